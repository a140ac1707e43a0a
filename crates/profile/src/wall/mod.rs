//! Thin walls: a face and its exact offset, closed by ends square to the face.

use crate::{Edge, Loop, OpenLoop};
use glam::DVec2;

/// Where a wall grows from its face.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Grow {
    /// To the left of the face's direction of travel.
    Left,
    /// To the right.
    Right,
    /// Half the thickness to each side.
    Both,
}

/// Why a wall cannot be made.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum WallFault {
    /// The thickness is not a positive finite length.
    #[error("a wall's thickness must be a positive length")]
    NotALength,
    /// The face has no edge.
    #[error("a wall's face needs at least one edge")]
    Empty,
    /// The edge at this index does not end, bit for bit, where the next one starts.
    #[error("edge {0} of the face does not end where the next one starts")]
    Gap(usize),
    /// On the hollow side of this edge the wall is thicker than the edge's radius of curvature.
    #[error("the wall is too thick for the radius of its face")]
    TooThick {
        /// Index of the edge in the face.
        index: usize,
        /// Where on the face.
        point: DVec2,
        /// Radius of curvature there, metres: the wall must be thinner on that side.
        least_radius: f64,
    },
    /// The offset of this edge vanishes between those of its neighbours.
    #[error("the wall's other side has no room for this edge between its neighbours")]
    TooShort {
        /// Index of the edge in the face.
        index: usize,
        /// Where on the face: the edge's middle.
        point: DVec2,
    },
    /// The face turns straight back after this edge.
    #[error("the wall's face turns straight back")]
    TurnsBack {
        /// Index in the face of the edge before the corner.
        index: usize,
        /// The corner.
        point: DVec2,
    },
}

/// The closed outline of a wall of `thickness` along the open chain `face`, whose edges share their corners bit for bit.
/// Material is on the left of travel.
///
/// Tags of the offset face's edges are those of the face's; the ends' are `end_tags`: at the start, at the end.
///
/// # Errors
/// See [`WallFault`].
pub fn wall(
    face: &[(Edge, u32)],
    thickness: f64,
    grow: Grow,
    end_tags: [u32; 2],
) -> Result<Loop, WallFault> {
    if !(thickness > 0.0 && thickness.is_finite()) {
        return Err(WallFault::NotALength);
    }
    let [right, left] = match grow {
        Grow::Left => [0.0, thickness],
        Grow::Right => [-thickness, 0.0],
        Grow::Both => [-0.5 * thickness, 0.5 * thickness],
    };
    let beside = |distance: f64| -> Vec<(Edge, u32)> {
        face.iter()
            .filter_map(|(edge, tag)| Some((edge.offset(distance)?, *tag)))
            .collect()
    };
    let (right, left) = (beside(right), beside(left));
    let (Some(first), Some(last)) = (
        right.first().zip(left.first()),
        right.last().zip(left.last()),
    ) else {
        return Err(WallFault::Empty);
    };
    let start = Edge::line(first.1.0.start(), first.0.0.start());
    let end = Edge::line(last.0.0.end(), last.1.0.end());
    let edges = right
        .iter()
        .copied()
        .chain([(end, end_tags[1])])
        .chain(left.iter().rev().map(|(edge, tag)| (edge.reversed(), *tag)))
        .chain([(start, end_tags[0])]);
    Loop::new(edges).map_err(|open| match open {
        OpenLoop::Gap(at) => WallFault::Gap(at),
        OpenLoop::TooShort => WallFault::Empty,
    })
}
