//! Part files put together from the format's own words and from numbers that are often trouble: what gets past the parser
//! and into geometry, where any bytes seldom come.
#![no_main]

use libfuzzer_sys::arbitrary::{Result, Unstructured};
use libfuzzer_sys::fuzz_target;
use std::fmt::Write as _;
use std::io;

/// One file beside the part file, whatever its name.
struct Beside(Vec<u8>);

impl part::Neighbours for Beside {
    fn read(&self, _file: &str) -> io::Result<Vec<u8>> {
        Ok(self.0.clone())
    }
}

/// Values as a part file may hold them: plain, extreme and wrong.
const VALUES: [&str; 40] = [
    "0",
    "1",
    "2",
    "3",
    "5",
    "10",
    "12.5",
    "20",
    "30",
    "50",
    "100",
    "-1",
    "-5",
    "-20",
    "0.1",
    "1e-9",
    "1e-308",
    "1e308",
    "5e-324",
    "-0.0",
    "nan",
    "inf",
    "90",
    "180",
    "360",
    "\"a\"",
    "\"b/2\"",
    "\"a + 1/3\"",
    "\"2 mm + 0.5 in\"",
    "\"sqrt(a)\"",
    "\"a^0.5\"",
    "\"1/0\"",
    "\"pi * a\"",
    "\"3 deg\"",
    "\"-c\"",
    "\"min(a, b)\"",
    "\"sin(30) * b\"",
    "\"1:20\"",
    "\"\"",
    "9007199254740993",
];

const COORDINATES: [&str; 6] = ["d", "r", "z", "dd", "dr", "dz"];

fn value<'a>(u: &mut Unstructured<'_>) -> Result<&'a str> {
    u.choose(&VALUES).copied()
}

/// Some coordinates, each with a value.
fn point(u: &mut Unstructured<'_>) -> Result<String> {
    let mut text = String::new();
    for _ in 0..u.int_in_range(0..=2)? {
        let _ = write!(text, "{} = {}, ", u.choose(&COORDINATES)?, value(u)?);
    }
    Ok(text)
}

/// The ways and treatments of a step.
fn manner(u: &mut Unstructured<'_>) -> Result<String> {
    Ok(match u.int_in_range(0..=16)? {
        0 => format!("arc = {}, centre_on = \"left\", ", value(u)?),
        1 => format!("arc = {}, centre_on = \"right\", long = true, ", value(u)?),
        2 => format!("via = {{ {} }}, ", point(u)?),
        3 => format!("centre = {{ {} }}, ", point(u)?),
        4 => format!("centre = {{ {} }}, centre_on = \"left\", ", point(u)?),
        5 => "tangent = true, ".to_owned(),
        6 => "ellipse = \"r\", ".to_owned(),
        7 => "ellipse = \"z\", ".to_owned(),
        8 => format!("curve = [{{ {} }}], ", point(u)?),
        9 => format!("curve = [{{ {} }}, {{ {} }}], ", point(u)?, point(u)?),
        10 => format!("taper = {}, ", value(u)?),
        11 => format!("angle = {}, ", value(u)?),
        12 => format!("round = {}, ", value(u)?),
        13 => format!("chamfer = {}, ", value(u)?),
        14 => format!("chamfer = [{}, {}], ", value(u)?, value(u)?),
        15 => "name = \"edge\", ".to_owned(),
        _ => String::new(),
    })
}

fn steps(u: &mut Unstructured<'_>, depth: u32) -> Result<String> {
    let mut text = String::from("[ ");
    for _ in 0..u.int_in_range(1..=10)? {
        if depth < 3 && u.ratio(1, 12)? {
            let _ = write!(
                text,
                "{{ repeat = {}, steps = {} }}, ",
                value(u)?,
                steps(u, depth + 1)?
            );
        } else {
            let _ = write!(text, "{{ {}{}{}}}, ", point(u)?, manner(u)?, manner(u)?);
        }
    }
    text.push(']');
    Ok(text)
}

fn section(u: &mut Unstructured<'_>) -> Result<String> {
    Ok(match u.int_in_range(0..=9)? {
        0 => format!(
            "outline = {{ circle = {{ {} }}, radius = {} }}\n",
            point(u)?,
            value(u)?
        ),
        1 => "outline = { csv = \"beside.csv\" }\n".to_owned(),
        2 => format!(
            "outline = {{ svg = \"beside.svg\", axis_x = {} }}\n",
            value(u)?
        ),
        3 | 4 => format!(
            "wall = {{ thickness = {}, grow = \"{}\", line = {} }}\n",
            value(u)?,
            u.choose(&["left", "right", "both"])?,
            steps(u, 0)?
        ),
        5 => format!("outline = {}\nvoids = [ {} ]\n", steps(u, 0)?, steps(u, 0)?),
        _ => format!("outline = {}\n", steps(u, 0)?),
    })
}

fn part_file(u: &mut Unstructured<'_>) -> Result<String> {
    let mut text = format!(
        "format = 1\n[part]\nname = \"fuzz\"\nunit = \"{}\"\n",
        u.choose(&["mm", "cm", "m", "in", "ft"])?
    );
    if u.ratio(1, 4)? {
        let _ = writeln!(text, "revolve = {}", value(u)?);
    }
    let _ = writeln!(
        text,
        "[size]\na = {}\nb = {}\nc = {{ is = {}, tol = {} }}",
        value(u)?,
        value(u)?,
        value(u)?,
        value(u)?
    );
    for body in 0..u.int_in_range(1..=2)? {
        let _ = write!(
            text,
            "[[body]]\nname = \"body {body}\"\ndensity = \"7850 kg/m3\"\n{}",
            section(u)?
        );
    }
    if u.ratio(1, 4)? {
        let _ = writeln!(
            text,
            "[expect]\nmass = \"{} kg +- 2 %\"\nvolume = {}",
            u.arbitrary::<i16>()?,
            value(u)?
        );
    }
    Ok(text)
}

fuzz_target!(|bytes: &[u8]| {
    let mut u = Unstructured::new(bytes);
    // What is left of the bytes is the file beside the part.
    if let Ok(text) = part_file(&mut u) {
        let _ = part::read(
            "fuzz.toml",
            text.as_bytes(),
            &[],
            &Beside(u.take_rest().to_vec()),
        );
    }
});
