//! Density of an oil at a temperature: stated, or typical of its base.

use crate::model::Oil;
use crate::model::rulebook::Rulebook;
use crate::quantity::convert::celsius;
use crate::quantity::{MassDensity, Measure, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::density::DensityLaw;

/// Density at 15 °C with the law that carries it to other temperatures.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Density {
    /// At 15 °C.
    pub at15: MassDensity,
    /// The law.
    pub law: DensityLaw,
    /// Whether it is typical of the base instead of stated.
    pub assumed: bool,
}

impl Density {
    /// At a temperature.
    pub fn at(self, t: ThermodynamicTemperature) -> MassDensity {
        self.law.density(self.at15, t)
    }
}

/// The density of an oil. A value stated at another temperature is carried to 15 °C.
pub fn density(oil: &Oil, base: BaseStock, rules: &Rulebook) -> Density {
    let law = base.density_law();
    match &oil.density {
        Some(given) => {
            let (rho, at) = given.value;
            Density {
                at15: carried_to_15(law, rho, at),
                law,
                assumed: false,
            }
        }
        None => Density {
            at15: rules.typical_density(base),
            law,
            assumed: true,
        },
    }
}

/// Solves `rho(t) = rho15 VCF(rho15, t)` for `rho15`; the factor hardly moves with `rho15`, so
/// a few steps of substitution settle to the last digits (contraction below 0.1 a step).
fn carried_to_15(law: DensityLaw, rho: MassDensity, at: ThermodynamicTemperature) -> MassDensity {
    if (at.base() - celsius(15.0).base()).abs() < 1e-9 {
        return rho;
    }
    let mut at15 = rho;
    for _ in 0..20 {
        at15 = MassDensity::from_base(rho.base() / law.volume_correction(at15, at).base());
    }
    at15
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_density_stated_warm_is_carried_back() {
        let law = BaseStock::MineralI.density_law();
        let rho15 = MassDensity::from_base(880.0);
        let warm = law.density(rho15, celsius(60.0));
        let back = carried_to_15(law, warm, celsius(60.0));
        assert!((back.base() - 880.0).abs() < 1e-9);
    }
}
