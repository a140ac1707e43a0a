//! Known answers, coincident edges, and random edges against brute force.

mod hostile;
mod known;
mod overlaps;
mod random;
mod two_ways;

use super::Meeting;
use crate::{Arc, Base, Bezier, Edge, EllipseArc, Parallel, trig};
use glam::DVec2;

pub(super) const WITHIN: f64 = 1e-12;

pub(super) fn v(x: f64, y: f64) -> DVec2 {
    DVec2::new(x, y)
}

pub(super) fn line(a: (f64, f64), b: (f64, f64)) -> Edge {
    Edge::line(v(a.0, a.1), v(b.0, b.1))
}

/// Arc about `centre`, from an angle (degrees) through an angle.
pub(super) fn arc(centre: (f64, f64), radius: f64, from: f64, through: f64) -> Edge {
    let at = |degrees: f64| v(centre.0, centre.1) + trig::direction(degrees.to_radians()) * radius;
    Edge::Arc(Arc {
        start: at(from),
        end: at(from + through),
        sweep: through.to_radians(),
    })
}

/// Ellipse about `centre` with these half axes, the first one turned from the r axis, angles in degrees.
pub(super) fn ellipse(
    centre: (f64, f64),
    axes: (f64, f64),
    turned: f64,
    from: f64,
    through: f64,
) -> Edge {
    let u = trig::direction(turned.to_radians());
    let (axis_a, axis_b) = (u * axes.0, crate::left_of(u) * axes.1);
    let at = |degrees: f64| {
        let (s, c) = trig::sin_cos(degrees.to_radians());
        v(centre.0, centre.1) + c * axis_a + s * axis_b
    };
    Edge::Ellipse(EllipseArc {
        start: at(from),
        end: at(from + through),
        axis_a,
        axis_b,
        from: from.to_radians(),
        sweep: through.to_radians(),
    })
}

pub(super) fn bezier(points: [(f64, f64); 4]) -> Edge {
    Edge::Bezier(Bezier {
        points: points.map(|(x, y)| v(x, y)),
    })
}

pub(super) fn parallel(base: &Edge, distance: f64) -> Edge {
    Edge::Parallel(Parallel::new(
        match *base {
            Edge::Ellipse(ellipse) => Base::Ellipse(ellipse),
            Edge::Bezier(bezier) => Base::Bezier(bezier),
            _ => panic!("only these have a parallel curve of its own kind"),
        },
        distance,
    ))
}

/// The points and whether they cross; panics on an overlap.
pub(super) fn points(meetings: &[Meeting]) -> Vec<(DVec2, bool)> {
    meetings
        .iter()
        .map(|meeting| match *meeting {
            Meeting::Point {
                point, crossing, ..
            } => (point, crossing),
            Meeting::Overlap { .. } => panic!("{meetings:?}"),
        })
        .collect()
}

/// Asserts that the edges meet in exactly these points, in any order, with this accuracy, whichever comes first.
pub(super) fn assert_meet(a: &Edge, b: &Edge, expected: &[(DVec2, bool)], accuracy: f64) {
    for (first, second) in [(a, b), (b, a)] {
        let meetings = super::meetings(first, second, WITHIN);
        let found = points(&meetings);
        assert_eq!(
            found.len(),
            expected.len(),
            "{first:?}\n{second:?}\n{found:?}\nexpected {expected:?}"
        );
        for (point, crossing) in expected {
            assert!(
                found
                    .iter()
                    .any(|(p, c)| p.distance(*point) <= accuracy && c == crossing),
                "{point} {crossing} not in {found:?}"
            );
        }
        for meeting in &meetings {
            if let Meeting::Point { t_a, t_b, .. } = *meeting {
                let apart = first.point(t_a).distance(second.point(t_b));
                assert!(apart <= accuracy.max(WITHIN), "{meeting:?} {apart:e}");
            }
        }
    }
}
