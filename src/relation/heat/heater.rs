//! Heating a sump before the start: power, time, and the heat a sheath gives to the oil.

use crate::quantity::{
    Area, HeatFluxDensity, MassDensity, Measure, Power, SpecificHeatCapacity, TemperatureInterval,
    Time, Volume,
};
use crate::relation::Law;

/// Power to warm a sump in a given time.
pub static POWER: Law = Law {
    name: "heater-power",
    title: "Power that warms a sump in a given time",
    formula: "P = V rho c_p Delta_t / tau + P_loss",
    range: "one temperature throughout the sump; iron not counted",
    source: "heat balance; c_p = 2.0 kJ/(kg K), common practice",
};

/// Heat from a sheath over its area.
pub static WATT_DENSITY: Law = Law {
    name: "heater-watt-density",
    title: "Watt density of a heater",
    formula: "q = P / A",
    range: "the whole sheath covered by oil",
    source: "definition",
};

/// Power to warm a volume by a rise in a time; losses come on top.
pub fn power(
    volume: Volume,
    density: MassDensity,
    heat: SpecificHeatCapacity,
    by: TemperatureInterval,
    within: Time,
) -> Power {
    let energy = volume.base() * density.base() * heat.base() * by.base();
    Power::from_base(energy / within.base())
}

/// Time in which a power warms a volume by a rise, losses not counted.
pub fn time(
    volume: Volume,
    density: MassDensity,
    heat: SpecificHeatCapacity,
    by: TemperatureInterval,
    with: Power,
) -> Time {
    let energy = volume.base() * density.base() * heat.base() * by.base();
    Time::from_base(energy / with.base())
}

/// Watt density of a sheath.
pub fn watt_density(power: Power, sheath: Area) -> HeatFluxDensity {
    HeatFluxDensity::from_base(power.base() / sheath.base())
}

/// Sheath that a power needs at a watt density.
pub fn sheath(power: Power, at_most: HeatFluxDensity) -> Area {
    Area::from_base(power.base() / at_most.base())
}

/// Power that a sheath may give at a watt density.
pub fn power_of_sheath(sheath: Area, at_most: HeatFluxDensity) -> Power {
    Power::from_base(sheath.base() * at_most.base())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::kelvins;

    #[test]
    fn a_sump_is_warmed_as_practice_reckons() {
        // common practice: kW = litres x kg/L x 2.0 x K / (3600 x hours);
        // 600 L of 0.88 kg/L by 20 K in 4 h: 600 x 0.88 x 2 x 20 / 14400 = 1.4667 kW
        let (v, rho) = (Volume::from_base(0.6), MassDensity::from_base(880.0));
        let c = SpecificHeatCapacity::from_base(2000.0);
        let p = power(v, rho, c, kelvins(20.0), Time::from_base(4.0 * 3600.0));
        assert!((p.base() - 1_466.666_666_7).abs() < 1e-6);
        assert!((time(v, rho, c, kelvins(20.0), p).base() - 14_400.0).abs() < 1e-9);
    }

    #[test]
    fn the_crusher_heater_of_the_demonstration_is_too_hot() {
        // 9 kW on 1900 cm2 is 4.74 W/cm2; at 1.6 W/cm2: 3.04 kW or 5625 cm2, worked by hand
        let (p, a) = (Power::from_base(9000.0), Area::from_base(0.19));
        assert!((watt_density(p, a).base() / 1e4 - 4.7368).abs() < 1e-4);
        let limit = HeatFluxDensity::from_base(1.6e4);
        assert!((sheath(p, limit).base() * 1e4 - 5625.0).abs() < 1e-9);
        assert!((power_of_sheath(a, limit).base() - 3040.0).abs() < 1e-9);
    }
}
