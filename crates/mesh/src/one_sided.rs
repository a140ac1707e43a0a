//! Meshes that lie on one side of the surface.

use crate::plan::{BodyPlan, Corner, LoopPlan, Outline, Station, count, pole};
use crate::{MeshError, Options, Placement};
use profile::{DVec2, trig};
use std::f64::consts::TAU;

/// Which way a band faces: away from the axis, towards it, or along it.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Facing {
    Outward,
    Inward,
    Along,
}

fn facing(from: DVec2, to: DVec2) -> Facing {
    // The outward normal of the travel (dr, dz) is (dz, -dr).
    match (to.y - from.y).partial_cmp(&0.0) {
        Some(std::cmp::Ordering::Greater) => Facing::Outward,
        Some(std::cmp::Ordering::Less) => Facing::Inward,
        _ => Facing::Along,
    }
}

/// Rings of one count for the whole body. With corners at the radius r the polygon is inside the circle, at r / cos(t/2)
/// outside; outward faces get the one, inward faces the other, so that the solid between them is on the same side
/// everywhere. Where two such faces meet in a lip, the ring stands where the two displaced faces meet.
pub(crate) fn one_sided_rings(
    chains: &[Outline],
    angle: f64,
    options: &Options,
    within: f64,
) -> Result<BodyPlan, MeshError> {
    let outer_grows = options.placement == Placement::Circumscribed;
    let excess = |step: f64| 1.0 / trig::cos(0.5 * step) - 1.0;
    let mut segments = chains
        .iter()
        .flat_map(|outline| &outline.corners)
        .filter(|corner| corner.at.x > 0.0)
        .map(|corner| count(corner, angle, options, within, excess))
        .max()
        .unwrap_or(3);
    loop {
        let grown = 1.0 + excess(angle / f64::from(segments));
        let factor = |facing: Facing| {
            if (facing == Facing::Outward) == outer_grows {
                grown
            } else {
                1.0
            }
        };
        let mut deviation = 0.0_f64;
        let loops: Vec<LoopPlan> = chains
            .iter()
            .map(|outline| {
                let (stations, off) = one_sided_stations(&outline.corners, segments, grown, factor);
                deviation = deviation.max(off);
                LoopPlan {
                    stations,
                    meridional: outline.meridional.clone(),
                }
            })
            .collect();
        if deviation <= within {
            let plan = BodyPlan { loops, deviation };
            plan.allow(angle, options)?;
            return Ok(plan);
        }
        let more = segments / 8 + 4;
        segments = if angle == TAU {
            segments + more / 4 * 4
        } else {
            segments + more
        };
        if u64::from(segments) > options.most_triangles {
            return Err(MeshError::TooMany {
                triangles: u64::from(segments),
                allowed: options.most_triangles,
            });
        }
    }
}

fn one_sided_stations(
    corners: &[Corner],
    segments: u32,
    grown: f64,
    factor: impl Fn(Facing) -> f64,
) -> (Vec<Station>, f64) {
    let count = corners.len();
    let mut deviation = 0.0_f64;
    let stations = (0..count)
        .map(|i| {
            let [before, corner, after] = [
                &corners[(i + count - 1) % count],
                &corners[i],
                &corners[(i + 1) % count],
            ];
            if corner.at.x <= 0.0 {
                return pole(corner);
            }
            let (arriving, leaving) = (facing(before.at, corner.at), facing(corner.at, after.at));
            let is_lip = matches!(
                (arriving, leaving),
                (Facing::Outward, Facing::Inward) | (Facing::Inward, Facing::Outward)
            );
            let scaled = |p: DVec2, by: f64| DVec2::new(p.x * by, p.y);
            let at = if is_lip {
                let (f, g) = (factor(arriving), factor(leaving));
                let (p, u) = (
                    scaled(corner.at, f),
                    scaled(corner.at, f) - scaled(before.at, f),
                );
                let (q, v) = (
                    scaled(corner.at, g),
                    scaled(after.at, g) - scaled(corner.at, g),
                );
                let turned = u.perp_dot(v);
                if turned == 0.0 {
                    p
                } else {
                    p + u * ((q - p).perp_dot(v) / turned)
                }
            } else {
                let facing = if arriving == Facing::Along {
                    leaving
                } else {
                    arriving
                };
                scaled(corner.at, factor(facing))
            };
            let off = if is_lip {
                at.distance(corner.at) + (grown - 1.0) * corner.at.x
            } else {
                corner.circle.cost((grown - 1.0) * corner.at.x)
            };
            deviation = deviation.max(corner.spent + off);
            corner.ring(segments, at)
        })
        .collect();
    (stations, deviation)
}
