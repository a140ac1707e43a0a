//! Reading a file of materials.

use crate::density::{density, positive};
use crate::{Contraction, Fault, Material};
use serde::Deserialize;
use std::ops::Range;
use toml::Spanned;

/// The file: `[[material]]`, any number of times.
#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct File {
    #[serde(default)]
    material: Vec<Row>,
}

/// One `[[material]]`, as written.
#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct Row {
    name: Spanned<String>,
    density: Spanned<Density>,
    range: Option<Spanned<[Density; 2]>>,
    #[serde(default)]
    aliases: Vec<Spanned<String>>,
    #[serde(default)]
    words: Vec<String>,
    contraction: Option<Spanned<[f64; 3]>>,
    source: Option<String>,
}

/// A density: a number in kg/m3, or a text with a unit as in a part file.
#[derive(Deserialize)]
#[serde(
    untagged,
    expecting = "a density is a number in kg/m3 or a text with a unit"
)]
enum Density {
    Number(f64),
    Text(String),
}

impl Density {
    fn value(&self) -> Result<f64, String> {
        match self {
            Self::Number(value) => positive(*value),
            Self::Text(text) => density(text),
        }
    }
}

/// A material and the place of its name and of each of its aliases.
pub(crate) struct Placed {
    pub(crate) material: Material,
    pub(crate) places: Vec<Range<usize>>,
}

/// The materials of the file `text`; `source` for those that do not name one.
///
/// # Errors
/// The first fault of its form, or else all faults of its values.
pub(crate) fn materials(text: &str, source: &str) -> Result<Vec<Placed>, Vec<Fault>> {
    let file: File = toml::from_str(text).map_err(|error| {
        vec![
            Fault::new(
                "materials::form",
                error.message().trim_end().replace('\n', "; "),
                error.span().unwrap_or(0..0),
            )
            .help("each [[material]] has a name and a density, and may have range, aliases, words, contraction and source"),
        ]
    })?;
    let mut faults = Vec::new();
    let placed = file
        .material
        .into_iter()
        .filter_map(|row| placed(row, source, &mut faults))
        .collect();
    if faults.is_empty() {
        Ok(placed)
    } else {
        Err(faults)
    }
}

/// The material that `row` gives; `None` where a fault was found.
fn placed(row: Row, source: &str, faults: &mut Vec<Fault>) -> Option<Placed> {
    let before = faults.len();
    let names = std::iter::once(&row.name).chain(&row.aliases);
    for name in names.filter(|name| name.get_ref().trim().is_empty()) {
        faults.push(Fault::new(
            "materials::name",
            "a name has at least one letter or digit",
            name.span(),
        ));
    }
    let mut value = |density: &Density, span: Range<usize>| {
        density
            .value()
            .map_err(|message| faults.push(Fault::new("materials::density", message, span)))
            .ok()
    };
    let density = value(row.density.get_ref(), row.density.span());
    let range = row.range.as_ref().and_then(|range| {
        let [least, greatest] = range.get_ref();
        Some([value(least, range.span())?, value(greatest, range.span())?])
    });
    if let (Some(written), Some(density), Some([least, greatest])) = (&row.range, density, range)
        && !(least <= density && density <= greatest)
    {
        faults.push(
            Fault::new(
                "materials::range",
                format!("the density {density} is not between {least} and {greatest}"),
                written.span(),
            )
            .help("range = [least, greatest], with the density between them"),
        );
    }
    let contraction = row.contraction.as_ref().map(|contraction| {
        let [least, greatest, usual] = *contraction.get_ref();
        if !(0.0 <= least && least <= usual && usual <= greatest && greatest < 100.0) {
            faults.push(Fault::new(
                "materials::contraction",
                "contraction = [least, greatest, usual] in percent, with the usual one between the two",
                contraction.span(),
            ));
        }
        Contraction {
            least,
            greatest,
            usual,
        }
    });
    let density = density.filter(|_| faults.len() == before)?;
    let places = std::iter::once(&row.name)
        .chain(&row.aliases)
        .map(Spanned::span)
        .collect();
    Some(Placed {
        material: Material {
            name: row.name.into_inner(),
            aliases: row.aliases.into_iter().map(Spanned::into_inner).collect(),
            words: row.words,
            density,
            range,
            contraction,
            source: row.source.unwrap_or_else(|| source.to_owned()),
        },
        places,
    })
}
