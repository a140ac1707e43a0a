//! What is told of drawings and tables that are no outline.

use crate::{Files, Refused};
use part::Neighbours;
use std::collections::BTreeSet;
use std::fmt::Write;
use std::io;

/// The one fault of a part whose outline is `outline`, with these files.
fn refused(outline: &str, neighbours: &dyn Neighbours) -> Refused {
    let text = format!(
        "format = 1\npart = {{ name = \"p\", unit = \"mm\" }}\n[[body]]\nname = \"b\"\ndensity = \"1 kg/m3\"\noutline = {outline}\n"
    );
    let faults = part::read("p.toml", text.as_bytes(), &[], neighbours).expect_err(outline);
    let all: Vec<_> = faults.iter().collect();
    let [fault] = all[..] else {
        panic!("{all:?}");
    };
    // Each one points at the file's name.
    assert!(
        text[fault.labels[0].span.clone()].starts_with('"'),
        "{fault:?}"
    );
    Refused {
        code: fault.code,
        message: fault.message.clone(),
        help: fault.help.clone().expect("there is advice"),
    }
}

/// Code, drawing, message and the beginning of the advice.
type Case = (&'static str, &'static str, &'static str, &'static str);

fn check(cases: &[Case], outline: &str, least: usize) {
    let mut codes = BTreeSet::new();
    for &(code, file, message, help) in cases {
        let found = refused(outline, &Files(&[("f.svg", file), ("f.csv", file)]));
        assert_eq!((found.code, &*found.message), (code, message), "{file}");
        assert!(found.help.starts_with(help), "{code}: {}", found.help);
        codes.insert(code);
    }
    assert!(codes.len() >= least, "{codes:?}");
}

const DRAWINGS: &[Case] = &[
    (
        "svg::xml",
        "<svg>\n<path d='M0 0'\n</svg>",
        "`f.svg`: line 2 is not XML: position 19: attribute key must be directly followed by `=` or space",
        "save the drawing again",
    ),
    (
        "svg::xml",
        "<svg>\n<path></g></svg>",
        "`f.svg`: line 2 is not XML: ill-formed document: expected `</path>`, but `</g>` was found",
        "save the drawing again",
    ),
    (
        "svg::xml",
        "<svg>\n\n<path d='&bomb;'/></svg>",
        "`f.svg`: line 3 is not XML: at 1..5: unrecognized entity `bomb`",
        "save the drawing again",
    ),
    (
        "svg::xml",
        "<svg><g><path d='M0 0h1'/>",
        "`f.svg`: it ends before all of its elements do",
        "save the drawing again",
    ),
    (
        "svg::dtd",
        "<!DOCTYPE svg [<!ENTITY a \"aaaa\"><!ENTITY b \"&a;&a;\">]><svg><path d='&b;'/></svg>",
        "`f.svg`: it has a document type definition, which is not read",
        "take out the <!DOCTYPE ..> line; nothing outside the file is ever fetched",
    ),
    (
        "svg::not_svg",
        "<html><svg/></html>",
        "`f.svg`: it is no SVG drawing: its outermost element is <html>",
        "save the drawing as plain SVG",
    ),
    (
        "svg::not_svg",
        "",
        "`f.svg`: it is no SVG drawing: it has no element",
        "save the drawing as plain SVG",
    ),
    (
        "svg::no_shape",
        "<svg><text>bell</text><defs><path d='M0 0h1'/></defs></svg>",
        "`f.svg`: it has no path, and no other shape that is drawn",
        "draw the section as one closed path",
    ),
    (
        "svg::several_shapes",
        "<svg><path id='inside' d='M0 0h1'/><path d='M0 0h1'/><circle id='hole' r='1'/></svg>",
        "`f.svg`: it has 3 shapes",
        "say which one is the section: id = ..; known here: inside, hole",
    ),
    (
        "svg::several_shapes",
        "<svg><path d='M0 0h1'/><path d='M0 0h1'/></svg>",
        "`f.svg`: it has 2 shapes",
        "give the section's path an id, and name it here: id = \"section\"",
    ),
    (
        "svg::css_transform",
        "<svg><g style='fill:none; transform: scale(2)'>\n<path d='M1 0h1v1z'/></g></svg>",
        "`f.svg`: the shape on line 2 has a transform in CSS, which is not read",
        "write it as the attribute transform=\"..\"",
    ),
    (
        "svg::css_transform",
        "<svg><style>/* */ .a { text-transform: none } path { rotate: 5deg }</style><path d='M1 0h1v1z'/></svg>",
        "`f.svg`: its style sheet has a transform in CSS, which is not read",
        "write it as the attribute transform=\"..\"",
    ),
    (
        "svg::transform",
        "<svg>\n<path transform='turn(3)' d='M1 0h1v1z'/></svg>",
        "`f.svg`: the transform on line 2 cannot be read: unexpected data at position 1",
        "write it as in transform=\"translate(10 20) rotate(90)\"",
    ),
    (
        "svg::transform",
        "<svg width='1mm' viewBox='0 0 1 1'><path transform='scale(0 1)' d='M1 0h1v1z'/></svg>",
        "`f.svg`: the transforms of the shape on line 1 leave nothing of it",
        "look for a scale of 0",
    ),
    (
        "svg::no_size",
        "<svg width='100' viewBox='0 0 1 1'><path d='M1 0h1v1z'/></svg>",
        "`f.svg`: its size `100` is not in mm, cm or in, so it does not say how large the part is",
        "give the size of one unit of the drawing here: scale = 1",
    ),
    (
        "svg::no_size",
        "<svg><path d='M1 0h1v1z'/></svg>",
        "`f.svg`: it does not say how large it is",
        "give the size of one unit of the drawing here: scale = 1",
    ),
    (
        "svg::uneven_size",
        "<svg width='100mm' height='100mm' viewBox='0 0 100 50'><path d='M1 0h1v1z'/></svg>",
        "`f.svg`: by its width one unit is 1 mm, by its height 2 mm",
        "give the size of one unit here: scale = 1",
    ),
    (
        "svg::view_box",
        "<svg width='100mm' viewBox='0 0 100'><path d='M1 0h1v1z'/></svg>",
        "`f.svg`: its viewBox `0 0 100` cannot be read: viewBox contains an invalid number",
        "write four numbers: viewBox=\"0 0 60 100\"",
    ),
    (
        "svg::length",
        "<svg width='-1mm' viewBox='0 0 1 1'><path d='M1 0h1v1z'/></svg>",
        "`f.svg`: its width `-1mm` is not a length",
        "write a number, or a number with mm, cm, in, pt or pc",
    ),
    (
        "svg::attribute",
        "<svg width='1mm' viewBox='0 0 1 1'><rect width='3'/></svg>",
        "`f.svg`: its <rect> has no width and height that can be drawn",
        "draw the section as one closed path",
    ),
    (
        "svg::attribute",
        "<svg width='1mm' viewBox='0 0 1 1'><polygon points='M 3 4'/></svg>",
        "`f.svg`: its <polygon> has no points that can be drawn",
        "draw the section as one closed path",
    ),
    (
        "svg::path_data",
        "<svg width='1mm' viewBox='0 0 1 1'><path d='M1 0 h1 v1 x z'/></svg>",
        "`f.svg`: its path data cannot be read after command 3: unexpected data at position 12",
        "path data are commands M L H V C S Q T A Z with numbers, and start with M",
    ),
    (
        "svg::empty_path",
        "<svg width='1mm' viewBox='0 0 1 1'><path d='M1 0 z M2 0'/></svg>",
        "`f.svg`: its path draws nothing",
        "draw the section as one closed path",
    ),
    (
        "svg::several_lines",
        "<svg width='1mm' viewBox='0 0 1 1'><path d='M1 0 h9 v9 z M3 1 h1 v1 z'/></svg>",
        "`f.svg`: its path draws more than one closed line",
        "an outline is one line; give each hole a path of its own and name it under `voids`",
    ),
    (
        "svg::out_of_range",
        "<svg width='1mm' viewBox='0 0 1 1'><path d='M1 0 h1e300 v9 z'/></svg>",
        "`f.svg`: its path leads farther out than can be computed with",
        "look at the scale and at the powers of ten",
    ),
    (
        "svg::out_of_range",
        "<svg width='1mm' viewBox='0 0 1 1'><path d='M1 0 A1e300 1e300 0 1 0 2 0 z'/></svg>",
        "`f.svg`: its path leads farther out than can be computed with",
        "look at the scale and at the powers of ten",
    ),
    (
        "svg::past_axis",
        "<svg width='1mm' viewBox='0 0 1 1'><path d='M-1 0 h3 v1 z'/></svg>",
        "`f.svg`: its path lies on both sides of the axis, from r = -1 mm to r = 2 mm",
        "draw the half section; the axis is the line x = 0 of the drawing unless axis_x",
    ),
];

#[test]
fn drawings() {
    check(DRAWINGS, "{ svg = \"f.svg\" }", 17);
}

#[test]
fn a_shape_that_is_named() {
    let cases: &[Case] = &[
        (
            "svg::unknown_id",
            "<svg><path id='section' d='M0 0h1'/><path id='frame' d='M0 0h1'/></svg>",
            "`f.svg`: it has no shape with the id `sektion`",
            "did you mean `section`? Known here: section, frame",
        ),
        (
            "svg::unknown_id",
            "<svg><path d='M0 0h1'/></svg>",
            "`f.svg`: it has no shape with the id `sektion`",
            "no shape of the drawing has an id; give the section's path one",
        ),
        (
            "svg::apart",
            "<svg><symbol>\n<path id='sektion' d='M0 0h1'/></symbol></svg>",
            "`f.svg`: the shape on line 2 stands inside <symbol>",
            "its size and place depend on where it is used; move it to the drawing itself",
        ),
    ];
    check(cases, "{ svg = \"f.svg\", id = \"sektion\" }", 2);
}

const TABLES: &[Case] = &[
    (
        "csv::empty",
        "# nothing yet\n\n",
        "`f.csv`: there is nothing in it",
        "the first line names the columns: r or d, and z",
    ),
    (
        "csv::no_names",
        "40,0\n60,0\n60,12\n",
        "`f.csv`: its first line has numbers in place of the columns' names",
        "write a line like d,z before the numbers",
    ),
    (
        "csv::unknown_column",
        "dia,z\n40,0\n",
        "`f.csv`: it has a column called `dia`",
        "known here: r, d, z; numbers are in the part's unit, mm",
    ),
    (
        "csv::column_twice",
        "d,z,z\n40,0,0\n",
        "`f.csv`: it has two columns called `z`",
        "take one of them out",
    ),
    (
        "csv::r_and_d",
        "r,d,z\n20,40,0\n",
        "`f.csv`: it has both radii and diameters",
        "keep the column r or the column d",
    ),
    (
        "csv::missing_column",
        "z\n0\n",
        "`f.csv`: it has no column r or d",
        "the columns are called r or d, and z, and are divided by commas, semicolons or tabs",
    ),
    (
        "csv::missing_column",
        "r\n0\n",
        "`f.csv`: it has no column z",
        "the columns are called r or d, and z",
    ),
    (
        "csv::values",
        "d,z\n40,0\n60,5,0\n60,12\n",
        "`f.csv`: line 3 has 3 values, and there are 2 columns",
        "write one value a column",
    ),
    (
        "csv::values",
        "d,z\n40,0\n60,5,0,0\n60,12\n",
        "`f.csv`: line 3 has 4 values, and there are 2 columns",
        "the comma divides columns: write decimals with a point, as in 12.5",
    ),
    (
        "csv::no_value",
        "d;z\n40;0\n60;\n60;12\n",
        "`f.csv`: line 3 lacks a value",
        "write one value a column",
    ),
    (
        "csv::decimal_comma",
        "d;z\n40;0\n60,5;0\n60;12\n",
        "`f.csv`: line 3 has `60,5` with a decimal comma",
        "write decimals with a point: 60.5",
    ),
    (
        "csv::not_a_number",
        "d,z\n40,0\n60 mm,0\n60,12\n",
        "`f.csv`: `60 mm` on line 3 is not a number",
        "values are plain numbers, without units and expressions",
    ),
    (
        "csv::not_a_number",
        "d,z\n40,0\nnan,0\n60,12\n",
        "`f.csv`: `nan` on line 3 is not a number",
        "values are plain numbers, without units and expressions",
    ),
    (
        "csv::past_axis",
        "d,z\n40,0\n-60,0\n60,12\n",
        "`f.csv`: the station on line 3 lies past the axis",
        "the section lies on one side of the axis",
    ),
    (
        "csv::out_of_range",
        "d,z\n40,0\n1e99,0\n60,12\n",
        "`f.csv`: the station on line 3 is farther out than can be computed with",
        "look at the powers of ten",
    ),
    (
        "csv::repeated",
        "d,z\n40,0\n60,0\n60,0\n60,12\n",
        "`f.csv`: the station on line 4 is the one before again, at r = 30, z = 0 mm",
        "take one of the two out",
    ),
    (
        "csv::too_few",
        "d,z\n40,0\n60,0\n40,0\n",
        "`f.csv`: 2 stations enclose nothing",
        "give three stations or more",
    ),
];

#[test]
fn tables() {
    check(TABLES, "{ csv = \"f.csv\" }", 14);
}

/// Answers every name with the same bytes, or an error.
struct Always(io::Result<Vec<u8>>);

impl Neighbours for Always {
    fn read(&self, _: &str) -> io::Result<Vec<u8>> {
        match &self.0 {
            Ok(bytes) => Ok(bytes.clone()),
            Err(error) => Err(error.kind().into()),
        }
    }
}

#[test]
fn files_that_cannot_be_read() {
    let cases = [
        (
            Err(io::ErrorKind::NotFound.into()),
            "file::missing",
            "there is no file `f.csv`",
        ),
        (
            Err(io::ErrorKind::PermissionDenied.into()),
            "file::unreadable",
            "`f.csv` cannot be read: permission denied",
        ),
        (
            Ok(vec![b' '; (16 << 20) + 1]),
            "file::too_long",
            "`f.csv` has more than 16 MiB",
        ),
        (
            Ok(b"d,z\n40,0\n\xff\xfe".to_vec()),
            "file::not_utf8",
            "`f.csv` is not text in UTF-8: line 3 has a byte that is no letter",
        ),
    ];
    for (answer, code, message) in cases {
        let found = refused("{ csv = \"f.csv\" }", &Always(answer));
        assert_eq!((found.code, &*found.message), (code, message));
    }
}

#[test]
fn a_table_with_many_faults_tells_the_first_ones() {
    let csv = format!("d,z\n{}", "x,y\n".repeat(1000));
    let text = "format = 1\npart = { name = \"p\", unit = \"mm\" }\n[[body]]\nname = \"b\"\ndensity = \"1 kg/m3\"\noutline = { csv = \"f.csv\" }\n";
    let faults = part::read("p.toml", text.as_bytes(), &[], &Files(&[("f.csv", &csv)]));
    assert_eq!(faults.unwrap_err().iter().count(), 10);
}

#[test]
fn hostile_drawings_end_soon() {
    let mut attributes = String::new();
    for number in 0..400_000 {
        write!(attributes, " a{number}=''").unwrap();
    }
    let namespaces = "<g xmlns:a='a'>".repeat(100_000);
    let cases = [
        (
            format!("<svg>{}</svg>", "<g>".repeat(1_000_000)),
            "svg::nesting",
        ),
        (format!("<svg>{namespaces}</svg>"), "svg::nesting"),
        (format!("<svg><path{attributes}/></svg>"), "svg::no_size"),
        (
            format!("<svg>{}</svg>", "<path d='M0 0h1'/>".repeat(500_000)),
            "svg::several_shapes",
        ),
        (
            format!(
                "<svg width='1mm' viewBox='0 0 1 1'><path d='M1 0{}'/></svg>",
                "h1v1".repeat(2_000_000)
            ),
            "limit::edges",
        ),
        (
            format!(
                "<svg width='1mm' viewBox='0 0 1 1'><path d='M1 0{}'/></svg>",
                "z".repeat(8_000_000)
            ),
            "svg::empty_path",
        ),
        (
            format!(
                "<svg><path transform='{}' d='M1 0'/></svg>",
                "scale(1e9)".repeat(1_000_000)
            ),
            "svg::no_size",
        ),
    ];
    for (svg, code) in cases {
        let started = std::time::Instant::now();
        let found = refused("{ svg = \"f.svg\" }", &Files(&[("f.svg", &svg)]));
        assert_eq!(found.code, code);
        // Half a second here in a build without optimisation would be far less in the program.
        assert!(
            started.elapsed().as_secs() < 5,
            "{code}: {:?}",
            started.elapsed()
        );
    }
}
