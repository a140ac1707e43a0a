//! From the steps of a part file to edges whose places are known from the drawing.

mod arcs;
mod closing;
mod corners;
mod curves;
mod files;
mod names;
mod refusals;
mod slopes;
mod walls;

use part::{Body, Neighbours, Part};
use profile::{Arc, DVec2, Edge};
use std::io;

/// Files beside the part file, by name.
pub(crate) struct Files<'a>(pub(crate) &'a [(&'a str, &'a str)]);

impl Neighbours for Files<'_> {
    fn read(&self, file: &str) -> io::Result<Vec<u8>> {
        let found = self.0.iter().find(|(name, _)| *name == file);
        found
            .map(|(_, text)| text.as_bytes().to_vec())
            .ok_or_else(|| io::ErrorKind::NotFound.into())
    }
}

/// What a fault tells.
#[derive(Debug)]
pub(crate) struct Refused {
    pub(crate) code: &'static str,
    pub(crate) message: String,
    pub(crate) help: String,
}

/// The part with one body that `section` (`outline = ..` and more) describes, in metres.
pub(crate) fn part_of(section: &str, files: &[(&str, &str)]) -> Part {
    let text = format!(
        "format = 1\npart = {{ name = \"p\", unit = \"m\" }}\n[[body]]\nname = \"b\"\ndensity = \"1 kg/m3\"\n{section}\n"
    );
    part::read("p.toml", text.as_bytes(), &[], &Files(files)).unwrap_or_else(|faults| {
        panic!("{section}\n{faults:?}");
    })
}

/// The body with the outline `steps`, in metres.
pub(crate) fn body(steps: &str) -> Body {
    part_of(&format!("outline = {steps}"), &[]).bodies.remove(0)
}

/// The edges of the outline `steps`. Outlines in these tests are drawn counter-clockwise, so that the order stays.
pub(crate) fn edges(steps: &str) -> Vec<Edge> {
    body(steps).region.outer().edges().to_vec()
}

/// The arc `edge` is.
pub(crate) fn arc(edge: &Edge) -> Arc {
    match edge {
        Edge::Arc(arc) => *arc,
        other => panic!("not an arc: {other:?}"),
    }
}

pub(crate) fn at(r: f64, z: f64) -> DVec2 {
    DVec2::new(r, z)
}

/// Asserts that two points differ by rounding of coordinates of some metres.
#[track_caller]
pub(crate) fn assert_near(found: DVec2, expected: DVec2) {
    let apart = (found - expected).length();
    assert!(apart < 1e-14, "{found} is {apart:e} from {expected}");
}

#[track_caller]
pub(crate) fn assert_close(found: f64, expected: f64) {
    let apart = (found - expected).abs();
    assert!(apart < 1e-14, "{found} is {apart:e} from {expected}");
}
