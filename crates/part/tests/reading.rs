//! What a part file says, in SI units.

use part::{
    Expected, LengthUnit, Material, Neighbours, Part, Setting, Tolerance, length, read, starter,
};
use std::f64::consts::{FRAC_PI_2, TAU};

struct Nothing;

impl Neighbours for Nothing {
    fn read(&self, _: &str) -> std::io::Result<Vec<u8>> {
        Err(std::io::ErrorKind::NotFound.into())
    }
}

fn part_with(text: &str, settings: &[(&str, &str)]) -> Part {
    let settings: Vec<Setting> = settings
        .iter()
        .map(|(name, value)| Setting {
            name: (*name).to_owned(),
            value: (*value).to_owned(),
        })
        .collect();
    read("bell.toml", text.as_bytes(), &settings, &Nothing).expect("the file is legal")
}

fn part(text: &str) -> Part {
    part_with(text, &[])
}

const BODY: &str = r#"
[[body]]
name = "bell"
density = "8.8 g/cm3"
outline = [ { d = 40, z = 0 }, { d = 60 }, { z = 12 }, { d = 40 } ]
"#;

fn sized(sizes: &str) -> Part {
    part(&format!(
        "format = 1\n[part]\nname = \"bell\"\nunit = \"mm\"\n[size]\n{sizes}{BODY}"
    ))
}

fn value(part: &Part, name: &str) -> f64 {
    let size = part.sizes.iter().find(|size| size.name == name);
    size.expect("the size is there").value
}

/// True where the two differ by rounding only.
fn close(a: f64, b: f64) -> bool {
    (a - b).abs() <= 4.0 * f64::EPSILON * b.abs()
}

#[test]
fn the_head_of_a_part() {
    let text = format!(
        "format = 1\n[part]\nname = \"Fog bell\"\nnumber = \"SL-021\"\nunit = \"in\"\nrevolve = \"360 / 4\"\n\
         general_tolerance = \"ISO 2768-mK\"\n{BODY}"
    );
    let part = part(&text);
    assert_eq!(part.name, "Fog bell");
    assert_eq!(part.number.as_deref(), Some("SL-021"));
    assert_eq!(part.unit, LengthUnit::Inch);
    assert_eq!(part.revolve, FRAC_PI_2);
    assert_eq!(part.general_tolerance.as_deref(), Some("ISO 2768-mK"));
    let bounds = part.bodies[0].region.bounds();
    assert!(close(bounds.max.x, 30.0 * 0.0254), "{bounds:?}");
    assert!(matches!(part.bodies[0].material, Material::Density(density) if density == 8800.0));
}

#[test]
fn a_full_turn_is_exact() {
    assert_eq!(sized("a = 1").revolve, TAU);
    let text = format!(
        "format = 1\npart = {{ name = \"a\", unit = \"mm\", revolve = \"4 * 90\" }}\n{BODY}"
    );
    assert_eq!(part(&text).revolve, TAU);
}

#[test]
fn general_tolerances() {
    for tolerance in [
        "ISO 2768-f",
        "ISO 2768-vL",
        "ISO 8062-3 DCTG 1",
        "ISO 8062-3 DCTG 16",
        "ISO 8062-3 DCTG10",
    ] {
        let text = format!(
            "format = 1\npart = {{ name = \"a\", unit = \"mm\", general_tolerance = \"{tolerance}\" }}\n{BODY}"
        );
        assert_eq!(part(&text).general_tolerance.as_deref(), Some(tolerance));
    }
}

#[test]
fn sizes_with_their_tolerances() {
    let part = sized(
        "mouth = { is = 320, tol = 1.5 }\nbore = { is = 25, tol = \"H7\" }\nlip = { is = 14, tol = [-0.5, \"1/32 in\"] }\n\
         crown = \"mouth * 0.52\"\ntilt = { is = \"8 deg\", tol = 0.5 }\nratio = \"mouth / lip\"\nface = \"mouth * lip\"\n\
         shaft = { is = 25, tol = \"js6\" }",
    );
    let names: Vec<&str> = part.sizes.iter().map(|size| size.name.as_str()).collect();
    assert_eq!(
        names,
        [
            "mouth", "bore", "lip", "crown", "tilt", "ratio", "face", "shaft"
        ]
    );
    assert_eq!(value(&part, "mouth"), 0.32);
    assert!(close(value(&part, "crown"), 0.1664));
    assert_eq!(value(&part, "tilt"), 8.0);
    assert!(close(value(&part, "ratio"), 320.0 / 14.0));
    assert!(close(value(&part, "face"), 0.32 * 0.014));
    let lengths: Vec<bool> = part.sizes.iter().map(|size| size.is_length).collect();
    assert_eq!(lengths, [true, true, true, true, false, false, false, true]);
    assert_eq!(
        part.sizes[0].tolerance,
        Some(Tolerance::Limits(-0.0015, 0.0015))
    );
    assert_eq!(
        part.sizes[1].tolerance,
        Some(Tolerance::Iso286("H7".to_owned()))
    );
    assert!(
        matches!(part.sizes[2].tolerance, Some(Tolerance::Limits(lower, upper))
        if lower == -0.0005 && close(upper, 0.0254 / 32.0))
    );
    assert_eq!(part.sizes[3].tolerance, None);
    assert_eq!(part.sizes[4].tolerance, Some(Tolerance::Limits(-0.5, 0.5)));
    assert_eq!(
        part.sizes[7].tolerance,
        Some(Tolerance::Iso286("js6".to_owned()))
    );
    assert_eq!(part.sizes[3].written, "mouth * 0.52");
    assert_eq!(part.sizes[0].written, "320");
}

#[test]
fn sizes_in_any_order_and_long_chains() {
    let part = sized("a = \"b + c\"\nb = \"2 * c\"\nc = 5");
    assert!(close(value(&part, "a"), 0.015));
    // Each names the next one twice: without a memory of values this would take 2^2000 steps.
    let chain: Vec<String> = (0..2000)
        .map(|i| format!("a{i} = \"(a{0} + a{0}) / 2\"", i + 1))
        .collect();
    let part = sized(&format!("{}\na2000 = 7", chain.join("\n")));
    assert!(close(value(&part, "a0"), 0.007));
}

#[test]
fn sizes_set_from_outside() {
    let text = format!(
        "format = 1\n[part]\nname = \"a\"\nunit = \"mm\"\n[size]\nbore = {{ is = 25, tol = \"H7\" }}\nwall = \"bore / 5\"\n{}",
        BODY.replace("d = 60", "d = \"2 * bore + 10\"")
    );
    let part = part_with(&text, &[("bore", "26")]);
    assert_eq!(value(&part, "bore"), 0.026);
    assert!(close(value(&part, "wall"), 0.0052));
    assert_eq!(part.sizes[0].written, "26");
    assert_eq!(
        part.sizes[0].tolerance,
        Some(Tolerance::Iso286("H7".to_owned()))
    );
    assert!(close(part.bodies[0].region.bounds().max.x, 0.031));
    let part = part_with(&text, &[("wall", "1/4 in"), ("bore", "wall * 5")]);
    assert!(close(value(&part, "bore"), 0.03175));
}

#[test]
fn materials_are_the_files_own_or_a_designation() {
    let text = r#"
        format = 1
        part = { name = "a", unit = "mm" }
        [[material]]
        name = "house bronze"
        density = "0.32 lb/in3"
        [[body]]
        name = "one"
        material = "house bronze"
        outline = [ { d = 40, z = 0 }, { d = 60 }, { z = 12 }, { d = 40 } ]
        [[body]]
        name = "two"
        material = "CC480K"
        outline = [ { d = 60, z = 0 }, { d = 80 }, { z = 12 }, { d = 60 } ]
    "#;
    let part = part(text);
    assert_eq!(part.materials.len(), 1);
    assert!(close(
        part.materials[0].density,
        0.32 * 0.453_592_37 / (0.0254 * 0.0254 * 0.0254)
    ));
    assert_eq!(part.bodies[0].material, Material::Own(0));
    let Material::Designation { word, span } = &part.bodies[1].material else {
        panic!("a designation is looked up by others");
    };
    assert_eq!(word, "CC480K");
    assert_eq!(&text[span.clone()], "\"CC480K\"");
}

#[test]
fn what_is_expected_in_si_units() {
    let text = format!(
        "format = 1\npart = {{ name = \"a\", unit = \"in\" }}\nsize = {{ d = 2 }}\n{BODY}[expect]\n\
         mass = \"12.4 kg +- 2 %\"\nvolume = \"1.4 l ± 10 ml\"\nsurface = \"300 cm2 +/- 1 %\"\ncentre_z = \"-101 mm +- 1 mm\"\n\
         inertia_axis = \"2500 kg cm2 +- 3 %\"\nlargest_d = \"d + 1 +- 1/32 in\"\nlength = \"240 mm +1 % -2 %\"\n"
    );
    let expect = part(&text).expect;
    let rows: Vec<(Expected, f64, f64, f64)> = expect
        .iter()
        .map(|line| {
            (
                line.quantity,
                line.value,
                line.deviation.0,
                line.deviation.1,
            )
        })
        .collect();
    let wanted = [
        (Expected::Mass, 12.4, -0.248, 0.248),
        (Expected::Volume, 0.0014, -1e-5, 1e-5),
        (Expected::Surface, 0.03, -0.0003, 0.0003),
        (Expected::CentreZ, -0.101, -0.001, 0.001),
        (Expected::InertiaAxis, 0.25, -0.0075, 0.0075),
        (
            Expected::LargestDiameter,
            0.0762,
            -0.000_793_75,
            0.000_793_75,
        ),
        (Expected::Length, 0.24, -0.0048, 0.0024),
    ];
    assert_eq!(rows.len(), wanted.len());
    for (row, want) in rows.iter().zip(wanted) {
        assert_eq!(row.0, want.0);
        assert!(
            close(row.1, want.1) && close(row.2, want.2) && close(row.3, want.3),
            "{row:?} {want:?}"
        );
    }
    assert_eq!(expect[0].written, "12.4 kg +- 2 %");
    assert_eq!(&text[expect[0].span.clone()], "\"12.4 kg +- 2 %\"");
}

#[test]
fn steps_may_stand_under_headers_too() {
    let text = "
        format = 1
        [part]
        name = 'a'
        unit = 'mm'
        [[body]]
        name = 'bell'
        density = '1 g/cm3'
        [[body.outline]]
        d = 40
        z = 0
        [[body.outline]]
        d = 60
        [[body.outline]]
        z = 12
        [[body.outline]]
        d = 40
    ";
    assert_eq!(part(text).bodies[0].region.outer().edges().len(), 4);
}

#[test]
fn the_starter_is_legal() {
    let part = part(&starter("Ring \"A\" \\ 7"));
    assert_eq!(part.name, "Ring \"A\" \\ 7");
    assert_eq!(part.bodies.len(), 1);
    assert_eq!(part.expect.len(), 2);
    let bounds = part.bodies[0].region.bounds();
    assert!(
        close(bounds.max.x, 0.06) && close(bounds.max.y, 0.06),
        "{bounds:?}"
    );
}

#[test]
fn a_byte_order_mark_and_dos_line_ends_are_taken() {
    let text = format!("\u{feff}{}", starter("bell").replace('\n', "\r\n"));
    assert_eq!(part(&text).name, "bell");
}

#[test]
fn lengths_of_the_command_line() {
    let cases = [
        ("0.1mm", LengthUnit::Inch, 0.0001),
        ("1/64 in", LengthUnit::Millimetre, 0.0254 / 64.0),
        ("0.1", LengthUnit::Millimetre, 0.0001),
        ("0.1", LengthUnit::Foot, 0.03048),
        ("50 um", LengthUnit::Metre, 5e-5),
    ];
    for (text, bare, metres) in cases {
        assert!(close(length(text, bare).expect(text), metres), "{text}");
    }
    for (text, code) in [
        ("8 deg", "value::wrong_dimension"),
        ("", "expression::empty"),
        ("mouth", "expression::unknown_size"),
        ("1 kg", "expression::unknown_unit"),
    ] {
        assert_eq!(
            length(text, LengthUnit::Millimetre).expect_err(text).code,
            code
        );
    }
}

#[test]
fn faults_that_do_not_depend_on_each_other_are_told_together() {
    let text = "
format = 2
[part]
name = 'bell'
unit = 'mn'
revolve = 'tilt'
[size]
bore = '25 +'
lip = 3x
[[body]]
name = 'bell'
materiel = 'CC480K'
outline = [ { d = 40, z = 0 }, { d = 60, ruond = 3 }, { z = 'lip' }, { d = 40,5 } ]
[expect]
mass = '12 kg'
";
    let faults = read("bell.toml", text.as_bytes(), &[], &Nothing).expect_err("all is wrong");
    let codes: Vec<&str> = faults.iter().map(|fault| fault.code).collect();
    let expected = [
        "part::format_unknown",
        "part::unit",
        "expression::unknown_size",
        "expression::operand",
        "toml::unquoted",
        "table::unknown_key",
        "table::unknown_key",
        "toml::equals",
        "expect::no_tolerance",
    ];
    assert_eq!(codes, expected);
}
