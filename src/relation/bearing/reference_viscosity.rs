//! The viscosity a rolling bearing needs at its running temperature.
//!
//! Source: ISO 281:2007. The two branches are used as printed; they do not meet at 1000 r/min
//! (2.3 % apart).

use crate::numeric::math::pow;
use crate::quantity::convert::{mm2_s, to_mm, to_mm2_s, to_rpm};
use crate::quantity::{AngularVelocity, KinematicViscosity, Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The pitch diameter from the boundary dimensions.
pub static PITCH_DIAMETER: Law = Law {
    name: "bearing-pitch-diameter",
    title: "Pitch diameter of a rolling bearing from its bore and outside diameter",
    formula: "Dpw = (d + D) / 2",
    range: "an estimate where the pitch diameter itself is not stated",
    source: "common practice",
};

/// The reference viscosity.
pub static REFERENCE_VISCOSITY: Law = Law {
    name: "bearing-nu1",
    title: "Reference viscosity of a rolling bearing",
    formula: "nu1 = 45000 n^-0.83 Dpw^-0.5 below 1000 r/min; nu1 = 4500 n^-0.5 Dpw^-0.5 from there",
    range: "n in r/min, Dpw in mm, nu1 in mm2/s at running temperature; oils with the pressure-viscosity behaviour of mineral oil",
    source: "ISO 281:2007",
};

/// The viscosity ratio.
pub static VISCOSITY_RATIO: Law = Law {
    name: "bearing-kappa",
    title: "Viscosity ratio of a rolling bearing",
    formula: "kappa = nu / nu1",
    range: "0.1 to 4; above 4 counts as 4 in the life calculation, below 0.1 it is not covered",
    source: "ISO 281:2007",
};

/// The film ratio that a viscosity ratio stands for.
pub static FILM_RATIO: Law = Law {
    name: "kappa-lambda",
    title: "Film ratio and viscosity ratio of a rolling bearing",
    formula: "kappa = Lambda^1.3",
    range: "about 0.1 to 4 in kappa; the way to judge oils that do not behave as mineral oil",
    source: "ISO/TR 1281-2 (from memory)",
};

/// Smallest viscosity ratio the standard covers.
pub const SMALLEST_KAPPA: f64 = 0.1;
/// Viscosity ratio above which nothing more is gained.
pub const LARGEST_KAPPA: f64 = 4.0;

/// Pitch diameter as the mean of bore and outside diameter.
///
/// # Errors
/// A diameter that is not above zero, or an outside diameter not above the bore.
pub fn pitch_diameter(bore: Length, outside: Length) -> Result<Length, Outside> {
    let d = positive("the bore", bore)?;
    let outer = positive("the outside diameter", outside)?;
    if outer <= d {
        return Err(Outside::NoAnswer {
            what: "the pitch diameter",
            why: "the outside diameter is not above the bore",
        });
    }
    Ok(Length::from_base(f64::midpoint(d, outer)))
}

/// Reference viscosity `nu1`, at running temperature.
///
/// # Errors
/// A speed or a diameter that is not above zero.
pub fn reference_viscosity(
    speed: AngularVelocity,
    pitch_diameter: Length,
) -> Result<KinematicViscosity, Outside> {
    positive("the speed", speed)?;
    positive("the pitch diameter", pitch_diameter)?;
    let n_rpm = to_rpm(speed);
    // 1000 r/min comes back from rad/s a rounding error away and belongs to the upper branch.
    let upper = n_rpm >= 1000.0 * (1.0 - 1e-12);
    let size = pow(to_mm(pitch_diameter), -0.5);
    Ok(mm2_s(if upper {
        4_500.0 * pow(n_rpm, -0.5) * size
    } else {
        45_000.0 * pow(n_rpm, -0.83) * size
    }))
}

/// Viscosity ratio `kappa`, as it comes: neither capped at 4 nor refused below 0.1.
///
/// # Errors
/// A reference viscosity that is not above zero.
pub fn viscosity_ratio(
    nu: KinematicViscosity,
    reference: KinematicViscosity,
) -> Result<Ratio, Outside> {
    positive("the reference viscosity", reference)?;
    Ok(Ratio::from_base(to_mm2_s(nu) / to_mm2_s(reference)))
}

/// Film ratio that a viscosity ratio stands for.
///
/// # Errors
/// A ratio that is not above zero.
pub fn film_ratio(kappa: Ratio) -> Result<Ratio, Outside> {
    let kappa = positive("kappa", kappa)?;
    Ok(Ratio::from_base(pow(kappa, 1.0 / 1.3)))
}

/// Viscosity ratio that a film ratio stands for.
///
/// # Errors
/// A ratio that is not above zero.
pub fn from_film_ratio(lambda: Ratio) -> Result<Ratio, Outside> {
    let lambda = positive("the film ratio", lambda)?;
    Ok(Ratio::from_base(pow(lambda, 1.3)))
}
