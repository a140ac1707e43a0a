//! `strickle weigh`.

use crate::arguments::Weigh;
use crate::command::each_part;
use crate::failure::Failure;
use crate::status::Status;
use crate::terminal::Terminal;

/// Prints the exact figures of each part and judges what it expects.
pub(super) fn run(arguments: &Weigh, terminal: &mut Terminal) -> Result<Status, Failure> {
    each_part(
        &arguments.parts,
        &arguments.settings,
        terminal,
        |study, terminal| {
            if arguments.output.json {
                terminal.print(&study.record.line())?;
            } else {
                terminal.show(&study.record.part.name)?;
            }
            Ok(Status::of(study.record.verdict.as_ref()))
        },
    )
}
