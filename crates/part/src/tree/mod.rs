//! TOML as a tree in which everything knows its place in the text.
//!
//! Words and values come from the `toml` crate's own lexer and decoder ([`toml_parser`]); what is added here is the
//! assembly, for three reasons. The memory stays in proportion to the text, whatever the text (a list of all tokens would
//! take twenty times a file of brackets). A broken value or statement leaves a [`Kind::Broken`] in its place, so that the rest
//! of the file is still checked. And the messages are for people who do not know TOML.
//!
//! [`toml_parser`]: https://docs.rs/toml_parser

mod assembly;
mod fields;
mod grammar;
mod key;
mod nested;
mod recovery;
mod scalar;
mod table;

pub(crate) use fields::{Fields, Keys};
pub(crate) use grammar::{Document, parse};
pub(crate) use table::{Entry, Table};

use crate::Span;
use std::borrow::Cow;
use table::Origin;

/// A value and its place.
#[derive(Debug)]
pub(crate) struct Value<'t> {
    pub(crate) kind: Kind<'t>,
    // Four bytes each are enough for 16 MiB, and there may be a million values.
    start: u32,
    end: u32,
}

/// What a value is.
#[derive(Debug)]
pub(crate) enum Kind<'t> {
    /// A string, without quotes and escapes.
    String(Cow<'t, str>),
    /// A whole number, in any base.
    Integer(i64),
    /// A number with a point or an exponent; may be infinite or not a number.
    Float(f64),
    /// `true` or `false`.
    Boolean(bool),
    /// A date or a time of day.
    Date,
    /// `[..]`, or all the tables under one `[[..]]`.
    List(Box<List<'t>>),
    /// `{..}`, or the keys under `[..]`.
    Table(Box<Table<'t>>),
    /// Something that could not be read; a fault has been reported.
    Broken,
}

/// A list of values.
#[derive(Debug)]
pub(crate) struct List<'t> {
    pub(crate) items: Vec<Value<'t>>,
    /// True for the tables under `[[..]]`.
    of_tables: bool,
}

impl<'t> Value<'t> {
    fn new(kind: Kind<'t>, span: &Span) -> Self {
        Self {
            kind,
            start: short(span.start),
            end: short(span.end),
        }
    }

    /// Its place; of a table under a header, the header's.
    pub(crate) fn span(&self) -> Span {
        self.start as usize..self.end as usize
    }

    /// True for a table that a header opened, or several of them.
    fn has_header(&self) -> bool {
        match &self.kind {
            Kind::Table(table) => matches!(table.origin, Origin::Header | Origin::Passed),
            Kind::List(list) => list.of_tables,
            _ => false,
        }
    }

    /// What it is, in words.
    pub(crate) fn words(&self) -> &'static str {
        match self.kind {
            Kind::String(_) => "a text",
            Kind::Integer(_) | Kind::Float(_) => "a number",
            Kind::Boolean(_) => "true or false",
            Kind::Date => "a date",
            Kind::List(_) => "a list",
            Kind::Table(_) => "a table",
            Kind::Broken => "unreadable",
        }
    }
}

/// An offset in four bytes. Texts are at most 16 MiB long.
fn short(offset: usize) -> u32 {
    u32::try_from(offset).unwrap_or(u32::MAX)
}

#[cfg(test)]
mod tests;
