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

    /// The least box that holds it, exact up to rounding.
    pub fn bounds(self) -> Bounds {
        let mut bounds = Bounds::of_corners(self.start, self.end);
        let (sine, cosine) = trig::sin_cos(0.5 * self.sweep.abs());
        let chord = self.chord();
        let length = chord.length();
        let along = chord / length;
        let to_middle = -left_of(along) * self.sweep.signum();
        let middle = self.start + 0.5 * chord + to_middle * (0.5 * length * sine / (1.0 + cosine));
        let radius = 0.5 * length / sine;
        for axis in 0..2 {
            // The circle's extreme along an axis lies on the arc where it is no further from the arc's middle, seen from
            // the centre, than the ends are. It lies radius * (1 - cos) beyond the middle: sin^2 / (1 + cos).
            let turn_cosine = to_middle[axis].abs();
            if turn_cosine > cosine {
                let beyond = radius * along[axis] * along[axis] / (1.0 + turn_cosine);
                let extreme = middle[axis] + beyond.copysign(to_middle[axis]);
                bounds.min[axis] = bounds.min[axis].min(extreme);
                bounds.max[axis] = bounds.max[axis].max(extreme);
            }
        }
        bounds
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::f64::consts::FRAC_PI_2;

    #[test]
    fn the_box_of_a_turned_arc() {
        // Radius 5 about (1, 2), 3-4-5 points.
        let centre = DVec2::new(1.0, 2.0);
        let arc = |from: [f64; 2], to: [f64; 2], left: bool| {
            Arc::about(
                centre + DVec2::from(from),
                centre + DVec2::from(to),
                centre,
                left,
            )
            .bounds()
        };
        let close = |found: Bounds, min: [f64; 2], max: [f64; 2]| {
            let off = (found.min - DVec2::from(min)).abs() + (found.max - DVec2::from(max)).abs();
            assert!(off.max_element() < 4e-15, "{found:?}");
        };
        close(arc([4.0, 3.0], [3.0, 4.0], true), [4.0, 5.0], [5.0, 6.0]);
        close(arc([4.0, -3.0], [4.0, 3.0], true), [5.0, -1.0], [6.0, 5.0]);
        close(arc([4.0, 3.0], [4.0, -3.0], false), [5.0, -1.0], [6.0, 5.0]);
        close(
            arc([3.0, -4.0], [-3.0, 4.0], true),
            [-2.0, -2.0],
            [6.0, 7.0],
        );
        close(
            arc([3.0, -4.0], [-3.0, 4.0], false),
            [-4.0, -3.0],
            [4.0, 6.0],
        );
        close(arc([5.0, 0.0], [0.0, 5.0], true), [1.0, 2.0], [6.0, 7.0]);
    }

    #[test]
    fn a_flat_arc_keeps_its_digits() {
        // The radius is a million chords: the sagitta is chord^2 / (8 radius) to the 13th digit.
        let sweep = 1e-6;
        let arc = Arc {
            start: DVec2::new(1.0, 2.0),
            end: DVec2::new(2.0, 2.0),
            sweep,
        };
        let sagitta = sweep / 8.0;
        assert!((2.0 - arc.bounds().min.y - sagitta).abs() < 1e-15);
        assert!((2.0 - arc.point(0.5).y - sagitta).abs() < 1e-15);
        assert!((arc.radius() - 1e6).abs() < 1e-6);
        assert!(
            (arc.centre() - DVec2::new(1.5, 1e6 + 2.0))
                .abs()
                .max_element()
                < 1e-6
        );
        for t in [0.0, 1e-9, 0.25, 0.5, 0.999_999, 1.0] {
            assert!((arc.parameter_of(arc.point(t)) - t).abs() < 1e-15);
        }
    }

    #[test]
    fn half_a_turn_goes_the_way_it_is_told_in_spite_of_rounding() {
        let centre = DVec2::new(0.1, 0.2);
        for left in [true, false] {
            for turn in 0..50 {
                let out = trig::direction(f64::from(turn)) * 0.3;
                let arc = Arc::about(centre + out, centre - out, centre, left);
                assert_eq!(arc.sweep > 0.0, left);
                assert!(arc.sweep.abs() <= PI && arc.sweep.abs() > PI - 1e-12);
            }
        }
        // Clearly less than half a turn goes the short way whatever is said.
        let arc = Arc::about(DVec2::X, DVec2::Y, DVec2::ZERO, false);
        assert_eq!(arc.sweep, FRAC_PI_2);
    }

    #[test]
    fn parameters_are_found_again_up_to_half_a_turn() {
        for sweep in [PI, -PI, 1.0, -2.5, 1e-3] {
            let arc = Arc {
                start: DVec2::new(0.3, -0.2),
                end: DVec2::new(-0.1, 0.7),
                sweep,
            };
            for t in [0.0, 0.1, 0.5, 0.75, 1.0] {
                assert!((arc.parameter_of(arc.point(t)) - t).abs() < 1e-15);
            }
        }
    }
}
