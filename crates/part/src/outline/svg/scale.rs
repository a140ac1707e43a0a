//! How large a drawing is.

use super::Refusal;
use super::document::Root;
use crate::nearest::shown;
use std::str::FromStr;
use svgtypes::{Length, LengthUnit, ViewBox};

/// CSS pixels an inch (CSS Values 4, section 6.2): what a user unit is where there is no viewBox.
const PIXELS_PER_INCH: f64 = 96.0;

/// Metres an inch.
const INCH: f64 = 0.0254;

/// How far the two scales of a drawing's width and height may differ, relatively: editors round them to four digits.
const SCALES_AGREE: f64 = 1e-3;

/// Metres of a user unit, by the document's own physical size.
///
/// # Errors
/// It has none, or its width says another one than its height.
pub(super) fn metres_per_unit(root: &Root) -> Result<f64, Refusal> {
    let sides = [("width", &root.width), ("height", &root.height)];
    let mut lengths = [None; 2];
    for (length, (name, value)) in lengths.iter_mut().zip(sides) {
        *length = match value {
            Some(value) => physical(name, value)?,
            None => None,
        };
    }
    let Some(text) = &root.view_box else {
        // Without a viewBox a user unit is a CSS pixel, whatever the size; the size must show that physical units are meant.
        return match lengths {
            [None, None] => Err(no_size(root)),
            _ => Ok(INCH / PIXELS_PER_INCH),
        };
    };
    let view = ViewBox::from_str(text).map_err(|error| {
        Refusal::new(
            "svg::view_box",
            format!("its viewBox `{}` cannot be read: {error}", shown(text)),
        )
        .help("write four numbers: viewBox=\"0 0 60 100\"")
    })?;
    let [across, down] = lengths;
    match (across.map(|w| w / view.w), down.map(|h| h / view.h)) {
        (None, None) => Err(no_size(root)),
        (Some(scale), None) | (None, Some(scale)) => Ok(scale),
        // The drawing is fitted into its size (preserveAspectRatio's `meet`, the initial value).
        (Some(a), Some(b)) if (a - b).abs() <= SCALES_AGREE * a.max(b) => Ok(a.min(b)),
        (Some(a), Some(b)) => Err(Refusal::new(
            "svg::uneven_size",
            format!(
                "by its width one unit is {} mm, by its height {} mm",
                1000.0 * a,
                1000.0 * b
            ),
        )
        .help("give the size of one unit here: scale = 1")),
    }
}

/// A length in metres; `None` where its unit says nothing of a size in the workshop.
fn physical(name: &str, text: &str) -> Result<Option<f64>, Refusal> {
    let length = length(name, text)?;
    let metres = match length.unit {
        LengthUnit::Mm => length.number / 1000.0,
        LengthUnit::Cm => length.number / 100.0,
        LengthUnit::In => length.number * INCH,
        LengthUnit::Pt => length.number * INCH / 72.0,
        LengthUnit::Pc => length.number * INCH / 6.0,
        LengthUnit::None
        | LengthUnit::Px
        | LengthUnit::Percent
        | LengthUnit::Em
        | LengthUnit::Ex => return Ok(None),
    };
    if metres > 0.0 {
        return Ok(Some(metres));
    }
    Err(unreadable(name, text))
}

/// A length of a shape in user units.
///
/// # Errors
/// It cannot be read, or depends on a font or on what is around.
pub(super) fn user_units(name: &str, text: &str) -> Result<f64, Refusal> {
    let length = length(name, text)?;
    let inches = match length.unit {
        LengthUnit::None | LengthUnit::Px => return Ok(length.number),
        LengthUnit::Mm => length.number / 25.4,
        LengthUnit::Cm => length.number / 2.54,
        LengthUnit::In => length.number,
        LengthUnit::Pt => length.number / 72.0,
        LengthUnit::Pc => length.number / 6.0,
        LengthUnit::Percent | LengthUnit::Em | LengthUnit::Ex => {
            return Err(unreadable(name, text));
        }
    };
    Ok(inches * PIXELS_PER_INCH)
}

fn length(name: &str, text: &str) -> Result<Length, Refusal> {
    Length::from_str(text.trim()).map_err(|_error| unreadable(name, text))
}

fn unreadable(name: &str, text: &str) -> Refusal {
    Refusal::new(
        "svg::length",
        format!("its {name} `{}` is not a length", shown(text)),
    )
    .help("write a number, or a number with mm, cm, in, pt or pc")
}

fn no_size(root: &Root) -> Refusal {
    let message = match root.width.as_ref().or(root.height.as_ref()) {
        Some(size) => format!(
            "its size `{}` is not in mm, cm or in, so it does not say how large the part is",
            shown(size)
        ),
        None => "it does not say how large it is".to_owned(),
    };
    Refusal::new("svg::no_size", message).help(
        "give the size of one unit of the drawing here: scale = 1; or give the drawing a width in mm and a viewBox",
    )
}
