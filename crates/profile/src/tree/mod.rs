//! A tree of turned boxes, for finding what is near a point, on a ray or near each other.
//!
//! Each box takes the direction of what it holds where that makes it smaller, so that long oblique edges side by side (the
//! flanks of fins, the teeth of a comb) are told apart as well as upright ones. Halving by the median keeps it balanced.

mod oriented;

use crate::left_of;
use crate::piece::Hull;
use glam::DVec2;
use oriented::{Oriented, into};
use std::ops::ControlFlow;

/// A tree over items that are known by their index.
#[derive(Debug, Clone)]
pub(crate) struct Tree {
    /// In preorder: a node's left child follows it.
    nodes: Vec<Node>,
}

#[derive(Debug, Clone, Copy)]
struct Node {
    bounds: Oriented,
    /// Index of the right child, or of the item where `is_leaf`.
    link: u32,
    is_leaf: bool,
}

/// Boxes that a walk down the tree may have to come back to: one a level, and the median halves 2^32 items in 32 levels.
const DEEPEST: usize = 34;

impl Tree {
    /// The tree over items whose hulls are given. Boxes are grown by `margin`, the rounding of the hulls' points.
    pub(crate) fn new(hulls: &[Hull], margin: f64) -> Self {
        let mut builder = Builder {
            hulls,
            centres: hulls.iter().map(centre).collect(),
            margin,
            nodes: Vec::with_capacity(2 * hulls.len()),
        };
        let count = u32::try_from(hulls.len()).expect("edges are counted in u32");
        let mut items: Vec<u32> = (0..count).collect();
        if !items.is_empty() {
            builder.build(&mut items);
        }
        Self {
            nodes: builder.nodes,
        }
    }

    fn children(&self, node: u32) -> Option<[u32; 2]> {
        let Node { link, is_leaf, .. } = self.nodes[node as usize];
        (!is_leaf).then_some([node + 1, link])
    }

    fn bounds(&self, node: u32) -> &Oriented {
        &self.nodes[node as usize].bounds
    }

    fn item(&self, node: u32) -> u32 {
        self.nodes[node as usize].link
    }

    /// Asks for the squared distance from `p` of every item that may be the nearest; `limit` is a squared distance beyond which
    /// none is of interest.
    pub(crate) fn nearest(
        &self,
        p: DVec2,
        limit: f64,
        mut distance_squared: impl FnMut(u32) -> f64,
    ) {
        let mut best = limit;
        let mut waiting = [(0_u32, 0.0_f64); DEEPEST];
        let mut depth = 0;
        let mut next = (!self.nodes.is_empty()).then_some(0);
        while let Some(node) = next.take() {
            if let Some([left, right]) = self.children(node) {
                let of = |node| (node, self.bounds(node).distance_squared(p));
                let (mut near, mut far) = (of(left), of(right));
                if far.1 < near.1 {
                    (near, far) = (far, near);
                }
                if far.1 < best {
                    waiting[depth] = far;
                    depth += 1;
                }
                if near.1 < best {
                    next = Some(near.0);
                }
            } else {
                best = best.min(distance_squared(self.item(node)));
            }
            while next.is_none() && depth > 0 {
                depth -= 1;
                let (node, bound) = waiting[depth];
                next = (bound < best).then_some(node);
            }
        }
    }

    /// Calls `each` with the items that the ray from `p` to the right may meet.
    pub(crate) fn right_of(&self, p: DVec2, each: impl FnMut(u32)) {
        self.walk(|bounds| bounds.may_meet_ray_right_of(p), each);
    }

    /// Calls `each` with the items whose boxes contain `p`.
    pub(crate) fn containing(&self, p: DVec2, each: impl FnMut(u32)) {
        self.walk(|bounds| bounds.distance_squared(p) == 0.0, each);
    }

    /// Calls `each` with the items that can be reached through boxes that are `wanted`.
    fn walk(&self, wanted: impl Fn(&Oriented) -> bool, mut each: impl FnMut(u32)) {
        let mut waiting = vec![0];
        if self.nodes.is_empty() {
            return;
        }
        while let Some(node) = waiting.pop() {
            if wanted(self.bounds(node)) {
                match self.children(node) {
                    Some(children) => waiting.extend(children),
                    None => each(self.item(node)),
                }
            }
        }
    }

    /// Calls `each` with every pair of items whose boxes meet, each pair once, until it breaks.
    pub(crate) fn pairs(&self, mut each: impl FnMut(u32, u32) -> ControlFlow<()>) {
        let mut within = vec![0];
        if self.nodes.is_empty() {
            return;
        }
        while let Some(node) = within.pop() {
            if let Some([left, right]) = self.children(node) {
                if self.pairs_between(left, self, right, &mut each).is_break() {
                    return;
                }
                within.extend([right, left]);
            }
        }
    }

    /// Calls `each` with every item of this tree and item of the other whose boxes meet, until it breaks.
    pub(crate) fn pairs_with(
        &self,
        other: &Self,
        mut each: impl FnMut(u32, u32) -> ControlFlow<()>,
    ) {
        if !(self.nodes.is_empty() || other.nodes.is_empty()) {
            // Whether it broke is known to the caller already.
            let _ = self.pairs_between(0, other, 0, &mut each);
        }
    }

    fn pairs_between(
        &self,
        a: u32,
        other: &Self,
        b: u32,
        each: &mut impl FnMut(u32, u32) -> ControlFlow<()>,
    ) -> ControlFlow<()> {
        let mut waiting = vec![(a, b)];
        while let Some((a, b)) = waiting.pop() {
            let (box_a, box_b) = (self.bounds(a), other.bounds(b));
            if !box_a.meets(box_b) {
                continue;
            }
            // The larger box is opened, or the one that can be.
            let (in_a, in_b) = (self.children(a), other.children(b));
            let opens_a = in_b.is_none() || box_a.reach() >= box_b.reach();
            if let Some([left, right]) = in_a.filter(|_| opens_a) {
                waiting.extend([(right, b), (left, b)]);
            } else if let Some([left, right]) = in_b {
                waiting.extend([(a, right), (a, left)]);
            } else {
                each(self.item(a), other.item(b))?;
            }
        }
        ControlFlow::Continue(())
    }
}

struct Builder<'a> {
    hulls: &'a [Hull],
    centres: Vec<DVec2>,
    margin: f64,
    nodes: Vec<Node>,
}

impl Builder<'_> {
    fn build(&mut self, items: &mut [u32]) {
        let hulls = self.hulls;
        let points = items
            .iter()
            .flat_map(|&item| hulls[item as usize].points().iter().copied());
        let direction = direction(items.iter().map(|&item| &hulls[item as usize]));
        let bounds = Oriented::around(points, direction, self.margin);
        let node = self.nodes.len();
        self.nodes.push(Node {
            bounds,
            link: items[0],
            is_leaf: true,
        });
        if items.len() == 1 {
            return;
        }
        let axis = self.widest(items, bounds.direction());
        let centres = &self.centres;
        let half = items.len() / 2;
        items.select_nth_unstable_by(half, |&a, &b| {
            let of = |item: u32| centres[item as usize].dot(axis);
            of(a).total_cmp(&of(b)).then(a.cmp(&b))
        });
        let (left, right) = items.split_at_mut(half);
        self.build(left);
        let link = u32::try_from(self.nodes.len()).expect("nodes are counted in u32");
        self.nodes[node].link = link;
        self.nodes[node].is_leaf = false;
        self.build(right);
    }

    /// Of `direction` and the one across, that along which the items are spread more widely than they are long: halved
    /// there, the halves overlap least.
    fn widest(&self, items: &[u32], direction: DVec2) -> DVec2 {
        let [mut least, mut most] = [DVec2::INFINITY, DVec2::NEG_INFINITY];
        let mut length = DVec2::ZERO;
        for &item in items {
            let centre = into(direction, self.centres[item as usize]);
            least = least.min(centre);
            most = most.max(centre);
            length += into(direction, chord(&self.hulls[item as usize])).abs();
        }
        let spread = (most - least) * items.len() as f64;
        // spread.x / length.x against spread.y / length.y.
        if spread.x * length.y >= spread.y * length.x {
            direction
        } else {
            left_of(direction)
        }
    }
}

/// The direction that the hulls mostly have, weighted by their length squared; any one where they have none.
fn direction<'a>(hulls: impl Iterator<Item = &'a Hull>) -> DVec2 {
    // Opposite directions are one: angles are doubled for the sum, and the sum's is halved.
    let sum: DVec2 = hulls.map(|hull| chord(hull).rotate(chord(hull))).sum();
    let doubled = sum.normalize_or(DVec2::X);
    let cos = (0.5 * (1.0 + doubled.x)).max(0.0).sqrt();
    let sin = (0.5 * (1.0 - doubled.x)).max(0.0).sqrt();
    DVec2::new(cos, sin.copysign(doubled.y)).normalize()
}

/// A turned box that holds all the hulls, at least one, as a hull of its own.
pub(crate) fn turned_box(hulls: &[Hull]) -> Hull {
    let points = hulls.iter().flat_map(Hull::points).copied();
    Hull::of(Oriented::around(points, direction(hulls.iter()), 0.0).corners())
}

/// From the first point to the last.
fn chord(hull: &Hull) -> DVec2 {
    let points = hull.points();
    points[points.len() - 1] - points[0]
}

fn centre(hull: &Hull) -> DVec2 {
    let points = hull.points();
    points.iter().sum::<DVec2>() / points.len() as f64
}
