//! `arc = R`: through two points with a radius.

use super::{Drawn, Leg, Turn};
use crate::outline::rounding::ROUNDING;
use crate::outline::step::Side;
use crate::{Fault, Span};

/// The arc of `radius` whose centre is on the side `centre_on` of travel.
///
/// # Errors
/// The ends are farther apart than two radii.
pub(super) fn arc(
    leg: &Leg<'_>,
    radius: f64,
    centre_on: Side,
    long: bool,
    span: &Span,
) -> Result<Drawn, Fault> {
    let chord = leg.chord().length();
    let ratio = chord / (2.0 * radius);
    // Near half a turn the angle hangs on the root of what the chord lacks: one digit lost in the 16th place would be
    // eight digits of the angle. What differs from the diameter by rounding is meant to be it.
    let rounding = ROUNDING + leg.rounding / chord;
    let ratio = if (ratio - 1.0).abs() <= rounding {
        1.0
    } else {
        ratio
    };
    if ratio > 1.0 {
        let least = leg.wording.at_least(0.5 * chord);
        return Err(Fault::new(
            "step::arc_too_small",
            format!(
                "the arc of {} has too small a radius: its ends are {} apart, more than twice {}",
                leg.step.words,
                leg.wording.length(chord),
                leg.wording.length(radius)
            ),
            span.clone(),
            format!("at least {least}"),
        )
        .help(format!(
            "give a radius of {least} (half a turn) or more, or bring the ends nearer"
        )));
    }
    let turn = Turn::of_chord(ratio, long, centre_on == Side::Left);
    Ok(turn.arc(leg.start, leg.end))
}
