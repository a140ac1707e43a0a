//! How near is touching.

use crate::Bounds;

/// Points of a loop nearer to each other than this part of its largest extent count as one.
///
/// Corners come out of a few dozen operations with a relative rounding of 1.1e-16 each, curved edges' points likewise; a
/// hundred times their sum is still a thousandth of a nanometre on a part of a metre, far below what a drawing means.
pub const TOUCH: f64 = 1e-12;

/// Coordinates themselves are rounded in proportion to their distance from the origin; a loop much smaller than that
/// distance cannot be told apart finer than this part of it.
const FAR_OFF: f64 = 16.0 * f64::EPSILON;

/// Distance below which points of what `bounds` holds count as one, m.
pub(crate) fn touch(bounds: Bounds) -> f64 {
    let farthest = bounds.min.abs().max(bounds.max.abs()).max_element();
    (TOUCH * bounds.size().max_element()).max(FAR_OFF * farthest)
}
