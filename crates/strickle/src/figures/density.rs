//! Densities in a column.

/// `densities` (kg/m3) as a column to be set to the right: whole numbers, and a decimal only where a density has one.
/// Densities are known to three or four digits; what stands behind the first decimal means nothing.
pub fn densities(densities: &[f64]) -> Vec<String> {
    let texts: Vec<String> = densities
        .iter()
        .map(|value| format!("{value:.1}"))
        .collect();
    let whole = texts.iter().all(|text| text.ends_with(".0"));
    let instead = if whole { "" } else { "  " };
    texts
        .into_iter()
        .map(|text| match text.strip_suffix(".0") {
            Some(number) => format!("{number}{instead}"),
            None => text,
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn points_stand_under_points() {
        assert_eq!(densities(&[7850.0, 998.2]), ["7850  ", "998.2"]);
        assert_eq!(densities(&[7850.0, 1025.0]), ["7850", "1025"]);
        assert_eq!(densities(&[7263.96]), ["7264"]);
        assert_eq!(densities(&[]), [""; 0]);
    }
}
