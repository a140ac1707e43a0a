//! The program as its users meet it: the real binary in a fresh folder, without anybody's settings.

mod folder;

mod exit_status;
mod json;
mod materials;
mod new;
mod pages;
mod terminal;
mod weigh;
