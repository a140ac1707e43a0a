//! Repeats, written out.

use super::Reader;
use crate::outline::{Coordinate, Step};
use crate::tree::{Fields, Keys, Kind, Value};
use crate::{Fault, Span, limits};

/// Keys of a repeat, which stands among the steps.
pub(crate) const REPEAT: Keys = Keys {
    table: "a repeat",
    known: &["repeat", "steps"],
    meant: &[
        ("times", "`repeat`"),
        ("count", "`repeat`"),
        ("step", "`steps`"),
    ],
};

impl Reader<'_, '_> {
    /// Writes out a repeat: `repeat = N, steps = [..]`.
    pub(super) fn repeat(
        &mut self,
        item: &Value<'_>,
        number: usize,
        depth: usize,
        steps: &mut Vec<Step>,
    ) -> Option<()> {
        let found = &mut *self.found;
        let fields = Fields::open(item, &REPEAT, found)?;
        let count = fields.require("repeat", "say how often: repeat = 4", found);
        let inner = fields.require(
            "steps",
            "give the steps to repeat: steps = [ { dz = 6 } ]",
            found,
        );
        let (count, inner) = (count?, inner?);
        if depth == limits::REPEATS {
            found.push(
                Fault::new(
                    "limit::repeats",
                    format!(
                        "repeats stand in each other more than {} deep",
                        limits::REPEATS
                    ),
                    count.key_span(),
                    "",
                )
                .help("write some of them out"),
            );
            return None;
        }
        let times = self.times(&count.value);
        let items = inner.value.list("`steps`", self.found)?;
        if items.is_empty() {
            self.found.push(
                Fault::new(
                    "repeat::empty",
                    "there is nothing to repeat",
                    inner.value.span(),
                    "",
                )
                .help("write steps with increments: steps = [ { dz = 6 }, { dd = -4 } ]"),
            );
            return None;
        }
        let first = steps.len();
        let whole = self.sequence(items, depth + 1, steps);
        let times = times?;
        if !whole {
            return None;
        }
        let round = steps.len() - first;
        let moves = steps[first..].iter().any(moves_on);
        if times > 1 && !moves {
            self.found.push(
                Fault::new(
                    "repeat::stands_still",
                    "each round of this repeat would be drawn over the one before",
                    inner.value.span(),
                    "no step here has an increment",
                )
                .help("use dd, dr or dz in the steps, so that each round goes on from the last"),
            );
            return None;
        }
        // The first round has been counted; nothing is made before the others are.
        let more = round.saturating_mul(times - 1);
        if !self.edges.add(more, count.value.span(), self.found) {
            return None;
        }
        steps.reserve(more);
        for turn in 2..=times {
            for at in first..first + round {
                let mut step = steps[at].clone();
                step.words = in_round(&step.words, turn, number);
                steps.push(step);
            }
        }
        for step in &mut steps[first..first + round] {
            step.words = in_round(&step.words, 1, number);
        }
        Some(())
    }

    /// How often: a whole number from 1 on.
    fn times(&mut self, value: &Value<'_>) -> Option<usize> {
        let number = self.values.number(value, "`repeat`", self.found)?;
        // What an expression comes to may be off by rounding.
        let times = number.round();
        if (number - times).abs() > 1e-9 * times.abs() || times < 1.0 {
            self.found.push(
                Fault::new(
                    "repeat::count",
                    format!("a repeat is done a whole number of times, and this is {number}"),
                    value.span(),
                    "",
                )
                .help("write 1 or more"),
            );
            return None;
        }
        #[expect(
            clippy::cast_possible_truncation,
            clippy::cast_sign_loss,
            reason = "positive, and a cast of a float stops at the largest integer"
        )]
        Some(times as usize)
    }
}

fn in_round(words: &str, turn: usize, number: usize) -> String {
    // Of repeats inside each other the innermost is named first.
    match words.strip_suffix(')') {
        Some(inner) => format!("{inner}, round {turn} of the repeat in step {number})"),
        None => format!("{words} (round {turn} of the repeat in step {number})"),
    }
}

pub(super) fn is_repeat(item: &Value<'_>) -> bool {
    match &item.kind {
        Kind::Table(table) => REPEAT.known.iter().any(|key| table.get(key).is_some()),
        _ => false,
    }
}

fn moves_on(step: &Step) -> bool {
    let by = |coordinate: &Option<(Coordinate, Span)>| {
        matches!(coordinate, Some((Coordinate::By(_), _)))
    };
    by(&step.to.r) || by(&step.to.z)
}
