//! A region made ready for many questions about points.

use crate::Region;
use crate::boundary::Boundary;
use crate::tolerance::touch;
use glam::DVec2;

/// Where a point lies.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Place {
    /// In the material.
    Inside,
    /// In a void or outside the outline.
    Outside,
    /// On the boundary, as far as rounding can tell: within [`TOUCH`](crate::TOUCH) of the region's largest extent.
    OnBoundary,
}

/// The point of a region's boundary that is nearest to a given one.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Nearest {
    /// How far it is, m.
    pub distance: f64,
    /// The point of the boundary.
    pub point: DVec2,
    /// Its loop: 0 is the outer one, 1 the first void.
    pub loop_index: usize,
    /// Its edge in the loop.
    pub edge_index: usize,
    /// The edge's parameter there.
    pub t: f64,
}

/// A region made ready for many questions about points, each answered in O(log n) for n edges.
///
/// Coordinates that are not finite get the answer `Outside` and distances that are not a number.
#[derive(Debug, Clone)]
pub struct RegionIndex {
    boundary: Boundary,
}

impl RegionIndex {
    /// The index of `region`, in O(n log n).
    pub fn new(region: &Region) -> Self {
        Self {
            boundary: Boundary::new(region.loops()),
        }
    }

    /// Where `p` lies.
    pub fn contains(&self, p: DVec2) -> Place {
        let touch = touch(self.boundary.bounds());
        match self.boundary.nearest(p) {
            Some(found) if found.distance_squared <= touch * touch => Place::OnBoundary,
            Some(found) if self.boundary.is_left(p, found) => Place::Inside,
            _ => Place::Outside,
        }
    }

    /// The nearest point of the boundary. Accuracy as of [`Edge::nearest`](crate::Edge::nearest).
    pub fn nearest(&self, p: DVec2) -> Nearest {
        let edge = self.boundary.nearest(p).map_or(0, |found| found.edge);
        let foot = self.boundary.seeker(edge).foot(p);
        let (loop_index, edge_index) = self.boundary.place_of(edge);
        Nearest {
            distance: foot.distance,
            point: foot.point,
            loop_index,
            edge_index,
            t: foot.t,
        }
    }

    /// Distance from `p` to the boundary, m: negative inside the material.
    ///
    /// # Accuracy
    /// A few units in the last place of the largest coordinate difference between `p` and the nearest edge's ends.
    pub fn signed_distance(&self, p: DVec2) -> f64 {
        self.boundary.signed_distance(p)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::samples::{rays, ring};
    use crate::{Edge, Loop, trig};
    use proptest::prelude::*;
    use std::f64::consts::TAU;

    /// Turns of the region's loops about `p` from the angles that short chords are seen under.
    fn turns_by_angles(region: &Region, p: DVec2) -> f64 {
        let chords = region.edges().flat_map(|edge| {
            (0..200).map(|i| {
                let at = |k: i32| edge.point(f64::from(k) / 200.0) - p;
                trig::angle_between(at(i), at(i + 1))
            })
        });
        chords.sum::<f64>() / TAU
    }

    fn polygon(corners: &[(f64, f64)]) -> Loop {
        let point = |i: usize| DVec2::from(corners[i % corners.len()]);
        Loop::new((0..corners.len()).map(|i| (Edge::line(point(i), point(i + 1)), 0))).unwrap()
    }

    fn square_with_hole() -> Region {
        Region {
            outer: polygon(&[(1.0, 0.0), (5.0, 0.0), (5.0, 4.0), (1.0, 4.0)]),
            voids: vec![polygon(&[(2.0, 1.0), (2.0, 3.0), (4.0, 3.0), (4.0, 1.0)])],
        }
    }

    #[test]
    fn distances_in_a_square_with_a_square_hole() {
        let index = RegionIndex::new(&square_with_hole());
        for (r, z, expected) in [
            (1.25, 2.0, -0.25),
            (1.5, 2.0, -0.5),
            (3.0, 2.0, 1.0),
            (0.0, 0.0, 1.0),
            (6.0, 5.0, 2_f64.sqrt()),
            (1.5, 0.5, -0.5),
            (1.875, 0.875, -2_f64.sqrt() / 8.0),
        ] {
            let found = index.signed_distance(DVec2::new(r, z));
            assert!((found - expected).abs() < 1e-15, "{found} at {r} {z}");
        }
        assert_eq!(index.contains(DVec2::new(2.0, 1.5)), Place::OnBoundary);
        assert_eq!(index.contains(DVec2::new(2.0, 1.0)), Place::OnBoundary);
        assert_eq!(index.contains(DVec2::new(3.0, 2.0)), Place::Outside);
        let nearest = index.nearest(DVec2::new(3.5, 1.75));
        assert_eq!((nearest.loop_index, nearest.edge_index), (1, 2));
        assert_eq!((nearest.t, nearest.distance), (0.625, 0.5));
    }

    #[test]
    fn rays_through_corners_count_once() {
        let index = RegionIndex::new(&square_with_hole());
        // At the height of corners and edges of both loops.
        for z in [0.0, 1.0, 3.0] {
            let at = |r: f64| index.boundary.winding(DVec2::new(r, z));
            let inside_void = i32::from(z != 1.0);
            assert_eq!([at(0.5), at(1.5), at(4.5), at(6.0)], [0, 1, 1, 0]);
            assert_eq!(at(3.0), if z == 0.0 { 1 } else { inside_void });
        }
        assert_eq!(index.boundary.winding(DVec2::new(3.0, 4.0)), 0);
    }

    #[test]
    fn what_is_not_finite_is_outside() {
        let index = RegionIndex::new(&square_with_hole());
        for p in [
            DVec2::NAN,
            DVec2::new(f64::INFINITY, 1.0),
            DVec2::new(2.0, f64::NAN),
        ] {
            assert_eq!(index.contains(p), Place::Outside);
            assert!(!index.signed_distance(p).is_finite());
            let _ = index.nearest(p);
        }
    }

    #[test]
    fn the_tip_of_a_thin_needle_and_of_a_thin_slit() {
        // So sharp that the tip's normals cancel: the turn is counted instead.
        let needle = polygon(&[(1.0, 0.0), (3.0, 0.0), (3.0, 1e-8)]);
        let slit = polygon(&[
            (0.0, -1.0),
            (9.0, -1.0),
            (9.0, 5e-9),
            (3.0, 0.0),
            (9.0, -5e-9 + 1.0),
            (9.0, 2.0),
            (0.0, 2.0),
        ]);
        let solid = |outer| {
            RegionIndex::new(&Region {
                outer,
                voids: vec![],
            })
        };
        let needle = solid(needle);
        assert!(needle.signed_distance(DVec2::new(0.5, 0.0)) > 0.0);
        assert!(needle.signed_distance(DVec2::new(2.0, 2e-9)) < 0.0);
        assert!(solid(slit).signed_distance(DVec2::new(2.5, 0.0)) < 0.0);
        let fold = polygon(&[
            (0.0, -1.0),
            (9.0, -1.0),
            (9.0, -4e-9),
            (3.0, 0.0),
            (9.0, 4e-9),
            (9.0, 2.0),
            (0.0, 2.0),
        ]);
        assert!(solid(fold).signed_distance(DVec2::new(2.5, 0.0)) < 0.0);
    }

    proptest! {
        #![proptest_config(ProptestConfig::with_cases(64))]

        #[test]
        fn turns_sides_and_angles_agree(
            (outer, inner) in (rays(), rays()),
            points in prop::collection::vec([-1.2..1.2, -1.2..1.2], 20),
        ) {
            let centre = DVec2::new(3.0, 0.5);
            let region = ring(&outer, &inner, centre, 1.0);
            let index = RegionIndex::new(&region);
            for [x, y] in points {
                let p = centre + DVec2::new(x, y);
                let nearest = index.nearest(p);
                let signed = index.signed_distance(p);
                prop_assert!((signed.abs() - nearest.distance).abs() < 1e-14);
                let brute = region.edges().map(|edge| edge.nearest(p).2).fold(f64::INFINITY, f64::min);
                prop_assert!((brute - nearest.distance).abs() < 1e-15, "{brute} {nearest:?}");
                let turns = index.boundary.winding(p);
                prop_assert_eq!(turns == 1, signed < 0.0, "{} at {}", signed, p);
                // Chords of 200 an edge leave a curve by less than a thousandth.
                if nearest.distance > 1e-3 {
                    let by_angles = turns_by_angles(&region, p);
                    prop_assert!((by_angles - f64::from(turns)).abs() < 1e-9, "{by_angles} {turns}");
                }
                let place = if signed < 0.0 { Place::Inside } else { Place::Outside };
                prop_assert!(nearest.distance < 1e-11 || index.contains(p) == place);
            }
        }

        #[test]
        fn a_ray_at_a_corner_s_height_counts_whole_turns(rays in rays(), which in 0_usize..7, x in -1.2..1.2) {
            let centre = DVec2::new(3.0, 0.5);
            let region = ring(&rays, &rays, centre, 1.0);
            let index = RegionIndex::new(&region);
            let corner = region.outer().edges()[which].start();
            let p = DVec2::new(centre.x + x, corner.y);
            prop_assert_eq!(index.boundary.winding(p) == 1, index.signed_distance(p) < 0.0);
        }
    }
}
