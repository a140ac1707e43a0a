//! A table read key by key: what is unknown, missing or of the wrong type is reported once, here.

use super::{Entry, Kind, Table, Value};
use crate::fault::Found;
use crate::nearest::{advice, shown};
use crate::{Fault, Span};

/// The keys of one kind of table.
#[derive(Debug)]
pub(crate) struct Keys {
    /// What the table is called in messages: `[part]`, `a step`.
    pub(crate) table: &'static str,
    /// All keys it may have.
    pub(crate) known: &'static [&'static str],
    /// Words that people write for them.
    pub(crate) meant: &'static [(&'static str, &'static str)],
}

/// A table whose keys are all known.
#[derive(Debug, Clone)]
pub(crate) struct Fields<'a, 't> {
    table: &'a Table<'t>,
    keys: &'static Keys,
    span: Span,
}

impl<'a, 't> Fields<'a, 't> {
    /// The table `value`; what it has of unknown keys is reported.
    pub(crate) fn open(
        value: &'a Value<'t>,
        keys: &'static Keys,
        found: &mut Found,
    ) -> Option<Self> {
        match &value.kind {
            Kind::Table(table) => Some(Self::of(table, value.span(), keys, found)),
            _ => {
                value.expected(keys.table, "a table", found);
                None
            }
        }
    }

    /// As [`Self::open`], of a table at `span`.
    pub(crate) fn of(
        table: &'a Table<'t>,
        span: Span,
        keys: &'static Keys,
        found: &mut Found,
    ) -> Self {
        for entry in &table.entries {
            if !keys.known.contains(&&*entry.key) {
                found.push(unknown_key(entry, keys));
            }
        }
        Self { table, keys, span }
    }

    /// The entry of `key`, if it is there.
    pub(crate) fn get(&self, key: &str) -> Option<&'a Entry<'t>> {
        debug_assert!(self.keys.known.contains(&key), "{key} is not a known key");
        self.table.get(key)
    }

    /// The first of `keys` that is there.
    pub(crate) fn first_of(&self, keys: &[&str]) -> Option<&'a Entry<'t>> {
        keys.iter().find_map(|key| self.get(key))
    }

    /// The entry of `key`; reported if it is not there.
    pub(crate) fn require(
        &self,
        key: &str,
        help: &str,
        found: &mut Found,
    ) -> Option<&'a Entry<'t>> {
        let entry = self.get(key);
        if entry.is_none() {
            found.push(
                Fault::new(
                    "table::missing_key",
                    format!("{} lacks the key `{key}`", self.keys.table),
                    self.span.clone(),
                    "",
                )
                .help(help),
            );
        }
        entry
    }

    /// Its place.
    pub(crate) fn span(&self) -> Span {
        self.span.clone()
    }
}

fn unknown_key(entry: &Entry<'_>, keys: &Keys) -> Fault {
    let key = shown(&entry.key);
    let meant = keys
        .meant
        .iter()
        .find(|(word, _)| entry.key.eq_ignore_ascii_case(word));
    let help = match meant {
        Some((_, meant)) => format!("did you mean {meant}?"),
        None => advice(&entry.key, keys.known),
    };
    Fault::new(
        "table::unknown_key",
        format!("`{key}` is no key of {}", keys.table),
        entry.key_span(),
        "",
    )
    .help(help)
}

impl<'t> Value<'t> {
    /// Reports that this is not what `what` has to be, unless it has been reported as broken.
    pub(crate) fn expected(&self, what: &str, kind: &str, found: &mut Found) {
        if !matches!(self.kind, Kind::Broken) {
            found.push(Fault::new(
                "table::wrong_type",
                format!("{what} is {kind}, not {}", self.words()),
                self.span(),
                format!("{kind} is expected here"),
            ));
        }
    }

    /// The items of a list.
    pub(crate) fn list(&self, what: &str, found: &mut Found) -> Option<&[Self]> {
        match &self.kind {
            Kind::List(list) => Some(&list.items),
            _ => {
                self.expected(what, "a list [..]", found);
                None
            }
        }
    }

    /// True or false.
    pub(crate) fn boolean(&self, what: &str, found: &mut Found) -> Option<bool> {
        match self.kind {
            Kind::Boolean(value) => Some(value),
            _ => {
                self.expected(what, "true or false", found);
                None
            }
        }
    }

    /// A text; blank ones are reported.
    pub(crate) fn text(&self, what: &str, found: &mut Found) -> Option<&str> {
        match &self.kind {
            Kind::String(text) if text.trim().is_empty() => {
                found.push(
                    Fault::new(
                        "table::empty_text",
                        format!("{what} is empty"),
                        self.span(),
                        "",
                    )
                    .help("write something between the quotes, or leave the key out"),
                );
                None
            }
            Kind::String(text) => Some(text),
            _ => {
                self.expected(what, "a text in quotes", found);
                None
            }
        }
    }
}
