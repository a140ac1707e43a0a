//! The part file as types, for its JSON Schema: editors colour, complete and explain from it.
//!
//! The reader walks the text's tree by itself, since it reports every fault with its place and serde stops at the first.
//! These types say the same once more; a test holds their keys against the reader's.
#![expect(
    dead_code,
    reason = "the fields are read by the schema's derivation, not by the program"
)]

mod body;
mod outline;
mod step;
mod value;

use body::{Body, OwnMaterial};
use schemars::JsonSchema;
use serde::Deserialize;
use std::collections::BTreeMap;
use value::{Size, Value};

/// The JSON Schema of the part file, draft 2020-12.
pub fn schema() -> serde_json::Value {
    schemars::schema_for!(PartFile).to_value()
}

/// A Strickle part file: a part of revolution as its drawing gives it.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
struct PartFile {
    /// The format of this file: 1.
    #[schemars(extend("const" = 1))]
    format: u32,
    /// The part as a whole.
    part: Part,
    /// Named dimensions. Expressions use them by name; `--set NAME=VALUE` sets them from outside.
    size: Option<BTreeMap<String, Size>>,
    /// Materials that the built-in table lacks.
    material: Option<Vec<OwnMaterial>>,
    /// The bodies of the part. They may touch and must not overlap.
    #[schemars(length(min = 1))]
    body: Vec<Body>,
    /// What the drawing or the order says about the finished part.
    expect: Option<Expect>,
}

/// The part as a whole.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
struct Part {
    /// Its name.
    #[schemars(length(min = 1))]
    name: String,
    /// Its number, free text for the title block.
    number: Option<String>,
    /// What a bare number means.
    unit: Unit,
    /// Degrees that the section is turned through, more than 0 and at most 360; 360 if left out.
    revolve: Option<Value>,
    /// For every size without a tolerance of its own: `ISO 2768-m`, `ISO 8062-3 DCTG 10`.
    #[schemars(regex(
        pattern = r"^\s*(ISO\s+2768-[fmcv][HKL]?|ISO\s+8062-3\s+DCTG\s*([1-9]|1[0-6]))\s*$"
    ))]
    general_tolerance: Option<String>,
}

/// A unit of length.
#[derive(Deserialize, JsonSchema)]
enum Unit {
    /// Millimetre.
    #[serde(rename = "mm")]
    Millimetre,
    /// Centimetre.
    #[serde(rename = "cm")]
    Centimetre,
    /// Metre.
    #[serde(rename = "m")]
    Metre,
    /// Inch, 25.4 mm.
    #[serde(rename = "in")]
    Inch,
    /// Foot, 304.8 mm.
    #[serde(rename = "ft")]
    Foot,
}

/// What is expected of the finished part: a value with its unit, and a tolerance in percent or in the same kind of unit.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
struct Expect {
    /// Mass: `12.4 kg +- 2 %`.
    mass: Option<String>,
    /// Volume: `1.41 l +- 1 %`.
    volume: Option<String>,
    /// Surface: `0.31 m2 +- 1 %`. Of several bodies the sum.
    surface: Option<String>,
    /// Centre of mass along the axis: `101 mm +- 1 mm`.
    centre_z: Option<String>,
    /// Moment of inertia about the axis: `0.25 kg m2 +- 3 %`.
    inertia_axis: Option<String>,
    /// Largest diameter: `320 mm +- 1.5 mm`.
    largest_d: Option<String>,
    /// Length along the axis: `240 mm +- 1 mm`.
    length: Option<String>,
}

#[cfg(test)]
mod tests;
