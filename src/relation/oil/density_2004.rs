//! Density of lubricating oils by the edition of 2004, as a second opinion on Table 54D.
//!
//! The newer algorithm works in degrees Fahrenheit from 60 °F on the temperature scale of 1968;
//! the two differ by less than 1e-5 of volume between -20 and 150 °C.

use crate::numeric::math::exp;
use crate::numeric::root::bracketed;
use crate::quantity::convert::{number, to_celsius};
use crate::quantity::{MassDensity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::Law;

/// Volume correction factor from 15 °C by the edition of 2004.
pub static VCF_2004: Law = Law {
    name: "volume-correction-2004",
    title: "Volume correction factor of a lubricating oil from 15 degC, edition of 2004",
    formula: "CTL = exp(-a dt (1 + 0.8 a (dt + 0.01374979547))), a = 0.34878 / rho*, \
              dt = t68 - 60.0068749 degF; VCF = CTL(t) / CTL(15 degC)",
    range: "density 800.9 to 1163.5 kg/m3 at 60 degF",
    source: "API MPMS 11.1-2004, constants of published code",
};

const K1_PER_F: f64 = 0.34878;
const DELTA_60: f64 = 0.013_749_795_47;

/// ITS-90 minus IPTS-68 as a polynomial in `t / 630`, degrees Celsius.
const SCALE_SHIFT: [f64; 8] = [
    -0.148_759, -0.267_408, 1.080_760, 1.269_056, -4.089_591, -1.871_251, 7.438_081, -3.536_296,
];

/// Degrees Fahrenheit of the scale of 1968.
fn fahrenheit_1968(t_c: f64) -> f64 {
    let scaled = t_c / 630.0;
    let shift = SCALE_SHIFT
        .iter()
        .rev()
        .fold(0.0, |sum, a| (sum + a) * scaled);
    (t_c - shift) * 1.8 + 32.0
}

/// Volume correction from 60 °F.
fn from_60_f(rho60_kg_m3: f64, t_c: f64) -> f64 {
    // K0 and K2 are zero for lubricating oils, which makes the published B one.
    let a = 0.5 * DELTA_60 * K1_PER_F / rho60_kg_m3;
    let shifted = 1.0 + (exp(a * (1.0 + 0.8 * a)) - 1.0) / (1.0 + a * (1.0 + 1.6 * a));
    let alpha = K1_PER_F / (rho60_kg_m3 * shifted);
    let dt = fahrenheit_1968(t_c) - 60.006_874_9;
    exp(-alpha * dt * (1.0 + 0.8 * alpha * (dt + DELTA_60)))
}

/// Density at 60 °F of an oil with a density at 15 °C.
pub fn density_60_f(rho15: MassDensity) -> MassDensity {
    let rho15_kg_m3 = rho15.base();
    let miss = |rho60: f64| rho60 * from_60_f(rho60, 15.0) - rho15_kg_m3;
    let root = bracketed(rho15_kg_m3 * 0.99, rho15_kg_m3 * 1.01, miss);
    MassDensity::from_base(root.map_or(rho15_kg_m3, |r| r.at))
}

/// Volume correction factor from 15 °C, unrounded (the standard rounds to five decimals).
pub fn volume_correction(rho15: MassDensity, at: ThermodynamicTemperature) -> Ratio {
    let rho60 = density_60_f(rho15).base();
    number(from_60_f(rho60, to_celsius(at)) / from_60_f(rho60, 15.0))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::celsius;
    use crate::relation::oil::density::DensityLaw;

    #[test]
    fn the_editions_differ_by_less_than_1e_5() {
        for rho in [840.0, 880.0, 920.0, 1000.0] {
            for t in [-20.0, 0.0, 40.0, 100.0, 150.0] {
                let rho = MassDensity::from_base(rho);
                let old = DensityLaw::LubricatingOil.volume_correction(rho, celsius(t));
                let new = volume_correction(rho, celsius(t));
                assert!((old.base() - new.base()).abs() < 1e-5, "{t} degC");
            }
        }
    }
}
