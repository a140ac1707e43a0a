//! The top of a part file: its format and `[part]`.

use crate::fault::Found;
use crate::nearest::unknown_word;
use crate::sizes::general_tolerance;
use crate::tree::{Entry, Fields, Keys, Kind};
use crate::values::Values;
use crate::{Fault, LengthUnit};
use std::f64::consts::TAU;

/// Keys at the top of a part file.
pub(crate) const FILE: Keys = Keys {
    table: "the part file",
    known: &["format", "part", "size", "material", "body", "expect"],
    meant: &[
        ("sizes", "`size`"),
        ("bodies", "`body`"),
        ("materials", "`material`"),
        ("parameters", "`size`"),
        ("name", "`part`: { name = .. }"),
        ("unit", "`part`: { unit = .. }"),
        ("revolve", "`part`: { revolve = .. }"),
        ("outline", "`body`: { outline = .. }"),
    ],
};

/// Keys of `[part]`.
pub(crate) const PART: Keys = Keys {
    table: "[part]",
    known: &["name", "number", "unit", "revolve", "general_tolerance"],
    meant: &[
        ("units", "`unit`"),
        ("title", "`name`"),
        ("id", "`number`"),
        ("angle", "`revolve`"),
        ("turn", "`revolve`"),
        ("tolerance", "`general_tolerance`"),
    ],
};

/// The format that this reader knows.
const FORMAT: i64 = 1;

/// Checks `format = 1`.
pub(crate) fn check_format(file: &Fields<'_, '_>, found: &mut Found) {
    let Some(entry) = file.get("format") else {
        return found.push(
            Fault::new(
                "part::format_missing",
                "the file does not say which format it has",
                0..0,
                "",
            )
            .help("write format = 1 in its first line"),
        );
    };
    match entry.value.kind {
        Kind::Integer(FORMAT) => {}
        Kind::Integer(other) => found.push(
            Fault::new(
                "part::format_unknown",
                format!("format {other} is not known"),
                entry.value.span(),
                "",
            )
            .help("this program reads format = 1; a newer file needs a newer program"),
        ),
        _ => entry.value.expected("`format`", "the number 1", found),
    }
}

/// What `[part]` says; `None` for what has a fault.
#[derive(Debug, Default)]
pub(crate) struct Head {
    pub(crate) name: Option<String>,
    pub(crate) number: Option<String>,
    pub(crate) unit: Option<LengthUnit>,
    pub(crate) general_tolerance: Option<String>,
}

/// `[part]` without `revolve`, which may be an expression and is read once there are sizes.
pub(crate) fn head<'a, 't>(
    file: &Fields<'a, 't>,
    found: &mut Found,
) -> (Head, Option<Fields<'a, 't>>) {
    let Some(entry) = file.require(
        "part",
        "write [part] and under it the part's name and unit",
        found,
    ) else {
        return (Head::default(), None);
    };
    let Some(fields) = Fields::open(&entry.value, &PART, found) else {
        return (Head::default(), None);
    };
    let mut text = |entry: Option<&Entry<'_>>, what: &str| {
        entry.and_then(|entry| entry.value.text(what, found).map(str::to_owned))
    };
    let number = text(fields.get("number"), "`number`");
    let name = fields.require("name", "name the part: name = \"Fog bell\"", found);
    let name = name.and_then(|entry| entry.value.text("`name`", found).map(str::to_owned));
    let unit = fields
        .require(
            "unit",
            "say what a bare number means: unit = \"mm\", \"cm\", \"m\", \"in\" or \"ft\"",
            found,
        )
        .and_then(|entry| unit(entry, found));
    let general_tolerance = fields
        .get("general_tolerance")
        .and_then(|entry| general_tolerance(&entry.value, found));
    let head = Head {
        name,
        number,
        unit,
        general_tolerance,
    };
    (head, Some(fields))
}

fn unit(entry: &Entry<'_>, found: &mut Found) -> Option<LengthUnit> {
    let word = entry.value.text("`unit`", found)?.trim();
    let unit = LengthUnit::from_word(word);
    if unit.is_none() {
        let known = LengthUnit::ALL.map(|(word, _)| word);
        let meant = match word.to_lowercase().as_str() {
            "inch" | "inches" | "\"" => Some("in"),
            "foot" | "feet" | "'" => Some("ft"),
            "millimetre" | "millimeter" | "millimetres" | "millimeters" => Some("mm"),
            "centimetre" | "centimeter" | "centimetres" | "centimeters" => Some("cm"),
            "metre" | "meter" | "metres" | "meters" => Some("m"),
            _ => None,
        };
        let fault = unknown_word(
            "part::unit",
            "unit of length",
            word,
            entry.value.span(),
            &known,
        );
        found.push(match meant {
            Some(meant) => fault.help(format!(
                "did you mean `{meant}`? Known here: {}",
                known.join(", ")
            )),
            None => fault,
        });
    }
    unit
}

/// `part.revolve` in radians; a full turn where it is left out.
pub(crate) fn revolve(
    part: Option<&Fields<'_, '_>>,
    values: &Values<'_>,
    found: &mut Found,
) -> Option<f64> {
    let Some(entry) = part.and_then(|fields| fields.get("revolve")) else {
        return Some(TAU);
    };
    let degrees = values.degrees(&entry.value, "`revolve`", found)?;
    if degrees > 0.0 && degrees <= 360.0 {
        // The full turn is exact: the meshes close on it.
        return Some(if degrees == 360.0 {
            TAU
        } else {
            degrees.to_radians()
        });
    }
    found.push(
        Fault::new(
            "part::revolve",
            format!("a part is revolved by more than 0 and at most 360 degrees, not {degrees}"),
            entry.value.span(),
            "",
        )
        .help("write revolve = 360, or leave it out"),
    );
    None
}
