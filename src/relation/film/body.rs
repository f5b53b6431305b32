//! What two bodies in contact are to each other: reduced modulus and reduced radii.
//!
//! Source: H. Hertz 1881, in the form of K. L. Johnson, *Contact Mechanics*, and of
//! Boresi and Schmidt, *Advanced Mechanics of Materials*, ch. 17 (skewed bodies).

use crate::numeric::math::sin;
use crate::quantity::{Angle, Length, Measure, Pressure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive, within};

/// The reduced modulus.
pub static REDUCED_MODULUS: Law = Law {
    name: "reduced-modulus",
    title: "Reduced elastic modulus of two bodies",
    formula: "E' = 2 / ((1 - nu1^2) / E1 + (1 - nu2^2) / E2)",
    range: "elastic, isotropic bodies; Poisson's ratio 0 to 0.5",
    source: "Hertz 1881; the convention of Dowson and Higginson, twice the 1/E* = sum((1 - nu^2)/E) of other texts",
};

/// The reduced radius in one plane.
pub static REDUCED_RADIUS: Law = Law {
    name: "reduced-radius",
    title: "Reduced radius of two bodies in one plane",
    formula: "R = 1 / (1 / r1 + 1 / r2)",
    range: "radii of curvature in the same plane; concave ones negative",
    source: "Hertz 1881",
};

/// The reduced radii of bodies whose planes of curvature do not coincide.
pub static SKEWED_RADII: Law = Law {
    name: "skewed-radii",
    title: "Reduced radii of two bodies turned against each other",
    formula: "1 / Rx = (S + sqrt((D1 + D2)^2 - 4 D1 D2 sin(theta)^2)) / 2; 1 / Ry = (S - sqrt((D1 + D2)^2 - 4 D1 D2 sin(theta)^2)) / 2",
    range: "principal planes at the angle theta; S sum of the four curvatures, D difference of the two of one body",
    source: "Boresi & Schmidt, Advanced Mechanics of Materials, ch. 17",
};

/// An elastic material.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Material {
    /// Young's modulus.
    pub youngs: Pressure,
    /// Poisson's ratio.
    pub poisson: Ratio,
}

impl Material {
    /// Bearing and gear steel: 206 `GPa` and 0.3 (common practice).
    pub fn steel() -> Self {
        Self {
            youngs: Pressure::from_base(206e9),
            poisson: Ratio::from_base(0.3),
        }
    }
}

/// Reduced modulus `E'` of two bodies: 226.4 `GPa` for steel on steel.
///
/// # Errors
/// A modulus that is not above zero, a Poisson's ratio outside 0 to 0.5.
pub fn reduced_modulus(a: Material, b: Material) -> Result<Pressure, Outside> {
    Ok(Pressure::from_base(2.0 / (compliance(a)? + compliance(b)?)))
}

fn compliance(material: Material) -> Result<f64, Outside> {
    let youngs = positive("Young's modulus", material.youngs)?;
    let needs = "it lies between 0 and 0.5";
    let poisson = within("Poisson's ratio", material.poisson, (0.0, 0.5), needs)?;
    Ok((1.0 - poisson * poisson) / youngs)
}

/// Reduced radii of a contact, along rolling and across it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Radii {
    /// In the rolling direction.
    pub x: Length,
    /// Across it.
    pub y: Length,
}

impl Radii {
    /// `Ry / Rx`.
    ///
    /// # Errors
    /// A radius that is not above zero.
    pub fn ratio(self) -> Result<Ratio, Outside> {
        let x = positive("the reduced radius in the rolling direction", self.x)?;
        let y = positive("the reduced radius across the rolling direction", self.y)?;
        Ok(Ratio::from_base(y / x))
    }
}

/// Reduced radius in one plane; a concave radius is negative, a flat is left out.
///
/// # Errors
/// A radius of zero, or two bodies that do not touch in a point: the hollow is tighter than the
/// body in it, or both are flat.
pub fn reduced_radius(a: Length, b: Option<Length>) -> Result<Length, Outside> {
    let sum = curvature(a)? + b.map_or(Ok(0.0), curvature)?;
    if sum > 0.0 {
        Ok(Length::from_base(1.0 / sum))
    } else {
        Err(Outside::NoAnswer {
            what: "the reduced radius",
            why: "the two curvatures do not add up to a convex contact",
        })
    }
}

fn curvature(radius: Length) -> Result<f64, Outside> {
    let r = radius.base();
    if r == 0.0 {
        return Err(Outside::NotPositive { what: "a radius" });
    }
    Ok(1.0 / r)
}

/// The two principal radii of one body; concave ones negative, flat ones infinite.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Principal {
    /// In the body's first principal plane.
    pub first: Length,
    /// In the plane at right angles to it.
    pub second: Length,
}

/// Reduced radii of two bodies whose first principal planes meet at an angle; `x` is the smaller.
///
/// # Errors
/// A radius of zero, or bodies that do not touch in a point.
pub fn skewed(a: Principal, b: Principal, angle: Angle) -> Result<Radii, Outside> {
    let (a1, a2) = (curvature(a.first)?, curvature(a.second)?);
    let (b1, b2) = (curvature(b.first)?, curvature(b.second)?);
    let (da, db) = (a1 - a2, b1 - b2);
    let s = sin(angle.base());
    let root = ((da + db) * (da + db) - 4.0 * da * db * s * s)
        .max(0.0)
        .sqrt();
    let sum = a1 + a2 + b1 + b2;
    let (large, small) = (f64::midpoint(sum, root), f64::midpoint(sum, -root));
    if small <= 0.0 {
        return Err(Outside::NoAnswer {
            what: "the reduced radii",
            why: "the bodies touch along a line or do not fit into each other",
        });
    }
    Ok(Radii {
        x: Length::from_base(1.0 / large),
        y: Length::from_base(1.0 / small),
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{degrees, mm, to_mm};

    #[test]
    fn skewed_at_zero_is_plane_by_plane() {
        let a = Principal {
            first: mm(10.0),
            second: mm(40.0),
        };
        let b = Principal {
            first: mm(-30.0),
            second: mm(f64::INFINITY),
        };
        let r = skewed(a, b, degrees(0.0)).expect("convex");
        assert!((to_mm(r.x) - 15.0).abs() < 1e-9);
        assert!((to_mm(r.y) - 40.0).abs() < 1e-9);
        // crossed equal cylinders make a circle
        let c = Principal {
            first: mm(10.0),
            second: mm(f64::INFINITY),
        };
        let r = skewed(c, c, degrees(90.0)).expect("convex");
        assert!((to_mm(r.x) - 10.0).abs() < 1e-9 && (to_mm(r.y) - 10.0).abs() < 1e-9);
        assert!(skewed(c, c, degrees(0.0)).is_err());
    }

    #[test]
    fn a_hollow_tighter_than_its_ball_is_refused() {
        assert!(reduced_radius(mm(10.0), Some(mm(-9.0))).is_err());
        assert!(reduced_radius(mm(0.0), None).is_err());
        let r = reduced_radius(mm(10.0), Some(mm(-20.0))).map(to_mm);
        assert_eq!(r.map(f64::round), Ok(20.0));
    }
}
