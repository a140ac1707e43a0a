//! Pairs of edges that may meet, by the boxes of their pieces.
//!
//! Curved edges close to each other are told apart only where their pieces' boxes are thin: where too many pairs of edges have
//! boxes that meet, the pieces are cut and the search starts anew.

use crate::Edge;
use crate::piece::{Hull, hulls};
use crate::tree::Tree;
use std::ops::ControlFlow;

/// Pairs of edges, for each edge on an average, that may be near each other by their boxes before curved edges are cut
/// finer,
const PATIENCE: usize = 8;

/// and pairs of boxes for each of these pairs.
const REPEATS: usize = 4;

/// Edges that are always allowed for in the two, so that a small outline is not cut for a few pairs.
const FEW: usize = 100;

/// Curved edges are not cut into more pieces than this together, to bound the memory,
const MOST_HULLS: usize = 200_000;

/// and no piece into more than this, where boxes are thinner than a hundred thousandth of their length.
const FINEST: u32 = 64;

/// Pairs of boxes that are looked at: with so many, curves lie nested more closely than they can be told apart in about a
/// second.
const MOST_PAIRS: usize = 600_000;

/// Of too many pairs this many are given, to be asked in case they tell enough.
const SAMPLE: usize = 50_000;

/// Two edges by their indices.
pub(crate) type Pair = [u32; 2];

/// Edges cut into pieces, the pieces' hulls edge by edge.
#[derive(Debug)]
pub(crate) struct Hulls {
    all: Vec<Hull>,
    /// Of each hull, its edge's index.
    edge: Vec<u32>,
    /// Of each edge, its first hull; and the number of hulls.
    first: Vec<usize>,
}

impl Hulls {
    /// The hulls of the edges, each piece of a curved one cut into `parts`. Edges that take no part are `None`.
    fn new<'a>(edges: impl Iterator<Item = Option<&'a Edge>>, parts: u32) -> Self {
        let mut list = Self {
            all: Vec::new(),
            edge: Vec::new(),
            first: vec![0],
        };
        for (number, edge) in (0_u32..).zip(edges) {
            if let Some(edge) = edge {
                hulls(edge, parts, |hull| list.all.push(hull));
            }
            list.edge.resize(list.all.len(), number);
            list.first.push(list.all.len());
        }
        list
    }

    /// Those of an edge.
    pub(crate) fn of(&self, edge: u32) -> &[Hull] {
        let edge = edge as usize;
        &self.all[self.first[edge]..self.first[edge + 1]]
    }
}

/// Pairs found so far, in no order, some of them several times.
struct Found {
    pairs: Vec<Pair>,
    most: usize,
}

impl Found {
    fn add(&mut self, pair: Pair) -> ControlFlow<()> {
        self.pairs.push(pair);
        if self.pairs.len() < self.most {
            ControlFlow::Continue(())
        } else {
            ControlFlow::Break(())
        }
    }
}

/// Pairs of the edges whose boxes, grown by `margin`, meet, the lower index first, in order; but for those of which the hulls
/// tell that they are `apart`.
///
/// # Errors
/// Some of the pairs, one at least, where there are too many.
pub(crate) fn within<'a>(
    edges: &(impl Iterator<Item = Option<&'a Edge>> + Clone),
    margin: f64,
    apart: impl Fn(&Hulls, Pair) -> bool,
) -> Result<Vec<Pair>, Vec<Pair>> {
    refined(edges.clone().flatten(), |parts, found| {
        let hulls = Hulls::new(edges.clone(), parts);
        Tree::new(&hulls.all, margin).pairs(|p, q| {
            let [p, q] = [p, q].map(|hull| hulls.edge[hull as usize]);
            let pair = [p.min(q), p.max(q)];
            if p == q || apart(&hulls, pair) {
                return ControlFlow::Continue(());
            }
            found.add(pair)
        });
    })
}

/// Pairs of a first edge and a second one whose boxes, grown by `margin`, meet, in order.
///
/// # Errors
/// Some of the pairs, one at least, where there are too many.
pub(crate) fn between(
    first: &[Edge],
    second: &[Edge],
    margin: f64,
) -> Result<Vec<Pair>, Vec<Pair>> {
    refined(first.iter().chain(second), |parts, found| {
        let [p, q] = [first, second].map(|edges| {
            let hulls = Hulls::new(edges.iter().map(Some), parts);
            (Tree::new(&hulls.all, margin), hulls.edge)
        });
        p.0.pairs_with(&q.0, |a, b| found.add([p.1[a as usize], q.1[b as usize]]));
    })
}

/// Searches with pieces cut into more and more parts until there are few enough pairs.
fn refined<'a>(
    edges: impl Iterator<Item = &'a Edge>,
    mut search: impl FnMut(u32, &mut Found),
) -> Result<Vec<Pair>, Vec<Pair>> {
    let [mut straight, mut curved] = [0_usize; 2];
    for edge in edges {
        match edge {
            Edge::Line(_) => straight += 1,
            // An edge has a few pieces, one or two mostly.
            _ => curved += 2,
        }
    }
    let patience = PATIENCE * (straight + curved).max(FEW);
    let mut parts = 1;
    loop {
        let finer = MOST_HULLS / (straight + curved * parts as usize).max(1);
        let may_cut = parts < FINEST && finer > 1 && curved > 0;
        let mut found = Found {
            pairs: Vec::new(),
            most: if may_cut {
                REPEATS * patience
            } else {
                MOST_PAIRS
            },
        };
        search(parts, &mut found);
        let Found { mut pairs, most } = found;
        if pairs.len() < most {
            pairs.sort_unstable();
            pairs.dedup();
            if !may_cut || pairs.len() <= patience {
                return Ok(pairs);
            }
        } else if !may_cut {
            pairs.truncate(SAMPLE);
            return Err(pairs);
        }
        parts *= if finer >= 4 { 4 } else { 2 };
    }
}
