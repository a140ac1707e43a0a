//! The example parts: each reads, weighs what its drawing expects, and is accepted by the JSON Schema.

use part::Neighbours;
use std::fs;
use std::io;
use std::path::{Path, PathBuf};
use strickle::{Source, Study};

fn folder() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("../examples")
}

struct Folder;

impl Neighbours for Folder {
    fn read(&self, file: &str) -> io::Result<Vec<u8>> {
        fs::read(folder().join(file))
    }
}

/// Name and text of every example, in order of name.
fn examples() -> Vec<(String, String)> {
    let mut examples: Vec<_> = fs::read_dir(folder())
        .expect("the folder of examples is there")
        .map(|entry| entry.expect("its entries can be read").path())
        .filter(|path| path.extension().is_some_and(|ending| ending == "toml"))
        .map(|path| {
            let text = fs::read_to_string(&path).expect("an example is a text");
            let name = path.file_name().unwrap_or_default();
            (name.to_string_lossy().into_owned(), text)
        })
        .collect();
    examples.sort();
    assert!(examples.len() >= 10);
    examples
}

fn study(name: &str, text: &str) -> Study {
    let source = Source {
        file: name,
        text: text.as_bytes(),
    };
    Study::read(source, &[], &Folder, &shop::Table::built_in())
        .unwrap_or_else(|faults| panic!("{name}: {faults:#?}"))
}

#[test]
fn every_example_weighs_what_its_drawing_expects() {
    for (name, text) in examples() {
        let record = study(&name, &text).record;
        assert!(!record.expect.is_empty(), "{name} expects nothing");
        for line in &record.expect {
            assert!(line.holds, "{name}: {line:#?}");
        }
        assert!(record.exact.unwrap().mass > 0.0, "{name}");
    }
}

#[test]
fn the_schema_accepts_every_example_and_refuses_a_slip() {
    let schema = jsonschema::validator_for(&part::schema()).unwrap();
    for (name, text) in examples() {
        let json = |text: &str| -> serde_json::Value {
            let table: toml::Table = text.parse().unwrap();
            serde_json::to_value(table).unwrap()
        };
        let faults: Vec<String> = schema
            .iter_errors(&json(&text))
            .map(|fault| fault.to_string())
            .collect();
        assert!(faults.is_empty(), "{name}: {faults:#?}");
        let slip = text.replacen("[part]", "[part]\nnmae = \"slip\"", 1);
        assert!(!schema.is_valid(&json(&slip)), "{name}");
    }
}

#[test]
fn the_examples_use_every_kind_of_step() {
    let all: String = examples().into_iter().map(|(_, text)| text).collect();
    for word in [
        "d =",
        "r =",
        "z =",
        "dd =",
        "dr =",
        "dz =",
        "taper =",
        "angle =",
        "arc =",
        "centre_on = \"left\"",
        "centre_on = \"right\"",
        "long = true",
        "via =",
        "centre =",
        "tangent = true",
        "ellipse = \"r\"",
        "ellipse = \"z\"",
        "curve =",
        "round =",
        "chamfer =",
        "chamfer = [",
        "name =",
        "repeat =",
        "circle =",
        "svg =",
        "csv =",
        "wall =",
        "grow = \"left\"",
        "grow = \"right\"",
        "grow = \"both\"",
        "voids =",
        "[[material]]",
        "density =",
        "revolve =",
        "general_tolerance =",
        "tol = \"",
        "tol = [",
        "[expect]",
    ] {
        assert!(all.contains(word), "no example shows `{word}`");
    }
}
