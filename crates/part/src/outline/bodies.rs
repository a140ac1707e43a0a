//! Bodies of one part.

use super::wording::Wording;
use crate::{Body, Fault, LengthUnit, StepOrigin};
use profile::{BodyFault, EdgeRef, Region, overlaps};

/// A fault for each two `bodies` that overlap, or of which that cannot be told. They may touch. Messages give lengths in
/// `unit`.
pub fn check_bodies(bodies: &[Body], unit: LengthUnit, faults: &mut Vec<Fault>) {
    let wording = Wording { unit };
    let regions: Vec<&Region> = bodies.iter().map(|body| &body.region).collect();
    faults.extend(overlaps(&regions).iter().map(|fault| match *fault {
        BodyFault::Overlap(overlap) => {
            let (place, depth) = (wording.place(overlap.place), wording.length(overlap.depth));
            between(bodies, overlap.bodies, overlap.edges, "body::overlap", |names| {
                format!("{names} overlap at {place}, {depth} deep")
            })
            .help("bodies of one part may touch; give them the same sizes where they do")
        }
        BodyFault::TooIntricate { bodies: two, edges } => {
            between(bodies, two, edges, "body::too_intricate", |names| {
                format!("{names}: whether they overlap cannot be told in reasonable time")
            })
            .help("so many of their edges, or so many bodies, lie close to each other that checking them would take minutes; draw fewer")
        }
    }));
}

/// A fault that shows an edge of each of two bodies; `message` is given their names.
fn between(
    bodies: &[Body],
    two: (usize, usize),
    edges: (EdgeRef, EdgeRef),
    code: &'static str,
    message: impl Fn(String) -> String,
) -> Fault {
    let [a, b] = [(two.0, edges.0), (two.1, edges.1)].map(|(body, edge)| {
        let body = &bodies[body];
        (&*body.name, origin(body, edge))
    });
    Fault::new(
        code,
        message(format!("the bodies `{}` and `{}`", a.0, b.0)),
        b.1.span.clone(),
        format!("`{}`: {}", b.0, b.1.words),
    )
    .also(a.1.span.clone(), format!("`{}`: {}", a.0, a.1.words))
}

fn origin(body: &Body, edge: EdgeRef) -> &StepOrigin {
    body.steps
        .get(edge.tag as usize)
        .expect("a region's tags index its steps")
}
