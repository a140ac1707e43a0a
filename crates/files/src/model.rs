//! What is written into a mesh file.

use crate::Unit;
use glam::DVec3;
use std::ops::Range;

/// A part's mesh with what a file can say about it.
#[derive(Debug, Clone)]
pub struct Model<'a> {
    /// Name of the part.
    pub name: &'a str,
    /// Unit of the file's coordinates.
    pub unit: Unit,
    /// Corners, metres.
    pub positions: &'a [DVec3],
    /// Triangles, counter-clockwise from outside, by index into `positions`.
    pub triangles: &'a [[u32; 3]],
    /// The bodies, each with corners and triangles of its own; together they have all of them, in order.
    pub bodies: Vec<Body<'a>>,
}

/// A body of a model.
#[derive(Debug, Clone)]
pub struct Body<'a> {
    /// Its name.
    pub name: &'a str,
    /// Its material's name.
    pub material: &'a str,
    /// Its corners.
    pub positions: Range<usize>,
    /// Its triangles.
    pub triangles: Range<usize>,
}

impl Model<'_> {
    /// A corner in the file's unit; no coordinate is -0.
    pub(crate) fn in_unit(&self, position: DVec3) -> DVec3 {
        position / self.unit.metres() + DVec3::ZERO
    }

    /// A body's corners.
    pub(crate) fn positions_of(&self, body: &Body) -> &[DVec3] {
        self.positions.get(body.positions.clone()).unwrap_or(&[])
    }

    /// A body's triangles.
    pub(crate) fn triangles_of(&self, body: &Body) -> &[[u32; 3]] {
        self.triangles.get(body.triangles.clone()).unwrap_or(&[])
    }
}

/// `text` on one line: what would end the line or cannot be shown becomes a blank.
pub(crate) fn on_one_line(text: &str) -> String {
    text.chars()
        .map(|c| if c.is_control() { ' ' } else { c })
        .collect()
}
