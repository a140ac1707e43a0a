//! Thin walls: do the bands of a body keep clear of each other?
//!
//! Every band lies within its deviation of its frustum; two bands that are no neighbours must be further apart, in the
//! section, than what both may deviate. Neighbours share a ring and cannot cross near it.

use crate::plan::BodyPlan;
use profile::DVec2;
use rstar::{AABB, RTree, RTreeObject};

/// A band in the section: a straight piece from station to station of the true circles.
struct Piece {
    loop_index: usize,
    index: usize,
    count: usize,
    from: DVec2,
    to: DVec2,
}

impl RTreeObject for Piece {
    type Envelope = AABB<[f64; 2]>;

    fn envelope(&self) -> Self::Envelope {
        AABB::from_corners(self.from.to_array(), self.to.to_array())
    }
}

/// A place where two bands come too close; `None` where the plan is clear.
pub(crate) fn first_conflict(plan: &BodyPlan) -> Option<DVec2> {
    let pieces: Vec<Piece> = plan
        .loops
        .iter()
        .enumerate()
        .flat_map(|(loop_index, l)| {
            let count = l.stations.len();
            (0..count).filter_map(move |index| {
                let (a, b) = (l.stations[index], l.stations[(index + 1) % count]);
                (!(a.is_pole() && b.is_pole())).then_some(Piece {
                    loop_index,
                    index,
                    count,
                    from: a.node,
                    to: b.node,
                })
            })
        })
        .collect();
    let tree = RTree::bulk_load(pieces);
    let clear = 2.0 * plan.deviation;
    tree.iter().find_map(|piece| {
        let low = piece.from.min(piece.to) - clear;
        let high = piece.from.max(piece.to) + clear;
        tree.locate_in_envelope_intersecting(AABB::from_corners(low.to_array(), high.to_array()))
            .filter(|other| (other.loop_index, other.index) > (piece.loop_index, piece.index))
            .filter(|other| !neighbours(piece, other))
            .find(|other| distance(piece, other) <= clear)
            .map(|_| piece.from)
    })
}

fn neighbours(a: &Piece, b: &Piece) -> bool {
    a.loop_index == b.loop_index
        && ((a.index + 1) % a.count == b.index || (b.index + 1) % b.count == a.index)
}

/// Distance of two straight pieces; 0 where they cross.
fn distance(a: &Piece, b: &Piece) -> f64 {
    let side = |p: DVec2, q: DVec2, x: DVec2| (q - p).perp_dot(x - p);
    let apart = |p: &Piece, q: &Piece| side(p.from, p.to, q.from) * side(p.from, p.to, q.to) > 0.0;
    if !apart(a, b) && !apart(b, a) {
        return 0.0;
    }
    let to_piece = |x: DVec2, p: &Piece| {
        let along = p.to - p.from;
        let t = ((x - p.from).dot(along) / along.length_squared()).clamp(0.0, 1.0);
        x.distance(p.from + t * along)
    };
    to_piece(a.from, b)
        .min(to_piece(a.to, b))
        .min(to_piece(b.from, a))
        .min(to_piece(b.to, a))
}
