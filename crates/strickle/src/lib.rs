//! What a part of revolution weighs, exactly, and the proof that its mesh is that part.
//!
//! A [`Study`] takes a part that has been read and finds everything out about it; what it found is a [`Record`], which is
//! also the machine output. The command line and the window only show it. The library does no input or output.

mod chords;
mod expect;
pub mod figures;

mod kept;
mod making;
mod material;
mod proof;
pub mod record;
#[cfg(test)]
mod sample;
mod study;
mod weighed;
mod weighing;

pub use kept::Kept;
pub use making::Made;
pub use material::BodyMaterial;
pub use record::Record;
pub use study::{Source, Study};
pub use weighed::Weighed;

/// Version of the program.
pub const VERSION: &str = env!("CARGO_PKG_VERSION");
