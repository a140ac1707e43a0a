//! What the mesh is predicted to enclose, from its rings alone.
//!
//! A band of [`crate::zip`] between ring a (corners at radius p, m segments) and ring b (q, n segments) is a prismatoid: at
//! the share s of its height its section is a polygon of area
//! ½ [(1-s)² m sin(f/m) p² + s² n sin(f/n) q² + s (1-s) G p q], with G the sum of the sines of the angles between joined
//! corners, which depends on m and n alone (G = 2 m sin(f/m) for m = n). So its volume against the plane z = const is
//! (dz/6) [m sin(f/m) p² + n sin(f/n) q² + G p q / 2]: the prismatoid formula.

use crate::plan::{LoopPlan, Station};
use crate::zip::{Facet, zip};
use crate::{EdgeDifference, Moments};
use glam::DVec3;
use profile::{DVec2, trig};
use std::collections::BTreeMap;

/// The constants of the ring counts met so far, for one angle of revolution.
#[derive(Debug)]
pub(crate) struct Patterns {
    angle: f64,
    joined: BTreeMap<(u32, u32), f64>,
}

impl Patterns {
    pub(crate) fn new(angle: f64) -> Self {
        Self {
            angle,
            joined: BTreeMap::new(),
        }
    }

    /// m sin(f/m): twice the area of a ring's polygon (or sector of one) at unit radius; 0 for a point on the axis.
    pub(crate) fn own(&self, segments: u32) -> f64 {
        if segments == 0 {
            return 0.0;
        }
        let n = f64::from(segments);
        n * trig::sin(self.angle / n)
    }

    /// G of the head of this file.
    pub(crate) fn joined(&mut self, m: u32, n: u32) -> f64 {
        if m == 0 || n == 0 {
            return 0.0;
        }
        if m == n {
            return 2.0 * self.own(m);
        }
        let angle = self.angle;
        *self.joined.entry((m, n)).or_insert_with(|| {
            let (a, b) = (angle / f64::from(m), angle / f64::from(n));
            zip(m, n)
                .map(|facet| match facet {
                    Facet::OnA(i, j) => {
                        let (x, y) = (f64::from(i) * a, f64::from(j) * b);
                        trig::sin(y - x) + trig::sin(x + a - y)
                    }
                    Facet::OnB(i, j) => {
                        let (x, y) = (f64::from(i) * a, f64::from(j) * b);
                        trig::sin(x - y) + trig::sin(y + b - x)
                    }
                })
                .sum()
        })
    }

    /// Volume that the loops' bands enclose, m3: outer loops count, voids count negative by their direction.
    pub(crate) fn volume(&mut self, loops: &[LoopPlan]) -> f64 {
        loops
            .iter()
            .flat_map(LoopPlan::bands)
            .map(|(a, b)| self.band(a.radius, a.segments, b.radius, b.segments) * (b.z - a.z))
            .sum()
    }

    /// Mean sectional area of a band, m2.
    pub(crate) fn band(&mut self, p: f64, m: u32, q: f64, n: u32) -> f64 {
        (self.own(m) * p * p + self.own(n) * q * q + 0.5 * self.joined(m, n) * p * q) / 6.0
    }
}

/// Volume, first and second moments of the mesh of one body about the origin.
///
/// A band of two equal rings is one quad's two triangles, repeated round the axis in closed form; a band of unequal rings
/// is summed facet by facet. The end caps of a part turn lie in planes through the axis and add nothing.
pub(crate) fn moments(loops: &[LoopPlan], angle: f64) -> Moments {
    let stations = || loops.iter().flat_map(|l| &l.stations);
    let low = stations().fold(f64::INFINITY, |z, s| z.min(s.z));
    let high = stations().fold(f64::NEG_INFINITY, |z, s| z.max(s.z));
    // About the middle, so that a part far up the axis keeps its digits.
    let middle = 0.5 * (low + high);
    let mut total = Moments::default();
    for (a, b) in loops.iter().flat_map(LoopPlan::bands) {
        let corner = |s: Station, i: u32| {
            let d = if s.is_pole() {
                DVec2::ZERO
            } else {
                trig::direction(f64::from(i) * angle / f64::from(s.segments))
            };
            DVec3::new(s.radius * d.x, s.radius * d.y, s.z - middle)
        };
        let facet = |facet: Facet| match facet {
            Facet::OnA(i, j) => Moments::of_triangle(corner(a, i), corner(a, i + 1), corner(b, j)),
            Facet::OnB(i, j) => Moments::of_triangle(corner(b, j), corner(a, i), corner(b, j + 1)),
        };
        let (m, n) = (a.segments, b.segments);
        if m == n || m == 0 || n == 0 {
            let count = m.max(n);
            let mut cell = Moments::default();
            if m > 0 {
                cell += facet(Facet::OnA(0, 0));
            }
            if n > 0 {
                cell += facet(Facet::OnB(u32::from(m > 0), 0));
            }
            total += cell.repeated(count, angle / f64::from(count));
        } else {
            zip(m, n).for_each(|f| total += facet(f));
        }
    }
    total.moved_up(middle)
}

/// Mesh volume less exact volume, by cause and edge.
pub(crate) fn differences(loops: &[LoopPlan], angle: f64) -> Vec<EdgeDifference> {
    let mut patterns = Patterns::new(angle);
    let mut found = Vec::new();
    for (loop_index, outline) in loops.iter().enumerate() {
        let first = found.len();
        found.extend(
            outline
                .meridional
                .iter()
                .enumerate()
                .map(|(edge_index, &moment)| EdgeDifference {
                    loop_index,
                    edge_index,
                    circumferential: 0.0,
                    meridional: angle * moment,
                }),
        );
        for (a, b) in outline.bands() {
            let facets = patterns.band(a.radius, a.segments, b.radius, b.segments) * (b.z - a.z);
            let (p, q) = (a.node.x, b.node.x);
            let circles = angle * (p * p + p * q + q * q) / 6.0 * (b.node.y - a.node.y);
            if let Some(edge) = found.get_mut(first + a.edge as usize) {
                edge.circumferential += facets - circles;
            }
        }
    }
    found
}
