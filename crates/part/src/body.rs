//! Bodies: what each is made of and the outlines of its section.

use crate::fault::Found;
use crate::kind::side;
use crate::material::{Materials, density};
use crate::nearest::unknown_word;
use crate::outline::{Coordinate, Outline};
use crate::point::{CENTRE, target};
use crate::steps::{EdgeCount, Use, steps};
use crate::tree::{Entry, Fields, Keys, Kind, Value};
use crate::values::Values;
use crate::{Fault, LengthUnit, Material, Span};

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

/// Keys of a whole circle.
pub(crate) const CIRCLE: Keys = Keys {
    table: "a circle",
    known: &["circle", "radius"],
    meant: &[
        ("r", "`radius`"),
        ("d", "`radius`"),
        ("diameter", "`radius`"),
        ("centre", "`circle`"),
    ],
};

/// Keys of an outline from an SVG file.
pub(crate) const SVG: Keys = Keys {
    table: "an outline from an SVG file",
    known: &["svg", "id", "axis_x", "scale"],
    meant: &[("path", "`id`"), ("axis", "`axis_x`"), ("unit", "`scale`")],
};

/// Keys of an outline from a CSV file.
pub(crate) const CSV: Keys = Keys {
    table: "an outline from a CSV file",
    known: &["csv"],
    meant: &[],
};

/// Keys of a thin wall.
pub(crate) const WALL: Keys = Keys {
    table: "a wall",
    known: &["line", "thickness", "grow"],
    meant: &[
        ("outline", "`line`"),
        ("steps", "`line`"),
        ("side", "`grow`"),
        ("thick", "`thickness`"),
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
                    format!(
                        "two bodies are called `{}`",
                        crate::nearest::shown(&second.0)
                    ),
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

fn is_step(table: &crate::tree::Table<'_>) -> bool {
    ["circle", "svg", "csv"]
        .iter()
        .all(|key| table.get(key).is_none())
}

fn outline(
    value: &Value<'_>,
    what: &str,
    values: &Values<'_>,
    edges: &mut EdgeCount,
    found: &mut Found,
) -> Option<Outline> {
    let table = match &value.kind {
        Kind::List(_) => {
            let steps = steps(value, Use::Outline, values, edges, found)?;
            return Some(Outline::Steps(steps, value.span()));
        }
        Kind::Table(table) => table,
        _ => {
            value.expected(what, "a list of steps or a table", found);
            return None;
        }
    };
    let kinds = ["circle", "svg", "csv"];
    let mut given = kinds.iter().filter_map(|key| table.get(key));
    let Some(entry) = given.next() else {
        found.push(
            Fault::new(
                "outline::kind",
                format!("{what} in braces is a circle, or comes from a file"),
                value.span(),
                "",
            )
            .help("write { circle = { r = 50, z = 0 }, radius = 12 }, { svg = \"bell.svg\" } or { csv = \"stations.csv\" }; steps stand in brackets [..]"),
        );
        return None;
    };
    if let Some(second) = given.next() {
        found.push(
            Fault::new(
                "outline::two_kinds",
                format!(
                    "an outline has `{}` or `{}`, not both",
                    entry.key, second.key
                ),
                second.key_span(),
                "",
            )
            .also(entry.key_span(), "")
            .help("keep one of them"),
        );
        return None;
    }
    match &*entry.key {
        "circle" => circle(value, values, found),
        "svg" => svg(value, values, found),
        _ => csv(value, values, found),
    }
}

fn circle(value: &Value<'_>, values: &Values<'_>, found: &mut Found) -> Option<Outline> {
    let fields = Fields::open(value, &CIRCLE, found)?;
    let centre = fields.require(
        "circle",
        "give the centre: circle = { r = 50, z = 0 }",
        found,
    );
    let radius = fields.require("radius", "give the radius: radius = 12", found);
    let centre = centre.and_then(|entry| {
        let fields = Fields::open(&entry.value, &CENTRE, found)?;
        let centre = target(&fields, values, found)?;
        let absolute = |coordinate: Option<(Coordinate, Span)>| match coordinate {
            Some((Coordinate::At(value), _)) => Some(value),
            _ => None,
        };
        let both = absolute(centre.r).zip(absolute(centre.z));
        // Increments are unknown keys here, and have been reported.
        if both.is_none() {
            found.push(
                Fault::new(
                    "outline::circle_centre",
                    "the centre of a circle has both coordinates",
                    entry.value.span(),
                    "",
                )
                .help("write circle = { r = 50, z = 0 }"),
            );
        }
        both
    });
    let radius = radius.and_then(|entry| positive(&entry.value, "`radius`", values, found));
    let ((r, z), radius) = (centre?, radius?);
    Some(Outline::Circle {
        r,
        z,
        radius,
        span: value.span(),
    })
}

fn svg(value: &Value<'_>, values: &Values<'_>, found: &mut Found) -> Option<Outline> {
    let fields = Fields::open(value, &SVG, found)?;
    let entry = fields.get("svg")?;
    let file = file_name(&entry.value, "`svg`", found);
    let id = match fields.get("id") {
        Some(entry) => Some(entry.value.text("`id`", found)?.to_owned()),
        None => None,
    };
    let axis_x = match fields.get("axis_x") {
        Some(entry) => values.number(&entry.value, "`axis_x`", found)?,
        None => 0.0,
    };
    let scale = match fields.get("scale") {
        Some(entry) => Some(positive(&entry.value, "`scale`", values, found)?),
        None => None,
    };
    Some(Outline::Svg {
        file: file?,
        id,
        axis_x,
        scale,
        span: entry.value.span(),
    })
}

fn csv(value: &Value<'_>, values: &Values<'_>, found: &mut Found) -> Option<Outline> {
    let fields = Fields::open(value, &CSV, found)?;
    let entry = fields.get("csv")?;
    Some(Outline::Csv {
        file: file_name(&entry.value, "`csv`", found)?,
        unit: values.unit.to(LengthUnit::Metre, 1.0).of(1.0),
        span: entry.value.span(),
    })
}

/// A file beside the part file, or in a folder below: nothing else is read.
fn file_name(value: &Value<'_>, what: &str, found: &mut Found) -> Option<String> {
    let name = value.text(what, found)?;
    let outside = name.starts_with('/')
        || name.contains(['\\', ':', '\0'])
        || name.split('/').any(|part| part == "..");
    if outside {
        found.push(
            Fault::new(
                "outline::file_outside",
                "a file that an outline names stands in the part file's folder or below it",
                value.span(),
                "",
            )
            .help("copy the file beside the part file and give its name; folders are divided by /"),
        );
        return None;
    }
    Some(name.to_owned())
}

fn wall(
    value: &Value<'_>,
    values: &Values<'_>,
    edges: &mut EdgeCount,
    found: &mut Found,
) -> Option<Outline> {
    let fields = Fields::open(value, &WALL, found)?;
    let line = fields
        .require("line", "give the steps of one face: line = [ .. ]", found)
        .and_then(|entry| steps(&entry.value, Use::Wall, values, edges, found));
    let thickness = fields
        .require(
            "thickness",
            "give the wall's thickness: thickness = 2",
            found,
        )
        .and_then(|entry| positive(&entry.value, "`thickness`", values, found));
    let grow = fields
        .require(
            "grow",
            "say on which side of travel the wall is: grow = \"left\", \"right\" or \"both\"",
            found,
        )
        .and_then(|entry| {
            let word = entry.value.text("`grow`", found)?;
            match (side(word), word) {
                (Some(side), _) => Some(Some(side)),
                (None, "both") => Some(None),
                _ => {
                    found.push(unknown_word(
                        "wall::side",
                        "side for a wall",
                        word,
                        entry.value.span(),
                        &["left", "right", "both"],
                    ));
                    None
                }
            }
        });
    Some(Outline::Wall {
        line: line?,
        thickness: thickness?,
        grow: grow?,
        span: value.span(),
    })
}

/// A length above 0.
fn positive(value: &Value<'_>, what: &str, values: &Values<'_>, found: &mut Found) -> Option<f64> {
    let length = values.length(value, what, found)?;
    if length > 0.0 {
        return Some(length);
    }
    found.push(
        Fault::new(
            "value::not_positive",
            format!("{what} is more than 0"),
            value.span(),
            "",
        )
        .help("give a length above 0"),
    );
    None
}
