//! How hot a journal bearing may run.

use crate::quantity::ThermodynamicTemperature;
use crate::quantity::convert::celsius;
use crate::relation::Law;

/// Largest bearing temperature.
pub static LAW: Law = Law {
    name: "journal-temperature-limit",
    title: "largest temperature of a journal bearing",
    formula: "T_lim by the oil in the system over its flow in a minute",
    range: "mineral oils; the larger value in special cases",
    source: "after ISO 7902-3 (from memory, unsure; the lower of the recalled values is taken)",
};

/// Trumpler's largest film temperature, 250 degF (from memory).
pub const TRUMPLER_CELSIUS: f64 = 121.0;

/// How much rest the oil gets between passes.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Supply {
    /// Ring, bath, or a system that turns its volume over in less than five minutes.
    Short,
    /// A system of more than five minutes' flow.
    Ample,
}

/// Largest temperature in general use, and in special cases, [`LAW`].
pub fn permissible(supply: Supply) -> (ThermodynamicTemperature, ThermodynamicTemperature) {
    match supply {
        Supply::Short => (celsius(90.0), celsius(110.0)),
        Supply::Ample => (celsius(100.0), celsius(125.0)),
    }
}

/// Trumpler's largest temperature.
pub fn trumpler() -> ThermodynamicTemperature {
    celsius(TRUMPLER_CELSIUS)
}
