//! Circular arcs: `arc`, `via`, `centre`, `tangent`.

use crate::{arc, assert_close, assert_near, at, edges};
use profile::Edge;
use std::f64::consts::{FRAC_1_SQRT_2, FRAC_PI_2, PI};

/// Unit quarter from (2, 0) to (3, 1), then up and back.
const QUARTER: &str = ", { z = 3 }, { r = 2 } ]";

#[test]
fn a_radius_with_the_centre_on_the_left_runs_counter_clockwise() {
    let edges = edges(&format!(
        "[ {{ r = 2, z = 0 }}, {{ r = 3, z = 1, arc = 1, centre_on = \"left\" }}{QUARTER}"
    ));
    let arc = arc(&edges[0]);
    assert_eq!((arc.start, arc.end), (at(2.0, 0.0), at(3.0, 1.0)));
    assert_close(arc.sweep, FRAC_PI_2);
    assert_near(arc.centre(), at(2.0, 1.0));
}

#[test]
fn a_radius_with_the_centre_on_the_right_runs_clockwise() {
    let edges = edges(&format!(
        "[ {{ r = 2, z = 0 }}, {{ r = 3, z = 1, arc = 1, centre_on = \"right\" }}{QUARTER}"
    ));
    let arc = arc(&edges[0]);
    assert_close(arc.sweep, -FRAC_PI_2);
    assert_near(arc.centre(), at(3.0, 0.0));
}

#[test]
fn the_longer_arc_of_a_radius_is_two_edges() {
    let steps =
        "[ { r = 2, z = 0 }, { r = 3, z = 1, arc = 1, centre_on = \"left\", long = true } ]";
    let edges = edges(steps);
    assert_eq!(edges.len(), 3);
    let (first, second) = (arc(&edges[0]), arc(&edges[1]));
    for half in [first, second] {
        assert_close(half.sweep, 0.75 * PI);
        assert_near(half.centre(), at(3.0, 0.0));
        assert_close(half.radius(), 1.0);
    }
    assert_near(first.end, at(3.0 + FRAC_1_SQRT_2, -FRAC_1_SQRT_2));
    assert_eq!(second.end, at(3.0, 1.0));
}

#[test]
fn a_chord_of_two_radii_is_half_a_turn_however_it_was_written() {
    // 0.1 + 0.2 is not 0.3 in binary; the sine's slope is 0 here, so its inverse would lose half of the digits.
    for z in ["\"0.1 + 0.2\"", "0.3", "\"0.4 - 0.1\""] {
        let edges = edges(&format!(
            "[ {{ r = 2, z = 0 }}, {{ z = {z}, arc = 0.15, centre_on = \"left\" }} ]"
        ));
        assert_eq!(arc(&edges[0]).sweep, PI);
    }
    // Far along the axis a chord of 0.3 is known to fewer digits.
    let edges = edges("[ { r = 2, z = 1000 }, { z = 1000.3, arc = 0.15, centre_on = \"left\" } ]");
    assert_eq!(arc(&edges[0]).sweep, PI);
}

#[test]
fn a_flat_arc_keeps_its_digits() {
    let edges = edges(
        "[ { r = 2, z = 0 }, { r = 3 }, { z = 1, arc = 1e6, centre_on = \"left\" }, { r = 2 } ]",
    );
    let arc = arc(&edges[1]);
    // asin(x) = x + x3/6 + ..: twice the sine of half the angle is 1e-6.
    let expected = 1e-6 + 1e-18 / 24.0;
    assert!((arc.sweep / expected - 1.0).abs() < 4.0 * f64::EPSILON);
    assert!((arc.radius() / 1e6 - 1.0).abs() < 4.0 * f64::EPSILON);
}

#[test]
fn an_arc_flat_to_rounding_is_a_line() {
    let edges = edges(
        "[ { r = 0.002, z = 0 }, { r = 0.003 }, { z = 1e-7, arc = 1e9, centre_on = \"left\" } ]",
    );
    assert!(matches!(edges[1], Edge::Line(_)), "{:?}", edges[1]);
}

#[test]
fn three_points_give_the_circle_through_them() {
    // About (3, 0): from (2, 0) by (3, -1) to (4, 0), half a turn counter-clockwise.
    let edges = edges("[ { r = 2, z = 0 }, { r = 4, via = { r = 3, z = -1 } } ]");
    let half = arc(&edges[0]);
    assert_close(half.sweep, PI);
    assert_near(half.centre(), at(3.0, 0.0));
}

#[test]
fn three_points_on_more_than_half_a_turn_are_two_edges() {
    // About (3, 0) from (2, 0) by (3, -1) and (4, 0) to (3, 1): three quarters. Any point between gives the same.
    let c = FRAC_1_SQRT_2;
    for via in [at(3.0, -1.0), at(4.0, 0.0), at(3.0 + c, -c), at(3.0 + c, c)] {
        let edges = edges(&format!(
            "[ {{ r = 2, z = 0 }}, {{ r = 3, z = 1, via = {{ r = {}, z = {} }} }} ]",
            via.x, via.y
        ));
        assert_eq!(edges.len(), 3);
        assert_near(arc(&edges[0]).end, at(3.0 + c, -c));
        for half in &edges[..2] {
            assert_close(arc(half).sweep, 0.75 * PI);
        }
    }
}

#[test]
fn a_circle_that_all_but_closes_keeps_its_size() {
    // The ends are 2e-9 apart on a circle of radius 1 about (3, 0).
    let edges = edges("[ { r = 2, z = -1e-9 }, { z = 1e-9, via = { r = 4, z = 0 } } ]");
    let far = arc(&edges[0]).end;
    // The circle through the three points passes (2, 1e-9): its leftmost point is 5e-19 further left.
    assert_near(far, at(4.0, 0.0));
    assert_close(arc(&edges[0]).radius(), 1.0);
}

#[test]
fn a_centre_gives_the_shorter_arc_or_the_longer_one() {
    let short = edges(&format!(
        "[ {{ r = 2, z = 0 }}, {{ r = 3, z = 1, centre = {{ r = 2, z = 1 }} }}{QUARTER}"
    ));
    assert_close(arc(&short[0]).sweep, FRAC_PI_2);
    // The other way round (4, 2) is clockwise and three quarters; this loop is closed on its right.
    let long = edges(
        "[ { r = 5, z = 1 }, { r = 4, z = 2, centre = { r = 4, z = 1 }, long = true, centre_on = \"right\" } ]",
    );
    let arcs: Vec<f64> = long
        .iter()
        .filter(|edge| matches!(edge, Edge::Arc(_)))
        .map(|edge| arc(edge).sweep)
        .collect();
    // The region runs the other way round: material is on the left of travel.
    assert_eq!(arcs.len(), 2);
    for sweep in arcs {
        assert_close(sweep, 0.75 * PI);
    }
}

#[test]
fn a_centre_on_the_chord_needs_a_side_and_gets_it() {
    for (side, sweep) in [("left", PI), ("right", -PI)] {
        let edges = edges(&format!(
            "[ {{ r = 2, z = 0 }}, {{ r = 4, centre = {{ r = 3, z = 0 }}, centre_on = \"{side}\" }}, {{ z = 3 }}, {{ r = 2 }} ]"
        ));
        assert_eq!(arc(&edges[0]).sweep, sweep);
    }
}

#[test]
fn a_centre_known_to_six_digits_gives_way_to_the_ends() {
    // 5 cos 45 degrees is 3.5355339..: the last digit of the centre is off.
    let edges = edges(
        "[ { r = 1, z = 0 }, { r = 8.0710678, z = 0, centre = { r = 4.5355339, z = 3.5355341 } }, { z = 9 }, { r = 1 } ]",
    );
    let arc = arc(&edges[0]);
    assert_eq!((arc.start, arc.end), (at(1.0, 0.0), at(8.071_067_8, 0.0)));
    assert!((arc.sweep - FRAC_PI_2).abs() < 1e-6);
}

#[test]
fn a_smooth_arc_leaves_as_the_step_before_arrived() {
    // Along r to (3, 0), then a unit quarter up to (4, 1).
    let quarter =
        edges("[ { r = 2, z = 0 }, { r = 3 }, { r = 4, z = 1, tangent = true }, { r = 2 } ]");
    assert_close(arc(&quarter[1]).sweep, FRAC_PI_2);
    // Then straight back over: half a turn, and from that on another.
    let half = edges(
        "[ { r = 2, z = 0 }, { r = 3 }, { z = 2, tangent = true }, { r = 2.5, tangent = true }, { r = 2 } ]",
    );
    assert_close(arc(&half[1]).sweep, PI);
    assert_near(arc(&half[1]).centre(), at(3.0, 1.0));
    assert!(matches!(half[2], Edge::Line(_)), "straight ahead is a line");
}

#[test]
fn a_smooth_arc_of_more_than_half_a_turn_is_two_edges() {
    // From (3, 0) along r round (3, 1) to (2, 1): three quarters.
    let edges = edges("[ { r = 2.5, z = 0 }, { r = 3 }, { r = 2, z = 1, tangent = true } ]");
    let c = FRAC_1_SQRT_2;
    assert_near(arc(&edges[1]).end, at(3.0 + c, 1.0 + c));
    for half in &edges[1..3] {
        assert_close(arc(half).sweep, 0.75 * PI);
        assert_near(arc(half).centre(), at(3.0, 1.0));
    }
}

#[test]
fn a_smooth_arc_after_a_treated_corner_leaves_along_the_step_as_written() {
    let edges = edges(
        "[ { r = 2, z = 0 }, { r = 3, round = 0.25 }, { z = 2 }, { r = 2, z = 3, tangent = true } ]",
    );
    let arc = arc(&edges[3]);
    assert_close(arc.sweep, FRAC_PI_2);
    assert_near(arc.centre(), at(2.0, 2.0));
}
