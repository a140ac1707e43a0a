//! The earth's reference ellipsoid GRS 80: geodesy prints its volume, surface and meridian to more digits than any table of
//! parts. Sources: the defining figures and R3 in a public table of the system's constants after H. Moritz, "Geodetic
//! Reference System 1980" (seen); b, R2 and the quadrant in a public encyclopedia's table computed from them with more
//! digits (seen; the older print of R2, 6371007.1810, differs from it in the last digit).

use checks::{Printed, exact, one_body};
use std::f64::consts::PI;

/// Equatorial and polar radius, m.
const A: f64 = 6_378_137.0;
const B: f64 = 6_356_752.314_140_347;

#[test]
fn grs_80() {
    let found = exact(&one_body(
        "m",
        5510.0,
        &format!(
            "outline = [{{ r = 0, z = {} }}, {{ r = {A}, z = 0, ellipse = \"r\" }}, {{ r = 0, z = {B}, ellipse = \"z\" }}]",
            -B
        ),
    ));
    let same_surface = (found.surface / (4.0 * PI)).sqrt();
    let same_volume = profile::trig::cbrt(found.volume / (4.0 / 3.0 * PI));
    let quadrant = (found.section.perimeter - 2.0 * B) / 2.0;
    for (what, found, printed) in [
        ("R2", same_surface, "6371007.1809"),
        ("R3", same_volume, "6371000.7900"),
        ("meridian quadrant", quadrant, "10001965.7292"),
    ] {
        assert!(
            Printed::of(printed).admits(found, 0.0),
            "{what}: {found} m, printed {printed} m"
        );
    }
}
