//! STL as text: `solid`, facets with their normal and corners, `endsolid`. Numbers are the f32 of the binary form, written
//! so that they are read back bit for bit. All bodies stand in one solid: many readers stop at the end of the first.

use super::facet;
use crate::Model;
use crate::model::on_one_line;
use std::io::{self, Write};

pub(crate) fn write(writer: &mut impl Write, model: &Model) -> io::Result<()> {
    let name = on_one_line(model.name);
    let title = format!("{} unit {}", name.trim(), model.unit.symbol());
    writeln!(writer, "solid {title}")?;
    for triangle in model.triangles {
        let corners = triangle.map(|i| {
            let position = model.positions[i as usize];
            model.in_unit(position).as_vec3().to_array()
        });
        let facet = facet(corners);
        let [x, y, z] = facet.normal.0;
        writeln!(writer, "  facet normal {x:e} {y:e} {z:e}\n    outer loop")?;
        for [x, y, z] in corners {
            writeln!(writer, "      vertex {x:e} {y:e} {z:e}")?;
        }
        writeln!(writer, "    endloop\n  endfacet")?;
    }
    writeln!(writer, "endsolid {title}")
}

#[cfg(test)]
mod tests {
    use crate::sample::wedges;
    use crate::{Format, Unit};
    use std::io::Cursor;

    /// stl_io reads the text form by itself.
    #[test]
    fn the_text_holds_the_facets_of_the_bytes() {
        let sample = wedges();
        let model = sample.model("wedges", Unit::Centimetre);
        let read = [Format::StlText, Format::Stl].map(|format| {
            let mut file = Cursor::new(Vec::new());
            format.write(&model, &mut file).unwrap();
            file.set_position(0);
            let facets: Vec<_> = stl_io::create_stl_reader(&mut file)
                .unwrap()
                .map(Result::unwrap)
                .collect();
            facets
        });
        assert_eq!(read[0].len(), 8);
        assert_eq!(read[0], read[1]);
    }
}
