//! What the drawing says of the finished part, judged.

use crate::figures::{Kind, Scale, System};
use crate::record::{Exact, Judgement, Verdict};
use part::{Expectation, Expected, Part};

/// How far beyond a limit a figure may lie, relative to the figure, and still be on it: ten times the relative error
/// that the exact figures are promised to keep on awkward parts. A limit and a figure that are equal on paper differ by
/// rounding: 0.101 - 0.1 is more than 0.001.
const ROUNDING: f64 = 1e-11;

/// What [`Exact`] says of each quantity that `part` expects something of, in the order of the file.
pub(crate) fn judgements(part: &Part, exact: &Exact) -> Vec<Judgement> {
    part.expect
        .iter()
        .map(|expectation| judged(expectation, found(expectation.quantity, exact)))
        .collect()
}

/// The answer to all of them; `None` where nothing was expected.
pub(crate) fn verdict(judgements: &[Judgement]) -> Option<Verdict> {
    let reasons: Vec<String> = judgements.iter().filter_map(reason).collect();
    (!judgements.is_empty()).then_some(Verdict {
        holds: reasons.is_empty(),
        reasons,
    })
}

fn judged(expectation: &Expectation, found: f64) -> Judgement {
    let (lower, upper) = expectation.deviation;
    let difference = found - expectation.value;
    let slack = ROUNDING * found.abs().max(expectation.value.abs());
    let (quantity, kind) = named(expectation.quantity);
    Judgement {
        quantity,
        wanted: expectation.value,
        deviation: [lower, upper],
        found,
        difference,
        holds: lower - slack <= difference && difference <= upper + slack,
        kind,
        system: System::of_text(&expectation.written),
        written: expectation.written.clone(),
    }
}

/// Why a judgement is NO, in words.
fn reason(judgement: &Judgement) -> Option<String> {
    let (beyond, side) = judgement.excess()?;
    let scale = |size| Scale::of_system(judgement.kind, judgement.system, size);
    Some(format!(
        "{} is {}, {} {side} the limit of {}",
        judgement.quantity,
        scale(judgement.found).text(judgement.found),
        scale(beyond).text(beyond),
        judgement.written
    ))
}

impl Judgement {
    /// How far the figure lies beyond its limit (SI, positive), and on which side: `above`, `below`. `None` where it
    /// holds.
    pub fn excess(&self) -> Option<(f64, &'static str)> {
        let [lower, upper] = self.deviation;
        match self {
            Self { holds: true, .. } => None,
            _ if self.difference < lower => Some((lower - self.difference, "below")),
            _ => Some((self.difference - upper, "above")),
        }
    }
}

/// The quantity's name in a part file, and what it is.
fn named(quantity: Expected) -> (&'static str, Kind) {
    match quantity {
        Expected::Mass => ("mass", Kind::Mass),
        Expected::Volume => ("volume", Kind::Volume),
        Expected::Surface => ("surface", Kind::Area),
        Expected::CentreZ => ("centre_z", Kind::Length),
        Expected::InertiaAxis => ("inertia_axis", Kind::Inertia),
        Expected::LargestDiameter => ("largest_d", Kind::Length),
        Expected::Length => ("length", Kind::Length),
    }
}

fn found(quantity: Expected, exact: &Exact) -> f64 {
    match quantity {
        Expected::Mass => exact.mass,
        Expected::Volume => exact.volume,
        Expected::Surface => exact.surface,
        Expected::CentreZ => exact.centre[2],
        Expected::InertiaAxis => exact.inertia_about_axis,
        Expected::LargestDiameter => exact.largest_diameter,
        Expected::Length => exact.length,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn expectation(quantity: Expected, value: f64, deviation: (f64, f64)) -> Expectation {
        Expectation {
            quantity,
            value,
            deviation,
            written: "as written".to_owned(),
            span: 0..0,
        }
    }

    #[test]
    fn a_figure_within_its_limits_holds() {
        let mass = expectation(Expected::Mass, 12.4, (-0.2, 0.3));
        for (found, holds) in [
            (12.4, true),
            (12.2, true),
            (12.7, true),
            (12.199_999, false),
            (12.700_001, false),
            (f64::NAN, false),
        ] {
            assert_eq!(judged(&mass, found).holds, holds, "{found}");
        }
    }

    #[test]
    fn a_figure_on_its_limit_holds_whatever_the_rounding() {
        let length = expectation(Expected::Length, 0.1, (-0.001, 0.001));
        let on_the_limit = judged(&length, 0.101);
        assert!(on_the_limit.difference > 0.001 && on_the_limit.holds);
        assert!(judged(&length, 0.099).holds);
        assert!(!judged(&length, 0.101_000_001).holds);
    }

    #[test]
    fn a_reason_says_what_where_and_by_how_much() {
        let heavy = judged(&expectation(Expected::Mass, 12.4, (-0.2, 0.2)), 13.0);
        let low = judged(&expectation(Expected::CentreZ, 0.1, (-0.001, 0.001)), 0.05);
        let verdict = verdict(&[heavy, low]).unwrap();
        assert!(!verdict.holds);
        assert_eq!(
            verdict.reasons,
            [
                "mass is 13.000 kg, 400.00 g above the limit of as written",
                "centre_z is 50.000 mm, 49.000 mm below the limit of as written",
            ]
        );
    }

    #[test]
    fn without_expectations_there_is_no_verdict() {
        assert_eq!(verdict(&[]), None);
        let good = judged(&expectation(Expected::Volume, 1.0, (-0.1, 0.1)), 1.05);
        assert_eq!(good.excess(), None);
        assert_eq!(
            verdict(&[good]),
            Some(Verdict {
                holds: true,
                reasons: Vec::new()
            })
        );
    }
}
