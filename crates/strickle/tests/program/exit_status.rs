//! 0, 1, 2, 3: each for what it is for.

use crate::folder::{DISC, Folder};

fn expecting(mass: &str) -> String {
    format!("{DISC}\n[expect]\nmass = \"{mass}\"\n")
}

#[test]
fn all_holds_is_0() {
    let folder = Folder::with(&[("disc.toml", &expecting("1.233 kg +- 1 %"))]);
    let ran = folder.run(&["weigh", "disc.toml"]);
    assert_eq!(ran.status, Some(0), "{ran:?}");
    assert_eq!(ran.err, "");
    assert!(ran.out.contains("holds"));
}

#[test]
fn a_figure_that_is_not_as_expected_is_1() {
    let folder = Folder::with(&[("disc.toml", &expecting("1.3 kg +- 1 %"))]);
    let ran = folder.run(&["weigh", "disc.toml"]);
    assert_eq!(ran.status, Some(1), "{ran:?}");
    assert!(ran.out.contains("FAILS, 53.9"), "{}", ran.out);
    let ran = folder.run(&["weigh", "--quiet", "disc.toml"]);
    assert_eq!(
        (ran.status, ran.out.as_str(), ran.err.as_str()),
        (Some(1), "", "")
    );
}

#[test]
fn a_wrong_part_is_2() {
    let folder = Folder::with(&[("disc.toml", &DISC.replace("S235JR", "S235JX"))]);
    let ran = folder.run(&["weigh", "disc.toml"]);
    assert_eq!(ran.status, Some(2));
    assert_eq!(ran.out, "");
    assert!(ran.err.contains("disc.toml:11:12"), "{}", ran.err);
    assert!(ran.err.contains("did you mean `S235JR`?"), "{}", ran.err);
}

#[test]
fn a_trade_word_as_a_material_is_told_what_it_may_stand_for() {
    let folder = Folder::with(&[("disc.toml", &DISC.replace("S235JR", "bronze"))]);
    let ran = folder.run(&["weigh", "disc.toml"]);
    assert_eq!(ran.status, Some(2));
    assert!(ran.err.contains("strickle materials bronze"), "{}", ran.err);
}

#[test]
fn a_wrong_usage_is_2() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    for (arguments, told) in [
        (&["wiegh", "disc.toml"][..], "weigh"),
        (&["weigh"], "PART"),
        (&["weigh", "disc.toml", "--jsn"], "--json"),
        (&["weigh", "disc.toml", "--set", "across"], "NAME=VALUE"),
        (&["weigh", "disc.toml", "--color", "pink"], "auto"),
        (&["weigh", "-", "-"], "standard input"),
        (&["completions", "fisch"], "fish"),
        (&["new", ".."], "does not name a part"),
        (&["materials", "unobtainium"], "no material"),
        (&[], "Usage"),
    ] {
        let ran = folder.run(arguments);
        assert_eq!(ran.status, Some(2), "{arguments:?}");
        assert_eq!(ran.out, "", "{arguments:?}");
        assert!(ran.err.contains(told), "{arguments:?}: {}", ran.err);
    }
}

#[test]
fn a_setting_of_a_size_that_is_not_there_is_2() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    let ran = folder.run(&["weigh", "disc.toml", "--set", "acros=3"]);
    assert_eq!(ran.status, Some(2));
    assert!(ran.err.contains("across"), "{}", ran.err);
}

#[test]
fn a_file_that_cannot_be_read_is_3() {
    let folder = Folder::new();
    let ran = folder.run(&["weigh", "none.toml"]);
    assert_eq!(ran.status, Some(3));
    assert!(
        ran.err.starts_with("error: could not read none.toml: "),
        "{}",
        ran.err
    );
    assert_eq!(folder.run(&["weigh", "."]).status, Some(3));
}

#[test]
fn the_worst_of_several_parts_counts_and_all_are_worked_on() {
    let folder = Folder::with(&[
        ("good.toml", DISC),
        ("heavy.toml", &expecting("1.3 kg +- 1 %")),
        ("wrong.toml", &DISC.replace("S235JR", "S235JX")),
        ("odd.toml", &DISC.replace("format = 1", "format = 7")),
    ]);
    let ran = folder.run(&["weigh", "wrong.toml", "odd.toml", "heavy.toml", "good.toml"]);
    assert_eq!(ran.status, Some(2));
    assert!(ran.err.contains("wrong.toml") && ran.err.contains("odd.toml"));
    assert!(ran.out.contains("heavy.toml") && ran.out.contains("good.toml"));
    assert_eq!(
        folder.run(&["weigh", "heavy.toml", "good.toml"]).status,
        Some(1)
    );
    let ran = folder.run(&["weigh", "none.toml", "wrong.toml", "good.toml"]);
    assert_eq!(ran.status, Some(3));
    assert!(ran.out.contains("good.toml"));
}

#[test]
fn a_part_file_of_more_than_16_mib_is_refused_before_it_is_read() {
    let folder = Folder::new();
    let huge = std::fs::File::create(folder.file("huge.toml")).unwrap();
    // A hole in the file: it takes no room on the disc.
    huge.set_len(1 << 40).unwrap();
    let ran = folder.run(&["weigh", "huge.toml"]);
    assert_eq!(ran.status, Some(2));
    assert!(ran.err.contains("16 MiB"), "{}", ran.err);
    let ran = folder.run_with_input(&["weigh", "-"], &"#".repeat((16 << 20) + 1));
    assert_eq!(ran.status, Some(2));
    assert!(ran.err.contains("16 MiB"), "{}", ran.err);
}

#[test]
fn no_bytes_make_it_panic() {
    let folder = Folder::new();
    for (index, bytes) in [
        &b""[..],
        b"\0",
        b"\xff\xfe\x00",
        b"\xef\xbb\xbfformat = 1",
        b"format = 1",
        b"[[[[[[[[[[[[",
        b"format = 1\n[part]\nname = \"\\u001b[31m\"\nunit = \"mm\"\n",
    ]
    .into_iter()
    .enumerate()
    {
        folder.write("bytes.toml", bytes);
        let ran = folder.run(&["weigh", "bytes.toml"]);
        assert_eq!(ran.status, Some(2), "{index}: {ran:?}");
        assert!(!ran.err.is_empty(), "{index}");
    }
}
