//! From the steps of an outline to a closed loop of edges.

mod step;

pub use step::{Centre, Coordinate, Corner, Kind, Outline, Side, Slope, Step, Target};
