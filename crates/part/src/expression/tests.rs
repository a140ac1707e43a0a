//! Expressions against values worked out by other means.

use super::*;
use crate::Fault;
use crate::LengthUnit::{self, Inch, Metre, Millimetre};
use crate::dimension::Dimension;
use crate::units::Vocabulary;

/// mouth = 320 and lip = 14 without units, tilt = 8 degrees, ratio = 2.5.
struct Four;

const NAMES: [&str; 4] = ["mouth", "lip", "tilt", "ratio"];

impl Names for Four {
    fn index(&self, word: &str) -> Option<usize> {
        NAMES.iter().position(|name| *name == word)
    }

    fn all(&self) -> Vec<&str> {
        NAMES.to_vec()
    }
}

fn sizes() -> Vec<Option<Quantity>> {
    let size = |value, dimension, made_of| {
        Some(Quantity {
            value,
            dimension,
            made_of,
        })
    };
    vec![
        size(320.0, Dimension::LENGTH, MadeOf::BareSizes),
        size(14.0, Dimension::LENGTH, MadeOf::BareSizes),
        size(8.0, Dimension::ANGLE, MadeOf::Units),
        size(2.5, Dimension::NUMBER, MadeOf::Units),
    ]
}

fn quantity_in(
    text: &str,
    bare: LengthUnit,
    system: LengthUnit,
    words: Vocabulary,
) -> Result<Quantity, Fault> {
    let written = Written::typed(text);
    let sizes = sizes();
    let scope = Scope {
        bare,
        system,
        sizes: &sizes,
    };
    let expression = parse(&written, words, &Four)?;
    evaluate(&expression, &written, &scope).map_err(|failure| match failure {
        Failure::Fault(fault) => fault,
        Failure::Silent => panic!("all sizes have values"),
    })
}

fn quantity(text: &str) -> Result<Quantity, Fault> {
    quantity_in(text, Millimetre, Millimetre, Vocabulary::Drawing)
}

fn number(text: &str) -> f64 {
    let quantity = quantity(text).unwrap();
    assert!(quantity.is_bare(), "{text}");
    quantity.value
}

fn dimensioned(text: &str, dimension: Dimension) -> f64 {
    let quantity = quantity(text).unwrap();
    assert_eq!(quantity.dimension, dimension, "{text}");
    quantity.value
}

fn code(text: &str) -> &'static str {
    quantity(text).unwrap_err().code
}

#[test]
fn signs_bind_as_in_arithmetic() {
    assert_eq!(number("2 + 3 * 4"), 14.0);
    assert_eq!(number("(2 + 3) * 4"), 20.0);
    assert_eq!(number("20 - 5 - 4"), 11.0);
    assert_eq!(number("48 / 4 / 3"), 4.0);
    assert_eq!(number("2 ^ 3 ^ 2"), 512.0);
    assert_eq!(number("-2 ^ 2"), -4.0);
    assert_eq!(number("(-2) ^ 2"), 4.0);
    assert_eq!(number("2 ^ -1"), 0.5);
    assert_eq!(number("- - 3"), 3.0);
    assert_eq!(number("3 * -2 + +1"), -5.0);
    assert_eq!(number("1e2 + 1.5e-1 + .5"), 100.65);
    assert_eq!(number("7 × 2 ÷ 4 − 1"), 2.5);
    assert_eq!(number("3²"), 9.0);
}

#[test]
fn functions_take_degrees() {
    assert_eq!(number("sqrt(1600)"), 40.0);
    assert_eq!(number("abs(-3) + min(4, 2, 9) + max(1, 7)"), 12.0);
    assert_eq!(number("20 * sin(30)"), 10.0);
    assert_eq!(number("20 * cos(60)"), 10.0);
    assert!((number("1 * tan(45)") - 1.0).abs() < 1e-15);
    assert!((number("1 * cos(180)") + 1.0).abs() < 1e-15);
    assert!((dimensioned("asin(1/2)", Dimension::ANGLE) - 30.0).abs() < 1e-13);
    assert!((dimensioned("acos(-1)", Dimension::ANGLE) - 180.0).abs() < 1e-13);
    assert!((dimensioned("atan(1) * 4", Dimension::ANGLE) - 180.0).abs() < 1e-13);
    assert!((number("pi") - std::f64::consts::PI).abs() < 1e-15);
    // sin(pi/6) of a quarter turn given in radians.
    assert!((dimensioned("(pi/6) rad", Dimension::ANGLE) - 30.0).abs() < 1e-13);
    assert!((number("2 * sin(tilt)") - 2.0 * 0.139_173_100_960_065_44).abs() < 1e-15);
}

#[test]
fn units_of_the_shop() {
    assert_eq!(dimensioned("3/4 in", Dimension::LENGTH), 19.05);
    assert_eq!(dimensioned("1 1/2 in", Dimension::LENGTH), 38.1);
    assert_eq!(dimensioned("2 mm + 0.5 in", Dimension::LENGTH), 14.7);
    assert_eq!(dimensioned("1/8in", Dimension::LENGTH), 3.175);
    assert_eq!(dimensioned("-(1/8 in)", Dimension::LENGTH), -3.175);
    assert_eq!(dimensioned("2 * 3/4 in", Dimension::LENGTH), 38.1);
    assert_eq!(dimensioned("1.5 cm", Dimension::LENGTH), 15.0);
    assert_eq!(dimensioned("250 um", Dimension::LENGTH), 0.25);
    assert_eq!(dimensioned("250 µm", Dimension::LENGTH), 0.25);
    assert_eq!(dimensioned("(2 + 3) cm", Dimension::LENGTH), 50.0);
    assert_eq!(dimensioned("8°", Dimension::ANGLE), 8.0);
    assert_eq!(dimensioned("90 deg / 4", Dimension::ANGLE), 22.5);
    assert_eq!(dimensioned("3 mm^2", Dimension::AREA), 3.0);
    assert_eq!(dimensioned("2 cm2", Dimension::AREA), 200.0);
    let inches = |text| {
        quantity_in(text, Inch, Inch, Vocabulary::Drawing)
            .unwrap()
            .value
    };
    assert_eq!(inches("25.4 mm"), 1.0);
    assert_eq!(inches("1 ft"), 12.0);
    assert_eq!(inches("3/8"), 0.375);
}

#[test]
fn a_bare_number_takes_the_unit_of_its_place() {
    assert_eq!(dimensioned("mouth - 2*lip", Dimension::LENGTH), 292.0);
    assert_eq!(dimensioned("mouth * 0.52", Dimension::LENGTH), 166.4);
    assert_eq!(dimensioned("240 - lip", Dimension::LENGTH), 226.0);
    assert_eq!(dimensioned("max(mouth, 400)", Dimension::LENGTH), 400.0);
    assert_eq!(dimensioned("tilt + 2", Dimension::ANGLE), 10.0);
    assert_eq!(
        dimensioned("sqrt(mouth^2 - 240^2)", Dimension::LENGTH),
        (320.0_f64 * 320.0 - 240.0 * 240.0).sqrt()
    );
    assert_eq!(
        dimensioned("mouth^2 / (16*lip)", Dimension::LENGTH),
        102_400.0 / 224.0
    );
    assert_eq!(
        dimensioned("mouth * (1 - lip/mouth)", Dimension::LENGTH),
        306.0
    );
    assert_eq!(dimensioned("mouth / lip", Dimension::NUMBER), 320.0 / 14.0);
    assert_eq!(
        dimensioned("(mouth^3)^(1/3)", Dimension::LENGTH).round(),
        320.0
    );
    // A bare number times a ratio is still a bare number.
    assert_eq!(number("10 * ratio"), 25.0);
    assert_eq!(
        number("10 * (mouth / lip) / 20"),
        10.0 * (320.0 / 14.0) / 20.0
    );
}

#[test]
fn a_size_without_a_unit_counts_where_only_a_number_can_stand() {
    assert_eq!(quantity("lip").unwrap().as_number(), Some(14.0));
    assert_eq!(quantity("2 * lip").unwrap().as_number(), Some(28.0));
    assert_eq!(quantity("14 mm").unwrap().as_number(), None);
    assert_eq!(quantity("14 mm / 7 mm").unwrap().as_number(), Some(2.0));
}

#[test]
fn physical_units_are_products() {
    let si = |text| quantity_in(text, Millimetre, Metre, Vocabulary::Physical).unwrap();
    let cases = [
        ("8800 kg/m3", 8800.0, Dimension::DENSITY),
        ("8.8 g/cm3", 8800.0, Dimension::DENSITY),
        ("8.8 g/cm^3", 8800.0, Dimension::DENSITY),
        ("8.8 g/cm³", 8800.0, Dimension::DENSITY),
        ("0.25 kg m2", 0.25, Dimension::INERTIA),
        ("2500 kg cm2", 0.25, Dimension::INERTIA),
        ("0.25 kg*m2", 0.25, Dimension::INERTIA),
        ("0.25 kg·m²", 0.25, Dimension::INERTIA),
        ("12.4 kg", 12.4, Dimension::MASS),
        ("1.5 t", 1500.0, Dimension::MASS),
        ("850 g", 0.85, Dimension::MASS),
        ("1.4 l", 0.0014, Dimension::VOLUME),
        ("300 cm2", 0.03, Dimension::AREA),
        ("mouth", 0.32, Dimension::LENGTH),
    ];
    for (text, value, dimension) in cases {
        let quantity = si(text);
        assert_eq!(quantity.dimension, dimension, "{text}");
        assert!(
            (quantity.value - value).abs() <= 2.0 * f64::EPSILON * value,
            "{text}: {}",
            quantity.value
        );
    }
    // 0.32 lb/in3 by hand: 0.32 * 0.45359237 / 0.0254^3.
    assert!((si("0.32 lb/in3").value - 8857.5695).abs() < 1e-3);
    assert!((si("100 lb").value - 45.359_237).abs() < 1e-12);
}

#[test]
fn each_mistake_has_its_code() {
    let cases = [
        ("moutn", "expression::unknown_size"),
        ("2 lip", "expression::operator"),
        ("2 (3)", "expression::operator"),
        ("lip lip", "expression::operator"),
        ("2 furlong", "expression::unknown_unit"),
        ("kg", "expression::unit_alone"),
        ("sine(3)", "expression::function"),
        ("sin", "expression::parenthesis"),
        ("(3", "expression::parenthesis"),
        ("3)", "expression::parenthesis"),
        ("", "expression::empty"),
        ("  ", "expression::empty"),
        ("3 +", "expression::operand"),
        ("* 3", "expression::operand"),
        ("3,5", "expression::comma"),
        ("min(3)", "expression::arguments"),
        ("sqrt()", "expression::arguments"),
        ("3 ** 2", "expression::sign"),
        ("3 $", "expression::sign"),
        ("3 +- 1", "expression::tolerance"),
        ("3 %", "expression::percent"),
        ("mouth + tilt", "expression::different_dimensions"),
        ("mouth + lip^2", "expression::different_dimensions"),
        ("mouth + ratio", "expression::different_dimensions"),
        ("min(mouth, tilt)", "expression::different_dimensions"),
        ("sin(mouth)", "expression::angle_expected"),
        ("sin(ratio)", "expression::angle_expected"),
        ("atan(mouth)", "expression::ratio_expected"),
        ("asin(2)", "expression::out_of_range"),
        ("2 ^ tilt", "expression::exponent"),
        ("mouth ^ 0.37", "expression::power"),
        ("(mouth ^ 9) ^ 9", "expression::power"),
        ("3 mm^0.5", "expression::power"),
        ("1 / 0", "expression::division_by_zero"),
        ("1 / (lip - 14)", "expression::division_by_zero"),
        ("0 ^ -1", "expression::division_by_zero"),
        ("tan(90)", "expression::division_by_zero"),
        ("sqrt(-1)", "expression::root_of_negative"),
        ("(-8) ^ 0.5", "expression::root_of_negative"),
        ("1e999", "expression::not_finite"),
        ("1e300 * 1e300", "expression::not_finite"),
        ("10 ^ 10 ^ 10", "expression::not_finite"),
        ("mouth mm", "expression::operator"),
        ("(mouth) mm", "expression::unit_twice"),
    ];
    for (text, expected) in cases {
        assert_eq!(code(text), expected, "{text}");
    }
}

#[test]
fn depth_and_length_have_limits() {
    let deep = |n: usize| format!("{}1{}", "(".repeat(n), ")".repeat(n));
    assert_eq!(number(&deep(90)), 1.0);
    assert_eq!(code(&deep(200)), "limit::parentheses");
    assert_eq!(code(&"(".repeat(60_000)), "limit::parentheses");
    assert_eq!(code(&"-".repeat(60_000)), "limit::parentheses");
    assert_eq!(code(&"2^".repeat(30_000)), "limit::parentheses");
    assert_eq!(code(&"sqrt(".repeat(10_000)), "limit::parentheses");
    let long = format!("{}1", "1+".repeat(30_000));
    assert_eq!(number(&long), 30_001.0);
    assert_eq!(
        code(&format!("{}1", "1+".repeat(40_000))),
        "limit::expression"
    );
}

#[test]
fn places_are_underlined() {
    let span = |text: &str| quantity(text).unwrap_err().labels[0].span.clone();
    assert_eq!(span("320 / (lip - 14)"), 7..15);
    assert_eq!(span("mouth + 2 * tilt"), 8..16);
    assert_eq!(span("1 + sqrt(lip - mouth)"), 9..20);
    assert_eq!(span("mouth * (3 + moutn)"), 13..18);
}

#[test]
fn a_part_of_a_text_keeps_its_place() {
    let written = Written::new("1:20", 10..16, Some(11));
    assert_eq!(written.part(2..4).span(0..2), 13..15);
    let hidden = Written::new("1:20", 10..22, None);
    assert_eq!(hidden.part(2..4).span(0..2), 10..22);
}
