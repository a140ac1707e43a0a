//! A table: its keys in the order of the text.

use super::{Value, short};
use crate::Span;
use std::borrow::Cow;
use std::collections::HashMap;

/// Keys up to which a table is searched from end to end; above, through an index.
const SEARCHED: usize = 16;

/// A key with its value.
#[derive(Debug)]
pub(crate) struct Entry<'t> {
    pub(crate) key: Cow<'t, str>,
    start: u32,
    end: u32,
    pub(crate) value: Value<'t>,
}

impl<'t> Entry<'t> {
    pub(super) fn new(key: Key<'t>, value: Value<'t>) -> Self {
        Self {
            key: key.name,
            start: short(key.span.start),
            end: short(key.span.end),
            value,
        }
    }

    /// The key's place.
    pub(crate) fn key_span(&self) -> Span {
        self.start as usize..self.end as usize
    }
}

/// One word of a key as it is read.
#[derive(Debug, Clone)]
pub(super) struct Key<'t> {
    pub(super) name: Cow<'t, str>,
    pub(super) span: Span,
}

/// How a table came to be, which decides what may be added to it later.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Origin {
    /// It has a header of its own, or is the whole file.
    Header,
    /// A header went through it: `a` in `[a.b]`.
    Passed,
    /// A dotted key went through it: `a` in `a.b = 1`.
    Dotted,
    /// Braces.
    Inline,
}

/// Positions of keys among the entries.
#[derive(Debug)]
struct Index<'t> {
    positions: HashMap<Cow<'t, str>, usize>,
}

/// Keys and values.
#[derive(Debug)]
pub(crate) struct Table<'t> {
    pub(crate) entries: Vec<Entry<'t>>,
    /// Position of each key, once there are many. Behind a pointer, as most tables have none.
    index: Option<Box<Index<'t>>>,
    pub(super) origin: Origin,
}

impl<'t> Table<'t> {
    pub(super) fn new(origin: Origin) -> Self {
        Self {
            entries: Vec::new(),
            index: None,
            origin,
        }
    }

    /// Where `key` is among the entries.
    pub(super) fn position(&self, key: &str) -> Option<usize> {
        match &self.index {
            Some(index) => index.positions.get(key).copied(),
            None => self.entries.iter().position(|entry| entry.key == key),
        }
    }

    /// The entry of `key`.
    pub(crate) fn get(&self, key: &str) -> Option<&Entry<'t>> {
        self.entries.get(self.position(key)?)
    }

    /// Adds an entry whose key is new, and says where.
    pub(super) fn push(&mut self, entry: Entry<'t>) -> usize {
        let at = self.entries.len();
        if let Some(index) = &mut self.index {
            index.positions.insert(entry.key.clone(), at);
        }
        self.entries.push(entry);
        if self.index.is_none() && self.entries.len() > SEARCHED {
            let keys = self.entries.iter().enumerate();
            let positions = keys.map(|(at, entry)| (entry.key.clone(), at)).collect();
            self.index = Some(Box::new(Index { positions }));
        }
        at
    }
}
