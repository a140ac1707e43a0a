//! What the part file expects, and whether it holds.

use crate::grid::{Cell, Grid};
use crate::style::{BAD, GOOD, QUIET};
use strickle::figures::{Kind, Scale, plain};
use strickle::record::{Judgement, Record};

/// Part of a size that is nothing but rounding.
const ROUNDING: f64 = 1e-9;

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
        let scale = scale(judgement, record);
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

/// A length is shown as finely as the part's size asks, so that what should be zero is not all decimals; and all as
/// finely as what they may differ by.
fn scale(judgement: &Judgement, record: &Record) -> Scale {
    let extent = match (judgement.kind, &record.exact) {
        (Kind::Length, Some(exact)) => exact.largest_diameter.max(exact.length),
        _ => 0.0,
    };
    let [lower, upper] = judgement.deviation;
    let sizes = [judgement.wanted, judgement.found, lower, upper, extent];
    // What is zero but for rounding asks for no decimals.
    let least = sizes.map(f64::abs).into_iter().fold(0.0, f64::max) * ROUNDING;
    Scale::of_system_column(
        judgement.kind,
        judgement.system,
        sizes.into_iter().filter(|size| size.abs() > least),
    )
}

/// Yes, or no and by how much.
fn answer(judgement: &Judgement) -> Cell {
    match judgement.excess() {
        None => Cell::left("holds").styled(GOOD),
        Some((beyond, side)) => {
            let beyond = Scale::of_system(judgement.kind, judgement.system, beyond).text(beyond);
            Cell::left(format!("FAILS, {beyond} {side}")).styled(BAD)
        }
    }
}
