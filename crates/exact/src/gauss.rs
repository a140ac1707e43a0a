//! Gauss-Legendre rules on [0, 1]: n points are exact for polynomials of degree 2 n - 1.

use crate::real::Real;
use std::sync::LazyLock;
use twofloat::TwoFloat;

/// A rule's abscissae and weights.
pub(crate) type Rule<R> = Vec<(R, R)>;

/// The rules in use, in both precisions.
pub(crate) struct Rules<R> {
    /// 3 points: a line's integrands, of degree 4.
    pub(crate) line: Rule<R>,
    /// 8 points: a cubic's integrands, of degree 14.
    pub(crate) cubic: Rule<R>,
    /// For arcs, by the sweep they are good for; see [`Rules::arc`].
    arcs: [(f64, Rule<R>); 4],
    /// For smooth integrands of no closed form, panel by panel.
    pub(crate) panel: Rule<R>,
}

impl<R> Rules<R> {
    /// A rule for the arcs of a sweep of at most pi.
    ///
    /// The integrands are trigonometric polynomials of degree 5 at most. The rule of n points on a length L leaves
    /// L^(2n+1) (n!)^4 / ((2n+1) (2n)!^3) times the 2n-th derivative (Abramowitz and Stegun 1964, 25.4.30), which is at most 5^2n
    /// times the integrand's size.
    pub(crate) fn arc(&self, sweep: f64) -> &Rule<R> {
        let [a, b, c, d] = &self.arcs;
        [a, b, c]
            .into_iter()
            .find(|(most, _)| sweep <= *most)
            .map_or(&d.1, |(_, rule)| rule)
    }
}

pub(crate) static SINGLE: LazyLock<Rules<f64>> = LazyLock::new(|| {
    let rounded = |n| {
        rule(n)
            .into_iter()
            .map(|(x, w)| (x.rounded(), w.rounded()))
            .collect()
    };
    Rules {
        line: rounded(3),
        cubic: rounded(8),
        // The remainder is below 1e-17 for each.
        arcs: [
            (0.02, rounded(4)),
            (0.4, rounded(7)),
            (1.6, rounded(12)),
            (3.2, rounded(17)),
        ],
        panel: rounded(12),
    }
});

pub(crate) static DOUBLE: LazyLock<Rules<TwoFloat>> = LazyLock::new(|| Rules {
    line: rule(3),
    cubic: rule(8),
    arcs: [
        (0.02, rule(6)),
        (0.4, rule(11)),
        (1.6, rule(18)),
        (3.2, rule(24)),
    ],
    panel: rule(16),
});

/// The rule of n points by Newton's method on the Legendre polynomial, in twice the working precision.
fn rule(n: u32) -> Rule<TwoFloat> {
    let count = f64::from(n);
    (0..n)
        .map(|i| {
            // Tricomi's first guess; Newton's steps double the digits.
            let guess =
                profile::trig::cos(std::f64::consts::PI * (f64::from(i) + 0.75) / (count + 0.5));
            let mut x = TwoFloat::from(guess);
            for _ in 0..5 {
                let (value, slope) = legendre(n, x);
                x -= value.over(slope);
            }
            let (_, slope) = legendre(n, x);
            let one = TwoFloat::from(1.0);
            // 2 / ((1 - x^2) P'^2) on [-1, 1], half of it on [0, 1].
            let weight = one.over((one - x * x) * slope * slope);
            ((one - x) * 0.5, weight)
        })
        .collect()
}

/// The Legendre polynomial of degree n and its derivative.
fn legendre(n: u32, x: TwoFloat) -> (TwoFloat, TwoFloat) {
    let one = TwoFloat::from(1.0);
    let (mut before, mut value) = (one, x);
    for k in 2..=n {
        let k = TwoFloat::from(f64::from(k));
        let next = ((k + k - one) * x * value - (k - one) * before).over(k);
        (before, value) = (value, next);
    }
    let slope = TwoFloat::from(f64::from(n)) * (x * value - before).over(x * x - one);
    (value, slope)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn integrates_powers() {
        for n in [3_u32, 8, 12, 17, 24] {
            for power in 0..2 * n {
                let sum = rule(n)
                    .into_iter()
                    .fold(TwoFloat::from(0.0), |sum, (x, w)| {
                        sum + (0..power).fold(w, |term, _| term * x)
                    });
                let wanted = TwoFloat::from(1.0) / f64::from(power + 1);
                assert!(
                    ((sum - wanted).rounded() * f64::from(power + 1)).abs() < 1e-28,
                    "{n} {power}"
                );
            }
        }
    }

    /// Abramowitz and Stegun 1964, table 25.4.
    #[test]
    fn printed_abscissa_and_weight() {
        let eight: Vec<(f64, f64)> = rule(8)
            .into_iter()
            .map(|(x, w)| (x.rounded(), w.rounded()))
            .collect();
        assert!((1.0 - 2.0 * eight[0].0 - 0.960_289_856_497_536).abs() < 1e-15);
        assert!((2.0 * eight[0].1 - 0.101_228_536_290_376).abs() < 1e-15);
    }
}
