//! `strickle new`.

use crate::arguments::New;
use crate::failure::Failure;
use crate::status::Status;
use crate::terminal::Terminal;
use std::io::{self, Write as _};
use std::path::{Path, PathBuf};

/// Writes a starter part file; one that is there already stays as it is.
pub(super) fn run(arguments: &New, terminal: &mut Terminal) -> Result<Status, Failure> {
    let file = file_of(&arguments.name);
    let name = file
        .file_stem()
        .map(|stem| stem.to_string_lossy())
        .filter(|stem| !stem.trim().is_empty())
        .ok_or_else(|| {
            Failure::usage(format!(
                "`{}` does not name a part",
                arguments.name.display()
            ))
            .with_hint("for example: strickle new bell")
        })?;
    write_new(&file, part::starter(&name).as_bytes()).map_err(|source| match source.kind() {
        io::ErrorKind::AlreadyExists => Failure::Write {
            file: file.clone(),
            source: io::Error::new(source.kind(), "it is there already and stays as it is"),
        },
        _ => Failure::Write {
            file: file.clone(),
            source,
        },
    })?;
    terminal.show(&format!(
        "{0} is written. Next: strickle weigh {0}\n",
        file.display()
    ))?;
    Ok(Status::Holds)
}

/// The file of the part called `name`: NAME.toml, where the name has no such ending yet.
fn file_of(name: &Path) -> PathBuf {
    if name.extension().is_some_and(|ending| ending == "toml") {
        return name.to_owned();
    }
    let mut file = name.as_os_str().to_owned();
    file.push(".toml");
    file.into()
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
