//! What a triangle mesh says for itself, wherever it came from.
//!
//! Two opinions on its mass properties: [`parry()`], the library's own, and [`figures()`], this program's compensated sum; and an
//! [`audit()`] of whether the numbers mean anything. Triangles are counter-clockwise seen from outside; lengths are metres; a
//! volume has its sign, negative for a mesh that is inside out.

mod audit;
mod crossings;
mod figures;
mod parry;
mod weld;

pub use audit::{Audit, audit};
pub use crossings::{Crossings, crossings};
pub use figures::{Figures, figures};
pub use parry::{Disagreement, Parry, compare, parry};
pub use weld::{Welded, Welder};

use glam::DVec3;

/// A triangle mesh to be measured; indices must be in range.
#[derive(Debug, Clone, Copy)]
pub struct Triangles<'a> {
    /// Corners, metres.
    pub positions: &'a [DVec3],
    /// Triangles by index.
    pub triangles: &'a [[u32; 3]],
}

impl Triangles<'_> {
    /// The corners of a triangle.
    pub fn corners(&self, triangle: [u32; 3]) -> [DVec3; 3] {
        triangle.map(|i| self.positions[i as usize])
    }

    /// Least and greatest coordinates of the corners that are used; `None` where there is no triangle.
    pub fn bounds(&self) -> Option<(DVec3, DVec3)> {
        let mut corners = self
            .triangles
            .iter()
            .flatten()
            .map(|&i| self.positions[i as usize]);
        let first = corners.next()?;
        Some(corners.fold((first, first), |(low, high), p| (low.min(p), high.max(p))))
    }
}
