//! Steps as plain numbers.

use super::*;
use crate::LengthUnit;
use crate::outline::{Coordinate, Corner, Kind, Side, Slope};
use crate::sizes::Sizes;
use crate::tree::parse;

fn read(text: &str) -> Result<Vec<Step>, Vec<&'static str>> {
    let text = format!("outline = {text}");
    let mut found = Found::default();
    let root = parse(&text, &mut found).root;
    let values = Values {
        text: &text,
        unit: LengthUnit::Millimetre,
        sizes: Sizes::default(),
    };
    let value = &root.get("outline").unwrap().value;
    let mut edges = EdgeCount::default();
    let read = steps(value, Use::Outline, &values, &mut edges, &mut found);
    read.ok_or_else(|| found.codes())
}

/// The coordinates in millimetres, increments with their sign.
fn coordinates(steps: &[Step]) -> Vec<String> {
    let word = |coordinate: &Option<(Coordinate, Span)>| match coordinate {
        Some((Coordinate::At(value), _)) => format!("{}", (value * 1e6).round() / 1e3),
        Some((Coordinate::By(value), _)) => format!("{:+}", (value * 1e6).round() / 1e3),
        None => "-".to_owned(),
    };
    let pair = |step: &Step| format!("{} {}", word(&step.to.r), word(&step.to.z));
    steps.iter().map(pair).collect()
}

#[test]
fn diameters_are_halved_and_increments_kept_apart() {
    let steps = read(
        "[ { d = 40, z = 0 }, { r = 25 }, { dd = -6, dz = '1/2 in' }, { dr = 4 }, { z = -3 } ]",
    );
    let expected = ["20 0", "25 -", "-3 +12.7", "+4 -", "- -3"];
    assert_eq!(coordinates(&steps.unwrap()), expected);
}

#[test]
fn every_kind_has_its_numbers() {
    let text = "[
        { d = 40, z = 0, chamfer = [1, 2] },
        { z = 5, taper = '-1:20' },
        { d = 60, angle = 30 },
        { z = 9, taper = 0.1 },
        { d = 80, arc = 50, centre_on = 'right', long = true, round = 3, name = 'flank' },
        { d = 70, via = { d = 75, dz = 1 } },
        { d = 60, centre = { r = 0 }, centre_on = 'left' },
        { d = 50, z = 9, tangent = true },
        { d = 40, z = 7, ellipse = 'z', chamfer = 1 },
        { d = 30, curve = [ { z = 3 } ] },
        { d = 20, curve = [ { z = 3 }, { dd = 2 } ], round = 0 },
    ]";
    let steps = read(text).unwrap();
    let kinds: Vec<&Kind> = steps.iter().map(|step| &step.kind).collect();
    let close = |a: f64, b: f64| (a - b).abs() < 1e-15;
    assert!(matches!(kinds[0], Kind::Line));
    assert!(matches!(kinds[1], Kind::Sloped(Slope::Taper(rate, _)) if close(*rate, -0.05)));
    let sixth = std::f64::consts::FRAC_PI_6;
    assert!(matches!(kinds[2], Kind::Sloped(Slope::Angle(angle, _)) if close(*angle, sixth)));
    assert!(matches!(kinds[3], Kind::Sloped(Slope::Taper(rate, _)) if close(*rate, 0.1)));
    assert!(
        matches!(kinds[4], Kind::Arc { radius, centre_on: Side::Right, long: true, .. } if close(*radius, 0.05))
    );
    assert!(
        matches!(kinds[5], Kind::Via(point, _) if matches!(point.z, Some((Coordinate::By(_), _))))
    );
    assert!(
        matches!(kinds[6], Kind::About(centre) if centre.centre_on == Some(Side::Left) && !centre.long && centre.at.z.is_none())
    );
    assert!(matches!(kinds[7], Kind::Tangent(_)));
    assert!(matches!(
        kinds[8],
        Kind::Ellipse {
            leaves_along_r: false,
            ..
        }
    ));
    assert!(matches!(kinds[9], Kind::Parabola(..)));
    assert!(matches!(kinds[10], Kind::Cubic(..)));
    assert!(
        matches!(&steps[0].corner, Some(Corner::Chamfer([a, b], _)) if close(*a, 0.001) && close(*b, 0.002))
    );
    assert!(matches!(&steps[4].corner, Some(Corner::Round(r, _)) if close(*r, 0.003)));
    assert!(
        matches!(&steps[8].corner, Some(Corner::Chamfer([a, b], _)) if close(*a, 0.001) && close(*b, 0.001))
    );
    assert!(
        steps[10].corner.is_none(),
        "a round of 0 leaves the corner sharp"
    );
    assert_eq!(steps[4].name.as_deref(), Some("flank"));
}

#[test]
fn repeats_are_written_out_with_the_words_for_each_round() {
    let steps = read(
        "[ { d = 40, z = 0 }, { repeat = 2, steps = [ { dz = 6 }, { dd = -4 } ] }, { d = 60 } ]",
    )
    .unwrap();
    assert_eq!(
        coordinates(&steps),
        ["20 0", "- +6", "-2 -", "- +6", "-2 -", "30 -"]
    );
    let words: Vec<&str> = steps.iter().map(|step| step.words.as_str()).collect();
    let expected = [
        "step 1",
        "step 1 (round 1 of the repeat in step 2)",
        "step 2 (round 1 of the repeat in step 2)",
        "step 1 (round 2 of the repeat in step 2)",
        "step 2 (round 2 of the repeat in step 2)",
        "step 3",
    ];
    assert_eq!(words, expected);
}

#[test]
fn repeats_inside_repeats() {
    let inner = "{ repeat = '6/2', steps = [ { dz = 1 } ] }";
    let steps = read(&format!(
        "[ {{ d = 40, z = 0 }}, {{ repeat = 2, steps = [ {{ dd = 2 }}, {inner} ] }} ]"
    ))
    .unwrap();
    assert_eq!(steps.len(), 1 + 2 * (1 + 3));
    let words = "step 1 (round 3 of the repeat in step 2, round 2 of the repeat in step 2)";
    assert_eq!(steps.last().unwrap().words, words);
}

#[test]
fn a_repeat_of_one_round_needs_no_increments() {
    let steps = read("[ { d = 40, z = 0 }, { repeat = 1, steps = [ { d = 60 }, { z = 5 } ] } ]");
    assert_eq!(steps.unwrap().len(), 3);
}

#[test]
fn the_number_of_edges_is_bounded_before_they_are_made() {
    let repeat = |times: &str| {
        format!("[ {{ d = 40, z = 0 }}, {{ repeat = {times}, steps = [ {{ dz = 1 }} ] }} ]")
    };
    assert_eq!(read(&repeat("99999")).unwrap().len(), limits::EDGES);
    for times in ["100000", "9223372036854775807", "1e300"] {
        assert_eq!(read(&repeat(times)), Err(vec!["limit::edges"]), "{times}");
    }
    let open = "{ repeat = 1000, steps = [ ".repeat(limits::REPEATS);
    let nested = format!(
        "[ {{ d = 40, z = 0 }}, {open} {{ dz = 1 }} {} ]",
        "] }".repeat(limits::REPEATS)
    );
    assert_eq!(read(&nested), Err(vec!["limit::edges"]));
    let deeper = format!(
        "[ {open} {open} {{ dz = 1 }} {} ]",
        "] }".repeat(2 * limits::REPEATS)
    );
    assert_eq!(read(&deeper), Err(vec!["limit::repeats"]));
}

#[test]
fn each_mistake_has_its_code() {
    let first = "{ d = 40, z = 0 }";
    let cases = [
        ("{ d = 1, r = 2 }", "step::coordinate_twice"),
        ("{ z = 1, dz = 2 }", "step::coordinate_twice"),
        ("{ r = -1 }", "step::beyond_axis"),
        ("{}", "step::goes_nowhere"),
        ("{ d = 1, arc = 4, tangent = true }", "step::two_kinds"),
        ("{ d = 1, arc = 4 }", "step::centre_on_missing"),
        ("{ d = 1, arc = 0, centre_on = 'left' }", "step::arc_radius"),
        ("{ d = 1, arc = 4, centre_on = 'up' }", "step::side"),
        ("{ d = 1, centre_on = 'left' }", "step::not_an_arc"),
        ("{ d = 1, tangent = true, long = true }", "step::not_an_arc"),
        ("{ d = 1, via = {} }", "point::empty"),
        ("{ d = 1, ellipse = 'd' }", "step::ellipse"),
        ("{ d = 1, curve = [] }", "step::curve_points"),
        ("{ d = 1, z = 2, angle = 8 }", "step::slope_and_both"),
        ("{ angle = 8 }", "step::slope_alone"),
        ("{ d = 1, angle = 120 }", "step::angle_range"),
        ("{ d = 1, taper = '1:-20' }", "step::taper"),
        ("{ d = 1, taper = '1 in 20' }", "step::taper"),
        (
            "{ d = 1, round = 1, chamfer = 1 }",
            "step::round_and_chamfer",
        ),
        ("{ d = 1, chamfer = -1 }", "step::negative_corner"),
        ("{ d = 1, chamfer = [1] }", "step::chamfer_legs"),
        ("{ d = 1e20 }", "limit::length"),
        ("{ d = 1, tangent = 1 }", "table::wrong_type"),
        ("{ d = true }", "table::wrong_type"),
        ("{ d = 1, name = '' }", "table::empty_text"),
        ("{ d = 1, nmae = 'x' }", "table::unknown_key"),
        ("7", "table::wrong_type"),
    ];
    for (step, code) in cases {
        assert_eq!(
            read(&format!("[ {first}, {step} ]")),
            Err(vec![code]),
            "{step}"
        );
    }
}

#[test]
fn a_slip_is_told_once() {
    let cases = [
        "{ diameter = 60 }",
        "{ d = 60, arc = 40, center_on = 'left' }",
        "{ repat = 4, steps = [ { dz = 1 } ] }",
    ];
    for step in cases {
        let codes = read(&format!("[ {{ d = 40, z = 0 }}, {step} ]")).unwrap_err();
        assert_eq!(codes, ["table::unknown_key"], "{step}");
    }
}

#[test]
fn false_is_the_same_as_left_out() {
    let steps = read("[ { d = 40, z = 0 }, { d = 60, tangent = false, long = false } ]");
    assert_eq!(steps.unwrap()[1].kind, Kind::Line);
}
