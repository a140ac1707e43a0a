//! The exact figures of random sections against mpmath at 50 digits: of 200 of the ordinary kinds (`tests/mpmath/make.py`
//! writes the parts and the figures into `parts.json` and says how they are defined and found) and of 71 that a formula loses
//! its digits on first (`tests/mpmath/awkward.py`, `awkward.json`).

use exact::{Solid, solid};
use glam::DMat3;
use profile::{Arc, Base, Bezier, DVec2, Edge, EllipseArc, Loop, Parallel, Region};
use serde::Deserialize;
use std::collections::BTreeMap;

#[derive(Deserialize)]
struct Part {
    class: String,
    allowed: f64,
    revolve: f64,
    loops: Vec<Vec<Piece>>,
    figures: Figures,
}

#[derive(Deserialize)]
struct Figures {
    area: f64,
    centroid: [f64; 2],
    perimeter: f64,
    perimeter_r: f64,
    volume: f64,
    swept: f64,
    centre: [f64; 3],
    inertia_origin: [f64; 6],
    inertia_centre: [f64; 6],
}

#[derive(Deserialize)]
#[serde(tag = "kind", rename_all = "lowercase")]
enum Piece {
    Line {
        start: [f64; 2],
        end: [f64; 2],
    },
    Arc {
        start: [f64; 2],
        end: [f64; 2],
        sweep: f64,
    },
    Ellipse {
        start: [f64; 2],
        end: [f64; 2],
        a: [f64; 2],
        b: [f64; 2],
        from: f64,
        sweep: f64,
    },
    Cubic {
        points: [[f64; 2]; 4],
    },
    Parallel {
        base: Box<Self>,
        distance: f64,
        start: [f64; 2],
        end: [f64; 2],
    },
}

impl Piece {
    fn edge(&self) -> Edge {
        let v = DVec2::from_array;
        match self {
            Self::Line { start, end } => Edge::line(v(*start), v(*end)),
            Self::Arc { start, end, sweep } => Edge::Arc(Arc {
                start: v(*start),
                end: v(*end),
                sweep: *sweep,
            }),
            Self::Ellipse {
                start,
                end,
                a,
                b,
                from,
                sweep,
            } => Edge::Ellipse(EllipseArc {
                start: v(*start),
                end: v(*end),
                axis_a: v(*a),
                axis_b: v(*b),
                from: *from,
                sweep: *sweep,
            }),
            Self::Cubic { points } => Edge::Bezier(Bezier {
                points: points.map(v),
            }),
            Self::Parallel {
                base,
                distance,
                start,
                end,
            } => Edge::Parallel(Parallel {
                base: match base.edge() {
                    Edge::Ellipse(ellipse) => Base::Ellipse(ellipse),
                    Edge::Bezier(bezier) => Base::Bezier(bezier),
                    other => panic!("{other:?} is no base"),
                },
                distance: *distance,
                start: v(*start),
                end: v(*end),
            }),
        }
    }
}

impl Part {
    fn region(&self) -> Region {
        let mut loops = self.loops.iter().map(|pieces| {
            let edges = pieces
                .iter()
                .zip(0..)
                .map(|(piece, tag)| (piece.edge(), tag));
            Loop::new(edges).expect("the pieces share their ends")
        });
        let outer = loops.next().expect("a part has an outer loop");
        Region::new(outer, loops.collect()).expect("the part is legal")
    }

    /// The largest error of the figures, each relative to its own size; a coordinate to the part's extent, a product of
    /// inertia to the largest moment of the same matrix, since both may vanish.
    fn worst(&self, found: &Solid) -> f64 {
        let figures = &self.figures;
        let relative = |found: f64, wanted: f64| (found - wanted).abs() / wanted.abs();
        let extent = (found.bounds_max - found.bounds_min).max_element();
        let place = |found: f64, wanted: f64| (found - wanted).abs() / extent.max(wanted.abs());
        let matrix = |found: DMat3, wanted: [f64; 6]| {
            let [x, y, z] = [found.x_axis, found.y_axis, found.z_axis];
            let entries = [x.x, y.y, z.z, x.y, y.z, z.x];
            let largest = wanted
                .iter()
                .fold(0.0_f64, |most, entry| most.max(entry.abs()));
            entries
                .iter()
                .zip(wanted)
                .fold(0.0_f64, |most, (a, b)| most.max((a - b).abs() / largest))
        };
        [
            relative(found.section.area, figures.area),
            relative(found.section.centroid.x, figures.centroid[0]),
            place(found.section.centroid.y, figures.centroid[1]),
            relative(found.section.perimeter, figures.perimeter),
            relative(found.section.perimeter_centroid.x, figures.perimeter_r),
            relative(found.volume, figures.volume),
            relative(found.swept_surface, figures.swept),
            place(found.centre.x, figures.centre[0]),
            place(found.centre.y, figures.centre[1]),
            place(found.centre.z, figures.centre[2]),
            matrix(found.inertia_about_origin, figures.inertia_origin),
            matrix(found.inertia_about_centre, figures.inertia_centre),
        ]
        .into_iter()
        .fold(0.0, f64::max)
    }
}

/// Every part of the file is as near to its figures as its class allows; the worst error of each class, in words.
fn check(file: &str, count: usize) -> String {
    let path = format!("{}/mpmath/{file}", env!("CARGO_MANIFEST_DIR"));
    let text = std::fs::read_to_string(path).expect("the parts lie in the repository");
    let parts: Vec<Part> =
        serde_json::from_str(&text).expect("the parts are those of the generator");
    assert_eq!(parts.len(), count);
    let mut worst: BTreeMap<&str, f64> = BTreeMap::new();
    let mut wrong = Vec::new();
    for (number, part) in parts.iter().enumerate() {
        let error = part.worst(&solid(&part.region(), part.revolve));
        let class = worst.entry(&part.class).or_default();
        *class = class.max(error);
        if error.is_nan() || error > part.allowed {
            wrong.push(format!(
                "part {number} ({}, turned {}): {error:.1e}",
                part.class, part.revolve
            ));
        }
    }
    assert!(wrong.is_empty(), "{wrong:#?}");
    let lines: Vec<String> = worst
        .iter()
        .map(|(class, error)| format!("{class}: {error:.1e}"))
        .collect();
    lines.join("\n")
}

#[test]
fn two_hundred_random_parts_at_fifty_digits() {
    println!("{}", check("parts.json", 200));
}

#[test]
fn seventy_one_awkward_parts_at_fifty_digits() {
    println!("{}", check("awkward.json", 71));
}
