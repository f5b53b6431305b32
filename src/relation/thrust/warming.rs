//! How warm the film under a thrust pad runs over the oil around it.

use super::pad::Film;
use crate::quantity::{Measure, TemperatureInterval};
use crate::relation::Law;

/// Rise of the film over the oil around the pad.
pub static RISE: Law = Law {
    name: "thrust-film-rise",
    title: "rise of the film under a thrust pad over the oil around it",
    formula: "Delta_T = P_f/(2 rho c_p Q)",
    range: "the oil drawn in carries the heat of the pad and leaves twice as far above; oil \
            carried over hot from the pad before not counted",
    source: "heat balance as in ISO 7902-1, with its rho c_p of 1.8 MJ/(m3 K) (from memory)",
};

/// Heat a cubic metre of oil takes for a kelvin, as ISO 7902-1 has it, J/(m3 K).
const HEAT_PER_VOLUME: f64 = 1.8e6;

/// Rise of [`RISE`].
pub fn rise(film: &Film) -> TemperatureInterval {
    let carried = 2.0 * HEAT_PER_VOLUME * film.flow.base();
    TemperatureInterval::from_base(film.power.base() / carried)
}
