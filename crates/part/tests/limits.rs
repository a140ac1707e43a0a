//! Whatever the bytes, the reader ends soon, in little memory, with a fault.

use part::{Faults, Neighbours, read};
use proptest::prelude::*;
use std::fmt::Write;

struct Nothing;

impl Neighbours for Nothing {
    fn read(&self, _: &str) -> std::io::Result<Vec<u8>> {
        Err(std::io::ErrorKind::NotFound.into())
    }
}

const HEAD: &str = "format = 1\npart = { name = \"a\", unit = \"mm\" }\n";
const BODY: &str = "[[body]]\nname = \"a\"\ndensity = \"1 g/cm3\"\n";

fn faults(text: impl AsRef<[u8]>) -> Faults {
    let read = read("bell.toml", text.as_ref(), &[], &Nothing);
    read.map(|_| ()).expect_err("this is no part file")
}

fn codes(text: impl AsRef<[u8]>) -> Vec<&'static str> {
    faults(text).iter().map(|fault| fault.code).collect()
}

/// The faults as a terminal shows them.
fn drawn(faults: &Faults) -> String {
    let theme = miette::GraphicalTheme::unicode_nocolor();
    let handler = miette::GraphicalReportHandler::new_themed(theme);
    let mut out = String::new();
    for diagnostic in faults.diagnostics() {
        handler
            .render_report(&mut out, diagnostic)
            .expect("a report is drawn into memory");
    }
    out
}

#[test]
fn a_file_of_more_than_16_mib_is_refused_unread() {
    let faults = faults(vec![b'#'; (16 << 20) + 1]);
    let fault = faults.iter().next().expect("there is one fault");
    assert_eq!(fault.code, "limit::text");
    assert_eq!(
        fault.message,
        "the file has 16.0 MiB, and a part file at most 16 MiB"
    );
    assert!(drawn(&faults).len() < 1000);
}

#[test]
fn bytes_that_are_no_text() {
    assert_eq!(codes([0xFF, 0xFE, b'a', 0]), ["part::not_utf8"]);
    assert_eq!(codes([0x80; 1000]), ["part::not_utf8"]);
    let faults = faults(b"format = 1\nname = \"Gl\xF6ckchen\"\n");
    let fault = faults.iter().next().expect("there is one fault");
    assert_eq!(fault.labels[0].span.start, 21);
    assert!(
        drawn(&faults).contains("bell.toml:2:11"),
        "{}",
        drawn(&faults)
    );
    assert!(
        codes([0; 1000])
            .iter()
            .all(|code| code.starts_with("toml::"))
    );
}

#[test]
fn deep_nesting_is_refused() {
    let text = |open: &str| format!("a = {}", open.repeat(200_000));
    assert!(codes(text("[")).contains(&"limit::nesting"));
    assert!(codes(text("{ a = ")).contains(&"limit::nesting"));
    assert!(codes(text("[ { a = ")).contains(&"limit::nesting"));
    assert_eq!(codes("[".repeat(200_000))[0], "toml::key");
    let key = format!("{} = 1", "a.".repeat(100_000) + "a");
    assert!(codes(key).contains(&"limit::nesting"));
}

#[test]
fn too_many_values_are_refused() {
    let many = format!("{HEAD}[size]\na = [{}]", "0,".repeat(1_300_000));
    assert_eq!(codes(many), ["limit::values"]);
    let headers = format!("{HEAD}{}", "[[body]]\n".repeat(1_300_000));
    assert_eq!(codes(headers), ["limit::values"]);
}

#[test]
fn too_many_keys_are_refused() {
    let keys: Vec<String> = (0..65_538).map(|i| format!("a{i} = {i}")).collect();
    let keys = keys.join("\n");
    let codes = codes(format!("{HEAD}[size]\n{keys}\n{BODY}outline = []"));
    assert_eq!(codes, ["limit::keys", "limit::keys", "outline::empty"]);
}

#[test]
fn too_many_edges_are_refused() {
    let steps = "  { dz = 1 },\n".repeat(100_001);
    let text = format!("{HEAD}{BODY}outline = [\n{{ d = 1, z = 0 }},\n{steps}]");
    assert_eq!(codes(text), ["limit::edges"]);
    let repeats = "{ repeat = 1000000, steps = [ { dz = 1 } ] },\n".repeat(20_000);
    let text = format!("{HEAD}{BODY}outline = [\n{{ d = 1, z = 0 }},\n{repeats}]");
    assert_eq!(codes(text), ["limit::edges"]);
    let body = |i: usize| {
        format!(
            "[[body]]\nname = \"{i}\"\ndensity = \"1 g/cm3\"\noutline = [ {{ d = 1, z = 0 }}, {{ repeat = 60000, steps = [ {{ dz = 1 }} ] }} ]\n"
        )
    };
    let text = format!("{HEAD}{}{}{}", body(1), body(2), body(3));
    assert!(
        codes(text).contains(&"limit::edges"),
        "the limit is the part's, not the body's"
    );
}

#[test]
fn outlines_too_intricate_to_be_checked_are_refused() {
    // Arcs to and fro, one above the other, that bulge a hundred thousand times as far as they lie apart.
    let mut steps = String::from("{ r = 10, z = 0 }");
    for row in 0..2000 {
        let r = if row % 2 == 0 { 20 } else { 10 };
        let side = if row % 2 == 0 { "left" } else { "right" };
        write!(
            steps,
            ", {{ r = {r}, z = {row}e-4, arc = 9, centre_on = \"{side}\" }}, {{ z = {row}.9e-4 }}"
        )
        .expect("a string takes all");
    }
    let text = format!("{HEAD}{BODY}outline = [ {steps}, {{ r = 5 }}, {{ z = 0 }} ]\n");
    assert_eq!(codes(text), ["outline::too_intricate"]);
}

#[test]
fn two_combs_through_each_other_are_told_once() {
    let mut upright = String::from("{ r = 10, z = 0 }");
    let mut lying = String::from("{ r = 9, z = 2 }");
    for tooth in 0..300 {
        let [r, next] = [tooth + 10, tooth + 11];
        write!(
            upright,
            ", {{ r = {r}, z = 400 }}, {{ r = {r}.5 }}, {{ z = 1 }}, {{ r = {next} }}"
        )
        .expect("a string takes all");
        let [z, next] = [tooth + 2, tooth + 3];
        write!(
            lying,
            ", {{ r = 309, z = {z} }}, {{ z = {z}.5 }}, {{ r = 9.5 }}, {{ z = {next} }}"
        )
        .expect("a string takes all");
    }
    let text = format!(
        "{HEAD}{BODY}outline = [ {upright}, {{ z = 0 }} ]\n{}outline = [ {lying}, {{ r = 9 }} ]\n",
        BODY.replace("\"a\"", "\"b\"")
    );
    assert_eq!(codes(text), ["body::overlap"]);
}

#[test]
fn of_many_corners_that_do_not_fit_a_hundred_are_tried() {
    let mut steps = String::from("{ r = 10, z = 0 }");
    for row in 1..1000 {
        let r = if row % 2 == 0 { 20 } else { 12 };
        write!(steps, ", {{ r = {r}, z = {row}, curve = [ {{ r = 14, z = {row} }}, {{ r = 17, z = {row} }} ], round = 90 }}").expect("a string takes all");
    }
    let text = format!("{HEAD}{BODY}outline = [ {steps}, {{ r = 10 }} ]\n");
    let faults = faults(text);
    let first = faults.iter().next().expect("there are faults");
    let last = faults.iter().last().expect("there are faults");
    assert!(first.code.starts_with("corner::"), "{}", first.code);
    assert_eq!(last.message, "and 50 more faults that are not shown");
}

#[test]
fn long_expressions_are_refused_and_long_chains_are_not() {
    let sized = |sizes: &str| format!("{HEAD}[size]\n{sizes}\n{BODY}outline = []");
    let long = sized(&format!("a = \"{}1\"", "1+".repeat(100_000)));
    assert_eq!(codes(long), ["limit::expression", "outline::empty"]);
    let deep = sized(&format!("a = \"{}\"", "(".repeat(50_000)));
    assert_eq!(codes(deep), ["limit::parentheses", "outline::empty"]);
    let chain: Vec<String> = (0..60_000)
        .map(|i| format!("a{i} = \"a{}\"", i + 1))
        .collect();
    let chain = chain.join("\n");
    assert_eq!(
        codes(sized(&format!("{chain}\na60000 = 1"))),
        ["outline::empty"]
    );
    let circle = sized(&format!("{chain}\na60000 = \"a0\""));
    assert_eq!(codes(circle), ["size::circle", "outline::empty"]);
}

#[test]
fn of_many_faults_fifty_are_shown() {
    let steps = "{ q = 1 },\n".repeat(400);
    let text = format!("{HEAD}{BODY}outline = [\n{steps}]");
    let faults = faults(text);
    let last = faults.iter().last().expect("there are faults");
    assert_eq!(faults.iter().count(), 51);
    assert_eq!(last.message, "and 350 more faults that are not shown");
    let endless = codes("=\n".repeat(1 << 20));
    assert_eq!(endless.len(), 51);
    assert_eq!(endless[50], "part::more_faults");
}

#[test]
fn a_report_is_short_however_long_a_line_is() {
    let long = "x".repeat(1 << 20);
    let texts = [
        format!("{long} = 1"),
        format!("a = {long}"),
        format!("a = \"{long}"),
        format!("{HEAD}[size]\na = \"{long}\""),
        format!(
            "{HEAD}{BODY}material = \"{long}\"\noutline = [ {{ d = 1, z = 0, {long} = 3 }}, {} ]",
            "{ q = 1 },".repeat(100_000)
        ),
        format!("a = [ {} ]", "b = 1, ".repeat(100_000)),
        format!(
            "{HEAD}{BODY}outline = [ {} ]",
            "{ d = 1, r = 1 }, ".repeat(50_000)
        ),
    ];
    for text in texts {
        let drawn = drawn(&faults(&text));
        assert!(
            drawn.len() < 200_000,
            "{} bytes for {}",
            drawn.len(),
            &text[..40]
        );
    }
}

#[test]
fn numbers_at_the_ends_of_what_can_be_written() {
    let numbers = [
        "nan",
        "inf",
        "-inf",
        "1e308",
        "-1e308",
        "1e-308",
        "5e-324",
        "9223372036854775807",
        "1e400",
        "0x7fffffffffffffff",
    ];
    for d in numbers {
        for z in numbers {
            let text = format!(
                "{HEAD}{BODY}outline = [ {{ d = {d}, z = {z} }}, {{ dd = {z} }}, {{ dz = {d} }}, {{ dd = {d}, arc = {z}, centre_on = \"left\" }} ]"
            );
            assert!(!codes(text).is_empty(), "{d} {z}");
        }
    }
}

/// Pieces of part files, right and wrong.
fn piece() -> impl Strategy<Value = &'static str> {
    prop::sample::select(vec![
        HEAD,
        BODY,
        "outline = [",
        "]",
        "{ d = 40, z = 0 },",
        "{ d = 60 },",
        "{ dz = 12 },",
        "{ z = \"12 + a\" },",
        "{ repeat = 3, steps = [",
        "] },",
        "{ d = 30, arc = 50, centre_on = \"left\" },",
        "{ z = 3, taper = \"1:20\", round = 1 },",
        "[size]\n",
        "a = 3\n",
        "b = \"a * 2\"\n",
        "c = { is = \"b\", tol = [-1, 1] }\n",
        "[expect]\nmass = \"1 kg +- 2 %\"\n",
        "[[material]]\nname = \"x\"\ndensity = \"1 kg/m3\"\n",
        "wall = { line = [",
        "], thickness = 1, grow = \"left\" }\n",
        "voids = [ [",
        "{ circle = { r = 9, z = 3 }, radius = 2 }",
        "\n",
        "\"",
        "{",
        "}",
        "[",
        ",",
        "=",
        "1e300",
        "nan",
        "-",
        "é",
        "\u{0}",
    ])
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(1000))]

    #[test]
    fn any_pieces_are_read_or_refused(pieces in prop::collection::vec(piece(), 0..30)) {
        if let Err(faults) = read("bell.toml", pieces.concat().as_bytes(), &[], &Nothing) {
            prop_assert!(!drawn(&faults).is_empty());
        }
    }

    #[test]
    fn any_bytes_are_refused(bytes in prop::collection::vec(any::<u8>(), 0..300)) {
        prop_assert!(!drawn(&faults(bytes)).is_empty());
    }
}
