//! Where edges meet.
//!
//! A line or a circle with a line, a circle or (line only) an ellipse has closed forms. For every other pair the edges are
//! cut into spirals, and two spirals are the graphs of two functions whose difference is followed to its zeros.

mod carrier;
mod closed_form;
mod conic;
mod contact;
mod graphs;
mod neighbours;
mod own;
mod reach;
mod straight;
#[cfg(test)]
mod tests;

pub use own::self_meetings;

use crate::{Bounds, Edge};
use conic::Conic;
use contact::Contacts;
use glam::DVec2;
use reach::reach;
use straight::Straight;

/// Where two edges meet.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Meeting {
    /// They share a point.
    Point {
        /// Parameter on the first edge; exactly 0 or 1 at its ends.
        t_a: f64,
        /// Parameter on the second edge; exactly 0 or 1 at its ends.
        t_b: f64,
        /// The point; bit for bit an edge's end where it is one.
        point: DVec2,
        /// True where each passes to the other side of the other. False where they only touch, and where one of them
        /// ends: whether the outline passes there is told by the neighbours.
        crossing: bool,
    },
    /// They run along each other.
    Overlap {
        /// From where to where on the first edge, `a[0] < a[1]`.
        a: [f64; 2],
        /// The same points on the second edge; `b[0] > b[1]` where they run opposite ways.
        b: [f64; 2],
    },
}

/// Points are never told apart by less than this part of the coordinates: the rounding of a computed point.
const ROUNDING: f64 = 8.0 * f64::EPSILON;

/// All meetings of the two closed edges, in order of t_a. Points nearer than `within` (metres) count as shared, and so do
/// points that differ by the rounding of their coordinates.
///
/// Where the edges stay within that distance of each other along a stretch there is one meeting: an overlap where the
/// stretch goes from an end of one of them to another end, a point otherwise. A point at the edges' ends is preferred, so
/// that edges that follow each other meet in their shared corner and there only, however smoothly they join.
///
/// Edges with coordinates that are not finite meet nowhere.
///
/// # Accuracy
/// A point lies on both edges within `within` and a few roundings of the coordinates. Along the edges it is as sure as the
/// angle between them allows: rounding divided by the sine of that angle.
pub fn meetings(a: &Edge, b: &Edge, within: f64) -> Vec<Meeting> {
    let (box_a, box_b) = (reach(a), reach(b));
    let largest = |bounds: Bounds| bounds.min.abs().max(bounds.max.abs()).max_element();
    if !(largest(box_a) + largest(box_b)).is_finite() {
        return Vec::new();
    }
    let within = within.max(ROUNDING * largest(box_a).max(largest(box_b)));
    if !box_a.grown(within).meets(box_b) {
        return Vec::new();
    }
    let mut found = Contacts::default();
    match (a, b) {
        (Edge::Line(a), Edge::Line(b)) => {
            closed_form::line_line(&Straight::from(*a), &Straight::from(*b), within, &mut found);
        }
        (Edge::Arc(a), Edge::Arc(b)) => {
            closed_form::arc_arc(&Conic::from(*a), &Conic::from(*b), within, &mut found);
        }
        (curve, Edge::Line(line)) if let Some(conic) = conic(curve) => {
            closed_form::conic_line(&conic, &Straight::from(*line), within, &mut found);
        }
        (Edge::Line(line), curve) if let Some(conic) = conic(curve) => {
            closed_form::conic_line(&conic, &Straight::from(*line), within, &mut found);
            found.exchange();
        }
        _ => {
            if let Some((t_a, t_b, point)) = neighbours::only_corner(a, b) {
                return vec![Meeting::Point {
                    t_a,
                    t_b,
                    point,
                    crossing: false,
                }];
            }
            graphs::contacts(a, b, within, &mut found);
        }
    }
    found.into_meetings(a, b, within)
}

/// The edge about its middle, where it is an arc.
fn conic(edge: &Edge) -> Option<Conic> {
    match edge {
        Edge::Arc(arc) => Some(Conic::from(*arc)),
        Edge::Ellipse(ellipse) => Some(Conic::from(*ellipse)),
        Edge::Line(_) | Edge::Bezier(_) | Edge::Parallel(_) => None,
    }
}
