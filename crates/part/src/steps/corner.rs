//! What is done to the corner where a step arrives.

use crate::Fault;
use crate::fault::Found;
use crate::outline::Corner;
use crate::tree::{Fields, Kind, Value};
use crate::values::Values;

/// What is done to the corner: `None` where that has a fault, `Some(None)` where it stays sharp.
#[expect(clippy::option_option, reason = "wrong and sharp are two things")]
pub(super) fn corner(
    fields: &Fields<'_, '_>,
    values: &Values<'_>,
    found: &mut Found,
) -> Option<Option<Corner>> {
    match (fields.get("round"), fields.get("chamfer")) {
        (None, None) => Some(None),
        (Some(round), Some(chamfer)) => {
            found.push(
                Fault::new(
                    "step::round_and_chamfer",
                    "a corner is rounded or chamfered, not both",
                    chamfer.key_span(),
                    "",
                )
                .also(round.key_span(), "")
                .help("keep one of them"),
            );
            None
        }
        (Some(round), None) => {
            let radius = cut(&round.value, "`round`", values, found)?;
            Some((radius > 0.0).then(|| Corner::Round(radius, round.value.span())))
        }
        (None, Some(chamfer)) => {
            let span = chamfer.value.span();
            let legs = match &chamfer.value.kind {
                Kind::List(list) => match list.items.as_slice() {
                    [before, after] => {
                        let before = cut(before, "the leg before the corner", values, found);
                        let after = cut(after, "the leg after the corner", values, found);
                        [before?, after?]
                    }
                    items => {
                        found.push(
                            Fault::new(
                                "step::chamfer_legs",
                                format!("a chamfer has two legs, not {}", items.len()),
                                span,
                                "",
                            )
                            .help("write chamfer = 2 for equal legs, or [before, after]"),
                        );
                        return None;
                    }
                },
                _ => [cut(&chamfer.value, "`chamfer`", values, found)?; 2],
            };
            if (legs[0] > 0.0) != (legs[1] > 0.0) {
                found.push(
                    Fault::new(
                        "step::chamfer_legs",
                        "one leg of this chamfer is 0",
                        span,
                        "",
                    )
                    .help("give both legs, or none"),
                );
                return None;
            }
            Some((legs[0] > 0.0).then_some(Corner::Chamfer(legs, span)))
        }
    }
}

/// The size of a corner's treatment. 0 leaves it sharp, so that a size can switch it off.
fn cut(value: &Value<'_>, what: &str, values: &Values<'_>, found: &mut Found) -> Option<f64> {
    let length = values.length(value, what, found)?;
    if length < 0.0 {
        found.push(
            Fault::new(
                "step::negative_corner",
                format!("{what} is negative"),
                value.span(),
                "",
            )
            .help("the material decides whether a corner is rounded outward or inward; leave the sign out"),
        );
        return None;
    }
    Some(length)
}
