//! What the edges of the closed forms have in common.

use glam::DVec2;

/// A straight edge or an arc, as a piece of a line or a conic.
pub(super) trait Carrier {
    /// Start and end.
    fn ends(&self) -> [DVec2; 2];

    /// Distance of `point` from the whole line or conic; of a conic to first order, for points near it.
    fn distance(&self, point: DVec2) -> f64;

    /// Parameter of the foot of `point`, which lies near the line or conic, if the edge reaches it.
    fn parameter(&self, point: DVec2) -> Option<f64>;

    /// Parameter of the edge's point nearest to `point`, if it is no further off than `within`.
    fn near(&self, point: DVec2, within: f64) -> Option<f64> {
        let [start, end] = self.ends();
        if point.distance_squared(start) <= within * within {
            Some(0.0)
        } else if point.distance_squared(end) <= within * within {
            Some(1.0)
        } else if self.distance(point) <= within {
            self.parameter(point)
        } else {
            None
        }
    }
}
