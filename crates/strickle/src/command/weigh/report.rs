//! The page that `weigh` prints of one part.

use super::{bodies, expected, inch, surfaces, theorems, whole};
use crate::style::{CAUTION, QUIET, STRONG};
use part::{LengthUnit, Part};
use strickle::Study;
use strickle::figures::plain;
use strickle::record::Record;
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
        title(&study.record),
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
        closing(study),
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

/// Name, number and file.
fn title(record: &Record) -> String {
    let name = plain(&record.part.name);
    let number = record.part.number.as_deref().map(plain).unwrap_or_default();
    let blank = WIDTH.saturating_sub(name.width() + number.width()).max(2);
    let blank = if number.is_empty() { 0 } else { blank };
    format!(
        "{STRONG}{name}{STRONG:#}{:blank$}{number}\n{QUIET}{}{QUIET:#}\n",
        "",
        plain(&record.part.file)
    )
}

/// The self-check, and a caution where the part is heavy.
fn closing(study: &Study) -> String {
    let exact = study.exact();
    let check = format!(
        "{QUIET}Self-check: the theorems used backwards give both centroids to within {:.0e}.{QUIET:#}\n",
        exact.implied_centroid.difference
    );
    let most = exact.mass_range.map_or(exact.mass, |[_, most]| most);
    if most <= LIFTING {
        return check;
    }
    format!(
        "{check}{CAUTION}Caution:{CAUTION:#} heavier than {LIFTING} kg. Lift it with tackle that is rated for it, keep to your local\n\
         rules on lifting, and weigh the real part first.\n"
    )
}
