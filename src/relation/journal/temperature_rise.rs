//! Rise of the oil's temperature across the film, from the characteristic or from fits to it.

use super::characteristic::Characteristic;
use super::feed::Coolant;
use crate::quantity::convert::kelvins;
use crate::quantity::{Measure, Pressure, Ratio, TemperatureInterval};
use crate::relation::Law;
use std::f64::consts::PI;

/// From the characteristic.
pub static LAW: Law = Law {
    name: "journal-temperature-rise",
    title: "temperature rise of the oil in a journal bearing",
    formula: "dT = 4 pi P (r f/c)/(rho c_p Q* (1 - Q_s/(2 Q))), Q* = Q/(r c N B)",
    range: "all heat leaves with the oil; side flow leaves at the mean temperature",
    source: "Raimondi and Boyd 1958, as in textbooks of machine design (from memory)",
};

/// Polynomial fits.
pub static FIT: Law = Law {
    name: "journal-temperature-rise-fit",
    title: "temperature rise of the oil in a journal bearing, fitted",
    formula: "0.120 dT/P = 0.349109 + 6.00940 S + 0.047467 S^2 (B/D 1), \
              0.394552 + 6.392527 S - 0.036013 S^2 (1/2), \
              0.933828 + 6.437512 S - 0.011048 S^2 (1/4); dT in K, P in MPa",
    range: "B/D 1, 1/2 and 1/4; S below about 15; up to 7 % low at small S",
    source: "fits to Raimondi and Boyd 1958 in textbooks of machine design (from memory; signs \
             of the squares confirmed with the rows)",
};

/// Width ratios that were fitted.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Fitted {
    /// Width equal to the diameter.
    One,
    /// Half the diameter.
    Half,
    /// A quarter.
    Quarter,
}

/// Rise of [`LAW`].
pub fn rise(mean: Pressure, at: &Characteristic, coolant: Coolant) -> TemperatureInterval {
    let carried = at.flow.base() * (1.0 - 0.5 * at.side_share.base());
    let heat = 4.0 * PI * mean.base() * at.friction_variable().base();
    kelvins(heat / (coolant.heat_per_volume() * carried))
}

/// Rise of [`FIT`].
pub fn fitted(mean: Pressure, sommerfeld: Ratio, width: Fitted) -> TemperatureInterval {
    let [constant, linear, square] = match width {
        Fitted::One => [0.349_109, 6.009_40, 0.047_467],
        Fitted::Half => [0.394_552, 6.392_527, -0.036_013],
        Fitted::Quarter => [0.933_828, 6.437_512, -0.011_048],
    };
    let s = sommerfeld.base();
    let p_mpa = mean.base() / 1e6;
    kelvins(p_mpa / 0.120 * (constant + linear * s + square * s * s))
}
