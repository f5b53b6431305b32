//! A share found by counting, and how far it may be off.

/// The 97.5 % point of the normal distribution.
const Z: f64 = 1.959_963_984_540_054;

/// The score interval of a share at 95 %: `of` counted in `all`. Lies within 0 to 1 and has a
/// width at 0 and at `all` too. Nothing counted in nothing may be anything.
///
/// Source: Wilson, J. Am. Stat. Assoc. 22 (1927) 209.
pub fn interval(of: u32, all: u32) -> (f64, f64) {
    if all == 0 {
        return (0.0, 1.0);
    }
    let (n, p) = (f64::from(all), f64::from(of) / f64::from(all));
    let z2 = Z * Z;
    let centre = p + z2 / (2.0 * n);
    let half = Z * (p * (1.0 - p) / n + z2 / (4.0 * n * n)).sqrt();
    let below = (centre - half) / (1.0 + z2 / n);
    let above = (centre + half) / (1.0 + z2 / n);
    // at the ends the sums cancel exactly but for rounding
    let below = if of == 0 { 0.0 } else { below.max(0.0) };
    let above = if of == all { 1.0 } else { above.min(1.0) };
    (below, above)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_interval_of_published_examples() {
        // Newcombe, Statistics in Medicine 17 (1998) 857, method 3, figures from memory:
        // 81 of 263: 0.2553 to 0.3662; 15 of 148: 0.0624 to 0.1605; 0 of 20: 0 to 0.1611
        for (of, all, low, high) in [
            (81, 263, 0.2553, 0.3662),
            (15, 148, 0.0624, 0.1605),
            (0, 20, 0.0, 0.1611),
        ] {
            let (a, b) = interval(of, all);
            assert!(
                (a - low).abs() < 5e-5 && (b - high).abs() < 5e-5,
                "{of}: {a} {b}"
            );
        }
        assert_eq!(interval(0, 0), (0.0, 1.0));
        assert!((interval(20, 20).1 - 1.0).abs() < f64::EPSILON);
    }
}
