//! Edges that no part has: whatever is asked of them ends, and does not panic.

use super::super::{meetings, self_meetings};
use crate::{
    Arc, Base, Bezier, DVec2, Edge, EllipseArc, Grow, Parallel, chamfer_corner, round_corner, wall,
};
use proptest::prelude::*;

fn number() -> BoxedStrategy<f64> {
    let special = [
        0.0,
        1.0,
        -1.0,
        0.5,
        1e308,
        -1e308,
        1e-308,
        1e200,
        1e-200,
        1e-17,
        1.0 + f64::EPSILON,
        f64::NAN,
        f64::INFINITY,
        f64::NEG_INFINITY,
    ];
    // Kept on the heap: the type of a whole edge's strategy would not fit on a test's stack.
    prop_oneof![2 => -1.0..1.0_f64, 1 => prop::sample::select(special.to_vec())].boxed()
}

fn point() -> impl Strategy<Value = DVec2> {
    (number(), number()).prop_map(|(x, y)| DVec2::new(x, y))
}

fn ellipse() -> impl Strategy<Value = EllipseArc> {
    (point(), point(), point(), point(), number(), number()).prop_map(
        |(start, end, axis_a, axis_b, from, sweep)| EllipseArc {
            start,
            end,
            axis_a,
            axis_b,
            from: 3.0 * from,
            sweep: 3.0 * sweep,
        },
    )
}

fn bezier() -> impl Strategy<Value = Bezier> {
    [point(), point(), point(), point()].prop_map(|points| Bezier { points })
}

fn edge() -> impl Strategy<Value = Edge> {
    prop_oneof![
        (point(), point()).prop_map(|(a, b)| Edge::line(a, b)),
        (point(), point(), number()).prop_map(|(start, end, sweep)| Edge::Arc(Arc {
            start,
            end,
            sweep: 3.0 * sweep
        })),
        ellipse().prop_map(Edge::Ellipse),
        bezier().prop_map(Edge::Bezier),
        (ellipse(), number()).prop_map(|(e, d)| Edge::Parallel(Parallel::new(Base::Ellipse(e), d))),
        (bezier(), number()).prop_map(|(b, d)| Edge::Parallel(Parallel::new(Base::Bezier(b), d))),
    ]
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 2000, ..ProptestConfig::default() })]

    #[test]
    fn questions_end(a in edge(), b in edge(), size in number()) {
        let started = std::time::Instant::now();
        for (first, second) in [(&a, &b), (&b, &a), (&a, &a)] {
            prop_assert!(meetings(first, second, size.abs().min(1e-9)).len() < 10_000);
        }
        prop_assert!(self_meetings(&a).len() < 100_000);
        let joined = b.with_ends(a.end(), b.end());
        // An answer of any kind will do.
        let _fillet = round_corner(&a, &joined, size);
        let _chamfer = chamfer_corner(&a, &joined, size, 0.1);
        for grow in [Grow::Left, Grow::Right, Grow::Both] {
            let _wall = wall(&[(a, 0), (joined, 1)], size, grow, [2, 3]);
        }
        // Far above what any of them takes, far below what a hang would.
        prop_assert!(started.elapsed().as_secs_f64() < 20.0, "{a:?} {b:?}");
    }
}
