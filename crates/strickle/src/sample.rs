//! Small parts for tests.

use crate::Source;
use part::{Body, LengthUnit, Material, Part, StepOrigin};
use profile::{DVec2, Edge, Loop, Region};

/// What they were read from.
pub(crate) const SOURCE: Source<'static> = Source {
    file: "sample.toml",
    text: b"a sample",
};

/// A part of these bodies, turned through `revolve`.
pub(crate) fn part(revolve: f64, bodies: Vec<Body>) -> Part {
    Part {
        name: "sample".to_owned(),
        number: None,
        unit: LengthUnit::Millimetre,
        revolve,
        general_tolerance: None,
        sizes: Vec::new(),
        materials: Vec::new(),
        bodies,
        expect: Vec::new(),
    }
}

/// A ring of rectangular section between two radii and two stations: both faces are called `face`, the outside `rim`,
/// the bore has no name.
pub(crate) fn ring(name: &str, inside: f64, outside: f64, bottom: f64, top: f64) -> Body {
    let corners = [
        DVec2::new(inside, bottom),
        DVec2::new(outside, bottom),
        DVec2::new(outside, top),
        DVec2::new(inside, top),
    ];
    let edges = (0..4_u32).zip([(0, 1), (1, 2), (2, 3), (3, 0)]);
    let outer =
        Loop::new(edges.map(|(tag, (start, end))| (Edge::line(corners[start], corners[end]), tag)))
            .unwrap();
    let names = [Some("face"), Some("rim"), Some("face"), None];
    Body {
        name: name.to_owned(),
        material: Material::Density(1000.0),
        region: Region::new(outer, Vec::new()).unwrap(),
        steps: names
            .map(|name| StepOrigin {
                name: name.map(ToOwned::to_owned),
                words: "outline".to_owned(),
                span: 0..0,
            })
            .into(),
        span: 0..8,
    }
}
