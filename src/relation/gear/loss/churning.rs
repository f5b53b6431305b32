//! Power lost by gears that stir the oil.
//!
//! Sources: ISO/TR 14179-2 and ISO/TR 14179-1, from memory.

use crate::numeric::math::{exp, pow, tan};
use crate::quantity::convert::{to_mm, to_mm2_s, to_rpm};
use crate::quantity::{
    Angle, AngularVelocity, KinematicViscosity, Length, Measure, Power, Ratio, Torque, Velocity,
};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive, within};

/// Torque by ISO/TR 14179-2.
pub static TORQUE: Law = Law {
    name: "gear-churning",
    title: "Churning torque of a dipping gear pair, referred to the pinion",
    formula: "T = C_Sp C1 exp(C2 v_t / 10); C1 = 0.063 (he1 + he2) / 10 + 0.0128 (b / 10)^3; C2 = (he1 + he2) / 800 + 0.2",
    range: "N.m, dip depths he and face width b in mm, m/s; too high for face widths above about 100 mm; no viscosity in it",
    source: "ISO/TR 14179-2 (from memory)",
};

/// Power by ISO/TR 14179-1.
pub static POWER: Law = Law {
    name: "gear-churning-agma",
    title: "Churning power of one gear, form of ISO/TR 14179-1",
    formula: "P = f_g nu n^3 D^4.7 (7.37 L + 1.474 D + 7.37 b R_f / sqrt(tan(beta))) / (A_g 10^26)",
    range: "kW; mm2/s, r/min, mm; f_g share of the gear below the oil level, A_g 0.2, R_f = 7.93 - 4.648 / mt; helix of 10 deg and more in the last term",
    source: "ISO/TR 14179-1 (from memory)",
};

/// A gear pair that dips.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Dip {
    /// Depth of the pinion below the oil level, zero if above.
    pub pinion: Length,
    /// Depth of the wheel.
    pub wheel: Length,
    /// Face width.
    pub face_width: Length,
    /// Pitch-line speed.
    pub pitch_speed: Velocity,
}

/// Splash factor of a housing: 1 where the oil is fed, else from the largest dip depth, the
/// height of the wheel's axis above the bottom and the width of the housing inside.
///
/// # Errors
/// A length that is not above zero.
pub fn splash_factor(
    deepest: Length,
    axis_height: Length,
    inside_width: Length,
) -> Result<Ratio, Outside> {
    let dip = positive("the dip depth", deepest)?;
    let height = positive("the height of the axis", axis_height)?;
    let width = positive("the inside width", inside_width)?;
    Ok(Ratio::from_base(
        pow(4.0 * dip / (3.0 * height), 1.5) * 2.0 * height / width,
    ))
}

/// Churning torque, referred to the pinion.
///
/// # Errors
/// A width or speed that is not above zero, a negative dip depth.
pub fn torque(dip: Dip, splash: Ratio) -> Result<Torque, Outside> {
    let v = positive("the pitch-line speed", dip.pitch_speed)?;
    let b_cm = positive("the face width", dip.face_width)? * 1e2;
    let splash = positive("the splash factor", splash)?;
    if dip.pinion.base() < 0.0 || dip.wheel.base() < 0.0 {
        return Err(Outside::NotPositive {
            what: "a dip depth",
        });
    }
    let depth_mm = to_mm(dip.pinion) + to_mm(dip.wheel);
    if depth_mm <= 0.0 {
        return Ok(Torque::from_base(0.0));
    }
    let c1 = 0.063 * depth_mm / 10.0 + 0.0128 * b_cm * b_cm * b_cm;
    let c2 = depth_mm / 800.0 + 0.2;
    Ok(Torque::from_base(splash * c1 * exp(c2 * v / 10.0)))
}

/// One gear that stirs.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Stirring {
    /// Share of the gear below the oil level, 0 to 1.
    pub dip_factor: Ratio,
    /// Viscosity at oil temperature.
    pub nu: KinematicViscosity,
    /// Speed of this gear.
    pub speed: AngularVelocity,
    /// Outside diameter.
    pub diameter: Length,
    /// Length of the smooth part, its face width for a gear blank.
    pub length: Length,
    /// Face width.
    pub face_width: Length,
    /// Transverse module.
    pub transverse_module: Length,
    /// Helix angle.
    pub helix: Angle,
}

/// Power one gear loses, form of ISO/TR 14179-1. Below 10° of helix the tooth term counts as at
/// 10°, where the form's range ends.
///
/// # Errors
/// An input that is not above zero, a dip factor outside 0 to 1.
pub fn power(s: Stirring) -> Result<Power, Outside> {
    let needs = "it lies between 0 and 1";
    let f_g = within("the dip factor", s.dip_factor, (0.0, 1.0), needs)?;
    positive("the viscosity", s.nu)?;
    positive("the speed", s.speed)?;
    positive("the diameter", s.diameter)?;
    positive("the transverse module", s.transverse_module)?;
    let n_rpm = to_rpm(s.speed);
    let d_mm = to_mm(s.diameter);
    let rough = 7.93 - 4.648 / to_mm(s.transverse_module);
    let slope = tan(s.helix.base().abs().max(10.0_f64.to_radians()));
    let smooth = 7.37 * to_mm(s.length);
    let teeth = 7.37 * to_mm(s.face_width) * rough.max(0.0) / slope.sqrt();
    let sum = smooth + 1.474 * d_mm + teeth;
    let scale = f_g * to_mm2_s(s.nu) * n_rpm * n_rpm * n_rpm * pow(d_mm, 4.7);
    Ok(Power::from_base(scale * sum / (0.2 * 1e26) * 1e3))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{degrees, mm, mm2_s, number, rpm};

    fn wheel(nu: f64, n: f64, helix: f64) -> f64 {
        let stirring = Stirring {
            dip_factor: number(0.3),
            nu: mm2_s(nu),
            speed: rpm(n),
            diameter: mm(330.0),
            length: mm(60.0),
            face_width: mm(60.0),
            transverse_module: mm(5.1),
            helix: degrees(helix),
        };
        power(stirring).map_or(f64::NAN, Measure::base)
    }

    #[test]
    fn churning_rises_straight_with_viscosity_and_with_the_cube_of_speed() {
        let one = wheel(100.0, 470.0, 12.0);
        assert!(one > 0.0);
        assert!((wheel(200.0, 470.0, 12.0) / one - 2.0).abs() < 1e-9);
        assert!((wheel(100.0, 940.0, 12.0) / one - 8.0).abs() < 1e-9);
        // below its range the tooth term stays as at 10 degrees
        let (spur, at_10) = (wheel(100.0, 470.0, 0.0), wheel(100.0, 470.0, 10.0));
        assert!((spur / at_10 - 1.0).abs() < 1e-12);
    }

    #[test]
    fn a_gear_that_does_not_dip_churns_nothing() {
        let dip = Dip {
            pinion: mm(0.0),
            wheel: mm(0.0),
            face_width: mm(60.0),
            pitch_speed: Velocity::from_base(8.0),
        };
        assert_eq!(torque(dip, number(1.0)).map(Measure::base), Ok(0.0));
        // as deep as the axis in a housing as wide as its axis is high: (4/3)^1.5 times 2
        let c = splash_factor(mm(100.0), mm(100.0), mm(100.0)).map_or(f64::NAN, Measure::base);
        assert!((c - 2.0 * pow(4.0 / 3.0, 1.5)).abs() < 1e-12);
    }
}
