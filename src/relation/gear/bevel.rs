//! Bevel gears as virtual cylindrical gears.
//!
//! Source: ISO 10300-1 (from memory). Hypoid gears slide along the teeth as well; their films are
//! not to be judged this way.

use super::geometry::Teeth;
use crate::numeric::math::{atan2, cos, sin};
use crate::quantity::{Angle, AngularVelocity, Length, Measure, Ratio, Torque};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};
use std::f64::consts::FRAC_PI_2;

/// Cone angles.
pub static CONE_ANGLES: Law = Law {
    name: "bevel-cone-angles",
    title: "Pitch cone angles of a bevel gear pair",
    formula: "tan(delta1) = sin(S) / (u + cos(S)); delta2 = S - delta1",
    range: "S shaft angle",
    source: "ISO 10300-1; Jindal, Machine Design, ch. 27",
};

/// Virtual cylindrical gears.
pub static VIRTUAL: Law = Law {
    name: "bevel-virtual",
    title: "Virtual cylindrical gears of a bevel gear pair",
    formula: "d_v = d_m / cos(delta); z_v = z / cos(delta)",
    range: "at the middle of the face; effective face width 0.85 b",
    source: "ISO 10300-1 (from memory)",
};

/// Speed and torque of the virtual pinion.
pub static VIRTUAL_LOAD: Law = Law {
    name: "bevel-virtual-load",
    title: "Speed and torque of the virtual pinion",
    formula: "n_v1 = n1 cos(delta1); T_v1 = T1 / cos(delta1)",
    range: "same pitch-line speed and tooth force as the real pinion",
    source: "ISO 10300-1 (from memory)",
};

/// A bevel gear pair at the middle of the face.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Bevel {
    /// Teeth of the pinion.
    pub z1: Ratio,
    /// Teeth of the wheel.
    pub z2: Ratio,
    /// Normal module at the middle of the face.
    pub mean_normal_module: Length,
    /// Spiral angle there.
    pub spiral: Angle,
    /// Normal pressure angle.
    pub pressure_angle: Angle,
    /// Angle between the shafts, usually 90°.
    pub shaft_angle: Angle,
    /// Face width.
    pub face_width: Length,
}

/// A bevel pair turned into a cylindrical one.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Virtual {
    /// Cone angles of pinion and wheel.
    pub cones: (Angle, Angle),
    /// Mean pitch diameters of pinion and wheel.
    pub mean_diameters: (Length, Length),
    /// The virtual teeth.
    pub teeth: Teeth,
    /// Width that carries.
    pub effective_width: Length,
}

impl Virtual {
    /// Torque of the virtual pinion with the tooth force of the real one.
    pub fn torque(&self, pinion_torque: Torque) -> Torque {
        let cosine = cos(self.cones.0.base());
        Torque::from_base(pinion_torque.base() / cosine)
    }

    /// Speed of the virtual pinion with the pitch-line speed of the real one.
    pub fn speed(&self, pinion_speed: AngularVelocity) -> AngularVelocity {
        let cosine = cos(self.cones.0.base());
        AngularVelocity::from_base(pinion_speed.base() * cosine)
    }
}

/// Cone angles of pinion and wheel.
///
/// # Errors
/// Teeth or a shaft angle that are not above zero, or a wheel that would be hollow.
pub fn cone_angles(z1: Ratio, z2: Ratio, shaft_angle: Angle) -> Result<(Angle, Angle), Outside> {
    let u = positive("the teeth of the wheel", z2)?
        / positive("the number of teeth of the pinion", z1)?;
    let sum = positive("the shaft angle", shaft_angle)?;
    let first = atan2(sin(sum), u + cos(sum));
    let second = sum - first;
    if !(first > 0.0 && second > 0.0 && second < FRAC_PI_2) {
        return Err(Outside::NoAnswer {
            what: "the cone angles",
            why: "the wheel would be a crown or an internal gear",
        });
    }
    Ok((Angle::from_base(first), Angle::from_base(second)))
}

/// The virtual cylindrical pair.
///
/// # Errors
/// As [`cone_angles`], or a module or width that is not above zero.
pub fn virtual_pair(b: Bevel) -> Result<Virtual, Outside> {
    let cones = cone_angles(b.z1, b.z2, b.shaft_angle)?;
    let module = positive("the mean normal module", b.mean_normal_module)? / cos(b.spiral.base());
    let width = positive("the face width", b.face_width)?;
    let virtual_teeth = |z: Ratio, cone: Angle| Ratio::from_base(z.base() / cos(cone.base()));
    Ok(Virtual {
        cones,
        mean_diameters: (
            Length::from_base(module * b.z1.base()),
            Length::from_base(module * b.z2.base()),
        ),
        teeth: Teeth {
            z1: virtual_teeth(b.z1, cones.0),
            z2: virtual_teeth(b.z2, cones.1),
            normal_module: b.mean_normal_module,
            helix: b.spiral,
            pressure_angle: b.pressure_angle,
        },
        effective_width: Length::from_base(0.85 * width),
    })
}
