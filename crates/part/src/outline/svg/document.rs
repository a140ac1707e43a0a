//! One pass through an SVG document: the shape that is asked for, and how large the drawing is.
//!
//! Nothing outside the text is ever asked for. A document type definition, which could define entities, is refused.

use super::Refusal;
use super::transform;
use crate::nearest::{advice, shown};
use crate::outline::beside;
use glam::DAffine2;
use quick_xml::Reader;
use quick_xml::events::{BytesStart, Event};

/// Elements inside each other.
const DEPTH: usize = 200;

/// `id`s that a message lists.
const LISTED: usize = 12;

/// Elements that are drawn as an outline.
const SHAPES: [&str; 6] = ["path", "rect", "circle", "ellipse", "polygon", "polyline"];

/// Elements whose content is not drawn in its place, or in a coordinate system of its own.
const APART: [&str; 8] = [
    "defs",
    "symbol",
    "clipPath",
    "mask",
    "marker",
    "pattern",
    "svg",
    "foreignObject",
];

/// Attributes of the outermost element.
#[derive(Debug, Default)]
pub(super) struct Root {
    pub(super) width: Option<String>,
    pub(super) height: Option<String>,
    pub(super) view_box: Option<String>,
}

/// A shape.
#[derive(Debug)]
pub(super) struct Shape {
    /// Its element's name.
    pub(super) element: String,
    /// Its attributes as written, in order.
    pub(super) attributes: Vec<(String, String)>,
    /// From its coordinates to those of the document.
    pub(super) to_document: DAffine2,
    /// Where in the text it starts.
    at: usize,
}

impl Shape {
    /// Line of `text`, the document, that it starts on.
    pub(super) fn line(&self, text: &str) -> usize {
        beside::line(text, self.at)
    }

    /// The value of `name`.
    pub(super) fn attribute(&self, name: &str) -> Option<&str> {
        let found = self.attributes.iter().find(|(key, _)| key == name);
        found.map(|(_, value)| &**value)
    }
}

/// An open element.
#[derive(Debug, Clone)]
struct Level {
    to_document: DAffine2,
    /// Name of the element around that keeps it from being drawn in its place.
    apart: Option<&'static str>,
    /// It or an element around it has a transform in CSS.
    has_css_transform: bool,
}

struct Pass<'a> {
    text: &'a str,
    id: Option<&'a str>,
    root: Option<Root>,
    /// Prefix of the SVG elements' names, with its colon.
    prefix: String,
    open: Vec<Level>,
    found: Option<Shape>,
    /// Shapes that could have been meant, without `id`.
    count: usize,
    ids: Vec<String>,
    in_style: bool,
    sheet_has_transform: bool,
}

/// The shape with this `id`, or the only one that is drawn.
///
/// # Errors
/// The text is not an SVG document that can be read, or there is no such shape.
pub(super) fn find(text: &str, id: Option<&str>) -> Result<(Root, Shape), Refusal> {
    let mut pass = Pass {
        text,
        id,
        root: None,
        prefix: String::new(),
        open: Vec::new(),
        found: None,
        count: 0,
        ids: Vec::new(),
        in_style: false,
        sheet_has_transform: false,
    };
    let mut reader = Reader::from_str(text);
    loop {
        let at = offset(reader.buffer_position());
        let event = reader.read_event().map_err(|error| {
            let line = beside::line(text, offset(reader.error_position()));
            Refusal::new("svg::xml", format!("line {line} is not XML: {error}"))
                .help("save the drawing again as plain SVG")
        })?;
        match event {
            Event::Start(element) => pass.element(&element, at, true)?,
            Event::Empty(element) => pass.element(&element, at, false)?,
            Event::End(_) => {
                pass.open.pop();
                pass.in_style = false;
            }
            Event::Text(content) if pass.in_style => pass.style(&content),
            Event::CData(content) if pass.in_style => pass.style(&content),
            Event::DocType(_) => {
                return Err(Refusal::new(
                    "svg::dtd",
                    "it has a document type definition, which is not read".to_owned(),
                )
                .help(
                    "take out the <!DOCTYPE ..> line; nothing outside the file is ever fetched",
                ));
            }
            Event::Eof if !pass.open.is_empty() => {
                let message = "it ends before all of its elements do".to_owned();
                return Err(
                    Refusal::new("svg::xml", message).help("save the drawing again as plain SVG")
                );
            }
            Event::Eof => break,
            _ => {}
        }
    }
    pass.finish()
}

/// A position in a text in memory.
fn offset(position: u64) -> usize {
    usize::try_from(position).unwrap_or(usize::MAX)
}

impl Pass<'_> {
    fn element(&mut self, start: &BytesStart<'_>, at: usize, opens: bool) -> Result<(), Refusal> {
        let name = start.name();
        let name: &str = name.as_ref();
        if self.root.is_none() {
            let (prefix, local) = name.rsplit_once(':').map_or(("", name), |(p, l)| (p, l));
            if local != "svg" {
                return Err(Refusal::new(
                    "svg::not_svg",
                    format!(
                        "it is no SVG drawing: its outermost element is <{}>",
                        shown(name)
                    ),
                )
                .help("save the drawing as plain SVG"));
            }
            if !prefix.is_empty() {
                self.prefix = format!("{prefix}:");
            }
        }
        if self.open.len() >= DEPTH {
            return Err(Refusal::new(
                "svg::nesting",
                format!("its elements stand in each other more than {DEPTH} deep"),
            )
            .help("ungroup the drawing and save it again"));
        }
        let element = name.strip_prefix(&*self.prefix).unwrap_or("");
        let is_shape = SHAPES.contains(&element);
        let is_root = self.root.is_none();
        let mut level = self.open.last().cloned().unwrap_or(Level {
            to_document: DAffine2::IDENTITY,
            apart: None,
            has_css_transform: false,
        });
        let line = |text| beside::line(text, at);
        let mut root = Root::default();
        let mut attributes = Vec::new();
        // Checks for an attribute given twice take the square of their number.
        for attribute in start.attributes().with_checks(false) {
            let attribute = attribute.map_err(|error| self.broken(at, &error.to_string()))?;
            let key: &str = attribute.key.as_ref();
            let wanted = is_shape || matches!(key, "transform" | "style" | "transform-origin");
            if !wanted && !is_root {
                continue;
            }
            let value = attribute
                .normalized_value(quick_xml::XmlVersion::Implicit1_0)
                .map_err(|error| self.broken(at, &error.to_string()))?;
            match key {
                "transform" => {
                    let own = transform::list(&value).map_err(|error| {
                        Refusal::new(
                            "svg::transform",
                            format!(
                                "the transform on line {} cannot be read: {error}",
                                line(self.text)
                            ),
                        )
                        .help("write it as in transform=\"translate(10 20) rotate(90)\"")
                    })?;
                    level.to_document *= own;
                }
                "style" => level.has_css_transform |= has_transform(&value),
                "transform-origin" => level.has_css_transform = true,
                "width" if is_root => root.width = Some(value.into_owned()),
                "height" if is_root => root.height = Some(value.into_owned()),
                "viewBox" if is_root => root.view_box = Some(value.into_owned()),
                _ if is_shape => attributes.push((key.to_owned(), value.into_owned())),
                _ => {}
            }
        }
        if is_root {
            self.root = Some(root);
        } else if let Some(&apart) = APART.iter().find(|apart| **apart == element) {
            level.apart.get_or_insert(apart);
        }
        if is_shape {
            self.shape(
                Shape {
                    element: element.to_owned(),
                    attributes,
                    to_document: level.to_document,
                    at,
                },
                &level,
            )?;
        }
        if opens {
            self.in_style = element == "style";
            self.open.push(level);
        }
        Ok(())
    }

    fn broken(&self, at: usize, error: &str) -> Refusal {
        let line = beside::line(self.text, at);
        Refusal::new("svg::xml", format!("line {line} is not XML: {error}"))
            .help("save the drawing again as plain SVG")
    }

    fn style(&mut self, content: &str) {
        self.sheet_has_transform |= has_transform(content);
    }

    /// Takes `shape` if it is the one, or could be.
    fn shape(&mut self, shape: Shape, level: &Level) -> Result<(), Refusal> {
        let id = shape.attribute("id").unwrap_or("").to_owned();
        let is_meant = match self.id {
            Some(wanted) => wanted == id && self.found.is_none(),
            None => level.apart.is_none(),
        };
        if !id.is_empty() && self.ids.len() < LISTED {
            self.ids.push(id);
        }
        if !is_meant {
            return Ok(());
        }
        self.count += 1;
        if self.count > 1 {
            return Ok(());
        }
        if let Some(apart) = level.apart.filter(|&apart| apart != "defs") {
            return Err(Refusal::new(
                "svg::apart",
                format!(
                    "the shape on line {} stands inside <{apart}>",
                    shape.line(self.text)
                ),
            )
            .help("its size and place depend on where it is used; move it to the drawing itself"));
        }
        if level.has_css_transform {
            return Err(css_transform(&format!(
                "the shape on line {}",
                shape.line(self.text)
            )));
        }
        self.found = Some(shape);
        Ok(())
    }

    fn finish(self) -> Result<(Root, Shape), Refusal> {
        let Some(root) = self.root else {
            return Err(Refusal::new(
                "svg::not_svg",
                "it is no SVG drawing: it has no element".to_owned(),
            )
            .help("save the drawing as plain SVG"));
        };
        let ids: Vec<&str> = self.ids.iter().map(|id| &**id).collect();
        let Some(shape) = self.found else {
            return Err(match self.id {
                Some(wanted) if !ids.is_empty() => Refusal::new(
                    "svg::unknown_id",
                    format!("it has no shape with the id `{}`", shown(wanted)),
                )
                .help(advice(wanted, &ids)),
                Some(wanted) => Refusal::new(
                    "svg::unknown_id",
                    format!("it has no shape with the id `{}`", shown(wanted)),
                )
                .help("no shape of the drawing has an id; give the section's path one"),
                None => Refusal::new(
                    "svg::no_shape",
                    "it has no path, and no other shape that is drawn".to_owned(),
                )
                .help("draw the section as one closed path; texts and pictures are not read"),
            });
        };
        if self.id.is_none() && self.count > 1 {
            let known = if ids.is_empty() {
                "give the section's path an id, and name it here: id = \"section\"".to_owned()
            } else {
                format!(
                    "say which one is the section: id = ..; {}",
                    advice("", &ids)
                )
            };
            return Err(Refusal::new(
                "svg::several_shapes",
                format!("it has {} shapes", self.count),
            )
            .help(known));
        }
        if self.sheet_has_transform {
            return Err(css_transform("its style sheet"));
        }
        Ok((root, shape))
    }
}

fn css_transform(what: &str) -> Refusal {
    Refusal::new(
        "svg::css_transform",
        format!("{what} has a transform in CSS, which is not read"),
    )
    .help("write it as the attribute transform=\"..\", or draw the section where it belongs")
}

/// True where the CSS declarations `text` have one that moves what is drawn.
fn has_transform(text: &str) -> bool {
    const MOVES: [&str; 5] = ["transform", "translate", "rotate", "scale", "d"];
    text.split([';', '{', '}'])
        .filter_map(|declaration| declaration.split_once(':'))
        .any(|(property, _)| {
            let property = property.trim();
            // A comment may stand before it.
            let property = property.rsplit("*/").next().unwrap_or(property).trim();
            MOVES
                .iter()
                .any(|moves| property.eq_ignore_ascii_case(moves))
        })
}
