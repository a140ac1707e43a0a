//! Do two triangles have a point in common besides the corners that they share?
//!
//! Two triangles meet if and only if an edge of the one meets the other. With one corner shared it is enough to ask the edges
//! across from it: what the triangles have in common reaches from the corner to one of them. With two shared the triangles
//! lie in one plane, on the same side of their edge, or have nothing else in common.

use glam::DVec3;
use robust::{Coord, Coord3D};
use std::cmp::Ordering;

/// A triangle that has an area.
#[derive(Debug, Clone, Copy)]
pub(super) struct Corners {
    at: [DVec3; 3],
    /// Twice its area along the normal, and the rounding of its product with a vector of length one.
    normal: DVec3,
    rounding: f64,
}

impl Corners {
    /// None for a triangle without area or with a coordinate that is not finite.
    pub(super) fn of(at: [DVec3; 3]) -> Option<Self> {
        let [a, b, c] = at;
        if !at.iter().all(|p| p.is_finite()) {
            return None;
        }
        let (u, v) = (b - a, c - a);
        let normal = u.cross(v);
        // Each of the product's terms is rounded some five times, by half a unit each.
        let rounding = 16.0 * f64::EPSILON * (u.length_squared() * v.length_squared()).sqrt();
        // Where f64 finds an area far above its rounding there is one; else the exact signs are asked.
        let has_area = normal.length() > 2.0 * rounding || Plane::of(at).is_some();
        has_area.then_some(Self {
            at,
            normal,
            rounding,
        })
    }

    /// False where the other triangle is seen at a glance to have nothing in common with this one but corners: its other
    /// corners lie on one side of this one's plane, by more than rounding.
    pub(super) fn may_meet(&self, other: [DVec3; 3]) -> bool {
        let (mut above, mut below) = (true, true);
        for corner in other.into_iter().filter(|corner| !self.at.contains(corner)) {
            let way = corner - self.at[0];
            let height = self.normal.dot(way);
            let rounding = self.rounding * way.length();
            above &= height > rounding;
            below &= height < -rounding;
        }
        !(above || below)
    }
}

/// Whether two triangles meet besides their shared corners.
pub(super) fn meet(first: &Corners, second: &Corners) -> bool {
    let (p, q) = (first.at, second.at);
    let shared = p.map(|corner| q.iter().position(|other| *other == corner));
    let own = |is_shared: bool| (0..3).filter(move |i| shared[*i].is_some() == is_shared);
    match own(true).count() {
        0 => {
            let sides = p.map(|corner| side(q, corner));
            if on_one_side(sides) {
                return false;
            }
            let sides = q.map(|corner| side(p, corner));
            !on_one_side(sides)
                && (edges(p).any(|edge| edge_meets(edge, q))
                    || edges(q).any(|edge| edge_meets(edge, p)))
        }
        1 => {
            let [Some(i), Some(j)] = [own(true).next(), shared.iter().flatten().next().copied()]
            else {
                return false;
            };
            let across = |t: [DVec3; 3], i: usize| [t[(i + 1) % 3], t[(i + 2) % 3]];
            edge_meets(across(p, i), q) || edge_meets(across(q, j), p)
        }
        2 => {
            let Some(apex) = own(false).next() else {
                return false;
            };
            let other = (0..3).find(|i| !shared.contains(&Some(*i)));
            let Some(other) = other else { return false };
            let [from, to] = [p[(apex + 1) % 3], p[(apex + 2) % 3]];
            side(p, q[other]) == Ordering::Equal
                && Plane::of(p).is_some_and(|plane| {
                    plane.turn(from, to, p[apex]) == plane.turn(from, to, q[other])
                })
        }
        _ => false,
    }
}

fn edges([a, b, c]: [DVec3; 3]) -> impl Iterator<Item = [DVec3; 2]> {
    [[a, b], [b, c], [c, a]].into_iter()
}

fn on_one_side(sides: [Ordering; 3]) -> bool {
    sides[0] != Ordering::Equal && sides[0] == sides[1] && sides[1] == sides[2]
}

/// On which side of the triangle's plane a point lies; equal in it.
fn side([a, b, c]: [DVec3; 3], p: DVec3) -> Ordering {
    let coord = |v: DVec3| Coord3D {
        x: v.x,
        y: v.y,
        z: v.z,
    };
    sign(robust::orient3d(coord(a), coord(b), coord(c), coord(p)))
}

fn sign(determinant: f64) -> Ordering {
    determinant.partial_cmp(&0.0).unwrap_or(Ordering::Equal)
}

/// Whether a segment, ends included, meets a triangle, boundary included.
fn edge_meets([p, q]: [DVec3; 2], triangle: [DVec3; 3]) -> bool {
    let sides = [p, q].map(|end| side(triangle, end));
    match sides {
        [Ordering::Equal, Ordering::Equal] => {
            Plane::of(triangle).is_some_and(|plane| plane.edge_meets([p, q], triangle))
        }
        [a, b] if a == b => false,
        _ => {
            // The line passes the triangle where it passes its edges all on the same hand.
            let [a, b, c] = triangle;
            let hands = [[a, b], [b, c], [c, a]].map(|[from, to]| side([p, q, from], to));
            !(hands.contains(&Ordering::Less) && hands.contains(&Ordering::Greater))
        }
    }
}

/// A coordinate plane onto which a triangle falls with an area.
#[derive(Debug, Clone, Copy)]
struct Plane {
    dropped: usize,
}

impl Plane {
    /// One where the triangle's own plane is seen least askew first; `None` for a triangle without area.
    fn of([a, b, c]: [DVec3; 3]) -> Option<Self> {
        let normal = (b - a).cross(c - a).abs().to_array();
        let mut order = [0, 1, 2];
        order.sort_by(|i, j| normal[*j].total_cmp(&normal[*i]));
        order
            .into_iter()
            .map(|dropped| Self { dropped })
            .find(|plane| plane.turn(a, b, c) != Ordering::Equal)
    }

    fn project(self, p: DVec3) -> Coord<f64> {
        let [x, y, z] = p.to_array();
        let (x, y) = match self.dropped {
            0 => (y, z),
            1 => (z, x),
            _ => (x, y),
        };
        Coord { x, y }
    }

    /// Which way the path a, b, c turns.
    fn turn(self, a: DVec3, b: DVec3, c: DVec3) -> Ordering {
        sign(robust::orient2d(
            self.project(a),
            self.project(b),
            self.project(c),
        ))
    }

    /// Whether a segment in the triangle's plane meets it.
    fn edge_meets(self, [p, q]: [DVec3; 2], triangle: [DVec3; 3]) -> bool {
        let [a, b, c] = triangle;
        let around = self.turn(a, b, c);
        let is_inside = edges(triangle).all(|[from, to]| {
            let turn = self.turn(from, to, p);
            turn == around || turn == Ordering::Equal
        });
        is_inside || edges(triangle).any(|edge| self.segments_meet([p, q], edge))
    }

    /// Whether two segments in one plane meet, ends included.
    fn segments_meet(self, [p, q]: [DVec3; 2], [a, b]: [DVec3; 2]) -> bool {
        let of_ab = [self.turn(p, q, a), self.turn(p, q, b)];
        let of_pq = [self.turn(a, b, p), self.turn(a, b, q)];
        if of_ab == [Ordering::Equal; 2] && of_pq == [Ordering::Equal; 2] {
            // On one line: their boxes meet where they do.
            let (low, high) = (p.min(q), p.max(q));
            let (least, most) = (a.min(b), a.max(b));
            return low.cmple(most).all() && least.cmple(high).all();
        }
        let apart = |[s, t]: [Ordering; 2]| s == t && s != Ordering::Equal;
        !(apart(of_ab) || apart(of_pq))
    }
}
