//! The named sizes: their expressions in the order in which they need each other, and their tolerances.

use crate::dimension::Dimension;
use crate::expression::{
    Expression, FUNCTIONS, Failure, MadeOf, Names, Quantity, Scope, Written, evaluate, parse,
};
use crate::fault::Found;
use crate::nearest::{listed, nearest, shown};
use crate::tolerance::tolerance;
use crate::tree::{Entry, Fields, Keys, Kind, Table, Value};
use crate::units::Vocabulary;
use crate::values::{Values, written_of};
use crate::{Fault, LengthUnit, Setting, Size, Span};
use std::collections::HashMap;

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

fn check_name(entry: &Entry<'_>, found: &mut Found) {
    let name = &*entry.key;
    let letter = |c: char| c.is_alphabetic() || c == '_';
    let right = name.starts_with(letter) && name.chars().all(|c| letter(c) || c.is_ascii_digit());
    if !right {
        let mended: String = name
            .chars()
            .map(|c| {
                if letter(c) || c.is_ascii_digit() {
                    c
                } else {
                    '_'
                }
            })
            .collect();
        let mended = if mended.starts_with(letter) {
            mended
        } else {
            format!("_{mended}")
        };
        return found.push(
            Fault::new(
                "size::name",
                "a size's name is made of letters, digits and _, a letter first",
                entry.key_span(),
                "",
            )
            .help(format!("call it {}", shown(&mended))),
        );
    }
    let drawing = crate::units::Unit::from_word(name, Vocabulary::Drawing).is_some();
    let taken = if name == "pi" {
        "the number pi"
    } else if drawing {
        "a unit"
    } else if FUNCTIONS.iter().any(|(function, _)| *function == name) {
        "a function"
    } else {
        return;
    };
    found.push(
        Fault::new(
            "size::reserved_name",
            format!("`{name}` is {taken} and cannot be a size too"),
            entry.key_span(),
            "",
        )
        .help(format!("call it {name}_1, or by what it measures")),
    );
}

fn check_settings(settings: &[Setting], sizes: &Sizes<'_>, header: &Span, found: &mut Found) {
    for (at, setting) in settings.iter().enumerate() {
        let name = setting.name.as_str();
        if sizes.index(name).is_none() {
            let near = nearest(name, sizes.names.iter().copied());
            let help = match near {
                Some(near) => format!("did you mean --set {near}=…?"),
                None if sizes.names.is_empty() => {
                    "only sizes under [size] can be set, and the file has none".to_owned()
                }
                None => format!("the sizes are {}", listed(&sizes.names)),
            };
            found.push(
                Fault::new(
                    "setting::unknown_size",
                    format!("--set {}: the file has no such size", shown(name)),
                    header.clone(),
                    "",
                )
                .help(help),
            );
        } else if settings[..at].iter().any(|other| other.name == name) {
            found.push(
                Fault::new(
                    "setting::twice",
                    format!("--set {name} is given twice"),
                    header.clone(),
                    "",
                )
                .help("give each size once"),
            );
        }
    }
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

/// The sizes in an order in which each comes after those it needs; those in a circle, and those that need them, are left out.
fn in_order(drafts: &[Draft<'_, '_>], found: &mut Found) -> Vec<usize> {
    #[derive(Clone, Copy, PartialEq)]
    enum State {
        New,
        Open,
        Done,
    }
    let needs: Vec<Vec<(usize, Span)>> = drafts
        .iter()
        .map(|draft| match &draft.source {
            Source::Expression(expression, written, setting) => expression
                .sizes()
                .map(|(size, at)| {
                    let place = match setting {
                        Some(_) => draft.entry.key_span(),
                        None => written.span(at),
                    };
                    (size, place)
                })
                .collect(),
            _ => Vec::new(),
        })
        .collect();
    let mut state = vec![State::New; drafts.len()];
    let mut order = Vec::with_capacity(drafts.len());
    let mut in_circle = vec![false; drafts.len()];
    for root in 0..drafts.len() {
        if state[root] != State::New {
            continue;
        }
        // A stack of its own, since a chain of sizes may be longer than the program's.
        let mut path: Vec<(usize, usize)> = vec![(root, 0)];
        state[root] = State::Open;
        while let Some((size, next)) = path.last_mut() {
            let size = *size;
            let Some((needed, _)) = needs[size].get(*next) else {
                state[size] = State::Done;
                path.pop();
                order.push(size);
                continue;
            };
            *next += 1;
            match state[*needed] {
                State::New => {
                    state[*needed] = State::Open;
                    path.push((*needed, 0));
                }
                State::Done => {}
                State::Open => {
                    let from = path
                        .iter()
                        .position(|(open, _)| open == needed)
                        .unwrap_or_default();
                    let circle = &path[from..];
                    for (size, _) in circle {
                        in_circle[*size] = true;
                    }
                    found.push(circle_fault(drafts, &needs, circle));
                }
            }
        }
    }
    order.retain(|&size| !in_circle[size]);
    order
}

fn circle_fault(
    drafts: &[Draft<'_, '_>],
    needs: &[Vec<(usize, Span)>],
    circle: &[(usize, usize)],
) -> Fault {
    const NAMED: usize = 12;
    const SHOWN: usize = 4;
    let name = |size: usize| shown(&drafts[size].entry.key);
    let mut names: Vec<String> = circle
        .iter()
        .take(NAMED)
        .map(|&(size, _)| name(size))
        .collect();
    if circle.len() > NAMED {
        names.push("…".to_owned());
    }
    names.extend(circle.first().map(|&(size, _)| name(size)));
    let mut places = circle.iter().filter_map(|&(size, next)| {
        let (needed, span) = needs[size].get(next.checked_sub(1)?)?;
        Some((size, *needed, span.clone()))
    });
    let first = places.next();
    let mut fault = match first {
        Some((size, _, span)) if circle.len() == 1 => Fault::new(
            "size::circle",
            format!("the size `{}` needs itself", name(size)),
            span,
            "",
        ),
        Some((size, needed, span)) => Fault::new(
            "size::circle",
            format!("sizes need each other in a circle: {}", names.join(" → ")),
            span,
            format!("{} needs {}", name(size), name(needed)),
        ),
        None => Fault::new(
            "size::circle",
            "sizes need each other in a circle",
            0..0,
            "",
        ),
    };
    for (size, needed, span) in places.take(SHOWN) {
        fault = fault.also(span, format!("{} needs {}", name(size), name(needed)));
    }
    fault.help("give one of them a number")
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
