//! The foot of a point on an edge that it lies on or close to.

use crate::Edge;
use glam::DVec2;

/// Steps after which the search ends. Near the curve each step doubles the digits; six would do from one digit.
const MOST_STEPS: usize = 12;

/// Parameter in [0, 1] of the edge's point nearest to `point`, and its distance, for a point close to the edge compared
/// with the radius of curvature. `guess` is a parameter near it; of a line or an arc any number will do.
pub(crate) fn foot(edge: &Edge, point: DVec2, guess: f64) -> (f64, f64) {
    let t = match edge {
        Edge::Line(line) => {
            let chord = line.chord();
            ((point - line.start).dot(chord) / chord.length_squared()).clamp(0.0, 1.0)
        }
        Edge::Arc(arc) => arc.parameter_of(point).clamp(0.0, 1.0),
        Edge::Ellipse(_) | Edge::Bezier(_) | Edge::Parallel(_) => by_steps(edge, point, guess),
    };
    (t, edge.point(t).distance(point))
}

/// Gauss-Newton steps: along the tangent to the foot on it.
fn by_steps(edge: &Edge, point: DVec2, guess: f64) -> f64 {
    let mut t = guess.clamp(0.0, 1.0);
    for _ in 0..MOST_STEPS {
        let derivative = edge.derivative(t);
        let step = (point - edge.point(t)).dot(derivative) / derivative.length_squared();
        let next = (t + step).clamp(0.0, 1.0);
        if next.is_nan() || (next - t).abs() <= f64::EPSILON {
            break;
        }
        t = next;
    }
    t
}
