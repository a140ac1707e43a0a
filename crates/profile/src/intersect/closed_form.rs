//! Pairs whose common points have a closed form: of a line or a circle with a line, a circle or (line only) an ellipse.

use super::carrier::Carrier;
use super::conic::{Conic, Harmonic};
use super::contact::{Contact, Contacts};
use super::straight::Straight;

/// Two straight edges.
pub(super) fn line_line(a: &Straight, b: &Straight, within: f64, found: &mut Contacts) {
    ends(a, b, within, found);
    let between = b.start - a.start;
    let across = a.along.perp_dot(b.along);
    let t_a = between.perp_dot(b.along) / (across * a.length);
    let t_b = between.perp_dot(a.along) / (across * b.length);
    if t_a > 0.0 && t_a < 1.0 && t_b > 0.0 && t_b < 1.0 {
        let point = a.start + t_a * a.length * a.along;
        // Of parallel edges either number says nothing: the second is taken from the first.
        if let Some(t_b) = b.near(point, within) {
            found.add(Contact {
                t_a,
                t_b,
                point,
                passes: Some(true),
            });
        }
    }
}

/// A circular or elliptic arc and a straight edge.
pub(super) fn conic_line(a: &Conic, b: &Straight, within: f64, found: &mut Contacts) {
    ends(a, b, within, found);
    let beside = a.beside_line(b.start, b.along);
    let touches = beside.extreme().0.abs() <= within;
    along_conic(a, b, beside, touches, found);
}

/// Two circular arcs.
pub(super) fn arc_arc(a: &Conic, b: &Conic, within: f64, found: &mut Contacts) {
    ends(a, b, within, found);
    let beside = a.beside_circle(b);
    let (extreme, tangent) = beside.extreme();
    let touches = a
        .at_tangent(tangent)
        .is_some_and(|(_, point)| extreme.abs() <= within * b.level(point).1.length());
    along_conic(a, b, beside, touches, found);
}

/// Adds the point where the two touch, or those where they cross, given `b`'s function along `a`.
fn along_conic(a: &Conic, b: &impl Carrier, beside: Harmonic, touches: bool, found: &mut Contacts) {
    if touches {
        if let Some((t_a, point)) = a.at_tangent(beside.extreme().1)
            && let Some(t_b) = b.parameter(point)
        {
            found.add(Contact {
                t_a,
                t_b,
                point,
                passes: Some(false),
            });
        }
        return;
    }
    for q in beside.half_tangents() {
        if let Some((t_a, point)) = a.at_half_tangent(q)
            && let Some(t_b) = b.parameter(point)
        {
            found.add(Contact {
                t_a,
                t_b,
                point,
                passes: Some(true),
            });
        }
    }
}

/// Adds the ends of each edge that lie on the other.
fn ends(a: &impl Carrier, b: &impl Carrier, within: f64, found: &mut Contacts) {
    for (t_a, point) in [0.0, 1.0].into_iter().zip(a.ends()) {
        if let Some(t_b) = b.near(point, within) {
            found.add(Contact {
                t_a,
                t_b,
                point,
                passes: Some(false),
            });
        }
    }
    for (t_b, point) in [0.0, 1.0].into_iter().zip(b.ends()) {
        if let Some(t_a) = a.near(point, within) {
            found.add(Contact {
                t_a,
                t_b,
                point,
                passes: Some(false),
            });
        }
    }
}
