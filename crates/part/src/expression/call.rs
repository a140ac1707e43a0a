//! Functions applied to values.

use super::evaluate::{Machine, Operand};
use super::function::{Function, cos_degrees, sin_degrees};
use super::quantity::{Failure, MadeOf, Quantity};
use crate::dimension::Dimension;
use profile::trig;
use std::ops::Range;

impl Machine<'_> {
    pub(super) fn call(
        &self,
        function: Function,
        mut arguments: Vec<Operand>,
        at: &Range<usize>,
    ) -> Result<Operand, Failure> {
        if matches!(function, Function::Min | Function::Max) {
            self.unify(&mut arguments, "compared with")?;
        }
        let first = arguments
            .first()
            .cloned()
            .expect("the parser has counted the arguments");
        let end = arguments.last().map_or(at.end, |last| last.at.end);
        let made_of = arguments
            .iter()
            .map(|operand| operand.quantity.made_of)
            .max()
            .unwrap_or(MadeOf::Numbers);
        let value = first.quantity.value;
        let plain = |value: f64, dimension: Dimension| Quantity {
            value,
            dimension,
            made_of,
        };
        let quantity = match function {
            Function::Abs => plain(value.abs(), first.quantity.dimension),
            Function::Min | Function::Max => {
                let values = arguments.iter().map(|operand| operand.quantity.value);
                let least = function == Function::Min;
                let best = values.fold(value, |a, b| if least { a.min(b) } else { a.max(b) });
                plain(best, first.quantity.dimension)
            }
            Function::Sqrt => {
                if value < 0.0 {
                    return Err(self
                        .fault(
                            "expression::root_of_negative",
                            "a negative number has no square root",
                            &first.at,
                        )
                        .help("with the sizes as they are this comes to less than 0")
                        .into());
                }
                match first.quantity.dimension.power(0.5) {
                    Some(dimension) => plain(value.sqrt(), dimension),
                    None => return Err(self.absurd_root(&first)),
                }
            }
            Function::Sin | Function::Cos | Function::Tan => {
                let degrees = self.degrees(&first)?;
                let (sin, cos) = (sin_degrees(degrees), cos_degrees(degrees));
                let value = match function {
                    Function::Sin => sin,
                    Function::Cos => cos,
                    _ if cos == 0.0 => {
                        return Err(self
                            .fault(
                                "expression::division_by_zero",
                                "the tangent of a right angle is infinite",
                                &first.at,
                            )
                            .help("tan has no value at 90 degrees")
                            .into());
                    }
                    _ => sin / cos,
                };
                // A ratio is a plain number whatever the angle came from.
                plain_number(value)
            }
            Function::Asin | Function::Acos | Function::Atan => self.angle(function, &first)?,
        };
        Ok(Operand {
            quantity,
            at: at.start..end,
        })
    }

    fn absurd_root(&self, operand: &Operand) -> Failure {
        let words = operand.quantity.dimension.words();
        self.fault(
            "expression::power",
            format!("the square root of {words} is nothing that can be measured"),
            &operand.at,
        )
        .help("the square root of an area is a length")
        .into()
    }

    fn degrees(&self, operand: &Operand) -> Result<f64, Failure> {
        if operand.quantity.is_bare() || operand.quantity.dimension == Dimension::ANGLE {
            return Ok(operand.quantity.value);
        }
        let words = operand.quantity.dimension.words();
        Err(self
            .fault(
                "expression::angle_expected",
                format!("sin, cos and tan take an angle, not {words}"),
                &operand.at,
            )
            .help("give an angle its unit where the size is given: \"8 deg\"; a plain number becomes one by * 1 deg")
            .into())
    }

    fn angle(&self, function: Function, operand: &Operand) -> Result<Quantity, Failure> {
        let quantity = operand.quantity;
        if !quantity.is_bare() && quantity.dimension != Dimension::NUMBER {
            let words = quantity.dimension.words();
            return Err(self
                .fault(
                    "expression::ratio_expected",
                    format!("{} takes a ratio, not {words}", function.word()),
                    &operand.at,
                )
                .help("divide one length by another")
                .into());
        }
        let value = quantity.value;
        if function != Function::Atan && value.abs() > 1.0 {
            return Err(self
                .fault(
                    "expression::out_of_range",
                    format!(
                        "{} takes values from -1 to 1, and this is {value}",
                        function.word()
                    ),
                    &operand.at,
                )
                .help("no angle has such a sine or cosine")
                .into());
        }
        let radians = match function {
            Function::Asin => trig::asin(value),
            Function::Acos => trig::acos(value),
            _ => trig::atan(value),
        };
        Ok(Quantity {
            value: radians.to_degrees(),
            dimension: Dimension::ANGLE,
            made_of: MadeOf::Units,
        })
    }
}

/// A plain number that does not become a length by where it stands.
fn plain_number(value: f64) -> Quantity {
    Quantity {
        value,
        dimension: Dimension::NUMBER,
        made_of: MadeOf::Units,
    }
}
