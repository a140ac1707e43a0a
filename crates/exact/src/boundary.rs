//! Lengths along the boundary and their moments. All integrands are positive: nothing cancels.

use crate::gauss::SINGLE;
use crate::segment::arc_length;
use profile::{DVec2, Edge};

/// ∫ ds, ∫ r ds and ∫ (z - z0) ds along an edge.
#[derive(Debug, Clone, Copy, Default, PartialEq)]
pub(crate) struct LineMoments {
    pub(crate) length: f64,
    pub(crate) r: f64,
    pub(crate) z: f64,
}

/// Relative change at which the quadrature of an edge without a closed form ends.
const SETTLED: f64 = 2e-15;
/// Halvings after which an interval is taken as it is: below 1e-12 of the edge it cannot matter.
const MOST_HALVINGS: u32 = 40;

/// Moments of the edge about the axis and the station `z0`.
///
/// Lines and arcs in closed form; the others by
/// adaptive Gauss-Legendre quadrature, halved until two halves agree with the whole to [`SETTLED`] of the edge's length.
pub(crate) fn line_moments(edge: &Edge, z0: f64) -> LineMoments {
    let closed = |length: f64, middle: DVec2| LineMoments {
        length,
        r: length * middle.x,
        z: length * (middle.y - z0),
    };
    match edge {
        Edge::Line(line) => closed(line.chord().length(), 0.5 * (line.start + line.end)),
        Edge::Arc(arc) => {
            let (length, middle) = arc_length(arc);
            closed(length, middle)
        }
        _ => {
            let whole = on_panel(edge, z0, [0.0, 1.0]);
            halves(
                edge,
                z0,
                [0.0, 1.0],
                whole,
                SETTLED * whole.length,
                MOST_HALVINGS,
            )
        }
    }
}

/// The moments between two parameters, of which `whole` is the first result.
fn halves(
    edge: &Edge,
    z0: f64,
    [from, to]: [f64; 2],
    whole: LineMoments,
    allowed: f64,
    depth: u32,
) -> LineMoments {
    let middle = 0.5 * (from + to);
    let parts = [[from, middle], [middle, to]];
    let [a, b] = parts.map(|part| on_panel(edge, z0, part));
    let sum = a.plus(b);
    if depth == 0 || (sum.length - whole.length).abs() <= allowed {
        return sum;
    }
    let [a, b] = [(parts[0], a), (parts[1], b)]
        .map(|(part, moments)| halves(edge, z0, part, moments, allowed, depth - 1));
    a.plus(b)
}

impl LineMoments {
    pub(crate) fn plus(self, other: Self) -> Self {
        Self {
            length: self.length + other.length,
            r: self.r + other.r,
            z: self.z + other.z,
        }
    }
}

fn on_panel(edge: &Edge, z0: f64, [from, to]: [f64; 2]) -> LineMoments {
    let width = to - from;
    SINGLE
        .panel
        .iter()
        .fold(LineMoments::default(), |sum, &(x, weight)| {
            let t = from + x * width;
            let (p, ds) = (edge.point(t), weight * width * edge.derivative(t).length());
            sum.plus(LineMoments {
                length: ds,
                r: p.x * ds,
                z: (p.y - z0) * ds,
            })
        })
}
