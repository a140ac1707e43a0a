//! The program's own sum over a mesh: volume, surface, centre and inertia, in one pass.
//!
//! The divergence theorem turns each integral over the solid into a sum over signed tetrahedra with one corner in common.
//! That corner is the middle of the mesh's box, so that a part far from the origin keeps its digits. Runs of [`RUN`] triangles
//! are summed plainly and in parallel, the runs in their order with Neumaier's compensation (Neumaier 1974): the error is
//! that of one run, whatever the mesh's size, and the bits are the same for any number of threads.

use crate::Triangles;
use glam::{DMat3, DVec3};
use rayon::prelude::*;

/// What a mesh encloses, for unit density.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Figures {
    /// Volume, m3; negative for a mesh that is inside out.
    pub volume: f64,
    /// Surface, m2.
    pub surface: f64,
    /// Centre of volume, m; not a number where the volume is zero.
    pub centre: DVec3,
    /// Moment of inertia matrix about the centre, m5; products with their minus sign.
    pub inertia: DMat3,
}

/// Triangles a run.
const RUN: usize = 1024;

/// Sums in the order volume, surface, first moments x y z, second moments xx yy zz xy yz zx.
type Sums = [f64; 11];

/// The figures of a mesh. They mean something where [`crate::audit()`] finds it closed and oriented.
pub fn figures(mesh: Triangles) -> Figures {
    let middle = mesh
        .bounds()
        .map_or(DVec3::ZERO, |(low, high)| 0.5 * (low + high));
    let runs: Vec<Sums> = mesh
        .triangles
        .par_chunks(RUN)
        .map(|run| sum_of(mesh, run, middle))
        .collect();
    let mut total = [Compensated::default(); 11];
    for run in runs {
        for (sum, part) in total.iter_mut().zip(run) {
            sum.add(part);
        }
    }
    let [volume, surface, x, y, z, xx, yy, zz, xy, yz, zx] = total.map(Compensated::value);
    // The sums leave out the means' factors: 1/6 of the determinant, 1/4 and 1/20 of the corners' sums.
    let volume = volume / 6.0;
    let first = DVec3::new(x, y, z) / 24.0;
    let centre = first / volume;
    let [xx, yy, zz, xy, yz, zx] = [xx, yy, zz, xy, yz, zx].map(|moment| moment / 120.0);
    let c = centre;
    let (xx, yy, zz) = (
        xx - volume * c.x * c.x,
        yy - volume * c.y * c.y,
        zz - volume * c.z * c.z,
    );
    let (xy, yz, zx) = (
        volume * c.x * c.y - xy,
        volume * c.y * c.z - yz,
        volume * c.z * c.x - zx,
    );
    Figures {
        volume,
        surface: 0.5 * surface,
        centre: middle + centre,
        inertia: DMat3::from_cols(
            DVec3::new(yy + zz, xy, zx),
            DVec3::new(xy, zz + xx, yz),
            DVec3::new(zx, yz, xx + yy),
        ),
    }
}

fn sum_of(mesh: Triangles, run: &[[u32; 3]], middle: DVec3) -> Sums {
    let mut sums = [0.0; 11];
    for &triangle in run {
        let [a, b, c] = mesh.corners(triangle).map(|p| p - middle);
        let normal = (b - a).cross(c - a);
        let determinant = a.dot(normal);
        let s = a + b + c;
        // ∫ x xᵀ over a tetrahedron on the middle: its volume / 20 times s sᵀ + a aᵀ + b bᵀ + c cᵀ.
        let squares = s * s + a * a + b * b + c * c;
        let turned = |v: DVec3| DVec3::new(v.y, v.z, v.x);
        let products = s * turned(s) + a * turned(a) + b * turned(b) + c * turned(c);
        let terms = [
            1.0, 0.0, s.x, s.y, s.z, squares.x, squares.y, squares.z, products.x, products.y,
            products.z,
        ];
        for (sum, term) in sums.iter_mut().zip(terms) {
            *sum += determinant * term;
        }
        sums[1] += normal.length();
    }
    sums
}

/// A sum with what its additions rounded away.
#[derive(Debug, Clone, Copy, Default)]
struct Compensated {
    sum: f64,
    lost: f64,
}

impl Compensated {
    fn add(&mut self, x: f64) {
        let sum = self.sum + x;
        self.lost += if self.sum.abs() >= x.abs() {
            (self.sum - sum) + x
        } else {
            (x - sum) + self.sum
        };
        self.sum = sum;
    }

    fn value(self) -> f64 {
        self.sum + self.lost
    }
}
