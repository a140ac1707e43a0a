//! From a part to a mesh that can be sent.

use crate::Study;
use crate::record::{Mesh, Predicted};
use files::{Body, Model, Unit};
use mesh::{MeshError, Options, Plan, Solid};

/// Share of the largest extent that a mesh may be off where nothing is said: 1/2000.
const DEFAULT_SHARE: f64 = 1.0 / 2000.0;

/// A mesh of the part, in f64, with the rings it was made from.
#[derive(Debug)]
pub struct Made {
    /// The rings.
    pub plan: Plan,
    /// The triangles, body after body.
    pub mesh: mesh::Mesh,
}

impl Study {
    /// The greatest distance between mesh and surface where nothing is said, metres.
    pub fn default_within(&self) -> f64 {
        let exact = self.exact();
        DEFAULT_SHARE * exact.largest_diameter.max(exact.length)
    }

    /// Plans a mesh of the part; where `at_most` triangles are asked for, the nearest one that has no more, whatever
    /// `options.within` says.
    ///
    /// # Errors
    /// See [`MeshError`].
    pub fn plan(&self, options: &Options, at_most: Option<u64>) -> Result<Plan, MeshError> {
        let bodies = self.part.bodies.iter().zip(&self.exact().bodies);
        let solids: Vec<Solid> = bodies
            .map(|(body, exact)| Solid {
                region: &body.region,
                volume: exact.volume,
            })
            .collect();
        match at_most {
            None => Plan::new(&solids, self.part.revolve, options),
            Some(most) => Plan::of_at_most(most, &solids, self.part.revolve, options),
        }
    }

    /// The mesh with what a file can say about it.
    pub fn model<'a>(&'a self, made: &'a Made, unit: Unit) -> Model<'a> {
        let bodies = self.part.bodies.iter().zip(&self.materials);
        Model {
            name: &self.part.name,
            unit,
            positions: &made.mesh.positions,
            triangles: &made.mesh.triangles,
            bodies: bodies
                .zip(&made.mesh.bodies)
                .map(|((body, material), range)| Body {
                    name: &body.name,
                    material: material.designation.as_deref().unwrap_or("not named"),
                    positions: range.positions.clone(),
                    triangles: range.triangles.clone(),
                })
                .collect(),
        }
    }

    /// Notes in the record which mesh was made, and the file that it was written to, if any.
    pub fn note_mesh(&mut self, made: &Made, file: Option<String>) {
        let predicted = self.predicted(&made.plan);
        self.record.mesh = Some(Mesh {
            file,
            triangles: made.mesh.triangles.len(),
            vertices: made.mesh.positions.len(),
            within: made.plan.options().within,
            placement: made.plan.options().placement.word(),
            largest_deviation: made.plan.deviation(),
            predicted: Predicted {
                volume: predicted.volume,
                centre: predicted.centre.to_array(),
            },
        });
    }
}

impl Made {
    /// Makes the triangles.
    ///
    /// # Errors
    /// See [`Plan::mesh`].
    pub fn of(plan: Plan) -> Result<Self, MeshError> {
        let mesh = plan.mesh()?;
        Ok(Self { plan, mesh })
    }
}
