//! Film thickness of balls, crowned rollers and other elliptical contacts.
//!
//! Source: Hamrock and Dowson 1977 (hard), 1978 (soft). Isothermal, fully flooded, smooth,
//! rolling along the minor axis. Fitted for `k` 1 to 8 and used up to line contact.

use super::body::Radii;
use super::groups::Groups;
use crate::numeric::math::{exp, pow};
use crate::quantity::{Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::outside::Outside;
use std::f64::consts::PI;

/// Ellipticity from the radii.
pub static ELLIPTICITY: Law = Law {
    name: "ellipticity",
    title: "Ellipticity parameter of the film formulas",
    formula: "k = (Ry / Rx)^(2/pi)",
    range: "Ry at least Rx: rolling along the minor axis",
    source: "Hamrock and Brewe 1983",
};

/// Minimum film, hard bodies.
pub static MINIMUM: Law = Law {
    name: "film-ellipse",
    title: "Minimum film of an elliptical contact, Hamrock and Dowson",
    formula: "h_min = Rx 3.63 U^0.68 G^0.49 W^-0.073 (1 - exp(-0.68 k))",
    range: "isothermal, fully flooded, smooth, hard bodies, rolling along the minor axis; k 1 to 8, used up to line contact",
    source: "Hamrock and Dowson 1977; scaled by Rx as its authors do",
};

/// Central film, hard bodies.
pub static CENTRAL: Law = Law {
    name: "film-ellipse-central",
    title: "Central film of an elliptical contact, Hamrock and Dowson",
    formula: "h_c = Rx 2.69 U^0.67 G^0.53 W^-0.067 (1 - 0.61 exp(-0.73 k))",
    range: "isothermal, fully flooded, smooth, hard bodies, rolling along the minor axis; k 1 to 8, used up to line contact",
    source: "Hamrock and Dowson 1977; scaled by Rx as its authors do",
};

/// Minimum film, soft bodies.
pub static SOFT_MINIMUM: Law = Law {
    name: "film-ellipse-soft",
    title: "Minimum film of a soft elliptical contact",
    formula: "h_min = Rx 7.43 U^0.65 W^-0.21 (1 - 0.85 exp(-0.31 k))",
    range: "rubber-like bodies: pressure too low to thicken the oil",
    source: "Hamrock and Dowson 1978 (from memory)",
};

/// Central film, soft bodies.
pub static SOFT_CENTRAL: Law = Law {
    name: "film-ellipse-soft-central",
    title: "Central film of a soft elliptical contact",
    formula: "h_c = Rx 7.32 U^0.64 W^-0.22 (1 - 0.72 exp(-0.28 k))",
    range: "rubber-like bodies: pressure too low to thicken the oil",
    source: "Hamrock and Dowson 1978 (from memory)",
};

/// Ellipticity for the film formulas.
///
/// # Errors
/// Radii that are not above zero, or an ellipse long in the rolling direction, for which the
/// formulas were not fitted.
pub fn ellipticity(radii: Radii) -> Result<Ratio, Outside> {
    let ratio = radii.ratio()?.base();
    if ratio < 1.0 {
        return Err(Outside::Range {
            what: "Ry / Rx",
            value: ratio,
            needs: "the film formulas hold for rolling along the minor axis, Ry / Rx of 1 and more",
        });
    }
    Ok(Ratio::from_base(pow(ratio, 2.0 / PI)))
}

/// Minimum film of hard bodies; an infinite `k` is the limit of a line contact.
pub fn minimum(groups: Groups, k: Ratio, rx: Length) -> Length {
    let (u, g, w) = plain(groups);
    let side = 1.0 - exp(-0.68 * k.base());
    Length::from_base(rx.base() * 3.63 * pow(u, 0.68) * pow(g, 0.49) * pow(w, -0.073) * side)
}

/// Central film of hard bodies.
pub fn central(groups: Groups, k: Ratio, rx: Length) -> Length {
    let (u, g, w) = plain(groups);
    let side = 1.0 - 0.61 * exp(-0.73 * k.base());
    Length::from_base(rx.base() * 2.69 * pow(u, 0.67) * pow(g, 0.53) * pow(w, -0.067) * side)
}

/// Minimum film of soft bodies.
pub fn soft_minimum(groups: Groups, k: Ratio, rx: Length) -> Length {
    let (u, _, w) = plain(groups);
    let side = 1.0 - 0.85 * exp(-0.31 * k.base());
    Length::from_base(rx.base() * 7.43 * pow(u, 0.65) * pow(w, -0.21) * side)
}

/// Central film of soft bodies.
pub fn soft_central(groups: Groups, k: Ratio, rx: Length) -> Length {
    let (u, _, w) = plain(groups);
    let side = 1.0 - 0.72 * exp(-0.28 * k.base());
    Length::from_base(rx.base() * 7.32 * pow(u, 0.64) * pow(w, -0.22) * side)
}

fn plain(groups: Groups) -> (f64, f64, f64) {
    (
        groups.speed.base(),
        groups.material.base(),
        groups.load.base(),
    )
}
