//! A straight edge as origin, direction and length.

use super::carrier::Carrier;
use crate::Line;
use glam::DVec2;

#[derive(Debug, Clone, Copy)]
pub(super) struct Straight {
    pub(super) start: DVec2,
    end: DVec2,
    /// Unit vector; of an edge without length, the r axis.
    pub(super) along: DVec2,
    pub(super) length: f64,
}

impl From<Line> for Straight {
    fn from(line: Line) -> Self {
        let length = line.chord().length();
        Self {
            start: line.start,
            end: line.end,
            along: if length > 0.0 {
                line.chord() / length
            } else {
                DVec2::X
            },
            length,
        }
    }
}

impl Carrier for Straight {
    fn ends(&self) -> [DVec2; 2] {
        [self.start, self.end]
    }

    fn distance(&self, point: DVec2) -> f64 {
        self.along.perp_dot(point - self.start).abs()
    }

    fn parameter(&self, point: DVec2) -> Option<f64> {
        let along = (point - self.start).dot(self.along);
        (along >= 0.0 && along <= self.length).then(|| along / self.length)
    }
}
