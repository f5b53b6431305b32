//! Forces and pressure in the mesh.
//!
//! Source: ISO 6336-1 and 6336-2.

use super::geometry::Mesh;
use crate::numeric::math::{cos, sin};
use crate::quantity::{
    Angle, AngularVelocity, Force, Length, LoadPerLength, Measure, Power, Pressure, Ratio, Torque,
};
use crate::relation::Law;
use crate::relation::film::hertz;
use crate::relation::outside::{Outside, positive};
use std::f64::consts::PI;

/// The tangential force.
pub static TANGENTIAL_FORCE: Law = Law {
    name: "gear-tangential-force",
    title: "Tangential force at the reference circle",
    formula: "F_t = 2 T1 / d1",
    range: "torque of the pinion, without load factors",
    source: "ISO 6336-1",
};

/// The load on the contact line.
pub static LINE_LOAD: Law = Law {
    name: "gear-line-load",
    title: "Load per length of contact line",
    formula: "w = X K F_t / (b cos(alpha_t))",
    range: "K product of the load factors, X share of the load at the point looked at",
    source: "ISO 6336-2; ISO/TS 6336-22",
};

/// The pressure.
pub static PRESSURE: Law = Law {
    name: "gear-pressure",
    title: "Hertz pressure between the flanks",
    formula: "p_H = sqrt(w E' / (2 pi rho_n))",
    range: "elastic contact of smooth flanks; equal to the form with the elasticity factor",
    source: "Hertz 1881; ISO 6336-2",
};

/// The torque.
pub static TORQUE: Law = Law {
    name: "gear-torque",
    title: "Torque of a power at a speed",
    formula: "T = P / omega",
    range: "steady running",
    source: "mechanics",
};

/// Torque of a power at a speed.
///
/// # Errors
/// A power or a speed that is not above zero.
pub fn torque_of(power: Power, speed: AngularVelocity) -> Result<Torque, Outside> {
    let p = positive("the power", power)?;
    Ok(Torque::from_base(p / positive("the speed", speed)?))
}

/// Tangential force at a diameter.
///
/// # Errors
/// A torque or a diameter that is not above zero.
pub fn tangential_force(torque: Torque, diameter: Length) -> Result<Force, Outside> {
    let t = positive("the torque", torque)?;
    let d = positive("the reference diameter", diameter)?;
    Ok(Force::from_base(2.0 * t / d))
}

/// Load per length of contact line, of teeth as wide as `face_width`.
///
/// # Errors
/// A force, width or factor that is not above zero.
pub fn line_load(
    force: Force,
    face_width: Length,
    load_factor: Ratio,
    load_share: Ratio,
    transverse_pressure_angle: Angle,
) -> Result<LoadPerLength, Outside> {
    let along = path_force(force, transverse_pressure_angle);
    let f = positive("the tangential force", along)?;
    let b = positive("the face width", face_width)?;
    let k = positive("the load factor", load_factor)?;
    let x = positive("the load share", load_share)?;
    Ok(LoadPerLength::from_base(x * k * f / b))
}

/// Pressure between flanks of that reduced radius.
///
/// # Errors
/// An input that is not above zero.
pub fn pressure(
    load: LoadPerLength,
    rho_n: Length,
    modulus: Pressure,
) -> Result<Pressure, Outside> {
    hertz::line(load, rho_n, modulus).map(|c| c.max_pressure)
}

/// The load share of a helical pair whose overlap is at least one: one over the contact ratio.
///
/// # Errors
/// A contact ratio that is not above zero.
pub fn helical_load_share(contact_ratio: Ratio) -> Result<Ratio, Outside> {
    positive("the transverse contact ratio", contact_ratio).map(|e| Ratio::from_base(1.0 / e))
}

/// Overlap ratio, `b sin(beta) / (pi mn)`.
pub fn overlap_ratio(mesh: &Mesh, face_width: Length) -> Ratio {
    let t = mesh.teeth;
    let sine = sin(t.helix.base().abs());
    let pitch = PI * t.normal_module.base();
    Ratio::from_base(face_width.base() * sine / pitch)
}

/// Force along the path of contact, `F_t / cos(alpha_t)`.
pub fn path_force(force: Force, transverse_pressure_angle: Angle) -> Force {
    Force::from_base(force.base() / cos(transverse_pressure_angle.base()))
}
