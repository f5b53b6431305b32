//! The speed at which a journal bearing leaves mixed friction.

use super::NoFilm;
use crate::quantity::convert::{rpm, to_rpm};
use crate::quantity::{AngularVelocity, DynamicViscosity, Force, Length, Measure, Ratio, Volume};
use crate::relation::Law;
use std::f64::consts::PI;

/// Vogelpohl's rule.
pub static LAW: Law = Law {
    name: "journal-transition",
    title: "speed at which a journal bearing leaves mixed friction",
    formula: "n_tr = 1e-7 F/(C eta V), V = pi D^2 B/4; n in r/min, F in N, eta in Pa s, V in m3",
    range: "C about 1, up to 6 for a run-in, stiff, well aligned bearing; run at 2 to 3 times \
            n_tr or more",
    source: "Vogelpohl (from memory)",
};

/// Viscosity that keeps a bearing clear of it.
pub static VISCOSITY: Law = Law {
    name: "journal-transition-viscosity",
    title: "viscosity that keeps a journal bearing clear of mixed friction",
    formula: "eta = x 1e-7 F/(C V n), x the factor of speed over n_tr",
    range: "as for the transition speed",
    source: "Vogelpohl (from memory)",
};

/// Volume of the bearing, `pi D^2 B/4`.
pub fn volume(diameter: Length, width: Length) -> Volume {
    Volume::from_base(PI / 4.0 * diameter.base() * diameter.base() * width.base())
}

/// Transition speed of [`LAW`]; `constant` is `C`.
///
/// # Errors
/// A load, viscosity, size or constant not above zero.
pub fn speed(
    load: Force,
    eta: DynamicViscosity,
    volume: Volume,
    constant: Ratio,
) -> Result<AngularVelocity, NoFilm> {
    for (value, what) in [
        (load.base(), "the load"),
        (eta.base(), "the viscosity"),
        (volume.base(), "the bearing's volume"),
        (constant.base(), "the transition constant"),
    ] {
        if value.is_nan() || value <= 0.0 {
            return Err(NoFilm::NotPositive { what });
        }
    }
    let n_rpm = 1e-7 * load.base() / (constant.base() * eta.base() * volume.base());
    Ok(rpm(n_rpm))
}

/// Viscosity at which a speed is `factor` times the transition speed, [`VISCOSITY`].
///
/// # Errors
/// A standing shaft, or a load, size, constant or factor not above zero.
pub fn viscosity(
    load: Force,
    at: AngularVelocity,
    volume: Volume,
    constant: Ratio,
    factor: Ratio,
) -> Result<DynamicViscosity, NoFilm> {
    if at.base().is_nan() || at.base() <= 0.0 {
        return Err(NoFilm::Standstill);
    }
    // n_tr is inverse to the viscosity: what it is at 1 Pa s tells the rest
    let unit = speed(load, DynamicViscosity::from_base(1.0), volume, constant)?;
    if factor.base().is_nan() || factor.base() <= 0.0 {
        let what = "the factor of speed";
        return Err(NoFilm::NotPositive { what });
    }
    let eta = factor.base() * to_rpm(unit) / to_rpm(at);
    Ok(DynamicViscosity::from_base(eta))
}
