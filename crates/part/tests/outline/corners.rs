//! Rounds and chamfers in their places; how they are computed is tested in `profile`.

use crate::{arc, assert_close, assert_near, at, edges};
use std::f64::consts::FRAC_PI_2;

/// The bell of the format's description, with `round` at its crown.
fn bell(round: &str) -> Result<part::Part, part::Faults> {
    let text = format!(
        r#"
format = 1
[part]
name = "Fog bell"
unit = "mm"
[size]
mouth = 320
lip = 14
crown = "mouth * 0.52"
[[body]]
name = "bell"
density = "8800 kg/m3"
outline = [
  {{ d = "mouth", z = 0 }},
  {{ z = 30, name = "lip" }},
  {{ d = "crown", z = 240, arc = 420, centre_on = "left" }},
  {{ d = 0, round = {round} }},
  {{ z = "240 - lip" }},
  {{ d = "mouth - 2*lip", z = 0, via = {{ d = 190, z = 120 }} }},
]
"#
    );
    part::read("bell.toml", text.as_bytes(), &[], &crate::Files(&[]))
}

#[test]
fn the_edges_of_a_bell() {
    let part = bell("10").unwrap_or_else(|faults| panic!("{faults:?}"));
    let edges = part.bodies[0].region.outer().edges();
    assert_eq!(edges.len(), 7);
    // Lip, arc up to (83.2, 240), along the crown to the axis, whose corner is rounded by 10, down, arc to the mouth.
    for (edge, start) in edges.iter().zip([
        at(0.16, 0.0),
        at(0.16, 0.03),
        at(0.0832, 0.24),
        at(0.01, 0.24),
        at(0.0, 0.23),
        at(0.0, 0.226),
        at(0.146, 0.0),
    ]) {
        assert_near(edge.start(), start);
    }
    // The waist is about a centre 420 away, on the left.
    let waist = arc(&edges[1]);
    assert_close(waist.radius(), 0.42);
    assert!(waist.sweep > 0.0);
    assert_eq!((edges[4].start().x, edges[4].end().x), (0.0, 0.0));
    // The inside passes the third point.
    let inside = arc(&edges[5]);
    assert_close(
        (at(0.095, 0.12) - inside.centre()).length(),
        inside.radius(),
    );
}

#[test]
fn a_round_larger_than_the_crown_is_thick_does_not_fit() {
    let faults = bell("20").unwrap_err();
    let fault = faults.iter().next().unwrap();
    assert_eq!(fault.code, "corner::too_large");
    assert_eq!(
        fault.help.as_deref(),
        Some("the largest radius that fits is 14 mm")
    );
}

#[test]
fn a_round_on_a_right_angle() {
    let edges = edges("[ { r = 2, z = 0 }, { r = 3, round = 0.25 }, { z = 1 }, { r = 2 } ]");
    assert_eq!(edges.len(), 5);
    let round = arc(&edges[1]);
    assert_near(round.start, at(2.75, 0.0));
    assert_near(round.end, at(3.0, 0.25));
    assert_close(round.sweep, FRAC_PI_2);
}

#[test]
fn a_chamfer_with_two_legs() {
    let edges =
        edges("[ { r = 2, z = 0 }, { r = 3, chamfer = [0.25, 0.5] }, { z = 1 }, { r = 2 } ]");
    assert_near(edges[1].start(), at(2.75, 0.0));
    assert_near(edges[1].end(), at(3.0, 0.5));
}

#[test]
fn the_first_steps_corner_is_where_the_outline_closes() {
    let square = "[ { r = 2, z = 0, round = 0.25 }, { r = 3 }, { z = 1 }, { r = 2 } ]";
    let explicit = "[ { r = 2, z = 0 }, { r = 3 }, { z = 1 }, { r = 2 }, { z = 0, round = 0.25 } ]";
    for steps in [square, explicit] {
        let edges = edges(steps);
        assert_eq!(edges.len(), 5);
        assert_near(edges[0].start(), at(2.25, 0.0));
        let round = arc(&edges[4]);
        assert_near(round.start, at(2.0, 0.25));
        assert_near(round.end, at(2.25, 0.0));
    }
}

#[test]
fn a_plate_rounded_to_its_full_thickness_loses_the_edge() {
    let edges =
        edges("[ { r = 2, z = 0 }, { r = 3, round = 0.5 }, { z = 1, round = 0.5 }, { r = 2 } ]");
    // Floor, two quarters, roof, closing edge.
    assert_eq!(edges.len(), 5);
    assert_near(arc(&edges[1]).end, at(3.0, 0.5));
    assert_near(arc(&edges[2]).centre(), at(2.5, 0.5));
}

#[test]
fn a_corner_after_a_long_arc_takes_from_its_second_half() {
    let edges = edges(
        "[ { r = 2, z = 0 }, { r = 3, z = 1, arc = 1, centre_on = \"left\", long = true, chamfer = 0.1 } ]",
    );
    assert_eq!(edges.len(), 4);
    assert_close(arc(&edges[0]).sweep, 0.75 * std::f64::consts::PI);
    // The chord of the piece that is taken is 0.1 long on a circle of radius 1.
    assert_close(
        arc(&edges[1]).sweep,
        0.75 * std::f64::consts::PI - 2.0 * profile::trig::asin(0.05),
    );
}
