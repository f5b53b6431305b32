//! Roots inside a bracket.

/// A root found.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Root {
    /// Where.
    pub at: f64,
    /// What is left of the residual there.
    pub residual: f64,
    /// Width of the last bracket.
    pub width: f64,
}

/// The bracket holds no change of sign.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
#[error("no root between {lo} and {hi} (the ends give {f_lo} and {f_hi})")]
pub struct NoRoot {
    /// Lower end.
    pub lo: f64,
    /// Upper end.
    pub hi: f64,
    /// Residual at the lower end.
    pub f_lo: f64,
    /// Residual at the upper end.
    pub f_hi: f64,
}

/// Steps that may interpolate; after them the bracket is only halved.
const INTERPOLATED: u32 = 60;
/// Steps at most: enough to halve any bracket to neighbouring floats.
const MOST: u32 = 200;

/// Closes a bracket to neighbouring floats. Each step halves it or, where the residuals lie on a
/// smooth curve, takes the inverse quadratic through three of them; the root always stays between
/// the ends. Cannot diverge, and tolerates the jumps that standards contain. A residual between
/// the ends that is not a number counts as negative.
///
/// Source: T. R. Chandrupatla, Advances in Engineering Software 28 (1997) 145.
///
/// # Errors
/// [`NoRoot`] where both ends have the same sign or one of them is not a number.
pub fn bracketed(lo: f64, hi: f64, mut f: impl FnMut(f64) -> f64) -> Result<Root, NoRoot> {
    let (f_lo, f_hi) = (f(lo), f(hi));
    for (at, residual) in [(lo, f_lo), (hi, f_hi)] {
        if residual == 0.0 {
            return Ok(Root {
                at,
                residual,
                width: 0.0,
            });
        }
    }
    if f_lo.is_nan() || f_hi.is_nan() || (f_lo > 0.0) == (f_hi > 0.0) {
        return Err(NoRoot { lo, hi, f_lo, f_hi });
    }
    // a is the newest end, b the one across the root, c the one left last
    let (mut a, mut b) = ((lo, f_lo), (hi, f_hi));
    let mut share = 0.5;
    for step in 0..MOST {
        let mut mid = a.0 + share * (b.0 - a.0);
        if !between(mid, a.0, b.0) {
            mid = a.0 + 0.5 * (b.0 - a.0);
        }
        if !between(mid, a.0, b.0) {
            break;
        }
        let f_mid = f(mid);
        let c = if (f_mid > 0.0) == (a.1 > 0.0) {
            a
        } else {
            std::mem::replace(&mut b, a)
        };
        a = (mid, f_mid);
        if f_mid == 0.0 {
            return Ok(Root {
                at: mid,
                residual: 0.0,
                width: 0.0,
            });
        }
        share = if step < INTERPOLATED {
            next_share(a, b, c)
        } else {
            0.5
        };
    }
    let nearer = if b.1.abs() < a.1.abs() { b } else { a };
    Ok(Root {
        at: nearer.0,
        residual: nearer.1,
        width: (b.0 - a.0).abs(),
    })
}

fn between(x: f64, a: f64, b: f64) -> bool {
    x > a.min(b) && x < a.max(b)
}

/// The share of the way from `a` to `b` to look at next.
fn next_share(a: (f64, f64), b: (f64, f64), c: (f64, f64)) -> f64 {
    let xi = (a.0 - b.0) / (c.0 - b.0);
    let phi = (a.1 - b.1) / (c.1 - b.1);
    // where the inverse quadratic is monotonic between the ends
    let smooth = phi * phi < xi && (1.0 - phi) * (1.0 - phi) < 1.0 - xi;
    if !smooth {
        return 0.5;
    }
    let share = a.1 / (b.1 - a.1) * c.1 / (b.1 - c.1)
        + (c.0 - a.0) / (b.0 - a.0) * a.1 / (c.1 - a.1) * b.1 / (c.1 - b.1);
    // no nearer to an end than a float, so that the far end closes in too
    let least = f64::EPSILON * a.0.abs().max(f64::MIN_POSITIVE) / (b.0 - a.0).abs();
    if share.is_finite() && least < 0.5 {
        share.clamp(least, 1.0 - least)
    } else {
        0.5
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn finds_a_root_and_says_where_there_is_none() {
        let root = bracketed(0.0, 2.0, |x| x * x - 2.0).map(|r| r.at);
        assert!((root.unwrap_or(f64::NAN) - std::f64::consts::SQRT_2).abs() < 1e-15);
        let none = bracketed(0.0, 1.0, |x| x * x + 1.0);
        assert_eq!(
            none,
            Err(NoRoot {
                lo: 0.0,
                hi: 1.0,
                f_lo: 1.0,
                f_hi: 2.0
            })
        );
    }

    #[test]
    fn takes_few_steps_where_the_residual_is_smooth_and_closes_in_from_both_sides() {
        let (lg, e, cubed) = (
            |x: f64| crate::numeric::math::ln(x) - 3.0,
            |x: f64| crate::numeric::math::exp(x) - 3.0,
            |x: f64| x * x * x - 1e-9,
        );
        let linear = |x: f64| x - 7.3;
        let residuals: [&dyn Fn(f64) -> f64; 4] = [&lg, &e, &cubed, &linear];
        let ends = [(1.0, 1e6), (-5.0, 40.0), (-1.0, 1.0), (10.0, 0.0)];
        for ((lo, hi), f) in ends.into_iter().zip(residuals) {
            let mut calls = 0;
            let root = bracketed(lo, hi, |x| {
                calls += 1;
                f(x)
            })
            .expect("a change of sign");
            assert!(calls < 30, "{calls} calls between {lo} and {hi}");
            let beside = root.at.abs() * 4.0 * f64::EPSILON;
            assert!(root.width <= beside.max(f64::MIN_POSITIVE), "{root:?}");
            assert!(f(root.at - beside) * f(root.at + beside) <= 0.0, "{root:?}");
        }
    }

    #[test]
    fn the_root_of_a_poor_curve_is_found_all_the_same() {
        // flat, then steep: interpolation alone would crawl
        let root = bracketed(-1.0, 1.0, |x| {
            crate::numeric::math::exp(60.0 * (x - 0.9)) - 1.0
        });
        assert!((root.map_or(f64::NAN, |r| r.at) - 0.9).abs() < 1e-12);
        let sentinel = bracketed(0.0, 1.0, |x| if x < 0.25 { -1e9 } else { x });
        assert!((sentinel.map_or(f64::NAN, |r| r.at) - 0.25).abs() < 1e-12);
        let unknown = bracketed(-1.0, 1.0, |x| match x {
            x if x <= -1.0 => -1.0,
            x if x < 0.25 => f64::NAN,
            x => x,
        });
        assert!((unknown.map_or(f64::NAN, |r| r.at) - 0.25).abs() < 1e-12);
    }

    #[test]
    fn tolerates_a_jump() {
        let root = bracketed(0.0, 10.0, |x| if x < 3.0 { -1.0 } else { 1.0 });
        assert!((root.map_or(f64::NAN, |r| r.at) - 3.0).abs() < 1e-12);
    }
}
