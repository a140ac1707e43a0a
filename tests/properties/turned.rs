//! Random parts of revolution, as outlines in the part file's words.
//!
//! Stations along the axis; at each an inner and an outer radius, far enough apart that no two edges can meet; between two
//! stations any kind of edge. All of it is plain data, so that a property can cut, turn round, move and scale it without
//! the crates under test.

use proptest::prelude::*;
use std::fmt::Write as _;

/// A point (r, z) in metres.
pub(crate) type Point = (f64, f64);

/// How an edge gets from one corner to the next.
#[derive(Debug, Clone, Copy)]
pub(crate) enum Way {
    Straight,
    /// A circular arc through this point.
    Via(Point),
    /// A quarter ellipse that leaves along r.
    EllipseAlongR,
    /// A quarter ellipse that leaves along z.
    EllipseAlongZ,
    Parabola(Point),
    Cubic(Point, Point),
}

/// A closed outline: corners, each with the way to the next one; the last leads back to the first.
#[derive(Debug, Clone)]
pub(crate) struct Outline(pub(crate) Vec<(Point, Way)>);

/// What lies between two stations on one side of the part, in fractions of the space that it may take.
#[derive(Debug, Clone, Copy)]
struct Shape {
    kind: usize,
    fractions: [f64; 4],
}

/// A random part: a tube with shaped walls, or a solid one.
#[derive(Debug, Clone)]
pub(crate) struct Turned {
    stations: Vec<f64>,
    /// Inner and outer radius at each station.
    radii: [Vec<f64>; 2],
    /// Inner and outer shape between each station and the next.
    shapes: [Vec<Shape>; 2],
    solid: bool,
}

/// The inner wall lies between these radii, the outer between those.
const INNER: (f64, f64) = (0.4, 0.9);
const OUTER: (f64, f64) = (1.6, 2.4);
/// A cylinder that lies between inner and outer wall.
pub(crate) const BETWEEN: f64 = 1.25;

/// Random parts of two to six stations.
pub(crate) fn turned() -> impl Strategy<Value = Turned> {
    (3_usize..=6)
        .prop_flat_map(|stations| {
            let steps = prop::collection::vec(0.6..1.5, stations);
            let radii = |(least, greatest): (f64, f64)| {
                prop::collection::vec(least + 0.1..greatest - 0.1, stations)
            };
            let shapes = || {
                let shape = (0_usize..6, prop::array::uniform4(0.0..1.0))
                    .prop_map(|(kind, fractions)| Shape { kind, fractions });
                prop::collection::vec(shape, stations)
            };
            (
                steps,
                radii(INNER),
                radii(OUTER),
                shapes(),
                shapes(),
                any::<bool>(),
            )
        })
        .prop_map(|(steps, inner, outer, inside, outside, solid)| Turned {
            stations: steps
                .iter()
                .scan(-2.0, |z, step| {
                    *z += step;
                    Some(*z)
                })
                .collect(),
            radii: [inner, outer],
            shapes: [inside, outside],
            solid,
        })
}

impl Turned {
    /// Number of stations.
    pub(crate) fn stations(&self) -> usize {
        self.stations.len()
    }

    /// Inner and outer radius at a station; the inner is 0 where the part is solid.
    pub(crate) fn radii(&self, station: usize) -> (f64, f64) {
        let inner = if self.solid {
            0.0
        } else {
            self.radii[0][station]
        };
        (inner, self.radii[1][station])
    }

    /// The wall between a station and the next, upwards: its way, on the inner (0) or outer (1) side.
    fn way(&self, side: usize, station: usize) -> Way {
        let (least, greatest) = [INNER, OUTER][side];
        let (r0, r1) = (self.radii[side][station], self.radii[side][station + 1]);
        let (z0, z1) = (self.stations[station], self.stations[station + 1]);
        let Shape { kind, fractions } = self.shapes[side][station];
        let [a, b, c, d] = fractions;
        let between = |low: f64, high: f64, fraction: f64| low + (high - low) * fraction;
        match kind {
            // A bulge of at most a tenth of the height, at least a thousandth: it turns by less than a right angle.
            1 => {
                let bulge = between(0.001, 0.1, a) * (z1 - z0) * if b < 0.5 { -1.0 } else { 1.0 };
                Way::Via((f64::midpoint(r0, r1) + bulge, f64::midpoint(z0, z1)))
            }
            2 if (r0 - r1).abs() > 1e-3 => Way::EllipseAlongR,
            3 if (r0 - r1).abs() > 1e-3 => Way::EllipseAlongZ,
            4 => Way::Parabola((between(least, greatest, a), between(z0, z1, b))),
            // Control points in order along the axis: it goes up all the way and cannot cross itself.
            5 => {
                let first = between(0.0, 0.9, b);
                Way::Cubic(
                    (between(least, greatest, a), between(z0, z1, first)),
                    (
                        between(least, greatest, c),
                        between(z0, z1, between(first, 1.0, d)),
                    ),
                )
            }
            // Also in place of a quarter ellipse that would be flat.
            _ => Way::Straight,
        }
    }

    /// The wall of one side from one station up to another: corners, each with the way to the next, and the last corner.
    fn wall(&self, side: usize, from: usize, to: usize) -> Vec<(Point, Way)> {
        let corner = |station: usize| (self.radii[side][station], self.stations[station]);
        let mut wall: Vec<(Point, Way)> = (from..to)
            .map(|station| (corner(station), self.way(side, station)))
            .collect();
        wall.push((corner(to), Way::Straight));
        wall
    }

    /// A straight wall at radius `r`.
    fn straight(&self, r: f64, from: usize, to: usize) -> Vec<(Point, Way)> {
        [from, to]
            .map(|station| ((r, self.stations[station]), Way::Straight))
            .to_vec()
    }

    /// The outline between two stations: up the outer wall, down the inner one.
    pub(crate) fn outline(&self, from: usize, to: usize) -> Outline {
        let inner = if self.solid {
            self.straight(0.0, from, to)
        } else {
            self.wall(0, from, to)
        };
        Outline::between(self.wall(1, from, to), inner)
    }

    /// The whole outline cut along the cylinder [`BETWEEN`]: the sleeve inside it, the sleeve outside it.
    pub(crate) fn sleeves(&self) -> [Outline; 2] {
        let last = self.stations() - 1;
        let cut = self.straight(BETWEEN, 0, last);
        let inner = if self.solid {
            self.straight(0.0, 0, last)
        } else {
            self.wall(0, 0, last)
        };
        [
            Outline::between(cut.clone(), inner),
            Outline::between(self.wall(1, 0, last), cut),
        ]
    }
}

impl Outline {
    /// Up one wall, straight across, down the other, straight back.
    fn between(up: Vec<(Point, Way)>, down: Vec<(Point, Way)>) -> Self {
        let mut corners = up;
        corners.extend(Self(down).backwards().0);
        // What led up the second wall's first edge now leads down it; its top and its foot are left straight.
        Self(corners)
    }

    /// The same outline travelled the other way, from its last corner.
    pub(crate) fn backwards(&self) -> Self {
        let count = self.0.len();
        let corners = (0..count).rev().map(|corner| {
            // The way out of a corner is now the way that led into it.
            let into = self.0[(corner + count - 1) % count].1;
            let way = match into {
                Way::EllipseAlongR => Way::EllipseAlongZ,
                Way::EllipseAlongZ => Way::EllipseAlongR,
                Way::Cubic(first, second) => Way::Cubic(second, first),
                other => other,
            };
            (self.0[corner].0, way)
        });
        Self(corners.collect())
    }

    /// The same outline from another of its corners.
    pub(crate) fn starting_at(&self, corner: usize) -> Self {
        let mut corners = self.0.clone();
        corners.rotate_left(corner % self.0.len());
        Self(corners)
    }

    /// Every point sent elsewhere.
    pub(crate) fn mapped(&self, to: impl Fn(Point) -> Point) -> Self {
        let way = |way: Way| match way {
            Way::Via(point) => Way::Via(to(point)),
            Way::Parabola(point) => Way::Parabola(to(point)),
            Way::Cubic(first, second) => Way::Cubic(to(first), to(second)),
            other => other,
        };
        Self(
            self.0
                .iter()
                .map(|&(corner, out)| (to(corner), way(out)))
                .collect(),
        )
    }

    /// The outline in the part file's words.
    pub(crate) fn steps(&self) -> String {
        let mut text = String::from("[");
        let mut add = |(r, z): Point, way: &str| {
            writeln!(text, "  {{ r = {r:?}, z = {z:?}{way} }},").expect("a String takes all");
        };
        let Some((&(first, _), rest)) = self.0.split_first() else {
            return "[]".to_owned();
        };
        add(first, "");
        let ways = self.0.iter().map(|(_, way)| in_words(*way));
        for ((corner, _), way) in rest.iter().zip(ways) {
            add(*corner, &way);
        }
        if let Some((_, way)) = self
            .0
            .last()
            .filter(|(_, way)| !matches!(way, Way::Straight))
        {
            add(first, &in_words(*way));
        }
        text.push(']');
        text
    }
}

/// The way in the part file's words, behind the corner it leads to.
fn in_words(way: Way) -> String {
    let point = |(r, z): Point| format!("{{ r = {r:?}, z = {z:?} }}");
    match way {
        Way::Straight => String::new(),
        Way::Via(through) => format!(", via = {}", point(through)),
        Way::EllipseAlongR => ", ellipse = \"r\"".to_owned(),
        Way::EllipseAlongZ => ", ellipse = \"z\"".to_owned(),
        Way::Parabola(control) => format!(", curve = [{}]", point(control)),
        Way::Cubic(first, second) => format!(", curve = [{}, {}]", point(first), point(second)),
    }
}
