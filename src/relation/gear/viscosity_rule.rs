//! The viscosity a gear pair needs, by pitch-line speed alone.
//!
//! Source: Errichello, *ASM Handbook* volume 18 (from memory) for the viscosity at 40 °C; the same
//! rule at running temperature, and the share of it that is asked for, are house values.

use crate::quantity::convert::{mm2_s, to_mm2_s};
use crate::quantity::{KinematicViscosity, Measure, Velocity};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// At 40 °C.
pub static AT_40: Law = Law {
    name: "gear-grade-rule",
    title: "Viscosity at 40 degC of a gear oil, by pitch-line speed",
    formula: "nu40 = 7000 / sqrt(V), V in ft/min; close to 500 / sqrt(v), v in m/s",
    range: "slowest mesh, 0.5 to 50 m/s, sump near 55 to 60 degC, viscosity index about 95",
    source: "Errichello, ASM Handbook volume 18 (from memory)",
};

/// At running temperature.
pub static RUNNING: Law = Law {
    name: "gear-running-rule",
    title: "Viscosity of a gear oil at running temperature, by pitch-line speed",
    formula: "nu = 180 / sqrt(v)",
    range: "slowest mesh, v in m/s, mm2/s at the temperature of the oil; 0.5 to 50 m/s",
    source: "house value: the rule for 40 degC restated at the sump temperature it assumes",
};

/// The least that is asked for.
pub static FLOOR: Law = Law {
    name: "gear-running-floor",
    title: "Least viscosity of a gear oil at running temperature",
    formula: "nu_min = 0.7 nu",
    range: "share of the rule for running temperature",
    source: "house value",
};

/// Pitch-line speeds the rule is used for, m/s.
pub const SPEEDS: (f64, f64) = (0.5, 50.0);

/// One foot a minute in m/s, as the rule's conversion has it.
const FT_MIN: f64 = 0.005_08;

/// Viscosity at 40 °C.
///
/// # Errors
/// A speed that is not above zero.
pub fn at_40(pitch_speed: Velocity) -> Result<KinematicViscosity, Outside> {
    let v = positive("the pitch-line speed", pitch_speed)?;
    Ok(mm2_s(7000.0 / (v / FT_MIN).sqrt()))
}

/// Viscosity at running temperature.
///
/// # Errors
/// A speed that is not above zero.
pub fn running(pitch_speed: Velocity) -> Result<KinematicViscosity, Outside> {
    let v = positive("the pitch-line speed", pitch_speed)?;
    Ok(mm2_s(180.0 / v.sqrt()))
}

/// Share of the running rule that is asked for.
pub fn floor(running: KinematicViscosity) -> KinematicViscosity {
    mm2_s(0.7 * to_mm2_s(running))
}

/// Whether a speed lies outside the range of the rule.
pub fn beyond_range(pitch_speed: Velocity) -> bool {
    !(SPEEDS.0..=SPEEDS.1).contains(&pitch_speed.base())
}
