//! A density as people write it.

/// Units of density, and how many kg/m3 one of them is. The pound is 0.45359237 kg, the inch 25.4 mm, exactly.
const UNITS: [(&str, f64); 8] = [
    ("kg/m3", 1.0),
    ("g/cm3", 1e3),
    ("g/ml", 1e3),
    ("kg/dm3", 1e3),
    ("kg/l", 1e3),
    ("t/m3", 1e3),
    ("lb/in3", 0.453_592_37 / (0.0254 * 0.0254 * 0.0254)),
    ("lb/ft3", 0.453_592_37 / (0.3048 * 0.3048 * 0.3048)),
];

/// The density that `text` gives, in kg/m3: a number and a unit, `8800 kg/m3`, `8.8 g/cm3`, `0.318 lb/in3`.
///
/// # Errors
/// It is no such thing, or not a positive finite number; the message says what was expected.
pub fn density(text: &str) -> Result<f64, String> {
    let text = text.trim();
    let end = text
        .find(|c: char| c.is_whitespace() || c.is_alphabetic() && !matches!(c, 'e' | 'E'))
        .unwrap_or(text.len());
    let (number, unit) = text.split_at(end);
    let number: f64 = number
        .parse()
        .map_err(|wrong| format!("`{number}` is not a number ({wrong})"))?;
    let unit = unit.trim();
    let (_, factor) = UNITS
        .iter()
        .find(|(name, _)| *name == unit)
        .ok_or_else(|| format!("a density is a number and one of {}", units()))?;
    positive(number * factor)
}

/// `value` where it can be a density.
pub(crate) fn positive(value: f64) -> Result<f64, String> {
    if value.is_finite() && value > 0.0 {
        Ok(value)
    } else {
        Err("a density is more than 0 and finite".to_owned())
    }
}

fn units() -> String {
    UNITS.map(|(name, _)| name).join(", ")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn units_are_turned_into_kg_per_m3() {
        assert_eq!(density("8800 kg/m3"), Ok(8800.0));
        assert_eq!(density("8.8g/cm3"), Ok(8800.0));
        assert_eq!(density(" 1e3 kg/m3 "), Ok(1000.0));
        // Water at 62.4 pounds a cubic foot and steel at 0.2836 a cubic inch, as handbooks in those units have them.
        assert!((density("62.428 lb/ft3").unwrap() - 1000.0).abs() < 0.01);
        assert!((density("0.2836 lb/in3").unwrap() - 7850.0).abs() < 1.0);
    }

    #[test]
    fn what_is_no_density_is_told_so() {
        for (text, message) in [
            ("heavy", "`` is not a number"),
            ("8800", "one of kg/m3"),
            ("8800 kg", "one of kg/m3"),
            ("8,8 g/cm3", "`8,8` is not a number"),
            ("0 kg/m3", "more than 0"),
            ("-1 kg/m3", "more than 0"),
            ("1e400 kg/m3", "finite"),
            ("", "is not a number"),
        ] {
            let told = density(text).unwrap_err();
            assert!(told.contains(message), "{text}: {told}");
        }
    }
}
