//! A box that an edge does not leave, had for next to nothing.

use crate::{Base, Bounds, Edge};
use std::f64::consts::FRAC_2_PI;

/// A box that holds the edge, not always the least one.
pub(super) fn reach(edge: &Edge) -> Bounds {
    match edge {
        Edge::Line(line) => line.bounds(),
        Edge::Arc(arc) => {
            // The sagitta is half the chord times tan(sweep / 4): a convex function, 0 at 0 and 1 at half a turn.
            let share = 0.5 * arc.sweep.abs() * FRAC_2_PI;
            Bounds::of_corners(arc.start, arc.end).grown(0.5 * arc.chord().length() * share)
        }
        Edge::Ellipse(ellipse) => ellipse.bounds(),
        Edge::Bezier(bezier) => {
            let [a, b, c, d] = bezier.points;
            Bounds::of_corners(a, d).with(b).with(c)
        }
        Edge::Parallel(parallel) => {
            let base = match parallel.base {
                Base::Ellipse(ellipse) => Edge::Ellipse(ellipse),
                Base::Bezier(bezier) => Edge::Bezier(bezier),
            };
            reach(&base)
                .grown(parallel.distance.abs())
                .with(parallel.start)
                .with(parallel.end)
        }
    }
}
