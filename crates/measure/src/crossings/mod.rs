//! Do triangles of one mesh meet where they should not?
//!
//! Boxes find the pairs that may; whether a pair does is decided by the signs of determinants, exact whatever the rounding
//! (Shewchuk 1997), by way of the `robust` crate.

mod pair;
mod tree;

use crate::Triangles;
use pair::{Corners, meet};
use rayon::prelude::*;
use tree::Tree;

/// Pairs of triangles that meet where they should not.
#[derive(Debug, Clone, Default, PartialEq, Eq)]
pub struct Crossings {
    /// How many pairs.
    pub count: usize,
    /// Some of the pairs, by the triangles' indices.
    pub some: Vec<[u32; 2]>,
}

/// Pairs that are named.
const NAMED: usize = 16;
/// Leaves of the tree looked at in one go.
const RUN: usize = 512;

/// Counts the pairs of triangles that have a point in common besides the corners or the edge that they share.
///
/// Touching counts: a corner of the one on the other, two faces on each other. Corners in the same place are shared, whatever
/// their indices: two cones may meet in their tips. Triangles with the same three corners are the audit's duplicates, those
/// without area its degenerate ones; both are left out, as are triangles with a coordinate that is not finite.
///
/// The result is the same for any number of threads. Indices must be in range.
pub fn crossings(mesh: Triangles) -> Crossings {
    let tree = Tree::new(mesh);
    let leaves = tree.leaves();
    let runs: Vec<Crossings> = (0..leaves.div_ceil(RUN))
        .into_par_iter()
        .map(|run| {
            let mut found = Crossings::default();
            for leaf in run * RUN..leaves.min((run + 1) * RUN) {
                tree.near(leaf, |other| within(mesh, &tree, [leaf, other], &mut found));
            }
            found
        })
        .collect();
    let mut all = Crossings::default();
    for run in runs {
        all.count += run.count;
        let room = NAMED - all.some.len();
        all.some.extend(run.some.into_iter().take(room));
    }
    all
}

/// The pairs of a leaf's triangles with another's, or among themselves.
fn within(mesh: Triangles, tree: &Tree, [leaf, other]: [usize; 2], found: &mut Crossings) {
    let at = |index: u32| mesh.corners(mesh.triangles[index as usize]);
    for (place, (own, bounds)) in tree.members(leaf).enumerate() {
        let behind = if leaf == other { place + 1 } else { 0 };
        let mut corners = None;
        for (index, _) in tree
            .members(other)
            .skip(behind)
            .filter(|(_, box_of)| box_of.meets(bounds))
        {
            let Some(corners) = corners.get_or_insert_with(|| Corners::of(at(own))) else {
                break;
            };
            let near = at(index);
            if corners.may_meet(near) && Corners::of(near).is_some_and(|near| meet(corners, &near))
            {
                found.count += 1;
                if found.some.len() < NAMED {
                    found.some.push([own.min(index), own.max(index)]);
                }
            }
        }
    }
}
