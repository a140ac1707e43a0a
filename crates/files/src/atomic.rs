//! Files are written to a temporary name beside the target, synced and renamed: the target is the old file or the whole
//! new one, whatever happens on the way.

use std::io::{self, BufWriter, Write};
use std::path::Path;

/// Writes `path` with what `fill` writes. On any failure nothing is left behind and an existing file is untouched.
///
/// # Errors
/// The folder is missing or not writable, the disk is full, `path` is a folder, or `fill` fails.
pub fn write_whole(
    path: &Path,
    fill: impl FnOnce(&mut BufWriter<&std::fs::File>) -> io::Result<()>,
) -> io::Result<()> {
    if path.is_dir() {
        return Err(io::Error::new(
            io::ErrorKind::IsADirectory,
            "it is a folder",
        ));
    }
    let folder = match path.parent() {
        Some(parent) if !parent.as_os_str().is_empty() => parent,
        _ => Path::new("."),
    };
    let mut builder = tempfile::Builder::new();
    builder.prefix(".strickle-").suffix(".part");
    // Like any new file, subject to the user's mask; the library's default is for the owner alone.
    #[cfg(unix)]
    builder.permissions(std::os::unix::fs::PermissionsExt::from_mode(0o666));
    let temporary = builder.tempfile_in(folder)?;
    let mut writer = BufWriter::with_capacity(1 << 20, temporary.as_file());
    fill(&mut writer)?;
    writer.flush()?;
    drop(writer);
    temporary.as_file().sync_all()?;
    temporary.persist(path).map_err(|failed| failed.error)?;
    Ok(())
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::fs;

    #[test]
    fn a_failure_on_the_way_leaves_the_old_file_and_nothing_else() {
        let folder = tempfile::tempdir().unwrap();
        let path = folder.path().join("bell.stl");
        fs::write(&path, "old").unwrap();
        let failed = write_whole(&path, |writer| {
            writer.write_all(b"half")?;
            Err(io::Error::other("no more room"))
        });
        assert_eq!(failed.unwrap_err().to_string(), "no more room");
        assert_eq!(fs::read_to_string(&path).unwrap(), "old");
        assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 1);
        write_whole(&path, |writer| writer.write_all(b"new")).unwrap();
        assert_eq!(fs::read_to_string(&path).unwrap(), "new");
        assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 1);
    }

    #[test]
    fn a_folder_is_not_a_target() {
        let folder = tempfile::tempdir().unwrap();
        let failed = write_whole(folder.path(), |_| Ok(()));
        assert_eq!(failed.unwrap_err().kind(), io::ErrorKind::IsADirectory);
    }
}
