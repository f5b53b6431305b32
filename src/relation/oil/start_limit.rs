//! Temperature at which an oil reaches a dynamic viscosity: start and pumping limits.
//!
//! Lines carried into the cold say nothing of wax or gelling; a limit found below the lowest
//! measured point is extrapolated, and below pour point and margin it has no meaning.

use super::density::DensityLaw;
use super::viscosity_temperature::{Misfit, ViscosityCurve};
use crate::numeric::root::bracketed;
use crate::quantity::convert::kinematic;
use crate::quantity::{DynamicViscosity, MassDensity, Measure, ThermodynamicTemperature};
use crate::relation::Law;

/// Temperature of a dynamic viscosity.
pub static START_LIMIT: Law = Law {
    name: "temperature-at-dynamic",
    title: "Temperature at which an oil has a dynamic viscosity",
    formula: "the T at which nu(T) rho(T) equals eta",
    range: "as the line and the density",
    source: "ASTM D341 with ASTM D1250 Table 54D or the fluid's own density, solved by bracketing",
};

/// How an oil's density is known.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Density {
    /// At 15 °C.
    pub rho15: MassDensity,
    /// How it changes.
    pub law: DensityLaw,
}

/// Temperature at which `curve` has the dynamic viscosity `eta`.
///
/// # Errors
/// [`Misfit::OutOfRange`].
pub fn temperature_at_dynamic(
    curve: &impl ViscosityCurve,
    density: Density,
    eta: DynamicViscosity,
) -> Result<ThermodynamicTemperature, Misfit> {
    // Density moves the answer by a few kelvins from where that at 15 °C would put it.
    let about = curve.temperature_at(kinematic(eta, density.rho15))?.base();
    let miss = |t_k: f64| {
        let at = ThermodynamicTemperature::from_base(t_k);
        curve.nu_at(at).base() * density.law.density(density.rho15, at).base() - eta.base()
    };
    let root = bracketed(about - 40.0, about + 40.0, miss).map_err(|_| Misfit::OutOfRange {
        nu: kinematic(eta, density.rho15),
        lowest: super::viscosity_temperature::LOWEST_MM2_S,
    })?;
    Ok(ThermodynamicTemperature::from_base(root.at))
}
