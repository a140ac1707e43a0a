//! Bearing balls: masses as trade tables print them (from memory), chromium steel taken as 7800 kg/m3.

use checks::{Printed, exact, one_body};

/// Diameter in millimetres, mass in grams.
const ROWS: [(f64, &str); 8] = [
    (3.175, "0.131"),
    (5.0, "0.511"),
    (6.35, "1.05"),
    (9.525, "3.53"),
    (10.0, "4.08"),
    (12.7, "8.37"),
    (20.0, "32.7"),
    (25.4, "66.9"),
];

#[test]
fn balls_weigh_what_the_tables_print() {
    for (diameter, grams) in ROWS {
        let half_circle = format!(
            "outline = [{{ r = 0, z = {} }}, {{ z = {}, centre = {{ r = 0, z = 0 }}, centre_on = \"left\" }}]",
            -diameter / 2.0,
            diameter / 2.0
        );
        let found = exact(&one_body("mm", 7800.0, &half_circle)).mass * 1e3;
        assert!(
            Printed::of(grams).admits(found, 0.0),
            "{diameter}: {found} g, printed {grams} g"
        );
    }
}
