//! Viscosity of blends at every temperature: the method of Wright.
//!
//! Components are blended at constant viscosity instead of constant temperature, which needs the
//! line of each. The standard prefers it. It reads 4 to 6 % higher than the constant-temperature
//! rule at a viscosity ratio of seven and up to 21 % at twenty (computed): beyond about ten
//! neither should be relied on without a laboratory blend.

use super::blend::{BlendError, check_fractions};
use super::viscosity_temperature::{Form, Line, Misfit};
use crate::quantity::convert::number;
use crate::quantity::{Measure, Ratio};
use crate::relation::Law;

/// Wright.
pub static WRIGHT: Law = Law {
    name: "blend-wright",
    title: "Line of a blend from the lines of its components, volume fractions",
    formula: "1/B = sum(x_i / B_i), A = B sum(x_i A_i / B_i)",
    range: "miscible fluids without polymer; a viscosity ratio up to about 10",
    source: "ASTM D7152 procedure A, structure from memory",
};

/// Why there is no blend.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum WrightError {
    /// Fractions that do not fit.
    #[error(transparent)]
    Blend(#[from] BlendError),
    /// Constants that make no line.
    #[error(transparent)]
    Line(#[from] Misfit),
    /// Components fitted with different forms of `Z`.
    #[error(
        "the lines of the components use different forms of ASTM D341; fit all of them with \
        the form for viscosities below 2 mm2/s"
    )]
    Forms,
}

/// Line of the blend.
///
/// # Errors
/// See [`WrightError`].
pub fn wright(fractions: &[Ratio], lines: &[Line]) -> Result<Line, WrightError> {
    check_fractions(fractions, lines.len())?;
    let form = lines.first().map_or(Form::Short, |l| l.form());
    if lines.iter().any(|l| l.form() != form) {
        return Err(WrightError::Forms);
    }
    let (mut inverse_b, mut a_over_b) = (0.0, 0.0);
    for (x, line) in fractions.iter().zip(lines) {
        inverse_b += x.base() / line.slope().base();
        a_over_b += x.base() * line.intercept().base() / line.slope().base();
    }
    // Fractions that miss 1 by rounding are taken in proportion.
    let total: f64 = fractions.iter().map(|x| x.base()).sum();
    let line = Line::from_constants(
        number(a_over_b / inverse_b),
        number(total / inverse_b),
        form,
    )?;
    Ok(line)
}
