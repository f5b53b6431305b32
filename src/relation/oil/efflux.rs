//! Engler degrees, Redwood seconds and the older Saybolt formulas: aids for reading old sheets.
//!
//! Published conversions of these instruments differ by 2 to 5 %, so a result stands for ± 4 %;
//! it is no basis for a selection on record.

use crate::numeric::root::{Root, bracketed};
use crate::quantity::convert::{mm2_s, to_mm2_s};
use crate::quantity::{Efflux, KinematicViscosity, Measure};
use crate::relation::Law;

/// Engler degrees.
pub static ENGLER: Law = Law {
    name: "engler-to-nu",
    title: "Kinematic viscosity from Engler degrees",
    formula: "E <= 3.2: nu = 8.0 E - 8.64 / E; E > 3.2: nu = 7.6 E - 4.0 / E",
    range: "1.2 degE or more; ± 4 %",
    source: "handbook formula, from memory",
};

/// Redwood seconds.
pub static REDWOOD: Law = Law {
    name: "redwood-to-nu",
    title: "Kinematic viscosity from Redwood seconds",
    formula: "No 1: R <= 100: nu = 0.260 R - 179 / R, above: 0.247 R - 50 / R; No 2: R <= 90: \
              nu = 2.46 R - 100 / R, above: 2.45 R",
    range: "30 s or more; ± 4 %",
    source: "handbook formula, from memory",
};

/// Older Saybolt formulas.
pub static SAYBOLT_OLDER: Law = Law {
    name: "saybolt-older",
    title: "Kinematic viscosity from Saybolt seconds by the older pair of formulas",
    formula: "Universal 32 to 100 s: nu = 0.226 t - 195 / t, above: 0.220 t - 135 / t; Furol 25 \
              to 40 s: nu = 2.24 t - 184 / t, above: 2.16 t - 60 / t",
    range: "for comparison with old sheets only; Furol 2 to 4 % above ASTM D2161",
    source: "Menon, Liquid Pipeline Hydraulics, eq. 2.8 to 2.11",
};

/// An instrument with a handbook formula.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Instrument {
    /// Engler degrees.
    Engler,
    /// Redwood No 1, seconds.
    RedwoodOne,
    /// Redwood No 2 (Admiralty), seconds.
    RedwoodTwo,
    /// Saybolt Universal by the older pair, seconds.
    SayboltOlder,
    /// Saybolt Furol by the older pair, seconds.
    FurolOlder,
}

/// Why a reading has no viscosity.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
#[error("{what} is outside the formula of this instrument, which begins at {lowest}")]
pub struct EffluxOutOfRange {
    what: f64,
    lowest: f64,
}

/// `nu = a R - b / R` up to a reading, other constants above.
struct Formula {
    lowest: f64,
    low: (f64, f64),
    up_to: f64,
    high: (f64, f64),
}

impl Instrument {
    /// The law to name in a calculation.
    pub fn law(self) -> &'static Law {
        match self {
            Self::Engler => &ENGLER,
            Self::RedwoodOne | Self::RedwoodTwo => &REDWOOD,
            Self::SayboltOlder | Self::FurolOlder => &SAYBOLT_OLDER,
        }
    }

    const fn formula(self) -> Formula {
        let (lowest, low, up_to, high) = match self {
            Self::Engler => (1.2, (8.0, 8.64), 3.2, (7.6, 4.0)),
            Self::RedwoodOne => (30.0, (0.260, 179.0), 100.0, (0.247, 50.0)),
            Self::RedwoodTwo => (30.0, (2.46, 100.0), 90.0, (2.45, 0.0)),
            Self::SayboltOlder => (32.0, (0.226, 195.0), 100.0, (0.220, 135.0)),
            Self::FurolOlder => (25.0, (2.24, 184.0), 40.0, (2.16, 60.0)),
        };
        Formula {
            lowest,
            low,
            up_to,
            high,
        }
    }

    /// Kinematic viscosity of a reading, at the temperature of the reading.
    ///
    /// # Errors
    /// [`EffluxOutOfRange`] below the instrument's range.
    pub fn viscosity(self, reading: Efflux) -> Result<KinematicViscosity, EffluxOutOfRange> {
        let formula = self.formula();
        let r = reading.base();
        if r < formula.lowest {
            let lowest = formula.lowest;
            return Err(EffluxOutOfRange { what: r, lowest });
        }
        Ok(mm2_s(formula.nu(r)))
    }

    /// Reading of a viscosity. The two branches do not quite meet; in the gap the reading is that
    /// of the branch point.
    ///
    /// # Errors
    /// [`EffluxOutOfRange`] below the instrument's range.
    pub fn reading(self, nu: KinematicViscosity) -> Result<Efflux, EffluxOutOfRange> {
        let formula = self.formula();
        let nu_mm2_s = to_mm2_s(nu);
        // Every slope is above 0.2 mm²/s a second and above 7 a degree.
        let highest = 10.0 * nu_mm2_s + 2.0 * formula.lowest;
        let root = bracketed(formula.lowest, highest, |r| formula.nu(r) - nu_mm2_s);
        let reading = |root: Root| Efflux(root.at);
        root.map(reading).map_err(|_| EffluxOutOfRange {
            what: nu_mm2_s,
            lowest: formula.nu(formula.lowest),
        })
    }
}

impl Formula {
    fn nu(&self, r: f64) -> f64 {
        let (a, b) = if r <= self.up_to { self.low } else { self.high };
        a * r - b / r
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn readings_undo_themselves_away_from_the_branch() {
        for (instrument, readings) in [
            (Instrument::Engler, [1.5, 6.1, 20.0]),
            (Instrument::RedwoodOne, [50.0, 200.0, 1000.0]),
            (Instrument::RedwoodTwo, [40.0, 80.0, 300.0]),
            (Instrument::SayboltOlder, [40.0, 80.0, 2000.0]),
            (Instrument::FurolOlder, [30.0, 50.0, 200.0]),
        ] {
            for r in readings {
                let nu = instrument.viscosity(Efflux(r));
                let back = nu.and_then(|nu| instrument.reading(nu));
                let back = back.map_or(f64::NAN, |e| e.0);
                assert!((back / r - 1.0).abs() < 1e-12, "{instrument:?} {r}: {back}");
            }
        }
        assert!(Instrument::Engler.viscosity(Efflux(1.0)).is_err());
        assert!(Instrument::RedwoodOne.reading(mm2_s(0.5)).is_err());
    }
}
