//! From a few lines of a part file to exact figures, by the way that a user's part goes.

use part::Neighbours;
use std::io;
use strickle::record::Exact;
use strickle::{Source, Study};

/// A part whose outline needs no file beside it.
#[derive(Debug)]
struct Alone;

impl Neighbours for Alone {
    fn read(&self, _file: &str) -> io::Result<Vec<u8>> {
        Err(io::ErrorKind::NotFound.into())
    }
}

/// The text of a part of one body: `unit` as in a part file, `density` in kg/m3, `section` a line such as
/// `outline = [..]`.
pub fn one_body(unit: &str, density: f64, section: &str) -> String {
    format!(
        "format = 1\n[part]\nname = \"check\"\nunit = \"{unit}\"\n[[body]]\nname = \"body\"\ndensity = \"{density} kg/m3\"\n\
         {section}\n"
    )
}

/// A ring of rectangular section, or a disc where `inside` is 0: diameters and height.
pub fn ring(unit: &str, density: f64, inside: f64, outside: f64, height: f64) -> String {
    one_body(
        unit,
        density,
        &format!(
            "outline = [{{ d = {inside}, z = 0 }}, {{ d = {outside} }}, {{ z = {height} }}, {{ d = {inside} }}]"
        ),
    )
}

/// The study of the part with this text.
///
/// # Panics
/// The text is not a part file; the message shows why.
pub fn study(text: &str) -> Study {
    let source = Source {
        file: "check.toml",
        text: text.as_bytes(),
    };
    Study::read(source, &[], &Alone, &shop::Table::built_in())
        .unwrap_or_else(|faults| panic!("{text}\n{faults:?}"))
}

/// The exact figures of the part with this text, SI.
///
/// # Panics
/// The text is not a part file; the message shows why.
pub fn exact(text: &str) -> Exact {
    study(text)
        .record
        .exact
        .expect("a study starts with the exact figures")
}
