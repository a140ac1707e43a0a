//! What a person in the shop reads when a part file is wrong: every message, drawn in full.
//!
//! `cases/*.txt` hold the cases: after `=== name` a part file, or a piece of one, and after `---` what is shown for it. A
//! name with a frame, `=== name (step)`, is a piece that the frame makes a whole file of. `RENEW=1 cargo test -p part
//! --test diagnostics` writes what is shown now; the difference is to be read before it is kept.

mod frames;

use miette::{GraphicalReportHandler, GraphicalTheme};
use part::{Faults, Neighbours, Setting};
use std::collections::BTreeSet;
use std::fmt::Write;
use std::path::{Path, PathBuf};

/// One case of a file.
struct Case {
    /// The line after `===`.
    title: String,
    /// The piece of a part file.
    piece: String,
    /// What is shown for it.
    shown: String,
}

/// The files in `beside` stand beside the part file.
struct Beside;

impl Neighbours for Beside {
    fn read(&self, file: &str) -> std::io::Result<Vec<u8>> {
        std::fs::read(folder().with_file_name("beside").join(file))
    }
}

fn folder() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/diagnostics/cases")
}

fn cases(text: &str) -> Vec<Case> {
    text.split("=== ")
        .skip(1)
        .map(|case| {
            let (title, rest) = case.split_once('\n').expect("a title is a line");
            let (piece, shown) = rest.split_once("\n---\n").unwrap_or((rest, ""));
            Case {
                title: title.to_owned(),
                piece: piece.trim_end_matches('\n').to_owned(),
                shown: shown.to_owned(),
            }
        })
        .collect()
}

/// Reads a case's file and gives its faults.
fn faults(case: &Case) -> Faults {
    let (text, settings) = frames::whole(&case.title, &case.piece);
    let settings: Vec<Setting> = settings;
    part::read("bell.toml", text.as_bytes(), &settings, &Beside)
        .map(|_| ())
        .expect_err(&case.title)
}

/// The faults as a terminal without colours shows them.
fn drawn(faults: &Faults) -> String {
    let handler = GraphicalReportHandler::new_themed(GraphicalTheme::unicode_nocolor());
    let mut out = String::new();
    for diagnostic in faults.diagnostics() {
        handler
            .render_report(&mut out, diagnostic)
            .expect("a report is drawn into memory");
        out.push('\n');
    }
    let lines: Vec<&str> = out.lines().map(str::trim_end).collect();
    lines.join("\n").trim_end().to_owned() + "\n"
}

fn files() -> Vec<PathBuf> {
    let mut files: Vec<PathBuf> = std::fs::read_dir(folder())
        .expect("the cases are there")
        .map(|entry| entry.expect("the folder can be read").path())
        .collect();
    files.sort();
    files
}

#[test]
fn each_message_is_as_it_was_read_and_approved() {
    let renew = std::env::var_os("RENEW").is_some();
    let mut wrong = String::new();
    for file in files() {
        let text = std::fs::read_to_string(&file).unwrap();
        let mut renewed = String::new();
        for case in cases(&text) {
            let shown = drawn(&faults(&case));
            if shown.trim_end() != case.shown.trim_end() {
                write!(
                    wrong,
                    "{}: expected\n{}\nshown\n{shown}\n",
                    case.title, case.shown
                )
                .unwrap();
            }
            write!(
                renewed,
                "=== {}\n{}\n---\n{shown}\n",
                case.title, case.piece
            )
            .unwrap();
        }
        if renew {
            std::fs::write(&file, renewed).unwrap();
        }
    }
    assert!(renew || wrong.is_empty(), "{wrong}");
}

#[test]
fn many_rules_have_a_message_of_their_own() {
    let mut codes = BTreeSet::new();
    for file in files() {
        let text = std::fs::read_to_string(&file).unwrap();
        for case in cases(&text) {
            for fault in faults(&case).iter() {
                codes.insert(fault.code);
                let last = fault.message.chars().last();
                assert!(last != Some('.'), "{}", fault.message);
                assert!(fault.help.is_some(), "{} has no advice", fault.code);
            }
        }
    }
    assert!(codes.len() >= 60, "{}: {codes:?}", codes.len());
}
