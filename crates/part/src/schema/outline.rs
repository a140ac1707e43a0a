//! Outlines and walls.

use super::step::Item;
use super::value::Value;
use schemars::JsonSchema;
use serde::Deserialize;

/// A closed outline.
#[derive(Deserialize, JsonSchema)]
#[serde(untagged)]
pub(super) enum Outline {
    /// Steps. The first one gives both coordinates; the last one runs straight back to the first.
    Steps(#[schemars(length(min = 1))] Vec<Item>),
    /// A whole circle.
    Circle(Circle),
    /// A path of an SVG file.
    Svg(Svg),
    /// Stations in a CSV file.
    Csv(Csv),
}

/// A whole circle: a ring of round wire, a torus.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(super) struct Circle {
    /// Its centre.
    circle: Centre,
    /// Its radius.
    radius: Value,
}

/// The centre of a circle: both coordinates.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
#[schemars(extend("oneOf" = [{ "required": ["d"] }, { "required": ["r"] }]))]
pub(super) struct Centre {
    /// Diameter.
    d: Option<Value>,
    /// Radius.
    r: Option<Value>,
    /// Station along the axis.
    z: Value,
}

/// A path of an SVG file beside the part file.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
#[expect(clippy::struct_field_names, reason = "they are the keys of the file")]
pub(super) struct Svg {
    /// The file.
    #[schemars(length(min = 1))]
    svg: String,
    /// `id` of the path; needed where the file has more than one.
    id: Option<String>,
    /// Where the axis is, in the document's own units; 0 if left out.
    axis_x: Option<Value>,
    /// Length of one unit of the document; its own physical size if left out.
    scale: Option<Value>,
}

/// Stations in a CSV file beside the part file, in `part.unit`.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(super) struct Csv {
    /// The file. Its columns are named r or d, and z.
    #[schemars(length(min = 1))]
    csv: String,
}

/// A thin wall given by one face; its ends are square to the face.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(super) struct Wall {
    /// The steps of the face.
    #[schemars(length(min = 1))]
    line: Vec<Item>,
    /// Thickness.
    thickness: Value,
    /// On which side of travel along the line the wall is.
    grow: Grow,
}

/// A side of the face.
#[derive(Deserialize, JsonSchema)]
#[serde(rename_all = "lowercase")]
pub(super) enum Grow {
    /// To the left of travel.
    Left,
    /// To the right of travel.
    Right,
    /// Half to each side.
    Both,
}
