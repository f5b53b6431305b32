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

    /// How often the interval holds the true share, summed exactly over the binomial distribution.
    ///
    /// Source: Brown, Cai and Dasgupta, Statistical Science 16 (2001) 101, section 4: on average over
    /// all shares the score interval holds close to 95 %, and away from the ends it is never far
    /// below; the least near the ends is about 0.83 (from memory). Agresti and Coull, The American
    /// Statistician 52 (1998) 119.
    #[test]
    fn the_interval_holds_the_true_share_as_often_as_it_says() {
        for (n, least) in [(50_u32, 0.90), (300, 0.92), (1000, 0.93)] {
            let (mut sum, mut tried) = (0.0, 0.0);
            for k in 1..400 {
                let p = f64::from(k) / 400.0;
                let held = coverage(n, p);
                sum += held;
                tried += 1.0;
                assert!(held > 0.83, "{n} at {p}: {held}");
                if (0.1..=0.9).contains(&p) {
                    assert!(held > least, "{n} at {p}: {held}");
                }
            }
            let mean = sum / tried;
            assert!((mean - 0.95).abs() < 0.006, "{n}: {mean}");
        }
    }

    /// The probability that the interval of a count out of `n` holds `p`.
    fn coverage(n: u32, p: f64) -> f64 {
        // terms of the binomial from their ratios, begun where they are greatest
        let held = |x: u32| {
            let (low, high) = interval(x, n);
            low <= p && p <= high
        };
        let odds = p / (1.0 - p);
        let mut log = vec![0.0; n as usize + 1];
        for x in 1..=n {
            let ratio = f64::from(n - x + 1) / f64::from(x) * odds;
            log[x as usize] = log[x as usize - 1] + crate::numeric::math::ln(ratio);
        }
        let most = log.iter().copied().fold(f64::NEG_INFINITY, f64::max);
        let weight = |x: u32| crate::numeric::math::exp(log[x as usize] - most);
        let all: f64 = (0..=n).map(weight).sum();
        let inside: f64 = (0..=n).filter(|x| held(*x)).map(weight).sum();
        inside / all
    }
}
