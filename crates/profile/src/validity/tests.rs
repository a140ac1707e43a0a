//! Good shapes are accepted, each bad one is told what is wrong with it.

use super::*;
use crate::samples::{rays, star};
use crate::{Arc, Base, Bezier, Edge, EllipseArc, Parallel, Region, trig};
use glam::DVec2;
use proptest::prelude::*;
use std::f64::consts::PI;

type Corners<'a> = &'a [(f64, f64)];

/// A polygon; the tag of each edge is a hundred and its index.
fn polygon(corners: Corners) -> Loop {
    let edge = |i: usize| {
        Edge::line(
            DVec2::from(corners[i]),
            DVec2::from(corners[(i + 1) % corners.len()]),
        )
    };
    tagged((0..corners.len()).map(edge).collect())
}

fn tagged(edges: Vec<Edge>) -> Loop {
    Loop::new(edges.into_iter().zip(100..)).unwrap()
}

fn arc(start: (f64, f64), end: (f64, f64), sweep: f64) -> Edge {
    Edge::Arc(Arc {
        start: start.into(),
        end: end.into(),
        sweep,
    })
}

fn line(start: (f64, f64), end: (f64, f64)) -> Edge {
    Edge::line(start.into(), end.into())
}

fn bezier(points: [(f64, f64); 4]) -> Edge {
    Edge::Bezier(Bezier {
        points: points.map(DVec2::from),
    })
}

fn square(r: f64, z: f64, side: f64) -> Loop {
    polygon(&[(r, z), (r + side, z), (r + side, z + side), (r, z + side)])
}

fn of_outline(outline: Loop) -> Vec<RegionFault> {
    Region::new(outline, Vec::new()).err().unwrap_or_default()
}

fn of_voids(voids: Vec<Loop>) -> Vec<RegionFault> {
    Region::new(square(1.0, 0.0, 10.0), voids)
        .err()
        .unwrap_or_default()
}

/// The only fault, told in few words: its kind, its edges' indices, its place.
fn told(faults: &[RegionFault]) -> (&'static str, Vec<usize>, (f64, f64)) {
    let [fault] = faults else {
        panic!("one fault expected: {faults:?}");
    };
    for edge in fault.edges() {
        assert_eq!(edge.tag as usize, 100 + edge.edge);
    }
    let kind = match fault {
        RegionFault::NotFinite { .. } => "not finite",
        RegionFault::TooLarge { .. } => "too large",
        RegionFault::TooSmall { .. } => "too small",
        RegionFault::NoLength { .. } => "no length",
        RegionFault::Crosses { .. } => "crosses",
        RegionFault::Touches { .. } => "touches",
        RegionFault::RunsAlong { .. } => "runs along",
        RegionFault::CrossesItself { .. } => "crosses itself",
        RegionFault::TurnsBack { .. } => "turns back",
        RegionFault::BelowAxis { .. } => "below axis",
        RegionFault::NoArea { .. } => "no area",
        RegionFault::VoidOutside { .. } => "void outside",
        RegionFault::VoidInVoid { .. } => "void in void",
        RegionFault::TooIntricate { .. } => "too intricate",
    };
    let place = fault.place().unwrap_or(DVec2::ZERO);
    let rounded = |x: f64| (x * 1e9).round() / 1e9;
    (
        kind,
        fault.edges().map(|edge| edge.edge).collect(),
        (rounded(place.x), rounded(place.y)),
    )
}

#[test]
fn a_bow_tie_crosses() {
    let faults = of_outline(polygon(&[(1.0, 0.0), (3.0, 2.0), (3.0, 0.0), (1.0, 2.0)]));
    assert_eq!(told(&faults), ("crosses", vec![0, 2], (2.0, 1.0)));
}

#[test]
fn a_bow_tie_with_its_knot_in_a_corner_crosses() {
    // The crossing is a corner of one chain, of both chains, or neither's.
    let knot = (2.0, 1.0);
    let one = polygon(&[(1.0, 0.0), knot, (3.0, 2.0), (3.0, 0.0), (1.0, 2.0)]);
    assert_eq!(told(&of_outline(one)), ("crosses", vec![0, 3], knot));
    let both = polygon(&[(1.0, 0.0), knot, (3.0, 2.0), (3.0, 0.0), knot, (1.0, 2.0)]);
    assert_eq!(told(&of_outline(both)), ("crosses", vec![0, 3], knot));
}

#[test]
fn loops_that_touch_in_a_corner_touch() {
    // Two squares that share a corner, run round as one loop.
    let knot = (2.0, 2.0);
    let faults = of_outline(polygon(&[
        (1.0, 1.0),
        (2.0, 1.0),
        knot,
        (3.0, 2.0),
        (3.0, 3.0),
        (2.0, 3.0),
        knot,
        (1.0, 2.0),
    ]));
    assert_eq!(told(&faults), ("touches", vec![1, 5], knot));
    // A corner on the middle of an edge.
    let faults = of_outline(polygon(&[
        (1.0, 0.0),
        (4.0, 0.0),
        (4.0, 3.0),
        (2.0, 0.0),
        (1.0, 3.0),
    ]));
    assert_eq!(told(&faults), ("touches", vec![0, 2], (2.0, 0.0)));
}

#[test]
fn a_corner_nearer_than_rounding_touches() {
    let notched = |gap: f64| {
        of_outline(polygon(&[
            (1.0, 0.0),
            (4.0, 0.0),
            (4.0, 3.0),
            (2.0, gap),
            (1.0, 3.0),
        ]))
    };
    assert_eq!(told(&notched(1e-12)).0, "touches");
    assert_eq!(notched(1e-10), vec![]);
}

#[test]
fn spikes_run_along() {
    let spike = of_outline(polygon(&[
        (1.0, 0.0),
        (3.0, 0.0),
        (3.0, 1.0),
        (5.0, 1.0),
        (2.0, 1.0),
        (1.0, 1.0),
    ]));
    // The spike, and the edge that it comes back on to.
    assert_eq!(told(&spike), ("runs along", vec![2, 3], (3.0, 1.0)));
    let arcs = of_outline(tagged(vec![
        line((1.0, 0.0), (4.0, 0.0)),
        arc((4.0, 0.0), (4.0, 2.0), PI),
        arc((4.0, 2.0), (5.0, 1.0), -0.5 * PI),
        line((5.0, 1.0), (1.0, 1.0)),
        line((1.0, 1.0), (1.0, 0.0)),
    ]));
    assert!(
        arcs.iter().any(
            |fault| matches!(fault, RegionFault::RunsAlong { first, second, .. }
            if (first.edge, second.edge) == (1, 2))
        ),
        "{arcs:?}"
    );
}

#[test]
fn a_loop_there_and_back_runs_along() {
    let there_and_back = tagged(vec![
        bezier([(1.0, 0.0), (2.0, 3.0), (4.0, 1.0), (5.0, 2.0)]),
        bezier([(5.0, 2.0), (4.0, 1.0), (2.0, 3.0), (1.0, 0.0)]),
    ]);
    assert_eq!(
        told(&of_outline(there_and_back)),
        ("runs along", vec![0, 1], (1.0, 0.0))
    );
}

#[test]
fn edges_side_by_side_run_along() {
    // A U whose arms lie against each other for a while.
    let faults = of_outline(polygon(&[
        (1.0, 0.0),
        (6.0, 0.0),
        (6.0, 5.0),
        (3.0, 5.0),
        (3.0, 2.0),
        (2.0, 2.0),
        (2.0, 3.0),
        (3.0, 3.0),
        (3.0, 4.0),
        (1.0, 4.0),
    ]));
    assert_eq!(told(&faults), ("runs along", vec![3, 7], (3.0, 4.0)));
}

#[test]
fn arcs_that_touch_from_outside_touch() {
    let pinched = |half_gap: f64| {
        of_outline(tagged(vec![
            line((1.0, -2.0), (7.0, -2.0)),
            line((7.0, -2.0), (7.0, -half_gap)),
            line((7.0, -half_gap), (5.0, -half_gap - 1.0)),
            arc((5.0, -half_gap - 1.0), (3.0, -half_gap - 1.0), PI),
            line((3.0, -half_gap - 1.0), (2.0, -1.5)),
            line((2.0, -1.5), (2.0, 1.5)),
            line((2.0, 1.5), (3.0, half_gap + 1.0)),
            arc((3.0, half_gap + 1.0), (5.0, half_gap + 1.0), PI),
            line((5.0, half_gap + 1.0), (7.0, half_gap)),
            line((7.0, half_gap), (7.0, 2.0)),
            line((7.0, 2.0), (1.0, 2.0)),
            line((1.0, 2.0), (1.0, -2.0)),
        ]))
    };
    let touching = pinched(0.0);
    assert!(
        touching.iter().any(
            |fault| matches!(fault, RegionFault::Touches { first, second, at }
            if (first.edge, second.edge) == (3, 7) && at.distance(DVec2::new(4.0, 0.0)) < 1e-9)
        ),
        "{touching:?}"
    );
    assert_eq!(pinched(1e-9), vec![]);
}

#[test]
fn neighbours_that_meet_again_cross() {
    // A line that the arc after it crosses on its way round.
    let faults = of_outline(tagged(vec![
        line((1.0, 0.0), (5.0, 0.0)),
        arc((5.0, 0.0), (2.0, -0.5), 3.0),
        line((2.0, -0.5), (1.0, -3.0)),
        line((1.0, -3.0), (1.0, 0.0)),
    ]));
    let (kind, edges, _) = told(&faults);
    assert_eq!((kind, edges), ("crosses", vec![0, 1]));
}

#[test]
fn an_edge_that_crosses_itself_or_turns_back() {
    let looped = of_outline(tagged(vec![
        bezier([(2.0, 1.0), (9.0, 5.0), (-3.0, 5.0), (4.0, 1.0)]),
        line((4.0, 1.0), (3.0, 0.0)),
        line((3.0, 0.0), (2.0, 1.0)),
    ]));
    let (kind, edges, place) = told(&looped);
    assert_eq!((kind, edges, place.0), ("crosses itself", vec![0], 3.0));
    let straight = of_outline(tagged(vec![
        bezier([(2.0, 1.0), (6.0, 1.0), (6.0, 1.0), (4.0, 1.0)]),
        line((4.0, 1.0), (3.0, 0.0)),
        line((3.0, 0.0), (2.0, 1.0)),
    ]));
    let (kind, edges, place) = told(&straight);
    assert_eq!((kind, edges, place.1), ("turns back", vec![0], 1.0));
    assert!(place.0 > 4.5, "{place:?}");
}

#[test]
fn a_parallel_curve_beyond_the_centre_of_curvature_turns_back() {
    let base = EllipseArc {
        start: DVec2::new(4.0, 1.0),
        end: DVec2::new(2.0, 1.0),
        axis_a: DVec2::new(1.0, 0.0),
        axis_b: DVec2::new(0.0, 2.0),
        from: 0.0,
        sweep: PI,
    };
    // Radius of curvature 1/2 at the tip.
    let with = |distance: f64| {
        let edge = Edge::Parallel(Parallel::new(Base::Ellipse(base), distance));
        of_outline(tagged(vec![
            edge,
            line(edge.end().into(), (3.0, 0.0)),
            line((3.0, 0.0), edge.start().into()),
        ]))
    };
    assert_eq!(told(&with(0.6)).0, "turns back");
    assert_eq!(with(0.4), vec![]);
    assert_eq!(with(-3.0), told_below_axis(&with(-3.0)));
}

/// The faults, if the only kind is a dip below the axis.
fn told_below_axis(faults: &[RegionFault]) -> Vec<RegionFault> {
    faults
        .iter()
        .filter(|fault| matches!(fault, RegionFault::BelowAxis { .. }))
        .copied()
        .collect()
}

#[test]
fn edges_on_and_below_the_axis() {
    let on_axis = polygon(&[(0.0, 0.0), (3.0, 0.0), (3.0, 4.0), (0.0, 4.0)]);
    assert_eq!(of_outline(on_axis), vec![]);
    let cone = polygon(&[(0.0, 0.0), (3.0, 2.0), (0.0, 4.0), (1.0, 2.0)]);
    assert_eq!(of_outline(cone), vec![]);
    let rounding = polygon(&[(-1e-13, 0.0), (3.0, 0.0), (3.0, 4.0), (-1e-13, 4.0)]);
    assert_eq!(of_outline(rounding), vec![]);
    let below = polygon(&[(1.0, 0.0), (3.0, 0.0), (3.0, 4.0), (-0.25, 2.0)]);
    let faults = of_outline(below);
    assert_eq!(faults.len(), 2);
    assert_eq!(told(&faults[..1]), ("below axis", vec![2], (-0.25, 2.0)));
    // An arc that dips between its ends: the lowest place is not a corner.
    let dipping = tagged(vec![
        line((0.5, 0.0), (3.0, 0.0)),
        line((3.0, 0.0), (0.5, 2.0)),
        arc((0.5, 2.0), (0.5, 0.0), PI),
    ]);
    assert_eq!(
        told(&of_outline(dipping)),
        ("below axis", vec![2], (-0.5, 1.0))
    );
}

#[test]
fn chains_on_the_axis_may_not_meet_there() {
    // A corner on the axis, and an edge on the axis beside it: they do not meet.
    let apart = polygon(&[
        (0.0, 0.0),
        (4.0, -1.0),
        (4.0, 3.0),
        (0.0, 3.0),
        (0.0, 2.0),
        (3.0, 1.0),
    ]);
    assert_eq!(of_outline(apart), vec![]);
    // A corner on an edge that lies on the axis.
    let touching = polygon(&[(0.0, -1.0), (4.0, -1.0), (0.0, 1.0), (4.0, 3.0), (0.0, 3.0)]);
    assert_eq!(
        told(&of_outline(touching)),
        ("touches", vec![1, 4], (0.0, 1.0))
    );
}

#[test]
fn an_edge_without_length_is_told_alone() {
    let faults = of_outline(polygon(&[
        (1.0, 0.0),
        (3.0, 0.0),
        (3.0, 1e-13),
        (3.0, 2.0),
        (1.0, 2.0),
    ]));
    assert_eq!(told(&faults), ("no length", vec![1], (3.0, 0.0)));
    let faults = of_outline(polygon(&[(1.0, 0.0), (1.0, 0.0), (1.0, 0.0)]));
    assert_eq!(told(&faults).0, "too small");
}

#[test]
fn numbers_that_cannot_be_computed_with() {
    let with = |corner: (f64, f64)| of_outline(polygon(&[(1.0, 0.0), (3.0, 0.0), corner]));
    // A corner that is not a number is not even a corner that two edges share; a control point or an angle may be one.
    for edge in [
        bezier([(2.0, 1.0), (3.0, f64::NAN), (1.0, 2.0), (1.0, 0.0)]),
        arc((2.0, 1.0), (1.0, 0.0), f64::NAN),
    ] {
        let faults = of_outline(tagged(vec![
            line((1.0, 0.0), (3.0, 0.0)),
            line((3.0, 0.0), (2.0, 1.0)),
            edge,
        ]));
        assert_eq!(told(&faults), ("not finite", vec![2], (0.0, 0.0)));
    }
    assert!(matches!(
        with((f64::INFINITY, 1.0))[0],
        RegionFault::NotFinite { .. }
    ));
    let far = RegionFault::TooLarge {
        loop_index: 0,
        extent: 1e61,
        at: DVec2::new(1.0, 1e61),
    };
    assert_eq!(with((1.0, 1e61)), vec![far]);
    let large = 1e59;
    assert_eq!(
        of_outline(polygon(&[(large, 0.0), (2.0 * large, 0.0), (large, large)])),
        vec![]
    );
    let tiny = 1e-61;
    assert_eq!(
        told(&of_outline(polygon(&[
            (tiny, 0.0),
            (2.0 * tiny, 0.0),
            (tiny, tiny)
        ])))
        .0,
        "too small"
    );
    let small = 1e-58;
    assert_eq!(
        of_outline(polygon(&[(small, 0.0), (2.0 * small, 0.0), (small, small)])),
        vec![]
    );
}

#[test]
fn voids_in_their_places_are_accepted_and_turned() {
    let region = Region::new(
        square(1.0, 0.0, 10.0).reversed(),
        vec![
            square(2.0, 1.0, 2.0),
            square(5.0, 1.0, 3.0).reversed(),
            square(2.0, 5.0, 1.0),
        ],
    )
    .unwrap();
    assert_eq!(region.outer().signed_area(), 100.0);
    assert_eq!(region.outer().tags(), [100, 101, 102, 103]);
    let areas: Vec<f64> = region.voids().iter().map(Loop::signed_area).collect();
    assert_eq!(areas, [-4.0, -9.0, -1.0]);
    assert_eq!(region.voids()[0].tags(), [103, 102, 101, 100]);
}

#[test]
fn voids_that_meet() {
    let crossing = of_voids(vec![square(2.0, 8.5, 2.0)]);
    assert_eq!(crossing.len(), 2);
    assert!(crossing.iter().all(
        |fault| matches!(fault, RegionFault::Crosses { first, second, .. }
        if (first.loop_index, second.loop_index) == (0, 1) && first.edge == 2)
    ));
    let against = of_voids(vec![square(2.0, 8.0, 2.0)]);
    assert_eq!(told(&against), ("runs along", vec![2, 2], (4.0, 10.0)));
    let corner = polygon(&[(5.0, 5.0), (7.0, 5.0), (6.0, 10.0)]);
    assert_eq!(
        told(&of_voids(vec![corner])),
        ("touches", vec![2, 1], (6.0, 10.0))
    );
    let both = of_voids(vec![square(2.0, 2.0, 2.0), square(3.0, 3.0, 2.0)]);
    assert_eq!(both.len(), 2);
    assert!(both.iter().all(
        |fault| matches!(fault, RegionFault::Crosses { first, second, .. }
        if (first.loop_index, second.loop_index) == (1, 2))
    ));
    let same = of_voids(vec![square(2.0, 2.0, 2.0), square(2.0, 2.0, 2.0)]);
    assert_eq!(same.len(), 4, "{same:?}");
    assert!(
        same.iter()
            .all(|fault| matches!(fault, RegionFault::RunsAlong { .. }))
    );
}

#[test]
fn voids_out_of_place() {
    let outside = of_voids(vec![square(20.0, 2.0, 2.0)]);
    assert_eq!(told(&outside), ("void outside", vec![], (20.0, 2.0)));
    let round = of_voids(vec![square(0.5, -0.5, 20.0)]);
    assert_eq!(told(&round), ("void outside", vec![], (0.5, -0.5)));
    let nested = of_voids(vec![
        square(3.0, 3.0, 1.0),
        square(2.0, 2.0, 3.0),
        square(1.5, 1.5, 8.0).reversed(),
    ]);
    assert!(matches!(
        nested[..],
        [
            RegionFault::VoidInVoid {
                void: 1,
                within: 2,
                ..
            },
            RegionFault::VoidInVoid {
                void: 2,
                within: 3,
                ..
            },
        ]
    ));
}

#[test]
fn faults_of_several_loops_come_in_order_and_not_without_end() {
    // A comb of crossings: a zigzag over a zigzag.
    let mut corners: Vec<(f64, f64)> = (0..200)
        .map(|i| (1.0 + f64::from(i), f64::from(i % 2)))
        .collect();
    corners.push((201.0, -1.0));
    corners.extend(
        (0..200)
            .rev()
            .map(|i| (1.1 + f64::from(i), f64::from(1 - i % 2))),
    );
    let faults = of_outline(polygon(&corners));
    assert_eq!(faults.len(), 20);
    assert!(faults.is_sorted_by_key(RegionFault::order));
    let faults = of_voids(vec![
        square(20.0, 0.0, 1.0),
        polygon(&[(2.0, 2.0), (3.0, 3.0), (3.0, 2.0), (2.0, 3.0)]),
    ]);
    assert_eq!(faults.len(), 2);
    assert_eq!(faults[0].loop_index(), 1);
    assert_eq!(faults[1].loop_index(), 2);
}

#[test]
fn fillets_join_smoothly() {
    // A quarter turn from line to line with corners computed the way a fillet is.
    for radius in [1e-6, 1e-3, 0.3] {
        let (c, s) = (1.0 - radius, radius);
        let filleted = tagged(vec![
            line((0.5, 0.0), (c, 0.0)),
            arc((c, 0.0), (1.0, s), 0.5 * PI),
            line((1.0, s), (1.0, 1.0)),
            line((1.0, 1.0), (0.5, 0.0)),
        ]);
        assert_eq!(of_outline(filleted), vec![]);
    }
    // Turned by an angle that has no short numbers.
    let turn = |p: (f64, f64)| DVec2::new(5.0, 0.0) + trig::turned(p.into(), 0.7);
    let corners = [(0.0, 0.0), (2.0, 0.0), (2.5, 0.5), (2.5, 3.0)].map(turn);
    let turned = tagged(vec![
        Edge::line(corners[0], corners[1]),
        Edge::Arc(Arc {
            start: corners[1],
            end: corners[2],
            sweep: 0.5 * PI,
        }),
        Edge::line(corners[2], corners[3]),
        Edge::line(corners[3], corners[0]),
    ]);
    assert_eq!(of_outline(turned), vec![]);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(128))]

    #[test]
    fn stars_are_accepted_whichever_way_they_run(
        (outer, inner) in (rays(), rays()),
        (backward, start) in (any::<bool>(), 0_usize..7),
        size in -6.0..6.0,
    ) {
        let size = trig::pow(10.0, size);
        let outline = star(&outer, DVec2::new(1.5 * size, 3.0 * size), size);
        let area = outline.signed_area();
        let edges = outline.edges().iter().copied().zip(outline.tags().iter().copied());
        let turned: Vec<_> = edges.clone().skip(start).chain(edges.take(start)).collect();
        let mut given = Loop::new(turned).unwrap();
        if backward {
            given = given.reversed();
        }
        let void = star(&inner, DVec2::new(1.5 * size, 3.0 * size), 0.3 * size);
        let region = Region::new(given, vec![void]);
        prop_assert!(region.is_ok(), "{:?}", region.err());
        let region = region.unwrap();
        prop_assert!((region.outer().signed_area() - area).abs() <= 1e-13 * area);
        prop_assert!(region.voids()[0].signed_area() < 0.0);
    }

    #[test]
    fn an_edge_pulled_through_the_loop_crosses(rays in rays(), which in 0_usize..7) {
        let centre = DVec2::new(3.0, 0.5);
        let outline = star(&rays, centre, 1.0);
        let mut edges = outline.edges().to_vec();
        // The corner after it is moved beyond the other side.
        let corner = edges[which].end();
        let far = centre - 3.0 * (corner - centre);
        let next = (which + 1) % edges.len();
        edges[which] = Edge::line(edges[which].start(), far);
        edges[next] = Edge::line(far, edges[next].end());
        let faults = of_outline(tagged(edges));
        let crosses = |fault: &RegionFault| matches!(fault, RegionFault::Crosses { .. });
        prop_assert!(faults.iter().any(crosses), "{faults:?}");
    }
}

/// Rows of arcs nested at `spacing`, walked to and fro, and the way back around them.
fn nested_arcs(rows: u32, spacing: f64) -> Loop {
    let mut edges = Vec::new();
    let width = f64::from(rows) * spacing;
    for row in 0..rows {
        let [z, above] = [row, row + 1].map(|row| f64::from(row) * spacing);
        let (left, right) = ((1.0, z), (2.0, z));
        let (from, to, sweep) = if row % 2 == 0 {
            (left, right, -1.0)
        } else {
            (right, left, 1.0)
        };
        edges.push(arc(from, to, sweep));
        edges.push(line(to, (to.0, above)));
    }
    edges.push(line((1.0, width), (0.5, width)));
    edges.push(line((0.5, width), (0.5, 0.0)));
    edges.push(line((0.5, 0.0), (1.0, 0.0)));
    tagged(edges)
}

#[test]
fn arcs_nested_within_their_bulge_are_told_apart() {
    let outline = nested_arcs(300, 1e-4);
    assert!(Region::new(outline.reversed(), Vec::new()).is_ok());
}

#[test]
fn too_many_arcs_nested_too_closely_are_refused_before_they_cost() {
    let faults = of_outline(nested_arcs(3000, 1e-9));
    assert!(
        matches!(faults[..], [RegionFault::TooIntricate { .. }]),
        "{faults:?}"
    );
}
