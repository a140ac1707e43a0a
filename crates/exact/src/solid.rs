//! The figures of one body, for unit density.

use crate::area::{AreaMoments, area_moments};
use crate::boundary::{LineMoments, line_moments};
use crate::real::Real;
use crate::turn::Turn;
use glam::{DMat3, DVec3};
use profile::{DVec2, Region};
use twofloat::TwoFloat;

/// The figures of a section.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Section {
    /// Area, m2.
    pub area: f64,
    /// Centroid of the area, r and z, m.
    pub centroid: DVec2,
    /// Length of the whole boundary, voids and edges on the axis included, m.
    pub perimeter: f64,
    /// Centroid of the boundary, r and z, m.
    pub perimeter_centroid: DVec2,
}

/// The figures of one edge.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct EdgeFigures {
    /// Length, m.
    pub length: f64,
    /// ∫ r ds, m2.
    pub first_moment_r: f64,
    /// Surface swept through the part's angle, m2.
    pub surface: f64,
}

/// The exact figures of one body of revolution, for unit density: mass is density times volume, a moment of inertia
/// density times what stands here.
///
/// Frame: the section starts in the plane y = 0, x >= 0 and turns right-handed about +z through `revolve`. Products of
/// inertia carry their minus sign: I_xy = -∫ x y dV.
#[derive(Debug, Clone, PartialEq)]
pub struct Solid {
    /// Angle turned through, radians.
    pub revolve: f64,
    /// The section.
    pub section: Section,
    /// Volume, m3.
    pub volume: f64,
    /// Surface swept by the boundary, m2.
    pub swept_surface: f64,
    /// Both end caps of a part turn, m2; 0 for a full turn.
    pub cap_surface: f64,
    /// Centre of volume, m.
    pub centre: DVec3,
    /// Moment of inertia matrix about the centre, m5.
    pub inertia_about_centre: DMat3,
    /// The same about the origin, m5.
    pub inertia_about_origin: DMat3,
    /// One a loop, as [`Region::loops`]; in it one an edge.
    pub edges: Vec<Vec<EdgeFigures>>,
    /// Least x, y, z, m.
    pub bounds_min: DVec3,
    /// Greatest x, y, z, m.
    pub bounds_max: DVec3,
    /// Bound on the relative error of area and volume.
    pub accuracy: f64,
}

impl Solid {
    /// Surface: swept and end caps, m2.
    pub fn surface(&self) -> f64 {
        self.swept_surface + self.cap_surface
    }
}

/// The exact figures of `region` turned through `revolve` (radians; exactly TAU for a full turn).
pub fn solid(region: &Region, revolve: f64) -> Solid {
    let turn = Turn::new(revolve);
    let moments = area_moments(region);
    let z0 = moments.origin.y;
    let mut boundary = LineMoments::default();
    let edges: Vec<Vec<EdgeFigures>> = region
        .loops()
        .map(|outline| {
            let figures = outline.edges().iter().map(|edge| {
                let own = line_moments(edge, z0);
                boundary = boundary.plus(own);
                EdgeFigures {
                    length: own.length,
                    first_moment_r: own.r,
                    surface: revolve * own.r,
                }
            });
            figures.collect()
        })
        .collect();
    let swept_surface = edges.iter().flatten().map(|edge| edge.surface).sum();
    let section = Section {
        area: moments.one.into(),
        centroid: moments.centroid(),
        perimeter: boundary.length,
        perimeter_centroid: DVec2::new(
            boundary.r / boundary.length,
            z0 + boundary.z / boundary.length,
        ),
    };
    let body = Body::new(&moments, &turn);
    let (bounds_min, bounds_max) = turn.bounds(region.bounds());
    Solid {
        revolve,
        section,
        volume: body.volume.into(),
        swept_surface,
        cap_surface: if turn.is_full() {
            0.0
        } else {
            2.0 * section.area
        },
        centre: body.centre(z0),
        inertia_about_centre: body.inertia_about_centre(),
        inertia_about_origin: body.inertia_about_origin(z0),
        edges,
        bounds_min,
        bounds_max,
        accuracy: moments.accuracy,
    }
}

impl AreaMoments {
    fn centroid(&self) -> DVec2 {
        self.origin + DVec2::new(self.r.over(self.one).into(), self.z.over(self.one).into())
    }
}

/// Raw moments of the body about the axis and the local station, in double-double: what is subtracted for the figures
/// about the centre keeps its digits.
struct Body {
    volume: TwoFloat,
    first: [TwoFloat; 3],
    xx: TwoFloat,
    yy: TwoFloat,
    zz: TwoFloat,
    xy: TwoFloat,
    yz: TwoFloat,
    zx: TwoFloat,
}

impl Body {
    /// dV = r dr dz dθ, so every moment is one of the section's, shifted from the local origin to the axis by the binomial
    /// theorem, times an integral over the angle.
    fn new(m: &AreaMoments, turn: &Turn) -> Self {
        let c = TwoFloat::from(m.origin.x);
        let two = TwoFloat::from(2.0);
        let three = TwoFloat::from(3.0);
        let r = c * m.one + m.r;
        let rr = c * (c * m.one + two * m.r) + m.rr;
        let rrr = c * (c * (c * m.one + three * m.r) + three * m.rr) + m.rrr;
        let rz = c * m.z + m.rz;
        let rrz = c * (c * m.z + two * m.rz) + m.rrz;
        let rzz = c * m.zz + m.rzz;
        Self {
            volume: turn.whole * r,
            first: [turn.cos * rr, turn.sin * rr, turn.whole * rz],
            xx: turn.cos_cos * rrr,
            yy: turn.sin_sin * rrr,
            zz: turn.whole * rzz,
            xy: turn.sin_cos * rrr,
            yz: turn.sin * rrz,
            zx: turn.cos * rrz,
        }
    }

    fn centre(&self, z0: f64) -> DVec3 {
        let [x, y, z] = self.first.map(|first| first.over(self.volume));
        DVec3::new(x.into(), y.into(), (z + TwoFloat::from(z0)).into())
    }

    fn inertia_about_centre(&self) -> DMat3 {
        let [x, y, z] = self.first;
        let v = self.volume;
        inertia(
            [
                self.xx - (x * x).over(v),
                self.yy - (y * y).over(v),
                self.zz - (z * z).over(v),
            ],
            [
                self.xy - (x * y).over(v),
                self.yz - (y * z).over(v),
                self.zx - (z * x).over(v),
            ],
        )
    }

    /// The origin is `z0` below the local station.
    fn inertia_about_origin(&self, z0: f64) -> DMat3 {
        let [x, y, z] = self.first;
        let z0 = TwoFloat::from(z0);
        let two = TwoFloat::from(2.0);
        inertia(
            [
                self.xx,
                self.yy,
                self.zz + z0 * (two * z + z0 * self.volume),
            ],
            [self.xy, self.yz + z0 * y, self.zx + z0 * x],
        )
    }
}

/// The matrix from the second moments [xx, yy, zz] and [xy, yz, zx].
fn inertia([xx, yy, zz]: [TwoFloat; 3], [xy, yz, zx]: [TwoFloat; 3]) -> DMat3 {
    let [ixx, iyy, izz] = [yy + zz, zz + xx, xx + yy].map(f64::from);
    // Not -0.0 for a product that vanishes.
    let [ixy, iyz, izx] = [xy, yz, zx].map(|product| 0.0 - f64::from(product));
    DMat3::from_cols(
        DVec3::new(ixx, ixy, izx),
        DVec3::new(ixy, iyy, iyz),
        DVec3::new(izx, iyz, izz),
    )
}
