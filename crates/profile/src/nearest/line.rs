//! The nearest point of a straight edge.

use super::{Foot, Probe, Zone};
use crate::Line;
use glam::DVec2;

/// A straight edge made ready.
#[derive(Debug, Clone, Copy)]
pub(crate) struct LineSeeker {
    line: Line,
    chord: DVec2,
    /// 1 / length squared; 0 for an edge too short to have one.
    scale: f64,
}

impl LineSeeker {
    pub(super) fn new(line: Line) -> Self {
        let chord = line.chord();
        let scale = chord.length_squared().recip();
        Self {
            line,
            chord,
            scale: if scale.is_finite() { scale } else { 0.0 },
        }
    }

    pub(super) fn probe(&self, p: DVec2) -> Probe {
        let from_start = p - self.line.start;
        let t = from_start.dot(self.chord) * self.scale;
        let across = self.chord.perp_dot(from_start);
        if t <= 0.0 {
            Probe::at_end(Zone::Start, from_start.length_squared())
        } else if t >= 1.0 {
            Probe::at_end(Zone::End, p.distance_squared(self.line.end))
        } else {
            Probe {
                distance_squared: across * across * self.scale,
                zone: Zone::Inner { left: across },
            }
        }
    }

    pub(super) fn foot(&self, p: DVec2) -> Foot {
        let t = ((p - self.line.start).dot(self.chord) * self.scale).clamp(0.0, 1.0);
        Foot::at(t, self.line.point(t), p)
    }
}
