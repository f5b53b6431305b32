//! How far a line of viscosity may be off, carried from its points to other temperatures.
//!
//! Between the points the errors share out; outside them they grow: 1 % up at 40 °C with 1 %
//! down at 100 °C is 10 % at -20 °C for an ISO VG 46 (computed).

use super::piecewise::Curve;
use super::viscosity_temperature::{Misfit, Point, ViscosityCurve};
use crate::numeric::math::{exp, ln};
use crate::quantity::convert::{number, to_celsius};
use crate::quantity::{Measure, Ratio, ThermodynamicTemperature};
use crate::relation::Law;

/// Reproducibility of the kinematic viscosity test.
pub static REPRODUCIBILITY: Law = Law {
    name: "viscosity-reproducibility",
    title: "Reproducibility of a kinematic viscosity between laboratories",
    formula: "R = 1.22 % at 40 degC, 1.38 % at 100 degC, 1.8 % at 150 degC, straight between; one \
              result lies within R / sqrt(2) of the mean of many",
    range: "formulated oils, two results in twenty cases once further apart; taken beyond 40 and \
            150 degC as it is there",
    source: "ASTM D445, figures from memory; the division is common practice",
};

/// A tolerance carried along a line.
pub static CARRIED: Law = Law {
    name: "line-tolerance",
    title: "Tolerance of a viscosity line at a temperature",
    formula: "u = sqrt(sum(u_i^2)), u_i = ln(nu_i / nu), nu_i with point i moved by its tolerance",
    range: "independent errors of the points",
    source: "propagation of uncertainty, JCGM 100, on ASTM D341",
};

/// Temperature, °C, and reproducibility, a share.
const TABLE: [(f64, f64); 3] = [(40.0, 0.0122), (100.0, 0.0138), (150.0, 0.018)];

/// Reproducibility of a kinematic viscosity at a temperature.
pub fn reproducibility(at: ThermodynamicTemperature) -> Ratio {
    let t = to_celsius(at);
    let (first, last) = (TABLE[0], TABLE[TABLE.len() - 1]);
    if t <= first.0 {
        return number(first.1);
    }
    for pair in TABLE.windows(2) {
        let ((t0, r0), (t1, r1)) = (pair[0], pair[1]);
        if t <= t1 {
            return number(r0 + (r1 - r0) * (t - t0) / (t1 - t0));
        }
    }
    number(last.1)
}

/// How far one result may lie from the mean of many laboratories, 19 times in 20.
pub fn of_one_result(at: ThermodynamicTemperature) -> Ratio {
    number(reproducibility(at).base() / std::f64::consts::SQRT_2)
}

/// The factor by which the viscosity may be off at a temperature, up or down, where each point
/// may be off by a share of its own. The curve is the one fitted to the points.
///
/// # Errors
/// [`Misfit`] where points moved by their tolerance make no curve.
pub fn factor(
    curve: &Curve,
    points: &[(Point, Ratio)],
    at: ThermodynamicTemperature,
) -> Result<Ratio, Misfit> {
    let nu = curve.nu_at(at).base();
    let mut sum = 0.0;
    for i in 0..points.len() {
        let mut most = 0.0_f64;
        for sign in [-1.0, 1.0] {
            let moved = curve.through_moved(points, i, sign)?;
            most = most.max(ln(moved.nu_at(at).base() / nu).abs());
        }
        sum += most * most;
    }
    Ok(number(exp(sum.sqrt())))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{celsius, mm2_s};

    fn vg_46(share: f64) -> (Curve, Vec<(Point, Ratio)>) {
        let points = [
            Point::new(celsius(40.0), mm2_s(46.0)),
            Point::new(celsius(100.0), mm2_s(6.8)),
        ];
        let curve = Curve::through(&points).expect("points fall").0;
        (curve, points.iter().map(|p| (*p, number(share))).collect())
    }

    #[test]
    fn a_per_cent_at_the_points_is_ten_at_minus_twenty() {
        // +1 % at 40 °C and -1 % at 100 °C together: +9.9 % at -20 °C (computed, 40 digits)
        let (curve, points) = vg_46(0.01);
        let (up, down) = (
            curve.through_moved(&points, 0, 1.0).expect("falls"),
            curve.through_moved(&points, 1, -1.0).expect("falls"),
        );
        let cold = celsius(-20.0);
        let nu = curve.nu_at(cold).base();
        let both = (up.nu_at(cold).base() / nu) * (down.nu_at(cold).base() / nu);
        assert!((both - 1.099).abs() < 0.001, "{both}");
        // independent, they are less than together and more than the greater alone
        let factor = factor(&curve, &points, cold).map_or(f64::NAN, Measure::base);
        assert!(factor < 1.099 && factor > up.nu_at(cold).base() / nu);
    }

    #[test]
    fn a_line_is_as_good_as_its_points_at_them() {
        let (curve, points) = vg_46(0.0122);
        let factor = |t| factor(&curve, &points, celsius(t)).map_or(f64::NAN, Measure::base);
        assert!((factor(40.0) - 1.0 / (1.0 - 0.0122)).abs() < 1e-9);
        assert!(factor(70.0) < factor(40.0) && factor(-20.0) > factor(0.0));
    }

    #[test]
    fn the_test_is_worse_hot() {
        assert!((reproducibility(celsius(40.0)).base() - 0.0122).abs() < 1e-12);
        assert!((reproducibility(celsius(100.0)).base() - 0.0138).abs() < 1e-12);
        assert!((reproducibility(celsius(200.0)).base() - 0.018).abs() < 1e-12);
        assert!(
            (of_one_result(celsius(0.0)).base() - 0.0122 / std::f64::consts::SQRT_2).abs() < 1e-12
        );
    }
}
