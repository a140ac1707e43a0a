//! `strickle completions`.

use crate::arguments::{Arguments, Completions};
use crate::failure::Failure;
use crate::status::Status;
use crate::terminal::Terminal;
use clap::CommandFactory as _;

/// Prints the completions for a shell.
pub(super) fn run(arguments: &Completions, terminal: &mut Terminal) -> Result<Status, Failure> {
    let mut script = Vec::new();
    clap_complete::generate(
        arguments.shell,
        &mut Arguments::command(),
        "strickle",
        &mut script,
    );
    terminal.print(&String::from_utf8_lossy(&script))?;
    Ok(Status::Holds)
}
