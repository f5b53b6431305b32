//! How the running temperature of a sump follows the ambient.

use super::Law;
use crate::quantity::convert::{rise, warmed};
use crate::quantity::{Measure, TemperatureInterval, ThermodynamicTemperature};

/// Sump temperature from ambient and rise.
pub static RUNNING: Law = Law {
    name: "sump-running",
    title: "Running temperature",
    formula: "t = t_amb + Delta_t",
    range: "the same load at every ambient; the rise is taken as constant",
    source: "common practice: losses and case cooling change little over the ambient range",
};

/// Rise from a reading.
pub static RISE: Law = Law {
    name: "sump-rise",
    title: "Rise over ambient, from a reading",
    formula: "Delta_t = t_sump - t_amb",
    range: "a reading in steady running",
    source: "definition",
};

/// Sump temperature between two stated ends.
pub static ACROSS: Law = Law {
    name: "sump-across",
    title: "Running temperature, linear between the coldest and the hottest ambient",
    formula: "t = t_cold + (t_hot - t_cold) (t_amb - t_amb_cold) / (t_amb_hot - t_amb_cold)",
    range: "carried on beyond both ends",
    source: "linear interpolation of the two stated temperatures",
};

/// A part hotter than its sump.
pub static PART: Law = Law {
    name: "part-temperature",
    title: "Temperature of the part",
    formula: "t_part = t + Delta_t_part",
    range: "steady running",
    source: "definition",
};

/// Start temperature over pour point.
pub static POUR_MARGIN: Law = Law {
    name: "pour-margin",
    title: "Margin of the start temperature over the pour point",
    formula: "margin = t_start - t_pour - Delta_t_least",
    range: "counted from the least margin, at which the verdict becomes fails",
    source: "definition; the least margin by the rule named beside it",
};

/// Running temperature under the oil's limit.
pub static CEILING_MARGIN: Law = Law {
    name: "oil-ceiling-margin",
    title: "Margin of the running temperature under the oil's limit",
    formula: "margin = t_max - t",
    range: "bulk oil at the hottest ambient",
    source: "definition; the limit by the supplier or the base stock",
};

/// Over the low end of a use range.
pub static USE_MARGIN: Law = Law {
    name: "use-range-margin",
    title: "Margin of the start temperature over the low end of the use range",
    formula: "margin = t_start - t_low",
    range: "coldest start",
    source: "definition; the range by the thickener",
};

/// `t = t_amb + rise`.
pub fn running(
    ambient: ThermodynamicTemperature,
    by: TemperatureInterval,
) -> ThermodynamicTemperature {
    warmed(ambient, by)
}

/// The rise a reading stands for.
pub fn rise_of_reading(
    sump: ThermodynamicTemperature,
    ambient: ThermodynamicTemperature,
) -> TemperatureInterval {
    rise(sump, ambient)
}

/// Sump temperature at an ambient, from the temperatures at the coldest and the hottest one.
/// With both ambients the same, the hotter of the two.
pub fn across(
    ambient: ThermodynamicTemperature,
    coldest: (ThermodynamicTemperature, ThermodynamicTemperature),
    hottest: (ThermodynamicTemperature, ThermodynamicTemperature),
) -> ThermodynamicTemperature {
    let ((a0, t0), (a1, t1)) = (coldest, hottest);
    let span = a1.base() - a0.base();
    if span == 0.0 {
        return ThermodynamicTemperature::from_base(t0.base().max(t1.base()));
    }
    let share = (ambient.base() - a0.base()) / span;
    ThermodynamicTemperature::from_base(t0.base() + (t1.base() - t0.base()) * share)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{celsius, kelvins, to_celsius};

    #[test]
    fn rise_and_reading_agree() {
        let by = rise_of_reading(celsius(78.0), celsius(36.0));
        assert_eq!(by, kelvins(42.0));
        assert!((to_celsius(running(celsius(-18.0), by)) - 24.0).abs() < 1e-9);
    }

    #[test]
    fn across_is_carried_on_beyond_its_ends() {
        let ends = (
            (celsius(-10.0), celsius(40.0)),
            (celsius(30.0), celsius(60.0)),
        );
        for (ambient, sump) in [(-10.0, 40.0), (10.0, 50.0), (30.0, 60.0), (50.0, 70.0)] {
            let t = across(celsius(ambient), ends.0, ends.1);
            assert!((to_celsius(t) - sump).abs() < 1e-9, "{ambient}");
        }
    }
}
