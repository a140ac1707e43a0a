//! Straight edges.

use crate::{Bounds, left_of};
use glam::DVec2;

/// A straight edge.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Line {
    /// Where it starts.
    pub start: DVec2,
    /// Where it ends.
    pub end: DVec2,
}

impl Line {
    /// Vector from start to end.
    pub fn chord(self) -> DVec2 {
        self.end - self.start
    }

    /// Point at `t`; the ends are returned bit for bit.
    pub fn point(self, t: f64) -> DVec2 {
        if t == 1.0 {
            self.end
        } else {
            self.start + t * self.chord()
        }
    }

    /// The line at `distance` to the left (to the right where negative).
    #[must_use]
    pub fn offset(self, distance: f64) -> Self {
        let shift = left_of(self.chord().normalize()) * distance;
        Self {
            start: self.start + shift,
            end: self.end + shift,
        }
    }

    /// The least box that holds it.
    pub fn bounds(self) -> Bounds {
        Bounds::of_corners(self.start, self.end)
    }
}
