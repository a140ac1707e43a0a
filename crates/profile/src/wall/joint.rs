//! A corner of the face, seen from one side: how the two offset edges there are joined.

use crate::{Arc, DVec2, Edge, Line, Meeting, meetings, trig};
use std::f64::consts::{FRAC_PI_2, PI};

/// Below this angle (radians) two directions are one: a joint that is computed to be smooth is so to 1e-14 or so.
pub(super) const SMOOTH: f64 = 1e-9;

/// Edges on the outer side of a corner run on until they meet, if that is within this many times the offset from the
/// corner: up to an angle of 29 degrees between the edges. A sharper corner would grow a spike.
const LONGEST_MITRE: f64 = 4.0;

/// How two offset edges are joined. Parameters are those of the edges, beyond 0 to 1 where one runs on.
#[derive(Debug, Clone, Copy)]
pub(super) enum Joint {
    /// In one point: trimmed, run on, or as they are.
    Point {
        /// Parameter of the first edge.
        t_before: f64,
        /// Parameter of the second edge.
        t_after: f64,
        /// The point.
        point: DVec2,
    },
    /// By an arc about the corner, from the first edge's end to the second's start.
    Round(Arc),
    /// They do not meet where they should.
    None,
}

/// The joint of the offset edges `before` and `after` at a corner of the face where it turns by `turn` (to the left
/// positive); the offset is to the left by `distance`.
pub(super) fn joint(before: &Edge, after: &Edge, corner: DVec2, turn: f64, distance: f64) -> Joint {
    if turn.abs() < SMOOTH {
        Joint::Point {
            t_before: 1.0,
            t_after: 0.0,
            point: before.end().midpoint(after.start()),
        }
    } else if turn * distance > 0.0 {
        trimmed(before, after, corner)
    } else {
        mitred(before, after, corner, LONGEST_MITRE * distance.abs()).unwrap_or(Joint::Round(Arc {
            start: before.end(),
            end: after.start(),
            sweep: turn,
        }))
    }
}

/// On the inner side: where the edges meet, nearest the corner.
pub(super) fn trimmed(before: &Edge, after: &Edge, corner: DVec2) -> Joint {
    nearest_meeting(before, after, corner).map_or(Joint::None, |(t_before, t_after, point)| {
        Joint::Point {
            t_before,
            t_after,
            point,
        }
    })
}

/// On the outer side: where they meet when they run on, at most `reach` from the corner.
fn mitred(before: &Edge, after: &Edge, corner: DVec2, reach: f64) -> Option<Joint> {
    let (beyond_before, scale_before) = run_on(before, reach)?;
    let (beyond_after, scale_after) = run_on(&after.reversed(), reach)?;
    let (t, s, point) = nearest_meeting(&beyond_before, &beyond_after, corner)?;
    (point.distance(corner) <= reach).then_some(Joint::Point {
        t_before: 1.0 + t * scale_before,
        t_after: -s * scale_after,
        point,
    })
}

/// What follows a straight or circular edge if it runs on by at least `reach`, and the parameter of that edge that one
/// unit of the new one's is worth.
pub(super) fn run_on(edge: &Edge, reach: f64) -> Option<(Edge, f64)> {
    match *edge {
        Edge::Line(line) => {
            let length = line.chord().length();
            let end = line.end + line.chord() * (reach / length);
            Some((Edge::line(line.end, end), reach / length))
        }
        Edge::Arc(arc) => {
            // An arc of at most half a turn is at most pi/2 times as long as its chord.
            let sweep = (FRAC_PI_2 * reach / arc.radius())
                .min(PI)
                .copysign(arc.sweep);
            let scale = sweep / arc.sweep;
            let beyond = Arc {
                start: arc.end,
                end: arc.point(1.0 + scale),
                sweep,
            };
            Some((Edge::Arc(beyond), scale))
        }
        Edge::Ellipse(_) | Edge::Bezier(_) | Edge::Parallel(_) => None,
    }
}

/// Parameters and point of the meeting that is nearest to the corner.
fn nearest_meeting(before: &Edge, after: &Edge, corner: DVec2) -> Option<(f64, f64, DVec2)> {
    meetings(before, after, 0.0)
        .into_iter()
        .map(|meeting| match meeting {
            Meeting::Point {
                t_a, t_b, point, ..
            } => (t_a, t_b, point),
            Meeting::Overlap { a, b } => (a[1], b[1], before.point(a[1])),
        })
        .min_by(|p, q| {
            let distance = |found: &(f64, f64, DVec2)| found.2.distance_squared(corner);
            distance(p).total_cmp(&distance(q))
        })
}

/// The edge from `from` to `to` (parameters, beyond 0 to 1 where it runs on) with these ends; an arc of more than half a
/// turn in two.
pub(super) fn cut(edge: &Edge, from: (f64, DVec2), to: (f64, DVec2)) -> Vec<Edge> {
    let (start, end) = (from.1, to.1);
    match *edge {
        Edge::Line(_) => vec![Edge::Line(Line { start, end })],
        Edge::Arc(arc) if (arc.sweep * (to.0 - from.0)).abs() > PI => {
            let middle = 0.5 * (from.0 + to.0);
            let between = arc.point(middle);
            vec![
                Edge::Arc(arc.part(from.0, middle)).with_ends(start, between),
                Edge::Arc(arc.part(middle, to.0)).with_ends(between, end),
            ]
        }
        _ if from.0 == 0.0 && to.0 == 1.0 => vec![edge.with_ends(start, end)],
        _ => vec![edge.part(from.0, to.0).with_ends(start, end)],
    }
}

/// Angle by which the face turns from one edge to the next, positive to the left.
pub(super) fn turn(before: &Edge, after: &Edge) -> f64 {
    trig::angle_between(before.tangent(1.0), after.tangent(0.0))
}
