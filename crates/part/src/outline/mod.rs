//! From the steps of an outline to a closed loop of edges, and from loops to a region.

mod beside;
mod bodies;
mod chain;
mod circle;
mod corners;
mod csv;
mod draw;
mod origins;
mod region;
mod rounding;
mod settle;
mod slope;
mod step;
mod steps;
mod svg;
mod walk;
mod wall;
mod wording;

use crate::{Fault, LengthUnit, Neighbours, StepOrigin};
use wording::Wording;

pub use bodies::check_bodies;
pub use region::region;
pub use step::{Centre, Coordinate, Corner, Kind, Outline, Side, Slope, Step, Target};

/// Faults of one outline that are told at most. More would have one cause, and only fill the memory.
const MOST_FAULTS: usize = 100;

/// A closed outline.
#[derive(Debug, Clone, PartialEq)]
pub struct Built {
    /// Its edges; each one's tag is an index into `steps`.
    pub outline: profile::Loop,
    /// Where the edges come from.
    pub steps: Vec<StepOrigin>,
}

/// The closed loop of `outline`, or `None` and one more fault at least.
///
/// `words_prefix` is what messages call it: `outline`, `void 1`; they give lengths in `unit`. Whether the loop is legal (does
/// not cross itself, keeps on one side of the axis) is [`region()`]'s to tell.
pub fn build(
    outline: &Outline,
    words_prefix: &str,
    unit: LengthUnit,
    neighbours: &dyn Neighbours,
    faults: &mut Vec<Fault>,
) -> Option<Built> {
    let wording = Wording { unit };
    match outline {
        Outline::Steps(steps, span) => steps::closed(steps, span, words_prefix, wording, faults),
        Outline::Circle { r, z, radius, span } => {
            circle::circle([*r, *z], *radius, span, words_prefix, wording, faults)
        }
        Outline::Svg {
            file,
            id,
            axis_x,
            scale,
            span,
        } => {
            let drawing = svg::Drawing {
                file,
                id: id.as_deref(),
                axis_x: *axis_x,
                scale: *scale,
                span,
            };
            svg::outline(&drawing, words_prefix, wording, neighbours, faults)
        }
        Outline::Csv { file, span } => {
            csv::outline(file, span, words_prefix, wording, neighbours, faults)
        }
        Outline::Wall {
            line,
            thickness,
            grow,
            span,
        } => wall::wall(line, *thickness, *grow, span, words_prefix, wording, faults),
    }
}
