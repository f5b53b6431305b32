//! Points on the path of contact: radii of curvature and surface speeds there.
//!
//! Source: ISO 6336-2, ISO/TS 6336-22 (points A to E).

use super::geometry::Mesh;
use crate::numeric::math::sin;
use crate::quantity::{Angle, AngularVelocity, Length, Measure, Ratio, Velocity};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};
use std::f64::consts::PI;

/// Pitch-line speed.
pub static PITCH_SPEED: Law = Law {
    name: "gear-pitch-speed",
    title: "Pitch-line speed",
    formula: "v_t = pi dw1 n1",
    range: "dw1 pitch diameter of the pinion",
    source: "ISO 6336-1",
};

/// Sum of the surface speeds at the pitch point.
pub static SUM_SPEED: Law = Law {
    name: "gear-pitch-point",
    title: "Sum of the surface speeds at the pitch point",
    formula: "v_sum = 2 v_t sin(alpha_wt)",
    range: "cylindrical involute gears; both flanks move at the same speed there",
    source: "ISO/TS 6336-22",
};

/// Radii at a point.
pub static POINT: Law = Law {
    name: "gear-path-point",
    title: "Radii of curvature and surface speeds on the path of contact",
    formula: "rho1 + rho2 = a sin(alpha_wt); v = omega rho; rho_n = rho1 rho2 / ((rho1 + rho2) cos(beta_b))",
    range: "points A to E from the tip diameters and the base pitch",
    source: "ISO 6336-2; ISO/TS 6336-22",
};

/// A point on the path of contact.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Point {
    /// Start of engagement, at the root of the pinion.
    A,
    /// Midway between A and B.
    AB,
    /// Lowest point of single tooth contact.
    B,
    /// Pitch point.
    C,
    /// Highest point of single tooth contact.
    D,
    /// Midway between D and E.
    DE,
    /// End of engagement, at the tip of the pinion.
    E,
}

impl Point {
    /// All, in the order of engagement.
    pub const ALL: &'static [(&'static str, Self)] = &[
        ("A", Self::A),
        ("AB", Self::AB),
        ("B", Self::B),
        ("C", Self::C),
        ("D", Self::D),
        ("DE", Self::DE),
        ("E", Self::E),
    ];
}

/// Tip diameters of pinion and wheel (that of an internal gear negative).
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Tips {
    /// Of the pinion.
    pub pinion: Length,
    /// Of the wheel.
    pub wheel: Length,
}

impl Tips {
    /// Teeth without profile shift, addendum one module.
    pub fn standard(mesh: &Mesh) -> Self {
        let two = 2.0 * mesh.teeth.normal_module.base();
        Self {
            pinion: Length::from_base(mesh.d1.base() + two),
            wheel: Length::from_base(mesh.d2.base() + two),
        }
    }
}

/// What happens at a point on the path of contact.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct At {
    /// Distance from A along the path of contact.
    pub from_a: Length,
    /// Transverse radius of curvature of the pinion flank.
    pub rho1: Length,
    /// Transverse radius of curvature of the wheel flank.
    pub rho2: Length,
    /// Reduced radius normal to the contact line.
    pub rho_n: Length,
    /// Surface speed of the pinion flank along the path.
    pub v1: Velocity,
    /// Surface speed of the wheel flank.
    pub v2: Velocity,
}

impl At {
    /// Sum of the surface speeds.
    pub fn sum(&self) -> Velocity {
        Velocity::from_base(self.v1.base() + self.v2.base())
    }

    /// Difference of the surface speeds.
    pub fn sliding(&self) -> Velocity {
        Velocity::from_base((self.v1.base() - self.v2.base()).abs())
    }
}

/// The path of contact of a pair.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Path {
    mesh: Mesh,
    /// Pinion radius of curvature at A and at E.
    ends: (f64, f64),
    base_pitch: f64,
}

impl Path {
    /// The path between the tips.
    ///
    /// # Errors
    /// Tips below the base circle, or a path shorter than one base pitch.
    pub fn new(mesh: &Mesh, tips: Tips) -> Result<Self, Outside> {
        let (db1, db2) = mesh.base_diameters;
        let at_tip = |tip: Length, base: Length| {
            let (tip, base) = (tip.base(), base.base());
            (tip * tip - base * base).sqrt() / 2.0
        };
        let total = mesh.centre_distance.base() * sin(mesh.working_pressure_angle.base());
        let e = at_tip(tips.pinion, db1);
        let a = total - at_tip(tips.wheel, db2).copysign(db2.base());
        let base_pitch = PI * mesh.base_diameters.0.base() / mesh.teeth.z1.base();
        if !(a > 0.0 && e >= a + base_pitch) {
            return Err(Outside::NoAnswer {
                what: "the path of contact",
                why: "the tip diameters leave less than one pair of teeth in engagement",
            });
        }
        Ok(Self {
            mesh: *mesh,
            ends: (a, e),
            base_pitch,
        })
    }

    /// Transverse contact ratio.
    pub fn contact_ratio(&self) -> Ratio {
        Ratio::from_base((self.ends.1 - self.ends.0) / self.base_pitch)
    }

    /// Parts of the contact ratio after (pinion's addendum) and before the pitch point.
    pub fn addendum_ratios(&self) -> (Ratio, Ratio) {
        let pitch = self.mesh.pitch_radii().0.base();
        (
            Ratio::from_base((self.ends.1 - pitch) / self.base_pitch),
            Ratio::from_base((pitch - self.ends.0) / self.base_pitch),
        )
    }

    /// Radii and speeds at a point.
    pub fn at(&self, point: Point, pinion_speed: AngularVelocity) -> At {
        let (a, e) = self.ends;
        let (b, d) = (e - self.base_pitch, a + self.base_pitch);
        let rho1 = match point {
            Point::A => a,
            Point::AB => f64::midpoint(a, b),
            Point::B => b,
            Point::C => self.mesh.pitch_radii().0.base(),
            Point::D => d,
            Point::DE => f64::midpoint(d, e),
            Point::E => e,
        };
        let total = self.mesh.centre_distance.base() * sin(self.mesh.working_pressure_angle.base());
        let rho2 = total - rho1;
        let omega1 = pinion_speed.base();
        let omega2 = omega1 / self.mesh.ratio().base();
        let pair = (Length::from_base(rho1), Length::from_base(rho2));
        At {
            from_a: Length::from_base(rho1 - a),
            rho1: pair.0,
            rho2: pair.1,
            rho_n: self.mesh.reduced_radius(pair),
            v1: Velocity::from_base(omega1 * rho1),
            v2: Velocity::from_base(omega2 * rho2),
        }
    }

    /// Share of the load that one pair of unmodified spur teeth carries at a point: one third at
    /// A and E rising to two thirds at B and D, all of it between.
    pub fn spur_load_share(&self, point: Point) -> Ratio {
        Ratio::from_base(match point {
            Point::A | Point::E => 1.0 / 3.0,
            Point::AB | Point::DE => 0.5,
            Point::B | Point::C | Point::D => 1.0,
        })
    }
}

/// Pitch-line speed, from the pinion's pitch diameter and speed.
///
/// # Errors
/// A diameter or speed that is not above zero.
pub fn pitch_speed(
    working_diameter: Length,
    pinion_speed: AngularVelocity,
) -> Result<Velocity, Outside> {
    let d = positive("the pitch diameter of the pinion", working_diameter)?;
    let omega = positive("the speed", pinion_speed)?;
    Ok(Velocity::from_base(d * omega / 2.0))
}

/// Sum of the surface speeds at the pitch point.
pub fn sum_speed(pitch_speed: Velocity, working_pressure_angle: Angle) -> Velocity {
    Velocity::from_base(2.0 * pitch_speed.base() * sin(working_pressure_angle.base()))
}
