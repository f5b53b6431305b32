//! The temperature at which losses and cooling agree.
//!
//! Losses fall with temperature (the oil gets thinner) and cooling rises with it, so there is one
//! temperature at most; it is looked for between the surroundings and a hottest one, never
//! iterated towards.

use crate::numeric::root::bracketed;
use crate::quantity::convert::to_celsius;
use crate::quantity::{
    Area, HeatTransfer, Measure, Power, ThermalConductance, ThermodynamicTemperature,
};
use crate::relation::Law;

/// Losses against cooling by the surroundings.
pub static LAW: Law = Law {
    name: "heat-balance",
    title: "temperature at which losses and cooling by the surroundings agree",
    formula: "P_V(T) = k A (T - T_amb)",
    range: "steady running; one temperature throughout the housing",
    source: "heat balance, as in ISO/TR 14179 and ISO 7902-1",
};

/// Cooling from one reading.
pub static CALIBRATION: Law = Law {
    name: "heat-calibration",
    title: "cooling of a housing from one temperature reading",
    formula: "k A = P_V(T_read)/(T_read - T_amb)",
    range: "a reading at steady running, with the oil in use",
    source: "heat balance, solved for the cooling",
};

/// Heat transfer from still or moving air.
pub static AIR: Law = Law {
    name: "heat-transfer-air",
    title: "heat transfer of a housing to moving air",
    formula: "k = 7 + 12 sqrt(v), v in m/s",
    range: "air above 1.2 m/s; below it 15 to 20 W/(m2 K)",
    source: "ISO 7902-1 (from memory)",
};

/// Heat a surface gives off.
pub static CONDUCTANCE: Law = Law {
    name: "heat-conductance",
    title: "heat a surface gives off for every kelvin",
    formula: "kA = k A",
    range: "one temperature throughout the housing",
    source: "definition",
};

/// Why no temperature is found.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum NoBalance {
    /// Losses still exceed cooling at the hottest temperature.
    #[error(
        "at {hottest:.0} degC the losses of {losses:.0} W still exceed the {removed:.0} W that \
         cooling removes"
    )]
    TooHot {
        /// Hottest temperature tried, degC.
        hottest: f64,
        /// Losses there, W.
        losses: f64,
        /// Cooling there, W.
        removed: f64,
    },
    /// Losses that are not a number, or negative, at one end.
    #[error("the losses at {at:.0} degC are {losses} W: no balance can be struck")]
    Losses {
        /// Where, degC.
        at: f64,
        /// What they are, W.
        losses: f64,
    },
    /// A hottest temperature not above the surroundings.
    #[error(
        "the surroundings at {ambient:.0} degC are not colder than the hottest temperature \
         looked at, {hottest:.0} degC"
    )]
    Surroundings {
        /// Surroundings, degC.
        ambient: f64,
        /// Hottest temperature, degC.
        hottest: f64,
    },
    /// A reading that tells nothing about cooling.
    #[error(
        "a reading of {reading:.1} degC in surroundings of {ambient:.1} degC with losses of \
         {losses:.0} W says nothing about cooling"
    )]
    Reading {
        /// Reading, degC.
        reading: f64,
        /// Surroundings, degC.
        ambient: f64,
        /// Losses at the reading, W.
        losses: f64,
    },
}

impl NoBalance {
    /// Kebab-case name for messages.
    pub fn name(&self) -> &'static str {
        match self {
            Self::TooHot { .. } => "heat-not-removed",
            Self::Losses { .. } => "losses-not-positive",
            Self::Surroundings { .. } => "surroundings-too-hot",
            Self::Reading { .. } => "reading-not-usable",
        }
    }
}

/// Where heat goes and how far the search goes.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Surroundings {
    /// Temperature of the air.
    pub ambient: ThermodynamicTemperature,
    /// Heat given off for every kelvin above it, `k A`.
    pub conductance: ThermalConductance,
    /// Hottest temperature looked at.
    pub hottest: ThermodynamicTemperature,
}

/// Heat conductance of a surface, `k A`.
pub fn conductance(transfer: HeatTransfer, area: Area) -> ThermalConductance {
    ThermalConductance::from_base(transfer.base() * area.base())
}

/// The temperature of [`LAW`].
///
/// # Errors
/// [`NoBalance`] where losses exceed cooling up to the hottest temperature, or are no number.
pub fn settled(
    surroundings: &Surroundings,
    losses: impl Fn(ThermodynamicTemperature) -> Power,
) -> Result<ThermodynamicTemperature, NoBalance> {
    let ka = surroundings.conductance.base();
    let ambient = surroundings.ambient.base();
    let hottest = surroundings.hottest.base();
    let loss = |t: f64| losses(ThermodynamicTemperature::from_base(t)).base();
    if hottest <= ambient {
        return Err(NoBalance::Surroundings {
            ambient: to_celsius(surroundings.ambient),
            hottest: to_celsius(surroundings.hottest),
        });
    }
    for t in [ambient, hottest] {
        if !(loss(t).is_finite() && loss(t) >= 0.0) {
            return Err(NoBalance::Losses {
                at: to_celsius(ThermodynamicTemperature::from_base(t)),
                losses: loss(t),
            });
        }
    }
    let root = bracketed(ambient, hottest, |t| loss(t) - ka * (t - ambient));
    let found = root.map_err(|_| NoBalance::TooHot {
        hottest: to_celsius(surroundings.hottest),
        losses: loss(hottest),
        removed: ka * (hottest - ambient),
    })?;
    Ok(ThermodynamicTemperature::from_base(found.at))
}

/// Cooling of [`CALIBRATION`]: with it, [`settled`] gives the reading back.
///
/// # Errors
/// A reading not above the surroundings, or losses not above zero.
pub fn calibrated(
    ambient: ThermodynamicTemperature,
    reading: ThermodynamicTemperature,
    losses: Power,
) -> Result<ThermalConductance, NoBalance> {
    let ka = losses.base() / (reading.base() - ambient.base());
    if ka.is_finite() && ka > 0.0 && losses.base() > 0.0 {
        Ok(ThermalConductance::from_base(ka))
    } else {
        Err(NoBalance::Reading {
            reading: to_celsius(reading),
            ambient: to_celsius(ambient),
            losses: losses.base(),
        })
    }
}

/// Heat transfer of [`AIR`] at an air speed in its range; `None` below 1.2 m/s.
pub fn moving_air(speed: crate::quantity::Velocity) -> Option<HeatTransfer> {
    let v = speed.base();
    (v > 1.2).then(|| HeatTransfer::from_base(7.0 + 12.0 * v.sqrt()))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::numeric::math::exp;
    use crate::quantity::convert::celsius;

    /// Churning that halves every 20 K and a part that does not change.
    fn losses(t: ThermodynamicTemperature) -> Power {
        Power::from_base(400.0 + 900.0 * exp(-(to_celsius(t) - 40.0) / 28.85))
    }

    #[test]
    fn the_reading_is_reproduced_and_a_thicker_oil_runs_hotter() {
        let (ambient, reading) = (celsius(25.0), celsius(71.3));
        let conductance = calibrated(ambient, reading, losses(reading)).unwrap();
        let surroundings = Surroundings {
            ambient,
            conductance,
            hottest: celsius(200.0),
        };
        let again = settled(&surroundings, losses).unwrap();
        assert!((again.base() - reading.base()).abs() < 1e-9);
        let thicker = settled(&surroundings, |t| {
            Power::from_base(losses(t).base() * 1.3 - 120.0)
        });
        let hotter = thicker.unwrap();
        assert!(hotter.base() > reading.base() && hotter.base() < celsius(85.0).base());
    }

    #[test]
    fn says_what_is_wrong() {
        let surroundings = Surroundings {
            ambient: celsius(25.0),
            conductance: ThermalConductance::from_base(1.0),
            hottest: celsius(200.0),
        };
        let refused = settled(&surroundings, |_| Power::from_base(1000.0)).unwrap_err();
        assert_eq!(refused.name(), "heat-not-removed");
        assert_eq!(
            refused.to_string(),
            "at 200 degC the losses of 1000 W still exceed the 175 W that cooling removes"
        );
        let refused = settled(&surroundings, |_| Power::from_base(f64::NAN)).unwrap_err();
        assert_eq!(refused.name(), "losses-not-positive");
        let cold = calibrated(celsius(40.0), celsius(40.0), Power::from_base(10.0));
        assert_eq!(cold.unwrap_err().name(), "reading-not-usable");
    }
}
