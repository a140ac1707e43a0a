//! Units of mesh files.

/// The unit of a mesh file's coordinates: those that 3MF knows.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Unit {
    /// Micrometre.
    Micron,
    /// Millimetre: what files without a unit mostly mean (common practice).
    #[default]
    Millimetre,
    /// Centimetre.
    Centimetre,
    /// Metre.
    Metre,
    /// Inch.
    Inch,
    /// Foot.
    Foot,
}

impl Unit {
    /// All of them.
    pub const ALL: [Self; 6] = [
        Self::Micron,
        Self::Millimetre,
        Self::Centimetre,
        Self::Metre,
        Self::Inch,
        Self::Foot,
    ];

    /// The unit in metres. Inch and foot are those of 1959, exact.
    pub fn metres(self) -> f64 {
        match self {
            Self::Micron => 1e-6,
            Self::Millimetre => 1e-3,
            Self::Centimetre => 1e-2,
            Self::Metre => 1.0,
            Self::Inch => 0.0254,
            Self::Foot => 0.3048,
        }
    }

    /// Its symbol.
    pub fn symbol(self) -> &'static str {
        match self {
            Self::Micron => "um",
            Self::Millimetre => "mm",
            Self::Centimetre => "cm",
            Self::Metre => "m",
            Self::Inch => "in",
            Self::Foot => "ft",
        }
    }

    /// Its word in a 3MF (3MF Core Specification 1.3, section 3.4, `ST_Unit`).
    pub fn word_in_3mf(self) -> &'static str {
        match self {
            Self::Micron => "micron",
            Self::Millimetre => "millimeter",
            Self::Centimetre => "centimeter",
            Self::Metre => "meter",
            Self::Inch => "inch",
            Self::Foot => "foot",
        }
    }
}
