//! The pitch point from the figures a nameplate gives: centre distance and ratio.

use crate::numeric::math::{asin, atan, cos, sin, tan};
use crate::quantity::{Angle, Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// Pitch diameter of the pinion.
pub static PITCH_DIAMETER: Law = Law {
    name: "gear-pitch-diameter",
    title: "Pitch diameter of the pinion",
    formula: "d1 = 2 a / (u + 1)",
    range: "parallel axes, external gears",
    source: "ISO 21771, geometry",
};

/// Reference diameter of the pinion.
pub static REFERENCE_DIAMETER: Law = Law {
    name: "gear-reference-diameter",
    title: "Reference diameter of the pinion",
    formula: "d1 = m_n z1 / cos(beta)",
    range: "cylindrical gears",
    source: "ISO 21771, geometry",
};

/// Pitch-line speed.
pub static PITCH_SPEED: Law = Law {
    name: "gear-nameplate-speed",
    title: "Pitch-line speed",
    formula: "v = pi d1 n1",
    range: "parallel axes",
    source: "definition",
};

/// Reduced radius at the pitch point.
pub static REDUCED_RADIUS: Law = Law {
    name: "gear-nameplate-radius",
    title: "Reduced radius of the flanks at the pitch point",
    formula: "rho_n = a u sin(alpha_wt) / ((u + 1)^2 cos(beta_b))",
    range: "parallel axes, external gears; the working pressure angle taken as the standard one where the teeth are not known",
    source: "ISO 6336-2, geometry at the pitch point",
};

/// Pitch diameter of the pinion.
///
/// # Errors
/// A distance or ratio that is not above zero.
pub fn pitch_diameter(centre_distance: Length, ratio: Ratio) -> Result<Length, Outside> {
    let a = positive("the centre distance", centre_distance)?;
    let u = positive("the ratio", ratio)?;
    Ok(Length::from_base(2.0 * a / (u + 1.0)))
}

/// Reference diameter of the pinion.
///
/// # Errors
/// A module or number of teeth that is not above zero.
pub fn reference_diameter(module: Length, teeth: Ratio, helix: Angle) -> Result<Length, Outside> {
    let m = positive("the module", module)?;
    let z = positive("the number of teeth", teeth)?;
    Ok(Length::from_base(m * z / cos(helix.base())))
}

/// Transverse pressure angle and base helix angle.
fn transverse(pressure_angle: Angle, helix: Angle) -> (f64, f64) {
    let (an, b) = (pressure_angle.base(), helix.base());
    (atan(tan(an) / cos(b)), asin(sin(b) * cos(an)))
}

/// Reduced radius at the pitch point.
///
/// # Errors
/// A distance or ratio that is not above zero.
pub fn reduced_radius(
    centre_distance: Length,
    ratio: Ratio,
    pressure_angle: Angle,
    helix: Angle,
) -> Result<Length, Outside> {
    let a = positive("the centre distance", centre_distance)?;
    let u = positive("the ratio", ratio)?;
    let (at, bb) = transverse(pressure_angle, helix);
    Ok(Length::from_base(
        a * u * sin(at) / ((u + 1.0) * (u + 1.0) * cos(bb)),
    ))
}

/// Sine and cosine of the transverse pressure angle, for speeds and loads at the pitch point.
pub fn transverse_sine_cosine(pressure_angle: Angle, helix: Angle) -> (Ratio, Ratio) {
    let (at, _) = transverse(pressure_angle, helix);
    (Ratio::from_base(sin(at)), Ratio::from_base(cos(at)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{degrees, mm, number, to_mm};

    /// The check case gr-21 (20/63 teeth, module 5 mm, helix 12 degrees, standard distance):
    /// reduced radius 13.797 mm; computed by an independent script, see tests/reference.
    #[test]
    fn agrees_with_the_full_geometry() {
        let d1 = reference_diameter(mm(5.0), number(20.0), degrees(12.0)).expect("a pinion");
        let u = number(63.0 / 20.0);
        let a = mm(to_mm(d1) * (1.0 + 3.15) / 2.0);
        assert!((to_mm(pitch_diameter(a, u).expect("a pair")) / to_mm(d1) - 1.0).abs() < 1e-12);
        let rho = reduced_radius(a, u, degrees(20.0), degrees(12.0)).expect("a pair");
        assert!((to_mm(rho) - 13.7969).abs() < 1e-3, "{}", to_mm(rho));
    }
}
