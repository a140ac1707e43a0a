//! Edges as functions of the parameter, in either precision, about a local origin.
//!
//! What is exact about an edge: a line its two ends; an arc its ends and sweep; a Bezier its four points. An elliptic arc
//! has ends of its own, centre + cos u a + sin u b, which differ from the stored ones by rounding; its figures are those of
//! the stored chord plus the segment between the arc and its own chord. A parallel curve likewise.

use crate::gauss::{Rule, Rules};
use crate::real::{Pair, Real};
use profile::{Arc, Base, Bezier, DVec2, Edge, EllipseArc, Parallel};

/// A curve: place and derivative at t in [0, 1].
pub(crate) trait Curve<R> {
    fn at(&self, t: R) -> (Pair<R>, Pair<R>);
}

/// A straight piece.
pub(crate) struct Straight<R> {
    pub(crate) start: Pair<R>,
    pub(crate) chord: Pair<R>,
}

impl<R: Real> Straight<R> {
    pub(crate) fn between(start: Pair<R>, end: Pair<R>) -> Self {
        Self {
            start,
            chord: end.minus(start),
        }
    }
}

impl<R: Real> Curve<R> for Straight<R> {
    fn at(&self, t: R) -> (Pair<R>, Pair<R>) {
        (self.start.plus(self.chord.times(t)), self.chord)
    }
}

/// A circular arc: start + radius times the chord of the angle passed, which does not cancel however flat it is.
pub(crate) struct Circular<R> {
    start: Pair<R>,
    /// Half the chord over sin(sweep/2), along the chord: the radius with the sweep's sign.
    radius: Pair<R>,
    half: R,
}

impl<R: Real> Circular<R> {
    pub(crate) fn new(arc: &Arc, origin: DVec2) -> Self {
        let half = R::of(arc.sweep) * R::of(0.5);
        let chord = Pair::between(arc.end, arc.start);
        Self {
            start: Pair::between(arc.start, origin),
            radius: chord.times(R::of(0.5).over(half.sin_cos().0)),
            half,
        }
    }
}

impl<R: Real> Curve<R> for Circular<R> {
    fn at(&self, t: R) -> (Pair<R>, Pair<R>) {
        let turn = |v: Pair<R>, (s, c): (R, R)| v.times(c).plus(v.left().times(s));
        // The chord from 0 to t is 2 radius sin(t half), turned back by (1 - t) half.
        let passed = t * self.half;
        let (s, c) = passed.sin_cos();
        let (sp, cp) = (passed - self.half).sin_cos();
        let place = turn(self.radius.times(s + s), (sp, cp));
        // The derivative is the radius vector times the sweep, turned by (2 t - 1) half.
        let both = (s * cp + c * sp, c * cp - s * sp);
        (
            self.start.plus(place),
            turn(self.radius.times(self.half + self.half), both),
        )
    }
}

/// An elliptic arc, from its own start (which is the stored one).
pub(crate) struct Elliptic<R> {
    start: Pair<R>,
    a: Pair<R>,
    b: Pair<R>,
    from: R,
    sweep: R,
}

impl<R: Real> Elliptic<R> {
    pub(crate) fn new(ellipse: &EllipseArc, origin: DVec2) -> Self {
        Self {
            start: Pair::between(ellipse.start, origin),
            a: Pair::of(ellipse.axis_a),
            b: Pair::of(ellipse.axis_b),
            from: R::of(ellipse.from),
            sweep: R::of(ellipse.sweep),
        }
    }
}

impl<R: Real> Curve<R> for Elliptic<R> {
    fn at(&self, t: R) -> (Pair<R>, Pair<R>) {
        let half = t * self.sweep * R::of(0.5);
        let (s, c) = (self.from + half).sin_cos();
        let passed = half.sin_cos().0;
        let place = self
            .b
            .times(c)
            .minus(self.a.times(s))
            .times(passed + passed);
        let (s, c) = (self.from + half + half).sin_cos();
        let derivative = self.b.times(c).minus(self.a.times(s)).times(self.sweep);
        (self.start.plus(place), derivative)
    }
}

/// A cubic.
pub(crate) struct Cubic<R> {
    points: [Pair<R>; 4],
}

impl<R: Real> Cubic<R> {
    pub(crate) fn new(bezier: &Bezier, origin: DVec2) -> Self {
        Self {
            points: bezier.points.map(|p| Pair::between(p, origin)),
        }
    }
}

impl<R: Real> Curve<R> for Cubic<R> {
    fn at(&self, t: R) -> (Pair<R>, Pair<R>) {
        let u = R::of(1.0) - t;
        let mix = |p: Pair<R>, q: Pair<R>| p.times(u).plus(q.times(t));
        let [a, b, c, d] = self.points;
        let (ab, bc, cd) = (mix(a, b), mix(b, c), mix(c, d));
        let (abc, bcd) = (mix(ab, bc), mix(bc, cd));
        (mix(abc, bcd), bcd.minus(abc).times(R::of(3.0)))
    }
}

impl<R: Real> Cubic<R> {
    /// How it sets off where its first control point lies on its start, and arrives where its last one lies on its end: from
    /// the one control point to the other, and where they are the same along the chord.
    fn direction(&self) -> Pair<R> {
        let [a, b, c, d] = self.points;
        let (near, far) = (c.minus(b), d.minus(a));
        if near.length().rounded() == 0.0 {
            far
        } else {
            near
        }
    }
}

/// A parallel curve: base + distance times the left normal, its derivative the base's times 1 - distance * curvature.
pub(crate) struct Beside<R> {
    base: Bases<R>,
    distance: R,
}

enum Bases<R> {
    Elliptic(Elliptic<R>),
    Cubic(Cubic<R>),
}

impl<R: Real> Beside<R> {
    pub(crate) fn new(parallel: &Parallel, origin: DVec2) -> Self {
        Self {
            base: match &parallel.base {
                Base::Ellipse(ellipse) => Bases::Elliptic(Elliptic::new(ellipse, origin)),
                Base::Bezier(bezier) => Bases::Cubic(Cubic::new(bezier, origin)),
            },
            distance: R::of(parallel.distance),
        }
    }

    fn second(&self, t: R) -> Pair<R> {
        match &self.base {
            Bases::Elliptic(e) => {
                let (s, c) = (e.from + t * e.sweep).sin_cos();
                e.a.times(c).plus(e.b.times(s)).times(-(e.sweep * e.sweep))
            }
            Bases::Cubic(cubic) => {
                let [a, b, c, d] = cubic.points;
                let bend =
                    |p: Pair<R>, q: Pair<R>, r: Pair<R>| p.minus(q.times(R::of(2.0))).plus(r);
                let (first, last) = (bend(a, b, c), bend(b, c, d));
                first
                    .times(R::of(1.0) - t)
                    .plus(last.times(t))
                    .times(R::of(6.0))
            }
        }
    }
}

impl<R: Real> Curve<R> for Beside<R> {
    fn at(&self, t: R) -> (Pair<R>, Pair<R>) {
        let (place, first) = match &self.base {
            Bases::Elliptic(elliptic) => elliptic.at(t),
            Bases::Cubic(cubic) => cubic.at(t),
        };
        let second = self.second(t);
        let speed = first.length();
        if speed.rounded() == 0.0 {
            // A cubic whose control point lies on its end.
            let along = match &self.base {
                Bases::Elliptic(_) => second,
                Bases::Cubic(cubic) => cubic.direction(),
            };
            let normal = along.left().times(self.distance.over(along.length()));
            return (place.plus(normal), first);
        }
        let curvature = (first.r * second.z - first.z * second.r).over(speed * speed * speed);
        (
            place.plus(first.left().times(self.distance.over(speed))),
            first.times(R::of(1.0) - self.distance * curvature),
        )
    }
}

/// Sums `visit(place, derivative, weight)` over the edge, in the sense of the head of this file; `panels` splits the curves
/// that have no finite rule.
pub(crate) fn visit<R: Real>(
    edge: &Edge,
    origin: DVec2,
    rules: &Rules<R>,
    panels: u32,
    mut visit: impl FnMut(Pair<R>, Pair<R>, R),
) {
    let (start, end) = (
        Pair::between(edge.start(), origin),
        Pair::between(edge.end(), origin),
    );
    let mut along = |curve: &dyn Curve<R>, rule: &Rule<R>, panels: u32, sign: f64| {
        let width = R::of(1.0).over(R::of(f64::from(panels)));
        for panel in 0..panels {
            let from = R::of(f64::from(panel)) * width;
            for &(x, weight) in rule {
                let (place, derivative) = curve.at(from + x * width);
                visit(place, derivative, weight * width * R::of(sign));
            }
        }
    };
    match edge {
        Edge::Line(_) => along(&Straight::between(start, end), &rules.line, 1, 1.0),
        Edge::Arc(arc) => along(
            &Circular::new(arc, origin),
            rules.arc(arc.sweep.abs()),
            1,
            1.0,
        ),
        Edge::Bezier(bezier) => along(&Cubic::new(bezier, origin), &rules.cubic, 1, 1.0),
        Edge::Ellipse(ellipse) => {
            let curve = Elliptic::new(ellipse, origin);
            let own = Straight::between(start, curve.at(R::of(1.0)).0);
            along(&curve, rules.arc(ellipse.sweep.abs()), 1, 1.0);
            along(&own, &rules.line, 1, -1.0);
            along(&Straight::between(start, end), &rules.line, 1, 1.0);
        }
        Edge::Parallel(parallel) => {
            let curve = Beside::new(parallel, origin);
            let own = Straight::between(curve.at(R::of(0.0)).0, curve.at(R::of(1.0)).0);
            along(&curve, &rules.panel, panels, 1.0);
            along(&own, &rules.line, 1, -1.0);
            along(&Straight::between(start, end), &rules.line, 1, 1.0);
        }
    }
}
