//! Pressure-viscosity coefficient of an oil: measured, or by its base stock.

use super::curve::Curve;
use super::density::Density;
use crate::model::Oil;
use crate::quantity::convert::{celsius, dynamic};
use crate::quantity::{KinematicViscosity, PressureViscosity, ThermodynamicTemperature};
use crate::relation::Law;
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::pressure_viscosity::{
    Family, GOLD, ISO_15144, MOVED, gold, iso_15144, moved,
};
use crate::relation::oil::viscosity_temperature::Line;

/// How the coefficient of an oil is had.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum PressureLaw {
    /// Measured at a temperature; moved by the law of ISO/TR 15144-1.
    Measured(PressureViscosity, ThermodynamicTemperature),
    /// ISO/TR 15144-1 from the dynamic viscosity at 38 °C.
    Iso(Family),
    /// Gold et al. from the kinematic viscosity at the temperature.
    Gold(Family),
    /// No correlation holds for the base: a measured value is needed.
    Unknown,
}

/// The law for an oil. A measured value comes before any correlation.
pub fn pressure_law(oil: &Oil, base: BaseStock) -> PressureLaw {
    if let Some(alpha) = &oil.alpha {
        return PressureLaw::Measured(alpha.value.0, alpha.value.1);
    }
    match base {
        BaseStock::Vegetable | BaseStock::AlkylatedNaphthalene => PressureLaw::Unknown,
        _ => match base.pressure_family() {
            Some(Family::Ester) => PressureLaw::Gold(Family::Ester),
            Some(family) => PressureLaw::Iso(family),
            None => PressureLaw::Unknown,
        },
    }
}

impl PressureLaw {
    /// The relation behind it.
    pub fn law(self) -> Option<&'static Law> {
        match self {
            Self::Measured(..) => Some(&MOVED),
            Self::Iso(_) => Some(&ISO_15144),
            Self::Gold(_) => Some(&GOLD),
            Self::Unknown => None,
        }
    }

    /// The coefficient of an oil whose line at that temperature is `line`.
    pub fn alpha(
        self,
        line: Line,
        density: Density,
        at: ThermodynamicTemperature,
    ) -> Option<PressureViscosity> {
        match self {
            Self::Measured(alpha, measured_at) => Some(moved(alpha, measured_at, at)),
            Self::Iso(family) => {
                let t38 = celsius(38.0);
                iso_15144(family, dynamic(line.nu_at(t38), density.at(t38)), at).ok()
            }
            Self::Gold(family) => Some(gold(family, line.nu_at(at))),
            Self::Unknown => None,
        }
    }

    /// The coefficient of the same oil slid, without turning, to another viscosity at that
    /// temperature: what a film solved for its viscosity goes by.
    pub fn alpha_slid(
        self,
        curve: &Curve,
        density: Density,
        nu: KinematicViscosity,
        at: ThermodynamicTemperature,
    ) -> Option<PressureViscosity> {
        self.alpha(curve.line_at(at).parallel_through(nu, at), density, at)
    }
}
