//! The text of a part file as diagnostics quote it: a few lines around a place, however long the file or a line is.

use miette::{MietteError, MietteSpanContents, SourceCode, SourceSpan, SpanContents};
use std::ops::Range;

/// Bytes of text quoted at most before and after a place. A file on one line of megabytes is quoted in part.
const QUOTED: usize = 240;

/// Bytes underlined at most.
const UNDERLINED: usize = 200;

/// Bytes from one noted line number to the next.
const STRIDE: usize = 1 << 16;

/// A text with its name, ready to be quoted.
///
/// `miette` reads a text from its beginning for every label. This one starts at the nearest noted line number, so that
/// fifty faults at the end of 16 MiB are shown without a wait.
pub(crate) struct Source {
    name: String,
    text: String,
    /// Number of line ends before each multiple of [`STRIDE`].
    noted: Vec<usize>,
}

impl Source {
    pub(crate) fn new(name: &str, text: String) -> Self {
        let text = printable(text);
        let mut ends = 0;
        let noted = text
            .as_bytes()
            .chunks(STRIDE)
            .map(|chunk| {
                let before = ends;
                ends += line_ends(chunk);
                before
            })
            .collect();
        Self {
            name: name.to_owned(),
            text,
            noted,
        }
    }

    pub(crate) fn name(&self) -> &str {
        &self.name
    }

    /// `span` as it can be underlined: inside the text, on whole characters and on one line.
    pub(crate) fn underlined(&self, span: &Range<usize>) -> Range<usize> {
        let last = self.text.len().saturating_sub(1);
        let start = self.text.floor_char_boundary(span.start.min(last));
        let end = self
            .text
            .ceil_char_boundary(span.end.min(self.text.len()))
            .max(start);
        let line = &self.text[start..end];
        let line = line.split(['\n', '\r']).next().unwrap_or(line);
        let length = line.floor_char_boundary(line.len().min(UNDERLINED));
        start..start + length
    }

    /// Number of the line, counted from 0, that the byte at `offset` is on.
    fn line(&self, offset: usize) -> usize {
        let chunk = offset / STRIDE;
        let ends = self.noted.get(chunk).copied().unwrap_or(0);
        let rest = self.text.as_bytes().get(chunk * STRIDE..offset);
        ends + line_ends(rest.unwrap_or(&[]))
    }

    /// Where the line of `offset` starts, or [`QUOTED`] bytes before `offset` if that is nearer.
    fn line_start(&self, offset: usize) -> usize {
        let from = self
            .text
            .ceil_char_boundary(offset.saturating_sub(QUOTED))
            .min(offset);
        let quoted = &self.text[from..offset];
        quoted.rfind('\n').map_or(from, |end| from + end + 1)
    }

    /// Where the line of `offset` ends (its line end included), or [`QUOTED`] bytes after `offset` if that is nearer.
    fn line_end(&self, offset: usize) -> usize {
        let to = self
            .text
            .floor_char_boundary((offset + QUOTED).min(self.text.len()));
        let quoted = &self.text[offset..to];
        quoted.find('\n').map_or(to, |end| offset + end + 1)
    }

    /// Column, counted from 0 in characters, of the byte at `offset`.
    fn column(&self, offset: usize) -> usize {
        let before = &self.text[..offset];
        let start = before.rfind('\n').map_or(0, |end| end + 1);
        before[start..].chars().count()
    }
}

/// The text with ? for control characters, byte for byte: a terminal would obey them.
fn printable(text: String) -> String {
    let commands = |c: char| c.is_control() && !matches!(c, '\n' | '\r' | '\t');
    if !text.contains(commands) {
        return text;
    }
    let mut printable = String::with_capacity(text.len());
    for c in text.chars() {
        if commands(c) {
            printable.extend(std::iter::repeat_n('?', c.len_utf8()));
        } else {
            printable.push(c);
        }
    }
    printable
}

fn line_ends(bytes: &[u8]) -> usize {
    bytes.split(|&byte| byte == b'\n').count() - 1
}

impl SourceCode for Source {
    fn read_span<'a>(
        &'a self,
        span: &SourceSpan,
        lines_before: usize,
        lines_after: usize,
    ) -> Result<Box<dyn SpanContents<'a> + 'a>, MietteError> {
        let places = self.underlined(&(span.offset()..span.offset() + span.len()));
        // Two labels on one endless line are quoted apart.
        if span.len() > places.len().max(16 * QUOTED) {
            return Err(MietteError::OutOfBounds);
        }
        let end = (span.offset() + span.len()).min(self.text.len());
        let end = self.text.ceil_char_boundary(end).max(places.start);
        let (from, to, column) = if lines_before == 0 && lines_after == 0 {
            (places.start, end, self.column(places.start))
        } else {
            let mut from = self.line_start(places.start);
            for _ in 0..lines_before {
                // Only whole lines go before.
                if self.text[..from].ends_with('\n') {
                    let above = self.line_start(from - 1);
                    if above == 0 || self.text[..above].ends_with('\n') {
                        from = above;
                    }
                }
            }
            let mut to = self.line_end(end);
            for _ in 0..lines_after {
                if self.text[..to].ends_with('\n') {
                    to = self.line_end(to);
                }
            }
            (from, to, 0)
        };
        let data = &self.text.as_bytes()[from..to];
        Ok(Box::new(MietteSpanContents::new_named(
            self.name.clone(),
            data,
            (from, data.len()).into(),
            self.line(from),
            column,
            line_ends(data),
        )))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn quoted(source: &Source, span: Range<usize>, lines: usize) -> (String, usize, usize) {
        let contents = source
            .read_span(&(span.start, span.len()).into(), lines, lines)
            .unwrap();
        (
            String::from_utf8(contents.data().to_vec()).unwrap(),
            contents.line(),
            contents.column(),
        )
    }

    #[test]
    fn quotes_whole_lines_with_their_number_and_column() {
        let source = Source::new("bell.toml", "one\ntwö = 2\nthree\nfour\n".to_owned());
        assert_eq!(quoted(&source, 11..12, 0), ("2".to_owned(), 1, 6));
        assert_eq!(
            quoted(&source, 11..12, 1),
            ("one\ntwö = 2\nthree\n".to_owned(), 0, 0)
        );
    }

    #[test]
    fn a_place_past_the_end_is_that_of_the_last_line() {
        let source = Source::new("bell.toml", "one\ntwo\n".to_owned());
        assert_eq!(source.underlined(&(8..8)), 7..7);
        assert_eq!(Source::new("", String::new()).underlined(&(3..9)), 0..0);
    }

    #[test]
    fn a_span_of_many_lines_is_underlined_on_its_first() {
        let source = Source::new("bell.toml", "a = [\n1,\n2]".to_owned());
        assert_eq!(source.underlined(&(4..11)), 4..5);
    }

    #[test]
    fn an_endless_line_is_quoted_in_part() {
        let source = Source::new("bell.toml", "[".repeat(1 << 20));
        assert_eq!(source.underlined(&(10..700_000)), 10..10 + UNDERLINED);
        let (text, line, _) = quoted(&source, 700_000..700_001, 1);
        assert!(text.len() <= 2 * QUOTED + 2, "{}", text.len());
        assert_eq!(line, 0);
    }

    #[test]
    fn control_characters_are_not_sent_to_the_terminal() {
        let source = Source::new("bell.toml", "a\u{1b}[31m\u{9b}b\0".to_owned());
        assert_eq!(quoted(&source, 0..10, 0).0, "a?[31m??b?");
    }

    #[test]
    fn line_numbers_hold_past_the_noted_ones() {
        let source = Source::new("bell.toml", "x\n".repeat(100_000));
        assert_eq!(quoted(&source, 160_000..160_001, 0).1, 80_000);
    }
}
