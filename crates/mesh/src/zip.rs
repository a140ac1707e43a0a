//! How two neighbouring rings are joined by triangles.
//!
//! Ring a has `m` segments, ring b has `n`; corner i of a stands at the share i/m of the turn, corner j of b at j/n. The
//! seam is walked once; at (i, j) the next segment is taken from the ring whose segment's middle comes first. So the
//! corner that a segment is joined to is never further from the segment's middle than half a segment of the other ring,
//! which is what [`crate::ring`]'s bound on the distance rests on. m + n triangles; with m = n, two a quad.

/// One triangle of the band, by the corners' numbers on their rings.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Facet {
    /// Segment (i, i + 1) of ring a with corner j of ring b.
    OnA(u32, u32),
    /// Segment (j, j + 1) of ring b with corner i of ring a.
    OnB(u32, u32),
}

/// The triangles between a ring of `m` and a ring of `n` segments, in order of the turn.
pub(crate) fn zip(m: u32, n: u32) -> impl Iterator<Item = Facet> {
    let (mut i, mut j) = (0_u32, 0_u32);
    std::iter::from_fn(move || {
        if i == m && j == n {
            return None;
        }
        let a_first =
            (2 * u64::from(i) + 1) * u64::from(n) <= (2 * u64::from(j) + 1) * u64::from(m);
        if j == n || (i < m && a_first) {
            i += 1;
            Some(Facet::OnA(i - 1, j))
        } else {
            j += 1;
            Some(Facet::OnB(i, j - 1))
        }
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_segment_once_and_the_far_corner_within_half_a_segment_of_the_other_ring() {
        for (m, n) in [(3, 3), (4, 8), (12, 20), (7, 100), (100, 7), (64, 68)] {
            let (mut on_a, mut on_b) = (0, 0);
            for facet in zip(m, n) {
                let (middle, corner, half) = match facet {
                    Facet::OnA(i, j) => {
                        assert_eq!(i, on_a);
                        on_a += 1;
                        (
                            (f64::from(i) + 0.5) / f64::from(m),
                            f64::from(j) / f64::from(n),
                            0.5 / f64::from(n),
                        )
                    }
                    Facet::OnB(i, j) => {
                        assert_eq!(j, on_b);
                        on_b += 1;
                        (
                            (f64::from(j) + 0.5) / f64::from(n),
                            f64::from(i) / f64::from(m),
                            0.5 / f64::from(m),
                        )
                    }
                };
                assert!(
                    (middle - corner).abs() <= half * (1.0 + 1e-12),
                    "{m} {n} {facet:?}"
                );
            }
            assert_eq!((on_a, on_b), (m, n));
        }
    }
}
