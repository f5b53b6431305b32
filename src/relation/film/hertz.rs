//! Pressure and size of an elastic contact.
//!
//! Source: H. Hertz 1881; exact elliptical solution in the form of Hamrock, *Fundamentals of
//! Fluid Film Lubrication*. Dry, frictionless, elastic, contact small against the radii.

pub mod approximate;

use super::body::Radii;
use crate::numeric::elliptic;
use crate::numeric::math::{cbrt, exp, ln, pow};
use crate::numeric::root::bracketed;
use crate::quantity::{Force, Length, LoadPerLength, Measure, Pressure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};
use std::f64::consts::PI;

/// Line contact.
pub static LINE: Law = Law {
    name: "hertz-line",
    title: "Hertz line contact",
    formula: "b = sqrt(8 w R / (pi E')); p_max = sqrt(w E' / (2 pi R))",
    range: "elastic, dry, frictionless bodies; half-width small against the radius",
    source: "Hertz 1881; K. L. Johnson, Contact Mechanics",
};

/// Elliptical contact, exact.
pub static ELLIPSE: Law = Law {
    name: "hertz-ellipse",
    title: "Hertz elliptical contact, exact",
    formula: "a_long = (6 k^2 E F R / (pi E'))^(1/3); a_short = a_long / k; p_max = 3 F / (2 pi a_long a_short)",
    range: "elastic, dry, frictionless bodies; k solved from the complete elliptic integrals; ratio of the radii up to 1e6",
    source: "Hertz 1881; Hamrock, Fundamentals of Fluid Film Lubrication",
};

/// A line contact under load.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LineContact {
    /// Half of the contact's width in the rolling direction.
    pub half_width: Length,
    /// Pressure on the centre line.
    pub max_pressure: Pressure,
    /// Load over contact area, `pi / 4` of the maximum.
    pub mean_pressure: Pressure,
}

/// Half-width and pressures of a line contact; `load` per length, `radius` and `modulus` reduced.
///
/// # Errors
/// An input that is not above zero.
pub fn line(
    load: LoadPerLength,
    radius: Length,
    modulus: Pressure,
) -> Result<LineContact, Outside> {
    let w = positive("the load", load)?;
    let r = positive("the reduced radius", radius)?;
    let e = positive("the reduced modulus", modulus)?;
    let p_max = (w * e / (2.0 * PI * r)).sqrt();
    Ok(LineContact {
        half_width: Length::from_base((8.0 * w * r / (PI * e)).sqrt()),
        max_pressure: Pressure::from_base(p_max),
        mean_pressure: Pressure::from_base(PI / 4.0 * p_max),
    })
}

/// An elliptical contact under load.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct EllipseContact {
    /// Semi-axis in the rolling direction.
    pub a_x: Length,
    /// Semi-axis across it.
    pub a_y: Length,
    /// Larger semi-axis; lies along the larger reduced radius.
    pub a_long: Length,
    /// Smaller semi-axis.
    pub a_short: Length,
    /// `a_y / a_x`, below one where the ellipse is long in the rolling direction.
    pub k: Ratio,
    /// Pressure in the centre.
    pub max_pressure: Pressure,
    /// Approach of the two bodies.
    pub approach: Length,
}

/// Size, pressure and approach of an elliptical contact, from the elliptic integrals.
///
/// # Errors
/// An input that is not above zero, or radii so unlike that the contact is a line.
pub fn ellipse(load: Force, radii: Radii, modulus: Pressure) -> Result<EllipseContact, Outside> {
    let ratio = radii.ratio()?.base();
    let k = axis_ratio(ratio.max(1.0 / ratio))?;
    let (first, second) = elliptic::complete(1.0 - 1.0 / (k * k));
    let form = Form { k, first, second };
    form.contact(load, radii, modulus)
}

/// Ratio of the axes and the two elliptic integrals, however they were come by.
struct Form {
    k: f64,
    first: f64,
    second: f64,
}

impl Form {
    fn contact(
        &self,
        load: Force,
        radii: Radii,
        modulus: Pressure,
    ) -> Result<EllipseContact, Outside> {
        let f = positive("the load", load)?;
        let e = positive("the reduced modulus", modulus)?;
        let (rx, ry) = (radii.x.base(), radii.y.base());
        let r = rx * ry / (rx + ry);
        let Self { k, first, second } = *self;
        let long = cbrt(6.0 * k * k * second * f * r / (PI * e));
        let short = long / k;
        let across = ry >= rx;
        let (a_x, a_y) = if across { (short, long) } else { (long, short) };
        let spread = f / (PI * k * e);
        Ok(EllipseContact {
            a_x: Length::from_base(a_x),
            a_y: Length::from_base(a_y),
            a_long: Length::from_base(long),
            a_short: Length::from_base(short),
            k: Ratio::from_base(a_y / a_x),
            max_pressure: Pressure::from_base(3.0 * f / (2.0 * PI * long * short)),
            approach: Length::from_base(first * cbrt(9.0 / (2.0 * second * r) * spread * spread)),
        })
    }
}

/// `a_long / a_short` for a ratio of the reduced radii of at least one.
fn axis_ratio(radii: f64) -> Result<f64, Outside> {
    // So near a circle the two sides of the equation cancel; there k = r^(2/3) to second order.
    if radii < 1.0 + 1e-5 {
        return Ok(pow(radii, 2.0 / 3.0));
    }
    let excess = |ln_k: f64| {
        let k_square = exp(2.0 * ln_k);
        let (first, second) = elliptic::complete(1.0 - 1.0 / k_square);
        (k_square * second - first) / (first - second) - radii
    };
    bracketed(1e-6, ln(1e4), excess)
        .map(|root| exp(root.at))
        .map_err(|_| Outside::Range {
            what: "the ratio of the reduced radii",
            value: radii,
            needs: "above 1e6 the contact is a line contact",
        })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{mm, newtons};

    #[test]
    fn a_sphere_on_a_flat_is_the_closed_form() {
        // p_max = (6 F E*² / (pi³ R²))^(1/3), E* = E'/2: Johnson, Contact Mechanics, eq. 4.24
        let (f, r, e) = (50.0, 0.0125, 226.37e9);
        let radii = Radii {
            x: mm(12.5),
            y: mm(12.5),
        };
        let c = ellipse(newtons(f), radii, Pressure::from_base(e)).expect("positive");
        let star = e / 2.0;
        let want = cbrt(6.0 * f * star * star / (PI * PI * PI * r * r));
        assert!((c.max_pressure.base() / want - 1.0).abs() < 1e-12);
    }

    #[test]
    fn near_the_circle_there_is_no_jump() {
        let below = axis_ratio(1.0 + 0.999_999e-5).unwrap_or(f64::NAN);
        let above = axis_ratio(1.0 + 1.000_001e-5).unwrap_or(f64::NAN);
        assert!((above - below).abs() < 1e-9, "{below} {above}");
        assert!(axis_ratio(1e8).is_err());
    }
}
