//! Materials for machines.

use serde::Serialize;
use shop::Material;

/// The machine output of `materials`.
#[derive(Serialize)]
struct Materials<'a> {
    strickle: &'static str,
    materials: Vec<Row<'a>>,
}

/// A material: density and range in kg/m3, contraction in percent as least, greatest, usual.
#[derive(Serialize)]
struct Row<'a> {
    name: &'a str,
    aliases: &'a [String],
    words: &'a [String],
    density: f64,
    range: Option<[f64; 2]>,
    contraction_percent: Option<[f64; 3]>,
    source: &'a str,
}

/// One object on one line.
pub(super) fn of(found: &[&Material]) -> String {
    let materials = found
        .iter()
        .map(|material| Row {
            name: &material.name,
            aliases: &material.aliases,
            words: &material.words,
            density: material.density,
            range: material.range,
            contraction_percent: material
                .contraction
                .map(|contraction| [contraction.least, contraction.greatest, contraction.usual]),
            source: &material.source,
        })
        .collect();
    let materials = Materials {
        strickle: strickle::VERSION,
        materials,
    };
    serde_json::to_string(&materials).expect("a table has no keys but texts") + "\n"
}
