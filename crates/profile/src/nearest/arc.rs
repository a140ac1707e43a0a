//! The nearest point of a circular arc.

use super::{Foot, Probe, Zone};
use crate::{Arc, left_of, trig};
use glam::DVec2;

/// A circular arc made ready.
///
/// All is reckoned from the chord's middle, x along the chord and y towards the arc, so that a flat arc with a far centre
/// loses nothing: with half the chord h and half the sweep f the centre is at y = -h cot f and the radius is h / sin f.
#[derive(Debug, Clone, Copy)]
pub(crate) struct ArcSeeker {
    arc: Arc,
    middle: DVec2,
    /// Unit vector along the chord.
    x: DVec2,
    /// Unit vector towards the arc.
    y: DVec2,
    half_chord: f64,
    half_sweep: f64,
    sin: f64,
    cos: f64,
}

impl ArcSeeker {
    pub(super) fn new(arc: Arc) -> Self {
        let chord = arc.chord();
        let x = chord.normalize_or(DVec2::X);
        let half_sweep = 0.5 * arc.sweep.abs();
        let (sin, cos) = trig::sin_cos(half_sweep);
        Self {
            arc,
            middle: arc.start + 0.5 * chord,
            x,
            y: left_of(x) * -arc.sweep.signum(),
            half_chord: 0.5 * chord.length(),
            half_sweep,
            sin,
            cos,
        }
    }

    /// `p` from the chord's middle.
    fn local(&self, p: DVec2) -> DVec2 {
        let d = p - self.middle;
        DVec2::new(d.dot(self.x), d.dot(self.y))
    }

    /// The vector from the centre to the local point, times sin f: the circle's radius becomes h.
    fn seen_from_centre(&self, local: DVec2) -> DVec2 {
        DVec2::new(
            local.x * self.sin,
            local.y * self.sin + self.half_chord * self.cos,
        )
    }

    /// (|seen_from_centre|2 - h2) / sin f, without cancellation: positive outside the circle.
    fn outside(&self, local: DVec2) -> f64 {
        let h = self.half_chord;
        self.sin * (local.length_squared() - h * h) + 2.0 * local.y * h * self.cos
    }

    /// Positive where `p` is on the left of the circle's direction of travel.
    pub(super) fn left(&self, p: DVec2) -> f64 {
        -self.outside(self.local(p)) * self.arc.sweep.signum()
    }

    pub(super) fn probe(&self, p: DVec2) -> Probe {
        let local = self.local(p);
        let v = self.seen_from_centre(local);
        // Within half the sweep of the middle direction; half a turn at most, so the cosine is not negative.
        if v.x.abs() * self.cos <= v.y * self.sin {
            let outside = self.outside(local);
            let distance = outside / (v.length() + self.half_chord);
            return Probe {
                distance_squared: distance * distance,
                zone: Zone::Inner {
                    left: -outside * self.arc.sweep.signum(),
                },
            };
        }
        if local.x > 0.0 {
            Probe::at_end(Zone::End, p.distance_squared(self.arc.end))
        } else {
            Probe::at_end(Zone::Start, p.distance_squared(self.arc.start))
        }
    }

    pub(super) fn foot(&self, p: DVec2) -> Foot {
        let v = self.seen_from_centre(self.local(p));
        let t = if v.x.abs() * self.cos <= v.y * self.sin {
            let angle = trig::atan2(v.x, v.y);
            (0.5 + 0.5 * angle / self.half_sweep).clamp(0.0, 1.0)
        } else if v.x > 0.0 {
            1.0
        } else {
            0.0
        };
        Foot::at(t, self.arc.point(t), p)
    }
}
