//! Two straight edges.

use super::Meeting;
use crate::Line;

/// Meetings of two straight edges.
pub(super) fn meetings(a: Line, b: Line, within: f64) -> Vec<Meeting> {
    let (along_a, along_b) = (a.chord(), b.chord());
    let across = along_a.perp_dot(along_b);
    let between = b.start - a.start;
    let (t_a, t_b) = (
        between.perp_dot(along_b) / across,
        between.perp_dot(along_a) / across,
    );
    let (slack_a, slack_b) = (within / along_a.length(), within / along_b.length());
    if t_a < -slack_a
        || t_a > 1.0 + slack_a
        || t_b < -slack_b
        || t_b > 1.0 + slack_b
        || across == 0.0
    {
        return Vec::new();
    }
    vec![Meeting::Point {
        t_a: t_a.clamp(0.0, 1.0),
        t_b: t_b.clamp(0.0, 1.0),
        point: a.point(t_a.clamp(0.0, 1.0)),
        crossing: t_a > slack_a && t_a < 1.0 - slack_a && t_b > slack_b && t_b < 1.0 - slack_b,
    }]
}
