//! Corners that are one place become one corner.

use crate::Triangles;
use glam::DVec3;
use std::collections::HashMap;

/// An indexed mesh made from loose facets.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Welded {
    /// Corners, metres.
    pub positions: Vec<DVec3>,
    /// Triangles by index.
    pub triangles: Vec<[u32; 3]>,
}

impl Welded {
    /// The mesh to be measured.
    pub fn triangles(&self) -> Triangles<'_> {
        Triangles {
            positions: &self.positions,
            triangles: &self.triangles,
        }
    }
}

/// Joins facets where their corners are equal bit for bit (0 and -0 are equal): right for a file whose writer writes one
/// corner the same way each time. Corners are numbered in the order in which they appear.
pub fn weld_equal(facets: &[[DVec3; 3]]) -> Welded {
    let mut welded = Welded {
        positions: Vec::with_capacity(facets.len() / 2 + 2),
        triangles: Vec::with_capacity(facets.len()),
    };
    let mut numbers: HashMap<[u64; 3], u32> = HashMap::with_capacity(facets.len() / 2 + 2);
    for facet in facets {
        let triangle = facet.map(|corner| {
            let key = corner.to_array().map(|x| (x + 0.0).to_bits());
            *numbers.entry(key).or_insert_with(|| {
                welded.positions.push(corner);
                u32::try_from(welded.positions.len() - 1).unwrap_or(u32::MAX)
            })
        });
        welded.triangles.push(triangle);
    }
    welded
}
