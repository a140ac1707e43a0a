//! What is wrong with a file of materials.

use std::ops::Range;

/// One thing that is wrong with a file of materials, and where.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
#[error("{message}")]
pub struct Fault {
    /// Which rule is broken.
    pub code: &'static str,
    /// What is wrong, in one sentence without a full stop.
    pub message: String,
    /// Where, in bytes of the text.
    pub span: Range<usize>,
    /// What to do.
    pub help: Option<String>,
}

impl Fault {
    pub(crate) fn new(code: &'static str, message: impl Into<String>, span: Range<usize>) -> Self {
        Self {
            code,
            message: message.into(),
            span,
            help: None,
        }
    }

    pub(crate) fn help(mut self, help: impl Into<String>) -> Self {
        self.help = Some(help.into());
        self
    }
}
