//! Lengths and places as a message gives them: in the part's unit, with the digits that help.

use crate::LengthUnit;
use glam::DVec2;

/// Digits of a place: enough to find it on the drawing.
const PLACE_DIGITS: usize = 6;

/// Digits of a length that is compared with another one.
const LENGTH_DIGITS: usize = 9;

/// Writes lengths in one unit.
#[derive(Debug, Clone, Copy)]
pub(super) struct Wording {
    /// The part's unit.
    pub(super) unit: LengthUnit,
}

impl Wording {
    /// `12.5 mm`
    pub(super) fn length(self, metres: f64) -> String {
        let number = rounded(metres / self.unit.metres(), LENGTH_DIGITS);
        format!("{number} {}", self.unit.word())
    }

    /// `r = 12.5, z = -40 mm`
    pub(super) fn place(self, point: DVec2) -> String {
        let [r, z] =
            [point.x, point.y].map(|metres| rounded(metres / self.unit.metres(), PLACE_DIGITS));
        format!("r = {r}, z = {z} {}", self.unit.word())
    }
}

/// `value` to so many significant digits, without zeros at the end; in powers of ten where it would be long.
fn rounded(value: f64, digits: usize) -> String {
    let rounded: f64 = format!("{value:.*e}", digits - 1).parse().unwrap_or(value);
    let size = rounded.abs();
    if size != 0.0 && !(1e-6..1e9).contains(&size) {
        format!("{rounded:e}")
    } else {
        // -0 is 0 to a reader.
        format!("{}", rounded + 0.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const MM: Wording = Wording {
        unit: LengthUnit::Millimetre,
    };

    #[test]
    fn lengths_have_the_digits_that_help() {
        assert_eq!(MM.length(0.0125), "12.5 mm");
        assert_eq!(MM.length(0.1 + 0.2), "300 mm");
        assert_eq!(MM.length(1.0 / 3.0), "333.333333 mm");
        assert_eq!(MM.length(-0.0), "0 mm");
        assert_eq!(MM.length(1e60), "1e63 mm");
        assert_eq!(MM.length(1e-12), "1e-9 mm");
        let inch = Wording {
            unit: LengthUnit::Inch,
        };
        assert_eq!(inch.length(0.0254), "1 in");
    }

    #[test]
    fn places_give_both_coordinates() {
        assert_eq!(MM.place(DVec2::new(0.0125, -0.04)), "r = 12.5, z = -40 mm");
        assert_eq!(
            MM.place(DVec2::new(-0.0, 1.0 / 3.0)),
            "r = 0, z = 333.333 mm"
        );
    }
}
