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
    // A trade word, such as `bronze` (or a slip of the keys for it), stands for several materials.
    let word = match table.search(&[word]).as_slice() {
        [] => table.nearest_word(word).unwrap_or(word),
        _ => word,
    };
    let found = table.search(&[word]);
    let names: Vec<&str> = found
        .iter()
        .take(4)
        .map(|material| material.name.as_str())
        .collect();
    if names.is_empty() {
        return fault.help(
            "`strickle materials` lists them; one that is missing is a [[material]] with name and density in this file",
        );
    }
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

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sample;

    /// The help that a part of this material is refused with.
    fn help(word: &str) -> String {
        let mut body = sample::ring("ring", 0.04, 0.06, 0.0, 0.03);
        body.material = Material::Designation {
            word: word.to_owned(),
            span: 2..4,
        };
        let mut part = sample::part(std::f64::consts::TAU, vec![body]);
        part.materials.push(part::OwnMaterial {
            name: "house bronze".to_owned(),
            density: 8800.0,
            span: 0..1,
        });
        let faults = of_bodies(&part, sample::SOURCE, &Table::built_in()).unwrap_err();
        let fault = faults.iter().next().unwrap();
        assert_eq!(
            (fault.code, fault.labels[0].span.clone()),
            ("material::unknown", 2..4)
        );
        fault.help.clone().unwrap()
    }

    #[test]
    fn an_unknown_material_is_told_what_was_meant() {
        assert_eq!(help("CC48OK"), "did you mean `CC480K`?");
        assert_eq!(help("house bronse"), "did you mean `house bronze`?");
        for word in ["bronze", "bronce"] {
            assert!(help(word).starts_with("`strickle materials bronze` finds CC491K, CC480K"));
        }
        assert!(help("unobtainium").starts_with("`strickle materials` lists them"));
    }

    #[test]
    fn every_kind_of_material_is_looked_up() {
        let of = |material: &Material| {
            let mut part = sample::part(std::f64::consts::TAU, Vec::new());
            part.materials.push(part::OwnMaterial {
                name: "own".to_owned(),
                density: 1234.0,
                span: 0..1,
            });
            of_body(material, &part, &Table::built_in()).unwrap()
        };
        let designation = of(&Material::Designation {
            word: "cc 480 k".to_owned(),
            span: 0..1,
        });
        assert_eq!(designation.designation.as_deref(), Some("CC480K"));
        assert_eq!(
            (designation.density, designation.range),
            (8700.0, Some([8600.0, 9000.0]))
        );
        let own = of(&Material::Own(0));
        assert_eq!(
            (own.designation.as_deref(), own.density),
            (Some("own"), 1234.0)
        );
        let bare = of(&Material::Density(7.0));
        assert_eq!(
            (bare.designation, bare.density, bare.range),
            (None, 7.0, None)
        );
    }
}
