//! Materials of the file's own, and densities.

use crate::dimension::Dimension;
use crate::fault::Found;
use crate::nearest::shown;
use crate::physical::Reading;
use crate::tree::{Entry, Fields, Keys, Kind, Value};
use crate::values::Values;
use crate::{Fault, OwnMaterial};
use std::collections::HashMap;

/// Keys of a `[[material]]`.
pub(crate) const MATERIAL: Keys = Keys {
    table: "a [[material]]",
    known: &["name", "density"],
    meant: &[("rho", "`density`"), ("designation", "`name`")],
};

/// The file's own materials by name.
#[derive(Debug, Default)]
pub(crate) struct Materials<'t> {
    names: HashMap<&'t str, Option<usize>>,
    pub(crate) list: Vec<OwnMaterial>,
}

impl Materials<'_> {
    /// Index of the material called `name`.
    pub(crate) fn index(&self, name: &str) -> Option<usize> {
        // One that has a fault keeps its name: index 0 is never looked at then.
        self.names.get(name).map(|index| index.unwrap_or(0))
    }
}

/// The materials under `[[material]]`.
pub(crate) fn materials<'a>(
    entry: &'a Entry<'_>,
    values: &Values<'_>,
    found: &mut Found,
) -> Materials<'a> {
    let mut materials = Materials::default();
    let items = match &entry.value.kind {
        Kind::Table(_) => {
            found.push(
                Fault::new(
                    "material::single_brackets",
                    "materials stand in double brackets, since there can be several",
                    entry.value.span(),
                    "",
                )
                .help("write [[material]]"),
            );
            std::slice::from_ref(&entry.value)
        }
        _ => match entry.value.list("`material`", found) {
            Some(items) => items,
            None => return materials,
        },
    };
    let mut places = HashMap::new();
    for item in items {
        if found.is_enough() {
            break;
        }
        let Some(fields) = Fields::open(item, &MATERIAL, found) else {
            continue;
        };
        let name = fields
            .require("name", "name the material: name = \"house bronze\"", found)
            .and_then(|entry| {
                Some((
                    entry.value.text("`name`", found)?.trim(),
                    entry.value.span(),
                ))
            });
        let density = fields
            .require(
                "density",
                "give its density: density = \"8800 kg/m3\"",
                found,
            )
            .and_then(|entry| density(&entry.value, values, found));
        let Some((name, span)) = name else {
            continue;
        };
        if let Some(first) = places.insert(name, span.clone()) {
            found.push(
                Fault::new(
                    "material::name_twice",
                    format!("two materials are called `{}`", shown(name)),
                    span,
                    "the second",
                )
                .also(first, "the first")
                .help("give each material a name of its own"),
            );
            continue;
        }
        let index = density.map(|density| {
            materials.list.push(OwnMaterial {
                name: name.to_owned(),
                density,
                span,
            });
            materials.list.len() - 1
        });
        materials.names.insert(name, index);
    }
    materials
}

/// A density in kg/m3.
pub(crate) fn density(value: &Value<'_>, values: &Values<'_>, found: &mut Found) -> Option<f64> {
    let Kind::String(text) = &value.kind else {
        let is_number = matches!(value.kind, Kind::Integer(_) | Kind::Float(_));
        if is_number {
            found.push(
                Fault::new(
                    "value::unit_missing",
                    "`density` has no unit",
                    value.span(),
                    "",
                )
                .help("write it with its unit in quotes: \"8800 kg/m3\", \"8.8 g/cm3\", \"0.32 lb/in3\""),
            );
        } else {
            value.expected("a density", "a number with a unit in quotes", found);
        }
        return None;
    };
    let reading = Reading::new(value, text, values);
    let density = reading.whole("`density`", Dimension::DENSITY, found)?;
    if density > 0.0 {
        return Some(density);
    }
    found.push(
        Fault::new(
            "material::density_positive",
            "a density is more than 0",
            value.span(),
            "",
        )
        .help("look the density up and write it like \"8800 kg/m3\""),
    );
    None
}
