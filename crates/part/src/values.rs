//! Numbers of the file where they are needed: a length, an angle, a plain number.

use crate::dimension::Dimension;
use crate::expression::{Failure, MadeOf, Quantity, Scope, Written, evaluate, parse};
use crate::fault::Found;
use crate::sizes::Sizes;
use crate::tree::{Kind, Value};
use crate::units::Vocabulary;
use crate::{Fault, LengthUnit, limits};

/// What values are read with.
pub(crate) struct Values<'t> {
    /// The whole text.
    pub(crate) text: &'t str,
    /// What bare numbers are in.
    pub(crate) unit: LengthUnit,
    /// The sizes that expressions may name.
    pub(crate) sizes: Sizes<'t>,
}

/// The expression in the string `value`, and its place in `text`.
pub(crate) fn written_of<'a>(value: &Value<'_>, string: &'a str, text: &str) -> Written<'a> {
    let whole = value.span();
    // Without escapes the string stands in the text as it is, after its quotes.
    let start = text
        .get(whole.clone())
        .and_then(|raw| raw.find(string))
        .map(|at| whole.start + at);
    Written::new(string, whole, start)
}

impl Value<'_> {
    /// A number that is not an expression.
    pub(crate) fn plain_number(&self, what: &str, found: &mut Found) -> Option<f64> {
        match self.kind {
            #[expect(
                clippy::cast_precision_loss,
                reason = "whole numbers past 2^53 are no sizes"
            )]
            Kind::Integer(value) => Some(value as f64),
            Kind::Float(value) if value.is_finite() => Some(value),
            Kind::Float(_) => {
                found.push(
                    Fault::new(
                        "value::not_finite",
                        format!("{what} is no finite number"),
                        self.span(),
                        "",
                    )
                    .help("write a number with digits"),
                );
                None
            }
            _ => {
                self.expected(what, "a number or an expression in quotes", found);
                None
            }
        }
    }
}

impl Values<'_> {
    /// A number or an expression, in the part's unit and degrees.
    pub(crate) fn quantity(
        &self,
        value: &Value<'_>,
        what: &str,
        found: &mut Found,
    ) -> Option<Quantity> {
        let Kind::String(string) = &value.kind else {
            return value.plain_number(what, found).map(Quantity::number);
        };
        let written = written_of(value, string, self.text);
        self.expression(&written, found)
    }

    /// The value of an expression.
    pub(crate) fn expression(&self, written: &Written<'_>, found: &mut Found) -> Option<Quantity> {
        let scope = self.scope(self.unit);
        let result = parse(written, Vocabulary::Drawing, &self.sizes)
            .map_err(Failure::from)
            .and_then(|expression| evaluate(&expression, written, &scope));
        match result {
            Ok(quantity) => Some(quantity),
            Err(Failure::Silent) => None,
            Err(Failure::Fault(fault)) => {
                found.push(fault);
                None
            }
        }
    }

    /// What expressions are evaluated in, with lengths computed in `system`.
    pub(crate) fn scope(&self, system: LengthUnit) -> Scope<'_> {
        Scope {
            bare: self.unit,
            system,
            sizes: self.sizes.values(),
        }
    }

    /// A length in metres.
    pub(crate) fn length(&self, value: &Value<'_>, what: &str, found: &mut Found) -> Option<f64> {
        let quantity = self.quantity(value, what, found)?;
        let in_unit = dimensioned(quantity, Dimension::LENGTH, what, value, found)?;
        let metres = self.unit.to(LengthUnit::Metre, 1.0).of(in_unit);
        if metres.abs() > limits::LENGTH {
            found.push(
                Fault::new(
                    "limit::length",
                    format!("{what} is more than a million kilometres"),
                    value.span(),
                    "",
                )
                .help("look for digits too many, or for a wrong unit"),
            );
            return None;
        }
        Some(metres)
    }

    /// A length above 0, in metres.
    pub(crate) fn positive(&self, value: &Value<'_>, what: &str, found: &mut Found) -> Option<f64> {
        let length = self.length(value, what, found)?;
        if length > 0.0 {
            return Some(length);
        }
        found.push(
            Fault::new(
                "value::not_positive",
                format!("{what} is more than 0"),
                value.span(),
                "",
            )
            .help("give a length above 0"),
        );
        None
    }

    /// An angle in degrees.
    pub(crate) fn degrees(&self, value: &Value<'_>, what: &str, found: &mut Found) -> Option<f64> {
        let quantity = self.quantity(value, what, found)?;
        dimensioned(quantity, Dimension::ANGLE, what, value, found)
    }

    /// A plain number.
    pub(crate) fn number(&self, value: &Value<'_>, what: &str, found: &mut Found) -> Option<f64> {
        let quantity = self.quantity(value, what, found)?;
        quantity
            .as_number()
            .or_else(|| dimensioned(quantity, Dimension::NUMBER, what, value, found))
    }
}

/// The value of `quantity` where `dimension` is needed.
pub(crate) fn dimensioned(
    quantity: Quantity,
    dimension: Dimension,
    what: &str,
    value: &Value<'_>,
    found: &mut Found,
) -> Option<f64> {
    if quantity.is_bare() || quantity.dimension == dimension {
        return Some(quantity.value);
    }
    let (needed, given) = (dimension.words(), quantity.dimension.words());
    let help = match (dimension, quantity.dimension) {
        (Dimension::ANGLE, _) if quantity.made_of == MadeOf::Units => {
            "an angle is written in degrees: 8, or \"8 deg\""
        }
        (Dimension::ANGLE, Dimension::LENGTH) => {
            "a size without a unit is a length; give an angle its unit where the size is given: \"8 deg\""
        }
        (Dimension::LENGTH, Dimension::NUMBER) => {
            "lengths divided by each other are a plain number; multiply by a length, or by 1 mm"
        }
        (Dimension::ANGLE, Dimension::NUMBER) => "a plain number becomes an angle by * 1 deg",
        (_, Dimension::AREA | Dimension::VOLUME) => {
            "a size without a unit is a length; for a plain number divide it by 1 mm"
        }
        _ => "look at the units in the expression",
    };
    found.push(
        Fault::new(
            "value::wrong_dimension",
            format!("{what} is {needed}, and this is {given}"),
            value.span(),
            "",
        )
        .help(help),
    );
    None
}
