//! What can be typed: every command and option with its help, in one place.
//!
//! Help, man page and completions are made from it.

mod meshing;

pub(crate) use meshing::Meshing;

use clap::{Args, Parser, Subcommand, ValueEnum};
use clap_complete::Shell;
use part::Setting;
use std::ffi::OsString;
use std::path::PathBuf;

/// What a part of revolution weighs, exactly, from the profile on its drawing
#[derive(Debug, Parser)]
#[command(
    name = "strickle",
    version,
    propagate_version = true,
    max_term_width = 100
)]
#[command(after_long_help = after_help())]
pub(crate) struct Arguments {
    #[command(subcommand)]
    pub(crate) command: Command,

    /// When to use colours
    ///
    /// `auto`: on a terminal, unless the environment variable NO_COLOR is set.
    #[arg(long, global = true, value_name = "WHEN", value_enum, default_value_t)]
    pub(crate) color: Colour,

    /// Print no tables and no notes; the exit status is the answer
    ///
    /// Faults are still reported, and what --json asks for is still printed.
    #[arg(long, short, global = true)]
    pub(crate) quiet: bool,
}

/// What the exit status means.
pub(crate) const EXIT_STATUS: [(&str, &str); 4] = [
    ("0", "all holds"),
    (
        "1",
        "the work was done and a verdict is NO: a figure is not what [expect] says, or a proof fails",
    ),
    ("2", "the input or the usage is wrong"),
    (
        "3",
        "a file could not be read or written; nothing half-written is left",
    ),
];

/// The environment variables that matter.
pub(crate) const ENVIRONMENT: [(&str, &str); 2] = [
    ("NO_COLOR", "no colours, where it is set and not empty"),
    (
        "STRICKLE_CONFIG_DIR",
        "the folder of the user's materials.toml, in place of the system's own for settings",
    ),
];

/// Exit status and environment, for the end of the long help.
fn after_help() -> String {
    let section = |title: &str, rows: &[(&str, &str)]| {
        let width = rows.iter().map(|(word, _)| word.len()).max().unwrap_or(0);
        let rows = rows
            .iter()
            .map(|(word, meaning)| format!("  {word:<width$}  {meaning}"));
        let lines: Vec<String> = std::iter::once(title.to_owned()).chain(rows).collect();
        lines.join("\n")
    };
    let exit_status = section("Exit status:", &EXIT_STATUS);
    let environment = section("Environment:", &ENVIRONMENT);
    format!("{exit_status}\n\n{environment}")
}

/// When to use colours.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default, ValueEnum)]
pub(crate) enum Colour {
    /// On a terminal
    #[default]
    Auto,
    /// Always
    Always,
    /// Never
    Never,
}

/// The commands.
#[derive(Debug, Subcommand)]
pub(crate) enum Command {
    /// Write a commented starter part file
    New(New),
    /// Weigh parts: volume, surface, mass, centre and inertia, exact
    ///
    /// The figures are closed forms by the two theorems of Pappus and Guldin; what the part file expects is judged.
    Weigh(Weigh),
    /// Revolve a part into a triangle mesh and write it
    ///
    /// STL, OBJ or 3MF, by the file's ending. The mesh lies within a stated distance of the true surface, both ways. To have it
    /// measured and every difference explained, use `prove`.
    Mesh(Mesh),
    /// Prove that a part's mesh is that part
    ///
    /// The main job: the exact figures, what the mesh should weigh by its rings, and what is measured on the mesh that was
    /// written and read back, side by side; where the difference comes from; and the answer.
    Prove(Prove),
    /// List materials, or find them by words
    ///
    /// The table has densities in kg/m3 at 20 C. Your own materials stand in materials.toml in the program's folder among
    /// your settings, as in a part file: any number of [[material]], each with name and density, and where you know them
    /// range, aliases, words, contraction and source.
    Materials(Materials),
    /// Print the JSON Schema of the part file
    ///
    /// Editors that know TOML complete and check a part file with it.
    Schema,
    /// Print the completions for a shell
    Completions(Completions),
    /// Print the manual page
    ///
    /// In roff: `strickle man | man -l -`, or into a file `strickle.1` on the manual's path.
    Man,
}

/// Arguments of `new`.
#[derive(Debug, Args)]
pub(crate) struct New {
    /// Name of the part, and of its file: "Fog bell" is written to fog_bell.toml
    ///
    /// May be in a folder that is there, and may be the file's name itself: parts/bell.toml. A file that is there
    /// already is never overwritten.
    pub(crate) name: PathBuf,
}

/// Arguments of `weigh`.
#[derive(Debug, Args)]
pub(crate) struct Weigh {
    #[command(flatten)]
    pub(crate) parts: Parts,

    #[command(flatten)]
    pub(crate) settings: Settings,

    #[command(flatten)]
    pub(crate) output: Output,
}

/// Arguments of `mesh`.
#[derive(Debug, Args)]
pub(crate) struct Mesh {
    /// The part file; `-` reads standard input
    #[arg(value_name = "PART")]
    pub(crate) part: PathBuf,

    /// The file to write: .stl, .obj or .3mf
    #[arg(short = 'o', long = "out", value_name = "FILE")]
    pub(crate) file: PathBuf,

    /// Write the STL as text; the numbers are the same
    #[arg(long)]
    pub(crate) text: bool,

    #[command(flatten)]
    pub(crate) meshing: Meshing,

    #[command(flatten)]
    pub(crate) settings: Settings,

    #[command(flatten)]
    pub(crate) output: Output,
}

/// Arguments of `prove`.
#[derive(Debug, Args)]
pub(crate) struct Prove {
    #[command(flatten)]
    pub(crate) parts: Parts,

    /// Folder for the mesh (STL and 3MF) and the figures (JSON); made where it is not there
    ///
    /// The files are named after the part file. Without it nothing is written and the mesh is proved in memory.
    #[arg(short = 'o', long = "out", value_name = "FOLDER")]
    pub(crate) folder: Option<PathBuf>,

    #[command(flatten)]
    pub(crate) meshing: Meshing,

    #[command(flatten)]
    pub(crate) settings: Settings,

    #[command(flatten)]
    pub(crate) output: Output,
}

/// The parts to work on.
#[derive(Debug, Args)]
pub(crate) struct Parts {
    /// Part files; `-` reads standard input
    ///
    /// All of them are worked on, whatever is wrong with one; the exit status is the worst of them.
    #[arg(required = true, value_name = "PART")]
    pub(crate) files: Vec<PathBuf>,
}

/// Sizes that are set from outside.
#[derive(Debug, Args)]
pub(crate) struct Settings {
    /// Set a size of the part file's [size] table; may be repeated
    ///
    /// VALUE is an expression as in the file: a bare number is in the part's unit, `--set bore="1 in"`.
    #[arg(long = "set", value_name = "NAME=VALUE", value_parser = setting)]
    pub(crate) set: Vec<Setting>,
}

/// How results are printed.
#[derive(Debug, Args)]
pub(crate) struct Output {
    /// Print JSON on standard output and nothing else: one object a part, one line an object
    ///
    /// SI base units (m, m2, m3, kg, kg m2); a part that could not be read has no line.
    #[arg(long)]
    pub(crate) json: bool,
}

/// Arguments of `materials`.
#[derive(Debug, Args)]
pub(crate) struct Materials {
    /// Words to find: of the designation, of another name, of what it is called in the trade
    #[arg(value_name = "WORD")]
    pub(crate) words: Vec<String>,

    /// Print JSON on standard output and nothing else
    #[arg(long)]
    pub(crate) json: bool,
}

/// Arguments of `completions`.
#[derive(Debug, Args)]
pub(crate) struct Completions {
    /// The shell
    #[arg(value_enum)]
    pub(crate) shell: Shell,
}

/// `NAME=VALUE`.
fn setting(text: &str) -> Result<Setting, String> {
    let (name, value) = text
        .split_once('=')
        .ok_or("a size is set by NAME=VALUE, for example bore=26")?;
    let [name, value] = [name, value].map(str::trim);
    if name.is_empty() || value.is_empty() {
        return Err("both the name and the value are needed, for example bore=26".to_owned());
    }
    Ok(Setting {
        name: name.to_owned(),
        value: value.to_owned(),
    })
}

/// The `--color` of a command line that could not be parsed as a whole, so that its message obeys it.
pub(crate) fn colour_of_the_command_line() -> Colour {
    colour_among(std::env::args_os())
}

fn colour_among(arguments: impl IntoIterator<Item = OsString>) -> Colour {
    let mut arguments = arguments
        .into_iter()
        .filter_map(|argument| argument.into_string().ok());
    let mut found = Colour::Auto;
    while let Some(argument) = arguments.next() {
        let word = match argument.strip_prefix("--color") {
            Some("") => arguments.next(),
            Some(word) => word.strip_prefix('=').map(ToOwned::to_owned),
            None => None,
        };
        if let Some(colour) = word.and_then(|word| Colour::from_str(&word, false).ok()) {
            found = colour;
        }
    }
    found
}

#[cfg(test)]
mod tests {
    use super::*;
    use clap::CommandFactory as _;

    #[test]
    fn the_commands_and_options_are_consistent() {
        Arguments::command().debug_assert();
    }

    #[test]
    fn a_setting_needs_a_name_and_a_value() {
        let set = setting("bore = 26 + 1").unwrap();
        assert_eq!((set.name.as_str(), set.value.as_str()), ("bore", "26 + 1"));
        assert_eq!(setting("a=b=c").unwrap().value, "b=c");
        for wrong in ["bore", "=26", "bore=", " = "] {
            assert!(setting(wrong).is_err(), "{wrong}");
        }
    }

    #[test]
    fn the_colour_is_found_in_a_wrong_command_line() {
        let among = |text: &str| colour_among(text.split(' ').map(OsString::from));
        assert_eq!(among("strickle wiegh"), Colour::Auto);
        assert_eq!(among("strickle --color never wiegh"), Colour::Never);
        assert_eq!(among("strickle wiegh --color=always"), Colour::Always);
        assert_eq!(among("strickle --color pink"), Colour::Auto);
        assert_eq!(among("strickle --color"), Colour::Auto);
    }
}
