//! Circular arcs of at most half a turn.

use crate::{Bounds, left_of, trig};
use glam::DVec2;
use std::f64::consts::PI;

/// An angle this close to half a turn is one: the rounding of a centre's coordinates, on circles down to 1e-3 of the
/// part, may turn it to either side.
const HALF_TURN_ROUNDING: f64 = 1e-12;

/// A circular arc of at most half a turn, given by its ends and the angle it turns through.
///
/// Ends and angle determine radius and centre with full precision, however flat the arc is: with a centre a million
/// chords away, centre and radius would lose six digits. A longer arc is two edges.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Arc {
    /// Where it starts.
    pub start: DVec2,
    /// Where it ends; not the start.
    pub end: DVec2,
    /// Angle turned through: counter-clockwise positive, 0 < |sweep| <= pi.
    pub sweep: f64,
}

impl Arc {
    /// Arc from `start` to `end` about `centre`, through the smaller angle (through pi where they are opposite, to
    /// rounding: counter-clockwise where `counter_clockwise`). The centre is used for the angle only.
    pub fn about(start: DVec2, end: DVec2, centre: DVec2, counter_clockwise: bool) -> Self {
        let sweep = trig::angle_between(start - centre, end - centre);
        let half_turn = PI - sweep.abs() <= HALF_TURN_ROUNDING;
        Self {
            start,
            end,
            sweep: if half_turn && (sweep > 0.0) != counter_clockwise {
                -sweep
            } else {
                sweep
            },
        }
    }

    /// Vector from start to end.
    pub fn chord(self) -> DVec2 {
        self.end - self.start
    }

    /// Radius: chord / (2 sin(|sweep|/2)).
    pub fn radius(self) -> f64 {
        self.chord().length() / (2.0 * trig::sin(0.5 * self.sweep.abs()))
    }

    /// Centre of the circle; as far off as the radius is long.
    pub fn centre(self) -> DVec2 {
        // From the chord's middle, at radius * cos(sweep/2) to the left for a counter-clockwise arc.
        let (s, c) = trig::sin_cos(0.5 * self.sweep);
        self.start + 0.5 * self.chord() + left_of(self.chord()) * (0.5 * c / s)
    }

    /// Unit direction of travel at the start.
    pub fn start_direction(self) -> DVec2 {
        trig::turned(self.chord().normalize(), -0.5 * self.sweep)
    }

    /// Point at `t`: start + the chord of the part from 0 to t. The ends are returned bit for bit.
    pub fn point(self, t: f64) -> DVec2 {
        if t == 0.0 {
            self.start
        } else if t == 1.0 {
            self.end
        } else {
            // The part's chord is longer or shorter in the ratio of the sines and turned back by (1 - t) sweep / 2.
            let ratio = trig::sin(0.5 * t * self.sweep) / trig::sin(0.5 * self.sweep);
            self.start + trig::turned(self.chord(), 0.5 * (t - 1.0) * self.sweep) * ratio
        }
    }

    /// Derivative with respect to `t`.
    pub fn derivative(self, t: f64) -> DVec2 {
        let speed = 0.5 * self.sweep / trig::sin(0.5 * self.sweep);
        trig::turned(self.chord(), (t - 0.5) * self.sweep) * speed
    }

    /// The part from `t0` to `t1`, t0 < t1.
    #[must_use]
    pub fn part(self, t0: f64, t1: f64) -> Self {
        Self {
            start: self.point(t0),
            end: self.point(t1),
            sweep: self.sweep * (t1 - t0),
        }
    }

    /// The arc at `distance` to the left (to the right where negative), about the same centre; `None` where the
    /// distance reaches the centre or passes it.
    pub fn offset(self, distance: f64) -> Option<Self> {
        // The centre is on the left of a counter-clockwise arc: going left makes it smaller.
        let turned_inward = if self.sweep > 0.0 {
            distance
        } else {
            -distance
        };
        if turned_inward >= self.radius() {
            return None;
        }
        let from = self.start_direction();
        let to = trig::turned(from, self.sweep);
        Some(Self {
            start: self.start + left_of(from) * distance,
            end: self.end + left_of(to) * distance,
            sweep: self.sweep,
        })
    }

    /// Parameter of the point of the whole circle nearest to `point`: 0 at the start, 1 at the end, beyond them outside
    /// [0, 1], up to half a turn from the middle. No digits are lost on a flat arc.
    pub(crate) fn parameter_of(self, point: DVec2) -> f64 {
        // Seen from the centre and measured from the arc's middle. All is multiplied by 2 sin(sweep/2) / chord^2, so that
        // the centre of a flat arc does not run away.
        let chord = self.chord();
        let (s, c) = trig::sin_cos(0.5 * self.sweep);
        let from_middle = (point - self.start - 0.5 * chord) / chord.length_squared();
        let along = 2.0 * s * from_middle.dot(chord);
        let outward = c - 2.0 * s * chord.perp_dot(from_middle);
        0.5 + trig::atan2(along, outward) / self.sweep
    }

    /// Parameter of the circle's point in this direction from the centre, if the arc passes it.
    fn parameter_towards(self, direction: DVec2) -> Option<f64> {
        // From the centre the arc's middle lies square to the chord. Measured from there, an arc of at most half a turn
        // is never more than a quarter turn away: no angle has to be wrapped.
        let to_middle = -left_of(self.chord()) * self.sweep.signum();
        let t = 0.5 + trig::angle_between(to_middle, direction) / self.sweep;
        (0.0..=1.0).contains(&t).then_some(t)
    }

    /// The least box that holds it, exact up to rounding.
    pub fn bounds(self) -> Bounds {
        [DVec2::X, DVec2::Y, DVec2::NEG_X, DVec2::NEG_Y]
            .into_iter()
            .filter_map(|direction| self.parameter_towards(direction))
            .fold(Bounds::of_corners(self.start, self.end), |bounds, t| {
                bounds.with(self.point(t))
            })
    }
}
