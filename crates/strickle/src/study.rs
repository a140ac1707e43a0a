//! Part in, everything out.

use crate::material::{self, BodyMaterial};
use crate::record::{self, Exact, Record};
use crate::{VERSION, expect, weighing};
use part::{Faults, Neighbours, Part, Setting};
use sha2::{Digest as _, Sha256};
use std::fmt::Write as _;

/// The text that a part was read from.
#[derive(Debug, Clone, Copy)]
pub struct Source<'a> {
    /// The file, as it was named.
    pub file: &'a str,
    /// Its bytes.
    pub text: &'a [u8],
}

/// Everything that can be found out about one part.
#[derive(Debug, Clone)]
pub struct Study {
    /// The part.
    pub part: Part,
    /// What the bodies are made of, body by body.
    pub materials: Vec<BodyMaterial>,
    /// What was found so far.
    pub record: Record,
}

impl Study {
    /// Reads a part file and studies the part.
    ///
    /// # Errors
    /// All that is wrong with the part file.
    pub fn read(
        source: Source<'_>,
        settings: &[Setting],
        neighbours: &dyn Neighbours,
        table: &shop::Table,
    ) -> Result<Self, Faults> {
        let part = part::read(source.file, source.text, settings, neighbours)?;
        Self::new(part, source, table)
    }

    /// Studies `part`, which was read from `source`: materials, exact figures, and whether what is expected holds.
    ///
    /// # Errors
    /// A material is not in the table, or a figure is too large or too small for a number.
    pub fn new(part: Part, source: Source<'_>, table: &shop::Table) -> Result<Self, Faults> {
        let materials = material::of_bodies(&part, source, table)?;
        let exact = weighing::exact(&part, &materials, source)?;
        let expect = expect::judgements(&part, &exact);
        let record = Record {
            strickle: VERSION,
            part: record::Part {
                name: part.name.clone(),
                file: source.file.to_owned(),
                sha256: sha256(source.text),
                number: part.number.clone(),
                revolve: part.revolve,
            },
            exact: Some(exact),
            mesh: None,
            measured: None,
            audit: None,
            budget: None,
            verdict: expect::verdict(&expect),
            expect,
        };
        Ok(Self {
            part,
            materials,
            record,
        })
    }

    /// The exact figures.
    pub fn exact(&self) -> &Exact {
        self.record
            .exact
            .as_ref()
            .expect("a study of a part starts with the exact figures")
    }
}

/// SHA-256 in hexadecimal.
fn sha256(bytes: &[u8]) -> String {
    Sha256::digest(bytes)
        .iter()
        .fold(String::with_capacity(64), |mut text, byte| {
            let _ = write!(text, "{byte:02x}");
            text
        })
}
