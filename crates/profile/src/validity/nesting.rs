//! Whether voids lie inside the outline and outside each other.

use super::RegionFault;
use crate::Loop;
use crate::boundary::Boundary;
use crate::piece::{Hull, hulls};
use crate::tree::{Tree, turned_box};
use glam::DVec2;
use std::cell::OnceCell;

/// A loop that meets no other.
struct Fence<'a> {
    outline: &'a Loop,
    area: f64,
    boundary: OnceCell<Boundary>,
}

impl<'a> Fence<'a> {
    fn new(outline: &'a Loop, area: f64) -> Self {
        Self {
            outline,
            area,
            boundary: OnceCell::new(),
        }
    }

    /// A point on it.
    fn point(&self) -> DVec2 {
        self.outline.edges()[0].start()
    }

    fn turned_box(&self) -> Hull {
        let mut all = Vec::with_capacity(self.outline.edges().len());
        for edge in self.outline.edges() {
            hulls(edge, 1, |hull| all.push(hull));
        }
        turned_box(&all)
    }

    /// Whether it runs round `p`, which is not on it.
    fn encloses(&self, p: DVec2) -> bool {
        let boundary = self.boundary.get_or_init(|| Boundary::new([self.outline]));
        boundary
            .nearest(p)
            .is_some_and(|nearest| boundary.is_left(p, nearest) == (self.area > 0.0))
    }
}

/// Voids that lie outside the outline or inside another void; asked of loops that are `sound` alone, so that none meets
/// another.
pub(super) fn faults(loops: &[&Loop], areas: &[f64], sound: &[bool]) -> Vec<RegionFault> {
    let fences: Vec<(usize, Fence<'_>)> = (0..loops.len())
        .filter(|&i| sound[i])
        .map(|i| (i, Fence::new(loops[i], areas[i])))
        .collect();
    let (outer, voids) = match fences.split_first() {
        Some((first, voids)) if first.0 == 0 => (Some(&first.1), voids),
        _ => (None, &fences[..]),
    };
    let boxes = voids
        .iter()
        .map(|(_, void)| void.turned_box())
        .collect::<Vec<_>>();
    let tree = Tree::new(&boxes, 0.0);
    voids
        .iter()
        .filter_map(|(index, void)| {
            let at = void.point();
            if outer.is_some_and(|outer| !outer.encloses(at)) {
                return Some(RegionFault::VoidOutside { void: *index, at });
            }
            let mut around: Option<&(usize, Fence<'_>)> = None;
            tree.containing(at, |other| {
                let other = &voids[other as usize];
                let smaller = around.is_none_or(|so_far| other.1.area.abs() < so_far.1.area.abs());
                if other.0 != *index && smaller && other.1.encloses(at) {
                    around = Some(other);
                }
            });
            around.map(|(within, _)| RegionFault::VoidInVoid {
                void: *index,
                within: *within,
                at,
            })
        })
        .collect()
}
