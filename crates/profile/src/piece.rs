//! The pieces of an edge on which r and z both run one way.

use crate::{Arc, Base, Edge, left_of, trig};
use glam::DVec2;
use std::f64::consts::FRAC_PI_2;

/// A piece of an edge on which r and z both run one way, so that it turns by a quarter at most.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Piece {
    /// Parameters of its ends, `t[0] < t[1]`.
    pub(crate) t: [f64; 2],
    /// The ends; neighbouring pieces share them bit for bit.
    pub(crate) ends: [DVec2; 2],
}

/// Parameters nearer to each other than this make no piece: what the curve could do between is less than rounding, as it
/// changes with the square of the parameter about a turning point.
const LEAST_STEP: f64 = 1e-8;

/// The pieces of the edge, in order.
pub(crate) fn pieces(edge: &Edge, mut each: impl FnMut(Piece)) {
    if let Edge::Line(line) = edge {
        return each(Piece {
            t: [0.0, 1.0],
            ends: [line.start, line.end],
        });
    }
    let mut cuts = cuts(edge);
    cuts.sort_unstable_by(f64::total_cmp);
    let mut from = (0.0, edge.start());
    for t in cuts {
        if t > from.0 + LEAST_STEP && t < 1.0 - LEAST_STEP {
            let to = (t, edge.point(t));
            each(Piece {
                t: [from.0, to.0],
                ends: [from.1, to.1],
            });
            from = to;
        }
    }
    each(Piece {
        t: [from.0, 1.0],
        ends: [from.1, edge.end()],
    });
}

/// Parameters at which an edge runs along r or z; of a parallel curve also those at which it bends the other way.
fn cuts(edge: &Edge) -> Vec<f64> {
    match edge {
        Edge::Line(_) => Vec::new(),
        Edge::Arc(arc) => arc_turnings(*arc).collect(),
        Edge::Ellipse(ellipse) => ellipse.turnings().collect(),
        Edge::Bezier(bezier) => bezier.turnings().collect(),
        Edge::Parallel(parallel) => {
            let mut cuts = parallel.base.knots();
            match parallel.base {
                Base::Ellipse(ellipse) => cuts.extend(ellipse.turnings()),
                Base::Bezier(bezier) => cuts.extend(bezier.turnings()),
            }
            cuts
        }
    }
}

/// Parameters at which the arc runs along r or z.
fn arc_turnings(arc: Arc) -> impl Iterator<Item = f64> {
    let chord = arc.chord();
    // The direction of travel turns evenly, half the sweep before the chord's direction at the start.
    let first = trig::atan2(chord.y, chord.x) - 0.5 * arc.sweep;
    (-4_i32..=4)
        .map(move |quarter| (f64::from(quarter) * FRAC_PI_2 - first) / arc.sweep)
        .filter(|t| *t > 0.0 && *t < 1.0)
}

/// Points whose convex hulls hold the edge: those of its pieces, and if it is curved each of them cut into `parts`.
pub(crate) fn hulls(edge: &Edge, parts: u32, mut each: impl FnMut(Hull)) {
    let parts = if matches!(edge, Edge::Line(_)) {
        1
    } else {
        parts
    };
    pieces(edge, |piece| {
        let [from, to] = piece.t;
        let mut start = piece.ends[0];
        for k in 1..=parts {
            let t = |k: u32| from + (to - from) * (f64::from(k) / f64::from(parts));
            let (t, end) = if k == parts {
                ([t(k - 1), to], piece.ends[1])
            } else {
                ([t(k - 1), t(k)], edge.point(t(k)))
            };
            let ends = [start, end];
            each(Piece { t, ends }.hull(edge));
            start = end;
        }
    });
}

/// Points whose convex hull holds a piece.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Hull {
    points: [DVec2; 4],
    count: usize,
}

impl Hull {
    /// The points, two to four.
    pub(crate) fn points(&self) -> &[DVec2] {
        &self.points[..self.count]
    }

    /// The hull of these points, two to four.
    pub(crate) fn of<const N: usize>(given: [DVec2; N]) -> Self {
        let mut points = [given[0]; 4];
        points[..N].copy_from_slice(&given);
        Self { points, count: N }
    }
}

impl Piece {
    /// Points whose convex hull holds the piece, up to rounding: its ends and, for a curve, where the tangents there meet
    /// (for a Bezier its control points).
    pub(crate) fn hull(&self, edge: &Edge) -> Hull {
        let [start, end] = self.ends;
        let middle = start + 0.5 * (end - start);
        match edge {
            Edge::Line(_) => Hull::of([start, end]),
            Edge::Arc(arc) => {
                // On the right of the chord of a counter-clockwise arc.
                let half = 0.5 * arc.sweep * (self.t[1] - self.t[0]);
                let apex = middle - left_of(end - start) * (0.5 * trig::tan(half));
                Hull::of([start, apex, end])
            }
            Edge::Ellipse(ellipse) => {
                // The image of the same on a unit circle.
                let half = 0.5 * ellipse.sweep * (self.t[1] - self.t[0]);
                let u = ellipse.from + 0.5 * ellipse.sweep * (self.t[0] + self.t[1]);
                let (s, c) = trig::sin_cos(u);
                let (sin, cos) = trig::sin_cos(half);
                let apex = middle + (c * ellipse.axis_a + s * ellipse.axis_b) * (sin * sin / cos);
                Hull::of([start, apex, end])
            }
            Edge::Bezier(bezier) => Hull::of(bezier.part(self.t[0], self.t[1]).points),
            Edge::Parallel(parallel) => {
                let base = parallel.base.edge();
                let (from, to) = (base.tangent(self.t[0]), base.tangent(self.t[1]));
                let chord = end - start;
                let length = chord.length();
                // The triangle of chord and tangents; with a turn of a quarter at most no side is longer than the chord.
                let reach = (chord.perp_dot(to) / from.perp_dot(to)).clamp(0.0, length);
                if reach > 0.0 {
                    Hull::of([start, start + from * reach, end])
                } else {
                    Hull::of([start, end])
                }
            }
        }
    }
}
