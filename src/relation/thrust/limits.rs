//! What thrust pads are usually held to.

use crate::quantity::convert::{pascals, um};
use crate::quantity::{Length, Pressure};
use crate::relation::Law;

/// Least film.
pub static LEAST_FILM: Law = Law {
    name: "thrust-film-limit",
    title: "least film of a thrust pad",
    formula: "10 to 15 um for small pads, 25 to 40 um for large ones",
    range: "flat, aligned pads; the lower ends are taken",
    source: "common practice",
};

/// Mean pressure.
pub static MEAN_PRESSURE: Law = Law {
    name: "thrust-pressure-limit",
    title: "usual mean pressure of a thrust pad",
    formula: "1.5 to 4 MPa",
    range: "white-metal pads",
    source: "common practice",
};

/// Size of a thrust bearing.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Size {
    /// Pumps, gears, blowers.
    Small,
    /// Hydraulic turbines and the like.
    Large,
}

/// Least film of [`LEAST_FILM`].
pub fn least_film(size: Size) -> Length {
    match size {
        Size::Small => um(10.0),
        Size::Large => um(25.0),
    }
}

/// Largest usual mean pressure of [`MEAN_PRESSURE`].
pub fn mean_pressure() -> Pressure {
    pascals(4e6)
}
