//! Boxes turned to fit what they hold.

use glam::DVec2;

/// A closed box with any direction.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Oriented {
    centre: DVec2,
    /// Unit vector along its first side.
    along: DVec2,
    /// Half its extents, along and to the left.
    half: DVec2,
}

impl Oriented {
    /// The least box with a side along the unit vector `along` that holds the points.
    fn with_direction(points: impl Iterator<Item = DVec2>, along: DVec2) -> Self {
        let (mut min, mut max) = (DVec2::INFINITY, DVec2::NEG_INFINITY);
        for p in points {
            let local = into(along, p);
            min = min.min(local);
            max = max.max(local);
        }
        let centre = 0.5 * (min + max);
        Self {
            centre: along.rotate(centre),
            along,
            half: 0.5 * (max - min),
        }
    }

    /// A box that holds the points, at least one: along r and z or along `direction`, whichever is smaller, grown by
    /// `margin`.
    pub(crate) fn around(
        points: impl Iterator<Item = DVec2> + Clone,
        direction: DVec2,
        margin: f64,
    ) -> Self {
        let mut best = Self::with_direction(points.clone(), DVec2::X);
        if direction.x != 0.0 && direction.y != 0.0 {
            let turned = Self::with_direction(points, direction);
            if turned.half.x * turned.half.y < best.half.x * best.half.y {
                best = turned;
            }
        }
        best.half += DVec2::splat(margin);
        best
    }

    /// Unit vector along its first side.
    pub(crate) fn direction(&self) -> DVec2 {
        self.along
    }

    /// Its corners, of which the first and the last are the ends of a side along its direction.
    pub(crate) fn corners(&self) -> [DVec2; 4] {
        let at = |x: f64, y: f64| self.centre + self.along.rotate(DVec2::new(x, y) * self.half);
        [at(-1.0, -1.0), at(-1.0, 1.0), at(1.0, 1.0), at(1.0, -1.0)]
    }

    /// Square of the distance from `p`, 0 inside.
    pub(crate) fn distance_squared(&self, p: DVec2) -> f64 {
        let local = into(self.along, p - self.centre).abs() - self.half;
        local.max(DVec2::ZERO).length_squared()
    }

    /// Half its extents along r and z.
    fn upright_half(&self) -> DVec2 {
        let turned = self.along.abs();
        DVec2::new(
            turned.dot(self.half),
            turned.y * self.half.x + turned.x * self.half.y,
        )
    }

    /// Whether the ray from `p` to the right (r growing) may meet it.
    pub(crate) fn may_meet_ray_right_of(&self, p: DVec2) -> bool {
        let half = self.upright_half();
        let from = self.centre - p;
        from.y.abs() <= half.y && from.x + half.x >= 0.0
    }

    /// Whether the boxes share a point, up to rounding: no side of either lies between them.
    pub(crate) fn meets(&self, other: &Self) -> bool {
        let between = (other.centre - self.centre).abs();
        if between
            .cmpgt(self.upright_half() + other.upright_half())
            .any()
        {
            return false;
        }
        self.reaches(other) && other.reaches(self)
    }

    /// Whether `other` reaches this box along this box's own sides.
    fn reaches(&self, other: &Self) -> bool {
        let between = into(self.along, other.centre - self.centre).abs();
        let turn = into(self.along, other.along).abs();
        let half = DVec2::new(
            turn.x * other.half.x + turn.y * other.half.y,
            turn.y * other.half.x + turn.x * other.half.y,
        );
        between.cmple(self.half + half).all()
    }

    /// The longer of its half extents.
    pub(crate) fn reach(&self) -> f64 {
        self.half.max_element()
    }
}

/// `p` in a frame whose first axis is the unit vector `along`.
pub(super) fn into(along: DVec2, p: DVec2) -> DVec2 {
    DVec2::new(along.dot(p), along.perp_dot(p))
}
