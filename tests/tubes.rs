//! Steel tubes: mass of a metre by EN 10220, steel of 7850 kg/m3. From memory; the standard computes each row as
//! (D - T) T 0.0246615 kg/m and prints three digits.

use checks::{Printed, exact, ring};

/// Outside diameter and wall in millimetres, mass of a metre in kilograms.
const ROWS: [(f64, f64, &str); 11] = [
    (21.3, 2.6, "1.20"),
    (33.7, 3.2, "2.41"),
    (60.3, 3.6, "5.03"),
    (88.9, 4.0, "8.38"),
    (114.3, 4.5, "12.2"),
    (168.3, 5.6, "22.5"),
    (219.1, 6.3, "33.1"),
    (273.0, 6.3, "41.4"),
    (323.9, 7.1, "55.5"),
    (406.4, 8.8, "86.3"),
    (508.0, 11.0, "135"),
];

#[test]
fn a_metre_of_tube_weighs_what_the_standard_prints() {
    for (outside, wall, kilograms) in ROWS {
        let found = exact(&ring("mm", 7850.0, outside - 2.0 * wall, outside, 1000.0)).mass;
        assert!(
            Printed::of(kilograms).admits(found, 0.0),
            "{outside} x {wall}: {found} kg/m, printed {kilograms} kg/m"
        );
        // The standard's own formula; its factor, pi 7850e-6, is printed to six digits.
        let formula = (outside - wall) * wall * 0.024_661_5;
        assert!(
            (found / formula - 1.0).abs() < 0.5e-7 / 0.0246,
            "{outside} x {wall}: {found} {formula}"
        );
    }
}
