//! The point of an edge that is nearest to a given one.

use crate::Edge;
use glam::DVec2;

impl Edge {
    /// The parameter, the point and the distance of the edge's point nearest to `p`.
    pub fn nearest(&self, p: DVec2) -> (f64, DVec2, f64) {
        (0..=64)
            .map(|k| f64::from(k) / 64.0)
            .map(|t| (t, self.point(t), self.point(t).distance(p)))
            .min_by(|a, b| a.2.total_cmp(&b.2))
            .expect("sixty-five candidates")
    }
}
