//! 3MF: a zip with one XML model in it (3MF Core Specification 1.3; the package by ISO/IEC 29500-2).

mod package;
mod read;
mod transform;
mod write;

pub use read::{Object, ThreeMf, ThreeMfError, read_three_mf};
pub(crate) use write::write;

/// The namespace of the core specification.
const NAMESPACE: &str = "http://schemas.microsoft.com/3dmanufacturing/core/2015/02";
/// The relationship that leads to the model.
const MODEL_RELATIONSHIP: &str = "http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel";
/// Where the model is, unless the package's relationships say otherwise.
const MODEL_PART: &str = "3D/3dmodel.model";
