//! Finding what somebody meant.

use strsim::osa_distance;

/// A word as it is compared: lower case, without spaces, hyphens and underscores.
pub(crate) fn folded(word: &str) -> String {
    word.chars()
        .filter(|c| !c.is_whitespace() && !matches!(c, '-' | '_'))
        .flat_map(char::to_lowercase)
        .collect()
}

/// True where `wanted`, folded, stands in `text` from the start of a word on: of `EN-GJL-250` the words are EN, GJL and
/// 250, of `CuSn10` they are Cu, Sn and 10.
pub(crate) fn occurs(wanted: &str, text: &str) -> bool {
    let mut before = Class::Other;
    text.char_indices().any(|(index, c)| {
        let class = Class::of(c);
        let starts = class != Class::Other
            && class != before
            && !(class == Class::Lower && before == Class::Upper);
        before = class;
        starts && folded(&text[index..]).starts_with(wanted)
    })
}

/// What a letter is for the start of a word.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Class {
    Upper,
    Lower,
    Digit,
    Other,
}

impl Class {
    fn of(c: char) -> Self {
        if c.is_numeric() {
            Self::Digit
        } else if c.is_uppercase() {
            Self::Upper
        } else if c.is_alphabetic() {
            Self::Lower
        } else {
            Self::Other
        }
    }
}

/// The one of `words` that is nearest to `word`, where it is near enough to be a slip of the keys: at most a third of
/// its letters differ. The first of several.
pub fn nearest<'a>(word: &str, words: impl Iterator<Item = &'a str>) -> Option<&'a str> {
    let word = folded(word);
    let most = word.chars().count() / 3;
    words
        .map(|candidate| (osa_distance(&word, &folded(candidate)), candidate))
        .filter(|(distance, _)| *distance <= most)
        .min_by_key(|(distance, _)| *distance)
        .map(|(_, candidate)| candidate)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn folding_leaves_letters_digits_and_points() {
        assert_eq!(folded("EN AW-6082"), "enaw6082");
        assert_eq!(folded("1.4301"), "1.4301");
        assert_eq!(folded(" TPU 95A "), "tpu95a");
    }

    #[test]
    fn a_word_is_found_from_its_start() {
        for (wanted, text) in [
            ("tin", "tin bronze"),
            ("bronze", "tin bronze"),
            ("bro", "tin bronze"),
            ("tinbronze", "tin bronze"),
            ("gjl", "EN-GJL-250"),
            ("250", "EN-GJL-250"),
            ("gjl250", "EN-GJL-250"),
            ("480", "CC480K"),
            ("sn10", "CuSn10"),
            ("4301", "1.4301"),
        ] {
            assert!(occurs(wanted, text), "{wanted} in {text}");
        }
        for (wanted, text) in [("tin", "casting alloy"), ("50", "EN-GJL-250"), ("x", "")] {
            assert!(!occurs(wanted, text), "{wanted} in {text}");
        }
    }

    #[test]
    fn the_nearest_word_is_a_slip_of_the_keys_away() {
        let words = ["CC480K", "CC483K", "bell metal"];
        let nearest = |word| nearest(word, words.into_iter());
        assert_eq!(nearest("cc48ok"), Some("CC480K"));
        assert_eq!(nearest("bel metal"), Some("bell metal"));
        assert_eq!(nearest("bronze"), None);
        assert_eq!(nearest(""), None);
    }
}
