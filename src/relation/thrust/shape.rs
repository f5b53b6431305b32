//! How the film of a pad narrows, and what that makes of it.

use super::series::{self, ASPECTS};
use super::slider::{self, STEEPEST, Slider};
use crate::quantity::{Measure, Ratio};

/// Why no film can be stated.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum NoPad {
    /// A size, load or viscosity that cannot be.
    #[error("{what} must be above zero")]
    NotPositive {
        /// Which.
        what: &'static str,
    },
    /// The runner stands.
    #[error("a standing runner carries no hydrodynamic film; give its sliding speed")]
    Standstill,
    /// Parallel films.
    #[error(
        "ratio 1 means films that do not narrow: with one viscosity and flat faces such a pad \
         carries nothing; give inlet over outlet film above 1, usually 2 to 3, or best"
    )]
    RatioOne,
    /// Films that widen, or narrow too much.
    #[error(
        "ratio {ratio:.3} is inlet over outlet film; it must lie above 1 and not above {most:.0}"
    )]
    Ratio {
        /// As given.
        ratio: f64,
        /// Largest.
        most: f64,
    },
    /// A pivot in the middle.
    #[error(
        "a pivot at {pivot:.3} of the length: at or before the middle, theory with one viscosity \
         and flat faces gives no load; what such pads carry comes from heat and crowning"
    )]
    PivotCentral {
        /// Distance from the inlet over the length.
        pivot: f64,
    },
    /// A pivot behind every centre of pressure.
    #[error("a pivot at {pivot:.3} of the length lies behind the centre of pressure at ratio 10")]
    PivotBehind {
        /// Distance from the inlet over the length.
        pivot: f64,
    },
    /// Width over length outside the range.
    #[error("width over length is {aspect:.3}; the solution covers {from} to {to}")]
    Aspect {
        /// Width over length.
        aspect: f64,
        /// Least.
        from: f64,
        /// Most.
        to: f64,
    },
    /// A taper at which no film in the range carries the load.
    #[error("no film with a ratio of 1.01 to 10 at that taper carries the load")]
    Taper,
}

impl NoPad {
    /// Kebab-case name for messages.
    pub fn name(&self) -> &'static str {
        match self {
            Self::NotPositive { .. } => "size-not-positive",
            Self::Standstill => "runner-stands",
            Self::RatioOne => "pad-ratio-one",
            Self::Ratio { .. } => "pad-ratio-out-of-range",
            Self::PivotCentral { .. } => "pivot-central",
            Self::PivotBehind { .. } => "pivot-out-of-range",
            Self::Aspect { .. } => "pad-width-out-of-range",
            Self::Taper => "taper-out-of-range",
        }
    }
}

/// How the film narrows.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Shape {
    /// Inlet over outlet film.
    Ratio(Ratio),
    /// The ratio with the largest load.
    Best,
    /// Pivot of a tilting pad, from the inlet over the length.
    Pivot(Ratio),
}

/// Refuses a width over length outside the range of the solution.
pub(super) fn check_aspect(aspect: Ratio) -> Result<(), NoPad> {
    let (from, to) = ASPECTS;
    // a limit worked out from two lengths may miss itself by a rounding
    if (from - 1e-12..=to + 1e-12).contains(&aspect.base()) {
        return Ok(());
    }
    let aspect = aspect.base();
    Err(NoPad::Aspect { aspect, from, to })
}

/// The ratio of films of a shape with its pure numbers, at a width over length, or infinitely
/// wide where that is `None`.
///
/// # Errors
/// Ratio 1 or outside its range, a pivot in the middle or too far back, a width outside its
/// range.
pub fn shaped(shape: Shape, aspect: Option<Ratio>) -> Result<(Ratio, Slider), NoPad> {
    if let Some(aspect) = aspect {
        check_aspect(aspect)?;
    }
    let ratio = match shape {
        Shape::Ratio(ratio) => ratio,
        Shape::Best => best(aspect),
        Shape::Pivot(pivot) => tilted(pivot, aspect)?,
    };
    let m = ratio.base();
    if (m - 1.0).abs() < 1e-9 {
        return Err(NoPad::RatioOne);
    }
    let out = NoPad::Ratio {
        ratio: m,
        most: STEEPEST,
    };
    if !(m > 1.0 && m <= STEEPEST) {
        return Err(out);
    }
    let numbers = match aspect {
        Some(aspect) => series::pad(ratio, aspect),
        None => slider::slider(ratio),
    };
    Ok((ratio, numbers.ok_or(out)?))
}

fn best(aspect: Option<Ratio>) -> Ratio {
    let finite = aspect.and_then(series::optimum);
    finite.map_or_else(|| slider::optimum().0, |(ratio, _)| ratio)
}

fn tilted(pivot: Ratio, aspect: Option<Ratio>) -> Result<Ratio, NoPad> {
    let at = pivot.base();
    if at.is_nan() || at < slider::FIRST_PIVOT {
        return Err(NoPad::PivotCentral { pivot: at });
    }
    let found = match aspect {
        Some(aspect) => series::ratio_from_pivot(pivot, aspect),
        None => slider::ratio_from_pivot(pivot),
    };
    found.ok_or(NoPad::PivotBehind { pivot: at })
}
