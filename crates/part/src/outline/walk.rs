//! Where the steps go: the corners of an outline, before anything is drawn between them.

use super::MOST_FAULTS;
use super::rounding::{ROUNDING, largest, on_axis};
use super::slope::sloped;
use super::step::{Coordinate, Kind, Step, Target};
use super::wording::Wording;
use crate::{Fault, Span};
use glam::DVec2;
use profile::{LARGEST, SMALLEST};

/// The corners of an outline.
#[derive(Debug)]
pub(super) struct Corners {
    /// Where each step arrives; fewer than there are steps where one has a fault.
    pub(super) points: Vec<DVec2>,
    /// Rounding of a coordinate, metres: corners nearer than this are the same.
    pub(super) rounding: f64,
}

impl Target {
    /// The coordinates that are given, on from `start`.
    pub(super) fn given(&self, start: DVec2) -> [Option<f64>; 2] {
        let on = |coordinate: &Option<(Coordinate, Span)>, start: f64| {
            coordinate
                .as_ref()
                .map(|(coordinate, _)| match *coordinate {
                    Coordinate::At(at) => at,
                    Coordinate::By(by) => start + by,
                })
        };
        [on(&self.r, start.x), on(&self.z, start.y)]
    }

    /// The point, on from `start`.
    pub(super) fn point(&self, start: DVec2) -> DVec2 {
        let [r, z] = self.given(start);
        DVec2::new(r.unwrap_or(start.x), z.unwrap_or(start.y))
    }
}

/// How many roundings stand behind the coordinates of a point: one more for each increment since the last fixed value.
#[derive(Debug, Clone, Copy)]
struct Increments {
    r: f64,
    z: f64,
}

impl Increments {
    fn after(self, step: &Step) -> Self {
        let is_sloped = matches!(step.kind, Kind::Sloped(_));
        let count = |before: f64, coordinate: &Option<(Coordinate, Span)>| match coordinate {
            Some((Coordinate::At(_), _)) => 1.0,
            Some((Coordinate::By(_), _)) => before + 1.0,
            None if is_sloped => before + 1.0,
            None => before,
        };
        Self {
            r: count(self.r, &step.to.r),
            z: count(self.z, &step.to.z),
        }
    }
}

/// The corners of `steps`. A corner on the axis has r = 0 exactly; a last step that arrives where the first one started,
/// up to rounding, arrives there exactly. Of the steps after a fault nothing is known.
pub(super) fn walk(steps: &[Step], wording: Wording, faults: &mut Vec<Fault>) -> Corners {
    let mut points: Vec<DVec2> = Vec::with_capacity(steps.len());
    let mut increments = Vec::with_capacity(steps.len());
    let mut at = DVec2::ZERO;
    let mut count = Increments { r: 1.0, z: 1.0 };
    for step in steps {
        let target = match &step.kind {
            Kind::Sloped(slope) => sloped(at, step.to.given(at), slope, step, wording),
            _ => Ok(step.to.point(at)),
        };
        match target.and_then(|point| in_range(point, step, wording)) {
            Ok(point) => at = point,
            Err(fault) => {
                faults.push(fault);
                break;
            }
        }
        count = count.after(step);
        points.push(at);
        increments.push(count);
    }

    let size = largest(&points);
    let most = faults.len() + MOST_FAULTS;
    for ((point, count), step) in points.iter_mut().zip(&increments).zip(steps) {
        point.x = on_axis(point.x, ROUNDING * count.r * size.x);
        if point.x < 0.0 && faults.len() < most {
            faults.push(past_axis(step, *point, wording));
        }
    }
    if let ([first, .., last], Some(count)) = (points.as_mut_slice(), increments.last()) {
        let apart = (*last - *first).abs();
        if apart.x <= ROUNDING * count.r * size.x && apart.y <= ROUNDING * count.z * size.y {
            *last = *first;
        }
    }
    let extent = size.max_element();
    if let (Some(first), true) = (steps.first(), extent > 0.0 && extent < SMALLEST) {
        faults.push(
            Fault::new(
                "outline::too_small",
                format!(
                    "the outline is smaller than can be computed with, {}",
                    wording.length(extent)
                ),
                first.span.clone(),
                "",
            )
            .help("look at the unit and at the powers of ten"),
        );
        points.clear();
    }
    Corners {
        points,
        rounding: ROUNDING * extent,
    }
}

/// `point`, if it can be computed with.
///
/// # Errors
/// It is too far out.
fn in_range(point: DVec2, step: &Step, wording: Wording) -> Result<DVec2, Fault> {
    if point.abs().max_element() <= LARGEST {
        return Ok(point);
    }
    Err(Fault::new(
        "step::out_of_range",
        format!(
            "{} leads farther out than can be computed with, {}",
            step.words,
            wording.length(LARGEST)
        ),
        step.span.clone(),
        "",
    )
    .help("look at the unit, at the powers of ten and at slopes near 0"))
}

fn past_axis(step: &Step, point: DVec2, wording: Wording) -> Fault {
    let span = match &step.to.r {
        Some((_, span)) => span.clone(),
        None => step.span.clone(),
    };
    Fault::new(
        "step::past_axis",
        format!(
            "{} leads past the axis, to {}",
            step.words,
            wording.place(point)
        ),
        span,
        "r may not fall below 0",
    )
    .help("the section lies on one side of the axis; it may touch the axis at r = 0")
}
