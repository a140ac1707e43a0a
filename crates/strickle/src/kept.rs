//! A mesh as it was kept: written, and read back.

use crate::Made;
use files::{StlError, ThreeMf, Unit, stl_facets};
use measure::{Welded, Welder};
use std::io::{Read, Seek};

/// What was read back of a mesh, and what rounds its coordinates.
#[derive(Debug, Clone)]
pub struct Kept {
    /// The file it was written to; `None` where it was written to memory.
    pub file: Option<String>,
    /// Unit of the file.
    pub unit: Unit,
    /// The bodies, metres.
    pub bodies: Vec<Welded>,
    /// What was not read back as it was written, in words.
    pub differences: Vec<String>,
}

impl Kept {
    /// Reads a mesh back that was written as binary STL; the format has no bodies, so that facets are given to them by
    /// their number.
    ///
    /// # Errors
    /// The file cannot be read or is no STL.
    pub fn stl<R: Read + Seek>(
        reader: &mut R,
        made: &Made,
        unit: Unit,
        file: Option<String>,
    ) -> Result<Self, StlError> {
        let mut facets = stl_facets(reader, unit.metres())?;
        let mut bodies = Vec::with_capacity(made.mesh.bodies.len());
        let mut count = 0_usize;
        for body in &made.mesh.bodies {
            let mut welder = Welder::with_room(body.triangles.len());
            for facet in facets.by_ref().take(body.triangles.len()) {
                welder.add(facet?);
                count += 1;
            }
            bodies.push(welder.finish());
        }
        count += facets.count();
        let written = made.mesh.triangles.len();
        let differences = (count != written)
            .then(|| format!("{count} facets were read back of {written} that were written"));
        Ok(Self {
            file,
            unit,
            bodies,
            differences: differences.into_iter().collect(),
        })
    }

    /// Compares what was read back of a 3MF with the mesh, number by number, and notes what differs.
    pub fn compare(&mut self, made: &Made, read: &ThreeMf) {
        let unit = read.unit.metres();
        let is_same = read.unit == self.unit
            && read.objects.len() == made.mesh.bodies.len()
            && read
                .objects
                .iter()
                .zip(&made.mesh.bodies)
                .all(|(object, body)| {
                    let positions = made.mesh.positions.get(body.positions.clone());
                    let triangles = made.mesh.triangles.get(body.triangles.clone());
                    let first = body.positions.start;
                    positions.is_some_and(|positions| {
                        let written = positions.iter().map(|p| *p / unit * unit);
                        object.positions.iter().copied().eq(written)
                    }) && triangles.is_some_and(|triangles| {
                        let written = triangles.iter().map(|t| t.map(|i| i as usize - first));
                        object
                            .triangles
                            .iter()
                            .map(|t| t.map(|i| i as usize))
                            .eq(written)
                    })
                });
        if !is_same {
            self.differences
                .push("the 3MF that was read back is not the mesh that was written".to_owned());
        }
    }
}
