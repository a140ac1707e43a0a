//! A small model for the tests of the formats.

use crate::{Body, Model, Unit};
use glam::DVec3;

/// Two tetrahedra side by side.
pub(crate) struct Wedges {
    positions: Vec<DVec3>,
    triangles: Vec<[u32; 3]>,
}

pub(crate) fn wedges() -> Wedges {
    let wedge = [
        DVec3::ZERO,
        DVec3::new(0.03, 0.0, 0.0),
        DVec3::new(0.0, 0.02, 0.0),
        DVec3::new(0.0, 0.0, 0.01),
    ];
    let faces = [[0, 2, 1], [0, 1, 3], [1, 2, 3], [2, 0, 3]];
    Wedges {
        positions: [0.0, 0.1]
            .iter()
            .flat_map(|x| wedge.map(|p| p + x * DVec3::X))
            .collect(),
        triangles: [0, 4]
            .iter()
            .flat_map(|first| faces.map(|face| face.map(|i| i + first)))
            .collect(),
    }
}

impl Wedges {
    pub(crate) fn model<'a>(&'a self, name: &'a str, unit: Unit) -> Model<'a> {
        let body = |name, first: usize| Body {
            name,
            material: "CC480K",
            positions: first..first + 4,
            triangles: first..first + 4,
        };
        Model {
            name,
            unit,
            positions: &self.positions,
            triangles: &self.triangles,
            bodies: vec![body("left", 0), body("right", 4)],
        }
    }
}
