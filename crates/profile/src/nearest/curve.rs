//! The nearest point of an elliptic arc, a Bezier, or a curve parallel to one.
//!
//! At the nearest inner point the way to `p` is square to the curve: (C(t) - p) . C'(t) = 0. Of a Bezier that is a polynomial of
//! degree 5 in t, of an ellipse one of degree 4 in the tangent of half the eccentric angle from the arc's middle. All
//! roots are found and the nearest point is taken, the ends included, so the answer is the global one. A parallel curve
//! has its normals in common with its base, hence the same roots.

use super::bernstein::roots;
use super::{Foot, Probe, Zone};
use crate::{Base, Bezier, Edge, EllipseArc, trig};
use glam::DVec2;

/// A curved edge made ready.
#[derive(Debug, Clone, Copy)]
pub(crate) struct CurveSeeker {
    edge: Edge,
    normals: Normals,
}

/// Finds the parameters at which the way to a point is square to the curve.
#[derive(Debug, Clone, Copy)]
enum Normals {
    Bezier {
        points: [DVec2; 4],
        /// Control points of the derivative.
        hodograph: [DVec2; 3],
    },
    Ellipse {
        arc: EllipseArc,
        centre: DVec2,
        /// Half-diameters at the arc's middle and a quarter turn on in the direction of travel.
        axes: [DVec2; 2],
        /// Tangent of a quarter of the sweep.
        reach: f64,
    },
}

impl Normals {
    fn of_bezier(bezier: Bezier) -> Self {
        let [a, b, c, d] = bezier.points;
        Self::Bezier {
            points: bezier.points,
            hodograph: [3.0 * (b - a), 3.0 * (c - b), 3.0 * (d - c)],
        }
    }

    fn of_ellipse(arc: EllipseArc) -> Self {
        let (s, c) = trig::sin_cos(arc.from + 0.5 * arc.sweep);
        let forward = arc.sweep.signum();
        Self::Ellipse {
            arc,
            centre: arc.centre(),
            axes: [
                c * arc.axis_a + s * arc.axis_b,
                forward * (c * arc.axis_b - s * arc.axis_a),
            ],
            reach: trig::tan(0.25 * arc.sweep.abs()),
        }
    }

    fn each(&self, p: DVec2, found: &mut impl FnMut(f64)) {
        match *self {
            Self::Bezier { points, hodograph } => {
                roots(bezier_normals(points.map(|q| q - p), hodograph), found);
            }
            Self::Ellipse {
                arc,
                centre,
                axes,
                reach,
            } => roots(ellipse_normals(centre - p, axes, reach), &mut |x| {
                let half_angle = trig::atan(reach * (2.0 * x - 1.0));
                found((0.5 + 2.0 * half_angle / arc.sweep.abs()).clamp(0.0, 1.0));
            }),
        }
    }
}

/// Bernstein coefficients of the product of a cubic and a quadratic, as vectors' dot product.
fn bezier_normals([q0, q1, q2, q3]: [DVec2; 4], [d0, d1, d2]: [DVec2; 3]) -> [f64; 6] {
    [
        q0.dot(d0),
        (3.0 * q1.dot(d0) + 2.0 * q0.dot(d1)) / 5.0,
        (3.0 * q2.dot(d0) + 6.0 * q1.dot(d1) + q0.dot(d2)) / 10.0,
        (q3.dot(d0) + 6.0 * q2.dot(d1) + 3.0 * q1.dot(d2)) / 10.0,
        (2.0 * q3.dot(d1) + 3.0 * q2.dot(d2)) / 5.0,
        q3.dot(d2),
    ]
}

/// Bernstein coefficients over w from -`reach` to `reach` of (q + cos u a + sin u b) . (cos u b - sin u a) (1 + w2)2, where
/// w = tan(u/2).
fn ellipse_normals(q: DVec2, [a, b]: [DVec2; 2], reach: f64) -> [f64; 5] {
    let (qa, qb) = (q.dot(a), q.dot(b));
    let (stretch, skew) = (b.length_squared() - a.length_squared(), a.dot(b));
    // Coefficients of w0 to w4, times the powers of the reach.
    let w = reach;
    let c = [
        qb + skew,
        2.0 * (stretch - qa) * w,
        -6.0 * skew * (w * w),
        -2.0 * (stretch + qa) * (w * w * w),
        (skew - qb) * (w * w * w * w),
    ];
    // The polar form of each power at j times +1 and 4 - j times -1.
    [
        c[0] - c[1] + c[2] - c[3] + c[4],
        c[0] - 0.5 * c[1] + 0.5 * c[3] - c[4],
        c[0] - c[2] / 3.0 + c[4],
        c[0] + 0.5 * c[1] - 0.5 * c[3] - c[4],
        c[0] + c[1] + c[2] + c[3] + c[4],
    ]
}

impl CurveSeeker {
    pub(super) fn of_bezier(bezier: Bezier) -> Self {
        Self {
            edge: Edge::Bezier(bezier),
            normals: Normals::of_bezier(bezier),
        }
    }

    pub(super) fn of_ellipse(arc: EllipseArc) -> Self {
        Self {
            edge: Edge::Ellipse(arc),
            normals: Normals::of_ellipse(arc),
        }
    }

    pub(super) fn of_parallel(parallel: crate::Parallel) -> Self {
        Self {
            edge: Edge::Parallel(parallel),
            normals: match parallel.base {
                Base::Bezier(bezier) => Normals::of_bezier(bezier),
                Base::Ellipse(arc) => Normals::of_ellipse(arc),
            },
        }
    }

    pub(super) fn foot(&self, p: DVec2) -> Foot {
        let mut best = Foot::at(0.0, self.edge.start(), p);
        let mut consider = |t: f64| {
            let foot = Foot::at(t, self.edge.point(t), p);
            if foot.distance < best.distance {
                best = foot;
            }
        };
        consider(1.0);
        self.normals.each(p, &mut consider);
        if let Some(t) = self.normals.improved(best.t, p) {
            let foot = Foot::at(t, self.edge.point(t), p);
            if foot.distance < best.distance {
                best = foot;
            }
        }
        best
    }

    pub(super) fn probe(&self, p: DVec2) -> Probe {
        let foot = self.foot(p);
        let distance_squared = foot.distance * foot.distance;
        if foot.t == 0.0 {
            Probe::at_end(Zone::Start, distance_squared)
        } else if foot.t == 1.0 {
            Probe::at_end(Zone::End, distance_squared)
        } else {
            Probe {
                distance_squared,
                zone: Zone::Inner {
                    left: self.edge.tangent(foot.t).perp_dot(p - foot.point),
                },
            }
        }
    }
}

impl Normals {
    /// One of Newton's steps from `t`. An ellipse's centre is as far off as its axes are long, so for a short arc the
    /// polynomial's roots carry the rounding of the whole ellipse; the step starts from the arc's own points.
    fn improved(&self, t: f64, p: DVec2) -> Option<f64> {
        let Self::Ellipse { arc, .. } = self else {
            return None;
        };
        let (way, first, second) = (
            arc.point(t) - p,
            arc.derivative(t),
            arc.second_derivative(t),
        );
        let slope = first.length_squared() + way.dot(second);
        (slope > 0.0).then(|| (t - way.dot(first) / slope).clamp(0.0, 1.0))
    }
}
