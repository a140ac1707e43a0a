//! Strickle's part file, format 1: from its text to the regions that everything else is computed from.
//!
//! [`read()`] takes the text and gives a [`Part`] in which every number is in SI units and every body is a legal
//! [`profile::Region`], or [`Faults`]: all that is wrong with the file, each with its place, what was expected and what
//! to do. The crate does no input or output; a file that an outline names is asked for through [`Neighbours`].
//!
//! The way of a text: TOML with spans -> tables checked key by key -> expressions evaluated -> [`outline::Step`]s with
//! plain numbers -> edges -> corners treated -> regions checked against each other.

mod body;
mod dimension;
mod expect;
mod expression;
mod fault;
mod geometry;
mod head;
mod limits;
mod material;
mod model;
mod nearest;
pub mod outline;
mod physical;
mod read;
mod schema;
mod sizes;
mod source;
mod starter;
mod steps;
mod tree;
mod units;
mod values;

pub use fault::{Fault, Faults, Label, Span};
pub use model::{
    Body, Expectation, Expected, LengthUnit, Material, OwnMaterial, Part, Size, StepOrigin,
    Tolerance,
};
pub use read::{Neighbours, Setting, length, read};
pub use schema::schema;
pub use starter::starter;
