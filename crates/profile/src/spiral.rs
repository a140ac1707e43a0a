//! An edge cut into spirals: pieces that turn one way only, by little, with a curvature that only grows or only falls.
//!
//! On such a piece everything is known from its ends: it lies between its chord and its end tangents, its directions lie
//! between the end directions, its curvatures between the end curvatures (to rounding).

use crate::polynomial::bracketed;
use crate::{Base, Bezier, Edge, EllipseArc, Parallel, trig};
use glam::DVec2;

/// A spiral turns by at most the angle of this cosine, 46 degrees: a little over an eighth of a turn, so that a quarter
/// circle is two pieces.
const LEAST_TURN_COSINE: f64 = 0.695;

/// A piece that turns too much is halved at most this often: what is left then is shorter than rounding (near the tip of
/// a cusp, where all of the turn sits in one point).
const MOST_HALVINGS: u32 = 50;

/// An edge is cut into no more pieces than this and what then is left: a cusp's tip takes two a halving, all other turns of
/// a legal edge a dozen.
const MOST_PIECES: usize = 200;

/// A Bezier's derivative counts as zero below this part of its longest control leg. Where it is that small the curve has
/// a cusp or an end control point on its end, and the direction is that of the second derivative: within the stretch
/// where this is not yet true the curve moves by the square of this number only.
const STALLED: f64 = 1e-9;

/// A piece of an edge. Arrays hold the value at its start and at its end.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Spiral {
    /// Parameters of the edge.
    pub(crate) t: [f64; 2],
    /// Points.
    pub(crate) point: [DVec2; 2],
    /// Unit directions of travel, as limits from inside the piece.
    pub(crate) direction: [DVec2; 2],
    /// Curvatures, as limits from inside the piece; infinite at a cusp.
    pub(crate) curvature: [f64; 2],
    /// True on a part of a parallel curve that is not legal, where it runs against its base.
    backward: bool,
}

/// The edge as spirals, in order.
pub(crate) fn spirals(edge: &Edge) -> Vec<Spiral> {
    let mut knots = vec![0.0];
    match edge {
        Edge::Line(_) | Edge::Arc(_) => {}
        Edge::Ellipse(ellipse) => knots.extend(ellipse.vertices()),
        Edge::Bezier(bezier) => knots.extend(bezier.knots()),
        Edge::Parallel(parallel) => {
            knots.extend(parallel.base.knots());
            knots.extend(parallel.cusps());
            knots.sort_by(f64::total_cmp);
        }
    }
    knots.push(1.0);
    let mut pieces = Vec::with_capacity(2 * knots.len());
    for pair in knots.windows(2) {
        let whole = Spiral::of(edge, pair[0], pair[1]);
        whole.halve_until_flat(edge, MOST_HALVINGS, &mut pieces);
    }
    pieces
}

/// Direction and curvature at `t`, as limits from after it or from before it. Of a parallel curve the direction is its
/// base's: where it is not legal it runs the other way, with the same curvature.
pub(crate) fn sided(edge: &Edge, t: f64, after: bool) -> (DVec2, f64) {
    match edge {
        Edge::Line(line) => (line.chord().normalize_or(DVec2::X), 0.0),
        Edge::Arc(_) | Edge::Ellipse(_) => (edge.tangent(t), edge.curvature(t)),
        Edge::Bezier(bezier) => bezier_sided(*bezier, t, after),
        Edge::Parallel(parallel) => {
            let (direction, curvature) = sided(&parallel.base.edge(), t, after);
            let ratio = 1.0 - parallel.distance * curvature;
            if ratio.is_infinite() {
                // At a cusp of its base it is the arc about the cusp's tip, of radius |distance|.
                (direction, curvature.signum() / parallel.distance.abs())
            } else {
                (direction, curvature / ratio.abs())
            }
        }
    }
}

fn bezier_sided(bezier: Bezier, t: f64, after: bool) -> (DVec2, f64) {
    let first = bezier.derivative(t);
    let second = bezier.second_derivative(t);
    let speed = first.length();
    let stalled = STALLED * bezier.longest_leg();
    if speed > stalled {
        return (
            first / speed,
            first.perp_dot(second) / (speed * speed * speed),
        );
    }
    // Near a stall at 0 the derivative is second * t + third * t^2 / 2.
    let third = bezier.third_derivative();
    if second.length() > stalled {
        let direction = if after { second } else { -second }.normalize();
        let bend = second.perp_dot(third);
        let curvature = if bend.abs() > stalled * stalled {
            f64::INFINITY.copysign(bend)
        } else {
            0.0
        };
        (direction, curvature)
    } else {
        (third.normalize_or(DVec2::X), 0.0)
    }
}

impl Spiral {
    fn of(edge: &Edge, from: f64, to: f64) -> Self {
        let backward = match edge {
            Edge::Parallel(parallel) => {
                // At its ends the ratio may be zero to rounding; between them it keeps its sign.
                let curvature = sided(&parallel.base.edge(), 0.5 * (from + to), true).1;
                parallel.distance * curvature > 1.0
            }
            _ => false,
        };
        let mut piece = Self {
            t: [from, to],
            point: [edge.point(from), edge.point(to)],
            direction: [DVec2::ZERO; 2],
            curvature: [0.0; 2],
            backward,
        };
        (piece.direction[0], piece.curvature[0]) = piece.sided(edge, from, true);
        (piece.direction[1], piece.curvature[1]) = piece.sided(edge, to, false);
        piece
    }

    /// Direction of travel and curvature at a parameter of the piece, as limits from after it or from before it.
    pub(crate) fn sided(&self, edge: &Edge, t: f64, after: bool) -> (DVec2, f64) {
        let (direction, curvature) = sided(edge, t, after);
        (
            if self.backward { -direction } else { direction },
            curvature,
        )
    }

    /// Adds the piece to `pieces`, or its halves where it turns too much.
    fn halve_until_flat(self, edge: &Edge, halvings: u32, pieces: &mut Vec<Self>) {
        if matches!(edge, Edge::Line(_)) {
            pieces.push(self);
            return;
        }
        let middle = 0.5 * (self.t[0] + self.t[1]);
        let (direction, curvature) = self.sided(edge, middle, true);
        // It turns one way: where it turns little from end to end and to the middle, it has not gone round.
        let [from, to] = self.direction;
        let turns_little = [(from, to), (from, direction), (direction, to)]
            .into_iter()
            .all(|(p, q)| p.dot(q) >= LEAST_TURN_COSINE || p.dot(q).is_nan());
        let enough = pieces.len() >= MOST_PIECES;
        if turns_little || enough || halvings == 0 || middle <= self.t[0] || middle >= self.t[1] {
            pieces.push(self);
            return;
        }
        let point = edge.point(middle);
        let half = |end: usize| {
            let mut half = self;
            half.t[end] = middle;
            half.point[end] = point;
            half.direction[end] = direction;
            half.curvature[end] = curvature;
            half
        };
        half(1).halve_until_flat(edge, halvings - 1, pieces);
        half(0).halve_until_flat(edge, halvings - 1, pieces);
    }
}

impl Base {
    /// Parameters in (0, 1), ascending, between which its curvature keeps its sign and is monotone.
    pub(crate) fn knots(self) -> Vec<f64> {
        match self {
            Self::Ellipse(ellipse) => ellipse.vertices(),
            Self::Bezier(bezier) => bezier.knots(),
        }
    }
}

impl Parallel {
    /// Parameters in (0, 1) where 1 - distance * curvature passes through zero: there it turns back. None where it is
    /// legal.
    pub(crate) fn cusps(self) -> Vec<f64> {
        let base = self.base.edge();
        let ratio = |t: f64, after: bool| 1.0 - self.distance * sided(&base, t, after).1;
        let mut knots = vec![0.0];
        knots.extend(self.base.knots());
        knots.push(1.0);
        knots
            .windows(2)
            .filter_map(|pair| {
                // Monotone between knots.
                let (from, to) = (ratio(pair[0], true), ratio(pair[1], false));
                (from * to < 0.0).then(|| {
                    // Its slope is not at hand: by halving alone.
                    let middle = 0.5 * (pair[0] + pair[1]);
                    bracketed(|t| (ratio(t, true), 0.0), [pair[0], pair[1]], from, middle)
                })
            })
            .collect()
    }

    /// Least of 1 - distance * curvature along the base, and the parameter where: how much slower than its base the
    /// curve runs there. Positive where the curve is legal; minus infinity at a cusp of the base.
    pub fn least_speed_ratio(&self) -> (f64, f64) {
        let base = self.base.edge();
        let mut least = (f64::INFINITY, 0.0);
        // The curvature is monotone between knots: extreme on one side of a knot.
        let mut consider = |ratio: f64, t: f64| {
            if ratio < least.0 {
                least = (ratio, t);
            }
        };
        let ratio = |curvature: f64| 1.0 - self.distance * curvature;
        consider(ratio(sided(&base, 0.0, true).1), 0.0);
        for t in self.base.knots() {
            let (before, after) = (sided(&base, t, false), sided(&base, t, true));
            if before.0.dot(after.0) < 0.0 {
                consider(f64::NEG_INFINITY, t);
            }
            consider(ratio(before.1), t);
            consider(ratio(after.1), t);
        }
        consider(ratio(sided(&base, 1.0, false).1), 1.0);
        least
    }
}

impl EllipseArc {
    /// Parameters in (0, 1), ascending, of the ends of its axes of symmetry: there its curvature is extreme.
    pub(crate) fn vertices(self) -> Vec<f64> {
        // |a cos u + b sin u| is extreme where tan 2u = 2 a.b / (a.a - b.b).
        let (a, b) = (self.axis_a, self.axis_b);
        let first = 0.5 * trig::atan2(2.0 * a.dot(b), a.length_squared() - b.length_squared());
        self.parameters_of(first, std::f64::consts::FRAC_PI_2)
    }
}
