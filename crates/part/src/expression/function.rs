//! The functions of expressions.

use profile::trig;

/// A function.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Function {
    Sqrt,
    Abs,
    Min,
    Max,
    Sin,
    Cos,
    Tan,
    Asin,
    Acos,
    Atan,
}

/// Their names.
pub(crate) const FUNCTIONS: [(&str, Function); 10] = [
    ("sqrt", Function::Sqrt),
    ("abs", Function::Abs),
    ("min", Function::Min),
    ("max", Function::Max),
    ("sin", Function::Sin),
    ("cos", Function::Cos),
    ("tan", Function::Tan),
    ("asin", Function::Asin),
    ("acos", Function::Acos),
    ("atan", Function::Atan),
];

impl Function {
    /// The function called `word`.
    pub(super) fn from_word(word: &str) -> Option<Self> {
        let found = FUNCTIONS.iter().find(|(name, _)| *name == word);
        found.map(|&(_, function)| function)
    }

    /// Its name.
    pub(super) fn word(self) -> &'static str {
        FUNCTIONS
            .iter()
            .find(|&&(_, function)| function == self)
            .map_or("", |&(name, _)| name)
    }

    /// How many values it takes, in words and as a test.
    pub(super) fn takes(self, count: usize) -> Result<(), &'static str> {
        match self {
            Self::Min | Self::Max if count >= 2 => Ok(()),
            Self::Min | Self::Max => Err("two values or more"),
            _ if count == 1 => Ok(()),
            _ => Err("one value"),
        }
    }
}

/// Sine of an angle in degrees; exact where the sine is 0, 1/2 or 1.
pub(super) fn sin_degrees(degrees: f64) -> f64 {
    // The remainder is exact, so that 390 degrees are 30 and not nearly so.
    let turned = degrees % 360.0;
    let (half, sign) = match turned.abs() {
        over if over > 180.0 => (over - 180.0, -turned.signum()),
        within => (within, turned.signum()),
    };
    let acute = if half > 90.0 { 180.0 - half } else { half };
    sign * sin_acute(acute)
}

/// Cosine of an angle in degrees; exact where the cosine is 0, 1/2 or 1.
pub(super) fn cos_degrees(degrees: f64) -> f64 {
    let turned = (degrees % 360.0).abs();
    let half = if turned > 180.0 {
        360.0 - turned
    } else {
        turned
    };
    if half > 90.0 {
        -sin_acute(half - 90.0)
    } else {
        sin_acute(90.0 - half)
    }
}

/// Sine of 0 to 90 degrees.
fn sin_acute(degrees: f64) -> f64 {
    if degrees == 0.0 {
        0.0
    } else if degrees == 30.0 {
        0.5
    } else if degrees <= 45.0 {
        trig::sin(degrees.to_radians())
    } else {
        trig::cos((90.0 - degrees).to_radians())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn plain_angles_are_exact() {
        let sines = [
            (0.0, 0.0),
            (30.0, 0.5),
            (90.0, 1.0),
            (150.0, 0.5),
            (180.0, 0.0),
            (270.0, -1.0),
            (-30.0, -0.5),
            (390.0, 0.5),
            (330.0, -0.5),
        ];
        for (angle, sine) in sines {
            assert_eq!(sin_degrees(angle), sine, "sin {angle}");
        }
        let cosines = [
            (0.0, 1.0),
            (60.0, 0.5),
            (90.0, 0.0),
            (120.0, -0.5),
            (180.0, -1.0),
            (240.0, -0.5),
            (270.0, 0.0),
            (-60.0, 0.5),
            (360.0, 1.0),
        ];
        for (angle, cosine) in cosines {
            assert_eq!(cos_degrees(angle), cosine, "cos {angle}");
        }
    }

    #[test]
    fn all_others_agree_with_radians() {
        let mut angle = -800.0;
        while angle < 800.0 {
            let (sine, cosine) = trig::sin_cos(angle * std::f64::consts::PI / 180.0);
            // The argument in radians is off by an ulp of up to 14 radians.
            assert!((sin_degrees(angle) - sine).abs() < 4e-15, "sin {angle}");
            assert!((cos_degrees(angle) - cosine).abs() < 4e-15, "cos {angle}");
            angle += 7.3;
        }
    }
}
