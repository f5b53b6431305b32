//! Rows of rolling bearings and their grease.

mod film;
mod friction;
mod grease;
mod life;
mod size;
mod viscosity;

use super::Relation;

/// The rows, in the order they are listed.
pub(super) static ROWS: &[Relation] = &[
    viscosity::NU1,
    viscosity::KAPPA,
    viscosity::KAPPA_LAMBDA,
    viscosity::MINIMUM,
    life::CONTAMINATION,
    life::LIFE_FACTOR,
    life::LIFE,
    life::FATIGUE_LIMIT,
    film::FILM,
    friction::FRICTION,
    grease::INTERVAL,
    grease::AMOUNT,
];

/// The heading they stand under.
const GROUP: &str = "rolling bearing";
