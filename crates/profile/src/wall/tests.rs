//! Walls with known outlines, and their thickness by measurement.

use super::{Grow, WallFault, wall};
use crate::{Arc, Base, Bezier, DVec2, Edge, EllipseArc, Loop, trig};
use std::f64::consts::{FRAC_PI_2, PI};

const ENDS: [u32; 2] = [100, 200];

fn v(x: f64, y: f64) -> DVec2 {
    DVec2::new(x, y)
}

/// The edges with their indices as tags.
fn face(edges: impl IntoIterator<Item = Edge>) -> Vec<(Edge, u32)> {
    edges.into_iter().zip(0..).collect()
}

/// Straight edges through these points.
fn chain(points: &[(f64, f64)]) -> Vec<(Edge, u32)> {
    face(
        points
            .windows(2)
            .map(|pair| Edge::line(v(pair[0].0, pair[0].1), v(pair[1].0, pair[1].1))),
    )
}

fn assert_corners(outline: &Loop, expected: &[(f64, f64)]) {
    let corners: Vec<DVec2> = outline.edges().iter().map(Edge::start).collect();
    assert_eq!(corners.len(), expected.len(), "{corners:?}");
    for (corner, (x, y)) in corners.iter().zip(expected) {
        assert!(
            corner.distance(v(*x, *y)) < 1e-14,
            "{corners:?}\n{expected:?}"
        );
    }
}

/// Least distance of a point from the face: from its edges between them and from its corners.
fn distance(face: &[(Edge, u32)], point: DVec2) -> f64 {
    face.iter()
        .map(|(edge, _)| {
            let at = |i: u32| edge.point(f64::from(i) / 400.0).distance(point);
            let guess = (0..=400)
                .min_by(|i, k| at(*i).total_cmp(&at(*k)))
                .unwrap_or(0);
            // Between the samples beside the nearest by golden section: a minimum's place to 1e-8, its value to 1e-16.
            let (mut low, mut high) = (
                (f64::from(guess) - 1.0).max(0.0) / 400.0,
                (f64::from(guess) + 1.0).min(400.0) / 400.0,
            );
            let off = |t: f64| edge.point(t).distance(point);
            for _ in 0..60 {
                let (a, b) = (
                    high - 0.618_034 * (high - low),
                    low + 0.618_034 * (high - low),
                );
                if off(a) < off(b) {
                    high = b;
                } else {
                    low = a;
                }
            }
            off(0.5 * (low + high)).min(off(0.0)).min(off(1.0))
        })
        .fold(f64::INFINITY, f64::min)
}

/// Asserts that every offset edge lies at its distance from the face all along; edges that run on past a corner (tags
/// given) may be further off.
fn assert_thickness(face: &[(Edge, u32)], outline: &Loop, thickness: f64, run_on: &[u32]) {
    let mut count = 0;
    for (edge, tag) in outline.edges().iter().zip(outline.tags()) {
        if ENDS.contains(tag)
            || face
                .iter()
                .any(|(own, _)| own == edge || own.reversed() == *edge)
        {
            continue;
        }
        for i in 0..=40 {
            let off = distance(face, edge.point(f64::from(i) / 40.0));
            if run_on.contains(tag) {
                assert!(off >= thickness - 1e-12, "{off} {tag} {edge:?}");
            } else {
                assert!(
                    (off - thickness).abs() < 1e-12,
                    "{:e} {tag} {edge:?}",
                    off - thickness
                );
            }
            count += 1;
        }
    }
    assert!(count > 0);
}

#[test]
fn a_plate_to_the_left_to_the_right_and_to_both_sides() {
    let line = chain(&[(1.0, 0.0), (5.0, 3.0)]);
    let left = wall(&line, 0.5, Grow::Left, ENDS).unwrap();
    assert_corners(&left, &[(1.0, 0.0), (5.0, 3.0), (4.7, 3.4), (0.7, 0.4)]);
    assert_eq!(left.tags(), [0, 200, 0, 100]);
    let right = wall(&line, 0.5, Grow::Right, ENDS).unwrap();
    assert_corners(&right, &[(1.3, -0.4), (5.3, 2.6), (5.0, 3.0), (1.0, 0.0)]);
    let both = wall(&line, 1.0, Grow::Both, ENDS).unwrap();
    assert_corners(&both, &[(1.3, -0.4), (5.3, 2.6), (4.7, 3.4), (0.7, 0.4)]);
    for (outline, area) in [(left, 2.5), (right, 2.5), (both, 5.0)] {
        assert!((outline.signed_area() - area).abs() < 1e-14);
    }
}

#[test]
fn an_angle_is_trimmed_inside_and_mitred_outside() {
    let angle = chain(&[(1.0, 4.0), (1.0, 1.0), (6.0, 1.0)]);
    // It turns left: inner side left.
    let inner = wall(&angle, 0.5, Grow::Left, ENDS).unwrap();
    assert_corners(
        &inner,
        &[
            (1.0, 4.0),
            (1.0, 1.0),
            (6.0, 1.0),
            (6.0, 1.5),
            (1.5, 1.5),
            (1.5, 4.0),
        ],
    );
    let outer = wall(&angle, 0.5, Grow::Right, ENDS).unwrap();
    assert_corners(
        &outer,
        &[
            (0.5, 4.0),
            (0.5, 0.5),
            (6.0, 0.5),
            (6.0, 1.0),
            (1.0, 1.0),
            (1.0, 4.0),
        ],
    );
    assert_eq!(outer.tags(), [0, 1, 200, 1, 0, 100]);
    assert!((inner.signed_area() - 3.75).abs() < 1e-14);
    assert!((outer.signed_area() - 4.25).abs() < 1e-14);
}

#[test]
fn a_sharp_corner_is_rounded_outside() {
    // 20 degrees between the edges: the mitre would be 5.8 offsets long.
    let tip = trig::direction(20.0_f64.to_radians()) * 5.0;
    let sharp = chain(&[(5.0, 0.0), (0.0, 0.0), (tip.x, tip.y)]);
    let outline = wall(&sharp, 0.2, Grow::Left, ENDS).unwrap();
    let arcs: Vec<&Edge> = outline
        .edges()
        .iter()
        .filter(|edge| matches!(edge, Edge::Arc(_)))
        .collect();
    let [Edge::Arc(arc)] = arcs[..] else {
        panic!("{outline:?}")
    };
    assert!((arc.radius() - 0.2).abs() < 1e-15);
    assert!(arc.centre().length() < 1e-15);
    assert!((arc.sweep.abs() - 160.0_f64.to_radians()).abs() < 1e-15);
    assert_thickness(&sharp, &outline, 0.2, &[]);
    // At 30 degrees it is mitred.
    let tip = trig::direction(30.0_f64.to_radians()) * 5.0;
    let outline = wall(
        &chain(&[(5.0, 0.0), (0.0, 0.0), (tip.x, tip.y)]),
        0.2,
        Grow::Left,
        ENDS,
    )
    .unwrap();
    assert_eq!(outline.edges().len(), 6);
}

#[test]
fn a_bowl_of_arcs_and_lines() {
    // From the axis: flat bottom, a knuckle, a straight side, a bead, all smooth.
    let bowl = face([
        Edge::line(v(0.0, 0.0), v(3.0, 0.0)),
        Edge::Arc(Arc {
            start: v(3.0, 0.0),
            end: v(4.0, 1.0),
            sweep: FRAC_PI_2,
        }),
        Edge::line(v(4.0, 1.0), v(4.0, 3.0)),
        Edge::Arc(Arc {
            start: v(4.0, 3.0),
            end: v(5.0, 4.0),
            sweep: -FRAC_PI_2,
        }),
    ]);
    for (grow, inner) in [(Grow::Left, 0.9), (Grow::Right, 1.1)] {
        let outline = wall(&bowl, 0.1, grow, ENDS).unwrap();
        assert_thickness(&bowl, &outline, 0.1, &[]);
        // Area: thickness times the length of the middle line.
        let length = 3.0 + 2.0 + FRAC_PI_2 * (1.0 + inner) / 2.0 + FRAC_PI_2 * (3.0 - inner) / 2.0;
        assert!((outline.signed_area() - 0.1 * length).abs() < 1e-14);
        assert!(
            outline
                .edges()
                .iter()
                .filter(|e| e.start().x == 0.0)
                .count()
                == 2
        );
    }
    let both = wall(&bowl, 0.1, Grow::Both, ENDS).unwrap();
    assert_thickness(&bowl, &both, 0.05, &[]);
    let fault = wall(&bowl, 1.0, Grow::Left, ENDS).unwrap_err();
    let WallFault::TooThick {
        index: 1,
        point,
        least_radius,
    } = fault
    else {
        panic!("{fault:?}")
    };
    assert_eq!(point, bowl[1].0.point(0.5));
    assert!((least_radius - 1.0).abs() < 1e-15);
    assert!(wall(&bowl, 0.999_999, Grow::Left, ENDS).is_ok());
    assert!(matches!(
        wall(&bowl, 1.5, Grow::Right, ENDS),
        Err(WallFault::TooThick { index: 3, .. })
    ));
}

#[test]
fn a_dish_of_an_ellipse_and_a_reflector_of_a_parabola() {
    let dish = face([Edge::Ellipse(EllipseArc::quarter(
        v(0.0, 0.0),
        v(2.0, 1.0),
        true,
    ))]);
    let reflector = face([Edge::Bezier(Bezier::parabola(
        v(0.0, 0.0),
        v(1.0, 0.0),
        v(2.0, 2.0),
    ))]);
    for face in [&dish, &reflector] {
        for grow in [Grow::Left, Grow::Right] {
            let outline = wall(face, 0.1, grow, ENDS).unwrap();
            assert_thickness(face, &outline, 0.1, &[]);
            // It starts square to the axis: r is 0 to the last bit.
            assert_eq!(
                outline
                    .edges()
                    .iter()
                    .filter(|e| e.start().x == 0.0)
                    .count(),
                2
            );
            assert!(outline.signed_area() > 0.1);
        }
    }
    // The ellipse's least radius of curvature is b2 / a at the end of its long axis; the parabola's, z = r2 / 2, 1 at its
    // vertex.
    for (face, radius, at) in [(&dish, 0.5, v(2.0, 1.0)), (&reflector, 1.0, v(0.0, 0.0))] {
        assert!(wall(face, radius * 0.999_999, Grow::Left, ENDS).is_ok());
        let fault = wall(face, radius * 1.01, Grow::Left, ENDS).unwrap_err();
        let WallFault::TooThick {
            index: 0,
            point,
            least_radius,
        } = fault
        else {
            panic!("{fault:?}")
        };
        assert!((least_radius - radius).abs() < 1e-14);
        assert!(point.distance(at) < 1e-14);
        assert!(wall(face, radius * 1.01, Grow::Right, ENDS).is_ok());
    }
}

#[test]
fn corners_between_curves() {
    // A line into an ellipse into a Bezier into an arc, with corners to both sides.
    let ellipse = EllipseArc::quarter(v(2.0, 1.0), v(3.0, 3.0), true);
    let mixed = face([
        Edge::line(v(1.0, 3.0), v(2.0, 1.0)),
        Edge::Ellipse(ellipse),
        Edge::Bezier(Bezier {
            points: [v(3.0, 3.0), v(3.5, 2.8), v(4.0, 2.5), v(4.5, 3.0)],
        }),
        Edge::Arc(Arc {
            start: v(4.5, 3.0),
            end: v(5.5, 2.0),
            sweep: -1.0,
        }),
    ]);
    for grow in [Grow::Left, Grow::Right, Grow::Both] {
        let outline = wall(&mixed, 0.1, grow, ENDS).unwrap();
        let offset = if grow == Grow::Both { 0.05 } else { 0.1 };
        assert_thickness(&mixed, &outline, offset, &[]);
        assert!(outline.signed_area() > 0.0);
    }
    // Round about the corners on their outer sides, with the tag of the edge before.
    let outline = wall(&mixed, 0.1, Grow::Right, ENDS).unwrap();
    let rounds = |tag: u32| {
        let of_tag = outline.edges().iter().zip(outline.tags());
        of_tag
            .filter(|(edge, of)| {
                **of == tag && matches!(edge, Edge::Arc(arc) if (arc.radius() - 0.1).abs() < 1e-14)
            })
            .count()
    };
    assert_eq!(rounds(0), 1);
}

#[test]
fn arcs_and_lines_run_on_to_a_mitre() {
    // A line along r meets a circle about (0, 3) at 3-4-5, from inside; outside they run on.
    let mixed = face([
        Edge::line(v(1.0, 0.0), v(4.0, 0.0)),
        Edge::Arc(Arc::about(v(4.0, 0.0), v(5.0, 3.0), v(0.0, 3.0), true)),
    ]);
    let outline = wall(&mixed, 0.5, Grow::Right, ENDS).unwrap();
    // The line at z = -0.5 and the circle of radius 5.5 meet at r2 = 5.5^2 - 3.5^2 = 18.
    let corner = outline.edges()[0].end();
    assert!(corner.distance(v(18.0_f64.sqrt(), -0.5)) < 2e-15);
    assert_thickness(&mixed, &outline, 0.5, &[0, 1]);
    let outline = wall(&mixed, 0.5, Grow::Left, ENDS).unwrap();
    // Inside: z = 0.5 and radius 4.5.
    let corner = outline.edges()[4].start();
    assert!(
        corner.distance(v((20.25_f64 - 6.25).sqrt(), 0.5)) < 2e-15,
        "{corner}"
    );
    assert_thickness(&mixed, &outline, 0.5, &[]);
}

#[test]
fn hollow_cones_close_on_the_axis() {
    // 3-4-5: rising by 3 over 4. The other side's tip is 0.5 * 5/4 above or below.
    let cone = chain(&[(0.0, 0.0), (4.0, 3.0)]);
    let left = wall(&cone, 0.5, Grow::Left, ENDS).unwrap();
    assert_corners(&left, &[(0.0, 0.0), (4.0, 3.0), (3.7, 3.4), (0.0, 0.625)]);
    let right = wall(&cone, 0.5, Grow::Right, ENDS).unwrap();
    assert_corners(&right, &[(0.0, -0.625), (4.3, 2.6), (4.0, 3.0), (0.0, 0.0)]);
    let both = wall(&cone, 1.0, Grow::Both, ENDS).unwrap();
    assert_corners(
        &both,
        &[(0.0, -0.625), (4.3, 2.6), (3.7, 3.4), (0.0, 0.625)],
    );
    // Travelled to the axis.
    let back = face([cone[0].0.reversed()]);
    let left = wall(&back, 0.5, Grow::Left, ENDS).unwrap();
    assert_corners(&left, &[(4.0, 3.0), (0.0, 0.0), (0.0, -0.625), (4.3, 2.6)]);
    for outline in [left, right, both] {
        assert!(outline.edges().iter().all(|edge| edge.start().x >= 0.0));
    }
}

#[test]
fn pointed_domes_close_on_the_axis() {
    // An ogive: an arc that leaves the axis upward at 45 degrees, bent to the right; the same as ellipse and Bezier.
    let arc = Edge::Arc(Arc {
        start: v(0.0, 0.0),
        end: v(2.0, 1.0),
        sweep: -0.6,
    });
    let bezier = Edge::Bezier(Bezier::parabola(v(0.0, 0.0), v(1.0, 1.0), v(2.0, 1.2)));
    let ellipse = Edge::Ellipse(EllipseArc {
        start: v(0.0, 0.0),
        end: v(2.0, 1.0),
        axis_a: v(-2.0, 0.0),
        axis_b: v(0.0, 1.0),
        from: 0.0,
        sweep: FRAC_PI_2,
    })
    .part(0.3, 1.0);
    let ellipse = ellipse.moved(v(-ellipse.start().x, 0.0));
    for edge in [arc, bezier, ellipse] {
        let dome = face([edge]);
        for grow in [Grow::Left, Grow::Right, Grow::Both] {
            let outline = wall(&dome, 0.1, grow, ENDS).unwrap();
            let offset = if grow == Grow::Both { 0.05 } else { 0.1 };
            assert_thickness(&dome, &outline, offset, &[0]);
            // The end lies on the axis.
            let end = outline
                .edges()
                .iter()
                .zip(outline.tags())
                .find(|(_, tag)| **tag == ENDS[0])
                .unwrap()
                .0;
            assert!(end.start().x == 0.0 && end.end().x == 0.0);
            assert!(
                outline
                    .edges()
                    .iter()
                    .all(|edge| edge.bounds().min.x >= 0.0)
            );
            assert!(outline.signed_area() > 0.0);
        }
    }
    // What runs along the axis keeps its square end.
    let rod = chain(&[(0.0, 0.0), (0.0, 3.0)]);
    let outline = wall(&rod, 0.5, Grow::Right, ENDS).unwrap();
    assert_corners(&outline, &[(0.5, 0.0), (0.5, 3.0), (0.0, 3.0), (0.0, 0.0)]);
    assert!(matches!(
        wall(&rod, 0.5, Grow::Left, ENDS),
        Err(WallFault::TooShort { index: 0, .. })
    ));
}

#[test]
fn a_bend_over_a_short_edge_leaves_it_out() {
    // A chamfered angle: inside, a chamfer shorter than 2 * thickness * tan(22.5 degrees) vanishes.
    let angle = chain(&[(0.5, 4.0), (0.5, 1.0), (1.0, 0.5), (6.0, 0.5)]);
    let chamfer = 0.5_f64.sqrt();
    let limit = 0.5 * chamfer / trig::tan(PI / 8.0);
    let kept = wall(&angle, limit * 0.99, Grow::Left, ENDS).unwrap();
    assert_eq!(kept.edges().len(), 8);
    for thickness in [limit * 1.01, 1.5] {
        let outline = wall(&angle, thickness, Grow::Left, ENDS).unwrap();
        let at = 0.5 + thickness;
        assert_corners(
            &outline,
            &[
                (0.5, 4.0),
                (0.5, 1.0),
                (1.0, 0.5),
                (6.0, 0.5),
                (6.0, at),
                (at, at),
                (at, 4.0),
            ],
        );
        assert_eq!(outline.tags(), [0, 1, 2, 200, 2, 0, 100]);
    }
    // A slot narrower than twice the thickness has no room.
    let slot = chain(&[(1.0, 5.0), (1.0, 1.0), (2.0, 1.0), (2.0, 5.0)]);
    assert!(matches!(
        wall(&slot, 0.6, Grow::Left, ENDS),
        Err(WallFault::TooShort { .. })
    ));
    assert!(wall(&slot, 0.4, Grow::Left, ENDS).is_ok());
    assert!(wall(&slot, 0.6, Grow::Right, ENDS).is_ok());
    // A step with corners to both sides: its edge cannot vanish.
    let step = chain(&[(1.0, 3.0), (1.0, 1.0), (1.3, 1.0), (1.3, 0.0)]);
    assert!(matches!(
        wall(&step, 0.5, Grow::Left, ENDS),
        Err(WallFault::TooShort { .. })
    ));
}

#[test]
fn what_makes_no_wall_is_told() {
    let line = chain(&[(1.0, 0.0), (5.0, 3.0)]);
    for thickness in [0.0, -1.0, f64::NAN, f64::INFINITY] {
        assert_eq!(
            wall(&line, thickness, Grow::Left, ENDS),
            Err(WallFault::NotALength)
        );
    }
    assert_eq!(wall(&[], 1.0, Grow::Left, ENDS), Err(WallFault::Empty));
    let open = face([
        Edge::line(v(1.0, 0.0), v(2.0, 0.0)),
        Edge::line(v(2.1, 0.0), v(3.0, 0.0)),
    ]);
    assert_eq!(wall(&open, 0.1, Grow::Left, ENDS), Err(WallFault::Gap(0)));
    let back = chain(&[(1.0, 0.0), (5.0, 3.0), (1.0, 0.0)]);
    assert!(matches!(
        wall(&back, 0.1, Grow::Left, ENDS),
        Err(WallFault::TurnsBack { index: 0, .. })
    ));
    // A cusp has no radius.
    let cusp = face([Edge::Bezier(Bezier {
        points: [v(1.0, 0.0), v(3.0, 1.0), v(1.0, 1.0), v(3.0, 0.0)],
    })]);
    let fault = wall(&cusp, 0.01, Grow::Right, ENDS).unwrap_err();
    assert!(
        matches!(fault, WallFault::TooThick { least_radius, .. } if least_radius < 0.01),
        "{fault:?}"
    );
}

#[test]
fn a_wall_of_a_wall() {
    // The offset of an offset face is the offset by the sum.
    let dish = face([Edge::Ellipse(EllipseArc::quarter(
        v(1.0, 0.0),
        v(3.0, 1.0),
        true,
    ))]);
    let offset = dish[0].0.offset(-0.2).unwrap();
    let outline = wall(&face([offset]), 0.1, Grow::Right, ENDS).unwrap();
    assert_thickness(
        &dish,
        &wall(&dish, 0.3, Grow::Right, ENDS).unwrap(),
        0.3,
        &[],
    );
    let outer = outline.edges()[0];
    let Edge::Parallel(parallel) = outer else {
        panic!("{outer:?}")
    };
    assert!(matches!(parallel.base, Base::Ellipse(_)));
    assert!((parallel.distance + 0.3).abs() < 1e-16);
}
