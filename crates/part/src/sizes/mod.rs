//! The named sizes: their expressions in the order in which they need each other, and their tolerances.

mod names;
mod order;
mod tolerance;

pub(crate) use tolerance::general_tolerance;

use crate::dimension::Dimension;
use crate::expression::{
    Expression, Failure, MadeOf, Names, Quantity, Scope, Written, evaluate, parse,
};
use crate::fault::Found;
use crate::nearest::shown;
use crate::tree::{Entry, Fields, Keys, Kind, Table, Value};
use crate::units::Vocabulary;
use crate::values::{Values, written_of};
use crate::{Fault, LengthUnit, Setting, Size, Span};
use names::{check_name, check_settings};
use order::in_order;
use std::collections::HashMap;
use tolerance::tolerance;

/// Keys of a size that is a table.
pub(crate) const SIZE: Keys = Keys {
    table: "a size",
    known: &["is", "tol"],
    meant: &[
        ("value", "`is`"),
        ("nominal", "`is`"),
        ("tolerance", "`tol`"),
        ("plus", "`tol = [lower, upper]`"),
        ("minus", "`tol = [lower, upper]`"),
    ],
};

/// Names and values of the sizes, for the expressions of the file.
#[derive(Debug, Default)]
pub(crate) struct Sizes<'t> {
    names: Vec<&'t str>,
    index: HashMap<&'t str, usize>,
    /// In the part's unit and degrees; `None` for those with a fault.
    values: Vec<Option<Quantity>>,
}

impl Names for Sizes<'_> {
    fn index(&self, word: &str) -> Option<usize> {
        self.index.get(word).copied()
    }

    fn all(&self) -> Vec<&str> {
        self.names.clone()
    }
}

impl Sizes<'_> {
    pub(crate) fn values(&self) -> &[Option<Quantity>] {
        &self.values
    }
}

/// A size as it is written.
struct Draft<'a, 't> {
    entry: &'a Entry<'t>,
    written: String,
    tolerance: Option<&'a Value<'t>>,
    source: Source<'a>,
}

/// Where a size's value comes from.
enum Source<'a> {
    /// A number.
    Number(f64),
    /// An expression.
    Expression(Expression, Written<'a>, Option<&'a Setting>),
    /// It could not be read; a fault has been reported.
    Broken,
}

/// The sizes of the table `table`, with `settings` in place of their values.
pub(crate) fn read_sizes<'a, 't>(
    table: Option<(&'a Table<'t>, Span)>,
    text: &'t str,
    unit: LengthUnit,
    settings: &'a [Setting],
    found: &mut Found,
) -> (Sizes<'a>, Vec<Size>)
where
    't: 'a,
{
    let mut sizes = Sizes::default();
    let entries = table.as_ref().map_or(&[][..], |(table, _)| &table.entries);
    for (at, entry) in entries.iter().enumerate() {
        check_name(entry, found);
        sizes.names.push(&entry.key);
        sizes.index.insert(&entry.key, at);
    }
    let header = table.map_or(0..0, |(_, span)| span);
    check_settings(settings, &sizes, &header, found);
    let drafts: Vec<Draft<'a, 't>> = entries
        .iter()
        .map(|entry| draft(entry, text, settings, &sizes, found))
        .collect();
    sizes.values = vec![None; drafts.len()];
    for at in in_order(&drafts, found) {
        sizes.values[at] = value(&drafts[at], unit, &sizes.values, found);
    }
    let values = Values { text, unit, sizes };
    let read = drafts
        .iter()
        .enumerate()
        .filter_map(|(at, draft)| {
            let quantity = values.sizes.values[at];
            let dimension = quantity.map(|quantity| quantity.dimension);
            let tolerance = draft
                .tolerance
                .and_then(|value| tolerance(value, dimension, &values, found));
            let quantity = quantity?;
            let metres = unit.to(LengthUnit::Metre, quantity.dimension.length_power());
            Some(Size {
                name: draft.entry.key.clone().into_owned(),
                value: metres.of(quantity.value),
                is_length: quantity.dimension == Dimension::LENGTH,
                tolerance,
                written: draft.written.clone(),
                span: draft.entry.key_span(),
            })
        })
        .collect();
    (values.sizes, read)
}

fn draft<'a, 't>(
    entry: &'a Entry<'t>,
    text: &str,
    settings: &'a [Setting],
    sizes: &Sizes<'_>,
    found: &mut Found,
) -> Draft<'a, 't> {
    let (is, tolerance) = match &entry.value.kind {
        Kind::Table(_) => match Fields::open(&entry.value, &SIZE, found) {
            Some(fields) => {
                let help = "write its value: { is = 25, tol = 0.1 }";
                let is = fields.require("is", help, found);
                (
                    is.map(|entry| &entry.value),
                    fields.get("tol").map(|entry| &entry.value),
                )
            }
            None => (None, None),
        },
        _ => (Some(&entry.value), None),
    };
    let setting = settings.iter().find(|setting| setting.name == entry.key);
    let source = match (setting, is) {
        (Some(setting), _) => {
            let value = Written::typed(&setting.value);
            match parse(&value, Vocabulary::Drawing, sizes) {
                Ok(expression) => Source::Expression(expression, value, Some(setting)),
                Err(fault) => {
                    found.push(in_setting(setting, fault, entry));
                    Source::Broken
                }
            }
        }
        (None, Some(value)) => source(value, &entry.key, text, sizes, found),
        (None, None) => Source::Broken,
    };
    let written = match (setting, is) {
        (Some(setting), _) => setting.value.clone(),
        (None, Some(value)) => match &value.kind {
            Kind::String(text) => text.clone().into_owned(),
            _ => text[value.span()].to_owned(),
        },
        (None, None) => String::new(),
    };
    Draft {
        entry,
        written,
        tolerance,
        source,
    }
}

fn source<'a>(
    value: &'a Value<'_>,
    name: &str,
    text: &str,
    sizes: &Sizes<'_>,
    found: &mut Found,
) -> Source<'a> {
    if let Kind::String(expression) = &value.kind {
        let written = written_of(value, expression, text);
        match parse(&written, Vocabulary::Drawing, sizes) {
            Ok(expression) => Source::Expression(expression, written, None),
            Err(fault) => {
                found.push(fault);
                Source::Broken
            }
        }
    } else {
        let what = format!("the size `{}`", shown(name));
        value
            .plain_number(&what, found)
            .map_or(Source::Broken, Source::Number)
    }
}

/// A fault in a value given by `--set`, told at the size that it was given for.
fn in_setting(setting: &Setting, fault: Fault, entry: &Entry<'_>) -> Fault {
    let piece = fault
        .labels
        .first()
        .and_then(|label| setting.value.get(label.span.clone()))
        .map(str::trim)
        .filter(|piece| !piece.is_empty() && !fault.message.contains(piece));
    let place = piece.map_or(String::new(), |piece| format!(" (at `{}`)", shown(piece)));
    Fault {
        message: format!(
            "--set {}={}: {}{place}",
            setting.name,
            shown(&setting.value),
            fault.message
        ),
        labels: Fault::new("", "", entry.key_span(), "this size").labels,
        ..fault
    }
}

fn value(
    draft: &Draft<'_, '_>,
    unit: LengthUnit,
    values: &[Option<Quantity>],
    found: &mut Found,
) -> Option<Quantity> {
    let scope = Scope {
        bare: unit,
        system: unit,
        sizes: values,
    };
    let quantity = match &draft.source {
        Source::Number(value) => Quantity::number(*value),
        Source::Expression(expression, written, setting) => {
            match evaluate(expression, written, &scope) {
                Ok(quantity) => quantity,
                Err(Failure::Silent) => return None,
                Err(Failure::Fault(fault)) => {
                    found.push(match setting {
                        Some(setting) => in_setting(setting, fault, draft.entry),
                        None => fault,
                    });
                    return None;
                }
            }
        }
        Source::Broken => return None,
    };
    // A bare number is in the part's unit; that it is bare is remembered, since it may count something.
    Some(if quantity.is_bare() {
        Quantity {
            made_of: MadeOf::BareSizes,
            ..scope.adopt(quantity, Dimension::LENGTH)
        }
    } else {
        quantity
    })
}
