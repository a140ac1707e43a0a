//! Volume, first and second moments of tetrahedra over the origin, and of their copies round the axis.

use glam::{DMat3, DVec3};
use profile::trig;
use std::f64::consts::TAU;
use std::ops::AddAssign;

/// ∫ dV, ∫ x dV and ∫ x xᵀ dV of what oriented triangles enclose with the origin.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Moments {
    /// Volume, m3.
    pub volume: f64,
    /// First moments, m4.
    pub first: DVec3,
    /// Second moments ∫ x xᵀ dV, m5, symmetric.
    pub second: DMat3,
}

impl Default for Moments {
    /// Nothing. (A matrix of glam's defaults to the identity.)
    fn default() -> Self {
        Self {
            volume: 0.0,
            first: DVec3::ZERO,
            second: DMat3::ZERO,
        }
    }
}

impl AddAssign for Moments {
    fn add_assign(&mut self, other: Self) {
        self.volume += other.volume;
        self.first += other.first;
        self.second += other.second;
    }
}

impl Moments {
    /// Of the tetrahedron over the origin on a triangle that is counter-clockwise from outside.
    ///
    /// With V the volume and s = a + b + c: ∫ x dV = V s/4, ∫ x xᵀ dV = V/20 (s sᵀ + a aᵀ + b bᵀ + c cᵀ), which are the
    /// means over a simplex with one corner at the origin.
    pub fn of_triangle(a: DVec3, b: DVec3, c: DVec3) -> Self {
        let volume = a.dot(b.cross(c)) / 6.0;
        let sum = a + b + c;
        let square = |v: DVec3| DMat3::from_cols(v * v.x, v * v.y, v * v.z);
        Self {
            volume,
            first: sum * (0.25 * volume),
            second: (square(sum) + square(a) + square(b) + square(c)) * (0.05 * volume),
        }
    }

    /// The sum of `count` copies turned about z by 0, `step`, 2 `step`..., radians.
    #[must_use]
    pub(crate) fn repeated(self, count: u32, step: f64) -> Self {
        let (c1, s1) = phase_sum(count, step);
        let (c2, s2) = phase_sum(count, 2.0 * step);
        let n = f64::from(count);
        let Self {
            volume,
            first,
            second,
        } = self;
        // Sums of cos^2, sin^2 and sin cos from those of the double angle.
        let (cc, ss, cs) = (0.5 * (n + c2), 0.5 * (n - c2), 0.5 * s2);
        let (xx, yy, zz) = (second.x_axis.x, second.y_axis.y, second.z_axis.z);
        let (xy, yz, zx) = (second.x_axis.y, second.y_axis.z, second.z_axis.x);
        let (new_xx, new_yy) = (
            cc * xx - 2.0 * cs * xy + ss * yy,
            ss * xx + 2.0 * cs * xy + cc * yy,
        );
        let new_xy = cs * (xx - yy) + (cc - ss) * xy;
        let (new_zx, new_yz) = (c1 * zx - s1 * yz, s1 * zx + c1 * yz);
        Self {
            volume: n * volume,
            first: DVec3::new(
                c1 * first.x - s1 * first.y,
                s1 * first.x + c1 * first.y,
                n * first.z,
            ),
            second: DMat3::from_cols(
                DVec3::new(new_xx, new_xy, new_zx),
                DVec3::new(new_xy, new_yy, new_yz),
                DVec3::new(new_zx, new_yz, n * zz),
            ),
        }
    }

    /// The same body with the origin moved to -`z` on the axis, that is, the body moved up by `z`.
    #[must_use]
    pub(crate) fn moved_up(self, z: f64) -> Self {
        let shift = DVec3::new(0.0, 0.0, z);
        let outer = |a: DVec3, b: DVec3| DMat3::from_cols(a * b.x, a * b.y, a * b.z);
        Self {
            volume: self.volume,
            first: self.first + shift * self.volume,
            second: self.second
                + outer(shift, self.first)
                + outer(self.first, shift)
                + outer(shift, shift) * self.volume,
        }
    }

    /// Centre, metres; not a number where there is no volume.
    pub fn centre(&self) -> DVec3 {
        self.first / self.volume
    }

    /// Moment of inertia matrix about the centre for unit density, m5; products with their minus sign.
    pub fn inertia_about_centre(&self) -> DMat3 {
        let centre = self.centre();
        let outer = DMat3::from_cols(centre * centre.x, centre * centre.y, centre * centre.z);
        let second = self.second - outer * self.volume;
        let trace = second.x_axis.x + second.y_axis.y + second.z_axis.z;
        DMat3::from_diagonal(DVec3::splat(trace)) - second
    }
}

/// Sums over k < count of cos(k step) and sin(k step).
fn phase_sum(count: u32, step: f64) -> (f64, f64) {
    let n = f64::from(count);
    // Whole turns cancel; computed they would leave rounding.
    let turns = n * step / TAU;
    if (turns - turns.round()).abs() < 1e-12
        && turns.round() != 0.0
        && (step / TAU).fract().abs() > 1e-12
    {
        return (0.0, 0.0);
    }
    let half = trig::sin(0.5 * step);
    if half.abs() < 1e-300 {
        return (n, 0.0);
    }
    let ratio = trig::sin(0.5 * n * step) / half;
    let (s, c) = trig::sin_cos(0.5 * (n - 1.0) * step);
    (ratio * c, ratio * s)
}
