//! What the drawing says of the finished part.

use crate::dimension::Dimension;
use crate::fault::Found;
use crate::physical::Reading;
use crate::tree::{Entry, Fields, Keys, Kind};
use crate::values::Values;
use crate::{Expectation, Expected, Fault};

/// Keys of `[expect]`.
pub(crate) const EXPECT: Keys = Keys {
    table: "[expect]",
    known: &[
        "mass",
        "volume",
        "surface",
        "centre_z",
        "inertia_axis",
        "largest_d",
        "length",
    ],
    meant: &[
        ("weight", "`mass`"),
        ("area", "`surface`"),
        ("center_z", "`centre_z`"),
        ("centroid", "`centre_z`"),
        ("centre", "`centre_z`"),
        ("inertia", "`inertia_axis`"),
        ("diameter", "`largest_d`"),
        ("d", "`largest_d`"),
        ("height", "`length`"),
    ],
};

impl Expected {
    /// The quantity of the key `word` and what it is measured as.
    fn of(word: &str) -> Option<(Self, Dimension)> {
        Some(match word {
            "mass" => (Self::Mass, Dimension::MASS),
            "volume" => (Self::Volume, Dimension::VOLUME),
            "surface" => (Self::Surface, Dimension::AREA),
            "centre_z" => (Self::CentreZ, Dimension::LENGTH),
            "inertia_axis" => (Self::InertiaAxis, Dimension::INERTIA),
            "largest_d" => (Self::LargestDiameter, Dimension::LENGTH),
            "length" => (Self::Length, Dimension::LENGTH),
            _ => return None,
        })
    }
}

/// The lines of `[expect]`, in the order of the file.
pub(crate) fn expectations(
    entry: &Entry<'_>,
    values: &Values<'_>,
    found: &mut Found,
) -> Vec<Expectation> {
    let Some(fields) = Fields::open(&entry.value, &EXPECT, found) else {
        return Vec::new();
    };
    fields
        .entries()
        .iter()
        .filter_map(|entry| {
            let (quantity, dimension) = Expected::of(&entry.key)?;
            expectation(entry, quantity, dimension, values, found)
        })
        .collect()
}

fn expectation(
    entry: &Entry<'_>,
    quantity: Expected,
    dimension: Dimension,
    values: &Values<'_>,
    found: &mut Found,
) -> Option<Expectation> {
    let what = format!("`{}`", entry.key);
    let value = &entry.value;
    let Kind::String(text) = &value.kind else {
        if matches!(value.kind, Kind::Integer(_) | Kind::Float(_)) {
            found.push(
                Fault::new(
                    "expect::no_tolerance",
                    format!("{what} has no tolerance, so nothing can be judged by it"),
                    value.span(),
                    "",
                )
                .help("write the value, its unit and how far it may be off in quotes: \"12.4 kg +- 2 %\""),
            );
        } else {
            value.expected(
                &what,
                "a value with its unit and tolerance in quotes",
                found,
            );
        }
        return None;
    };
    let reading = Reading::new(value, text, values);
    let tolerated = reading.tolerated(&what, dimension, found)?;
    let signless = !matches!(quantity, Expected::CentreZ);
    if signless && tolerated.value < 0.0 {
        found.push(
            Fault::new(
                "expect::negative",
                format!("{what} is not negative"),
                value.span(),
                "",
            )
            .help("only centre_z has a sign"),
        );
        return None;
    }
    Some(Expectation {
        quantity,
        value: tolerated.value,
        deviation: (tolerated.lower, tolerated.upper),
        written: text.clone().into_owned(),
        span: value.span(),
    })
}
