//! The highest point of a curve with one hill.

/// Golden-section search between `lo` and `hi` for a curve that rises, then falls; `(x, f(x))`.
/// The place is good to about 1e-8 of the bracket, the height to rounding.
pub fn golden(lo: f64, hi: f64, f: impl Fn(f64) -> f64) -> (f64, f64) {
    const SHARE: f64 = 0.618_033_988_749_894_9;
    let (mut lo, mut hi) = (lo, hi);
    let (mut left, mut right) = (hi - SHARE * (hi - lo), lo + SHARE * (hi - lo));
    let (mut f_left, mut f_right) = (f(left), f(right));
    for _ in 0..40 {
        if f_left < f_right {
            lo = left;
            (left, f_left) = (right, f_right);
            right = lo + SHARE * (hi - lo);
            f_right = f(right);
        } else {
            hi = right;
            (right, f_right) = (left, f_left);
            left = hi - SHARE * (hi - lo);
            f_left = f(left);
        }
    }
    if f_left < f_right {
        (right, f_right)
    } else {
        (left, f_left)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn finds_the_top() {
        let (x, y) = golden(0.0, 3.0, |x| 2.0 - (x - 1.3) * (x - 1.3));
        assert!((x - 1.3).abs() < 1e-7 && (y - 2.0).abs() < 1e-14);
        let (x, _) = golden(0.0, 3.0, |x| x);
        assert!((x - 3.0).abs() < 1e-7);
    }
}
