//! A thin wall, given by one face.

use super::Built;
use super::chain::edges;
use super::corners::treat_corners;
use super::origins::Origins;
use super::settle::settled;
use super::step::{Side, Step};
use super::steps::open;
use super::wording::Wording;
use crate::{Fault, Span};
use profile::{Edge, Grow, WallFault};

/// The wall of `thickness` along the face `line`, whose corners are treated before it grows. Both faces have the names of the
/// steps: a wall's edge is named with both its sides.
pub(super) fn wall(
    line: &[Step],
    thickness: f64,
    grow: Option<Side>,
    span: &Span,
    prefix: &str,
    wording: Wording,
    faults: &mut Vec<Fault>,
) -> Option<Built> {
    let before = faults.len();
    let mut origins = Origins::new(prefix);
    let (mut links, corners) = open(line, &mut origins, wording, faults);
    if faults.len() > before {
        return None;
    }
    let (first, last) = (line.first()?, line.last()?);
    if let ([start, .., end], true) = (corners.points.as_slice(), links.len() > 1)
        && start == end
    {
        faults.push(
            Fault::new(
                "wall::closed",
                "the wall's line ends where it starts, and its ends would run into each other",
                last.span.clone(),
                wording.place(*end),
            )
            .also(first.span.clone(), "it starts here")
            .help("a closed shell is an outline with a void: outline = [ .. ], voids = [ [ .. ] ]"),
        );
        return None;
    }
    treat_corners(&mut links, false, &mut origins, wording, faults);
    if faults.len() > before {
        return None;
    }
    let face = edges(links);
    let ends = [
        origins.end("the wall's start", first.span.clone()),
        origins.end("the wall's end", last.span.clone()),
    ];
    let grow = match grow {
        Some(Side::Left) => Grow::Left,
        Some(Side::Right) => Grow::Right,
        None => Grow::Both,
    };
    match profile::wall(&face, thickness, grow, ends) {
        Ok(outline) => {
            let tags = outline.tags().iter().copied();
            let edges = outline.edges().iter().copied().zip(tags).collect();
            settled(edges, origins, span, faults)
        }
        Err(fault) => {
            faults.push(told(&fault, &face, thickness, span, &origins, wording));
            None
        }
    }
}

fn told(
    fault: &WallFault,
    face: &[(Edge, u32)],
    thickness: f64,
    span: &Span,
    origins: &Origins,
    wording: Wording,
) -> Fault {
    let thick = wording.length(thickness);
    let edge = |index: usize| {
        let origin = face.get(index).map(|&(_, tag)| (tag, origins.get(tag)));
        origin.map_or(("the wall", span.clone()), |(tag, origin)| {
            (origins.short(tag), origin.span.clone())
        })
    };
    match *fault {
        WallFault::TooThick {
            index,
            point,
            least_radius,
        } => {
            let (words, at) = edge(index);
            let radius = wording.length(least_radius);
            Fault::new(
                "wall::too_thick",
                format!(
                    "a wall of {thick} is too thick for {words}: on its hollow side the radius is {radius} at {}",
                    wording.place(point)
                ),
                at,
                format!("radius {radius}"),
            )
            .also(span.clone(), format!("thickness {thick}"))
            .help("give the wall's other face as the line, or make the wall thinner on that side than the radius")
        }
        WallFault::TooShort { index, point } => {
            let (words, at) = edge(index);
            Fault::new(
                "wall::too_short",
                format!(
                    "a wall of {thick} leaves no room for {words} on its other side, at {}",
                    wording.place(point)
                ),
                at,
                "vanishes between its neighbours",
            )
            .also(span.clone(), format!("thickness {thick}"))
            .help("give the wall's other face as the line, or make the step longer or the wall thinner")
        }
        WallFault::TurnsBack { index, point } => {
            let ((words, at), (next, after)) = (edge(index), edge(index + 1));
            Fault::new(
                "wall::turns_back",
                format!(
                    "the wall's face turns straight back between {words} and {next}, at {}",
                    wording.place(point)
                ),
                after,
                "straight back",
            )
            .also(at, "")
            .help("a wall goes round a corner of less than half a turn; round it with an arc")
        }
        ref other => Fault::new(
            "wall::impossible",
            format!("no wall: {other}"),
            span.clone(),
            "",
        ),
    }
}
