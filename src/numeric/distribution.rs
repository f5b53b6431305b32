//! Distribution functions needed for confidence intervals.

/// Two-sided quantile of Student's distribution: how many standard errors either way hold the
/// truth in `share` of all cases. `degrees` at least 1; `None` outside 0 < share < 1.
///
/// Solved from the distribution itself, whose integral is a finite sum for whole degrees
/// (Abramowitz and Stegun 26.7.3 and 26.7.4).
pub fn student(share: f64, degrees: u32) -> Option<f64> {
    if !(share > 0.0 && share < 1.0) || degrees == 0 {
        return None;
    }
    let within = |t: f64| inside(t, degrees) - share;
    let mut high = 2.0;
    while within(high) < 0.0 {
        high *= 2.0;
        if high > 1e9 {
            return None;
        }
    }
    let root = super::root::bracketed(0.0, high, within).ok()?;
    Some(root.at)
}

/// Share of the distribution within `t` either way.
fn inside(t: f64, degrees: u32) -> f64 {
    let n = f64::from(degrees);
    let theta = super::math::atan(t / n.sqrt());
    let (sin, cos) = (super::math::sin(theta), super::math::cos(theta));
    let two_over_pi = std::f64::consts::FRAC_2_PI;
    if degrees == 1 {
        return two_over_pi * theta;
    }
    // the sums begin with 1 (even) or cos (odd) and take the next two factors each time
    let even = degrees.is_multiple_of(2);
    let mut term = if even { 1.0 } else { cos };
    let mut sum = term;
    let mut k = if even { 2.0 } else { 3.0 };
    while k <= n - 2.0 {
        term *= cos * cos * (k - 1.0) / k;
        sum += term;
        k += 2.0;
    }
    if even {
        sin * sum
    } else {
        two_over_pi * (theta + sin * sum)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Published table (Abramowitz and Stegun, table 26.10): t at 95 % two-sided.
    #[test]
    fn quantiles_are_those_of_the_table() {
        for (n, t) in [
            (1, 12.706),
            (2, 4.303),
            (3, 3.182),
            (4, 2.776),
            (5, 2.571),
            (10, 2.228),
            (30, 2.042),
        ] {
            let found = student(0.95, n).expect("a quantile");
            assert!((found - t).abs() < 6e-4, "{n}: {found}");
        }
        assert_eq!(student(1.0, 3), None);
        assert_eq!(student(0.95, 0), None);
    }
}
