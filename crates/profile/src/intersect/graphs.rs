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
use super::reach::reach;
use crate::foot::foot;
use crate::polynomial::bracketed;
use crate::spiral::{Spiral, spirals};
use crate::{Bounds, Edge, left_of};
use glam::DVec2;

/// Two edges are looked at in at most this many stretches of their spirals. Fourth-order contact takes a thousand; what is
/// left then is looked at once and not cut further.
pub(super) const MOST_STRETCHES: usize = 4096;

/// A vertical distance is at most 1/cos(70 degrees) = 2.9 times the distance.
const STEEPEST: f64 = 3.0;

/// Where in a stretch, besides its ends and its middle, it is asked whether the curves coincide.
const CLOSE_SAMPLES: [f64; 6] = [0.25, 0.75, 0.125, 0.625, 0.375, 0.875];

/// Newton's steps before the bracket is taken instead. From one digit six suffice.
const MOST_STEPS: usize = 10;

/// The last of Newton's steps is shorter than this: it has doubled the digits once more.
const SETTLED: f64 = 1e-10;

/// Adds all contacts of two edges.
pub(super) fn contacts(a: &Edge, b: &Edge, within: f64, found: &mut Contacts) {
    // About a point where they may meet, so that what is small and far away keeps its digits.
    let (box_a, box_b) = (reach(a), reach(b));
    let origin = Bounds {
        min: box_a.min.max(box_b.min),
        max: box_a.max.min(box_b.max),
    }
    .centre();
    let moved = [a.moved(-origin), b.moved(-origin)];
    let pieces = moved.each_ref().map(spirals);
    let mut left_over = MOST_STRETCHES;
    let mut report = |t: [f64; 2], passes| {
        found.add(Contact {
            t_a: t[0],
            t_b: t[1],
            point: a.point(t[0]),
            passes,
        });
    };
    for piece_a in &pieces[0] {
        let box_a = piece_a.bounds().grown(within);
        for piece_b in &pieces[1] {
            if box_a.meets(piece_b.bounds()) {
                let pair = [piece_a, piece_b];
                piece_contacts(&moved, pair, within, &mut left_over, &mut report);
            }
        }
    }
}

/// Reports the parameters of all contacts of two spirals of two edges, and where it can tell whether they pass there;
/// counts the stretches down from what is `left_over`.
pub(super) fn piece_contacts(
    edges: &[Edge; 2],
    pieces: [&Spiral; 2],
    within: f64,
    left_over: &mut usize,
    report: Report,
) {
    if let Some(graphs) = Graphs::of(edges, pieces, within) {
        graphs.follow(left_over, report);
    }
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

/// A point of one graph.
#[derive(Debug, Clone, Copy)]
struct Local {
    t: f64,
    x: f64,
    y: f64,
    slope: f64,
    /// Second derivative.
    bend: f64,
}

/// Points of both graphs at one x.
type Station = [Local; 2];

/// A report of a contact: its parameters, and whether the edges pass each other there if that is known.
type Report<'a> = &'a mut dyn FnMut([f64; 2], Option<bool>);

/// The difference of the graphs.
fn gap(station: &Station) -> f64 {
    station[0].y - station[1].y
}

/// The derivative of the difference.
fn gap_slope(station: &Station) -> f64 {
    station[0].slope - station[1].slope
}

/// What is sought between two stations.
#[derive(Clone, Copy)]
enum Sought {
    /// A zero of the gap.
    Meeting,
    /// A zero of its derivative.
    Extreme,
}

impl Sought {
    fn value(self, station: &Station) -> f64 {
        match self {
            Self::Meeting => gap(station),
            Self::Extreme => gap_slope(station),
        }
    }

    /// The derivative of one graph's share of the value.
    fn slope(self, local: &Local) -> f64 {
        match self {
            Self::Meeting => local.slope,
            Self::Extreme => local.bend,
        }
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

    fn local(&self, which: usize, t: f64) -> Local {
        let (edge, piece) = (&self.edges[which], self.pieces[which]);
        let (point, direction, curvature) =
            if let Some(end) = piece.t.iter().position(|end| *end == t) {
                (piece.point[end], piece.direction[end], piece.curvature[end])
            } else {
                let (direction, curvature) = piece.sided(edge, t, true);
                (edge.point(t), direction, curvature)
            };
        let forward = direction.dot(self.along);
        let slope = direction.dot(self.across) / forward;
        let stretch = 1.0 + slope * slope;
        Local {
            t,
            x: self.x(point),
            y: self.across.dot(point),
            slope,
            // Travelled the other way a curve bends the other way.
            bend: curvature * stretch * stretch.sqrt() * 1.0_f64.copysign(forward),
        }
    }

    /// The point of a graph at `x`, between two of its points.
    fn at(&self, which: usize, x: f64, left: &Local, right: &Local) -> Local {
        for end in [left, right] {
            if end.x == x {
                return *end;
            }
        }
        let edge = &self.edges[which];
        let ahead = |t: f64| {
            (
                self.x(edge.point(t)) - x,
                edge.derivative(t).dot(self.along),
            )
        };
        let share = (x - left.x) / (right.x - left.x);
        let guess = left.t + share * (right.t - left.t);
        let (low, high) = if left.t < right.t {
            (left, right)
        } else {
            (right, left)
        };
        self.local(which, bracketed(ahead, [low.t, high.t], low.x - x, guess))
    }

    /// The station where the first graph is at this share of the way, in its parameter, from one station to the other.
    fn between(&self, left: &Station, right: &Station, share: f64) -> Station {
        let first = self.local(0, left[0].t + share * (right[0].t - left[0].t));
        [first, self.at(1, first.x, &left[1], &right[1])]
    }

    /// Parameters of the contact at a station, if the edges are that close there: one edge's point and its foot on the
    /// other.
    fn near(&self, station: &Station) -> Option<[f64; 2]> {
        if gap(station).abs() > STEEPEST * self.within {
            return None;
        }
        [(0, 1), (1, 0)].into_iter().find_map(|(from, to)| {
            let point = self.edges[from].point(station[from].t);
            let (t, distance) = foot(&self.edges[to], point, station[to].t);
            (distance <= self.within).then(|| {
                let mut at = station.map(|local| local.t);
                at[to] = t;
                at
            })
        })
    }

    fn follow(&self, left_over: &mut usize, report: Report) {
        // Each graph from left to right, then the stretch that they share.
        let ends = [0, 1].map(|which| {
            let ends = self.pieces[which].t.map(|t| self.local(which, t));
            if ends[0].x <= ends[1].x {
                ends
            } else {
                [ends[1], ends[0]]
            }
        });
        let low = usize::from(ends[1][0].x > ends[0][0].x);
        let high = usize::from(ends[1][1].x < ends[0][1].x);
        let (low, high) = (ends[low][0], ends[high][1]);
        if low.x > high.x {
            // One ends before the other begins: only these two ends can be near.
            if low.x - high.x <= self.within {
                self.facing_ends(report);
            }
            return;
        }
        let station =
            |x: f64| [0, 1].map(|which| self.at(which, x, &ends[which][0], &ends[which][1]));
        let (left, right) = (station(low.x), station(high.x));
        for end in [&left, &right] {
            if let Some(t) = self.near(end) {
                report(t, None);
            }
        }
        let mut stretches = vec![(left, right)];
        while let Some((left, right)) = stretches.pop() {
            *left_over = left_over.saturating_sub(1);
            self.stretch(&left, &right, *left_over > 0, &mut stretches, report);
        }
    }

    /// The pieces' ends that are near each other.
    fn facing_ends(&self, report: Report) {
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
        report: Report,
    ) {
        let reach = STEEPEST * self.within;
        let strips = [0, 1].map(|which| strip(&left[which], &right[which]));
        let (gap_left, gap_right) = (gap(left), gap(right));
        if gap_left.min(gap_right) + strips[0][0] - strips[1][1] > reach
            || gap_left.max(gap_right) + strips[0][1] - strips[1][0] < -reach
        {
            return;
        }
        if apart(left, right, |local| local.slope) {
            self.monotone(left, right, report);
            return;
        }
        if apart(left, right, |local| local.bend) {
            self.convex(left, right, report);
            return;
        }
        let thickness: f64 = strips.iter().map(|strip| strip[1] - strip[0]).sum();
        if !may_cut || thickness <= 0.5 * self.within {
            self.monotone(left, right, report);
            return;
        }
        let middle = self.between(left, right, 0.5);
        let inside = |local: &Local| left[0].x < local.x && local.x < right[0].x;
        if !inside(&middle[0]) {
            self.monotone(left, right, report);
            return;
        }
        if let (Some(t_left), Some(t_right)) = (self.near(left), self.near(right))
            && self.near(&middle).is_some()
            && CLOSE_SAMPLES
                .into_iter()
                .all(|share| self.near(&self.between(left, right, share)).is_some())
        {
            report(t_left, None);
            report(t_right, None);
            return;
        }
        stretches.push((middle, *right));
        stretches.push((*left, middle));
    }

    /// A stretch on which the gap is convex or concave: monotone on each side of its extreme.
    fn convex(&self, left: &Station, right: &Station, report: Report) {
        if gap_slope(left) * gap_slope(right) >= 0.0 {
            self.monotone(left, right, report);
            return;
        }
        let extreme = self.seek(Sought::Extreme, left, right);
        if let Some(t) = self.near(&extreme) {
            report(t, Some(false));
        } else {
            self.monotone(left, &extreme, report);
            self.monotone(&extreme, right, report);
        }
    }

    /// A stretch on which the gap is monotone: a zero where it changes its sign, else its smaller end where that is near.
    fn monotone(&self, left: &Station, right: &Station, report: Report) {
        if gap(left) * gap(right) < 0.0 {
            let meeting = self.seek(Sought::Meeting, left, right);
            report(meeting.map(|local| local.t), None);
            return;
        }
        let nearer = if gap(left).abs() < gap(right).abs() {
            left
        } else {
            right
        };
        if let Some(t) = self.near(nearer) {
            report(t, None);
        }
    }

    /// The one zero between two stations where the value has different signs.
    fn seek(&self, sought: Sought, left: &Station, right: &Station) -> Station {
        self.seek_by_steps(sought, left, right)
            .unwrap_or_else(|| self.seek_by_bracket(sought, left, right))
    }

    /// Newton's steps on both parameters at once, while they stay between the stations and gain digits.
    fn seek_by_steps(&self, sought: Sought, left: &Station, right: &Station) -> Option<Station> {
        let (at_left, at_right) = (sought.value(left), sought.value(right));
        let share = at_left / (at_left - at_right);
        let mut t = [0, 1].map(|i| left[i].t + share * (right[i].t - left[i].t));
        for _ in 0..MOST_STEPS {
            let station = [self.local(0, t[0]), self.local(1, t[1])];
            let [a, b] = &station;
            // Both graphs at the same x, and the value zero, to first order.
            let (slope_a, slope_b) = (sought.slope(a), sought.slope(b));
            let apart = b.x - a.x;
            let step_b = -(sought.value(&station) + slope_a * apart) / (slope_a - slope_b);
            let steps = [step_b + apart, step_b];
            let mut settled = true;
            for i in 0..2 {
                let rate = self.edges[i].derivative(t[i]).dot(self.along);
                let next = t[i] + steps[i] / rate;
                let (low, high) = (left[i].t.min(right[i].t), left[i].t.max(right[i].t));
                if !(low..=high).contains(&next) {
                    return None;
                }
                settled &= (next - t[i]).abs() <= SETTLED;
                t[i] = next;
            }
            if settled {
                return Some([self.local(0, t[0]), self.local(1, t[1])]);
            }
        }
        None
    }

    /// Along the first graph, with the second followed to the same x.
    fn seek_by_bracket(&self, sought: Sought, left: &Station, right: &Station) -> Station {
        let at = |t: f64| {
            let first = self.local(0, t);
            [first, self.at(1, first.x, &left[1], &right[1])]
        };
        let value = |t: f64| {
            let station = at(t);
            let slope = sought.slope(&station[0]) - sought.slope(&station[1]);
            let rate = self.edges[0].derivative(t).dot(self.along);
            (sought.value(&station), slope * rate)
        };
        let (low, high) = if left[0].t < right[0].t {
            (left, right)
        } else {
            (right, left)
        };
        let bracket = [low[0].t, high[0].t];
        let middle = 0.5 * (bracket[0] + bracket[1]);
        at(bracketed(value, bracket, sought.value(low), middle))
    }
}

/// Least and greatest height of a graph over its chord.
fn strip(left: &Local, right: &Local) -> [f64; 2] {
    let width = right.x - left.x;
    let chord = (right.y - left.y) / width;
    let (from, to) = (left.slope, right.slope);
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

/// True where the ranges of the first graph's and the second graph's values between the stations have none in common.
fn apart(left: &Station, right: &Station, value: impl Fn(&Local) -> f64) -> bool {
    let [first, second] = [0, 1].map(|which| {
        let (from, to) = (value(&left[which]), value(&right[which]));
        [from.min(to), from.max(to)]
    });
    first[1] < second[0] || first[0] > second[1]
}
