//! Signed area of loops.

use crate::Loop;

impl Loop {
    /// Area enclosed, m2: positive where the loop runs counter-clockwise (r to the right, z up).
    pub fn signed_area(&self) -> f64 {
        let origin = self.bounds().centre();
        self.edges()
            .iter()
            .map(|edge| 0.5 * (edge.start() - origin).perp_dot(edge.end() - origin))
            .sum()
    }
}
