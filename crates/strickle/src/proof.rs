//! The proof: what a mesh should weigh by its rings, what it is measured to weigh, and where the difference comes from.
//!
//! The mesh is measured as it was written and read back, not as it was meant. Each body is measured by itself, since bodies
//! that touch share places; the part is their sum, weighed with their densities.

use crate::Study;
use crate::record::{Audit, Budget, Measured, Mesh, Predicted, Verdict};
use glam::{DMat3, DVec3};
use measure::{Figures, Triangles, Welded};
use mesh::{MeshError, Moments, Options, Plan, Solid};

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

/// How a mesh was kept: what rounds its coordinates.
#[derive(Debug, Clone)]
pub struct Kept {
    /// The file it was written to.
    pub file: Option<String>,
    /// Metres a number of the file.
    pub unit: f64,
    /// The facets as read back, body after body, metres.
    pub facets: Vec<[DVec3; 3]>,
}

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

impl Study {
    /// The greatest distance between mesh and surface where nothing is said, metres.
    pub fn default_within(&self) -> f64 {
        let exact = self.exact();
        DEFAULT_SHARE * exact.largest_diameter.max(exact.length)
    }

    /// Makes a mesh of the part.
    ///
    /// # Errors
    /// See [`MeshError`].
    pub fn mesh(&self, options: &Options) -> Result<Made, MeshError> {
        let bodies = self.part.bodies.iter().zip(&self.exact().bodies);
        let solids: Vec<Solid> = bodies
            .map(|(body, exact)| Solid {
                region: &body.region,
                volume: exact.volume,
            })
            .collect();
        let plan = Plan::new(&solids, self.part.revolve, options)?;
        let mesh = plan.mesh()?;
        Ok(Made { plan, mesh })
    }

    /// Measures the mesh as it was kept, compares, and judges: fills in the record's mesh, measured, audit, budget and
    /// verdict. Gives what was predicted and what was measured.
    pub fn prove(&mut self, made: &Made, kept: &Kept) -> (Weighed, Option<Weighed>) {
        let densities: Vec<f64> = self
            .materials
            .iter()
            .map(|material| material.density)
            .collect();
        let predicted = together(made.plan.predicted().iter().map(of_moments).zip(&densities));
        let bodies: Vec<Welded> = made
            .mesh
            .bodies
            .iter()
            .map(|body| measure::weld_equal(kept.facets.get(body.triangles.clone()).unwrap_or(&[])))
            .collect();
        let audits: Vec<measure::Audit> = bodies
            .iter()
            .map(|body| measure::audit(body.triangles()))
            .collect();
        let figures: Vec<Figures> = bodies
            .iter()
            .map(|body| measure::figures(body.triangles()))
            .collect();
        let peers: Vec<Option<measure::Parry>> = bodies
            .iter()
            .map(|body| measure::parry(body.triangles()))
            .collect();

        let mut reasons = soundness(&audits);
        let measured = peers
            .iter()
            .copied()
            .collect::<Option<Vec<_>>>()
            .map(|peers| {
                for (peer, own) in peers.iter().zip(&figures) {
                    reasons.extend(measure::compare(own, peer).iter().map(disagreement));
                }
                // Volume and centre are parry's; the matrix is our own, whose principal moments parry has confirmed.
                together(
                    peers
                        .iter()
                        .zip(&figures)
                        .map(|(peer, own)| (peer.volume, peer.centre, own.inertia))
                        .zip(&densities),
                )
            });
        let surface: f64 = figures.iter().map(|figures| figures.surface).sum();
        let budget = measured
            .as_ref()
            .map(|measured| self.budget(made, kept, measured.volume));
        if let Some(budget) = &budget {
            let allowed = self.rounding_of_the_sum(made.mesh.triangles.len(), surface);
            if budget.unexplained.is_nan() || budget.unexplained.abs() > allowed {
                reasons.push(format!(
                    "{:+.3e} m3 of the difference in volume has no cause; rounding explains {allowed:.1e} m3",
                    budget.unexplained
                ));
            }
        } else {
            reasons.push("the mesh encloses no volume that could be measured".to_owned());
        }
        reasons.extend(
            self.record
                .verdict
                .iter()
                .flat_map(|verdict| verdict.reasons.clone()),
        );
        self.record.mesh = Some(mesh_record(made, kept, &predicted));
        self.record.measured = measured.as_ref().map(|measured| Measured {
            by: "parry3d-f64",
            volume: measured.volume,
            surface,
            mass: measured.mass,
            centre: measured.centre.to_array(),
            inertia_about_centre: measured.inertia.to_cols_array_2d(),
        });
        self.record.audit = Some(summed(&audits));
        self.record.budget = budget;
        self.record.verdict = Some(Verdict {
            holds: reasons.is_empty(),
            reasons,
        });
        (predicted, measured)
    }

    /// Measured less exact volume, by cause.
    fn budget(&self, made: &Made, kept: &Kept, measured: f64) -> Budget {
        let differences = || made.plan.differences().into_iter().flatten();
        let circumferential: f64 = differences().map(|edge| edge.circumferential).sum();
        let meridional: f64 = differences().map(|edge| edge.meridional).sum();
        let rounded: Vec<DVec3> = made
            .mesh
            .positions
            .iter()
            .map(|p| files::rounded(*p, kept.unit))
            .collect();
        let volume_of = |positions: &[DVec3]| -> f64 {
            let bodies = made.mesh.bodies.iter();
            let volumes = bodies.map(|body| {
                let triangles = made
                    .mesh
                    .triangles
                    .get(body.triangles.clone())
                    .unwrap_or(&[]);
                measure::figures(Triangles {
                    positions,
                    triangles,
                })
                .volume
            });
            volumes.sum()
        };
        let rounding = volume_of(&rounded) - volume_of(&made.mesh.positions);
        let difference = measured - self.exact().volume;
        Budget {
            circumferential,
            meridional,
            rounding,
            unexplained: difference - circumferential - meridional - rounding,
        }
    }

    /// What rounding may leave of a volume summed in f64 over `triangles`: each of the n additions rounds by half a unit of
    /// a sum that is at most surface times extent over 3 (Higham 2002, section 4.2), and the closed forms round likewise.
    fn rounding_of_the_sum(&self, triangles: usize, surface: f64) -> f64 {
        let exact = self.exact();
        let extent = exact.largest_diameter.max(exact.length);
        let terms = surface * extent / 3.0;
        (triangles as f64 + 64.0) * 0.5 * f64::EPSILON * terms
    }
}

/// Volume, centre and inertia about it for unit density.
fn of_moments(moments: &Moments) -> (f64, DVec3, DMat3) {
    (
        moments.volume,
        moments.centre(),
        moments.inertia_about_centre(),
    )
}

/// Bodies with their densities, as one.
fn together<'a>(bodies: impl Iterator<Item = ((f64, DVec3, DMat3), &'a f64)> + Clone) -> Weighed {
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
            sum + (inertia + shift * volume) * *density
        });
    Weighed {
        volume: bodies.map(|((volume, ..), _)| volume).sum(),
        mass,
        centre,
        inertia,
    }
}

fn mesh_record(made: &Made, kept: &Kept, predicted: &Weighed) -> Mesh {
    Mesh {
        file: kept.file.clone(),
        triangles: made.mesh.triangles.len(),
        vertices: made.mesh.positions.len(),
        within: made.plan.options().within,
        placement: made.plan.options().placement.word(),
        largest_deviation: made.plan.deviation(),
        predicted: Predicted {
            volume: predicted.volume,
            centre: predicted.centre.to_array(),
        },
    }
}

/// The bodies' audits as one: counts add, answers must be yes for all.
fn summed(audits: &[measure::Audit]) -> Audit {
    let count = |of: &dyn Fn(&measure::Audit) -> usize| audits.iter().map(of).sum();
    Audit {
        closed: audits.iter().all(measure::Audit::is_closed),
        manifold: audits.iter().all(measure::Audit::is_manifold),
        oriented: audits.iter().all(measure::Audit::is_oriented),
        outward: audits.iter().all(|audit| audit.outward),
        components: count(&|audit| audit.components),
        boundary_edges: count(&|audit| audit.boundary_edges),
        nonmanifold_edges: count(&|audit| audit.nonmanifold_edges),
        flipped_edges: count(&|audit| audit.flipped_edges),
        degenerate_triangles: count(&|audit| audit.degenerate_triangles),
        duplicate_triangles: count(&|audit| audit.duplicate_triangles),
        unreferenced_vertices: count(&|audit| audit.unreferenced_vertices),
        self_intersections: None,
    }
}

/// What is not sound, in words.
fn soundness(audits: &[measure::Audit]) -> Vec<String> {
    let all = summed(audits);
    let mut reasons: Vec<String> = [
        (
            all.boundary_edges,
            "edges have a triangle on one side only: the mesh is open",
        ),
        (all.nonmanifold_edges, "edges have more than two triangles"),
        (
            all.flipped_edges,
            "edges have neighbours that face opposite ways",
        ),
        (all.degenerate_triangles, "triangles have no area"),
        (all.duplicate_triangles, "triangles stand twice"),
    ]
    .into_iter()
    .filter(|(count, _)| *count > 0)
    .map(|(count, what)| format!("{count} {what}"))
    .collect();
    if !all.outward {
        reasons.push("the mesh is inside out".to_owned());
    }
    reasons
}

fn disagreement(found: &measure::Disagreement) -> String {
    format!(
        "parry3d-f64 and the program's own sum disagree on the {} by {:.1e}",
        found.on, found.by
    )
}
