//! `strickle materials` and the user's own table.

use crate::folder::{DISC, Folder};
use serde_json::Value;

const OWN: &str =
    "[[material]]\nname = \"house bronze\"\ndensity = \"8.81 g/cm3\"\nwords = [\"bronze\"]\n";

#[test]
fn all_are_listed_and_columns_fit() {
    let ran = Folder::new().run(&["materials"]);
    assert_eq!(ran.status, Some(0));
    let rows = ran.out.lines().filter(|line| line.contains("7850")).count();
    assert!(rows >= 5, "{}", ran.out);
    assert!(ran.out.lines().count() > 60);
    let table = ran.out.split("\n\n").next().unwrap();
    for line in table.lines() {
        assert!(line.chars().count() <= 80, "{line}");
        assert_eq!(line, line.trim_end());
    }
}

#[test]
fn a_word_finds_and_a_few_are_told_in_full() {
    let folder = Folder::new();
    let ran = folder.run(&["materials", "bronze"]);
    for name in ["CC480K", "CC491K", "CC333G", "bell metal"] {
        assert!(ran.out.contains(name), "{}", ran.out);
    }
    assert!(!ran.out.contains("S235JR"));
    let ran = folder.run(&["materials", "cc480k"]);
    assert!(ran.out.contains("EN 1982"), "{}", ran.out);
    assert!(ran.out.contains("8600 to 9000"), "{}", ran.out);
}

#[test]
fn a_slip_of_the_keys_is_put_right() {
    let ran = Folder::new().run(&["materials", "bronce"]);
    assert_eq!(ran.status, Some(2));
    assert!(ran.err.contains("did you mean `bronze`?"), "{}", ran.err);
}

#[test]
fn machines_get_every_row_with_its_source() {
    let ran = Folder::new().run(&["materials", "--json"]);
    assert_eq!(ran.out.lines().count(), 1);
    let found: Value = serde_json::from_str(&ran.out).unwrap();
    let rows = found["materials"].as_array().unwrap();
    assert!(rows.len() >= 60);
    for row in rows {
        assert!(row["density"].as_f64().unwrap() > 0.0);
        assert!(!row["source"].as_str().unwrap().is_empty());
    }
}

#[test]
fn the_users_own_are_found_and_weighed_with() {
    let folder = Folder::with(&[
        ("settings/materials.toml", OWN),
        ("disc.toml", &DISC.replace("S235JR", "House Bronze")),
    ]);
    assert!(
        folder
            .run(&["materials", "bronze"])
            .out
            .contains("house bronze")
    );
    let ran = folder.run(&["weigh", "--json", "disc.toml"]);
    let found: Value = serde_json::from_str(&ran.out).unwrap();
    assert_eq!(found["exact"]["density"], 8810.0);
    assert_eq!(found["exact"]["bodies"][0]["material"], "house bronze");
}

#[test]
fn a_fault_in_the_users_own_is_shown_at_its_line() {
    let folder = Folder::with(&[
        (
            "settings/materials.toml",
            &OWN.replace("8.81 g/cm3", "8.81 stone"),
        ),
        ("disc.toml", DISC),
    ]);
    for arguments in [&["materials"][..], &["weigh", "disc.toml"]] {
        let ran = folder.run(arguments);
        assert_eq!(ran.status, Some(2), "{arguments:?}");
        assert_eq!(ran.out, "");
        assert!(ran.err.contains("materials.toml:3:11"), "{}", ran.err);
        assert!(ran.err.contains("kg/m3"), "{}", ran.err);
    }
    // Commands that need no material work on.
    assert_eq!(folder.run(&["schema"]).status, Some(0));
}

#[test]
fn a_range_of_the_density_is_a_range_of_the_mass() {
    let folder = Folder::with(&[("disc.toml", &DISC.replace("S235JR", "CC480K"))]);
    let ran = folder.run(&["weigh", "--json", "disc.toml"]);
    let found: Value = serde_json::from_str(&ran.out).unwrap();
    let volume = found["exact"]["volume"].as_f64().unwrap();
    let range = &found["exact"]["mass_range"];
    for (end, density) in [(0, 8600.0), (1, 9000.0)] {
        let mass = range[end].as_f64().unwrap();
        assert!((mass / (volume * density) - 1.0).abs() < 1e-13);
    }
    let ran = folder.run(&["weigh", "disc.toml"]);
    assert!(ran.out.contains("from 1.3509 to 1.4137 kg"), "{}", ran.out);
}

#[test]
fn a_table_of_the_users_own_that_is_no_text_is_told() {
    let folder = Folder::new();
    folder.write("settings/materials.toml", b"# caf\xe9\n");
    let ran = folder.run(&["materials"]);
    assert_eq!(ran.status, Some(2));
    assert!(ran.err.contains("not UTF-8 from byte 5 on"), "{}", ran.err);
}

#[test]
fn the_listing_says_where_the_users_own_go() {
    let folder = Folder::new();
    let place = folder.file("settings/materials.toml");
    let place = place.to_str().unwrap();
    assert!(
        folder
            .run(&["materials"])
            .out
            .contains(&format!("{place} (not there yet)"))
    );
    folder.write("settings/materials.toml", OWN);
    assert!(
        folder
            .run(&["materials"])
            .out
            .ends_with(&format!("{place}\n"))
    );
}
