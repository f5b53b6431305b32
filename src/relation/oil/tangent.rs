//! Lines of ASTM D341 drawn to a curve: parallels through a limit, and tangents where the curve
//! itself is not straight.

use super::viscosity_temperature::{Form, Line};
use crate::numeric::math::{exp, ln};
use crate::quantity::convert::to_mm2_s;
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::Law;

/// A tangent in the coordinates of the chart.
pub static TANGENT: Law = Law {
    name: "d341-tangent",
    title: "Tangent of a curve in the coordinates of ASTM D341",
    formula: "B = s nu dZ/dnu / (Z ln Z), s = -d ln nu / d ln T",
    range: "where the curve is smooth",
    source: "ASTM D341, differentiated",
};

/// `-d ln nu / d ln T` of a line at a temperature; 8 to 25 for oils.
pub fn fall(line: Line, at: ThermodynamicTemperature) -> f64 {
    line.beta(at).0 * at.base()
}

/// The line through a viscosity at a temperature that falls there as steeply as `fall` says.
pub fn tangent(
    nu: KinematicViscosity,
    at: ThermodynamicTemperature,
    fall: f64,
    form: Form,
) -> Line {
    let nu_mm2_s = to_mm2_s(nu);
    let z = form.z(nu_mm2_s);
    let b = fall * nu_mm2_s * form.dz(nu_mm2_s) / (z * ln(z));
    Line::with_slope(nu, at, b, form)
}

/// `ln ln Z` of a limit, the form in which it is compared with lines.
pub(crate) fn ln_ln_z(form: Form, nu: KinematicViscosity) -> f64 {
    ln(ln(form.z(to_mm2_s(nu))))
}

/// Viscosity at 40 °C, m²/s, of the parallel of a line of slope `b` through a limit: the form for
/// many evaluations. `w` is [`ln_ln_z`] of the limit, `ln_t` the logarithm of its temperature.
#[inline]
pub(crate) fn parallel_nu40(form: Form, b: f64, w: f64, ln_t: f64) -> f64 {
    form.undo(exp(exp(w + b * (ln_t - LN_T40)))).base()
}

/// Logarithm of 313.15.
pub(crate) const LN_T40: f64 = 5.746_682_308_971_422;

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{celsius, mm2_s};
    use crate::relation::oil::viscosity_temperature::Point;

    fn oil() -> Line {
        Line::through(
            Point::new(celsius(40.0), mm2_s(220.0)),
            Point::new(celsius(100.0), mm2_s(19.4)),
        )
        .expect("two good points")
    }

    #[test]
    fn the_constant_is_the_logarithm_of_40_celsius() {
        assert!((LN_T40 - ln(313.15)).abs() < 1e-14);
    }

    #[test]
    fn a_line_is_its_own_tangent() {
        let line = oil();
        for t in [-20.0, 30.0, 78.0] {
            let at = celsius(t);
            let same = tangent(line.nu_at(at), at, fall(line, at), line.form());
            assert!(
                (same.slope().base() / line.slope().base() - 1.0).abs() < 1e-12,
                "{t}"
            );
            assert!(
                (same.nu40().base() / line.nu40().base() - 1.0).abs() < 1e-10,
                "{t}"
            );
        }
    }

    #[test]
    fn the_parallel_is_the_line_of_the_same_slope() {
        let line = oil();
        let (limit, at) = (mm2_s(40.8), celsius(78.0));
        let fast = parallel_nu40(
            line.form(),
            line.slope().base(),
            ln_ln_z(line.form(), limit),
            ln(at.base()),
        );
        let slow = line.parallel_through(limit, at).nu40().base();
        assert!((fast / slow - 1.0).abs() < 1e-12);
    }
}
