//! Viscosities in other units than mm2/s, converted in view: the value keeps its spelling.

use super::value::{Fault, Mend};
use crate::problem::Code;
use crate::quantity::convert::{kinematic, to_mm2_s};
use crate::quantity::parse::Read;
use crate::quantity::{
    DynamicViscosity, Efflux, Kind, KinematicViscosity, MassDensity, Measure,
    ThermodynamicTemperature,
};
use crate::relation::oil::density::DensityLaw;
use crate::relation::oil::efflux::Instrument;
use crate::relation::oil::saybolt;

/// What turns a dynamic viscosity of an oil into a kinematic one.
#[derive(Clone, Copy, Debug)]
pub struct Dense {
    /// Density at 15 °C.
    pub rho15: MassDensity,
    /// How it falls with temperature.
    pub law: DensityLaw,
}

impl Dense {
    /// The density at a temperature.
    pub fn at(&self, at: ThermodynamicTemperature) -> MassDensity {
        self.law.density(self.rho15, at)
    }
}

/// A viscosity read, as a kinematic one at its temperature.
///
/// # Errors
/// Readings an instrument cannot give, in bytes of the text of the value.
pub fn to_kinematic(
    read: &Read,
    at: ThermodynamicTemperature,
    dense: Option<&Dense>,
    text: &str,
) -> Result<KinematicViscosity, Fault> {
    match read.amount.kind {
        Kind::DynamicViscosity => {
            let eta = DynamicViscosity::from_base(read.amount.base);
            match dense {
                Some(dense) => Ok(kinematic(eta, dense.at(at))),
                None => Err(Fault::new(
                    Code::ConversionRange,
                    "a dynamic viscosity without a density",
                    0..text.len(),
                )
                .why("mPa.s divided by the density in g/cm3 gives mm2/s")),
            }
        }
        Kind::Efflux => efflux(read, at, text),
        _ => Ok(KinematicViscosity::from_base(read.amount.base)),
    }
}

fn efflux(
    read: &Read,
    at: ThermodynamicTemperature,
    text: &str,
) -> Result<KinematicViscosity, Fault> {
    let reading = Efflux(read.amount.base);
    let result = match read.unit {
        "SUS" => saybolt::from_universal(reading, at).map_err(|e| e.to_string()),
        "SFS" => saybolt::from_furol(reading, at).map_err(|e| e.to_string()),
        "degE" => Instrument::Engler
            .viscosity(reading)
            .map_err(|e| e.to_string()),
        "s Redwood 2" => Instrument::RedwoodTwo
            .viscosity(reading)
            .map_err(|e| e.to_string()),
        _ => Instrument::RedwoodOne
            .viscosity(reading)
            .map_err(|e| e.to_string()),
    };
    result.map_err(|why| {
        let unit_at = text.find(read.unit).unwrap_or(text.len());
        let end = unit_at + text[unit_at..].find(" at ").unwrap_or(read.unit.len());
        let fault = Fault::new(
            Code::ConversionRange,
            format!("{} {} cannot be converted", read.value, read.unit),
            0..text.len(),
        )
        .why(why);
        if read.unit == "SFS" {
            let value = text.split(" at ").next().unwrap_or(text);
            return fault
                .mend(
                    Mend::new(0..text.len(), format!("{value} at 122 degF"))
                        .remark("if it was read there"),
                )
                .mend(Mend::new(0..text.len(), format!("{value} at 210 degF")));
        }
        fault.mend(Mend::new(unit_at..end.min(text.len()), "mm2/s").remark("if that is the unit"))
    })
}

/// `46.2 mm2/s`, for saying what a value was read as.
pub fn shown(nu: KinematicViscosity) -> String {
    let value = to_mm2_s(nu);
    let text = if value >= 100.0 {
        format!("{value:.0}")
    } else {
        format!("{value:.1}")
    };
    format!("{text} mm2/s")
}
