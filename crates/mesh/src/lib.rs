//! The revolved triangle mesh of a part, and what it will weigh before anything measures it.
//!
//! Conventions: the axis of revolution is z; the section starts in the plane y = 0, x >= 0 and turns right-handed about +z.
//! Triangles are counter-clockwise seen from outside. Every shell is closed by index: a seam ends in the corner it started
//! from, a point on the axis is one corner. Lengths are metres.
//!
//! A [`Plan`] fixes the rings: where they stand along the section, how many segments each has, within the distance asked for.
//! It knows the mesh's triangle count, volume, centre and inertia in closed form; [`Plan::mesh`] then makes the triangles.

mod aspect;
mod cap;
mod clearance;
mod correction;
mod fit;
mod meridian;
mod moments;
mod one_sided;
mod options;
mod plan;
mod predict;
mod revolve;
mod ring;
mod zip;

pub use moments::Moments;
pub use options::{MeshError, Options, Placement};

use glam::DVec3;
use profile::Region;
use std::f64::consts::TAU;
use std::ops::Range;

/// An indexed triangle mesh, metres.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Mesh {
    /// Corners.
    pub positions: Vec<DVec3>,
    /// Triangles, counter-clockwise from outside, by index into `positions`.
    pub triangles: Vec<[u32; 3]>,
    /// One for each body, in order: its part of the corners and of the triangles.
    pub bodies: Vec<BodyRange>,
}

/// A body's part of a mesh.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct BodyRange {
    /// Its corners.
    pub positions: Range<usize>,
    /// Its triangles.
    pub triangles: Range<usize>,
}

/// A body to be meshed.
#[derive(Debug, Clone, Copy)]
pub struct Solid<'a> {
    /// Its section.
    pub region: &'a Region,
    /// Its exact volume over the part's angle, m3.
    pub volume: f64,
}

/// The rings of a mesh that is to be made.
#[derive(Debug, Clone)]
pub struct Plan {
    bodies: Vec<plan::BodyPlan>,
    angle: f64,
    options: Options,
}

impl Plan {
    /// Plans the mesh of `solids` turned through `angle` (radians, TAU for a full turn).
    ///
    /// # Errors
    /// See [`MeshError`].
    pub fn new(solids: &[Solid], angle: f64, options: &Options) -> Result<Self, MeshError> {
        let bodies = solids
            .iter()
            .map(|solid| plan::body(solid.region, angle, solid.volume, options))
            .collect::<Result<Vec<_>, _>>()?;
        let planned = Self {
            bodies,
            angle,
            options: *options,
        };
        let triangles = planned.triangles();
        if triangles > options.most_triangles {
            return Err(MeshError::TooMany {
                triangles,
                allowed: options.most_triangles,
            });
        }
        Ok(planned)
    }

    /// How it was asked for.
    pub fn options(&self) -> &Options {
        &self.options
    }

    /// Triangles that the mesh will have.
    pub fn triangles(&self) -> u64 {
        self.bodies
            .iter()
            .map(|body| body.triangles(self.angle))
            .sum()
    }

    /// Bound on the distance between mesh and true surface, both ways, metres: the one that the formulas prove, at most
    /// the distance asked for.
    pub fn deviation(&self) -> f64 {
        self.bodies
            .iter()
            .fold(0.0, |most, body| most.max(body.deviation))
    }

    /// Volume, centre and inertia of the mesh of each body, from its rings.
    pub fn predicted(&self) -> Vec<Moments> {
        self.bodies
            .iter()
            .map(|body| predict::moments(&body.loops, self.angle))
            .collect()
    }

    /// How each body's mesh differs from it, by cause and edge.
    pub fn differences(&self) -> Vec<Vec<EdgeDifference>> {
        self.bodies
            .iter()
            .map(|body| predict::differences(&body.loops, self.angle))
            .collect()
    }

    /// Makes the triangles.
    ///
    /// # Errors
    /// End caps that cannot be triangulated.
    pub fn mesh(&self) -> Result<Mesh, MeshError> {
        let mut mesh = Mesh::default();
        for body in &self.bodies {
            let mut shells = revolve::revolve(body, self.angle)?;
            let (first, from) = (mesh.positions.len(), mesh.triangles.len());
            if first == 0 {
                (mesh.positions, mesh.triangles) = (shells.positions, shells.triangles);
            } else {
                let shift =
                    u32::try_from(first).map_err(|source| MeshError::TooManyCorners { source })?;
                mesh.positions.append(&mut shells.positions);
                mesh.triangles
                    .extend(shells.triangles.iter().map(|t| t.map(|i| i + shift)));
            }
            mesh.bodies.push(BodyRange {
                positions: first..mesh.positions.len(),
                triangles: from..mesh.triangles.len(),
            });
        }
        Ok(mesh)
    }

    /// True for a whole turn, which has no end caps.
    pub fn is_full_turn(&self) -> bool {
        self.angle == TAU
    }
}

/// What one edge of a body contributes to mesh volume less exact volume, m3.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct EdgeDifference {
    /// Which loop, 0 for the outer one.
    pub loop_index: usize,
    /// Which edge of the loop.
    pub edge_index: usize,
    /// From polygons in place of circles.
    pub circumferential: f64,
    /// From chords in place of the edge.
    pub meridional: f64,
}
