//! The largest size that still fits.

/// Halvings of the interval in which the limit is sought: ten digits.
const HALVINGS: usize = 34;

/// The largest size below `too_large` for which `fit` has an answer, to ten digits from below, with that answer; `None`
/// where none is found. What fits is taken to fit at every smaller size, too.
pub(super) fn largest<T>(too_large: f64, fit: impl Fn(f64) -> Option<T>) -> Option<(f64, T)> {
    // Down to a size that fits, then between it and the last that did not.
    let mut above = too_large;
    let mut best = None;
    for _ in 0..HALVINGS {
        let size = 0.5 * above;
        if let Some(answer) = fit(size) {
            best = Some((size, answer));
            break;
        }
        above = size;
    }
    let (mut size, mut answer) = best?;
    for _ in 0..HALVINGS {
        let middle = 0.5 * (size + above);
        if let Some(better) = fit(middle) {
            (size, answer) = (middle, better);
        } else {
            above = middle;
        }
    }
    Some((size, answer))
}
