//! What is wrong with an expression, in words.

use super::function::{FUNCTIONS, Function};
use super::parse::Parser;
use super::token::Token;
use crate::Fault;
use crate::nearest::{listed, nearest, shown};
use crate::units::{Unit, Vocabulary};
use std::ops::Range;

/// Sizes that a message lists at most.
const LISTED: usize = 12;

impl Parser<'_, '_> {
    pub(super) fn absurd_power(&self, at: Range<usize>) -> Fault {
        self.fault("expression::power", "a unit has no such power", at)
            .help("units have whole powers: m^2, m^3")
    }

    /// A token where it cannot stand.
    pub(super) fn out_of_place(&self) -> Fault {
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

    pub(super) fn unknown_name(&self, word: &str, at: Range<usize>) -> Fault {
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

    pub(super) fn unknown_unit(&self, word: &str, at: Range<usize>) -> Fault {
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

    pub(super) fn unknown_function(&self, word: &str, at: Range<usize>) -> Fault {
        let names: Vec<&str> = FUNCTIONS.iter().map(|(name, _)| *name).collect();
        let fault = self.fault(
            "expression::function",
            format!("there is no function `{}`", shown(word)),
            at,
        );
        let near = nearest(word, names.iter().copied());
        let all = listed(&names);
        match near {
            Some(near) => fault.help(format!("did you mean `{near}`? Known are {all}")),
            None if self.names.index(word).is_some() => {
                fault.help(format!("for a product write {word} * (…)"))
            }
            None => fault.help(format!("known are {all}")),
        }
    }
}
