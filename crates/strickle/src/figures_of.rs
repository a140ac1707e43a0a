//! The exact figures of a part, from its regions and materials.

use crate::chords;
use crate::material::BodyMaterial;
use crate::record::{Body, Box3, Exact, Gyration, Implied, Matrix, Section, Surface};
use crate::Source;
use exact::{Solid, Whole};
use glam::DMat3;
use part::{Fault, Faults, Part};

/// What the surface of the two plane ends of a part turn is called.
const END_CAPS: &str = "end caps";

/// The exact figures of `part`, whose bodies are made of `materials`.
///
/// # Errors
/// The bodies whose figures are too large or too small for a number.
pub(crate) fn part(
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
    positive.into_iter().all(|figure| figure.is_normal() && figure > 0.0)
        && body.centre.iter().chain(inertia).all(|figure| figure.is_finite())
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
    bodies.iter().any(|body| body.density_range.is_some()).then(|| {
        [0, 1].map(|end| {
            bodies
                .iter()
                .map(|body| body.volume * body.density_range.map_or(body.density, |range| range[end]))
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
        let mut unnamed = None;
        for (outline, figures) in body.region.loops().zip(&solid.edges) {
            for (tag, edge) in outline.tags().iter().zip(figures) {
                let step = usize::try_from(*tag).ok().and_then(|tag| body.steps.get(tag));
                match step.and_then(|step| step.name.as_deref()) {
                    None => *unnamed.get_or_insert(0.0) += edge.surface,
                    Some(name) => match named.iter_mut().find(|(known, _)| *known == name) {
                        Some((_, area)) => *area += edge.surface,
                        None => named.push((name, edge.surface)),
                    },
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
