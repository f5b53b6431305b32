//! Saybolt seconds: ASTM D2161.
//!
//! Universal seconds (SUS) and Furol seconds (SFS). A table that sets 150 SUS beside ISO VG 32
//! has converted the viscosity at 40 °C; the same oil reads about 165 SUS at 100 °F.

use crate::numeric::root::bracketed;
use crate::quantity::convert::{mm2_s, to_mm2_s};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{Efflux, KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::Law;

/// Universal seconds.
pub static UNIVERSAL: Law = Law {
    name: "saybolt",
    title: "Saybolt Universal seconds",
    formula: "SUS = (4.6324 nu + (1 + 0.03264 nu) / ((3930.2 + 262.7 nu + 23.97 nu^2 \
              + 1.646 nu^3) 1e-5)) (1 + 0.000061 (t_F - 100))",
    range: "1.8 mm2/s or more; the tables end at 500 mm2/s (100 degF) and 140 mm2/s (210 degF)",
    source: "ASTM D2161; the factor of temperature is from memory and gives the published 4.632 \
             at 100 degF and 4.664 at 210 degF",
};

/// Universal seconds undone.
pub static FROM_UNIVERSAL: Law = Law {
    name: "saybolt-to-nu",
    title: "Kinematic viscosity from Saybolt Universal seconds",
    formula: "the nu at which SUS(nu, t) equals the reading",
    range: "32 SUS or more",
    source: "ASTM D2161, solved by bracketing",
};

/// Furol seconds.
pub static FUROL: Law = Law {
    name: "furol",
    title: "Saybolt Furol seconds",
    formula: "122 degF: SFS = 0.4717 nu + 13924 / (nu^2 - 72.59 nu + 6816); 210 degF: \
              SFS = 0.4792 nu + 5610 / (nu^2 + 2130); above 1300 mm2/s the linear term alone",
    range: "48 mm2/s or more at 122 degF, 50 mm2/s or more at 210 degF",
    source: "ASTM D2161, constants from memory",
};

/// Furol seconds undone.
pub static FROM_FUROL: Law = Law {
    name: "furol-to-nu",
    title: "Kinematic viscosity from Saybolt Furol seconds",
    formula: "the nu at which SFS(nu) equals the reading",
    range: "25 SFS or more, at 122 or 210 degF",
    source: "ASTM D2161, constants from memory, solved by bracketing",
};

/// Lowest viscosity of the tables, mm²/s.
const LOWEST_MM2_S: f64 = 1.77;
const LINEAR_FROM_MM2_S: f64 = 1300.0;

/// Why a reading has no viscosity, or a viscosity no reading.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum SayboltError {
    /// Thinner than the instrument.
    #[error("{} is too thin for Saybolt seconds, which begin at {lowest} mm2/s", shown(*nu))]
    TooThin {
        /// The viscosity.
        nu: KinematicViscosity,
        /// Lowest viscosity, mm²/s.
        lowest: f64,
    },
    /// A reading below the instrument's shortest.
    #[error("{seconds} seconds is below the shortest reading at this temperature, {shortest:.1}")]
    TooShort {
        /// The reading.
        seconds: f64,
        /// The shortest.
        shortest: f64,
    },
    /// Furol seconds at another temperature.
    #[error("Furol seconds are defined at 122 and 210 degF (50 and 98.9 degC) only, not at {}",
        quantity(at.amount(), Units::Si, Toward::Nearest))]
    FurolTemperature {
        /// The temperature.
        at: ThermodynamicTemperature,
    },
}

fn shown(nu: KinematicViscosity) -> String {
    quantity(nu.amount(), Units::Si, Toward::Nearest)
}

fn fahrenheit(at: ThermodynamicTemperature) -> f64 {
    at.base() * 1.8 - 459.67
}

fn sus_100_f(nu: f64) -> f64 {
    let cubic = 3930.2 + nu * (262.7 + nu * (23.97 + nu * 1.646));
    4.6324 * nu + (1.0 + 0.03264 * nu) / (cubic * 1e-5)
}

fn temperature_factor(at: ThermodynamicTemperature) -> f64 {
    1.0 + 0.000_061 * (fahrenheit(at) - 100.0)
}

/// Saybolt Universal seconds at a temperature, of a viscosity at that temperature.
///
/// # Errors
/// [`SayboltError::TooThin`] below 1.77 mm²/s.
pub fn universal(
    nu: KinematicViscosity,
    at: ThermodynamicTemperature,
) -> Result<Efflux, SayboltError> {
    let nu_mm2_s = to_mm2_s(nu);
    if nu_mm2_s < LOWEST_MM2_S {
        let lowest = LOWEST_MM2_S;
        return Err(SayboltError::TooThin { nu, lowest });
    }
    Ok(Efflux(sus_100_f(nu_mm2_s) * temperature_factor(at)))
}

/// Viscosity at a temperature, of Saybolt Universal seconds at that temperature.
///
/// # Errors
/// [`SayboltError::TooShort`] below the reading of 1.77 mm²/s, about 32 seconds.
pub fn from_universal(
    reading: Efflux,
    at: ThermodynamicTemperature,
) -> Result<KinematicViscosity, SayboltError> {
    let at_100_f = reading.base() / temperature_factor(at);
    let root = bracketed(LOWEST_MM2_S, at_100_f, |nu| sus_100_f(nu) - at_100_f);
    root.map(|r| mm2_s(r.at))
        .map_err(|_| SayboltError::TooShort {
            seconds: reading.base(),
            shortest: sus_100_f(LOWEST_MM2_S) * temperature_factor(at),
        })
}

/// The two temperatures of Furol seconds.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum FurolAt {
    F122,
    F210,
}

impl FurolAt {
    fn of(at: ThermodynamicTemperature) -> Result<Self, SayboltError> {
        let t_f = fahrenheit(at);
        if (t_f - 122.0).abs() < 0.2 {
            Ok(Self::F122)
        } else if (t_f - 210.0).abs() < 0.2 {
            Ok(Self::F210)
        } else {
            Err(SayboltError::FurolTemperature { at })
        }
    }

    fn lowest(self) -> f64 {
        match self {
            Self::F122 => 48.0,
            Self::F210 => 50.0,
        }
    }

    fn slope(self) -> f64 {
        match self {
            Self::F122 => 0.4717,
            Self::F210 => 0.4792,
        }
    }

    fn seconds(self, nu: f64) -> f64 {
        let rest = match self {
            Self::F122 => 13_924.0 / (nu * (nu - 72.59) + 6816.0),
            Self::F210 => 5610.0 / (nu * nu + 2130.0),
        };
        self.slope() * nu + if nu > LINEAR_FROM_MM2_S { 0.0 } else { rest }
    }
}

/// Saybolt Furol seconds at 122 or 210 °F, of a viscosity at that temperature.
///
/// # Errors
/// [`SayboltError`] for another temperature or below the range.
pub fn furol(nu: KinematicViscosity, at: ThermodynamicTemperature) -> Result<Efflux, SayboltError> {
    let scale = FurolAt::of(at)?;
    let nu_mm2_s = to_mm2_s(nu);
    let lowest = scale.lowest();
    if nu_mm2_s < lowest * (1.0 - 1e-9) {
        return Err(SayboltError::TooThin { nu, lowest });
    }
    Ok(Efflux(scale.seconds(nu_mm2_s)))
}

/// Viscosity at 122 or 210 °F, of Saybolt Furol seconds at that temperature.
///
/// # Errors
/// [`SayboltError`] for another temperature or below the range.
pub fn from_furol(
    reading: Efflux,
    at: ThermodynamicTemperature,
) -> Result<KinematicViscosity, SayboltError> {
    let scale = FurolAt::of(at)?;
    let seconds = reading.base();
    if seconds > scale.seconds(LINEAR_FROM_MM2_S) {
        return Ok(mm2_s(seconds / scale.slope()));
    }
    let miss = |nu: f64| scale.seconds(nu) - seconds;
    let root = bracketed(scale.lowest(), LINEAR_FROM_MM2_S, miss);
    root.map(|r| mm2_s(r.at))
        .map_err(|_| SayboltError::TooShort {
            seconds,
            shortest: scale.seconds(scale.lowest()),
        })
}
