//! The materials of a part's bodies, looked up.

use crate::Source;
use part::{Fault, Faults, Material, Part, Span};
use shop::Table;

/// What a body is made of, looked up.
#[derive(Debug, Clone, PartialEq)]
pub struct BodyMaterial {
    /// Its designation; `None` where the file gives a bare density.
    pub designation: Option<String>,
    /// Density, kg/m3.
    pub density: f64,
    /// Least and greatest density, kg/m3.
    pub range: Option<[f64; 2]>,
}

/// What the bodies of `part` are made of, in their order.
///
/// # Errors
/// All designations that are not in the table.
pub(crate) fn of_bodies(
    part: &Part,
    source: Source<'_>,
    table: &Table,
) -> Result<Vec<BodyMaterial>, Faults> {
    let mut faults = Vec::new();
    let materials = part
        .bodies
        .iter()
        .filter_map(|body| {
            of_body(&body.material, part, table)
                .map_err(|fault| faults.push(fault))
                .ok()
        })
        .collect();
    match Faults::of(source.file, &String::from_utf8_lossy(source.text), faults) {
        Some(faults) => Err(faults),
        None => Ok(materials),
    }
}

fn of_body(material: &Material, part: &Part, table: &Table) -> Result<BodyMaterial, Fault> {
    match material {
        Material::Designation { word, span } => table
            .find(word)
            .map(|found| BodyMaterial {
                designation: Some(found.name.clone()),
                density: found.density,
                range: found.range,
            })
            .ok_or_else(|| unknown(word, span.clone(), part, table)),
        Material::Own(index) => {
            let own = part
                .materials
                .get(*index)
                .expect("the reader gives the index of a material of the part");
            Ok(BodyMaterial {
                designation: Some(own.name.clone()),
                density: own.density,
                range: None,
            })
        }
        Material::Density(density) => Ok(BodyMaterial {
            designation: None,
            density: *density,
            range: None,
        }),
    }
}

/// The designation `word` is not in the table.
fn unknown(word: &str, span: Span, part: &Part, table: &Table) -> Fault {
    let fault = Fault::new(
        "material::unknown",
        format!("the material `{word}` is not known"),
        span,
        "not in the table of materials",
    );
    let own = part.materials.iter().map(|own| own.name.as_str());
    if let Some(near) = shop::nearest(word, own).or_else(|| table.nearest(word)) {
        return fault.help(format!("did you mean `{near}`?"));
    }
    // A trade word, such as `bronze`, stands for several materials.
    let found = table.search(&[word]);
    let names: Vec<&str> = found
        .iter()
        .take(4)
        .map(|material| material.name.as_str())
        .collect();
    if names.is_empty() {
        fault.help(
            "`strickle materials` lists them; one that is missing is a [[material]] with name and density in this file",
        )
    } else {
        let more = if found.len() > names.len() {
            ", ..."
        } else {
            ""
        };
        fault.help(format!(
            "`strickle materials {word}` finds {}{more}; one that is missing is a [[material]] in this file",
            names.join(", ")
        ))
    }
}
