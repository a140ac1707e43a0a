//! Circular arcs by the angle that they turn through, up to a whole turn.

use super::Drawn;
use crate::outline::rounding::ROUNDING;
use glam::DVec2;
use profile::{Arc, Edge, left_of, trig};
use std::f64::consts::{PI, TAU};

/// The angle that an arc turns through, and what is missing to a whole turn. Both are kept: near a whole turn the one does
/// not tell the other with full precision.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(in crate::outline) struct Turn {
    /// Angle turned through, 0 to 2 pi.
    pub(in crate::outline) angle: f64,
    /// 2 pi less the angle.
    pub(in crate::outline) rest: f64,
    /// True where it turns to the left.
    pub(in crate::outline) counter_clockwise: bool,
}

impl Turn {
    /// Of the arc that leaves along `direction` and has the chord `chord`; also of the arc through three points, whose
    /// chords from the first to the second and from there to the third are given: the angle between is half the turn.
    pub(super) fn between(direction: DVec2, chord: DVec2) -> Self {
        let half = trig::angle_between(direction, chord);
        Self {
            angle: 2.0 * half.abs(),
            rest: 2.0 * trig::angle_between(-direction, chord).abs(),
            counter_clockwise: half > 0.0,
        }
    }

    /// Of an arc whose chord is `ratio` times its diameter, 0 < ratio <= 1; the longer one where `long`.
    pub(in crate::outline) fn of_chord(ratio: f64, long: bool, counter_clockwise: bool) -> Self {
        let short = 2.0 * trig::asin(ratio);
        let (angle, rest) = if long {
            (TAU - short, short)
        } else {
            (short, TAU - short)
        };
        Self {
            angle,
            rest,
            counter_clockwise,
        }
    }

    /// The arc from `start` to `end`: two edges where it is longer than half a turn, a line where it is flat to rounding.
    pub(in crate::outline) fn arc(self, start: DVec2, end: DVec2) -> Drawn {
        let sign = if self.counter_clockwise { 1.0 } else { -1.0 };
        let arc = |start, end, angle: f64| {
            Edge::Arc(Arc {
                start,
                end,
                sweep: sign * angle.min(PI),
            })
        };
        if self.angle <= f64::EPSILON {
            return Edge::line(start, end).into();
        }
        // Half a turn that is too long by rounding is half a turn.
        if self.angle <= PI * (1.0 + ROUNDING) {
            return arc(start, end, self.angle).into();
        }
        // The middle lies on the far side of the centre: its height over the chord is half the chord over the tangent of
        // a quarter of the angle that is missing.
        let chord = end - start;
        let height = 0.5 / trig::tan(0.25 * self.rest);
        let middle = start + 0.5 * chord - left_of(chord) * (sign * height);
        let half = PI - 0.5 * self.rest;
        Drawn {
            first: arc(start, middle, half),
            second: Some(arc(middle, end, half)),
        }
    }
}

/// Half a turn from `start` to `end`, counter-clockwise.
pub(in crate::outline) fn half_circle_from(start: DVec2, end: DVec2) -> Edge {
    Edge::Arc(Arc {
        start,
        end,
        sweep: PI,
    })
}
