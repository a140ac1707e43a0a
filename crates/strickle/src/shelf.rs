//! The table of materials with the user's own.

use crate::failure::Failure;
use crate::input;
use part::{Fault, Faults};
use shop::Table;
use std::env;
use std::io;
use std::path::PathBuf;

/// The variable that names another folder for the user's settings.
const FOLDER: &str = "STRICKLE_CONFIG_DIR";

/// The user's file of materials: `materials.toml` in the folder that STRICKLE_CONFIG_DIR names, or else in the program's
/// folder among the user's settings. `None` where the system has no such place.
pub(crate) fn file() -> Option<PathBuf> {
    let folder = match env::var_os(FOLDER) {
        Some(folder) if !folder.is_empty() => PathBuf::from(folder),
        _ => directories::ProjectDirs::from("", "", "strickle")?
            .config_dir()
            .to_owned(),
    };
    Some(folder.join("materials.toml"))
}

/// The built-in materials and those of the user's file, where there is one.
///
/// # Errors
/// The user's file could not be read, or something is wrong with it.
pub(crate) fn table() -> Result<Table, Failure> {
    let table = Table::built_in();
    let Some(file) = file() else {
        return Ok(table);
    };
    let name = file.display().to_string();
    let bytes = match input::contents(&file) {
        Ok(Some(bytes)) => bytes,
        Ok(None) => return Err(Failure::usage(format!("{name} is larger than 16 MiB"))),
        Err(source) if source.kind() == io::ErrorKind::NotFound => return Ok(table),
        Err(source) => return Err(Failure::Read { file, source }),
    };
    let text = String::from_utf8(bytes).map_err(|error| {
        let place = error.utf8_error().valid_up_to();
        Failure::usage(format!("{name} is not UTF-8 from byte {place} on"))
    })?;
    table.extended(&text, &name).map_err(|faults| {
        let faults = faults.into_iter().map(of_the_text).collect();
        Failure::Part(
            Faults::of(&name, &text, faults).expect("a table that was refused has a fault"),
        )
    })
}

/// A fault of a file of materials as one of a text.
fn of_the_text(fault: shop::Fault) -> Fault {
    let told = Fault::new(fault.code, fault.message, fault.span, "here");
    match fault.help {
        Some(help) => told.help(help),
        None => told,
    }
}
