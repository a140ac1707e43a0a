//! Which format a file has, and writing it.

use crate::{Model, obj, stl, three_mf, write_whole};
use std::io::{self, Seek, Write};
use std::path::Path;

/// A format that meshes are written in.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Format {
    /// Binary STL: coordinates are f32, no unit, no bodies.
    Stl,
    /// STL as text; the numbers are those of the binary form.
    StlText,
    /// Wavefront OBJ: text in full f64, one object a body, no unit.
    Obj,
    /// 3MF: text in full f64, zipped, with the unit, one object a body with the name of its material.
    ThreeMf,
}

impl Format {
    /// The format that a file's name asks for; STL is the binary one.
    pub fn of_name(path: &Path) -> Option<Self> {
        let ending = path.extension()?.to_str()?.to_ascii_lowercase();
        match ending.as_str() {
            "stl" => Some(Self::Stl),
            "obj" => Some(Self::Obj),
            "3mf" => Some(Self::ThreeMf),
            _ => None,
        }
    }

    /// Its name.
    pub fn name(self) -> &'static str {
        match self {
            Self::Stl => "STL",
            Self::StlText => "STL, text",
            Self::Obj => "OBJ",
            Self::ThreeMf => "3MF",
        }
    }

    /// True where the file says its unit in a way that readers understand.
    pub fn has_unit(self) -> bool {
        self == Self::ThreeMf
    }

    /// Writes `model`. The bytes are the same for the same model, always.
    ///
    /// # Errors
    /// The writer's.
    pub fn write(self, model: &Model, writer: &mut (impl Write + Seek)) -> io::Result<()> {
        match self {
            Self::Stl => stl::binary::write(writer, model),
            Self::StlText => stl::text::write(writer, model),
            Self::Obj => obj::write(writer, model),
            Self::ThreeMf => three_mf::write(writer, model),
        }
    }

    /// Writes `model` to the file `path`, whole or not at all.
    ///
    /// # Errors
    /// See [`write_whole`].
    pub fn write_file(self, model: &Model, path: &Path) -> io::Result<()> {
        write_whole(path, |writer| self.write(model, writer))
    }
}
