//! `strickle mesh`.

mod report;

use crate::arguments::Mesh;
use crate::command::{meshing, study};
use crate::failure::Failure;
use crate::progress::Progress;
use crate::shelf;
use crate::status::Status;
use crate::terminal::Terminal;
use files::Format;
use strickle::Made;

/// Meshes a part and writes the mesh.
pub(super) fn run(arguments: &Mesh, terminal: &mut Terminal) -> Result<Status, Failure> {
    // Asked first: nothing is worked out for a file that cannot be written.
    let format = format(arguments)?;
    let mut study = study(&arguments.part, &arguments.settings.set, &shelf::table()?)?;
    let plan = meshing::plan(&study, &arguments.meshing)?;
    let mut progress = Progress::of(plan.triangles(), terminal);
    progress.stage("making the triangles");
    let made = Made::of(plan).map_err(|error| meshing::refused(&study, &error))?;
    progress.stage("writing");
    let unit = arguments.meshing.unit.unit();
    format
        .write_file(&study.model(&made, unit), &arguments.file)
        .map_err(|source| Failure::Write {
            file: arguments.file.clone(),
            source,
        })?;
    progress.end();
    study.note_mesh(&made, Some(arguments.file.display().to_string()));
    if arguments.output.json {
        terminal.print(&study.record.line())?;
    } else {
        terminal.show(&report::of(&study, format, unit))?;
    }
    Ok(Status::of(study.record.verdict.as_ref()))
}

/// The format by the file's ending.
fn format(arguments: &Mesh) -> Result<Format, Failure> {
    let file = &arguments.file;
    match (Format::of_name(file), arguments.text) {
        (Some(Format::Stl), true) => Ok(Format::StlText),
        (Some(format), false) => Ok(format),
        (Some(format), true) => Err(Failure::usage(format!(
            "--text: {} has one form only; the option is for STL",
            format.name()
        ))),
        (None, _) => Err(Failure::usage(format!(
            "{}: the file's ending does not tell the format",
            file.display()
        ))
        .with_hint("end it in .stl, .obj or .3mf")),
    }
}
