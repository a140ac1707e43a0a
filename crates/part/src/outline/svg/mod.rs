//! An outline drawn as a path of an SVG file (W3C, SVG 2).
//!
//! Numbers are read and transformed in f64 and arcs stay arcs of circles and ellipses: a general-purpose reader would turn
//! them into f32 and Beziers, and the figures would be exact to seven digits at best.
//!
//! x runs away from the axis, which is the line x = 0 unless the part file says otherwise; y runs down, so z = -y: the line
//! y = 0 is z = 0. A section drawn to the left of the axis is the same part as its mirror image.

mod conic;
mod document;
mod path;
mod scale;
mod shape;
mod transform;

use super::Built;
use super::beside;
use super::origins::Origins;
use super::rounding::ROUNDING;
use super::settle::settled;
use super::wording::Wording;
use crate::nearest::shown;
use crate::{Fault, Neighbours, Span};
use glam::{DAffine2, DMat2, DVec2};
use path::Piece;
use profile::{Bounds, Edge, LARGEST};

/// Roundings behind a coordinate that went through a product of transforms.
const OPERATIONS: f64 = 16.0;

/// Where an outline is drawn.
#[derive(Debug, Clone, Copy)]
pub(super) struct Drawing<'a> {
    /// The file, as written.
    pub(super) file: &'a str,
    /// `id` of the path; the only one where `None`.
    pub(super) id: Option<&'a str>,
    /// x of the axis, user units.
    pub(super) axis_x: f64,
    /// Metres a user unit; the document's own physical size where `None`.
    pub(super) scale: Option<f64>,
    /// Place of the file's name.
    pub(super) span: &'a Span,
}

/// Why a drawing is no outline, without the file's name and place.
#[derive(Debug)]
struct Refusal {
    code: &'static str,
    message: String,
    help: String,
}

impl Refusal {
    fn new(code: &'static str, message: String) -> Self {
        Self {
            code,
            message,
            help: String::new(),
        }
    }

    fn help(mut self, help: impl Into<String>) -> Self {
        self.help = help.into();
        self
    }
}

/// The loop of the path in `drawing`.
pub(super) fn outline(
    drawing: &Drawing<'_>,
    prefix: &str,
    wording: Wording,
    neighbours: &dyn Neighbours,
    faults: &mut Vec<Fault>,
) -> Option<Built> {
    let edges = beside::text(drawing.file, drawing.span, neighbours).and_then(|text| {
        section(drawing, &text, wording).map_err(|refusal| {
            let message = format!("`{}`: {}", shown(drawing.file), refusal.message);
            Fault::new(refusal.code, message, drawing.span.clone(), "").help(refusal.help)
        })
    });
    match edges {
        Ok(edges) => {
            let mut origins = Origins::new(prefix);
            let mut last: Option<(Piece, u32)> = None;
            let mut tagged = Vec::with_capacity(edges.len());
            for (edge, piece) in edges {
                // The two edges of a long arc have one tag.
                let tag = match last {
                    Some((before, tag)) if before == piece => tag,
                    _ => origins.add(None, &piece.to_string(), drawing.span.clone()),
                };
                tagged.push((edge, tag));
                last = Some((piece, tag));
            }
            settled(tagged, origins, drawing.span, faults)
        }
        Err(fault) => {
            faults.push(fault);
            None
        }
    }
}

/// The edges of the section in (r, z), metres, each with its piece of the path.
fn section(
    drawing: &Drawing<'_>,
    text: &str,
    wording: Wording,
) -> Result<Vec<(Edge, Piece)>, Refusal> {
    let (root, shape) = document::find(text, drawing.id)?;
    let scale = match drawing.scale {
        Some(scale) => scale,
        None => scale::metres_per_unit(&root)?,
    };
    let data = shape::path_data(&shape)?;
    let mut edges = path::read(&data)?;
    let to_part = DAffine2::from_mat2_translation(
        DMat2::from_diagonal(DVec2::new(scale, -scale)),
        DVec2::new(-scale * drawing.axis_x, 0.0),
    );
    let map = to_part * shape.to_document;
    if map.matrix2.determinant() == 0.0 || !map.is_finite() {
        return Err(Refusal::new(
            "svg::transform",
            format!(
                "the transforms of the shape on line {} leave nothing of it",
                shape.line(text)
            ),
        )
        .help("look for a scale of 0"));
    }
    for (edge, _) in &mut edges {
        *edge = transform::transformed(edge, &map);
        // A path keeps within the range, a product with a large scale may not; its square would be no number.
        if edge
            .start()
            .abs()
            .max_element()
            .max(edge.chord().abs().max_element())
            > LARGEST
        {
            return Err(path::out_of_range());
        }
    }
    mirror_to_right(&mut edges, wording)?;
    Ok(edges)
}

/// Mirrors a section on the left of the axis.
fn mirror_to_right(edges: &mut [(Edge, Piece)], wording: Wording) -> Result<(), Refusal> {
    let bounds = edges
        .iter()
        .map(|(edge, _)| edge.bounds())
        .reduce(Bounds::union);
    let Some(Bounds { min, max }) = bounds else {
        return Ok(());
    };
    let size = min.abs().max(max.abs()).max_element();
    let within = OPERATIONS * ROUNDING * size;
    if min.x >= -within {
        return Ok(());
    }
    if max.x > within {
        return Err(Refusal::new(
            "svg::past_axis",
            format!(
                "its path lies on both sides of the axis, from r = {} to r = {}",
                wording.length(min.x),
                wording.length(max.x)
            ),
        )
        .help("draw the half section; the axis is the line x = 0 of the drawing unless axis_x says where it is"));
    }
    let mirror = DAffine2::from_scale(DVec2::new(-1.0, 1.0));
    for (edge, _) in edges {
        *edge = transform::transformed(edge, &mirror);
    }
    Ok(())
}
