//! Bodies and materials.

use super::outline::{Outline, Wall};
use schemars::JsonSchema;
use serde::Deserialize;

/// A body of the part.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
#[schemars(extend("allOf" = [
    { "oneOf": [{ "required": ["material"] }, { "required": ["density"] }] },
    { "oneOf": [{ "required": ["outline"] }, { "required": ["wall"] }] },
]))]
pub(super) struct Body {
    /// Its name; each body has its own.
    #[schemars(length(min = 1))]
    name: String,
    /// What it is made of: a designation in the table of materials, or a `[[material]]` of this file.
    #[schemars(length(min = 1))]
    material: Option<String>,
    /// Its density with a unit, in place of a material: `8800 kg/m3`.
    #[schemars(length(min = 1))]
    density: Option<String>,
    /// Its section: a list of steps, a whole circle, or an outline from a file.
    outline: Option<Outline>,
    /// Its section as a thin wall, in place of an outline.
    wall: Option<Wall>,
    /// Closed holes inside the section.
    voids: Option<Vec<Outline>>,
}

/// A material that the built-in table lacks.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(super) struct OwnMaterial {
    /// Its name, for `material` of a body.
    #[schemars(length(min = 1))]
    name: String,
    /// Its density with a unit: `8800 kg/m3`.
    #[schemars(length(min = 1))]
    density: String,
}
