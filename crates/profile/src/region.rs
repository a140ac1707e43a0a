//! The section of one body: a loop less the loops inside it.

use crate::validity::checked;
use crate::{Bounds, Edge, Loop, RegionFault};

/// The section of one body: the area inside the outer loop less the voids.
///
/// Legal by construction: the outer loop runs counter-clockwise, the voids clockwise (the material is on the left of
/// travel everywhere), every loop is simple, none crosses another, every void lies inside, r >= 0 throughout.
#[derive(Debug, Clone, PartialEq)]
pub struct Region {
    pub(crate) outer: Loop,
    pub(crate) voids: Vec<Loop>,
}

impl Region {
    /// Checks and orients: loops that run the wrong way are reversed, and the tags stay with their edges.
    ///
    /// # Errors
    /// Every fault found, in order of place; of a loop with very many, the first ones.
    pub fn new(outer: Loop, voids: Vec<Loop>) -> Result<Self, Vec<RegionFault>> {
        let loops: Vec<&Loop> = std::iter::once(&outer).chain(&voids).collect();
        let areas = checked(&loops)?;
        let oriented = |outline: Loop, runs_well: bool| {
            if runs_well {
                outline
            } else {
                outline.reversed()
            }
        };
        Ok(Self {
            outer: oriented(outer, areas[0] > 0.0),
            voids: voids
                .into_iter()
                .zip(&areas[1..])
                .map(|(void, area)| oriented(void, *area < 0.0))
                .collect(),
        })
    }

    /// The outer loop, counter-clockwise.
    pub fn outer(&self) -> &Loop {
        &self.outer
    }

    /// The closed holes inside the section, clockwise.
    pub fn voids(&self) -> &[Loop] {
        &self.voids
    }

    /// All loops, the outer one first.
    pub fn loops(&self) -> impl Iterator<Item = &Loop> {
        std::iter::once(&self.outer).chain(&self.voids)
    }

    /// All edges, loop by loop.
    pub fn edges(&self) -> impl Iterator<Item = &Edge> {
        self.loops().flat_map(Loop::edges)
    }

    /// A box that holds it.
    pub fn bounds(&self) -> Bounds {
        self.outer.bounds()
    }
}
