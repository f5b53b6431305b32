//! Worm gears: sliding speed, efficiency, and the viscosity it asks for.
//!
//! Sources: textbook mechanics (Jindal, *Machine Design*, ch. 28); friction curve of AGMA 6034 and
//! viscosity guide from memory.

use crate::numeric::math::{atan, cos, exp, pow, tan};
use crate::quantity::convert::mm2_s;
use crate::quantity::{
    Angle, AngularVelocity, Area, HeatTransfer, KinematicViscosity, Length, Measure, Power, Ratio,
    TemperatureInterval, Velocity,
};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive, within, within_degrees};

/// Sliding speed.
pub static SLIDING: Law = Law {
    name: "worm-sliding",
    title: "Sliding speed of a worm gear",
    formula: "v_g = pi d1 n1 / cos(gamma)",
    range: "at the mean diameter of the worm",
    source: "Jindal, Machine Design, ch. 28",
};

/// Usual diameter of a worm.
pub static USUAL_DIAMETER: Law = Law {
    name: "worm-usual-diameter",
    title: "Usual mean diameter of a worm by centre distance",
    formula: "d1 = a^0.875 / 2.2; between a^0.875 / 3.0 and a^0.875 / 1.7",
    range: "in inches; where nobody knows the worm itself",
    source: "AGMA 6022 (from memory)",
};

/// Lead angle.
pub static LEAD: Law = Law {
    name: "worm-lead-angle",
    title: "Lead angle of a worm from centre distance and ratio",
    formula: "tan(gamma) = (2 a - d1) / (u d1)",
    range: "shafts at right angles; mean diameter of the worm",
    source: "geometry: z2 m = 2 a - d1, z1 m = d1 tan(gamma)",
};

/// Power lost in the mesh.
pub static LOSS: Law = Law {
    name: "worm-loss",
    title: "Power lost in a worm mesh",
    formula: "P_V = P (1 - eta)",
    range: "worm driving; tooth friction only",
    source: "definition of efficiency",
};

/// Coefficient of friction.
pub static FRICTION: Law = Law {
    name: "worm-friction",
    title: "Coefficient of friction of a worm gear by sliding speed",
    formula: "mu = 0.103 exp(-0.110 v^0.450) + 0.012; mu = 0.124 exp(-0.074 v^0.645) up to 10 ft/min",
    range: "v in ft/min; steel worm on bronze wheel, mineral oil; 0.15 at rest",
    source: "AGMA 6034, ISO/TR 14179-1 (from memory)",
};

/// Efficiency.
pub static EFFICIENCY: Law = Law {
    name: "worm-efficiency",
    title: "Efficiency of a worm gear with the worm driving",
    formula: "eta = (cos(alpha_n) - mu tan(gamma)) / (cos(alpha_n) + mu cot(gamma))",
    range: "tooth friction only",
    source: "Jindal, Machine Design, ch. 28",
};

/// Viscosity guide.
pub static VISCOSITY_GUIDE: Law = Law {
    name: "worm-viscosity-guide",
    title: "Viscosity at 40 degC of a worm gear oil by sliding speed",
    formula: "nu40 = 900 (to 1 m/s, heavy), 500 (to 2.5, heavy), 350 (to 5), 220 (to 10), 150 (to 15), 100 (to 25), 80 (above)",
    range: "mm2/s; a guide where nothing better is known",
    source: "machine-design textbooks (from memory)",
};

/// Rise over the surroundings.
pub static HOUSING_RISE: Law = Law {
    name: "worm-housing-rise",
    title: "Rise of the oil over the surroundings by the lost power",
    formula: "dT = P (1 - eta) / (k A)",
    range: "steady state; k 10 to 15 W/(m2.K) in still air, 15 to 25 ventilated, to 30 with a fan",
    source: "Jindal, Machine Design, ch. 28; k common practice",
};

/// Sliding speed at the mean diameter.
///
/// # Errors
/// A diameter or speed that is not above zero, a lead angle outside 0 to 90°.
pub fn sliding_speed(
    worm_diameter: Length,
    speed: AngularVelocity,
    lead_angle: Angle,
) -> Result<Velocity, Outside> {
    let d = positive("the worm diameter", worm_diameter)?;
    let omega = positive("the speed", speed)?;
    let gamma = lead(lead_angle)?;
    Ok(Velocity::from_base(d / 2.0 * omega / cos(gamma)))
}

/// Usual mean diameter: the middle, and the ends of what is usual.
///
/// # Errors
/// A centre distance that is not above zero.
pub fn usual_diameter(centre_distance: Length) -> Result<(Length, Length, Length), Outside> {
    let inches = positive("the centre distance", centre_distance)? / 0.0254;
    let over = |k: f64| Length::from_base(0.0254 * pow(inches, 0.875) / k);
    Ok((over(2.2), over(3.0), over(1.7)))
}

/// Lead angle of a worm.
///
/// # Errors
/// A length or ratio that is not above zero, or a worm too thick for the centre distance.
pub fn lead_angle(
    centre_distance: Length,
    worm_diameter: Length,
    ratio: Ratio,
) -> Result<Angle, Outside> {
    let a = positive("the centre distance", centre_distance)?;
    let d = positive("the worm diameter", worm_diameter)?;
    let u = positive("the ratio", ratio)?;
    let wheel = 2.0 * a - d;
    if wheel <= 0.0 {
        return Err(Outside::NoAnswer {
            what: "the lead angle",
            why: "the worm is thicker than twice the centre distance",
        });
    }
    Ok(Angle::from_base(atan(wheel / (u * d))))
}

/// Power lost in the mesh.
pub fn loss(power: Power, efficiency: Ratio) -> Power {
    Power::from_base(power.base() * (1.0 - efficiency.base()))
}

fn lead(angle: Angle) -> Result<f64, Outside> {
    let needs = "in degrees, it lies between 0 and 90";
    within_degrees("the lead angle", angle, (1e-4, 90.0 - 1e-4), needs)
}

/// Coefficient of friction.
pub fn friction(sliding: Velocity) -> Ratio {
    let v_ft_min = sliding.base().abs() * 60.0 / 0.3048;
    Ratio::from_base(if v_ft_min <= 0.0 {
        0.15
    } else if v_ft_min <= 10.0 {
        0.124 * exp(-0.074 * pow(v_ft_min, 0.645))
    } else {
        0.103 * exp(-0.110 * pow(v_ft_min, 0.450)) + 0.012
    })
}

/// Efficiency with the worm driving.
///
/// # Errors
/// A lead angle outside 0 to 90°, a negative coefficient of friction, or friction that locks.
pub fn efficiency(lead_angle: Angle, pressure_angle: Angle, mu: Ratio) -> Result<Ratio, Outside> {
    let gamma = lead(lead_angle)?;
    let needs = "it is not negative and below 1";
    let mu = within("the coefficient of friction", mu, (0.0, 1.0), needs)?;
    let across = cos(pressure_angle.base());
    let efficiency = (across - mu * tan(gamma)) / (across + mu / tan(gamma));
    if !(0.0..=1.0).contains(&efficiency) {
        return Err(Outside::NoAnswer {
            what: "the efficiency",
            why: "friction is too high for this lead angle",
        });
    }
    Ok(Ratio::from_base(efficiency))
}

/// Viscosity at 40 °C by sliding speed; `heavy` for high loads at low speed.
///
/// # Errors
/// A speed that is not above zero.
pub fn viscosity_guide(sliding: Velocity, heavy: bool) -> Result<KinematicViscosity, Outside> {
    let v = positive("the sliding speed", sliding)?;
    Ok(mm2_s(match v {
        v if heavy && v <= 1.0 => 900.0,
        v if heavy && v <= 2.5 => 500.0,
        v if v <= 5.0 => 350.0,
        v if v <= 10.0 => 220.0,
        v if v <= 15.0 => 150.0,
        v if v <= 25.0 => 100.0,
        _ => 80.0,
    }))
}

/// Rise of the oil over the surroundings.
///
/// # Errors
/// A power, heat transfer coefficient or area that is not above zero.
pub fn housing_rise(
    power: Power,
    efficiency: Ratio,
    transfer: HeatTransfer,
    area: Area,
) -> Result<TemperatureInterval, Outside> {
    let p = positive("the power", power)?;
    let k = positive("the heat transfer coefficient", transfer)?;
    let a = positive("the area", area)?;
    Ok(TemperatureInterval::from_base(
        p * (1.0 - efficiency.base()) / (k * a),
    ))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{mm, number, to_mm};

    /// A worm of 80 mm, 200 mm centre distance, ratio 40: the wheel is 320 mm, so the lead is
    /// 8 mm on 80 mm of diameter, and tan(gamma) = 0.1. By hand.
    #[test]
    fn the_lead_follows_from_the_wheel() {
        let gamma = lead_angle(mm(200.0), mm(80.0), number(40.0)).expect("a worm");
        assert!((tan(gamma.base()) - 0.1).abs() < 1e-12);
        assert!(lead_angle(mm(40.0), mm(80.0), number(40.0)).is_err());
    }

    /// 4 inches between the shafts: 4^0.875 = 3.3636 inches over 2.2, 38.83 mm. By hand.
    #[test]
    fn the_usual_worm() {
        let (d, lo, hi) = usual_diameter(mm(101.6)).expect("a distance");
        assert!((to_mm(d) - 38.834).abs() < 0.01, "{}", to_mm(d));
        assert!(lo < d && d < hi);
    }
}
