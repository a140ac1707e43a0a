//! Edges that share a corner and from there lead apart: the common case along an outline, told from their control points.

use crate::{Edge, trig};
use glam::DVec2;

/// Least cosine, to the direction in which the edges lead apart, of every control point seen from the corner: the two
/// edges lie in two cones with tips there, and points of theirs that are near each other are near the corner.
const CONE: f64 = 0.25;

/// The corner's parameters, where the edges share one, bit for bit, and meet nowhere else.
pub(super) fn only_corner(a: &Edge, b: &Edge) -> Option<(f64, f64, DVec2)> {
    let ends = |edge: &Edge| [edge.start(), edge.end()];
    let (ends_a, ends_b) = (ends(a), ends(b));
    let (i, k) = [(1, 0), (0, 1), (0, 0), (1, 1)]
        .into_iter()
        .find(|(i, k)| ends_a[*i] == ends_b[*k])?;
    let corner = ends_a[i];
    let (into_a, into_b) = (ends_a[1 - i] - corner, ends_b[1 - k] - corner);
    let apart = into_b.try_normalize()? - into_a.try_normalize()?;
    let apart = apart.try_normalize()?;
    let in_cone = |edge: &Edge, axis: DVec2| {
        control_points(edge).is_some_and(|points| {
            points.into_iter().all(|point| {
                let from_corner = point - corner;
                from_corner.dot(axis) >= CONE * from_corner.length()
            })
        })
    };
    (in_cone(a, -apart) && in_cone(b, apart)).then(|| {
        let parameter = |end: usize| if end == 0 { 0.0 } else { 1.0 };
        (parameter(i), parameter(k), corner)
    })
}

/// Points whose convex hull holds the edge, where they are at hand.
fn control_points(edge: &Edge) -> Option<[DVec2; 4]> {
    match edge {
        Edge::Line(line) => Some([line.start, line.start, line.end, line.end]),
        Edge::Bezier(bezier) => Some(bezier.points),
        Edge::Arc(_) | Edge::Ellipse(_) => {
            // The end tangents meet the middle's tangent at tan(sweep / 4) times the middle's derivative by the angle.
            let sweep = match edge {
                Edge::Arc(arc) => arc.sweep,
                Edge::Ellipse(ellipse) => ellipse.sweep,
                _ => return None,
            };
            let reach = edge.derivative(0.5) * (trig::tan(0.25 * sweep) / sweep);
            let middle = edge.point(0.5);
            Some([edge.start(), middle - reach, middle + reach, edge.end()])
        }
        Edge::Parallel(_) => None,
    }
}

#[cfg(test)]
mod tests {
    use super::super::tests::{arc, bezier, ellipse};
    use super::control_points;

    #[test]
    fn control_points_hold_the_edge() {
        for edge in [
            arc((0.1, 0.2), 0.7, 20.0, 170.0),
            arc((0.1, 0.2), 0.7, 20.0, -180.0),
            ellipse((0.1, 0.2), (0.9, 0.3), 30.0, 200.0, 95.0),
            bezier([(0.0, 0.0), (0.5, 1.0), (0.5, -1.0), (1.0, 0.3)]),
        ] {
            let controls = control_points(&edge).unwrap();
            for k in 0..16 {
                let axis = crate::trig::direction(f64::from(k) * 0.4);
                let most = |points: &mut dyn Iterator<Item = crate::DVec2>| {
                    points.map(|p| axis.dot(p)).fold(f64::MIN, f64::max)
                };
                let edge_reaches = most(&mut (0..=64).map(|i| edge.point(f64::from(i) / 64.0)));
                assert!(edge_reaches <= most(&mut controls.into_iter()) + 1e-15);
            }
        }
    }
}
