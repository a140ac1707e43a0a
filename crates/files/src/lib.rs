//! Mesh files: bytes in, triangles out, and back; and how a file comes to be written whole or not at all.

mod atomic;
mod stl;

pub use atomic::write_whole;
pub use stl::{Header, StlError, read_stl, rounded, write_stl};
