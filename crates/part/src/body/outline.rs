//! Outlines: steps, circles and files.

use crate::fault::Found;
use crate::outline::{Coordinate, Outline};
use crate::steps::{CENTRE, EdgeCount, Use, steps, target};
use crate::tree::{Fields, Keys, Kind, Value};
use crate::values::Values;
use crate::{Fault, Span};

/// Keys of a whole circle.
pub(crate) const CIRCLE: Keys = Keys {
    table: "a circle",
    known: &["circle", "radius"],
    meant: &[
        ("r", "`radius`"),
        ("d", "`radius`"),
        ("diameter", "`radius`"),
        ("centre", "`circle`"),
    ],
};

/// Keys of an outline from an SVG file.
pub(crate) const SVG: Keys = Keys {
    table: "an outline from an SVG file",
    known: &["svg", "id", "axis_x", "scale"],
    meant: &[("path", "`id`"), ("axis", "`axis_x`"), ("unit", "`scale`")],
};

/// Keys of an outline from a CSV file.
pub(crate) const CSV: Keys = Keys {
    table: "an outline from a CSV file",
    known: &["csv"],
    meant: &[],
};

pub(super) fn outline(
    value: &Value<'_>,
    what: &str,
    values: &Values<'_>,
    edges: &mut EdgeCount,
    found: &mut Found,
) -> Option<Outline> {
    let table = match &value.kind {
        Kind::List(_) => {
            let steps = steps(value, Use::Outline, values, edges, found)?;
            return Some(Outline::Steps(steps, value.span()));
        }
        Kind::Table(table) => table,
        _ => {
            value.expected(what, "a list of steps or a table", found);
            return None;
        }
    };
    let kinds = ["circle", "svg", "csv"];
    let mut given = kinds.iter().filter_map(|key| table.get(key));
    let Some(entry) = given.next() else {
        found.push(
            Fault::new(
                "outline::kind",
                format!("{what} in braces is a circle, or comes from a file"),
                value.span(),
                "",
            )
            .help("write { circle = { r = 50, z = 0 }, radius = 12 }, { svg = \"bell.svg\" } or { csv = \"stations.csv\" }; steps stand in brackets [..]"),
        );
        return None;
    };
    if let Some(second) = given.next() {
        found.push(
            Fault::new(
                "outline::two_kinds",
                format!(
                    "an outline has `{}` or `{}`, not both",
                    entry.key, second.key
                ),
                second.key_span(),
                "",
            )
            .also(entry.key_span(), "")
            .help("keep one of them"),
        );
        return None;
    }
    match &*entry.key {
        "circle" => circle(value, values, found),
        "svg" => svg(value, values, found),
        _ => csv(value, found),
    }
}

fn circle(value: &Value<'_>, values: &Values<'_>, found: &mut Found) -> Option<Outline> {
    let fields = Fields::open(value, &CIRCLE, found)?;
    let centre = fields.require(
        "circle",
        "give the centre: circle = { r = 50, z = 0 }",
        found,
    );
    let radius = fields.require("radius", "give the radius: radius = 12", found);
    let centre = centre.and_then(|entry| {
        let fields = Fields::open(&entry.value, &CENTRE, found)?;
        let centre = target(&fields, values, found)?;
        let absolute = |coordinate: Option<(Coordinate, Span)>| match coordinate {
            Some((Coordinate::At(value), _)) => Some(value),
            _ => None,
        };
        let both = absolute(centre.r).zip(absolute(centre.z));
        // Increments are unknown keys here, and have been reported.
        if both.is_none() {
            found.push(
                Fault::new(
                    "outline::circle_centre",
                    "the centre of a circle has both coordinates",
                    entry.value.span(),
                    "",
                )
                .help("write circle = { r = 50, z = 0 }"),
            );
        }
        both
    });
    let radius = radius.and_then(|entry| values.positive(&entry.value, "`radius`", found));
    let ((r, z), radius) = (centre?, radius?);
    Some(Outline::Circle {
        r,
        z,
        radius,
        span: value.span(),
    })
}

fn svg(value: &Value<'_>, values: &Values<'_>, found: &mut Found) -> Option<Outline> {
    let fields = Fields::open(value, &SVG, found)?;
    let entry = fields.get("svg")?;
    let file = file_name(&entry.value, "`svg`", found);
    let id = match fields.get("id") {
        Some(entry) => Some(entry.value.text("`id`", found)?.to_owned()),
        None => None,
    };
    let axis_x = match fields.get("axis_x") {
        Some(entry) => values.number(&entry.value, "`axis_x`", found)?,
        None => 0.0,
    };
    let scale = match fields.get("scale") {
        Some(entry) => Some(values.positive(&entry.value, "`scale`", found)?),
        None => None,
    };
    Some(Outline::Svg {
        file: file?,
        id,
        axis_x,
        scale,
        span: entry.value.span(),
    })
}

fn csv(value: &Value<'_>, found: &mut Found) -> Option<Outline> {
    let fields = Fields::open(value, &CSV, found)?;
    let entry = fields.get("csv")?;
    Some(Outline::Csv {
        file: file_name(&entry.value, "`csv`", found)?,
        span: entry.value.span(),
    })
}

/// A file beside the part file, or in a folder below: nothing else is read.
fn file_name(value: &Value<'_>, what: &str, found: &mut Found) -> Option<String> {
    let name = value.text(what, found)?;
    let outside = name.starts_with('/')
        || name.contains(['\\', ':', '\0'])
        || name.split('/').any(|part| part == "..");
    if outside {
        found.push(
            Fault::new(
                "outline::file_outside",
                "a file that an outline names stands in the part file's folder or below it",
                value.span(),
                "",
            )
            .help("copy the file beside the part file and give its name; folders are divided by /"),
        );
        return None;
    }
    Some(name.to_owned())
}
