//! Where an edge meets itself.

use super::graphs::{MOST_STRETCHES, piece_contacts};
use crate::foot::foot;
use crate::polynomial::sign_changes;
use crate::spiral::spirals;
use crate::{Bezier, Bounds, Edge, Parallel};

/// Parameters (t0 < t1) of the points that the edge passes twice, in order of t0: only a Bezier or a parallel curve can have
/// one. Of a straight Bezier that turns back, for each turn the ends of the stretch that is travelled twice.
///
/// # Accuracy
/// As of [`meetings`](super::meetings), within the rounding of the coordinates.
pub fn self_meetings(edge: &Edge) -> Vec<(f64, f64)> {
    match edge {
        Edge::Line(_) | Edge::Arc(_) | Edge::Ellipse(_) => Vec::new(),
        Edge::Bezier(bezier) => of_bezier(*bezier),
        Edge::Parallel(parallel) => of_parallel(*parallel),
    }
}

/// B(t0) = B(t1), divided by t1 - t0, is c1 + c2 (t0 + t1) + c3 (t0^2 + t0 t1 + t1^2) = 0, with B = c0 + c1 t + c2 t^2 + c3 t^3:
/// linear in the sum of the two and in their product.
fn of_bezier(bezier: Bezier) -> Vec<(f64, f64)> {
    let (c1, c2, c3) = (
        bezier.derivative(0.0),
        bezier.second_derivative(0.0) / 2.0,
        bezier.third_derivative() / 6.0,
    );
    let turn = c2.perp_dot(c3);
    // Straight, to rounding: all three along one direction.
    let size = c1.length().max(c2.length()).max(c3.length());
    let straight = |cross: f64| cross.abs() <= super::ROUNDING * size * size;
    if straight(turn) && straight(c1.perp_dot(c2)) && straight(c1.perp_dot(c3)) {
        return of_straight(bezier);
    }
    let sum = -c1.perp_dot(c3) / turn;
    let product = sum * sum + (c2 * sum + c1).dot(c3) / c3.length_squared();
    let quarter = 0.25 * sum * sum - product;
    if quarter.is_nan() || quarter <= 0.0 {
        return Vec::new();
    }
    let (t0, t1) = (0.5 * sum - quarter.sqrt(), 0.5 * sum + quarter.sqrt());
    if t0 >= 0.0 && t1 <= 1.0 {
        vec![(t0, t1)]
    } else {
        Vec::new()
    }
}

/// A straight Bezier travels a stretch twice on both sides of each point where it turns back.
fn of_straight(bezier: Bezier) -> Vec<(f64, f64)> {
    let knots = bezier.knots();
    let mut stops = vec![0.0];
    stops.extend(knots.into_iter().filter(|t| {
        let turns = |after| crate::spiral::sided(&Edge::Bezier(bezier), *t, after).0;
        turns(false).dot(turns(true)) < 0.0
    }));
    stops.push(1.0);
    stops
        .windows(3)
        .map(|around| {
            let points = [0, 1, 2].map(|i| bezier.point(around[i]));
            // The shorter of the two ways from the turn is travelled twice; the other's parameter at its end is sought.
            let direction = points[1] - points[0];
            let along = |point: glam::DVec2| (point - points[1]).dot(direction);
            let (back, forth) = (along(points[0]), along(points[2]));
            let [c1, c2, c3] = [
                bezier.derivative(0.0).dot(direction),
                bezier.second_derivative(0.0).dot(direction) / 2.0,
                bezier.third_derivative().dot(direction) / 6.0,
            ];
            let constant = along(bezier.point(0.0)) - back.max(forth);
            let level = [constant, c1, c2, c3];
            if back > forth {
                let other = sign_changes(&level, around[1], around[2]).first().copied();
                (around[0], other.unwrap_or(around[2]))
            } else {
                let other = sign_changes(&level, around[0], around[1]).first().copied();
                (other.unwrap_or(around[0]), around[2])
            }
        })
        .collect()
}

/// Spiral against spiral. A spiral does not meet itself (Kneser: its circles of curvature lie inside each other), nor its
/// neighbour: the two together turn by less than half a turn.
fn of_parallel(parallel: Parallel) -> Vec<(f64, f64)> {
    let edge = Edge::Parallel(parallel);
    let bounds = edge.bounds();
    if !bounds.size().is_finite() {
        return Vec::new();
    }
    let moved = edge.moved(-bounds.centre());
    let within = super::ROUNDING * Bounds::size(bounds).max_element();
    let pieces = spirals(&moved);
    let mut found = Vec::new();
    let mut left_over = MOST_STRETCHES;
    for (i, first) in pieces.iter().enumerate() {
        for second in pieces.iter().skip(i + 2) {
            let pair = [first, second];
            piece_contacts(
                &[moved, moved],
                pair,
                within,
                &mut left_over,
                &mut |t, _| {
                    found.push((t[0], t[1]));
                },
            );
        }
    }
    let cusps = parallel.cusps();
    found.retain(|(t0, t1)| {
        !stays(&edge, *t0, *t1, 4.0 * within) && !is_fold(&edge, *t0, *t1, &cusps, 4.0 * within)
    });
    found.sort_by(|p, q| p.0.total_cmp(&q.0));
    // The same point found from both sides of a cut.
    found.dedup_by(|q, p| {
        let near = edge.point(p.0).distance(edge.point(q.0)) <= 4.0 * within;
        near && (p.1 - q.1).abs() < 0.5 * (p.1 - p.0)
    });
    found
}

/// True where the edge does not leave its place from `t0` to `t1`: between two cuts that are one, to rounding.
fn stays(edge: &Edge, t0: f64, t1: f64, within: f64) -> bool {
    let place = edge.point(t0);
    [0.25, 0.5, 0.75, 1.0]
        .into_iter()
        .all(|share| edge.point(t0 + share * (t1 - t0)).distance(place) <= within)
}

/// True where the edge from `t0` to `t1` only runs to a cusp and back along itself, to rounding: at its tip a cusp is
/// thinner than that.
fn is_fold(edge: &Edge, t0: f64, t1: f64, cusps: &[f64], within: f64) -> bool {
    let mut between = cusps.iter().filter(|cusp| t0 < **cusp && **cusp < t1);
    let (Some(tip), None) = (between.next(), between.next()) else {
        return false;
    };
    [0.25, 0.5, 0.75].into_iter().all(|share| {
        let way_there = edge.point(t0 + share * (tip - t0));
        foot(edge, way_there, t1 + share * (tip - t1)).1 <= within
    })
}
