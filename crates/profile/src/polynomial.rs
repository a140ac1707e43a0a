//! Real roots of polynomials of low degree.

/// Steps after which a search ends: as many halvings leave less than 1e-36 of the bracket, and Newton's steps in between
/// shrink at least as fast.
const HALVINGS: usize = 120;

/// Value and derivative at `t` of the polynomial with these coefficients, the constant first (Horner).
fn value_and_slope(coefficients: &[f64], t: f64) -> (f64, f64) {
    coefficients
        .iter()
        .rev()
        .fold((0.0, 0.0), |(value, slope), c| {
            (value * t + c, slope * t + value)
        })
}

/// The most coefficients that are needed: degree five.
const MOST: usize = 6;

/// A few numbers in ascending order, without a place of their own in memory.
#[derive(Debug, Clone, Copy, Default)]
pub(crate) struct Few {
    values: [f64; MOST],
    count: usize,
}

impl Few {
    fn push(&mut self, value: f64) {
        // A polynomial of degree five has five roots.
        if let Some(place) = self.values.get_mut(self.count) {
            *place = value;
            self.count += 1;
        }
    }
}

impl std::ops::Deref for Few {
    type Target = [f64];
    fn deref(&self) -> &[f64] {
        &self.values[..self.count]
    }
}

/// Parameters in the open interval (`low`, `high`) where the polynomial (constant coefficient first, at most degree five)
/// changes its sign, in ascending order, to rounding. A root that it only touches may be left out: none of the callers
/// needs it.
///
/// Between neighbouring roots of its derivative a polynomial is monotone, so that a change of sign brackets a root.
pub(crate) fn sign_changes(coefficients: &[f64], low: f64, high: f64) -> Few {
    let mut roots = Few::default();
    if coefficients.len() < 2 {
        return roots;
    }
    let mut derivative = [0.0; MOST];
    for (power, c) in coefficients.iter().enumerate().skip(1) {
        derivative[power - 1] = power as f64 * c;
    }
    let knots = sign_changes(&derivative[..coefficients.len() - 1], low, high);
    let mut from = low;
    let mut value_from = value_and_slope(coefficients, low).0;
    for to in knots.iter().copied().chain([high]) {
        let value_to = value_and_slope(coefficients, to).0;
        // A zero at `from` has been counted, or is the end of the interval.
        if value_from * value_to < 0.0 {
            let function = |t| value_and_slope(coefficients, t);
            roots.push(bracketed(
                function,
                [from, to],
                value_from,
                0.5 * (from + to),
            ));
        } else if value_to == 0.0 && to < high && value_from != 0.0 {
            roots.push(to);
        }
        (from, value_from) = (to, value_to);
    }
    roots
}

/// A Newton's step this small a part of the bracket is the last: it doubles the digits once more, or is noise.
const LAST_STEP: f64 = 1e-11;

/// Root of a function with a change of sign between the two ends of `bracket`; `at_low` is its value at the first. Newton's
/// steps from `guess`, halving where one leaves the bracket or gains too little.
pub(crate) fn bracketed(
    value_and_slope: impl Fn(f64) -> (f64, f64),
    bracket: [f64; 2],
    at_low: f64,
    guess: f64,
) -> f64 {
    let [mut low, mut high] = bracket;
    let mut t = guess.max(low).min(high);
    let mut last_step = high - low;
    let small = LAST_STEP * last_step;
    for _ in 0..HALVINGS {
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
        if newton >= low && newton <= high && step <= small {
            return newton;
        }
        let next = if newton >= low && newton <= high && step <= 0.5 * last_step {
            last_step = step;
            newton
        } else {
            last_step = 0.5 * (high - low);
            low + last_step
        };
        if next == t {
            return t;
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
        for (root, found) in roots.iter().zip(found.iter()) {
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
