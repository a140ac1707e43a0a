//! The few styles of the output for people.

use anstyle::{AnsiColor, Style};

/// A title, a total.
pub(crate) const STRONG: Style = Style::new().bold();

/// What explains rather than tells: headings of columns, notes.
pub(crate) const QUIET: Style = Style::new().dimmed();

/// A verdict that is YES.
pub(crate) const GOOD: Style = AnsiColor::Green.on_default();

/// A verdict that is NO, an error.
pub(crate) const BAD: Style = AnsiColor::Red.on_default().bold();

/// A caution.
pub(crate) const CAUTION: Style = AnsiColor::Yellow.on_default().bold();

/// Advice.
pub(crate) const HINT: Style = AnsiColor::Cyan.on_default();
