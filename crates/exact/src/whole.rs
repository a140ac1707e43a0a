//! Several bodies with their densities, together.

use crate::{Section, Solid};
use glam::{DMat3, DVec3};

/// The figures of a whole part.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Whole {
    /// Volume, m3: the sum over the bodies.
    pub volume: f64,
    /// Surface, m2: the sum over the bodies, faces where they touch included.
    pub surface: f64,
    /// Mass, kg.
    pub mass: f64,
    /// Centre of mass, m.
    pub centre: DVec3,
    /// Moment of inertia matrix about the centre of mass, kg m2.
    pub inertia_about_centre: DMat3,
    /// The same about the origin, kg m2.
    pub inertia_about_origin: DMat3,
    /// Least x, y, z, m.
    pub bounds_min: DVec3,
    /// Greatest x, y, z, m.
    pub bounds_max: DVec3,
}

impl Whole {
    /// Moment of inertia about the axis of revolution, kg m2.
    pub fn inertia_about_axis(&self) -> f64 {
        self.inertia_about_origin.z_axis.z
    }

    /// Radii of gyration in m about the lines through the centre of mass along x, y and z, and about the axis.
    pub fn radii_of_gyration(&self) -> [f64; 4] {
        let centre = self.inertia_about_centre;
        [
            centre.x_axis.x,
            centre.y_axis.y,
            centre.z_axis.z,
            self.inertia_about_axis(),
        ]
        .map(|inertia| (inertia / self.mass).sqrt())
    }
}

/// The figures of all bodies together, each with its density in kg/m3. At least one body.
///
/// # Panics
/// Without a body.
pub fn whole(bodies: &[(&Solid, f64)]) -> Whole {
    let (first, _) = bodies.first().expect("a part has at least one body");
    let mass: f64 = bodies
        .iter()
        .map(|(solid, density)| density * solid.volume)
        .sum();
    // About the first body's centre, so that a part far up the axis keeps its digits.
    let near = first.centre;
    let moment: DVec3 = bodies
        .iter()
        .map(|(solid, density)| (solid.centre - near) * (density * solid.volume))
        .sum();
    let centre = near + moment / mass;
    let about = |point: DVec3| {
        bodies.iter().fold(DMat3::ZERO, |sum, (solid, density)| {
            let shifted = steiner(solid.centre - point) * solid.volume;
            sum + (solid.inertia_about_centre + shifted) * *density
        })
    };
    Whole {
        volume: bodies.iter().map(|(solid, _)| solid.volume).sum(),
        surface: bodies.iter().map(|(solid, _)| solid.surface()).sum(),
        mass,
        centre,
        inertia_about_centre: about(centre),
        inertia_about_origin: bodies.iter().fold(DMat3::ZERO, |sum, (solid, density)| {
            sum + solid.inertia_about_origin * *density
        }),
        bounds_min: bodies
            .iter()
            .map(|(solid, _)| solid.bounds_min)
            .fold(first.bounds_min, DVec3::min),
        bounds_max: bodies
            .iter()
            .map(|(solid, _)| solid.bounds_max)
            .fold(first.bounds_max, DVec3::max),
    }
}

/// The parallel-axis theorem (Steiner): what unit mass at `d` adds, d² 1 - d dᵀ.
fn steiner(d: DVec3) -> DMat3 {
    let square = d * d;
    let product = |a: f64, b: f64| 0.0 - a * b;
    DMat3::from_cols(
        DVec3::new(square.y + square.z, product(d.x, d.y), product(d.z, d.x)),
        DVec3::new(product(d.x, d.y), square.z + square.x, product(d.y, d.z)),
        DVec3::new(product(d.z, d.x), product(d.y, d.z), square.x + square.y),
    )
}

/// The sections of all bodies as one: areas and perimeters add, centroids are their means.
pub fn section_of(solids: &[&Solid]) -> Section {
    let sum = |figure: &dyn Fn(&Section) -> f64| {
        solids
            .iter()
            .map(|solid| figure(&solid.section))
            .sum::<f64>()
    };
    let (area, perimeter) = (sum(&|s| s.area), sum(&|s| s.perimeter));
    let mean = |weight: &dyn Fn(&Section) -> f64, place: &dyn Fn(&Section) -> f64, total: f64| {
        sum(&|s| weight(s) * place(s)) / total
    };
    Section {
        area,
        centroid: profile::DVec2::new(
            mean(&|s| s.area, &|s| s.centroid.x, area),
            mean(&|s| s.area, &|s| s.centroid.y, area),
        ),
        perimeter,
        perimeter_centroid: profile::DVec2::new(
            mean(&|s| s.perimeter, &|s| s.perimeter_centroid.x, perimeter),
            mean(&|s| s.perimeter, &|s| s.perimeter_centroid.y, perimeter),
        ),
    }
}
