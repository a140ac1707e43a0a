//! Binary STL: 80 bytes of header, the count of facets, 50 bytes a facet. No unit of its own; coordinates are f32.
//!
//! Written and read by stl_io. Its writer leaves the header blank; ours says the part's name and the unit in it, and never
//! begins with `solid`, which readers take for the text form.

use super::facet;
use crate::Model;
use glam::DVec3;
use std::io::{self, Read, Seek, Write};

/// The header's 80 bytes: ASCII, padded with blanks.
fn header(model: &Model) -> [u8; 80] {
    let mut bytes = [b' '; 80];
    let unit = format!("strickle, unit {}: ", model.unit.symbol());
    let text = unit.chars().chain(model.name.chars());
    let ascii = text.map(|c| {
        if c.is_ascii_graphic() || c == ' ' {
            c as u8
        } else {
            b'?'
        }
    });
    bytes.iter_mut().zip(ascii).for_each(|(byte, c)| *byte = c);
    bytes
}

/// Why an STL could not be read.
#[derive(Debug, thiserror::Error)]
#[non_exhaustive]
pub enum StlError {
    /// The file could not be read, or stl_io refuses it.
    #[error(transparent)]
    Io(#[from] io::Error),
    /// A coordinate that is not a finite number.
    #[error("facet {facet} has a coordinate that is not a finite number")]
    NotFinite {
        /// The facet, counted from 1.
        facet: usize,
    },
}

/// Writes the model's facets; coordinates are rounded to f32.
pub(crate) fn write(writer: &mut impl Write, model: &Model) -> io::Result<()> {
    let rounded: Vec<[f32; 3]> = model
        .positions
        .iter()
        .map(|p| model.in_unit(*p).as_vec3().to_array())
        .collect();
    let facets = model
        .triangles
        .iter()
        .map(|triangle| facet(triangle.map(|i| rounded[i as usize])));
    stl_io::write_stl(
        &mut Headed {
            writer,
            header: header(model),
            done: 0,
        },
        facets,
    )
}

/// A writer that puts the header in place of the first 80 bytes.
struct Headed<'a, W> {
    writer: &'a mut W,
    header: [u8; 80],
    done: usize,
}

impl<W: Write> Write for Headed<'_, W> {
    fn write(&mut self, bytes: &[u8]) -> io::Result<usize> {
        if let Some(rest) = self.header.get(self.done..).filter(|rest| !rest.is_empty()) {
            let count = rest.len().min(bytes.len());
            self.writer.write_all(&rest[..count])?;
            self.done += count;
            return Ok(count);
        }
        self.writer.write(bytes)
    }

    fn flush(&mut self) -> io::Result<()> {
        self.writer.flush()
    }
}

/// The facets of an STL that this program wrote, in the file's order: corners in metres, with `unit` metres a number of the
/// file.
///
/// # Errors
/// See [`StlError`].
pub fn stl_facets<R: Read + Seek>(
    reader: &mut R,
    unit: f64,
) -> Result<impl Iterator<Item = Result<[DVec3; 3], StlError>> + use<'_, R>, StlError> {
    let facets = stl_io::create_stl_reader(reader)?.enumerate();
    Ok(facets.map(move |(index, facet)| {
        let corners = facet?
            .vertices
            .map(|vertex| glam::Vec3::from_array(vertex.0).as_dvec3() * unit);
        if corners.iter().all(|corner| corner.is_finite()) {
            Ok(corners)
        } else {
            Err(StlError::NotFinite { facet: index + 1 })
        }
    }))
}

#[cfg(test)]
mod tests {
    use super::super::rounded;
    use super::*;
    use crate::sample::wedges;
    use crate::{Format, Unit};
    use std::io::Cursor;

    fn written(name: &str) -> Vec<u8> {
        let mut file = Cursor::new(Vec::new());
        let sample = wedges();
        Format::Stl
            .write(&sample.model(name, Unit::Millimetre), &mut file)
            .unwrap();
        file.into_inner()
    }

    fn read(bytes: Vec<u8>) -> Result<Vec<[DVec3; 3]>, StlError> {
        stl_facets(&mut Cursor::new(bytes), 1e-3)?.collect()
    }

    /// The layout of the format: 80 bytes, a count, 50 bytes a facet (common practice since the format's first description).
    #[test]
    fn header_count_and_length() {
        let bytes = written("solid Glocke für Nebel");
        assert_eq!(bytes.len(), 84 + 8 * 50);
        assert!(bytes.starts_with(b"strickle, unit mm: solid Glocke f?r Nebel   "));
        assert_eq!(bytes[80..84], 8_u32.to_le_bytes());
        // The first facet's normal: down.
        assert_eq!(
            bytes[84..96],
            [0.0_f32, 0.0, -1.0].map(f32::to_le_bytes).concat()
        );
    }

    #[test]
    fn what_is_read_is_what_was_written_rounded_to_f32() {
        let sample = wedges();
        let model = sample.model("wedges", Unit::Millimetre);
        let meant: Vec<[DVec3; 3]> = model
            .triangles
            .iter()
            .map(|t| t.map(|i| rounded(model.positions[i as usize], 1e-3)))
            .collect();
        assert_eq!(read(written("wedges")).unwrap(), meant);
    }

    #[test]
    fn a_coordinate_that_is_no_number_is_named() {
        let mut bytes = written("wedges");
        bytes[84 + 50 + 12..84 + 50 + 16].copy_from_slice(&f32::NAN.to_le_bytes());
        assert_eq!(
            read(bytes).unwrap_err().to_string(),
            "facet 2 has a coordinate that is not a finite number"
        );
    }
}
