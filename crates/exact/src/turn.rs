//! Integrals over the angle that a section is turned through.

use glam::DVec3;
use profile::{Bounds, trig};
use std::f64::consts::{FRAC_PI_2, PI, TAU};
use twofloat::TwoFloat;

/// The angle f and the integrals from 0 to f of 1, cos, sin, cos^2, sin^2 and sin cos.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Turn {
    angle: f64,
    pub(crate) whole: TwoFloat,
    pub(crate) cos: TwoFloat,
    pub(crate) sin: TwoFloat,
    pub(crate) cos_cos: TwoFloat,
    pub(crate) sin_sin: TwoFloat,
    pub(crate) sin_cos: TwoFloat,
}

impl Turn {
    pub(crate) fn new(angle: f64) -> Self {
        let zero = TwoFloat::from(0.0);
        let half = TwoFloat::from(0.5);
        if angle == TAU {
            // A whole turn is 2 pi itself, not the f64 next to it.
            let pi = twofloat::consts::PI;
            return Self {
                angle,
                whole: pi + pi,
                cos: zero,
                sin: zero,
                cos_cos: pi,
                sin_sin: pi,
                sin_cos: zero,
            };
        }
        let whole = TwoFloat::from(angle);
        let (s, c) = whole.sin_cos();
        let s_half = (whole * half).sin();
        // f/2 - sin f cos f / 2, whose terms cancel for a small angle.
        let sin_sin = if angle < SMALL {
            small_sin_sin(whole)
        } else {
            (whole - s * c) * half
        };
        Self {
            angle,
            whole,
            cos: s,
            sin: s_half * s_half * TwoFloat::from(2.0),
            cos_cos: (whole + s * c) * half,
            sin_sin,
            sin_cos: s * s * half,
        }
    }

    pub(crate) fn is_full(&self) -> bool {
        self.angle == TAU
    }

    /// The box in space of a section's box.
    pub(crate) fn bounds(&self, section: Bounds) -> (DVec3, DVec3) {
        let (low, high) = (section.min.x, section.max.x);
        let (s, c) = trig::sin_cos(self.angle);
        // Where the angle passes an axis, the largest radius reaches along it.
        let least_cos = if self.angle >= PI { -1.0 } else { c };
        let greatest_sin = if self.angle >= FRAC_PI_2 { 1.0 } else { s };
        let least_sin = if self.angle >= 1.5 * PI {
            -1.0
        } else {
            s.min(0.0)
        };
        let reach = |factor: f64| {
            if factor < 0.0 {
                factor * high
            } else {
                factor * low
            }
        };
        let min = DVec3::new(reach(least_cos), reach(least_sin), section.min.y);
        (min, DVec3::new(high, greatest_sin * high, section.max.y))
    }
}

/// Below it the series is taken: its terms fall by a thousandth and more.
const SMALL: f64 = 0.05;

/// (x - sin x)/4 with x = 2 f, as x^3/24 (1 - x^2/20 (1 - x^2/42 (1 - x^2/72 ...))).
fn small_sin_sin(angle: TwoFloat) -> TwoFloat {
    let x = angle + angle;
    let square = x * x;
    let one = TwoFloat::from(1.0);
    let nested = [156.0, 110.0, 72.0, 42.0, 20.0]
        .into_iter()
        .fold(one, |sum, divisor| one - square / divisor * sum);
    x * square / 24.0 * nested
}
