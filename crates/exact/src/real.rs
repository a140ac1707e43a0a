//! The numbers that the integrals are written in: f64, and pairs of f64 where f64 would lose digits.

use std::ops::{Add, Mul, Neg, Sub};
use twofloat::TwoFloat;

/// A real number of some precision.
pub(crate) trait Real:
    Copy + Add<Output = Self> + Sub<Output = Self> + Mul<Output = Self> + Neg<Output = Self>
{
    /// Its relative rounding error.
    const ROUNDING: f64;
    /// The number itself.
    fn of(x: f64) -> Self;
    /// Rounded to f64.
    fn rounded(self) -> f64;
    /// Sine and cosine.
    fn sin_cos(self) -> (Self, Self);
    /// Square root.
    fn sqrt(self) -> Self;
    /// The quotient, to the full precision.
    fn over(self, divisor: Self) -> Self;
}

impl Real for f64 {
    const ROUNDING: Self = Self::EPSILON / 2.0;

    fn of(x: f64) -> Self {
        x
    }

    fn rounded(self) -> f64 {
        self
    }

    fn sin_cos(self) -> (Self, Self) {
        profile::trig::sin_cos(self)
    }

    fn sqrt(self) -> Self {
        Self::sqrt(self)
    }

    fn over(self, divisor: Self) -> Self {
        self / divisor
    }
}

impl Real for TwoFloat {
    // Its sine's polynomial ends at the fifteenth power on [0, pi/4]: 5e-19; the sums are far better.
    const ROUNDING: f64 = 1e-19;

    fn of(x: f64) -> Self {
        x.into()
    }

    fn rounded(self) -> f64 {
        self.into()
    }

    fn sin_cos(self) -> (Self, Self) {
        Self::sin_cos(self)
    }

    fn sqrt(self) -> Self {
        Self::sqrt(self)
    }

    fn over(self, divisor: Self) -> Self {
        // The crate's quotient of two pairs (0.8.4) is good to one f64 only; by an f64 it is right. One step of Newton's
        // method from there.
        let first = self / divisor.hi();
        first + (self - first * divisor) / divisor.hi()
    }
}

/// A plane vector: r and z.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Pair<R> {
    pub(crate) r: R,
    pub(crate) z: R,
}

impl<R: Real> Pair<R> {
    pub(crate) fn of(v: profile::DVec2) -> Self {
        Self {
            r: R::of(v.x),
            z: R::of(v.y),
        }
    }

    /// a - b without rounding before the subtraction.
    pub(crate) fn between(a: profile::DVec2, b: profile::DVec2) -> Self {
        Self {
            r: R::of(a.x) - R::of(b.x),
            z: R::of(a.y) - R::of(b.y),
        }
    }

    pub(crate) fn plus(self, other: Self) -> Self {
        Self {
            r: self.r + other.r,
            z: self.z + other.z,
        }
    }

    pub(crate) fn minus(self, other: Self) -> Self {
        Self {
            r: self.r - other.r,
            z: self.z - other.z,
        }
    }

    pub(crate) fn times(self, factor: R) -> Self {
        Self {
            r: self.r * factor,
            z: self.z * factor,
        }
    }

    pub(crate) fn left(self) -> Self {
        Self {
            r: -self.z,
            z: self.r,
        }
    }

    pub(crate) fn length(self) -> R {
        (self.r * self.r + self.z * self.z).sqrt()
    }
}
