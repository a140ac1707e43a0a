//! Values: numbers, expressions, sizes with their tolerances.

use schemars::JsonSchema;
use serde::Deserialize;

/// A number in `part.unit` (an angle in degrees), or an expression: numbers, `+ - * / ^`, parentheses, `pi`, `sqrt abs min max
/// sin cos tan asin acos atan`, names of sizes, and units after a number, as in `3/4 in`.
#[derive(Deserialize, JsonSchema)]
#[serde(untagged)]
pub(super) enum Value {
    /// A number.
    Number(f64),
    /// An expression.
    Expression(String),
}

/// A named dimension.
#[derive(Deserialize, JsonSchema)]
#[serde(untagged)]
pub(super) enum Size {
    /// Its value alone.
    Value(Value),
    /// Its value and its tolerance.
    Toleranced(Toleranced),
}

/// A value with its tolerance.
#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(super) struct Toleranced {
    /// The value.
    is: Value,
    /// A number: to both sides. Two numbers: the lower and the upper deviation. A text: a class of ISO 286-1 like `H7`, or an
    /// expression.
    tol: Option<Tolerance>,
}

/// What a size may differ by.
#[derive(Deserialize, JsonSchema)]
#[serde(untagged)]
pub(super) enum Tolerance {
    /// To both sides, or a class of ISO 286-1.
    Both(Value),
    /// The lower and the upper deviation.
    Limits([Value; 2]),
}
