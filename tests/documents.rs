//! The documents say what is so: every path and every command that they name exists.

use std::path::{Path, PathBuf};

/// The top of the repository.
fn top() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR"))
        .parent()
        .expect("the package lies in a folder of the repository")
        .to_owned()
}

fn document(name: &str) -> String {
    std::fs::read_to_string(top().join(name)).unwrap_or_else(|why| panic!("{name}: {why}"))
}

/// The words between backquotes outside fenced blocks, and the words of the commands inside fenced `sh` blocks.
fn quoted(text: &str) -> (Vec<String>, Vec<Vec<String>>) {
    let (mut words, mut commands) = (Vec::new(), Vec::new());
    let mut fence: Option<String> = None;
    for line in text.lines() {
        match (&fence, line.trim().strip_prefix("```")) {
            (None, Some(language)) => fence = Some(language.to_owned()),
            (Some(_), Some(_)) => fence = None,
            (Some(language), None) if language == "sh" => {
                let command = line.split('#').next().unwrap_or_default();
                commands.push(command.split_whitespace().map(str::to_owned).collect());
            }
            (Some(_), None) => {}
            (None, None) => words.extend(line.split('`').skip(1).step_by(2).map(str::to_owned)),
        }
    }
    (words, commands)
}

/// True for a word that names a file or folder of the repository: it has a slash or a file's ending, and nothing that a
/// path here never has. What the program writes (`out/`) is not part of the repository.
fn names_a_path(word: &str) -> bool {
    let plain = |c: char| c.is_ascii_alphanumeric() || "/._-".contains(c);
    let ending = [".toml", ".rs", ".py", ".md", ".svg", ".csv", ".txt"]
        .iter()
        .any(|ending| word.ends_with(ending));
    (word.contains('/') || ending)
        && word.chars().all(plain)
        && !word.starts_with("out")
        && word.starts_with(|c: char| c.is_ascii_lowercase() || c == '.')
}

fn missing_paths(name: &str) -> Vec<String> {
    let (words, commands) = quoted(&document(name));
    let words: Vec<String> = words
        .into_iter()
        .chain(commands.into_iter().flatten())
        .filter(|word| names_a_path(word))
        .collect();
    assert!(
        words.len() > 5,
        "{name} names hardly any path; is it read aright?"
    );
    words
        .into_iter()
        .filter(|word| !top().join(word).exists())
        .collect()
}

#[test]
fn the_part_files_in_the_readme_weigh_what_they_expect() {
    let readme = document("README.md");
    let files: Vec<&str> = readme
        .split("```toml\n")
        .skip(1)
        .filter_map(|rest| rest.split("```").next())
        .collect();
    assert!(!files.is_empty());
    for text in files {
        let expected = checks::study(text).record.expect;
        assert!(!expected.is_empty());
        assert!(expected.iter().all(|line| line.holds), "{expected:#?}");
    }
}

#[test]
fn every_path_in_the_documents_exists() {
    assert_eq!(missing_paths("README.md"), [""; 0]);
    assert_eq!(missing_paths("DEVELOPERS.md"), [""; 0]);
}

#[test]
fn a_path_that_is_not_there_would_be_found() {
    let (words, commands) =
        quoted("see `crates/nowhere`\n```sh\nstrickle weigh examples/none.toml # now\n```\n");
    assert_eq!(words, ["crates/nowhere"]);
    assert_eq!(commands, [["strickle", "weigh", "examples/none.toml"]]);
    assert!(names_a_path("crates/nowhere") && names_a_path("examples/none.toml"));
    assert!(!names_a_path("PART") && !names_a_path("--json") && !names_a_path("mm"));
}
