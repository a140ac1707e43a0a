//! What ends a command before its work is done.

use crate::status::Status;
use std::io;
use std::path::PathBuf;

/// Why a command could not do its work.
#[derive(Debug, thiserror::Error)]
pub(crate) enum Failure {
    /// The part file is wrong.
    #[error("{0}")]
    Part(#[from] part::Faults),
    /// The usage, or an input as a whole, is wrong.
    #[error("{message}")]
    Usage {
        /// What is wrong.
        message: String,
        /// What to do.
        hint: Option<String>,
    },
    /// A file could not be read.
    #[error("could not read {}", file.display())]
    Read {
        /// The file.
        file: PathBuf,
        /// Why.
        source: io::Error,
    },
    /// A file could not be written.
    #[error("could not write {}", file.display())]
    Write {
        /// The file.
        file: PathBuf,
        /// Why.
        source: io::Error,
    },
    /// The reader of standard output has closed its end.
    #[error("standard output was closed")]
    PipeClosed,
}

impl Failure {
    /// A wrong usage or input.
    pub(crate) fn usage(message: impl Into<String>) -> Self {
        Self::Usage {
            message: message.into(),
            hint: None,
        }
    }

    /// The same with advice.
    pub(crate) fn with_hint(self, advice: impl Into<String>) -> Self {
        match self {
            Self::Usage { message, .. } => Self::Usage {
                message,
                hint: Some(advice.into()),
            },
            other => other,
        }
    }

    /// The exit status that it leads to.
    pub(crate) fn status(&self) -> Status {
        match self {
            Self::Part(_) | Self::Usage { .. } => Status::WrongInput,
            Self::Read { .. } | Self::Write { .. } => Status::File,
            Self::PipeClosed => Status::Holds,
        }
    }
}
