//! One step of an outline, with plain numbers: metres, radians, radii.
//!
//! This is the seam inside the reader: on its far side are TOML, units, expressions and repeats; on its near side
//! geometry only. Spans lead back to the text.

use crate::Span;

/// One coordinate of a step.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Coordinate {
    /// At this place: a radius (a diameter has been halved) or a station.
    At(f64),
    /// This much further than the step before.
    By(f64),
}

/// Where a step, or a point inside one, lies. An omitted coordinate is that of the step before.
#[derive(Debug, Clone, PartialEq)]
pub struct Target {
    /// `r`, `d`/2, `dr` or `dd`/2, and its place in the text.
    pub r: Option<(Coordinate, Span)>,
    /// `z` or `dz`, and its place in the text.
    pub z: Option<(Coordinate, Span)>,
}

/// A side of the direction of travel.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Side {
    /// Left.
    Left,
    /// Right.
    Right,
}

/// A direction that gives the coordinate a step leaves out. Where r is left out, outward and inward hold whichever way along
/// the axis the step goes; where z is left out it goes towards +z, and the sign must agree with what r does.
#[derive(Debug, Clone, PartialEq)]
pub enum Slope {
    /// `taper`: change of diameter over length; positive: outward with travel.
    Taper(f64, Span),
    /// `angle`: radians from the axis; positive: outward with travel.
    Angle(f64, Span),
}

/// How a step gets to its target.
#[derive(Debug, Clone, PartialEq)]
pub enum Kind {
    /// Straight.
    Line,
    /// Straight, with one coordinate given by a slope.
    Sloped(Slope),
    /// `arc = R`.
    Arc {
        /// Radius.
        radius: f64,
        /// The side on which the centre is.
        centre_on: Side,
        /// True for the longer of the two arcs.
        long: bool,
        /// Place of the radius.
        span: Span,
    },
    /// `via = {..}`.
    Via(Target, Span),
    /// `centre = {..}`.
    About(Centre),
    /// `tangent = true`: leaves as the step before arrived, whatever is done to the corner between them.
    Tangent(Span),
    /// `ellipse = "r"/"z"`.
    Ellipse {
        /// True where it leaves along r.
        leaves_along_r: bool,
        /// Place of the value.
        span: Span,
    },
    /// `curve = [{..}]`: one control point, a parabola.
    Parabola(Target, Span),
    /// `curve = [{..}, {..}]`: two control points, a cubic.
    Cubic([Target; 2], Span),
}

/// An arc about a given centre.
#[derive(Debug, Clone, PartialEq)]
pub struct Centre {
    /// The centre.
    pub at: Target,
    /// Which side it is on; needed for exactly half a turn, checked where given.
    pub centre_on: Option<Side>,
    /// True for the longer way round.
    pub long: bool,
    /// Place of the centre.
    pub span: Span,
}

/// What is done to the corner where a step arrives.
#[derive(Debug, Clone, PartialEq)]
pub enum Corner {
    /// A fillet of this radius.
    Round(f64, Span),
    /// A chamfer with these legs before and after the corner.
    Chamfer([f64; 2], Span),
}

/// One step.
#[derive(Debug, Clone, PartialEq)]
pub struct Step {
    /// Where it goes.
    pub to: Target,
    /// How.
    pub kind: Kind,
    /// What is done to the corner where it arrives; on the first step: where the outline closes.
    pub corner: Option<Corner>,
    /// Name of the edge; on the first step: of the edge that closes the outline.
    pub name: Option<String>,
    /// What to call it in a message: `step 3`, `step 3 (round 2 of the repeat in step 5)`.
    pub words: String,
    /// The whole step's place in the text.
    pub span: Span,
}

/// An outline as the file gives it.
#[derive(Debug, Clone, PartialEq)]
pub enum Outline {
    /// Steps; the last one runs straight back to the first.
    Steps(Vec<Step>, Span),
    /// A whole circle: its centre (r, z), its radius.
    Circle {
        /// Centre along r.
        r: f64,
        /// Centre along z.
        z: f64,
        /// Radius.
        radius: f64,
        /// Place of the outline.
        span: Span,
    },
    /// A path of an SVG file: r = x less the axis, z = -y.
    Svg {
        /// The file, as written.
        file: String,
        /// `id` of the path; needed where the file has more than one.
        id: Option<String>,
        /// x of the axis in the document's user units (before scaling).
        axis_x: f64,
        /// Metres a user unit; the document's own physical size where `None`.
        scale: Option<f64>,
        /// Place of the file name.
        span: Span,
    },
    /// Stations of a CSV file with columns r or d, and z, in the part's unit.
    Csv {
        /// The file, as written.
        file: String,
        /// Place of the file name.
        span: Span,
    },
    /// A thin wall given by one face.
    Wall {
        /// The face; open.
        line: Vec<Step>,
        /// Thickness.
        thickness: f64,
        /// Where the wall grows from the face: left, right, or half to each side (`None`).
        grow: Option<Side>,
        /// Place of the wall.
        span: Span,
    },
}
