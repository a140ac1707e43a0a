//! The nearest known word to one that is not known.

use crate::{Fault, Span};

/// Longest word that a nearest one is looked for; comparing takes the product of the lengths.
const COMPARED: usize = 40;

/// The word of `known` that `word` was most likely meant to be: at most a third of its letters are wrong.
pub(crate) fn nearest<'k>(word: &str, known: impl IntoIterator<Item = &'k str>) -> Option<&'k str> {
    if word.len() > COMPARED {
        return None;
    }
    let word = word.to_lowercase();
    known
        .into_iter()
        .filter(|candidate| candidate.len() <= COMPARED)
        .map(|candidate| {
            let wrong = strsim::damerau_levenshtein(&word, &candidate.to_lowercase());
            (wrong, candidate)
        })
        .filter(|&(wrong, candidate)| {
            let letters = word.chars().count().max(candidate.chars().count());
            3 * wrong <= letters
        })
        .min_by_key(|&(wrong, _)| wrong)
        .map(|(_, candidate)| candidate)
}

/// What to do about a word that is none of `known`.
pub(crate) fn advice(word: &str, known: &[&str]) -> String {
    let all = listed(known);
    match nearest(word, known.iter().copied()) {
        Some(near) => format!("did you mean `{near}`? Known here: {all}"),
        None => format!("known here: {all}"),
    }
}

/// A fault about a word that is none of the few `known`.
pub(crate) fn unknown_word(
    code: &'static str,
    what: &str,
    word: &str,
    span: Span,
    known: &[&str],
) -> Fault {
    Fault::new(code, format!("`{}` is no {what}", shown(word)), span, "").help(advice(word, known))
}

/// `a, b, c`
pub(crate) fn listed(words: &[&str]) -> String {
    words.join(", ")
}

/// A count with its thousands apart: `100,000`.
pub(crate) fn grouped(count: usize) -> String {
    let digits = count.to_string();
    let mut grouped = String::new();
    for (at, digit) in digits.char_indices() {
        if at > 0 && (digits.len() - at).is_multiple_of(3) {
            grouped.push(',');
        }
        grouped.push(digit);
    }
    grouped
}

/// A word of the file as a message repeats it: not longer than a line.
pub(crate) fn shown(word: &str) -> String {
    const LONGEST: usize = 40;
    let clean: String = word
        .chars()
        .take(LONGEST)
        .map(|c| if c.is_control() { ' ' } else { c })
        .collect();
    if clean.len() < word.len() {
        format!("{clean}…")
    } else {
        clean
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const KEYS: [&str; 6] = ["d", "r", "z", "centre_on", "round", "chamfer"];

    #[test]
    fn a_slip_finds_its_word() {
        assert_eq!(nearest("center_on", KEYS), Some("centre_on"));
        assert_eq!(nearest("Chamfre", KEYS), Some("chamfer"));
        assert_eq!(nearest("ruond", KEYS), Some("round"));
        assert_eq!(nearest("D", KEYS), Some("d"));
    }

    #[test]
    fn thousands() {
        let counts = [7, 100, 1000, 65_536, 1_250_000].map(grouped);
        assert_eq!(counts, ["7", "100", "1,000", "65,536", "1,250,000"]);
    }

    #[test]
    fn a_word_far_from_all_finds_none() {
        assert_eq!(nearest("x", KEYS), None);
        assert_eq!(nearest("thickness", KEYS), None);
        assert_eq!(nearest(&"round".repeat(1 << 20), KEYS), None);
    }
}
