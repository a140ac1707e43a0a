//! Standard output and standard error: results on the one, messages on the other.

use crate::arguments::Colour;
use crate::failure::Failure;
use crate::status::Status;
use crate::style::{BAD, HINT};
use anstream::AutoStream;
use miette::{GraphicalReportHandler, GraphicalTheme};
use std::error::Error as _;
use std::fmt::Write as _;
use std::io::{self, IsTerminal as _, Stderr, StdoutLock, Write as _};

/// Columns where the terminal does not tell, and the most that messages use.
const COLUMNS: usize = 80;

/// The two streams, with the colours that they can show.
pub(crate) struct Terminal {
    out: AutoStream<StdoutLock<'static>>,
    /// Not locked: a sign of life is drawn from another thread.
    err: AutoStream<Stderr>,
    quiet: bool,
}

impl Terminal {
    /// The streams of this process.
    pub(crate) fn new(colour: Colour, quiet: bool) -> Self {
        let choice = match colour {
            Colour::Auto => anstream::ColorChoice::Auto,
            Colour::Always => anstream::ColorChoice::AlwaysAnsi,
            Colour::Never => anstream::ColorChoice::Never,
        };
        Self {
            out: AutoStream::new(io::stdout().lock(), choice),
            err: AutoStream::new(io::stderr(), choice),
            quiet,
        }
    }

    /// True where a sign of life can be drawn and taken away again.
    pub(crate) fn shows_progress(&self) -> bool {
        !self.quiet && io::stderr().is_terminal()
    }

    /// Writes a result for people, unless they asked for quiet. Styles are stripped where they cannot be shown.
    ///
    /// # Errors
    /// Standard output is closed or could not be written.
    pub(crate) fn show(&mut self, text: &str) -> Result<(), Failure> {
        if self.quiet {
            return Ok(());
        }
        self.print(text)
    }

    /// Writes a result that was asked for as such: machine output, a schema, a page.
    ///
    /// # Errors
    /// Standard output is closed or could not be written.
    pub(crate) fn print(&mut self, text: &str) -> Result<(), Failure> {
        self.out
            .write_all(text.as_bytes())
            .and_then(|()| self.out.flush())
            .map_err(|source| match source.kind() {
                io::ErrorKind::BrokenPipe => Failure::PipeClosed,
                _ => Failure::Write {
                    file: "standard output".into(),
                    source,
                },
            })
    }

    /// Says what went wrong, on standard error, and gives the status that it leads to.
    pub(crate) fn tell(&mut self, failure: &Failure) -> Status {
        let text = match failure {
            Failure::PipeClosed => String::new(),
            Failure::Part(faults) => self.drawn(faults),
            Failure::Usage { message, hint } => {
                let hints = hint
                    .as_ref()
                    .map_or_else(String::new, |hint| format!("{HINT}hint:{HINT:#} {hint}\n"));
                format!("{BAD}error:{BAD:#} {message}\n{hints}")
            }
            Failure::Read { .. } | Failure::Write { .. } => {
                let cause = failure
                    .source()
                    .map_or_else(String::new, |cause| format!(": {cause}"));
                format!("{BAD}error:{BAD:#} {failure}{cause}\n")
            }
        };
        // Nobody is left to be told where standard error fails too; the status still says it.
        let _ = self.err.write_all(text.as_bytes());
        failure.status()
    }

    /// Shows what the parser of the command line has to say: help and version on standard output, faults on the other.
    ///
    /// # Errors
    /// Standard output is closed or could not be written.
    pub(crate) fn usage(&mut self, message: &clap::Error) -> Result<Status, Failure> {
        let text = message.render().ansi().to_string();
        if message.use_stderr() {
            let _ = self.err.write_all(text.as_bytes());
            return Ok(Status::WrongInput);
        }
        self.print(&text)?;
        Ok(Status::Holds)
    }

    /// The faults as lines of the file with the places underlined.
    fn drawn(&self, faults: &part::Faults) -> String {
        let theme = match self.err.current_choice() {
            anstream::ColorChoice::Never => GraphicalTheme::unicode_nocolor(),
            _ => GraphicalTheme::unicode(),
        };
        let width = terminal_size::terminal_size_of(io::stderr())
            .map_or(COLUMNS, |(width, _)| usize::from(width.0));
        let handler = GraphicalReportHandler::new_themed(theme)
            .with_width(width)
            .with_links(false);
        let mut text = String::new();
        for diagnostic in faults.diagnostics() {
            if !text.is_empty() {
                text.push('\n');
            }
            if handler.render_report(&mut text, diagnostic).is_err() {
                // A report that cannot be drawn is still told.
                let _ = writeln!(text, "{}: {diagnostic}", faults.file());
            }
        }
        text
    }
}
