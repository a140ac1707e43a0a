//! What the part file expects, and whether it holds.

use crate::grid::{Cell, Grid};
use crate::style::{BAD, GOOD, QUIET};
use strickle::figures::{Scale, plain};
use strickle::record::{Judgement, Record};

/// A line for each expectation; nothing where there are none.
pub(in crate::command) fn of(record: &Record) -> String {
    if record.expect.is_empty() {
        return String::new();
    }
    let mut grid = Grid::new(2);
    grid.row(
        [
            Cell::left("expected"),
            Cell::default(),
            Cell::right("found"),
            Cell::right("difference"),
        ]
        .map(|cell| cell.styled(QUIET)),
    );
    for judgement in &record.expect {
        // A figure that should be zero is shown as finely as what it may differ by.
        let [lower, upper] = judgement.deviation;
        let size = [judgement.wanted, judgement.found, lower, upper]
            .map(f64::abs)
            .into_iter()
            .fold(0.0, f64::max);
        let scale = Scale::of(judgement.kind, size);
        grid.row([
            Cell::left(judgement.quantity),
            Cell::left(plain(&judgement.written)),
            Cell::right(scale.text(judgement.found)),
            Cell::right(scale.signed(judgement.difference)),
            answer(judgement),
        ]);
    }
    grid.lines()
}

/// Yes, or no and by how much.
fn answer(judgement: &Judgement) -> Cell {
    match judgement.excess() {
        None => Cell::left("holds").styled(GOOD),
        Some((beyond, side)) => {
            let beyond = Scale::of(judgement.kind, beyond).text(beyond);
            Cell::left(format!("FAILS, {beyond} {side}")).styled(BAD)
        }
    }
}
