//! The oil film between gear teeth.
//!
//! Sources: ISO/TS 6336-22 (ISO/TR 15144-1) for the minimum film over the mean Ra; AGMA 925 for
//! the central film over the composite Rq. The two ratios cannot be compared with each other, and
//! no limit holds for every oil and gear: the former's comes from a micropitting test.

use crate::numeric::math::pow;
use crate::quantity::convert::to_celsius;
use crate::quantity::{
    DynamicViscosity, Length, MassDensity, Measure, Pressure, PressureViscosity, Ratio,
    ThermodynamicTemperature, Velocity,
};
use crate::relation::Law;
use crate::relation::film::groups::Groups;
use crate::relation::outside::{Outside, positive};
use std::f64::consts::PI;

/// Minimum film, ISO/TS 6336-22.
pub static MINIMUM: Law = Law {
    name: "gear-film",
    title: "Minimum film between gear teeth, ISO form",
    formula: "h = 1600 rho_n G^0.6 U^0.7 W^-0.13 S^0.22",
    range: "h in um, rho_n in mm; G = alpha E', U = eta v_sum / (2 E' rho_n), W = 2 pi p^2 / E'^2 at the bulk temperature; S for the flash, 1 at the pitch point",
    source: "ISO/TS 6336-22, ISO/TR 15144-1 (from memory)",
};

/// Film over roughness, ISO/TS 6336-22.
pub static MINIMUM_RATIO: Law = Law {
    name: "gear-film-ratio",
    title: "Minimum film over mean Ra",
    formula: "lambda = 2 h / (Ra1 + Ra2)",
    range: "to be compared with the value of a micropitting test of the same oil; no universal limit",
    source: "ISO/TS 6336-22 (from memory)",
};

/// Central film, AGMA 925.
pub static CENTRAL: Law = Law {
    name: "gear-film-central",
    title: "Central film between gear teeth, AGMA form",
    formula: "h_c = rho_n 3.06 G^0.56 U^0.69 W^-0.10",
    range: "U with the mean of the surface speeds, alpha from the viscosity at tooth temperature; W = 2 pi p^2 / E'^2",
    source: "AGMA 925 after Dowson and Toyoda 1979 (from memory)",
};

/// Density in the gear film method.
pub static DENSITY: Law = Law {
    name: "gear-film-density",
    title: "Density of a gear oil at temperature, in the gear film method",
    formula: "rho = rho15 - 0.7 (t + 273 - 289)",
    range: "kg/m3, t in degC; within 0.5 % of the tables of ASTM D1250 for mineral oil",
    source: "ISO/TR 15144-1 (from memory)",
};

/// Density of a gear oil as the method has it.
///
/// # Errors
/// A temperature so high that no density is left.
pub fn density(rho15: MassDensity, at: ThermodynamicTemperature) -> Result<MassDensity, Outside> {
    let rho = rho15.base() - 0.7 * (to_celsius(at) + 273.0 - 289.0);
    let left = MassDensity::from_base(rho);
    positive("the density at temperature", left)?;
    Ok(left)
}

/// Groups of a tooth contact.
pub static GROUPS: Law = Law {
    name: "gear-film-groups",
    title: "Speed, material and load parameter of a tooth contact",
    formula: "U = eta v_sum / (2 E' rho_n); G = alpha E'; W = 2 pi p^2 / E'^2",
    range: "viscosity and alpha at the bulk temperature of the teeth",
    source: "ISO/TS 6336-22, ISO/TR 15144-1",
};

/// The contact at one point of the path.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ToothContact {
    /// Sum of the surface speeds.
    pub sum_speed: Velocity,
    /// Reduced radius normal to the contact line.
    pub rho_n: Length,
    /// Pressure there.
    pub pressure: Pressure,
    /// Reduced modulus.
    pub modulus: Pressure,
}

/// Dimensionless groups of a tooth contact; the oil at the bulk temperature of the teeth.
///
/// # Errors
/// An input that is not above zero.
pub fn groups(
    eta: DynamicViscosity,
    alpha: PressureViscosity,
    contact: ToothContact,
) -> Result<Groups, Outside> {
    let eta = positive("the viscosity", eta)?;
    let alpha = positive("the pressure-viscosity coefficient", alpha)?;
    let v = positive("the sum of the surface speeds", contact.sum_speed)?;
    let rho = positive("the reduced radius", contact.rho_n)?;
    let p = positive("the pressure", contact.pressure)?;
    let e = positive("the reduced modulus", contact.modulus)?;
    Ok(Groups {
        speed: Ratio::from_base(eta * v / (2.0 * e * rho)),
        material: Ratio::from_base(alpha * e),
        load: Ratio::from_base(2.0 * PI * (p / e) * (p / e)),
    })
}

/// What the flash between the teeth leaves of viscosity and pressure-viscosity coefficient:
/// `alpha eta` at the contact temperature over that at the bulk temperature, at most 1.
///
/// # Errors
/// A value that is not above zero.
pub fn sliding_parameter(
    flash: (DynamicViscosity, PressureViscosity),
    bulk: (DynamicViscosity, PressureViscosity),
) -> Result<Ratio, Outside> {
    let hot = positive("the viscosity in the flash", flash.0)? * flash.1.base();
    let cool = positive("the viscosity at the bulk temperature", bulk.0)?
        * positive("the pressure-viscosity coefficient", bulk.1)?;
    Ok(Ratio::from_base((hot / cool).min(1.0)))
}

/// Minimum film, ISO form; `sliding` is [`sliding_parameter`], 1 at the pitch point.
pub fn minimum(groups: Groups, rho_n: Length, sliding: Ratio) -> Length {
    let h = 1.6
        * pow(groups.material.base(), 0.6)
        * pow(groups.speed.base(), 0.7)
        * pow(groups.load.base(), -0.13)
        * pow(sliding.base(), 0.22);
    Length::from_base(h * rho_n.base())
}

/// Minimum film over the mean Ra of the flanks.
///
/// # Errors
/// A mean roughness that is not above zero.
pub fn minimum_ratio(film: Length, ra1: Length, ra2: Length) -> Result<Ratio, Outside> {
    let mean = Length::from_base(f64::midpoint(ra1.base(), ra2.base()));
    Ok(Ratio::from_base(
        film.base() / positive("the mean Ra", mean)?,
    ))
}
