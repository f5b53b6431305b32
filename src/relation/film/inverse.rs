//! The viscosity that a wanted film needs.
//!
//! The film rises with viscosity without limit as long as heating is left out, so one viscosity
//! answers; the pressure-viscosity coefficient follows the viscosity and is worked out inside.
//! Source: the film formulas themselves, solved in a bracket.

use crate::numeric::math::{exp, ln};
use crate::numeric::root::bracketed;
use crate::quantity::{DynamicViscosity, Length, Measure};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The viscosity for a film.
pub static VISCOSITY: Law = Law {
    name: "film-viscosity",
    title: "Dynamic viscosity at which a film is reached",
    formula: "h(eta, alpha(eta)) = lambda sigma",
    range: "0.1 mPa.s to 100 Pa.s; isothermal film",
    source: "the film formula named beside it, solved for viscosity",
};

/// Thinnest liquid looked at, Pa·s.
const THINNEST: f64 = 1e-4;
/// Thickest liquid looked at, Pa·s.
const THICKEST: f64 = 1e2;

/// The viscosity at which `film` reaches `target`, between 0.1 mPa·s and `ceiling` (100 Pa·s
/// where none is given: with a heating factor the ceiling is where its range ends).
///
/// # Errors
/// A target that is not above zero, one that the thinnest liquid already reaches or the thickest
/// does not, and whatever `film` itself refuses.
pub fn viscosity(
    target: Length,
    ceiling: Option<DynamicViscosity>,
    film: impl Fn(DynamicViscosity) -> Result<Length, Outside>,
) -> Result<DynamicViscosity, Outside> {
    let wanted = positive("the wanted film", target)?;
    let top = ceiling.map_or(THICKEST, Measure::base);
    let at = |eta: f64| film(DynamicViscosity::from_base(eta)).map(Measure::base);
    if at(THINNEST)? >= wanted {
        return Err(Outside::NoAnswer {
            what: "the viscosity",
            why: "a liquid of 0.1 mPa.s already reaches the film",
        });
    }
    if at(top)? < wanted {
        return Err(Outside::NoAnswer {
            what: "the viscosity",
            why: "no viscosity within the range of the film formula reaches the film",
        });
    }
    // In the logarithm: the film is close to a power of the viscosity.
    let excess = |ln_eta: f64| at(exp(ln_eta)).map_or(f64::NAN, |h| ln(h / wanted));
    bracketed(ln(THINNEST), ln(top), excess)
        .map(|root| DynamicViscosity::from_base(exp(root.at)))
        .map_err(|_| Outside::NoAnswer {
            what: "the viscosity",
            why: "the film does not rise steadily with viscosity",
        })
}
