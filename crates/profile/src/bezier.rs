//! Cubic Bezier edges; a parabola is a cubic whose control points were raised from three to four.

use crate::Bounds;
use crate::polynomial::sign_changes;
use glam::DVec2;

/// A cubic Bezier.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Bezier {
    /// Start, two control points, end.
    pub points: [DVec2; 4],
}

/// A knot nearer to an end than this is the end's: about a stall a curve moves by the square of the parameter, which here is
/// less than rounding.
const NEAREST: f64 = 1e-8;

impl Bezier {
    /// The parabola from `start` to `end` whose end tangents meet in `control`.
    pub fn parabola(start: DVec2, control: DVec2, end: DVec2) -> Self {
        Self {
            points: [
                start,
                start + (control - start) * (2.0 / 3.0),
                end + (control - end) * (2.0 / 3.0),
                end,
            ],
        }
    }

    /// Point at `t` by de Casteljau's construction; the ends are returned bit for bit.
    pub fn point(self, t: f64) -> DVec2 {
        self.split(t).0[3]
    }

    /// Control points of the two parts that meet at `t`.
    fn split(self, t: f64) -> ([DVec2; 4], [DVec2; 4]) {
        let [a, b, c, d] = self.points;
        let mix = |p: DVec2, q: DVec2| (1.0 - t) * p + t * q;
        let (ab, bc, cd) = (mix(a, b), mix(b, c), mix(c, d));
        let (abc, bcd) = (mix(ab, bc), mix(bc, cd));
        let middle = mix(abc, bcd);
        ([a, ab, abc, middle], [middle, bcd, cd, d])
    }

    /// Derivative with respect to `t`.
    pub fn derivative(self, t: f64) -> DVec2 {
        let [a, b, c, d] = self.points;
        let u = 1.0 - t;
        3.0 * (u * u * (b - a) + 2.0 * u * t * (c - b) + t * t * (d - c))
    }

    /// Second derivative with respect to `t`.
    pub fn second_derivative(self, t: f64) -> DVec2 {
        let [a, b, c, d] = self.points;
        6.0 * ((1.0 - t) * (a - 2.0 * b + c) + t * (b - 2.0 * c + d))
    }

    /// Third derivative with respect to `t`: a constant.
    pub(crate) fn third_derivative(self) -> DVec2 {
        let [a, b, c, d] = self.points;
        6.0 * ((d - a) - 3.0 * (c - b))
    }

    /// The longest of the three legs of the control polygon.
    pub(crate) fn longest_leg(self) -> f64 {
        let [a, b, c, d] = self.points;
        (b - a)
            .length_squared()
            .max((c - b).length_squared())
            .max((d - c).length_squared())
            .sqrt()
    }

    /// Parameters in (0, 1), ascending, between which its curvature keeps its sign and is monotone: inflections, extremes
    /// of curvature, cusps.
    pub(crate) fn knots(self) -> Vec<f64> {
        let (c1, c2, c3) = (
            self.derivative(0.0),
            self.second_derivative(0.0),
            self.third_derivative(),
        );
        // B' = c1 + c2 t + c3 t^2 / 2. The curvature is w / v^(3/2) with w = B' x B'', v = B'.B'.
        let w = [c1.perp_dot(c2), c1.perp_dot(c3), 0.5 * c2.perp_dot(c3)];
        let v = [
            c1.dot(c1),
            2.0 * c1.dot(c2),
            c2.dot(c2) + c1.dot(c3),
            c2.dot(c3),
            0.25 * c3.dot(c3),
        ];
        // It is extreme where w' v - 3/2 w v' = 0.
        let mut extreme = [0.0; 6];
        for (i, v) in v.iter().enumerate() {
            extreme[i] += w[1] * v;
            extreme[i + 1] += 2.0 * w[2] * v;
        }
        for (i, w) in w.iter().enumerate() {
            for (k, v) in v.iter().enumerate().skip(1) {
                extreme[i + k - 1] -= 1.5 * w * (k as f64) * v;
            }
        }
        let mut knots = sign_changes(&extreme, 0.0, 1.0).to_vec();
        knots.extend_from_slice(&sign_changes(&w, 0.0, 1.0));
        // A cusp, or on a straight Bezier the point where it turns back, is where the speed is least.
        let slowest = [v[1], 2.0 * v[2], 3.0 * v[3], 4.0 * v[4]];
        knots.extend_from_slice(&sign_changes(&slowest, 0.0, 1.0));
        // A curve that stalls in an end has the end itself as a knot, to rounding inside.
        knots.retain(|t| (NEAREST..=1.0 - NEAREST).contains(t));
        knots.sort_by(f64::total_cmp);
        knots.dedup();
        knots
    }

    /// The part from `t0` to `t1`, t0 < t1.
    #[must_use]
    pub fn part(self, t0: f64, t1: f64) -> Self {
        let mut points = self.points;
        if t1 < 1.0 {
            points = self.split(t1).0;
        }
        if t0 > 0.0 {
            points = Self { points }.split(t0 / t1).1;
        }
        Self { points }
    }

    /// The least box that holds it, exact up to rounding.
    pub fn bounds(self) -> Bounds {
        let [a, _, _, d] = self.points;
        self.turnings()
            .map(|t| self.point(t))
            .fold(Bounds::of_corners(a, d), Bounds::with)
    }

    /// The parameters strictly between the ends at which it runs along r or along z.
    pub(crate) fn turnings(self) -> impl Iterator<Item = f64> {
        let [a, b, c, d] = self.points;
        [0, 1]
            .into_iter()
            .flat_map(move |axis| {
                // The derivative's coefficients in 1, t, t2 along this axis, divided by 3.
                let (p0, p1, p2) = (b[axis] - a[axis], c[axis] - b[axis], d[axis] - c[axis]);
                quadratic_roots(p0 - 2.0 * p1 + p2, 2.0 * (p1 - p0), p0)
            })
            .filter(|t| *t > 0.0 && *t < 1.0)
    }
}

/// Real roots of a t2 + b t + c, without cancellation; a double root twice, a constant none.
pub(crate) fn quadratic_roots(a: f64, b: f64, c: f64) -> impl Iterator<Item = f64> {
    let discriminant = b * b - 4.0 * a * c;
    let q = -0.5 * (b + b.signum() * discriminant.max(0.0).sqrt());
    let real = discriminant >= 0.0;
    [
        (real && a != 0.0).then(|| q / a),
        (real && q != 0.0).then(|| c / q),
    ]
    .into_iter()
    .flatten()
}

impl Bezier {
    /// Unit direction of travel at `t`; where the derivative vanishes at an end, the direction to the next control point
    /// that differs.
    pub fn tangent(self, t: f64) -> DVec2 {
        let [a, b, c, d] = self.points;
        let first_that_differs = |from: DVec2, others: [DVec2; 3]| {
            others
                .into_iter()
                .map(|p| p - from)
                .find(|v| *v != DVec2::ZERO)
                .unwrap_or(DVec2::X)
        };
        if t == 0.0 {
            first_that_differs(a, [b, c, d]).normalize()
        } else if t == 1.0 {
            -first_that_differs(d, [c, b, a]).normalize()
        } else {
            self.derivative(t).try_normalize().unwrap_or_else(|| {
                // A cusp in the middle: the direction after it.
                self.second_derivative(t)
                    .try_normalize()
                    .unwrap_or(DVec2::X)
            })
        }
    }
}
