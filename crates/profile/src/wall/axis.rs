//! Where a wall's face ends on the axis.

use super::WallFault;
use super::beside::{Side, too_short};
use super::joint::{SMOOTH, cut, run_on};
use crate::{DVec2, Edge, Meeting, left_of, meetings};

/// The offset runs on to the axis for at most this many times its distance: to the tip of a cone of a sixteenth of a degree.
/// A face that starts along the axis keeps its square end.
const LONGEST_TIP: f64 = 1000.0;

/// The side with its ends on the axis where those of the face are.
pub(super) fn meet_axis(
    side: Side,
    face: &[(Edge, u32)],
    distance: f64,
) -> Result<Side, WallFault> {
    let (Some((first, _)), Some((last, _))) = (face.first(), face.last()) else {
        return Ok(side);
    };
    let mut edges = side.edges;
    if first.start().x == 0.0 {
        edges = start_on_axis(edges, first, distance).ok_or_else(|| too_short(face, 0))?;
    }
    if last.end().x == 0.0 {
        // Travelled the other way, the end is a start.
        let reversed = |edges: Vec<(Edge, u32)>| -> Vec<(Edge, u32)> {
            edges
                .into_iter()
                .rev()
                .map(|(edge, tag)| (edge.reversed(), tag))
                .collect()
        };
        edges = start_on_axis(reversed(edges), &last.reversed(), -distance)
            .map(reversed)
            .ok_or_else(|| too_short(face, face.len() - 1))?;
    }
    Ok(Side { edges })
}

/// The offset of a face whose first edge, `face`, starts on the axis; `None` where all of it lies beyond the axis.
fn start_on_axis(edges: Vec<(Edge, u32)>, face: &Edge, distance: f64) -> Option<Vec<(Edge, u32)>> {
    let direction = face.tangent(0.0);
    let r = left_of(direction).x * distance;
    if r.abs() <= SMOOTH * distance.abs() {
        // Square to the axis: whatever is left of r is rounding.
        let mut edges = edges;
        let (first, _) = edges.first_mut()?;
        *first = first.with_ends(DVec2::new(0.0, first.start().y), first.end());
        Some(edges)
    } else if r < 0.0 {
        trimmed(edges)
    } else {
        Some(run_on_to_axis(edges, direction, r, distance.abs()))
    }
}

/// The edges from where they come over the axis.
fn trimmed(edges: Vec<(Edge, u32)>) -> Option<Vec<(Edge, u32)>> {
    let (at, t, point) = edges.iter().enumerate().find_map(|(at, (edge, _))| {
        let (t, point) = crossing_of_axis(edge)?;
        (t < 1.0).then_some((at, t, point))
    })?;
    let (first, tag) = edges[at];
    let rest = cut(&first, (t, point), (1.0, first.end()));
    Some(
        rest.into_iter()
            .map(|edge| (edge, tag))
            .chain(edges.into_iter().skip(at + 1))
            .collect(),
    )
}

/// The first edge, carried on backward to the axis along its line or circle, or along its tangent.
fn run_on_to_axis(
    mut edges: Vec<(Edge, u32)>,
    direction: DVec2,
    r: f64,
    distance: f64,
) -> Vec<(Edge, u32)> {
    let length = r / direction.x;
    if !(direction.x > 0.0 && length <= LONGEST_TIP * distance) {
        return edges;
    }
    let (first, tag) = edges[0];
    let carried_on = run_on(&first.reversed(), 2.0 * length).and_then(|(beyond, scale)| {
        let (t, tip) = crossing_of_axis(&beyond)?;
        Some(cut(&first, (-t * scale, tip), (1.0, first.end())))
    });
    let new = carried_on.unwrap_or_else(|| {
        let start = first.start();
        let tip = DVec2::new(0.0, start.y - direction.y * length);
        vec![Edge::line(tip, start), first]
    });
    edges.splice(0..1, new.into_iter().map(|edge| (edge, tag)));
    edges
}

/// Parameter and point, with r exactly 0, where an edge first meets the axis.
fn crossing_of_axis(edge: &Edge) -> Option<(f64, DVec2)> {
    let bounds = edge.bounds();
    let margin = bounds.size().max_element();
    let axis = Edge::line(
        DVec2::new(0.0, bounds.min.y - margin),
        DVec2::new(0.0, bounds.max.y + margin),
    );
    match *meetings(edge, &axis, 0.0).first()? {
        Meeting::Point { t_a, point, .. } => Some((t_a, DVec2::new(0.0, point.y))),
        Meeting::Overlap { a, .. } => Some((a[1], DVec2::new(0.0, edge.point(a[1]).y))),
    }
}
