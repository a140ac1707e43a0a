//! From tokens to operations in postfix order.

use super::Written;
use super::function::{FUNCTIONS, Function};
use super::token::{Placed, Token, tokens};
use crate::nearest::{grouped, listed, nearest, shown};
use crate::units::{Unit, Vocabulary};
use crate::{Fault, limits};
use std::ops::Range;

/// Sizes that a message lists at most.
const LISTED: usize = 12;

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

struct Parser<'p, 'e> {
    written: &'p Written<'e>,
    tokens: &'p [Placed<'e>],
    next: usize,
    depth: usize,
    vocabulary: Vocabulary,
    names: &'p dyn Names,
    operations: Vec<(Operation, Range<usize>)>,
}

impl<'e> Parser<'_, 'e> {
    fn token(&self) -> Token<'e> {
        self.token_after(0)
    }

    fn token_after(&self, skip: usize) -> Token<'e> {
        self.tokens
            .get(self.next + skip)
            .map_or(Token::End, |placed| placed.token)
    }

    fn at(&self) -> Range<usize> {
        let end = self.written.text.len();
        self.tokens
            .get(self.next)
            .map_or(end..end, |placed| placed.at.clone())
    }

    /// Takes a token and gives its place.
    fn take(&mut self) -> Range<usize> {
        let at = self.at();
        self.next += 1;
        at
    }

    fn emit(&mut self, operation: Operation, at: Range<usize>) {
        self.operations.push((operation, at));
    }

    fn fault(&self, code: &'static str, message: impl Into<String>, at: Range<usize>) -> Fault {
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

    /// After a number: `/4 in` or ` 3/4 in` make it a fraction of a unit, as inches are written.
    fn fraction(&mut self, first: Range<usize>) {
        if let (Token::Over, Token::Number(under), Token::Word(word)) =
            (self.token(), self.token_after(1), self.token_after(2))
        {
            if self.is_unit(word) && self.token_after(3) != Token::Open {
                let over = self.take();
                let place = self.take();
                self.emit(Operation::Number(under), place);
                self.emit(Operation::Divide, over);
            }
        } else if let (Token::Number(part), Token::Over, Token::Number(under), Token::Word(word)) = (
            self.token(),
            self.token_after(1),
            self.token_after(2),
            self.token_after(3),
        ) && self.is_unit(word)
        {
            let part_at = self.take();
            let over = self.take();
            let under_at = self.take();
            self.emit(Operation::Number(part), part_at);
            self.emit(Operation::Number(under), under_at);
            self.emit(Operation::Divide, over);
            self.emit(Operation::Add, first);
        }
    }

    fn is_unit(&self, word: &str) -> bool {
        Unit::from_word(word, self.vocabulary).is_some()
    }

    /// The unit after a number, if there is one.
    fn unit(&mut self) -> Result<(), Fault> {
        let Token::Word(word) = self.token() else {
            return self.no_operand();
        };
        let at = self.at();
        let Some(mut unit) = Unit::from_word(word, self.vocabulary) else {
            return Err(self.unknown_unit(word, at));
        };
        self.take();
        unit = self.unit_power(unit)?;
        // kg/m3, kg m2
        while self.vocabulary == Vocabulary::Physical {
            let (skip, inverse) = match self.token() {
                Token::Over => (1, true),
                Token::Times => (1, false),
                _ => (0, false),
            };
            let Token::Word(word) = self.token_after(skip) else {
                break;
            };
            let Some(next) = Unit::from_word(word, self.vocabulary) else {
                break;
            };
            self.next += skip + 1;
            let next = self.unit_power(next)?;
            let next = if inverse {
                next.power(-1.0)
            } else {
                Some(next)
            };
            unit = match next {
                Some(next) => unit.times(next),
                None => return Err(self.absurd_power(at)),
            };
        }
        let at = at.start..self.tokens[self.next - 1].at.end;
        self.emit(Operation::Measure(unit), at);
        self.no_operand()
    }

    /// A whole power after a unit's name: `m^3`.
    fn unit_power(&mut self, unit: Unit) -> Result<Unit, Fault> {
        let (Token::Power, Token::Number(exponent)) = (self.token(), self.token_after(1)) else {
            return Ok(unit);
        };
        let at = self.at();
        let powered = unit.power(exponent).filter(|_| exponent.fract() == 0.0);
        let Some(powered) = powered else {
            return Err(self.absurd_power(at));
        };
        self.next += 2;
        Ok(powered)
    }

    fn absurd_power(&self, at: Range<usize>) -> Fault {
        self.fault("expression::power", "a unit has no such power", at)
            .help("units have whole powers: m^2, m^3")
    }

    fn call(&mut self, word: &str) -> Result<(), Fault> {
        let at = self.take();
        let Some(function) = Function::from_word(word) else {
            let names: Vec<&str> = FUNCTIONS.iter().map(|(name, _)| *name).collect();
            let fault = self.fault(
                "expression::function",
                format!("there is no function `{}`", shown(word)),
                at,
            );
            let near = nearest(word, names.iter().copied());
            let all = listed(&names);
            return Err(match near {
                Some(near) => fault.help(format!("did you mean `{near}`? Known are {all}")),
                None if self.names.index(word).is_some() => {
                    fault.help(format!("for a product write {word} * (…)"))
                }
                None => fault.help(format!("known are {all}")),
            });
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
    fn no_operand(&self) -> Result<(), Fault> {
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

    /// A token where it cannot stand.
    fn out_of_place(&self) -> Fault {
        let at = self.at();
        match self.token() {
            Token::End if self.written.text.trim().is_empty() => self
                .fault("expression::empty", "the expression is empty", at)
                .help("write a number, a size or an expression"),
            Token::End => self
                .fault("expression::operand", "the expression ends too early", at)
                .help("a number or a size is missing at its end"),
            Token::Close => self
                .fault(
                    "expression::parenthesis",
                    "this parenthesis closes nothing that is open, or a value is missing before it",
                    at,
                )
                .help("parentheses come in pairs"),
            Token::Comma => self
                .fault(
                    "expression::comma",
                    "a comma stands only between the values of min and max",
                    at,
                )
                .help("a decimal number is written with a point: 12.5"),
            _ => self
                .fault(
                    "expression::operand",
                    "a number or a size is missing before this",
                    at,
                )
                .help("a sign stands between two values"),
        }
    }

    fn unknown_name(&self, word: &str, at: Range<usize>) -> Fault {
        if self.is_unit(word) || Unit::from_word(word, Vocabulary::Physical).is_some() {
            return self
                .fault(
                    "expression::unit_alone",
                    format!("the unit {word} stands without a number"),
                    at,
                )
                .help(format!("a unit stands after a number: 1 {word}"));
        }
        if Function::from_word(word).is_some() {
            return self
                .fault(
                    "expression::parenthesis",
                    format!("the function {word} lacks its parentheses"),
                    at,
                )
                .help(format!("write {word}(…)"));
        }
        let names = self.names.all();
        let fault = self.fault(
            "expression::unknown_size",
            format!("there is no size `{}`", shown(word)),
            at,
        );
        let near = nearest(word, names.iter().copied());
        fault.help(match near {
            Some(near) => format!("did you mean `{near}`?"),
            None if names.is_empty() => {
                "the file has no sizes; give one under [size], or write a number".to_owned()
            }
            None if names.len() <= LISTED => format!("the sizes are {}", listed(&names)),
            None => format!("give `{}` under [size]", shown(word)),
        })
    }

    fn unknown_unit(&self, word: &str, at: Range<usize>) -> Fault {
        if self.names.index(word).is_some() || self.token_after(1) == Token::Open {
            return self
                .fault("expression::operator", "a sign is missing before this", at)
                .help(format!("for a product write * {word}"));
        }
        if self.vocabulary == Vocabulary::Drawing
            && Unit::from_word(word, Vocabulary::Physical).is_some()
        {
            return self
                .fault(
                    "expression::unknown_unit",
                    format!("the unit {word} does not belong to a size of a drawing"),
                    at,
                )
                .help(format!(
                    "units here are {}",
                    listed(Unit::words(self.vocabulary))
                ));
        }
        let units = Unit::words(self.vocabulary);
        let all = listed(units);
        let meant = match word.to_lowercase().as_str() {
            "inch" | "inches" => Some("in"),
            "foot" | "feet" => Some("ft"),
            "millimetre" | "millimeter" | "millimetres" | "millimeters" => Some("mm"),
            "centimetre" | "centimeter" | "centimetres" | "centimeters" => Some("cm"),
            "metre" | "meter" | "metres" | "meters" => Some("m"),
            "degree" | "degrees" | "grad" => Some("deg"),
            "radian" | "radians" => Some("rad"),
            "lbs" | "pound" | "pounds" => Some("lb"),
            "kilogram" | "kilograms" | "kgs" | "kilo" => Some("kg"),
            "gram" | "grams" | "gr" => Some("g"),
            "ton" | "tons" | "tonne" | "tonnes" => Some("t"),
            "litres" | "liter" | "liters" => Some("l"),
            _ => None,
        };
        let near = meant.or_else(|| nearest(word, units.iter().copied()));
        self.fault(
            "expression::unknown_unit",
            format!("`{}` is no unit", shown(word)),
            at,
        )
        .help(match near {
            Some(near) => format!("did you mean `{near}`? Units are {all}"),
            None => format!("units are {all}"),
        })
    }
}
