//! The two opinions on a mesh, against closed forms and against each other; and what the audit must not miss.

use glam::{DMat3, DQuat, DVec3};
use measure::{Triangles, audit, compare, figures, parry};
use parry3d::mass_properties::MassProperties;
use profile::trig;
use std::f64::consts::{PI, TAU};

#[derive(Clone)]
struct Sample {
    positions: Vec<DVec3>,
    triangles: Vec<[u32; 3]>,
}

impl Sample {
    fn mesh(&self) -> Triangles<'_> {
        Triangles {
            positions: &self.positions,
            triangles: &self.triangles,
        }
    }

    fn moved(&self, by: impl Fn(DVec3) -> DVec3) -> Self {
        Self {
            positions: self.positions.iter().map(|p| by(*p)).collect(),
            ..self.clone()
        }
    }
}

/// A tetrahedron with no two edges alike, off the origin.
fn wedge() -> Sample {
    Sample {
        positions: vec![
            DVec3::new(1.0, 2.0, 3.0),
            DVec3::new(4.0, 2.5, 3.0),
            DVec3::new(1.5, 7.0, 2.0),
            DVec3::new(0.5, 2.0, 9.0),
        ],
        triangles: vec![[0, 2, 1], [0, 1, 3], [1, 2, 3], [2, 0, 3]],
    }
}

/// A ring of rectangular section between radii `a` and `b`, `h` high, of `n` equal segments about z.
fn ring(a: f64, b: f64, h: f64, n: u32) -> Sample {
    let corner = |r: f64, z: f64, i: u32| {
        let (s, c) = trig::sin_cos(TAU * f64::from(i) / f64::from(n));
        DVec3::new(r * c, r * s, z)
    };
    let section = [(a, 0.0), (b, 0.0), (b, h), (a, h)];
    let positions = (0..n)
        .flat_map(|i| section.map(|(r, z)| corner(r, z, i)))
        .collect();
    let triangles = (0..n)
        .flat_map(|i| {
            let next = (i + 1) % n;
            (0..4).flat_map(move |k| {
                let l = (k + 1) % 4;
                let [a0, a1, b0, b1] = [4 * i + k, 4 * next + k, 4 * i + l, 4 * next + l];
                [[a0, a1, b0], [b0, a1, b1]]
            })
        })
        .collect();
    Sample {
        positions,
        triangles,
    }
}

/// What the ring's mesh encloses: a circle's moments with the factors of N equal steps (house rule: sin t / t on the area,
/// and (2 + cos t)/3 more on the polar moment of area).
fn ring_closed_form(a: f64, b: f64, h: f64, n: u32) -> (f64, f64, f64) {
    let t = TAU / f64::from(n);
    let area = trig::sin(t) / t;
    let volume = area * PI * (b * b - a * a) * h;
    let polar = area * (2.0 + trig::cos(t)) / 3.0 * PI / 2.0 * (b * b * b * b - a * a * a * a) * h;
    (volume, polar, polar / 2.0 + volume * h * h / 12.0)
}

fn near(a: f64, b: f64, relative: f64) -> bool {
    (a - b).abs() <= relative * b.abs()
}

/// ∫ x dV = V (a+b+c+d)/4 and, with products of the corners' sums, ∫ x y dV = V/20 (sum x sum y + sum of x y): the means over
/// a simplex (any text on finite elements).
#[test]
fn a_tetrahedron_has_its_closed_form() {
    let sample = wedge();
    let found = figures(sample.mesh());
    let [a, b, c, d] = [0, 1, 2, 3].map(|i: usize| sample.positions[i]);
    let volume = (b - a).dot((c - a).cross(d - a)) / 6.0;
    let centre = (a + b + c + d) / 4.0;
    assert!(near(found.volume, volume, 1e-14));
    assert!(found.centre.distance(centre) < 1e-14);
    let own = [a, b, c, d].map(|p| p - centre);
    let product = |i: usize, j: usize| volume / 20.0 * own.iter().map(|p| p[i] * p[j]).sum::<f64>();
    let wanted = DMat3::from_cols(
        DVec3::new(
            product(1, 1) + product(2, 2),
            -product(0, 1),
            -product(0, 2),
        ),
        DVec3::new(
            -product(0, 1),
            product(0, 0) + product(2, 2),
            -product(1, 2),
        ),
        DVec3::new(
            -product(0, 2),
            -product(1, 2),
            product(0, 0) + product(1, 1),
        ),
    );
    assert!(
        found.inertia.abs_diff_eq(wanted, 1e-13 * wanted.x_axis.x),
        "{} {wanted}",
        found.inertia
    );
    assert!(compare(&found, &parry(sample.mesh()).unwrap()).is_empty());
}

#[test]
fn figures_follow_the_mesh_as_it_is_moved_turned_scaled_and_renumbered() {
    let sample = wedge();
    let plain = figures(sample.mesh());
    let turn = DQuat::from_axis_angle(DVec3::new(1.0, -2.0, 0.5).normalize(), 1.1);
    let matrix = DMat3::from_quat(turn);
    for scale in [1e-5, 1e-3, 1.0, 1e5] {
        let there = DVec3::new(-3.0, 40.0, 7.0);
        let found = figures(sample.moved(|p| (turn * p + there) * scale).mesh());
        let (cube, fifth) = (scale * scale * scale, scale * scale * scale * scale * scale);
        assert!(near(found.volume, plain.volume * cube, 1e-13));
        assert!(near(found.surface, plain.surface * scale * scale, 1e-13));
        assert!(
            found.centre.distance((turn * plain.centre + there) * scale) < 1e-13 * 50.0 * scale
        );
        let wanted = matrix * plain.inertia * matrix.transpose() * fifth;
        assert!(
            found
                .inertia
                .abs_diff_eq(wanted, 1e-12 * wanted.x_axis.x.abs())
        );
    }
    let mut renumbered = sample.clone();
    renumbered.positions.swap(0, 3);
    renumbered.triangles = sample
        .triangles
        .iter()
        .map(|t| t.map(|i| [3, 1, 2, 0][i as usize]))
        .map(|[a, b, c]| [b, c, a])
        .collect();
    let found = figures(renumbered.mesh());
    assert!(near(found.volume, plain.volume, 1e-14) && found.centre.distance(plain.centre) < 1e-14);
}

#[test]
fn inside_out_is_negative_and_told() {
    let mut sample = wedge();
    sample.triangles.iter_mut().for_each(|t| t.swap(0, 1));
    let found = figures(sample.mesh());
    assert!(near(found.volume, -figures(wedge().mesh()).volume, 1e-15));
    assert!(near(found.surface, figures(wedge().mesh()).surface, 1e-15));
    // parry drops the sign.
    assert!(parry(sample.mesh()).unwrap().volume > 0.0);
    let audit = audit(sample.mesh());
    assert!(audit.is_closed() && audit.is_oriented() && !audit.outward && !audit.is_sound());
}

/// A flat ring in metres that stands askew: two equal small moments. parry 0.31.1 puts its matrix together again from axes
/// that are wrong there; its principal moments are right. Should the first assertion fail, the trap is gone.
#[test]
fn parry_s_principal_moments_are_right_where_its_matrix_is_not() {
    let askew = DQuat::from_axis_angle(DVec3::new(1.0, 0.4, -0.3).normalize(), 0.7);
    let tilted = ring(0.6, 1.0, 0.05, 96).moved(|p| askew * p);
    let own = figures(tilted.mesh());
    let rebuilt = MassProperties::from_trimesh(1.0, &tilted.positions, &tilted.triangles)
        .reconstruct_inertia_matrix();
    let error = (0..9)
        .map(|i| (rebuilt.to_cols_array()[i] - own.inertia.to_cols_array()[i]).abs())
        .fold(0.0, f64::max);
    assert!(error > 1e-3 * own.inertia.x_axis.x, "{error}");
    assert!(compare(&own, &parry(tilted.mesh()).unwrap()).is_empty());
}

#[test]
fn both_opinions_have_the_closed_form_of_flat_tall_and_thin_rings_at_every_scale() {
    for (a, b, h) in [(0.6, 1.0, 0.02), (0.2, 0.3, 4.0), (0.999, 1.0, 0.5)] {
        for scale in [1e-5, 1e-2, 1.0, 1e5] {
            let n = 120;
            let (volume, axial, across) = ring_closed_form(a, b, h, n);
            let askew = DQuat::from_axis_angle(DVec3::new(0.2, 1.0, 0.1).normalize(), 0.4);
            let sample = ring(a, b, h, n).moved(|p| askew * p * scale);
            let own = figures(sample.mesh());
            let (cube, fifth) = (scale * scale * scale, scale * scale * scale * scale * scale);
            // A wall of a thousandth of its radius cancels a thousandfold.
            assert!(near(own.volume, volume * cube, 1e-12));
            let axis = askew * DVec3::Z;
            let side = askew * DVec3::X;
            assert!(near(axis.dot(own.inertia * axis), axial * fifth, 1e-11));
            assert!(near(side.dot(own.inertia * side), across * fifth, 1e-11));
            let peer = parry(sample.mesh()).unwrap();
            assert!(near(peer.volume, own.volume, 1e-10));
            assert!(
                compare(&own, &peer).is_empty(),
                "{:?}",
                compare(&own, &peer)
            );
        }
    }
}

/// Why the measuring is done in f64: the same sum in f32, over a torus of a million triangles, is off in the fourth digit.
#[test]
fn single_precision_is_not_enough() {
    let (n, m) = (1000_u32, 500_u32);
    let corner = |i: u32, j: u32| {
        let (s, c) = trig::sin_cos(TAU * f64::from(i % n) / f64::from(n));
        let (v, u) = trig::sin_cos(TAU * f64::from(j % m) / f64::from(m));
        let r = 3.0 + u;
        DVec3::new(r * c, r * s, v)
    };
    let (mut single, mut double) = (0.0_f32, 0.0_f64);
    for i in 0..n {
        for j in 0..m {
            let [a, b, c, d] = [
                corner(i, j),
                corner(i + 1, j),
                corner(i, j + 1),
                corner(i + 1, j + 1),
            ];
            for [p, q, r] in [[a, b, c], [c, b, d]] {
                double += p.dot(q.cross(r));
                let [p, q, r] = [p, q, r].map(DVec3::as_vec3);
                single += p.dot(q.cross(r));
            }
        }
    }
    assert!(near(double / 6.0, TAU * 3.0 * PI, 1e-4));
    let error = (f64::from(single) / double - 1.0).abs();
    assert!(error > 1e-4, "{error}");
}

#[test]
fn the_audit_tells_each_kind_of_damage() {
    let sound = ring(1.0, 2.0, 1.0, 12);
    let found = audit(sound.mesh());
    assert!(found.is_sound(), "{found:?}");
    assert_eq!((found.components, found.triangles), (1, 96));

    let mut missing = sound.clone();
    missing.triangles.pop();
    let found = audit(missing.mesh());
    assert_eq!(found.boundary_edges, 3);
    assert!(!found.is_closed());

    let mut flipped = sound.clone();
    flipped.triangles[5].swap(0, 1);
    let found = audit(flipped.mesh());
    assert_eq!(found.flipped_edges, 3);
    assert!(found.is_closed() && !found.is_oriented());

    let mut twice = sound.clone();
    twice.triangles.push(sound.triangles[7]);
    let found = audit(twice.mesh());
    assert_eq!((found.duplicate_triangles, found.nonmanifold_edges), (1, 3));
    assert!(!found.is_manifold());

    let mut flat = sound.clone();
    let [a, b, _] = flat.triangles[0];
    flat.triangles.push([a, b, a]);
    assert_eq!(audit(flat.mesh()).degenerate_triangles, 1);

    let mut unused = sound.clone();
    unused.positions.push(DVec3::ONE);
    assert_eq!(audit(unused.mesh()).unreferenced_vertices, 1);
    assert_eq!(figures(unused.mesh()), figures(sound.mesh()));

    // Two rings, the second turned inside out: two pieces, one of them inverted.
    let mut pair = sound.clone();
    let second = ring(1.2, 1.8, 0.4, 12).moved(|p| p + 0.3 * DVec3::Z);
    let first = u32::try_from(pair.positions.len()).unwrap();
    pair.positions.extend(second.positions);
    pair.triangles.extend(
        second
            .triangles
            .iter()
            .map(|&[a, b, c]| [b + first, a + first, c + first]),
    );
    let found = audit(pair.mesh());
    assert_eq!((found.components, found.inverted_components), (2, 1));
    assert!(found.is_sound() && found.outward);

    let nothing = Sample {
        positions: Vec::new(),
        triangles: Vec::new(),
    };
    assert!(!audit(nothing.mesh()).is_closed());
    assert_eq!(parry(nothing.mesh()), None);
    assert_eq!(figures(nothing.mesh()).volume, 0.0);
}
