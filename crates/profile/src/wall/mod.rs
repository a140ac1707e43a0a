//! Thin walls: a face and its exact offset, closed by ends square to the face.

mod axis;
mod beside;
mod joint;
#[cfg(test)]
mod tests;

use crate::{DVec2, Edge, Loop, OpenLoop};
use beside::beside;

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
    /// On the hollow side of this edge the wall is as thick as the edge's radius of curvature, or thicker.
    #[error("the wall is too thick for the radius of its face")]
    TooThick {
        /// Index of the edge in the face.
        index: usize,
        /// Where on the face.
        point: DVec2,
        /// Radius of curvature there, metres: the wall must be thinner on that side.
        least_radius: f64,
    },
    /// The offset of this edge has no place between those of its neighbours, or on the right side of the axis.
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
/// The other side (both sides where it grows to both) is the face's exact offset. On the inner side of a corner the
/// offset edges are trimmed where they meet; an edge between two such corners that is shorter than what they trim is left
/// out, as on a sheet that is bent over it. On the outer side straight and circular edges run on until they meet, if that
/// is no further from the corner than four times the offset; otherwise an arc about the corner closes the gap.
///
/// The ends are straight and square to the face, with one exception: where the face ends on the axis (r = 0) but not square
/// to it, a square end would cross the axis or leave a dimple. There the offset is trimmed at the axis or runs on to it, as
/// the tip of a hollow cone does, and the end lies on the axis.
///
/// Tags of the offset's edges are those of the face's edges, an arc about a corner has that of the edge before it; the
/// ends' are `end_tags`: at the start, at the end.
///
/// # Errors
/// See [`WallFault`].
///
/// # Accuracy
/// The thickness is exact to a few roundings of the coordinates.
pub fn wall(
    face: &[(Edge, u32)],
    thickness: f64,
    grow: Grow,
    end_tags: [u32; 2],
) -> Result<Loop, WallFault> {
    if !(thickness > 0.0 && thickness.is_finite()) {
        return Err(WallFault::NotALength);
    }
    if face.is_empty() {
        return Err(WallFault::Empty);
    }
    if let Some(gap) = face
        .windows(2)
        .position(|pair| pair[0].0.end() != pair[1].0.start())
    {
        return Err(WallFault::Gap(gap));
    }
    let [right, left] = match grow {
        Grow::Left => [0.0, thickness],
        Grow::Right => [-thickness, 0.0],
        Grow::Both => [-0.5 * thickness, 0.5 * thickness],
    };
    let (right, left) = (beside(face, right)?, beside(face, left)?);
    let start = Edge::line(left.start(), right.start());
    let end = Edge::line(right.end(), left.end());
    let edges = right
        .edges()
        .chain([(end, end_tags[1])])
        .chain(left.edges().rev().map(|(edge, tag)| (edge.reversed(), tag)))
        .chain([(start, end_tags[0])]);
    Loop::new(edges).map_err(|open| match open {
        OpenLoop::Gap(at) => WallFault::Gap(at),
        OpenLoop::TooShort => WallFault::Empty,
    })
}
