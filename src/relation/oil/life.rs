//! Life of an oil against its running temperature. Guidance for clean and dry oil, never a
//! promise: water, dirt and lost additives commonly end it earlier.

use crate::numeric::math::{exp, ln, power_of_ten};
use crate::quantity::{Measure, Ratio, TemperatureInterval, ThermodynamicTemperature, Time};
use crate::relation::Law;

/// Oxidation life by the equation of Arrhenius.
pub static ARRHENIUS: Law = Law {
    name: "oil-life",
    title: "Oxidation life of an oil by the equation of Arrhenius",
    formula: "lg L = k1 + 4750 / T, L in h, T in K; times the life of the base against mineral oil",
    range: "clean and dry oil, about 60 to 130 degC; k1 by type of oil",
    source: "Khonsari and Booser, Applied Tribology; constants from memory",
};

/// The rule of ten.
pub static RULE_OF_TEN: Law = Law {
    name: "oil-life-rule-of-ten",
    title: "Life of an oil, halved for every 10 K",
    formula: "L = L_0 f^(-(t - t_0) / step)",
    range: "above the temperature the rule begins at; below it, additives and dirt decide",
    source: "common practice; the doubling of the rate for 10 K was confirmed on turbine oils \
             (ASTM symposium, 1986)",
};

/// Slope of the equation, K.
const SLOPE_K: f64 = 4750.0;

/// Oxidation life: `constant` by type of oil, `multiple` that of the base against mineral oil.
pub fn arrhenius(constant: Ratio, multiple: Ratio, at: ThermodynamicTemperature) -> Time {
    let hours = multiple.base() * power_of_ten(constant.base() + SLOPE_K / at.base());
    Time::from_base(hours * 3600.0)
}

/// Where the rule of ten begins and how fast life falls from there.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Halving {
    /// Temperature it begins at.
    pub above: ThermodynamicTemperature,
    /// Factor for each step.
    pub factor: Ratio,
    /// The step.
    pub step: TemperatureInterval,
}

impl Halving {
    /// Life at a temperature from the life where the rule begins; the same below it.
    pub fn life(self, at_start: Time, at: ThermodynamicTemperature) -> Time {
        let steps = ((at.base() - self.above.base()) / self.step.base()).max(0.0);
        Time::from_base(at_start.base() * exp(-steps * ln(self.factor.base())))
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{celsius, kelvins, number};

    fn hours(t: Time) -> f64 {
        t.base() / 3600.0
    }

    #[test]
    fn gives_the_published_lives() {
        // turbine oil at 100 °C about 19 000 h, EP gear oil at 93 °C about 4700 h, and about 2.1
        // times for 10 K near 100 °C: Khonsari and Booser, from memory
        let turbine = hours(arrhenius(number(-8.45), number(1.0), celsius(100.0)));
        assert!((turbine - 19_000.0).abs() < 500.0, "{turbine}");
        let gear = hours(arrhenius(number(-9.31), number(1.0), celsius(93.0)));
        assert!((gear - 4700.0).abs() < 200.0, "{gear}");
        let hotter = hours(arrhenius(number(-8.45), number(1.0), celsius(110.0)));
        assert!((turbine / hotter - 2.15).abs() < 0.1);
        let pao = hours(arrhenius(number(-8.45), number(3.0), celsius(100.0)));
        assert!((pao / turbine - 3.0).abs() < 1e-12);
    }

    #[test]
    fn the_rule_halves_above_its_start_and_is_level_below() {
        let rule = Halving {
            above: celsius(60.0),
            factor: number(2.0),
            step: kelvins(10.0),
        };
        let life = |t| rule.life(Time::from_base(8.0), celsius(t)).base();
        assert!((life(90.0) - 1.0).abs() < 1e-12);
        assert!((life(40.0) - 8.0).abs() < 1e-12);
    }
}
