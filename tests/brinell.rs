//! Brinell hardness: the tables of ISO 6506-4 (from memory) print, for each diameter of the dent, the load over the dent's
//! surface, a zone of the ball: 3000 kgf on a ball of 10 mm. It is the first theorem with a printed answer.

use checks::{Printed, exact, one_body};

/// Diameter of the dent in millimetres, hardness HBW 10/3000.
const ROWS: [(f64, &str); 9] = [
    (2.4, "653"),
    (2.5, "601"),
    (3.0, "415"),
    (3.5, "302"),
    (4.0, "229"),
    (4.5, "179"),
    (5.0, "143"),
    (5.5, "116"),
    (6.0, "95.5"),
];

#[test]
fn dents_have_the_surface_that_the_hardness_tables_imply() {
    for (dent, hardness) in ROWS {
        // A block of 40 mm with the dent in its top, the ball's centre on the axis.
        let bottom = (25.0 - dent * dent / 4.0_f64).sqrt() - 5.0;
        let block = one_body(
            "mm",
            7850.0,
            &format!(
                "outline = [{{ d = 0, z = -20 }}, {{ d = 40 }}, {{ z = 0 }}, {{ d = {dent} }},\n\
                 {{ d = 0, z = {bottom}, arc = 5, centre_on = \"right\", name = \"dent\" }}]"
            ),
        );
        let surface = exact(&block)
            .surfaces
            .iter()
            .find(|surface| surface.name.as_deref() == Some("dent"))
            .expect("the dent has a name")
            .area;
        let found = 3000.0 / (surface * 1e6);
        assert!(
            Printed::of(hardness).admits(found, 0.0),
            "{dent}: HBW {found}, printed {hardness}"
        );
    }
}
