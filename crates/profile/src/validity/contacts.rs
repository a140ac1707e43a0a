//! Which edges meet that should not.

use super::passing::Strand;
use super::{EdgeRef, RegionFault};
use crate::candidates::{self, Hulls, Pair};
use crate::piece::Hull;
use crate::{Edge, Loop, Meeting, meetings};
use glam::DVec2;

/// When so many meetings have been found the search ends: an outline that crosses itself a million times is not worth more.
const ENOUGH: usize = 1000;

/// How an edge takes part in meetings.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum State {
    /// It may meet others.
    Good,
    /// It has no length: its neighbours are each other's.
    Point,
    /// It turns back: where it meets others says nothing.
    Broken,
}

impl State {
    /// The state of an edge with these faults of its own.
    pub(super) fn of(faults: &[RegionFault]) -> Self {
        faults
            .iter()
            .find_map(|fault| match fault {
                RegionFault::NoLength { .. } => Some(Self::Point),
                RegionFault::TurnsBack { .. } => Some(Self::Broken),
                _ => None,
            })
            .unwrap_or(Self::Good)
    }
}

/// The edges of all loops that may meet.
#[derive(Debug)]
pub(super) struct Network<'a> {
    loops: &'a [&'a Loop],
    nodes: Vec<Node>,
}

/// An edge that has a length.
#[derive(Debug)]
struct Node {
    named: EdgeRef,
    touch: f64,
    /// Its neighbours in `nodes`: those before and after it in its loop.
    neighbours: [usize; 2],
    state: State,
}

/// Two edges that meet, by their indices in the network, the first the lower.
#[derive(Debug, Clone, Copy)]
struct Contact {
    edges: [usize; 2],
    t: [f64; 2],
    kind: Kind,
}

#[derive(Debug, Clone, Copy)]
enum Kind {
    Point { at: DVec2, crossing: bool },
    Along { from: DVec2, to: DVec2 },
}

impl EdgeRef {
    /// The edge at its place in `loops`.
    pub(super) fn new(loops: &[&Loop], loop_index: usize, edge: usize) -> Self {
        Self {
            loop_index,
            edge,
            tag: loops[loop_index].tags()[edge],
        }
    }
}

impl<'a> Network<'a> {
    pub(super) fn new(loops: &'a [&'a Loop]) -> Self {
        let count = loops.iter().map(|outline| outline.edges().len()).sum();
        Self {
            loops,
            nodes: Vec::with_capacity(count),
        }
    }

    /// Adds an edge; edges are added loop by loop, in order.
    pub(super) fn add(&mut self, named: EdgeRef, touch: f64, state: State) {
        if state == State::Point {
            return;
        }
        let index = self.nodes.len();
        // What follows the last edge so far is the loop's first one.
        let (before, first) = match self.nodes.last() {
            Some(last) if last.named.loop_index == named.loop_index => {
                (index - 1, last.neighbours[1])
            }
            _ => (index, index),
        };
        self.nodes.push(Node {
            named,
            touch,
            neighbours: [before, first],
            state,
        });
        self.nodes[before].neighbours[1] = index;
        self.nodes[first].neighbours[0] = index;
    }

    fn edge(&self, index: usize) -> &'a Edge {
        let EdgeRef {
            loop_index, edge, ..
        } = self.nodes[index].named;
        &self.loops[loop_index].edges()[edge]
    }

    /// The faults: all meetings but the corners that neighbours share.
    pub(super) fn faults(&self) -> Vec<RegionFault> {
        let mut contacts = match self.contacts() {
            Ok(contacts) => contacts,
            Err(index) => {
                return vec![RegionFault::TooIntricate {
                    edge: self.nodes[index].named,
                    at: self.edge(index).start(),
                }];
            }
        };
        contacts.sort_by(|p, q| (p.edges.cmp(&q.edges)).then(p.t[0].total_cmp(&q.t[0])));
        self.merge(&mut contacts);
        contacts.iter().map(|contact| self.fault(contact)).collect()
    }

    /// All meetings but the corners that neighbours share, or an edge among too many that cannot be told apart.
    fn contacts(&self) -> Result<Vec<Contact>, usize> {
        let edges = (0..self.nodes.len())
            .map(|index| (self.nodes[index].state == State::Good).then(|| self.edge(index)));
        let margin = self.nodes.iter().map(|node| node.touch).fold(0.0, f64::max);
        let (pairs, is_whole) = match candidates::within(&edges, margin, |hulls, pair| {
            self.part_at_corner(hulls, pair)
        }) {
            Ok(pairs) => (pairs, true),
            Err(some) => (some, false),
        };
        let mut found = Vec::new();
        for pair in &pairs {
            if found.len() >= ENOUGH {
                break;
            }
            self.ask(pair.map(|edge| edge as usize), &mut found);
        }
        match pairs.first() {
            Some(&[edge, _]) if !is_whole && found.is_empty() => Err(edge as usize),
            _ => Ok(found),
        }
    }

    /// Adds the meetings of two edges.
    fn ask(&self, [a, b]: [usize; 2], found: &mut Vec<Contact>) {
        let within = self.nodes[a].touch.max(self.nodes[b].touch);
        let follows = |next: usize, before: usize| self.nodes[before].neighbours[1] == next;
        for meeting in meetings(self.edge(a), self.edge(b), within) {
            let contact = match meeting {
                Meeting::Point { t_a, t_b, .. }
                    if t_a == 1.0 && t_b == 0.0 && follows(b, a)
                        || t_a == 0.0 && t_b == 1.0 && follows(a, b) =>
                {
                    continue;
                }
                Meeting::Point {
                    t_a,
                    t_b,
                    point,
                    crossing,
                } => Contact {
                    edges: [a, b],
                    t: [t_a, t_b],
                    kind: Kind::Point {
                        at: point,
                        crossing,
                    },
                },
                Meeting::Overlap { a: t, b: s } => Contact {
                    edges: [a, b],
                    t: [t[0], s[0]],
                    kind: Kind::Along {
                        from: self.edge(a).point(t[0]),
                        to: self.edge(a).point(t[1]),
                    },
                },
            };
            found.push(contact);
        }
    }

    /// Whether the two edges share one corner, and a straight line through it has all else of the one on one side and all
    /// else of the other on the other: then they meet nowhere else, and need not be followed.
    fn part_at_corner(&self, hulls: &Hulls, pair: Pair) -> bool {
        let [a, b] = pair.map(|edge| edge as usize);
        let (before, after) = match (
            self.nodes[a].neighbours[1] == b,
            self.nodes[b].neighbours[1] == a,
        ) {
            (true, false) => (a, b),
            (false, true) => (b, a),
            _ => return false,
        };
        let corner = self.edge(before).end();
        let away = |p: DVec2| (p - corner).normalize_or_zero();
        let across = away(self.edge(after).end()) - away(self.edge(before).start());
        let of = |edge: usize| hulls.of(if edge == a { pair[0] } else { pair[1] });
        let all_beyond = |edge: usize, across: DVec2| {
            of(edge)
                .iter()
                .flat_map(Hull::points)
                .filter(|&&p| p != corner)
                .all(|&p| (p - corner).dot(across) > LEAST_PARTING * p.distance(corner))
        };
        corner == self.edge(after).start()
            && all_beyond(after, across)
            && all_beyond(before, -across)
    }

    /// Leaves of the meetings in one place one: where corners meet, each of their edges does.
    fn merge(&self, contacts: &mut Vec<Contact>) {
        let stretches: Vec<[DVec2; 2]> = contacts
            .iter()
            .filter_map(|contact| match contact.kind {
                Kind::Along { from, to } => Some([from, to]),
                Kind::Point { .. } => None,
            })
            .collect();
        let mut kept: Vec<([usize; 2], DVec2)> = Vec::new();
        contacts.retain(|contact| {
            let Kind::Point { at, .. } = contact.kind else {
                return true;
            };
            let within = 4.0
                * self.nodes[contact.edges[0]]
                    .touch
                    .max(self.nodes[contact.edges[1]].touch);
            let here = |p: DVec2| p.distance_squared(at) <= within * within;
            let mut places = [0, 1].map(|i| self.corner(contact.edges[i], contact.t[i]));
            places.sort_unstable();
            // Where two edges stop running along each other their neighbours meet too.
            if stretches.iter().flatten().any(|&end| here(end))
                || kept.iter().any(|&(others, p)| others == places && here(p))
            {
                return false;
            }
            kept.push((places, at));
            true
        });
    }

    /// The edge, or where it is met in its end, the one that starts there.
    fn corner(&self, edge: usize, t: f64) -> usize {
        if t == 1.0 {
            self.nodes[edge].neighbours[1]
        } else {
            edge
        }
    }

    fn fault(&self, contact: &Contact) -> RegionFault {
        let [first, second] = contact.edges.map(|edge| self.nodes[edge].named);
        match contact.kind {
            Kind::Along { from, to } => RegionFault::RunsAlong {
                first,
                second,
                from,
                to,
            },
            Kind::Point { at, crossing } if crossing || self.chains_cross(contact) => {
                RegionFault::Crosses { first, second, at }
            }
            Kind::Point { at, .. } => RegionFault::Touches { first, second, at },
        }
    }

    /// Whether two edges that meet in an end of one of them belong to chains that cross there.
    fn chains_cross(&self, contact: &Contact) -> bool {
        let [a, b] = [0, 1].map(|i| {
            let (edge, t) = (contact.edges[i], contact.t[i]);
            let [before, after] = self.nodes[edge].neighbours.map(|edge| self.edge(edge));
            Strand::new(before, self.edge(edge), after, t)
        });
        let in_an_end = contact.t.iter().any(|t| *t == 0.0 || *t == 1.0);
        in_an_end && a.is_crossed_by(&b)
    }
}

/// Neighbours part at their corner where each keeps away from a straight line through it by this part of the distance from
/// it: far more than rounding, far less than any corner that is not a spike.
const LEAST_PARTING: f64 = 1e-6;
