//! Worked examples of textbooks with printed answers. Where the page's figure is not at hand, its dimensions are read from
//! the terms of its solution, named in each comment. A printed answer admits half of its last digit.

use checks::{Printed, exact, one_body, ring};
use std::f64::consts::PI;
use strickle::record::Exact;

fn area_of(found: &Exact, name: &str) -> f64 {
    found
        .surfaces
        .iter()
        .find(|surface| surface.name.as_deref() == Some(name))
        .expect("the edge has a name")
        .area
}

fn assert_printed(what: &str, printed: &str, found: f64) {
    assert!(
        Printed::of(printed).admits(found, 0.0),
        "{what}: {found}, printed {printed}"
    );
}

/// The foot, metres.
const FOOT: f64 = 0.3048;
/// Its square and cube, m2 and m3.
const SQUARE_FOOT: f64 = FOOT * FOOT;
const CUBIC_FOOT: f64 = FOOT * FOOT * FOOT;

#[test]
fn cone_to_be_painted() {
    // A university set of worked statics examples, section 9.3, examples 1 and 2 (seen): radius 3 ft, height 10 ft,
    // painted inside and outside, 300 square feet a gallon.
    let cone = one_body(
        "ft",
        1000.0,
        "outline = [{ r = 0, z = 0 }, { r = 3, z = 10, name = \"cone\" }, { r = 0 }]",
    );
    let found = exact(&cone);
    let surface = area_of(&found, "cone") / SQUARE_FOOT;
    // The page goes on with the slant height rounded to 10.4403 ft.
    let slant = Printed::of("10.4403");
    let rounded = slant.half_digit / slant.value;
    assert!(Printed::of("98.3975").admits(surface, rounded), "{surface}");
    assert_printed("paint, gallons", "0.656", 2.0 * surface / 300.0);
    assert_printed("volume, ft3", "94.2", found.volume / CUBIC_FOOT);
    assert_printed("section, ft2", "15", found.section.area / SQUARE_FOOT);
    assert_printed("centroid, ft", "1", found.section.centroid_r / FOOT);
}

#[test]
fn half_a_ring_of_round_section() {
    // The same set, example 3 (seen): a circle of 1 m about a centre 4 m from the axis, half a turn. The example counts the
    // curved surface, without the two ends.
    let ring = one_body(
        "m",
        1000.0,
        "outline = { circle = { r = 4, z = 0 }, radius = 1 }",
    )
    .replace("unit = \"m\"", "unit = \"m\"\nrevolve = 180");
    let found = exact(&ring);
    let curved: f64 = found
        .surfaces
        .iter()
        .filter(|surface| !surface.end_caps)
        .map(|surface| surface.area)
        .sum();
    assert_printed("curved surface, m2", "79.0", curved);
}

#[test]
fn silo_with_a_conical_roof() {
    // Worked solutions of an engineering-mechanics text, section 9.3, exercise 13 (seen): terms 0.75 x 2.5 + 1.5 x 2 +
    // 0.75 x 1.5 and 0.5 x 1.5 x 2/2 + 0.75 x 2 x 1.5; answers 12 pi m2 and 6 pi m3.
    let found = exact(&one_body(
        "m",
        1000.0,
        "outline = [{ r = 0, z = 0 }, { r = 1.5 }, { z = 2 }, { r = 0, z = 4 }]",
    ));
    assert_printed("surface over pi, m2", "12", found.surface / PI);
    assert_printed("volume over pi, m3", "6", found.volume / PI);
    // The terms are exact, so the figures are, too.
    assert!((found.surface / (12.0 * PI) - 1.0).abs() < 1e-13);
    assert!((found.volume / (6.0 * PI) - 1.0).abs() < 1e-13);
}

#[test]
fn cylinder_about_a_core_with_a_conical_edge() {
    // The same, exercise 14 (seen): lengths sqrt(0.9^2 + 1.2^2) and 0.9 at 1.95 m, 1.5 at 2.4 m, 2.7 at 1.5 m; areas
    // 0.9 x 1.2 / 2 at 1.8 m and 1.5 x 0.9 at 1.95 m: a ring between 1.5 m and 2.4 m, 1.5 m high outside, 2.7 m inside.
    let found = exact(&one_body(
        "m",
        1000.0,
        "outline = [{ r = 1.5, z = 0 }, { r = 2.4 }, { z = 1.5 }, { r = 1.5, z = 2.7 }]",
    ));
    assert_printed("surface over pi, m2", "24.66", found.surface / PI);
    // Printed 7.21 with terms rounded on the way; 2 (1.8 x 0.54 + 1.95 x 1.35) is 7.209.
    assert_printed("volume over pi, m3", "7.21", found.volume / PI);
}

#[test]
fn hopper() {
    // The same, exercise 15 (seen): terms 15 x 7.5 + 18 x 15 + 22.5 sqrt(20^2 + 15^2) + 15 x 30, answers 2790 pi in2 and
    // 14550 pi in3.
    let found = exact(&one_body(
        "in",
        1000.0,
        "outline = [{ r = 0, z = 0 }, { r = 15 }, { z = 18 }, { r = 30, z = 38 }, { r = 0 }]",
    ));
    let inch = FOOT / 12.0;
    assert_printed(
        "surface over pi, in2",
        "2790",
        found.surface / (PI * inch * inch),
    );
    assert_printed(
        "volume over pi, in3",
        "14550",
        found.volume / (PI * inch * inch * inch),
    );
}

#[test]
fn rim_of_a_pulley() {
    // A statics text (from memory): outside diameter 0.8 m, rim 100 mm wide and 50 mm deep with a recess 60 mm wide and
    // 30 mm deep on its inner side, steel of 7850 kg/m3.
    let found = exact(&one_body(
        "mm",
        7850.0,
        "outline = [{ r = 350, z = -50 }, { r = 400 }, { z = 50 }, { r = 350 }, { z = 30 }, { r = 380 }, { z = -30 },\n\
         { r = 350 }]",
    ));
    assert_printed("volume, mm3", "7.65e6", found.volume * 1e9);
    // The text goes on with the volume rounded.
    let volume = Printed::of("7.65e6");
    let rounded = volume.half_digit / volume.value;
    assert!(
        Printed::of("60.0").admits(found.mass, rounded),
        "{}",
        found.mass
    );
    assert!(
        Printed::of("589").admits(found.mass * 9.81, rounded),
        "{}",
        found.mass
    );
}

#[test]
fn flywheel_of_a_pump() {
    // A hydraulics text's problem on the moment of inertia W R^2 (seen): a tube 1000/900 mm x 300 mm of 100 kg/m3 on a
    // plate 1200 mm x 30 mm of 7800 kg/m3, g = 9.81. W R^2 = g I.
    let tube = exact(&ring("mm", 100.0, 900.0, 1000.0, 300.0));
    let plate = exact(&ring("mm", 7800.0, 0.0, 1200.0, 30.0));
    assert_printed("tube, N", "43.917", tube.mass * 9.81);
    assert_printed("plate, N", "2596.195", plate.mass * 9.81);
    let both = exact(
        "format = 1\n[part]\nname = \"flywheel\"\nunit = \"mm\"\n\
         [[body]]\nname = \"plate\"\ndensity = \"7800 kg/m3\"\n\
         outline = [{ d = 0, z = 0 }, { d = 1200 }, { z = 30 }, { d = 0 }]\n\
         [[body]]\nname = \"tube\"\ndensity = \"100 kg/m3\"\n\
         outline = [{ d = 900, z = 30 }, { d = 1000 }, { z = 330 }, { d = 900 }]\n",
    );
    assert_printed("W R^2, N m2", "477.251", both.inertia_about_axis * 9.81);
}

#[test]
fn blank_of_a_drawn_cup() {
    // Production texts (seen): a cup of 25 mm x 15 mm with a sharp corner comes from a blank of sqrt(d^2 + 4 d h) =
    // 46.1 mm: the surface of bottom and wall, at no thickness, is the blank's.
    let found = exact(&one_body(
        "mm",
        1000.0,
        "outline = [{ d = 0, z = 0 }, { d = 25, name = \"cup\" }, { z = 15, name = \"cup\" }, { d = 0 }]",
    ));
    let blank = (4.0 * area_of(&found, "cup") / PI).sqrt();
    assert_printed("blank, mm", "46.1", blank * 1e3);
}

#[test]
fn modulus_of_castings() {
    // Foundry texts (seen): the modulus V/A of a sphere is d/6, of a cylinder as high as wide d/6, too.
    let cylinder = exact(&ring("cm", 7200.0, 0.0, 12.0, 12.0));
    assert_printed(
        "cylinder, cm",
        "2",
        cylinder.volume / cylinder.surface * 100.0,
    );
    let sphere = exact(&one_body(
        "cm",
        7200.0,
        "outline = [{ r = 0, z = -6 }, { z = 6, centre = { r = 0, z = 0 }, centre_on = \"left\" }]",
    ));
    assert_printed("sphere, cm", "2", sphere.volume / sphere.surface * 100.0);
    // A ring far from the axis is a bar bent round: t h / (2 (t + h)) of its section.
    let bar = exact(&ring("mm", 7200.0, 1_000_000.0, 1_000_060.0, 20.0));
    let modulus = 30.0 * 20.0 / (2.0 * (30.0 + 20.0));
    assert!((bar.volume / bar.surface * 1e3 / modulus - 1.0).abs() < 1e-12);
}

#[test]
fn filament() {
    // Print benches' tables: 1.75 mm filament holds 2.405 cm3 a metre (seen); a kilogram of 1240 kg/m3 is 335 m long, of
    // 2.85 mm 126 m (computed there).
    for (diameter, cm3, metres) in [(1.75, Some("2.405"), "335"), (2.85, None, "126")] {
        let found = exact(&ring("mm", 1240.0, 0.0, diameter, 1000.0));
        if let Some(cm3) = cm3 {
            assert_printed("cm3 a metre", cm3, found.volume * 1e6);
        }
        assert_printed("metres a kilogram", metres, 1.0 / found.mass);
    }
}
