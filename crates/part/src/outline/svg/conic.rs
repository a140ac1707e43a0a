//! Elliptical arcs of path data (SVG 2, appendix B.2): exact, not as Beziers.

use super::transform::{sin_cos_degrees, transformed};
use crate::outline::draw::Turn;
use crate::outline::rounding::ROUNDING;
use glam::{DAffine2, DMat2, DVec2};
use profile::Edge;

/// The arc between `ends` of an ellipse with these `radii`, whose first axis is turned by `rotation` degrees; the longer one
/// where `large`, turning from x towards y where `sweep`. One or two edges. Radii that are too small grow until the arc
/// reaches; one that is 0 makes it a straight line.
pub(super) fn arc(
    [from, to]: [DVec2; 2],
    radii: DVec2,
    rotation: f64,
    large: bool,
    sweep: bool,
    rounding: f64,
) -> [Option<Edge>; 2] {
    let chord = to - from;
    if radii.min_element() == 0.0 || chord == DVec2::ZERO {
        return [Some(Edge::line(from, to)), None];
    }
    if radii.x == radii.y {
        let ratio = reached(chord.length() / (2.0 * radii.x), rounding / chord.length());
        let drawn = Turn::of_chord(ratio, large, sweep).arc(from, to);
        return [Some(drawn.first), drawn.second];
    }
    // In the coordinates where the ellipse is the unit circle the arc is a circular one.
    let (s, c) = sin_cos_degrees(rotation);
    let turned = DMat2::from_cols(DVec2::new(c, s), DVec2::new(-s, c));
    let unit = (turned.transpose() * chord) / radii;
    let ratio = reached(0.5 * unit.length(), rounding / chord.length());
    // Radii that were too small are as large as the chord needs.
    let radii = radii * (0.5 * unit.length() / ratio).max(1.0);
    let unit = (turned.transpose() * chord) / radii;
    let drawn = Turn::of_chord(ratio, large, sweep).arc(DVec2::ZERO, unit);
    let map = DAffine2::from_mat2_translation(turned * DMat2::from_diagonal(radii), from);
    let on_ellipse = |edge: &Edge| transformed(edge, &map);
    match drawn.second.map(|second| on_ellipse(&second)) {
        None => [Some(on_ellipse(&drawn.first).with_ends(from, to)), None],
        Some(second) => {
            let first = on_ellipse(&drawn.first).with_ends(from, second.start());
            [Some(first), Some(second.with_ends(second.start(), to))]
        }
    }
}

/// `ratio` of the chord to the diameter; 1 where it is more, or as near to it as rounding makes it.
fn reached(ratio: f64, rounding: f64) -> f64 {
    if ratio >= 1.0 - (ROUNDING + rounding) {
        1.0
    } else {
        ratio
    }
}
