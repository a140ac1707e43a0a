//! From statements to the tree: headers, dotted keys, and what may not be said twice.

use super::table::{Entry, Key, Origin, Table};
use super::{Kind, List, Value, short};
use crate::fault::Found;
use crate::nearest::{grouped, shown};
use crate::{Fault, Span, limits};

/// The words of a key, `a.b.c`. Almost always one.
#[derive(Debug, Default)]
pub(super) struct KeyPath<'t> {
    last: Option<Key<'t>>,
    before: Vec<Key<'t>>,
}

impl<'t> KeyPath<'t> {
    pub(super) fn push(&mut self, key: Key<'t>) {
        self.before.extend(self.last.replace(key));
    }

    pub(super) fn len(&self) -> usize {
        self.before.len() + usize::from(self.last.is_some())
    }

    pub(super) fn last(&self) -> &Key<'t> {
        self.last.as_ref().expect("a key has at least one word")
    }

    /// Place of the whole key.
    pub(super) fn span(&self) -> Span {
        let last = self.last();
        let start = self.before.first().unwrap_or(last).span.start;
        start..last.span.end
    }

    fn split(self) -> (Vec<Key<'t>>, Key<'t>) {
        let last = self.last.expect("a key has at least one word");
        (self.before, last)
    }
}

/// The tree while it is put together.
pub(super) struct Assembly<'t> {
    root: Table<'t>,
    /// Where the keys that come now belong: entries from the root down, through a list to its last table. `None` below a
    /// header that was refused.
    current: Option<Vec<usize>>,
}

impl<'t> Assembly<'t> {
    pub(super) fn new() -> Self {
        Self {
            root: Table::new(Origin::Header),
            current: Some(Vec::new()),
        }
    }

    pub(super) fn finish(self) -> Table<'t> {
        self.root
    }

    /// The keys that follow belong nowhere.
    pub(super) fn lose_header(&mut self) {
        self.current = None;
    }

    /// A header: the keys that follow belong to this table.
    pub(super) fn header(
        &mut self,
        path: KeyPath<'t>,
        of_list: bool,
        span: &Span,
        found: &mut Found,
    ) {
        self.current = None;
        let (before, last) = path.split();
        let mut places = Vec::with_capacity(before.len() + 1);
        let mut table = &mut self.root;
        for key in before {
            let Some(at) = entry_of(table, &key, Origin::Passed, found) else {
                return;
            };
            places.push(at);
            let entry = &mut table.entries[at];
            let first = entry.key_span();
            let next = inner_table(&mut entry.value);
            match next {
                Some(inner) if inner.origin != Origin::Inline => table = inner,
                _ => return found.push(not_a_table(&key, first)),
            }
        }
        let at = if let Some(at) = table.position(&last.name) {
            at
        } else {
            let kind = if of_list {
                let items = Vec::new();
                let of_tables = true;
                Kind::List(Box::new(List { items, of_tables }))
            } else {
                // `Passed` until its own header is entered below.
                Kind::Table(Box::new(Table::new(Origin::Passed)))
            };
            let value = Value::new(kind, span);
            match add(table, last.clone(), value, found) {
                Some(at) => at,
                None => return,
            }
        };
        let entry = &mut table.entries[at];
        let first = entry.key_span();
        match &mut entry.value.kind {
            Kind::List(list) if of_list && list.of_tables => {
                let table = Kind::Table(Box::new(Table::new(Origin::Header)));
                list.items.push(Value::new(table, span));
            }
            Kind::Table(table) if !of_list && table.origin == Origin::Passed => {
                table.origin = Origin::Header;
                entry.value.start = short(span.start);
                entry.value.end = short(span.end);
            }
            kind => {
                let fault = twice(&last, first);
                let fault = if of_list || matches!(kind, Kind::List(_)) {
                    fault.help(format!(
                        "[[{0}]] makes one of several, [{0}] the only one; use the same brackets everywhere",
                        shown(&last.name)
                    ))
                } else {
                    fault.help("put the keys of both under one header")
                };
                return found.push(fault);
            }
        }
        places.push(at);
        self.current = Some(places);
    }

    /// `key = value` below the last header.
    pub(super) fn insert(&mut self, path: KeyPath<'t>, value: Value<'t>, found: &mut Found) {
        let Some(places) = &self.current else {
            return;
        };
        let mut table = &mut self.root;
        for &at in places {
            table = inner_table(&mut table.entries[at].value)
                .expect("a header leads to a table that it has entered");
        }
        insert(table, path, value, found);
    }

    /// `key = value` between braces.
    pub(super) fn insert_inline(
        table: &mut Table<'t>,
        path: KeyPath<'t>,
        value: Value<'t>,
        found: &mut Found,
    ) {
        insert(table, path, value, found);
    }
}

fn insert<'t>(mut table: &mut Table<'t>, path: KeyPath<'t>, value: Value<'t>, found: &mut Found) {
    let (before, last) = path.split();
    for key in before {
        let Some(at) = entry_of(table, &key, Origin::Dotted, found) else {
            return;
        };
        let entry = &mut table.entries[at];
        let first = entry.key_span();
        match &mut entry.value.kind {
            Kind::Table(inner) if matches!(inner.origin, Origin::Dotted | Origin::Passed) => {
                table = inner;
            }
            _ => return found.push(not_a_table(&key, first)),
        }
    }
    if let Some(first) = table.get(&last.name) {
        let fault = twice(&last, first.key_span());
        return found.push(fault.help("keep the one that is meant and take the other away"));
    }
    add(table, last, value, found);
}

/// Where the entry of `key` is; a table of `origin` is made where there is none.
fn entry_of<'t>(
    table: &mut Table<'t>,
    key: &Key<'t>,
    origin: Origin,
    found: &mut Found,
) -> Option<usize> {
    table.position(&key.name).or_else(|| {
        let inner = Kind::Table(Box::new(Table::new(origin)));
        add(table, key.clone(), Value::new(inner, &key.span), found)
    })
}

/// Adds a new entry, unless the table is full.
fn add<'t>(
    table: &mut Table<'t>,
    key: Key<'t>,
    value: Value<'t>,
    found: &mut Found,
) -> Option<usize> {
    if table.entries.len() >= limits::KEYS {
        found.push(
            Fault::new(
                "limit::keys",
                format!("a table has more than {} keys", grouped(limits::KEYS)),
                key.span,
                "",
            )
            .help("take away what the part does not need"),
        );
        return None;
    }
    Some(table.push(Entry::new(key, value)))
}

/// The table that a key leads into: the value itself or, of several under `[[..]]`, the last.
fn inner_table<'v, 't>(value: &'v mut Value<'t>) -> Option<&'v mut Table<'t>> {
    match &mut value.kind {
        Kind::Table(table) => Some(table),
        Kind::List(list) if list.of_tables => match list.items.last_mut().map(|v| &mut v.kind) {
            Some(Kind::Table(table)) => Some(table),
            _ => None,
        },
        _ => None,
    }
}

fn twice(key: &Key<'_>, first: Span) -> Fault {
    Fault::new(
        "toml::twice",
        format!("`{}` is given twice", shown(&key.name)),
        key.span.clone(),
        "the second time",
    )
    .also(first, "the first time")
}

fn not_a_table(key: &Key<'_>, first: Span) -> Fault {
    Fault::new(
        "toml::not_a_table",
        format!(
            "`{}` has a value already, so no key can go below it",
            shown(&key.name)
        ),
        key.span.clone(),
        "",
    )
    .also(first, "its value")
    .help("write the keys of one table in one place")
}
