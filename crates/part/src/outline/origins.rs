//! Where edges come from, one entry a tag.

use super::step::{Corner, Step};
use crate::{Span, StepOrigin};

/// The origins of one outline's edges; a tag is an index into them.
#[derive(Debug)]
pub(super) struct Origins {
    /// What the outline is called: `outline`, `void 1`.
    prefix: String,
    all: Vec<StepOrigin>,
}

impl Origins {
    pub(super) fn new(prefix: &str) -> Self {
        Self {
            prefix: prefix.to_owned(),
            all: Vec::new(),
        }
    }

    /// Notes an edge that `words` name within the outline.
    pub(super) fn add(&mut self, name: Option<String>, words: &str, span: Span) -> u32 {
        // A part has 100,000 edges at most.
        let tag = u32::try_from(self.all.len()).unwrap_or(u32::MAX);
        self.all.push(StepOrigin {
            name,
            words: format!("{}, {words}", self.prefix),
            span,
        });
        tag
    }

    /// Notes the edge of `step`.
    pub(super) fn step(&mut self, step: &Step) -> u32 {
        self.add(step.name.clone(), &step.words, step.span.clone())
    }

    /// Notes the edge that closes an outline; the first step's name is its, since it arrives there.
    pub(super) fn closing(&mut self, first: &Step, last: &Step) -> u32 {
        self.add(first.name.clone(), "the closing edge", last.span.clone())
    }

    /// Notes the edge that treats the corner where `step` arrives, between the edges `before` and `after`. It has the name of
    /// both of them if they have the same one, and no name otherwise: a round belongs to neither of two surfaces.
    pub(super) fn corner(&mut self, corner: &Corner, step: &Step, before: u32, after: u32) -> u32 {
        let name = (self.get(before).name == self.get(after).name)
            .then(|| self.get(before).name.clone())
            .flatten();
        let (what, span) = corner.words();
        self.add(name, &format!("the {what} at {}", step.words), span)
    }

    /// Notes an end of a wall; it has no outline's name before it.
    pub(super) fn end(&mut self, words: &str, span: Span) -> u32 {
        let tag = self.add(None, words, span);
        if let Some(origin) = self.all.last_mut() {
            words.clone_into(&mut origin.words);
        }
        tag
    }

    pub(super) fn get(&self, tag: u32) -> &StepOrigin {
        self.all
            .get(tag as usize)
            .expect("a tag is given out with its entry")
    }

    /// What the edge is called within its outline: `step 3`.
    pub(super) fn short(&self, tag: u32) -> &str {
        let words = &self.get(tag).words;
        words
            .strip_prefix(&self.prefix)
            .map_or(&**words, |words| words.trim_start_matches(", "))
    }

    pub(super) fn into_all(self) -> Vec<StepOrigin> {
        self.all
    }
}

impl Corner {
    /// What it is, and its place.
    pub(super) fn words(&self) -> (&'static str, Span) {
        match self {
            Self::Round(_, span) => ("round", span.clone()),
            Self::Chamfer(_, span) => ("chamfer", span.clone()),
        }
    }
}
