//! The value of an expression, with its dimension checked at every step.

use super::Written;
use super::parse::{Expression, Operation};
use super::quantity::{Failure, MadeOf, Quantity, Scope};
use crate::Fault;
use crate::dimension::Dimension;
use profile::trig;
use std::ops::Range;

/// The value of `expression`.
pub(crate) fn evaluate(
    expression: &Expression,
    written: &Written<'_>,
    scope: &Scope<'_>,
) -> Result<Quantity, Failure> {
    let mut machine = Machine {
        written,
        scope,
        stack: Vec::with_capacity(4),
    };
    for (operation, at) in &expression.operations {
        machine.perform(*operation, at)?;
    }
    Ok(machine.pop().quantity)
}

/// A value on the stack and the part of the text that it is the value of.
#[derive(Clone)]
pub(super) struct Operand {
    pub(super) quantity: Quantity,
    pub(super) at: Range<usize>,
}

pub(super) struct Machine<'m> {
    written: &'m Written<'m>,
    scope: &'m Scope<'m>,
    stack: Vec<Operand>,
}

impl Machine<'_> {
    fn pop(&mut self) -> Operand {
        self.stack
            .pop()
            .expect("the parser puts every operand before its operation")
    }

    pub(super) fn fault(
        &self,
        code: &'static str,
        message: impl Into<String>,
        at: &Range<usize>,
    ) -> Fault {
        Fault::new(code, message, self.written.span(at.clone()), "")
    }

    fn perform(&mut self, operation: Operation, at: &Range<usize>) -> Result<(), Failure> {
        let operand = match operation {
            Operation::Number(value) => Operand {
                quantity: Quantity::number(value),
                at: at.clone(),
            },
            Operation::Size(index) => {
                let size = self.scope.sizes.get(index).copied().flatten();
                let mut quantity = size.ok_or(Failure::Silent)?;
                quantity.value = self.scope.in_system(quantity.value, quantity.dimension);
                Operand {
                    quantity,
                    at: at.clone(),
                }
            }
            Operation::Measure(unit) => {
                let Operand { quantity, at: from } = self.pop();
                let place = from.start..at.end;
                if !quantity.is_bare() {
                    return Err(self
                        .fault("expression::unit_twice", "this has a unit already", at)
                        .also(
                            self.written.span(from),
                            "a bare number is expected before a unit",
                        )
                        .help("a unit stands after a bare number")
                        .into());
                }
                Operand {
                    quantity: Quantity {
                        value: unit.to(self.scope.system).of(quantity.value),
                        dimension: unit.dimension,
                        made_of: MadeOf::Units,
                    },
                    at: place,
                }
            }
            Operation::Negate => {
                let mut operand = self.pop();
                operand.quantity.value = -operand.quantity.value;
                operand.at.start = at.start;
                operand
            }
            Operation::Call(function, count) => {
                let first = self.stack.len().saturating_sub(count);
                let arguments = self.stack.split_off(first);
                self.call(function, arguments, at)?
            }
            Operation::Add | Operation::Subtract => {
                let (left, right) = self.operands();
                self.sum(operation == Operation::Subtract, left, right)?
            }
            Operation::Multiply => {
                let (left, right) = self.operands();
                let dimension = left.quantity.dimension + right.quantity.dimension;
                let value = left.quantity.value * right.quantity.value;
                scaled(value, dimension, &left, &right)
            }
            Operation::Divide => {
                let (left, right) = self.operands();
                if right.quantity.value == 0.0 {
                    return Err(self
                        .fault(
                            "expression::division_by_zero",
                            "this is a division by zero",
                            &right.at,
                        )
                        .help("the divisor comes to 0 with the sizes as they are")
                        .into());
                }
                let dimension = left.quantity.dimension - right.quantity.dimension;
                let value = left.quantity.value / right.quantity.value;
                scaled(value, dimension, &left, &right)
            }
            Operation::Power => {
                let (left, right) = self.operands();
                self.power(&left, &right)?
            }
        };
        if !operand.quantity.value.is_finite() {
            return Err(self
                .fault(
                    "expression::not_finite",
                    "this is too large to be computed",
                    &operand.at,
                )
                .help("look for a wrong power or for digits too many")
                .into());
        }
        if !operand.quantity.dimension.is_sensible() {
            return Err(self
                .fault(
                    "expression::power",
                    "this comes to an absurd power of a unit",
                    &operand.at,
                )
                .help("a volume is the third power of a length")
                .into());
        }
        self.stack.push(operand);
        Ok(())
    }

    fn operands(&mut self) -> (Operand, Operand) {
        let right = self.pop();
        let left = self.pop();
        (left, right)
    }

    /// Gives bare numbers among `operands` the dimension of the others, which must all have the same.
    pub(super) fn unify(&self, operands: &mut [Operand], verb: &str) -> Result<(), Failure> {
        let Some(first) = operands
            .iter()
            .position(|operand| !operand.quantity.is_bare())
        else {
            return Ok(());
        };
        let dimension = operands[first].quantity.dimension;
        let first_at = operands[first].at.clone();
        for operand in operands {
            if operand.quantity.is_bare() {
                operand.quantity = self.scope.adopt(operand.quantity, dimension);
            } else if operand.quantity.dimension != dimension {
                let (this, other) = (operand.quantity.dimension.words(), dimension.words());
                return Err(self
                    .fault(
                        "expression::different_dimensions",
                        format!("{this} cannot be {verb} {other}"),
                        &operand.at,
                    )
                    .also(self.written.span(first_at), other)
                    .help("both sides must be of the same kind; a size without a unit is a length in part.unit")
                    .into());
            }
        }
        Ok(())
    }

    fn sum(&self, minus: bool, left: Operand, right: Operand) -> Result<Operand, Failure> {
        let mut both = [left, right];
        let verb = if minus { "subtracted from" } else { "added to" };
        self.unify(&mut both, verb)?;
        let [left, right] = both;
        let value = if minus {
            left.quantity.value - right.quantity.value
        } else {
            left.quantity.value + right.quantity.value
        };
        let dimension = left.quantity.dimension;
        Ok(joined(value, dimension, &left, &right))
    }

    fn power(&self, base: &Operand, exponent: &Operand) -> Result<Operand, Failure> {
        let Some(number) = exponent.quantity.as_number() else {
            let words = exponent.quantity.dimension.words();
            return Err(self
                .fault(
                    "expression::exponent",
                    format!("an exponent is a plain number, not {words}"),
                    &exponent.at,
                )
                .help("write a number, or divide by a quantity of the same kind")
                .into());
        };
        let Some(dimension) = base.quantity.dimension.power(number) else {
            let words = base.quantity.dimension.words();
            return Err(self
                .fault(
                    "expression::power",
                    format!("{words} to this power is nothing that can be measured"),
                    &exponent.at,
                )
                .help("lengths are raised to 2, 3, 0.5 and the like")
                .into());
        };
        let value = base.quantity.value;
        if value < 0.0 && number.fract() != 0.0 {
            return Err(self
                .fault(
                    "expression::root_of_negative",
                    "a negative number has no such root",
                    &base.at,
                )
                .help("with the sizes as they are this comes to less than 0")
                .into());
        }
        if value == 0.0 && number < 0.0 {
            return Err(self
                .fault(
                    "expression::division_by_zero",
                    "this is a division by zero",
                    &base.at,
                )
                .help("the base of a negative power comes to 0 with the sizes as they are")
                .into());
        }
        // Squares and cubes as products: the same digits as written out.
        let value = if number == 2.0 {
            value * value
        } else if number == 3.0 {
            value * value * value
        } else if number == 0.5 {
            value.sqrt()
        } else {
            trig::pow(value, number)
        };
        Ok(joined(value, dimension, base, exponent))
    }
}

fn joined(value: f64, dimension: Dimension, left: &Operand, right: &Operand) -> Operand {
    Operand {
        quantity: Quantity {
            value,
            dimension,
            made_of: left.quantity.made_of.max(right.quantity.made_of),
        },
        at: left.at.start..right.at.end,
    }
}

/// A product or quotient: a bare number times a ratio is a bare number still, so that `20 * sin(30)` can be a length.
fn scaled(value: f64, dimension: Dimension, left: &Operand, right: &Operand) -> Operand {
    let mut product = joined(value, dimension, left, right);
    let bare = left.quantity.is_bare() || right.quantity.is_bare();
    if bare && dimension == Dimension::NUMBER {
        product.quantity.made_of = MadeOf::Numbers;
    }
    product
}
