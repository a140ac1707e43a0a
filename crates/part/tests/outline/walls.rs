//! Thin walls; their offsets are tested in `profile`.

use crate::{arc, assert_close, assert_near, at, part_of};
use profile::Edge;

fn wall(rest: &str) -> Vec<Edge> {
    let part = part_of(&format!("wall = {{ {rest} }}"), &[]);
    part.bodies[0].region.outer().edges().to_vec()
}

#[test]
fn a_pipe() {
    for (grow, inner, outer) in [
        ("left", 0.9, 1.0),
        ("right", 1.0, 1.1),
        ("both", 0.95, 1.05),
    ] {
        let edges = wall(&format!(
            "thickness = 0.1, grow = \"{grow}\", line = [ {{ r = 1, z = 0 }}, {{ z = 2 }} ]"
        ));
        assert_eq!(edges.len(), 4);
        let r = |edge: &Edge| edge.start().x;
        assert_close(edges.iter().map(r).fold(f64::INFINITY, f64::min), inner);
        assert_close(edges.iter().map(r).fold(0.0, f64::max), outer);
    }
}

#[test]
fn a_bowl_ends_on_the_axis_exactly() {
    // A quarter of a sphere's section from the axis out; the face's direction at the axis is known to rounding only.
    let edges = wall(
        "thickness = 0.1, grow = \"left\", line = [ { r = 0, z = 0.7 }, { r = 0.7, z = 1.4, arc = 0.7, centre_on = \"left\" } ]",
    );
    let on_axis: Vec<_> = edges
        .iter()
        .filter(|edge| edge.start().x == 0.0 && edge.end().x == 0.0)
        .collect();
    assert_eq!(on_axis.len(), 1);
    assert!(edges.iter().all(|edge| edge.start().x >= 0.0));
}

#[test]
fn corners_are_treated_before_the_wall_grows() {
    let edges = wall(
        "thickness = 0.1, grow = \"left\", line = [ { r = 1, z = 0 }, { r = 2, round = 0.5 }, { z = 1 } ]",
    );
    let radii: Vec<f64> = edges
        .iter()
        .filter(|edge| matches!(edge, Edge::Arc(_)))
        .map(|edge| arc(edge).radius())
        .collect();
    assert_eq!(radii.len(), 2);
    assert_close(radii[0].max(radii[1]), 0.5);
    assert_close(radii[0].min(radii[1]), 0.4);
    assert_near(edges[0].start(), at(1.0, 0.0));
}
