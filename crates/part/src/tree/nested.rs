//! Lists in brackets and tables in braces.

use super::assembly::Assembly;
use super::grammar::{Grammar, Lost};
use super::table::{Origin, Table};
use super::{Kind, List, Value};
use crate::{Fault, Span};
use toml_parser::lexer::TokenKind;

impl<'t> Grammar<'t, '_> {
    pub(super) fn list(&mut self, depth: usize) -> Result<Value<'t>, Lost> {
        let open = self.span();
        let mut items = Vec::new();
        self.next();
        loop {
            self.blanks();
            if self.at(TokenKind::RightSquareBracket) {
                let span = open.start..self.span().end;
                self.next();
                items.shrink_to_fit();
                let of_tables = false;
                return Ok(Value::new(
                    Kind::List(Box::new(List { items, of_tables })),
                    &span,
                ));
            }
            if self.at(TokenKind::Eof) || self.at_statement() {
                return self.unclosed(open, "list", "]");
            }
            items.push(self.item(depth + 1)?);
            self.blanks();
            match self.token.kind() {
                TokenKind::Comma => self.next(),
                TokenKind::RightSquareBracket | TokenKind::Eof => {}
                _ if self.at_statement() => {}
                TokenKind::Equals => {
                    self.found.push(
                        Fault::new(
                            "toml::key_in_list",
                            "a list holds values, not keys",
                            self.span(),
                            "",
                        )
                        .also(open, "the list begins here")
                        .help("a step with its keys stands in braces: { d = 40, z = 0 }"),
                    );
                    return Err(Lost);
                }
                TokenKind::RightCurlyBracket => {
                    return self.unclosed(open, "list", "]");
                }
                _ => self.missing_comma(),
            }
        }
    }

    /// A value of a list. One whose structure is lost is left as broken if its end is on the same line.
    fn item(&mut self, depth: usize) -> Result<Value<'t>, Lost> {
        let level = self.open;
        let start = self.span().start;
        if let Ok(value) = self.value(depth) {
            Ok(value)
        } else {
            let end = self.end_of_item(level).ok_or(Lost)?;
            Ok(Value::new(Kind::Broken, &(start..end)))
        }
    }

    pub(super) fn inline_table(&mut self, depth: usize) -> Result<Value<'t>, Lost> {
        let open = self.span();
        let mut table = Table::new(Origin::Inline);
        self.next();
        loop {
            self.blanks();
            match self.token.kind() {
                TokenKind::RightCurlyBracket => {
                    let span = open.start..self.span().end;
                    self.next();
                    table.entries.shrink_to_fit();
                    return Ok(Value::new(Kind::Table(Box::new(table)), &span));
                }
                TokenKind::Eof
                | TokenKind::LeftCurlyBracket
                | TokenKind::LeftSquareBracket
                | TokenKind::RightSquareBracket => return self.unclosed(open, "table", "}"),
                _ => {}
            }
            let path = self.key("a table holds keys with values: { d = 40, z = 0 }")?;
            let value = self.assigned(&path, depth + 1)?;
            Assembly::insert_inline(&mut table, path, value, self.found);
            self.blanks();
            match self.token.kind() {
                TokenKind::Comma => self.next(),
                TokenKind::Atom | TokenKind::BasicString | TokenKind::LiteralString => {
                    self.missing_comma();
                }
                TokenKind::Equals | TokenKind::Dot => {
                    self.found.push(
                        Fault::new("toml::comma", "a comma is expected here", self.span(), "")
                            .help("between two keys of a table stands a comma"),
                    );
                    return Err(Lost);
                }
                _ => {}
            }
        }
    }

    /// Reports a comma missing before this word, and goes on as if it were there.
    fn missing_comma(&mut self) {
        let at = self.span().start;
        let before = self.text[..at].trim_end().len();
        self.found.push(
            Fault::new("toml::comma", "a comma is missing here", before..before, "")
                .help("between two values stands a comma"),
        );
    }

    fn unclosed<T>(&mut self, open: Span, what: &str, closing: &str) -> Result<T, Lost> {
        self.found.push(
            Fault::new(
                "toml::unclosed",
                format!("the {what} that begins here is not closed"),
                open,
                "",
            )
            .also(
                self.span().start..self.span().start,
                format!("`{closing}` is expected before this"),
            )
            .help(format!("write {closing} at the end of the {what}")),
        );
        Err(Lost)
    }
}
