//! Where a step goes, and where a list of steps begins and ends.

use super::Use;
use super::point::{AXIAL, RADIAL};
use super::repeat::is_repeat;
use crate::fault::Found;
use crate::outline::{Coordinate, Corner, Kind, Step};
use crate::tree::{Fields, Value};
use crate::{Fault, Span};

/// Whether a step says where it goes, and not more than that.
pub(super) fn check_target(step: &Step, fields: &Fields<'_, '_>, found: &mut Found) {
    let r = fields.first_of(&RADIAL);
    let z = fields.first_of(&AXIAL);
    match (&step.kind, r, z) {
        (Kind::Sloped(_), Some(r), Some(z)) => {
            let slope = fields.first_of(&["taper", "angle"]);
            let (key, place) = slope.map_or(("taper", step.span.clone()), |entry| {
                (&*entry.key, entry.key_span())
            });
            found.push(
                Fault::new(
                    "step::slope_and_both",
                    format!("`{key}` gives the coordinate that is left out, and none is"),
                    place,
                    "",
                )
                .also(r.key_span(), "one coordinate")
                .also(z.key_span(), "the other")
                .help(format!("leave out `{}`, `{}` or `{key}`", r.key, z.key)),
            );
        }
        (Kind::Sloped(_), None, None) => {
            found.push(
                Fault::new(
                    "step::slope_alone",
                    "a slope alone does not say how far the step goes",
                    step.span.clone(),
                    "",
                )
                .help("give one coordinate; the slope gives the other"),
            );
        }
        (_, None, None) => {
            found.push(
                Fault::new(
                    "step::goes_nowhere",
                    "this step goes nowhere",
                    step.span.clone(),
                    "",
                )
                .help("give d or r, z, or an increment dd, dr, dz"),
            );
        }
        _ => {}
    }
}

/// Whether the steps begin and end as an outline or a line does.
pub(super) fn check_ends(
    steps: &[Step],
    items: &[Value<'_>],
    span: Span,
    purpose: Use,
    found: &mut Found,
) {
    let [first, others @ ..] = steps else {
        let code = "outline::empty";
        return found.push(
            Fault::new(code, "there are no steps here", span, "").help(
                "an outline is a list of steps: [ { d = 40, z = 0 }, { d = 60 }, { z = 12 } ]",
            ),
        );
    };
    check_first(first, items, found);
    let Some(last) = others.last() else {
        return found.push(
            Fault::new(
                "outline::one_step",
                "one step encloses nothing",
                first.span.clone(),
                "",
            )
            .help("the first step only says where the outline starts; add those that go on from there"),
        );
    };
    if purpose == Use::Wall {
        for (step, end) in [(first, "begins"), (last, "ends")] {
            if let Some(Corner::Round(_, span) | Corner::Chamfer(_, span)) = &step.corner {
                found.push(
                    Fault::new(
                        "wall::corner_at_end",
                        format!("where the line {end} there is no corner to round or chamfer"),
                        span.clone(),
                        "",
                    )
                    .help(
                        "leave round and chamfer out here: the wall's ends are square to its face",
                    ),
                );
            }
        }
        if first.name.is_some() {
            found.push(
                Fault::new(
                    "wall::name_at_start",
                    "the first step of a line draws no edge that could have a name",
                    first.span.clone(),
                    "",
                )
                .help("put the name on the step that arrives at the edge's end"),
            );
        }
    }
}

/// The first step says where the outline starts: both coordinates, no increments, no curve.
fn check_first(first: &Step, items: &[Value<'_>], found: &mut Found) {
    let help = "the first step gives both coordinates: { d = 40, z = 0 }";
    let coordinates = [("d or r", &first.to.r), ("z", &first.to.z)];
    for (key, coordinate) in coordinates {
        match coordinate {
            Some((Coordinate::At(_), _)) => {}
            Some((Coordinate::By(_), span)) => found.push(
                Fault::new(
                    "step::first_by_increment",
                    "the first step has no step before it to add an increment to",
                    span.clone(),
                    "",
                )
                .help(help),
            ),
            None => found.push(
                Fault::new(
                    "step::first_coordinate",
                    format!("the first step lacks {key}"),
                    first.span.clone(),
                    "",
                )
                .help(help),
            ),
        }
    }
    if first.kind != Kind::Line {
        // A repeat's first step stands inside it; the place is the step's all the same.
        let place = items
            .first()
            .filter(|item| !is_repeat(item))
            .map_or(first.span.clone(), Value::span);
        found.push(
            Fault::new(
                "step::first_kind",
                "the first step only says where the outline starts, so it has no curve or slope",
                place,
                "",
            )
            .help("put the curve on the step that arrives at its end; the last step runs straight back to the first"),
        );
    }
}
