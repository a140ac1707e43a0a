//! Revolved meshes of parts whose volumes are in every handbook: closed, of the predicted weight, within the distance, on
//! the right side.

use glam::{DVec2, DVec3};
use mesh::{Mesh, MeshError, Moments, Options, Placement, Plan, Solid};
use profile::{Arc, Edge, Loop, Region, RegionIndex, trig};
use std::collections::HashMap;
use std::f64::consts::{FRAC_PI_2, PI, TAU};

fn at(r: f64, z: f64) -> DVec2 {
    DVec2::new(r, z)
}

fn outline(edges: Vec<Edge>) -> Loop {
    Loop::new(edges.into_iter().zip(0..)).expect("the edges share their ends")
}

fn polygon(corners: &[(f64, f64)]) -> Loop {
    let next = corners.iter().cycle().skip(1);
    let edges = corners.iter().zip(next);
    outline(
        edges
            .map(|(a, b)| Edge::line(at(a.0, a.1), at(b.0, b.1)))
            .collect(),
    )
}

fn arc(start: DVec2, end: DVec2, sweep: f64) -> Edge {
    Edge::Arc(Arc { start, end, sweep })
}

/// A ball of radius 1, closed along the axis.
fn ball() -> Loop {
    outline(vec![
        arc(at(0.0, -1.0), at(0.0, 1.0), PI),
        Edge::line(at(0.0, 1.0), at(0.0, -1.0)),
    ])
}

/// Parts and their volumes over a full turn, by the handbook.
fn parts() -> Vec<(&'static str, Region, f64)> {
    let frustum = |a: f64, b: f64, h: f64| PI * h / 3.0 * (a * a + a * b + b * b);
    let inner = 0.999;
    let region = |outer: Loop| Region::new(outer, vec![]).expect("a handbook part is legal");
    let torus = outline(vec![
        arc(at(3.0, -1.0), at(3.0, 1.0), PI),
        arc(at(3.0, 1.0), at(3.0, -1.0), PI),
    ]);
    // Touches the axis in the middle of an edge: a torus without a hole.
    let horn = outline(vec![
        arc(at(1.0, -1.0), at(1.0, 1.0), PI),
        arc(at(1.0, 1.0), at(1.0, -1.0), PI),
    ]);
    let pierced = polygon(&[(0.3, 0.0), (0.4, 0.3), (0.5, 0.0)]);
    let shell = outline(vec![
        arc(at(0.0, -1.0), at(0.0, 1.0), PI),
        Edge::line(at(0.0, 1.0), at(0.0, inner)),
        arc(at(0.0, inner), at(0.0, -inner), -PI),
        Edge::line(at(0.0, -inner), at(0.0, -1.0)),
    ]);
    vec![
        ("horn torus", region(horn), 2.0 * PI * PI),
        (
            "cylinder",
            region(polygon(&[(0.0, 0.0), (1.0, 0.0), (1.0, 2.0), (0.0, 2.0)])),
            2.0 * PI,
        ),
        (
            "tube",
            region(polygon(&[(0.5, 0.0), (1.0, 0.0), (1.0, 2.0), (0.5, 2.0)])),
            1.5 * PI,
        ),
        (
            "cones",
            region(polygon(&[
                (0.0, 0.0),
                (1.0, 0.0),
                (0.5, 2.0),
                (0.2, 3.0),
                (0.0, 3.5),
            ])),
            frustum(1.0, 0.5, 2.0) + frustum(0.5, 0.2, 1.0) + frustum(0.2, 0.0, 0.5),
        ),
        (
            // Reaches the axis in one point: a disc less two cones on it.
            "two cones out of a disc",
            region(polygon(&[(0.0, 0.0), (1.0, -1.0), (1.0, 1.0)])),
            2.0 * PI - 2.0 * frustum(0.0, 1.0, 1.0),
        ),
        ("ball", region(ball()), 4.0 / 3.0 * PI),
        ("torus", region(torus), TAU * 3.0 * PI),
        // Pappus: area times the path of its centroid.
        (
            "sharp lip",
            region(polygon(&[(1.0, 0.0), (2.0, 1.0), (1.2, 0.4)])),
            TAU * 0.1 * (1.0 + 2.0 + 1.2) / 3.0,
        ),
        (
            "ball with a void",
            Region::new(ball(), vec![pierced]).expect("a handbook part is legal"),
            4.0 / 3.0 * PI - TAU * 0.4 * 0.03,
        ),
        (
            "thin shell",
            region(shell),
            4.0 / 3.0 * PI * (1.0 - inner * inner * inner),
        ),
    ]
}

const WITHIN: f64 = 2e-3;

fn corners(mesh: &Mesh, triangle: [u32; 3]) -> [DVec3; 3] {
    triangle.map(|i| mesh.positions[i as usize])
}

fn measured(mesh: &Mesh) -> Moments {
    mesh.triangles
        .iter()
        .fold(Moments::default(), |mut sum, triangle| {
            let [a, b, c] = corners(mesh, *triangle);
            sum += Moments::of_triangle(a, b, c);
            sum
        })
}

/// Every directed edge once and its opposite too, no triangle without area, no corner unused.
fn assert_sound(name: &str, mesh: &Mesh) {
    let mut edges: HashMap<(u32, u32), u32> = HashMap::new();
    let mut used = vec![false; mesh.positions.len()];
    for triangle in &mesh.triangles {
        let [i, j, k] = *triangle;
        for (from, to) in [(i, j), (j, k), (k, i)] {
            *edges.entry((from, to)).or_default() += 1;
            used[from as usize] = true;
        }
        let [a, b, c] = corners(mesh, *triangle);
        assert!(
            (b - a).cross(c - a).length() > 0.0,
            "{name}: {triangle:?} has no area"
        );
    }
    let sound = edges
        .iter()
        .all(|(&(i, j), &count)| count == 1 && edges.contains_key(&(j, i)));
    assert!(sound && used.into_iter().all(|used| used), "{name}");
}

/// A part meshed one way.
struct Case {
    name: String,
    region: Region,
    volume: f64,
    angle: f64,
    placement: Placement,
    plan: Plan,
    mesh: Mesh,
}

fn cases() -> impl Iterator<Item = Case> {
    parts().into_iter().flat_map(|(name, region, full)| {
        [TAU, FRAC_PI_2, 5.0].into_iter().flat_map(move |angle| {
            let region = region.clone();
            let placements = [
                Placement::VolumeTrue,
                Placement::Inscribed,
                Placement::Circumscribed,
            ];
            placements.into_iter().map(move |placement| {
                let volume = full * angle / TAU;
                let options = Options {
                    placement,
                    ..Options::within(WITHIN)
                };
                let plan = Plan::new(
                    &[Solid {
                        region: &region,
                        volume,
                    }],
                    angle,
                    &options,
                )
                .expect("a handbook part is legal");
                let mesh = plan.mesh().expect("a handbook part is legal");
                let name = format!("{name} turned {angle:.2}, {}", placement.word());
                Case {
                    name,
                    region: region.clone(),
                    volume,
                    angle,
                    placement,
                    plan,
                    mesh,
                }
            })
        })
    })
}

#[test]
fn every_mesh_is_sound_and_has_the_triangles_that_were_counted() {
    for Case {
        name, plan, mesh, ..
    } in cases()
    {
        assert_eq!(mesh.triangles.len() as u64, plan.triangles(), "{name}");
        assert_sound(&name, &mesh);
    }
}

#[test]
fn every_mesh_weighs_what_its_rings_say_and_the_causes_add_up() {
    for Case {
        name,
        volume,
        placement,
        plan,
        mesh,
        ..
    } in cases()
    {
        let (found, predicted) = (measured(&mesh), plan.predicted()[0]);
        // A plain sum of n terms rounds by at most n/2 units of the terms' sizes (Higham 2002, section 4.2).
        let sizes: f64 = mesh
            .triangles
            .iter()
            .map(|triangle| {
                let [a, b, c] = corners(&mesh, *triangle);
                Moments::of_triangle(a, b, c).volume.abs()
            })
            .sum();
        let rounding = 0.5 * f64::EPSILON * mesh.triangles.len() as f64 * sizes;
        assert!((predicted.volume - found.volume).abs() < rounding, "{name}");
        assert!(predicted.centre().distance(found.centre()) < 1e-9, "{name}");
        let (a, b) = (
            predicted.inertia_about_centre(),
            found.inertia_about_centre(),
        );
        assert!(a.abs_diff_eq(b, 1e-9 * b.x_axis.x), "{name}: {a} {b}");
        let causes = plan.differences();
        let causes: f64 = causes[0]
            .iter()
            .map(|edge| edge.circumferential + edge.meridional)
            .sum();
        assert!((volume + causes - found.volume).abs() < rounding, "{name}");
        match placement {
            Placement::VolumeTrue => assert!((found.volume / volume - 1.0).abs() < 1e-9, "{name}"),
            Placement::Inscribed => assert!(found.volume < volume, "{name}"),
            Placement::Circumscribed => assert!(found.volume > volume, "{name}"),
        }
    }
}

/// Corners, edge middles and facet middles of full turns, by their signed distance from the section.
#[test]
fn every_mesh_keeps_its_distance_and_its_side() {
    for Case {
        name,
        region,
        angle,
        placement,
        plan,
        mesh,
        ..
    } in cases()
    {
        assert!(plan.deviation() <= WITHIN * (1.0 + 1e-12), "{name}");
        if angle != TAU {
            continue;
        }
        let index = RegionIndex::new(&region);
        let rounding = 1e-12;
        for triangle in &mesh.triangles {
            let [a, b, c] = corners(&mesh, *triangle);
            for p in [
                a,
                b,
                c,
                0.5 * (a + b),
                0.5 * (b + c),
                0.5 * (c + a),
                (a + b + c) / 3.0,
            ] {
                let distance = index.signed_distance(at(trig::hypot(p.x, p.y), p.z));
                assert!(
                    distance.abs() <= plan.deviation() + rounding,
                    "{name}: {distance} at {p}"
                );
                let right_side = match placement {
                    Placement::VolumeTrue => true,
                    Placement::Inscribed => distance <= rounding,
                    Placement::Circumscribed => distance >= -rounding,
                };
                assert!(right_side, "{name}: {distance} at {p}");
            }
        }
    }
}

/// N equal steps: the section's volume times N sin(2 pi/N)/(2 pi), the axial moment (2 + cos(2 pi/N))/3 times that more.
#[test]
fn an_inscribed_cylinder_has_the_factors_of_n_equal_steps() {
    let case = cases()
        .find(|case| case.placement == Placement::Inscribed && case.name.starts_with("cylinder"))
        .expect("it is among them");
    let steps = (case.mesh.positions.len() - 2) / 2;
    let t = TAU / steps as f64;
    let factor = trig::sin(t) / t;
    let found = measured(&case.mesh);
    assert!((found.volume / (case.volume * factor) - 1.0).abs() < 1e-13);
    let axial = 0.5 * case.volume * factor * (2.0 + trig::cos(t)) / 3.0;
    assert!((found.inertia_about_centre().z_axis.z / axial - 1.0).abs() < 1e-13);
}

#[test]
fn the_best_mesh_of_so_many_triangles() {
    let (_, ball, volume) = parts()
        .into_iter()
        .find(|part| part.0 == "ball")
        .expect("it is among them");
    let solids = [Solid {
        region: &ball,
        volume,
    }];
    let best = |most: u64| Plan::of_at_most(most, &solids, TAU, &Options::within(1.0)).unwrap();
    let (fine, coarse) = (best(20_000), best(2_000));
    assert!(
        (18_000..=20_000).contains(&fine.triangles()),
        "{}",
        fine.triangles()
    );
    assert!(
        (1_700..=2_000).contains(&coarse.triangles()),
        "{}",
        coarse.triangles()
    );
    // The distance falls as one over the count.
    let ratio = coarse.deviation() / fine.deviation();
    assert!((7.0..14.0).contains(&ratio), "{ratio}");
}

/// Longest edge over the height on it.
fn aspect([a, b, c]: [DVec3; 3]) -> f64 {
    let longest = (a.distance(b)).max(b.distance(c)).max(c.distance(a));
    longest * longest / (b - a).cross(c - a).length()
}

#[test]
fn triangles_keep_the_aspect_ratio_that_is_asked_for() {
    let placements = [
        Placement::VolumeTrue,
        Placement::Inscribed,
        Placement::Circumscribed,
    ];
    let mut slenderest = 0.0_f64;
    for (name, region, volume) in parts() {
        let solids = [Solid {
            region: &region,
            volume,
        }];
        // A cusp on the axis has no end of rings.
        if name == "horn torus" {
            let options = Options {
                greatest_aspect: Some(7.0),
                ..Options::within(WITHIN)
            };
            let refused = Plan::new(&solids, TAU, &options).expect_err("needles at a cusp");
            assert_eq!(refused, MeshError::Aspect { asked: 7.0 });
            continue;
        }
        for placement in placements {
            for asked in [None, Some(6.0), Some(10.0), Some(30.0)] {
                let name = format!("{name}, {}, {asked:?}", placement.word());
                let options = Options {
                    placement,
                    greatest_aspect: asked,
                    most_triangles: 2_000_000,
                    ..Options::within(WITHIN)
                };
                let plan = match Plan::new(&solids, TAU, &options) {
                    Ok(plan) => plan,
                    // One count for all rings, and rings of any radius down to none.
                    Err(MeshError::Aspect { .. })
                        if placement != Placement::VolumeTrue && region.bounds().min.x <= 0.0 =>
                    {
                        continue;
                    }
                    Err(error) => panic!("{name}: {error}"),
                };
                let mesh = plan.mesh().expect("a planned mesh can be made");
                assert_sound(&name, &mesh);
                assert_eq!(mesh.triangles.len() as u64, plan.triangles(), "{name}");
                assert!(plan.deviation() <= WITHIN * (1.0 + 1e-12), "{name}");
                let worst = mesh
                    .triangles
                    .iter()
                    .map(|triangle| aspect(corners(&mesh, *triangle)))
                    .fold(0.0, f64::max);
                match asked {
                    Some(asked) => assert!(worst <= asked * (1.0 + 1e-9), "{name}: {worst}"),
                    None => slenderest = slenderest.max(worst),
                }
            }
        }
    }
    assert!(
        slenderest > 30.0,
        "without it there are needles: {slenderest}"
    );
}

#[test]
fn what_cannot_be_meshed_is_refused() {
    let (_, ball, volume) = parts()
        .into_iter()
        .find(|part| part.0 == "ball")
        .expect("it is among them");
    let solids = [Solid {
        region: &ball,
        volume,
    }];
    for within in [0.0, -1.0, f64::NAN, f64::INFINITY, 1e-14] {
        assert!(
            Plan::new(&solids, TAU, &Options::within(within)).is_err(),
            "{within}"
        );
    }
    let many = Plan::new(&solids, TAU, &Options::within(1e-11))
        .unwrap_err()
        .to_string();
    assert!(many.contains("more than the"), "{many}");
    let few = Plan::of_at_most(3, &solids, TAU, &Options::within(1.0))
        .unwrap_err()
        .to_string();
    assert!(few.contains("more than the 3 asked for"), "{few}");
    // A distance larger than the part: the plainest mesh, still sound.
    let plain = Plan::new(&solids, TAU, &Options::within(50.0))
        .unwrap()
        .mesh()
        .unwrap();
    assert_sound("plain ball", &plain);
}
