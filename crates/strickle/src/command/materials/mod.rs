//! `strickle materials`.

mod json;
mod page;

use crate::arguments::Materials;
use crate::failure::Failure;
use crate::shelf;
use crate::status::Status;
use crate::terminal::Terminal;
use shop::Table;

/// Lists the materials, or those that the words find.
pub(super) fn run(arguments: &Materials, terminal: &mut Terminal) -> Result<Status, Failure> {
    let table = shelf::table()?;
    let found = table.search(&arguments.words);
    if found.is_empty() {
        return Err(nothing(&arguments.words, &table));
    }
    if arguments.json {
        terminal.print(&json::of(&found))?;
    } else {
        terminal.show(&page::of(&found))?;
        if arguments.words.is_empty() {
            terminal.show(&page::of_own(shelf::file().as_deref()))?;
        }
    }
    Ok(Status::Holds)
}

/// No material has all of `words`.
fn nothing(words: &[String], table: &Table) -> Failure {
    let failure = Failure::usage(format!("no material is found by `{}`", words.join(" ")));
    match words.iter().find_map(|word| table.nearest_word(word)) {
        Some(near) => failure.with_hint(format!("did you mean `{near}`?")),
        None => failure.with_hint("`strickle materials` lists them all"),
    }
}
