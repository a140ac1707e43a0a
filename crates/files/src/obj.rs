//! Wavefront OBJ: text, f64 written so that it is read back bit for bit, one object a body, no unit of its own.

use crate::Model;
use crate::model::on_one_line;
use std::io::{self, Write};

pub(crate) fn write(writer: &mut impl Write, model: &Model) -> io::Result<()> {
    writeln!(writer, "# {}", on_one_line(model.name))?;
    writeln!(
        writer,
        "# written by strickle, unit {}",
        model.unit.symbol()
    )?;
    for body in &model.bodies {
        writeln!(writer, "# material {}", on_one_line(body.material))?;
        writeln!(writer, "o {}", on_one_line(body.name))?;
        for position in model.positions_of(body) {
            let p = model.in_unit(*position);
            writeln!(writer, "v {} {} {}", p.x, p.y, p.z)?;
        }
        // Corners are counted from 1 over the whole file.
        for [a, b, c] in model.triangles_of(body) {
            let [a, b, c] = [a, b, c].map(|i| u64::from(*i) + 1);
            writeln!(writer, "f {a} {b} {c}")?;
        }
    }
    Ok(())
}

#[cfg(test)]
mod tests {
    use crate::sample::wedges;
    use crate::{Format, Unit};
    use std::io::Cursor;

    #[test]
    fn one_object_a_body_with_corners_counted_on() {
        let mut file = Cursor::new(Vec::new());
        let sample = wedges();
        Format::Obj
            .write(&sample.model("two\nwedges", Unit::Millimetre), &mut file)
            .unwrap();
        let text = String::from_utf8(file.into_inner()).unwrap();
        let lines: Vec<&str> = text.lines().collect();
        assert_eq!(lines[0], "# two wedges");
        assert_eq!(lines[2..5], ["# material CC480K", "o left", "v 0 0 0"]);
        assert_eq!(lines[8], "f 1 3 2");
        assert_eq!(lines[13], "o right");
        assert_eq!(lines[18], "f 5 7 6");
        assert_eq!(lines.len(), 22);
    }
}
