//! `strickle weigh`.

mod bodies;
pub(super) mod expected;
mod inch;
mod report;
mod surfaces;
mod theorems;
mod whole;

pub(in crate::command) use report::{caution, title};

use crate::arguments::Weigh;
use crate::command::each_part;
use crate::failure::Failure;
use crate::status::Status;
use crate::terminal::Terminal;

/// Prints the exact figures of each part and judges what it expects.
pub(super) fn run(arguments: &Weigh, terminal: &mut Terminal) -> Result<Status, Failure> {
    let mut first = true;
    each_part(
        &arguments.parts,
        &arguments.settings,
        terminal,
        |study, terminal| {
            if arguments.output.json {
                terminal.print(&study.record.line())?;
            } else {
                let between = if first { "" } else { "\n\n" };
                terminal.show(&format!("{between}{}", report::of(&study)))?;
            }
            first = false;
            Ok(Status::of(study.record.verdict.as_ref()))
        },
    )
}
