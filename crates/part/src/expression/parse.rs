//! From tokens to operations in postfix order.

use super::Written;
use super::function::Function;
use super::token::{Placed, Token, tokens};
use crate::nearest::grouped;
use crate::units::{Unit, Vocabulary};
use crate::{Fault, limits};
use std::ops::Range;

/// One operation on the stack of values.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Operation {
    /// Puts a bare number there.
    Number(f64),
    /// Gives the topmost number its unit.
    Measure(Unit),
    /// Puts the size with this index there.
    Size(usize),
    Negate,
    Add,
    Subtract,
    Multiply,
    Divide,
    Power,
    /// Takes so many values and puts the function's there.
    Call(Function, usize),
}

/// An expression that can be evaluated.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Expression {
    /// The operations with the places they are reported at.
    pub(super) operations: Vec<(Operation, Range<usize>)>,
}

impl Expression {
    /// The sizes that it names, with their places.
    pub(crate) fn sizes(&self) -> impl Iterator<Item = (usize, Range<usize>)> {
        self.operations
            .iter()
            .filter_map(|(operation, at)| match operation {
                Operation::Size(index) => Some((*index, at.clone())),
                _ => None,
            })
    }
}

/// The names that an expression may use.
pub(crate) trait Names {
    /// Index of the size called `word`.
    fn index(&self, word: &str) -> Option<usize>;

    /// All names, in the order of the file.
    fn all(&self) -> Vec<&str>;
}

/// An expression and what follows it: a tolerance, or nothing.
pub(crate) struct Parsed<'e> {
    pub(crate) expression: Expression,
    /// From `+-` or a sign on, [`Token::End`] last.
    pub(crate) rest: Vec<Placed<'e>>,
}

/// Parses an expression that takes up all of the text.
pub(crate) fn parse(
    written: &Written<'_>,
    vocabulary: Vocabulary,
    names: &dyn Names,
) -> Result<Expression, Fault> {
    let Parsed { expression, rest } =
        parse_tokens(written, tokens_of(written)?, vocabulary, names)?;
    match rest.first() {
        None | Some(Placed { token: Token::End, .. }) => Ok(expression),
        Some(Placed { token: Token::PlusMinus, at }) => Err(Fault::new(
            "expression::tolerance",
            "a tolerance does not stand here",
            written.span(at.clone()),
            "",
        )
        .help("a size's tolerance is its own key: { is = 25, tol = 0.1 }; a sum with a negative number is written a + (-b)")),
        Some(Placed { at, .. }) => Err(Fault::new(
            "expression::percent",
            "a percentage does not stand here",
            written.span(at.clone()),
            "",
        )
        .help("write the factor instead: * 0.02")),
    }
}

/// The tokens of `written`, if it is not too long.
pub(crate) fn tokens_of<'e>(written: &Written<'e>) -> Result<Vec<Placed<'e>>, Fault> {
    if written.text.len() > limits::EXPRESSION {
        return Err(Fault::new(
            "limit::expression",
            format!(
                "an expression of more than {} characters is not read",
                grouped(limits::EXPRESSION)
            ),
            written.whole(),
            "",
        )
        .help("divide it into several sizes"));
    }
    tokens(written)
}

/// Parses the expression at the beginning of `tokens`, up to `+-` or `%`.
pub(crate) fn parse_tokens<'e>(
    written: &Written<'e>,
    tokens: Vec<Placed<'e>>,
    vocabulary: Vocabulary,
    names: &dyn Names,
) -> Result<Parsed<'e>, Fault> {
    let mut parser = Parser {
        written,
        tokens: &tokens,
        next: 0,
        depth: 0,
        vocabulary,
        names,
        operations: Vec::new(),
    };
    parser.sum()?;
    match parser.token() {
        Token::End | Token::PlusMinus | Token::Percent => {}
        _ => return Err(parser.out_of_place()),
    }
    let next = parser.next;
    let expression = Expression {
        operations: parser.operations,
    };
    let mut tokens = tokens;
    Ok(Parsed {
        expression,
        rest: tokens.split_off(next),
    })
}

pub(super) struct Parser<'p, 'e> {
    pub(super) written: &'p Written<'e>,
    pub(super) tokens: &'p [Placed<'e>],
    pub(super) next: usize,
    depth: usize,
    pub(super) vocabulary: Vocabulary,
    pub(super) names: &'p dyn Names,
    operations: Vec<(Operation, Range<usize>)>,
}

impl<'e> Parser<'_, 'e> {
    pub(super) fn token(&self) -> Token<'e> {
        self.token_after(0)
    }

    pub(super) fn token_after(&self, skip: usize) -> Token<'e> {
        self.tokens
            .get(self.next + skip)
            .map_or(Token::End, |placed| placed.token)
    }

    pub(super) fn at(&self) -> Range<usize> {
        let end = self.written.text.len();
        self.tokens
            .get(self.next)
            .map_or(end..end, |placed| placed.at.clone())
    }

    /// Takes a token and gives its place.
    pub(super) fn take(&mut self) -> Range<usize> {
        let at = self.at();
        self.next += 1;
        at
    }

    pub(super) fn emit(&mut self, operation: Operation, at: Range<usize>) {
        self.operations.push((operation, at));
    }

    pub(super) fn fault(
        &self,
        code: &'static str,
        message: impl Into<String>,
        at: Range<usize>,
    ) -> Fault {
        Fault::new(code, message, self.written.span(at), "")
    }

    /// One level of nesting deeper.
    fn nested(&mut self, inner: impl FnOnce(&mut Self) -> Result<(), Fault>) -> Result<(), Fault> {
        self.depth += 1;
        if self.depth > limits::PARENTHESES {
            return Err(self
                .fault(
                    "limit::parentheses",
                    format!(
                        "parentheses, signs and powers stand in each other more than {} deep",
                        limits::PARENTHESES
                    ),
                    self.at(),
                )
                .help("divide the expression into several sizes"));
        }
        let result = inner(self);
        self.depth -= 1;
        result
    }

    fn sum(&mut self) -> Result<(), Fault> {
        self.product()?;
        loop {
            let operation = match self.token() {
                Token::Plus => Operation::Add,
                Token::Minus => Operation::Subtract,
                _ => return Ok(()),
            };
            let at = self.take();
            self.product()?;
            self.emit(operation, at);
        }
    }

    fn product(&mut self) -> Result<(), Fault> {
        self.signed()?;
        loop {
            let operation = match self.token() {
                Token::Times => Operation::Multiply,
                Token::Over => Operation::Divide,
                _ => return Ok(()),
            };
            let at = self.take();
            self.signed()?;
            self.emit(operation, at);
        }
    }

    fn signed(&mut self) -> Result<(), Fault> {
        match self.token() {
            Token::Minus => {
                let at = self.take();
                self.nested(Self::signed)?;
                self.emit(Operation::Negate, at);
                Ok(())
            }
            Token::Plus => {
                self.take();
                self.nested(Self::signed)
            }
            _ => self.power(),
        }
    }

    fn power(&mut self) -> Result<(), Fault> {
        self.primary(true)?;
        self.raised()
    }

    /// What stands after `^`; powers of powers bind from the right.
    fn exponent(&mut self) -> Result<(), Fault> {
        if self.token() == Token::Minus {
            let at = self.take();
            self.nested(Self::exponent)?;
            self.emit(Operation::Negate, at);
            return Ok(());
        }
        self.primary(false)?;
        self.raised()
    }

    /// `^` and what stands after it, if anything.
    fn raised(&mut self) -> Result<(), Fault> {
        if self.token() != Token::Power {
            return Ok(());
        }
        let at = self.take();
        self.nested(Self::exponent)?;
        self.emit(Operation::Power, at);
        Ok(())
    }

    fn primary(&mut self, fractions: bool) -> Result<(), Fault> {
        match self.token() {
            Token::Number(value) => {
                let at = self.take();
                self.emit(Operation::Number(value), at.clone());
                if fractions {
                    self.fraction(at);
                }
                self.unit()
            }
            Token::Word(word) if self.token_after(1) == Token::Open => self.call(word),
            Token::Word("pi") => {
                let at = self.take();
                self.emit(Operation::Number(std::f64::consts::PI), at);
                self.unit()
            }
            Token::Word(word) => {
                let at = self.at();
                let Some(index) = self.names.index(word) else {
                    return Err(self.unknown_name(word, at));
                };
                self.take();
                self.emit(Operation::Size(index), at);
                self.no_operand()
            }
            Token::Open => {
                let open = self.take();
                self.nested(Self::sum)?;
                self.close(open)?;
                self.unit()
            }
            _ => Err(self.out_of_place()),
        }
    }

    fn call(&mut self, word: &str) -> Result<(), Fault> {
        let at = self.take();
        let Some(function) = Function::from_word(word) else {
            return Err(self.unknown_function(word, at));
        };
        let open = self.take();
        let mut count = 0;
        if self.token() != Token::Close {
            loop {
                self.nested(Self::sum)?;
                count += 1;
                if self.token() != Token::Comma {
                    break;
                }
                self.take();
            }
        }
        self.close(open)?;
        if let Err(takes) = function.takes(count) {
            return Err(self
                .fault(
                    "expression::arguments",
                    format!("{} takes {takes}, not {count}", function.word()),
                    at,
                )
                .help("values are separated by commas: max(a, b)"));
        }
        self.emit(Operation::Call(function, count), at);
        self.unit()
    }

    fn close(&mut self, open: Range<usize>) -> Result<(), Fault> {
        match self.token() {
            Token::Close => {
                self.take();
                Ok(())
            }
            Token::End => Err(self
                .fault(
                    "expression::parenthesis",
                    "this parenthesis is not closed",
                    open,
                )
                .help("write ) where it ends")),
            _ => Err(self.out_of_place()),
        }
    }

    /// After a whole operand no further one stands without a sign between.
    pub(super) fn no_operand(&self) -> Result<(), Fault> {
        match self.token() {
            Token::Number(_) | Token::Word(_) | Token::Open => Err(self
                .fault(
                    "expression::operator",
                    "a sign is missing before this",
                    self.at(),
                )
                .help("between two values stands + - * / or ^")),
            _ => Ok(()),
        }
    }
}
