//! Moments of a section's area, by Green's theorem: ∬ r^a z^b dA = ∮ r^(a+1)/(a+1) z^b dz, the material on the left.
//!
//! A line's are closed forms, an arc's its chord's and its segment's; a cubic's are polynomials, for which a Gauss-Legendre rule
//! is exact; a parallel curve's are quadrature with panels doubled until they settle.
//!
//! They are taken about the middle of the section's box: a thin ring far from the axis keeps its digits. Where the edges'
//! contributions cancel more than [`CANCELLED`]-fold (two close concentric arcs), they are taken again in double-double,
//! there with rules that are good to its rounding for every kind of edge.

use crate::curve::visit;
use crate::gauss::{DOUBLE, Rules, SINGLE};
use crate::real::Real;
use crate::segment::Segment;
use profile::{DVec2, Edge, Line, Region};
use twofloat::TwoFloat;

/// ∬ ρ^a ζ^b dA about the local origin, for a + b <= 3 as far as figures need them.
#[derive(Debug, Clone, Copy)]
pub(crate) struct AreaMoments {
    /// The local origin, r and z.
    pub(crate) origin: DVec2,
    pub(crate) one: TwoFloat,
    pub(crate) r: TwoFloat,
    pub(crate) z: TwoFloat,
    pub(crate) rr: TwoFloat,
    pub(crate) rz: TwoFloat,
    pub(crate) zz: TwoFloat,
    pub(crate) rrr: TwoFloat,
    pub(crate) rrz: TwoFloat,
    pub(crate) rzz: TwoFloat,
    /// Bound on the relative error of the area.
    pub(crate) accuracy: f64,
}

/// Sum of the contributions' sizes over the area above which f64 is not enough: it leaves 1e-13 with room to spare.
const CANCELLED: f64 = 60.0;

/// Rounding errors that one contribution gathers on its way, in units of the working precision.
const STEPS: f64 = 8.0;

pub(crate) fn area_moments(region: &Region) -> AreaMoments {
    let origin = region.bounds().centre();
    let quick = sums(region, |edge| closed_sums(edge, origin));
    let cancelled = quick.sizes / quick.values[0].abs();
    if cancelled <= CANCELLED {
        return quick.moments(origin, cancelled);
    }
    let careful = sums(region, |edge| {
        settled_sums::<TwoFloat>(edge, origin, &DOUBLE)
    });
    careful.moments(origin, cancelled)
}

struct Sums<R> {
    values: [R; 9],
    /// Sum of the sizes of the area's contributions.
    sizes: f64,
}

impl<R: Real> Sums<R> {
    fn none() -> Self {
        Self {
            values: [R::of(0.0); 9],
            sizes: 0.0,
        }
    }

    fn add(&mut self, values: [R; 9], sizes: f64) {
        self.sizes += sizes;
        for (sum, value) in self.values.iter_mut().zip(values) {
            *sum = *sum + value;
        }
    }
}

impl<R: Real> Sums<R>
where
    TwoFloat: From<R>,
{
    fn moments(&self, origin: DVec2, cancelled: f64) -> AreaMoments {
        let [one, r, z, rr, rz, zz, rrr, rrz, rzz] = self.values.map(TwoFloat::from);
        let accuracy = STEPS * R::ROUNDING * cancelled + f64::EPSILON;
        AreaMoments {
            origin,
            one,
            r,
            z,
            rr,
            rz,
            zz,
            rrr,
            rrz,
            rzz,
            accuracy,
        }
    }
}

fn sums<R: Real>(region: &Region, of_edge: impl Fn(&Edge) -> Sums<R>) -> Sums<R> {
    region
        .edges()
        .map(of_edge)
        .fold(Sums::none(), |mut total, own| {
            total.add(own.values, own.sizes);
            total
        })
}

/// An edge's sums in f64.
fn closed_sums(edge: &Edge, origin: DVec2) -> Sums<f64> {
    let mut own = Sums::none();
    match edge {
        Edge::Line(line) => own.add_line(*line, origin, 1.0),
        Edge::Arc(arc) => {
            own.add_line(
                Line {
                    start: arc.start,
                    end: arc.end,
                },
                origin,
                1.0,
            );
            own.add_moments(Segment::of_arc(arc, origin).moments());
        }
        Edge::Ellipse(ellipse) => {
            own.add_line(
                Line {
                    start: ellipse.start,
                    end: ellipse.end,
                },
                origin,
                1.0,
            );
            own.add_moments(Segment::of_ellipse(ellipse, origin).moments());
        }
        Edge::Bezier(_) | Edge::Parallel(_) => return settled_sums(edge, origin, &SINGLE),
    }
    own
}

impl Sums<f64> {
    fn add_moments(&mut self, moments: [f64; 9]) {
        self.add(moments, moments[0].abs());
    }

    /// ∫ r^(a+1)/(a+1) z^b dz along a straight line, exact: the integrands' means over a segment with ends p and q.
    fn add_line(&mut self, line: Line, origin: DVec2, sign: f64) {
        let (p, q) = (line.start - origin, line.end - origin);
        let dz = sign * (q.y - p.y);
        let (rr, rrr) = (
            p.x * p.x + p.x * q.x + q.x * q.x,
            (p.x + q.x) * (p.x * p.x + q.x * q.x),
        );
        let rrrr = p.x * p.x * (p.x * p.x + p.x * q.x) + q.x * q.x * (rr);
        // Means of r^n z over the segment: weights of the two ends' products (n + 1 choose 1 and so on).
        let rz = (2.0 * p.x * p.y + p.x * q.y + q.x * p.y + 2.0 * q.x * q.y) / 6.0;
        let rrz = (p.y * (3.0 * p.x * p.x + 2.0 * p.x * q.x + q.x * q.x)
            + q.y * (p.x * p.x + 2.0 * p.x * q.x + 3.0 * q.x * q.x))
            / 12.0;
        let rrrz = (p.y
            * (4.0 * p.x * p.x * p.x
                + 3.0 * p.x * p.x * q.x
                + 2.0 * p.x * q.x * q.x
                + q.x * q.x * q.x)
            + q.y
                * (p.x * p.x * p.x
                    + 2.0 * p.x * p.x * q.x
                    + 3.0 * p.x * q.x * q.x
                    + 4.0 * q.x * q.x * q.x))
            / 20.0;
        let rzz = (p.x * (3.0 * p.y * p.y + 2.0 * p.y * q.y + q.y * q.y)
            + q.x * (p.y * p.y + 2.0 * p.y * q.y + 3.0 * q.y * q.y))
            / 12.0;
        let (pp, pq, qq) = (p.x * p.x, p.x * q.x, q.x * q.x);
        let rrzz = (pp * (6.0 * p.y * p.y + 3.0 * p.y * q.y + q.y * q.y)
            + pq * (3.0 * p.y * p.y + 4.0 * p.y * q.y + 3.0 * q.y * q.y)
            + qq * (p.y * p.y + 3.0 * p.y * q.y + 6.0 * q.y * q.y))
            / 30.0;
        let means = [
            0.5 * (p.x + q.x),
            rr / 6.0,
            rz,
            rrr / 12.0,
            0.5 * rrz,
            rzz,
            rrrr / 20.0,
            rrrz / 3.0,
            0.5 * rrzz,
        ];
        let values = means.map(|mean| mean * dz);
        // Not the value's own size: rounding is that of the ends, which may lie on both sides of the origin.
        self.add(values, 0.5 * (p.x.abs() + q.x.abs()) * dz.abs());
    }
}

/// An edge's sums by a rule, a parallel curve's by twice the panels until nothing changes.
fn settled_sums<R: Real>(edge: &Edge, origin: DVec2, rules: &Rules<R>) -> Sums<R> {
    let mut panels = 1;
    let mut own = edge_sums(edge, origin, rules, panels);
    if let Edge::Parallel(_) = edge {
        for _ in 0..MOST_DOUBLINGS {
            panels *= 2;
            let finer = edge_sums(edge, origin, rules, panels);
            let change = (finer.values[0] - own.values[0]).rounded().abs();
            own = finer;
            // The rule's error falls by 2^24 or more each time: a change of this size is the last.
            if change <= R::ROUNDING.sqrt() * 1e-3 * own.sizes {
                break;
            }
        }
    }
    own
}

/// A parallel curve next to its cusp may need many panels; more than these means that it is one.
const MOST_DOUBLINGS: u32 = 10;

fn edge_sums<R: Real>(edge: &Edge, origin: DVec2, rules: &Rules<R>, panels: u32) -> Sums<R> {
    let (half, third, quarter) = (R::of(0.5), R::of(1.0).over(R::of(3.0)), R::of(0.25));
    let mut own = Sums::none();
    visit(edge, origin, rules, panels, |place, derivative, weight| {
        let (r, z, w) = (place.r, place.z, derivative.z * weight);
        let rw = r * w;
        let (rrw, rzw) = (r * rw, z * rw);
        let (rrrw, rrzw) = (r * rrw, z * rrw);
        let terms = [
            rw,
            rrw * half,
            rzw,
            rrrw * third,
            rrzw * half,
            z * rzw,
            r * rrrw * quarter,
            z * rrrw * third,
            z * rrzw * half,
        ];
        own.add(terms, rw.rounded().abs());
    });
    own
}
