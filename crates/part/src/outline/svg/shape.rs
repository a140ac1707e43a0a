//! The basic shapes (SVG 2, section 10) as path data.

use super::Refusal;
use super::document::Shape;
use super::scale::user_units;

/// The path data of `shape`.
///
/// # Errors
/// An attribute is missing or cannot be read.
pub(super) fn path_data(shape: &Shape) -> Result<String, Refusal> {
    let number = |name: &str| match shape.attribute(name) {
        Some(value) => user_units(name, value).map(Some),
        None => Ok(None),
    };
    let or_zero = |name: &str| number(name).map(|value| value.unwrap_or(0.0));
    match &*shape.element {
        "path" => match shape.attribute("d") {
            Some(data) => Ok(data.to_owned()),
            None => Err(missing("path", "d")),
        },
        "polygon" => points(shape).map(|points| format!("M{points}Z")),
        "polyline" => points(shape).map(|points| format!("M{points}")),
        "rect" => {
            let [x, y] = [or_zero("x")?, or_zero("y")?];
            let [width, height] = [or_zero("width")?, or_zero("height")?];
            if !(width > 0.0 && height > 0.0) {
                return Err(missing("rect", "width and height"));
            }
            // A corner radius that is left out is as large as the other one; none is more than half a side.
            let (rx, ry) = match (number("rx")?, number("ry")?) {
                (None, None) => (0.0, 0.0),
                (Some(rx), None) => (rx, rx),
                (None, Some(ry)) => (ry, ry),
                (Some(rx), Some(ry)) => (rx, ry),
            };
            let (rx, ry) = (rx.min(0.5 * width), ry.min(0.5 * height));
            let [left, right] = [x, x + width];
            let [top, bottom] = [y, y + height];
            Ok(if rx > 0.0 && ry > 0.0 {
                let corner = format!("A{rx} {ry} 0 0 1");
                format!(
                    "M{} {top}L{} {top}{corner} {right} {}L{right} {}{corner} {} {bottom}L{} {bottom}{corner} {left} {}L{left} {}{corner} {} {top}Z",
                    left + rx,
                    right - rx,
                    top + ry,
                    bottom - ry,
                    right - rx,
                    left + rx,
                    bottom - ry,
                    top + ry,
                    left + rx
                )
            } else {
                format!("M{left} {top}L{right} {top}L{right} {bottom}L{left} {bottom}Z")
            })
        }
        element => {
            let [cx, cy] = [or_zero("cx")?, or_zero("cy")?];
            let (rx, ry) = if element == "circle" {
                let r = or_zero("r")?;
                (r, r)
            } else {
                (or_zero("rx")?, or_zero("ry")?)
            };
            if !(rx > 0.0 && ry > 0.0) {
                return Err(missing(element, "radius"));
            }
            let [left, right] = [cx - rx, cx + rx];
            Ok(format!(
                "M{right} {cy}A{rx} {ry} 0 0 1 {left} {cy}A{rx} {ry} 0 0 1 {right} {cy}Z"
            ))
        }
    }
}

fn points(shape: &Shape) -> Result<&str, Refusal> {
    let points = shape.attribute("points").unwrap_or("");
    let is_number = |c: char| !c.is_ascii_alphabetic() || matches!(c, 'e' | 'E');
    if points.trim().is_empty() || !points.chars().all(is_number) {
        return Err(missing(&shape.element, "points"));
    }
    Ok(points)
}

fn missing(element: &str, what: &str) -> Refusal {
    Refusal::new(
        "svg::attribute",
        format!("its <{element}> has no {what} that can be drawn"),
    )
    .help("draw the section as one closed path")
}
