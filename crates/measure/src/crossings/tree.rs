//! A flat tree of boxes over triangles in the order of a space-filling curve (Morton 1966): a number and a box of f32 a triangle,
//! and few boxes more.

use crate::Triangles;
use glam::{DVec3, Vec3};
use rayon::prelude::*;

/// Triangles a leaf.
const LEAF: usize = 8;

/// A box, rounded outward to f32.
#[derive(Debug, Clone, Copy)]
pub(super) struct Bounds {
    low: Vec3,
    high: Vec3,
}

impl Bounds {
    const NOTHING: Self = Self {
        low: Vec3::INFINITY,
        high: Vec3::NEG_INFINITY,
    };

    /// Of a triangle.
    pub(super) fn of([a, b, c]: [DVec3; 3]) -> Self {
        let (low, high) = (a.min(b).min(c), a.max(b).max(c));
        let outward =
            |v: DVec3, next: fn(f32) -> f32| Vec3::from_array(v.as_vec3().to_array().map(next));
        Self {
            low: outward(low, f32::next_down),
            high: outward(high, f32::next_up),
        }
    }

    fn union(self, other: Self) -> Self {
        Self {
            low: self.low.min(other.low),
            high: self.high.max(other.high),
        }
    }

    pub(super) fn meets(&self, other: &Self) -> bool {
        self.low.cmple(other.high).all() && other.low.cmple(self.high).all()
    }
}

/// The tree: level by level, leaves first, each box above two of the level below.
#[derive(Debug)]
pub(super) struct Tree {
    order: Vec<u32>,
    /// Of each triangle, in that order.
    boxes: Vec<Bounds>,
    levels: Vec<Vec<Bounds>>,
}

impl Tree {
    pub(super) fn new(mesh: Triangles) -> Self {
        let (low, high) = mesh.bounds().unwrap_or((DVec3::ZERO, DVec3::ONE));
        let scale = (high - low).map(|extent| if extent > 0.0 { CELLS / extent } else { 0.0 });
        let count = u32::try_from(mesh.triangles.len()).unwrap_or(u32::MAX);
        let mut keyed: Vec<(u64, u32)> = (0..count)
            .into_par_iter()
            .map(|index| {
                let [a, b, c] = mesh.corners(mesh.triangles[index as usize]);
                (morton((((a + b + c) / 3.0) - low) * scale), index)
            })
            .collect();
        keyed.par_sort_unstable();
        let order: Vec<u32> = keyed.iter().map(|(_, index)| *index).collect();
        drop(keyed);
        let boxes: Vec<Bounds> = order
            .par_iter()
            .map(|index| Bounds::of(mesh.corners(mesh.triangles[*index as usize])))
            .collect();
        let leaves: Vec<Bounds> = boxes
            .par_chunks(LEAF)
            .map(|leaf| leaf.iter().copied().fold(Bounds::NOTHING, Bounds::union))
            .collect();
        let mut levels = vec![leaves];
        while let Some(below) = levels.last().filter(|level| level.len() > 1) {
            let above = below
                .chunks(2)
                .map(|pair| pair.iter().copied().fold(Bounds::NOTHING, Bounds::union))
                .collect();
            levels.push(above);
        }
        Self {
            order,
            boxes,
            levels,
        }
    }

    /// Number of leaves.
    pub(super) fn leaves(&self) -> usize {
        self.order.len().div_ceil(LEAF)
    }

    /// A leaf's triangles with their boxes.
    pub(super) fn members(&self, leaf: usize) -> impl Iterator<Item = (u32, &Bounds)> + Clone {
        let places = leaf * LEAF..self.order.len().min((leaf + 1) * LEAF);
        let boxes = self.boxes.get(places.clone()).unwrap_or(&[]);
        self.order
            .get(places)
            .unwrap_or(&[])
            .iter()
            .copied()
            .zip(boxes)
    }

    /// Calls `each` with the leaves from `leaf` on whose boxes meet its box, itself first or among them.
    pub(super) fn near(&self, leaf: usize, mut each: impl FnMut(usize)) {
        let Some(bounds) = self.levels[0].get(leaf) else {
            return;
        };
        // A level halves the boxes below it, so that one waits a level.
        let mut waiting = [(0_usize, 0_usize); 64];
        let mut count = 1;
        waiting[0] = (self.levels.len() - 1, 0);
        while count > 0 {
            count -= 1;
            let (level, node) = waiting[count];
            let Some(own) = self.levels[level].get(node) else {
                continue;
            };
            if (node + 1) << level <= leaf || !own.meets(bounds) {
                continue;
            }
            if level > 0 {
                waiting[count] = (level - 1, 2 * node + 1);
                waiting[count + 1] = (level - 1, 2 * node);
                count += 2;
            } else {
                each(node);
            }
        }
    }
}

/// Cells along each side of the box: 21 bits of three coordinates fill 63.
const CELLS: f64 = 2_097_151.0;

/// The bits of three coordinates in turn.
fn morton(cell: DVec3) -> u64 {
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "clamped to 21 bits; not a number becomes 0"
    )]
    let spread = |x: f64| {
        let mut x = x.clamp(0.0, CELLS) as u64;
        for (shift, mask) in [
            (32, 0x001F_0000_0000_FFFF),
            (16, 0x001F_0000_FF00_00FF),
            (8, 0x100F_00F0_0F00_F00F),
            (4, 0x10C3_0C30_C30C_30C3),
            (2, 0x1249_2492_4924_9249),
        ] {
            x = (x | (x << shift)) & mask;
        }
        x
    };
    spread(cell.x) | (spread(cell.y) << 1) | (spread(cell.z) << 2)
}
