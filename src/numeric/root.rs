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

/// Bisects to neighbouring floats. Cannot diverge, and tolerates the jumps that standards contain.
///
/// # Errors
/// [`NoRoot`] where both ends have the same sign or one of them is not a number.
pub fn bracketed(lo: f64, hi: f64, f: impl Fn(f64) -> f64) -> Result<Root, NoRoot> {
    let (mut lo, mut hi) = (lo, hi);
    let (mut f_lo, f_hi) = (f(lo), f(hi));
    if f_lo == 0.0 {
        return Ok(Root {
            at: lo,
            residual: 0.0,
            width: 0.0,
        });
    }
    if f_hi == 0.0 {
        return Ok(Root {
            at: hi,
            residual: 0.0,
            width: 0.0,
        });
    }
    if f_lo.is_nan() || f_hi.is_nan() || (f_lo > 0.0) == (f_hi > 0.0) {
        return Err(NoRoot { lo, hi, f_lo, f_hi });
    }
    let mut best = Root {
        at: lo,
        residual: f_lo,
        width: hi - lo,
    };
    for _ in 0..200 {
        let mid = lo + 0.5 * (hi - lo);
        if mid <= lo.min(hi) || mid >= lo.max(hi) {
            break;
        }
        let f_mid = f(mid);
        best = Root {
            at: mid,
            residual: f_mid,
            width: (hi - lo).abs(),
        };
        if f_mid == 0.0 {
            break;
        }
        if (f_mid > 0.0) == (f_lo > 0.0) {
            (lo, f_lo) = (mid, f_mid);
        } else {
            hi = mid;
        }
    }
    Ok(best)
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
    fn tolerates_a_jump() {
        let root = bracketed(0.0, 10.0, |x| if x < 3.0 { -1.0 } else { 1.0 });
        assert!((root.map_or(f64::NAN, |r| r.at) - 3.0).abs() < 1e-12);
    }
}
