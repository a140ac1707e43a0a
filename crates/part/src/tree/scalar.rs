//! Numbers, texts, true and false.

use super::grammar::{Grammar, Lost, control_character};
use super::{Kind, Value};
use crate::nearest::shown;
use crate::{Fault, Span};
use std::borrow::Cow;
use toml_parser::decoder::ScalarKind;
use toml_parser::lexer::TokenKind;
use toml_parser::{Expected, ParseError};

impl<'t> Grammar<'t, '_> {
    /// A text in quotes.
    pub(super) fn string(&mut self) -> Result<Value<'t>, Lost> {
        let span = self.span();
        let mut text = Cow::Borrowed("");
        let mut wrong: Option<ParseError> = None;
        if let Some(raw) = self.source.get(self.token) {
            let mut keep_first = |error: ParseError| {
                wrong.get_or_insert(error);
            };
            let _: ScalarKind = raw.decode_scalar(&mut text, &mut keep_first);
        }
        self.next();
        let Some(error) = wrong else {
            return Ok(Value::new(Kind::String(text), &span));
        };
        let at = error.unexpected().map_or(span.start, |place| place.start());
        let unclosed =
            at >= span.end && matches!(error.expected(), Some([Expected::Literal("\"" | "'"), ..]));
        if unclosed {
            let quote = &self.text[span.start..=span.start];
            self.found.push(
                Fault::new(
                    "toml::unclosed_text",
                    "the text that begins here is not closed",
                    span.start..span.start + 1,
                    "",
                )
                .help(format!("write {quote} at its end")),
            );
            return Err(Lost);
        }
        self.found.push(self.bad_text(at, &span));
        Ok(Value::new(Kind::Broken, &span))
    }

    fn bad_text(&self, at: usize, span: &Span) -> Fault {
        let control = self.text[at..span.end]
            .chars()
            .next()
            .is_some_and(|c| c.is_control() && c != '\n');
        if control {
            return control_character(at);
        }
        let from = self.text[span.start..at]
            .rfind('\\')
            .map_or(at, |slash| span.start + slash);
        Fault::new(
            "toml::escape",
            "a backslash in this text is followed by something that means nothing",
            from..at + 1,
            "",
        )
        .help(r#"write \\ for a backslash and \" for a quote, or put the text in 'single quotes'"#)
    }

    /// A number, true, false or a date; or words that lack their quotes.
    pub(super) fn scalar(&mut self) -> Value<'t> {
        let start = self.span().start;
        let mut end = self.word();
        let mut words = 1;
        while self.at(TokenKind::Whitespace) && self.word_goes_on() {
            self.next();
            end = self.word();
            words += 1;
        }
        let span = start..end;
        let written = &self.text[span.clone()];
        if words > 1 && !is_date(written) {
            self.found.push(unquoted(written, &span));
            return Value::new(Kind::Broken, &span);
        }
        let kind = self.number(written, &span);
        Value::new(kind, &span)
    }

    /// Passes a word without blanks (`1.5` is three of the lexer's) and gives its end.
    fn word(&mut self) -> usize {
        let mut end = self.span().end;
        self.next();
        while matches!(
            self.token.kind(),
            TokenKind::Atom | TokenKind::Dot | TokenKind::BasicString | TokenKind::LiteralString
        ) {
            end = self.span().end;
            self.next();
        }
        end
    }

    /// True where after this blank comes a further word of the same value, and not the next key.
    fn word_goes_on(&self) -> bool {
        let rest = &self.text[self.span().end..];
        let word = rest
            .find([',', ']', '}', '[', '{', '#', '\n', '\r', '=', ' ', '\t'])
            .map_or(rest, |end| &rest[..end]);
        let after = rest[word.len()..].trim_start_matches([' ', '\t']);
        !word.is_empty() && !after.starts_with('=') && !word.starts_with("\"\"\"")
    }

    fn number(&mut self, written: &'t str, span: &Span) -> Kind<'t> {
        let mut text = Cow::Borrowed("");
        let mut right = true;
        let place = toml_parser::Span::new_unchecked(span.start, span.end);
        let kind = self
            .source
            .get(place)
            .map(|raw| raw.decode_scalar(&mut text, &mut |_: ParseError| right = false));
        let kind = match kind {
            Some(ScalarKind::Boolean(value)) if right => Some(Kind::Boolean(value)),
            Some(ScalarKind::DateTime) if right => Some(Kind::Date),
            Some(ScalarKind::Integer(radix)) if right => {
                let value = i64::from_str_radix(&text, radix.value());
                return value.map_or_else(|_| self.too_large(span), Kind::Integer);
            }
            Some(ScalarKind::Float) if right => match text.parse::<f64>() {
                Ok(value) if value.is_infinite() && !text.contains("inf") => {
                    return self.too_large(span);
                }
                Ok(value) => Some(Kind::Float(value)),
                Err(_) => None,
            },
            _ => None,
        };
        kind.unwrap_or_else(|| {
            self.found.push(not_a_value(written, span));
            Kind::Broken
        })
    }

    fn too_large(&mut self, span: &Span) -> Kind<'t> {
        self.found.push(
            Fault::new(
                "toml::number_too_large",
                "this number is too large",
                span.clone(),
                "",
            )
            .help("look for digits too many"),
        );
        Kind::Broken
    }
}

/// True for `1979-05-27 07:32:00`, the one value with a blank in it.
fn is_date(written: &str) -> bool {
    written.len() > 10
        && written.bytes().enumerate().all(|(at, byte)| match at {
            4 | 7 => byte == b'-',
            0..=9 => byte.is_ascii_digit(),
            10 => byte == b' ',
            _ => !matches!(byte, b' ' | b'\t' | b'"' | b'\''),
        })
}

/// Words that lack their quotes.
fn unquoted(written: &str, span: &Span) -> Fault {
    Fault::new(
        "toml::unquoted",
        "a text, a number with a unit and an expression stand in quotes",
        span.clone(),
        "",
    )
    .help(format!(
        "write \"{}\"",
        shown(&written.replace(['"', '\''], ""))
    ))
}

/// One word that is no value.
fn not_a_value(written: &str, span: &Span) -> Fault {
    let bytes = written.as_bytes();
    let digits = |part: &str| !part.is_empty() && part.bytes().all(|byte| byte.is_ascii_digit());
    let unsigned = written.trim_start_matches(['+', '-']);
    let fault = |message: &str| Fault::new("toml::number", message, span.clone(), "");
    if digits(unsigned) && unsigned.starts_with('0') {
        let value = unsigned.trim_start_matches('0');
        return fault("a number does not begin with 0").help(format!(
            "write {}",
            if value.is_empty() { "0" } else { value }
        ));
    }
    if let Some((whole, fraction)) = unsigned.split_once('.')
        && ((digits(whole) && fraction.is_empty()) || (whole.is_empty() && digits(fraction)))
    {
        let or_zero = |part: &str| if part.is_empty() { "0" } else { part }.to_owned();
        return fault("a decimal number has digits before and after its point").help(format!(
            "write {}.{}",
            or_zero(whole),
            or_zero(fraction)
        ));
    }
    if written.eq_ignore_ascii_case("true") || written.eq_ignore_ascii_case("false") {
        return Fault::new(
            "toml::unquoted",
            "true and false are written in small letters",
            span.clone(),
            "",
        )
        .help(format!("write {}", written.to_ascii_lowercase()));
    }
    let number_like = bytes
        .first()
        .is_some_and(|byte| byte.is_ascii_digit() || matches!(byte, b'.' | b'_' | b'+' | b'-'));
    if number_like
        && !unsigned
            .bytes()
            .any(|byte| byte.is_ascii_alphabetic() || byte == b'*' || byte == b'/')
    {
        return fault("this cannot be read as a number")
            .help("numbers are written like 12, 12.5, -3 or 1e-3");
    }
    unquoted(written, span)
}
