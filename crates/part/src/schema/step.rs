//! Steps.

use super::value::Value;
use schemars::JsonSchema;
use serde::Deserialize;

/// One item of an outline.
#[derive(Deserialize, JsonSchema)]
#[serde(untagged)]
pub(super) enum Item {
    /// A step.
    Step(Box<Step>),
    /// Steps that are repeated.
    Repeat(Repeat),
}

/// Steps that are repeated: grooves, fins, bellows.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(super) struct Repeat {
    /// How often, a whole number.
    repeat: Value,
    /// The steps, with increments.
    #[schemars(length(min = 1))]
    steps: Vec<Item>,
}

/// A step of an outline: where it goes and how.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(super) struct Step {
    /// To this diameter.
    d: Option<Value>,
    /// To this radius.
    r: Option<Value>,
    /// To this station along the axis.
    z: Option<Value>,
    /// By so much more diameter.
    dd: Option<Value>,
    /// By so much more radius.
    dr: Option<Value>,
    /// By so much along the axis.
    dz: Option<Value>,
    /// Rate of taper, change of diameter : length, as `1:20`; gives the coordinate that is left out. A sign says outward or
    /// inward.
    taper: Option<Value>,
    /// Degrees from the axis; gives the coordinate that is left out. A sign says outward or inward.
    angle: Option<Value>,
    /// Circular arc of this radius; `centre_on` says to which side it bends.
    arc: Option<Value>,
    /// The side of travel along the arc on which its centre is. Left: the arc runs counter-clockwise, r to the right and z
    /// up.
    centre_on: Option<Side>,
    /// The longer of the two arcs.
    long: Option<bool>,
    /// Circular arc through this point.
    via: Option<Point>,
    /// Circular arc about this point, the shorter way round, or the longer with `long = true`.
    centre: Option<Point>,
    /// Circular arc that leaves along the direction in which the step before arrived.
    tangent: Option<bool>,
    /// Quarter ellipse with axes along r and z that leaves along r or along z.
    ellipse: Option<Axis>,
    /// Parabola (one control point) or cubic Bezier (two).
    #[schemars(length(min = 1, max = 2))]
    curve: Option<Vec<Point>>,
    /// Fillet radius at the corner where this step arrives; on the first step, where the outline closes.
    round: Option<Value>,
    /// Chamfer at the corner where this step arrives: equal legs, or the leg before and the leg after.
    chamfer: Option<Chamfer>,
    /// Name of the edge, for finish, coating and machining allowances.
    #[schemars(length(min = 1))]
    name: Option<String>,
}

/// A point inside a step; a coordinate left out is that of the step before.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
#[schemars(extend("minProperties" = 1))]
pub(super) struct Point {
    /// At this diameter.
    d: Option<Value>,
    /// At this radius.
    r: Option<Value>,
    /// At this station along the axis.
    z: Option<Value>,
    /// By so much more diameter than the step before.
    dd: Option<Value>,
    /// By so much more radius than the step before.
    dr: Option<Value>,
    /// By so much further along the axis than the step before.
    dz: Option<Value>,
}

/// A side of the direction of travel.
#[derive(Deserialize, JsonSchema)]
#[serde(rename_all = "lowercase")]
pub(super) enum Side {
    /// Left.
    Left,
    /// Right.
    Right,
}

/// A direction of the section.
#[derive(Deserialize, JsonSchema)]
#[serde(rename_all = "lowercase")]
pub(super) enum Axis {
    /// Square to the axis.
    R,
    /// Along the axis.
    Z,
}

/// A chamfer.
#[derive(Deserialize, JsonSchema)]
#[serde(untagged)]
pub(super) enum Chamfer {
    /// Equal legs.
    Equal(Value),
    /// The leg before the corner and the leg after it.
    Legs([Value; 2]),
}
