//! Binary STL: 80 bytes of header, the count of facets, 50 bytes a facet. No unit of its own; coordinates are f32.
//!
//! Written and read by stl_io. Its writer leaves the header blank; ours says the part's name and the unit in it, and never
//! begins with `solid`, which readers take for the text form.

use glam::DVec3;
use std::io::{self, Read, Seek, Write};

/// What the header of a binary STL says.
#[derive(Debug, Clone, PartialEq)]
pub struct Header<'a> {
    /// Name of the part.
    pub name: &'a str,
    /// Word for the unit of the coordinates.
    pub unit: &'a str,
}

impl Header<'_> {
    /// The 80 bytes, ASCII, padded with blanks.
    fn bytes(&self) -> [u8; 80] {
        let mut bytes = [b' '; 80];
        let unit = format!("strickle, unit {}: ", self.unit);
        let text = unit.chars().chain(self.name.chars());
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

/// Writes triangles in `unit` metres as binary STL; coordinates are rounded to f32.
///
/// # Errors
/// The writer's.
pub fn write_stl(
    writer: &mut impl Write,
    header: &Header,
    unit: f64,
    positions: &[DVec3],
    triangles: &[[u32; 3]],
) -> io::Result<()> {
    let rounded: Vec<[f32; 3]> = positions
        .iter()
        .map(|p| (*p / unit).as_vec3().to_array())
        .collect();
    let facets = triangles
        .iter()
        .map(|triangle| facet(triangle.map(|i| rounded[i as usize])));
    stl_io::write_stl(
        &mut Headed {
            writer,
            header: header.bytes(),
            done: 0,
        },
        facets,
    )
}

/// A facet with the unit normal of its own rounded corners; zero where they lie on a line.
fn facet(corners: [[f32; 3]; 3]) -> stl_io::Triangle {
    let [a, b, c] = corners.map(|p| glam::Vec3::from_array(p).as_dvec3());
    let normal = (b - a).cross(c - a).normalize_or_zero();
    stl_io::Triangle {
        normal: stl_io::Normal::new(normal.as_vec3().to_array()),
        vertices: corners.map(stl_io::Vertex::new),
    }
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

/// Reads an STL that this program wrote, facet by facet in the file's order: corners in metres, with `unit` metres a number of
/// the file.
///
/// # Errors
/// See [`StlError`].
pub fn read_stl(reader: &mut (impl Read + Seek), unit: f64) -> Result<Vec<[DVec3; 3]>, StlError> {
    let facets = stl_io::create_stl_reader(reader)?.enumerate();
    facets
        .map(|(index, facet)| {
            let corners = facet?
                .vertices
                .map(|vertex| glam::Vec3::from_array(vertex.0).as_dvec3() * unit);
            if corners.iter().all(|corner| corner.is_finite()) {
                Ok(corners)
            } else {
                Err(StlError::NotFinite { facet: index + 1 })
            }
        })
        .collect()
}

/// A length of the mesh as the file holds it: rounded to f32 in units of `unit` metres.
pub fn rounded(position: DVec3, unit: f64) -> DVec3 {
    (position / unit).as_vec3().as_dvec3() * unit
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::io::Cursor;

    fn wedge() -> (Vec<DVec3>, Vec<[u32; 3]>) {
        let positions = vec![
            DVec3::ZERO,
            DVec3::new(0.03, 0.0, 0.0),
            DVec3::new(0.0, 0.02, 0.0),
            DVec3::new(0.0, 0.0, 0.01),
        ];
        (positions, vec![[0, 2, 1], [0, 1, 3], [1, 2, 3], [2, 0, 3]])
    }

    fn written(name: &str) -> Vec<u8> {
        let (positions, triangles) = wedge();
        let mut bytes = Vec::new();
        let header = Header { name, unit: "mm" };
        write_stl(&mut bytes, &header, 1e-3, &positions, &triangles).unwrap();
        bytes
    }

    /// The layout of the format: 80 bytes, a count, 50 bytes a facet (common practice since the format's first description).
    #[test]
    fn header_count_and_length() {
        let bytes = written("solid Glocke für Nebel");
        assert_eq!(bytes.len(), 84 + 4 * 50);
        assert!(bytes.starts_with(b"strickle, unit mm: solid Glocke f?r Nebel   "));
        assert_eq!(bytes[80..84], 4_u32.to_le_bytes());
        // The first facet's normal: down.
        assert_eq!(
            bytes[84..96],
            [0.0_f32, 0.0, -1.0].map(f32::to_le_bytes).concat()
        );
    }

    #[test]
    fn what_is_read_is_what_was_written_rounded_to_f32() {
        let (positions, triangles) = wedge();
        let read = read_stl(&mut Cursor::new(written("wedge")), 1e-3).unwrap();
        let meant: Vec<[DVec3; 3]> = triangles
            .iter()
            .map(|t| t.map(|i| rounded(positions[i as usize], 1e-3)))
            .collect();
        assert_eq!(read, meant);
    }

    #[test]
    fn a_coordinate_that_is_no_number_is_named() {
        let mut bytes = written("wedge");
        bytes[84 + 50 + 12..84 + 50 + 16].copy_from_slice(&f32::NAN.to_le_bytes());
        let refused = read_stl(&mut Cursor::new(bytes), 1e-3).unwrap_err();
        assert_eq!(
            refused.to_string(),
            "facet 2 has a coordinate that is not a finite number"
        );
    }
}
