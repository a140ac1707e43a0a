//! One piece of an outline, of any kind.

use crate::{Arc, Base, Bezier, Bounds, EllipseArc, Line, Parallel, left_of};
use glam::DVec2;

/// One piece of an outline. The parameter t runs from 0 at the start to 1 at the end.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Edge {
    /// A straight edge.
    Line(Line),
    /// A circular arc of at most half a turn.
    Arc(Arc),
    /// An elliptic arc of at most half a turn.
    Ellipse(EllipseArc),
    /// A cubic Bezier.
    Bezier(Bezier),
    /// A curve parallel to an elliptic arc or a Bezier.
    Parallel(Parallel),
}

impl Edge {
    /// A straight edge.
    pub fn line(start: DVec2, end: DVec2) -> Self {
        Self::Line(Line { start, end })
    }

    /// Where it starts.
    pub fn start(&self) -> DVec2 {
        match self {
            Self::Line(line) => line.start,
            Self::Arc(arc) => arc.start,
            Self::Ellipse(ellipse) => ellipse.start,
            Self::Bezier(bezier) => bezier.points[0],
            Self::Parallel(parallel) => parallel.start,
        }
    }

    /// Where it ends.
    pub fn end(&self) -> DVec2 {
        match self {
            Self::Line(line) => line.end,
            Self::Arc(arc) => arc.end,
            Self::Ellipse(ellipse) => ellipse.end,
            Self::Bezier(bezier) => bezier.points[3],
            Self::Parallel(parallel) => parallel.end,
        }
    }

    /// Vector from start to end.
    pub fn chord(&self) -> DVec2 {
        self.end() - self.start()
    }

    /// Point at `t`; the ends are returned bit for bit.
    pub fn point(&self, t: f64) -> DVec2 {
        match self {
            Self::Line(line) => line.point(t),
            Self::Arc(arc) => arc.point(t),
            Self::Ellipse(ellipse) => ellipse.point(t),
            Self::Bezier(bezier) => bezier.point(t),
            Self::Parallel(parallel) => parallel.point(t),
        }
    }

    /// Derivative of the point with respect to `t`.
    pub fn derivative(&self, t: f64) -> DVec2 {
        match self {
            Self::Line(line) => line.chord(),
            Self::Arc(arc) => arc.derivative(t),
            Self::Ellipse(ellipse) => ellipse.derivative(t),
            Self::Bezier(bezier) => bezier.derivative(t),
            Self::Parallel(parallel) => parallel.derivative(t),
        }
    }

    /// Unit direction of travel at `t`. Where a Bezier's derivative vanishes (a control point on its end), the limit.
    pub fn tangent(&self, t: f64) -> DVec2 {
        match self {
            Self::Bezier(bezier) => bezier.tangent(t),
            Self::Parallel(parallel) => parallel.base.edge().tangent(t),
            _ => self.derivative(t).normalize(),
        }
    }

    /// Curvature at `t` in 1/m: positive where the edge turns to the left.
    pub fn curvature(&self, t: f64) -> f64 {
        let of = |first: DVec2, second: DVec2| {
            first.perp_dot(second) / (first.length_squared() * first.length())
        };
        match self {
            Self::Line(_) => 0.0,
            Self::Arc(arc) => arc.sweep.signum() / arc.radius(),
            Self::Ellipse(ellipse) => of(ellipse.derivative(t), ellipse.second_derivative(t)),
            Self::Bezier(bezier) => of(bezier.derivative(t), bezier.second_derivative(t)),
            Self::Parallel(parallel) => {
                let base = parallel.base.edge().curvature(t);
                base / (1.0 - parallel.distance * base)
            }
        }
    }

    /// The same points, travelled the other way.
    #[must_use]
    pub fn reversed(&self) -> Self {
        match *self {
            Self::Line(Line { start, end }) => Self::line(end, start),
            Self::Arc(Arc { start, end, sweep }) => Self::Arc(Arc {
                start: end,
                end: start,
                sweep: -sweep,
            }),
            Self::Ellipse(ellipse) => Self::Ellipse(reversed_ellipse(ellipse)),
            Self::Bezier(bezier) => Self::Bezier(reversed_bezier(bezier)),
            Self::Parallel(parallel) => Self::Parallel(Parallel {
                base: match parallel.base {
                    Base::Ellipse(ellipse) => Base::Ellipse(reversed_ellipse(ellipse)),
                    Base::Bezier(bezier) => Base::Bezier(reversed_bezier(bezier)),
                },
                distance: -parallel.distance,
                start: parallel.end,
                end: parallel.start,
            }),
        }
    }

    /// The part from `t0` to `t1`, 0 <= t0 < t1 <= 1.
    #[must_use]
    pub fn part(&self, t0: f64, t1: f64) -> Self {
        match self {
            Self::Line(line) => Self::line(line.point(t0), line.point(t1)),
            Self::Arc(arc) => Self::Arc(arc.part(t0, t1)),
            Self::Ellipse(ellipse) => Self::Ellipse(ellipse.part(t0, t1)),
            Self::Bezier(bezier) => Self::Bezier(bezier.part(t0, t1)),
            Self::Parallel(parallel) => Self::Parallel(parallel.part(t0, t1)),
        }
    }

    /// The same edge with ends that differ from its own by rounding only, so that neighbours share them bit for bit.
    #[must_use]
    pub fn with_ends(mut self, start: DVec2, end: DVec2) -> Self {
        match &mut self {
            Self::Line(line) => (line.start, line.end) = (start, end),
            Self::Arc(arc) => (arc.start, arc.end) = (start, end),
            Self::Ellipse(ellipse) => (ellipse.start, ellipse.end) = (start, end),
            Self::Bezier(bezier) => (bezier.points[0], bezier.points[3]) = (start, end),
            Self::Parallel(parallel) => (parallel.start, parallel.end) = (start, end),
        }
        self
    }

    /// The edge moved by `shift`.
    #[must_use]
    pub fn moved(&self, shift: DVec2) -> Self {
        let bezier = |b: Bezier| Bezier {
            points: b.points.map(|p| p + shift),
        };
        let ellipse = |e: EllipseArc| EllipseArc {
            start: e.start + shift,
            end: e.end + shift,
            ..e
        };
        match *self {
            Self::Line(line) => Self::line(line.start + shift, line.end + shift),
            Self::Arc(arc) => Self::Arc(Arc {
                start: arc.start + shift,
                end: arc.end + shift,
                sweep: arc.sweep,
            }),
            Self::Ellipse(e) => Self::Ellipse(ellipse(e)),
            Self::Bezier(b) => Self::Bezier(bezier(b)),
            Self::Parallel(parallel) => Self::Parallel(Parallel {
                base: match parallel.base {
                    Base::Ellipse(e) => Base::Ellipse(ellipse(e)),
                    Base::Bezier(b) => Base::Bezier(bezier(b)),
                },
                distance: parallel.distance,
                start: parallel.start + shift,
                end: parallel.end + shift,
            }),
        }
    }

    /// The edge at `distance` to the left (to the right where negative): of a line a line, of an arc an arc, of the
    /// others a [`Parallel`]. `None` where the distance reaches an arc's centre or passes it; for the others the caller
    /// asks whether the result runs forward (1 - distance * curvature > 0).
    pub fn offset(&self, distance: f64) -> Option<Self> {
        Some(match *self {
            Self::Line(line) => Self::Line(line.offset(distance)),
            Self::Arc(arc) => Self::Arc(arc.offset(distance)?),
            Self::Ellipse(ellipse) => {
                Self::Parallel(Parallel::new(Base::Ellipse(ellipse), distance))
            }
            Self::Bezier(bezier) => Self::Parallel(Parallel::new(Base::Bezier(bezier), distance)),
            Self::Parallel(parallel) => {
                let mut further = Parallel::new(parallel.base, parallel.distance + distance);
                further.start = parallel.start + left_of(self.tangent(0.0)) * distance;
                further.end = parallel.end + left_of(self.tangent(1.0)) * distance;
                Self::Parallel(further)
            }
        })
    }

    /// The least box that holds it, exact up to rounding.
    pub fn bounds(&self) -> Bounds {
        match self {
            Self::Line(line) => line.bounds(),
            Self::Arc(arc) => arc.bounds(),
            Self::Ellipse(ellipse) => ellipse.bounds(),
            Self::Bezier(bezier) => bezier.bounds(),
            Self::Parallel(parallel) => parallel.bounds(),
        }
    }
}

fn reversed_ellipse(e: EllipseArc) -> EllipseArc {
    EllipseArc {
        start: e.end,
        end: e.start,
        from: e.from + e.sweep,
        sweep: -e.sweep,
        ..e
    }
}

fn reversed_bezier(b: Bezier) -> Bezier {
    let [p, q, r, s] = b.points;
    Bezier {
        points: [s, r, q, p],
    }
}
