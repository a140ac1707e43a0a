//! Transforms, and edges under them.

use crate::outline::rounding::ROUNDING;
use glam::{DAffine2, DMat2, DVec2};
use profile::{Arc, Bezier, Edge, EllipseArc, left_of, trig};
use svgtypes::{TransformListParser, TransformListToken};

/// Roundings behind the entries of a matrix that is a product of several.
const OPERATIONS: f64 = 16.0;

/// The product of the list of transforms `text` (SVG 2, section 8.5), the last one nearest to the shape.
///
/// # Errors
/// What is wrong with the text.
pub(super) fn list(text: &str) -> Result<DAffine2, svgtypes::Error> {
    let mut all = DAffine2::IDENTITY;
    for token in TransformListParser::from(text) {
        let columns = match token? {
            TransformListToken::Matrix { a, b, c, d, e, f } => [a, b, c, d, e, f],
            TransformListToken::Translate { tx, ty } => [1.0, 0.0, 0.0, 1.0, tx, ty],
            TransformListToken::Scale { sx, sy } => [sx, 0.0, 0.0, sy, 0.0, 0.0],
            TransformListToken::Rotate { angle } => {
                let (s, c) = sin_cos_degrees(angle);
                [c, s, -s, c, 0.0, 0.0]
            }
            TransformListToken::SkewX { angle } => {
                [1.0, 0.0, trig::tan(angle.to_radians()), 1.0, 0.0, 0.0]
            }
            TransformListToken::SkewY { angle } => {
                [1.0, trig::tan(angle.to_radians()), 0.0, 1.0, 0.0, 0.0]
            }
        };
        all *= DAffine2::from_cols_array(&columns);
    }
    Ok(all)
}

/// Sine and cosine of an angle in degrees, exact at whole quarters.
pub(super) fn sin_cos_degrees(angle: f64) -> (f64, f64) {
    let angle = angle % 360.0;
    let quarters = (angle / 90.0).round();
    let (s, c) = trig::sin_cos((angle - 90.0 * quarters).to_radians());
    match quarters.rem_euclid(4.0) {
        1.0 => (c, -s),
        2.0 => (-s, -c),
        3.0 => (-c, s),
        _ => (s, c),
    }
}

/// `edge` under `map`. Circles that stay circles stay arcs, others become ellipses; ends that are the same stay the same.
pub(super) fn transformed(edge: &Edge, map: &DAffine2) -> Edge {
    let at = |point| map.transform_point2(point);
    match *edge {
        Edge::Line(line) => Edge::line(at(line.start), at(line.end)),
        Edge::Bezier(bezier) => Edge::Bezier(Bezier {
            points: bezier.points.map(at),
        }),
        Edge::Arc(arc) if keeps_circles(&map.matrix2) => Edge::Arc(Arc {
            start: at(arc.start),
            end: at(arc.end),
            sweep: arc.sweep * map.matrix2.determinant().signum(),
        }),
        Edge::Arc(arc) => {
            let radius = arc.start - arc.centre();
            ellipse(EllipseArc {
                start: at(arc.start),
                end: at(arc.end),
                axis_a: map.transform_vector2(radius),
                axis_b: map.transform_vector2(left_of(radius)),
                from: 0.0,
                sweep: arc.sweep,
            })
        }
        Edge::Ellipse(arc) => ellipse(EllipseArc {
            start: at(arc.start),
            end: at(arc.end),
            axis_a: map.transform_vector2(arc.axis_a),
            axis_b: map.transform_vector2(arc.axis_b),
            ..arc
        }),
        // No path has one.
        Edge::Parallel(parallel) => Edge::line(at(parallel.start), at(parallel.end)),
    }
}

/// The elliptic arc, or the circular one where its axes are those of a circle.
fn ellipse(arc: EllipseArc) -> Edge {
    let axes = DMat2::from_cols(arc.axis_a, arc.axis_b);
    if keeps_circles(&axes) {
        return Edge::Arc(Arc {
            start: arc.start,
            end: arc.end,
            sweep: arc.sweep * axes.determinant().signum(),
        });
    }
    Edge::Ellipse(arc)
}

/// True where `map` takes circles to circles, up to rounding: its columns are equally long and square to each other.
fn keeps_circles(map: &DMat2) -> bool {
    let (a, b): (DVec2, DVec2) = (map.x_axis, map.y_axis);
    let size = a.length_squared().max(b.length_squared());
    let within = OPERATIONS * ROUNDING * size;
    (a.length_squared() - b.length_squared()).abs() <= within && a.dot(b).abs() <= within
}
