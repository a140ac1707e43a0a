//! Figures for people: units that suit the size, and as many digits as mean something.
//!
//! A [`Scale`] is chosen once for figures that are read together (a column, the coordinates of a point), from the size of
//! the largest of them. All of them are then shown in one unit with one number of decimals, so that points stand under
//! points, and what is zero but for rounding is shown as zero.
//!
//! ```
//! use strickle::figures::{Kind, Scale};
//! let mass = Scale::of(Kind::Mass, 57.1849);
//! assert_eq!(mass.text(57.1849), "57.185 kg");
//! assert_eq!(mass.text(0.5601), "0.560 kg");
//! assert_eq!(Scale::of(Kind::Volume, 6.2e-5).text(6.2e-5), "62.000 cm3");
//! ```

mod density;
mod scale;
mod units;

pub use density::densities;
pub use scale::Scale;
pub use units::{Kind, System};

/// `text` without control characters, which could move a terminal's cursor or change its colours.
pub fn plain(text: &str) -> String {
    text.chars()
        .map(|c| if c.is_control() { '?' } else { c })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn plain_text_cannot_steer_a_terminal() {
        assert_eq!(plain("bell\u{1b}[2J\n\u{9b}0m"), "bell?[2J??0m");
        assert_eq!(plain("Glocke für Ø 320"), "Glocke für Ø 320");
    }
}
