//! `strickle prove`: the main job.

mod report;

pub(in crate::command) use report::distances;

use crate::arguments::Prove;
use crate::command::each_part;
use crate::command::meshing;
use crate::failure::Failure;
use crate::progress::Progress;
use crate::status::Status;
use crate::terminal::Terminal;
use files::{Format, Unit, write_whole};
use std::fs::{self, File};
use std::io::{self, BufReader, Cursor, Write as _};
use std::path::{Path, PathBuf};
use strickle::{Kept, Made, Study};

/// Meshes each part, measures what was written and read back, and judges.
pub(super) fn run(arguments: &Prove, terminal: &mut Terminal) -> Result<Status, Failure> {
    let unit = arguments.meshing.unit.unit();
    let mut first = true;
    let mut taken = Vec::new();
    each_part(
        &arguments.parts,
        &arguments.settings,
        terminal,
        |mut study, terminal| {
            let target = arguments
                .folder
                .as_deref()
                .map(|folder| Target::new(folder, &study, &mut taken))
                .transpose()?;
            let plan = meshing::plan(&study, &arguments.meshing)?;
            let mut progress = Progress::of(plan.triangles(), terminal);
            progress.stage("making the triangles");
            let made = Made::of(plan).map_err(|error| meshing::refused(&study, &error))?;
            // Not before: a part that cannot be meshed leaves no folder behind.
            if let Some(folder) = &arguments.folder {
                fs::create_dir_all(folder).map_err(|source| Failure::Write {
                    file: folder.clone(),
                    source,
                })?;
            }
            progress.stage("writing and reading back");
            let kept = match &target {
                Some(target) => keep_in(target, &study, &made, unit)?,
                None => keep_in_memory(&study, &made, unit)?,
            };
            progress.stage("measuring");
            let (predicted, measured) = study.prove(&made, &kept);
            progress.end();
            let json = study.record.line();
            if let Some(target) = &target {
                let file = target.with("json");
                write_whole(&file, |writer| writer.write_all(json.as_bytes()))
                    .map_err(|source| Failure::Write { file, source })?;
            }
            if arguments.output.json {
                terminal.print(&json)?;
            } else {
                let between = if first { "" } else { "\n\n" };
                terminal.show(&format!(
                    "{between}{}",
                    report::of(&study, &predicted, measured.as_ref(), &kept)
                ))?;
            }
            first = false;
            Ok(Status::of(study.record.verdict.as_ref()))
        },
    )
}

/// Where a part's files go: the folder and the files' name without its ending.
struct Target {
    folder: PathBuf,
    stem: String,
}

impl Target {
    /// The files are named after the part file, or after the part where it came by standard input.
    fn new(folder: &Path, study: &Study, taken: &mut Vec<String>) -> Result<Self, Failure> {
        let file = Path::new(&study.record.part.file);
        let stem = match file.file_stem().and_then(|stem| stem.to_str()) {
            Some(stem) if stem != "-" => stem.to_owned(),
            _ => study
                .part
                .name
                .to_lowercase()
                .chars()
                .map(|c| if c.is_alphanumeric() { c } else { '_' })
                .collect(),
        };
        if taken.contains(&stem) {
            return Err(Failure::usage(format!(
                "two of the parts would be written to the files {stem}.*"
            ))
            .with_hint("prove them one at a time, each into its own folder"));
        }
        taken.push(stem.clone());
        Ok(Self {
            folder: folder.to_owned(),
            stem,
        })
    }

    fn with(&self, ending: &str) -> PathBuf {
        self.folder.join(format!("{}.{ending}", self.stem))
    }
}

/// Writes the mesh as STL and 3MF and reads both back.
fn keep_in(target: &Target, study: &Study, made: &Made, unit: Unit) -> Result<Kept, Failure> {
    let model = study.model(made, unit);
    let [stl, package] =
        [(Format::Stl, "stl"), (Format::ThreeMf, "3mf")].map(|(format, ending)| {
            let file = target.with(ending);
            format
                .write_file(&model, &file)
                .map_err(|source| Failure::Write {
                    file: file.clone(),
                    source,
                })
                .map(|()| file)
        });
    let (stl, package) = (stl?, package?);
    let unreadable = |file: &Path, source: io::Error| Failure::Read {
        file: file.to_owned(),
        source,
    };
    let open = |file: &Path| File::open(file).map_err(|source| unreadable(file, source));
    let name = stl.display().to_string();
    let mut kept = Kept::stl(&mut BufReader::new(open(&stl)?), made, unit, Some(name))
        .map_err(|error| unreadable(&stl, io::Error::other(error)))?;
    let read = files::read_three_mf(BufReader::new(open(&package)?))
        .map_err(|error| unreadable(&package, io::Error::other(error)))?;
    kept.compare(made, &read);
    Ok(kept)
}

/// Writes the mesh as STL to memory and reads it back.
fn keep_in_memory(study: &Study, made: &Made, unit: Unit) -> Result<Kept, Failure> {
    // Header, count and 50 bytes a facet: a vector that grows would take twice as much.
    let size = 84 + 50 * made.mesh.triangles.len();
    let mut bytes = Cursor::new(Vec::with_capacity(size));
    Format::Stl
        .write(&study.model(made, unit), &mut bytes)
        .and_then(|()| {
            bytes.set_position(0);
            Kept::stl(&mut bytes, made, unit, None).map_err(io::Error::other)
        })
        .map_err(|source| Failure::Read {
            file: PathBuf::from("(memory)"),
            source,
        })
}
