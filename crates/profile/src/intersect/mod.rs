//! Where edges meet.

mod line_line;

use crate::Edge;
use glam::DVec2;

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
        /// From where to where on the first edge, a[0] < a[1].
        a: [f64; 2],
        /// The same points on the second edge; b[0] > b[1] where they run opposite ways.
        b: [f64; 2],
    },
}

/// All meetings of the two closed edges, in order of t_a. Points nearer than `within` (metres) count as shared.
pub fn meetings(a: &Edge, b: &Edge, within: f64) -> Vec<Meeting> {
    match (a, b) {
        (Edge::Line(a), Edge::Line(b)) => line_line::meetings(*a, *b, within),
        _ => Vec::new(),
    }
}

/// Parameters (t0 < t1) of the points that the edge passes twice: only a Bezier or a parallel curve can have one.
pub fn self_meetings(_edge: &Edge) -> Vec<(f64, f64)> {
    Vec::new()
}
