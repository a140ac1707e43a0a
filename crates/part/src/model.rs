//! A part that has been read: plain, legal, in SI units. Everything after the reader trusts it.

use crate::Span;
use profile::Region;

/// The unit of a bare number.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum LengthUnit {
    /// Millimetre.
    Millimetre,
    /// Centimetre.
    Centimetre,
    /// Metre.
    Metre,
    /// Inch, 25.4 mm.
    Inch,
    /// Foot, 304.8 mm.
    Foot,
}

/// A part of revolution as its file gives it.
#[derive(Debug, Clone)]
pub struct Part {
    /// `part.name`.
    pub name: String,
    /// `part.number`, free text for the title block.
    pub number: Option<String>,
    /// `part.unit`.
    pub unit: LengthUnit,
    /// `part.revolve` in radians, 0 < revolve <= 2 pi; exactly `std::f64::consts::TAU` for a full turn.
    pub revolve: f64,
    /// `part.general_tolerance`, as written, its form checked.
    pub general_tolerance: Option<String>,
    /// The named sizes in the order of the file.
    pub sizes: Vec<Size>,
    /// The file's own materials.
    pub materials: Vec<OwnMaterial>,
    /// The bodies; at least one. They may touch and do not overlap.
    pub bodies: Vec<Body>,
    /// What the drawing says of the finished part.
    pub expect: Vec<Expectation>,
}

/// A named dimension.
#[derive(Debug, Clone, PartialEq)]
pub struct Size {
    /// Its name.
    pub name: String,
    /// Its value: metres for a length; the plain number, or degrees, where it is not one.
    pub value: f64,
    /// True where the value is a length: it was written with a unit, or as a bare number (which is in `part.unit`).
    pub is_length: bool,
    /// What it may differ by.
    pub tolerance: Option<Tolerance>,
    /// The expression or number as written; the value given by `--set` where there was one.
    pub written: String,
    /// Its place in the text.
    pub span: Span,
}

/// What a size may differ by.
#[derive(Debug, Clone, PartialEq)]
pub enum Tolerance {
    /// Lower and upper deviation in metres (equal and opposite for `tol = 1.5`); lower <= upper.
    Limits(f64, f64),
    /// A tolerance class of ISO 286-1 as written: `H7`, `js6`.
    Iso286(String),
}

/// A `[[material]]` of the file.
#[derive(Debug, Clone, PartialEq)]
pub struct OwnMaterial {
    /// Its name.
    pub name: String,
    /// Density in kg/m3, positive.
    pub density: f64,
    /// Its place in the text.
    pub span: Span,
}

/// What a body is made of.
#[derive(Debug, Clone, PartialEq)]
pub enum Material {
    /// A designation to be looked up in the table of materials; not one of the file's own.
    Designation {
        /// The designation as written.
        word: String,
        /// Its place in the text.
        span: Span,
    },
    /// The file's own material at this index.
    Own(usize),
    /// A density given in its place, kg/m3, positive.
    Density(f64),
}

/// One body of the part.
#[derive(Debug, Clone)]
pub struct Body {
    /// Its name; unique in the part.
    pub name: String,
    /// What it is made of.
    pub material: Material,
    /// Its section, in metres. Each edge's tag is an index into `steps`.
    pub region: Region,
    /// Where the edges come from.
    pub steps: Vec<StepOrigin>,
    /// Its place in the text.
    pub span: Span,
}

/// Where an edge of a body comes from.
#[derive(Debug, Clone, PartialEq)]
pub struct StepOrigin {
    /// The step's `name`, or that of the corner it was cut at; edges without one have `None`.
    pub name: Option<String>,
    /// What to call it in a message: `outline, step 3`, `void 1, step 2`, `the wall's end`.
    pub words: String,
    /// Its place in the text.
    pub span: Span,
}

/// A quantity that `[expect]` can speak of.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Expected {
    /// Mass, kg.
    Mass,
    /// Volume, m3.
    Volume,
    /// Surface, m2.
    Surface,
    /// Centre of mass along the axis, m.
    CentreZ,
    /// Moment of inertia about the axis, kg m2.
    InertiaAxis,
    /// Largest diameter, m.
    LargestDiameter,
    /// Length along the axis, m.
    Length,
}

/// A line of `[expect]`.
#[derive(Debug, Clone, PartialEq)]
pub struct Expectation {
    /// What it speaks of.
    pub quantity: Expected,
    /// The value wanted, SI.
    pub value: f64,
    /// Lower and upper deviation that are accepted, SI; lower <= upper. Both 0 where none was written, which the reader
    /// refuses: a figure without a tolerance cannot be judged.
    pub deviation: (f64, f64),
    /// As written, for messages.
    pub written: String,
    /// Its place in the text.
    pub span: Span,
}
