//! The words and signs of an expression.

use super::Written;
use crate::Fault;
use std::ops::Range;

/// A word or sign.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) enum Token<'e> {
    Number(f64),
    /// A name, a function or a unit.
    Word(&'e str),
    Plus,
    Minus,
    Times,
    Over,
    Power,
    Open,
    Close,
    Comma,
    /// `+-`, `+/-` or `±`, before a tolerance.
    PlusMinus,
    Percent,
    End,
}

/// A token and its place in the expression.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Placed<'e> {
    pub(crate) token: Token<'e>,
    pub(crate) at: Range<usize>,
}

/// The tokens of an expression, [`Token::End`] last.
pub(super) fn tokens<'e>(written: &Written<'e>) -> Result<Vec<Placed<'e>>, Fault> {
    let text = written.text;
    let mut tokens = Vec::new();
    let mut at = 0;
    while let Some(c) = text[at..].chars().next() {
        let rest = &text[at..];
        let (token, length) = match c {
            c if c.is_whitespace() => {
                at += c.len_utf8();
                continue;
            }
            '0'..='9' => number(written, at)?,
            '.' if rest[1..].starts_with(|c: char| c.is_ascii_digit()) => number(written, at)?,
            '+' if rest.starts_with("+/-") => (Token::PlusMinus, 3),
            '+' if rest.starts_with("+-") => (Token::PlusMinus, 2),
            '±' => (Token::PlusMinus, c.len_utf8()),
            '+' => (Token::Plus, 1),
            '-' | '\u{2212}' => (Token::Minus, c.len_utf8()),
            '*' if rest.starts_with("**") => {
                return Err(wrong_sign(written, at..at + 2, "a power is written ^"));
            }
            '*' | '×' | '·' => (Token::Times, c.len_utf8()),
            '/' | '÷' => (Token::Over, c.len_utf8()),
            '^' => (Token::Power, 1),
            '(' => (Token::Open, 1),
            ')' => (Token::Close, 1),
            ',' => (Token::Comma, 1),
            '%' => (Token::Percent, 1),
            '²' | '³' => {
                let place = at..at + c.len_utf8();
                tokens.push(Placed {
                    token: Token::Power,
                    at: place.clone(),
                });
                (
                    Token::Number(if c == '²' { 2.0 } else { 3.0 }),
                    c.len_utf8(),
                )
            }
            c if is_letter(c) => {
                let word = rest
                    .find(|c: char| !is_letter(c) && !c.is_ascii_digit())
                    .map_or(rest, |end| &rest[..end]);
                (Token::Word(word), word.len())
            }
            c => {
                let advice = match c {
                    '[' | '{' => "parentheses are round: ( )",
                    '\'' | '"' => "inches are written in: 3/4 in",
                    ':' => "a division is written /",
                    _ => {
                        "an expression has numbers, names of sizes, units, + - * / ^ and parentheses"
                    }
                };
                return Err(wrong_sign(written, at..at + c.len_utf8(), advice));
            }
        };
        tokens.push(Placed {
            token,
            at: at..at + length,
        });
        at += length;
    }
    tokens.push(Placed {
        token: Token::End,
        at: text.len()..text.len(),
    });
    Ok(tokens)
}

/// Letters of names and units: `µ` and `°` are for micrometres and degrees.
fn is_letter(c: char) -> bool {
    c.is_alphabetic() || matches!(c, '_' | '°' | 'µ')
}

fn wrong_sign(written: &Written<'_>, at: Range<usize>, advice: &str) -> Fault {
    let sign = &written.text[at.clone()];
    Fault::new(
        "expression::sign",
        format!("`{sign}` means nothing in an expression"),
        written.span(at),
        "",
    )
    .help(advice)
}

/// A number: digits, a point, an exponent.
fn number<'e>(written: &Written<'e>, from: usize) -> Result<(Token<'e>, usize), Fault> {
    let bytes = &written.text.as_bytes()[from..];
    let digits = |at: usize| {
        let rest = bytes.get(at..).unwrap_or_default();
        rest.iter().take_while(|byte| byte.is_ascii_digit()).count()
    };
    let mut end = digits(0);
    if bytes.get(end) == Some(&b'.') {
        end += 1 + digits(end + 1);
    }
    if matches!(bytes.get(end), Some(b'e' | b'E')) {
        let sign = usize::from(matches!(bytes.get(end + 1), Some(b'+' | b'-')));
        let exponent = digits(end + 1 + sign);
        if exponent > 0 {
            end += 1 + sign + exponent;
        }
    }
    let place = from..from + end;
    match written.text[place.clone()].parse::<f64>() {
        Ok(value) if value.is_finite() => Ok((Token::Number(value), end)),
        _ => Err(Fault::new(
            "expression::not_finite",
            "this number is too large",
            written.span(place),
            "",
        )
        .help("look for digits too many")),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn read(text: &str) -> Vec<Token<'_>> {
        let placed = tokens(&Written::typed(text)).unwrap();
        placed.into_iter().map(|placed| placed.token).collect()
    }

    #[test]
    fn numbers_units_and_signs() {
        use Token::{End, Minus, Number, Over, Plus, PlusMinus, Power, Times, Word};
        assert_eq!(
            read("3/4in+.5e-1*mouth_2"),
            [
                Number(3.0),
                Over,
                Number(4.0),
                Word("in"),
                Plus,
                Number(0.05),
                Times,
                Word("mouth_2"),
                End
            ]
        );
        assert_eq!(
            read("2e−1 m²"),
            [
                Number(2.0),
                Word("e"),
                Minus,
                Number(1.0),
                Word("m"),
                Power,
                Number(2.0),
                End
            ]
        );
        assert_eq!(
            read("8° ± 1"),
            [Number(8.0), Word("°"), PlusMinus, Number(1.0), End]
        );
    }

    #[test]
    fn what_means_nothing_is_refused() {
        assert_eq!(
            tokens(&Written::typed("3 $ 4")).unwrap_err().labels[0].span,
            2..3
        );
        assert_eq!(
            tokens(&Written::typed("1e999")).unwrap_err().code,
            "expression::not_finite"
        );
    }
}
