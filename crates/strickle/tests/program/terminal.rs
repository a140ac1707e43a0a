//! Streams and colours.

use crate::folder::{DISC, Folder, ran};
use std::fs::File;
use std::process::Stdio;

const ESCAPE: char = '\u{1b}';

#[test]
fn there_are_no_colours_where_there_is_no_terminal() {
    let folder = Folder::with(&[("disc.toml", DISC), ("wrong.toml", "format = 7")]);
    for arguments in [
        &["weigh", "disc.toml", "wrong.toml"][..],
        &["materials"],
        &["--help"],
        &["wiegh"],
    ] {
        let ran = folder.run(arguments);
        assert!(
            !ran.out.contains(ESCAPE) && !ran.err.contains(ESCAPE),
            "{arguments:?}"
        );
    }
}

#[test]
fn colours_can_be_asked_for_and_refused() {
    let folder = Folder::with(&[("disc.toml", DISC), ("wrong.toml", "format = 7")]);
    let always = folder.run(&["--color", "always", "weigh", "disc.toml", "wrong.toml"]);
    assert!(always.out.contains(ESCAPE) && always.err.contains(ESCAPE));
    // The same text but for the colours.
    let never = folder.run(&["--color=never", "weigh", "disc.toml", "wrong.toml"]);
    let plain = |text: &str| anstream::adapter::strip_str(text).to_string();
    assert_eq!(plain(&always.out), never.out);
    assert_eq!(plain(&always.err), never.err);
    assert!(
        folder
            .run(&["--color=always", "wiegh"])
            .err
            .contains(ESCAPE)
    );
    // JSON is never coloured.
    let json = folder.run(&["--color", "always", "weigh", "--json", "disc.toml"]);
    assert!(!json.out.contains(ESCAPE));
}

#[test]
fn what_is_asked_for_on_the_command_line_beats_no_color() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    let with = |colour: &str| {
        let output = folder
            .command(&["--color", colour, "weigh", "disc.toml"])
            .env("NO_COLOR", "1")
            .output();
        ran(&output.unwrap())
    };
    assert!(with("always").out.contains(ESCAPE));
    assert!(!with("auto").out.contains(ESCAPE));
}

#[cfg(target_os = "linux")]
#[test]
fn a_closed_pipe_is_a_quiet_success() {
    let folder = Folder::with(&[("disc.toml", DISC), ("wrong.toml", "format = 7")]);
    for arguments in [
        &["weigh", "disc.toml", "disc.toml"][..],
        &["weigh", "--json", "disc.toml"],
        &["materials"],
        &["schema"],
        &["man"],
        &["completions", "bash"],
        &["--help"],
    ] {
        let (reader, writer) = std::io::pipe().unwrap();
        drop(reader);
        let output = folder.command(arguments).stdout(writer).output().unwrap();
        let ran = ran(&output);
        assert_eq!(
            (ran.status, ran.err.as_str()),
            (Some(0), ""),
            "{arguments:?}"
        );
    }
}

#[cfg(target_os = "linux")]
#[test]
fn a_full_disc_is_told() {
    let folder = Folder::with(&[("disc.toml", DISC)]);
    let full = File::options().write(true).open("/dev/full").unwrap();
    let output = folder
        .command(&["weigh", "disc.toml"])
        .stdout(Stdio::from(full))
        .output()
        .unwrap();
    let ran = ran(&output);
    assert_eq!(ran.status, Some(3));
    assert!(
        ran.err
            .starts_with("error: could not write standard output: "),
        "{}",
        ran.err
    );
}

#[test]
fn a_name_cannot_steer_the_terminal() {
    let text = DISC.replace("\"Disc\"", "\"Disc\\u001b[2J\"");
    let folder = Folder::with(&[("disc.toml", &text)]);
    let ran = folder.run(&["weigh", "--color=always", "disc.toml"]);
    assert!(!ran.out.contains("\u{1b}[2J") && !ran.err.contains("\u{1b}[2J"));
}
