//! Exact figures of a body of revolution.
//!
//! The two theorems of Pappus and Guldin: a section of area A whose centroid is at the radius r sweeps the volume A times the
//! path of its centroid, A r f for the angle f; a boundary of length L whose centroid is at the radius r sweeps the surface
//! L r f. Both are ∬ r dA and ∮ r ds, which is what is computed, along with the higher moments that centre and inertia need.

mod area;
mod boundary;
mod curve;
mod gauss;
mod real;
mod segment;
mod solid;
mod turn;
mod whole;

pub use solid::{EdgeFigures, Section, Solid, solid};
pub use whole::{Whole, section_of, whole};
