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
/// Triangles looked at in one go.
const RUN: usize = 4096;

/// Counts the pairs of triangles that have a point in common besides the corners or the edge that they share.
///
/// Touching counts: a corner of the one on the other, two faces on each other. Corners in the same place are shared, whatever
/// their indices: two cones may meet in their tips. Triangles with the same three corners are the audit's duplicates, those
/// without area its degenerate ones; both are left out, as are triangles with a coordinate that is not finite.
///
/// The result is the same for any number of threads. Indices must be in range.
pub fn crossings(mesh: Triangles) -> Crossings {
    let tree = Tree::new(mesh);
    let order = tree.order();
    let runs: Vec<Crossings> = order
        .par_chunks(RUN)
        .enumerate()
        .map(|(run, members)| {
            let mut found = Crossings::default();
            for (place, &own) in (run * RUN..).zip(members) {
                let Some(corners) = Corners::of(mesh, own) else {
                    continue;
                };
                tree.near(corners.bounds(), place + 1, |other| {
                    if Corners::of(mesh, other).is_some_and(|other| meet(&corners, &other)) {
                        found.count += 1;
                        if found.some.len() < NAMED {
                            found.some.push([own.min(other), own.max(other)]);
                        }
                    }
                });
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
