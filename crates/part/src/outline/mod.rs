//! From the steps of an outline to a closed loop of edges, and from loops to a region.

mod bodies;
mod region;
mod step;

use crate::{Fault, LengthUnit, Neighbours, StepOrigin};

pub use bodies::check_bodies;
pub use region::region;
pub use step::{Centre, Coordinate, Corner, Kind, Outline, Side, Slope, Step, Target};

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
/// not cross itself, keeps on one side of the axis) is [`region`]'s to tell.
pub fn build(
    outline: &Outline,
    words_prefix: &str,
    unit: LengthUnit,
    neighbours: &dyn Neighbours,
    faults: &mut Vec<Fault>,
) -> Option<Built> {
    let _ = (outline, words_prefix, unit, neighbours, faults);
    None
}
