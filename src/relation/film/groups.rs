//! The dimensionless groups of elastohydrodynamic films.
//!
//! Source: Dowson and Higginson 1966 (line), Hamrock and Dowson 1977 (ellipse).

use super::body::Radii;
use crate::quantity::{
    DynamicViscosity, Force, Length, LoadPerLength, Measure, Pressure, PressureViscosity, Ratio,
    Velocity,
};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// The groups of a line contact.
pub static LINE_GROUPS: Law = Law {
    name: "film-groups-line",
    title: "Speed, material and load parameter of a line contact",
    formula: "U = eta u / (E' R); G = alpha E'; W = w / (E' R)",
    range: "u the mean of the surface speeds; viscosity and alpha at the inlet temperature",
    source: "Dowson and Higginson, Elasto-hydrodynamic Lubrication, 1966",
};

/// The groups of an elliptical contact.
pub static ELLIPSE_GROUPS: Law = Law {
    name: "film-groups-ellipse",
    title: "Speed, material and load parameter of an elliptical contact",
    formula: "U = eta u / (E' Rx); G = alpha E'; W = F / (E' Rx^2)",
    range: "u the mean of the surface speeds; viscosity and alpha at the inlet temperature",
    source: "Hamrock and Dowson 1977",
};

/// The oil as it enters the contact.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Inlet {
    /// Dynamic viscosity at the inlet temperature and atmospheric pressure.
    pub eta: DynamicViscosity,
    /// Pressure-viscosity coefficient at the same temperature.
    pub alpha: PressureViscosity,
    /// Mean of the two surface speeds relative to the contact.
    pub speed: Velocity,
}

/// A loaded line contact.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LineLoad {
    /// Load per length.
    pub load: LoadPerLength,
    /// Reduced radius.
    pub radius: Length,
    /// Reduced modulus.
    pub modulus: Pressure,
}

/// A loaded elliptical contact.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PointLoad {
    /// Load.
    pub load: Force,
    /// Reduced radii.
    pub radii: Radii,
    /// Reduced modulus.
    pub modulus: Pressure,
}

/// The three parameters.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Groups {
    /// Speed parameter U.
    pub speed: Ratio,
    /// Material parameter G.
    pub material: Ratio,
    /// Load parameter W.
    pub load: Ratio,
}

/// The groups of a line contact.
///
/// # Errors
/// An input that is not above zero.
pub fn of_line(inlet: Inlet, contact: LineLoad) -> Result<Groups, Outside> {
    let r = positive("the reduced radius", contact.radius)?;
    let e = positive("the reduced modulus", contact.modulus)?;
    let w = positive("the load", contact.load)?;
    groups(inlet, e, r, w / (e * r))
}

/// The groups of an elliptical contact.
///
/// # Errors
/// An input that is not above zero.
pub fn of_ellipse(inlet: Inlet, contact: PointLoad) -> Result<Groups, Outside> {
    let r = positive(
        "the reduced radius in the rolling direction",
        contact.radii.x,
    )?;
    let e = positive("the reduced modulus", contact.modulus)?;
    let f = positive("the load", contact.load)?;
    groups(inlet, e, r, f / (e * r * r))
}

fn groups(inlet: Inlet, e: f64, r: f64, load: f64) -> Result<Groups, Outside> {
    let eta = positive("the viscosity", inlet.eta)?;
    let alpha = positive("the pressure-viscosity coefficient", inlet.alpha)?;
    let u = positive("the entrainment speed", inlet.speed)?;
    Ok(Groups {
        speed: Ratio::from_base(eta * u / (e * r)),
        material: Ratio::from_base(alpha * e),
        load: Ratio::from_base(load),
    })
}
