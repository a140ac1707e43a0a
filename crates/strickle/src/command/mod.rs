//! The commands, one a file.

mod completions;
mod man;
mod materials;
mod mesh;
mod meshing;
mod new;
mod prove;
mod schema;
mod weigh;

use crate::arguments::{Command, Parts, Settings};
use crate::failure::Failure;
use crate::input::{PartFile, is_standard_input};
use crate::shelf;
use crate::status::Status;
use crate::terminal::Terminal;
use part::Setting;
use std::path::Path;
use strickle::{Source, Study};

/// Does what was asked for.
///
/// # Errors
/// What ends the command before its work is done; a wrong part among several does not.
pub(crate) fn run(command: &Command, terminal: &mut Terminal) -> Result<Status, Failure> {
    match command {
        Command::New(arguments) => new::run(arguments, terminal),
        Command::Weigh(arguments) => weigh::run(arguments, terminal),
        Command::Mesh(arguments) => mesh::run(arguments, terminal),
        Command::Prove(arguments) => prove::run(arguments, terminal),
        Command::Materials(arguments) => materials::run(arguments, terminal),
        Command::Schema => schema::run(terminal),
        Command::Completions(arguments) => completions::run(arguments, terminal),
        Command::Man => man::run(terminal),
    }
}

/// Studies each of `parts` and does `work` with it; what is wrong with one is told and the others still come.
///
/// Gives the worst status of all.
///
/// # Errors
/// The table of materials cannot be had, standard input is asked for twice, or standard output is closed.
fn each_part(
    parts: &Parts,
    settings: &Settings,
    terminal: &mut Terminal,
    mut work: impl FnMut(Study, &mut Terminal) -> Result<Status, Failure>,
) -> Result<Status, Failure> {
    let inputs = parts.files.iter().filter(|file| is_standard_input(file));
    if inputs.count() > 1 {
        return Err(
            Failure::usage("standard input can be read once only").with_hint("give `-` one time")
        );
    }
    let table = shelf::table()?;
    let mut worst = Status::Holds;
    for file in &parts.files {
        let status =
            match study(file, &settings.set, &table).and_then(|study| work(study, terminal)) {
                Ok(status) => status,
                Err(Failure::PipeClosed) => return Err(Failure::PipeClosed),
                Err(failure) => terminal.tell(&failure),
            };
        worst = worst.max(status);
    }
    Ok(worst)
}

/// Reads the part file at `path` and studies it.
fn study(path: &Path, settings: &[Setting], table: &shop::Table) -> Result<Study, Failure> {
    let file = PartFile::read(path)?;
    let source = Source {
        file: &file.name,
        text: &file.text,
    };
    Ok(Study::read(source, settings, &file.folder, table)?)
}
