//! `strickle materials`.

use crate::arguments::Materials;
use crate::failure::Failure;
use crate::shelf;
use crate::status::Status;
use crate::terminal::Terminal;
use shop::Material;

/// Lists the materials, or those that the words find.
pub(super) fn run(arguments: &Materials, terminal: &mut Terminal) -> Result<Status, Failure> {
    let table = shelf::table()?;
    let found = table.search(&arguments.words);
    if found.is_empty() {
        return Err(nothing(&arguments.words, &table));
    }
    if arguments.json {
        terminal.print(&json(&found))?;
    } else {
        terminal.show(&listed(&found))?;
    }
    Ok(Status::Holds)
}

/// The list for people, one line a material.
fn listed(found: &[&Material]) -> String {
    let lines: Vec<String> = found
        .iter()
        .map(|material| {
            let range = material
                .range
                .map_or_else(String::new, |[least, greatest]| {
                    format!("{least} to {greatest}")
                });
            format!(
                "{:<20} {:>7}  {range:<14} {}",
                material.name,
                material.density,
                material.words.first().map_or("", String::as_str)
            )
        })
        .collect();
    lines.join("\n") + "\n"
}

/// The list for machines.
fn json(found: &[&Material]) -> String {
    let rows: Vec<serde_json::Value> = found
        .iter()
        .map(|material| {
            serde_json::json!({
                "name": material.name,
                "density": material.density,
                "range": material.range,
                "source": material.source,
            })
        })
        .collect();
    format!("{}\n", serde_json::Value::from(rows))
}

/// No material has all of `words`.
fn nothing(words: &[String], table: &shop::Table) -> Failure {
    let failure = Failure::usage(format!("no material is found by `{}`", words.join(" ")));
    match words.iter().find_map(|word| table.nearest_word(word)) {
        Some(near) => failure.with_hint(format!("did you mean `{near}`?")),
        None => failure.with_hint("`strickle materials` lists them all"),
    }
}
