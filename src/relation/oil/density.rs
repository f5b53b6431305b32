//! Density and temperature.
//!
//! Lubricating oils follow the volume correction of ASTM D1250 Table 54D; fluids that expand
//! otherwise fall along a straight line with a coefficient of their own.

use crate::numeric::math::exp;
use crate::quantity::convert::{number, to_celsius};
use crate::quantity::{MassDensity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::Law;

/// Volume correction factor of lubricating oils.
pub static VCF_54D: Law = Law {
    name: "volume-correction",
    title: "Volume correction factor of a lubricating oil",
    formula: "VCF = exp(-a dt (1 + 0.8 a dt)), a = 0.6278 / rho15, dt = t - 15",
    range: "density 800 to 1164 kg/m3 at 15 degC; -50 to 150 degC",
    source: "API MPMS 11.1-1980, ASTM D1250 Table 54D; constants of ISO 91-1; temperature range \
             from memory",
};

/// Density of a lubricating oil.
pub static DENSITY: Law = Law {
    name: "density-at",
    title: "Density at a temperature",
    formula: "rho = rho15 VCF",
    range: "density 800 to 1164 kg/m3 at 15 degC; -50 to 150 degC",
    source: "API MPMS 11.1-1980, ASTM D1250 Table 54D",
};

/// Density of a fluid with a coefficient of its own.
pub static DENSITY_LINEAR: Law = Law {
    name: "density-linear",
    title: "Density at a temperature, fluid outside the tables for lubricating oils",
    formula: "rho = rho15 - k (t - 15); k = 0.78 (PAG), 1.7 (PFPE), 0.90 (silicone), 0.80 \
              (phosphate ester), 0.64 (water-glycol) kg/(m3 K)",
    range: "-20 to 120 degC",
    source: "common practice, coefficients from memory; the supplier's come first",
};

/// Dynamic viscosity from the kinematic one.
pub static DYNAMIC_VISCOSITY: Law = Law {
    name: "dynamic-viscosity",
    title: "Dynamic viscosity",
    formula: "eta = nu rho",
    range: "both at one temperature",
    source: "definition",
};

/// How density changes with temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum DensityLaw {
    /// ASTM D1250 Table 54D.
    LubricatingOil,
    /// A straight line.
    Linear(Expansion),
}

/// Fall of density per kelvin.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Expansion {
    kg_m3_k: f64,
}

impl DensityLaw {
    /// A straight line falling by so many kg/m³ a kelvin.
    pub(super) const fn falling_by(kg_m3_k: f64) -> Self {
        Self::Linear(Expansion { kg_m3_k })
    }

    /// A straight line with the supplier's coefficient of expansion, a share of the density at
    /// 15 °C for a kelvin.
    pub fn expanding_by(rho15: MassDensity, share_per_kelvin: Ratio) -> Self {
        Self::falling_by(rho15.base() * share_per_kelvin.base())
    }

    /// The law to name in a calculation.
    pub fn law(self) -> &'static Law {
        match self {
            Self::LubricatingOil => &DENSITY,
            Self::Linear(_) => &DENSITY_LINEAR,
        }
    }

    /// Density at a temperature.
    pub fn density(self, rho15: MassDensity, at: ThermodynamicTemperature) -> MassDensity {
        MassDensity::from_base(rho15.base() * self.volume_correction(rho15, at).base())
    }

    /// Density at a temperature over density at 15 °C.
    pub fn volume_correction(self, rho15: MassDensity, at: ThermodynamicTemperature) -> Ratio {
        let rho15_kg_m3 = rho15.base();
        let dt_k = to_celsius(at) - 15.0;
        number(match self {
            Self::LubricatingOil => {
                let step = 0.6278 / rho15_kg_m3 * dt_k;
                exp(-step * (1.0 + 0.8 * step))
            }
            Self::Linear(expansion) => 1.0 - expansion.kg_m3_k * dt_k / rho15_kg_m3,
        })
    }

    /// Whether density and temperature are where the law was published for.
    pub fn covers(self, rho15: MassDensity, at: ThermodynamicTemperature) -> bool {
        let (rho, t) = (rho15.base(), to_celsius(at));
        match self {
            Self::LubricatingOil => {
                (800.0..=1164.0).contains(&rho) && (-50.001..=150.001).contains(&t)
            }
            Self::Linear(_) => (-20.001..=120.001).contains(&t),
        }
    }
}
