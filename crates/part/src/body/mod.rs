//! Bodies: what each is made of and the outlines of its section.

mod outline;
mod wall;

#[cfg(test)]
pub(crate) use outline::{CIRCLE, CSV, SVG};
#[cfg(test)]
pub(crate) use wall::WALL;

use crate::fault::Found;
use crate::material::{Materials, density};
use crate::nearest::shown;
use crate::outline::Outline;
use crate::steps::EdgeCount;
use crate::tree::{Entry, Fields, Keys, Kind, Table, Value};
use crate::values::Values;
use crate::{Fault, Material, Span};
use outline::outline;
use wall::wall;

/// Keys of a `[[body]]`.
pub(crate) const BODY: Keys = Keys {
    table: "a [[body]]",
    known: &["name", "material", "density", "outline", "wall", "voids"],
    meant: &[
        ("void", "`voids`"),
        ("holes", "`voids`"),
        ("hole", "`voids`"),
        ("profile", "`outline`"),
        ("steps", "`outline`"),
        ("section", "`outline`"),
        (
            "thickness",
            "`wall = { line = [..], thickness = 2, grow = \"left\" }`",
        ),
    ],
};

/// A body before its geometry is built.
#[derive(Debug)]
pub(crate) struct Draft {
    pub(crate) name: String,
    pub(crate) material: Material,
    pub(crate) outline: Outline,
    pub(crate) voids: Vec<Outline>,
    pub(crate) span: Span,
}

/// The bodies under `[[body]]`, those without a fault of their own.
pub(crate) fn bodies(
    entry: &Entry<'_>,
    values: &Values<'_>,
    materials: &Materials<'_>,
    found: &mut Found,
) -> Vec<Draft> {
    let mut edges = EdgeCount::default();
    let items = match &entry.value.kind {
        Kind::Table(_) => {
            found.push(
                Fault::new(
                    "body::single_brackets",
                    "bodies stand in double brackets, since there can be several",
                    entry.value.span(),
                    "",
                )
                .help("write [[body]]"),
            );
            std::slice::from_ref(&entry.value)
        }
        _ => match entry.value.list("`body`", found) {
            Some(items) => items,
            None => return Vec::new(),
        },
    };
    let mut names: Vec<(String, Span)> = Vec::new();
    let mut drafts = Vec::new();
    for item in items {
        if found.is_enough() {
            break;
        }
        drafts.extend(body(item, values, materials, &mut edges, &mut names, found));
    }
    check_names(&names, found);
    drafts
}

fn check_names(names: &[(String, Span)], found: &mut Found) {
    let mut sorted: Vec<&(String, Span)> = names.iter().collect();
    sorted.sort_by(|a, b| a.0.cmp(&b.0).then(a.1.start.cmp(&b.1.start)));
    for pair in sorted.windows(2) {
        if let [first, second] = pair
            && first.0 == second.0
        {
            found.push(
                Fault::new(
                    "body::name_twice",
                    format!("two bodies are called `{}`", shown(&second.0)),
                    second.1.clone(),
                    "the second",
                )
                .also(first.1.clone(), "the first")
                .help("give each body a name of its own"),
            );
        }
    }
}

fn body(
    item: &Value<'_>,
    values: &Values<'_>,
    materials: &Materials<'_>,
    edges: &mut EdgeCount,
    names: &mut Vec<(String, Span)>,
    found: &mut Found,
) -> Option<Draft> {
    let fields = Fields::open(item, &BODY, found)?;
    // Everything is read before anything is given up, so that each fault is told.
    let name = fields
        .require("name", "name the body: name = \"wheel\"", found)
        .and_then(|entry| {
            let name = entry.value.text("`name`", found)?.to_owned();
            names.push((name.clone(), entry.value.span()));
            Some(name)
        });
    let material = material(&fields, values, materials, found);
    let outline = section(&fields, values, edges, found);
    let voids = match fields.get("voids") {
        Some(entry) => voids(&entry.value, values, edges, found),
        None => Some(Vec::new()),
    };
    Some(Draft {
        name: name?,
        material: material?,
        outline: outline?,
        voids: voids?,
        span: fields.span(),
    })
}

fn material(
    fields: &Fields<'_, '_>,
    values: &Values<'_>,
    materials: &Materials<'_>,
    found: &mut Found,
) -> Option<Material> {
    match (fields.get("material"), fields.get("density")) {
        (Some(material), Some(density)) => {
            found.push(
                Fault::new(
                    "body::material_and_density",
                    "a body has a material or a density, not both",
                    density.key_span(),
                    "",
                )
                .also(material.key_span(), "")
                .help("the material has its density; to use another one, leave the material out"),
            );
            None
        }
        (Some(entry), None) => {
            let word = entry.value.text("`material`", found)?.trim();
            Some(match materials.index(word) {
                Some(index) => Material::Own(index),
                None => Material::Designation {
                    word: word.to_owned(),
                    span: entry.value.span(),
                },
            })
        }
        (None, Some(entry)) => density(&entry.value, values, found).map(Material::Density),
        (None, None) if fields.slipped(&["material", "density"]) => None,
        (None, None) => {
            found.push(
                Fault::new(
                    "body::no_material",
                    "this body does not say what it is made of",
                    fields.span(),
                    "",
                )
                .help("write material = \"CC480K\", or density = \"8800 kg/m3\""),
            );
            None
        }
    }
}

/// The outline or the wall.
fn section(
    fields: &Fields<'_, '_>,
    values: &Values<'_>,
    edges: &mut EdgeCount,
    found: &mut Found,
) -> Option<Outline> {
    match (fields.get("outline"), fields.get("wall")) {
        (Some(outline_entry), Some(wall_entry)) => {
            found.push(
                Fault::new(
                    "body::outline_and_wall",
                    "a body has an outline or a wall, not both",
                    wall_entry.key_span(),
                    "",
                )
                .also(outline_entry.key_span(), "")
                .help("keep one of them; a second body can touch the first"),
            );
            None
        }
        (Some(entry), None) => outline(&entry.value, "`outline`", values, edges, found),
        (None, Some(entry)) => wall(&entry.value, values, edges, found),
        (None, None) if fields.slipped(&["outline", "wall"]) => None,
        (None, None) => {
            found.push(
                Fault::new(
                    "body::no_outline",
                    "this body has no outline",
                    fields.span(),
                    "",
                )
                .help("give its section: outline = [ { d = 40, z = 0 }, { d = 60 }, { z = 12 } ]"),
            );
            None
        }
    }
}

fn voids(
    value: &Value<'_>,
    values: &Values<'_>,
    edges: &mut EdgeCount,
    found: &mut Found,
) -> Option<Vec<Outline>> {
    let items = value.list("`voids`", found)?;
    // A single void without the outer brackets is a list of steps.
    if let Some(first) = items.first()
        && matches!(&first.kind, Kind::Table(table) if is_step(table))
    {
        found.push(
            Fault::new(
                "body::voids_brackets",
                "`voids` is a list of outlines, and this is a list of steps",
                first.span(),
                "",
            )
            .help("put brackets around each void: voids = [ [ { r = 40, z = 200 }, .. ] ]"),
        );
        return None;
    }
    let read: Vec<Option<Outline>> = items
        .iter()
        .map(|item| outline(item, "a void", values, edges, found))
        .collect();
    read.into_iter().collect()
}

fn is_step(table: &Table<'_>) -> bool {
    ["circle", "svg", "csv"]
        .iter()
        .all(|key| table.get(key).is_none())
}
