//! The machine output: names and order of its keys are for good.

use crate::folder::{DISC, Folder};
use serde_json::Value;

/// The keys of the contract with their nesting, in order; a list holds one sample of its objects. New keys come behind
/// these.
const CONTRACT: &str = r#"{ "strickle": "0.1.0", "part": { "name": "", "file": "", "sha256": "" },
  "exact": {
    "section": { "area": 0, "centroid_r": 0, "centroid_z": 0, "perimeter": 0, "perimeter_centroid_r": 0 },
    "volume": 0, "surface": 0, "mass": 0, "density": 0,
    "centre": [0, 0, 0],
    "inertia_about_centre": [[0,0,0],[0,0,0],[0,0,0]], "inertia_about_origin": [[0,0,0],[0,0,0],[0,0,0]],
    "bounds": { "min": [0,0,0], "max": [0,0,0] },
    "surfaces": [ { "body": "", "name": "", "area": 0 } ],
    "bodies": [ { "name": "", "material": "", "density": 0, "volume": 0, "surface": 0, "mass": 0, "centre": [0,0,0] } ] },
  "mesh": null, "measured": null, "audit": null, "budget": null, "verdict": null }"#;

/// An object's keys in the order of the text, which `serde_json::Value` does not keep.
#[derive(Debug, serde::Deserialize)]
#[serde(untagged)]
enum Ordered {
    Object(Keys),
    List(Vec<Self>),
    Other(Value),
}

#[derive(Debug)]
struct Keys(Vec<(String, Ordered)>);

impl<'de> serde::Deserialize<'de> for Keys {
    fn deserialize<D: serde::Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        struct InOrder;
        impl<'de> serde::de::Visitor<'de> for InOrder {
            type Value = Keys;

            fn expecting(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
                f.write_str("an object")
            }

            fn visit_map<A: serde::de::MapAccess<'de>>(self, mut map: A) -> Result<Keys, A::Error> {
                let mut keys = Vec::new();
                while let Some(entry) = map.next_entry()? {
                    keys.push(entry);
                }
                Ok(Keys(keys))
            }
        }
        deserializer.deserialize_map(InOrder)
    }
}

/// Checks that `found` has the keys of `wanted` first and in their order, and values of their kinds.
fn assert_as(found: &Ordered, wanted: &Ordered, at: &str) {
    match (found, wanted) {
        (Ordered::Object(found), Ordered::Object(wanted)) => {
            let names = |keys: &Keys| -> Vec<String> {
                keys.0.iter().map(|(name, _)| name.clone()).collect()
            };
            let found_names = names(found);
            assert_eq!(found_names[..wanted.0.len()], names(wanted)[..], "{at}");
            for ((name, found), (_, wanted)) in found.0.iter().zip(&wanted.0) {
                assert_as(found, wanted, &format!("{at}.{name}"));
            }
        }
        (Ordered::List(found), Ordered::List(wanted)) => {
            assert!(!found.is_empty(), "{at} is empty");
            for (index, found) in found.iter().enumerate() {
                let wanted = wanted.get(index).unwrap_or(&wanted[0]);
                assert_as(found, wanted, &format!("{at}[{index}]"));
            }
        }
        (Ordered::Other(found), Ordered::Other(wanted)) => {
            let same =
                found.is_null() || std::mem::discriminant(found) == std::mem::discriminant(wanted);
            assert!(same, "{at}: {found} in place of {wanted}");
        }
        _ => panic!("{at}: {found:?} in place of {wanted:?}"),
    }
}

#[test]
fn the_keys_stand_as_in_the_contract() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    let ran = folder.run(&["weigh", "--json", "disc.toml"]);
    assert_eq!(ran.status, Some(0), "{ran:?}");
    let found: Ordered = serde_json::from_str(&ran.out).unwrap();
    assert_as(&found, &serde_json::from_str(CONTRACT).unwrap(), "");
}

#[test]
fn figures_are_si_and_survive_the_text() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    let ran = folder.run(&["weigh", "--json", "disc.toml"]);
    let found: Value = serde_json::from_str(&ran.out).unwrap();
    let exact = &found["exact"];
    let volume = std::f64::consts::PI * 0.05 * 0.05 * 0.02;
    for (name, known) in [
        ("volume", volume),
        ("surface", std::f64::consts::TAU * 0.05 * (0.05 + 0.02)),
        ("mass", volume * 7850.0),
        ("density", 7850.0),
        ("inertia_about_axis", volume * 7850.0 * 0.05 * 0.05 / 2.0),
        ("largest_diameter", 0.1),
        ("length", 0.02),
    ] {
        let value = exact[name].as_f64().unwrap();
        assert!(
            (value / known - 1.0).abs() < 1e-13,
            "{name}: {value} is not {known}"
        );
    }
    assert_eq!(found["part"]["name"], "Disc");
    assert_eq!(found["part"]["file"], "disc.toml");
    assert_eq!(exact["bodies"][0]["material"], "S235JR");
    let named: Vec<&Value> = exact["surfaces"]
        .as_array()
        .unwrap()
        .iter()
        .map(|surface| &surface["name"])
        .collect();
    assert_eq!(named, [&Value::from("rim"), &Value::Null]);
    // Every number of the text is the shortest that reads back as the same number.
    for word in ran.out.split(|c: char| !"0123456789.+-eE".contains(c)) {
        if let (Ok(number), true) = (word.parse::<f64>(), word.contains('.')) {
            assert_eq!(serde_json::to_string(&number).unwrap(), word);
        }
    }
}

#[test]
fn the_hash_is_that_of_the_bytes() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    let hash = |folder: &Folder| -> String {
        let ran = folder.run(&["weigh", "--json", "disc.toml"]);
        let found: Value = serde_json::from_str(&ran.out).unwrap();
        found["part"]["sha256"].as_str().unwrap().to_owned()
    };
    let before = hash(&folder);
    assert!(before.len() == 64 && before.bytes().all(|byte| byte.is_ascii_hexdigit()));
    folder.write("disc.toml", DISC.to_owned() + "\n");
    assert_ne!(before, hash(&folder));
}

#[test]
fn several_parts_are_several_lines_and_a_wrong_one_has_none() {
    let folder = Folder::with(&[
        ("a.toml", DISC),
        ("wrong.toml", "format = 1\n"),
        ("b.toml", DISC),
    ]);
    let ran = folder.run(&["weigh", "--json", "a.toml", "wrong.toml", "b.toml"]);
    assert_eq!(ran.status, Some(2));
    let files: Vec<Value> = ran
        .out
        .lines()
        .map(|line| serde_json::from_str::<Value>(line).unwrap()["part"]["file"].clone())
        .collect();
    assert_eq!(files, ["a.toml", "b.toml"]);
}

#[test]
fn a_verdict_says_why_not() {
    let text =
        format!("{DISC}\n[expect]\nmass = \"1.3 kg +- 1 %\"\nvolume = \"157 cm3 +- 1 cm3\"\n");
    let folder = Folder::with(&[("disc.toml", &text)]);
    let ran = folder.run(&["weigh", "--json", "--quiet", "disc.toml"]);
    assert_eq!(ran.status, Some(1));
    let found: Value = serde_json::from_str(&ran.out).unwrap();
    assert_eq!(found["verdict"]["holds"], false);
    let reasons = found["verdict"]["reasons"].as_array().unwrap();
    assert_eq!(reasons.len(), 1);
    assert!(
        reasons[0]
            .as_str()
            .unwrap()
            .starts_with("mass is 1.2331 kg")
    );
    assert_eq!(found["expect"][0]["quantity"], "mass");
    assert_eq!(found["expect"][0]["holds"], false);
    assert_eq!(found["expect"][1]["holds"], true);
}
