//! Fillets: the circle that touches both edges.

use super::largest::largest;
use super::{CornerFault, Cut, SMOOTH, Treated, rounding, turn};
use crate::{Arc, DVec2, Edge, Line, Meeting, meetings, trig};

/// Rounds the corner where `before` ends and `after` starts with a fillet of `radius`: the circle that touches both edges
/// on the inner side of the turn, nearest the corner.
///
/// # Errors
/// [`CornerFault::NotALength`], [`CornerFault::NoCorner`], [`CornerFault::TurnsBack`] as they say;
/// [`CornerFault::TooLarge`] where the circle does not touch both edges between their ends. `largest` is a closed form
/// between straight edges, found by halving to ten digits otherwise.
///
/// # Accuracy
/// The points of contact are right to a few roundings of the coordinates, the angle turned through to that divided by
/// the radius.
pub fn round_corner(before: &Edge, after: &Edge, radius: f64) -> Result<Treated, CornerFault> {
    if !(radius > 0.0 && radius.is_finite()) {
        return Err(CornerFault::NotALength);
    }
    let turn = turn(before, after)?;
    let fillet = if let (Edge::Line(before), Edge::Line(after)) = (before, after) {
        between_lines(*before, *after, turn, radius)?
    } else {
        between_curves(before, after, turn, radius)?
    };
    Ok(fillet.cut.treat(before, after, |start, end| {
        Edge::Arc(Arc {
            start,
            end,
            sweep: fillet.sweep,
        })
    }))
}

/// A fillet: what it takes of its edges, and its angle.
#[derive(Debug, Clone, Copy)]
struct Fillet {
    cut: Cut,
    sweep: f64,
}

/// The legs from the corner to the points of contact are radius * tan(turn / 2).
fn between_lines(before: Line, after: Line, turn: f64, radius: f64) -> Result<Fillet, CornerFault> {
    let corner = before.end;
    let (chord_before, chord_after) = (before.chord(), after.chord());
    let (length_before, length_after) = (chord_before.length(), chord_after.length());
    let leg_of_radius = trig::tan(0.5 * turn.abs());
    let leg = radius * leg_of_radius;
    let slack = rounding(&Edge::Line(before), &Edge::Line(after));
    let (on_before, on_after) = (leg > length_before + slack, leg > length_after + slack);
    if on_before || on_after {
        return Err(CornerFault::TooLarge {
            largest: Some(length_before.min(length_after) / leg_of_radius),
            on_before,
            on_after,
        });
    }
    // The share of an edge that is taken, all of it where only rounding would be left.
    let share = |length: f64| {
        if leg >= length - slack {
            1.0
        } else {
            leg / length
        }
    };
    let (share_before, share_after) = (share(length_before), share(length_after));
    Ok(Fillet {
        cut: Cut {
            before: (1.0 - share_before, corner - share_before * chord_before),
            after: (share_after, corner + share_after * chord_after),
        },
        sweep: turn,
    })
}

fn between_curves(
    before: &Edge,
    after: &Edge,
    turn: f64,
    radius: f64,
) -> Result<Fillet, CornerFault> {
    // About the corner, so that a small fillet keeps its digits.
    let corner = before.end();
    let slack = rounding(before, after);
    let (moved_before, moved_after) = (before.moved(-corner), after.moved(-corner));
    let fit = |radius: f64| touching(&moved_before, &moved_after, turn, radius, slack);
    if let Some(mut fillet) = fit(radius) {
        fillet.cut.before.1 += corner;
        fillet.cut.after.1 += corner;
        return Ok(fillet);
    }
    // A circle whose legs, by the angle at the corner, are much longer than the edges will not fit.
    let longest = before.chord().length().max(after.chord().length());
    let hopeless = HOPELESS * longest / trig::tan(0.5 * turn.abs());
    let best = largest(radius.min(hopeless), fit);
    // The edge of which the largest fillet leaves nothing is the one that is too short. Where it leaves some of both,
    // one is too sharply curved for more.
    let left_over = best.map(|(_, fillet)| (fillet.cut.before.0, 1.0 - fillet.cut.after.0));
    let (on_before, on_after) = match left_over {
        Some((of_before, of_after)) if of_before.min(of_after) < USED_UP => {
            (of_before < USED_UP, of_after < USED_UP)
        }
        _ => {
            let signed = radius.copysign(turn);
            let too_curved = |edge: &Edge| !runs_forward(edge, signed);
            match (too_curved(before), too_curved(after)) {
                (false, false) => (true, true),
                told => told,
            }
        }
    };
    Err(CornerFault::TooLarge {
        largest: best.map(|(radius, _)| radius),
        on_before,
        on_after,
    })
}

/// A fillet is not looked for where its legs between straight edges would be this many times as long as the longer edge's
/// chord: no bend of the edges makes up for that.
const HOPELESS: f64 = 64.0;

/// Less than this part of an edge beyond the largest fillet, which is known to ten digits, is nothing.
const USED_UP: f64 = 1e-6;

/// True where the curve at this signed distance from the edge runs forward all along it.
fn runs_forward(edge: &Edge, distance: f64) -> bool {
    match edge.offset(distance) {
        Some(Edge::Parallel(parallel)) => parallel.least_speed_ratio().0 > 0.0,
        Some(_) => true,
        None => false,
    }
}

/// The fillet of two edges whose corner is the origin, if it fits: its centre is where the curves at its radius from
/// them meet, nearest the corner.
fn touching(before: &Edge, after: &Edge, turn: f64, radius: f64, slack: f64) -> Option<Fillet> {
    let signed = radius.copysign(turn);
    let (beside_before, beside_after) = (before.offset(signed)?, after.offset(signed)?);
    let centres = meetings(&beside_before, &beside_after, slack);
    let candidates = centres.into_iter().map(|meeting| match meeting {
        Meeting::Point {
            t_a, t_b, point, ..
        } => (t_a, t_b, point),
        Meeting::Overlap { a, b } => (a[1], b[1], beside_before.point(a[1])),
    });
    candidates
        .filter_map(|(t_before, t_after, centre)| {
            // Where a curve is more sharply bent than the fillet, the circle would lie across it.
            let lies_inside = |edge: &Edge, t: f64| edge.curvature(t) * signed < 1.0;
            if t_before == 1.0
                || t_after == 0.0
                || !lies_inside(before, t_before)
                || !lies_inside(after, t_after)
            {
                return None;
            }
            let sweep = trig::angle_between(before.tangent(t_before), after.tangent(t_after));
            (sweep * turn > 0.0 && sweep.abs() > SMOOTH).then_some((
                centre.length_squared(),
                Fillet {
                    cut: Cut {
                        before: (t_before, contact(before, t_before, signed, centre)),
                        after: (t_after, contact(after, t_after, signed, centre)),
                    },
                    sweep,
                },
            ))
        })
        .min_by(|a, b| a.0.total_cmp(&b.0))
        .map(|(_, fillet)| fillet)
}

/// The foot of the fillet's centre on the edge.
fn contact(edge: &Edge, t: f64, signed: f64, centre: DVec2) -> DVec2 {
    centre - crate::left_of(edge.tangent(t)) * signed
}
