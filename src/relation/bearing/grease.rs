//! Grease in a rolling bearing: how much, and how long it lasts.
//!
//! Sources: interval after Neale (ed.), *The Tribology Handbook*, 2nd edition, table 20.4;
//! adjustments and amount common practice.

use super::class::BearingKind;
use crate::numeric::math::pow;
use crate::quantity::convert::{to_celsius, to_mm, to_rpm};
use crate::quantity::{
    AngularVelocity, Length, Mass, Measure, Ratio, ThermodynamicTemperature, Time,
};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The interval at 70 °C.
pub static INTERVAL: Law = Law {
    name: "grease-interval",
    title: "Relubrication interval of a grease at 70 degC",
    formula: "t = k (14 10^6 / (n sqrt(d)) - 4 d)",
    range: "hours; n in r/min, bore d in mm; k 10 ball, 5 cylindrical and needle, 1 spherical and tapered roller; where the bracket is negative, grease does not suit the speed",
    source: "Neale (ed.), The Tribology Handbook, 2nd edition, table 20.4",
};

/// The interval as it is run.
pub static ADJUSTED: Law = Law {
    name: "grease-interval-adjusted",
    title: "Relubrication interval under running conditions",
    formula: "t = t70 2^((70 - T) / 15) f, the temperature's part at most 2",
    range: "T bearing temperature in degC up to the limit of the grease; f the product of position, dirt, moisture and vibration factors",
    source: "common practice",
};

/// The interval with every factor of a table.
pub static BY_FACTORS: Law = Law {
    name: "grease-interval-by-factors",
    title: "Relubrication interval with a factor for every influence",
    formula: "t = K (14 10^6 / (n sqrt(d)) - 4 d) k_T k_d k_m k_v k_p",
    range: "factors of temperature, dirt, moisture, vibration and position from the rules",
    source: "common practice (from memory)",
};

/// A grease point against what is done today.
pub static SHARE: Law = Law {
    name: "grease-share",
    title: "What is put in today over what is needed",
    formula: "s = G_now / G",
    range: "amounts, or intervals",
    source: "definition",
};

/// The product n dm.
pub static N_DM: Law = Law {
    name: "grease-n-dm",
    title: "Speed factor of a greased bearing",
    formula: "n dm",
    range: "mm r/min, dm the mean of bore and outside diameter",
    source: "common practice",
};

/// The amount.
pub static AMOUNT: Law = Law {
    name: "grease-amount",
    title: "Grease for one relubrication",
    formula: "G = 0.005 D B",
    range: "grams; outside diameter D and width B in mm, total height for thrust bearings; lubricated from the side",
    source: "Neale (ed.), The Tribology Handbook, 2nd edition, section A20; common practice",
};

/// Factors together.
pub static FACTORS: Law = Law {
    name: "grease-interval-factors",
    title: "Factors on the relubrication interval together",
    formula: "f = f1 f2",
    range: "factors that act independently",
    source: "common practice",
};

/// Two factors together.
pub fn together(one: Ratio, other: Ratio) -> Ratio {
    Ratio::from_base(one.base() * other.base())
}

/// Factor of the kind of bearing in the interval; `None` for thrust bearings, which the table
/// does not hold.
pub fn kind_factor(kind: BearingKind) -> Option<Ratio> {
    let k = match kind {
        BearingKind::DeepGrooveBall
        | BearingKind::AngularContactBall
        | BearingKind::DoubleRowAngularContactBall
        | BearingKind::SelfAligningBall => 10.0,
        BearingKind::CylindricalRoller | BearingKind::NeedleRoller => 5.0,
        BearingKind::SphericalRoller | BearingKind::TaperedRoller => 1.0,
        BearingKind::ThrustBall
        | BearingKind::CylindricalRollerThrust
        | BearingKind::SphericalRollerThrust => return None,
    };
    Some(Ratio::from_base(k))
}

/// Interval at 70 °C bearing temperature.
///
/// # Errors
/// A factor, speed or bore that is not above zero, or a speed too high for grease.
pub fn interval(k: Ratio, speed: AngularVelocity, bore: Length) -> Result<Time, Outside> {
    let k = positive("the factor of the kind", k)?;
    positive("the speed", speed)?;
    positive("the bore", bore)?;
    let (n_rpm, d_mm) = (to_rpm(speed), to_mm(bore));
    let hours = k * (14e6 / (n_rpm * d_mm.sqrt()) - 4.0 * d_mm);
    if hours <= 0.0 {
        return Err(Outside::NoAnswer {
            what: "the relubrication interval",
            why: "grease is not suitable at this size and speed",
        });
    }
    Ok(Time::from_base(hours * 3600.0))
}

/// What the bearing temperature does to the interval: half for every 15 K above 70 °C, at most
/// double below.
pub fn temperature_factor(bearing: ThermodynamicTemperature) -> Ratio {
    let steps = (70.0 - to_celsius(bearing)) / 15.0;
    Ratio::from_base(pow(2.0, steps.min(1.0)))
}

/// The interval under running conditions; `others` is the product of the other factors.
///
/// # Errors
/// A factor that is not above zero.
pub fn adjusted(
    at_70: Time,
    bearing: ThermodynamicTemperature,
    others: Ratio,
) -> Result<Time, Outside> {
    let others = positive("the product of the factors", others)?;
    let temperature = temperature_factor(bearing).base();
    Ok(Time::from_base(at_70.base() * temperature * others))
}

/// The interval shortened by five factors.
pub fn by_factors(at_rest: Time, factors: [Ratio; 5]) -> Time {
    let product: f64 = factors.iter().map(|f| f.base()).product();
    Time::from_base(at_rest.base() * product)
}

/// Speed factor, mm r/min.
pub fn n_dm(speed: AngularVelocity, pitch_diameter: Length) -> Ratio {
    Ratio::from_base(to_rpm(speed) * to_mm(pitch_diameter))
}

/// Grease for one relubrication.
///
/// # Errors
/// A length that is not above zero.
pub fn amount(outside: Length, width: Length) -> Result<Mass, Outside> {
    positive("the outside diameter", outside)?;
    positive("the width", width)?;
    let grams = 0.005 * to_mm(outside) * to_mm(width);
    Ok(Mass::from_base(grams * 1e-3))
}

/// Factors of the surroundings on the interval, in words (common practice).
pub mod surroundings {
    /// How the shaft lies; halved for a vertical shaft.
    pub const POSITION: &[(&str, f64)] = &[("horizontal", 1.0), ("vertical", 0.5)];
    /// Dirt.
    pub const DIRT: &[(&str, f64)] = &[("light", 1.0), ("severe", 0.7), ("extreme", 0.4)];
    /// Moisture.
    pub const MOISTURE: &[(&str, f64)] = &[
        ("dry", 1.0),
        ("humid", 0.7),
        ("condensation", 0.4),
        ("water", 0.1),
    ];
    /// Vibration: below 5 mm/s, 5 to 10 mm/s, above.
    pub const VIBRATION: &[(&str, f64)] = &[("low", 1.0), ("medium", 0.6), ("high", 0.3)];
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{mm, number, rpm};

    /// 95 mm bore at 1487 r/min: 14e6 / (1487 x 9.7468) - 380 = 585.9 h, times 10 for a ball
    /// bearing and 0.5 for 72 degC: 2930 h. By hand, with the factors of practice.
    #[test]
    fn a_motor_of_250_kw() {
        let base = interval(number(10.0), rpm(1487.0), mm(95.0)).expect("grease serves");
        let one = number(1.0);
        let hours = by_factors(base, [number(0.5), one, one, one, one]).base() / 3600.0;
        assert!((hours - 2930.0).abs() < 5.0, "{hours}");
    }
}
