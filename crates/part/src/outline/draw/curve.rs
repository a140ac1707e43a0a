//! `curve = [..]`: parabolas and cubics by their control points.

use super::{Drawn, Leg};
use crate::outline::step::Target;
use crate::{Fault, Span};
use glam::DVec2;
use profile::{Bezier, Edge};

/// The parabola whose end tangents meet in `control`.
///
/// # Errors
/// The control point makes it run to and fro on a straight line.
pub(super) fn parabola(leg: &Leg<'_>, control: &Target, span: &Span) -> Result<Drawn, Fault> {
    let control = leg.point(control);
    let curve = Bezier::parabola(leg.start, control, leg.end);
    if !leg.is_on_line(control) {
        return Ok(Edge::Bezier(curve).into());
    }
    let along = leg.along(control);
    if (0.0..=1.0).contains(&along) {
        Ok(leg.line())
    } else {
        Err(leg.turns_back(span))
    }
}

/// The cubic with two control points. One that ends where it starts is a loop, in two edges.
///
/// # Errors
/// The control points make it run to and fro on a straight line, or do not leave the start.
pub(super) fn cubic(leg: &Leg<'_>, controls: &[Target; 2], span: &Span) -> Result<Drawn, Fault> {
    let [first, second] = controls;
    let (first, second) = (leg.point(first), leg.point(second));
    let curve = Bezier {
        points: [leg.start, first, second, leg.end],
    };
    if leg.is_short(leg.start, leg.end) {
        if leg.is_short(leg.start, first) && leg.is_short(leg.start, second) {
            return Err(leg.no_length());
        }
        let closed = Bezier {
            points: [leg.start, first, second, leg.start],
        };
        let second = closed.part(0.5, 1.0);
        return Ok(Drawn {
            first: Edge::Bezier(closed.part(0.0, 0.5)).with_ends(leg.start, second.points[0]),
            second: Some(Edge::Bezier(second).with_ends(second.points[0], leg.end)),
        });
    }
    if !(leg.is_on_line(first) && leg.is_on_line(second)) {
        return Ok(Edge::Bezier(curve).into());
    }
    // Along the line the derivative's coefficients are a, b, c in Bernstein's form: never negative where a and c are
    // not and b is above minus the geometric mean of the two.
    let (first, second) = (leg.along(first), leg.along(second));
    let (a, b, c) = (first, second - first, 1.0 - second);
    if a >= 0.0 && c >= 0.0 && (b >= 0.0 || b * b <= a * c) {
        Ok(leg.line())
    } else {
        Err(leg.turns_back(span))
    }
}

impl Leg<'_> {
    /// True where `point` is on the straight line through the ends, up to rounding.
    fn is_on_line(&self, point: DVec2) -> bool {
        let chord = self.chord();
        let from_start = point - self.start;
        let reach = chord.length().max(from_start.length());
        chord.perp_dot(from_start).abs() <= 2.0 * self.rounding * reach
    }

    /// How far along the chord `point` is: 0 at the start, 1 at the end.
    fn along(&self, point: DVec2) -> f64 {
        let chord = self.chord();
        chord.dot(point - self.start) / chord.length_squared()
    }

    fn turns_back(&self, span: &Span) -> Fault {
        Fault::new(
            "step::curve_turns_back",
            format!(
                "the curve of {} runs to and fro on a straight line",
                self.step.words
            ),
            span.clone(),
            "on the line through the ends, and beyond one of them",
        )
        .help("move a control point aside, or leave `curve` out for a straight step")
    }
}
