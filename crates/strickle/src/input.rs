//! Reading part files and the files beside them.

use crate::failure::Failure;
use part::Neighbours;
use std::fs::{self, File};
use std::io::{self, Read};
use std::path::{Path, PathBuf};

/// Most bytes of a part file, or of a file that its outline names.
const LARGEST_FILE: u64 = 16 << 20;

/// A part file's bytes and where they came from.
#[derive(Debug)]
pub(crate) struct PartFile {
    /// The file, as it was named.
    pub(crate) name: String,
    /// Its bytes.
    pub(crate) text: Vec<u8>,
    /// The folder that the files its outlines name are in.
    pub(crate) folder: Folder,
}

impl PartFile {
    /// Reads the file at `path`, or standard input for `-`.
    ///
    /// # Errors
    /// It could not be read, or it is larger than a part file may be.
    pub(crate) fn read(path: &Path) -> Result<Self, Failure> {
        let name = path.display().to_string();
        let (text, folder) = if is_standard_input(path) {
            (limited(io::stdin().lock(), 0), PathBuf::new())
        } else {
            let folder = path.parent().unwrap_or(Path::new("")).to_owned();
            (contents(path), folder)
        };
        match text {
            Ok(Some(text)) => Ok(Self {
                name,
                text,
                folder: Folder(folder),
            }),
            Ok(None) => Err(Failure::usage(format!(
                "{name} is larger than a part file may be (16 MiB)"
            ))),
            Err(source) => Err(Failure::Read {
                file: path.to_owned(),
                source,
            }),
        }
    }
}

/// True for `-`.
pub(crate) fn is_standard_input(path: &Path) -> bool {
    path.as_os_str() == "-"
}

/// The folder of a part file, for the files that its outlines name.
#[derive(Debug)]
pub(crate) struct Folder(PathBuf);

impl Neighbours for Folder {
    fn read(&self, file: &str) -> io::Result<Vec<u8>> {
        let path = self.0.join(file);
        // A pipe or a device could keep the program waiting, or never end.
        if !fs::metadata(&path)?.is_file() {
            return Err(io::Error::other("not a regular file"));
        }
        contents(&path)?
            .ok_or_else(|| io::Error::new(io::ErrorKind::FileTooLarge, "larger than 16 MiB"))
    }
}

/// The bytes of the file at `path`; `None` where they are more than 16 MiB.
pub(crate) fn contents(path: &Path) -> io::Result<Option<Vec<u8>>> {
    let file = File::open(path)?;
    let length = file.metadata()?.len();
    if length > LARGEST_FILE {
        return Ok(None);
    }
    limited(file, length)
}

/// All bytes of `reader`, about `expected` of them; `None` where they are too many.
fn limited(reader: impl Read, expected: u64) -> io::Result<Option<Vec<u8>>> {
    let mut bytes = Vec::with_capacity(usize::try_from(expected).unwrap_or(0) + 1);
    let read = reader.take(LARGEST_FILE + 1).read_to_end(&mut bytes)?;
    Ok((read as u64 <= LARGEST_FILE).then_some(bytes))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn reading_stops_at_the_limit() {
        let largest = usize::try_from(LARGEST_FILE).unwrap();
        assert_eq!(
            limited(&vec![b'#'; largest][..], 0).unwrap().unwrap().len(),
            largest
        );
        assert!(limited(io::repeat(b'['), 0).unwrap().is_none());
    }

    #[test]
    fn a_neighbour_is_found_beside_the_part_and_must_be_a_regular_file() {
        let folder = tempfile::tempdir().unwrap();
        fs::create_dir(folder.path().join("curves")).unwrap();
        fs::write(folder.path().join("curves/bell.csv"), "r,z\n").unwrap();
        let beside = Folder(folder.path().to_owned());
        assert_eq!(beside.read("curves/bell.csv").unwrap(), b"r,z\n");
        assert!(beside.read("curves").is_err());
        assert_eq!(
            beside.read("none.csv").unwrap_err().kind(),
            io::ErrorKind::NotFound
        );
    }
}
