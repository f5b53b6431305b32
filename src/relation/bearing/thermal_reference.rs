//! The conditions for which thermal speed ratings are stated.
//!
//! Source: ISO 15312, as quoted in bearing catalogues (common practice).

use super::class::RatingClass;
use crate::quantity::convert::{celsius, mm2_s};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};

/// The reference conditions of a class.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reference {
    /// Temperature of the outer ring.
    pub bearing: ThermodynamicTemperature,
    /// Temperature around it.
    pub ambient: ThermodynamicTemperature,
    /// Load, as a share of the static rating.
    pub load_share: Ratio,
    /// Viscosity at 70 °C; the standard's two values are for radial and thrust roller bearings,
    /// and thrust ball bearings run with the former.
    pub nu70: KinematicViscosity,
}

/// Reference conditions of a class; the oil bath reaches the centre of the lowest element.
pub fn reference(class: RatingClass) -> Reference {
    let thrust = matches!(class, RatingClass::ThrustBall | RatingClass::ThrustRoller);
    let thick = class == RatingClass::ThrustRoller;
    Reference {
        bearing: celsius(70.0),
        ambient: celsius(20.0),
        load_share: Ratio::from_base(if thrust { 0.02 } else { 0.05 }),
        nu70: mm2_s(if thick { 24.0 } else { 12.0 }),
    }
}
