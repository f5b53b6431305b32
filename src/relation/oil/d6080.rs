//! Designation of hydraulic fluids for cold: ASTM D6080.
//!
//! The low-temperature grade goes by the temperature at which the new fluid has 750 mPa·s in the
//! Brookfield test (ASTM D2983); the other figures are those of the fluid after the sonic shear
//! test (ASTM D5621, from memory). Not for fluids that contain water.

use super::grade::IsoGrade;
use super::sae_engine::Measured;
use super::viscosity_index::whole;
use crate::numeric::math::ln;
use crate::quantity::convert::{celsius, number, to_celsius, to_mm2_s};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::Law;

/// The low-temperature grade.
pub static LOW_GRADE: Law = Law {
    name: "d6080-grade",
    title: "Low-temperature grade of a hydraulic fluid",
    formula: "the grade whose band holds the whole-degree temperature of 750 mPa.s, halves to the \
              even degree",
    range: "to 16 degC; 4 to 150 mm2/s at 40 degC",
    source: "ASTM D6080, Table 1 from memory; scope, method and rounding published",
};

/// The temperature of 750 mPa·s.
pub static T750: Law = Law {
    name: "d6080-t750",
    title: "Temperature at which a fluid has 750 mPa.s",
    formula: "straight line of ln eta over t between the two measured points on either side",
    range: "between measured points",
    source: "ASTM D6080 interpolates measured points; the logarithm is common practice",
};

/// Grade and the highest whole-degree temperature of its band, °C, coldest first.
static BANDS: [(&str, f64); 10] = [
    ("L5", -50.0),
    ("L7", -42.0),
    ("L10", -33.0),
    ("L15", -23.0),
    ("L22", -15.0),
    ("L32", -8.0),
    ("L46", -2.0),
    ("L68", 4.0),
    ("L100", 10.0),
    ("L150", 16.0),
];

/// Why there is no temperature of 750 mPa·s.
#[derive(Clone, Copy, Debug, PartialEq, Eq, thiserror::Error)]
#[error("750 mPa.s does not lie between two of the measured viscosities")]
pub struct NotBetween;

/// Why there is no designation.
#[derive(Clone, Copy, Debug, PartialEq, Eq, thiserror::Error)]
pub enum NoDesignation {
    /// Outside the scope of the practice.
    #[error("the practice covers 4 to 150 mm2/s at 40 degC")]
    Scope,
    /// Between the ISO grades.
    #[error("the new fluid lies between the ISO grades")]
    NoIsoGrade,
    /// Too thick in the cold.
    #[error("750 mPa.s above 16 degC has no low-temperature grade")]
    TooThick,
}

/// The low-temperature grade of a temperature of 750 mPa·s; `None` above 16 °C.
pub fn low_grade(t750: ThermodynamicTemperature) -> Option<&'static str> {
    let degree = whole(number(to_celsius(t750))).base();
    let band = BANDS.iter().find(|(_, highest)| degree <= highest + 0.5);
    band.map(|(name, _)| *name)
}

/// Temperature of 750 mPa·s between measured points.
///
/// # Errors
/// [`NotBetween`].
pub fn t750(measured: &[Measured]) -> Result<ThermodynamicTemperature, NotBetween> {
    let mut points = measured.to_vec();
    points.sort_by(|a, b| a.at.base().total_cmp(&b.at.base()));
    let target = ln(0.75);
    for pair in points.windows(2) {
        let (cold, hot) = (ln(pair[0].eta.base()), ln(pair[1].eta.base()));
        if cold >= target && target >= hot && cold > hot {
            let share = (cold - target) / (cold - hot);
            let (t0, t1) = (to_celsius(pair[0].at), to_celsius(pair[1].at));
            return Ok(celsius(t0 + share * (t1 - t0)));
        }
    }
    Err(NotBetween)
}

/// The whole designation, as `ISO VG 46, L32-41 (150)`: grade new, low-temperature grade,
/// viscosity at 40 °C and index after shear. The form is from memory.
///
/// # Errors
/// See [`NoDesignation`].
pub fn designation(
    nu40_new: KinematicViscosity,
    t750: ThermodynamicTemperature,
    nu40_sheared: KinematicViscosity,
    index_sheared: Ratio,
) -> Result<String, NoDesignation> {
    if !(4.0..=150.0).contains(&to_mm2_s(nu40_new)) {
        return Err(NoDesignation::Scope);
    }
    let iso = IsoGrade::of_viscosity(nu40_new).ok_or(NoDesignation::NoIsoGrade)?;
    let low = low_grade(t750).ok_or(NoDesignation::TooThick)?;
    let sheared = whole(number(to_mm2_s(nu40_sheared))).base();
    let index = whole(index_sheared).base();
    Ok(format!(
        "ISO VG {}, {low}-{sheared:.0} ({index:.0})",
        iso.number()
    ))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::DynamicViscosity;
    use crate::quantity::convert::mm2_s;

    #[test]
    fn interpolates_between_measured_points() {
        let at = |t: f64, eta: f64| Measured {
            at: celsius(t),
            eta: DynamicViscosity::from_base(eta),
        };
        let found = t750(&[at(-20.0, 2.0), at(0.0, 0.2), at(-10.0, 0.6)]);
        // ln(2 / 0.75) / ln(2 / 0.6) = 0.81466 of the way from -20 to -10
        assert!((found.map_or(f64::NAN, to_celsius) + 11.853_4).abs() < 1e-3);
        assert_eq!(t750(&[at(-10.0, 0.6), at(0.0, 0.2)]), Err(NotBetween));
    }

    #[test]
    fn writes_the_designation() {
        let text = designation(mm2_s(46.0), celsius(-13.0), mm2_s(41.2), number(149.6));
        assert_eq!(text.as_deref(), Ok("ISO VG 46, L32-41 (150)"));
        let gap = designation(mm2_s(39.0), celsius(-13.0), mm2_s(38.0), number(100.0));
        assert_eq!(gap, Err(NoDesignation::NoIsoGrade));
    }
}
