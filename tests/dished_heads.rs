//! Dished heads of pressure vessels: depth and volume by the vessel-head formula of several public tables (seen), and the
//! rule-of-thumb factors that the trade prints. The body weighed is what the head holds: its inside.

use checks::{Printed, exact, one_body};
use profile::trig::asin;
use std::f64::consts::PI;
use strickle::record::Exact;

/// What a torispherical head of inside diameter 1 m, crown radius `crown` and knuckle radius `knuckle` holds: from its
/// apex at z = 0 up to its rim. The stations are expressions, as a shop would write them.
fn torispherical(crown: f64, knuckle: f64) -> Exact {
    exact(&format!(
        "format = 1\n[part]\nname = \"head\"\nunit = \"m\"\n\
         [size]\ncrown = {crown}\nknuckle = {knuckle}\narm = \"0.5 - knuckle\"\n\
         drop = \"sqrt((crown - knuckle)^2 - arm^2)\"\n\
         [[body]]\nname = \"inside\"\ndensity = \"1000 kg/m3\"\n\
         outline = [\n\
         {{ r = 0, z = 0 }},\n\
         {{ r = \"crown * arm / (crown - knuckle)\", z = \"crown - crown * drop / (crown - knuckle)\",\n\
            centre = {{ r = 0, z = \"crown\" }}, name = \"shell\" }},\n\
         {{ r = 0.5, z = \"crown - drop\", tangent = true, name = \"shell\" }},\n\
         {{ r = 0 }} ]\n"
    ))
}

/// Depth and volume by the formula of the tables, inside diameter 1 m.
fn tabulated(crown: f64, knuckle: f64) -> (f64, f64) {
    let (r, a) = (crown, knuckle);
    let c = 0.5 - a;
    let h = r - ((r - a) * (r - a) - c * c).sqrt();
    let terms = 2.0 * h * r * r - (2.0 * a * a + c * c + 2.0 * a * r) * (r - h)
        + 3.0 * a * a * c * asin((r - h) / (r - a));
    (h, PI / 3.0 * terms)
}

#[test]
fn torispherical_heads_hold_what_the_tables_formula_gives() {
    for (crown, knuckle) in [
        (1.0, 0.1),
        (1.0, 0.06),
        (0.8, 0.154),
        (0.9, 0.17),
        (1.2, 0.02),
    ] {
        let found = torispherical(crown, knuckle);
        let (depth, volume) = tabulated(crown, knuckle);
        // The promised 1e-13; the table's formula subtracts terms up to twenty times its result, and keeps no more.
        assert!(
            (found.length / depth - 1.0).abs() < 1e-13,
            "{crown} {knuckle}: {} {depth}",
            found.length
        );
        let cancelled = 20.0 * 8.0 * f64::EPSILON;
        assert!(
            (found.volume / volume - 1.0).abs() < 1e-13 + cancelled,
            "{crown} {knuckle}: {} {volume}",
            found.volume
        );
    }
}

#[test]
fn torispherical_heads_come_near_the_trades_factors() {
    // Crown radius, knuckle, printed depth and volume over D and D^3. 'About' is what the trade's factor leaves open.
    let rows = [
        // ASME VIII UG-32 and DIN 28011 proportions: 0.194 D (seen), 0.1 D^3 (from memory, to one digit).
        (1.0, 0.1, "0.194", Some("0.1")),
        // 6 % knuckle: the usual 0.0847 D^3 counts a straight flange, so only the depth is compared: 0.169 D.
        (1.0, 0.06, "0.169", None),
    ];
    for (crown, knuckle, depth, volume) in rows {
        let found = torispherical(crown, knuckle);
        assert!(
            Printed::of(depth).admits(found.length, 0.0),
            "{} printed {depth}",
            found.length
        );
        if let Some(volume) = volume {
            assert!(
                Printed::of(volume).admits(found.volume, 0.0),
                "{} printed {volume}",
                found.volume
            );
        }
    }
    // DIN 28013: 0.255 D and 0.1298 D^3 (from memory) are for the outside diameter of a common plate; inside, within 1 %.
    let found = torispherical(0.8, 0.154);
    assert!(
        (found.length / 0.255 - 1.0).abs() < 0.01,
        "{}",
        found.length
    );
    assert!(
        (found.volume / 0.1298 - 1.0).abs() < 0.01,
        "{}",
        found.volume
    );
}

#[test]
fn semi_ellipsoidal_head_two_to_one() {
    // Depth D/4, volume pi D^3 / 24 (seen), surface 1.084 D^2 as vessel tables print it (from memory).
    let found = exact(&one_body(
        "m",
        1000.0,
        "outline = [{ r = 0, z = 0 }, { r = 0.5, z = 0.25, ellipse = \"r\", name = \"shell\" }, { r = 0 }]",
    ));
    assert!((found.volume / (PI / 24.0) - 1.0).abs() < 1e-13);
    let shell = &found.surfaces[0];
    assert_eq!(shell.name.as_deref(), Some("shell"));
    assert!(
        Printed::of("1.084").admits(shell.area, 0.0),
        "{}",
        shell.area
    );
}

#[test]
fn hemispherical_head() {
    // Volume pi D^3 / 12 (seen), surface 1.571 D^2 (from memory).
    let found = exact(&one_body(
        "m",
        1000.0,
        "outline = [{ r = 0, z = 0 }, { r = 0.5, z = 0.5, centre = { r = 0, z = 0.5 }, name = \"shell\" }, { r = 0 }]",
    ));
    assert!((found.volume / (PI / 12.0) - 1.0).abs() < 1e-13);
    assert!(
        Printed::of("1.571").admits(found.surfaces[0].area, 0.0),
        "{}",
        found.surfaces[0].area
    );
}
