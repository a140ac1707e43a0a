//! Chamfers: a straight cut across the corner.

use super::largest::largest;
use super::{CornerFault, Cut, Treated, rounding, turn};
use crate::{Arc, Edge, Meeting, meetings, trig};
use glam::DVec2;
use std::f64::consts::PI;

/// Cuts the corner where `before` ends and `after` starts by a straight chamfer. A leg is the straight distance from the
/// corner to the chamfer's end, on curved edges too: what a slide gauge shows.
///
/// # Errors
/// [`CornerFault::NotALength`], [`CornerFault::NoCorner`], [`CornerFault::TurnsBack`] as they say;
/// [`CornerFault::TooLarge`] where an edge has no point at its leg's distance from the corner.
///
/// # Accuracy
/// The chamfer's ends are right to a few roundings of the coordinates.
pub fn chamfer_corner(
    before: &Edge,
    after: &Edge,
    leg_before: f64,
    leg_after: f64,
) -> Result<Treated, CornerFault> {
    for leg in [leg_before, leg_after] {
        if !(leg > 0.0 && leg.is_finite()) {
            return Err(CornerFault::NotALength);
        }
    }
    turn(before, after)?;
    // About the corner, and away from it.
    let corner = before.end();
    let slack = rounding(before, after);
    let back = before.moved(-corner).reversed();
    let forth = after.moved(-corner);
    let on_back = at_distance(&back, leg_before, slack);
    let on_forth = at_distance(&forth, leg_after, slack);
    let (Some((t_back, start)), Some((t_forth, end))) = (on_back, on_forth) else {
        let limits = [
            (on_back.is_none(), &back, leg_before),
            (on_forth.is_none(), &forth, leg_after),
        ];
        let limit = limits
            .into_iter()
            .filter(|(too_short, ..)| *too_short)
            .filter_map(|(_, edge, leg)| largest_leg(edge, leg, slack))
            .min_by(f64::total_cmp);
        return Err(CornerFault::TooLarge {
            largest: limit,
            on_before: on_back.is_none(),
            on_after: on_forth.is_none(),
        });
    };
    let cut = Cut {
        before: (1.0 - t_back, start + corner),
        after: (t_forth, end + corner),
    };
    Ok(cut.treat(before, after, Edge::line))
}

/// Parameter and point of an edge that starts at the origin, where it first is this far from there; the end where that
/// is as far to rounding.
fn at_distance(edge: &Edge, distance: f64, slack: f64) -> Option<(f64, DVec2)> {
    let far = edge.chord().length();
    match edge {
        // Along a line, and along an arc of at most half a turn, the distance only grows.
        Edge::Line(_) | Edge::Arc(_) if distance > far + slack => None,
        Edge::Line(_) | Edge::Arc(_) if distance >= far - slack => Some((1.0, edge.end())),
        Edge::Line(line) => Some((distance / far, line.chord() * (distance / far))),
        Edge::Arc(arc) => {
            // The chord of the part from 0 to t is sin(t sweep / 2) / sin(sweep / 2) of the whole chord.
            let half = 0.5 * arc.sweep.abs();
            let t = trig::asin(distance / far * trig::sin(half)) / half;
            Some((t, arc.point(t)))
        }
        Edge::Ellipse(_) | Edge::Bezier(_) | Edge::Parallel(_) => {
            let half_turns = [distance, -distance].map(|x| {
                Edge::Arc(Arc {
                    start: DVec2::new(x, 0.0),
                    end: DVec2::new(-x, 0.0),
                    sweep: PI,
                })
            });
            half_turns
                .iter()
                .flat_map(|half_turn| meetings(edge, half_turn, slack))
                .map(|meeting| match meeting {
                    Meeting::Point { t_a, point, .. } => (t_a, point),
                    Meeting::Overlap { a, .. } => (a[0], edge.point(a[0])),
                })
                .min_by(|a, b| a.0.total_cmp(&b.0))
        }
    }
}

/// The largest leg that an edge from the origin has, to ten digits from below where it is not a straight or circular one.
fn largest_leg(edge: &Edge, too_large: f64, slack: f64) -> Option<f64> {
    match edge {
        Edge::Line(_) | Edge::Arc(_) => Some(edge.chord().length()),
        Edge::Ellipse(_) | Edge::Bezier(_) | Edge::Parallel(_) => {
            largest(too_large, |leg| at_distance(edge, leg, slack)).map(|(leg, _)| leg)
        }
    }
}
