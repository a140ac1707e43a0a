//! How often a loop runs round a point.

use crate::{Edge, Seeker, piece::Piece};
use glam::DVec2;

impl Piece {
    /// What the piece adds to the number of turns about `p`: +1 where it crosses the ray from `p` to the right upwards, -1
    /// downwards.
    ///
    /// Of the two ends that have the height of `p` the ray's rule counts one (half-open), by comparison alone; so the sum over
    /// a closed chain of pieces that share their ends bit for bit is a whole number of turns wherever `p` lies. Which
    /// side of the piece `p` is on is rounded like the piece's own points.
    pub(crate) fn winding(&self, edge: &Edge, seeker: &Seeker, p: DVec2) -> i32 {
        let [start, end] = self.ends;
        let upwards = start.y <= p.y && p.y < end.y;
        let downwards = end.y <= p.y && p.y < start.y;
        if !(upwards || downwards) || p.x >= start.x.max(end.x) {
            return 0;
        }
        let crossing_is_right = p.x < start.x.min(end.x)
            || match edge {
                Edge::Line(_) => ((end - start).perp_dot(p - start) > 0.0) == upwards,
                // In the piece's box the inside of the circle is on one side.
                _ => seeker.left_of_circle(p).map_or_else(
                    || self.crosses_right_of(edge, p),
                    |left| (left > 0.0) == upwards,
                ),
            };
        match (crossing_is_right, upwards) {
            (false, _) => 0,
            (true, true) => 1,
            (true, false) => -1,
        }
    }

    /// Whether the piece has the height of `p` at a greater r: halved until r is on one side all along, as r runs one way.
    fn crosses_right_of(&self, edge: &Edge, p: DVec2) -> bool {
        let [mut t0, mut t1] = self.t;
        let [mut low, mut high] = self.ends;
        if low.y > high.y {
            (t0, t1, low, high) = (t1, t0, high, low);
        }
        loop {
            let (left, right) = (low.x.min(high.x), low.x.max(high.x));
            let t = 0.5 * (t0 + t1);
            if p.x < left || p.x >= right || t == t0 || t == t1 {
                return p.x < left;
            }
            let middle = edge.point(t);
            if middle.y <= p.y {
                (t0, low) = (t, middle);
            } else {
                (t1, high) = (t, middle);
            }
        }
    }
}
