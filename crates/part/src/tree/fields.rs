//! A table read key by key: what is unknown, missing or of the wrong type is reported once, here.

use super::{Entry, Kind, Table, Value};
use crate::fault::Found;
use crate::nearest::{listed, nearest, shown};
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
    /// Known keys that unknown ones were probably meant to be: they are not missing as well.
    slips: Vec<&'static str>,
}

impl<'a, 't> Fields<'a, 't> {
    /// The table `value`; what it has of unknown keys is reported.
    pub(crate) fn open(
        value: &'a Value<'t>,
        keys: &'static Keys,
        found: &mut Found,
    ) -> Option<Self> {
        if let Kind::Table(table) = &value.kind {
            Some(Self::of(table, value.span(), keys, found))
        } else {
            value.expected(keys.table, "a table", found);
            None
        }
    }

    /// As [`Self::open`], of a table at `span`.
    pub(crate) fn of(
        table: &'a Table<'t>,
        span: Span,
        keys: &'static Keys,
        found: &mut Found,
    ) -> Self {
        let mut slips = Vec::new();
        for entry in &table.entries {
            if !keys.known.contains(&&*entry.key) {
                let meant = keys.meant_by(&entry.key);
                slips.extend(meant.map(|(key, _)| key));
                found.push(unknown_key(entry, keys, meant));
            }
        }
        Self {
            table,
            keys,
            span,
            slips,
        }
    }

    /// The entry of `key`, if it is there.
    pub(crate) fn get(&self, key: &str) -> Option<&'a Entry<'t>> {
        // An unknown key has been reported, and counts as left out.
        self.keys
            .known
            .contains(&key)
            .then(|| self.table.get(key))?
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
        if entry.is_none() && !self.slipped(&[key]) {
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

    /// True where one of `keys` was probably meant by an unknown key, which has been reported.
    pub(crate) fn slipped(&self, keys: &[&str]) -> bool {
        self.slips.iter().any(|slip| keys.contains(slip))
    }

    /// All entries, unknown ones too.
    pub(crate) fn entries(&self) -> &'a [Entry<'t>] {
        &self.table.entries
    }

    /// Its place.
    pub(crate) fn span(&self) -> Span {
        self.span.clone()
    }
}

impl Keys {
    /// The known key that people write `word` for, or that is nearest to it, and what to call it.
    fn meant_by(&self, word: &str) -> Option<(&'static str, &'static str)> {
        let meant = self
            .meant
            .iter()
            .find(|(other, _)| word.eq_ignore_ascii_case(other));
        if let Some(&(_, words)) = meant {
            let quoted = words.split('`').nth(1).unwrap_or(words);
            let key = quoted.split(' ').next().unwrap_or(quoted);
            return Some((key, words));
        }
        let near = nearest(word, self.known.iter().copied())?;
        Some((near, near))
    }
}

fn unknown_key(entry: &Entry<'_>, keys: &Keys, meant: Option<(&str, &str)>) -> Fault {
    let key = shown(&entry.key);
    let all = listed(keys.known);
    let help = match meant {
        Some((key, words)) if key == words => format!("did you mean `{key}`? Known here: {all}"),
        Some((_, words)) => format!("did you mean {words}? Known here: {all}"),
        None => format!("known here: {all}"),
    };
    let (code, message) = if entry.value.has_header() {
        (
            "table::unknown_table",
            format!("this program knows no table [{key}]"),
        )
    } else {
        (
            "table::unknown_key",
            format!("`{key}` is no key of {}", keys.table),
        )
    };
    Fault::new(code, message, entry.key_span(), "").help(help)
}

impl Value<'_> {
    /// Reports that this is not what `what` has to be, unless it has been reported as broken.
    pub(crate) fn expected(&self, what: &str, kind: &str, found: &mut Found) {
        if matches!(self.kind, Kind::Broken) {
            return;
        }
        let help = if kind.contains("quotes") && kind.contains("number") {
            "write a number like 40, or an expression in quotes like \"mouth / 2\""
        } else if kind.contains("quotes") {
            "put it in quotes: \"..\""
        } else if kind.contains("list") {
            "a list stands in brackets: [ .. ]"
        } else if kind.contains("table") {
            "a table stands in braces, { .. }, or under a header of its own"
        } else {
            "write it without quotes or brackets"
        };
        let is = self.words();
        found.push(
            Fault::new(
                "table::wrong_type",
                format!("{what} is {kind}, not {is}"),
                self.span(),
                "",
            )
            .help(help),
        );
    }

    /// The items of a list.
    pub(crate) fn list(&self, what: &str, found: &mut Found) -> Option<&[Self]> {
        if let Kind::List(list) = &self.kind {
            Some(&list.items)
        } else {
            self.expected(what, "a list [..]", found);
            None
        }
    }

    /// True or false.
    pub(crate) fn boolean(&self, what: &str, found: &mut Found) -> Option<bool> {
        if let Kind::Boolean(value) = self.kind {
            Some(value)
        } else {
            self.expected(what, "true or false", found);
            None
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
