//! A body as rings: which circles the mesh stands on and how many segments each has, before a triangle is made.

use crate::meridian::{Chain, Division, Node, divide};
use crate::one_sided::one_sided_rings;
use crate::ring::{Circle, area_true, segments};
use crate::{MeshError, Options, Placement};
use profile::{DVec2, Edge, Loop, Region};
use std::f64::consts::TAU;

/// A ring of the mesh, or a point of it on the axis.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Station {
    /// Radius of the ring's corners, metres; 0 for a point on the axis.
    pub(crate) radius: f64,
    /// Where along the axis, metres.
    pub(crate) z: f64,
    /// Segments over the part's angle; 0 for a point on the axis.
    pub(crate) segments: u32,
    /// The node of the chain that the ring stands for, r and z: a circle that its polygon replaces.
    pub(crate) node: DVec2,
    /// What the ring answers for.
    pub(crate) circle: Circle,
    /// Meridional distance already spent on either side, metres.
    pub(crate) spent: f64,
    /// The edge (index in its loop) of the band from this station to the next.
    pub(crate) edge: u32,
}

impl Station {
    /// Bound on the distance of the bands about this ring from the true surface.
    fn deviation(self) -> f64 {
        self.spent + self.circle.cost((self.radius - self.node.x).abs())
    }

    /// True for a point on the axis.
    pub(crate) fn is_pole(self) -> bool {
        self.segments == 0
    }
}

/// The stations of one loop in order of travel, closed.
#[derive(Debug, Clone)]
pub(crate) struct LoopPlan {
    pub(crate) stations: Vec<Station>,
    /// Chain's moment ∬ r dA less the edge's, one an edge, m3 a radian.
    pub(crate) meridional: Vec<f64>,
}

impl LoopPlan {
    /// The bands: pairs of neighbouring stations of which at most one is on the axis.
    pub(crate) fn bands(&self) -> impl Iterator<Item = (Station, Station)> {
        let following = self.stations.iter().cycle().skip(1);
        self.stations
            .iter()
            .zip(following)
            .filter(|(a, b)| !(a.is_pole() && b.is_pole()))
            .map(|(a, b)| (*a, *b))
    }
}

/// One body as rings.
#[derive(Debug, Clone)]
pub(crate) struct BodyPlan {
    pub(crate) loops: Vec<LoopPlan>,
    /// Bound on the distance between mesh and true surface, both ways, metres.
    pub(crate) deviation: f64,
}

impl BodyPlan {
    /// Refuses more triangles than are allowed.
    pub(crate) fn allow(&self, angle: f64, options: &Options) -> Result<(), MeshError> {
        let triangles = self.triangles(angle);
        if triangles > options.most_triangles {
            return Err(MeshError::TooMany {
                triangles,
                allowed: options.most_triangles,
            });
        }
        Ok(())
    }

    /// Triangles that the plan leads to, end caps included.
    pub(crate) fn triangles(&self, angle: f64) -> u64 {
        let bands: u64 = self
            .loops
            .iter()
            .flat_map(LoopPlan::bands)
            .map(|(a, b)| u64::from(a.segments) + u64::from(b.segments))
            .sum();
        if angle == TAU {
            bands
        } else {
            // A polygon of n corners and h holes has n + 2h - 2 triangles.
            let corners: usize = self.loops.iter().map(|l| l.stations.len()).sum();
            bands + 2 * (corners + 2 * (self.loops.len() - 1) - 2) as u64
        }
    }
}

/// A node of the chain with what the ring on it has to answer for.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Corner {
    pub(crate) at: DVec2,
    pub(crate) circle: Circle,
    /// Meridional distance already spent on either side.
    pub(crate) spent: f64,
    /// The edge that starts or runs on here.
    pub(crate) edge: u32,
    /// Least number of segments of its ring, over the part's angle.
    pub(crate) least: u32,
}

/// Cosine of the angle between two faces' normals above which the profile counts as running on smoothly: 0.08 degrees.
const SMOOTH: f64 = 1.0 - 1e-6;

/// Plans one body.
///
/// `volume`: what the body's mesh shall enclose, m3, for the volume-true placement.
///
/// # Errors
/// More triangles than allowed; faces closer than a mesh of allowed size keeps apart.
pub(crate) fn body(
    region: &Region,
    angle: f64,
    volume: f64,
    options: &Options,
) -> Result<BodyPlan, MeshError> {
    let extent = region
        .bounds()
        .size()
        .max_element()
        .max(region.bounds().max.x);
    if !(options.within.is_finite() && options.within >= LEAST_WITHIN * extent) {
        return Err(MeshError::Within);
    }
    // The part's own extent is bound enough: beyond it the plainest mesh is made.
    let mut within = options.within.min(extent);
    let mut conflict = None;
    loop {
        let plan = match (
            body_within(region, [angle, volume, extent], options, within),
            conflict,
        ) {
            // Not so many triangles for the distance asked for, but to keep faces apart.
            (Err(MeshError::TooMany { .. }), Some(conflict)) => return Err(conflict),
            (plan, _) => plan?,
        };
        let Some(place) = crate::clearance::first_conflict(&plan, angle) else {
            return Ok(plan);
        };
        let too_thin = MeshError::TooThin {
            r: place.x,
            z: place.y,
        };
        // Finer until every face keeps clear of the others.
        if within <= options.within * LEAST_SHARE || within <= LEAST_WITHIN * extent {
            return Err(too_thin);
        }
        conflict = Some(too_thin);
        within *= 0.5;
    }
}

/// Below this share of the part's extent f64 cannot tell mesh and surface apart.
const LEAST_WITHIN: f64 = 1e-12;
/// How much finer than asked a mesh may be made to keep thin walls apart.
const LEAST_SHARE: f64 = 1e-6;

fn body_within(
    region: &Region,
    [angle, volume, extent]: [f64; 3],
    options: &Options,
    within: f64,
) -> Result<BodyPlan, MeshError> {
    // A part of the bound is kept for the last correction; it is rarely touched.
    let mut reserve = 0.03;
    loop {
        let share = if options.placement == Placement::VolumeTrue {
            within * (1.0 - reserve)
        } else {
            within
        };
        let chains = region
            .loops()
            .map(|l| corners(l, options, share, extent))
            .collect::<Result<Vec<_>, _>>()?;
        let rings = |chains: &[Outline]| match options.placement {
            Placement::VolumeTrue => area_true_rings(chains, angle, volume, options, share),
            Placement::Inscribed | Placement::Circumscribed => {
                one_sided_rings(chains, angle, options, within)
            }
        };
        let plan = match options.greatest_aspect {
            None => rings(&chains)?,
            Some(asked) => {
                crate::aspect::kept(asked, &chains, angle, options.most_triangles, rings)?
            }
        };
        if plan.deviation <= within || reserve > 0.7 {
            return Ok(plan);
        }
        reserve += 0.1;
    }
}

/// One loop's corners, and its chains' moment errors.
#[derive(Debug, Clone)]
pub(crate) struct Outline {
    pub(crate) corners: Vec<Corner>,
    pub(crate) meridional: Vec<f64>,
    /// Of each edge, the greatest distance of its chain from it.
    pub(crate) spent: Vec<f64>,
}

/// Divides the edges of a loop.
fn corners(
    outline: &Loop,
    options: &Options,
    within: f64,
    extent: f64,
) -> Result<Outline, MeshError> {
    let on_axis =
        |edge: &Edge| edge.start().x == 0.0 && edge.end().x == 0.0 && matches!(edge, Edge::Line(_));
    let division = Division {
        within: 0.5 * within,
        placement: options.placement,
        greatest_turn: TAU / f64::from(options.least_segments.get()),
        greatest_chord: options
            .greatest_edge
            .map_or(f64::INFINITY, |edge| edge * std::f64::consts::FRAC_1_SQRT_2),
        axis: profile::TOUCH * extent,
        // Fewer rings than this many are always allowed; more would break the limit on triangles whatever their counts.
        most_pieces: options.most_triangles / u64::from(options.least_segments.get().max(3)) + 2,
    };
    let edges = outline.edges();
    let chains = edges
        .iter()
        .map(|edge| {
            if on_axis(edge) {
                Ok(None)
            } else {
                divide(edge, &division).map(Some)
            }
        })
        .collect::<Result<Vec<_>, _>>()?;
    let mut found = Outline {
        corners: Vec::new(),
        meridional: Vec::new(),
        spent: chains
            .iter()
            .map(|chain| chain.as_ref().map_or(0.0, |chain| chain.deviation))
            .collect(),
    };
    for (i, edge) in edges.iter().enumerate() {
        let before = if i == 0 { edges.len() - 1 } else { i - 1 };
        let last_facing = chains[before]
            .as_ref()
            .and_then(|chain| facings(chain, &edges[before]).last().copied());
        let spent_before = chains[before].as_ref().map_or(0.0, |chain| chain.deviation);
        let number = u32::try_from(i).unwrap_or(u32::MAX);
        let Some(chain) = &chains[i] else {
            found.corners.push(Corner {
                at: edge.start(),
                circle: AXIS,
                spent: spent_before,
                edge: number,
                least: 0,
            });
            found.meridional.push(0.0);
            continue;
        };
        let facings = facings(chain, edge);
        for (j, node) in chain.nodes.iter().enumerate() {
            let (circle, spent) = if j == 0 {
                let arriving = -profile::left_of(edges[before].tangent(1.0));
                (
                    circle_at(node, Some(arriving), edges[before].curvature(1.0)),
                    spent_before.max(chain.deviation),
                )
            } else {
                (circle_at(node, None, 0.0), chain.deviation)
            };
            // Between a node and the next the surface may face the axis more than at either.
            let before = if j > 0 {
                facings.get(j - 1)
            } else {
                last_facing.as_ref()
            };
            let facing = [before, facings.get(j)]
                .into_iter()
                .flatten()
                .fold(circle.facing, |most, facing| most.max(*facing));
            let circle = Circle { facing, ..circle };
            found.corners.push(Corner {
                at: node.at,
                circle,
                spent,
                edge: number,
                least: 0,
            });
        }
        found.meridional.push(chain.moment_excess);
    }
    Ok(found)
}

/// Of each chord of a chain, the most that the surface along it faces the axis or away from it, |n_r|.
fn facings(chain: &Chain, edge: &Edge) -> Vec<f64> {
    let end = -profile::left_of(edge.tangent(1.0));
    let normals = || chain.nodes.iter().map(|node| node.normal);
    normals()
        .zip(normals().skip(1).chain([end]))
        .map(|(from, to)| {
            if from.y * to.y < 0.0 {
                1.0
            } else {
                from.x.abs().max(to.x.abs())
            }
        })
        .collect()
}

/// A point on the axis.
const AXIS: Circle = Circle {
    radius: 0.0,
    facing: 1.0,
    curvature: 0.0,
};

/// What the ring on a node has to answer for; `arriving` is the normal of the edge before, at an edge's start.
fn circle_at(node: &Node, arriving: Option<DVec2>, arriving_curvature: f64) -> Circle {
    let radius = node.at.x;
    match arriving {
        Some(normal) if normal.dot(node.normal) < SMOOTH => Circle {
            radius,
            facing: 1.0,
            curvature: 0.0,
        },
        Some(normal) => {
            let other = arriving_curvature.abs();
            Circle {
                radius,
                facing: node.normal.x.abs().max(normal.x.abs()),
                curvature: node
                    .curvature
                    .max(if other.is_finite() { other } else { 0.0 }),
            }
        }
        None => Circle {
            radius,
            facing: node.normal.x.abs(),
            curvature: node.curvature,
        },
    }
}

/// Count of the ring on a corner whose circle may be missed by `within`.
pub(crate) fn count(
    corner: &Corner,
    angle: f64,
    options: &Options,
    within: f64,
    excess: impl Fn(f64) -> f64,
) -> u32 {
    let least = options.least_segments.get();
    let by_length = options.greatest_edge.map_or(0.0, |edge| {
        corner.circle.radius * TAU / (edge * std::f64::consts::FRAC_1_SQRT_2)
    });
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "clamped to the range of u32"
    )]
    let least = least.max(by_length.ceil().clamp(0.0, 4e8) as u32);
    let own = segments(corner.circle, angle, least, within - corner.spent, excess);
    if corner.least <= own {
        return own;
    }
    // A full turn's count stays a multiple of four.
    if angle == TAU {
        corner.least.next_multiple_of(4)
    } else {
        corner.least
    }
}

fn area_true_rings(
    chains: &[Outline],
    angle: f64,
    volume: f64,
    options: &Options,
    within: f64,
) -> Result<BodyPlan, MeshError> {
    let excess = |step: f64| area_true(step) - 1.0;
    let loops: Vec<LoopPlan> = chains
        .iter()
        .map(|outline| {
            let stations = outline.corners.iter().map(|corner| {
                if corner.at.x <= 0.0 {
                    return pole(corner);
                }
                let segments = count(corner, angle, options, within, excess);
                corner.ring(
                    segments,
                    corner.at * DVec2::new(area_true(angle / f64::from(segments)), 1.0),
                )
            });
            LoopPlan {
                stations: stations.collect(),
                meridional: outline.meridional.clone(),
            }
        })
        .collect();
    let mut plan = BodyPlan {
        loops,
        deviation: 0.0,
    };
    // Before the correction, which looks at every facet between unequal rings.
    plan.allow(angle, options)?;
    crate::correction::close_volume(&mut plan.loops, angle, volume);
    plan.deviation = plan
        .loops
        .iter()
        .flat_map(|l| &l.stations)
        .fold(0.0, |most, station| station.deviation().max(most));
    Ok(plan)
}

impl Corner {
    /// The ring on this corner, its own corners at `at`.
    pub(crate) fn ring(&self, segments: u32, at: DVec2) -> Station {
        Station {
            radius: at.x,
            z: at.y,
            segments,
            node: self.at,
            circle: self.circle,
            spent: self.spent,
            edge: self.edge,
        }
    }
}

pub(crate) fn pole(corner: &Corner) -> Station {
    corner.ring(0, DVec2::new(0.0, corner.at.y))
}
