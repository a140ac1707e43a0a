//! How a step gets to its target.

use super::point::point;
use crate::fault::Found;
use crate::outline::{Centre, Kind, Side, Slope};
use crate::tree::{Entry, Fields, Kind as ValueKind, Value};
use crate::values::{Values, written_of};
use crate::{Fault, nearest};

/// Keys of which a step has one at most.
const KINDS: [&str; 8] = [
    "taper", "angle", "arc", "via", "centre", "tangent", "ellipse", "curve",
];

/// How the step gets to its target; `None` where that has a fault.
pub(crate) fn kind(
    fields: &Fields<'_, '_>,
    values: &Values<'_>,
    found: &mut Found,
) -> Option<Kind> {
    let mut given: Vec<&Entry<'_>> = KINDS
        .iter()
        .filter_map(|key| fields.get(key))
        .filter(|entry| !is_false_tangent(entry))
        .collect();
    given.sort_by_key(|entry| entry.key_span().start);
    if let [first, second, ..] = given.as_slice() {
        found.push(
            Fault::new(
                "step::two_kinds",
                format!("a step has `{}` or `{}`, not both", first.key, second.key),
                second.key_span(),
                "the second",
            )
            .also(first.key_span(), "the first")
            .help("keep one of them"),
        );
        return None;
    }
    let entry = given.first().copied();
    check_companions(fields, entry, found);
    let Some(entry) = entry else {
        return match fields.get("tangent") {
            Some(entry) => {
                entry.value.boolean("`tangent`", found)?;
                Some(Kind::Line)
            }
            None => Some(Kind::Line),
        };
    };
    let value = &entry.value;
    let span = value.span();
    match &*entry.key {
        "taper" => {
            let rate = taper(value, values, found)?;
            Some(Kind::Sloped(Slope::Taper(rate, span)))
        }
        "angle" => {
            let degrees = values.degrees(value, "`angle`", found)?;
            if degrees.abs() > 90.0 {
                found.push(
                    Fault::new(
                        "step::angle_range",
                        "an angle from the axis is between -90 and 90 degrees",
                        span,
                        "",
                    )
                    .help("the sign says outward or inward; the coordinate says which way along the axis"),
                );
                return None;
            }
            Some(Kind::Sloped(Slope::Angle(degrees.to_radians(), span)))
        }
        "arc" => arc(entry, fields, values, found),
        "via" => Some(Kind::Via(point(value, values, found)?, span)),
        "centre" => {
            let at = point(value, values, found)?;
            Some(Kind::About(Centre {
                at,
                centre_on: centre_on(fields, found)?,
                long: long(fields, found)?,
                span,
            }))
        }
        "tangent" => {
            value.boolean("`tangent`", found)?;
            Some(Kind::Tangent(span))
        }
        "ellipse" => {
            let leaves_along_r = match value.text("`ellipse`", found)? {
                "r" => true,
                "z" => false,
                other => {
                    found.push(
                        Fault::new(
                            "step::ellipse",
                            format!(
                                "an ellipse leaves along \"r\" or along \"z\", not `{}`",
                                nearest::shown(other)
                            ),
                            span,
                            "",
                        )
                        .help("\"r\" leaves square to the axis, \"z\" along it"),
                    );
                    return None;
                }
            };
            Some(Kind::Ellipse {
                leaves_along_r,
                span,
            })
        }
        _ => curve(value, values, found),
    }
}

fn is_false_tangent(entry: &Entry<'_>) -> bool {
    entry.key == "tangent" && matches!(entry.value.kind, ValueKind::Boolean(false))
}

/// `centre_on` and `long` belong to an arc.
fn check_companions(fields: &Fields<'_, '_>, kind: Option<&Entry<'_>>, found: &mut Found) {
    let of_arc = kind.is_some_and(|entry| matches!(&*entry.key, "arc" | "centre"));
    if of_arc {
        return;
    }
    for key in ["centre_on", "long"] {
        let Some(entry) = fields.get(key) else {
            continue;
        };
        if matches!(entry.value.kind, ValueKind::Boolean(false)) {
            continue;
        }
        let help = match kind {
            Some(kind) => format!("`{}` needs no `{key}`; leave it out", kind.key),
            None => "give the arc's radius (arc = 40) or its centre".to_owned(),
        };
        found.push(
            Fault::new(
                "step::not_an_arc",
                format!("`{key}` belongs to `arc` or `centre`"),
                entry.key_span(),
                "",
            )
            .help(help),
        );
    }
}

fn arc(
    entry: &Entry<'_>,
    fields: &Fields<'_, '_>,
    values: &Values<'_>,
    found: &mut Found,
) -> Option<Kind> {
    let radius = values.length(&entry.value, "`arc`", found);
    let span = entry.value.span();
    if radius.is_some_and(|radius| radius <= 0.0) {
        found.push(
            Fault::new(
                "step::arc_radius",
                "an arc's radius is more than 0",
                span,
                "",
            )
            .help("the side of its centre is said by centre_on, not by a sign"),
        );
        return None;
    }
    let side = centre_on(fields, found);
    let long = long(fields, found);
    let (radius, side, long) = (radius?, side?, long?);
    let Some(centre_on) = side else {
        if fields.slipped(&["centre_on"]) {
            return None;
        }
        found.push(
            Fault::new(
                "step::centre_on_missing",
                "an arc of a given radius can bend to either side",
                entry.key_span(),
                "",
            )
            .help(
                "add centre_on = \"left\" or \"right\": the side of travel on which the centre is",
            ),
        );
        return None;
    };
    Some(Kind::Arc {
        radius,
        centre_on,
        long,
        span,
    })
}

/// The side of the centre: `None` where it is wrong, `Some(None)` where it is not given.
#[expect(clippy::option_option, reason = "wrong and left out are two things")]
fn centre_on(fields: &Fields<'_, '_>, found: &mut Found) -> Option<Option<Side>> {
    let Some(entry) = fields.get("centre_on") else {
        return Some(None);
    };
    let text = entry.value.text("`centre_on`", found)?;
    let side = side(text);
    if side.is_none() {
        found.push(nearest::unknown_word(
            "step::side",
            "side",
            text,
            entry.value.span(),
            &["left", "right"],
        ));
    }
    Some(Some(side?))
}

/// The side called `word`.
pub(crate) fn side(word: &str) -> Option<Side> {
    match word {
        "left" => Some(Side::Left),
        "right" => Some(Side::Right),
        _ => None,
    }
}

fn long(fields: &Fields<'_, '_>, found: &mut Found) -> Option<bool> {
    match fields.get("long") {
        Some(entry) => entry.value.boolean("`long`", found),
        None => Some(false),
    }
}

/// A rate of taper: `"1:20"`, or the change of diameter over length as a number.
fn taper(value: &Value<'_>, values: &Values<'_>, found: &mut Found) -> Option<f64> {
    if let ValueKind::String(text) = &value.kind
        && let Some((change, _)) = text.split_once(':')
    {
        let written = written_of(value, text, values.text);
        let change_part = written.part(0..change.len());
        let length_part = written.part(change.len() + 1..text.len());
        let change = values.expression(&change_part, found);
        let length = values.expression(&length_part, found);
        let (change, length) = (change?, length?);
        if length.value <= 0.0 {
            found.push(
                Fault::new(
                    "step::taper",
                    "the length of a taper is more than 0",
                    length_part.whole(),
                    "",
                )
                .help("a taper is change of diameter : length, as \"1:20\"; the sign stands before the 1"),
            );
            return None;
        }
        let alike = change.is_bare() || length.is_bare() || change.dimension == length.dimension;
        if !alike {
            found.push(
                Fault::new(
                    "step::taper",
                    "a taper is a length over a length, or a plain ratio",
                    value.span(),
                    "",
                )
                .help("write change of diameter : length, as \"1:20\""),
            );
            return None;
        }
        return Some(change.value / length.value);
    }
    if let ValueKind::String(text) = &value.kind
        && let Some((change, length)) = text.split_once(" in ")
    {
        found.push(
            Fault::new(
                "step::taper",
                "a taper is written with a colon",
                value.span(),
                "",
            )
            .help(format!("write \"{}:{}\"", change.trim(), length.trim())),
        );
        return None;
    }
    values.number(value, "`taper`", found)
}

fn curve(value: &Value<'_>, values: &Values<'_>, found: &mut Found) -> Option<Kind> {
    let span = value.span();
    match value.list("`curve`", found)? {
        [control] => Some(Kind::Parabola(point(control, values, found)?, span)),
        [first, second] => {
            let first = point(first, values, found);
            let second = point(second, values, found);
            Some(Kind::Cubic([first?, second?], span))
        }
        points => {
            found.push(
                Fault::new(
                    "step::curve_points",
                    format!("a curve has one or two control points, not {}", points.len()),
                    span,
                    "",
                )
                .help("one makes a parabola, two a cubic Bezier; divide a longer curve into several steps"),
            );
            None
        }
    }
}
