//! What must hold of every mesh: random parts, meshed in random ways, are sound, near, on their side, and weigh what they
//! should.

use crate::turned::{Turned, turned};
use crate::{DENSITY, config};
use checks::{one_body, study};
use files::{Format, Unit};
use glam::DVec3;
use mesh::{MeshError, Options, Placement};
use profile::trig::{direction, hypot};
use profile::{DVec2, Region, RegionIndex};
use proptest::prelude::*;
use proptest::test_runner::Config;
use std::io::Cursor;
use std::num::NonZeroU32;
use strickle::{Kept, Made, Study};

/// How a part is meshed.
#[derive(Debug, Clone, Copy)]
struct Way {
    within: f64,
    placement: Placement,
    segments: u32,
    /// Degrees turned through; a whole turn as often as not.
    degrees: f64,
}

fn ways() -> impl Strategy<Value = Way> {
    let placement = prop_oneof![
        2 => Just(Placement::VolumeTrue),
        1 => Just(Placement::Inscribed),
        1 => Just(Placement::Circumscribed),
    ];
    let degrees = prop_oneof![Just(360.0), 5.0..359.0_f64];
    (-6.0..-0.5_f64, placement, 3_u32..40, degrees).prop_map(
        |(exponent, placement, segments, degrees)| Way {
            within: libm::exp2(exponent),
            placement,
            segments,
            degrees,
        },
    )
}

/// The part's study and its mesh; none where a one-sided mesh would lie on itself, in a notch or an edge without an angle.
fn meshed(part: &Turned, way: Way) -> Option<(Study, Made)> {
    let outline = part.outline(0, part.stations() - 1);
    let text = one_body("m", DENSITY, &format!("outline = {}", outline.steps()));
    let text = text.replace(
        "unit = \"m\"",
        &format!("unit = \"m\"\nrevolve = {:?}", way.degrees),
    );
    let study = study(&text);
    let options = Options {
        placement: way.placement,
        least_segments: NonZeroU32::new(way.segments).expect("three at least"),
        most_triangles: 300_000,
        ..Options::within(way.within)
    };
    let plan = match study.plan(&options, None) {
        Err(MeshError::TooThin { .. })
            if way.placement != Placement::VolumeTrue
                && has_a_cusp(&study.part.bodies[0].region) =>
        {
            return None;
        }
        plan => plan.expect("a random part can be meshed"),
    };
    let made = Made::of(plan).expect("a planned mesh can be made");
    Some((study, made))
}

/// Whether somewhere two edges leave a corner in the same direction.
fn has_a_cusp(region: &Region) -> bool {
    let edges: Vec<_> = region.edges().collect();
    let following = edges.iter().cycle().skip(1);
    edges
        .iter()
        .zip(following)
        .any(|(edge, next)| edge.tangent(1.0).dot(next.tangent(0.0)) < -1.0 + 1e-9)
}

/// Corners, edge middles and facet middles.
fn samples([a, b, c]: [DVec3; 3]) -> [DVec3; 7] {
    [
        a,
        b,
        c,
        0.5 * (a + b),
        0.5 * (b + c),
        0.5 * (c + a),
        (a + b + c) / 3.0,
    ]
}

fn corners(made: &Made, triangle: usize) -> [DVec3; 3] {
    made.mesh.triangles[triangle].map(|i| made.mesh.positions[i as usize])
}

/// The nearest point of a triangle (Ericson 2005, section 5.1.5): by its plane, else by its edges.
fn distance_to_triangle(p: DVec3, [a, b, c]: [DVec3; 3]) -> f64 {
    let normal = (b - a).cross(c - a);
    let inside = [(a, b), (b, c), (c, a)]
        .into_iter()
        .all(|(from, to)| (to - from).cross(p - from).dot(normal) >= 0.0);
    if inside {
        return ((p - a).dot(normal) / normal.length()).abs();
    }
    [(a, b), (b, c), (c, a)]
        .into_iter()
        .map(|(from, to)| {
            let along = to - from;
            let t = ((p - from).dot(along) / along.length_squared()).clamp(0.0, 1.0);
            p.distance(from + t * along)
        })
        .fold(f64::INFINITY, f64::min)
}

/// Points of the true swept surface, at shares of the boundary's edges and of the turn.
fn on_surface(region: &Region, degrees: f64, shares: &[(f64, f64)]) -> Vec<DVec3> {
    let edges: Vec<_> = region
        .edges()
        .filter(|edge| edge.point(0.5).x > 0.0)
        .collect();
    shares
        .iter()
        .zip(edges.iter().cycle())
        .map(|((along, around), edge)| {
            let p = edge.point(*along);
            let turned = direction(around * degrees.to_radians());
            DVec3::new(p.x * turned.x, p.x * turned.y, p.y)
        })
        .collect()
}

proptest! {
    #![proptest_config(Config { cases: if std::env::var_os("PROPTEST_CASES").is_none() { 500 } else { config().cases }, ..config() })]

    #[test]
    fn a_mesh_of_any_part_is_proved_near_and_on_its_side(
        part in turned(),
        way in ways(),
        shares in prop::collection::vec((0.0..1.0_f64, 0.0..1.0_f64), 12),
    ) {
        let Some((mut study, made)) = meshed(&part, way) else {
            return Ok(());
        };
        let deviation = made.plan.deviation();
        prop_assert!(deviation <= way.within * (1.0 + 1e-12));
        prop_assert_eq!(made.mesh.triangles.len() as u64, made.plan.triangles());

        // Written and read back, it is proved.
        let mut file = Cursor::new(Vec::new());
        Format::Stl.write(&study.model(&made, Unit::Millimetre), &mut file).expect("memory takes all");
        file.set_position(0);
        let kept = Kept::stl(&mut file, &made, Unit::Millimetre, None).expect("it was just written");
        let (predicted, _) = study.prove(&made, &kept);
        let verdict = study.record.verdict.clone().expect("a proof has a verdict");
        prop_assert!(verdict.holds, "{:?}", verdict.reasons);
        let ratio = predicted.volume / study.exact().volume;
        match way.placement {
            Placement::VolumeTrue => prop_assert!((ratio - 1.0).abs() < 1e-9, "{ratio}"),
            Placement::Inscribed => prop_assert!(ratio <= 1.0, "{ratio}"),
            Placement::Circumscribed => prop_assert!(ratio >= 1.0, "{ratio}"),
        }

        // From the mesh to the surface, and its side. Of a part turn the faces of the ends are off the surface all over.
        let region = &study.part.bodies[0].region;
        let rounding = 1e-11;
        if way.degrees == 360.0 {
            let index = RegionIndex::new(region);
            let step = made.mesh.triangles.len().div_ceil(300);
            for triangle in (0..made.mesh.triangles.len()).step_by(step) {
                for p in samples(corners(&made, triangle)) {
                    let distance = index.signed_distance(DVec2::new(hypot(p.x, p.y), p.z));
                    prop_assert!(distance.abs() <= deviation + rounding, "{distance} at {p}, {deviation} allowed");
                    match way.placement {
                        Placement::VolumeTrue => {}
                        Placement::Inscribed => prop_assert!(distance <= rounding, "{distance} at {p}"),
                        Placement::Circumscribed => prop_assert!(distance >= -rounding, "{distance} at {p}"),
                    }
                }
            }
        }
        // From the surface to the mesh.
        for p in on_surface(region, way.degrees, &shares) {
            let distance = (0..made.mesh.triangles.len())
                .map(|triangle| distance_to_triangle(p, corners(&made, triangle)))
                .fold(f64::INFINITY, f64::min);
            prop_assert!(distance <= deviation + rounding, "{distance} at {p}, {deviation} allowed");
        }
    }
}
