//! A sign of life on standard error while long work goes on.

use crate::terminal::Terminal;
use indicatif::{ProgressBar, ProgressStyle};
use std::time::Duration;

/// A mesh of more triangles than this takes over half a second to make, write, read back and measure.
const LONG: u64 = 300_000;

/// What is being done, with the time it takes; nothing at all for short work, without a terminal or where quiet was asked for.
#[derive(Debug)]
pub(crate) struct Progress {
    bar: Option<ProgressBar>,
}

impl Progress {
    /// For work on so many triangles.
    pub(crate) fn of(triangles: u64, terminal: &Terminal) -> Self {
        let is_shown = triangles > LONG && terminal.shows_progress();
        let bar = is_shown.then(|| {
            let bar = ProgressBar::new_spinner();
            if let Ok(style) = ProgressStyle::with_template("{spinner} {msg} {elapsed}") {
                bar.set_style(style);
            }
            bar.enable_steady_tick(Duration::from_millis(120));
            bar
        });
        Self { bar }
    }

    /// Names what is done from now on.
    pub(crate) fn stage(&mut self, what: &'static str) {
        if let Some(bar) = &self.bar {
            bar.set_message(what);
        }
    }

    /// Takes the sign away, for the result to stand alone.
    pub(crate) fn end(&mut self) {
        if let Some(bar) = self.bar.take() {
            bar.finish_and_clear();
        }
    }
}

impl Drop for Progress {
    fn drop(&mut self) {
        self.end();
    }
}
