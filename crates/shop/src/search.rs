//! Finding what somebody meant.

use strsim::osa_distance;

/// A word as it is compared: lower case, without spaces, hyphens and underscores.
pub(crate) fn folded(word: &str) -> String {
    word.chars()
        .filter(|c| !c.is_whitespace() && !matches!(c, '-' | '_'))
        .flat_map(char::to_lowercase)
        .collect()
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
