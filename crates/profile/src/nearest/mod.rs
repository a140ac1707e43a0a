//! The point of an edge that is nearest to a given one.

mod arc;
mod bernstein;
mod curve;
mod line;

use crate::Edge;
use arc::ArcSeeker;
use curve::CurveSeeker;
use glam::DVec2;
use line::LineSeeker;

impl Edge {
    /// The parameter, the point and the distance (m) of the edge's point nearest to `p`; of several the one with the least
    /// parameter, as far as rounding can tell.
    ///
    /// # Accuracy
    /// Closed forms for lines and arcs; for the others all points whose normal passes through `p` are compared, so no
    /// nearer point is missed. The distance is good to a few units in the last place of the greatest of the
    /// coordinates' differences and, for an ellipse, its axes.
    pub fn nearest(&self, p: DVec2) -> (f64, DVec2, f64) {
        let foot = Seeker::new(self).foot(p);
        (foot.t, foot.point, foot.distance)
    }
}

/// An edge made ready for many questions.
#[derive(Debug, Clone)]
pub(crate) enum Seeker {
    Line(LineSeeker),
    Arc(ArcSeeker),
    /// Larger than the others and rarer.
    Curve(Box<CurveSeeker>),
}

/// The nearest point of an edge.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Foot {
    pub(crate) t: f64,
    pub(crate) point: DVec2,
    pub(crate) distance: f64,
}

impl Foot {
    fn at(t: f64, point: DVec2, p: DVec2) -> Self {
        Self {
            t,
            point,
            distance: point.distance(p),
        }
    }
}

/// How far an edge is, and where on it the nearest point lies.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Probe {
    pub(crate) distance_squared: f64,
    pub(crate) zone: Zone,
}

impl Probe {
    fn at_end(zone: Zone, distance_squared: f64) -> Self {
        Self {
            distance_squared,
            zone,
        }
    }
}

/// Where on an edge the nearest point lies.
#[derive(Debug, Clone, Copy)]
pub(crate) enum Zone {
    /// It is the start.
    Start,
    /// It is the end.
    End,
    /// Between the ends.
    Inner {
        /// Positive where the point asked about is on the left of travel; of no scale.
        left: f64,
    },
}

impl Seeker {
    pub(crate) fn new(edge: &Edge) -> Self {
        match *edge {
            Edge::Line(line) => Self::Line(LineSeeker::new(line)),
            Edge::Arc(arc) => Self::Arc(ArcSeeker::new(arc)),
            Edge::Ellipse(ellipse) => Self::Curve(Box::new(CurveSeeker::of_ellipse(ellipse))),
            Edge::Bezier(bezier) => Self::Curve(Box::new(CurveSeeker::of_bezier(bezier))),
            Edge::Parallel(parallel) => Self::Curve(Box::new(CurveSeeker::of_parallel(parallel))),
        }
    }

    /// The nearest point.
    pub(crate) fn foot(&self, p: DVec2) -> Foot {
        match self {
            Self::Line(line) => line.foot(p),
            Self::Arc(arc) => arc.foot(p),
            Self::Curve(curve) => curve.foot(p),
        }
    }

    /// How far it is and on which side; of lines and arcs without the parameter, which costs more.
    pub(crate) fn probe(&self, p: DVec2) -> Probe {
        match self {
            Self::Line(line) => line.probe(p),
            Self::Arc(arc) => arc.probe(p),
            Self::Curve(curve) => curve.probe(p),
        }
    }

    /// Which side of the whole circle `p` is on, positive on the left of travel; `None` where it is no arc.
    pub(crate) fn left_of_circle(&self, p: DVec2) -> Option<f64> {
        match self {
            Self::Arc(arc) => Some(arc.left(p)),
            _ => None,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::samples::{rays, star};
    use crate::{Arc, Bezier, EllipseArc, trig};
    use proptest::prelude::*;
    use std::f64::consts::{FRAC_PI_2, PI};

    /// The nearest of many points of the edge: not nearer than the nearest, and farther by a step's length at most.
    fn by_sampling(edge: &Edge, p: DVec2) -> f64 {
        (0..=1000)
            .map(|i| edge.point(f64::from(i) / 1000.0).distance(p))
            .fold(f64::INFINITY, f64::min)
    }

    #[test]
    fn of_a_line_the_foot_or_an_end() {
        let line = Edge::line(DVec2::new(1.0, 1.0), DVec2::new(4.0, 5.0));
        // The line's direction is (3, 4)/5, its left normal (-4, 3)/5.
        let (t, point, distance) = line.nearest(DVec2::new(2.5, 3.0) + DVec2::new(-4.0, 3.0));
        assert!((t - 0.5).abs() < 1e-15 && (distance - 5.0).abs() < 1e-15);
        assert!(point.distance(DVec2::new(2.5, 3.0)) < 1e-15);
        assert_eq!(line.nearest(DVec2::ZERO), (0.0, line.start(), 2_f64.sqrt()));
        assert_eq!(line.nearest(DVec2::new(4.0, 6.0)), (1.0, line.end(), 1.0));
    }

    #[test]
    fn of_an_arc_the_radial_point_or_the_nearer_end() {
        let half = Edge::Arc(Arc {
            start: DVec2::new(3.0, 0.0),
            end: DVec2::new(1.0, 0.0),
            sweep: PI,
        });
        let (t, point, distance) = half.nearest(DVec2::new(2.0, 3.0));
        assert!((t - 0.5).abs() < 1e-15 && (distance - 2.0).abs() < 1e-15);
        assert!(point.distance(DVec2::new(2.0, 1.0)) < 1e-15);
        assert!((half.nearest(DVec2::new(2.0, 0.0)).2 - 1.0).abs() < 1e-15);
        assert_eq!(half.nearest(DVec2::new(1.5, -9.0)).0, 1.0);
        assert_eq!(half.nearest(DVec2::new(2.5, -9.0)).0, 0.0);
    }

    #[test]
    fn a_flat_arc_is_found_as_well_as_a_line() {
        // A ten-millionth of a turn: the radius is 1.6 million chords.
        let sweep = 2e-7 * PI;
        for sweep in [sweep, -sweep] {
            let edge = Edge::Arc(Arc {
                start: DVec2::new(1.0, 2.0),
                end: DVec2::new(1.6, 2.8),
                sweep,
            });
            for i in 0..=20 {
                let t = f64::from(i) / 20.0;
                for off in [0.0, 1e-9, -1e-3, 0.5] {
                    let p = edge.point(t) + crate::left_of(edge.tangent(t)) * off;
                    let (found, _, distance) = edge.nearest(p);
                    assert!((found - t).abs() < 1e-14, "{found} {t}");
                    assert!((distance - f64::abs(off)).abs() < 1e-15, "{distance} {off}");
                    let probe = Seeker::new(&edge).probe(p);
                    assert!((probe.distance_squared.sqrt() - f64::abs(off)).abs() < 2e-15);
                }
            }
        }
    }

    #[test]
    fn a_short_arc_of_a_large_ellipse_keeps_its_digits() {
        let (from, sweep) = (0.7, 1e-6);
        let (a, b) = (DVec2::new(3.0, 0.0), DVec2::new(0.0, 2.0));
        let at = |u: f64| DVec2::new(5.0, 1.0) + trig::cos(u) * a + trig::sin(u) * b;
        let edge = Edge::Ellipse(EllipseArc {
            start: at(from),
            end: at(from + sweep),
            axis_a: a,
            axis_b: b,
            from,
            sweep,
        });
        for i in 0..=10 {
            let t = f64::from(i) / 10.0;
            let p = edge.point(t) + crate::left_of(edge.tangent(t)) * 1e-7;
            let (found, _, distance) = edge.nearest(p);
            // Coordinates of some metres: 1e-15 m is 4e-10 of the arc's length.
            assert!((found - t).abs() < 1e-9, "{found} {t}");
            assert!((distance - 1e-7).abs() < 2e-15, "{distance}");
        }
    }

    #[test]
    fn of_an_ellipse_both_sides_are_tried() {
        // The upper half; from a point above the centre the flat top is near, from one beside it an end.
        let edge = Edge::Ellipse(EllipseArc {
            start: DVec2::new(9.0, 0.0),
            end: DVec2::new(1.0, 0.0),
            axis_a: DVec2::new(4.0, 0.0),
            axis_b: DVec2::new(0.0, 1.0),
            from: 0.0,
            sweep: PI,
        });
        let (t, point, distance) = edge.nearest(DVec2::new(5.0, 0.0));
        assert!(
            (t - 0.5).abs() < 1e-9 && (distance - 1.0).abs() < 1e-15,
            "{t} {point}"
        );
        // On the long axis inside the evolute: at u with cos u = a c / (a2 - b2).
        let (t, _, distance) = edge.nearest(DVec2::new(5.0 + 1.875, 0.0));
        let u = trig::acos(4.0 * 1.875 / 15.0);
        assert!((t - u / PI).abs() < 1e-12, "{t}");
        let expected = trig::hypot(4.0 * trig::cos(u) - 1.875, trig::sin(u));
        assert!((distance - expected).abs() < 1e-15);
    }

    #[test]
    fn of_a_parabola_the_known_foot() {
        // z = x2 from x = -1 to 1; from (0, 1) the nearest points are at x = +- sqrt(1/2), 0.75^0.5 away.
        let edge = Edge::Bezier(Bezier::parabola(
            DVec2::new(9.0, 1.0),
            DVec2::new(10.0, -1.0),
            DVec2::new(11.0, 1.0),
        ));
        let (_, point, distance) = edge.nearest(DVec2::new(10.0, 1.0));
        assert!((distance - 0.75_f64.sqrt()).abs() < 1e-15);
        assert!(((point.x - 10.0).abs() - 0.5_f64.sqrt()).abs() < 1e-8);
        // At the vertex' centre of curvature three feet fall together.
        let (t, _, distance) = edge.nearest(DVec2::new(10.0, 0.5));
        assert!(
            (t - 0.5).abs() < 1e-4 && (distance - 0.5).abs() < 1e-15,
            "{t} {distance}"
        );
    }

    #[test]
    fn a_parallel_circle_is_a_circle() {
        let centre = DVec2::new(4.0, 4.0);
        let base = EllipseArc {
            start: centre + DVec2::X,
            end: centre + DVec2::Y,
            axis_a: DVec2::X,
            axis_b: DVec2::Y,
            from: 0.0,
            sweep: FRAC_PI_2,
        };
        let edge = Edge::Parallel(crate::Parallel::new(crate::Base::Ellipse(base), 0.25));
        for angle in [0.1, 0.8, 1.5] {
            let (t, _, distance) = edge.nearest(centre + 3.0 * trig::direction(angle));
            assert!((t - angle / FRAC_PI_2).abs() < 1e-14, "{t}");
            assert!((distance - 2.25).abs() < 1e-14, "{distance}");
        }
    }

    proptest! {
        #![proptest_config(ProptestConfig::with_cases(64))]

        #[test]
        fn nothing_is_nearer(rays in rays(), x in -1.5..1.5, y in -1.5..1.5) {
            let centre = DVec2::new(3.0, 0.5);
            let p = centre + DVec2::new(x, y);
            for edge in star(&rays, centre, 1.0).edges() {
                let (t, point, distance) = edge.nearest(p);
                let sampled = by_sampling(edge, p);
                prop_assert!(point.distance(edge.point(t)) < 1e-15);
                prop_assert!(distance <= sampled + 1e-15, "{distance} {sampled} {edge:?}");
                // Steps of an edge of length 2 at most, and the distance's change is second order at an inner foot.
                prop_assert!(sampled < distance + 2e-3, "{distance} {sampled} {edge:?}");
                let probe = Seeker::new(edge).probe(p);
                prop_assert!((probe.distance_squared.sqrt() - distance).abs() < 1e-14);
            }
        }

        #[test]
        fn a_point_beside_the_edge_is_led_back(rays in rays(), t in 0.0..1.0, off in -0.01..0.01) {
            for edge in star(&rays, DVec2::new(3.0, 0.5), 1.0).edges() {
                let p = edge.point(t) + crate::left_of(edge.tangent(t)) * off;
                if off * edge.curvature(t) < 0.5 {
                    // Coordinates below 8 are rounded to 4.4e-16, those of the edge and those of p.
                    let distance = edge.nearest(p).2;
                    prop_assert!(distance <= f64::abs(off) + 2e-15, "{distance} {off}");
                }
                if let Zone::Inner { left } = Seeker::new(edge).probe(p).zone
                    && f64::abs(off) > 1e-12
                {
                    let nearest = edge.nearest(p);
                    let side = edge.tangent(nearest.0).perp_dot(p - nearest.1);
                    prop_assert!(left * side > 0.0, "{left} {side}");
                }
            }
        }
    }
}
