//! Names of sizes, in the file and from outside.

use super::Sizes;
use crate::expression::{FUNCTIONS, Names};
use crate::fault::Found;
use crate::nearest::{listed, nearest, shown};
use crate::tree::Entry;
use crate::units::{Unit, Vocabulary};
use crate::{Fault, Setting, Span};

pub(super) fn check_name(entry: &Entry<'_>, found: &mut Found) {
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
    let drawing = Unit::from_word(name, Vocabulary::Drawing).is_some();
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

pub(super) fn check_settings(
    settings: &[Setting],
    sizes: &Sizes<'_>,
    header: &Span,
    found: &mut Found,
) {
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
