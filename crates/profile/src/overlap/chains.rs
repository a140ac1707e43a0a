//! Where the boundary of one body lies in another body.
//!
//! Each edge is cut where it meets an edge of the other body. Between two cuts it lies all inside the other body, all
//! outside, or along its boundary; its middle tells which. Along the boundary the materials lie on the same side if the edges
//! run the same way, and on opposite sides, so that the bodies only touch, if they run opposite ways. If no piece of either
//! boundary lies inside the other body or along it the same way, the bodies have no inner point in common: one body's
//! inside, being connected, would lie all in the other, and its boundary with it.

use crate::boundary::Boundary;
use crate::{Meeting, candidates, left_of, meetings};
use glam::DVec2;

/// A place where two bodies overlap.
#[derive(Debug, Clone, Copy)]
pub(super) struct Evidence {
    /// A point on the boundary of one body, in the other body or on its boundary.
    pub(super) at: DVec2,
    /// Unit vector from there into the first-named body.
    pub(super) inward: DVec2,
    /// An edge of each body.
    pub(super) edges: [usize; 2],
}

/// As many places are enough to find one that is deep.
const ENOUGH: usize = 64;

/// When so many edges have been found to cross, the search for more ends: the bodies overlap, and where they cross is
/// evidence enough.
const MANY: usize = 1000;

/// Pieces shorter than this many times the distance within which points are shared are part of a meeting.
const SHORTEST: f64 = 8.0;

/// The edges' meetings, by edge: of each, the parameters at which it is cut.
struct Cuts {
    of_edge: Vec<Vec<f64>>,
}

/// Places where the bodies overlap, as far as their boundaries tell; none where they do not. Where edges cross, the first
/// place names two that do.
pub(super) fn evidence(both: [&Boundary; 2], within: f64) -> Result<Vec<Evidence>, [usize; 2]> {
    let mut cuts = both.map(|boundary| Cuts {
        of_edge: vec![Vec::new(); boundary.edges().len()],
    });
    let crossing = match cut(both, within, &mut cuts)? {
        Crossings::Many(evidence) => return Ok(evidence),
        Crossings::First(edges) => edges,
    };
    let mut found = Vec::new();
    for (body, cuts) in cuts.iter_mut().enumerate() {
        let (own, other) = (both[body], both[1 - body]);
        for edges in own.loop_edges() {
            let first = edges.start;
            let mut is_cut = false;
            for edge in edges {
                let params = &mut cuts.of_edge[edge];
                if params.is_empty() || found.len() >= ENOUGH {
                    continue;
                }
                is_cut = true;
                params.extend([0.0, 1.0]);
                params.sort_unstable_by(f64::total_cmp);
                for piece in params.windows(2) {
                    let ends = [piece[0], piece[1]].map(|t| own.edges()[edge].point(t));
                    if ends[0].distance(ends[1]) > SHORTEST * within {
                        let t = 0.5 * (piece[0] + piece[1]);
                        found.extend(inside(body, own, edge, t, other, within));
                    }
                }
            }
            // A loop that meets nothing lies all on one side.
            if !is_cut && found.len() < ENOUGH {
                found.extend(inside(body, own, first, 0.0, other, within));
            }
        }
    }
    if let (Some(first), Some(edges)) = (found.first_mut(), crossing) {
        first.edges = edges;
    }
    Ok(found)
}

/// Edges of the two boundaries that cross.
enum Crossings {
    /// The first two in order of the first boundary, if any do.
    First(Option<[usize; 2]>),
    /// So many that the search ended early: some of the places.
    Many(Vec<Evidence>),
}

/// Notes where edges of the two boundaries meet.
fn cut(both: [&Boundary; 2], within: f64, cuts: &mut [Cuts; 2]) -> Result<Crossings, [usize; 2]> {
    let [first, second] = both.map(Boundary::edges);
    let (pairs, is_whole) = match candidates::between(first, second, within) {
        Ok(pairs) => (pairs, true),
        Err(some) => (some, false),
    };
    let mut crossings: Vec<Evidence> = Vec::new();
    for pair in &pairs {
        let edges = pair.map(|edge| edge as usize);
        let [a, b] = [first[edges[0]], second[edges[1]]];
        for meeting in meetings(&a, &b, within) {
            match meeting {
                Meeting::Point {
                    t_a,
                    t_b,
                    point,
                    crossing,
                } => {
                    cuts[0].of_edge[edges[0]].push(t_a);
                    cuts[1].of_edge[edges[1]].push(t_b);
                    if crossing {
                        // What both bodies share lies left of both edges.
                        let inward = left_of(a.tangent(t_a)) + left_of(b.tangent(t_b));
                        crossings.push(Evidence {
                            at: point,
                            inward: inward.normalize_or_zero(),
                            edges,
                        });
                    }
                }
                Meeting::Overlap { a, b } => {
                    cuts[0].of_edge[edges[0]].extend(a);
                    cuts[1].of_edge[edges[1]].extend(b);
                }
            }
        }
        if crossings.len() >= MANY {
            break;
        }
    }
    let first = crossings.first().map(|crossing| crossing.edges);
    match pairs.first() {
        Some(pair) if !is_whole && first.is_none() => Err(pair.map(|edge| edge as usize)),
        _ if is_whole && crossings.len() < MANY => Ok(Crossings::First(first)),
        _ => {
            crossings.truncate(ENOUGH);
            Ok(Crossings::Many(crossings))
        }
    }
}

/// What the point at `t` of an edge of `own`, the boundary of body number `body`, tells.
fn inside(
    body: usize,
    own: &Boundary,
    edge: usize,
    t: f64,
    other: &Boundary,
    within: f64,
) -> Option<Evidence> {
    let at = own.edges()[edge].point(t);
    let direction = own.edges()[edge].tangent(t);
    let nearest = other.nearest(at)?;
    let is_inside = if nearest.distance_squared > within * within {
        other.is_left(at, nearest)
    } else {
        let beside = other.seeker(nearest.edge).foot(at).t;
        other.edges()[nearest.edge].tangent(beside).dot(direction) > 0.0
    };
    let mut edges = [edge, nearest.edge];
    if body == 1 {
        edges.swap(0, 1);
    }
    is_inside.then(|| Evidence {
        at,
        inward: left_of(direction),
        edges,
    })
}
