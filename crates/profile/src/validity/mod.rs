//! Which loops make a region.
//!
//! Asked in this order, each of what passed the ones before: are the numbers fit to compute with; is each edge good by
//! itself; which edges meet that should not; does each loop enclose an area; do the voids lie inside the outline and
//! outside each other.

mod contacts;
mod fault;
mod nesting;
mod passing;
mod single;
#[cfg(test)]
mod tests;

pub use fault::{EdgeRef, RegionFault};

use crate::tolerance::touch;
use crate::{Bounds, Edge, Loop};
use contacts::Network;

/// The largest coordinate that is computed with, m: its fifth power, a moment of inertia's, does not overflow.
pub const LARGEST: f64 = 1e60;

/// The smallest extent of a loop that is computed with, m: its fifth power does not vanish.
pub const SMALLEST: f64 = 1e-60;

/// Of one loop this many faults are reported, the first ones in order of its edges.
const MOST_FAULTS: usize = 20;

/// The signed areas of these loops, the outer one first, if they make a region.
///
/// # Errors
/// All faults, loop by loop, in order of their edges.
pub(crate) fn checked(loops: &[&Loop]) -> Result<Vec<f64>, Vec<RegionFault>> {
    let mut faults = Vec::new();
    let mut network = Network::new(loops);
    let mut sound = vec![true; loops.len()];
    let boxes: Vec<Option<Bounds>> = (0..loops.len())
        .map(|loop_index| survey(loops, loop_index, &mut network, &mut faults))
        .collect();
    faults.extend(network.faults());
    let mark = |faults: &[RegionFault], sound: &mut [bool]| {
        for loop_index in faults.iter().flat_map(RegionFault::loops) {
            sound[loop_index] = false;
        }
    };
    mark(&faults, &mut sound);
    let mut areas = vec![0.0; loops.len()];
    for (loop_index, outline) in loops.iter().enumerate() {
        if let (true, Some(bounds)) = (sound[loop_index], boxes[loop_index]) {
            areas[loop_index] = outline.signed_area();
            faults.extend(single::flatness(
                loop_index,
                outline,
                bounds,
                areas[loop_index],
            ));
        }
    }
    mark(&faults, &mut sound);
    faults.extend(nesting::faults(loops, &areas, &sound));
    if faults.is_empty() {
        return Ok(areas);
    }
    faults.sort_by_key(RegionFault::order);
    Err(faults
        .chunk_by(|a, b| a.loop_index() == b.loop_index())
        .flat_map(|of_loop| of_loop.iter().take(MOST_FAULTS))
        .copied()
        .collect())
}

/// Asks a loop for its numbers and its edges one by one, and adds the edges to the network; its box, where its numbers are
/// fit to compute with.
fn survey(
    loops: &[&Loop],
    loop_index: usize,
    network: &mut Network<'_>,
    faults: &mut Vec<RegionFault>,
) -> Option<Bounds> {
    let outline = loops[loop_index];
    let numbers = single::numbers(loop_index, outline);
    if !numbers.is_empty() {
        faults.extend(numbers);
        return None;
    }
    let boxes: Vec<Bounds> = outline.edges().iter().map(Edge::bounds).collect();
    let bounds = boxes.iter().copied().reduce(Bounds::union)?;
    if let Some(fault) = single::size(loop_index, outline, bounds) {
        faults.push(fault);
        return None;
    }
    let touch = touch(bounds);
    for (index, (edge, bounds)) in outline.edges().iter().zip(boxes).enumerate() {
        let named = EdgeRef::new(loops, loop_index, index);
        let of_edge = single::shape(named, edge, bounds, touch);
        network.add(named, touch, contacts::State::of(&of_edge));
        faults.extend(of_edge);
    }
    Some(bounds)
}
