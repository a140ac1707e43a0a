//! Round steel bar: mass of a metre, steel of 7850 kg/m3, as EN 10060 and EN 10080 print it (from memory; the rows up to
//! 16 mm seen in tables of bar weights).

use checks::{Printed, exact, ring};

/// Diameter in millimetres, mass of a metre in kilograms.
const ROWS: [(f64, &str); 13] = [
    (6.0, "0.222"),
    (8.0, "0.395"),
    (10.0, "0.617"),
    (12.0, "0.888"),
    (14.0, "1.21"),
    (16.0, "1.58"),
    (20.0, "2.47"),
    (25.0, "3.85"),
    (28.0, "4.83"),
    (30.0, "5.55"),
    (32.0, "6.31"),
    (40.0, "9.86"),
    (50.0, "15.4"),
];

#[test]
fn a_metre_of_bar_weighs_what_the_standards_print() {
    for (diameter, kilograms) in ROWS {
        let found = exact(&ring("mm", 7850.0, 0.0, diameter, 1000.0)).mass;
        assert!(
            Printed::of(kilograms).admits(found, 0.0),
            "{diameter}: {found} kg/m, printed {kilograms} kg/m"
        );
    }
}
