//! Bodies that touch, bodies that overlap.

use super::*;
use crate::samples::{rays, ring, star};
use crate::{Arc, Edge, Loop, RegionIndex};
use proptest::prelude::*;
use std::f64::consts::PI;

fn polygon(corners: &[(f64, f64)]) -> Loop {
    let edge = |i: usize| Edge::line(corners[i].into(), corners[(i + 1) % corners.len()].into());
    Loop::new((0..corners.len()).map(edge).zip(100..)).unwrap()
}

fn rectangle(r: (f64, f64), z: (f64, f64)) -> Loop {
    polygon(&[(r.0, z.0), (r.1, z.0), (r.1, z.1), (r.0, z.1)])
}

fn solid(outline: Loop) -> Region {
    Region::new(outline, Vec::new()).unwrap()
}

fn found(regions: &[Region]) -> Vec<BodyOverlap> {
    overlaps(&regions.iter().collect::<Vec<_>>())
        .into_iter()
        .map(|fault| match fault {
            BodyFault::Overlap(overlap) => overlap,
            BodyFault::TooIntricate { .. } => panic!("{fault:?}"),
        })
        .collect()
}

fn assert_apart(regions: &[Region]) {
    assert_eq!(found(regions), vec![]);
    let mut turned: Vec<Region> = regions.to_vec();
    turned.reverse();
    assert_eq!(found(&turned), vec![]);
}

/// The only overlap: its depth, and whether its place is that deep by a look of its own.
fn only_depth(regions: &[Region]) -> f64 {
    let all = found(regions);
    let [overlap] = all[..] else {
        panic!("one overlap expected: {all:?}");
    };
    let (i, j) = overlap.bodies;
    for body in [i, j] {
        let index = RegionIndex::new(&regions[body]);
        assert!(-index.signed_distance(overlap.place) >= overlap.depth * (1.0 - 1e-12));
    }
    overlap.depth
}

#[test]
fn a_bush_in_its_hub_touches() {
    // The hub's bore is one edge, the bush's outside three, one of them longer than the bore.
    let hub = solid(rectangle((2.0, 5.0), (1.0, 4.0)));
    let bush = solid(polygon(&[
        (1.0, 0.0),
        (2.0, 0.0),
        (2.0, 1.5),
        (2.0, 2.5),
        (2.0, 4.5),
        (1.0, 4.5),
    ]));
    assert_apart(&[hub.clone(), bush]);
    // A collar that dips into the hub by a tenth.
    let collared = solid(polygon(&[
        (1.0, 0.0),
        (2.0, 0.0),
        (2.0, 1.5),
        (2.1, 1.5),
        (2.1, 2.5),
        (2.0, 2.5),
        (2.0, 4.5),
        (1.0, 4.5),
    ]));
    let regions = [hub, collared];
    assert!((only_depth(&regions) - 0.05).abs() < 0.0026);
    let overlap = found(&regions)[0];
    assert_eq!(overlap.bodies, (0, 1));
    assert!(overlap.place.x > 2.0 && overlap.place.x < 2.1);
    assert!(overlap.place.y > 1.5 && overlap.place.y < 2.5);
}

#[test]
fn tapered_faces_computed_apart_touch() {
    // A cone in a cone: the same line, cut at other places, in thirds that have no short numbers.
    let at = |t: f64| (2.0 + t / 3.0, 1.0 + t / 7.0);
    let cone = solid(polygon(&[
        (0.5, at(0.1).1),
        at(0.1),
        at(2.3),
        (0.5, at(2.3).1),
    ]));
    let socket = solid(polygon(&[
        at(3.1),
        (6.0, at(3.1).1),
        (6.0, 0.5),
        at(-0.4),
        at(0.7),
    ]));
    assert_apart(&[cone, socket]);
}

#[test]
fn a_body_fills_a_void() {
    let core = rectangle((2.0, 3.0), (1.0, 2.0));
    let shell = Region::new(rectangle((1.0, 5.0), (0.0, 4.0)), vec![core.clone()]).unwrap();
    assert_apart(&[shell.clone(), solid(core)]);
    assert_apart(&[shell.clone(), solid(rectangle((2.2, 2.8), (1.2, 1.8)))]);
    // Too large by a little on one side.
    let large = solid(rectangle((2.0, 3.0 + 1e-6), (1.0, 2.0)));
    assert!((only_depth(&[shell.clone(), large]) - 5e-7).abs() < 1e-8);
    // In the material beside the void.
    let beside = solid(rectangle((3.5, 4.5), (1.0, 2.0)));
    assert!(only_depth(&[shell.clone(), beside]) > 0.45);
    // A plug that fills void and material.
    let plug = solid(rectangle((1.5, 4.5), (0.5, 3.5)));
    assert!(only_depth(&[shell, plug]) > 0.2);
}

#[test]
fn the_same_body_twice_overlaps() {
    let body = ring_of_round_wire(3.0, 1.0);
    assert!((only_depth(&[body.clone(), body.clone()]) - 1.0).abs() < 0.05);
    // One inside the other, with a face in common that runs the same way.
    let whole = solid(rectangle((1.0, 3.0), (0.0, 2.0)));
    let half = solid(rectangle((1.0, 2.0), (0.0, 2.0)));
    assert!((only_depth(&[whole.clone(), half]) - 0.5).abs() < 0.026);
    let corner = solid(rectangle((1.0, 1.25), (0.0, 0.25)));
    assert!((only_depth(&[whole.clone(), corner]) - 0.125).abs() < 0.007);
    let inner = solid(rectangle((1.5, 2.5), (0.5, 1.5)));
    assert!((only_depth(&[inner, whole]) - 0.5).abs() < 0.026);
}

fn ring_of_round_wire(r: f64, radius: f64) -> Region {
    let half = |from: f64, to: f64| {
        Edge::Arc(Arc {
            start: DVec2::new(from, 0.0),
            end: DVec2::new(to, 0.0),
            sweep: PI,
        })
    };
    let (low, high) = (r - radius, r + radius);
    solid(Loop::new([(half(low, high), 1), (half(high, low), 2)]).unwrap())
}

#[test]
fn round_bodies_touch_in_a_point() {
    // Wires side by side, a wire on a plate, a wire in a groove that fits.
    assert_apart(&[ring_of_round_wire(3.0, 1.0), ring_of_round_wire(5.5, 1.5)]);
    let plate = solid(rectangle((1.0, 9.0), (-2.0, -1.0)));
    assert_apart(&[ring_of_round_wire(3.0, 1.0), plate]);
    let groove = Region::new(
        Loop::new([
            (Edge::line(DVec2::new(1.0, -2.0), DVec2::new(6.0, -2.0)), 0),
            (Edge::line(DVec2::new(6.0, -2.0), DVec2::new(6.0, 0.0)), 1),
            (Edge::line(DVec2::new(6.0, 0.0), DVec2::new(4.0, 0.0)), 2),
            (
                Edge::Arc(Arc {
                    start: DVec2::new(4.0, 0.0),
                    end: DVec2::new(2.0, 0.0),
                    sweep: -PI,
                }),
                3,
            ),
            (Edge::line(DVec2::new(2.0, 0.0), DVec2::new(1.0, 0.0)), 4),
            (Edge::line(DVec2::new(1.0, 0.0), DVec2::new(1.0, -2.0)), 5),
        ])
        .unwrap(),
        vec![],
    )
    .unwrap();
    assert_apart(&[groove.clone(), ring_of_round_wire(3.0, 1.0)]);
    assert!((only_depth(&[groove, ring_of_round_wire(3.0, 1.001)]) - 5e-4).abs() < 5e-5);
    assert!(
        (only_depth(&[ring_of_round_wire(3.0, 1.0), ring_of_round_wire(4.0, 1.0)]) - 0.5).abs()
            < 0.026
    );
}

#[test]
fn crossing_edges_are_named() {
    let upright = solid(rectangle((2.0, 3.0), (0.0, 9.0)));
    let flat = solid(rectangle((1.0, 5.0), (4.0, 5.0)));
    let all = found(&[flat, upright]);
    assert_eq!(all.len(), 1);
    let (first, second) = all[0].edges;
    // The flat one's lower edge and the upright one's right edge.
    assert_eq!(
        (first.edge, first.tag, second.edge, second.tag),
        (0, 100, 1, 101)
    );
}

#[test]
fn of_many_bodies_the_pairs_that_overlap() {
    // A stack of a thousand discs, each on the one below; three are too thick.
    let thick = [17, 400, 998];
    let stack: Vec<Region> = (0..1000)
        .map(|i| {
            let z = f64::from(i) * 0.1;
            let height = if thick.contains(&i) { 0.11 } else { 0.1 };
            solid(rectangle((0.0, 1.0), (z, f64::from(i) * 0.1 + height)))
        })
        .collect();
    let pairs: Vec<_> = found(&stack).iter().map(|overlap| overlap.bodies).collect();
    assert_eq!(pairs, [(17, 18), (400, 401), (998, 999)]);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(48))]

    #[test]
    fn stars_overlap_where_a_sample_lies_in_both(
        (first, inner, second) in (rays(), rays(), rays()),
        shift in [-2.0..2.0, -2.0..2.0],
        size in 0.05..1.0,
    ) {
        let centre = DVec2::new(4.0, 0.0);
        let regions = [
            ring(&first, &inner, centre, 1.0),
            solid(star(&second, centre + DVec2::from(shift), size)),
        ];
        let indices = regions.each_ref().map(RegionIndex::new);
        let common = |p: DVec2| indices.iter().map(|index| -index.signed_distance(p)).fold(f64::INFINITY, f64::min);
        let bounds = regions[1].bounds();
        let sampled = (0..30)
            .flat_map(|i| (0..30).map(move |j| DVec2::new(f64::from(i) / 29.0, f64::from(j) / 29.0)))
            .map(|share| common(bounds.min + share * bounds.size()))
            .fold(f64::NEG_INFINITY, f64::max);
        let all = found(&regions);
        if let Some(overlap) = all.first() {
            prop_assert!(overlap.depth > 0.0 && (common(overlap.place) - overlap.depth).abs() < 1e-14);
            prop_assert!(overlap.depth * 1.1 >= sampled, "{} {sampled}", overlap.depth);
        } else {
            prop_assert!(sampled < 1e-9, "{sampled}");
        }
    }
}
