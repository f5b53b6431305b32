//! How far a figure may be off: the reproducibility of its test.

use crate::model::rulebook::Rulebook;
use crate::model::sample::Reading;
use crate::numeric::math::pow;
use crate::quantity::convert::celsius;
use crate::quantity::{Amount, Kind};
use crate::relation::oil::uncertainty::reproducibility;
use std::collections::BTreeMap;

/// Two results of one oil differ by more than 2.77 standard deviations once in twenty cases:
/// `1.96 sqrt(2)`.
const RESULTS: f64 = 2.77;

/// The scatter of every test, ready to be asked.
#[derive(Clone, Debug)]
pub struct Scatter {
    tests: BTreeMap<Reading, (f64, f64)>,
}

impl Scatter {
    /// From the rules.
    pub fn new(rules: &Rulebook) -> Self {
        let mut tests = BTreeMap::new();
        for rule in &rules.scatter {
            let share = rule.share.map_or(0.0, crate::quantity::Measure::base);
            let least = rule.least.map_or(0.0, |a| in_unit(rule.reading, a));
            for reading in std::iter::once(&rule.reading).chain(&rule.also) {
                tests.insert(*reading, (share, least));
            }
        }
        Self { tests }
    }

    /// Standard deviation of one result, in the unit of the reading. 10 % of the value where the
    /// rules know no test.
    pub fn sigma(&self, reading: Reading, value: f64) -> f64 {
        let both = match reading {
            Reading::Nu40 => share_of_viscosity(40.0, value) * value,
            Reading::Nu100 => share_of_viscosity(100.0, value) * value,
            _ => match self.tests.get(&reading) {
                Some((share, least)) => (share * value.abs()).max(*least),
                None => 0.277 * value.abs(),
            },
        };
        both / RESULTS
    }
}

/// Reproducibility of the viscosity of used oil, a share: that of formulated oils, or the figure
/// for in-service oils where it is greater, `0.000594 nu^1.722` at 40 °C and
/// `0.003361 nu^1.4633` at 100 °C (ASTM D445, from memory).
fn share_of_viscosity(t: f64, nu_mm2_s: f64) -> f64 {
    use crate::quantity::Measure;
    let formulated = reproducibility(celsius(t)).base();
    let in_service = if t < 70.0 {
        0.000_594 * pow(nu_mm2_s, 0.722)
    } else {
        0.003_361 * pow(nu_mm2_s, 0.4633)
    };
    formulated.max(in_service)
}

/// An amount of the rules in the unit a reading is kept in.
pub(super) fn in_unit(reading: Reading, amount: Amount) -> f64 {
    if amount.kind == Kind::Rise {
        return amount.base;
    }
    let unit = match reading.unit() {
        "" => amount.kind.spec().units.first(),
        name => amount.kind.unit(name),
    };
    unit.map_or(amount.base, |u| u.from_base(amount.base))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// ASTM D445 (from memory): formulated oils 1.22 % at 40 °C; in-service oils of 320 mm²/s
    /// about 12 mm²/s.
    #[test]
    fn thick_oils_scatter_more() {
        assert!((share_of_viscosity(40.0, 46.0) - 0.0122).abs() < 1e-12);
        let r = share_of_viscosity(40.0, 320.0) * 320.0;
        assert!((r - 12.2).abs() < 0.3, "{r}");
    }
}
