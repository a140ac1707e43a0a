//! The edges of one step, kind by kind.

mod centre;
mod curve;
mod ellipse;
mod radius;
mod tangent;
mod turn;
mod via;

pub(super) use turn::{Turn, half_circle_from};

use super::step::{Kind, Step, Target};
use super::wording::Wording;
use crate::Fault;
use glam::DVec2;
use profile::Edge;

/// What a step draws: one edge, or two where the one would be too long for its kind.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Drawn {
    pub(super) first: Edge,
    pub(super) second: Option<Edge>,
}

impl From<Edge> for Drawn {
    fn from(first: Edge) -> Self {
        Self {
            first,
            second: None,
        }
    }
}

impl Drawn {
    /// The edge that arrives.
    pub(super) fn last(&self) -> Edge {
        self.second.unwrap_or(self.first)
    }
}

/// A step and the corners that it joins.
#[derive(Debug, Clone, Copy)]
pub(super) struct Leg<'s> {
    pub(super) step: &'s Step,
    pub(super) start: DVec2,
    pub(super) end: DVec2,
    /// Direction in which the step before arrived, before any treatment of the corner; `None` on the first edge.
    pub(super) arriving: Option<DVec2>,
    /// Rounding of a coordinate, metres.
    pub(super) rounding: f64,
    pub(super) wording: Wording,
}

impl Leg<'_> {
    /// The edges of the step.
    ///
    /// # Errors
    /// What does not fit in the step.
    pub(super) fn draw(&self) -> Result<Drawn, Fault> {
        let closes_on_itself = matches!(self.step.kind, Kind::Cubic(..));
        if !closes_on_itself && self.is_short(self.start, self.end) {
            return Err(self.no_length());
        }
        match &self.step.kind {
            Kind::Line | Kind::Sloped(_) => Ok(self.line()),
            Kind::Arc {
                radius,
                centre_on,
                long,
                span,
            } => radius::arc(self, *radius, *centre_on, *long, span),
            Kind::Via(via, span) => via::arc(self, via, span),
            Kind::About(centre) => centre::arc(self, centre),
            Kind::Tangent(span) => tangent::arc(self, span),
            Kind::Ellipse {
                leaves_along_r,
                span,
            } => ellipse::quarter(self, *leaves_along_r, span),
            Kind::Parabola(control, span) => curve::parabola(self, control, span),
            Kind::Cubic(controls, span) => curve::cubic(self, controls, span),
        }
    }

    fn line(&self) -> Drawn {
        Edge::line(self.start, self.end).into()
    }

    fn chord(&self) -> DVec2 {
        self.end - self.start
    }

    /// True where the two points are the same, up to rounding.
    fn is_short(&self, from: DVec2, to: DVec2) -> bool {
        (to - from).abs().max_element() <= self.rounding
    }

    /// A point inside the step.
    fn point(&self, target: &Target) -> DVec2 {
        target.point(self.start)
    }

    fn place(&self, point: DVec2) -> String {
        self.wording.place(point)
    }

    fn no_length(&self) -> Fault {
        Fault::new(
            "step::no_length",
            format!(
                "{} stays where it is, at {}",
                self.step.words,
                self.place(self.end)
            ),
            self.step.span.clone(),
            "the step before arrived here already",
        )
        .help("leave the step out, or say where it goes")
    }
}
