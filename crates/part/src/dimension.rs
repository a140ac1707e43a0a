//! What kind of quantity a number is: powers of length, angle and mass.

use std::ops::{Add, Sub};

/// Exponents of length, angle and mass, in twelfths: roots up to the fourth stay whole.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub(crate) struct Dimension {
    pub(crate) length: i32,
    pub(crate) angle: i32,
    pub(crate) mass: i32,
}

/// Twelfths in one.
const WHOLE: i32 = 12;

/// Largest exponent that an expression may come to, in twelfths; a part needs 5 (a moment of inertia from lengths).
const LARGEST: i32 = 12 * WHOLE;

impl Dimension {
    pub(crate) const NUMBER: Self = Self::of(0, 0, 0);
    pub(crate) const LENGTH: Self = Self::of(1, 0, 0);
    pub(crate) const AREA: Self = Self::of(2, 0, 0);
    pub(crate) const VOLUME: Self = Self::of(3, 0, 0);
    pub(crate) const ANGLE: Self = Self::of(0, 1, 0);
    pub(crate) const MASS: Self = Self::of(0, 0, 1);
    pub(crate) const DENSITY: Self = Self::of(-3, 0, 1);
    pub(crate) const INERTIA: Self = Self::of(2, 0, 1);

    const fn of(length: i32, angle: i32, mass: i32) -> Self {
        Self {
            length: length * WHOLE,
            angle: angle * WHOLE,
            mass: mass * WHOLE,
        }
    }

    /// Exponent of length.
    pub(crate) fn length_power(self) -> f64 {
        f64::from(self.length) / f64::from(WHOLE)
    }

    /// This to the power `exponent`; `None` where that is no multiple of a twelfth, or absurd.
    pub(crate) fn power(self, exponent: f64) -> Option<Self> {
        let scaled = |twelfths: i32| {
            let exact = f64::from(twelfths) * exponent;
            let near = exact.round();
            // The exponent 1/3 is off by rounding; one that is meant as another is off by more.
            let meant = (exact - near).abs() <= 1e-9 * near.abs();
            (meant && near.abs() <= f64::from(LARGEST)).then_some(
                #[expect(clippy::cast_possible_truncation, reason = "bounded the line before")]
                {
                    near as i32
                },
            )
        };
        Some(Self {
            length: scaled(self.length)?,
            angle: scaled(self.angle)?,
            mass: scaled(self.mass)?,
        })
    }

    /// True where all exponents are below the largest one.
    pub(crate) fn is_sensible(self) -> bool {
        [self.length, self.angle, self.mass]
            .iter()
            .all(|exponent| exponent.abs() <= LARGEST)
    }

    /// What it is called: `a length`, `an area`.
    pub(crate) fn words(self) -> String {
        let known = [
            (Self::NUMBER, "a plain number"),
            (Self::LENGTH, "a length"),
            (Self::AREA, "an area"),
            (Self::VOLUME, "a volume"),
            (Self::ANGLE, "an angle"),
            (Self::MASS, "a mass"),
            (Self::DENSITY, "a density"),
            (Self::INERTIA, "a moment of inertia"),
        ];
        if let Some((_, words)) = known.iter().find(|(dimension, _)| *dimension == self) {
            return (*words).to_owned();
        }
        let factors = [
            ("length", self.length),
            ("angle", self.angle),
            ("mass", self.mass),
        ];
        let factors: Vec<String> = factors
            .iter()
            .filter(|&&(_, exponent)| exponent != 0)
            .map(|&(name, exponent)| match exponent {
                WHOLE => name.to_owned(),
                _ => format!("{name}^{}", f64::from(exponent) / f64::from(WHOLE)),
            })
            .collect();
        format!("a quantity of {}", factors.join(" × "))
    }
}

impl Add for Dimension {
    type Output = Self;

    /// The dimension of a product.
    fn add(self, other: Self) -> Self {
        Self {
            length: self.length + other.length,
            angle: self.angle + other.angle,
            mass: self.mass + other.mass,
        }
    }
}

impl Sub for Dimension {
    type Output = Self;

    /// The dimension of a quotient.
    fn sub(self, other: Self) -> Self {
        Self {
            length: self.length - other.length,
            angle: self.angle - other.angle,
            mass: self.mass - other.mass,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn powers_and_roots() {
        assert_eq!(Dimension::LENGTH.power(2.0), Some(Dimension::AREA));
        assert_eq!(Dimension::AREA.power(0.5), Some(Dimension::LENGTH));
        assert_eq!(Dimension::VOLUME.power(1.0 / 3.0), Some(Dimension::LENGTH));
        assert_eq!(Dimension::LENGTH.power(0.123), None);
        assert_eq!(Dimension::LENGTH.power(1e300), None);
        assert_eq!(Dimension::NUMBER.power(0.123), Some(Dimension::NUMBER));
        assert_eq!(Dimension::MASS - Dimension::VOLUME, Dimension::DENSITY);
    }

    #[test]
    fn names() {
        assert_eq!(Dimension::AREA.words(), "an area");
        let root = Dimension::LENGTH.power(0.5).unwrap();
        assert_eq!(root.words(), "a quantity of length^0.5");
        let odd = Dimension::MASS + Dimension::LENGTH;
        assert_eq!(odd.words(), "a quantity of length × mass");
    }
}
