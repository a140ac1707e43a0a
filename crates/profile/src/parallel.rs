//! Curves parallel to an ellipse or a Bezier: neither is of its base's kind, so it is kept as base and distance.

use crate::{Bezier, Bounds, Edge, EllipseArc, left_of};
use glam::DVec2;

/// The curve that a [`Parallel`] runs beside.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Base {
    /// An elliptic arc.
    Ellipse(EllipseArc),
    /// A cubic Bezier.
    Bezier(Bezier),
}

impl Base {
    /// The base as an edge of its own.
    pub fn edge(self) -> Edge {
        match self {
            Self::Ellipse(ellipse) => Edge::Ellipse(ellipse),
            Self::Bezier(bezier) => Edge::Bezier(bezier),
        }
    }
}

/// The points at `distance` to the left of the base (to the right where negative): base(t) + distance * n(t).
///
/// Legal where 1 - distance * curvature > 0 all along the base (curvature positive to the left), so that the curve runs
/// forward and has no cusp. The ends are kept as given, so that neighbours share them bit for bit.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Parallel {
    /// The curve it runs beside.
    pub base: Base,
    /// Distance to the left of the base's direction of travel.
    pub distance: f64,
    /// Where it starts.
    pub start: DVec2,
    /// Where it ends.
    pub end: DVec2,
}

impl Parallel {
    /// The curve beside `base`, with ends as computed. Whether it is legal is the caller's to ask.
    pub fn new(base: Base, distance: f64) -> Self {
        let edge = base.edge();
        let at = |t| edge.point(t) + left_of(edge.tangent(t)) * distance;
        Self {
            base,
            distance,
            start: at(0.0),
            end: at(1.0),
        }
    }

    /// Point at `t`; the ends are returned bit for bit.
    pub fn point(self, t: f64) -> DVec2 {
        if t == 0.0 {
            self.start
        } else if t == 1.0 {
            self.end
        } else {
            let base = self.base.edge();
            base.point(t) + left_of(base.tangent(t)) * self.distance
        }
    }

    /// Derivative with respect to `t`: the base's, times 1 - distance * curvature.
    pub fn derivative(self, t: f64) -> DVec2 {
        let base = self.base.edge();
        base.derivative(t) * (1.0 - self.distance * base.curvature(t))
    }

    /// The part from `t0` to `t1`, t0 < t1.
    #[must_use]
    pub fn part(self, t0: f64, t1: f64) -> Self {
        Self {
            base: match self.base {
                Base::Ellipse(ellipse) => Base::Ellipse(ellipse.part(t0, t1)),
                Base::Bezier(bezier) => Base::Bezier(bezier.part(t0, t1)),
            },
            distance: self.distance,
            start: self.point(t0),
            end: self.point(t1),
        }
    }

    /// The least box that holds it, exact up to rounding: it runs along r or z where its base does, and
    /// where it is not legal it may turn back at a cusp.
    pub fn bounds(self) -> Bounds {
        let ends = Bounds::of_corners(self.start, self.end);
        let with = |bounds: Bounds, t| bounds.with(self.point(t));
        let legal = match self.base {
            Base::Ellipse(ellipse) => ellipse.turnings().fold(ends, with),
            Base::Bezier(bezier) => bezier.turnings().fold(ends, with),
        };
        self.cusps().into_iter().fold(legal, with)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_box_is_touched_on_every_side_and_left_on_none() {
        let arch = Bezier {
            points: [
                DVec2::new(1.0, 0.0),
                DVec2::new(1.2, 0.9),
                DVec2::new(2.3, 1.1),
                DVec2::new(2.0, -0.2),
            ],
        };
        let ellipse = EllipseArc {
            start: DVec2::new(3.0, 1.0),
            end: DVec2::new(1.0, 1.0),
            axis_a: DVec2::new(1.0, 0.0),
            axis_b: DVec2::new(0.0, 0.5),
            from: 0.0,
            sweep: std::f64::consts::PI,
        };
        for base in [Base::Bezier(arch), Base::Ellipse(ellipse)] {
            for distance in [-0.1, 0.05] {
                let beside = Parallel::new(base, distance);
                let bounds = beside.bounds();
                let sampled = (0..=10_000)
                    .map(|i| beside.point(f64::from(i) / 1e4))
                    .map(Bounds::of_point)
                    .reduce(Bounds::union)
                    .unwrap();
                // Between samples the curve rises at most by its curvature times the step squared: far below 1e-6.
                let (low, high) = (sampled.min - bounds.min, bounds.max - sampled.max);
                for gap in [low.x, low.y, high.x, high.y] {
                    assert!((-1e-15..1e-6).contains(&gap), "{gap} {distance}");
                }
            }
        }
    }
}
