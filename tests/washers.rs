//! Plain washers: dimensions and masses of DIN 125-1 form A (now ISO 7089), steel of 7850 kg/m3.
//! Source: fastener tables after DIN 125 (seen). The tables round each mass to three digits from the nominal dimensions.

use checks::{Printed, exact, ring};

/// Thread, inside and outside diameter and thickness in millimetres, mass of one in grams.
const ROWS: [(&str, f64, f64, f64, &str); 13] = [
    ("M5", 5.3, 10.0, 1.0, "0.443"),
    ("M6", 6.4, 12.0, 1.6, "1.02"),
    ("M8", 8.4, 16.0, 1.6, "1.83"),
    ("M10", 10.5, 20.0, 2.0, "3.57"),
    ("M12", 13.0, 24.0, 2.5, "6.27"),
    ("M14", 15.0, 28.0, 2.5, "8.62"),
    ("M16", 17.0, 30.0, 3.0, "11.3"),
    ("M18", 19.0, 34.0, 3.0, "14.7"),
    ("M20", 21.0, 37.0, 3.0, "17.2"),
    ("M22", 23.0, 39.0, 3.0, "18.3"),
    ("M24", 25.0, 44.0, 4.0, "32.3"),
    ("M27", 28.0, 50.0, 4.0, "42.3"),
    ("M30", 31.0, 56.0, 4.0, "53.6"),
];

#[test]
fn washers_weigh_what_the_tables_print() {
    for (thread, inside, outside, thickness, grams) in ROWS {
        let found = exact(&ring("mm", 7850.0, inside, outside, thickness)).mass * 1e3;
        assert!(
            Printed::of(grams).admits(found, 0.0),
            "{thread}: {found} g, printed {grams} g"
        );
    }
}
