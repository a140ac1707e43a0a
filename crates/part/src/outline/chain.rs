//! The edges of an outline or a wall's face, one link a step, with their corners.

use super::draw::Drawn;
use super::step::{Corner, Step};
use profile::Edge;

/// What one step draws.
#[derive(Debug)]
pub(super) struct Link<'s> {
    /// Its edges: one or two, fewer where corners take them up.
    edges: [Option<Edge>; 2],
    /// Their tag.
    pub(super) tag: u32,
    /// What is to be done to the corner where it arrives, and the step that says so.
    pub(super) treatment: Option<(&'s Corner, &'s Step)>,
    /// The edge that treats that corner, and its tag.
    corner: Option<(Edge, u32)>,
    /// True where the corner at its start has taken some of it.
    pub(super) is_cut_at_start: bool,
    /// True where the corner at its end has.
    pub(super) is_cut_at_end: bool,
}

impl<'s> Link<'s> {
    pub(super) fn new(drawn: Drawn, tag: u32, arrives: &'s Step) -> Self {
        Self {
            edges: [Some(drawn.first), drawn.second],
            tag,
            treatment: arrives.corner.as_ref().map(|corner| (corner, arrives)),
            corner: None,
            is_cut_at_start: false,
            is_cut_at_end: false,
        }
    }

    /// The edge that leaves the corner at its start; `None` where corners have taken up all edges.
    pub(super) fn leaving(&mut self) -> Option<&mut Option<Edge>> {
        self.edges.iter_mut().find(|edge| edge.is_some())
    }

    /// The edge that arrives at the corner at its end.
    pub(super) fn arriving(&mut self) -> Option<&mut Option<Edge>> {
        self.edges.iter_mut().rev().find(|edge| edge.is_some())
    }

    /// Puts `edge` in the corner at its end.
    pub(super) fn treat(&mut self, edge: Edge, tag: u32) {
        self.corner = Some((edge, tag));
    }

    /// Its edges and its corner's, with their tags.
    fn into_edges(self) -> impl Iterator<Item = (Edge, u32)> {
        let tag = self.tag;
        self.edges
            .into_iter()
            .flatten()
            .map(move |edge| (edge, tag))
            .chain(self.corner)
    }
}

/// The edges of `links` in order of travel.
pub(super) fn edges(links: Vec<Link<'_>>) -> Vec<(Edge, u32)> {
    links.into_iter().flat_map(Link::into_edges).collect()
}
