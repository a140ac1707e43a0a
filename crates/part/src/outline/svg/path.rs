//! Path data (SVG 2, section 9) to edges, in the shape's own coordinates: x as r, y as z.

use super::Refusal;
use super::conic::arc;
use crate::limits;
use crate::outline::rounding::ROUNDING;
use glam::DVec2;
use profile::{Bezier, Edge, LARGEST};
use std::fmt;
use svgtypes::{PathParser, PathSegment};

/// What an edge is a piece of.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Piece {
    /// The command with this number and letter.
    Command(usize, char),
    /// The line that closes an open path.
    Closing,
}

impl fmt::Display for Piece {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Command(number, letter) => write!(f, "path command {number} ({letter})"),
            Self::Closing => f.write_str("the closing edge"),
        }
    }
}

/// Draws the commands of a path one after the other.
#[derive(Debug, Default)]
struct Pen {
    edges: Vec<(Edge, Piece)>,
    /// Where the subpath starts.
    first: DVec2,
    /// Where the pen is as the commands give it.
    at: DVec2,
    /// Where the last edge ends: the same, save for pieces that were too short to draw.
    end: DVec2,
    /// Control point of the command before, if it was a curve of that kind.
    cubic: Option<DVec2>,
    quadratic: Option<DVec2>,
    /// The largest coordinate so far.
    size: f64,
    /// Relative commands so far: each adds a rounding to where the pen is.
    relative: f64,
    /// True where the subpath has been closed, or another one begun.
    is_done: bool,
}

/// The edges of the closed line that the path data `data` draws, each with the piece of the path that it belongs to.
///
/// # Errors
/// The data cannot be read, draw nothing, or draw several lines.
pub(super) fn read(data: &str) -> Result<Vec<(Edge, Piece)>, Refusal> {
    let mut pen = Pen::default();
    for (at, segment) in PathParser::from(data).enumerate() {
        let segment = segment.map_err(|error| {
            Refusal::new(
                "svg::path_data",
                format!("its path data cannot be read after command {at}: {error}"),
            )
            .help("path data are commands M L H V C S Q T A Z with numbers, and start with M")
        })?;
        let command = char::from(segment.command());
        pen.draw(segment, Piece::Command(at + 1, command))?;
        if pen.size > LARGEST {
            return Err(out_of_range());
        }
        if pen.edges.len() > limits::EDGES {
            return Err(Refusal::new(
                "limit::edges",
                format!("its path has more than {} edges", limits::EDGES),
            )
            .help("simplify the path"));
        }
    }
    pen.finish()
}

/// A number of the path is too large.
pub(super) fn out_of_range() -> Refusal {
    Refusal::new(
        "svg::out_of_range",
        "its path leads farther out than can be computed with".to_owned(),
    )
    .help("look at the scale and at the powers of ten")
}

impl Pen {
    fn draw(&mut self, segment: PathSegment, piece: Piece) -> Result<(), Refusal> {
        let base = if segment.is_abs() {
            DVec2::ZERO
        } else {
            self.relative += 1.0;
            self.at
        };
        let on = |x, y| base + DVec2::new(x, y);
        let (cubic, quadratic) = (self.cubic.take(), self.quadratic.take());
        match segment {
            PathSegment::MoveTo { x, y, .. } => {
                self.is_done |= !self.edges.is_empty();
                self.at = on(x, y);
                self.first = self.at;
                if !self.is_done {
                    self.end = self.at;
                }
                self.grow(self.at);
                Ok(())
            }
            PathSegment::ClosePath { .. } => {
                self.is_done |= !self.edges.is_empty();
                self.at = self.first;
                Ok(())
            }
            PathSegment::LineTo { x, y, .. } => self.line(on(x, y), piece),
            PathSegment::HorizontalLineTo { x, .. } => {
                self.line(DVec2::new(base.x + x, self.at.y), piece)
            }
            PathSegment::VerticalLineTo { y, .. } => {
                self.line(DVec2::new(self.at.x, base.y + y), piece)
            }
            PathSegment::CurveTo {
                x1,
                y1,
                x2,
                y2,
                x,
                y,
                ..
            } => self.curve([on(x1, y1), on(x2, y2)], on(x, y), piece),
            PathSegment::SmoothCurveTo { x2, y2, x, y, .. } => {
                let first = cubic.map_or(self.at, |control| 2.0 * self.at - control);
                self.curve([first, on(x2, y2)], on(x, y), piece)
            }
            PathSegment::Quadratic { x1, y1, x, y, .. } => {
                self.parabola(on(x1, y1), on(x, y), piece)
            }
            PathSegment::SmoothQuadratic { x, y, .. } => {
                let control = quadratic.map_or(self.at, |control| 2.0 * self.at - control);
                self.parabola(control, on(x, y), piece)
            }
            PathSegment::EllipticalArc {
                rx,
                ry,
                x_axis_rotation,
                large_arc,
                sweep,
                x,
                y,
                ..
            } => {
                let to = on(x, y);
                self.grow(to);
                self.grow(DVec2::new(rx, ry));
                if self.size > LARGEST {
                    return Err(out_of_range());
                }
                let (from, rounding) = (self.end, self.rounding());
                let radii = DVec2::new(rx.abs(), ry.abs());
                let edges = arc(
                    [from, to],
                    radii,
                    x_axis_rotation,
                    large_arc,
                    sweep,
                    rounding,
                );
                self.add(to, edges, piece)
            }
        }
    }

    fn line(&mut self, to: DVec2, piece: Piece) -> Result<(), Refusal> {
        self.grow(to);
        let edge = Edge::line(self.end, to);
        self.add(to, [Some(edge), None], piece)
    }

    fn curve(
        &mut self,
        [first, second]: [DVec2; 2],
        to: DVec2,
        piece: Piece,
    ) -> Result<(), Refusal> {
        self.grow(first);
        self.grow(second);
        self.grow(to);
        self.cubic = Some(second);
        let curve = Bezier {
            points: [self.end, first, second, to],
        };
        self.add_curve(curve, &[first, second], to, piece)
    }

    fn parabola(&mut self, control: DVec2, to: DVec2, piece: Piece) -> Result<(), Refusal> {
        self.grow(control);
        self.grow(to);
        self.quadratic = Some(control);
        let curve = Bezier::parabola(self.end, control, to);
        self.add_curve(curve, &[control], to, piece)
    }

    /// A curve that comes back to its start is a loop, in two edges.
    fn add_curve(
        &mut self,
        mut curve: Bezier,
        controls: &[DVec2],
        to: DVec2,
        piece: Piece,
    ) -> Result<(), Refusal> {
        let is_away = |point: &DVec2| !self.is_short(*point);
        if !self.is_short(to) || !controls.iter().any(is_away) {
            return self.add(to, [Some(Edge::Bezier(curve)), None], piece);
        }
        curve.points[3] = self.end;
        let (first, second) = (curve.part(0.0, 0.5), curve.part(0.5, 1.0));
        let middle = second.points[0];
        let edges = [
            Edge::Bezier(first).with_ends(self.end, middle),
            Edge::Bezier(second).with_ends(middle, self.end),
        ];
        self.check_open()?;
        self.edges.extend(edges.map(|edge| (edge, piece)));
        self.at = to;
        Ok(())
    }

    /// Adds the edges of one command and moves on to `to`, unless that is where the pen is: drawings are full of pieces
    /// without length.
    fn add(&mut self, to: DVec2, edges: [Option<Edge>; 2], piece: Piece) -> Result<(), Refusal> {
        if !self.is_short(to) {
            self.check_open()?;
            for edge in edges.into_iter().flatten() {
                self.edges.push((edge, piece));
            }
            self.end = to;
        }
        self.at = to;
        Ok(())
    }

    fn check_open(&self) -> Result<(), Refusal> {
        if !self.is_done {
            return Ok(());
        }
        Err(Refusal::new(
            "svg::several_lines",
            "its path draws more than one closed line".to_owned(),
        )
        .help("an outline is one line; give each hole a path of its own and name it under `voids`"))
    }

    fn grow(&mut self, point: DVec2) {
        self.size = self.size.max(point.abs().max_element());
    }

    fn rounding(&self) -> f64 {
        ROUNDING * (1.0 + self.relative) * self.size
    }

    fn is_short(&self, to: DVec2) -> bool {
        (to - self.end).abs().max_element() <= ROUNDING * self.size
    }

    fn finish(mut self) -> Result<Vec<(Edge, Piece)>, Refusal> {
        let Some(start) = self.edges.first().map(|(edge, _)| edge.start()) else {
            return Err(
                Refusal::new("svg::empty_path", "its path draws nothing".to_owned())
                    .help("draw the section as one closed path"),
            );
        };
        if (self.end - start).abs().max_element() <= self.rounding() {
            if let Some((edge, _)) = self.edges.last_mut() {
                *edge = edge.with_ends(edge.start(), start);
            }
        } else {
            let closing = Edge::line(self.end, start);
            self.edges.push((closing, Piece::Closing));
        }
        Ok(self.edges)
    }
}
