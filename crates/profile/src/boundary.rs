//! The edges of some loops made ready for questions about points.

use crate::piece::{Hull, Piece, pieces};
use crate::tolerance::touch;
use crate::tree::Tree;
use crate::{Bounds, Edge, Loop, Seeker, Zone, left_of};
use glam::DVec2;
use std::ops::Range;

/// The edges of some loops with a tree over their pieces.
#[derive(Debug, Clone)]
pub(crate) struct Boundary {
    edges: Vec<Edge>,
    seekers: Vec<Seeker>,
    /// Of each edge, the sum of the unit normals to the left on both sides of the corner where it starts.
    corners: Vec<DVec2>,
    /// Index of each loop's first edge, and the number of edges.
    first: Vec<usize>,
    pieces: Vec<(u32, Piece)>,
    tree: Tree,
    bounds: Bounds,
}

/// The nearest edge: its index over all loops, the squared distance and where on it.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Found {
    pub(crate) edge: usize,
    pub(crate) distance_squared: f64,
    zone: Zone,
}

/// Sums of two unit normals shorter than this belong to edges that nearly turn back on each other; which side is which
/// then hangs on their curvature.
const FOLDED: f64 = 1e-6;

impl Boundary {
    /// The boundary made of `loops`; at least one.
    pub(crate) fn new<'a>(loops: impl IntoIterator<Item = &'a Loop>) -> Self {
        let mut edges = Vec::new();
        let mut corners = Vec::new();
        let mut first = vec![0];
        for outline in loops {
            edges.extend_from_slice(outline.edges());
            let mut before = outline.edges().last();
            for edge in outline.edges() {
                let arriving = before.map_or(DVec2::ZERO, |edge| edge.tangent(1.0));
                corners.push(left_of(arriving + edge.tangent(0.0)));
                before = Some(edge);
            }
            first.push(edges.len());
        }
        let mut all_pieces = Vec::with_capacity(edges.len());
        let mut hulls: Vec<Hull> = Vec::with_capacity(edges.len());
        for (index, edge) in (0_u32..).zip(&edges) {
            pieces(edge, |piece| {
                all_pieces.push((index, piece));
                hulls.push(piece.hull(edge));
            });
        }
        let bounds = hulls
            .iter()
            .flat_map(Hull::points)
            .map(|&p| Bounds::of_point(p))
            .reduce(Bounds::union)
            .unwrap_or(Bounds::of_point(DVec2::ZERO));
        Self {
            seekers: edges.iter().map(Seeker::new).collect(),
            tree: Tree::new(&hulls, touch(bounds)),
            edges,
            corners,
            first,
            pieces: all_pieces,
            bounds,
        }
    }

    /// All edges, loop by loop.
    pub(crate) fn edges(&self) -> &[Edge] {
        &self.edges
    }

    /// The loop of the edge with this index over all loops, and its index there.
    pub(crate) fn place_of(&self, edge: usize) -> (usize, usize) {
        let outline = self.first.partition_point(|&first| first <= edge) - 1;
        (outline, edge - self.first[outline])
    }

    /// The edges of each loop, by their indices over all loops.
    pub(crate) fn loop_edges(&self) -> impl Iterator<Item = Range<usize>> {
        self.first.windows(2).map(|ends| ends[0]..ends[1])
    }

    /// A box that holds the boundary.
    pub(crate) fn bounds(&self) -> Bounds {
        self.bounds
    }

    /// The index over all loops of the edge that follows in its loop.
    pub(crate) fn next(&self, edge: usize) -> usize {
        let outline = self.place_of(edge).0;
        if edge + 1 < self.first[outline + 1] {
            edge + 1
        } else {
            self.first[outline]
        }
    }

    /// How an edge is asked for its nearest point.
    pub(crate) fn seeker(&self, edge: usize) -> &Seeker {
        &self.seekers[edge]
    }

    /// The nearest edge; where `p` is not finite there may be none.
    pub(crate) fn nearest(&self, p: DVec2) -> Option<Found> {
        let mut best: Option<Found> = None;
        self.tree.nearest(p, f64::INFINITY, |piece| {
            let edge = self.pieces[piece as usize].0 as usize;
            let probe = self.seekers[edge].probe(p);
            if best.is_none_or(|best| probe.distance_squared < best.distance_squared) {
                best = Some(Found {
                    edge,
                    distance_squared: probe.distance_squared,
                    zone: probe.zone,
                });
            }
            probe.distance_squared
        });
        best
    }

    /// Whether `p` is on the left of travel of the boundary where it is nearest.
    ///
    /// The way to the nearest point meets no other edge, so that is the side of the loop that it belongs to, and where all
    /// loops keep the material on their left, the question whether `p` is in it.
    pub(crate) fn is_left(&self, p: DVec2, nearest: Found) -> bool {
        let corner = match nearest.zone {
            Zone::Inner { left } => return left > 0.0,
            Zone::Start => nearest.edge,
            Zone::End => self.next(nearest.edge),
        };
        let normal = self.corners[corner];
        if normal.length_squared() > FOLDED * FOLDED {
            normal.dot(p - self.edges[corner].start()) > 0.0
        } else {
            self.winding(p) > 0
        }
    }

    /// Distance from `p` to the boundary, negative on its left; not a number where `p` is not finite.
    pub(crate) fn signed_distance(&self, p: DVec2) -> f64 {
        self.nearest(p).map_or(f64::NAN, |found| {
            let distance = found.distance_squared.sqrt();
            if self.is_left(p, found) {
                -distance
            } else {
                distance
            }
        })
    }

    /// Turns of all loops about `p`, counter-clockwise positive.
    pub(crate) fn winding(&self, p: DVec2) -> i32 {
        let mut turns = 0;
        self.tree.right_of(p, |piece| {
            let (edge, piece) = self.pieces[piece as usize];
            let edge = edge as usize;
            turns += piece.winding(&self.edges[edge], &self.seekers[edge], p);
        });
        turns
    }
}
