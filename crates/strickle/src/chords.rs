//! The figures of a section by another way, for the self-check.
//!
//! Every edge is replaced by chords through more and more of its points, whose area, length and first moments are those of
//! a polygon, and the results are extrapolated to infinitely many chords (Richardson 1911; Romberg 1955): for a smooth
//! edge the error of n equal steps of the parameter is a series in 1/n^2. Nothing but the edge's points is used, so a
//! fault in a closed form cannot hide.

use profile::{DVec2, Edge, Region};
use std::ops::{Add, Mul, Sub};

/// Halvings of the parameter's step after which the result is taken as it is: 256 chords. Smooth edges settle after 4
/// to 6; an edge that starts with no speed (a control point on its end) settles slowly.
const MOST_HALVINGS: usize = 8;

/// Change between two extrapolations, relative to the edge's size, at which they have settled.
const SETTLED: f64 = 1e-14;

/// Integrals along a boundary about a local origin.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub(crate) struct Sums {
    /// Area between the boundary and the origin, m2.
    pub(crate) area: f64,
    /// Its first moment along r about the origin, m3.
    pub(crate) area_r: f64,
    /// Length, m.
    pub(crate) length: f64,
    /// Its first moment along r about the origin, m2.
    pub(crate) length_r: f64,
}

impl Add for Sums {
    type Output = Self;

    fn add(self, other: Self) -> Self {
        Self {
            area: self.area + other.area,
            area_r: self.area_r + other.area_r,
            length: self.length + other.length,
            length_r: self.length_r + other.length_r,
        }
    }
}

impl Mul<f64> for Sums {
    type Output = Self;

    fn mul(self, factor: f64) -> Self {
        Self {
            area: self.area * factor,
            area_r: self.area_r * factor,
            length: self.length * factor,
            length_r: self.length_r * factor,
        }
    }
}

impl Sub for Sums {
    type Output = Self;

    fn sub(self, other: Self) -> Self {
        self + other * -1.0
    }
}

/// Distances of the centroids of area and boundary from the axis, m.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Centroids {
    /// Of the area.
    pub(crate) area: f64,
    /// Of the boundary.
    pub(crate) perimeter: f64,
}

/// The centroids of the sections of several bodies together.
pub(crate) fn centroids<'a>(regions: impl Iterator<Item = &'a Region> + Clone) -> Centroids {
    // About a point of the section, so that a thin ring far from the axis keeps its digits.
    let origin = regions
        .clone()
        .map(Region::bounds)
        .reduce(profile::Bounds::union)
        .map_or(DVec2::ZERO, profile::Bounds::centre);
    let sums = regions
        .flat_map(Region::edges)
        .map(|edge| of_edge(edge, origin))
        .fold(Sums::default(), Sums::add);
    Centroids {
        area: origin.x + sums.area_r / sums.area,
        perimeter: origin.x + sums.length_r / sums.length,
    }
}

/// The sums of one edge.
fn of_edge(edge: &Edge, origin: DVec2) -> Sums {
    let chord = |start: DVec2, end: DVec2| of_chord(start - origin, end - origin);
    let mut row = vec![chord(edge.start(), edge.end())];
    if let Edge::Line(_) = edge {
        return row[0];
    }
    let mut chords = 1_u32;
    for _ in 0..MOST_HALVINGS {
        chords *= 2;
        let mut start = edge.start();
        let mut finer = Sums::default();
        for i in 1..=chords {
            let end = edge.point(f64::from(i) / f64::from(chords));
            finer = finer + chord(start, end);
            start = end;
        }
        let next = extrapolated(finer, &row);
        let (before, after) = (row[row.len() - 1], next[next.len() - 1]);
        row = next;
        if settled(before, after, edge, origin) {
            break;
        }
    }
    row[row.len() - 1]
}

/// The next row of Romberg's triangle: from the sums of twice as many chords and the row before.
fn extrapolated(finer: Sums, before: &[Sums]) -> Vec<Sums> {
    let mut row = vec![finer];
    let mut factor = 1.0;
    for (index, coarse) in before.iter().enumerate() {
        factor *= 4.0;
        row.push(row[index] + (row[index] - *coarse) * (1.0 / (factor - 1.0)));
    }
    row
}

/// True where the last step changed nothing that could be seen in the whole, or nothing but the rounding of the points.
fn settled(before: Sums, after: Sums, edge: &Edge, origin: DVec2) -> bool {
    let change = after - before;
    let length = after.length;
    let reach = length + (edge.start() - origin).length();
    let rounding = 4.0 * f64::EPSILON * (length + edge.start().length());
    let least = SETTLED * length + rounding;
    change.length.abs() <= least
        && change.length_r.abs() <= least * reach
        && change.area.abs() <= least * reach
        && change.area_r.abs() <= least * reach * reach
}

/// The sums of a straight line: its triangle with the origin has its centroid at a third of the corners' sum.
fn of_chord(start: DVec2, end: DVec2) -> Sums {
    let area = 0.5 * start.perp_dot(end);
    let length = start.distance(end);
    Sums {
        area,
        area_r: area * (start.x + end.x) / 3.0,
        length,
        length_r: length * 0.5 * (start.x + end.x),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use profile::Arc;
    use std::f64::consts::PI;

    #[test]
    fn half_a_circle_has_its_known_centroids() {
        let arc = Edge::Arc(Arc {
            start: DVec2::new(0.0, -2.0),
            end: DVec2::new(0.0, 2.0),
            sweep: PI,
        });
        let sums = of_edge(&arc, DVec2::ZERO);
        // Area pi r^2/2 with its centroid at 4 r/(3 pi); arc pi r with its centroid at 2 r/pi.
        for (found, known) in [
            (sums.area, 2.0 * PI),
            (sums.area_r, 16.0 / 3.0),
            (sums.length, 2.0 * PI),
            (sums.length_r, 8.0),
        ] {
            assert!((found / known - 1.0).abs() < 1e-13, "{found} {known}");
        }
    }

    #[test]
    fn a_line_needs_no_extrapolation() {
        let line = Edge::line(DVec2::new(1.0, 0.0), DVec2::new(1.0, 3.0));
        let sums = of_edge(&line, DVec2::ZERO);
        assert_eq!(
            sums,
            Sums {
                area: 1.5,
                area_r: 1.0,
                length: 3.0,
                length_r: 3.0
            }
        );
    }

    #[test]
    fn a_parabola_has_its_known_area() {
        let parabola = Edge::Bezier(profile::Bezier::parabola(
            DVec2::ZERO,
            DVec2::new(1.0, 0.0),
            DVec2::new(2.0, 4.0),
        ));
        let sums = of_edge(&parabola, DVec2::ZERO);
        // Between the chord and the parabola z = r^2 (its control point is (1, 0)): 4/3, on the left of travel.
        assert!((sums.area - 4.0 / 3.0).abs() < 1e-13, "{}", sums.area);
        // Length of z = r^2 from 0 to 2: sqrt(17) + asinh(4)/4.
        let length = 4.646_783_762_432_936;
        assert!((sums.length - length).abs() < 1e-13, "{}", sums.length);
    }
}
