//! Random outlines for tests: star-shaped about a point, hence simple, of all kinds of edge.

use crate::{Arc, Base, Bezier, DVec2, Edge, EllipseArc, Loop, Parallel, Region, left_of, trig};
use proptest::prelude::*;
use std::f64::consts::TAU;

/// What one edge of a star is made from; numbers between 0 and 1.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Ray {
    kind: u8,
    radius: f64,
    spread: f64,
    bulge: [f64; 2],
}

fn ray() -> impl Strategy<Value = Ray> {
    (0_u8..6, 0.0..1.0, 0.0..1.0, [0.0..1.0, 0.0..1.0]).prop_map(|(kind, radius, spread, bulge)| {
        Ray {
            kind,
            radius,
            spread,
            bulge,
        }
    })
}

/// Rays of a star.
pub(crate) fn rays() -> impl Strategy<Value = Vec<Ray>> {
    prop::collection::vec(ray(), 7..24)
}

/// A star-shaped loop, counter-clockwise, between `size` / 2 and `size` about `centre`.
///
/// Every edge's control points have growing angles about the centre, all edges being rational Beziers with positive weights;
/// so the angle grows along every edge (variation-diminishing property) and the loop is simple.
pub(crate) fn star(rays: &[Ray], centre: DVec2, size: f64) -> Loop {
    // With seven or more rays the widest angle between neighbours is a fifth of a turn.
    let total: f64 = rays.iter().map(|ray| 1.0 + 0.5 * ray.spread).sum();
    let mut angle = 0.3;
    let mut corners = Vec::new();
    for ray in rays {
        corners.push((angle, ray.radius));
        angle += TAU * (1.0 + 0.5 * ray.spread) / total;
    }
    let at =
        |(angle, radius): (f64, f64)| centre + trig::direction(angle) * size * (0.5 + 0.5 * radius);
    let edges = rays.iter().enumerate().map(|(i, ray)| {
        let from = corners[i];
        let to = if i + 1 < corners.len() {
            corners[i + 1]
        } else {
            (corners[0].0 + TAU, corners[0].1)
        };
        let next = corners[(i + 1) % corners.len()];
        let control = |part: f64, radius: f64| at((from.0 + part * (to.0 - from.0), radius));
        let edge = edge(
            ray,
            to.0 - from.0,
            [at(from), at(next)],
            [
                control(0.3, ray.bulge[0]),
                control(0.5, 0.5 * (ray.bulge[0] + ray.bulge[1])),
                control(0.7, ray.bulge[1]),
            ],
        );
        (edge, u32::try_from(i).unwrap())
    });
    Loop::new(edges.collect::<Vec<_>>()).unwrap()
}

fn edge(
    ray: &Ray,
    width: f64,
    [start, end]: [DVec2; 2],
    [first, middle, last]: [DVec2; 3],
) -> Edge {
    let chord = end - start;
    let bezier = Bezier {
        points: [start, first, last, end],
    };
    match ray.kind {
        0 => Edge::line(start, end),
        1 => Edge::Arc(Arc {
            start,
            end,
            // In proportion to the star's angle here, so that the tangents meet well inside it.
            sweep: 0.9 * (ray.bulge[0] - 0.5) * width,
        }),
        2 => Edge::Ellipse(through_apex(start, middle, end, 0.2 + ray.bulge[0])),
        3 => Edge::Bezier(bezier),
        4 => beside(
            Base::Bezier(bezier),
            (ray.bulge[1] - 0.5) * 0.02 * chord.length(),
        ),
        _ => beside(
            Base::Ellipse(through_apex(start, middle, end, 0.4)),
            (ray.bulge[1] - 0.5) * 0.02 * chord.length(),
        ),
    }
}

/// The elliptic arc whose end tangents meet in `apex` and that spans twice `half` in eccentric angle.
fn through_apex(start: DVec2, apex: DVec2, end: DVec2, half: f64) -> EllipseArc {
    let (sin, cos) = trig::sin_cos(half);
    let middle = 0.5 * (start + end);
    EllipseArc {
        start,
        end,
        axis_a: (apex - middle) * (cos / (sin * sin)),
        axis_b: (end - start) / (2.0 * sin),
        from: -half,
        sweep: 2.0 * half,
    }
}

/// The curve at `distance` from `base` moved so that it joins the base's ends in the same directions; the base itself
/// where that would turn back.
fn beside(base: Base, distance: f64) -> Edge {
    let curve = base.edge();
    let (from, to) = (curve.tangent(0.0), curve.tangent(1.0));
    let (start, end) = (
        curve.start() - left_of(from) * distance,
        curve.end() - left_of(to) * distance,
    );
    let moved = match base {
        Base::Bezier(bezier) => {
            let [a, b, c, d] = bezier.points;
            Base::Bezier(Bezier {
                points: [start, b + (start - a), c + (end - d), end],
            })
        }
        Base::Ellipse(arc) => {
            let apex = start + from * ((end - start).perp_dot(to) / from.perp_dot(to));
            Base::Ellipse(through_apex(start, apex, end, 0.5 * arc.sweep))
        }
    };
    let parallel = Parallel::new(moved, distance);
    let missed = (parallel.start - curve.start()).length() + (parallel.end - curve.end()).length();
    if parallel.least_speed_ratio().0 > 0.2 && missed < 1e-14 * curve.bounds().max.length() {
        Edge::Parallel(parallel).with_ends(curve.start(), curve.end())
    } else {
        curve
    }
}

/// A star-shaped region with a smaller star as its void.
pub(crate) fn ring(outer: &[Ray], inner: &[Ray], centre: DVec2, size: f64) -> Region {
    Region {
        outer: star(outer, centre, size),
        voids: vec![star(inner, centre, 0.3 * size).reversed()],
    }
}
