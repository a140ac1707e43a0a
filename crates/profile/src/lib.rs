//! Plane geometry of a part's section, in f64.
//!
//! A part of revolution is drawn as its section in the half-plane r >= 0; the axis of revolution is z. A [`DVec2`] holds
//! `x` = r and `y` = z. Lengths are metres, angles radians.
//!
//! - An [`Edge`] is a straight line, a circular arc, an elliptic arc, a cubic Bezier or a curve parallel to one of the
//!   last two. Arcs and ellipses stay what they are; nothing is turned into Beziers.
//! - A [`Loop`] is a closed chain of edges that share their corners bit for bit.
//! - A [`Region`] is one loop that runs counter-clockwise (r to the right, z up; the material is on the left of travel)
//!   less the loops inside it, which run clockwise.
//!
//! Every edge has a parameter t from 0 at its start to 1 at its end.

mod arc;
mod area;
mod bezier;
mod boundary;
mod bounds;
mod candidates;
mod corner;
mod edge;
mod ellipse;
mod foot;
mod index;
mod intersect;
mod line;
mod nearest;
mod outline;
mod overlap;
mod parallel;
mod piece;
mod polynomial;
mod region;
#[cfg(test)]
mod samples;
mod spiral;
mod tolerance;
mod tree;
pub mod trig;
mod validity;
mod wall;
mod winding;

pub use arc::Arc;
pub use bezier::Bezier;
pub use bounds::Bounds;
pub use corner::{CornerFault, Treated, chamfer_corner, round_corner};
pub use edge::Edge;
pub use ellipse::EllipseArc;
pub use glam::DVec2;
pub use index::{Nearest, Place, RegionIndex};
pub use intersect::{Meeting, meetings, self_meetings};
pub use line::Line;
pub(crate) use nearest::{Seeker, Zone};
pub use outline::{Loop, OpenLoop};
pub use overlap::{BodyFault, BodyOverlap, overlaps};
pub use parallel::{Base, Parallel};
pub use region::Region;
pub use tolerance::TOUCH;
pub use validity::{EdgeRef, LARGEST, RegionFault, SMALLEST};
pub use wall::{Grow, WallFault, wall};

/// The vector turned a quarter to the left: the left-hand normal of a direction of travel.
pub fn left_of(direction: DVec2) -> DVec2 {
    DVec2::new(-direction.y, direction.x)
}
