//! Which loops make a region.

mod fault;

pub use fault::{EdgeRef, RegionFault};

/// The largest coordinate that is computed with, m: its fifth power, a moment of inertia's, does not overflow.
pub const LARGEST: f64 = 1e60;

/// The smallest extent of a loop that is computed with, m: its fifth power does not vanish.
pub const SMALLEST: f64 = 1e-60;
