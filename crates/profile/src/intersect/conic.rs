//! Circular and elliptic arcs about their middles.

use super::carrier::Carrier;
use crate::{Arc, EllipseArc, left_of, trig};
use glam::DVec2;

/// A circular or elliptic arc of at most half a turn as middle + sin(d) tangent + (1 - cos(d)) inward, d in [-half, half].
///
/// About its own middle an arc keeps its digits however flat it is: tangent and inward grow like the radius, sin(d) and
/// 1 - cos(d) shrink with it, and the far-off centre never appears.
#[derive(Debug, Clone, Copy)]
pub(super) struct Conic {
    start: DVec2,
    end: DVec2,
    middle: DVec2,
    tangent: DVec2,
    inward: DVec2,
    /// The dual basis: a vector is (v . dual_tangent) tangent + (v . dual_inward) inward.
    dual_tangent: DVec2,
    dual_inward: DVec2,
    /// Half of the angle passed through, positive, and its sine and cosine.
    half: f64,
    sine: f64,
    cosine: f64,
}

/// g0 + g1 sin(d) + g2 (1 - cos(d)): what a straight line's distance becomes along a conic, and a circle's equation along
/// another circle.
#[derive(Debug, Clone, Copy)]
pub(super) struct Harmonic {
    pub(super) g0: f64,
    pub(super) g1: f64,
    pub(super) g2: f64,
}

impl Harmonic {
    /// Both real roots as q = tan(d/2): (g0 + 2 g2) q^2 + 2 g1 q + g0 = 0, without cancellation.
    pub(super) fn half_tangents(self) -> impl Iterator<Item = f64> {
        let square = self.g0 + 2.0 * self.g2;
        let discriminant = self.g1 * self.g1 - self.g0 * square;
        let w = -(self.g1 + discriminant.max(0.0).sqrt().copysign(self.g1));
        let real = discriminant >= 0.0;
        [
            (real && square != 0.0).then(|| w / square),
            (real && w != 0.0).then(|| self.g0 / w),
        ]
        .into_iter()
        .flatten()
    }

    /// The extreme value with |d| <= pi/2 and the tangent of its d.
    pub(super) fn extreme(self) -> (f64, f64) {
        let root = (self.g1 * self.g1 + self.g2 * self.g2).sqrt();
        let divisor = self.g2 + root.copysign(self.g2);
        if divisor == 0.0 {
            (self.g0, 0.0)
        } else {
            (self.g0 - self.g1 * self.g1 / divisor, -self.g1 / self.g2)
        }
    }
}

impl From<Arc> for Conic {
    fn from(arc: Arc) -> Self {
        let half = 0.5 * arc.sweep.abs();
        let (sine, cosine) = trig::sin_cos(half);
        let chord = arc.chord();
        let to_centre = left_of(chord) * 1.0_f64.copysign(arc.sweep);
        let (tangent, inward) = (chord * (0.5 / sine), to_centre * (0.5 / sine));
        let per_square = 1.0 / tangent.length_squared();
        Self {
            start: arc.start,
            end: arc.end,
            middle: arc.start + 0.5 * chord - to_centre * (0.5 * sine / (1.0 + cosine)),
            tangent,
            inward,
            dual_tangent: tangent * per_square,
            dual_inward: inward * per_square,
            half,
            sine,
            cosine,
        }
    }
}

impl From<EllipseArc> for Conic {
    fn from(ellipse: EllipseArc) -> Self {
        let half = 0.5 * ellipse.sweep.abs();
        let (sine, cosine) = trig::sin_cos(half);
        let (s, c) = trig::sin_cos(ellipse.from + 0.5 * ellipse.sweep);
        let (a, b) = (ellipse.axis_a, ellipse.axis_b);
        let tangent = (c * b - s * a) * 1.0_f64.copysign(ellipse.sweep);
        let inward = -(c * a + s * b);
        let area = tangent.perp_dot(inward);
        Self {
            start: ellipse.start,
            end: ellipse.end,
            middle: ellipse.point(0.5),
            tangent,
            inward,
            dual_tangent: -left_of(inward) / area,
            dual_inward: left_of(tangent) / area,
            half,
            sine,
            cosine,
        }
    }
}

impl Conic {
    /// The distance to the left of the line through `origin` along the unit vector `along`, as a function on this arc.
    pub(super) fn beside_line(&self, origin: DVec2, along: DVec2) -> Harmonic {
        let normal = left_of(along);
        Harmonic {
            g0: normal.dot(self.middle - origin),
            g1: normal.dot(self.tangent),
            g2: normal.dot(self.inward),
        }
    }

    /// [`Conic::level`] of `circle` as a function on this arc. Both must be circular.
    pub(super) fn beside_circle(&self, circle: &Self) -> Harmonic {
        let (level, gradient) = circle.level(self.middle);
        // Along a circle |point - middle|^2 = 2 radius^2 (1 - cos(d)): the square term of the level is of the same form.
        let square = 2.0 * self.tangent.length_squared() * circle.dual_tangent.length_squared();
        Harmonic {
            g0: level,
            g1: gradient.dot(self.tangent),
            g2: gradient.dot(self.inward) + square,
        }
    }

    /// x^2 + (1 - y)^2 - 1 and its gradient, x and y the coordinates along tangent and inward: 0 on the conic, negative
    /// inside. Divided by the gradient's length it is the distance, near the conic.
    pub(super) fn level(&self, point: DVec2) -> (f64, DVec2) {
        let (x, y) = self.coordinates(point);
        (
            x * x + y * y - 2.0 * y,
            2.0 * (x * self.dual_tangent + (y - 1.0) * self.dual_inward),
        )
    }

    fn coordinates(&self, point: DVec2) -> (f64, f64) {
        let from_middle = point - self.middle;
        (
            from_middle.dot(self.dual_tangent),
            from_middle.dot(self.dual_inward),
        )
    }

    /// Point at sin(d) = `sine`, 1 - cos(d) = `versine`.
    fn at(&self, sine: f64, versine: f64) -> DVec2 {
        self.middle + sine * self.tangent + versine * self.inward
    }

    /// Parameter and point where tan(d/2) is `q`, if the arc reaches it.
    pub(super) fn at_half_tangent(&self, q: f64) -> Option<(f64, DVec2)> {
        // tan(half/2) = sin(half) / (1 + cos(half)).
        (q.abs() * (1.0 + self.cosine) <= self.sine).then(|| {
            let scale = 2.0 / (1.0 + q * q);
            (
                0.5 + trig::atan(q) / self.half,
                self.at(scale * q, scale * q * q),
            )
        })
    }

    /// Parameter and point where tan(d) is `tangent`, |d| < pi/2, if the arc reaches it.
    pub(super) fn at_tangent(&self, tangent: f64) -> Option<(f64, DVec2)> {
        (tangent.abs() * self.cosine <= self.sine).then(|| {
            let d = trig::atan(tangent);
            let cosine = 1.0 / (1.0 + tangent * tangent).sqrt();
            let sine = tangent * cosine;
            // 1 - cos without cancellation.
            (
                0.5 + 0.5 * d / self.half,
                self.at(sine, sine * sine / (1.0 + cosine)),
            )
        })
    }
}

impl Carrier for Conic {
    fn ends(&self) -> [DVec2; 2] {
        [self.start, self.end]
    }

    fn distance(&self, point: DVec2) -> f64 {
        let (level, gradient) = self.level(point);
        level.abs() / gradient.length()
    }

    fn parameter(&self, point: DVec2) -> Option<f64> {
        let (x, y) = self.coordinates(point);
        // |d| <= half <= pi/2 exactly where sin(half - |d|) >= 0.
        ((1.0 - y) * self.sine >= x.abs() * self.cosine)
            .then(|| 0.5 + 0.5 * trig::atan2(x, 1.0 - y) / self.half)
    }
}
