//! What heating in the inlet takes from a film.
//!
//! Sources: Gupta, Cheng, Zhu, Forster and Schrand 1992; Murch and Wilson 1975; Greenwood and
//! Kauzlarich 1973, all from memory. The speed in the parameter is the mean rolling speed; texts
//! with the sum of the speeds print values four times as large.

use crate::numeric::math::pow;
use crate::quantity::{
    DynamicViscosity, Length, Measure, Pressure, Ratio, TemperatureCoefficient,
    ThermalConductivity, Velocity,
};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The loading parameter.
pub static PARAMETER: Law = Law {
    name: "film-thermal-parameter",
    title: "Thermal loading parameter of the inlet",
    formula: "L = beta eta u^2 / k_f",
    range: "u the mean rolling speed; viscosity and its temperature coefficient at the inlet",
    source: "Gupta et al. 1992 (from memory)",
};

/// Gupta's factor.
pub static GUPTA: Law = Law {
    name: "film-thermal",
    title: "Film reduction by inlet heating, with sliding and pressure",
    formula: "phi = (1 - 13.2 (p_max / E') L^0.42) / (1 + 0.213 (1 + 2.23 S^0.83) L^0.64)",
    range: "L up to 25; above about 30 the film would shrink as viscosity rises",
    source: "Gupta et al. 1992 (from memory)",
};

/// Murch and Wilson's factor.
pub static MURCH_WILSON: Law = Law {
    name: "film-thermal-murch-wilson",
    title: "Film reduction by inlet heating, pure rolling",
    formula: "phi = 3.94 / (3.94 + L^0.62)",
    range: "pure rolling; the film keeps rising with viscosity at every L",
    source: "Murch and Wilson 1975 (from memory)",
};

/// Greenwood and Kauzlarich's factor.
pub static GREENWOOD_KAUZLARICH: Law = Law {
    name: "film-thermal-greenwood-kauzlarich",
    title: "Film reduction by inlet heating, with sliding",
    formula: "phi = 1 / (1 + 0.241 (1 + 14.8 S^0.83) L^0.64)",
    range: "for comparison only: the constants are quoted differently in print",
    source: "after Greenwood and Kauzlarich 1973 (from memory, not confirmed)",
};

/// Thermal conductivity of lubricating oils, where nobody measured it (common practice: 0.13 to
/// 0.15 W/(m·K) for mineral oils).
pub fn usual_conductivity() -> ThermalConductivity {
    ThermalConductivity::from_base(0.14)
}

/// Largest thermal loading parameter for which Gupta's factor is used.
pub const GUPTA_LARGEST: f64 = 25.0;

/// Thermal loading parameter.
///
/// # Errors
/// A viscosity or conductivity that is not above zero, or a viscosity that does not fall with
/// temperature.
pub fn parameter(
    beta: TemperatureCoefficient,
    eta: DynamicViscosity,
    speed: Velocity,
    conductivity: ThermalConductivity,
) -> Result<Ratio, Outside> {
    let beta = positive("the temperature coefficient of viscosity", beta)?;
    let eta = positive("the viscosity", eta)?;
    let k_f = positive("the thermal conductivity of the oil", conductivity)?;
    let u = speed.base();
    Ok(Ratio::from_base(beta * eta * u * u / k_f))
}

/// Gupta's factor; `slide_roll` is `2 |u1 - u2| / (u1 + u2)`.
///
/// # Errors
/// Pressure and heating so large that the factor is not positive.
pub fn gupta(
    parameter: Ratio,
    slide_roll: Ratio,
    p_max: Pressure,
    modulus: Pressure,
) -> Result<Ratio, Outside> {
    let l = parameter.base().max(0.0);
    let e = positive("the reduced modulus", modulus)?;
    let above = 1.0 - 13.2 * (p_max.base() / e) * pow(l, 0.42);
    if above <= 0.0 {
        return Err(Outside::Range {
            what: "the thermal loading parameter",
            value: l,
            needs: "the factor with sliding and pressure holds up to 25",
        });
    }
    let sliding = 1.0 + 2.23 * pow(slide_roll.base().abs(), 0.83);
    Ok(Ratio::from_base(
        above / (1.0 + 0.213 * sliding * pow(l, 0.64)),
    ))
}

/// Murch and Wilson's factor.
pub fn murch_wilson(parameter: Ratio) -> Ratio {
    let l = parameter.base().max(0.0);
    Ratio::from_base(3.94 / (3.94 + pow(l, 0.62)))
}

/// Greenwood and Kauzlarich's factor.
pub fn greenwood_kauzlarich(parameter: Ratio, slide_roll: Ratio) -> Ratio {
    let l = parameter.base().max(0.0);
    let sliding = 1.0 + 14.8 * pow(slide_roll.base().abs(), 0.83);
    Ratio::from_base(1.0 / (1.0 + 0.241 * sliding * pow(l, 0.64)))
}

/// A film thinned by a factor.
pub fn thinned(film: Length, factor: Ratio) -> Length {
    Length::from_base(film.base() * factor.base())
}
