//! What a mesh is asked to be, and why it may be refused.

use std::num::NonZeroU32;

/// Where the mesh's corners and faces lie with respect to the true surface.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Placement {
    /// Corners a little outside, facet middles a little inside, so that the mesh encloses the part's exact volume.
    #[default]
    VolumeTrue,
    /// Never outside the solid: an outer face lies within its true size, a bore is never under its true size. Choose it
    /// where the part must go in, or the bore must stay clear.
    Inscribed,
    /// Never inside the solid's surface: an outer face is never under its true size, a bore never over it. Choose it
    /// where nothing may be missing: a plug that must fill, stock to be cut.
    Circumscribed,
}

impl Placement {
    /// The word of the command line and of the JSON.
    pub fn word(self) -> &'static str {
        match self {
            Self::VolumeTrue => "volume-true",
            Self::Inscribed => "inscribed",
            Self::Circumscribed => "circumscribed",
        }
    }
}

/// What a mesh is asked to be.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Options {
    /// Greatest distance in metres between mesh and true surface, both ways. Positive and finite.
    pub within: f64,
    /// Where corners and faces lie.
    pub placement: Placement,
    /// Least number of segments a turn, both round the axis and along a curved edge that turned through a whole turn.
    /// At least 3; default 12.
    pub least_segments: NonZeroU32,
    /// Greatest length of a triangle's edge, metres.
    pub greatest_edge: Option<f64>,
    /// Greatest ratio of a triangle's longest edge to its height over that edge, for the swept faces; not all parts can keep less than 6.
    pub greatest_aspect: Option<f64>,
    /// Most triangles that may be made; more is an error that tells the number. Default 50 million.
    pub most_triangles: u64,
}

impl Options {
    /// The defaults with this greatest distance.
    pub fn within(within: f64) -> Self {
        Self {
            within,
            placement: Placement::default(),
            least_segments: NonZeroU32::new(12).expect("twelve is not zero"),
            greatest_edge: None,
            greatest_aspect: None,
            most_triangles: 50_000_000,
        }
    }
}

/// Why no mesh was made.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum MeshError {
    /// The distance asked for is not a positive finite length, or too small against the part for f64 to tell.
    #[error(
        "the distance between mesh and surface must be a positive length, at least 1e-12 of the part's extent"
    )]
    Within,
    /// More triangles than allowed.
    #[error("the mesh would have {triangles} triangles, more than the {allowed} allowed")]
    TooMany {
        /// Triangles that the options lead to.
        triangles: u64,
        /// Triangles allowed.
        allowed: u64,
    },
    /// No mesh with so few triangles.
    #[error(
        "the plainest mesh of this part has {least} triangles, more than the {asked} asked for"
    )]
    TooFew {
        /// Triangles of the plainest mesh.
        least: u64,
        /// Triangles asked for.
        asked: u64,
    },
    /// No division of the rings has been found that keeps the aspect ratio.
    #[error("no mesh of this part keeps its triangles' aspect ratio within {asked}")]
    Aspect {
        /// The ratio asked for.
        asked: f64,
    },
    /// Walls come so close to each other that no mesh of allowed size keeps them apart. So it is, for a one-sided placement,
    /// where two edges leave a corner in the same direction: the faces would lie on each other.
    #[error(
        "two faces of the section come closer than a mesh can keep apart, near r {r} m, z {z} m"
    )]
    TooThin {
        /// Radius of the place, metres.
        r: f64,
        /// Station of the place, metres.
        z: f64,
    },
    /// The section could not be triangulated for the end caps.
    #[error("the end caps of the part turn could not be triangulated: {why}")]
    Cap {
        /// What the triangulation found.
        why: String,
    },
    /// More corners than an index of 32 bits counts.
    #[error("the mesh has more corners than can be numbered")]
    TooManyCorners {
        /// The number's own complaint.
        source: std::num::TryFromIntError,
    },
}
