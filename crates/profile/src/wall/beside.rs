//! The offset of a whole face.

use super::WallFault;
use super::axis::meet_axis;
use super::joint::{Joint, SMOOTH, cut, joint, trimmed, turn};
use crate::{Arc, DVec2, Edge};
use std::f64::consts::PI;

/// A curve that runs slower than this part of its base's speed has come to its base's centre of curvature, to rounding.
const STANDSTILL: f64 = 1e-12;

/// One side of a wall, from start to end; never empty.
#[derive(Debug, Clone)]
pub(super) struct Side {
    pub(super) edges: Vec<(Edge, u32)>,
}

impl Side {
    pub(super) fn edges(&self) -> impl DoubleEndedIterator<Item = (Edge, u32)> + '_ {
        self.edges.iter().copied()
    }

    pub(super) fn start(&self) -> DVec2 {
        self.edges.first().expect("never empty").0.start()
    }

    pub(super) fn end(&self) -> DVec2 {
        self.edges.last().expect("never empty").0.end()
    }
}

/// The offset of one edge of the face, cut as far as it is known.
#[derive(Debug, Clone, Copy)]
struct Offset {
    /// Index in the face.
    index: usize,
    edge: Edge,
    from: (f64, DVec2),
    to: (f64, DVec2),
    /// The arc about the corner after it.
    round: Option<Arc>,
    /// True where it is trimmed on the inner side of the corner at its start.
    trimmed: bool,
}

/// The side at `distance` to the left of the face (to the right where negative), closed on the axis where the face ends
/// there.
pub(super) fn beside(face: &[(Edge, u32)], distance: f64) -> Result<Side, WallFault> {
    if distance == 0.0 {
        return Ok(Side {
            edges: face.to_vec(),
        });
    }
    let mut edges = Vec::with_capacity(face.len());
    for offset in offsets(face, distance)? {
        let tag = face[offset.index].1;
        edges.extend(
            cut(&offset.edge, offset.from, offset.to)
                .into_iter()
                .map(|edge| (edge, tag)),
        );
        edges.extend(offset.round.map(|arc| (Edge::Arc(arc), tag)));
    }
    meet_axis(Side { edges }, face, distance)
}

/// The offsets of all edges, joined, without those that the joints leave nothing of.
fn offsets(face: &[(Edge, u32)], distance: f64) -> Result<Vec<Offset>, WallFault> {
    let mut chain: Vec<Offset> = Vec::with_capacity(face.len());
    for index in 0..face.len() {
        let mut next = offset(face, index, distance)?;
        let mut left_out = false;
        while let Some(last) = chain.last_mut() {
            match join(face, last, &mut next, distance)? {
                Room::Both => break,
                Room::NextOnly => {
                    // Only between two inner corners an edge may vanish.
                    if !last.trimmed {
                        return Err(too_short(face, last.index));
                    }
                    chain.pop();
                }
                Room::LastOnly => {
                    let inner_after = face
                        .get(index + 1)
                        .is_some_and(|(after, _)| turn(&face[index].0, after) * distance > 0.0);
                    if !inner_after {
                        return Err(too_short(face, index));
                    }
                    left_out = true;
                    break;
                }
            }
        }
        if !left_out {
            chain.push(next);
        }
    }
    Ok(chain)
}

/// For which of two offset edges their joint leaves room.
enum Room {
    Both,
    NextOnly,
    LastOnly,
}

/// Joins two offset edges that follow each other.
fn join(
    face: &[(Edge, u32)],
    last: &mut Offset,
    next: &mut Offset,
    distance: f64,
) -> Result<Room, WallFault> {
    let corner = face[next.index].0.start();
    let neighbours = last.index + 1 == next.index;
    let joint = if neighbours {
        let turn = turn(&face[last.index].0, &face[next.index].0);
        if PI - turn.abs() < SMOOTH {
            return Err(WallFault::TurnsBack {
                index: last.index,
                point: corner,
            });
        }
        next.trimmed = turn.abs() >= SMOOTH && turn * distance > 0.0;
        joint(&last.edge, &next.edge, corner, turn, distance)
    } else {
        next.trimmed = true;
        trimmed(&last.edge, &next.edge, corner)
    };
    last.round = None;
    match joint {
        Joint::Point {
            t_before,
            t_after,
            point,
        } => {
            if t_before <= last.from.0 {
                return Ok(Room::NextOnly);
            }
            if t_after >= 1.0 {
                return Ok(Room::LastOnly);
            }
            last.to = (t_before, point);
            next.from = (t_after, point);
            Ok(Room::Both)
        }
        Joint::Round(arc) => {
            last.to = (1.0, arc.start);
            last.round = Some(arc);
            next.from = (0.0, arc.end);
            Ok(Room::Both)
        }
        // Of two edges that miss each other the shorter one is in the way of the other's neighbours.
        Joint::None => Ok(
            if last.edge.chord().length_squared() < next.edge.chord().length_squared() {
                Room::NextOnly
            } else {
                Room::LastOnly
            },
        ),
    }
}

/// The offset of one edge as it is, if it runs forward all along.
fn offset(face: &[(Edge, u32)], index: usize, distance: f64) -> Result<Offset, WallFault> {
    let face_edge = &face[index].0;
    let too_thick = |t: f64| {
        let radius = face_edge.curvature(t).abs().recip();
        WallFault::TooThick {
            index,
            point: face_edge.point(t),
            least_radius: if radius.is_finite() { radius } else { 0.0 },
        }
    };
    let edge = face_edge.offset(distance).ok_or(too_thick(0.5))?;
    let (speed, t) = match &edge {
        Edge::Arc(arc) => (arc.radius() * face_edge.curvature(0.5).abs(), 0.5),
        Edge::Parallel(parallel) => parallel.least_speed_ratio(),
        _ => (1.0, 0.5),
    };
    if speed <= STANDSTILL {
        return Err(too_thick(t));
    }
    Ok(Offset {
        index,
        edge,
        from: (0.0, edge.start()),
        to: (1.0, edge.end()),
        round: None,
        trimmed: false,
    })
}

pub(super) fn too_short(face: &[(Edge, u32)], index: usize) -> WallFault {
    WallFault::TooShort {
        index,
        point: face[index].0.point(0.5),
    }
}
