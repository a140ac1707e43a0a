//! What can be asked of a mesh.

use clap::{Args, ValueEnum, value_parser};
use files::Unit;
use mesh::Placement;

/// How a part is meshed.
#[derive(Debug, Args)]
pub(crate) struct Meshing {
    /// Largest distance between mesh and true surface; 1/2000 of the largest extent unless said
    ///
    /// A bare number is in the part's unit: `--within 0.05mm`, `--within "1/64 in"`.
    #[arg(long, value_name = "LENGTH", conflicts_with = "triangles")]
    pub(crate) within: Option<String>,

    /// Where corners and faces lie
    #[arg(long, value_name = "WHERE", value_enum, default_value_t)]
    pub(crate) placement: Where,

    /// The nearest mesh of at most so many triangles, in place of a distance
    #[arg(long, value_name = "COUNT", value_parser = value_parser!(u64).range(4..))]
    pub(crate) triangles: Option<u64>,

    /// Least number of segments a turn, round the axis and along a curve
    #[arg(long, value_name = "COUNT", default_value_t = 12, value_parser = value_parser!(u32).range(3..=1_000_000))]
    pub(crate) segments: u32,

    /// Greatest length of a triangle's edge
    #[arg(long, value_name = "LENGTH")]
    pub(crate) edge: Option<String>,

    /// Greatest ratio of a triangle's longest edge to its height over it, 6 or more
    #[arg(long, value_name = "RATIO")]
    pub(crate) aspect: Option<f64>,

    /// Refuse more triangles than this; they take some 140 bytes each while they are made and proved
    #[arg(long, value_name = "COUNT", default_value_t = 50_000_000)]
    pub(crate) most: u64,

    /// Unit of a mesh file that has none of its own; its header says it
    #[arg(long, value_name = "UNIT", value_enum, default_value_t)]
    pub(crate) unit: MeshUnit,
}

/// Where corners and faces of a mesh lie.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default, ValueEnum)]
pub(crate) enum Where {
    /// On both sides of the surface, so that the mesh weighs what the part weighs
    #[default]
    VolumeTrue,
    /// Never outside the solid: an outer face never over its size, a bore never under it
    Inscribed,
    /// Never inside the surface: an outer face never under its size, a bore never over it
    Circumscribed,
}

impl Where {
    pub(crate) fn placement(self) -> Placement {
        match self {
            Self::VolumeTrue => Placement::VolumeTrue,
            Self::Inscribed => Placement::Inscribed,
            Self::Circumscribed => Placement::Circumscribed,
        }
    }
}

/// Units of a mesh file.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default, ValueEnum)]
pub(crate) enum MeshUnit {
    /// Millimetre
    #[default]
    Mm,
    /// Centimetre
    Cm,
    /// Metre
    M,
    /// Inch
    In,
    /// Foot
    Ft,
}

impl MeshUnit {
    pub(crate) fn unit(self) -> Unit {
        match self {
            Self::Mm => Unit::Millimetre,
            Self::Cm => Unit::Centimetre,
            Self::M => Unit::Metre,
            Self::In => Unit::Inch,
            Self::Ft => Unit::Foot,
        }
    }
}
