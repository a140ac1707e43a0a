//! Boxes along r and z.

use glam::DVec2;

/// A closed box: `min.x <= r <= max.x`, `min.y <= z <= max.y`. May be flat; never empty.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Bounds {
    /// Least r and least z.
    pub min: DVec2,
    /// Greatest r and greatest z.
    pub max: DVec2,
}

impl Bounds {
    /// The box of one point.
    pub fn of_point(p: DVec2) -> Self {
        Self { min: p, max: p }
    }

    /// The least box that holds both points.
    pub fn of_corners(a: DVec2, b: DVec2) -> Self {
        Self {
            min: a.min(b),
            max: a.max(b),
        }
    }

    /// The least box that also holds `p`.
    #[must_use]
    pub fn with(self, p: DVec2) -> Self {
        Self {
            min: self.min.min(p),
            max: self.max.max(p),
        }
    }

    /// The least box that holds both.
    #[must_use]
    pub fn union(self, other: Self) -> Self {
        Self {
            min: self.min.min(other.min),
            max: self.max.max(other.max),
        }
    }

    /// The box grown by `margin` on every side.
    #[must_use]
    pub fn grown(self, margin: f64) -> Self {
        Self {
            min: self.min - DVec2::splat(margin),
            max: self.max + DVec2::splat(margin),
        }
    }

    /// True where the closed boxes share a point.
    pub fn meets(self, other: Self) -> bool {
        self.min.cmple(other.max).all() && other.min.cmple(self.max).all()
    }

    /// True where `p` lies in the closed box.
    pub fn contains(self, p: DVec2) -> bool {
        self.min.cmple(p).all() && p.cmple(self.max).all()
    }

    /// Extents along r and z.
    pub fn size(self) -> DVec2 {
        self.max - self.min
    }

    /// Middle of the box.
    pub fn centre(self) -> DVec2 {
        self.min + 0.5 * self.size()
    }
}
