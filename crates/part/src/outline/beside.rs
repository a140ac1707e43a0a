//! Files beside the part file.

use crate::nearest::shown;
use crate::{Fault, Neighbours, Span, limits};
use std::io::ErrorKind;

/// The text of `file`, which the part file names at `span`; a byte order mark is taken off.
///
/// # Errors
/// It cannot be read, is too long or is not text.
pub(super) fn text(file: &str, span: &Span, neighbours: &dyn Neighbours) -> Result<String, Fault> {
    let name = shown(file);
    let refuse = |code, message: String| Fault::new(code, message, span.clone(), "");
    let bytes = neighbours.read(file).map_err(|error| {
        if error.kind() == ErrorKind::NotFound {
            let message = format!("there is no file `{name}`");
            return refuse("file::missing", message)
                .help("the name is looked for in the part file's own folder");
        }
        refuse(
            "file::unreadable",
            format!("`{name}` cannot be read: {error}"),
        )
        .help("a file that an outline names stands in the part file's own folder")
    })?;
    if bytes.len() > limits::TEXT {
        let message = format!("`{name}` has more than {} MiB", limits::TEXT >> 20);
        return Err(refuse("file::too_long", message)
            .help("is it the right file? An outline takes a few lines"));
    }
    let mut text = String::from_utf8(bytes).map_err(|error| {
        let at = error.utf8_error().valid_up_to();
        let line = line(&String::from_utf8_lossy(error.as_bytes()), at);
        refuse(
            "file::not_utf8",
            format!("`{name}` is not text in UTF-8: line {line} has a byte that is no letter"),
        )
        .help("save it again as UTF-8, not compressed")
    })?;
    if text.starts_with('\u{feff}') {
        text.drain(..'\u{feff}'.len_utf8());
    }
    Ok(text)
}

/// Number of the line, counted from 1, that the byte at `offset` is on.
pub(super) fn line(text: &str, offset: usize) -> usize {
    let before = text.get(..offset).unwrap_or(text);
    1 + before.matches('\n').count()
}
