//! The command line of Strickle.

mod arguments;
mod command;
mod failure;
mod grid;
mod input;
mod progress;
mod shelf;
mod status;
mod style;
mod terminal;

use arguments::Arguments;
use clap::Parser as _;
use std::process::ExitCode;
use terminal::Terminal;

fn main() -> ExitCode {
    let arguments = match Arguments::try_parse() {
        Ok(arguments) => arguments,
        Err(message) => {
            let mut terminal = Terminal::new(arguments::colour_of_the_command_line(), false);
            return status::exit(&mut terminal, |terminal| terminal.usage(&message));
        }
    };
    let mut terminal = Terminal::new(arguments.color, arguments.quiet);
    status::exit(&mut terminal, |terminal| {
        command::run(&arguments.command, terminal)
    })
}
