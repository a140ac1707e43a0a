//! Units of length, angle and mass and what is made of them.
//!
//! Inch and foot are the international ones of 1959 (25.4 mm, 304.8 mm), the pound is the international avoirdupois
//! pound (0.45359237 kg), the litre 1 dm3 (SI Brochure, 9th edition, table 8).

use crate::LengthUnit;
use crate::dimension::Dimension;

/// A factor as a fraction, so that 25.4 or 1/1000 enter a product without a rounding of their own.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Factor {
    over: f64,
    under: f64,
}

impl Factor {
    /// `value` times this.
    pub(crate) fn of(self, value: f64) -> f64 {
        value * self.over / self.under
    }

    /// This to a whole power, or to a fractional one where the quantity is a root.
    fn power(self, exponent: f64) -> Self {
        let raised = |base: f64, exponent: f64| {
            if base == 1.0 || exponent == 0.0 {
                1.0
            } else if exponent == 1.0 {
                base
            } else {
                profile::trig::pow(base, exponent)
            }
        };
        if exponent < 0.0 {
            Self {
                over: raised(self.under, -exponent),
                under: raised(self.over, -exponent),
            }
        } else {
            Self {
                over: raised(self.over, exponent),
                under: raised(self.under, exponent),
            }
        }
    }

    fn times(self, other: Self) -> Self {
        // Cancelled crosswise: g/cm3 is 1000 kg/m3 and not 1000000/1000.
        let (a, b) = reduced(self.over, other.under);
        let (c, d) = reduced(other.over, self.under);
        Self {
            over: a * c,
            under: d * b,
        }
    }
}

/// Two whole numbers without their common divisor; others, and numbers past 2^53, as they are.
fn reduced(over: f64, under: f64) -> (f64, f64) {
    const EXACT: f64 = 9_007_199_254_740_992.0;
    let whole = |x: f64| x.fract() == 0.0 && (1.0..EXACT).contains(&x);
    if !whole(over) || !whole(under) {
        return (over, under);
    }
    let (mut a, mut b) = (over, under);
    while b != 0.0 {
        (a, b) = (b, a % b);
    }
    (over / a, under / a)
}

impl LengthUnit {
    /// All units of length.
    pub(crate) const ALL: [(&'static str, Self); 5] = [
        ("mm", Self::Millimetre),
        ("cm", Self::Centimetre),
        ("m", Self::Metre),
        ("in", Self::Inch),
        ("ft", Self::Foot),
    ];

    /// The unit called `word` in a part file and on the command line.
    pub fn from_word(word: &str) -> Option<Self> {
        let found = Self::ALL.iter().find(|(name, _)| *name == word);
        found.map(|&(_, unit)| unit)
    }

    /// What it is called: `mm`, `in`.
    pub fn word(self) -> &'static str {
        match self {
            Self::Millimetre => "mm",
            Self::Centimetre => "cm",
            Self::Metre => "m",
            Self::Inch => "in",
            Self::Foot => "ft",
        }
    }

    /// Metres of one.
    pub fn metres(self) -> f64 {
        self.to(Self::Metre, 1.0).of(1.0)
    }

    /// Its length in tenths of a micrometre, of which every unit is a whole number.
    fn tenths(self) -> f64 {
        match self {
            Self::Millimetre => 10_000.0,
            Self::Centimetre => 100_000.0,
            Self::Metre => 10_000_000.0,
            Self::Inch => 254_000.0,
            Self::Foot => 3_048_000.0,
        }
    }

    /// Factor from this unit to the power `power` to `other` to that power.
    pub(crate) fn to(self, other: Self, power: f64) -> Factor {
        ratio(self.tenths(), other).power(power)
    }
}

fn ratio(tenths: f64, unit: LengthUnit) -> Factor {
    let (over, under) = reduced(tenths, unit.tenths());
    Factor { over, under }
}

/// Which units may stand in a place.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Vocabulary {
    /// Lengths and angles: sizes and coordinates.
    Drawing,
    /// These and masses, with quotients and products of units: densities and what is expected.
    Physical,
}

/// A unit, or a product of several.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Unit {
    /// What it measures.
    pub(crate) dimension: Dimension,
    /// Its value in powers of the metre, in degrees and kilograms.
    factor: Factor,
}

/// The units without their powers: name, dimension, value in metres, degrees or kilograms as a fraction.
const SIMPLE: [(&str, Dimension, f64, f64); 15] = [
    ("mm", Dimension::LENGTH, 1.0, 1000.0),
    ("cm", Dimension::LENGTH, 1.0, 100.0),
    ("m", Dimension::LENGTH, 1.0, 1.0),
    ("um", Dimension::LENGTH, 1.0, 1_000_000.0),
    ("in", Dimension::LENGTH, 127.0, 5000.0),
    ("ft", Dimension::LENGTH, 381.0, 1250.0),
    ("deg", Dimension::ANGLE, 1.0, 1.0),
    ("rad", Dimension::ANGLE, 180.0, std::f64::consts::PI),
    ("kg", Dimension::MASS, 1.0, 1.0),
    ("g", Dimension::MASS, 1.0, 1000.0),
    ("t", Dimension::MASS, 1000.0, 1.0),
    ("lb", Dimension::MASS, 45_359_237.0, 100_000_000.0),
    ("l", Dimension::VOLUME, 1.0, 1000.0),
    ("ml", Dimension::VOLUME, 1.0, 1_000_000.0),
    ("mg", Dimension::MASS, 1.0, 1_000_000.0),
];

/// Other spellings.
const SPELLINGS: [(&str, &str); 5] = [
    ("°", "deg"),
    ("µm", "um"),
    ("μm", "um"),
    ("L", "l"),
    ("litre", "l"),
];

impl Unit {
    /// The unit `word`, which may end in a power: `mm`, `cm3`.
    pub(crate) fn from_word(word: &str, vocabulary: Vocabulary) -> Option<Self> {
        let word = SPELLINGS
            .iter()
            .find(|(spelling, _)| *spelling == word)
            .map_or(word, |&(_, word)| word);
        let (name, power) = match word.char_indices().next_back() {
            Some((at, digit @ '2'..='4')) => {
                (&word[..at], f64::from(u32::from(digit) - u32::from('0')))
            }
            _ => (word, 1.0),
        };
        let &(_, dimension, over, under) = SIMPLE.iter().find(|(simple, ..)| *simple == name)?;
        let fits = match vocabulary {
            Vocabulary::Drawing => matches!(dimension, Dimension::LENGTH | Dimension::ANGLE),
            Vocabulary::Physical => true,
        };
        let whole = power == 1.0 || dimension == Dimension::LENGTH;
        let unit = Self {
            dimension,
            factor: Factor { over, under },
        };
        (fits && whole).then(|| unit.power(power)).flatten()
    }

    /// Words that a message lists as units.
    pub(crate) fn words(vocabulary: Vocabulary) -> &'static [&'static str] {
        match vocabulary {
            Vocabulary::Drawing => &["mm", "cm", "m", "um", "in", "ft", "deg", "rad"],
            Vocabulary::Physical => &[
                "mm", "cm", "m", "in", "ft", "kg", "g", "t", "lb", "l", "cm2", "m2", "cm3", "m3",
                "kg/m3", "g/cm3", "lb/in3", "kg m2",
            ],
        }
    }

    /// This to a whole power.
    pub(crate) fn power(self, exponent: f64) -> Option<Self> {
        Some(Self {
            dimension: self.dimension.power(exponent)?,
            factor: self.factor.power(exponent),
        })
    }

    /// The product.
    pub(crate) fn times(self, other: Self) -> Self {
        Self {
            dimension: self.dimension + other.dimension,
            factor: self.factor.times(other.factor),
        }
    }

    /// Factor from this unit to the system of `length`, degree and kilogram.
    pub(crate) fn to(self, length: LengthUnit) -> Factor {
        let metre = LengthUnit::Metre.to(length, self.dimension.length_power());
        self.factor.times(metre)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn convert(value: f64, word: &str, length: LengthUnit) -> f64 {
        let unit = Unit::from_word(word, Vocabulary::Physical).unwrap();
        unit.to(length).of(value)
    }

    #[test]
    fn lengths_keep_their_digits() {
        assert_eq!(convert(12.7, "mm", LengthUnit::Millimetre), 12.7);
        assert_eq!(convert(0.1, "in", LengthUnit::Inch), 0.1);
        assert_eq!(convert(25.4, "mm", LengthUnit::Inch), 1.0);
        assert_eq!(convert(1.0, "ft", LengthUnit::Inch), 12.0);
        assert_eq!(convert(320.0, "mm", LengthUnit::Metre), 0.32);
        assert_eq!(convert(1.0, "um", LengthUnit::Millimetre), 0.001);
        assert_eq!(LengthUnit::Inch.metres(), 0.0254);
    }

    #[test]
    fn powers() {
        assert_eq!(convert(1.0, "in3", LengthUnit::Millimetre), 16387.064);
        assert_eq!(convert(1.0, "l", LengthUnit::Millimetre), 1e6);
        assert_eq!(convert(3.0, "cm2", LengthUnit::Millimetre), 300.0);
        assert!(Unit::from_word("kg2", Vocabulary::Physical).is_none());
        assert!(Unit::from_word("kg", Vocabulary::Drawing).is_none());
        assert!(Unit::from_word("mm3", Vocabulary::Drawing).is_some());
        assert!(Unit::from_word("", Vocabulary::Drawing).is_none());
    }

    #[test]
    fn a_gram_a_cubic_centimetre_is_a_tonne_a_cubic_metre() {
        let gram = Unit::from_word("g", Vocabulary::Physical).unwrap();
        let per_cm3 = Unit::from_word("cm3", Vocabulary::Physical)
            .unwrap()
            .power(-1.0)
            .unwrap();
        let unit = gram.times(per_cm3);
        assert_eq!(unit.dimension, Dimension::DENSITY);
        assert_eq!(unit.to(LengthUnit::Metre).of(8.8), 8800.0);
    }
}
