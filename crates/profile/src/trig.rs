//! The one place that sines, cosines, roots of powers and angles come from.
//!
//! The standard library's functions call the system's mathematics library, whose last digit differs from machine to
//! machine. These are `libm`'s, compiled with the program: the same bits everywhere. Angles are radians.

use glam::DVec2;

/// Sine.
pub fn sin(angle: f64) -> f64 {
    libm::sin(angle)
}

/// Cosine.
pub fn cos(angle: f64) -> f64 {
    libm::cos(angle)
}

/// Sine and cosine.
pub fn sin_cos(angle: f64) -> (f64, f64) {
    libm::sincos(angle)
}

/// Tangent.
pub fn tan(angle: f64) -> f64 {
    libm::tan(angle)
}

/// Angle in [-pi/2, pi/2] whose sine is `x`; not a number outside [-1, 1].
pub fn asin(x: f64) -> f64 {
    libm::asin(x)
}

/// Angle in [0, pi] whose cosine is `x`; not a number outside [-1, 1].
pub fn acos(x: f64) -> f64 {
    libm::acos(x)
}

/// Angle in (-pi/2, pi/2) whose tangent is `x`.
pub fn atan(x: f64) -> f64 {
    libm::atan(x)
}

/// Angle in [-pi, pi] of the point (`x`, `y`).
pub fn atan2(y: f64, x: f64) -> f64 {
    libm::atan2(y, x)
}

/// Length of (`x`, `y`) without overflow on the way.
pub fn hypot(x: f64, y: f64) -> f64 {
    libm::hypot(x, y)
}

/// `x` to the power `y`.
pub fn pow(x: f64, y: f64) -> f64 {
    libm::pow(x, y)
}

/// Cube root.
pub fn cbrt(x: f64) -> f64 {
    libm::cbrt(x)
}

/// Unit vector at `angle` from the r axis, counter-clockwise.
pub fn direction(angle: f64) -> DVec2 {
    let (s, c) = sin_cos(angle);
    DVec2::new(c, s)
}

/// `v` turned counter-clockwise by `angle`.
pub fn turned(v: DVec2, angle: f64) -> DVec2 {
    direction(angle).rotate(v)
}

/// Angle in [-pi, pi] from `a` counter-clockwise to `b`; full precision for nearly parallel vectors.
pub fn angle_between(a: DVec2, b: DVec2) -> f64 {
    atan2(a.perp_dot(b), a.dot(b))
}
