//! The exact figures of a part, from its regions and materials.

use crate::Source;
use crate::chords;
use crate::material::BodyMaterial;
use crate::record::{Body, Box3, Exact, Gyration, Implied, Matrix, Section, Surface};
use exact::{Solid, Whole};
use glam::DMat3;
use part::{Fault, Faults, Part};
use std::collections::HashMap;

/// What the surface of the two plane ends of a part turn is called.
const END_CAPS: &str = "end caps";

/// The exact figures of `part`, whose bodies are made of `materials`.
///
/// # Errors
/// The bodies whose figures are too large or too small for a number.
pub(crate) fn exact(
    part: &Part,
    materials: &[BodyMaterial],
    source: Source<'_>,
) -> Result<Exact, Faults> {
    let solids: Vec<Solid> = part
        .bodies
        .iter()
        .map(|body| exact::solid(&body.region, part.revolve))
        .collect();
    let bodies: Vec<Body> = part
        .bodies
        .iter()
        .zip(&solids)
        .zip(materials)
        .map(|((body, solid), material)| of_body(&body.name, solid, material))
        .collect();
    let faults = part
        .bodies
        .iter()
        .zip(&bodies)
        .filter(|(_, figures)| !is_sound(figures))
        .map(|(body, _)| {
            Fault::new(
                "study::out_of_range",
                format!(
                    "the figures of the body `{}` are too large or too small to be computed",
                    body.name
                ),
                body.span.clone(),
                "this body",
            )
            .help("is `unit` what the numbers are in?")
        })
        .collect();
    if let Some(faults) = Faults::of(source.file, &String::from_utf8_lossy(source.text), faults) {
        return Err(faults);
    }
    let weighted: Vec<(&Solid, f64)> = solids
        .iter()
        .zip(materials)
        .map(|(solid, material)| (solid, material.density))
        .collect();
    let whole = exact::whole(&weighted);
    let section = exact::section_of(&solids.iter().collect::<Vec<_>>());
    let swept: f64 = solids.iter().map(|solid| solid.swept_surface).sum();
    let section = Section {
        area: section.area,
        centroid_r: section.centroid.x,
        centroid_z: section.centroid.y,
        perimeter: section.perimeter,
        perimeter_centroid_r: section.perimeter_centroid.x,
    };
    let [across_x, across_y, _, axis] = whole.radii_of_gyration();
    Ok(Exact {
        volume: whole.volume,
        surface: whole.surface,
        mass: whole.mass,
        density: density(materials, &whole),
        centre: whole.centre.to_array(),
        inertia_about_centre: rows(whole.inertia_about_centre),
        inertia_about_origin: rows(whole.inertia_about_origin),
        bounds: Box3 {
            min: whole.bounds_min.to_array(),
            max: whole.bounds_max.to_array(),
        },
        surfaces: surfaces(part, &solids),
        mass_range: mass_range(&bodies),
        bodies,
        inertia_about_axis: whole.inertia_about_axis(),
        radii_of_gyration: Gyration {
            axis,
            across_x,
            across_y,
        },
        // A section starts in the plane y = 0, so its largest radius lies along x.
        largest_diameter: 2.0 * whole.bounds_max.x,
        length: whole.bounds_max.z - whole.bounds_min.z,
        implied_centroid: implied(part, &section, whole.volume, swept),
        section,
    })
}

fn of_body(name: &str, solid: &Solid, material: &BodyMaterial) -> Body {
    let density = material.density;
    Body {
        name: name.to_owned(),
        material: material.designation.clone(),
        density,
        volume: solid.volume,
        surface: solid.surface(),
        mass: density * solid.volume,
        centre: solid.centre.to_array(),
        inertia_about_centre: rows(solid.inertia_about_centre * density),
        density_range: material.range,
    }
}

/// True where no figure has left the range of a number.
fn is_sound(body: &Body) -> bool {
    let inertia = body.inertia_about_centre.as_flattened();
    let positive = [body.volume, body.surface, body.mass, inertia[0], inertia[8]];
    positive
        .into_iter()
        .all(|figure| figure.is_normal() && figure > 0.0)
        && body
            .centre
            .iter()
            .chain(inertia)
            .all(|figure| figure.is_finite())
}

/// The one density of all bodies, or mass over volume.
fn density(materials: &[BodyMaterial], whole: &Whole) -> f64 {
    match materials {
        [first, others @ ..] if others.iter().all(|other| other.density == first.density) => {
            first.density
        }
        _ => whole.mass / whole.volume,
    }
}

/// Least and greatest mass; `None` where every density is fixed.
fn mass_range(bodies: &[Body]) -> Option<[f64; 2]> {
    bodies
        .iter()
        .any(|body| body.density_range.is_some())
        .then(|| {
            [0, 1].map(|end| {
                bodies
                    .iter()
                    .map(|body| {
                        body.volume * body.density_range.map_or(body.density, |range| range[end])
                    })
                    .sum()
            })
        })
}

/// The surface by body and name: names in the order in which the outline meets them, then all edges without one, then
/// the end caps.
fn surfaces(part: &Part, solids: &[Solid]) -> Vec<Surface> {
    let mut surfaces = Vec::new();
    for (body, solid) in part.bodies.iter().zip(solids) {
        let mut named: Vec<(&str, f64)> = Vec::new();
        let mut places: HashMap<&str, usize> = HashMap::new();
        let mut unnamed = None;
        for (outline, figures) in body.region.loops().zip(&solid.edges) {
            for (tag, edge) in outline.tags().iter().zip(figures) {
                let step = usize::try_from(*tag)
                    .ok()
                    .and_then(|tag| body.steps.get(tag));
                match step.and_then(|step| step.name.as_deref()) {
                    None => *unnamed.get_or_insert(0.0) += edge.surface,
                    Some(name) => {
                        let place = *places.entry(name).or_insert(named.len());
                        match named.get_mut(place) {
                            Some((_, area)) => *area += edge.surface,
                            None => named.push((name, edge.surface)),
                        }
                    }
                }
            }
        }
        let mut add = |name: Option<&str>, area: f64, end_caps: bool| {
            surfaces.push(Surface {
                body: body.name.clone(),
                name: name.map(ToOwned::to_owned),
                area,
                end_caps,
            });
        };
        for (name, area) in named {
            add(Some(name), area, false);
        }
        if let Some(area) = unnamed {
            add(None, area, false);
        }
        if solid.cap_surface > 0.0 {
            add(Some(END_CAPS), solid.cap_surface, true);
        }
    }
    surfaces
}

/// The theorems used backwards, compared with the centroids found by another way.
fn implied(part: &Part, section: &Section, volume: f64, swept: f64) -> Implied {
    let by_chords = chords::centroids(part.bodies.iter().map(|body| &body.region));
    let area = volume / (section.area * part.revolve);
    let perimeter = swept / (section.perimeter * part.revolve);
    let difference = |implied: f64, found: f64| (implied / found - 1.0).abs();
    Implied {
        area,
        perimeter,
        difference: difference(area, by_chords.area)
            .max(difference(perimeter, by_chords.perimeter)),
    }
}

fn rows(matrix: DMat3) -> Matrix {
    // By rows as by columns: it is symmetric.
    matrix.to_cols_array_2d()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sample::{self, ring};
    use std::f64::consts::{FRAC_PI_2, PI, TAU};

    fn figures(sample: &Part, materials: &[BodyMaterial]) -> Exact {
        exact(sample, materials, sample::SOURCE).unwrap()
    }

    fn material(density: f64, range: Option<[f64; 2]>) -> BodyMaterial {
        BodyMaterial {
            designation: None,
            density,
            range,
        }
    }

    #[track_caller]
    fn assert_near(found: f64, known: f64) {
        assert!(
            (found - known).abs() <= 1e-13 * known.abs(),
            "{found} is not {known}"
        );
    }

    #[test]
    fn a_ring_has_the_figures_of_handbooks() {
        let sample = sample::part(TAU, vec![ring("ring", 0.04, 0.06, -0.01, 0.02)]);
        let exact = figures(&sample, &[material(7850.0, None)]);
        let volume = PI * (0.06 * 0.06 - 0.04 * 0.04) * 0.03;
        assert_near(exact.section.area, 0.02 * 0.03);
        assert_near(exact.section.centroid_r, 0.05);
        assert_near(exact.section.centroid_z, 0.005);
        assert_near(exact.section.perimeter, 0.1);
        assert_near(exact.volume, volume);
        assert_near(exact.mass, volume * 7850.0);
        assert_eq!(exact.density, 7850.0);
        assert_eq!(exact.mass_range, None);
        // Mass times the mean of the squared radii; across: the half of it and the twelfth of the squared height.
        let squares = 0.06 * 0.06 + 0.04 * 0.04;
        assert_near(exact.inertia_about_axis, exact.mass * squares / 2.0);
        let across = exact.mass * (squares / 4.0 + 0.03 * 0.03 / 12.0);
        assert_near(exact.inertia_about_centre[0][0], across);
        assert_near(
            exact.inertia_about_origin[1][1],
            across + exact.mass * 0.005 * 0.005,
        );
        assert_near(exact.radii_of_gyration.axis, (squares / 2.0).sqrt());
        assert_near(exact.largest_diameter, 0.12);
        assert_near(exact.length, 0.03);
        assert_near(exact.implied_centroid.area, 0.05);
        assert!(exact.implied_centroid.difference < 1e-13);
    }

    #[test]
    fn surfaces_are_grouped_by_body_and_name() {
        let sample = sample::part(TAU, vec![ring("ring", 0.04, 0.06, 0.0, 0.03)]);
        let exact = figures(&sample, &[material(1000.0, None)]);
        let named: Vec<Option<&str>> = exact
            .surfaces
            .iter()
            .map(|surface| surface.name.as_deref())
            .collect();
        assert_eq!(named, [Some("face"), Some("rim"), None]);
        let face = PI * (0.06 * 0.06 - 0.04 * 0.04);
        assert_near(exact.surfaces[0].area, 2.0 * face);
        assert_near(exact.surfaces[1].area, TAU * 0.06 * 0.03);
        assert_near(exact.surfaces[2].area, TAU * 0.04 * 0.03);
        assert_near(
            exact.surfaces.iter().map(|surface| surface.area).sum(),
            exact.surface,
        );
    }

    #[test]
    fn a_part_turn_has_two_end_caps() {
        let sample = sample::part(FRAC_PI_2, vec![ring("ring", 0.04, 0.06, 0.0, 0.03)]);
        let exact = figures(&sample, &[material(1000.0, None)]);
        let caps = exact.surfaces.last().unwrap();
        assert_eq!(
            (caps.name.as_deref(), caps.end_caps),
            (Some("end caps"), true)
        );
        assert_near(caps.area, 2.0 * 0.02 * 0.03);
        assert_near(exact.volume, PI / 4.0 * (0.06 * 0.06 - 0.04 * 0.04) * 0.03);
        assert_near(exact.largest_diameter, 0.12);
        assert!(exact.implied_centroid.difference < 1e-13);
        // As much along x as along y, and each the other's mirror.
        assert_near(exact.centre[0], exact.centre[1]);
        assert!(exact.inertia_about_origin[0][1] < 0.0);
    }

    #[test]
    fn bodies_add_up() {
        let wheel = ring("wheel", 0.02, 0.06, 0.0, 0.03);
        let bush = ring("bush", 0.01, 0.02, -0.01, 0.04);
        let sample = sample::part(TAU, vec![wheel, bush]);
        let exact = figures(
            &sample,
            &[
                material(7200.0, Some([7050.0, 7350.0])),
                material(9000.0, None),
            ],
        );
        let [wheel, bush] = [0, 1].map(|index| exact.bodies[index].volume);
        assert_near(exact.volume, wheel + bush);
        assert_near(exact.mass, 7200.0 * wheel + 9000.0 * bush);
        assert_near(exact.density, exact.mass / exact.volume);
        let [least, most] = exact.mass_range.unwrap();
        assert_near(least, 7050.0 * wheel + 9000.0 * bush);
        assert_near(most, 7350.0 * wheel + 9000.0 * bush);
        assert_near(
            exact.surface,
            exact.bodies[0].surface + exact.bodies[1].surface,
        );
        assert_near(exact.length, 0.05);
        assert_near(exact.centre[2], 0.015);
    }

    #[test]
    fn figures_that_are_no_numbers_are_refused() {
        // Sizes that a region may have, with densities that take the moments of inertia out of f64's range.
        for (scale, density) in [(1e58, 1e30), (1e-57, 1e-30)] {
            let body = ring("ring", 0.04 * scale, 0.06 * scale, 0.0, 0.03 * scale);
            let sample = sample::part(TAU, vec![body]);
            let faults = exact(&sample, &[material(density, None)], sample::SOURCE).unwrap_err();
            let codes: Vec<_> = faults.iter().map(|fault| fault.code).collect();
            assert_eq!(codes, ["study::out_of_range"]);
        }
    }
}
