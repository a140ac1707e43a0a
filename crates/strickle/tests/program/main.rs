//! The program as its users meet it: the real binary in a fresh folder, without anybody's settings.
#![expect(
    clippy::unwrap_used,
    reason = "a test that cannot be set up has failed"
)]

mod folder;

mod exit_status;
mod json;
mod materials;
mod new;
mod pages;
mod terminal;
mod weigh;
