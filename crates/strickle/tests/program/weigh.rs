//! `strickle weigh`: what people read.

use crate::folder::{DISC, Folder};

/// The one line of `text` that begins with `start`.
fn line<'a>(text: &'a str, start: &str) -> &'a str {
    let lines: Vec<&str> = text
        .lines()
        .filter(|line| line.starts_with(start))
        .collect();
    assert_eq!(lines.len(), 1, "{start}: {text}");
    lines[0]
}

/// A line's words, whatever blanks are between them.
fn words(line: &str) -> String {
    line.split_whitespace().collect::<Vec<_>>().join(" ")
}

#[test]
fn the_two_theorems_are_two_lines() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    let ran = folder.run(&["weigh", "disc.toml"]);
    assert_eq!(ran.status, Some(0), "{ran:?}");
    // 10 cm2 whose centroid runs 2 pi 25 mm; 140 mm of boundary, 20 mm of it on the axis.
    assert_eq!(
        words(line(&ran.out, "area")),
        "area 10.000 cm2 x path of centroid 157.08 mm = volume 157.08 cm3"
    );
    assert_eq!(
        words(line(&ran.out, "perimeter")),
        "perimeter 140.00 mm x path of centroid 157.08 mm = surface 219.91 cm2"
    );
    assert_eq!(
        words(line(&ran.out, "disc  S")),
        "disc S235JR 7850 157.08 219.91 1.2331"
    );
    assert!(line(&ran.out, "Self-check").contains("15 digits"));
    assert!(!ran.out.contains("Caution"));
}

#[test]
fn a_size_can_be_set_from_outside() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    let ran = folder.run(&[
        "weigh",
        "disc.toml",
        "--set",
        "across=200",
        "--set",
        "high=1 in",
    ]);
    assert_eq!(ran.status, Some(0), "{ran:?}");
    assert!(
        words(line(&ran.out, "size")).starts_with("size largest diameter 200.00, length 25.40"),
        "{}",
        ran.out
    );
}

#[test]
fn a_part_can_come_from_standard_input() {
    let folder = Folder::new();
    let ran = folder.run_with_input(&["weigh", "-"], DISC);
    assert_eq!(ran.status, Some(0), "{ran:?}");
    assert!(ran.out.contains("Disc"));
    let ran = folder.run_with_input(&["weigh", "--json", "-"], DISC);
    assert!(ran.out.contains("\"file\":\"-\""));
    let ran = folder.run_with_input(&["weigh", "-"], "format = 7");
    assert_eq!(ran.status, Some(2));
}

#[test]
fn files_that_an_outline_names_lie_beside_the_part() {
    let outline = "outline = { csv = \"stations.csv\" }\n";
    let start = DISC.find("outline").unwrap();
    let text = DISC[..start].to_owned() + outline;
    let stations = "d,z\n0,0\n100,0\n100,20\n0,20\n";
    let folder = Folder::with(&[("parts/disc.toml", &text), ("parts/stations.csv", stations)]);
    let ran = folder.run(&["weigh", "parts/disc.toml"]);
    assert_eq!(ran.status, Some(0), "{ran:?}");
    assert!(ran.out.contains("157.08 cm3"));
    // Standard input has the current folder.
    assert_eq!(
        folder.run_with_input(&["weigh", "-"], &text).status,
        Some(2)
    );
    folder.write("stations.csv", stations);
    assert_eq!(
        folder.run_with_input(&["weigh", "-"], &text).status,
        Some(0)
    );
}

#[test]
fn a_heavy_part_carries_a_caution() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    let ran = folder.run(&["weigh", "disc.toml", "--set", "across=500"]);
    assert!(
        ran.out.contains("Caution: heavier than 25 kg."),
        "{}",
        ran.out
    );
}

#[test]
fn a_part_turn_shows_its_ends_and_its_angle() {
    let text = DISC.replace("unit = \"mm\"", "unit = \"mm\"\nrevolve = 90");
    let folder = Folder::with(&[("disc.toml", &text)]);
    let ran = folder.run(&["weigh", "disc.toml"]);
    assert!(ran.out.contains("turned through 90 degrees"));
    assert_eq!(
        words(line(&ran.out, "two ends")),
        "two ends 10.000 cm2 x 2 + surface 20.000 cm2"
    );
    assert!(ran.out.contains("end caps"));
}

#[test]
fn several_bodies_are_summed() {
    let text = format!(
        "{DISC}\n[[body]]\nname = \"knob\"\ndensity = \"1000 kg/m3\"\noutline = [{{ d = 0, z = 20 }}, {{ d = 20 }}, {{ z = 40 }}, {{ d = 0 }}]\n"
    );
    let folder = Folder::with(&[("disc.toml", &text)]);
    let ran = folder.run(&["weigh", "disc.toml"]);
    assert_eq!(ran.status, Some(0), "{ran:?}");
    // 1233.075 g of steel and 6.283 g of the knob, on 163.363 cm3.
    assert_eq!(
        words(line(&ran.out, "whole")),
        "whole (sum over the bodies) 7586.5 163.36 238.76 1.23936"
    );
}

#[test]
fn a_part_in_inches_shows_inches_and_pounds_too() {
    let text = DISC.replace("\"mm\"", "\"in\"");
    let folder = Folder::with(&[("disc.toml", &text)]);
    let ran = folder.run(&["weigh", "disc.toml", "--set", "across=4", "--set", "high=1"]);
    // 4 pi cubic inches.
    assert!(words(&ran.out).contains("volume 12.566 in3"), "{}", ran.out);
    assert!(
        words(&ran.out).contains("largest diameter 4.0000 in"),
        "{}",
        ran.out
    );
}

#[test]
fn every_example_fits_in_80_columns_and_confirms_itself() {
    let examples = concat!(env!("CARGO_MANIFEST_DIR"), "/../../examples");
    let folder = Folder::new();
    let mut weighed = 0;
    for entry in std::fs::read_dir(examples).unwrap() {
        let path = entry.unwrap().path();
        if path.extension().is_none_or(|ending| ending != "toml") {
            continue;
        }
        let ran = folder.run(&["weigh", path.to_str().unwrap()]);
        assert_eq!(
            ran.status,
            Some(0),
            "{}: {}{}",
            path.display(),
            ran.out,
            ran.err
        );
        // The second line is the file's name, as long as it is.
        for line in ran.out.lines().take(1).chain(ran.out.lines().skip(2)) {
            assert!(line.chars().count() <= 80, "{}: {line}", path.display());
            assert_eq!(line, line.trim_end(), "{}", path.display());
        }
        let check = line(&ran.out, "Self-check");
        let digits: u32 = check
            .split_whitespace()
            .rev()
            .nth(1)
            .and_then(|word| word.parse().ok())
            .unwrap();
        assert!(digits >= 12, "{}: {check}", path.display());
        weighed += 1;
    }
    assert!(weighed >= 10);
}
