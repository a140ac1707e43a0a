//! Closed chains of edges.

use crate::{Bounds, Edge};

/// A closed chain of edges that share their corners bit for bit.
///
/// Each edge carries a tag, a number of the caller's (a part file's step), that stays with it through every operation.
#[derive(Debug, Clone, PartialEq)]
pub struct Loop {
    edges: Vec<Edge>,
    tags: Vec<u32>,
}

/// Why edges do not make a [`Loop`].
#[derive(Debug, Clone, Copy, PartialEq, Eq, thiserror::Error)]
pub enum OpenLoop {
    /// A loop takes at least two edges.
    #[error("a closed outline needs at least two edges")]
    TooShort,
    /// The edge at this index does not end, bit for bit, where the next one starts.
    #[error("edge {0} does not end where the next one starts")]
    Gap(usize),
}

impl Loop {
    /// A loop of `edges` with their tags.
    ///
    /// # Errors
    /// Fewer than two edges, or an end that is not the next start.
    pub fn new(edges: impl IntoIterator<Item = (Edge, u32)>) -> Result<Self, OpenLoop> {
        let (edges, tags): (Vec<Edge>, Vec<u32>) = edges.into_iter().unzip();
        if edges.len() < 2 {
            return Err(OpenLoop::TooShort);
        }
        let next = |i: usize| if i + 1 < edges.len() { i + 1 } else { 0 };
        if let Some(gap) = (0..edges.len()).find(|&i| edges[i].end() != edges[next(i)].start()) {
            return Err(OpenLoop::Gap(gap));
        }
        Ok(Self { edges, tags })
    }

    /// The edges in order of travel.
    pub fn edges(&self) -> &[Edge] {
        &self.edges
    }

    /// The edges' tags, one an edge.
    pub fn tags(&self) -> &[u32] {
        &self.tags
    }

    /// The loop travelled the other way; its first edge is the last one's reverse.
    #[must_use]
    pub fn reversed(&self) -> Self {
        Self {
            edges: self.edges.iter().rev().map(Edge::reversed).collect(),
            tags: self.tags.iter().rev().copied().collect(),
        }
    }

    /// A box that holds it.
    pub fn bounds(&self) -> Bounds {
        self.edges
            .iter()
            .map(Edge::bounds)
            .reduce(Bounds::union)
            .expect("a loop has at least two edges")
    }
}
