//! The page that `weigh` prints of one part.

use super::{bodies, expected, inch, surfaces, theorems, whole};
use crate::style::{CAUTION, QUIET, STRONG};
use part::{LengthUnit, Part};
use strickle::Study;
use strickle::figures::plain;
use unicode_width::UnicodeWidthStr as _;

/// Columns of the page.
pub(super) const WIDTH: usize = 80;

/// Mass from which lifting by hand needs care, kg: the limit that ISO 11228-1 and many national rules start from.
const LIFTING: f64 = 25.0;

/// The page of a part that was studied.
pub(super) fn of(study: &Study) -> String {
    let (part, exact) = (&study.part, study.exact());
    let inches = matches!(part.unit, LengthUnit::Inch | LengthUnit::Foot);
    let sections = [
        title(study),
        theorems::of(exact, part),
        bodies::of(exact),
        whole::of(exact, part),
        surfaces::of(exact),
        if inches {
            inch::of(exact)
        } else {
            String::new()
        },
        expected::of(&study.record),
        self_check(study) + &caution(study),
    ];
    let sections: Vec<String> = sections
        .into_iter()
        .filter(|section| !section.is_empty())
        .collect();
    sections.join("\n")
}

/// True where the part is a full turn.
pub(super) fn is_full_turn(part: &Part) -> bool {
    part.revolve == std::f64::consts::TAU
}

/// Name, number, file, and the angle of a part turn.
pub(in crate::command) fn title(study: &Study) -> String {
    let record = &study.record;
    let name = plain(&record.part.name);
    let number = record.part.number.as_deref().map(plain).unwrap_or_default();
    let blank = WIDTH.saturating_sub(name.width() + number.width()).max(2);
    let blank = if number.is_empty() { 0 } else { blank };
    let turn = if is_full_turn(&study.part) {
        String::new()
    } else {
        format!(", turned through {} degrees", degrees(study.part.revolve))
    };
    format!(
        "{STRONG}{name}{STRONG:#}{:blank$}{number}\n{QUIET}{}{turn}{QUIET:#}\n",
        "",
        plain(&record.part.file)
    )
}

/// An angle with at most five decimals, without zeros at the end.
fn degrees(angle: f64) -> String {
    let text = format!("{:.5}", angle.to_degrees());
    text.trim_end_matches('0').trim_end_matches('.').to_owned()
}

/// The self-check.
fn self_check(study: &Study) -> String {
    format!(
        "{QUIET}Self-check: the theorems used backwards give both centroids to {} digits.{QUIET:#}\n",
        agreeing_digits(study.exact().implied_centroid.difference)
    )
}

/// A caution where the part is heavy.
pub(in crate::command) fn caution(study: &Study) -> String {
    let exact = study.exact();
    let most = exact.mass_range.map_or(exact.mass, |[_, most]| most);
    if most <= LIFTING {
        return String::new();
    }
    format!(
        "{CAUTION}Caution:{CAUTION:#} heavier than {LIFTING} kg. Lift it with tackle rated for it, keep to\n\
         your local rules on lifting, and weigh the real part first.\n"
    )
}

/// How many digits two figures share that differ by `difference` of their size; 15 where a number holds no more.
fn agreeing_digits(difference: f64) -> i32 {
    let text = format!("{:e}", difference.max(1e-15));
    let power = text
        .split_once('e')
        .and_then(|(_, power)| power.parse().ok());
    power.map_or(0, |power: i32| (-power).max(0))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn digits_that_agree_are_counted() {
        for (difference, digits) in [
            (0.0, 15),
            (2e-16, 15),
            (1e-15, 15),
            (3e-14, 14),
            (0.05, 2),
            (0.5, 1),
            (7.0, 0),
            (f64::INFINITY, 0),
        ] {
            assert_eq!(agreeing_digits(difference), digits, "{difference}");
        }
    }

    #[test]
    fn degrees_have_no_needless_zeros() {
        assert_eq!(degrees(std::f64::consts::FRAC_PI_2), "90");
        assert_eq!(degrees(1.0), "57.29578");
        assert_eq!(degrees(0.5_f64.to_radians()), "0.5");
    }
}
