//! Ellipses, parabolas, cubics, whole circles.

use crate::{arc, assert_close, assert_near, at, edges, part_of};
use profile::Edge;
use std::f64::consts::{FRAC_PI_2, PI};

#[test]
fn a_quarter_ellipse_leaves_along_the_given_axis() {
    for (axis, centre, middle) in [
        // Half way in the eccentric angle: centre -+ half axes / sqrt 2.
        (
            "r",
            at(2.0, 1.0),
            at(2.0 + 2.0 * 0.5_f64.sqrt(), 1.0 - 0.5_f64.sqrt()),
        ),
        (
            "z",
            at(4.0, 0.0),
            at(4.0 - 2.0 * 0.5_f64.sqrt(), 0.5_f64.sqrt()),
        ),
    ] {
        let edges = edges(&format!(
            "[ {{ r = 2, z = 0 }}, {{ r = 4, z = 1, ellipse = \"{axis}\" }}, {{ z = 3 }}, {{ r = 2 }} ]"
        ));
        let Edge::Ellipse(ellipse) = edges[0] else {
            panic!("{:?}", edges[0]);
        };
        assert_near(ellipse.centre(), centre);
        assert_near(ellipse.point(0.5), middle);
        assert_eq!((ellipse.start, ellipse.end), (at(2.0, 0.0), at(4.0, 1.0)));
    }
}

#[test]
fn a_quarter_ellipse_with_equal_axes_is_a_quarter_circle() {
    for (axis, sweep, centre) in [
        ("r", FRAC_PI_2, at(2.0, 1.0)),
        ("z", -FRAC_PI_2, at(3.0, 0.0)),
    ] {
        let edges = edges(&format!(
            "[ {{ r = 2, z = 0 }}, {{ r = 3, z = 1, ellipse = \"{axis}\" }}, {{ z = 3 }}, {{ r = 2 }} ]"
        ));
        assert_eq!(arc(&edges[0]).sweep, sweep);
        assert_near(arc(&edges[0]).centre(), centre);
    }
}

#[test]
fn a_parabola_has_its_tangents_meet_in_the_control_point() {
    // z = (r - 2)2 from (2, 0) to (3, 1): the tangents meet in (2.5, 0); half way at (2.5, 0.25).
    let edges = edges(
        "[ { r = 2, z = 0 }, { r = 3, z = 1, curve = [ { r = 2.5, z = 0 } ] }, { z = 2 }, { r = 2 } ]",
    );
    assert_near(edges[0].point(0.5), at(2.5, 0.25));
    assert_near(edges[0].point(0.25), at(2.25, 0.0625));
}

#[test]
fn a_cubic_has_its_two_control_points() {
    let edges = edges(
        "[ { r = 2, z = 0 }, { r = 3, z = 1, curve = [ { dr = 0.5 }, { dr = 1, dz = 0.5 } ] }, { z = 2 }, { r = 2 } ]",
    );
    // Increments of control points count from the step before.
    let Edge::Bezier(cubic) = edges[0] else {
        panic!("{:?}", edges[0]);
    };
    assert_eq!(
        cubic.points,
        [at(2.0, 0.0), at(2.5, 0.0), at(3.0, 0.5), at(3.0, 1.0)]
    );
}

#[test]
fn curves_with_controls_between_their_ends_on_a_line_are_lines() {
    let edges = edges(
        "[ { r = 2, z = 0 }, { r = 3, curve = [ { r = 2.25 } ] }, { z = 1, curve = [ { z = 0.75 }, { z = 0.25 } ] }, { r = 2 } ]",
    );
    assert!(edges.iter().all(|edge| matches!(edge, Edge::Line(_))));
}

#[test]
fn a_cubic_that_comes_back_is_a_loop_of_two_edges() {
    let edges = edges(
        "[ { r = 2, z = 0 }, { r = 2, z = 0, curve = [ { r = 4, z = 0 }, { r = 2, z = 2 } ] } ]",
    );
    assert_eq!(edges.len(), 2);
    // (3 b + 3 c) / 8 of the way from the start, at half the parameter.
    assert_near(edges[0].end(), at(2.0 + 3.0 * 2.0 / 8.0, 3.0 * 2.0 / 8.0));
}

#[test]
fn a_whole_circle_is_two_half_turns() {
    let part = part_of("outline = { circle = { r = 3, z = 1 }, radius = 0.5 }", &[]);
    let edges = part.bodies[0].region.outer().edges();
    assert_eq!(edges.len(), 2);
    for half in edges {
        assert_eq!(arc(half).sweep, PI);
        assert_near(arc(half).centre(), at(3.0, 1.0));
        assert_close(arc(half).radius(), 0.5);
    }
}

#[test]
fn a_circle_may_touch_the_axis() {
    // 0.1 + 0.2 is more than 0.3 by rounding: the ring with no hole still touches the axis exactly.
    let part = part_of(
        "outline = { circle = { r = 0.3, z = 0 }, radius = \"0.1 + 0.2\" }",
        &[],
    );
    let edges = part.bodies[0].region.outer().edges();
    assert!(edges.iter().any(|edge| edge.start().x == 0.0));
}

#[test]
fn a_void_may_be_a_circle() {
    let part = part_of(
        "outline = [ { r = 1, z = 0 }, { r = 4 }, { z = 3 }, { r = 1 } ]\nvoids = [ { circle = { r = 2, z = 1 }, radius = 0.5 } ]",
        &[],
    );
    let body = &part.bodies[0];
    let void = &body.region.voids()[0];
    assert_eq!(
        body.steps[void.tags()[0] as usize].words,
        "void 1, the circle"
    );
}
