//! Real roots of polynomials of low degree.

/// Halvings after which a bracket of doubles cannot get any narrower (1074 + 52 would be needed for a root at 0; below
/// 2^-80 of the interval nothing depends on it).
const HALVINGS: usize = 80;

/// Value and derivative at `t` of the polynomial with these coefficients, the constant first (Horner).
fn value_and_slope(coefficients: &[f64], t: f64) -> (f64, f64) {
    coefficients
        .iter()
        .rev()
        .fold((0.0, 0.0), |(value, slope), c| {
            (value * t + c, slope * t + value)
        })
}

/// Parameters in the open interval (`low`, `high`) where the polynomial (constant coefficient first) changes its sign, in
/// ascending order, to rounding. A root that it only touches may be left out: none of the callers needs it.
///
/// Between neighbouring roots of its derivative a polynomial is monotone, so that a change of sign brackets a root.
pub(crate) fn sign_changes(coefficients: &[f64], low: f64, high: f64) -> Vec<f64> {
    if coefficients.len() < 2 {
        return Vec::new();
    }
    let derivative: Vec<f64> = coefficients
        .iter()
        .enumerate()
        .skip(1)
        .map(|(power, c)| power as f64 * c)
        .collect();
    let mut knots = sign_changes(&derivative, low, high);
    knots.push(high);
    let mut roots = Vec::new();
    let mut from = low;
    let mut value_from = value_and_slope(coefficients, low).0;
    for to in knots {
        let value_to = value_and_slope(coefficients, to).0;
        // A zero at `from` has been counted, or is the end of the interval.
        if value_from * value_to < 0.0 {
            roots.push(bracketed(
                |t| value_and_slope(coefficients, t),
                from,
                to,
                value_from,
            ));
        } else if value_to == 0.0 && to < high && value_from != 0.0 {
            roots.push(to);
        }
        (from, value_from) = (to, value_to);
    }
    roots
}

/// Root of a function with a change of sign between `low` and `high`; `at_low` is its value at `low`. Newton's steps,
/// halving where one leaves the bracket or gains too little; ends when the bracket or the step has no digit left.
pub(crate) fn bracketed(
    value_and_slope: impl Fn(f64) -> (f64, f64),
    mut low: f64,
    mut high: f64,
    at_low: f64,
) -> f64 {
    let mut t = 0.5 * (low + high);
    let mut last_step = high - low;
    for _ in 0..2 * HALVINGS {
        let (value, slope) = value_and_slope(t);
        if value == 0.0 {
            return t;
        }
        if (value > 0.0) == (at_low > 0.0) {
            low = t;
        } else {
            high = t;
        }
        let newton = t - value / slope;
        let step = (newton - t).abs();
        let next = if newton > low && newton < high && step < 0.5 * last_step {
            last_step = step;
            newton
        } else {
            last_step = 0.5 * (high - low);
            low + last_step
        };
        if next == t || (next - t).abs() <= f64::EPSILON * t.abs().max(f64::MIN_POSITIVE) {
            return next;
        }
        t = next;
    }
    t
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Coefficients of the product of (t - root).
    fn with_roots(roots: &[f64]) -> Vec<f64> {
        roots.iter().fold(vec![1.0], |p, root| {
            let mut q = vec![0.0; p.len() + 1];
            for (i, c) in p.iter().enumerate() {
                q[i + 1] += c;
                q[i] -= c * root;
            }
            q
        })
    }

    #[test]
    fn finds_the_roots_it_was_made_from() {
        let roots = [0.05, 0.2, 0.5, 0.75, 0.96];
        let found = sign_changes(&with_roots(&roots), 0.0, 1.0);
        assert_eq!(found.len(), roots.len());
        for (root, found) in roots.iter().zip(found) {
            assert!((root - found).abs() < 1e-12, "{root} {found}");
        }
    }

    #[test]
    fn leaves_out_what_lies_outside_and_what_only_touches() {
        assert!(sign_changes(&with_roots(&[-0.5, 1.5]), 0.0, 1.0).is_empty());
        assert!(sign_changes(&[1.0, 0.0, 1.0], 0.0, 1.0).is_empty());
        assert!(sign_changes(&[3.0], 0.0, 1.0).is_empty());
        assert!(sign_changes(&[0.0, 0.0, 0.0], 0.0, 1.0).is_empty());
        // (t - 1/2)^2 (t - 3/4): the double root is a touch.
        let found = sign_changes(&with_roots(&[0.5, 0.5, 0.75]), 0.0, 1.0);
        assert!(found.iter().any(|t| (t - 0.75).abs() < 1e-14));
    }

    #[test]
    fn ends_on_values_that_are_not_numbers() {
        assert!(sign_changes(&[f64::NAN, 1.0, 2.0], 0.0, 1.0).is_empty());
    }
}
