//! Bodies of one part.

use super::wording::Wording;
use crate::{Body, Fault, LengthUnit, StepOrigin};
use profile::{EdgeRef, Region, overlaps};

/// A fault for each two `bodies` that overlap. They may touch. Messages give lengths in `unit`.
pub fn check_bodies(bodies: &[Body], unit: LengthUnit, faults: &mut Vec<Fault>) {
    let wording = Wording { unit };
    let regions: Vec<&Region> = bodies.iter().map(|body| &body.region).collect();
    for overlap in overlaps(&regions) {
        let (Some(first), Some(second)) =
            (bodies.get(overlap.bodies.0), bodies.get(overlap.bodies.1))
        else {
            continue;
        };
        let [a, b] = [(first, overlap.edges.0), (second, overlap.edges.1)]
            .map(|(body, edge)| (&*body.name, origin(body, edge)));
        faults.push(
            Fault::new(
                "body::overlap",
                format!(
                    "the bodies `{}` and `{}` overlap at {}, {} deep",
                    a.0,
                    b.0,
                    wording.place(overlap.place),
                    wording.length(overlap.depth)
                ),
                b.1.span.clone(),
                format!("`{}`: {}", b.0, b.1.words),
            )
            .also(a.1.span.clone(), format!("`{}`: {}", a.0, a.1.words))
            .help("bodies of one part may touch; give them the same sizes where they do"),
        );
    }
}

fn origin(body: &Body, edge: EdgeRef) -> &StepOrigin {
    body.steps
        .get(edge.tag as usize)
        .expect("a region's tags index its steps")
}
