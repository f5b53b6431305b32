//! How far off stated inputs usually are, where nobody says. Used only to say how sure a verdict
//! is; it judges nothing.

use crate::quantity::{Amount, Kind};

/// The usual tolerance of a stated input, to both sides, base units; `None` where figures of that
/// kind are taken as they are (dimensions of drawings, ratios, moduli).
///
/// Common practice: a thermometer in a sump or a weather record within 2 K, a rise worked out from
/// two readings within 3 K, speeds within 2 %, forces within 15 %, power and torque within 10 %,
/// roughness within 25 %.
pub fn tolerance(key: &str, taken: Amount) -> Option<f64> {
    let share = match taken.kind {
        Kind::Temperature => return Some(2.0),
        Kind::Rise => return Some(3.0),
        Kind::RotationalSpeed | Kind::Velocity => 0.02,
        Kind::Force | Kind::LoadPerLength => 0.15,
        Kind::Power | Kind::Torque => 0.10,
        Kind::Length if key.contains("roughness") => 0.25,
        _ => return None,
    };
    let by = share * taken.base.abs();
    (by > 0.0).then_some(by)
}
