//! Reading: the build's items as objects with their own corners in metres, components put in place.

use super::transform::Transform;
use super::{MODEL_PART, MODEL_RELATIONSHIP};
use crate::Unit;
use glam::DVec3;
use quick_xml::escape::resolve_predefined_entity;
use quick_xml::events::{BytesStart, Event};
use quick_xml::{Reader, XmlVersion};
use std::collections::HashMap;
use std::io::{self, BufRead, BufReader, Read, Seek};
use zip::ZipArchive;

/// More than this is not read out of a package, however small it is zipped.
const MOST_BYTES: u64 = 8 << 30;
/// Components in components, and no deeper.
const DEEPEST: usize = 16;
/// Triangles that components may multiply to.
const MOST_TRIANGLES: usize = 400_000_000;

/// What a 3MF holds.
#[derive(Debug, Clone, PartialEq)]
pub struct ThreeMf {
    /// The unit it is written in.
    pub unit: Unit,
    /// Its title, if it has one.
    pub title: Option<String>,
    /// What is to be built, item by item; an object of components is one for each of them.
    pub objects: Vec<Object>,
}

/// A mesh of a 3MF.
#[derive(Debug, Clone, PartialEq)]
pub struct Object {
    /// Its name, if it has one.
    pub name: Option<String>,
    /// Its base material's name, if it has one.
    pub material: Option<String>,
    /// Corners, metres.
    pub positions: Vec<DVec3>,
    /// Triangles by index; all are in range.
    pub triangles: Vec<[u32; 3]>,
}

/// Why a 3MF could not be read.
#[derive(Debug, thiserror::Error)]
#[non_exhaustive]
pub enum ThreeMfError {
    /// The file could not be read.
    #[error(transparent)]
    Io(#[from] io::Error),
    /// It is no zip, or a broken one.
    #[error("it is not a whole zip package: {0}")]
    Zip(#[from] zip::result::ZipError),
    /// The model is no XML.
    #[error("its model is not well-formed XML: {0}")]
    Xml(#[from] quick_xml::Error),
    /// The model is XML, and not as the specification has it.
    #[error("{0}")]
    Model(String),
}

/// Nothing but the core specification is read: what extensions add is not seen.
///
/// # Errors
/// See [`ThreeMfError`].
pub fn read_three_mf(reader: impl Read + Seek) -> Result<ThreeMf, ThreeMfError> {
    let mut package = ZipArchive::new(reader)?;
    let part = model_part(&mut package)?;
    let model = package.by_name(&part).map_err(|error| match error {
        zip::result::ZipError::FileNotFound => {
            ThreeMfError::Model(format!("the package has no model at {part}"))
        }
        other => other.into(),
    })?;
    let mut document = Document::default();
    document.read(BufReader::with_capacity(1 << 16, model.take(MOST_BYTES)))?;
    document.assemble()
}

/// The place of the model, by the package's relationships.
fn model_part<R: Read + Seek>(package: &mut ZipArchive<R>) -> Result<String, ThreeMfError> {
    let Ok(relationships) = package.by_name("_rels/.rels") else {
        return Ok(MODEL_PART.to_owned());
    };
    let mut xml = Reader::from_reader(BufReader::new(relationships.take(1 << 20)));
    let mut buffer = Vec::new();
    loop {
        match xml.read_event_into(&mut buffer)? {
            Event::Empty(element) | Event::Start(element) => {
                let attributes = Attributes::of(&element)?;
                if attributes.get("Type") == Some(MODEL_RELATIONSHIP)
                    && let Some(target) = attributes.get("Target")
                {
                    return Ok(target.trim_start_matches('/').to_owned());
                }
            }
            Event::Eof => return Ok(MODEL_PART.to_owned()),
            _ => {}
        }
        buffer.clear();
    }
}

/// An element's attributes without their prefixes.
struct Attributes(Vec<(String, String)>);

impl Attributes {
    fn of(element: &BytesStart) -> Result<Self, ThreeMfError> {
        element
            .attributes()
            .map(|attribute| {
                let attribute = attribute.map_err(quick_xml::Error::from)?;
                let name = attribute.key.local_name().into_inner().to_owned();
                let value = attribute
                    .normalized_value(XmlVersion::Implicit1_0)?
                    .into_owned();
                Ok((name, value))
            })
            .collect::<Result<_, ThreeMfError>>()
            .map(Self)
    }

    fn get(&self, name: &str) -> Option<&str> {
        let found = self.0.iter().find(|(own, _)| own == name);
        found.map(|(_, value)| value.as_str())
    }

    fn number<T: std::str::FromStr>(&self, name: &str, what: &str) -> Result<T, ThreeMfError> {
        let text = self
            .get(name)
            .ok_or_else(|| wrong(format!("a {what} has no {name}")))?;
        text.trim().parse().ok().ok_or_else(|| {
            wrong(format!(
                "{name}=\"{text}\" of a {what} is no number that fits"
            ))
        })
    }
}

fn wrong(message: impl Into<String>) -> ThreeMfError {
    ThreeMfError::Model(message.into())
}

/// What an object or the build refers to.
#[derive(Debug, Clone)]
struct Reference {
    object: u32,
    transform: Transform,
}

/// An object as it is written.
#[derive(Debug, Default)]
struct Written {
    name: Option<String>,
    material: Option<(u32, usize)>,
    positions: Vec<DVec3>,
    triangles: Vec<[u32; 3]>,
    components: Vec<Reference>,
}

/// The model's elements, as they are written.
#[derive(Debug, Default)]
struct Document {
    unit: Unit,
    title: Option<String>,
    /// Base materials by resource.
    materials: HashMap<u32, Vec<String>>,
    objects: HashMap<u32, Written>,
    items: Vec<Reference>,
    /// The resource or object that is being read.
    current: u32,
    in_title: bool,
}

impl Document {
    fn read(&mut self, reader: impl BufRead) -> Result<(), ThreeMfError> {
        let mut xml = Reader::from_reader(reader);
        let mut buffer = Vec::with_capacity(1 << 10);
        let mut is_model = false;
        loop {
            match xml.read_event_into(&mut buffer)? {
                Event::Start(element) | Event::Empty(element) => {
                    is_model |= element.local_name().as_ref() == "model";
                    self.element(&element)?;
                }
                Event::Text(text) if self.in_title => {
                    let text = text.xml10_content();
                    self.title.get_or_insert_default().push_str(&text);
                }
                Event::GeneralRef(entity) if self.in_title => {
                    let title = self.title.get_or_insert_default();
                    match entity.resolve_char_ref()? {
                        Some(character) => title.push(character),
                        None => title.push_str(resolve_predefined_entity(&entity).unwrap_or("")),
                    }
                }
                Event::End(element) if element.local_name().as_ref() == "metadata" => {
                    self.in_title = false;
                }
                // Entities could blow up, and a model has no use for them.
                Event::DocType(_) => {
                    return Err(wrong("its model has a document type, which 3MF forbids"));
                }
                Event::Eof if is_model => return Ok(()),
                Event::Eof => return Err(wrong("its model part holds no model")),
                _ => {}
            }
            buffer.clear();
        }
    }

    fn element(&mut self, element: &BytesStart) -> Result<(), ThreeMfError> {
        match element.local_name().as_ref() {
            "vertex" => self.vertex(element),
            "triangle" => self.triangle(element),
            "model" => {
                let attributes = Attributes::of(element)?;
                let word = attributes.get("unit").unwrap_or("millimeter");
                self.unit = Unit::ALL
                    .into_iter()
                    .find(|unit| unit.word_in_3mf() == word)
                    .ok_or_else(|| wrong(format!("its unit {word} is none that 3MF knows")))?;
                Ok(())
            }
            "metadata" => {
                self.in_title = Attributes::of(element)?.get("name") == Some("Title");
                Ok(())
            }
            "basematerials" => {
                self.current = Attributes::of(element)?.number("id", "basematerials")?;
                self.materials.insert(self.current, Vec::new());
                Ok(())
            }
            "base" => {
                let name = Attributes::of(element)?
                    .get("name")
                    .unwrap_or("")
                    .to_owned();
                self.materials.entry(self.current).or_default().push(name);
                Ok(())
            }
            "object" => self.object(element),
            "component" => {
                let reference = reference(element, "component")?;
                self.objects
                    .entry(self.current)
                    .or_default()
                    .components
                    .push(reference);
                Ok(())
            }
            "item" => {
                self.items.push(reference(element, "item")?);
                Ok(())
            }
            _ => Ok(()),
        }
    }

    fn object(&mut self, element: &BytesStart) -> Result<(), ThreeMfError> {
        let attributes = Attributes::of(element)?;
        self.current = attributes.number("id", "object")?;
        let material = match attributes.get("pid") {
            Some(_) => {
                let index = attributes.number("pindex", "object").unwrap_or(0);
                Some((attributes.number("pid", "object")?, index))
            }
            None => None,
        };
        let written = Written {
            name: attributes.get("name").map(ToOwned::to_owned),
            material,
            ..Written::default()
        };
        if self.objects.insert(self.current, written).is_some() {
            return Err(wrong(format!("two objects have the id {}", self.current)));
        }
        Ok(())
    }

    fn current(&mut self) -> Result<&mut Written, ThreeMfError> {
        self.objects
            .get_mut(&self.current)
            .ok_or_else(|| wrong("a mesh stands outside of an object"))
    }

    fn vertex(&mut self, element: &BytesStart) -> Result<(), ThreeMfError> {
        let [x, y, z] = numbers(element, ["x", "y", "z"], "vertex")?;
        let position = DVec3::new(x, y, z);
        if !position.is_finite() {
            return Err(wrong(
                "a vertex has a coordinate that is not a finite number",
            ));
        }
        self.current()?.positions.push(position);
        Ok(())
    }

    fn triangle(&mut self, element: &BytesStart) -> Result<(), ThreeMfError> {
        let triangle: [u32; 3] = numbers(element, ["v1", "v2", "v3"], "triangle")?;
        let written = self.current()?;
        let corners = written.positions.len();
        if triangle.iter().any(|i| *i as usize >= corners) {
            let number = written.triangles.len() + 1;
            return Err(wrong(format!(
                "triangle {number} has a corner that is not among the object's {corners} vertices"
            )));
        }
        written.triangles.push(triangle);
        Ok(())
    }

    /// The items with their components put in place, metres.
    fn assemble(mut self) -> Result<ThreeMf, ThreeMfError> {
        let items = std::mem::take(&mut self.items);
        let mut objects = Vec::new();
        let mut triangles = 0;
        for item in &items {
            self.place(item, DEEPEST, &mut triangles, &mut objects)?;
        }
        Ok(ThreeMf {
            unit: self.unit,
            title: self.title,
            objects,
        })
    }

    fn place(
        &self,
        reference: &Reference,
        depth: usize,
        triangles: &mut usize,
        objects: &mut Vec<Object>,
    ) -> Result<(), ThreeMfError> {
        let id = reference.object;
        let written = self.objects.get(&id).ok_or_else(|| {
            wrong(format!(
                "the build asks for object {id}, which is not there"
            ))
        })?;
        if !written.triangles.is_empty() {
            *triangles += written.triangles.len();
            if *triangles > MOST_TRIANGLES {
                return Err(wrong(format!(
                    "its items have more than {MOST_TRIANGLES} triangles"
                )));
            }
            objects.push(self.object_of(written, &reference.transform));
        }
        let Some(depth) = depth.checked_sub(1) else {
            return Err(wrong(format!(
                "its components lie more than {DEEPEST} deep in each other"
            )));
        };
        for component in &written.components {
            let inner = Reference {
                object: component.object,
                transform: component.transform.then(&reference.transform),
            };
            self.place(&inner, depth, triangles, objects)?;
            if objects.len() > MOST_TRIANGLES / 1000 {
                return Err(wrong("it has more objects than can be read"));
            }
        }
        Ok(())
    }

    fn object_of(&self, written: &Written, transform: &Transform) -> Object {
        let unit = self.unit.metres();
        let place = |p: &DVec3| {
            if transform.is_identity() {
                *p * unit
            } else {
                transform.apply(*p) * unit
            }
        };
        let mut triangles = written.triangles.clone();
        if transform.mirrors() {
            // A mirror turns the triangles' sense round, and with it what is inside.
            for [_, b, c] in &mut triangles {
                std::mem::swap(b, c);
            }
        }
        let material = written
            .material
            .and_then(|(resource, index)| self.materials.get(&resource)?.get(index).cloned());
        Object {
            name: written.name.clone(),
            material,
            positions: written.positions.iter().map(place).collect(),
            triangles,
        }
    }
}

fn reference(element: &BytesStart, what: &str) -> Result<Reference, ThreeMfError> {
    let attributes = Attributes::of(element)?;
    let transform = match attributes.get("transform") {
        None => Transform::IDENTITY,
        Some(text) => Transform::parse(text).ok_or_else(|| {
            wrong(format!(
                "the transform \"{text}\" of a {what} is not twelve numbers"
            ))
        })?,
    };
    Ok(Reference {
        object: attributes.number("objectid", what)?,
        transform,
    })
}

/// Three numbers of an element, without a copy of their text: there are millions of them.
fn numbers<T: std::str::FromStr + Copy + Default>(
    element: &BytesStart,
    names: [&str; 3],
    what: &str,
) -> Result<[T; 3], ThreeMfError> {
    let mut found = [None; 3];
    for attribute in element.attributes() {
        let attribute = attribute.map_err(quick_xml::Error::from)?;
        let key = attribute.key.local_name();
        if let Some(place) = names.iter().position(|name| *name == key.as_ref()) {
            let text: &str = &attribute.value;
            let number = text.trim().parse().ok().ok_or_else(|| {
                wrong(format!(
                    "{}=\"{text}\" of a {what} is no number that fits",
                    names[place]
                ))
            })?;
            found[place] = Some(number);
        }
    }
    let [Some(a), Some(b), Some(c)] = found else {
        return Err(wrong(format!("a {what} lacks one of {}", names.join(", "))));
    };
    Ok([a, b, c])
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::Format;
    use crate::sample::wedges;
    use std::io::{Cursor, Write as _};
    use zip::write::SimpleFileOptions;

    fn package(model: &str) -> Cursor<Vec<u8>> {
        let mut package = zip::ZipWriter::new(Cursor::new(Vec::new()));
        package
            .start_file(MODEL_PART, SimpleFileOptions::default())
            .unwrap();
        package.write_all(model.as_bytes()).unwrap();
        package.finish().unwrap()
    }

    fn model(inner: &str) -> String {
        format!(
            r#"<?xml version="1.0"?><model unit="inch" xmlns="{}">{inner}</model>"#,
            super::super::NAMESPACE
        )
    }

    const TETRAHEDRON: &str = r#"<mesh><vertices><vertex x="0" y="0" z="0"/><vertex x="1" y="0" z="0"/><vertex x="0" y="1" z="0"/><vertex x="0" y="0" z="1"/></vertices>
        <triangles><triangle v1="0" v2="2" v3="1"/><triangle v1="0" v2="1" v3="3"/><triangle v1="1" v2="2" v3="3"/><triangle v1="2" v2="0" v3="3"/></triangles></mesh>"#;

    #[test]
    fn what_is_read_is_what_was_written() {
        let sample = wedges();
        let written = sample.model("two <wedges> & more", Unit::Millimetre);
        let mut file = Cursor::new(Vec::new());
        Format::ThreeMf.write(&written, &mut file).unwrap();
        let mut again = Cursor::new(Vec::new());
        Format::ThreeMf.write(&written, &mut again).unwrap();
        assert_eq!(file, again, "the same bytes each time");
        let read = read_three_mf(file).unwrap();
        assert_eq!(read.unit, Unit::Millimetre);
        assert_eq!(read.title.as_deref(), Some("two <wedges> & more"));
        assert_eq!(read.objects.len(), 2);
        for (object, body) in read.objects.iter().zip(&written.bodies) {
            assert_eq!(object.name.as_deref(), Some(body.name));
            assert_eq!(object.material.as_deref(), Some("CC480K"));
            for (p, q) in object.positions.iter().zip(written.positions_of(body)) {
                assert!(p.distance(*q) <= 1e-16);
            }
            assert_eq!(
                object.triangles,
                [[0, 2, 1], [0, 1, 3], [1, 2, 3], [2, 0, 3]]
            );
        }
    }

    #[test]
    fn components_are_put_in_place_and_mirrors_turned() {
        let inner = format!(
            r#"<resources><object id="1">{TETRAHEDRON}</object>
            <object id="7"><components><component objectid="1" transform="-1 0 0 0 1 0 0 0 1 10 0 0"/></components></object></resources>
            <build><item objectid="7" transform="1 0 0 0 1 0 0 0 1 0 100 0"/><item objectid="1"/></build>"#
        );
        let read = read_three_mf(package(&model(&inner))).unwrap();
        assert_eq!(read.objects.len(), 2);
        let turned = &read.objects[0];
        assert_eq!(turned.positions[1], DVec3::new(9.0, 100.0, 0.0) * 0.0254);
        assert_eq!(turned.triangles[0], [0, 1, 2]);
        assert_eq!(read.objects[1].triangles[0], [0, 2, 1]);
    }

    #[test]
    fn what_is_wrong_is_told() {
        let refused = |text: &str| read_three_mf(package(text)).unwrap_err().to_string();
        let object = |mesh: &str| {
            model(&format!(
                r#"<resources><object id="1">{mesh}</object></resources><build><item objectid="1"/></build>"#
            ))
        };
        for (text, told) in [
            (
                object(&TETRAHEDRON.replace("v3=\"3\"", "v3=\"4\"")),
                "triangle 2 has a corner that is not among the object's 4 vertices",
            ),
            (
                object(&TETRAHEDRON.replace("x=\"1\"", "x=\"nan\"")),
                "a vertex has a coordinate that is not a finite number",
            ),
            (
                object(&TETRAHEDRON.replace("x=\"1\"", "x=\"one\"")),
                "x=\"one\" of a vertex is no number that fits",
            ),
            (
                object(&TETRAHEDRON.replace("v1=\"0\"", "v1=\"-1\"")),
                "v1=\"-1\" of a triangle is no number that fits",
            ),
            (
                object(&TETRAHEDRON.replace("x=\"1\"", "")),
                "a vertex lacks one of x, y, z",
            ),
            (
                model(r#"<build><item objectid="3"/></build>"#),
                "the build asks for object 3, which is not there",
            ),
            (
                model(
                    r#"<resources><object id="1"><components><component objectid="1"/></components></object></resources><build><item objectid="1"/></build>"#,
                ),
                "its components lie more than 16 deep in each other",
            ),
            ("<html/>".to_owned(), "its model part holds no model"),
            (
                model("").replace("inch", "league"),
                "its unit league is none that 3MF knows",
            ),
            (
                format!("<!DOCTYPE model [<!ENTITY a \"b\">]>{}", model("")),
                "its model has a document type, which 3MF forbids",
            ),
        ] {
            assert_eq!(refused(&text), told);
        }
        assert!(refused("<model").starts_with("its model is not well-formed XML"));
        let no_zip = read_three_mf(Cursor::new(b"solid bell".to_vec())).unwrap_err();
        assert!(
            no_zip
                .to_string()
                .starts_with("it is not a whole zip package")
        );
    }
}
