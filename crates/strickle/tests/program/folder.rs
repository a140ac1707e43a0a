//! A fresh folder to run the program in.

use std::io::Write as _;
use std::path::{Path, PathBuf};
use std::process::{Command, Output, Stdio};
use tempfile::TempDir;

/// A steel disc of 100 mm diameter and 20 mm height with a named rim: 1.23308 kg.
pub(crate) const DISC: &str = r#"
format = 1
[part]
name = "Disc"
unit = "mm"
[size]
across = 100
high = { is = 20, tol = 0.1 }
[[body]]
name = "disc"
material = "S235JR"
outline = [
  { d = 0, z = 0 },
  { d = "across" },
  { z = "high", name = "rim" },
  { d = 0 },
]
"#;

/// What a run gave.
#[derive(Debug)]
pub(crate) struct Ran {
    /// Exit status; `None` where a signal ended it.
    pub(crate) status: Option<i32>,
    /// Standard output.
    pub(crate) out: String,
    /// Standard error.
    pub(crate) err: String,
}

/// A folder of its own, with a place for settings that nobody has used.
pub(crate) struct Folder(TempDir);

impl Folder {
    pub(crate) fn new() -> Self {
        Self(tempfile::tempdir().unwrap())
    }

    /// A folder with these files.
    pub(crate) fn with(files: &[(&str, &str)]) -> Self {
        let folder = Self::new();
        for (name, text) in files {
            folder.write(name, text);
        }
        folder
    }

    pub(crate) fn path(&self) -> &Path {
        self.0.path()
    }

    pub(crate) fn file(&self, name: &str) -> PathBuf {
        self.path().join(name)
    }

    pub(crate) fn write(&self, name: &str, text: impl AsRef<[u8]>) {
        let file = self.file(name);
        std::fs::create_dir_all(file.parent().unwrap()).unwrap();
        std::fs::write(file, text).unwrap();
    }

    pub(crate) fn read(&self, name: &str) -> String {
        std::fs::read_to_string(self.file(name)).unwrap()
    }

    /// The program with these arguments, to be run in this folder; nothing but PATH comes from outside.
    pub(crate) fn command(&self, arguments: &[&str]) -> Command {
        let mut command = Command::new(env!("CARGO_BIN_EXE_strickle"));
        command
            .args(arguments)
            .current_dir(self.path())
            .env_clear()
            .env("STRICKLE_CONFIG_DIR", self.file("settings"))
            .stdin(Stdio::null());
        command
    }

    /// Runs it.
    pub(crate) fn run(&self, arguments: &[&str]) -> Ran {
        ran(&self.command(arguments).output().unwrap())
    }

    /// Runs it with `input` on standard input.
    pub(crate) fn run_with_input(&self, arguments: &[&str], input: &str) -> Ran {
        let mut child = self
            .command(arguments)
            .stdin(Stdio::piped())
            .stdout(Stdio::piped())
            .stderr(Stdio::piped())
            .spawn()
            .unwrap();
        // It may end before it has read all: that is for the test to judge.
        let _ = child.stdin.take().unwrap().write_all(input.as_bytes());
        ran(&child.wait_with_output().unwrap())
    }
}

/// The output as texts.
pub(crate) fn ran(output: &Output) -> Ran {
    let text = |bytes: &[u8]| String::from_utf8(bytes.to_vec()).unwrap();
    Ran {
        status: output.status.code(),
        out: text(&output.stdout),
        err: text(&output.stderr),
    }
}
