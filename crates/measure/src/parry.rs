//! The second opinion: parry3d-f64's mass properties of a triangle mesh.
//!
//! What is asked of it and what is not: its mass, centre and principal moments are right for closed meshes of unit size, to
//! which the mesh is brought first. It drops the volume's sign and answers for open meshes too, so the audit is asked
//! beforehand; and its matrix put together again from principal moments (`reconstruct_inertia_matrix`, 0.31.1) is wrong
//! for a flat ring that stands askew, whose two smallest moments are equal, so the matrix is compared by its invariants.

use crate::{Figures, Triangles};
use glam::DVec3;
use parry3d::mass_properties::MassProperties;

/// What parry says of a mesh, for unit density.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Parry {
    /// Volume without its sign, m3.
    pub volume: f64,
    /// Centre, m.
    pub centre: DVec3,
    /// Principal moments of inertia about the centre, in no order, m5.
    pub principal: [f64; 3],
}

/// Measures by parry; `None` where there is no triangle or no volume.
pub fn parry(mesh: Triangles) -> Option<Parry> {
    let (low, high) = mesh.bounds()?;
    let (middle, extent) = (0.5 * (low + high), (high - low).max_element());
    if !(extent.is_finite() && extent > 0.0) {
        return None;
    }
    let unit: Vec<DVec3> = mesh
        .positions
        .iter()
        .map(|p| (p - middle) / extent)
        .collect();
    let found = MassProperties::from_trimesh(1.0, &unit, mesh.triangles);
    let volume = found.mass();
    if !(volume.is_finite() && volume > 0.0) {
        return None;
    }
    let (square, cube) = (extent * extent, extent * extent * extent);
    Some(Parry {
        volume: volume * cube,
        centre: middle + found.local_com * extent,
        principal: found
            .principal_inertia()
            .to_array()
            .map(|moment| moment * cube * square),
    })
}

/// Where the two opinions differ by more than rounding.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Disagreement {
    /// On what: `volume`, `centre`, `principal moments`.
    pub on: &'static str,
    /// By how much, relative to the volume, the mesh's extent, the moments.
    pub by: f64,
}

/// Relative difference beyond which the two opinions disagree. Both are sums of f64 over up to 1e8 triangles; parry's is not
/// compensated, and a thin shell cancels up to 1e4-fold: 1e-16 times 1e4 times a random walk's 1e4 is 1e-8.
const AGREED: f64 = 1e-8;

/// Compares the two opinions on one mesh.
pub fn compare(own: &Figures, peer: &Parry) -> Vec<Disagreement> {
    let i = own.inertia;
    let trace = i.x_axis.x + i.y_axis.y + i.z_axis.z;
    let minors = {
        let pair = |a: f64, b: f64, off: f64| a * b - off * off;
        pair(i.x_axis.x, i.y_axis.y, i.x_axis.y)
            + pair(i.y_axis.y, i.z_axis.z, i.y_axis.z)
            + pair(i.z_axis.z, i.x_axis.x, i.z_axis.x)
    };
    let [p, q, r] = peer.principal;
    let relative = |a: f64, b: f64| (a - b).abs() / b.abs();
    let gyration = (trace / own.volume).abs().sqrt();
    [
        ("volume", relative(own.volume.abs(), peer.volume)),
        ("centre", own.centre.distance(peer.centre) / gyration),
        (
            "principal moments",
            relative(trace.abs(), p + q + r)
                .max(relative(minors, p * q + q * r + r * p))
                .max(relative(i.determinant().abs(), p * q * r)),
        ),
    ]
    .into_iter()
    // Not a number counts as a disagreement.
    .filter(|(_, by)| by.is_nan() || *by > AGREED)
    .map(|(on, by)| Disagreement { on, by })
    .collect()
}
