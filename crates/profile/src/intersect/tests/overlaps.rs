//! Edges that run along each other.

use super::super::{Meeting, meetings};
use super::{WITHIN, arc, assert_meet, bezier, ellipse, line, parallel, v};
use crate::{Arc, Edge, EllipseArc};

/// Asserts one overlap with these ends on the first edge, and that both parameters of each end give the same point.
fn assert_overlap(a: &Edge, b: &Edge, on_a: [f64; 2], opposite: bool) {
    for (first, second) in [(a, b), (b, a)] {
        let found = meetings(first, second, WITHIN);
        let [
            Meeting::Overlap {
                a: on_first,
                b: on_second,
            },
        ] = found[..]
        else {
            panic!("{first:?}\n{second:?}\n{found:?}");
        };
        assert!(on_first[0] < on_first[1]);
        assert_eq!(on_second[0] > on_second[1], opposite, "{found:?}");
        for (t, s) in on_first.into_iter().zip(on_second) {
            assert!(
                first.point(t).distance(second.point(s)) <= 2.0 * WITHIN,
                "{found:?}"
            );
        }
        if first == a {
            for (t, expected) in on_first.into_iter().zip(on_a) {
                assert!((t - expected).abs() < 1e-11, "{found:?} {on_a:?}");
            }
        }
    }
}

/// Every way in which two parts of one edge can lie along it.
fn assert_parts_overlap(whole: &Edge) {
    assert_overlap(whole, whole, [0.0, 1.0], false);
    assert_overlap(whole, &whole.reversed(), [0.0, 1.0], true);
    let inside = whole.part(0.3, 0.6);
    assert_overlap(whole, &inside, [0.3, 0.6], false);
    assert_overlap(whole, &inside.reversed(), [0.3, 0.6], true);
    let (first, last) = (whole.part(0.0, 0.7), whole.part(0.4, 1.0));
    assert_overlap(&first, &last, [0.4 / 0.7, 1.0], false);
    assert_overlap(&first, &last.reversed(), [0.4 / 0.7, 1.0], true);
    // End to end: one shared corner. Apart: nothing.
    let (first, last) = (whole.part(0.0, 0.5), whole.part(0.5, 1.0));
    assert_meet(&first, &last, &[(whole.point(0.5), false)], 1e-15);
    assert_meet(
        &first,
        &last.reversed(),
        &[(whole.point(0.5), false)],
        1e-15,
    );
    assert_meet(&whole.part(0.0, 0.4), &whole.part(0.5, 1.0), &[], 0.0);
}

#[test]
fn parts_of_one_edge() {
    assert_parts_overlap(&line((0.1, 0.2), (0.9, 0.5)));
    assert_parts_overlap(&arc((0.2, 0.1), 0.7, 20.0, 140.0));
    assert_parts_overlap(&arc((0.2, 0.1), 0.7, 20.0, -180.0));
    assert_parts_overlap(&ellipse((0.2, 0.1), (0.9, 0.4), 25.0, -70.0, 130.0));
    assert_parts_overlap(&ellipse((0.2, 0.1), (0.9, 0.4), 25.0, -70.0, -180.0));
    let cubic = bezier([(0.0, 0.0), (0.3, 0.8), (0.7, -0.4), (1.0, 0.2)]);
    assert_parts_overlap(&cubic);
    assert_parts_overlap(&parallel(&cubic, 0.02));
    assert_parts_overlap(&parallel(
        &ellipse((0.0, 0.0), (0.9, 0.4), 10.0, 0.0, 150.0),
        -0.3,
    ));
}

#[test]
fn a_flat_arc_and_its_parts() {
    let flat = Edge::Arc(Arc {
        start: v(0.0, 0.0),
        end: v(1.0, 0.2),
        sweep: 1e-6,
    });
    assert_parts_overlap(&flat);
    // A line along its chord is 1e-7 off in the middle: only the ends are shared.
    assert_meet(
        &flat,
        &line((0.0, 0.0), (1.0, 0.2)),
        &[(v(0.0, 0.0), false), (v(1.0, 0.2), false)],
        0.0,
    );
}

#[test]
fn the_same_curve_as_another_kind() {
    // A circle as an ellipse, a line as a Bezier, a parallel of a circular ellipse as an arc, of a straight Bezier as a line.
    let circle = arc((0.1, 0.2), 0.8, 0.0, 120.0);
    let as_ellipse = ellipse((0.1, 0.2), (0.8, 0.8), 0.0, 30.0, 120.0);
    assert_overlap(&circle, &as_ellipse, [0.25, 1.0], false);
    let straight = bezier([(0.0, 0.0), (0.2, 0.1), (0.7, 0.35), (1.0, 0.5)]);
    assert_overlap(&line((0.0, 0.0), (2.0, 1.0)), &straight, [0.0, 0.5], false);
    let outer = arc((0.1, 0.2), 1.0, 0.0, 120.0);
    assert_overlap(
        &outer,
        &parallel(&as_ellipse.reversed(), 0.2),
        [0.25, 1.0],
        true,
    );
    let beside = parallel(&straight, 0.5_f64.sqrt());
    let shift = v(-0.5, 1.0) * (0.5_f64.sqrt() / 1.25_f64.sqrt());
    assert_overlap(
        &Edge::line(shift, shift + v(2.0, 1.0)),
        &beside,
        [0.0, 0.5],
        false,
    );
    // One ellipse by different conjugate half-diameters.
    let (s, c) = crate::trig::sin_cos(0.7);
    let Edge::Ellipse(e) = ellipse((0.0, 0.0), (0.9, 0.4), 25.0, 0.0, 100.0) else {
        unreachable!()
    };
    let other = Edge::Ellipse(EllipseArc {
        axis_a: c * e.axis_a + s * e.axis_b,
        axis_b: c * e.axis_b - s * e.axis_a,
        from: e.from - 0.7,
        ..e
    });
    assert_overlap(&Edge::Ellipse(e), &other, [0.0, 1.0], false);
}

#[test]
fn nearly_coincident_is_not_coincident() {
    // A thousandth of a micrometre apart.
    assert_meet(
        &arc((0.0, 0.0), 0.5, 0.0, 90.0),
        &arc((0.0, 0.0), 0.5 + 1e-9, 0.0, 90.0),
        &[],
        0.0,
    );
    let e = ellipse((0.0, 0.0), (0.5, 0.3), 0.0, 0.0, 90.0);
    assert_meet(&e, &parallel(&e, 1e-9), &[], 0.0);
    // Moved along by 1e-9 an ellipse meets itself near its vertex.
    let found = meetings(
        &ellipse((0.0, 0.0), (0.5, 0.3), 0.0, 0.0, 180.0),
        &e.moved(v(1e-9, 0.0)),
        WITHIN,
    );
    assert!(found.len() <= 1, "{found:?}");
    // Two lines at a millionth of a degree cross in one point.
    assert_meet(
        &line((0.0, 0.0), (1.0, 0.0)),
        &line((0.0, -1e-8), (1.0, 1e-8)),
        &[(v(0.5, 0.0), true)],
        1e-7,
    );
}
