//! What a size may differ by.

use super::Sizes;
use crate::dimension::Dimension;
use crate::expression::Names;
use crate::fault::Found;
use crate::tree::{Kind, Value};
use crate::values::{Values, dimensioned};
use crate::{Fault, LengthUnit, Tolerance};

/// Fundamental deviations of ISO 286-1:2010, table 2 and 3, as letters of a hole; of a shaft in small letters.
const DEVIATIONS: [&str; 28] = [
    "A", "B", "C", "CD", "D", "E", "EF", "F", "FG", "G", "H", "J", "JS", "K", "M", "N", "P", "R",
    "S", "T", "U", "V", "X", "Y", "Z", "ZA", "ZB", "ZC",
];

/// Standard tolerance grades of ISO 286-1:2010, table 1.
const GRADES: [&str; 20] = [
    "01", "0", "1", "2", "3", "4", "5", "6", "7", "8", "9", "10", "11", "12", "13", "14", "15",
    "16", "17", "18",
];

/// The tolerance `value` of a size of `dimension` (`None` where the size has a fault of its own).
pub(super) fn tolerance(
    value: &Value<'_>,
    dimension: Option<Dimension>,
    values: &Values<'_>,
    found: &mut Found,
) -> Option<Tolerance> {
    if let Kind::String(text) = &value.kind {
        let text = text.trim();
        if looks_like_class(text, &values.sizes) {
            return class(text, value, dimension, found);
        }
    }
    let dimension = dimension?;
    let (lower, upper) = if let Kind::List(_) = &value.kind {
        let items = value.list("`tol`", found)?;
        let [lower, upper] = items else {
            found.push(
                Fault::new(
                    "tolerance::list",
                    "a list of deviations has two: the lower and the upper",
                    value.span(),
                    "",
                )
                .help("write tol = [-0.5, 1.0]"),
            );
            return None;
        };
        let from = deviation(lower, dimension, values, found);
        let to = deviation(upper, dimension, values, found);
        let (from, to) = (from?, to?);
        if from > to {
            found.push(
                Fault::new(
                    "tolerance::order",
                    "the lower deviation is above the upper one",
                    lower.span(),
                    "the lower",
                )
                .also(upper.span(), "the upper")
                .help("the lower deviation stands first: [-0.5, 1.0]"),
            );
            return None;
        }
        (from, to)
    } else {
        let both = deviation(value, dimension, values, found)?;
        if both < 0.0 {
            found.push(
                Fault::new(
                    "tolerance::negative",
                    "a tolerance to both sides is not negative",
                    value.span(),
                    "",
                )
                .help("write it without its sign, or lower and upper: [-0.5, 0]"),
            );
            return None;
        }
        (-both, both)
    };
    Some(Tolerance::Limits(lower, upper))
}

fn deviation(
    value: &Value<'_>,
    dimension: Dimension,
    values: &Values<'_>,
    found: &mut Found,
) -> Option<f64> {
    let quantity = values.quantity(value, "a tolerance", found)?;
    let in_unit = dimensioned(
        quantity,
        dimension,
        "a tolerance of this size",
        value,
        found,
    )?;
    let metres = values.unit.to(LengthUnit::Metre, dimension.length_power());
    Some(metres.of(in_unit))
}

/// True for letters and then digits, or a fit, that are not the name of a size.
fn looks_like_class(text: &str, sizes: &Sizes<'_>) -> bool {
    let letters = text.chars().take_while(char::is_ascii_alphabetic).count();
    let digits = text[letters..]
        .chars()
        .take_while(char::is_ascii_digit)
        .count();
    let rest = &text[letters + digits..];
    letters > 0
        && digits > 0
        && (rest.is_empty() || rest.starts_with('/'))
        && sizes.index(text).is_none()
}

fn class(
    text: &str,
    value: &Value<'_>,
    dimension: Option<Dimension>,
    found: &mut Found,
) -> Option<Tolerance> {
    let letters = text.len()
        - text
            .trim_start_matches(|c: char| c.is_ascii_alphabetic())
            .len();
    let (deviation, grade) = text.split_at(letters);
    let one_case = deviation.bytes().all(|byte| byte.is_ascii_uppercase())
        || deviation.bytes().all(|byte| byte.is_ascii_lowercase());
    let known = DEVIATIONS.contains(&deviation.to_ascii_uppercase().as_str());
    let help = if text.contains('/') {
        "a size is a hole or a shaft; give the class of this one: H7"
    } else if !known || !one_case {
        "classes have a letter of ISO 286, A to ZC for holes and a to zc for shafts: H7, js6"
    } else if !GRADES.contains(&grade) {
        "grades of ISO 286 go from 01, 0, 1 to 18: H7"
    } else if dimension.is_some_and(|dimension| dimension != Dimension::LENGTH) {
        "classes of ISO 286 are for lengths; write this tolerance as a number"
    } else {
        return Some(Tolerance::Iso286(text.to_owned()));
    };
    found.push(
        Fault::new(
            "tolerance::class",
            format!(
                "`{}` is no tolerance class for this size",
                crate::nearest::shown(text)
            ),
            value.span(),
            "",
        )
        .help(help),
    );
    None
}

/// Checks a general tolerance: `ISO 2768-m`, `ISO 2768-mK`, `ISO 8062-3 DCTG 10`.
pub(crate) fn general_tolerance(value: &Value<'_>, found: &mut Found) -> Option<String> {
    let text = value.text("`general_tolerance`", found)?.trim();
    let words: Vec<&str> = text.split_whitespace().collect();
    let right = match words.as_slice() {
        // The letter of ISO 2768-1 for lengths and angles, then that of ISO 2768-2 for form.
        ["ISO", class] => class.strip_prefix("2768-").is_some_and(|class| {
            let mut letters = class.chars();
            matches!(letters.next(), Some('f' | 'm' | 'c' | 'v'))
                && matches!(letters.next(), None | Some('H' | 'K' | 'L'))
                && letters.next().is_none()
        }),
        ["ISO", "8062-3", grade @ ..] => {
            let grade = grade.concat();
            let number = grade.strip_prefix("DCTG").and_then(|grade| {
                let plain = grade.bytes().all(|byte| byte.is_ascii_digit());
                grade.parse::<u32>().ok().filter(|_| plain)
            });
            number.is_some_and(|grade| (1..=16).contains(&grade))
        }
        _ => false,
    };
    if !right {
        found.push(
            Fault::new(
                "part::general_tolerance",
                "this general tolerance is not known",
                value.span(),
                "",
            )
            .help("write ISO 2768-f, -m, -c or -v (with K and the like after it), or ISO 8062-3 DCTG 1 to DCTG 16"),
        );
        return None;
    }
    Some(text.to_owned())
}
