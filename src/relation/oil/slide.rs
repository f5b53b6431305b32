//! A line of ASTM D341 slid and turned: the neighbouring grade of the same slope, the same grade
//! with another viscosity index.

use super::tangent::{LN_T40, ln_ln_z};
use super::viscosity_index::{self, IndexError};
use super::viscosity_temperature::{Line, Misfit};
use crate::numeric::math::{ln, power_of_ten};
use crate::quantity::convert::{celsius, number};
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::Law;

/// A line moved in the coordinates of the chart.
pub static SLIDE: Law = Law {
    name: "d341-slide",
    title: "Line slid and turned about 40 degC in the coordinates of ASTM D341",
    formula: "ln ln Z_2 = ln ln Z_1 + r + s (ln T - ln 313.15)",
    range: "while the line still falls",
    source: "ASTM D341; a parallel keeps the slope B, a turn about 40 degC keeps the grade",
};

/// How far a line is moved.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Slide {
    /// Added to `ln ln Z` at 40 °C.
    rise: f64,
    /// Added to the slope of `ln ln Z` over `ln T`.
    turn: f64,
}

impl Slide {
    /// The slide that makes a line so many VG steps thicker at 40 °C, its slope kept.
    pub fn of_steps(line: Line, steps: f64) -> Self {
        let form = line.form();
        let nu40 = line.nu40();
        let moved = KinematicViscosity::from_base(nu40.base() * power_of_ten(steps / 6.0));
        Self {
            rise: ln_ln_z(form, moved) - ln_ln_z(form, nu40),
            turn: 0.0,
        }
    }

    /// The turn about 40 °C that gives a line another viscosity index.
    ///
    /// # Errors
    /// An index without a viscosity at 100 °C.
    pub fn to_index(line: Line, index: Ratio) -> Result<Self, IndexError> {
        let form = line.form();
        let nu100 = viscosity_index::nu100(line.nu40(), index)?;
        let span = ln(celsius(100.0).base()) - LN_T40;
        Ok(Self {
            rise: 0.0,
            turn: (ln_ln_z(form, nu100) - ln_ln_z(form, line.nu100())) / span,
        })
    }

    /// A line moved.
    ///
    /// # Errors
    /// A line that would no longer fall.
    pub fn of(self, line: Line) -> Result<Line, Misfit> {
        let (a, b) = (line.intercept().base(), line.slope().base());
        let ln_10 = std::f64::consts::LN_10;
        let a = a + (self.rise - self.turn * LN_T40) / ln_10;
        Line::from_constants(number(a), number(b - self.turn), line.form())
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{mm2_s, to_mm2_s};
    use crate::relation::oil::viscosity_temperature::Point;

    fn oil() -> Line {
        Line::through(
            Point::new(celsius(40.0), mm2_s(220.0)),
            Point::new(celsius(100.0), mm2_s(19.4)),
        )
        .expect("two good points")
    }

    #[test]
    fn one_step_up_is_the_parallel_through_the_next_grade() {
        let moved = Slide::of_steps(oil(), 1.0).of(oil()).expect("falls");
        let next = mm2_s(220.0 * power_of_ten(1.0 / 6.0));
        let parallel = oil().parallel_through(next, celsius(40.0));
        for t in [-20.0, 40.0, 100.0] {
            let (a, b) = (moved.nu_at(celsius(t)), parallel.nu_at(celsius(t)));
            assert!((a.base() / b.base() - 1.0).abs() < 1e-11, "{t}");
        }
    }

    #[test]
    fn a_turn_keeps_the_grade_and_gives_the_index() {
        // ASTM D2270 both ways: the index of the turned line is the one asked for
        let turned = Slide::to_index(oil(), number(160.0)).expect("a line");
        let turned = turned.of(oil()).expect("falls");
        assert!((to_mm2_s(turned.nu40()) - 220.0).abs() < 1e-9);
        let vi = viscosity_index::index(turned.nu40(), turned.nu100()).expect("an index");
        assert!((vi.base() - 160.0).abs() < 1e-6, "{vi:?}");
    }
}
