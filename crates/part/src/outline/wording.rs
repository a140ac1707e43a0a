//! Lengths and places as a message gives them: in the part's unit, with the digits that help.

use crate::LengthUnit;
use glam::DVec2;

/// Digits of a place: enough to find it on the drawing.
const PLACE_DIGITS: usize = 6;

/// Digits of a length that is compared with another one.
const LENGTH_DIGITS: usize = 9;

/// Digits of a bound.
const BOUND_DIGITS: usize = 6;

/// Relative difference that is the rounding of a computation.
const SAME: f64 = 1e-12;

/// Writes lengths in one unit.
#[derive(Debug, Clone, Copy)]
pub(super) struct Wording {
    /// The part's unit.
    pub(super) unit: LengthUnit,
}

impl Wording {
    /// `12.5 mm`
    pub(super) fn length(self, metres: f64) -> String {
        let number = significant(metres / self.unit.metres(), LENGTH_DIGITS);
        format!("{number} {}", self.unit.word())
    }

    /// A length that is a largest one: a length with these digits still fits.
    pub(super) fn at_most(self, metres: f64) -> String {
        self.bound(metres, false)
    }

    /// A length that is a least one: a length with these digits still reaches.
    pub(super) fn at_least(self, metres: f64) -> String {
        self.bound(metres, true)
    }

    fn bound(self, metres: f64, up: bool) -> String {
        let value = metres / self.unit.metres();
        let text = format!("{value:.*e}", BOUND_DIGITS - 1);
        let nearest: f64 = text.parse().unwrap_or(value);
        let place = last_place(value);
        // What differs from round digits by the rounding of a computation is meant to be round.
        let slack = SAME * value.abs();
        let bound = if up && nearest < value - slack {
            nearest + place
        } else if !up && nearest > value + slack {
            nearest - place
        } else {
            nearest
        };
        format!("{} {}", significant(bound, BOUND_DIGITS), self.unit.word())
    }

    /// `r = 12.5, z = -40 mm`
    pub(super) fn place(self, point: DVec2) -> String {
        let [r, z] =
            [point.x, point.y].map(|metres| significant(metres / self.unit.metres(), PLACE_DIGITS));
        format!("r = {r}, z = {z} {}", self.unit.word())
    }
}

/// What one more in the last of [`BOUND_DIGITS`] digits of `value` comes to.
fn last_place(value: f64) -> f64 {
    let text = format!("{value:e}");
    let exponent = text
        .split_once('e')
        .and_then(|(_, e)| e.parse::<i32>().ok());
    let place = exponent.unwrap_or(0) + 1 - i32::try_from(BOUND_DIGITS).unwrap_or(0);
    format!("1e{place}").parse().unwrap_or(0.0)
}

/// `value` to so many significant digits, without zeros at the end; in powers of ten where it would be long.
fn significant(value: f64, digits: usize) -> String {
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
    fn bounds_hold_as_they_are_written() {
        assert_eq!(MM.at_most(0.005_777_472_114), "5.77747 mm");
        assert_eq!(MM.at_most(0.005_777_477_9), "5.77747 mm");
        assert_eq!(MM.at_least(0.005_777_472_114), "5.77748 mm");
        assert_eq!(MM.at_most(0.01 * (1.0 - f64::EPSILON)), "10 mm");
        assert_eq!(MM.at_least(0.015), "15 mm");
        assert_eq!(MM.at_most(9.999_999), "9999.99 mm");
        assert_eq!(MM.at_least(1e-12), "1e-9 mm");
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
