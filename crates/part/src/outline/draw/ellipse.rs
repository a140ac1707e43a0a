//! `ellipse = "r"/"z"`: a quarter of an ellipse.

use super::{Drawn, Leg};
use crate::{Fault, Span};
use profile::{Arc, Edge, EllipseArc, left_of};
use std::f64::consts::FRAC_PI_2;

/// The quarter that leaves along r or along z. With equal half axes it is a quarter of a circle.
///
/// # Errors
/// One of the half axes is 0.
pub(super) fn quarter(leg: &Leg<'_>, leaves_along_r: bool, span: &Span) -> Result<Drawn, Fault> {
    let ellipse = EllipseArc::quarter(leg.start, leg.end, leaves_along_r);
    let chord = leg.chord().abs();
    if chord.min_element() <= leg.rounding {
        let unchanged = if chord.x <= leg.rounding { "r" } else { "z" };
        return Err(Fault::new(
            "step::ellipse_flat",
            format!(
                "the ellipse of {} has no width: {unchanged} does not change",
                leg.step.words
            ),
            span.clone(),
            "",
        )
        .help("a quarter of an ellipse goes to another d (or r) and to another z; leave `ellipse` out for a straight step"));
    }
    if (chord.x - chord.y).abs() <= leg.rounding {
        let leaves = ellipse.axis_b;
        let is_to_left = left_of(leaves).dot(leg.chord()) > 0.0;
        return Ok(Edge::Arc(Arc {
            start: leg.start,
            end: leg.end,
            sweep: if is_to_left { FRAC_PI_2 } else { -FRAC_PI_2 },
        })
        .into());
    }
    Ok(Edge::Ellipse(ellipse).into())
}
