//! Viscosity of single-grade engine oils where only the grade is known.
//!
//! Source: Seireg and Dandage, as quoted by Shigley (coefficients from memory and a public
//! script). For hand calculations of plain bearings; a data sheet's own viscosities come first.

use super::Law;
use super::outside::Outside;
use crate::numeric::math::exp;
use crate::quantity::{DynamicViscosity, Measure, ThermodynamicTemperature};

/// The fit.
pub static SAE_FIT: Law = Law {
    name: "sae-viscosity-fit",
    title: "Viscosity of a single-grade oil by its SAE number",
    formula: "eta = eta0 exp(b / (T + 95))",
    range: "T in degF, 10 to 60 grades; typical oils of the last century",
    source: "Seireg and Dandage, in Shigley (from memory and a public script)",
};

/// One reyn in Pa·s.
const REYN: f64 = 6_894.757_293_168_361;

/// SAE number, `eta0` in reyn, `b` in °F.
const FITS: [(u32, f64, f64); 6] = [
    (10, 0.0158e-6, 1157.5),
    (20, 0.0136e-6, 1271.6),
    (30, 0.0141e-6, 1360.0),
    (40, 0.0121e-6, 1474.4),
    (50, 0.0170e-6, 1509.6),
    (60, 0.0187e-6, 1564.0),
];

/// Viscosity of an oil of that SAE number.
///
/// # Errors
/// A number other than 10, 20 … 60, or a temperature outside 0 to 150 °C.
pub fn sae_viscosity(
    grade: u32,
    at: ThermodynamicTemperature,
) -> Result<DynamicViscosity, Outside> {
    let celsius = at.base() - 273.15;
    if !(0.0..=150.0).contains(&celsius) {
        return Err(Outside::Range {
            what: "the temperature",
            value: celsius,
            needs: "the fit is used from 0 to 150 degC",
        });
    }
    let (_, eta0, b) = FITS
        .iter()
        .find(|(g, _, _)| *g == grade)
        .ok_or(Outside::Range {
            what: "the SAE number",
            value: f64::from(grade),
            needs: "it is 10, 20, 30, 40, 50 or 60",
        })?;
    let fahrenheit = celsius * 1.8 + 32.0;
    Ok(DynamicViscosity::from_base(
        eta0 * exp(b / (fahrenheit + 95.0)) * REYN,
    ))
}
