//! Bodies of one part may touch and must not overlap.

mod chains;
mod deepest;
#[cfg(test)]
mod tests;

use crate::boundary::Boundary;
use crate::piece::Hull;
use crate::tolerance::touch;
use crate::tree::Tree;
use crate::{EdgeRef, Region};
use chains::{Evidence, evidence};
use deepest::deepest;
use glam::DVec2;
use std::cell::OnceCell;
use std::ops::ControlFlow;

/// Two bodies that share more than boundary.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct BodyOverlap {
    /// Indices of the two bodies, the lower first.
    pub bodies: (usize, usize),
    /// A place (r, z) deep in the part that they share.
    pub place: DVec2,
    /// Distance from the place to the nearest boundary of either body, m.
    pub depth: f64,
    /// An edge of each body: two that cross or, where none do, one that lies in the other body and one near to it. Indices are
    /// those of the regions.
    pub edges: (EdgeRef, EdgeRef),
}

/// A body made ready where it is first asked.
struct Body<'a> {
    region: &'a Region,
    boundary: OnceCell<Boundary>,
}

impl Body<'_> {
    fn boundary(&self) -> &Boundary {
        self.boundary
            .get_or_init(|| Boundary::new(self.region.loops()))
    }
}

/// The pairs of bodies that overlap, in order.
///
/// Bodies may share faces, whole or in part, within [`TOUCH`](crate::TOUCH) of the larger one's extent; a body may fill a void of
/// another one.
pub fn overlaps(regions: &[&Region]) -> Vec<BodyOverlap> {
    let hulls: Vec<Hull> = regions
        .iter()
        .map(|region| {
            let bounds = region.bounds();
            let (low, high) = (bounds.min, bounds.max);
            let corner = DVec2::new;
            Hull::of([low, corner(low.x, high.y), high, corner(high.x, low.y)])
        })
        .collect();
    let bodies: Vec<Body<'_>> = regions
        .iter()
        .map(|&region| Body {
            region,
            boundary: OnceCell::new(),
        })
        .collect();
    let mut pairs = Vec::new();
    Tree::new(&hulls, 0.0).pairs(|a, b| {
        pairs.push((a.min(b) as usize, a.max(b) as usize));
        ControlFlow::Continue(())
    });
    pairs.sort_unstable();
    pairs
        .into_iter()
        .filter_map(|(i, j)| overlap([i, j], &bodies))
        .collect()
}

/// What two bodies share.
fn overlap([i, j]: [usize; 2], bodies: &[Body<'_>]) -> Option<BodyOverlap> {
    let both = [i, j].map(|body| bodies[body].boundary());
    let within = touch(both[0].bounds()).max(touch(both[1].bounds()));
    let evidence = evidence(both, within);
    let Evidence { edges, .. } = *evidence.first()?;
    let (place, depth) = deepest(both, &evidence);
    let named = |body: usize| {
        let (loop_index, edge) = both[body].place_of(edges[body]);
        let outline = bodies[[i, j][body]].region.loops().nth(loop_index);
        EdgeRef {
            loop_index,
            edge,
            tag: outline.map_or(0, |outline| outline.tags()[edge]),
        }
    };
    (depth > within).then(|| BodyOverlap {
        bodies: (i, j),
        place,
        depth,
        edges: (named(0), named(1)),
    })
}
