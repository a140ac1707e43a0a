//! A whole circle: a ring of round wire, a torus.

use super::Built;
use super::draw::half_circle_from;
use super::origins::Origins;
use super::rounding::{ROUNDING, on_axis};
use super::settle::settled;
use super::wording::Wording;
use crate::{Fault, Span};
use glam::DVec2;

/// The circle about (`r`, `z`), in two half turns. It may touch the axis.
pub(super) fn circle(
    [r, z]: [f64; 2],
    radius: f64,
    span: &Span,
    prefix: &str,
    wording: Wording,
    faults: &mut Vec<Fault>,
) -> Option<Built> {
    let mut refuse = |code, message: String, help: &str| {
        faults.push(Fault::new(code, message, span.clone(), "").help(help));
        None
    };
    let inner = on_axis(r - radius, ROUNDING * radius);
    if inner < 0.0 {
        return refuse(
            "circle::past_axis",
            format!(
                "the circle's radius of {} reaches past the axis, to r = {}",
                wording.length(radius),
                wording.length(inner)
            ),
            "a ring's centre is at least one radius from the axis; a ball is half a circle: [ { r = 0, z = 0 }, { z = 24, arc = 12, centre_on = \"left\" } ]",
        );
    }
    let (inner, outer) = (DVec2::new(inner, z), DVec2::new(r + radius, z));
    if inner == outer {
        return refuse(
            "circle::too_small",
            format!(
                "the circle's radius of {} is less than the rounding of r = {}",
                wording.length(radius),
                wording.length(r)
            ),
            "look at the unit and at the powers of ten",
        );
    }
    let mut origins = Origins::new(prefix);
    let tag = origins.add(None, "the circle", span.clone());
    let edges = vec![
        (half_circle_from(outer, inner), tag),
        (half_circle_from(inner, outer), tag),
    ];
    settled(edges, origins, span, faults)
}
