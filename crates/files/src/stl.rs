//! Binary STL: 80 bytes of header, the count of facets, 50 bytes a facet. No unit of its own; coordinates are f32.
//!
//! Written and read by stl_io. Its writer leaves the header blank; ours says the part's name and the unit in it, and never
//! begins with `solid`, which readers take for the text form.

use glam::DVec3;
use std::collections::HashMap;
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

/// Reads a binary STL that this program wrote: corners that are equal bit for bit become one. Metres, with `unit` metres a
/// number of the file.
///
/// # Errors
/// See [`StlError`].
pub fn read_stl(
    reader: &mut (impl Read + Seek),
    unit: f64,
) -> Result<(Vec<DVec3>, Vec<[u32; 3]>), StlError> {
    let mut positions = Vec::new();
    let mut triangles = Vec::new();
    let mut numbers: HashMap<[u32; 3], u32> = HashMap::new();
    for (index, facet) in stl_io::create_stl_reader(reader)?.enumerate() {
        let mut triangle = [0; 3];
        for (corner, vertex) in triangle.iter_mut().zip(facet?.vertices) {
            if !vertex.0.iter().all(|x| x.is_finite()) {
                return Err(StlError::NotFinite { facet: index + 1 });
            }
            // -0.0 and 0.0 are one place.
            let key = vertex.0.map(|x| (x + 0.0).to_bits());
            *corner = *numbers.entry(key).or_insert_with(|| {
                positions.push(glam::Vec3::from_array(vertex.0).as_dvec3() * unit);
                u32::try_from(positions.len() - 1).unwrap_or(u32::MAX)
            });
        }
        triangles.push(triangle);
    }
    Ok((positions, triangles))
}
