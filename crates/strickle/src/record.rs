//! What a study found, in the order and under the names that the machine output has.
//!
//! SI base units throughout: m, m2, m3, kg, kg m2; angles in radians. Space: the axis of revolution is z, the section
//! starts in the half-plane y = 0, x >= 0 and turns right-handed about +z. `None` is `null`: it does not apply. Keys
//! keep their names and order for good; new ones are added behind the old.

use crate::figures::{Kind, System};
use serde::Serialize;

/// A point or vector in space.
pub type Vector = [f64; 3];

/// A symmetric matrix in space, by rows.
pub type Matrix = [[f64; 3]; 3];

/// All that a study found.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Record {
    /// Version of the program that found it.
    pub strickle: &'static str,
    /// Which part.
    pub part: Part,
    /// Exact figures.
    pub exact: Option<Exact>,
    /// The mesh that was made.
    pub mesh: Option<Mesh>,
    /// What the mesh says for itself.
    pub measured: Option<Measured>,
    /// Whether the mesh is sound.
    pub audit: Option<Audit>,
    /// Where the difference between measured and exact volume comes from.
    pub budget: Option<Budget>,
    /// The answer; `None` where nothing was asked.
    pub verdict: Option<Verdict>,
    /// What `[expect]` says, judged; in the order of the file.
    pub expect: Vec<Judgement>,
}

impl Record {
    /// The record as JSON on one line, with the line's end.
    pub fn line(&self) -> String {
        let json = serde_json::to_string(self).expect("a record has no keys but texts");
        json + "\n"
    }
}

/// Which part it was.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Part {
    /// Its name.
    pub name: String,
    /// The file, as it was named.
    pub file: String,
    /// SHA-256 of the file's bytes, in hexadecimal.
    pub sha256: String,
    /// Its number.
    pub number: Option<String>,
    /// Angle of revolution, radians.
    pub revolve: f64,
}

/// The exact figures of the whole part and of its bodies.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Exact {
    /// The section, summed over the bodies.
    pub section: Section,
    /// Volume, m3.
    pub volume: f64,
    /// Surface, m2: the sum over the bodies, end caps of a part turn included.
    pub surface: f64,
    /// Mass, kg.
    pub mass: f64,
    /// Mass over volume, kg/m3.
    pub density: f64,
    /// Centre of mass, m.
    pub centre: Vector,
    /// Mass moment of inertia about the centre of mass, kg m2; products with their minus sign.
    pub inertia_about_centre: Matrix,
    /// Mass moment of inertia about the origin, kg m2.
    pub inertia_about_origin: Matrix,
    /// The box that holds the part.
    pub bounds: Box3,
    /// Surface by body and name of the edge.
    pub surfaces: Vec<Surface>,
    /// Body by body.
    pub bodies: Vec<Body>,
    /// Least and greatest mass that the densities allow, kg; `None` where no material has a range.
    pub mass_range: Option<[f64; 2]>,
    /// Mass moment of inertia about the axis, kg m2.
    pub inertia_about_axis: f64,
    /// Radii of gyration, m.
    pub radii_of_gyration: Gyration,
    /// Largest diameter, m.
    pub largest_diameter: f64,
    /// Length along the axis, m.
    pub length: f64,
    /// The theorems used backwards: the distances from the axis that volume and swept surface imply, m.
    pub implied_centroid: Implied,
}

/// A plane section in the half-plane r >= 0.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Section {
    /// Area, m2.
    pub area: f64,
    /// Distance of the area's centroid from the axis, m.
    pub centroid_r: f64,
    /// Station of the area's centroid, m.
    pub centroid_z: f64,
    /// Length of the whole boundary, edges on the axis included, m.
    pub perimeter: f64,
    /// Distance of the boundary's centroid from the axis, m.
    pub perimeter_centroid_r: f64,
}

/// A box along the axes of space.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Box3 {
    /// Least coordinates, m.
    pub min: Vector,
    /// Greatest coordinates, m.
    pub max: Vector,
}

/// The surface that the edges of one name sweep, or the end caps of a part turn.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Surface {
    /// The body.
    pub body: String,
    /// Name of the edges; `None` for all that have none; `end caps` where `end_caps` is true.
    pub name: Option<String>,
    /// Area, m2.
    pub area: f64,
    /// True for the two plane ends of a part turn.
    pub end_caps: bool,
}

/// One body.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Body {
    /// Its name.
    pub name: String,
    /// The material's designation; `None` where the file gives a bare density.
    pub material: Option<String>,
    /// Density, kg/m3.
    pub density: f64,
    /// Volume, m3.
    pub volume: f64,
    /// Surface, m2, end caps included.
    pub surface: f64,
    /// Mass, kg.
    pub mass: f64,
    /// Centre of mass, m.
    pub centre: Vector,
    /// Mass moment of inertia about its own centre of mass, kg m2.
    pub inertia_about_centre: Matrix,
    /// Least and greatest density of the material, kg/m3.
    pub density_range: Option<[f64; 2]>,
}

/// Radii of gyration about axes through the centre of mass, except the first, m.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Gyration {
    /// About the axis of revolution.
    pub axis: f64,
    /// About the line through the centre of mass along x.
    pub across_x: f64,
    /// About the line through the centre of mass along y.
    pub across_y: f64,
}

/// The theorems used backwards, as a check of the figures by another way.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Implied {
    /// Volume over area and angle: the centroid's distance from the axis, m.
    pub area: f64,
    /// Swept surface over perimeter and angle: the boundary's centroid's distance from the axis, m.
    pub perimeter: f64,
    /// The larger relative difference from the centroids found by chords through points of the edges.
    pub difference: f64,
}

/// A triangle mesh of the part.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Mesh {
    /// The file it was written to.
    pub file: Option<String>,
    /// Number of triangles.
    pub triangles: usize,
    /// Number of vertices.
    pub vertices: usize,
    /// Largest distance between mesh and true surface that was asked for, m.
    pub within: f64,
    /// Where the vertices lie: `volume-true`, `inscribed`, `circumscribed`.
    pub placement: &'static str,
    /// Largest distance between mesh and true surface, m.
    pub largest_deviation: f64,
    /// What the mesh must measure.
    pub predicted: Predicted,
}

/// What a mesh must measure, by closed forms.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Predicted {
    /// Volume, m3.
    pub volume: f64,
    /// Centre of mass, m.
    pub centre: Vector,
}

/// What a mesh says for itself.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Measured {
    /// Who measured.
    pub by: &'static str,
    /// Volume, m3.
    pub volume: f64,
    /// Surface, m2.
    pub surface: f64,
    /// Mass, kg.
    pub mass: f64,
    /// Centre of mass, m.
    pub centre: Vector,
    /// Mass moment of inertia about the centre of mass, kg m2.
    pub inertia_about_centre: Matrix,
}

/// Whether a mesh is sound.
#[derive(Debug, Clone, PartialEq, Serialize)]
#[expect(
    clippy::struct_excessive_bools,
    reason = "four questions with an answer each, as the machine output has them"
)]
pub struct Audit {
    /// No edge has a triangle on one side only.
    pub closed: bool,
    /// Every edge has two triangles.
    pub manifold: bool,
    /// Neighbours agree on which side is outside.
    pub oriented: bool,
    /// The outside is outside.
    pub outward: bool,
    /// Number of connected pieces.
    pub components: usize,
    /// Edges with one triangle.
    pub boundary_edges: usize,
    /// Edges with more than two triangles.
    pub nonmanifold_edges: usize,
    /// Edges that both neighbours run along in the same direction.
    pub flipped_edges: usize,
    /// Triangles without area.
    pub degenerate_triangles: usize,
    /// Triangles that are there more than once.
    pub duplicate_triangles: usize,
    /// Vertices that no triangle uses.
    pub unreferenced_vertices: usize,
    /// Pairs of triangles that cut through each other; `None` where that was not looked for.
    pub self_intersections: Option<usize>,
}

/// Measured less exact volume, by cause, m3.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Budget {
    /// Chords in place of circles about the axis.
    pub circumferential: f64,
    /// Chords in place of curved edges of the section.
    pub meridional: f64,
    /// Coordinates rounded to what the file can hold.
    pub rounding: f64,
    /// What no cause explains.
    pub unexplained: f64,
    /// The first two by edge; edges that contribute nothing are left out.
    pub edges: Vec<EdgeBudget>,
}

/// What an edge contributes to mesh less exact volume, m3.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct EdgeBudget {
    /// The body.
    pub body: String,
    /// Where the edge comes from: `outline, step 3`.
    pub edge: Option<String>,
    /// Its name, if it has one.
    pub name: Option<String>,
    /// Chords in place of circles about the axis.
    pub circumferential: f64,
    /// Chords in place of the curved edge.
    pub meridional: f64,
}

/// The answer.
#[derive(Debug, Clone, PartialEq, Eq, Serialize)]
pub struct Verdict {
    /// Yes or no.
    pub holds: bool,
    /// Why not; empty where it holds.
    pub reasons: Vec<String>,
}

/// One line of `[expect]`, judged.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Judgement {
    /// The quantity, as the part file names it.
    pub quantity: &'static str,
    /// The value wanted, SI.
    pub wanted: f64,
    /// Lower and upper deviation that are accepted, SI.
    pub deviation: [f64; 2],
    /// The value found, SI.
    pub found: f64,
    /// Found less wanted, SI.
    pub difference: f64,
    /// True where the difference lies within the deviation.
    pub holds: bool,
    /// What it is, for people.
    #[serde(skip)]
    pub kind: Kind,
    /// The units that it is written in, for people.
    #[serde(skip)]
    pub system: System,
    /// What is wanted, as written.
    pub written: String,
}
