//! Fillets and chamfers of known size, and between all pairs of kinds.

use super::{CornerFault, Treated, chamfer_corner, round_corner};
use crate::{Arc, Base, Bezier, DVec2, Edge, EllipseArc, Parallel, left_of, trig};
use std::f64::consts::FRAC_PI_2;

fn v(x: f64, y: f64) -> DVec2 {
    DVec2::new(x, y)
}

fn line(a: (f64, f64), b: (f64, f64)) -> Edge {
    Edge::line(v(a.0, a.1), v(b.0, b.1))
}

/// The arc of a fillet.
fn fillet(treated: &Treated) -> Arc {
    let Edge::Arc(arc) = treated.corner else {
        panic!("{treated:?}")
    };
    arc
}

/// Asserts that the three edges share their ends bit for bit and that the outer ends are those of the two edges.
fn assert_joined(treated: &Treated, before: &Edge, after: &Edge) {
    if let Some(rest) = treated.before {
        assert_eq!(rest.start(), before.start());
        assert_eq!(rest.end(), treated.corner.start());
    } else {
        assert_eq!(treated.corner.start(), before.start());
    }
    if let Some(rest) = treated.after {
        assert_eq!(rest.start(), treated.corner.end());
        assert_eq!(rest.end(), after.end());
    } else {
        assert_eq!(treated.corner.end(), after.end());
    }
}

/// Edges of each kind that leave `corner` along `direction`, about 1 long, bent to the left (`bend` > 0) or right.
fn leaving(corner: DVec2, direction: DVec2, bend: f64) -> Vec<Edge> {
    let across = left_of(direction) * bend;
    let bezier = |corner: DVec2| Bezier {
        points: [
            corner,
            corner + 0.4 * direction,
            corner + 0.7 * direction + 0.1 * across,
            corner + direction + 0.3 * across,
        ],
    };
    let ellipse = |corner: DVec2| EllipseArc {
        start: corner,
        end: corner + direction + 0.6 * across,
        axis_a: -0.6 * across,
        axis_b: direction,
        from: 0.0,
        sweep: FRAC_PI_2,
    };
    let beside = |base: &dyn Fn(DVec2) -> Base, distance: f64| {
        let shift = left_of(direction) * distance;
        let parallel = Parallel::new(base(corner - shift), distance);
        Edge::Parallel(parallel).with_ends(corner, parallel.end)
    };
    vec![
        Edge::line(corner, corner + direction),
        Edge::Arc(Arc {
            start: corner,
            end: corner + direction + across,
            sweep: FRAC_PI_2 * bend.signum(),
        }),
        Edge::Ellipse(ellipse(corner)),
        Edge::Bezier(bezier(corner)),
        beside(&|corner| Base::Ellipse(ellipse(corner)), 0.1),
        beside(&|corner| Base::Bezier(bezier(corner)), -0.07),
    ]
}

/// Edges of each kind that arrive at `corner` along `direction`.
fn arriving(corner: DVec2, direction: DVec2, bend: f64) -> Vec<Edge> {
    leaving(corner, -direction, -bend)
        .iter()
        .map(Edge::reversed)
        .collect()
}

/// Least distance of the point from the edge by sampling.
fn distance(edge: &Edge, point: DVec2) -> f64 {
    (0..=2000)
        .map(|i| edge.point(f64::from(i) / 2000.0).distance(point))
        .fold(f64::INFINITY, f64::min)
}

#[test]
fn fillets_touch_edges_of_every_kind() {
    let corner = v(0.31, -0.17);
    let mut count = 0;
    for turn in [0.3, 1.2, FRAC_PI_2, 2.4, -0.7, -2.0] {
        for (bend_before, bend_after) in [(1.0, 1.0), (1.0, -1.0), (-1.0, 1.0), (-1.0, -1.0)] {
            let direction = trig::direction(0.4);
            for before in arriving(corner, direction, bend_before) {
                for after in leaving(corner, trig::turned(direction, turn), bend_after) {
                    for radius in [0.05, 1e-3] {
                        let treated = round_corner(&before, &after, radius).unwrap();
                        assert_joined(&treated, &before, &after);
                        let arc = fillet(&treated);
                        assert!(
                            (arc.radius() / radius - 1.0).abs() < 1e-11,
                            "{} {radius}",
                            arc.radius()
                        );
                        assert_eq!(arc.sweep > 0.0, turn > 0.0);
                        let (rest_before, rest_after) =
                            (treated.before.unwrap(), treated.after.unwrap());
                        let along = |a: DVec2, b: DVec2| trig::angle_between(a, b).abs();
                        assert!(along(rest_before.tangent(1.0), arc.start_direction()) < 1e-11);
                        let end_direction = trig::turned(arc.start_direction(), arc.sweep);
                        assert!(along(rest_after.tangent(0.0), end_direction) < 1e-11);
                        // It touches the whole edges from inside, and the ends lie on them.
                        for edge in [&before, &after] {
                            assert!(distance(edge, arc.centre()) > radius * (1.0 - 1e-11));
                        }
                        assert!(
                            distance(&before, arc.start) < 1e-3 && distance(&after, arc.end) < 1e-3
                        );
                        count += 1;
                    }
                }
            }
        }
    }
    assert_eq!(count, 6 * 4 * 6 * 6 * 2);
}

#[test]
fn a_fillet_of_a_micrometre_on_a_metre() {
    let radius = 1e-6;
    let corner = v(1.0, 1.0);
    for after in leaving(corner, trig::direction(2.0), 1.0) {
        for before in arriving(corner, trig::direction(0.5), 1.0) {
            let treated = round_corner(&before, &after, radius).unwrap();
            assert_joined(&treated, &before, &after);
            let arc = fillet(&treated);
            // Near the corner the edges are straight, to a part of 1e-6: the legs are radius * tan(turn / 2).
            let leg = radius * trig::tan(0.75);
            for end in [arc.start, arc.end] {
                assert!((end.distance(corner) / leg - 1.0).abs() < 4e-6);
            }
            // The coordinates are rounded to 1e-16 of the part: 1e-10 of the radius.
            assert!((arc.radius() / radius - 1.0).abs() < 1e-9);
            assert!((arc.sweep - 1.5).abs() < 4e-6);
        }
    }
    let treated = round_corner(
        &line((0.0, 1.0), (1.0, 1.0)),
        &line((1.0, 1.0), (1.0, 2.0)),
        radius,
    )
    .unwrap();
    let arc = fillet(&treated);
    assert_eq!(arc.sweep, FRAC_PI_2);
    assert!((arc.start - v(1.0 - radius, 1.0)).length() < 2e-16);
    assert!((arc.end - v(1.0, 1.0 + radius)).length() < 3e-16);
}

#[test]
fn a_fillet_between_straight_edges_has_a_closed_form() {
    // 3-4-5: the turn has tangent 4/3, half of it 1/2.
    let before = line((0.0, 0.0), (10.0, 0.0));
    let after = line((10.0, 0.0), (16.0, 8.0));
    let arc = fillet(&round_corner(&before, &after, 4.0).unwrap());
    assert!((arc.start - v(8.0, 0.0)).length() < 4e-15);
    assert!((arc.end - v(11.2, 1.6)).length() < 4e-15);
    assert!((arc.centre() - v(8.0, 4.0)).length() < 4e-15);
    let fault = round_corner(&before, &after, 21.0).unwrap_err();
    let CornerFault::TooLarge {
        largest: Some(largest),
        on_before: true,
        on_after: true,
    } = fault
    else {
        panic!("{fault:?}")
    };
    assert!((largest - 20.0).abs() < 1e-13);
    let short = line((10.0, 0.0), (13.0, 4.0));
    let fault = round_corner(&before, &short, 11.0).unwrap_err();
    assert!(
        matches!(
            fault,
            CornerFault::TooLarge {
                on_before: false,
                on_after: true,
                ..
            }
        ),
        "{fault:?}"
    );
}

#[test]
fn a_fillet_between_a_line_and_a_circle_has_a_closed_form() {
    // The circle of radius 5 about the origin arrives at (4, 3) from below; the line leaves to the left at height 3.
    let before = Edge::Arc(Arc::about(v(4.0, -3.0), v(4.0, 3.0), DVec2::ZERO, true));
    let after = line((4.0, 3.0), (-9.0, 3.0));
    // Inside both: centre 1 below the line, 4 from the origin.
    let arc = fillet(&round_corner(&before, &after, 1.0).unwrap());
    let centre = v(12.0_f64.sqrt(), 2.0);
    assert!((arc.centre() - centre).length() < 4e-15);
    assert!((arc.start - centre * 1.25).length() < 4e-15);
    assert!((arc.end - v(centre.x, 3.0)).length() < 4e-15);
    // The largest touches the arc in its start: the centre lies on the radius to (4, -3), r below the line.
    let fault = round_corner(&before, &after, 4.9).unwrap_err();
    let CornerFault::TooLarge {
        largest: Some(largest),
        on_before,
        on_after,
    } = fault
    else {
        panic!("{fault:?}")
    };
    // 3 - r = -3/5 (5 - r) gives r = 15/4.
    assert!((largest - 3.75).abs() < 1e-8, "{largest}");
    assert!(on_before && !on_after);
}

#[test]
fn a_plate_rounded_from_both_sides_loses_its_end() {
    // 0.1 + 0.2 is not 0.3: the end's half thickness differs from the radius by rounding.
    let thickness = 0.1 + 0.2;
    let upper = line((0.0, thickness), (1.0, thickness));
    let end = line((1.0, thickness), (1.0, 0.0));
    let lower = line((1.0, 0.0), (0.0, 0.0));
    for radius in [0.15, 0.5 * thickness] {
        let first = round_corner(&upper, &end, radius).unwrap();
        let rest = first.after.unwrap();
        let second = round_corner(&rest, &lower, radius).unwrap();
        assert!(second.before.is_none());
        assert_joined(&second, &rest, &lower);
        assert_eq!(first.corner.end(), second.corner.start());
        assert!((fillet(&second).radius() - radius).abs() < 1e-15);
    }
    // The same with a chamfer, and with curved edges.
    let first = chamfer_corner(&upper, &end, 0.3, 0.15).unwrap();
    let second = chamfer_corner(&first.after.unwrap(), &lower, 0.15, 0.3).unwrap();
    assert!(second.before.is_none());
    assert!(second.after.is_some());
    let dome = Edge::Bezier(Bezier::parabola(v(1.0, 0.0), v(0.5, -0.5), v(0.0, 0.0)));
    let rest = first.after.unwrap();
    let second = chamfer_corner(&rest, &dome, 0.15, 0.3).unwrap();
    assert!(second.before.is_none());
    assert_joined(&second, &rest, &dome);
}

#[test]
fn chamfers_of_every_kind_have_their_legs() {
    let corner = v(0.31, -0.17);
    for turn in [0.3, 2.4, -0.7] {
        for before in arriving(corner, DVec2::X, 1.0) {
            for after in leaving(corner, trig::direction(turn), -1.0) {
                let treated = chamfer_corner(&before, &after, 0.2, 0.1).unwrap();
                assert_joined(&treated, &before, &after);
                let cut = treated.corner;
                assert!((cut.start().distance(corner) - 0.2).abs() < 1e-14);
                assert!((cut.end().distance(corner) - 0.1).abs() < 1e-14);
                assert!(distance(&before, cut.start()) < 1e-3);
                assert!(distance(&after, cut.end()) < 1e-3);
                // All of the edge and no more.
                let all = chamfer_corner(&before, &after, before.chord().length(), 0.1).unwrap();
                assert!(all.before.is_none());
                let fault = chamfer_corner(&before, &after, 3.0, 0.1).unwrap_err();
                let CornerFault::TooLarge {
                    largest: Some(largest),
                    on_before: true,
                    on_after: false,
                } = fault
                else {
                    panic!("{fault:?}")
                };
                assert!((largest - before.chord().length()).abs() < 1e-9);
            }
        }
    }
}

#[test]
fn what_is_no_corner_is_told() {
    let before = line((0.0, 0.0), (1.0, 0.0));
    assert_eq!(
        round_corner(&before, &line((1.0, 0.0), (2.0, 0.0)), 0.1),
        Err(CornerFault::NoCorner)
    );
    assert_eq!(
        chamfer_corner(&before, &line((1.0, 0.0), (0.5, 0.0)), 0.1, 0.1),
        Err(CornerFault::TurnsBack)
    );
    for radius in [0.0, -1.0, f64::NAN, f64::INFINITY] {
        let after = line((1.0, 0.0), (1.0, 1.0));
        assert_eq!(
            round_corner(&before, &after, radius),
            Err(CornerFault::NotALength)
        );
        assert_eq!(
            chamfer_corner(&before, &after, 0.1, radius),
            Err(CornerFault::NotALength)
        );
    }
}

#[test]
fn a_fillet_larger_than_the_hollow_is_refused_with_the_largest() {
    // Inside the hollow of a parabola with radius of curvature 1/2 at its vertex, against a wall at x = 1.
    let before = Edge::Bezier(Bezier::parabola(v(-2.0, 4.0), v(-0.5, -2.0), v(1.0, 1.0)));
    let after = line((1.0, 1.0), (1.0, 9.0));
    let fault = round_corner(&before, &after, 2.0).unwrap_err();
    let CornerFault::TooLarge {
        largest: Some(largest),
        ..
    } = fault
    else {
        panic!("{fault:?}")
    };
    let treated = round_corner(&before, &after, largest).unwrap();
    let arc = fillet(&treated);
    assert!((arc.radius() / largest - 1.0).abs() < 1e-10);
    assert!(round_corner(&before, &after, largest * (1.0 + 1e-6)).is_err());
}
