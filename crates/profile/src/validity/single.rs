//! What can be asked of a loop's numbers and of each edge by itself.

use super::{EdgeRef, LARGEST, RegionFault, SMALLEST};
use crate::piece::pieces;
use crate::tolerance::touch;
use crate::{Base, Bezier, Bounds, Edge, Loop, self_meetings};
use glam::DVec2;

/// The numbers of a loop that cannot be computed with.
pub(super) fn numbers(loop_index: usize, outline: &Loop) -> Vec<RegionFault> {
    let mut largest = 0.0_f64;
    let mut faults = Vec::new();
    for (edge, (shape, &tag)) in outline.edges().iter().zip(outline.tags()).enumerate() {
        let number = largest_number(shape);
        if number.is_finite() {
            largest = largest.max(number);
        } else {
            let edge = EdgeRef {
                loop_index,
                edge,
                tag,
            };
            faults.push(RegionFault::NotFinite { edge });
        }
    }
    if faults.is_empty() && largest > LARGEST {
        let farther = |a: &DVec2, b: &DVec2| {
            let reach = |p: &DVec2| p.abs().max_element();
            reach(a).total_cmp(&reach(b))
        };
        let corners = outline.edges().iter().map(Edge::start);
        faults.push(RegionFault::TooLarge {
            loop_index,
            extent: largest,
            at: corners.max_by(farther).unwrap_or_default(),
        });
    }
    faults
}

/// Whether a loop is too small to compute with.
pub(super) fn size(loop_index: usize, outline: &Loop, bounds: Bounds) -> Option<RegionFault> {
    let extent = bounds.size().max_element();
    (extent < SMALLEST).then(|| RegionFault::TooSmall {
        loop_index,
        extent,
        at: outline.edges()[0].start(),
    })
}

/// The largest of the numbers that an edge is given by, without signs; not finite where one of them is not.
fn largest_number(edge: &Edge) -> f64 {
    let of_points = |points: &[DVec2]| {
        points
            .iter()
            .flat_map(|p| [p.x, p.y])
            .fold(0.0, |largest: f64, x| {
                // A maximum that keeps what is not a number.
                if x.abs() <= largest || largest.is_nan() {
                    largest
                } else {
                    x.abs()
                }
            })
    };
    let of_base = |base: Base| match base {
        Base::Ellipse(e) => of_points(&[
            e.start,
            e.end,
            e.axis_a,
            e.axis_b,
            DVec2::new(0.0, e.from),
            DVec2::new(0.0, e.sweep),
        ]),
        Base::Bezier(b) => of_points(&b.points),
    };
    match *edge {
        Edge::Line(line) => of_points(&[line.start, line.end]),
        Edge::Arc(arc) => of_points(&[arc.start, arc.end, DVec2::new(0.0, arc.sweep)]),
        Edge::Ellipse(ellipse) => of_base(Base::Ellipse(ellipse)),
        Edge::Bezier(bezier) => of_base(Base::Bezier(bezier)),
        Edge::Parallel(parallel) => of_points(&[
            parallel.start,
            parallel.end,
            DVec2::new(of_base(parallel.base), parallel.distance),
        ]),
    }
}

/// What is wrong with an edge by itself; `touch` is the distance below which points of its loop count as one.
pub(super) fn shape(named: EdgeRef, edge: &Edge, bounds: Bounds, touch: f64) -> Vec<RegionFault> {
    if bounds.size().max_element() <= touch {
        return vec![RegionFault::NoLength {
            edge: named,
            at: edge.start(),
        }];
    }
    let mut faults = Vec::new();
    if bounds.min.x < -touch {
        let mut lowest = edge.start();
        pieces(edge, |piece| {
            let end = piece.ends[1];
            if end.x < lowest.x {
                lowest = end;
            }
        });
        faults.push(RegionFault::BelowAxis {
            edge: named,
            at: lowest,
        });
    }
    if let Some(at) = turn_back(edge, touch) {
        faults.push(RegionFault::TurnsBack { edge: named, at });
    } else if let Some((t, _)) = self_meetings(edge).first() {
        faults.push(RegionFault::CrossesItself {
            edge: named,
            at: edge.point(*t),
        });
    }
    faults
}

/// Where an edge turns straight back.
fn turn_back(edge: &Edge, touch: f64) -> Option<DVec2> {
    match edge {
        Edge::Parallel(parallel) => {
            let (ratio, t) = parallel.least_speed_ratio();
            (ratio <= 0.0).then(|| parallel.point(t))
        }
        Edge::Bezier(bezier) if is_straight(*bezier, touch) => {
            let (from, to) = self_meetings(edge).first().copied()?;
            let start = bezier.point(from);
            // On a straight line that ends where it started, the turn is where it is farthest away.
            let farther = |a: &DVec2, b: &DVec2| {
                let distance = |p: &DVec2| p.distance_squared(start);
                distance(a).total_cmp(&distance(b))
            };
            bezier
                .knots()
                .into_iter()
                .filter(|t| from < *t && *t < to)
                .map(|t| bezier.point(t))
                .max_by(farther)
        }
        _ => None,
    }
}

/// Whether all control points lie on one straight line.
fn is_straight(bezier: Bezier, touch: f64) -> bool {
    let [a, b, c, d] = bezier.points;
    let farthest = [b, c, d]
        .into_iter()
        .map(|p| p - a)
        .fold(DVec2::ZERO, |far, v| {
            if v.length_squared() > far.length_squared() {
                v
            } else {
                far
            }
        });
    let direction = farthest.normalize_or_zero();
    [b, c, d]
        .into_iter()
        .all(|p| direction.perp_dot(p - a).abs() <= touch)
}

/// Whether what a loop encloses is thinner than rounding.
pub(super) fn flatness(
    loop_index: usize,
    outline: &Loop,
    bounds: Bounds,
    area: f64,
) -> Option<RegionFault> {
    (area.abs() <= touch(bounds) * bounds.size().max_element()).then(|| RegionFault::NoArea {
        loop_index,
        at: outline.edges()[0].start(),
    })
}
