//! Why a relation has no answer for what it was given.

use crate::quantity::{Angle, Measure};

/// The inputs lie where the relation says nothing.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum Outside {
    /// A length, load, speed or modulus that must be above zero is not.
    #[error("{what} is not above zero")]
    NotPositive {
        /// The input, in words.
        what: &'static str,
    },
    /// A value beyond the range of the relation.
    #[error("{what} is {value}; {needs}")]
    Range {
        /// The input, in words.
        what: &'static str,
        /// What it was, in the unit named by `needs`.
        value: f64,
        /// What the relation holds for.
        needs: &'static str,
    },
    /// The inputs are sound one by one, but together there is no such thing.
    #[error("{what}: {why}")]
    NoAnswer {
        /// What was asked for.
        what: &'static str,
        /// Why there is none.
        why: &'static str,
    },
}

impl Outside {
    /// Its name in machine output.
    pub fn name(self) -> &'static str {
        match self {
            Self::NotPositive { .. } => "not-positive",
            Self::Range { .. } => "out-of-range",
            Self::NoAnswer { .. } => "no-answer",
        }
    }
}

/// The base value of a quantity that must be above zero.
pub(crate) fn positive<Q: Measure>(what: &'static str, quantity: Q) -> Result<f64, Outside> {
    let base = quantity.base();
    if base > 0.0 && base.is_finite() {
        Ok(base)
    } else {
        Err(Outside::NotPositive { what })
    }
}

/// The value of a pure number, refused outside `lo..=hi`.
pub(crate) fn within<Q: Measure>(
    what: &'static str,
    quantity: Q,
    (lo, hi): (f64, f64),
    needs: &'static str,
) -> Result<f64, Outside> {
    let value = quantity.base();
    if (lo..=hi).contains(&value) {
        Ok(value)
    } else {
        Err(Outside::Range { what, value, needs })
    }
}

/// An angle in radians, refused outside `lo..=hi` degrees.
pub(crate) fn within_degrees(
    what: &'static str,
    angle: Angle,
    (lo, hi): (f64, f64),
    needs: &'static str,
) -> Result<f64, Outside> {
    let value = angle.base().to_degrees();
    if (lo..=hi).contains(&value) {
        Ok(angle.base())
    } else {
        Err(Outside::Range { what, value, needs })
    }
}
