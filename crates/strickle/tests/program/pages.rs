//! Schema, completions and manual page: made from the commands, so that none of them is left out.

use crate::folder::Folder;

/// All commands with the options of their own, as `--help` shows them.
fn commands(folder: &Folder) -> Vec<(String, Vec<String>)> {
    let names: Vec<String> = rows_under(&folder.run(&["--help"]).out, "Commands:")
        .into_iter()
        .filter(|name| name != "help")
        .collect();
    assert!(names.len() >= 6, "{names:?}");
    names
        .into_iter()
        .map(|name| {
            let help = folder.run(&[&name, "--help"]);
            assert_eq!(help.status, Some(0), "{name}");
            let options = help
                .out
                .split(|c: char| !c.is_ascii_alphanumeric() && c != '-')
                .filter(|word| word.starts_with("--") && word.len() > 2)
                .map(str::to_owned)
                .collect();
            (name, options)
        })
        .collect()
}

/// The first words of the rows under a heading.
fn rows_under(help: &str, heading: &str) -> Vec<String> {
    help.lines()
        .skip_while(|line| *line != heading)
        .skip(1)
        .take_while(|line| !line.is_empty())
        .filter_map(|line| line.split_whitespace().next())
        .map(str::to_owned)
        .collect()
}

#[test]
fn the_manual_page_tells_every_command_and_option() {
    let folder = Folder::new();
    let ran = folder.run(&["man"]);
    assert_eq!(ran.status, Some(0));
    assert!(ran.out.contains(".TH strickle 1"));
    let page = ran.out.replace("\\-", "-");
    for (name, options) in commands(&folder) {
        let title = format!(".SH \"STRICKLE {}\"", name.to_uppercase());
        assert!(page.contains(&title), "{title}");
        for option in options {
            assert!(page.contains(&option), "{name} {option}");
        }
    }
    for section in ["EXIT STATUS", "ENVIRONMENT"] {
        assert!(page.contains(&format!(".SH \"{section}\"")));
    }
}

#[test]
fn completions_know_every_command_and_option() {
    let folder = Folder::new();
    let commands = commands(&folder);
    for shell in ["bash", "zsh", "fish", "powershell", "elvish"] {
        let ran = folder.run(&["completions", shell]);
        assert_eq!(ran.status, Some(0), "{shell}");
        for (name, options) in &commands {
            assert!(ran.out.contains(name.as_str()), "{shell} {name}");
            for option in options {
                let word = option.trim_start_matches('-');
                assert!(ran.out.contains(word), "{shell} {name} {option}");
            }
        }
    }
}

#[test]
fn the_schema_is_one_object_that_says_which_schema_it_is() {
    let ran = Folder::new().run(&["schema"]);
    assert_eq!(ran.status, Some(0));
    let schema: serde_json::Value = serde_json::from_str(&ran.out).unwrap();
    assert!(
        schema["$schema"]
            .as_str()
            .unwrap()
            .contains("json-schema.org")
    );
    assert!(schema["properties"]["body"].is_object());
}

#[test]
fn help_and_version_are_results() {
    let folder = Folder::new();
    for arguments in [
        &["--help"][..],
        &["weigh", "-h"],
        &["help", "weigh"],
        &["--version"],
    ] {
        let ran = folder.run(arguments);
        assert_eq!(
            (ran.status, ran.err.as_str()),
            (Some(0), ""),
            "{arguments:?}"
        );
        assert!(!ran.out.is_empty());
    }
    assert_eq!(
        folder.run(&["--version"]).out,
        format!("strickle {}\n", env!("CARGO_PKG_VERSION"))
    );
    for status in ["0  all holds", "1  ", "2  ", "3  "] {
        assert!(folder.run(&["--help"]).out.contains(status));
    }
}
