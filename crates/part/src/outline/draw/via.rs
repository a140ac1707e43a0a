//! `via = {..}`: the arc through three points.

use super::{Drawn, Leg, Turn};
use crate::outline::step::Target;
use crate::{Fault, Span};

/// The arc through `via`.
///
/// # Errors
/// The three points are on a line, or two of them are the same.
pub(super) fn arc(leg: &Leg<'_>, via: &Target, span: &Span) -> Result<Drawn, Fault> {
    let via = leg.point(via);
    let fault = |code, message, help: &str| {
        Err(Fault::new(code, message, span.clone(), leg.place(via)).help(help))
    };
    for (end, words) in [(leg.start, "starts"), (leg.end, "ends")] {
        if leg.is_short(via, end) {
            let message = format!("`via` is the point where {} {words}", leg.step.words);
            let help = "give a third point, best near the middle of the arc";
            return fault("step::via_at_end", message, help);
        }
    }
    let (to, from) = (via - leg.start, leg.end - via);
    let turn = Turn::between(to, from);
    // Each point is as sure as its rounding, so each chord's direction as sure as that over its length.
    let unsure = 4.0 * leg.rounding / to.length().min(from.length());
    if turn.angle.min(turn.rest) <= unsure {
        let message = format!(
            "`via` lies on the straight line through the ends of {}",
            leg.step.words
        );
        let help =
            "leave `via` out for a straight step, or move it to the side that the arc bends to";
        return fault("step::via_in_line", message, help);
    }
    Ok(turn.arc(leg.start, leg.end))
}
