//! Writing: f64 as text that is read back bit for bit, the bodies' names, their materials' names, the unit.

use super::package::{CONTENT_TYPES, relationships};
use super::{MODEL_PART, NAMESPACE};
use crate::model::{Model, on_one_line};
use quick_xml::Writer;
use quick_xml::events::{BytesDecl, BytesText, Event};
use std::io::{self, Seek, Write};
use zip::ZipWriter;
use zip::write::SimpleFileOptions;

/// What a material without a look of its own is shown in, sRGB: 3MF asks for a colour.
const COLOUR: &str = "#9C9C94";
/// The materials' resource; the bodies are numbered from the next.
const MATERIALS: usize = 1;

pub(crate) fn write(writer: &mut (impl Write + Seek), model: &Model) -> io::Result<()> {
    // The time of writing would make each file another.
    let options = SimpleFileOptions::default()
        .last_modified_time(zip::DateTime::default())
        .large_file(model.triangles.len() > 20_000_000);
    let mut package = ZipWriter::new(writer);
    package.start_file("[Content_Types].xml", options)?;
    package.write_all(CONTENT_TYPES.as_bytes())?;
    package.start_file("_rels/.rels", options)?;
    package.write_all(relationships().as_bytes())?;
    package.start_file(MODEL_PART, options)?;
    let mut buffered = io::BufWriter::with_capacity(1 << 16, &mut package);
    document(&mut Writer::new(&mut buffered), model)?;
    buffered.flush()?;
    drop(buffered);
    package.finish()?;
    Ok(())
}

fn document<W: Write>(xml: &mut Writer<W>, model: &Model) -> io::Result<()> {
    xml.write_event(Event::Decl(BytesDecl::new("1.0", Some("UTF-8"), None)))?;
    xml.create_element("model")
        .with_attributes([
            ("unit", model.unit.word_in_3mf()),
            ("xml:lang", "en"),
            ("xmlns", NAMESPACE),
        ])
        .write_inner_content(|xml| {
            metadata(xml, "Title", model.name)?;
            metadata(
                xml,
                "Application",
                concat!("Strickle ", env!("CARGO_PKG_VERSION")),
            )?;
            xml.create_element("resources").write_inner_content(|xml| {
                materials(xml, model)?;
                (0..model.bodies.len()).try_for_each(|index| object(xml, model, index))
            })?;
            xml.create_element("build").write_inner_content(|xml| {
                (0..model.bodies.len()).try_for_each(|index| {
                    let id = object_id(index).to_string();
                    xml.create_element("item")
                        .with_attribute(("objectid", id.as_str()))
                        .write_empty()?;
                    Ok(())
                })
            })?;
            Ok(())
        })?;
    Ok(())
}

fn metadata<W: Write>(xml: &mut Writer<W>, name: &str, text: &str) -> io::Result<()> {
    xml.create_element("metadata")
        .with_attribute(("name", name))
        .write_text_content(BytesText::new(&on_one_line(text)))?;
    Ok(())
}

fn object_id(body: usize) -> usize {
    MATERIALS + 1 + body
}

/// One base material a body, in the bodies' order.
fn materials<W: Write>(xml: &mut Writer<W>, model: &Model) -> io::Result<()> {
    let id = MATERIALS.to_string();
    xml.create_element("basematerials")
        .with_attribute(("id", id.as_str()))
        .write_inner_content(|xml| {
            model.bodies.iter().try_for_each(|body| {
                let name = on_one_line(body.material);
                xml.create_element("base")
                    .with_attributes([("name", name.as_str()), ("displaycolor", COLOUR)])
                    .write_empty()?;
                Ok(())
            })
        })?;
    Ok(())
}

fn object<W: Write>(xml: &mut Writer<W>, model: &Model, index: usize) -> io::Result<()> {
    let body = &model.bodies[index];
    let (id, material) = (object_id(index).to_string(), index.to_string());
    let resource = MATERIALS.to_string();
    let name = on_one_line(body.name);
    xml.create_element("object")
        .with_attributes([
            ("id", id.as_str()),
            ("type", "model"),
            ("name", name.as_str()),
            ("pid", resource.as_str()),
            ("pindex", material.as_str()),
        ])
        .write_inner_content(|xml| {
            xml.create_element("mesh").write_inner_content(|xml| {
                // Two elements a triangle: written plainly, since they hold nothing but numbers.
                xml.create_element("vertices").write_inner_content(|xml| {
                    let out = xml.get_mut();
                    model.positions_of(body).iter().try_for_each(|position| {
                        let p = model.in_unit(*position);
                        write!(out, r#"<vertex x="{}" y="{}" z="{}"/>"#, p.x, p.y, p.z)
                    })
                })?;
                xml.create_element("triangles").write_inner_content(|xml| {
                    let out = xml.get_mut();
                    model.triangles_of(body).iter().try_for_each(|triangle| {
                        // Corners are counted from the body's first.
                        let [a, b, c] = triangle.map(|i| i as usize - body.positions.start);
                        write!(out, r#"<triangle v1="{a}" v2="{b}" v3="{c}"/>"#)
                    })
                })?;
                Ok(())
            })?;
            Ok(())
        })?;
    Ok(())
}
