//! Where to go on after the structure was lost.

use super::grammar::Grammar;
use toml_parser::lexer::TokenKind;

impl Grammar<'_, '_> {
    /// True where a new statement begins although a list is still open: the line is a header, or `key =`.
    pub(super) fn at_statement(&self) -> bool {
        let start = self.span().start;
        let line_start = self.text[..start].trim_end_matches([' ', '\t']);
        if !(line_start.is_empty() || line_start.ends_with('\n')) {
            return false;
        }
        match self.token.kind() {
            TokenKind::Atom => self.text[self.span().end..]
                .trim_start_matches([' ', '\t'])
                .starts_with('='),
            TokenKind::LeftSquareBracket => is_header(&self.text[start..]),
            _ => false,
        }
    }

    /// Passes the end of a value that brackets or braces are open in, down to `level`, if it is on this line.
    pub(super) fn end_of_item(&mut self, level: usize) -> Option<usize> {
        while self.open > level && !self.at_statement() {
            match self.token.kind() {
                TokenKind::Newline | TokenKind::Eof => return None,
                TokenKind::LeftSquareBracket | TokenKind::LeftCurlyBracket => self.open += 1,
                TokenKind::RightSquareBracket | TokenKind::RightCurlyBracket => self.open -= 1,
                _ => {}
            }
            if self.open == level {
                let end = self.span().end;
                self.next();
                return Some(end);
            }
            self.next();
        }
        None
    }

    /// Skips to the next statement after the structure was lost.
    pub(super) fn recover(&mut self) {
        self.damaged = true;
        // A list that was not closed ends where the next statement begins.
        if self.open > 0 && self.at_statement() {
            self.open = 0;
            return;
        }
        loop {
            match self.token.kind() {
                TokenKind::Eof => break,
                TokenKind::LeftSquareBracket | TokenKind::LeftCurlyBracket => self.open += 1,
                TokenKind::RightSquareBracket | TokenKind::RightCurlyBracket => {
                    self.open = self.open.saturating_sub(1);
                }
                TokenKind::Newline => {
                    self.next();
                    self.spaces();
                    if self.open == 0 || self.at_statement() {
                        break;
                    }
                    continue;
                }
                _ => {}
            }
            self.next();
        }
        self.open = 0;
    }
}

/// True where the line that `text` begins with is a table's header: `[size]`, `[[body]]`.
fn is_header(text: &str) -> bool {
    let line = text.lines().next().unwrap_or_default();
    let line = line.split('#').next().unwrap_or_default().trim_end();
    let Some(inner) = line
        .strip_prefix('[')
        .and_then(|line| line.strip_suffix(']'))
    else {
        return false;
    };
    let name = inner
        .strip_prefix('[')
        .and_then(|inner| inner.strip_suffix(']'))
        .unwrap_or(inner)
        .trim();
    name.starts_with(|c: char| c.is_ascii_alphabetic())
        && !matches!(name, "true" | "false" | "inf" | "nan")
        && name
            .bytes()
            .all(|byte| byte.is_ascii_alphanumeric() || matches!(byte, b'_' | b'-' | b'.'))
}
