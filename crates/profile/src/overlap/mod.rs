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

/// What is wrong between two bodies.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum BodyFault {
    /// They overlap.
    Overlap(BodyOverlap),
    /// So many of their edges lie near each other, or so many bodies, that it cannot be asked in reasonable time whether
    /// they overlap.
    TooIntricate {
        /// Indices of the two bodies, the lower first.
        bodies: (usize, usize),
        /// An edge of each of them.
        edges: (EdgeRef, EdgeRef),
    },
}

/// Pairs of bodies that are asked, by their boxes: far more than a part has that is no mistake.
const MOST_PAIRS: usize = 100_000;

/// Faults after which no more are looked for.
const MOST_FAULTS: usize = 100;

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

/// What is wrong between bodies, in their order; the first 100 faults.
///
/// Bodies may share faces, whole or in part, within [`TOUCH`](crate::TOUCH) of the larger one's extent; a body may fill a void of
/// another one.
pub fn overlaps(regions: &[&Region]) -> Vec<BodyFault> {
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
        pairs.push([a.min(b) as usize, a.max(b) as usize]);
        if pairs.len() < MOST_PAIRS {
            ControlFlow::Continue(())
        } else {
            ControlFlow::Break(())
        }
    });
    let unasked = pairs.get(MOST_PAIRS - 1).copied();
    pairs.sort_unstable();
    let mut found: Vec<BodyFault> = pairs
        .into_iter()
        .filter_map(|pair| fault(pair, &bodies))
        .take(MOST_FAULTS)
        .collect();
    if let (true, Some(pair)) = (found.is_empty(), unasked) {
        found.push(too_intricate(pair, &bodies, [0, 0]));
    }
    found
}

/// What is wrong between two bodies.
fn fault(pair: [usize; 2], bodies: &[Body<'_>]) -> Option<BodyFault> {
    let both = pair.map(|body| bodies[body].boundary());
    let within = touch(both[0].bounds()).max(touch(both[1].bounds()));
    let evidence = match evidence(both, within) {
        Ok(evidence) => evidence,
        Err(edges) => return Some(too_intricate(pair, bodies, edges)),
    };
    let Evidence { edges, .. } = *evidence.first()?;
    let (place, depth) = deepest(both, &evidence);
    (depth > within).then(|| {
        BodyFault::Overlap(BodyOverlap {
            bodies: pair.into(),
            place,
            depth,
            edges: named(pair, bodies, edges),
        })
    })
}

fn too_intricate(pair: [usize; 2], bodies: &[Body<'_>], edges: [usize; 2]) -> BodyFault {
    BodyFault::TooIntricate {
        bodies: pair.into(),
        edges: named(pair, bodies, edges),
    }
}

/// An edge of each of two bodies, by its place there.
fn named(pair: [usize; 2], bodies: &[Body<'_>], edges: [usize; 2]) -> (EdgeRef, EdgeRef) {
    let of = |which: usize| {
        let body = &bodies[pair[which]];
        let (loop_index, edge) = body.boundary().place_of(edges[which]);
        let outline = body.region.loops().nth(loop_index);
        EdgeRef {
            loop_index,
            edge,
            tag: outline.map_or(0, |outline| outline.tags()[edge]),
        }
    };
    (of(0), of(1))
}
