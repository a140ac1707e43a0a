//! Bodies with their densities, as one.

use crate::Study;
use glam::{DMat3, DVec3};
use mesh::{Moments, Plan};

/// One body or the whole part, measured or predicted: everything the comparison shows.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Weighed {
    /// Volume, m3.
    pub volume: f64,
    /// Mass, kg.
    pub mass: f64,
    /// Centre of mass, m.
    pub centre: DVec3,
    /// Moment of inertia matrix about the centre of mass, kg m2.
    pub inertia: DMat3,
}

/// Volume, centre and inertia about it of one body, for unit density.
pub(crate) type Unweighed = (f64, DVec3, DMat3);

impl Study {
    /// What the mesh must measure, by its rings.
    pub fn predicted(&self, plan: &Plan) -> Weighed {
        self.together(plan.predicted().iter().map(of_moments))
    }

    /// The bodies, in their order, with their densities as one.
    pub(crate) fn together(&self, bodies: impl Iterator<Item = Unweighed> + Clone) -> Weighed {
        let densities = self.materials.iter().map(|material| material.density);
        let bodies = bodies.zip(densities);
        let mass: f64 = bodies
            .clone()
            .map(|((volume, ..), density)| volume * density)
            .sum();
        let centre = bodies
            .clone()
            .map(|((volume, centre, _), density)| centre * (volume * density))
            .sum::<DVec3>()
            / mass;
        let inertia = bodies
            .clone()
            .fold(DMat3::ZERO, |sum, ((volume, own, inertia), density)| {
                let d = own - centre;
                let outer = DMat3::from_cols(d * d.x, d * d.y, d * d.z);
                let shift = DMat3::from_diagonal(DVec3::splat(d.length_squared())) - outer;
                sum + (inertia + shift * volume) * density
            });
        Weighed {
            volume: bodies.map(|((volume, ..), _)| volume).sum(),
            mass,
            centre,
            inertia,
        }
    }
}

fn of_moments(moments: &Moments) -> Unweighed {
    (
        moments.volume,
        moments.centre(),
        moments.inertia_about_centre(),
    )
}
