//! From the text of a part file to a [`Part`].

use crate::{Fault, Faults, LengthUnit, Part};

/// The files beside a part file, for outlines that come from a file.
///
/// A name is given as written: relative, with `/` between folders. The reader refuses names that are absolute or lead out
/// of the folder, so an implementation joins the name to the part file's folder and no more.
pub trait Neighbours {
    /// The bytes of `file`.
    ///
    /// # Errors
    /// It is not there or could not be read.
    fn read(&self, file: &str) -> std::io::Result<Vec<u8>>;
}

/// A size that is set from outside: `--set NAME=VALUE`.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Setting {
    /// Name of the size.
    pub name: String,
    /// Its value, an expression as in the file; a bare number is in `part.unit`.
    pub value: String,
}

/// Reads the part file `text` (its bytes, in UTF-8), called `file` in messages.
///
/// # Errors
/// All that is wrong with it, as far as the faults are independent, in order of place.
pub fn read(
    file: &str,
    text: &[u8],
    settings: &[Setting],
    neighbours: &dyn Neighbours,
) -> Result<Part, Faults> {
    let _ = (settings, neighbours);
    let text = String::from_utf8_lossy(text);
    let fault = Fault::new("part::empty", "the reader is on its way", 0..0, "");
    Err(Faults::of(file, &text, vec![fault]).expect("one fault was given"))
}

/// A length typed outside a part file, in metres: `0.1mm`, `1/64 in`, `0.1` (in the unit `bare`).
///
/// # Errors
/// It is not a length; the fault's places are in `text`.
pub fn length(text: &str, bare: LengthUnit) -> Result<f64, Fault> {
    let _ = bare;
    Err(Fault::new(
        "value::not_a_length",
        "not a length",
        0..text.len(),
        "",
    ))
}

/// The JSON Schema of the part file.
pub fn schema() -> serde_json::Value {
    serde_json::Value::Bool(true)
}

/// The text of a new part file called `name`: commented, and itself a legal part.
pub fn starter(name: &str) -> String {
    format!("format = 1\n\n[part]\nname = {name:?}\n")
}
