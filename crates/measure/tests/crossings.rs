//! Triangles that meet where they should not: known cases, and all pairs of small soups by another method in whole numbers.

use glam::DVec3;
use measure::{Triangles, crossings};
use mesh::{Options, Plan, Solid};
use profile::{Arc, DVec2, Edge, Loop, Region};
use proptest::prelude::*;
use std::f64::consts::{PI, TAU};

type Triangle = [[i32; 3]; 3];

/// Loose triangles, each with corners of its own.
fn count(soup: &[Triangle]) -> usize {
    let positions: Vec<DVec3> = soup
        .iter()
        .flatten()
        .map(|p| DVec3::from_array(p.map(f64::from)))
        .collect();
    let triangles: Vec<[u32; 3]> = (0_u32..)
        .take(soup.len())
        .map(|i| [3 * i, 3 * i + 1, 3 * i + 2])
        .collect();
    crossings(Triangles {
        positions: &positions,
        triangles: &triangles,
    })
    .count
}

const FLOOR: Triangle = [[0, 0, 0], [4, 0, 0], [0, 4, 0]];

#[test]
fn two_triangles() {
    let with_floor = |other: Triangle| count(&[FLOOR, other]) == 1;
    // Through the middle, beside it, above it.
    assert!(with_floor([[1, 1, -1], [1, 1, 1], [5, 5, 1]]));
    assert!(!with_floor([[3, 3, -1], [3, 3, 1], [5, 5, 1]]));
    assert!(!with_floor([[1, 1, 1], [1, 1, 2], [5, 5, 1]]));
    // A corner on it, on its edge, an edge across its edge.
    assert!(with_floor([[1, 1, 0], [1, 1, 2], [2, 1, 2]]));
    assert!(with_floor([[2, 2, 0], [2, 2, 2], [3, 2, 2]]));
    assert!(with_floor([[2, -1, 0], [2, 1, 0], [2, 0, 3]]));
    // In its plane: over it, in it, around it, beside it, along its edge.
    assert!(with_floor([[1, -1, 0], [1, 5, 0], [2, -1, 0]]));
    assert!(with_floor([[1, 1, 0], [2, 1, 0], [1, 2, 0]]));
    assert!(with_floor([[-9, -9, 0], [30, -9, 0], [-9, 30, 0]]));
    assert!(!with_floor([[3, 3, 0], [5, 5, 0], [3, 5, 0]]));
    assert!(with_floor([[1, 0, 0], [3, 0, 0], [2, -2, 0]]));
    // One corner shared: away, through, along an edge.
    assert!(!with_floor([[0, 0, 0], [1, 1, 1], [0, 1, 1]]));
    assert!(with_floor([[0, 0, 0], [1, 1, 1], [1, 1, -1]]));
    assert!(with_floor([[0, 0, 0], [2, 0, 0], [0, 0, 3]]));
    assert!(with_floor([[0, 0, 0], [6, 0, 0], [0, 0, 3]]));
    assert!(!with_floor([[0, 0, 0], [-1, 0, 0], [0, -1, 0]]));
    assert!(with_floor([[0, 0, 0], [5, 1, 0], [5, 2, 0]]));
    // An edge shared: a fold, a fin on the other side, a leaf folded back.
    assert!(!with_floor([[0, 0, 0], [4, 0, 0], [0, 0, 4]]));
    assert!(!with_floor([[0, 0, 0], [4, 0, 0], [1, -4, 0]]));
    assert!(with_floor([[0, 0, 0], [4, 0, 0], [1, 1, 0]]));
    // Left to the audit: the same again, no area.
    assert!(!with_floor(FLOOR));
    assert!(!with_floor([[1, 1, -1], [1, 1, 1], [1, 1, 5]]));
}

#[test]
fn what_is_no_number_meets_nothing() {
    let positions = [
        DVec3::ZERO,
        DVec3::X,
        DVec3::Y,
        DVec3::NAN,
        DVec3::INFINITY,
        DVec3::Z,
    ];
    let found = crossings(Triangles {
        positions: &positions,
        triangles: &[[0, 1, 2], [3, 1, 2], [4, 5, 0], [0, 0, 1]],
    });
    assert_eq!(found.count, 0);
    assert_eq!(
        crossings(Triangles {
            positions: &[],
            triangles: &[]
        })
        .count,
        0
    );
}

/// A hollow ball: two shells, fans at the poles.
fn hollow_ball() -> mesh::Mesh {
    let half = |radius: f64, turn: f64| {
        let at = |z: f64| DVec2::new(0.0, z * radius * turn.signum());
        [
            Edge::Arc(Arc {
                start: at(-1.0),
                end: at(1.0),
                sweep: turn,
            }),
            Edge::line(at(1.0), at(-1.0)),
        ]
    };
    let shell = {
        let [outer, _] = half(1.0, PI);
        let [inner, _] = half(0.9, -PI);
        let edges = [
            outer,
            Edge::line(outer.end(), inner.start()),
            inner,
            Edge::line(inner.end(), outer.start()),
        ];
        Loop::new(edges.into_iter().zip(0..)).expect("the edges close")
    };
    let region = Region::new(shell, vec![]).expect("a hollow ball is a part");
    let volume = 4.0 / 3.0 * PI * (1.0 - 0.9 * 0.9 * 0.9);
    let solid = Solid {
        region: &region,
        volume,
    };
    let plan = Plan::new(&[solid], TAU, &Options::within(1e-3)).expect("it can be meshed");
    plan.mesh().expect("it can be meshed")
}

#[test]
fn a_mesh_of_this_program_crosses_itself_only_where_it_is_bent() {
    let mut mesh = hollow_ball();
    let found = |mesh: &mesh::Mesh| {
        crossings(Triangles {
            positions: &mesh.positions,
            triangles: &mesh.triangles,
        })
    };
    assert_eq!(found(&mesh).count, 0);
    // A corner of the outer shell is pushed through the inner one.
    let outside = mesh
        .positions
        .iter()
        .position(|p| p.x > 0.7 && p.length() > 0.95)
        .expect("it has an outside");
    mesh.positions[outside] *= 0.8;
    let bent = found(&mesh);
    assert!(bent.count > 5, "{}", bent.count);
    assert_eq!(bent.some.len(), bent.count.min(16));
}

/// By separating axes (Gottschalk, Lin and Manocha 1996) in whole numbers: two convex pieces have no point in common where
/// along some axis the one ends before the other begins.
mod oracle {
    type V = [i128; 3];

    fn sub(a: V, b: V) -> V {
        [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
    }

    fn cross(a: V, b: V) -> V {
        [
            a[1] * b[2] - a[2] * b[1],
            a[2] * b[0] - a[0] * b[2],
            a[0] * b[1] - a[1] * b[0],
        ]
    }

    fn dot(a: V, b: V) -> i128 {
        a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
    }

    fn sides(piece: &[V]) -> Vec<V> {
        let count = piece.len();
        (0..count)
            .map(|i| sub(piece[(i + 1) % count], piece[i]))
            .collect()
    }

    fn axes(a: &[V], b: &[V]) -> Vec<V> {
        let (of_a, of_b) = (sides(a), sides(b));
        let mut axes = Vec::new();
        for u in of_a.iter().chain(&of_b) {
            for v in of_a.iter().chain(&of_b) {
                let normal = cross(*u, *v);
                axes.push(normal);
                // In a common plane the axes lie in it.
                axes.extend(of_a.iter().chain(&of_b).map(|w| cross(normal, *w)));
            }
            axes.push(*u);
        }
        axes.retain(|axis| *axis != [0; 3]);
        axes
    }

    fn range(piece: &[V], axis: V) -> (i128, i128) {
        let along = || piece.iter().map(|p| dot(*p, axis));
        (
            along().min().expect("a piece has corners"),
            along().max().expect("a piece has corners"),
        )
    }

    fn disjoint(a: &[V], b: &[V]) -> bool {
        axes(a, b).into_iter().any(|axis| {
            let (p, q) = (range(a, axis), range(b, axis));
            p.1 < q.0 || q.1 < p.0
        })
    }

    pub(super) fn meet(a: super::Triangle, b: super::Triangle) -> bool {
        let wide = |t: super::Triangle| t.map(|p| p.map(i128::from));
        let (a, b) = (wide(a), wide(b));
        let flat = |t: [V; 3]| cross(sub(t[1], t[0]), sub(t[2], t[0])) == [0; 3];
        if flat(a) || flat(b) {
            return false;
        }
        let alone = |t: [V; 3], other: [V; 3]| -> Vec<V> {
            t.into_iter().filter(|p| !other.contains(p)).collect()
        };
        let (of_a, of_b) = (alone(a, b), alone(b, a));
        match of_a.len() {
            3 => !disjoint(&a, &b),
            2 => !disjoint(&of_a, &b) || !disjoint(&of_b, &a),
            1 => {
                // One plane, and no axis in it along which the one ends where the other begins.
                let normal = cross(sub(a[1], a[0]), sub(a[2], a[0]));
                let in_plane = b.iter().all(|p| dot(sub(*p, a[0]), normal) == 0);
                let mut axes = sides(&a);
                axes.extend(sides(&b));
                in_plane
                    && axes
                        .into_iter()
                        .map(|side| cross(normal, side))
                        .all(|axis| {
                            let (p, q) = (range(&a, axis), range(&b, axis));
                            p.1 > q.0 && q.1 > p.0
                        })
            }
            _ => false,
        }
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(300))]

    #[test]
    fn small_soups_by_separating_axes(soup in prop::collection::vec(prop::array::uniform3(prop::array::uniform3(-2_i32..3)), 2..14)) {
        let pairs = (0..soup.len()).flat_map(|i| (i + 1..soup.len()).map(move |j| (i, j)));
        let wanted = pairs.filter(|(i, j)| oracle::meet(soup[*i], soup[*j])).count();
        prop_assert_eq!(count(&soup), wanted);
    }
}
