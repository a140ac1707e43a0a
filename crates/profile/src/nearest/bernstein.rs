//! Roots of polynomials in Bernstein form.

/// Calls `found` with every root in [0, 1] of the polynomial with these Bernstein coefficients, and perhaps with places where
/// it comes as close to zero as rounding can tell.
///
/// The number of sign changes among the coefficients is never less than the number of roots (the variation-diminishing
/// property, Lane and Riesenfeld 1981): none means no root, one means one, more are told apart by halving.
pub(super) fn roots<const N: usize>(coefficients: [f64; N], found: &mut impl FnMut(f64)) {
    isolate(coefficients, [0.0, 1.0], found);
}

/// Halvings after which sign changes are noise or a multiple root.
const FINEST: f64 = 1.0 / (1_u64 << 40) as f64;

fn isolate<const N: usize>(b: [f64; N], [from, to]: [f64; 2], found: &mut impl FnMut(f64)) {
    match sign_changes(&b) {
        0 => {
            if b[0] == 0.0 {
                found(from);
            }
            if b[N - 1] == 0.0 {
                found(to);
            }
        }
        1 => found(from + (to - from) * only_root(b)),
        _ if to - from <= FINEST => found(0.5 * (from + to)),
        _ => {
            let (left, right) = halved(b);
            let middle = 0.5 * (from + to);
            isolate(left, [from, middle], found);
            isolate(right, [middle, to], found);
        }
    }
}

fn sign_changes(b: &[f64]) -> usize {
    let mut changes = 0;
    let mut last = 0.0_f64;
    for &c in b {
        changes += usize::from(c * last.signum() < 0.0 && last != 0.0);
        if c != 0.0 {
            last = c;
        }
    }
    changes
}

/// Coefficients over either half, by de Casteljau's construction.
fn halved<const N: usize>(mut b: [f64; N]) -> ([f64; N], [f64; N]) {
    let mut left = b;
    for (level, first) in left.iter_mut().enumerate() {
        *first = b[0];
        for i in 0..N - 1 - level {
            b[i] = 0.5 * (b[i] + b[i + 1]);
        }
    }
    (left, b)
}

/// Value and derivative at `x`.
fn value_and_slope<const N: usize>(mut b: [f64; N], x: f64) -> (f64, f64) {
    for level in 1..N - 1 {
        for i in 0..N - level {
            b[i] = (1.0 - x) * b[i] + x * b[i + 1];
        }
    }
    let degree = (N - 1) as f64;
    ((1.0 - x) * b[0] + x * b[1], degree * (b[1] - b[0]))
}

/// The root of a polynomial with one sign change: Newton's steps, kept between the signs by halving.
fn only_root<const N: usize>(b: [f64; N]) -> f64 {
    let rising = b.iter().find(|c| **c != 0.0).is_some_and(|c| *c < 0.0);
    let (mut low, mut high) = (0.0, 1.0);
    // The chord's zero is a better start than the middle where the ends differ much.
    let (first, last) = (b[0], b[N - 1]);
    let mut x = if first * last < 0.0 {
        first / (first - last)
    } else {
        0.5
    };
    for _ in 0..64 {
        let (value, slope) = value_and_slope(b, x);
        if value == 0.0 {
            return x;
        }
        if (value < 0.0) == rising {
            low = x;
        } else {
            high = x;
        }
        let newton = x - value / slope;
        let next = if newton > low && newton < high {
            newton
        } else {
            0.5 * (low + high)
        };
        if (next - x).abs() <= f64::EPSILON * next || high - low <= f64::EPSILON {
            return next;
        }
        x = next;
    }
    x
}

#[cfg(test)]
mod tests {
    use super::*;

    fn found<const N: usize>(coefficients: [f64; N]) -> Vec<f64> {
        let mut all = Vec::new();
        roots(coefficients, &mut |x| all.push(x));
        all
    }

    /// Bernstein coefficients of the product of (x - r) over the roots.
    fn with_roots<const N: usize>(zeros: &[f64]) -> [f64; N] {
        // Each factor has the coefficients (-r, 1 - r); the product's are averages over the choices.
        let mut b = [0.0; N];
        b[0] = 1.0;
        for (degree, r) in zeros.iter().enumerate() {
            let before = b;
            let n = (degree + 1) as f64;
            for (k, c) in b.iter_mut().enumerate().take(degree + 2) {
                let (k_of_n, lower) = (k as f64 / n, if k > 0 { before[k - 1] } else { 0.0 });
                let same = if k <= degree { before[k] } else { 0.0 };
                *c = k_of_n * (1.0 - r) * lower - (1.0 - k_of_n) * r * same;
            }
        }
        b
    }

    #[test]
    fn roots_put_in_are_found() {
        let zeros = [0.1, 0.11, 0.5, 0.97, 1.5];
        let all = found(with_roots::<6>(&zeros));
        assert_eq!(all.len(), 4, "{all:?}");
        for (x, zero) in all.iter().zip(zeros) {
            assert!((x - zero).abs() < 1e-11, "{all:?}");
        }
    }

    #[test]
    fn roots_at_the_ends_and_double_roots_are_found() {
        let all = found(with_roots::<5>(&[0.0, 0.25, 0.25, 1.0]));
        for zero in [0.0, 0.25, 1.0] {
            assert!(
                all.iter().any(|x| (x - zero).abs() < 1e-7),
                "{zero} {all:?}"
            );
        }
    }

    #[test]
    fn no_root_is_made_up() {
        assert_eq!(found([1.0, 0.2, 3.0, 1.0]), Vec::<f64>::new());
        assert_eq!(found(with_roots::<4>(&[-0.5, 1.5, 2.0])), Vec::<f64>::new());
    }
}
