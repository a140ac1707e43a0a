//! The proof: what a mesh should weigh by its rings, what it is measured to weigh, and where the difference comes from.
//!
//! The mesh is measured as it was written and read back, not as it was meant. Each body is measured by itself, since bodies
//! that touch share places; the part is their sum, weighed with their densities.

use crate::record::{Audit, Budget, EdgeBudget, Measured, Verdict};
use crate::{Kept, Made, Study, Weighed};
use glam::DVec3;
use measure::{Figures, Triangles};

impl Study {
    /// Measures the mesh as it was kept, compares, and judges: fills in the record's mesh, measured, audit, budget and
    /// verdict. Gives what was predicted and what was measured.
    pub fn prove(&mut self, made: &Made, kept: &Kept) -> (Weighed, Option<Weighed>) {
        let predicted = self.predicted(&made.plan);
        let bodies = &kept.bodies;
        let audits: Vec<measure::Audit> = bodies
            .iter()
            .map(|body| measure::audit(body.triangles()))
            .collect();
        let crossings: usize = bodies
            .iter()
            .map(|body| measure::crossings(body.triangles()).count)
            .sum();
        let figures: Vec<Figures> = bodies
            .iter()
            .map(|body| measure::figures(body.triangles()))
            .collect();
        let peers: Vec<Option<measure::Parry>> = bodies
            .iter()
            .map(|body| measure::parry(body.triangles()))
            .collect();

        let mut reasons = kept.differences.clone();
        let audit = summed(&audits, crossings);
        reasons.extend(soundness(&audit));
        let measured = peers
            .iter()
            .copied()
            .collect::<Option<Vec<_>>>()
            .map(|peers| {
                for (peer, own) in peers.iter().zip(&figures) {
                    reasons.extend(measure::compare(own, peer).iter().map(disagreement));
                }
                // Volume and centre are parry's; the matrix is our own, whose principal moments parry has confirmed.
                self.together(
                    peers
                        .iter()
                        .zip(&figures)
                        .map(|(peer, own)| (peer.volume, peer.centre, own.inertia)),
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
        self.note_mesh(made, kept.file.clone());
        self.record.measured = measured.as_ref().map(|measured| Measured {
            by: "parry3d-f64",
            volume: measured.volume,
            surface,
            mass: measured.mass,
            centre: measured.centre.to_array(),
            inertia_about_centre: measured.inertia.to_cols_array_2d(),
        });
        self.record.audit = Some(audit);
        self.record.budget = budget;
        self.record.verdict = Some(Verdict {
            holds: reasons.is_empty(),
            reasons,
        });
        (predicted, measured)
    }

    /// Measured less exact volume, by cause.
    fn budget(&self, made: &Made, kept: &Kept, measured: f64) -> Budget {
        let edges = self.edge_budgets(made);
        let circumferential: f64 = edges.iter().map(|edge| edge.circumferential).sum();
        let meridional: f64 = edges.iter().map(|edge| edge.meridional).sum();
        let rounded: Vec<DVec3> = made
            .mesh
            .positions
            .iter()
            .map(|p| files::rounded(*p, kept.unit.metres()))
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
            edges: edges
                .into_iter()
                .filter(|edge| edge.circumferential != 0.0 || edge.meridional != 0.0)
                .collect(),
        }
    }

    /// What each edge contributes to mesh less exact volume.
    fn edge_budgets(&self, made: &Made) -> Vec<EdgeBudget> {
        let differences = made.plan.differences();
        let bodies = self.part.bodies.iter().zip(&differences);
        bodies
            .flat_map(|(body, edges)| {
                edges.iter().map(|edge| {
                    let outline = body.region.loops().nth(edge.loop_index);
                    let tag = outline.and_then(|outline| outline.tags().get(edge.edge_index));
                    let origin = tag.and_then(|tag| body.steps.get(*tag as usize));
                    EdgeBudget {
                        body: body.name.clone(),
                        edge: origin.map(|origin| origin.words.clone()),
                        name: origin.and_then(|origin| origin.name.clone()),
                        circumferential: edge.circumferential,
                        meridional: edge.meridional,
                    }
                })
            })
            .collect()
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

/// The bodies' audits as one: counts add, answers must be yes for all.
fn summed(audits: &[measure::Audit], crossings: usize) -> Audit {
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
        self_intersections: Some(crossings),
    }
}

/// What is not sound, in words.
fn soundness(all: &Audit) -> Vec<String> {
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
        (
            all.self_intersections.unwrap_or(0),
            "pairs of triangles cut or touch each other where they should not",
        ),
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
