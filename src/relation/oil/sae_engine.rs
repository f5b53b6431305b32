//! Viscosity grades of engine oils: SAE J300.
//!
//! Cranking (CCS) and pumping (MRV) viscosities cannot be worked out from those at 40 and 100 °C;
//! only measured values count. Older tables with SAE 20 from 5.6 mm²/s or an HTHS of 2.9 for
//! SAE 40 are superseded (2013 and 2007).

use super::grade::NOISE;
use crate::quantity::convert::{celsius, mm2_s, to_celsius, to_mm2_s, to_mpa_s};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, Measure, Pressure, ThermodynamicTemperature,
};
use crate::relation::Law;

/// The SAE classification of engine oils.
pub static J300: Law = Law {
    name: "sae-engine-grade",
    title: "SAE viscosity grade of an engine oil",
    formula: "W grade: the coldest whose CCS, MRV and nu100 limits hold; \
              hot grade: the highest whose nu100 and HTHS hold",
    range: "new oil; CCS and MRV measured at the temperature of the grade",
    source: "SAE J300, limits of the 2015 to 2024 editions; choice among overlapping grades and \
             the limit of yield stress from memory",
};

/// Yield stress from which the pumping test fails, Pa (from memory).
const YIELD_LIMIT_PA: f64 = 35.0;

/// Yield stress from which the pumping test fails.
pub fn yield_limit() -> Pressure {
    Pressure::from_base(YIELD_LIMIT_PA)
}

/// A winter grade: limits of cranking, pumping and viscosity at 100 °C.
#[derive(Debug, PartialEq)]
pub struct WinterGrade {
    /// As printed: `10W`.
    pub name: &'static str,
    /// Highest CCS viscosity, mPa·s.
    ccs_most_mpa_s: f64,
    /// Temperature of the cranking test, °C.
    ccs_at_c: f64,
    /// Highest MRV viscosity, mPa·s.
    mrv_most_mpa_s: f64,
    /// Temperature of the pumping test, °C.
    mrv_at_c: f64,
    /// Lowest viscosity at 100 °C, mm²/s.
    nu100_least_mm2_s: f64,
}

/// A grade by the hot viscosity.
#[derive(Debug, PartialEq)]
pub struct HotGrade {
    /// As printed: `30`.
    pub name: &'static str,
    /// Lowest viscosity at 100 °C, included, mm²/s.
    nu100_least_mm2_s: f64,
    /// Viscosity at 100 °C it stays below, mm²/s.
    nu100_below_mm2_s: f64,
    /// Lowest viscosity at 150 °C and 1e6 1/s, mPa·s.
    hths_least_mpa_s: f64,
    /// The same for 15W, 20W and 25W and for single grades, mPa·s.
    hths_least_heavy_mpa_s: f64,
}

impl WinterGrade {
    /// Highest cranking viscosity, and its temperature.
    pub fn cranking(&self) -> Measured {
        measured(self.ccs_at_c, self.ccs_most_mpa_s)
    }

    /// Highest pumping viscosity, and its temperature.
    pub fn pumping(&self) -> Measured {
        measured(self.mrv_at_c, self.mrv_most_mpa_s)
    }

    /// Lowest viscosity at 100 °C, included.
    pub fn nu100_least(&self) -> KinematicViscosity {
        mm2_s(self.nu100_least_mm2_s)
    }
}

fn measured(t_c: f64, eta_mpa_s: f64) -> Measured {
    Measured {
        at: celsius(t_c),
        eta: DynamicViscosity::from_base(eta_mpa_s * 1e-3),
    }
}

impl HotGrade {
    /// Lowest viscosity at 100 °C, included.
    pub fn nu100_least(&self) -> KinematicViscosity {
        mm2_s(self.nu100_least_mm2_s)
    }

    /// Viscosity at 100 °C it stays below.
    pub fn nu100_below(&self) -> KinematicViscosity {
        mm2_s(self.nu100_below_mm2_s)
    }

    /// Lowest viscosity at 150 °C and 1e6 1/s beside a winter grade, or alone.
    pub fn hths_least(&self, winter: Option<&WinterGrade>) -> DynamicViscosity {
        let heavy = winter.is_none_or(|w| w.ccs_at_c > -22.0);
        let least = if heavy {
            self.hths_least_heavy_mpa_s
        } else {
            self.hths_least_mpa_s
        };
        DynamicViscosity::from_base(least * 1e-3)
    }
}

const fn winter(
    name: &'static str,
    ccs_at_c: f64,
    ccs_most_mpa_s: f64,
    nu100_least_mm2_s: f64,
) -> WinterGrade {
    WinterGrade {
        name,
        ccs_most_mpa_s,
        ccs_at_c,
        mrv_most_mpa_s: 60_000.0,
        mrv_at_c: ccs_at_c - 5.0,
        nu100_least_mm2_s,
    }
}

const fn hot(name: &'static str, window: (f64, f64), hths: (f64, f64)) -> HotGrade {
    HotGrade {
        name,
        nu100_least_mm2_s: window.0,
        nu100_below_mm2_s: window.1,
        hths_least_mpa_s: hths.0,
        hths_least_heavy_mpa_s: hths.1,
    }
}

/// Winter grades, coldest first.
pub static WINTER: [WinterGrade; 6] = [
    winter("0W", -35.0, 6200.0, 3.8),
    winter("5W", -30.0, 6600.0, 3.8),
    winter("10W", -25.0, 7000.0, 4.1),
    winter("15W", -20.0, 7000.0, 5.6),
    winter("20W", -15.0, 9500.0, 5.6),
    winter("25W", -10.0, 13_000.0, 9.3),
];

/// Hot grades, thinnest first.
pub static HOT: [HotGrade; 8] = [
    hot("8", (4.0, 6.1), (1.7, 1.7)),
    hot("12", (5.0, 7.1), (2.0, 2.0)),
    hot("16", (6.1, 8.2), (2.3, 2.3)),
    hot("20", (6.9, 9.3), (2.6, 2.6)),
    hot("30", (9.3, 12.5), (2.9, 2.9)),
    hot("40", (12.5, 16.3), (3.5, 3.7)),
    hot("50", (16.3, 21.9), (3.7, 3.7)),
    hot("60", (21.9, 26.1), (3.7, 3.7)),
];

/// A dynamic viscosity measured at a temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Measured {
    /// The temperature.
    pub at: ThermodynamicTemperature,
    /// The viscosity.
    pub eta: DynamicViscosity,
}

/// What is known of an engine oil.
#[derive(Clone, Debug)]
pub struct EngineOil<'a> {
    /// Viscosity at 100 °C.
    pub nu100: KinematicViscosity,
    /// Viscosity at 150 °C and 1e6 1/s.
    pub hths: Option<DynamicViscosity>,
    /// Cranking simulator viscosities.
    pub ccs: &'a [Measured],
    /// Mini-rotary viscosities.
    pub mrv: &'a [Measured],
    /// Yield stress seen in the mini-rotary test.
    pub yield_stress: Option<Pressure>,
}

/// The grade an engine oil meets.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct EngineGrade {
    /// Winter part.
    pub winter: Option<&'static WinterGrade>,
    /// Hot part.
    pub hot: Option<&'static HotGrade>,
    /// Whether the hot part stands without a measured HTHS.
    pub hths_unchecked: bool,
}

impl EngineGrade {
    /// As printed: `5W-30`, `40`, `10W`; `None` where the oil meets no grade.
    pub fn name(&self) -> Option<String> {
        joined(self.winter.map(|w| w.name), self.hot.map(|h| h.name))
    }
}

/// `75W` and `90` as `75W-90`.
pub(super) fn joined(winter: Option<&str>, hot: Option<&str>) -> Option<String> {
    match (winter, hot) {
        (Some(winter), Some(hot)) => Some(format!("{winter}-{hot}")),
        (Some(one), None) | (None, Some(one)) => Some(one.to_owned()),
        (None, None) => None,
    }
}

/// Whether a viscosity at 100 °C lies in a window, lower limit included.
pub(super) fn in_window(nu100: KinematicViscosity, least: f64, below: f64) -> bool {
    let nu = to_mm2_s(nu100);
    nu >= least * (1.0 - NOISE) && nu < below * (1.0 - NOISE)
}

/// The grade an oil meets by its measured values.
pub fn classify(oil: &EngineOil) -> EngineGrade {
    let winter = WINTER.iter().find(|w| meets_winter(oil, w));
    let hot = HOT.iter().rev().find(|h| {
        let least = h.hths_least(winter).base() * (1.0 - NOISE);
        in_window(oil.nu100, h.nu100_least_mm2_s, h.nu100_below_mm2_s)
            && oil.hths.is_none_or(|hths| hths.base() >= least)
    });
    EngineGrade {
        winter,
        hot,
        hths_unchecked: oil.hths.is_none() && hot.is_some(),
    }
}

fn meets_winter(oil: &EngineOil, w: &WinterGrade) -> bool {
    let pumpable = oil.yield_stress.is_none_or(|y| y.base() < YIELD_LIMIT_PA);
    pumpable
        && at_most(oil.ccs, w.ccs_at_c, w.ccs_most_mpa_s)
        && at_most(oil.mrv, w.mrv_at_c, w.mrv_most_mpa_s)
        && in_window(oil.nu100, w.nu100_least_mm2_s, f64::INFINITY)
}

/// Whether the value measured at that temperature is at most the limit; not, where none was.
fn at_most(measured: &[Measured], at_c: f64, most_mpa_s: f64) -> bool {
    measured
        .iter()
        .find(|m| (to_celsius(m.at) - at_c).abs() < 0.05)
        .is_some_and(|m| to_mpa_s(m.eta) <= most_mpa_s * (1.0 + NOISE))
}
