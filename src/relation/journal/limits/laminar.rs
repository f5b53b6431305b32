//! Whether the film flows in layers, as every relation of these bearings assumes.

use crate::quantity::convert::number;
use crate::quantity::{AngularVelocity, DynamicViscosity, MassDensity, Measure, Ratio};
use crate::relation::Law;
use crate::relation::journal::Geometry;

/// Reynolds number of the film.
pub static REYNOLDS_NUMBER: Law = Law {
    name: "journal-reynolds-number",
    title: "Reynolds number of the film of a journal bearing",
    formula: "Re = rho omega R c/eta",
    range: "any journal bearing",
    source: "ISO 7902-1",
};

/// Where layers break up.
pub static LAW: Law = Law {
    name: "journal-laminar-limit",
    title: "Reynolds number at which vortices form in a journal bearing",
    formula: "Re = 41.3 sqrt(R/c)",
    range: "concentric cylinders; above it friction and temperature are underestimated",
    source: "Taylor 1923; ISO 7902-1 (from memory)",
};

/// Viscosity from which on the film is laminar.
pub static VISCOSITY: Law = Law {
    name: "journal-laminar-viscosity",
    title: "viscosity from which on the film of a journal bearing is laminar",
    formula: "eta = rho omega R c/(41.3 sqrt(R/c))",
    range: "as for the limit of the Reynolds number",
    source: "Taylor 1923; ISO 7902-1 (from memory)",
};

/// Viscosity of [`VISCOSITY`].
pub fn viscosity(
    geometry: &Geometry,
    speed: AngularVelocity,
    density: MassDensity,
) -> DynamicViscosity {
    let unit = reynolds_number(geometry, speed, density, DynamicViscosity::from_base(1.0));
    DynamicViscosity::from_base(unit.base() / limit(geometry).base())
}

/// Reynolds number of [`REYNOLDS_NUMBER`].
pub fn reynolds_number(
    geometry: &Geometry,
    speed: AngularVelocity,
    density: MassDensity,
    eta: DynamicViscosity,
) -> Ratio {
    let radius = geometry.diameter().base() / 2.0;
    let film = radius * geometry.clearance().base();
    number(density.base() * speed.base() * film / eta.base())
}

/// Largest Reynolds number of laminar flow, [`LAW`].
pub fn limit(geometry: &Geometry) -> Ratio {
    number(41.3 / geometry.relative_clearance().base().sqrt())
}
