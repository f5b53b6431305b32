//! How fast grease and oil may run a rolling bearing.
//!
//! Source: Neale (ed.), *The Tribology Handbook*, 2nd edition, table 8.1. The number is bore times
//! speed, with the pitch diameter in place of the bore above 65 mm.

use crate::quantity::convert::{celsius, to_mm, to_rpm};
use crate::quantity::{AngularVelocity, Length, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::Law;

/// The speed number.
pub static SPEED_NUMBER: Law = Law {
    name: "bearing-speed-number",
    title: "Speed number of a rolling bearing",
    formula: "d n, with dm in place of d above 65 mm bore",
    range: "grease to 300 000 to 350 000 mm/min, oil to 450 000 to 500 000 mm/min",
    source: "Neale (ed.), The Tribology Handbook, 2nd edition, table 8.1",
};

/// Usual and largest speed number with grease, mm r/min.
pub const GREASE: (f64, f64) = (300_000.0, 350_000.0);
/// Usual and largest speed number with oil, mm r/min.
pub const OIL: (f64, f64) = (450_000.0, 500_000.0);

/// Hottest bearing that grease serves.
pub fn grease_hottest() -> ThermodynamicTemperature {
    celsius(120.0)
}

/// Hottest bulk oil.
pub fn oil_hottest() -> ThermodynamicTemperature {
    celsius(90.0)
}

/// Speed number, mm r/min.
pub fn speed_number(bore: Length, pitch_diameter: Length, speed: AngularVelocity) -> Ratio {
    let d_mm = if to_mm(bore) > 65.0 {
        to_mm(pitch_diameter)
    } else {
        to_mm(bore)
    };
    Ratio::from_base(d_mm * to_rpm(speed))
}
