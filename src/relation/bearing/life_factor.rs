//! How film, cleanliness and load together change the life of a rolling bearing.
//!
//! Source: ISO 281:2007, equations for the life modification factor (coefficients from memory,
//! continuity of the branches checked).

use super::class::RatingClass;
use super::reference_viscosity::{LARGEST_KAPPA, SMALLEST_KAPPA};
use crate::numeric::math::{cbrt, pow};
use crate::quantity::{Force, Measure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The combined load and cleanliness number.
pub static FATIGUE_STRESS: Law = Law {
    name: "bearing-fatigue-ratio",
    title: "Contamination factor times fatigue load limit over equivalent load",
    formula: "x = e_C C_u / P",
    range: "equivalent load above zero",
    source: "ISO 281:2007",
};

/// The life modification factor.
pub static LIFE_FACTOR: Law = Law {
    name: "bearing-life-factor",
    title: "Life modification factor of a rolling bearing",
    formula: "a_iso = 0.1 (1 - (A - c / kappa^e)^s y^t)^-r",
    range: "kappa 0.1 to 4 (4 above); result up to 50; balls A 2.5671, s 0.83, t 1/3, r 9.3; rollers A 1.5859, s 1, t 0.4, r 9.185; c and e by kappa; y = x, in thrust bearings x / 3 (ball) or x / 2.5 (roller)",
    source: "ISO 281:2007 (from memory)",
};

/// Largest life modification factor.
pub const LARGEST: f64 = 50.0;
/// Smallest contamination factor with which a proven EP additive counts.
pub const EP_CLEANLINESS: f64 = 0.2;
/// Largest factor that an EP additive may bring about.
pub const EP_LARGEST: f64 = 3.0;

/// `e_C C_u / P`.
///
/// # Errors
/// A load that is not above zero, or a negative factor or fatigue load limit.
pub fn fatigue_ratio(e_c: Ratio, c_u: Force, load: Force) -> Result<Ratio, Outside> {
    let p = positive("the equivalent load", load)?;
    let limit = positive("the fatigue load limit", c_u)?;
    let e_c = e_c.base();
    if !(0.0..=1.0).contains(&e_c) {
        return Err(Outside::Range {
            what: "the contamination factor",
            value: e_c,
            needs: "it lies between 0 and 1",
        });
    }
    Ok(Ratio::from_base(e_c * limit / p))
}

/// Life modification factor for a viscosity ratio and `x = e_C C_u / P`.
///
/// # Errors
/// A viscosity ratio below 0.1, which the standard does not cover, or a negative `x`.
pub fn life_factor(class: RatingClass, kappa: Ratio, x: Ratio) -> Result<Ratio, Outside> {
    let kappa = kappa.base();
    if kappa.is_nan() || kappa < SMALLEST_KAPPA {
        return Err(Outside::Range {
            what: "kappa",
            value: kappa,
            needs: "the standard covers 0.1 and more",
        });
    }
    let x = x.base();
    if x.is_nan() || x < 0.0 {
        return Err(Outside::Range {
            what: "x",
            value: x,
            needs: "it is not negative",
        });
    }
    let kappa = kappa.min(LARGEST_KAPPA);
    let bracket = if class.is_ball() {
        let film = 2.5671 - ball_term(kappa);
        1.0 - pow(film, 0.83) * cbrt(relieved(class, x))
    } else {
        let film = 1.5859 - roller_term(kappa);
        1.0 - film * pow(relieved(class, x), 0.4)
    };
    // A bracket of zero or less stands for an endless life, which the standard caps.
    let factor = if bracket <= 0.0 {
        LARGEST
    } else {
        let exponent = if class.is_ball() { -9.3 } else { -9.185 };
        (0.1 * pow(bracket, exponent)).min(LARGEST)
    };
    Ok(Ratio::from_base(factor))
}

/// The same with an effective EP additive in the oil: below `kappa` 1 and from a contamination
/// factor of 0.2 on, the factor of `kappa` 1 counts, up to 3; a larger one of its own stays.
///
/// # Errors
/// As [`life_factor`].
pub fn life_factor_with_ep(
    class: RatingClass,
    kappa: Ratio,
    x: Ratio,
    e_c: Ratio,
) -> Result<Ratio, Outside> {
    let plain = life_factor(class, kappa, x)?;
    if kappa.base() >= 1.0 || e_c.base() < EP_CLEANLINESS {
        return Ok(plain);
    }
    let helped = life_factor(class, Ratio::from_base(1.0), x)?;
    Ok(Ratio::from_base(
        helped.base().min(EP_LARGEST).max(plain.base()),
    ))
}

fn ball_term(kappa: f64) -> f64 {
    match kappa {
        k if k < 0.4 => 2.2649 / pow(k, 0.054_381),
        k if k < 1.0 => 1.9987 / pow(k, 0.190_87),
        k => 1.9987 / pow(k, 0.071_739),
    }
}

fn roller_term(kappa: f64) -> f64 {
    match kappa {
        k if k < 0.4 => 1.3993 / pow(k, 0.054_381),
        k if k < 1.0 => 1.2348 / pow(k, 0.190_87),
        k => 1.2348 / pow(k, 0.071_739),
    }
}

fn relieved(class: RatingClass, x: f64) -> f64 {
    match class {
        RatingClass::RadialBall | RatingClass::RadialRoller => x,
        RatingClass::ThrustBall => x / 3.0,
        RatingClass::ThrustRoller => x / 2.5,
    }
}
