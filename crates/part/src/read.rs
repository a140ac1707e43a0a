//! From the text of a part file to a [`Part`].

use crate::body::bodies;
use crate::dimension::Dimension;
use crate::expect::expectations;
use crate::expression::{Failure, Names, Quantity, Scope, Written, evaluate, parse};
use crate::fault::Found;
use crate::head::{FILE, Head, check_format, head, revolve};
use crate::material::{Materials, materials};
use crate::sizes::read_sizes;
use crate::tree::{Document, Fields, Kind};
use crate::units::Vocabulary;
use crate::values::Values;
use crate::{Fault, Faults, LengthUnit, Part, geometry, limits, tree};

/// The files beside a part file, for outlines that come from a file.
///
/// A name is given as written: relative, with `/` between folders. The reader refuses names that are absolute or lead out
/// of the folder, so an implementation joins the name to the part file's folder and no more.
pub trait Neighbours {
    /// The bytes of `file`.
    ///
    /// # Errors
    /// It is not there or could not be read.
    fn read(&self, file: &str) -> std::io::Result<Vec<u8>>;
}

/// A size that is set from outside: `--set NAME=VALUE`.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Setting {
    /// Name of the size.
    pub name: String,
    /// Its value, an expression as in the file; a bare number is in `part.unit`.
    pub value: String,
}

/// Faults that may only be consequences of a statement that could not be read.
const CONSEQUENCES: [&str; 6] = [
    "table::missing_key",
    "part::format_missing",
    "part::no_body",
    "body::no_material",
    "body::no_outline",
    "expression::unknown_size",
];

/// Reads the part file `text` (its bytes, in UTF-8), called `file` in messages.
///
/// # Errors
/// All that is wrong with it, as far as the faults are independent, in order of place.
pub fn read(
    file: &str,
    text: &[u8],
    settings: &[Setting],
    neighbours: &dyn Neighbours,
) -> Result<Part, Faults> {
    let mut found = Found::default();
    let text = match decoded(text) {
        Ok(text) => text,
        Err((shown, fault)) => {
            found.push(fault);
            return Err(gathered(file, &shown, found));
        }
    };
    let part = part(text, settings, neighbours, &mut found);
    match part {
        Some(part) if found.is_empty() => Ok(part),
        _ => Err(gathered(file, text, found)),
    }
}

fn gathered(file: &str, text: &str, found: Found) -> Faults {
    Faults::gather(file, text.to_owned(), found)
        .expect("where there is no part a fault has been reported")
}

/// The text, or the part of it that can be shown and why the rest cannot be read.
fn decoded(bytes: &[u8]) -> Result<&str, (String, Fault)> {
    if bytes.len() > limits::TEXT {
        let fault = Fault::new(
            "limit::text",
            format!(
                "the file has {:.1} MiB, and a part file at most {} MiB",
                bytes.len() as f64 / f64::from(1 << 20),
                limits::TEXT >> 20
            ),
            0..0,
            "",
        );
        let fault = fault.help("is it a part file? Long outlines stand in a CSV or SVG file");
        return Err((String::new(), fault));
    }
    std::str::from_utf8(bytes).map_err(|error| {
        let at = error.valid_up_to();
        let utf_16 = bytes.starts_with(&[0xFF, 0xFE]) || bytes.starts_with(&[0xFE, 0xFF]);
        let byte = bytes.get(at).copied().unwrap_or_default();
        let fault = Fault::new(
            "part::not_utf8",
            "the file is not text in UTF-8",
            at..at + 1,
            format!("byte {byte:#04x} is no letter"),
        )
        .help(if utf_16 {
            "it is UTF-16: save it again as UTF-8"
        } else {
            "save it as UTF-8; is it a part file?"
        });
        (String::from_utf8_lossy(bytes).into_owned(), fault)
    })
}

fn part(
    text: &str,
    settings: &[Setting],
    neighbours: &dyn Neighbours,
    found: &mut Found,
) -> Option<Part> {
    let Document { root, damaged } = tree::parse(text, found);
    let file = Fields::of(&root, 0..0, &FILE, found);
    if root.entries.is_empty() && !damaged {
        found.push(
            Fault::new("part::empty", "there is nothing in this file", 0..0, "")
                .help("`strickle new NAME` writes a part file to begin with"),
        );
        return None;
    }
    check_format(&file, found);
    let (head, part) = head(&file, found);
    // Without a unit the rest is read all the same; there will be no part.
    let unit = head.unit.unwrap_or(LengthUnit::Millimetre);
    let table = file.get("size").and_then(|entry| {
        if let Kind::Table(table) = &entry.value.kind {
            return Some((&**table, entry.value.span()));
        }
        entry.value.expected("`size`", "a table [size]", found);
        None
    });
    let (sizes, named) = read_sizes(table, text, unit, settings, found);
    let values = Values { text, unit, sizes };
    let revolve = revolve(part.as_ref(), &values, found);
    let materials = match file.get("material") {
        Some(entry) => materials(entry, &values, found),
        None => Materials::default(),
    };
    let drafts = if let Some(entry) = file.get("body") {
        bodies(entry, &values, &materials, found)
    } else {
        if !file.slipped(&["body"]) {
            found.push(no_body());
        }
        Vec::new()
    };
    let expect = match file.get("expect") {
        Some(entry) => expectations(entry, &values, found),
        None => Vec::new(),
    };
    if damaged {
        found.drop_codes(&CONSEQUENCES);
    }
    let bodies = geometry::bodies(drafts, unit, neighbours, found);
    if !found.is_empty() {
        return None;
    }
    let Head {
        name,
        number,
        general_tolerance,
        ..
    } = head;
    Some(Part {
        name: name?,
        number,
        unit,
        revolve: revolve?,
        general_tolerance,
        sizes: named,
        materials: materials.list,
        bodies,
        expect,
    })
}

fn no_body() -> Fault {
    Fault::new("part::no_body", "the part has no body", 0..0, "").help(
        "write [[body]] and under it a name, a material and an outline: outline = [ { d = 40, z = 0 }, { d = 60 }, { z = 12 } ]",
    )
}

/// Sizes of a text that stands alone: none.
struct NoSizes;

impl Names for NoSizes {
    fn index(&self, _: &str) -> Option<usize> {
        None
    }

    fn all(&self) -> Vec<&str> {
        Vec::new()
    }
}

/// A length typed outside a part file, in metres: `0.1mm`, `1/64 in`, `0.1` (in the unit `bare`).
///
/// # Errors
/// It is not a length; the fault's places are in `text`.
pub fn length(text: &str, bare: LengthUnit) -> Result<f64, Fault> {
    let written = Written::typed(text);
    let scope = Scope {
        bare,
        system: bare,
        sizes: &[],
    };
    let quantity: Quantity = parse(&written, Vocabulary::Drawing, &NoSizes)
        .map_err(Failure::from)
        .and_then(|expression| evaluate(&expression, &written, &scope))
        .map_err(|failure| match failure {
            Failure::Fault(fault) => fault,
            Failure::Silent => Fault::new("value::not_a_length", "not a length", 0..text.len(), ""),
        })?;
    if !quantity.is_bare() && quantity.dimension != Dimension::LENGTH {
        let given = quantity.dimension.words();
        return Err(Fault::new(
            "value::wrong_dimension",
            format!("a length is expected, and this is {given}"),
            0..text.len(),
            "",
        )
        .help("write it like 0.1mm or 1/64in"));
    }
    Ok(bare.to(LengthUnit::Metre, 1.0).of(quantity.value))
}
