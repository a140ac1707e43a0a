//! Mesh files: bytes in, triangles out, and back; and how a file comes to be written whole or not at all.
//!
//! What is written is a [`Model`], in a [`Format`]. Coordinates are metres on this side of a file and its [`Unit`] on the other.

mod atomic;
mod format;
mod model;
mod obj;
#[cfg(test)]
mod sample;
mod stl;
mod three_mf;
mod unit;

pub use atomic::write_whole;
pub use format::Format;
pub use model::{Body, Model};
pub use stl::binary::{StlError, stl_facets};
pub use stl::rounded;
pub use three_mf::{Object, ThreeMf, ThreeMfError, read_three_mf};
pub use unit::Unit;
