//! Any bytes as a part file: the reader answers with a part or with faults, and does not panic.
#![no_main]

use libfuzzer_sys::fuzz_target;
use std::io;

/// No files beside the part file.
struct Alone;

impl part::Neighbours for Alone {
    fn read(&self, _file: &str) -> io::Result<Vec<u8>> {
        Err(io::ErrorKind::NotFound.into())
    }
}

fuzz_target!(|text: &[u8]| {
    let _ = part::read("fuzz.toml", text, &[], &Alone);
});
