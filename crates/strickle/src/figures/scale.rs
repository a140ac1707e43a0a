//! One unit and one number of decimals for figures that are read together.

use super::units::{Kind, System, Unit, suited};

/// Digits of the figure that a scale is chosen for.
const DIGITS: i32 = 5;

/// Digits of a small difference.
const DIFFERENCE_DIGITS: i32 = 2;

/// Digits that the smallest figure of a column gets too, as far as [`MOST_DECIMALS`] allow.
const LEAST_DIGITS: i32 = 3;

/// Most decimals that a column gets for the sake of its smallest figure.
const MOST_DECIMALS: i32 = 5;

/// The powers of ten, in the unit, of figures that are written out; others are written with a power of ten.
const WRITTEN_OUT: std::ops::RangeInclusive<i32> = -4..=8;

/// A unit and a number of decimals.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Scale {
    unit: Unit,
    decimals: Decimals,
}

#[derive(Debug, Clone, Copy, PartialEq)]
enum Decimals {
    /// So many behind the point.
    Fixed(usize),
    /// So many behind the point of the mantissa.
    Power(usize),
}

impl Scale {
    /// The scale for a figure of the magnitude `size` (SI), in metric units.
    pub fn of(kind: Kind, size: f64) -> Self {
        Self::of_system(kind, System::Metric, size)
    }

    /// The scale for a small difference of the magnitude `size` (SI), in metric units: two digits say enough of it.
    pub fn of_difference(kind: Kind, size: f64) -> Self {
        Self::with_digits(kind, System::Metric, size, DIFFERENCE_DIGITS)
    }

    /// The scale for a figure of the magnitude `size` (SI).
    pub fn of_system(kind: Kind, system: System, size: f64) -> Self {
        Self::with_digits(kind, system, size, DIGITS)
    }

    fn with_digits(kind: Kind, system: System, size: f64, digits: i32) -> Self {
        let unit = suited(kind, system, size.abs());
        let decimals = match power(size / unit.size) {
            None => Decimals::Fixed(0),
            Some(power) if WRITTEN_OUT.contains(&power) => fixed(digits - 1 - power),
            Some(_) => Decimals::Power((digits - 1).unsigned_abs() as usize),
        };
        Self { unit, decimals }
    }

    /// The scale for a column of figures (SI), in metric units: that of the largest, with decimals enough for the
    /// smallest to say something.
    pub fn of_column(kind: Kind, values: impl IntoIterator<Item = f64>) -> Self {
        Self::of_system_column(kind, System::Metric, values)
    }

    /// The scale for a column of figures (SI): that of the largest, with decimals enough for the smallest to say
    /// something.
    pub fn of_system_column(
        kind: Kind,
        system: System,
        values: impl IntoIterator<Item = f64>,
    ) -> Self {
        let sizes: Vec<f64> = values
            .into_iter()
            .map(f64::abs)
            .filter(|size| *size > 0.0)
            .collect();
        let largest = sizes.iter().copied().fold(0.0, f64::max);
        let smallest = sizes.iter().copied().fold(largest, f64::min);
        let scale = Self::of_system(kind, system, largest);
        let (Decimals::Fixed(decimals), Some(power)) =
            (scale.decimals, power(smallest / scale.unit.size))
        else {
            return scale;
        };
        let wanted = (LEAST_DIGITS - 1 - power).min(MOST_DECIMALS);
        let Decimals::Fixed(wanted) = fixed(wanted) else {
            return scale;
        };
        Self {
            decimals: Decimals::Fixed(decimals.max(wanted)),
            ..scale
        }
    }

    /// The number of `value` (SI) in this unit, without the unit.
    pub fn number(&self, value: f64) -> String {
        let value = value / self.unit.size;
        let text = match self.decimals {
            Decimals::Fixed(decimals) => format!("{value:.decimals$}"),
            Decimals::Power(decimals) => format!("{value:.decimals$e}"),
        };
        // What rounds to zero has no sign.
        match text.strip_prefix('-') {
            Some(digits) if !digits.bytes().any(|byte| matches!(byte, b'1'..=b'9')) => {
                digits.to_owned()
            }
            _ => text,
        }
    }

    /// The name of the unit.
    pub fn unit(&self) -> &'static str {
        self.unit.name
    }

    /// `value` (SI) with its unit.
    pub fn text(&self, value: f64) -> String {
        format!("{} {}", self.number(value), self.unit.name)
    }

    /// `value` (SI) with its sign and its unit.
    pub fn signed(&self, value: f64) -> String {
        let text = self.text(value);
        if text.starts_with('-') {
            text
        } else {
            format!("+{text}")
        }
    }
}

/// So many decimals, or none.
fn fixed(decimals: i32) -> Decimals {
    Decimals::Fixed(usize::try_from(decimals).unwrap_or(0))
}

/// The power of ten of the first of [`DIGITS`] digits, after rounding; `None` for zero and for what is not finite.
fn power(value: f64) -> Option<i32> {
    if value == 0.0 || !value.is_finite() {
        return None;
    }
    let digits = (DIGITS - 1).unsigned_abs() as usize;
    let text = format!("{value:.digits$e}");
    let (_, power) = text.split_once('e')?;
    power.parse().ok()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn five_digits_in_a_unit_that_suits() {
        for (kind, value, text) in [
            (Kind::Mass, 12.345_678, "12.346 kg"),
            (Kind::Mass, 0.012_345_678, "12.346 g"),
            (Kind::Mass, 1_234_567.8, "1234.6 t"),
            (Kind::Length, 0.320, "320.00 mm"),
            (Kind::Length, 0.000_25, "0.25000 mm"),
            (Kind::Area, 0.123_456, "1234.6 cm2"),
            (Kind::Volume, 0.002_345_678, "2.3457 l"),
            (Kind::Volume, 0.999_999_9e-3, "1000.0 cm3"),
            (Kind::Density, 7850.0, "7850.0 kg/m3"),
        ] {
            assert_eq!(Scale::of(kind, value).text(value), text);
        }
    }

    #[test]
    fn all_digits_before_the_point_are_written() {
        assert_eq!(
            Scale::of(Kind::Volume, 123_456.7).text(123_456.7),
            "123457 m3"
        );
        assert_eq!(Scale::of(Kind::Mass, 1.5e14).text(1.5e14), "1.5000e11 t");
        assert_eq!(
            Scale::of(Kind::Volume, 2.5e-15).text(2.5e-15),
            "2.5000e-6 mm3"
        );
    }

    #[test]
    fn what_is_zero_beside_the_size_is_shown_as_zero() {
        let scale = Scale::of(Kind::Length, 0.45);
        assert_eq!(scale.text(-1e-17), "0.00 mm");
        assert_eq!(scale.text(0.0), "0.00 mm");
        assert_eq!(scale.text(-0.001), "-1.00 mm");
        assert_eq!(scale.signed(0.001), "+1.00 mm");
        assert_eq!(scale.signed(-0.001), "-1.00 mm");
        assert_eq!(Scale::of(Kind::Length, 0.0).text(0.0), "0 um");
    }

    #[test]
    fn a_column_has_one_unit_and_one_number_of_decimals() {
        let scale = Scale::of_column(Kind::Mass, [56.625_1, 0.560_12]);
        assert_eq!(scale.text(56.625_1), "56.625 kg");
        assert_eq!(scale.text(0.560_12), "0.560 kg");
        let scale = Scale::of_column(Kind::Mass, [5662.5, 0.560_12, 0.0]);
        assert_eq!(scale.text(5662.5), "5.66250 t");
        assert_eq!(scale.text(0.560_12), "0.00056 t");
        assert_eq!(Scale::of_column(Kind::Mass, []).text(0.0), "0 mg");
    }

    #[test]
    fn inch_units_agree_with_their_definitions() {
        let pounds = Scale::of_system(Kind::Mass, System::Inch, 10.0);
        assert_eq!(pounds.text(10.0), "22.046 lb");
        let inches = Scale::of_system(Kind::Length, System::Inch, 0.254);
        assert_eq!(inches.text(0.254), "10.000 in");
    }

    #[test]
    fn nothing_panics() {
        for value in [f64::NAN, f64::INFINITY, f64::MAX, f64::MIN_POSITIVE, -5.0] {
            for kind in [Kind::Length, Kind::Inertia, Kind::Density] {
                Scale::of(kind, value).signed(value);
                Scale::of_column(kind, [value, 1.0]).text(value);
            }
        }
    }
}
