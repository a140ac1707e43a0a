//! Values with their dimension, and what they are computed in.

use crate::dimension::Dimension;
use crate::{Fault, LengthUnit};

/// A value with its dimension, in the system of a [`Scope`]'s length, degree and kilogram.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Quantity {
    pub(crate) value: f64,
    pub(crate) dimension: Dimension,
    /// How firmly it has its dimension.
    pub(crate) made_of: MadeOf,
}

/// What a quantity was made of.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub(crate) enum MadeOf {
    /// Bare numbers only: it takes the unit that its place needs.
    Numbers,
    /// Bare numbers, and sizes that are bare numbers.
    BareSizes,
    /// Something that has a unit.
    Units,
}

impl Quantity {
    /// A bare number.
    pub(crate) fn number(value: f64) -> Self {
        Self {
            value,
            dimension: Dimension::NUMBER,
            made_of: MadeOf::Numbers,
        }
    }

    /// True for a bare number, which takes the unit that its place needs.
    pub(crate) fn is_bare(self) -> bool {
        self.made_of == MadeOf::Numbers
    }

    /// As a plain number, if it is one; a size without a unit counts as one where only a number can stand.
    pub(crate) fn as_number(self) -> Option<f64> {
        let plain = self.dimension == Dimension::NUMBER || self.made_of != MadeOf::Units;
        plain.then_some(self.value)
    }
}

/// Why there is no value.
#[derive(Debug)]
pub(crate) enum Failure {
    /// This is wrong.
    Fault(Fault),
    /// A size that it needs has a fault of its own.
    Silent,
}

impl From<Fault> for Failure {
    fn from(fault: Fault) -> Self {
        Self::Fault(fault)
    }
}

/// What an expression is evaluated in.
pub(crate) struct Scope<'s> {
    /// What bare numbers are in.
    pub(crate) bare: LengthUnit,
    /// What lengths are computed in. The bare unit keeps the digits of a drawing; the metre those of a density.
    pub(crate) system: LengthUnit,
    /// The values of the sizes in the bare unit, degrees; `None` for those with a fault.
    pub(crate) sizes: &'s [Option<Quantity>],
}

impl Scope<'_> {
    /// The bare number `quantity` as a quantity of `dimension`.
    pub(crate) fn adopt(&self, quantity: Quantity, dimension: Dimension) -> Quantity {
        Quantity {
            value: self.in_system(quantity.value, dimension),
            dimension,
            made_of: quantity.made_of,
        }
    }

    pub(super) fn in_system(&self, value: f64, dimension: Dimension) -> f64 {
        if self.bare == self.system {
            value
        } else {
            let factor = self.bare.to(self.system, dimension.length_power());
            factor.of(value)
        }
    }
}
