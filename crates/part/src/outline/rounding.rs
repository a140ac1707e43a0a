//! Differences that say nothing: what is left of a number that should be 0 after a few operations.

use glam::DVec2;

/// Error of a coordinate after a few operations, relative to the largest number that took part: an expression, the change
/// of unit, the halving of a diameter and one addition round once each, by half of [`f64::EPSILON`] at most.
pub(super) const ROUNDING: f64 = 4.0 * f64::EPSILON;

/// `r`, or exactly 0 where it is no farther from 0 than `within`. Never -0.
pub(super) fn on_axis(r: f64, within: f64) -> f64 {
    if r.abs() <= within { 0.0 } else { r }
}

/// The largest coordinate of `points`, without its sign.
pub(super) fn largest(points: &[DVec2]) -> DVec2 {
    points
        .iter()
        .fold(DVec2::ZERO, |largest, point| largest.max(point.abs()))
}
