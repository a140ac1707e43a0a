//! Pairs with known answers.

use super::{WITHIN, arc, assert_meet, bezier, ellipse, line, parallel, v};
use crate::{Edge, meetings, self_meetings};

/// Rounding of coordinates near 1, with room for a few operations.
const ROUNDING: f64 = 2e-15;

#[test]
fn lines() {
    let a = line((0.0, 0.0), (4.0, 2.0));
    assert_meet(
        &a,
        &line((1.0, 3.0), (2.0, -1.0)),
        &[(v(14.0 / 9.0, 7.0 / 9.0), true)],
        ROUNDING,
    );
    // Ends on the other, from both sides; a shared corner; beyond the end.
    assert_meet(
        &a,
        &line((2.0, 1.0), (2.0, 5.0)),
        &[(v(2.0, 1.0), false)],
        0.0,
    );
    assert_meet(
        &a,
        &line((4.0, 2.0), (5.0, 0.0)),
        &[(v(4.0, 2.0), false)],
        0.0,
    );
    assert_meet(
        &a,
        &line((4.0, 2.0), (0.0, 1.0)),
        &[(v(4.0, 2.0), false)],
        0.0,
    );
    assert_meet(&a, &line((4.1, 0.0), (4.1, 5.0)), &[], 0.0);
    assert_meet(&a, &line((0.0, 0.1), (4.0, 2.1)), &[], 0.0);
}

#[test]
fn line_and_circle() {
    let half = arc((1.0, 2.0), 5.0, -90.0, 180.0);
    // 3-4-5.
    assert_meet(
        &half,
        &line((4.0, -9.0), (4.0, 9.0)),
        &[(v(4.0, 6.0), true), (v(4.0, -2.0), true)],
        ROUNDING,
    );
    assert_meet(
        &half,
        &line((0.0, 5.0), (9.0, 5.0)),
        &[(v(5.0, 5.0), true)],
        ROUNDING,
    );
    // Touching in the middle; passing beside; the other half of the circle.
    assert_meet(
        &half,
        &line((6.0, -9.0), (6.0, 9.0)),
        &[(v(6.0, 2.0), false)],
        ROUNDING,
    );
    assert_meet(&half, &line((6.1, -9.0), (6.1, 9.0)), &[], 0.0);
    assert_meet(&half, &line((-3.0, -9.0), (-3.0, 9.0)), &[], 0.0);
}

#[test]
fn circles() {
    let a = arc((0.0, 0.0), 5.0, -90.0, 180.0);
    let b = arc((6.0, 0.0), 5.0, 90.0, 180.0);
    assert_meet(
        &a,
        &b,
        &[(v(3.0, 4.0), true), (v(3.0, -4.0), true)],
        ROUNDING,
    );
    // From outside, from inside, beside, about the same centre.
    assert_meet(
        &a,
        &arc((8.0, 0.0), 3.0, 90.0, 180.0),
        &[(v(5.0, 0.0), false)],
        ROUNDING,
    );
    assert_meet(
        &a,
        &arc((2.0, 0.0), 3.0, -90.0, 180.0),
        &[(v(5.0, 0.0), false)],
        ROUNDING,
    );
    assert_meet(&a, &arc((8.1, 0.0), 3.0, 90.0, 180.0), &[], 0.0);
    assert_meet(&a, &arc((0.0, 0.0), 4.0, -90.0, 180.0), &[], 0.0);
}

#[test]
fn flat_arcs_keep_their_digits() {
    // Chord 2, sagitta 1e-6: a radius of half a million. Over the chord y = h (1 - x^2) to 1e-18.
    let sagitta = 1e-6_f64;
    let sweep = 4.0 * crate::trig::atan(sagitta);
    let arc = |up: f64| {
        Edge::Arc(crate::Arc {
            start: v(1.0, 0.0),
            end: v(-1.0, 0.0),
            sweep: sweep * up,
        })
    };
    let at = |x: f64| sagitta * (1.0 - x * x);
    assert_meet(
        &arc(1.0),
        &line((0.25, -1.0), (0.25, 1.0)),
        &[(v(0.25, at(0.25)), true)],
        1e-16,
    );
    assert_meet(
        &arc(1.0),
        &line((-1.0, 0.0), (1.0, 0.0)),
        &[(v(1.0, 0.0), false), (v(-1.0, 0.0), false)],
        0.0,
    );
    assert_meet(
        &arc(1.0),
        &arc(-1.0),
        &[(v(1.0, 0.0), false), (v(-1.0, 0.0), false)],
        0.0,
    );
    assert_meet(
        &arc(1.0),
        &line((-1.0, sagitta), (1.0, sagitta)),
        &[(v(0.0, sagitta), false)],
        1e-15,
    );
    // The same arc turned a quarter about the origin: they cross near (h, h).
    let upright = Edge::Arc(crate::Arc {
        start: v(0.0, 1.0),
        end: v(0.0, -1.0),
        sweep: -sweep,
    });
    assert_meet(
        &arc(1.0),
        &upright,
        &[(v(at(sagitta), at(sagitta)), true)],
        1e-16,
    );
}

#[test]
fn small_beside_large() {
    // A fillet of 1 um at (1, 1), between edges a metre long: in its corners, and crossed by a third line.
    let r = 1e-6;
    let fillet = Edge::Arc(crate::Arc {
        start: v(1.0, 1.0 - r),
        end: v(1.0 - r, 1.0),
        sweep: std::f64::consts::FRAC_PI_2,
    });
    assert_meet(
        &line((1.0, 0.0), (1.0, 1.0 - r)),
        &fillet,
        &[(v(1.0, 1.0 - r), false)],
        0.0,
    );
    assert_meet(
        &line((0.0, 1.0), (1.0 - r, 1.0)),
        &fillet,
        &[(v(1.0 - r, 1.0), false)],
        0.0,
    );
    let middle = 1.0 - r + r * std::f64::consts::FRAC_1_SQRT_2;
    assert_meet(
        &line((0.0, 0.0), (2.0, 2.0)),
        &fillet,
        &[(v(middle, middle), true)],
        1e-15,
    );
}

#[test]
fn line_and_ellipse() {
    let half = ellipse((0.0, 0.0), (5.0, 3.0), 0.0, -90.0, 180.0);
    // x = 4 gives y = 3 * 3/5.
    assert_meet(
        &half,
        &line((4.0, -9.0), (4.0, 9.0)),
        &[(v(4.0, 1.8), true), (v(4.0, -1.8), true)],
        ROUNDING,
    );
    assert_meet(
        &half,
        &line((5.0, -9.0), (5.0, 9.0)),
        &[(v(5.0, 0.0), false)],
        ROUNDING,
    );
    // The tangent x/10 + y sqrt(3)/6 = 1 touches where the eccentric angle is 60 degrees.
    let (x, y) = (2.5, 1.5 * 3.0_f64.sqrt());
    let (dx, dy) = (3.0_f64.sqrt() / 6.0, -0.1);
    assert_meet(
        &half,
        &line((x - 9.0 * dx, y - 9.0 * dy), (x + 9.0 * dx, y + 9.0 * dy)),
        &[(v(x, y), false)],
        1e-14,
    );
}

#[test]
fn ellipses_at_right_angles() {
    // x2/9 + y2/4 = 1 and x2/4 + y2/9 = 1 meet where |x| = |y| = sqrt(36/13): at 45 degrees.
    let c = (36.0_f64 / 13.0).sqrt();
    let a = ellipse((0.0, 0.0), (3.0, 2.0), 0.0, 0.0, 180.0);
    let b = ellipse((0.0, 0.0), (3.0, 2.0), 90.0, -90.0, 180.0);
    assert_meet(&a, &b, &[(v(c, c), true), (v(-c, c), true)], ROUNDING);
    let lower = ellipse((0.0, 0.0), (3.0, 2.0), 0.0, 180.0, 180.0);
    assert_meet(&lower, &b, &[], 0.0);
    // Touching at the vertex (3, 0), from outside and from inside.
    let right = ellipse((0.0, 0.0), (3.0, 2.0), 0.0, -90.0, 180.0);
    assert_meet(
        &right,
        &ellipse((5.0, 0.0), (2.0, 3.0), 0.0, 90.0, 180.0),
        &[(v(3.0, 0.0), false)],
        1e-13,
    );
    assert_meet(
        &right,
        &ellipse((2.0, 0.0), (1.0, 0.5), 0.0, -90.0, 180.0),
        &[(v(3.0, 0.0), false)],
        1e-13,
    );
}

#[test]
fn ellipse_and_circle() {
    // x2/25 + y2/9 = 1 and x2 + y2 = 16: x2 = 16 - y2, 9 (16 - y2) + 25 y2 = 225, y2 = 81/16.
    let y = 9.0 / 4.0;
    let x = (16.0_f64 - y * y).sqrt();
    let half = ellipse((0.0, 0.0), (5.0, 3.0), 0.0, -90.0, 180.0);
    let circle = arc((0.0, 0.0), 4.0, -90.0, 180.0);
    assert_meet(&half, &circle, &[(v(x, y), true), (v(x, -y), true)], 8e-15);
    // The circle of curvature at the vertex (5, 0) has radius 9/5 and contact of the fourth order: from inside.
    let osculating = arc((5.0 - 1.8, 0.0), 1.8, -90.0, 180.0);
    assert_meet(&half, &osculating, &[(v(5.0, 0.0), false)], 2e-3);
    // At any other point the circle of curvature passes through.
    let (s, c) = (0.6_f64, 0.8_f64);
    let radius = (25.0 * s * s + 9.0 * c * c).sqrt() * (25.0 * s * s + 9.0 * c * c) / 15.0;
    let point = v(5.0 * c, 3.0 * s);
    let inward = -v(3.0 * c, 5.0 * s).normalize();
    let centre = point + inward * radius;
    let degrees = crate::trig::atan2(-inward.y, -inward.x).to_degrees();
    let osculating = arc((centre.x, centre.y), radius, degrees - 30.0, 60.0);
    assert_meet(&half, &osculating, &[(point, true)], 2e-4);
}

#[test]
fn parabola_and_line() {
    // y = x2 from -2 to 2.
    let parabola = Edge::Bezier(crate::Bezier::parabola(
        v(-2.0, 4.0),
        v(0.0, -4.0),
        v(2.0, 4.0),
    ));
    assert_meet(
        &parabola,
        &line((-3.0, -1.0), (3.0, 5.0)),
        &[(v(-1.0, 1.0), true), (v(2.0, 4.0), false)],
        1e-14,
    );
    assert_meet(
        &parabola,
        &line((-3.0, 2.25), (3.0, 2.25)),
        &[(v(-1.5, 2.25), true), (v(1.5, 2.25), true)],
        1e-14,
    );
    assert_meet(
        &parabola,
        &line((-3.0, 0.0), (3.0, 0.0)),
        &[(v(0.0, 0.0), false)],
        1e-14,
    );
    assert_meet(&parabola, &line((-3.0, -1e-6), (3.0, -1e-6)), &[], 0.0);
    // Nearly touching from inside: two crossings a thousandth apart.
    assert_meet(
        &parabola,
        &line((-3.0, 2.5e-7), (3.0, 2.5e-7)),
        &[(v(5e-4, 2.5e-7), true), (v(-5e-4, 2.5e-7), true)],
        1e-12,
    );
}

#[test]
fn cubic_and_its_inflection_tangent() {
    // y = x3 from -1 to 1 as a Bezier; the r axis touches it with passing.
    let cubic = bezier([
        (-1.0, -1.0),
        (-1.0 / 3.0, 1.0),
        (1.0 / 3.0, -1.0),
        (1.0, 1.0),
    ]);
    assert_meet(
        &cubic,
        &line((-1.0, 0.0), (1.0, 0.0)),
        &[(v(0.0, 0.0), true)],
        1e-4,
    );
    // y = x meets it three times.
    assert_meet(
        &cubic,
        &line((-0.5, -0.5), (2.0, 2.0)),
        &[(v(0.0, 0.0), true), (v(1.0, 1.0), false)],
        1e-14,
    );
    // Two cubics with all of Bezout's nine common points.
    let steep = |x: f64| 4.0 * x * x * x - 3.0 * x;
    let wave = bezier([
        (-1.0, -1.0),
        (-1.0 / 3.0, 5.0),
        (1.0 / 3.0, -5.0),
        (1.0, 1.0),
    ]);
    // Chebyshev's polynomial 4x3 - 3x in Bernstein form has the coefficients -1, 5, -5, 1.
    assert!((wave.point(0.3).y - steep(wave.point(0.3).x)).abs() < 1e-14);
    let Edge::Bezier(upright) = wave else {
        unreachable!()
    };
    let upright = Edge::Bezier(crate::Bezier {
        points: upright.points.map(|p| v(p.y, p.x)),
    });
    let found = meetings(&wave, &upright, WITHIN);
    assert_eq!(found.len(), 9, "{found:?}");
}

#[test]
fn parallel_curves() {
    // The curve 1 inside the ellipse 5 x 3 passes through (4, 0) and (0, 2).
    let base = ellipse((0.0, 0.0), (5.0, 3.0), 0.0, -90.0, 180.0);
    let inner = parallel(&base, 1.0);
    assert_meet(
        &inner,
        &line((0.0, 0.0), (9.0, 0.0)),
        &[(v(4.0, 0.0), true)],
        ROUNDING,
    );
    assert_meet(&inner, &base, &[], 0.0);
    // At eccentric angle u it is (5 cos u, 3 sin u) - n, n = (3 cos u, 5 sin u) / |..|.
    let (s, c) = (0.6_f64, 0.8_f64);
    let point = v(5.0 * c, 3.0 * s) - v(3.0 * c, 5.0 * s).normalize();
    assert_meet(
        &inner,
        &line((0.0, 0.0), (2.0 * point.x, 2.0 * point.y)),
        &[(point, true)],
        ROUNDING,
    );
    // A circle about the base's point with the distance as radius touches the parallel curve, from outside.
    assert_meet(
        &inner,
        &arc((5.0 * c, 3.0 * s), 1.0, 180.0, 180.0),
        &[(point, false)],
        1e-13,
    );
    // Two parallel curves of the same parabola mirrored: on the mirror line x = 0 of both.
    let parabola = Edge::Bezier(crate::Bezier::parabola(
        v(0.0, 0.0),
        v(1.0, 0.0),
        v(2.0, 2.0),
    ));
    let left = parallel(&parabola, 0.25);
    assert_meet(
        &left,
        &line((0.0, 0.25), (-1.0, 0.25)),
        &[(v(0.0, 0.25), false)],
        0.0,
    );
}

#[test]
fn smooth_neighbours_meet_in_their_corner_only() {
    let corner = v(0.3, 0.7);
    let along = v(0.8, 0.6);
    let across = crate::left_of(along);
    let start = |bend: f64| {
        let mut kinds = vec![Edge::line(corner, corner + 2.0 * along)];
        kinds.push(Edge::Bezier(crate::Bezier {
            points: [
                corner,
                corner + 0.5 * along,
                corner + along + bend * across,
                corner + 2.0 * along + bend * across,
            ],
        }));
        kinds.push(Edge::Ellipse(crate::EllipseArc {
            start: corner,
            end: corner + along + 0.5 * bend.signum() * across,
            axis_a: -0.5 * bend.signum() * across,
            axis_b: along,
            from: 0.0,
            sweep: std::f64::consts::FRAC_PI_2,
        }));
        kinds.push(Edge::Arc(crate::Arc {
            start: corner,
            end: corner + along + bend.signum() * across,
            sweep: std::f64::consts::FRAC_PI_2 * bend.signum(),
        }));
        kinds
    };
    for bend in [0.25, -0.25] {
        for after in start(bend) {
            for before in start(0.25).into_iter().chain(start(-0.5)) {
                // Mirrored through the corner: it arrives along the same direction.
                let mirrored = mirrored_through(&before, corner).reversed();
                assert_meet(&mirrored, &after, &[(corner, false)], 0.0);
            }
        }
    }
}

/// The edge turned by half a turn about `centre`.
fn mirrored_through(edge: &Edge, centre: crate::DVec2) -> Edge {
    let m = |p: crate::DVec2| 2.0 * centre - p;
    match *edge {
        Edge::Line(l) => Edge::line(m(l.start), m(l.end)),
        Edge::Arc(a) => Edge::Arc(crate::Arc {
            start: m(a.start),
            end: m(a.end),
            sweep: a.sweep,
        }),
        Edge::Ellipse(e) => Edge::Ellipse(crate::EllipseArc {
            start: m(e.start),
            end: m(e.end),
            axis_a: -e.axis_a,
            axis_b: -e.axis_b,
            ..e
        }),
        Edge::Bezier(b) => Edge::Bezier(crate::Bezier {
            points: b.points.map(m),
        }),
        Edge::Parallel(_) => unreachable!("not among the kinds"),
    }
}

/// The curvature of this Bezier is greatest in its middle, which rounding makes two cuts of.
#[test]
fn a_curve_beside_a_symmetric_bezier_does_not_meet_itself() {
    let base = bezier([(6.0, 4.0), (8.0, 4.0), (10.0, 2.0), (10.0, 0.0)]);
    for distance in [-1.0, -1e-2, -1e-4, -1e-6, 1e-6, 1e-4] {
        assert_eq!(self_meetings(&parallel(&base, distance)), []);
    }
}

/// A control point on an end: the curvature grows without bound towards it, and on the outside nothing turns back.
#[test]
fn a_curve_beside_a_bezier_that_stalls_in_an_end_is_legal_on_the_outside() {
    let base = bezier([(1.0, 0.0), (1.7, 0.2), (1.2, 1.0), (1.2, 1.0)]);
    for base in [base, base.reversed()] {
        let outside = if base.start().x == 1.0 { -1.0 } else { 1.0 };
        for (distance, is_legal) in [(outside * 1e-2, true), (outside * -1e-2, false)] {
            let Edge::Parallel(parallel) = parallel(&base, distance) else {
                panic!("a curve beside a Bezier is a parallel curve");
            };
            assert_eq!(parallel.least_speed_ratio().0 > 0.0, is_legal);
        }
    }
}

#[test]
fn a_loop_meets_itself() {
    // Symmetric about x = 0: B(t0).x = B(1 - t0).x = 0.
    let looped = bezier([(-1.0, 0.0), (3.0, 4.0), (-3.0, 4.0), (1.0, 0.0)]);
    let found = self_meetings(&looped);
    assert_eq!(found.len(), 1);
    let (t0, t1) = found[0];
    assert!((t0 + t1 - 1.0).abs() < 1e-15);
    assert!(looped.point(t0).distance(looped.point(t1)) < 1e-15);
    assert!(looped.point(t0).x.abs() < 1e-15);
    assert!(self_meetings(&bezier([(-1.0, 0.0), (-1.0, 1.0), (1.0, 1.0), (1.0, 0.0)])).is_empty());
    assert!(self_meetings(&bezier([(0.0, 0.0), (1.0, 0.0), (2.0, 0.0), (3.0, 0.0)])).is_empty());
    // Straight out to x = 2 1/4 and back to 0: x = 9 t (1 - t).
    let found = self_meetings(&bezier([(0.0, 0.0), (3.0, 0.0), (3.0, 0.0), (0.0, 0.0)]));
    assert_eq!(found.len(), 1);
    assert!(found[0].0.abs() < 1e-12 && (found[0].1 - 1.0).abs() < 1e-12);
    // Out to the turn and half the way back.
    let found = self_meetings(&bezier([(0.0, 0.0), (3.0, 0.0), (3.0, 0.0), (1.0, 0.0)]));
    assert_eq!(found.len(), 1);
    let (t0, t1) = found[0];
    assert_eq!(t1, 1.0);
    assert!(t0 > 0.0);
}

#[test]
fn a_parallel_curve_beyond_the_radius_of_curvature_meets_itself() {
    // Of the parabola y = x2 the radius of curvature is 1/2 at its vertex; at distance 2 inside it has a swallow's tail.
    let parabola = Edge::Bezier(crate::Bezier::parabola(
        v(-2.0, 4.0),
        v(0.0, -4.0),
        v(2.0, 4.0),
    ));
    let tail = parallel(&parabola, 2.0);
    let found = self_meetings(&tail);
    assert_eq!(found.len(), 1, "{found:?}");
    let (t0, t1) = found[0];
    assert!((t0 + t1 - 1.0).abs() < 1e-12);
    // On the axis: x - 2 * 2x / sqrt(1 + 4 x2) = 0, x2 = 15/4.
    let point = tail.point(t0);
    assert!(point.x.abs() < 1e-14);
    assert!((point.y - (3.75 + 2.0 / 4.0)).abs() < 1e-13);
    assert!(self_meetings(&parallel(&parabola, 0.49)).is_empty());
    assert!(self_meetings(&parallel(&parabola, -2.0)).is_empty());
}

#[test]
fn a_swallows_tail_of_any_size_is_found_once() {
    // The parabola's radius of curvature is 1/2 at its vertex: from there on the tail grows, its height with
    // the square: at 1e-8 it is below rounding.
    let parabola = Edge::Bezier(crate::Bezier::parabola(
        v(-2.0, 4.0),
        v(0.0, -4.0),
        v(2.0, 4.0),
    ));
    for exponent in 0..8 {
        let beyond = crate::trig::pow(10.0, -f64::from(exponent));
        let found = self_meetings(&parallel(&parabola, 0.5 + beyond));
        assert_eq!(found.len(), 1, "{beyond:e} {found:?}");
    }
}
