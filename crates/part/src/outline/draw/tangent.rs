//! `tangent = true`: the arc that goes on smoothly.

use super::{Drawn, Leg, Turn};
use crate::{Fault, Span};

/// The arc that leaves along the direction in which the step before arrived; a line where the end lies straight ahead. A
/// corner that is treated there counts as untreated: its direction is that of the step as written.
///
/// # Errors
/// There is no step before, or the end lies straight behind.
pub(super) fn arc(leg: &Leg<'_>, span: &Span) -> Result<Drawn, Fault> {
    let Some(arriving) = leg.arriving else {
        return Err(Fault::new(
            "step::tangent_at_start",
            format!("{} has no edge before it to go on from", leg.step.words),
            span.clone(),
            "",
        )
        .help(
            "the first step draws nothing; give this arc a radius, a centre or a point on its way",
        ));
    };
    let chord = leg.chord();
    let turn = Turn::between(arriving, chord);
    let unsure = 4.0 * leg.rounding / chord.length();
    if turn.rest <= unsure {
        return Err(Fault::new(
            "step::tangent_straight_back",
            format!(
                "no arc goes on smoothly to {}: {} ends straight behind its start",
                leg.place(leg.end),
                leg.step.words
            ),
            span.clone(),
            "",
        )
        .help("move the end aside, or go there in two steps"));
    }
    if turn.angle <= unsure {
        return Ok(leg.line());
    }
    Ok(turn.arc(leg.start, leg.end))
}
