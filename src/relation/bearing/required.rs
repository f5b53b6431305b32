//! The viscosity that a viscosity ratio asks for.

use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::Law;

/// Viscosity for a ratio.
pub static REQUIRED: Law = Law {
    name: "bearing-required",
    title: "Viscosity that a viscosity ratio asks for",
    formula: "nu_min = kappa_min nu1",
    range: "0.1 to 4 for the ratio",
    source: "ISO 281, definition of the viscosity ratio",
};

/// `kappa nu1`.
pub fn required_viscosity(kappa: Ratio, reference: KinematicViscosity) -> KinematicViscosity {
    KinematicViscosity::from_base(kappa.base() * reference.base())
}
