//! What the checks share: figures as a page prints them.

mod printed;

pub use printed::Printed;
