//! The VG step: a margin counted in grades of ISO 3448.
//!
//! Slide the oil's line, without turning it, until it touches the limit; read both lines at
//! 40 °C; the margin is `6 lg(ratio)`. It means the same at the hot end and at the cold one,
//! which a ratio at temperature does not.

use super::tangent::{ln_ln_z, parallel_nu40};
use super::viscosity_temperature::Line;
use crate::numeric::math::{lg, ln};
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature, VgStep};
use crate::relation::Law;

/// Margin above a floor.
pub static ABOVE: Law = Law {
    name: "vg-step-floor",
    title: "Margin above a floor",
    formula: "margin = 6 lg(nu_40 / nu_40_limit)",
    range: "the limit is carried to 40 degC along a line parallel to the oil's own",
    source: "definition; one step is one grade of ISO 3448, a ratio of 10^(1/6)",
};

/// Margin below a ceiling.
pub static BELOW: Law = Law {
    name: "vg-step-ceiling",
    title: "Margin below a ceiling",
    formula: "margin = 6 lg(nu_40_limit / nu_40)",
    range: "the limit is carried to 40 degC along a line parallel to the oil's own",
    source: "definition; one step is one grade of ISO 3448, a ratio of 10^(1/6)",
};

/// A limit carried to 40 °C.
pub static CARRIED: Law = Law {
    name: "limit-at-40",
    title: "The limit carried to 40 degC along the oil's slope",
    formula: "lg lg Z_40 = lg lg Z_limit + B (lg T - lg 313.15)",
    range: "a parallel of the oil's line in the coordinates of ASTM D341",
    source: "ASTM D341, line of the same slope through the limit",
};

/// Steps between two viscosities at 40 °C, positive where the first is the greater.
pub fn steps(nu40: KinematicViscosity, limit40: KinematicViscosity) -> VgStep {
    VgStep(6.0 * lg(nu40.base() / limit40.base()))
}

/// The limit at 40 °C on a parallel of the oil's line through it.
pub fn carried_to_40(
    line: Line,
    limit: KinematicViscosity,
    at: ThermodynamicTemperature,
) -> KinematicViscosity {
    let w = ln_ln_z(line.form(), limit);
    let nu40 = parallel_nu40(line.form(), line.slope_b(), w, ln(at.base()));
    KinematicViscosity::from_base(nu40)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{celsius, mm2_s};
    use crate::relation::oil::viscosity_temperature::Point;

    fn line(nu40: f64, nu100: f64) -> Line {
        let point = |nu, t| Point::new(celsius(t), mm2_s(nu));
        Line::through(point(nu40, 40.0), point(nu100, 100.0)).expect("two good points")
    }

    /// One ISO 3448 grade apart at 40 °C on parallel lines is one step at any temperature.
    #[test]
    fn a_parallel_one_grade_up_is_one_step_everywhere() {
        let oil = line(220.0, 26.4);
        let limit40 = 220.0 / crate::numeric::math::power_of_ten(1.0 / 6.0);
        let limit_line = oil.parallel_through(mm2_s(limit40), celsius(40.0));
        for t in [-30.0, 0.0, 40.0, 78.0, 100.0] {
            let limit = limit_line.nu_at(celsius(t));
            let margin = steps(oil.nu40(), carried_to_40(oil, limit, celsius(t)));
            assert!((margin.0 - 1.0).abs() < 1e-9, "{t}: {}", margin.0);
        }
    }

    /// Worked by hand with the short form: SG-220 of the drawing, 220 / 26.4, floor 40.797 at
    /// 78 °C: the report shows +0.67.
    #[test]
    fn the_margin_of_the_drawn_example() {
        let oil = line(220.0, 26.4);
        let margin = steps(oil.nu40(), carried_to_40(oil, mm2_s(40.797), celsius(78.0)));
        assert!((margin.0 - 0.676).abs() < 2e-3, "{}", margin.0);
    }
}
