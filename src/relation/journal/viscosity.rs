//! The viscosity a journal bearing needs for a least film.

use super::film::Bearing;
use super::{Duty, Geometry, NoFilm, Route};
use crate::quantity::convert::number;
use crate::quantity::{DynamicViscosity, Length, Measure, Ratio};
use crate::relation::Law;
use std::f64::consts::PI;

/// Viscosity for a film.
pub static LAW: Law = Law {
    name: "journal-viscosity",
    title: "viscosity a journal bearing needs for a least film",
    formula: "e = 1 - h_min/c; eta = P psi^2/(So(e, B/D) omega)",
    range: "full bearing with a steady load, laminar, aligned; B/D to 2 (short-bearing form \
            below 0.25), film 3 to 100 % of the radial clearance",
    source: "Reynolds equation with the Reynolds cavitation condition, solved and tabulated by \
             the program; closed forms of ISO 7902-2 beside it (from memory)",
};

/// Viscosity from a Sommerfeld number read off a chart.
pub static FROM_SOMMERFELD: Law = Law {
    name: "journal-viscosity-from-sommerfeld",
    title: "viscosity of a journal bearing from its Sommerfeld number",
    formula: "eta = S P (c/r)^2/N, N in rev/s",
    range: "any journal bearing",
    source: "definition of the Sommerfeld number, Raimondi and Boyd 1958",
};

/// Eccentricity that leaves a least film, `e = 1 - h_min/c`.
pub fn eccentricity_for(geometry: &Geometry, h_min: Length) -> Ratio {
    number(1.0 - h_min.base() / geometry.clearance().base())
}

/// The viscosity at which the least film is `h_min`, directly.
///
/// # Errors
/// A film outside 3 to 100 % of the radial clearance; a width ratio outside the route.
pub fn needed(
    geometry: Geometry,
    duty: Duty,
    h_min: Length,
    route: Route,
) -> Result<DynamicViscosity, NoFilm> {
    let bearing = Bearing::new(geometry, duty, route)?;
    let so = bearing.carried_at(eccentricity_for(&geometry, h_min))?;
    if so.base() <= 0.0 {
        // only a shaft without load runs in the middle
        let clearance_um = geometry.clearance().base() * 1e6;
        return Err(NoFilm::Target {
            film_um: h_min.base() * 1e6,
            which: "100 %",
            clearance_um,
        });
    }
    let psi = geometry.relative_clearance().base();
    let pressure = duty.specific_load(&geometry).base();
    let eta = pressure * psi * psi / (so.base() * duty.speed().base());
    Ok(DynamicViscosity::from_base(eta))
}

/// Viscosity of [`FROM_SOMMERFELD`].
pub fn from_sommerfeld(geometry: &Geometry, duty: &Duty, sommerfeld: Ratio) -> DynamicViscosity {
    let psi = geometry.relative_clearance().base();
    let turns = duty.speed().base() / (2.0 * PI);
    let pressure = duty.specific_load(geometry).base();
    DynamicViscosity::from_base(sommerfeld.base() * pressure * psi * psi / turns)
}
