//! Units after numbers, and fractions of units.

use super::parse::{Operation, Parser};
use super::token::Token;
use crate::Fault;
use crate::units::{Unit, Vocabulary};
use std::ops::Range;

impl Parser<'_, '_> {
    /// After a number: `/4 in` or ` 3/4 in` make it a fraction of a unit, as inches are written.
    pub(super) fn fraction(&mut self, first: Range<usize>) {
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

    pub(super) fn is_unit(&self, word: &str) -> bool {
        Unit::from_word(word, self.vocabulary).is_some()
    }

    /// The unit after a number, if there is one.
    pub(super) fn unit(&mut self) -> Result<(), Fault> {
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
}
