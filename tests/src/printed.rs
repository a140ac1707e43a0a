//! A figure as a page prints it, and how much its last digit leaves open.

/// A published figure: its value and what its rounding leaves open.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Printed {
    /// The figure.
    pub value: f64,
    /// Half a unit of its last printed digit.
    pub half_digit: f64,
}

impl Printed {
    /// The figure printed as `text`: `0.443`, `135`, `7.65e6`.
    ///
    /// # Panics
    /// `text` is not a plain decimal number.
    pub fn of(text: &str) -> Self {
        let (digits, exponent) = text.split_once('e').unwrap_or((text, "0"));
        let decimals = digits.split_once('.').map_or(0, |(_, after)| after.len());
        let exponent: i64 = exponent.parse().expect("a decimal exponent");
        let last = exponent - i64::try_from(decimals).expect("a short number");
        Self {
            value: text.parse().expect("a decimal number"),
            half_digit: format!("0.5e{last}").parse().expect("a decimal number"),
        }
    }

    /// True where `computed` could have been printed as this figure, given that what it is computed from is itself known
    /// to the relative accuracy `given` only (a density that a table rounds).
    ///
    /// ```
    /// let washer = checks::Printed::of("0.443");
    /// assert!(washer.admits(0.443_49, 0.0) && !washer.admits(0.443_51, 0.0));
    /// assert!(washer.admits(0.443_51, 1e-3));
    /// assert!(checks::Printed::of("7.65e6").admits(7_654_999.0, 0.0));
    /// ```
    pub fn admits(&self, computed: f64, given: f64) -> bool {
        // One part in 1e12 for the decimal numbers themselves, which are rounded to binary.
        (computed - self.value).abs() <= self.half_digit + (given + 1e-12) * self.value.abs()
    }
}
