//! What the checks share: figures as a page prints them, and parts written in a few lines.

mod exact;
mod printed;

pub use exact::{exact, one_body, ring, study};
pub use printed::Printed;
