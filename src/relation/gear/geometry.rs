//! Geometry of a cylindrical gear pair.
//!
//! Source: ISO 6336-1 and ISO 21771 (notation and relations).

use crate::numeric::math::{acos, asin, atan, cos, sin, tan};
use crate::quantity::{Angle, Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive, within_degrees};

/// Centre distance of gears without profile shift.
pub static CENTRE_DISTANCE: Law = Law {
    name: "gear-centre-distance",
    title: "Centre distance of a gear pair without profile shift",
    formula: "a = mn (z1 + z2) / (2 cos(beta))",
    range: "cylindrical gears; profile shifts that add up to zero",
    source: "ISO 21771",
};

/// Diameters and angles of a pair.
pub static MESH: Law = Law {
    name: "gear-mesh-geometry",
    title: "Diameters and working angles of a cylindrical gear pair",
    formula: "d1 = mn z1 / cos(beta); tan(alpha_t) = tan(alpha_n) / cos(beta); cos(alpha_wt) = (db1 + db2) / (2 a); dw1 = 2 a / (z2 / z1 + 1)",
    range: "cylindrical involute gears; z2 and a negative for an internal pair",
    source: "ISO 21771; ISO 6336-1",
};

/// Reduced radius at the pitch point.
pub static PITCH_RADIUS: Law = Law {
    name: "gear-pitch-radius",
    title: "Reduced radius of curvature at the pitch point",
    formula: "rho_n = rho1 rho2 / ((rho1 + rho2) cos(beta_b)); rho = db tan(alpha_wt) / 2",
    range: "cylindrical involute gears; normal to the contact line",
    source: "ISO 6336-2; ISO/TS 6336-22",
};

/// The teeth of a pair.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Teeth {
    /// Teeth of the pinion.
    pub z1: Ratio,
    /// Teeth of the wheel; negative for an internal gear.
    pub z2: Ratio,
    /// Normal module.
    pub normal_module: Length,
    /// Helix angle.
    pub helix: Angle,
    /// Normal pressure angle.
    pub pressure_angle: Angle,
}

impl Teeth {
    /// Pitch diameter of the pinion, `mn z1 / cos(beta)`.
    pub fn reference_diameter(self) -> Length {
        let module = self.normal_module.base() / cos(self.helix.base());
        Length::from_base(module * self.z1.base())
    }

    fn checked(self) -> Result<Self, Outside> {
        positive("the number of teeth of the pinion", self.z1)?;
        positive("the normal module", self.normal_module)?;
        if self.z2.base() == 0.0 || self.z2.base() + self.z1.base() == 0.0 {
            return Err(Outside::NotPositive {
                what: "the number of teeth of the wheel",
            });
        }
        let needs = "in degrees, it lies between -90 and 90";
        let edge = 90.0 - 1e-4;
        within_degrees("the helix angle", self.helix, (-edge, edge), needs)?;
        let needs = "in degrees, it lies between 0 and 90";
        let angle = self.pressure_angle;
        within_degrees("the pressure angle", angle, (1e-4, edge), needs)?;
        Ok(self)
    }
}

/// Centre distance without profile shift.
///
/// # Errors
/// Teeth that do not exist.
pub fn centre_distance(teeth: Teeth) -> Result<Length, Outside> {
    let t = teeth.checked()?;
    let sum = t.z1.base() + t.z2.base();
    let a = t.normal_module.base() * sum / (2.0 * cos(t.helix.base()));
    Ok(Length::from_base(a))
}

/// A pair of cylindrical gears.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Mesh {
    /// The teeth.
    pub teeth: Teeth,
    /// Centre distance.
    pub centre_distance: Length,
    /// Transverse pressure angle.
    pub transverse_pressure_angle: Angle,
    /// Working transverse pressure angle.
    pub working_pressure_angle: Angle,
    /// Base helix angle.
    pub base_helix: Angle,
    /// Reference diameter of the pinion.
    pub d1: Length,
    /// Reference diameter of the wheel, negative for an internal gear.
    pub d2: Length,
    /// Base diameters of pinion and wheel.
    pub base_diameters: (Length, Length),
    /// Pitch diameter of the pinion.
    pub working_diameter: Length,
}

impl Mesh {
    /// The pair at a centre distance.
    ///
    /// # Errors
    /// Teeth that do not exist, or a centre distance at which they cannot mesh.
    pub fn new(teeth: Teeth, centre_distance: Length) -> Result<Self, Outside> {
        let t = teeth.checked()?;
        let (z1, z2) = (t.z1.base(), t.z2.base());
        let a = centre_distance.base();
        let transverse = atan(tan(t.pressure_angle.base()) / cos(t.helix.base()));
        let module = t.normal_module.base() / cos(t.helix.base());
        let (d1, d2) = (module * z1, module * z2);
        let (db1, db2) = (d1 * cos(transverse), d2 * cos(transverse));
        let cosine = (db1 + db2) / (2.0 * a);
        if !(cosine > 0.0 && cosine < 1.0) {
            return Err(Outside::NoAnswer {
                what: "the working pressure angle",
                why: "these teeth do not mesh at this centre distance",
            });
        }
        let base_helix = asin(sin(t.helix.base().abs()) * cos(t.pressure_angle.base()));
        Ok(Self {
            teeth,
            centre_distance,
            transverse_pressure_angle: Angle::from_base(transverse),
            working_pressure_angle: Angle::from_base(acos(cosine)),
            base_helix: Angle::from_base(base_helix),
            d1: Length::from_base(d1),
            d2: Length::from_base(d2),
            base_diameters: (Length::from_base(db1), Length::from_base(db2)),
            working_diameter: Length::from_base(2.0 * a / (z2 / z1 + 1.0)),
        })
    }

    /// The pair at the centre distance of gears without profile shift.
    ///
    /// # Errors
    /// Teeth that do not exist.
    pub fn standard(teeth: Teeth) -> Result<Self, Outside> {
        Self::new(teeth, centre_distance(teeth)?)
    }

    /// Gear ratio `z2 / z1`.
    pub fn ratio(&self) -> Ratio {
        Ratio::from_base(self.teeth.z2.base() / self.teeth.z1.base())
    }

    /// Radii of curvature of pinion and wheel at the pitch point, in the transverse plane.
    pub fn pitch_radii(&self) -> (Length, Length) {
        let slope = tan(self.working_pressure_angle.base()) / 2.0;
        let (db1, db2) = self.base_diameters;
        (
            Length::from_base(db1.base() * slope),
            Length::from_base(db2.base() * slope),
        )
    }

    /// Reduced radius of two transverse radii of curvature, normal to the contact line.
    pub fn reduced_radius(&self, (first, second): (Length, Length)) -> Length {
        let (r1, r2) = (first.base(), second.base());
        Length::from_base(r1 * r2 / (r1 + r2) / cos(self.base_helix.base()))
    }

    /// Reduced radius at the pitch point, normal to the contact line.
    pub fn pitch_reduced_radius(&self) -> Length {
        self.reduced_radius(self.pitch_radii())
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{degrees, mm, number, to_mm};

    fn teeth(z1: f64, z2: f64) -> Teeth {
        Teeth {
            z1: number(z1),
            z2: number(z2),
            normal_module: mm(4.0),
            helix: degrees(0.0),
            pressure_angle: degrees(20.0),
        }
    }

    #[test]
    fn an_internal_pair_has_a_longer_radius_than_its_pinion() {
        let mesh = Mesh::standard(teeth(20.0, -80.0)).expect("a planet in its ring");
        assert!((to_mm(mesh.centre_distance) + 120.0).abs() < 1e-9);
        assert!((to_mm(mesh.working_diameter) - 80.0).abs() < 1e-9);
        let pinion = mesh.pitch_radii().0;
        assert!(mesh.pitch_reduced_radius() > pinion);
    }

    #[test]
    fn teeth_that_cannot_mesh_are_refused() {
        assert!(Mesh::new(teeth(24.0, 72.0), mm(170.0)).is_err());
        assert!(Mesh::standard(teeth(0.0, 72.0)).is_err());
        assert!(Mesh::standard(teeth(24.0, -24.0)).is_err());
        // a longer centre distance opens the working pressure angle
        let wide = Mesh::new(teeth(24.0, 72.0), mm(193.0)).expect("meshes");
        assert!(wide.working_pressure_angle > wide.transverse_pressure_angle);
    }
}
