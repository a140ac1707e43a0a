//! A closed outline from its steps.

use super::chain::{Link, edges};
use super::corners::treat_corners;
use super::draw::Leg;
use super::origins::Origins;
use super::settle::settled;
use super::step::{Kind, Step};
use super::walk::{Corners, walk};
use super::wording::Wording;
use super::{Built, MOST_FAULTS};
use crate::{Fault, Span};
use profile::Edge;

/// The loop through `steps` and straight back to the first. A last step that arrives at the first one closes the loop
/// itself.
pub(super) fn closed(
    steps: &[Step],
    span: &Span,
    prefix: &str,
    wording: Wording,
    faults: &mut Vec<Fault>,
) -> Option<Built> {
    let before = faults.len();
    let mut origins = Origins::new(prefix);
    let (mut links, corners) = open(steps, &mut origins, wording, faults);
    if faults.len() > before {
        return None;
    }
    let (first, last) = (steps.first()?, steps.last()?);
    let (start, end) = (*corners.points.first()?, *corners.points.last()?);
    if start == end {
        // The corner where the outline closes is the first step's, and may be given at the last one too.
        if let (Some(link), Some(corner)) = (links.last_mut(), &first.corner) {
            if link.treatment.is_some() {
                faults.push(two_corners(first, last));
                return None;
            }
            link.treatment = Some((corner, first));
        }
    } else {
        let tag = origins.closing(first, last);
        links.push(Link::new(Edge::line(end, start).into(), tag, first));
    }
    let is_straight = |step: &Step| matches!(step.kind, Kind::Line | Kind::Sloped(_));
    if links.len() <= 2 && steps.iter().all(is_straight) {
        faults.push(
            Fault::new(
                "outline::too_few_steps",
                format!("{prefix}: straight there and straight back encloses nothing"),
                span.clone(),
                "",
            )
            .help("an outline has three corners or more, or a curve"),
        );
        return None;
    }
    treat_corners(&mut links, true, &mut origins, wording, faults);
    if faults.len() > before {
        return None;
    }
    settled(edges(links), origins, span, faults)
}

/// The links from the first of `steps` to the last, corners not yet treated, and the corners. Tags are those of `origins`.
pub(super) fn open<'s>(
    steps: &'s [Step],
    origins: &mut Origins,
    wording: Wording,
    faults: &mut Vec<Fault>,
) -> (Vec<Link<'s>>, Corners) {
    let corners = walk(steps, wording, faults);
    let mut links = Vec::with_capacity(steps.len());
    let mut arriving = None;
    let mut is_known = true;
    let most = faults.len() + MOST_FAULTS;
    for (ends, step) in corners.points.windows(2).zip(steps.iter().skip(1)) {
        let [start, end] = *ends else { continue };
        let leg = Leg {
            step,
            start,
            end,
            arriving,
            rounding: corners.rounding,
            wording,
        };
        // How a smooth arc would leave a step that cannot be drawn is not known.
        if !is_known && matches!(step.kind, Kind::Tangent(_)) {
            continue;
        }
        match leg.draw() {
            Ok(drawn) => {
                arriving = Some(drawn.last().tangent(1.0));
                is_known = true;
                links.push(Link::new(drawn, origins.step(step), step));
            }
            Err(fault) => {
                is_known = false;
                faults.push(fault);
                if faults.len() >= most {
                    break;
                }
            }
        }
    }
    (links, corners)
}

fn two_corners(first: &Step, last: &Step) -> Fault {
    let place = |step: &Step| {
        step.corner
            .as_ref()
            .map_or_else(|| step.span.clone(), |corner| corner.words().1)
    };
    Fault::new(
        "corner::given_twice",
        format!(
            "{} arrives where the outline starts, and that corner is treated at both steps",
            last.words
        ),
        place(last),
        "here",
    )
    .also(place(first), "and at the first step")
    .help("keep one of them")
}
