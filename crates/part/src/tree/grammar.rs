//! From words to statements, lists and tables.

use super::assembly::{Assembly, KeyPath};
use super::table::Table;
use super::{Kind, Value};
use crate::fault::Found;
use crate::nearest::{grouped, shown};
use crate::{Fault, Span, limits};
use toml_parser::Source;
use toml_parser::lexer::{Lexer, Token, TokenKind};

/// The tree of `text`, which is at most [`limits::TEXT`] long. What is wrong goes to `found`.
pub(crate) fn parse<'t>(text: &'t str, found: &mut Found) -> Document<'t> {
    let source = Source::new(text);
    let mut lexer = source.lex();
    let first = lexer
        .next()
        .expect("a lexer gives at least the end of the text");
    let mut grammar = Grammar {
        text,
        source,
        lexer,
        token: first,
        found,
        open: 0,
        values: 0,
        damaged: false,
    };
    let root = grammar.document();
    Document {
        root,
        damaged: grammar.damaged,
    }
}

/// A file as a tree.
#[derive(Debug)]
pub(crate) struct Document<'t> {
    /// The keys and tables at the top.
    pub(crate) root: Table<'t>,
    /// True where a statement could not be read, so that what seems to be missing may be there.
    pub(crate) damaged: bool,
}

/// The structure is lost; a fault has been reported, and the statement is to be skipped.
#[derive(Debug)]
pub(super) struct Lost;

pub(super) struct Grammar<'t, 'f> {
    pub(super) text: &'t str,
    pub(super) source: Source<'t>,
    lexer: Lexer<'t>,
    /// The word that is looked at.
    pub(super) token: Token,
    pub(super) found: &'f mut Found,
    /// Brackets and braces open here.
    pub(super) open: usize,
    /// Values so far.
    values: usize,
    pub(super) damaged: bool,
}

impl<'t> Grammar<'t, '_> {
    /// Goes on to the next word; at the end of the text it stays.
    pub(super) fn next(&mut self) {
        if let Some(token) = self.lexer.next() {
            self.token = token;
        }
    }

    pub(super) fn at(&self, kind: TokenKind) -> bool {
        self.token.kind() == kind
    }

    pub(super) fn span(&self) -> Span {
        self.token.span().start()..self.token.span().end()
    }

    pub(super) fn spaces(&mut self) {
        while self.at(TokenKind::Whitespace) {
            self.next();
        }
    }

    /// Passes blanks, comments and line ends.
    pub(super) fn blanks(&mut self) {
        loop {
            if self.found.is_enough() {
                self.stop();
                self.next();
            }
            match self.token.kind() {
                TokenKind::Whitespace => {}
                TokenKind::Newline => self.line_end(),
                TokenKind::Comment => self.comment(),
                _ => return,
            }
            self.next();
        }
    }

    fn line_end(&mut self) {
        let span = self.span();
        if &self.text[span.clone()] == "\r" {
            self.found.push(
                Fault::new(
                    "toml::control_character",
                    "a carriage return stands where no line ends",
                    span,
                    "",
                )
                .help("save the file with line ends LF or CR LF"),
            );
        }
    }

    fn comment(&mut self) {
        let mut first = None;
        if let Some(raw) = self.source.get(self.token) {
            raw.decode_comment(&mut |error: toml_parser::ParseError| {
                first = first.or(error.unexpected());
            });
        }
        if let Some(place) = first {
            self.found.push(control_character(place.start()));
        }
    }

    fn document(&mut self) -> Table<'t> {
        let mut assembly = Assembly::new();
        loop {
            self.blanks();
            match self.token.kind() {
                TokenKind::Eof => return assembly.finish(),
                TokenKind::LeftSquareBracket => self.header(&mut assembly),
                _ => self.statement(&mut assembly),
            }
        }
    }

    /// `[a.b]` or `[[a.b]]`.
    fn header(&mut self, assembly: &mut Assembly<'t>) {
        let start = self.span().start;
        self.next();
        let of_list = self.at(TokenKind::LeftSquareBracket);
        if of_list {
            self.next();
        }
        self.spaces();
        let Ok(path) = self.key("a table has a name between its brackets") else {
            assembly.lose_header();
            return self.recover();
        };
        self.spaces();
        let closed = self.at(TokenKind::RightSquareBracket) && {
            if of_list {
                self.next();
            }
            self.at(TokenKind::RightSquareBracket)
        };
        if !closed {
            let brackets = if of_list { "[[ and ]]" } else { "[ and ]" };
            self.found.push(
                Fault::new(
                    "toml::header",
                    "the table's header is not closed",
                    start..self.span().start,
                    "",
                )
                .help(format!("the name stands between {brackets}")),
            );
            assembly.lose_header();
            return self.recover();
        }
        let span = start..self.span().end;
        self.next();
        if self.count(&span).is_err() {
            return self.recover();
        }
        assembly.header(path, of_list, &span, self.found);
        self.end_of_statement();
    }

    /// `key = value`.
    fn statement(&mut self, assembly: &mut Assembly<'t>) {
        let Ok(path) = self.key("a line is a key, an equals sign and a value") else {
            return self.recover();
        };
        let value = self.assigned(&path, 0);
        let lost = value.is_err();
        let span = path.span();
        let value = value.unwrap_or_else(|Lost| Value::new(Kind::Broken, &span));
        assembly.insert(path, value, self.found);
        if lost {
            self.recover();
        } else {
            self.end_of_statement();
        }
    }

    /// The equals sign and the value after a key.
    pub(super) fn assigned(&mut self, path: &KeyPath<'t>, depth: usize) -> Result<Value<'t>, Lost> {
        self.spaces();
        if !self.at(TokenKind::Equals) {
            let key = path.last();
            let name = shown(&key.name);
            let mut fault = Fault::new(
                "toml::equals",
                format!("an equals sign is missing after `{name}`"),
                key.span.clone(),
                "",
            );
            let more = self.key_goes_on(key.span.end);
            fault = if let Some(more) = more {
                fault.help(format!("a key is one word: {name}_{}", shown(more)))
            } else if key.name.bytes().all(|byte| byte.is_ascii_digit()) {
                fault.help("a decimal number is written with a point: 12.5")
            } else {
                fault.help(format!("write {name} = and its value"))
            };
            self.found.push(fault);
            return Err(Lost);
        }
        self.next();
        self.spaces();
        self.value(depth)
    }

    /// The second word, where a key was written in two before its equals sign.
    fn key_goes_on(&self, from: usize) -> Option<&'t str> {
        let (word, _) = self.text[from..].split_once('=')?;
        let word = word.trim_matches([' ', '\t']);
        let plain = word.bytes().all(|byte| byte.is_ascii_alphanumeric());
        (plain && !word.is_empty()).then_some(word)
    }

    /// After a header or a value nothing more stands on the line.
    fn end_of_statement(&mut self) {
        self.spaces();
        match self.token.kind() {
            TokenKind::Newline | TokenKind::Comment | TokenKind::Eof => return,
            _ => {}
        }
        let fault = Fault::new(
            "toml::after_value",
            "something stands after the value where the line should end",
            self.span(),
            "",
        );
        let fault = match self.token.kind() {
            TokenKind::Comma => fault
                .help("a decimal number is written with a point: 12.5; lines end without a comma"),
            TokenKind::RightSquareBracket | TokenKind::RightCurlyBracket => {
                fault.help("this closes nothing that is open; take it away")
            }
            _ => fault.help("begin a new line, or write # before a remark"),
        };
        self.found.push(fault);
        self.recover();
    }

    /// A value; `depth` lists and tables are around it.
    pub(super) fn value(&mut self, depth: usize) -> Result<Value<'t>, Lost> {
        let span = self.span();
        self.count(&span)?;
        match self.token.kind() {
            TokenKind::BasicString
            | TokenKind::LiteralString
            | TokenKind::MlBasicString
            | TokenKind::MlLiteralString => self.string(),
            TokenKind::Atom | TokenKind::Dot => Ok(self.scalar()),
            TokenKind::LeftSquareBracket | TokenKind::LeftCurlyBracket => {
                if depth == limits::NESTING {
                    self.too_deep();
                    return Err(Lost);
                }
                self.open += 1;
                let value = if self.at(TokenKind::LeftSquareBracket) {
                    self.list(depth)?
                } else {
                    self.inline_table(depth)?
                };
                self.open -= 1;
                Ok(value)
            }
            _ => {
                self.found.push(
                    Fault::new("toml::value", "a value is missing here", span, "").help(
                        "a value is a number, a text in quotes, true, false, a list [..] or a table {..}",
                    ),
                );
                Err(Lost)
            }
        }
    }

    pub(super) fn too_deep(&mut self) {
        self.found.push(
            Fault::new(
                "limit::nesting",
                format!(
                    "lists and tables stand in each other more than {} deep",
                    limits::NESTING
                ),
                self.span(),
                "",
            )
            .help("no part needs that; look for a bracket that is not closed"),
        );
    }

    /// Reads no more of the text: what comes next is its end.
    fn stop(&mut self) {
        self.lexer = Source::new("").lex();
        self.damaged = true;
    }

    /// Counts a value. Past the limit the rest of the text is not read.
    fn count(&mut self, span: &Span) -> Result<(), Lost> {
        self.values += 1;
        if self.values <= limits::VALUES {
            return Ok(());
        }
        self.found.push(
            Fault::new(
                "limit::values",
                format!("the file has more than {} values", grouped(limits::VALUES)),
                span.clone(),
                "the rest is not read",
            )
            .help("give an outline of so many points in a CSV file"),
        );
        self.stop();
        Err(Lost)
    }
}

pub(super) fn control_character(at: usize) -> Fault {
    Fault::new(
        "toml::control_character",
        "a control character stands here that cannot be seen",
        at..at + 1,
        "",
    )
    .help("delete it and type the line again")
}
