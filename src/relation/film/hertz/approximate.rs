//! Elliptical contact without solving for the axes.
//!
//! Source: Brewe and Hamrock 1977, and the variant of Hamrock and Brewe 1983. The exact solution
//! is used everywhere else; these stand for comparison with hand calculations.

use super::{EllipseContact, Form};
use crate::numeric::math::{ln, pow};
use crate::quantity::{Force, Measure, Pressure};
use crate::relation::Law;
use crate::relation::film::body::Radii;
use crate::relation::outside::Outside;
use std::f64::consts::{FRAC_PI_2, PI};

/// The approximation of 1977.
pub static BREWE_HAMROCK: Law = Law {
    name: "hertz-ellipse-1977",
    title: "Hertz elliptical contact, approximate axes of 1977",
    formula: "k = 1.0339 r^0.636; E = 1.0003 + 0.5968 / r; K = 1.5277 + 0.6023 ln(r)",
    range: "ratio r of the reduced radii 1 to 100: k within 6.5 %, maximum pressure within 2.2 %",
    source: "Brewe and Hamrock 1977 (from memory; errors worked out against the exact solution)",
};

/// The approximation of 1983.
pub static HAMROCK_BREWE: Law = Law {
    name: "hertz-ellipse-1983",
    title: "Hertz elliptical contact, approximate axes of 1983",
    formula: "k = r^(2/pi); E = 1 + q / r; K = pi/2 + q ln(r); q = pi/2 - 1",
    range: "ratio r of the reduced radii 1 to 100: k within 4 %, maximum pressure within 1.7 %",
    source: "Hamrock and Brewe 1983 (from memory; errors worked out against the exact solution)",
};

/// Which approximation.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Variant {
    /// 1977, fitted coefficients.
    BreweHamrock,
    /// 1983, exact for the circle.
    HamrockBrewe,
}

/// Size, pressure and approach of an elliptical contact by an approximation.
///
/// # Errors
/// An input that is not above zero.
pub fn ellipse(
    load: Force,
    radii: Radii,
    modulus: Pressure,
    variant: Variant,
) -> Result<EllipseContact, Outside> {
    let ratio = radii.ratio()?.base();
    let r = ratio.max(1.0 / ratio);
    let form = match variant {
        Variant::BreweHamrock => Form {
            k: 1.0339 * pow(r, 0.636),
            second: 1.0003 + 0.5968 / r,
            first: 1.5277 + 0.6023 * ln(r),
        },
        Variant::HamrockBrewe => {
            let q = FRAC_PI_2 - 1.0;
            Form {
                k: pow(r, 2.0 / PI),
                second: 1.0 + q / r,
                first: FRAC_PI_2 + q * ln(r),
            }
        }
    };
    form.contact(load, radii, modulus)
}
