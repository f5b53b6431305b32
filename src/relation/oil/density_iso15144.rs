//! Density over temperature as the calculation methods for gears and bearings take it.

use crate::quantity::{MassDensity, Measure, ThermodynamicTemperature};
use crate::relation::Law;

/// A straight line for every oil.
pub static LAW: Law = Law {
    name: "density-iso15144",
    title: "Density at a temperature, straight line of the film methods",
    formula: "rho = rho15 - 0.7 (T - 289), kg/m3 and K",
    range: "mineral oils from 0 to 120 degC; within 0.8 % of ASTM D1250 there",
    source: "ISO/TR 15144-1 (from memory)",
};

/// Density of [`LAW`].
pub fn density(rho15: MassDensity, at: ThermodynamicTemperature) -> MassDensity {
    MassDensity::from_base(rho15.base() - 0.7 * (at.base() - 289.0))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::celsius;
    use crate::relation::oil::density::DensityLaw;

    #[test]
    fn stays_near_the_tables() {
        let rho15 = MassDensity::from_base(870.0);
        for t in 0..=120 {
            let at = celsius(f64::from(t));
            let table = DensityLaw::LubricatingOil.density(rho15, at);
            let ratio = density(rho15, at).base() / table.base();
            assert!((ratio - 1.0).abs() < 0.008, "{t}: {ratio}");
        }
    }
}
