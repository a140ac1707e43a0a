//! `strickle man`.

use crate::arguments::{Arguments, ENVIRONMENT, EXIT_STATUS};
use crate::failure::Failure;
use crate::status::Status;
use crate::terminal::Terminal;
use clap::CommandFactory as _;
use clap_mangen::Man;
use std::io;

/// Prints one manual page for the program and all its commands.
pub(super) fn run(terminal: &mut Terminal) -> Result<Status, Failure> {
    let page = page().expect("a page that is written to memory cannot fail");
    terminal.print(&page)?;
    Ok(Status::Holds)
}

/// The page, in roff.
fn page() -> io::Result<String> {
    let mut program = Arguments::command().disable_help_subcommand(true);
    program.build();
    let mut text = Vec::new();
    let man = Man::new(program.clone()).manual("Strickle");
    man.render_title(&mut text)?;
    man.render_name_section(&mut text)?;
    man.render_synopsis_section(&mut text)?;
    man.render_description_section(&mut text)?;
    man.render_options_section(&mut text)?;
    let mut page = String::from_utf8_lossy(&text).into_owned();
    for command in program.get_subcommands() {
        page.push_str(&section(command)?);
    }
    page.push_str(&definitions("EXIT STATUS", &EXIT_STATUS));
    page.push_str(&definitions("ENVIRONMENT", &ENVIRONMENT));
    Ok(page)
}

/// The section of one command: its own page's sections one level down.
fn section(command: &clap::Command) -> io::Result<String> {
    // The global options are told once, for the program.
    let command = command
        .clone()
        .mut_args(|argument| {
            let global = argument.is_global_set();
            argument.hide(global)
        })
        .disable_help_flag(true)
        .disable_version_flag(true);
    let title = command
        .get_bin_name()
        .unwrap_or(command.get_name())
        .to_uppercase();
    let man = Man::new(command);
    let mut text = Vec::new();
    man.render_description_section(&mut text)?;
    man.render_synopsis_section(&mut text)?;
    man.render_options_section(&mut text)?;
    let text = String::from_utf8_lossy(&text).replace("\n.SH DESCRIPTION\n", "\n");
    let text = text
        .trim_start_matches(".SH DESCRIPTION\n")
        .replace(".SH ", ".SS ");
    Ok(format!(".SH \"{title}\"\n{text}"))
}

/// A section of words and what they mean.
fn definitions(title: &str, rows: &[(&str, &str)]) -> String {
    let mut section = format!(".SH \"{title}\"\n");
    for (word, meaning) in rows {
        section.push_str(".TP\n\\fB");
        section.push_str(&escaped(word));
        section.push_str("\\fR\n");
        section.push_str(&escaped(meaning));
        section.push('\n');
    }
    section
}

/// Text that roff takes as it is.
fn escaped(text: &str) -> String {
    text.replace('\\', "\\\\").replace('-', "\\-")
}
