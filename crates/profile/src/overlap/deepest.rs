//! The place where two bodies overlap most deeply.

use super::chains::Evidence;
use crate::Bounds;
use crate::boundary::Boundary;
use glam::DVec2;
use std::cmp::Ordering;
use std::collections::BinaryHeap;

/// A square that may hold a deeper place than the best one so far.
#[derive(Debug)]
struct Cell {
    centre: DVec2,
    half: f64,
    /// No place in the square is deeper: the depth changes by no more than the way.
    most: f64,
}

impl PartialEq for Cell {
    fn eq(&self, other: &Self) -> bool {
        self.cmp(other).is_eq()
    }
}

impl Eq for Cell {}

impl PartialOrd for Cell {
    fn partial_cmp(&self, other: &Self) -> Option<Ordering> {
        Some(self.cmp(other))
    }
}

impl Ord for Cell {
    fn cmp(&self, other: &Self) -> Ordering {
        self.most.total_cmp(&other.most)
    }
}

/// Halvings of the way inward from a piece of evidence: from the bodies' size to the least that counts as overlapping.
const HALVINGS: i32 = 44;

/// Squares looked at before the search is content with the best place so far.
const MOST_CELLS: usize = 400;

/// A place is deep enough where no other one can be deeper by more than this part.
const CONTENT: f64 = 1.05;

/// A deep place that two bodies share and its distance from the nearest boundary of either; the distance is not positive where
/// there is none.
///
/// Of squares that cover the common box the one that may hold the deepest place is quartered, until no other can be much
/// deeper. (The depth is the least of distances, so it changes by no more than one goes.) Where what the bodies
/// share is thin and long that takes too many squares; then a place straight inward from the evidence stands.
pub(super) fn deepest(both: [&Boundary; 2], evidence: &[Evidence]) -> (DVec2, f64) {
    let [a, b] = both.map(Boundary::bounds);
    let common = Bounds {
        min: a.min.max(b.min),
        max: a.max.min(b.max),
    };
    let size = common.size().max_element();
    let mut search = Search {
        both,
        best: (common.centre(), f64::NEG_INFINITY),
        cells: BinaryHeap::new(),
    };
    for one in evidence {
        let mut way = size;
        for _ in 0..HALVINGS {
            way *= 0.5;
            // No place nearer than this to a boundary is deeper.
            if way <= search.best.1 {
                break;
            }
            search.depth(one.at + one.inward * way);
        }
    }
    search.add(common.centre(), 0.5 * size);
    for _ in 0..MOST_CELLS {
        let Some(cell) = search.cells.pop() else {
            break;
        };
        if cell.most <= CONTENT * search.best.1 {
            break;
        }
        let half = 0.5 * cell.half;
        for (x, y) in [(-1.0, -1.0), (1.0, -1.0), (-1.0, 1.0), (1.0, 1.0)] {
            search.add(cell.centre + half * DVec2::new(x, y), half);
        }
    }
    search.best
}

struct Search<'a> {
    both: [&'a Boundary; 2],
    /// The deepest place so far and its depth.
    best: (DVec2, f64),
    cells: BinaryHeap<Cell>,
}

impl Search<'_> {
    /// How deep a place lies in both bodies.
    fn depth(&mut self, p: DVec2) -> f64 {
        let [a, b] = self.both.map(|boundary| -boundary.signed_distance(p));
        let depth = a.min(b);
        if depth > self.best.1 {
            self.best = (p, depth);
        }
        depth
    }

    /// Adds the square if it may hold a deeper place.
    fn add(&mut self, centre: DVec2, half: f64) {
        let most = self.depth(centre) + half * std::f64::consts::SQRT_2;
        if most > CONTENT * self.best.1 {
            self.cells.push(Cell { centre, half, most });
        }
    }
}
