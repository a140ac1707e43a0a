//! Whether two chains of edges that meet in a corner pass through each other there.

use crate::Edge;
use glam::DVec2;

/// A chain of edges at one of its points: unit directions in which it leaves the point, back along the edge before and forth
/// along the one after.
#[derive(Debug, Clone, Copy)]
pub(super) struct Strand {
    back: DVec2,
    forth: DVec2,
}

/// Directions nearer than this to each other (sine of the angle) are one: which is which hangs on more than they tell.
const SAME_DIRECTION: f64 = 1e-9;

impl Strand {
    /// The chain at parameter `t` of `edge`, whose neighbours are `before` and `after`.
    pub(super) fn new(before: &Edge, edge: &Edge, after: &Edge, t: f64) -> Self {
        let (arriving, leaving) = if t == 0.0 {
            (before.tangent(1.0), edge.tangent(0.0))
        } else if t == 1.0 {
            (edge.tangent(1.0), after.tangent(0.0))
        } else {
            (edge.tangent(t), edge.tangent(t))
        };
        Self {
            back: -arriving,
            forth: leaving,
        }
    }

    /// Whether the other chain comes from one side of this one and leaves to the other; false where two directions are the
    /// same to rounding, as the chains only touch then or run along each other.
    pub(super) fn is_crossed_by(&self, other: &Self) -> bool {
        self.has_on_left(other.back)
            .zip(self.has_on_left(other.forth))
            .is_some_and(|(back, forth)| back != forth)
    }

    /// Whether `direction` lies in the angle from `forth` counter-clockwise to `back`; `None` where it lies on one of them.
    fn has_on_left(&self, direction: DVec2) -> Option<bool> {
        let from_forth = self.forth.perp_dot(direction);
        let to_back = direction.perp_dot(self.back);
        let on =
            |sine: f64, along: DVec2| sine.abs() <= SAME_DIRECTION && along.dot(direction) > 0.0;
        if on(from_forth, self.forth) || on(to_back, self.back) {
            return None;
        }
        let turn = self.forth.perp_dot(self.back);
        Some(if turn > 0.0 {
            from_forth > 0.0 && to_back > 0.0
        } else {
            from_forth > 0.0 || to_back > 0.0
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::trig;

    fn strand(back: f64, forth: f64) -> Strand {
        Strand {
            back: trig::direction(back),
            forth: trig::direction(forth),
        }
    }

    #[test]
    fn chains_cross_where_their_directions_alternate() {
        for turn in [0.0, 1.0, 2.5, 4.0] {
            // Four directions round the point, in order.
            let [a, b, c, d] = [0.1, 0.9, 2.0, 4.5].map(|angle| angle + turn);
            assert!(strand(a, c).is_crossed_by(&strand(b, d)));
            assert!(strand(c, a).is_crossed_by(&strand(b, d)));
            assert!(!strand(a, b).is_crossed_by(&strand(c, d)));
            assert!(!strand(a, b).is_crossed_by(&strand(d, c)));
            assert!(!strand(a, d).is_crossed_by(&strand(b, c)));
            // One direction in common.
            assert!(!strand(a, c).is_crossed_by(&strand(a, d)));
        }
    }
}
