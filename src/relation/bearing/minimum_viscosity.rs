//! Least viscosity by kind of bearing, where size or speed are not known.
//!
//! Source: Neale (ed.), *The Tribology Handbook*, 2nd edition, section C8; other handbooks print
//! 13, 20 (21) and 30 (32). Counting tapered rollers with the spherical ones is common practice.

use super::class::BearingKind;
use crate::quantity::KinematicViscosity;
use crate::quantity::convert::mm2_s;
use crate::relation::Law;

/// The least viscosity.
pub static MINIMUM_VISCOSITY: Law = Law {
    name: "bearing-minimum-viscosity",
    title: "Least viscosity by kind of rolling bearing",
    formula: "nu_min = 12, 20 or 32 by kind",
    range: "12 ball and cylindrical roller, 20 spherical and tapered roller, 32 spherical roller thrust; mm2/s at running temperature, moderate speeds; the reference viscosity overrides it for slow bearings",
    source: "Neale (ed.), The Tribology Handbook, 2nd edition, section C8",
};

/// Least viscosity at running temperature.
pub fn minimum_viscosity(kind: BearingKind) -> KinematicViscosity {
    mm2_s(match kind {
        BearingKind::SphericalRoller | BearingKind::TaperedRoller => 20.0,
        BearingKind::SphericalRollerThrust => 32.0,
        BearingKind::DeepGrooveBall
        | BearingKind::AngularContactBall
        | BearingKind::DoubleRowAngularContactBall
        | BearingKind::SelfAligningBall
        | BearingKind::CylindricalRoller
        | BearingKind::NeedleRoller
        | BearingKind::ThrustBall
        | BearingKind::CylindricalRollerThrust => 12.0,
    })
}
