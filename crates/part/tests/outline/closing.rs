//! Where outlines close and where they touch the axis.

use crate::{at, body, edges};

#[test]
fn the_last_step_runs_straight_back_to_the_first() {
    let edges = edges("[ { r = 2, z = 0 }, { r = 3 }, { z = 1 } ]");
    assert_eq!(edges.len(), 3);
    assert_eq!(
        (edges[2].start(), edges[2].end()),
        (at(3.0, 1.0), at(2.0, 0.0))
    );
}

#[test]
fn a_last_step_that_arrives_at_the_first_closes_the_outline() {
    let edges = edges("[ { r = 2, z = 0 }, { r = 3 }, { z = 1 }, { r = 2 }, { z = 0 } ]");
    assert_eq!(edges.len(), 4);
}

#[test]
fn a_last_step_that_arrives_there_to_rounding_arrives_there() {
    // Ten times 0.1 is not 1 in binary.
    let edges = edges(
        "[ { r = 2, z = 0 }, { r = 3 }, { z = 1 }, { r = 2 }, { repeat = 10, steps = [ { dz = -0.1, dr = 0 } ] } ]",
    );
    assert_eq!(edges.len(), 13);
    assert_eq!(edges[12].end(), at(2.0, 0.0));
}

#[test]
fn an_edge_on_the_axis_is_on_it_exactly() {
    // 0.7 - 7 * 0.1 is 1e-16 or so.
    let edges = edges(
        "[ { r = 0, z = 0 }, { r = 0.7 }, { z = 1 }, { repeat = 7, steps = [ { dr = -0.1, dz = 0.1 } ] } ]",
    );
    let last = edges.last().unwrap();
    assert_eq!((last.start().x, last.end().x), (0.0, 0.0));
    assert!(last.start().x.is_sign_positive());
    assert_eq!(last.end(), at(0.0, 0.0));
}

#[test]
fn every_edge_knows_its_step() {
    let body = body(
        "[ { r = 2, z = 0 }, { r = 3, name = \"floor\" }, { z = 1 }, { repeat = 2, steps = [ { dr = -0.2 }, { dz = 0.1 } ] } ]",
    );
    let words: Vec<&str> = body
        .region
        .outer()
        .tags()
        .iter()
        .map(|&tag| &*body.steps[tag as usize].words)
        .collect();
    assert_eq!(
        words,
        [
            "outline, step 2",
            "outline, step 3",
            "outline, step 1 (round 1 of the repeat in step 4)",
            "outline, step 2 (round 1 of the repeat in step 4)",
            "outline, step 1 (round 2 of the repeat in step 4)",
            "outline, step 2 (round 2 of the repeat in step 4)",
            "outline, the closing edge",
        ]
    );
}
