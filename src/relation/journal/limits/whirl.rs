//! Too thick an oil is also a fault: a shaft that runs near the middle may whirl.

use crate::quantity::convert::number;
use crate::quantity::{DynamicViscosity, Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::journal::{Duty, Geometry, NoFilm, Route, viscosity};

/// Eccentricity under which a light, fast shaft may whirl.
pub static LAW: Law = Law {
    name: "journal-whirl",
    title: "eccentricity under which a lightly loaded fast shaft may whirl in its oil",
    formula: "e < 0.5",
    range: "plain cylindrical bearings of light, fast rotors; a caution, not a stability analysis",
    source: "common practice",
};

/// The eccentricity of [`LAW`].
pub fn least_eccentricity() -> Ratio {
    number(0.5)
}

/// Whether the caution applies.
pub fn is_possible(eccentricity: Ratio) -> bool {
    eccentricity.base() < least_eccentricity().base()
}

/// The viscosity above which the shaft rides closer to the middle than [`least_eccentricity`].
///
/// # Errors
/// As for [`viscosity::needed`].
pub fn thickest(geometry: Geometry, duty: Duty, route: Route) -> Result<DynamicViscosity, NoFilm> {
    let film = geometry.clearance().base() * (1.0 - least_eccentricity().base());
    viscosity::needed(geometry, duty, Length::from_base(film), route)
}
