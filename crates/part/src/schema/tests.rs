//! The schema says what the reader says.

use super::{PartFile, schema};
use crate::body::{BODY, CIRCLE, CSV, SVG, WALL};
use crate::expect::EXPECT;
use crate::head::{FILE, PART};
use crate::material::MATERIAL;
use crate::sizes::SIZE;
use crate::steps::{CENTRE, POINT, REPEAT, STEP};
use crate::tree::Keys;
use serde_json::{Value, json};
use std::collections::BTreeSet;

const EXAMPLES: &str = concat!(env!("CARGO_MANIFEST_DIR"), "/../../examples");

/// Each kind of table by the name of its type, with the reader's keys.
const TABLES: [(&str, &Keys); 13] = [
    ("Part", &PART),
    ("Toleranced", &SIZE),
    ("OwnMaterial", &MATERIAL),
    ("Body", &BODY),
    ("Circle", &CIRCLE),
    ("Centre", &CENTRE),
    ("Svg", &SVG),
    ("Csv", &CSV),
    ("Wall", &WALL),
    ("Step", &STEP),
    ("Repeat", &REPEAT),
    ("Point", &POINT),
    ("Expect", &EXPECT),
];

fn keys(table: &Value) -> BTreeSet<String> {
    let properties = table["properties"].as_object().unwrap();
    properties.keys().cloned().collect()
}

fn known(keys: &Keys) -> BTreeSet<String> {
    keys.known.iter().map(|key| (*key).to_owned()).collect()
}

#[test]
fn the_keys_of_every_table_are_the_readers() {
    let schema = schema();
    assert_eq!(keys(&schema), known(&FILE));
    let definitions = schema["$defs"].as_object().unwrap();
    for (name, reader) in TABLES {
        assert_eq!(keys(&definitions[name]), known(reader), "{name}");
    }
    let tables: BTreeSet<&str> = definitions
        .iter()
        .filter(|(_, definition)| definition.get("properties").is_some())
        .map(|(name, _)| name.as_str())
        .collect();
    let compared: BTreeSet<&str> = TABLES.iter().map(|(name, _)| *name).collect();
    assert_eq!(tables, compared, "a table of the schema is not compared");
}

#[test]
fn every_key_has_a_description() {
    let schema = schema();
    let definitions = schema["$defs"].as_object().unwrap();
    for (name, table) in definitions {
        let properties = table.get("properties").and_then(Value::as_object);
        for (key, property) in properties.into_iter().flatten() {
            assert!(property.get("description").is_some(), "{name}.{key}");
        }
    }
}

/// The examples as JSON, and the part file that `strickle new` writes.
fn legal() -> Vec<(String, Value)> {
    let mut texts = vec![("starter".to_owned(), crate::starter("Fog bell"))];
    for entry in std::fs::read_dir(EXAMPLES).unwrap() {
        let path = entry.unwrap().path();
        if path
            .extension()
            .is_some_and(|extension| extension == "toml")
        {
            let text = std::fs::read_to_string(&path).unwrap();
            texts.push((path.display().to_string(), text));
        }
    }
    assert!(texts.len() > 10, "the examples are not there");
    texts
        .into_iter()
        .map(|(name, text)| {
            let table: toml::Table = text.parse().unwrap();
            (name, serde_json::to_value(table).unwrap())
        })
        .collect()
}

#[test]
fn every_example_is_accepted() {
    let schema = schema();
    let validator = jsonschema::draft202012::new(&schema).unwrap();
    for (name, file) in legal() {
        let faults: Vec<String> = validator
            .iter_errors(&file)
            .map(|error| format!("{}: {error}", error.instance_path()))
            .collect();
        assert!(faults.is_empty(), "{name}: {faults:#?}");
        let read: Result<PartFile, _> = serde_json::from_value(file);
        assert!(read.is_ok(), "{name}: {:?}", read.err());
    }
}

/// A file that has every kind of table once.
fn whole() -> Value {
    json!({
        "format": 1,
        "part": { "name": "bell", "unit": "mm" },
        "size": { "bore": { "is": 25, "tol": "H7" } },
        "material": [ { "name": "house bronze", "density": "8800 kg/m3" } ],
        "body": [
            { "name": "a", "material": "house bronze",
              "outline": [
                { "d": 40, "z": 0 },
                { "d": 60, "via": { "d": 50, "z": 1 } },
                { "repeat": 2, "steps": [ { "dz": 3 } ] },
              ],
              "voids": [
                { "circle": { "r": 50, "z": 0 }, "radius": 12 },
                { "svg": "bell.svg" },
                { "csv": "bell.csv" },
              ] },
            { "name": "b", "density": "8800 kg/m3",
              "wall": { "line": [ { "d": 40, "z": 0 }, { "z": 12 } ], "thickness": 2, "grow": "left" } },
        ],
        "expect": { "mass": "12.4 kg +- 2 %" },
    })
}

/// Pointers to all tables of `value` whose keys are known ones; [size] itself has names.
fn tables(value: &Value, path: &str, found: &mut Vec<String>) {
    match value {
        Value::Object(table) => {
            if path != "/size" {
                found.push(path.to_owned());
            }
            for (key, value) in table {
                tables(value, &format!("{path}/{key}"), found);
            }
        }
        Value::Array(items) => {
            for (at, value) in items.iter().enumerate() {
                tables(value, &format!("{path}/{at}"), found);
            }
        }
        _ => {}
    }
}

#[test]
fn an_unknown_key_is_rejected_in_every_table() {
    let schema = schema();
    let validator = jsonschema::draft202012::new(&schema).unwrap();
    assert!(validator.is_valid(&whole()));
    let mut paths = Vec::new();
    tables(&whole(), "", &mut paths);
    assert!(paths.len() > TABLES.len(), "{paths:?}");
    for path in paths {
        let mut file = whole();
        let table = file.pointer_mut(&path).unwrap();
        table["strange"] = json!(1);
        assert!(!validator.is_valid(&file), "accepted in {path}");
        let text = toml::to_string(&file).unwrap();
        let faults = crate::read("bell.toml", text.as_bytes(), &[], &Nothing).unwrap_err();
        let codes: Vec<&str> = faults.iter().map(|fault| fault.code).collect();
        assert!(codes.contains(&"table::unknown_key"), "{path}: {codes:?}");
    }
}

#[test]
fn what_the_reader_asks_for_is_asked_for() {
    let schema = schema();
    let validator = jsonschema::draft202012::new(&schema).unwrap();
    let removed = [
        ("", "format"),
        ("", "part"),
        ("", "body"),
        ("/part", "name"),
        ("/part", "unit"),
        ("/size/bore", "is"),
        ("/material/0", "name"),
        ("/material/0", "density"),
        ("/body/0", "name"),
        ("/body/0", "material"),
        ("/body/0", "outline"),
        ("/body/1", "density"),
        ("/body/1", "wall"),
        ("/body/1/wall", "line"),
        ("/body/1/wall", "thickness"),
        ("/body/1/wall", "grow"),
        ("/body/0/voids/0", "radius"),
        ("/body/0/voids/0/circle", "z"),
        ("/body/0/outline/2", "repeat"),
        ("/body/0/outline/2", "steps"),
    ];
    for (path, key) in removed {
        let mut file = whole();
        file.pointer_mut(path)
            .unwrap()
            .as_object_mut()
            .unwrap()
            .remove(key)
            .unwrap();
        assert!(
            !validator.is_valid(&file),
            "{path} without {key} is accepted"
        );
        let text = toml::to_string(&file).unwrap();
        let read = crate::read("bell.toml", text.as_bytes(), &[], &Nothing);
        assert!(read.is_err(), "{path} without {key} is read");
    }
}

struct Nothing;

impl crate::Neighbours for Nothing {
    fn read(&self, _: &str) -> std::io::Result<Vec<u8>> {
        Err(std::io::ErrorKind::NotFound.into())
    }
}
