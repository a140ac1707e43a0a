//! From single contacts, found in whatever way, to meetings: near ones are one, and runs of them are overlaps.

use super::Meeting;
use crate::Edge;
use crate::foot::foot;
use glam::DVec2;

/// A point that two edges share.
#[derive(Debug, Clone, Copy)]
pub(super) struct Contact {
    pub(super) t_a: f64,
    pub(super) t_b: f64,
    pub(super) point: DVec2,
    /// Whether the edges pass to each other's other side, where the finder can tell.
    pub(super) passes: Option<bool>,
}

/// Contacts of two edges, in any order, some of them perhaps twice.
#[derive(Debug, Default)]
pub(super) struct Contacts {
    list: Vec<Contact>,
}

/// A run of contacts counts as an overlap where it is longer than this many times the distance within which points are
/// shared; shorter, it is one point.
const SHORTEST_OVERLAP: f64 = 4.0;

/// Where between two contacts it is asked whether the edges run together. Edges that stay within the tolerance at five
/// points but not between them differ by a bend that no edge of a part has.
const SAMPLES: [f64; 3] = [0.5, 0.25, 0.75];

/// Doublings of a step from the least part of an edge that a double can tell to the whole of it.
const MOST_DOUBLINGS: usize = 64;

impl Contacts {
    pub(super) fn add(&mut self, contact: Contact) {
        self.list.push(contact);
    }

    /// The same contacts with the first edge and the second exchanged.
    pub(super) fn exchange(&mut self) {
        for contact in &mut self.list {
            std::mem::swap(&mut contact.t_a, &mut contact.t_b);
        }
    }

    /// The meetings that the contacts make.
    pub(super) fn into_meetings(mut self, a: &Edge, b: &Edge, within: f64) -> Vec<Meeting> {
        for contact in &mut self.list {
            contact.snap(a, b, within);
        }
        self.list
            .sort_by(|p, q| p.t_a.total_cmp(&q.t_a).then(p.t_b.total_cmp(&q.t_b)));
        self.list.dedup_by(|q, p| p.t_a == q.t_a && p.t_b == q.t_b);
        self.list
            .chunk_by(|p, q| run_together(a, b, p, q, within))
            .map(|run| meeting(a, b, run, within))
            .collect()
    }
}

impl Contact {
    /// Takes the ends of the edges where the contact is as near to one as points that are shared.
    fn snap(&mut self, a: &Edge, b: &Edge, within: f64) {
        let point = self.point;
        let near = |end: DVec2| end.distance_squared(point) <= within * within;
        for (t, edge) in [(&mut self.t_b, b), (&mut self.t_a, a)] {
            if *t == 0.0 || near(edge.start()) {
                *t = 0.0;
                self.point = edge.start();
            } else if *t == 1.0 || near(edge.end()) {
                *t = 1.0;
                self.point = edge.end();
            }
        }
    }

    /// How many of the edges end here.
    fn ends(&self) -> usize {
        [self.t_a, self.t_b]
            .into_iter()
            .filter(|t| *t == 0.0 || *t == 1.0)
            .count()
    }
}

/// True where the edges stay within the tolerance of each other from one contact to the next.
fn run_together(a: &Edge, b: &Edge, from: &Contact, to: &Contact, within: f64) -> bool {
    let stays = |along: &Edge, t: [f64; 2], beside: &Edge, s: [f64; 2]| {
        SAMPLES.into_iter().all(|share| {
            let mix = |ends: [f64; 2]| ends[0] + share * (ends[1] - ends[0]);
            foot(beside, along.point(mix(t)), mix(s)).1 <= within
        })
    };
    let (t_a, t_b) = ([from.t_a, to.t_a], [from.t_b, to.t_b]);
    stays(a, t_a, b, t_b) && stays(b, t_b, a, t_a)
}

/// The meeting that a run of contacts makes: an overlap where it goes from an end of an edge to another end, as curves
/// that coincide do; a point otherwise.
fn meeting(a: &Edge, b: &Edge, run: &[Contact], within: f64) -> Meeting {
    let (first, last) = (run[0], run[run.len() - 1]);
    if first.ends() > 0
        && last.ends() > 0
        && first.point.distance(last.point) > SHORTEST_OVERLAP * within
    {
        return Meeting::Overlap {
            a: [first.t_a, last.t_a],
            b: [first.t_b, last.t_b],
        };
    }
    let most_ends = run.iter().map(Contact::ends).max().unwrap_or(0);
    let candidates = || run.iter().filter(|contact| contact.ends() == most_ends);
    let chosen = candidates()
        .nth((candidates().count() - 1) / 2)
        .unwrap_or(&first);
    let crossing = most_ends == 0
        && match chosen.passes {
            Some(passes) if run.len() == 1 => passes,
            _ => passes_through(a, b, &first, &last, within),
        };
    Meeting::Point {
        t_a: chosen.t_a,
        t_b: chosen.t_b,
        point: chosen.point,
        crossing,
    }
}

/// True where `a` comes to the contacts from one side of `b` and leaves them to the other.
fn passes_through(a: &Edge, b: &Edge, first: &Contact, last: &Contact, within: f64) -> bool {
    let before = side_beyond(a, b, first, 0.0, within);
    let after = side_beyond(a, b, last, 1.0, within);
    before
        .zip(after)
        .is_some_and(|(before, after)| before != after)
}

/// On which side of `b` the edge `a` is (true: left) where, going from the contact towards its parameter `towards`, it
/// first is clearly off `b`; `None` where one of them ends before.
fn side_beyond(a: &Edge, b: &Edge, contact: &Contact, towards: f64, within: f64) -> Option<bool> {
    let whole = towards - contact.t_a;
    let mut step = (SHORTEST_OVERLAP * within / a.chord().length()).min(0.25) * whole.signum();
    let mut guess = contact.t_b;
    for _ in 0..MOST_DOUBLINGS {
        let t = if step.abs() >= whole.abs() {
            towards
        } else {
            contact.t_a + step
        };
        let point = a.point(t);
        let (s, distance) = foot(b, point, guess);
        if distance > SHORTEST_OVERLAP * within {
            let beside = b.derivative(s).perp_dot(point - b.point(s));
            // Beyond an end of b there are no sides.
            let square = b.derivative(s).length() * distance;
            return (beside.abs() > 0.5 * square).then_some(beside > 0.0);
        }
        if t == towards {
            return None;
        }
        guess = s;
        step *= 2.0;
    }
    None
}
