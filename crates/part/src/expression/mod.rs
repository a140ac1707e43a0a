//! Expressions: numbers with units, names of sizes, arithmetic.

mod call;
mod evaluate;
mod explain;
mod function;
mod measure;
mod parse;
mod quantity;
mod token;

pub(crate) use evaluate::evaluate;
pub(crate) use function::FUNCTIONS;
pub(crate) use parse::{Expression, Names, Parsed, parse, parse_tokens, tokens_of};
pub(crate) use quantity::{Failure, MadeOf, Quantity, Scope};
pub(crate) use token::{Placed, Token};

use crate::Span;
use std::ops::Range;

/// The text of an expression and where it stands.
#[derive(Debug, Clone)]
pub(crate) struct Written<'e> {
    /// The text.
    pub(crate) text: &'e str,
    whole: Span,
    /// Where the text's first byte is; `None` where escapes hide that.
    start: Option<usize>,
}

impl<'e> Written<'e> {
    /// A text at `start`, as the string at `whole` gives it.
    pub(crate) fn new(text: &'e str, whole: Span, start: Option<usize>) -> Self {
        Self { text, whole, start }
    }

    /// A text that was typed by itself.
    pub(crate) fn typed(text: &'e str) -> Self {
        Self::new(text, 0..text.len(), Some(0))
    }

    /// Place of a part of it; of all of it where escapes hide the part.
    pub(crate) fn span(&self, at: Range<usize>) -> Span {
        match self.start {
            Some(start) => start + at.start..start + at.end,
            None => self.whole.clone(),
        }
    }

    /// A part of it, to be read by itself.
    pub(crate) fn part(&self, at: Range<usize>) -> Self {
        Self {
            text: self.text.get(at.clone()).unwrap_or_default(),
            whole: self.span(at.clone()),
            start: self.start.map(|start| start + at.start),
        }
    }

    /// Place of the whole value, with its quotes.
    pub(crate) fn whole(&self) -> Span {
        self.whole.clone()
    }
}

#[cfg(test)]
mod tests;
