//! `strickle new`.

use crate::arguments::New;
use crate::failure::Failure;
use crate::status::Status;
use crate::terminal::Terminal;
use std::io::{self, Write as _};
use std::path::{Path, PathBuf};
use strickle::figures::plain;

/// Writes a starter part file; one that is there already stays as it is.
pub(super) fn run(arguments: &New, terminal: &mut Terminal) -> Result<Status, Failure> {
    let (file, name) = file_and_name(&arguments.name).ok_or_else(|| {
        Failure::usage(format!(
            "`{}` does not name a part",
            arguments.name.display()
        ))
        .with_hint("for example: strickle new \"Fog bell\"")
    })?;
    write_new(&file, part::starter(&name).as_bytes()).map_err(|source| {
        let source = match source.kind() {
            io::ErrorKind::AlreadyExists => {
                io::Error::new(source.kind(), "it is there already and stays as it is")
            }
            _ => source,
        };
        Failure::Write {
            file: file.clone(),
            source,
        }
    })?;
    let file = plain(&file.display().to_string());
    terminal.show(&format!("{file} is written. Next: strickle weigh {file}\n"))?;
    Ok(Status::Holds)
}

/// The file and the name of the part that was asked for by `given`: `Fog bell` is the part `Fog bell` in the file
/// `fog_bell.toml`; `parts/bell.toml` is the part `bell` in the file of that name.
fn file_and_name(given: &Path) -> Option<(PathBuf, String)> {
    let last = given.file_name()?.to_str()?;
    let (file, name) = match last.strip_suffix(".toml") {
        Some(stem) => (last.to_owned(), stem),
        None => (in_a_file_name(last) + ".toml", last),
    };
    let name = name.trim();
    (!name.is_empty()).then(|| (given.with_file_name(file), name.to_owned()))
}

/// `name` in small letters, with underscores for blanks.
fn in_a_file_name(name: &str) -> String {
    let words: Vec<&str> = name.split_whitespace().collect();
    words.join("_").to_lowercase()
}

/// Writes `text` to `file`, whole or not at all.
///
/// # Errors
/// The file is there already, or it could not be written.
fn write_new(file: &Path, text: &[u8]) -> io::Result<()> {
    let folder = match file.parent() {
        Some(folder) if folder.as_os_str() != "" => folder,
        _ => Path::new("."),
    };
    let mut builder = tempfile::Builder::new();
    // As any new file: what the user's mask leaves.
    #[cfg(unix)]
    builder.permissions(std::os::unix::fs::PermissionsExt::from_mode(0o666));
    let mut written = builder.tempfile_in(folder)?;
    written.write_all(text)?;
    written.persist_noclobber(file)?;
    Ok(())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_file_is_named_after_the_part() {
        for (given, file, name) in [
            ("Fog bell", "fog_bell.toml", "Fog bell"),
            ("parts/Fog bell", "parts/fog_bell.toml", "Fog bell"),
            ("bell.toml", "bell.toml", "bell"),
            ("Bell.toml", "Bell.toml", "Bell"),
            ("v1.2", "v1.2.toml", "v1.2"),
        ] {
            let found = file_and_name(Path::new(given));
            assert_eq!(found, Some((file.into(), name.to_owned())), "{given}");
        }
        for given in ["", "/", "..", ".toml", "  "] {
            assert_eq!(file_and_name(Path::new(given)), None, "{given}");
        }
    }
}
