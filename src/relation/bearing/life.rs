//! Rating life of a rolling bearing.
//!
//! Source: ISO 281:2007.

use super::class::RatingClass;
use crate::numeric::math::pow;
use crate::quantity::convert::{to_mm, to_rpm};
use crate::quantity::{AngularVelocity, Force, Length, Measure, Ratio, Time};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// Basic rating life.
pub static BASIC: Law = Law {
    name: "bearing-life",
    title: "Basic rating life of a rolling bearing",
    formula: "L10h = (C / P)^p 10^6 / (60 n)",
    range: "p 3 for ball, 10/3 for roller bearings; n in r/min, result in hours",
    source: "ISO 281:2007",
};

/// Modified rating life.
pub static MODIFIED: Law = Law {
    name: "bearing-life-modified",
    title: "Modified rating life of a rolling bearing",
    formula: "Lnmh = a1 a_iso L10h",
    range: "a1 by reliability, a_iso by lubrication and cleanliness",
    source: "ISO 281:2007",
};

/// Fatigue load limit.
pub static FATIGUE_LIMIT: Law = Law {
    name: "bearing-fatigue-limit",
    title: "Fatigue load limit of a rolling bearing, estimated",
    formula: "C_u = C0 / 22 (ball) or C0 / 8.2 (roller), times (100 / Dpw)^0.5 or (100 / Dpw)^0.3 above 100 mm",
    range: "where the catalogue states no limit; Dpw in mm",
    source: "ISO 281:2007, annex B (from memory)",
};

/// Reliability in per cent and life factor of the edition of 2007 (from memory; the edition of
/// 1990 had 0.62, 0.53, 0.44, 0.33, 0.21 for 95 to 99 %).
pub const RELIABILITY: &[(f64, f64)] = &[
    (90.0, 1.0),
    (95.0, 0.64),
    (96.0, 0.55),
    (97.0, 0.47),
    (98.0, 0.37),
    (99.0, 0.25),
    (99.2, 0.22),
    (99.4, 0.19),
    (99.6, 0.16),
    (99.8, 0.12),
    (99.9, 0.093),
    (99.95, 0.077),
];

/// Basic rating life in hours of running.
///
/// # Errors
/// A load rating, load or speed that is not above zero.
pub fn basic(
    class: RatingClass,
    rating: Force,
    load: Force,
    speed: AngularVelocity,
) -> Result<Time, Outside> {
    let c = positive("the load rating", rating)?;
    let p = positive("the equivalent load", load)?;
    positive("the speed", speed)?;
    let exponent = if class.is_ball() { 3.0 } else { 10.0 / 3.0 };
    let minutes = pow(c / p, exponent) * 1e6 / to_rpm(speed);
    Ok(Time::from_base(minutes * 60.0))
}

/// Modified rating life.
///
/// # Errors
/// A factor that is not above zero.
pub fn modified(basic: Time, a1: Ratio, a_iso: Ratio) -> Result<Time, Outside> {
    let a1 = positive("a1", a1)?;
    let a_iso = positive("a_iso", a_iso)?;
    Ok(Time::from_base(a1 * a_iso * basic.base()))
}

/// Life factor for a reliability of the table, 90 % to 99.95 %.
pub fn reliability_factor(reliability: Ratio) -> Option<Ratio> {
    let percent = reliability.base() * 100.0;
    RELIABILITY
        .iter()
        .find(|(p, _)| (p - percent).abs() < 1e-6)
        .map(|(_, a1)| Ratio::from_base(*a1))
}

/// Estimated fatigue load limit from the static load rating.
///
/// # Errors
/// A rating or a diameter that is not above zero.
pub fn fatigue_limit(
    class: RatingClass,
    static_rating: Force,
    pitch_diameter: Length,
) -> Result<Force, Outside> {
    let c0 = positive("the static load rating", static_rating)?;
    positive("the pitch diameter", pitch_diameter)?;
    let large = (100.0 / to_mm(pitch_diameter)).min(1.0);
    Ok(Force::from_base(if class.is_ball() {
        c0 / 22.0 * pow(large, 0.5)
    } else {
        c0 / 8.2 * pow(large, 0.3)
    }))
}
