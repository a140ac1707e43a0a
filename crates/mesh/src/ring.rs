//! Round the axis: how many segments a ring has, and how far its polygon is from its circle.
//!
//! A ring of n segments over the angle f, t = f/n, has its corners at the radius k r and its chord middles at
//! k r cos(t/2). Volume-true: k = sqrt(t / sin t), so that every sector's triangle has its circular sector's area; corners
//! are then outside by r t^2/12 and chord middles inside by r t^2/24, to the leading order.
//!
//! Between two rings, at the share s of the way from ring a (radius r_a, segments t_a) to ring b, a band of [`crate::zip`]
//! lies outside the cone by at most (1-s) (k_a-1) r_a + s (k_b-1) r_b, since its corners do and a facet bulges nowhere. It
//! lies inside by at most (1-s) r_a t_a^2/24 + s r_b t_b^2/24: on the segment of ring a at the angle x from its middle,
//! joined to a corner of b at the angle y from it, |y| <= t_b/2, the radius falls short of the mean by
//! p (t_a^2/8 - x^2/2) + p q (x-y)^2 / (2 (p+q)), p = (1-s) r_a, q = s r_b; its maximum over x is p t_a^2/8 + q y^2/2. So each
//! ring answers for itself, whatever its neighbour's count.
//!
//! What a radial displacement e costs in distance: at a corner of the profile at most e; where the profile runs on
//! smoothly with the normal (n_r, n_z) and the curvature c, at most e |n_r| + (e n_z)^2 c / 2: to the tangent, then from the
//! tangent to the curve.

use profile::trig;
use std::f64::consts::TAU;

/// What is known of a ring before its segments are counted.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Circle {
    /// Radius of the true circle, metres.
    pub(crate) radius: f64,
    /// |n_r| of the profile's normal, 1 at a corner.
    pub(crate) facing: f64,
    /// Curvature of the profile, 1/m, 0 at a corner.
    pub(crate) curvature: f64,
}

impl Circle {
    /// Bound on the distance that a radial displacement costs, metres.
    pub(crate) fn cost(self, displacement: f64) -> f64 {
        let along = displacement * displacement * (1.0 - self.facing * self.facing).max(0.0);
        (displacement * self.facing + 0.5 * along * self.curvature).min(displacement)
    }
}

/// Factor on the radius of a ring's corners for which its polygon has its circle's area, `step` radians a segment.
pub(crate) fn area_true(step: f64) -> f64 {
    (step / trig::sin(step)).sqrt()
}

/// The least count of segments over `angle` for which the corners' displacement, `excess(step)` of the radius, costs at
/// most `within`; at least `least` a turn. A full turn has a multiple of four, so that the mesh keeps the axis as its own
/// and its width along x and y is the ring's.
pub(crate) fn segments(
    circle: Circle,
    angle: f64,
    least: u32,
    within: f64,
    excess: impl Fn(f64) -> f64,
) -> u32 {
    let allowed = |count: f64| circle.cost(excess(angle / count) * circle.radius) <= within;
    let unit = if angle == TAU { 4.0 } else { 1.0 };
    // Below a third of a turn a segment's polygon is far from its circle and its area factor has no meaning.
    let fewest = (f64::from(least.max(3)) * angle / TAU / unit)
        .ceil()
        .max(1.0);
    // From the leading order, then up to where the exact bound holds.
    let first = angle * (circle.radius * circle.facing / (12.0 * within)).sqrt() / unit;
    let mut units = first.floor().clamp(fewest, MOST_SEGMENTS);
    let mut stride = (units / 64.0).ceil();
    while !allowed(units * unit) && units < MOST_SEGMENTS {
        units += stride;
    }
    // And back down by ever smaller strides.
    while stride >= 1.0 {
        while units - stride >= fewest && allowed((units - stride) * unit) {
            units -= stride;
        }
        stride = if stride > 1.0 {
            (stride / 2.0).floor()
        } else {
            0.0
        };
    }
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "between 1 and four times MOST_SEGMENTS"
    )]
    let count = (units * unit) as u32;
    count
}

/// A count beyond every limit on triangles, yet far from overflow.
const MOST_SEGMENTS: f64 = 1e8;

#[cfg(test)]
mod tests {
    use super::*;
    use std::f64::consts::PI;

    #[test]
    fn the_polygon_of_an_area_true_ring_has_its_circle_s_area() {
        for n in [4.0, 12.0, 1000.0] {
            let step = TAU / n;
            let k = area_true(step);
            let polygon = 0.5 * n * k * k * trig::sin(step);
            assert!((polygon / PI - 1.0).abs() < 1e-14);
        }
    }

    #[test]
    fn the_count_is_the_least_that_holds_the_bound() {
        for (radius, within) in [(1.0, 1e-3), (0.16, 1e-5), (0.01, 0.1)] {
            let circle = Circle {
                radius,
                facing: 1.0,
                curvature: 0.0,
            };
            let excess = |step: f64| area_true(step) - 1.0;
            let n = segments(circle, TAU, 3, within, excess);
            assert!(excess(TAU / f64::from(n)) * radius <= within);
            assert!(n == 4 || excess(TAU / f64::from(n - 4)) * radius > within);
        }
    }
}
