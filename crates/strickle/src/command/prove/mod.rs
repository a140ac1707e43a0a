//! `strickle prove`: the main job.

mod report;

use crate::arguments::Prove;
use crate::command::each_part;
use crate::failure::Failure;
use crate::status::Status;
use crate::terminal::Terminal;
use files::Header;
use mesh::{MeshError, Options};
use std::fs::{self, File};
use std::io::{self, BufReader, Cursor, Write as _};
use std::path::{Path, PathBuf};
use strickle::figures::{Kind, Scale};
use strickle::{Kept, Made, Study};

/// Meshes each part, measures what was written and read back, and judges.
pub(super) fn run(arguments: &Prove, terminal: &mut Terminal) -> Result<Status, Failure> {
    if let Some(folder) = &arguments.folder {
        fs::create_dir_all(folder).map_err(|source| Failure::Write {
            file: folder.clone(),
            source,
        })?;
    }
    let mut first = true;
    let mut taken = Vec::new();
    each_part(
        &arguments.parts,
        &arguments.settings,
        terminal,
        |mut study, terminal| {
            let options = Options::within(within(&study, arguments.within.as_deref())?);
            let made = study
                .mesh(&options)
                .map_err(|error| refused(&study, &error))?;
            let target = arguments
                .folder
                .as_deref()
                .map(|folder| Target::new(folder, &study, &mut taken))
                .transpose()?;
            let unit = arguments.unit.metres();
            let header = Header {
                name: &study.part.name,
                unit: arguments.unit.word(),
            };
            let stl = target.as_ref().map(|target| target.with("stl"));
            let kept = keep(&made, &header, unit, stl)?;
            let (predicted, measured) = study.prove(&made, &kept);
            let json = study.record.line();
            if let Some(target) = &target {
                let file = target.with("json");
                files::write_whole(&file, |writer| writer.write_all(json.as_bytes())).map_err(
                    |source| Failure::Write {
                        file: file.clone(),
                        source,
                    },
                )?;
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

/// The distance asked for, in metres, or the part's default.
fn within(study: &Study, asked: Option<&str>) -> Result<f64, Failure> {
    let Some(text) = asked else {
        return Ok(study.default_within());
    };
    let hint = "for example: --within 0.05mm";
    let length = part::length(text, study.part.unit).map_err(|fault| {
        Failure::usage(format!("--within {text}: {}", fault.message))
            .with_hint(fault.help.as_deref().unwrap_or(hint))
    })?;
    if length.is_finite() && length > 0.0 {
        Ok(length)
    } else {
        Err(
            Failure::usage(format!("--within {text}: the distance must be positive"))
                .with_hint(hint),
        )
    }
}

/// Why there is no mesh, and what to do.
fn refused(study: &Study, error: &MeshError) -> Failure {
    let place = Scale::of(Kind::Length, study.exact().largest_diameter);
    match *error {
        MeshError::TooThin { r, z } => Failure::usage(format!(
            "two faces come closer than a mesh can keep apart, near r {}, z {}",
            place.text(r),
            place.text(z)
        ))
        .with_hint("make the wall thicker there, or ask for a larger --within so that fewer triangles are needed elsewhere"),
        MeshError::Within | MeshError::TooMany { .. } => {
            Failure::usage(error.to_string()).with_hint("ask for a larger distance with --within")
        }
        _ => Failure::usage(error.to_string()),
    }
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

/// Writes the mesh to `file`, or to memory where there is none, and reads it back.
fn keep(made: &Made, header: &Header, unit: f64, file: Option<PathBuf>) -> Result<Kept, Failure> {
    let (positions, triangles) = (&made.mesh.positions, &made.mesh.triangles);
    let facets = if let Some(file) = &file {
        files::write_whole(file, |writer| {
            files::write_stl(writer, header, unit, positions, triangles)
        })
        .map_err(|source| Failure::Write {
            file: file.clone(),
            source,
        })?;
        File::open(file)
            .map_err(files::StlError::from)
            .and_then(|opened| files::read_stl(&mut BufReader::new(opened), unit))
            .map_err(|error| Failure::Read {
                file: file.clone(),
                source: io::Error::other(error),
            })?
    } else {
        let mut bytes = Vec::new();
        files::write_stl(&mut bytes, header, unit, positions, triangles)
            .and_then(|()| files::read_stl(&mut Cursor::new(bytes), unit).map_err(io::Error::other))
            .map_err(|source| Failure::Read {
                file: PathBuf::from("(memory)"),
                source,
            })?
    };
    Ok(Kept {
        file: file.map(|file| file.display().to_string()),
        unit,
        facets,
    })
}
