//! Values with units of mass: densities and what the drawing expects.

use crate::Fault;
use crate::LengthUnit;
use crate::dimension::Dimension;
use crate::expression::{
    Failure, Parsed, Placed, Quantity, Token, Written, evaluate, parse_tokens, tokens_of,
};
use crate::fault::Found;
use crate::tree::Value;
use crate::units::Vocabulary;
use crate::values::{Values, written_of};

/// The text of such a value while it is read.
pub(crate) struct Reading<'r, 't> {
    written: Written<'r>,
    values: &'r Values<'t>,
}

/// A value and the deviations that are accepted.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Tolerated {
    pub(crate) value: f64,
    pub(crate) lower: f64,
    pub(crate) upper: f64,
}

impl<'r, 't> Reading<'r, 't> {
    pub(crate) fn new(value: &Value<'_>, text: &'r str, values: &'r Values<'t>) -> Self {
        Self {
            written: written_of(value, text, values.text),
            values,
        }
    }

    /// A value of `dimension` in SI units, with nothing after it.
    pub(crate) fn whole(&self, what: &str, dimension: Dimension, found: &mut Found) -> Option<f64> {
        let tokens = keep(tokens_of(&self.written), found)?;
        let (value, rest) = self.value(what, dimension, tokens, found)?;
        if let Some(extra) = rest.iter().find(|placed| placed.token != Token::End) {
            found.push(
                Fault::new(
                    "value::after",
                    format!("{what} is a value with its unit and no more"),
                    self.written.span(extra.at.clone()),
                    "",
                )
                .help("leave the rest out"),
            );
            return None;
        }
        Some(value)
    }

    /// A value of `dimension` and its tolerance: `12.4 kg +- 2 %`, `101 mm +- 1 mm`, `12 kg +3 % -1 %`.
    pub(crate) fn tolerated(
        &self,
        what: &str,
        dimension: Dimension,
        found: &mut Found,
    ) -> Option<Tolerated> {
        let mut tokens = keep(tokens_of(&self.written), found)?;
        if let Some(at) = one_sided(&tokens) {
            let signs = tokens.split_off(at);
            let (value, _) = self.value(what, dimension, tokens, found)?;
            let [first, second] = sides(signs);
            let first = self.deviation(what, dimension, value, first, found)?;
            let second = self.deviation(what, dimension, value, second, found)?;
            return Some(Tolerated {
                value,
                lower: first.min(second),
                upper: first.max(second),
            });
        }
        let (value, rest) = self.value(what, dimension, tokens, found)?;
        let mut rest = rest.into_iter();
        let Some(Placed {
            token: Token::PlusMinus,
            at,
        }) = rest.next()
        else {
            found.push(
                Fault::new(
                    "expect::no_tolerance",
                    format!("{what} has no tolerance, so nothing can be judged by it"),
                    self.written.whole(),
                    "",
                )
                .help("write how far it may be off: \"12.4 kg +- 2 %\", \"101 mm +- 1 mm\""),
            );
            return None;
        };
        let tolerance: Vec<_> = rest.collect();
        let deviation = self.deviation(what, dimension, value, tolerance, found)?;
        if deviation < 0.0 {
            found.push(
                Fault::new(
                    "expect::negative_tolerance",
                    "a tolerance after +- has no sign",
                    self.written.span(at.start..self.written.text.len()),
                    "",
                )
                .help("write 12.4 kg +- 2 %"),
            );
            return None;
        }
        Some(Tolerated {
            value,
            lower: -deviation,
            upper: deviation,
        })
    }

    /// The value at the beginning of `tokens` in SI units, and the tokens after it.
    fn value<'e>(
        &self,
        what: &str,
        dimension: Dimension,
        tokens: Vec<Placed<'e>>,
        found: &mut Found,
    ) -> Option<(f64, Vec<Placed<'e>>)>
    where
        'r: 'e,
    {
        let start = tokens.first().map_or(0, |first| first.at.start);
        let Parsed { expression, rest } = keep(
            parse_tokens(
                &self.written,
                tokens,
                Vocabulary::Physical,
                &self.values.sizes,
            ),
            found,
        )?;
        let scope = self.values.scope(LengthUnit::Metre);
        let quantity = match evaluate(&expression, &self.written, &scope) {
            Ok(quantity) => quantity,
            Err(Failure::Silent) => return None,
            Err(Failure::Fault(fault)) => {
                found.push(fault);
                return None;
            }
        };
        let end = rest
            .first()
            .map_or(self.written.text.len(), |next| next.at.start);
        let length_only = dimension.mass == 0;
        let quantity: Quantity = if quantity.is_bare() && length_only {
            scope.adopt(quantity, dimension)
        } else {
            quantity
        };
        if quantity.dimension != dimension {
            let shown = self.written.text.get(start..end).unwrap_or_default();
            let place = self.written.span(start..start + shown.trim_end().len());
            let needed = dimension.words();
            found.push(if quantity.is_bare() {
                Fault::new(
                    "value::unit_missing",
                    format!("{what} has no unit"),
                    place,
                    "",
                )
                .help(example(dimension))
            } else {
                let given = quantity.dimension.words();
                Fault::new(
                    "value::wrong_dimension",
                    format!("{what} is {needed}, and this is {given}"),
                    place,
                    "",
                )
                .help(example(dimension))
            });
            return None;
        }
        Some((quantity.value, rest))
    }

    /// A deviation in percent of `value`, or in the unit of it.
    fn deviation<'e>(
        &self,
        what: &str,
        dimension: Dimension,
        value: f64,
        mut tokens: Vec<Placed<'e>>,
        found: &mut Found,
    ) -> Option<f64>
    where
        'r: 'e,
    {
        let percent = tokens
            .iter()
            .position(|placed| placed.token == Token::Percent);
        let Some(percent) = percent else {
            let what = format!("the tolerance of {what}");
            let (deviation, rest) = self.value(&what, dimension, tokens, found)?;
            return self.at_end(&rest, found).then_some(deviation);
        };
        let rest = tokens.split_off(percent);
        let (deviation, _) = self.value("a percentage", Dimension::NUMBER, tokens, found)?;
        if !self.at_end(rest.get(1..).unwrap_or_default(), found) {
            return None;
        }
        if value == 0.0 {
            let at = rest.first().map_or(0..0, |placed| placed.at.clone());
            found.push(
                Fault::new(
                    "expect::percent_of_zero",
                    "a percentage of 0 is 0, whatever the percentage",
                    self.written.span(at),
                    "",
                )
                .help("give the tolerance in the value's own unit"),
            );
            return None;
        }
        Some(deviation / 100.0 * value.abs())
    }

    fn at_end(&self, rest: &[Placed<'_>], found: &mut Found) -> bool {
        let extra = rest.iter().find(|placed| placed.token != Token::End);
        if let Some(extra) = extra {
            found.push(
                Fault::new(
                    "expect::after_tolerance",
                    "something stands after the tolerance",
                    self.written.span(extra.at.clone()),
                    "",
                )
                .help(
                    "write one tolerance, 12.4 kg +- 2 %, or one to each side, 12.4 kg +3 % -1 %",
                ),
            );
        }
        extra.is_none()
    }
}

fn keep<T>(result: Result<T, Fault>, found: &mut Found) -> Option<T> {
    result.map_err(|fault| found.push(fault)).ok()
}

/// Where a tolerance to each side begins: `12 kg +3 % -1 %` has two signed values at its end, the first with a unit or a
/// percentage, and no operator between them.
fn one_sided(tokens: &[Placed<'_>]) -> Option<usize> {
    let signs: Vec<usize> = tokens
        .iter()
        .enumerate()
        .filter(|(_, placed)| matches!(placed.token, Token::Plus | Token::Minus))
        .map(|(at, _)| at)
        .collect();
    let [.., first, second] = signs.as_slice() else {
        return None;
    };
    let opposite = tokens[*first].token != tokens[*second].token;
    let percent = tokens[*first..]
        .iter()
        .any(|placed| placed.token == Token::Percent);
    let plain = tokens
        .iter()
        .all(|placed| !matches!(placed.token, Token::PlusMinus | Token::Open));
    // Without a percent sign `240 mm + 2 mm - 1 mm` is a sum.
    (*first > 0 && opposite && percent && plain).then_some(*first)
}

/// The two signed values of a tolerance to each side.
fn sides(mut tokens: Vec<Placed<'_>>) -> [Vec<Placed<'_>>; 2] {
    let second = tokens
        .iter()
        .skip(1)
        .position(|placed| matches!(placed.token, Token::Plus | Token::Minus))
        .map_or(tokens.len(), |at| at + 1);
    let after = tokens.split_off(second);
    [tokens, after]
}

fn example(dimension: Dimension) -> &'static str {
    match dimension {
        Dimension::MASS => "write it like \"12.4 kg\", \"850 g\", \"27 lb\"",
        Dimension::DENSITY => "write it like \"8800 kg/m3\", \"8.8 g/cm3\", \"0.32 lb/in3\"",
        Dimension::INERTIA => "write it like \"0.25 kg m2\", \"2500 kg cm2\"",
        Dimension::VOLUME => "write it like \"1.4 l\", \"1400 cm3\"",
        Dimension::AREA => "write it like \"0.3 m2\", \"3000 cm2\"",
        Dimension::NUMBER => "write a plain number",
        _ => "write it like \"101 mm\"",
    }
}
