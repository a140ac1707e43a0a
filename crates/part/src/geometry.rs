//! From outlines to bodies whose regions are legal and do not overlap.

use crate::body::Draft;
use crate::fault::Found;
use crate::nearest::grouped;
use crate::outline::{Built, Outline, build, check_bodies, region};
use crate::{Body, Fault, LengthUnit, Neighbours, limits};

/// The bodies of `drafts`; messages give lengths in `unit`. Fewer than drafts where some have faults.
pub(crate) fn bodies(
    drafts: Vec<Draft>,
    unit: LengthUnit,
    neighbours: &dyn Neighbours,
    found: &mut Found,
) -> Vec<Body> {
    let count = drafts.len();
    let mut edges = 0;
    let mut bodies = Vec::with_capacity(count);
    let mut faults = Vec::new();
    for draft in drafts {
        bodies.extend(body(draft, unit, neighbours, &mut edges, &mut faults));
        if edges > limits::EDGES {
            break;
        }
    }
    // Whether bodies overlap is told of whole parts only: a missing one may be what the others are measured by.
    if bodies.len() == count {
        check_bodies(&bodies, unit, &mut faults);
    }
    found.extend(faults);
    bodies
}

fn body(
    draft: Draft,
    unit: LengthUnit,
    neighbours: &dyn Neighbours,
    edges: &mut usize,
    faults: &mut Vec<Fault>,
) -> Option<Body> {
    let words = match draft.outline {
        Outline::Wall { .. } => "wall",
        _ => "outline",
    };
    let outer = build(&draft.outline, words, unit, neighbours, faults);
    let voids: Vec<Option<Built>> = draft
        .voids
        .iter()
        .enumerate()
        .map(|(at, void)| {
            let words = format!("void {}", at + 1);
            build(void, &words, unit, neighbours, faults)
        })
        .collect();
    let outer = outer?;
    let voids: Vec<Built> = voids.into_iter().collect::<Option<_>>()?;
    let loops = std::iter::once(&outer).chain(&voids);
    *edges += loops
        .map(|built| built.outline.edges().len())
        .sum::<usize>();
    if *edges > limits::EDGES {
        faults.push(
            Fault::new(
                "limit::edges",
                format!("the part has more than {} edges", grouped(limits::EDGES)),
                draft.span,
                "the limit is passed in this body",
            )
            .help("rounds and chamfers are edges too; describe the part more simply"),
        );
        return None;
    }
    let (region, steps) = region(outer, voids, unit, faults)?;
    Some(Body {
        name: draft.name,
        material: draft.material,
        region,
        steps,
        span: draft.span,
    })
}
