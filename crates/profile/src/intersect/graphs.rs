//! Any two edges, spiral by spiral: over a common direction two spirals are the graphs of two functions.
//!
//! Two pieces that turn by at most [an eighth](crate::spiral) each have a direction from which none of their tangents
//! deviates by more than 70 degrees. Along it, x, each is a function y(x), and where they meet the difference h = y_a - y_b is zero.
//! From its ends alone a stretch of x is known to be
//! - free of meetings, where the strips that hold the two graphs (between chord and end tangents) are apart;
//! - monotone in h, where the slopes' ranges are apart: then there is one zero where h changes its sign and none elsewhere;
//! - convex in h, where the ranges of the second derivatives are apart: split at the extreme it is monotone on both sides.
//!
//! Otherwise it is halved. Where two curves osculate this goes on until the strips are thinner than the tolerance, and
//! where they coincide it would go on everywhere: such stretches are found by sampling and taken as a whole.

use super::contact::{Contact, Contacts};
use crate::foot::foot;
use crate::polynomial::bracketed;
use crate::spiral::{Spiral, spirals};
use crate::{Bounds, Edge, left_of};
use glam::DVec2;

/// A pair of spirals is cut into at most this many stretches. Fourth-order contact takes a thousand; what is left then is
/// looked at once and not cut further.
const MOST_STRETCHES: usize = 4096;

/// A vertical distance is at most 1/cos(70 degrees) = 2.9 times the distance.
const STEEPEST: f64 = 3.0;

/// Adds all contacts of two edges.
pub(super) fn contacts(a: &Edge, b: &Edge, within: f64, found: &mut Contacts) {
    // About a point where they may meet, so that what is small and far away keeps its digits.
    let (box_a, box_b) = (a.bounds(), b.bounds());
    let origin = Bounds {
        min: box_a.min.max(box_b.min),
        max: box_a.max.min(box_b.max),
    }
    .centre();
    let moved = [a.moved(-origin), b.moved(-origin)];
    let pieces = moved.each_ref().map(spirals);
    for piece_a in &pieces[0] {
        let reach = piece_a.bounds().grown(within);
        for piece_b in &pieces[1] {
            if reach.meets(piece_b.bounds()) {
                piece_contacts(
                    &moved,
                    [piece_a, piece_b],
                    within,
                    &mut |t: [f64; 2], passes| {
                        found.add(Contact {
                            t_a: t[0],
                            t_b: t[1],
                            point: a.point(t[0]),
                            passes,
                        });
                    },
                );
            }
        }
    }
}

/// Reports the parameters of all contacts of two spirals of two edges, and where it can tell whether they pass there.
pub(super) fn piece_contacts(
    edges: &[Edge; 2],
    pieces: [&Spiral; 2],
    within: f64,
    report: &mut dyn FnMut([f64; 2], Option<bool>),
) {
    let Some(graphs) = Graphs::of(edges, pieces, within) else {
        return;
    };
    graphs.follow(report);
}

impl Spiral {
    /// A box that holds it: that of its ends and of the point where its end tangents meet.
    fn bounds(&self) -> Bounds {
        let [start, end] = self.point;
        let bounds = Bounds::of_corners(start, end);
        let across = self.direction[0].perp_dot(self.direction[1]);
        if across == 0.0 {
            return bounds;
        }
        let along = (end - start).perp_dot(self.direction[1]) / across;
        let tip = start + along * self.direction[0];
        if tip.is_finite() {
            bounds.with(tip)
        } else {
            bounds
        }
    }
}

/// Two spirals over a common direction.
struct Graphs<'a> {
    edges: &'a [Edge; 2],
    pieces: [&'a Spiral; 2],
    along: DVec2,
    across: DVec2,
    within: f64,
}

/// Both graphs at one x. Arrays hold the value of the first and of the second.
#[derive(Debug, Clone, Copy)]
struct Station {
    x: f64,
    t: [f64; 2],
    y: [f64; 2],
    slope: [f64; 2],
    bend: [f64; 2],
}

impl Station {
    /// The difference of the graphs.
    fn gap(&self) -> f64 {
        self.y[0] - self.y[1]
    }

    /// Its derivative.
    fn gap_slope(&self) -> f64 {
        self.slope[0] - self.slope[1]
    }
}

impl<'a> Graphs<'a> {
    fn of(edges: &'a [Edge; 2], pieces: [&'a Spiral; 2], within: f64) -> Option<Self> {
        let [first, second] = pieces.map(|piece| piece.direction[0] + piece.direction[1]);
        let (first, second) = (first.try_normalize()?, second.try_normalize()?);
        let along = if first.dot(second) < 0.0 {
            first - second
        } else {
            first + second
        }
        .try_normalize()?;
        Some(Self {
            edges,
            pieces,
            along,
            across: left_of(along),
            within,
        })
    }

    fn x(&self, point: DVec2) -> f64 {
        self.along.dot(point)
    }

    /// One graph at `x`: parameter, height, slope, second derivative.
    fn graph(&self, which: usize, x: f64) -> (f64, f64, f64, f64) {
        let (edge, piece) = (&self.edges[which], self.pieces[which]);
        let ends = piece.point.map(|point| self.x(point));
        let end = ends.iter().position(|end| *end == x);
        let (t, point, direction, curvature) = if let Some(end) = end {
            (
                piece.t[end],
                piece.point[end],
                piece.direction[end],
                piece.curvature[end],
            )
        } else {
            let t = bracketed(
                |t| {
                    (
                        self.x(edge.point(t)) - x,
                        edge.derivative(t).dot(self.along),
                    )
                },
                piece.t[0],
                piece.t[1],
                ends[0] - x,
            );
            let (direction, curvature) = piece.sided(edge, t, true);
            (t, edge.point(t), direction, curvature)
        };
        let forward = direction.dot(self.along);
        let slope = direction.dot(self.across) / forward;
        let stretch = 1.0 + slope * slope;
        // Travelled the other way a curve bends the other way.
        let bend = curvature.copysign(curvature * forward) * stretch * stretch.sqrt();
        (t, self.across.dot(point), slope, bend)
    }

    fn station(&self, x: f64) -> Station {
        let (a, b) = (self.graph(0, x), self.graph(1, x));
        Station {
            x,
            t: [a.0, b.0],
            y: [a.1, b.1],
            slope: [a.2, b.2],
            bend: [a.3, b.3],
        }
    }

    /// Parameters of the contact at a station, if the edges are that close there: the first edge's point and its foot on
    /// the second, or where that edge's piece ends first, the other way round.
    fn near(&self, station: &Station) -> Option<[f64; 2]> {
        if station.gap().abs() > STEEPEST * self.within {
            return None;
        }
        [(0, 1), (1, 0)].into_iter().find_map(|(from, to)| {
            let point = self.edges[from].point(station.t[from]);
            let (t, distance) = foot(&self.edges[to], point, station.t[to]);
            (distance <= self.within).then(|| {
                let mut at = station.t;
                at[to] = t;
                at
            })
        })
    }

    fn follow(&self, report: &mut dyn FnMut([f64; 2], Option<bool>)) {
        let ranges = self.pieces.map(|piece| {
            let [a, b] = piece.point.map(|point| self.x(point));
            [a.min(b), a.max(b)]
        });
        let low = ranges[0][0].max(ranges[1][0]);
        let high = ranges[0][1].min(ranges[1][1]);
        if low > high {
            // One ends before the other begins: only these two ends can be near.
            if low - high <= self.within {
                self.facing_ends(report);
            }
            return;
        }
        let (left, right) = (self.station(low), self.station(high));
        for end in [&left, &right] {
            if let Some(t) = self.near(end) {
                report(t, None);
            }
        }
        let mut stretches = vec![(left, right)];
        let mut left_over = MOST_STRETCHES;
        while let Some((left, right)) = stretches.pop() {
            left_over = left_over.saturating_sub(1);
            self.stretch(&left, &right, left_over > 0, &mut stretches, report);
        }
    }

    /// The pieces' ends that are nearest to each other, where they are near.
    fn facing_ends(&self, report: &mut dyn FnMut([f64; 2], Option<bool>)) {
        for end_a in 0..2 {
            for end_b in 0..2 {
                let [a, b] = [self.pieces[0].point[end_a], self.pieces[1].point[end_b]];
                if a.distance_squared(b) <= self.within * self.within {
                    report([self.pieces[0].t[end_a], self.pieces[1].t[end_b]], None);
                }
            }
        }
    }

    /// Reports the contacts between two stations, or adds the stretch's halves to `stretches`.
    fn stretch(
        &self,
        left: &Station,
        right: &Station,
        may_cut: bool,
        stretches: &mut Vec<(Station, Station)>,
        report: &mut dyn FnMut([f64; 2], Option<bool>),
    ) {
        let width = right.x - left.x;
        let reach = STEEPEST * self.within;
        let strips = [0, 1].map(|which| strip(left, right, which));
        let (gap_left, gap_right) = (left.gap(), right.gap());
        if gap_left.min(gap_right) + strips[0][0] - strips[1][1] > reach
            || gap_left.max(gap_right) + strips[0][1] - strips[1][0] < -reach
        {
            return;
        }
        if apart(left.slope, right.slope) {
            self.monotone(left, right, report);
            return;
        }
        if apart(left.bend, right.bend) {
            self.convex(left, right, report);
            return;
        }
        let middle_x = left.x + 0.5 * width;
        let thickness: f64 = strips.iter().map(|strip| strip[1] - strip[0]).sum();
        if !may_cut || thickness <= 0.5 * self.within || middle_x <= left.x || middle_x >= right.x {
            self.monotone(left, right, report);
            return;
        }
        let middle = self.station(middle_x);
        let close = |x: f64| self.near(&self.station(x)).is_some();
        if let (Some(t_left), Some(t_right)) = (self.near(left), self.near(right))
            && self.near(&middle).is_some()
            && [0.25, 0.75, 0.125, 0.625, 0.375, 0.875]
                .into_iter()
                .all(|share| close(left.x + share * width))
        {
            report(t_left, None);
            report(t_right, None);
            return;
        }
        stretches.push((middle, *right));
        stretches.push((*left, middle));
    }

    /// A stretch on which the gap is convex or concave: monotone on each side of its extreme.
    fn convex(
        &self,
        left: &Station,
        right: &Station,
        report: &mut dyn FnMut([f64; 2], Option<bool>),
    ) {
        if left.gap_slope() * right.gap_slope() >= 0.0 {
            self.monotone(left, right, report);
            return;
        }
        let x = bracketed(
            |x| {
                let station = self.station(x);
                (station.gap_slope(), station.bend[0] - station.bend[1])
            },
            left.x,
            right.x,
            left.gap_slope(),
        );
        let extreme = self.station(x);
        if let Some(t) = self.near(&extreme) {
            report(t, Some(false));
        } else {
            self.monotone(left, &extreme, report);
            self.monotone(&extreme, right, report);
        }
    }

    /// A stretch on which the gap is monotone: a zero where it changes its sign, else its smaller end where that is near.
    fn monotone(
        &self,
        left: &Station,
        right: &Station,
        report: &mut dyn FnMut([f64; 2], Option<bool>),
    ) {
        let (gap_left, gap_right) = (left.gap(), right.gap());
        if gap_left * gap_right < 0.0 {
            let x = bracketed(
                |x| {
                    let station = self.station(x);
                    (station.gap(), station.gap_slope())
                },
                left.x,
                right.x,
                gap_left,
            );
            let station = self.station(x);
            report(station.t, None);
            return;
        }
        let nearer = if gap_left.abs() < gap_right.abs() {
            left
        } else {
            right
        };
        if let Some(t) = self.near(nearer) {
            report(t, None);
        }
    }
}

/// Least and greatest height of a graph over its chord.
fn strip(left: &Station, right: &Station, which: usize) -> [f64; 2] {
    let width = right.x - left.x;
    let chord = (right.y[which] - left.y[which]) / width;
    let (from, to) = (left.slope[which], right.slope[which]);
    // The end tangents meet this far from the chord.
    let height = (chord - from) * (to - chord) / (to - from) * width;
    if to > from {
        [-height.max(0.0), 0.0]
    } else if to < from {
        [0.0, (-height).max(0.0)]
    } else {
        [0.0, 0.0]
    }
}

/// True where the ranges of the first graph's and the second graph's values at the two ends have no value in common.
fn apart(left: [f64; 2], right: [f64; 2]) -> bool {
    left[0].max(right[0]) < left[1].min(right[1]) || left[0].min(right[0]) > left[1].max(right[1])
}
