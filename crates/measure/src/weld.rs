//! Corners that are one place become one corner.

use crate::Triangles;
use glam::DVec3;
use rustc_hash::FxBuildHasher;
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

/// Joins facets, one after the other, where their corners are equal bit for bit (0 and -0 are equal): right for a file whose
/// writer writes one corner the same way each time. Corners are numbered in the order in which they appear.
#[derive(Debug, Default)]
pub struct Welder {
    welded: Welded,
    numbers: HashMap<[u64; 3], u32, FxBuildHasher>,
}

impl Welder {
    /// A welder with room for `facets`.
    pub fn with_room(facets: usize) -> Self {
        // A closed surface has half as many corners as triangles.
        let corners = facets / 2 + 2;
        Self {
            welded: Welded {
                positions: Vec::with_capacity(corners),
                triangles: Vec::with_capacity(facets),
            },
            numbers: HashMap::with_capacity_and_hasher(corners, FxBuildHasher),
        }
    }

    /// Adds a facet.
    pub fn add(&mut self, facet: [DVec3; 3]) {
        let Welded {
            positions,
            triangles,
        } = &mut self.welded;
        triangles.push(facet.map(|corner| {
            let key = corner.to_array().map(|x| (x + 0.0).to_bits());
            *self.numbers.entry(key).or_insert_with(|| {
                positions.push(corner);
                u32::try_from(positions.len() - 1).unwrap_or(u32::MAX)
            })
        }));
    }

    /// The mesh.
    pub fn finish(self) -> Welded {
        self.welded
    }
}
