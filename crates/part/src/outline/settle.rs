//! The last touch: corners that belong on the axis are put on it, and the edges become a loop.

use super::Built;
use super::origins::Origins;
use super::rounding::{ROUNDING, on_axis};
use crate::{Fault, Span};
use glam::DVec2;
use profile::{Edge, Loop, OpenLoop};

/// Roundings behind the corner of an offset or a transformed edge: direction, product, sum, each a few.
const OPERATIONS: f64 = 8.0;

/// The loop of `edges`, whose tags index `origins`. A corner whose r is 0 up to rounding gets r = 0: the end of a wall whose
/// face starts square on the axis lies on the axis itself.
pub(super) fn settled(
    mut edges: Vec<(Edge, u32)>,
    origins: Origins,
    span: &Span,
    faults: &mut Vec<Fault>,
) -> Option<Built> {
    let size = edges
        .iter()
        .map(|(edge, _)| edge.start().abs().max_element())
        .fold(0.0, f64::max);
    let within = OPERATIONS * ROUNDING * size;
    let onto = |point: DVec2| DVec2::new(on_axis(point.x, within), point.y);
    for (edge, _) in &mut edges {
        let (start, end) = (onto(edge.start()), onto(edge.end()));
        if start != edge.start() || end != edge.end() {
            *edge = edge.with_ends(start, end);
        }
    }
    match Loop::new(edges) {
        Ok(outline) => Some(Built {
            outline,
            steps: origins.into_all(),
        }),
        Err(OpenLoop::TooShort | OpenLoop::Gap(_)) => {
            faults.push(Fault::new(
                "outline::open",
                "the outline does not close",
                span.clone(),
                "",
            ));
            None
        }
    }
}
