//! Names of edges, for surfaces by name.

use crate::{body, part_of};
use part::Body;

fn names(body: &Body) -> Vec<Option<&str>> {
    let tags = body.region.outer().tags().iter();
    tags.map(|&tag| body.steps[tag as usize].name.as_deref())
        .collect()
}

#[test]
fn a_name_is_that_of_the_edge_that_arrives() {
    let body = body("[ { r = 2, z = 0 }, { r = 3, name = \"floor\" }, { z = 1 } ]");
    assert_eq!(names(&body), [Some("floor"), None, None]);
}

#[test]
fn the_first_steps_name_is_the_closing_edges() {
    let body = body("[ { r = 2, z = 0, name = \"cone\" }, { r = 3 }, { z = 1 } ]");
    assert_eq!(names(&body), [None, None, Some("cone")]);
}

#[test]
fn both_halves_of_a_long_arc_have_its_name() {
    let body = body(
        "[ { r = 2, z = 0 }, { r = 3, z = 1, arc = 1, centre_on = \"left\", long = true, name = \"bead\" } ]",
    );
    assert_eq!(names(&body), [Some("bead"), Some("bead"), None]);
    assert_eq!(body.region.outer().tags()[..2], [0, 0]);
}

#[test]
fn a_corner_has_the_name_that_both_its_edges_have() {
    let body = body(
        "[ { r = 2, z = 0 }, { r = 3, name = \"out\", round = 0.1 }, { z = 1, name = \"out\", chamfer = 0.1 }, { r = 2, name = \"top\" } ]",
    );
    assert_eq!(
        names(&body),
        [
            Some("out"),
            Some("out"),
            Some("out"),
            None,
            Some("top"),
            None
        ]
    );
    let words: Vec<&str> = body.steps.iter().map(|step| &*step.words).collect();
    assert!(words.contains(&"outline, the round at step 2"));
    assert!(words.contains(&"outline, the chamfer at step 3"));
}

#[test]
fn both_faces_of_a_wall_have_the_name_and_its_ends_have_none() {
    let part = part_of(
        "wall = { thickness = 0.1, grow = \"left\", line = [ { r = 1, z = 0 }, { z = 2, name = \"pipe\" } ] }",
        &[],
    );
    let body = &part.bodies[0];
    let mut all: Vec<(&str, Option<&str>)> = body
        .region
        .outer()
        .tags()
        .iter()
        .map(|&tag| &body.steps[tag as usize])
        .map(|step| (&*step.words, step.name.as_deref()))
        .collect();
    all.sort_unstable();
    assert_eq!(
        all,
        [
            ("the wall's end", None),
            ("the wall's start", None),
            ("wall, step 2", Some("pipe")),
            ("wall, step 2", Some("pipe")),
        ]
    );
}
