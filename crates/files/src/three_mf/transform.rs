//! The affine transforms of a 3MF.

use glam::DVec3;

/// x' = x m00 + y m10 + z m20 + m30 and so on: twelve numbers, row by row (3MF Core Specification 1.3, section 3.3).
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Transform {
    rows: [DVec3; 4],
}

impl Transform {
    pub(super) const IDENTITY: Self = Self {
        rows: [DVec3::X, DVec3::Y, DVec3::Z, DVec3::ZERO],
    };

    /// From the attribute's text; `None` where it is not twelve finite numbers.
    pub(super) fn parse(text: &str) -> Option<Self> {
        let numbers: Vec<f64> = text
            .split_ascii_whitespace()
            .map(|word| word.parse().ok().filter(|x: &f64| x.is_finite()))
            .collect::<Option<_>>()?;
        let rows: [f64; 12] = numbers.try_into().ok()?;
        let row = |i: usize| DVec3::new(rows[3 * i], rows[3 * i + 1], rows[3 * i + 2]);
        Some(Self {
            rows: [row(0), row(1), row(2), row(3)],
        })
    }

    pub(super) fn apply(&self, p: DVec3) -> DVec3 {
        let [x, y, z, moved] = self.rows;
        x * p.x + y * p.y + z * p.z + moved
    }

    /// First `self`, then `outer`.
    pub(super) fn then(&self, outer: &Self) -> Self {
        let [x, y, z, moved] = self.rows;
        let turn = |v: DVec3| outer.apply(v) - outer.rows[3];
        Self {
            rows: [turn(x), turn(y), turn(z), outer.apply(moved)],
        }
    }

    /// True where it turns the inside out.
    pub(super) fn mirrors(&self) -> bool {
        let [x, y, z, _] = self.rows;
        x.cross(y).dot(z) < 0.0
    }

    pub(super) fn is_identity(&self) -> bool {
        *self == Self::IDENTITY
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_stand_row_by_row_and_the_inner_one_comes_first() {
        // A quarter turn about z, then a move: the row vector (1, 0, 0) goes to (0, 1, 0) + (5, 6, 7).
        let turned = Transform::parse("0 1 0 -1 0 0 0 0 1 5 6 7").unwrap();
        assert_eq!(turned.apply(DVec3::X), DVec3::new(5.0, 7.0, 7.0));
        let doubled = Transform::parse("2 0 0 0 2 0 0 0 2 0 0 0").unwrap();
        assert_eq!(
            doubled.then(&turned).apply(DVec3::X),
            turned.apply(doubled.apply(DVec3::X))
        );
        assert!(!turned.mirrors());
        assert!(
            Transform::parse("-1 0 0 0 1 0 0 0 1 0 0 0")
                .unwrap()
                .mirrors()
        );
        for wrong in [
            "",
            "1 2 3",
            "1 0 0 0 1 0 0 0 1 0 0 NaN",
            "1 0 0 0 1 0 0 0 1 0 0 0 0",
        ] {
            assert_eq!(Transform::parse(wrong), None);
        }
    }
}
