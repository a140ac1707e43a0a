//! Random edges of all kinds against brute force.

use super::super::{Meeting, meetings};
use super::v;
use crate::{Arc, Base, Bezier, DVec2, Edge, EllipseArc, Parallel, trig};
use proptest::prelude::*;

fn point() -> impl Strategy<Value = DVec2> {
    (-1.0..1.0_f64, -1.0..1.0_f64).prop_map(|(x, y)| v(x, y))
}

fn sweep() -> impl Strategy<Value = f64> {
    prop_oneof![
        0.05..std::f64::consts::PI,
        -std::f64::consts::PI..-0.05,
        1e-7..1e-5_f64
    ]
}

fn ellipse() -> impl Strategy<Value = EllipseArc> {
    (point(), point(), 0.05..1.5_f64, 0.0..6.0_f64, sweep()).prop_map(
        |(centre, axis_a, ratio, from, sweep)| {
            let axis_b = crate::left_of(axis_a) * ratio + 0.3 * axis_a;
            let at = |u: f64| {
                let (s, c) = trig::sin_cos(u);
                centre + c * axis_a + s * axis_b
            };
            EllipseArc {
                start: at(from),
                end: at(from + sweep),
                axis_a,
                axis_b,
                from,
                sweep,
            }
        },
    )
}

fn bezier() -> impl Strategy<Value = Bezier> {
    [point(), point(), point(), point()].prop_map(|points| Bezier { points })
}

fn legal(base: Base, distance: f64) -> Option<Parallel> {
    let parallel = Parallel::new(base, distance);
    (parallel.least_speed_ratio().0 > 0.05).then_some(parallel)
}

/// Lines and arcs.
pub(super) fn simple_edge() -> impl Strategy<Value = Edge> {
    prop_oneof![
        (point(), point()).prop_map(|(a, b)| Edge::line(a, b)),
        (point(), point(), sweep()).prop_map(|(start, end, sweep)| Edge::Arc(Arc {
            start,
            end,
            sweep
        })),
    ]
    .prop_filter("long enough", is_long)
}

pub(super) fn elliptic_edge() -> impl Strategy<Value = Edge> {
    ellipse()
        .prop_map(Edge::Ellipse)
        .prop_filter("long enough", is_long)
}

fn is_long(edge: &Edge) -> bool {
    edge.bounds().size().max_element() > 1e-3
}

/// Edges of all kinds.
fn edge() -> impl Strategy<Value = Edge> {
    prop_oneof![
        2 => simple_edge(),
        1 => elliptic_edge(),
        1 => bezier().prop_map(Edge::Bezier),
        1 => (ellipse(), -0.5..0.5_f64)
            .prop_filter_map("legal", |(e, d)| legal(Base::Ellipse(e), d).map(Edge::Parallel)),
        1 => (bezier(), -0.3..0.3_f64)
            .prop_filter_map("legal", |(b, d)| legal(Base::Bezier(b), d).map(Edge::Parallel)),
    ]
    .prop_filter("long enough", is_long)
}

/// Chords of the edge.
fn chords(edge: &Edge, count: usize) -> Vec<(DVec2, DVec2)> {
    (0..count)
        .map(|i| {
            let at = |k: usize| edge.point(k as f64 / count as f64);
            (at(i), at(i + 1))
        })
        .collect()
}

/// Where chords of the two edges cross clearly: not near the chords' ends, not at a small angle.
fn clear_crossings(a: &Edge, b: &Edge) -> Vec<DVec2> {
    const COUNT: usize = 150;
    let (of_a, of_b) = (chords(a, COUNT), chords(b, COUNT));
    let mut found = Vec::new();
    for (p, q) in &of_a {
        for (r, s) in &of_b {
            let (u, w) = (*q - *p, *s - *r);
            let across = u.perp_dot(w);
            if across.abs() < 0.3 * u.length() * w.length() {
                continue;
            }
            let (t, k) = (
                (*r - *p).perp_dot(w) / across,
                (*r - *p).perp_dot(u) / across,
            );
            if t > 0.05 && t < 0.95 && k > 0.05 && k < 0.95 {
                found.push(*p + t * u);
            }
        }
    }
    found
}

/// The largest distance of an edge from its chords, nearly.
fn sagitta(edge: &Edge) -> f64 {
    const COUNT: usize = 150;
    (0..COUNT)
        .map(|i| {
            let at = |k: f64| edge.point((i as f64 + k) / COUNT as f64);
            at(0.5).distance(0.5 * (at(0.0) + at(1.0)))
        })
        .fold(0.0, f64::max)
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 512, ..ProptestConfig::default() })]

    #[test]
    fn points_lie_on_both_and_none_is_missed(a in edge(), b in edge()) {
        let within = 1e-12;
        let found = meetings(&a, &b, within);
        let mut last = 0.0;
        for meeting in &found {
            let Meeting::Point { t_a, t_b, point, .. } = *meeting else {
                return Err(TestCaseError::fail(format!("random edges overlap: {found:?}")));
            };
            prop_assert!(t_a >= last && t_a <= 1.0 && (0.0..=1.0).contains(&t_b));
            last = t_a;
            prop_assert!(a.point(t_a).distance(point) <= 4e-15 + within, "{meeting:?} {:e}", a.point(t_a).distance(point));
            prop_assert!(b.point(t_b).distance(point) <= 4e-15 + within, "{meeting:?} {:e}", b.point(t_b).distance(point));
        }
        let room = 4.0 * (sagitta(&a) + sagitta(&b));
        for expected in clear_crossings(&a, &b) {
            prop_assert!(
                found.iter().any(|meeting| matches!(meeting, Meeting::Point { point, .. } if point.distance(expected) <= room)),
                "missed {expected} of {a:?} {b:?}: {found:?}"
            );
        }
        // The same the other way round, and travelled the other way.
        let swapped = meetings(&b, &a, within);
        prop_assert_eq!(found.len(), swapped.len());
        let reversed = meetings(&a.reversed(), &b, within);
        prop_assert_eq!(found.len(), reversed.len());
        for meeting in &found {
            if let Meeting::Point { point, crossing, .. } = *meeting {
                for others in [&swapped, &reversed] {
                    prop_assert!(others.iter().any(|other| matches!(other, Meeting::Point { point: p, crossing: c, .. }
                        if p.distance(point) < 1e-9 && *c == crossing)), "{found:?} {others:?}");
                }
            }
        }
    }

    /// An edge through a point of another, along its tangent there: it touches or passes, and is found.
    #[test]
    fn touching_is_found(a in edge(), b in edge(), t in 0.1..0.9_f64, s in 0.1..0.9_f64) {
        // b turned about and moved so that b(s) lies on a(t) with the same tangent.
        let angle = trig::angle_between(b.tangent(s), a.tangent(t));
        let turned = turned(&b, angle);
        let b = turned.moved(a.point(t) - turned.point(s));
        prop_assume!(a.curvature(t).abs() < 50.0 && b.curvature(s).abs() < 50.0);
        let found = meetings(&a, &b, 1e-12);
        let near = |meeting: &Meeting| match meeting {
            Meeting::Point { point, .. } => point.distance(a.point(t)) < 1e-3,
            Meeting::Overlap { a: [from, to], .. } => *from <= t && t <= *to,
        };
        prop_assert!(found.iter().any(near), "{a:?} {b:?} {found:?}");
        prop_assert!(found.len() < 10);
    }
}

fn turned(edge: &Edge, angle: f64) -> Edge {
    let turn = |p: DVec2| trig::turned(p, angle);
    let ellipse = |e: EllipseArc| EllipseArc {
        start: turn(e.start),
        end: turn(e.end),
        axis_a: turn(e.axis_a),
        axis_b: turn(e.axis_b),
        ..e
    };
    let bezier = |b: Bezier| Bezier {
        points: b.points.map(turn),
    };
    match *edge {
        Edge::Line(l) => Edge::line(turn(l.start), turn(l.end)),
        Edge::Arc(a) => Edge::Arc(Arc {
            start: turn(a.start),
            end: turn(a.end),
            ..a
        }),
        Edge::Ellipse(e) => Edge::Ellipse(ellipse(e)),
        Edge::Bezier(b) => Edge::Bezier(bezier(b)),
        Edge::Parallel(p) => Edge::Parallel(Parallel {
            base: match p.base {
                Base::Ellipse(e) => Base::Ellipse(ellipse(e)),
                Base::Bezier(b) => Base::Bezier(bezier(b)),
            },
            distance: p.distance,
            start: turn(p.start),
            end: turn(p.end),
        }),
    }
}
