//! `strickle schema`.

use crate::failure::Failure;
use crate::status::Status;
use crate::terminal::Terminal;

/// Prints the JSON Schema of the part file.
pub(super) fn run(terminal: &mut Terminal) -> Result<Status, Failure> {
    terminal.print(&format!("{:#}\n", part::schema()))?;
    Ok(Status::Holds)
}
