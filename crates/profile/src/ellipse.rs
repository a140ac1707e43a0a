//! Elliptic arcs of at most half a turn.

use crate::{Bounds, trig};
use glam::DVec2;
use std::f64::consts::PI;

/// An elliptic arc: centre + cos(u) `axis_a` + sin(u) `axis_b` for the eccentric angle u from `from` to `from + sweep`.
///
/// The ends are kept as they were given, so that neighbours share them bit for bit; the centre follows from the start.
/// The axes are conjugate half-diameters (for a step of a part file: the half axes along r and z).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct EllipseArc {
    /// Where it starts.
    pub start: DVec2,
    /// Where it ends.
    pub end: DVec2,
    /// Half-diameter at the eccentric angle 0.
    pub axis_a: DVec2,
    /// Half-diameter at the eccentric angle pi/2; not parallel to `axis_a`.
    pub axis_b: DVec2,
    /// Eccentric angle at the start.
    pub from: f64,
    /// Eccentric angle passed through: 0 < |sweep| <= pi.
    pub sweep: f64,
}

impl EllipseArc {
    /// A quarter of an ellipse with axes along r and z, from `start` to `end`, leaving along r or along z.
    pub fn quarter(start: DVec2, end: DVec2, leaves_along_r: bool) -> Self {
        let centre = if leaves_along_r {
            DVec2::new(start.x, end.y)
        } else {
            DVec2::new(end.x, start.y)
        };
        Self {
            start,
            end,
            axis_a: start - centre,
            axis_b: end - centre,
            from: 0.0,
            sweep: std::f64::consts::FRAC_PI_2,
        }
    }

    /// Vector from start to end.
    pub fn chord(self) -> DVec2 {
        self.end - self.start
    }

    /// Centre of the ellipse.
    pub fn centre(self) -> DVec2 {
        let (s, c) = trig::sin_cos(self.from);
        self.start - c * self.axis_a - s * self.axis_b
    }

    /// Point at `t`; the ends are returned bit for bit.
    pub fn point(self, t: f64) -> DVec2 {
        if t == 1.0 {
            return self.end;
        }
        // cos(u0 + d) - cos(u0) = -2 sin(d/2) sin(u0 + d/2), likewise the sine: no cancellation near the start.
        let half = 0.5 * t * self.sweep;
        let (s, c) = trig::sin_cos(self.from + half);
        self.start + 2.0 * trig::sin(half) * (c * self.axis_b - s * self.axis_a)
    }

    /// Derivative with respect to `t`.
    pub fn derivative(self, t: f64) -> DVec2 {
        let (s, c) = trig::sin_cos(self.from + t * self.sweep);
        self.sweep * (c * self.axis_b - s * self.axis_a)
    }

    /// Second derivative with respect to `t`.
    pub fn second_derivative(self, t: f64) -> DVec2 {
        let (s, c) = trig::sin_cos(self.from + t * self.sweep);
        -self.sweep * self.sweep * (c * self.axis_a + s * self.axis_b)
    }

    /// The part from `t0` to `t1`, t0 < t1.
    #[must_use]
    pub fn part(self, t0: f64, t1: f64) -> Self {
        Self {
            start: self.point(t0),
            end: self.point(t1),
            from: self.from + t0 * self.sweep,
            sweep: self.sweep * (t1 - t0),
            ..self
        }
    }

    /// The least box that holds it, exact up to rounding.
    pub fn bounds(self) -> Bounds {
        self.turnings()
            .map(|t| self.point(t))
            .fold(Bounds::of_corners(self.start, self.end), Bounds::with)
    }

    /// The parameters strictly between the ends at which it runs along r or along z.
    pub(crate) fn turnings(self) -> impl Iterator<Item = f64> {
        // r is extreme where -a_r sin u + b_r cos u = 0, likewise z; each twice a turn.
        [
            (self.axis_a.x, self.axis_b.x),
            (self.axis_a.y, self.axis_b.y),
        ]
        .into_iter()
        .flat_map(move |(a, b)| {
            let extreme = trig::atan2(b, a);
            (-3_i32..=3).map(move |k| (extreme + f64::from(k) * PI - self.from) / self.sweep)
        })
        .filter(|t| *t > 0.0 && *t < 1.0)
    }

    /// Parameters in (0, 1), ascending, whose eccentric angle is `angle` plus a multiple of `period`, which is
    /// at least a quarter turn.
    pub(crate) fn parameters_of(self, angle: f64, period: f64) -> Vec<f64> {
        let (low, high) = if self.sweep > 0.0 {
            (self.from, self.from + self.sweep)
        } else {
            (self.from + self.sweep, self.from)
        };
        let first = angle + ((low - angle) / period).ceil() * period;
        // At most half a turn is swept, and no period is shorter than a quarter: three of them at most.
        let mut parameters: Vec<f64> = (0..3)
            .map(|k| first + f64::from(k) * period)
            .filter(|at| *at < high)
            .map(|at| (at - self.from) / self.sweep)
            .filter(|t| *t > 0.0 && *t < 1.0)
            .collect();
        parameters.sort_by(f64::total_cmp);
        parameters
    }
}
