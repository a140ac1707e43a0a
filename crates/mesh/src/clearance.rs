//! Thin walls: do the bands of a body keep clear of each other?
//!
//! A ring is a plane polygon: its corners have one radius and its segments' middles another, at one station. Between two rings
//! a band keeps, in the section, to the hull of these four places ([`crate::ring`]). The hulls of two bands that are no
//! neighbours must not meet. Where all their rings have the same segments, the section is everywhere the same but for a factor
//! on the radius, and the corners alone tell. Neighbours share a ring and
//! cannot cross near it, but one may lie on the other.

use crate::plan::{BodyPlan, Station};
use profile::{DVec2, left_of, trig};
use rstar::{AABB, RTree, RTreeObject};

/// A band in the section: the places of its two rings' corners and middles.
struct Piece {
    loop_index: usize,
    index: usize,
    count: usize,
    places: [DVec2; 4],
    /// Segments of its rings, where they are the same; a point on the axis goes with any.
    segments: Option<u32>,
}

impl RTreeObject for Piece {
    type Envelope = AABB<[f64; 2]>;

    fn envelope(&self) -> Self::Envelope {
        let [a, b, c, d] = self.places;
        AABB::from_corners(
            a.min(b).min(c).min(d).to_array(),
            a.max(b).max(c).max(d).to_array(),
        )
    }
}

/// A place where two bands come too close; `None` where the plan is clear.
pub(crate) fn first_conflict(plan: &BodyPlan, angle: f64) -> Option<DVec2> {
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
                    places: places(&a, &b, angle),
                    segments: (a.segments == b.segments || a.is_pole() || b.is_pole())
                        .then(|| a.segments.max(b.segments)),
                })
            })
        })
        .collect();
    let tree = RTree::bulk_load(pieces);
    tree.iter().find_map(|piece| {
        tree.locate_in_envelope_intersecting(piece.envelope())
            .filter(|other| (other.loop_index, other.index) > (piece.loop_index, piece.index))
            .find(|other| {
                if neighbours(piece, other) {
                    piece.lies_on(other)
                } else {
                    piece.meets(other)
                }
            })
            .map(|_| piece.places[0])
    })
}

/// Cosine of the angle between two neighbours' chords below which the one goes back along the other: a millionth of a turn.
const BACK: f64 = -1.0 + 1e-11;

impl Piece {
    /// Whether a neighbour goes back along this one: in a notch without an angle both keep to one side of the surface on the
    /// same plane.
    fn lies_on(&self, other: &Self) -> bool {
        let way = |piece: &Self| (piece.places[2] - piece.places[0]).normalize_or_zero();
        way(self).dot(way(other)) < BACK
    }

    fn meets(&self, other: &Self) -> bool {
        let is_scaled = self.segments.is_some() && self.segments == other.segments;
        if is_scaled {
            // Of two rings the corners, without the middles.
            let corners = |[a, _, b, _]: [DVec2; 4]| [a, a, b, b];
            return meet(&corners(self.places), &corners(other.places));
        }
        meet(&self.places, &other.places)
    }
}

/// Corners and segments' middles of two rings, r and z.
fn places(a: &Station, b: &Station, angle: f64) -> [DVec2; 4] {
    let of_ring = |ring: &Station| {
        let middle = if ring.is_pole() {
            0.0
        } else {
            ring.radius * trig::cos(0.5 * angle / f64::from(ring.segments))
        };
        [ring.radius, middle].map(|radius| DVec2::new(radius, ring.z))
    };
    let ([p, q], [r, s]) = (of_ring(a), of_ring(b));
    [p, q, r, s]
}

fn neighbours(a: &Piece, b: &Piece) -> bool {
    a.loop_index == b.loop_index
        && ((a.index + 1) % a.count == b.index || (b.index + 1) % b.count == a.index)
}

/// Whether the hulls of two sets of places meet: along no axis does the one end before the other begins.
fn meet(first: &[DVec2; 4], second: &[DVec2; 4]) -> bool {
    let ways = |places: &[DVec2; 4]| {
        let [a, b, c, d] = *places;
        [b - a, c - a, d - a, c - b, d - b, d - c]
    };
    let range = |places: &[DVec2; 4], axis: DVec2| {
        let along = places.map(|place| place.dot(axis));
        along
            .into_iter()
            .fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), x| {
                (low.min(x), high.max(x))
            })
    };
    !ways(first)
        .into_iter()
        .chain(ways(second))
        // A piece without breadth ends along itself too.
        .flat_map(|way| [left_of(way), way])
        .any(|axis| {
            let (p, q) = (range(first, axis), range(second, axis));
            p.1 < q.0 || q.1 < p.0
        })
}
