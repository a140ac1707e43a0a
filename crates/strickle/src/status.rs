//! The one place that decides the exit status.

use crate::failure::Failure;
use crate::terminal::Terminal;
use std::process::ExitCode;
use strickle::record::Verdict;

/// How a run ended, from good to bad; the worst of several parts is the run's.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub(crate) enum Status {
    /// All holds.
    Holds = 0,
    /// The work was done and a verdict is NO.
    No = 1,
    /// The input or the usage is wrong.
    WrongInput = 2,
    /// A file could not be read or written.
    File = 3,
}

impl Status {
    /// The status of a part whose verdict is `verdict`; `None` where nothing was asked of it.
    pub(crate) fn of(verdict: Option<&Verdict>) -> Self {
        match verdict {
            Some(verdict) if !verdict.holds => Self::No,
            _ => Self::Holds,
        }
    }
}

/// Runs `work` and turns its end into the exit status; a failure is told first.
///
/// A reader that has closed its end of the pipe has seen all it wanted: that is no failure.
pub(crate) fn exit(
    terminal: &mut Terminal,
    work: impl FnOnce(&mut Terminal) -> Result<Status, Failure>,
) -> ExitCode {
    let status = work(terminal).unwrap_or_else(|failure| terminal.tell(&failure));
    ExitCode::from(status as u8)
}
