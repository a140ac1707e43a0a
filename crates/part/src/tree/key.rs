//! Keys.

use super::assembly::KeyPath;
use super::grammar::{Grammar, Lost};
use super::table::Key;
use crate::{Fault, Span, limits};
use std::borrow::Cow;
use toml_parser::lexer::TokenKind;

impl<'t> Grammar<'t, '_> {
    /// One or several words with points between.
    pub(super) fn key(&mut self, expected: &'static str) -> Result<KeyPath<'t>, Lost> {
        let mut path = KeyPath::default();
        loop {
            let key = self.simple_key(expected)?;
            path.push(key);
            // A blank may stand before the point.
            let blank =
                self.at(TokenKind::Whitespace) && self.text[self.span().end..].starts_with('.');
            if blank {
                self.next();
            }
            if !self.at(TokenKind::Dot) {
                return Ok(path);
            }
            if path.len() == limits::NESTING {
                self.too_deep();
                return Err(Lost);
            }
            self.next();
            self.spaces();
        }
    }

    fn simple_key(&mut self, expected: &'static str) -> Result<Key<'t>, Lost> {
        let span = self.span();
        let quoted = match self.token.kind() {
            TokenKind::Atom => false,
            TokenKind::BasicString | TokenKind::LiteralString => true,
            kind => {
                let (message, help) = match kind {
                    TokenKind::Equals => ("a key is missing before the equals sign", expected),
                    TokenKind::MlBasicString | TokenKind::MlLiteralString => (
                        "a key is not written over several lines",
                        "write the key without quotes",
                    ),
                    _ => ("a key is expected here", expected),
                };
                self.found
                    .push(Fault::new("toml::key", message, span, "").help(help));
                return Err(Lost);
            }
        };
        let mut name = Cow::Borrowed("");
        let mut wrong = None;
        if let Some(raw) = self.source.get(self.token) {
            raw.decode_key(&mut name, &mut |error: toml_parser::ParseError| {
                wrong = wrong.take().or(Some(error.unexpected()));
            });
        }
        if let Some(place) = wrong {
            self.found.push(if quoted {
                Fault::new("toml::key", "the key in quotes cannot be read", span, "")
                    .help("write the key without quotes")
            } else {
                bad_key(&self.text[span.clone()], &span, place)
            });
            return Err(Lost);
        }
        self.next();
        Ok(Key { name, span })
    }
}

/// A key without quotes that has a character it may not have, the first of them at `place`.
fn bad_key(key: &str, span: &Span, place: Option<toml_parser::Span>) -> Fault {
    let at = place.map_or(span.start, |place| place.start());
    let wrong = key
        .get(at - span.start..)
        .and_then(|rest| rest.chars().next());
    let fault = Fault::new(
        "toml::key",
        "a key is made of letters a to z, digits, - and _",
        at..at + wrong.map_or(1, char::len_utf8),
        "",
    );
    match wrong {
        Some(':') => fault.help(format!(
            "write an equals sign between key and value: {} =",
            key.trim_end_matches(':')
        )),
        Some(wrong) => fault.help(format!("take `{wrong}` away, or put the key in quotes")),
        None => fault,
    }
}
