//! Viscosity grades of axle and manual-transmission oils: SAE J306, edition of February 2019.
//!
//! The limits at 100 °C must also hold after 20 h in the tapered roller bearing test. Numbers of
//! this scale and of SAE J300 are unrelated. A revision of 2025 adds grades whose limits are not
//! known here.

use super::grade::NOISE;
use super::sae_engine::{in_window, joined};
use crate::quantity::convert::{celsius, mm2_s, to_celsius};
use crate::quantity::{KinematicViscosity, ThermodynamicTemperature};
use crate::relation::Law;

/// The SAE classification of automotive gear oils.
pub static J306: Law = Law {
    name: "sae-gear-grade",
    title: "SAE viscosity grade of an automotive gear oil",
    formula: "W grade: the coldest whose temperature of 150 000 mPa.s and nu100 minimum hold; hot \
              grade: the one whose nu100 window holds, new and sheared",
    range: "edition of February 2019; sheared after 20 h by CEC L-45-A-99 method C",
    source: "SAE J306 FEB2019",
};

/// A winter grade.
#[derive(Debug, PartialEq)]
pub struct WinterGrade {
    /// As printed: `75W`.
    pub name: &'static str,
    /// Highest temperature at which the oil may have 150 000 mPa·s, °C.
    t150000_most_c: f64,
    /// Lowest viscosity at 100 °C, mm²/s.
    nu100_least_mm2_s: f64,
}

/// A grade by the hot viscosity.
#[derive(Debug, PartialEq)]
pub struct HotGrade {
    /// As printed: `90`.
    pub name: &'static str,
    /// Lowest viscosity at 100 °C, included, mm²/s.
    nu100_least_mm2_s: f64,
    /// Viscosity at 100 °C it stays below, mm²/s; infinite for the thickest.
    nu100_below_mm2_s: f64,
}

impl WinterGrade {
    /// Highest temperature at which the oil may have 150 000 mPa·s.
    pub fn t150000_most(&self) -> ThermodynamicTemperature {
        celsius(self.t150000_most_c)
    }

    /// Lowest viscosity at 100 °C, included.
    pub fn nu100_least(&self) -> KinematicViscosity {
        mm2_s(self.nu100_least_mm2_s)
    }
}

impl HotGrade {
    /// Lowest viscosity at 100 °C, included.
    pub fn nu100_least(&self) -> KinematicViscosity {
        mm2_s(self.nu100_least_mm2_s)
    }

    /// Viscosity at 100 °C it stays below; none for the thickest.
    pub fn nu100_below(&self) -> Option<KinematicViscosity> {
        self.nu100_below_mm2_s
            .is_finite()
            .then(|| mm2_s(self.nu100_below_mm2_s))
    }
}

const fn winter(name: &'static str, t150000_most_c: f64, nu100_least_mm2_s: f64) -> WinterGrade {
    WinterGrade {
        name,
        t150000_most_c,
        nu100_least_mm2_s,
    }
}

const fn hot(name: &'static str, nu100_least_mm2_s: f64, nu100_below_mm2_s: f64) -> HotGrade {
    HotGrade {
        name,
        nu100_least_mm2_s,
        nu100_below_mm2_s,
    }
}

/// Winter grades, coldest first.
pub static WINTER: [WinterGrade; 4] = [
    winter("70W", -55.0, 3.8),
    winter("75W", -40.0, 3.8),
    winter("80W", -26.0, 8.5),
    winter("85W", -12.0, 11.0),
];

/// Hot grades, thinnest first; their windows meet without overlap.
pub static HOT: [HotGrade; 10] = [
    hot("65", 3.8, 5.0),
    hot("70", 5.0, 6.5),
    hot("75", 6.5, 8.5),
    hot("80", 8.5, 11.0),
    hot("85", 11.0, 13.5),
    hot("90", 13.5, 18.5),
    hot("110", 18.5, 24.0),
    hot("140", 24.0, 32.5),
    hot("190", 32.5, 41.0),
    hot("250", 41.0, f64::INFINITY),
];

/// What is known of a gear oil.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct GearOil {
    /// Viscosity at 100 °C, new.
    pub nu100: KinematicViscosity,
    /// The same after the shear test.
    pub nu100_sheared: Option<KinematicViscosity>,
    /// Temperature at which it has 150 000 mPa·s by ASTM D2983.
    pub t150000: Option<ThermodynamicTemperature>,
}

/// The grade a gear oil meets.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct GearGrade {
    /// Winter part.
    pub winter: Option<&'static WinterGrade>,
    /// Hot part by the new oil.
    pub hot_new: Option<&'static HotGrade>,
    /// Hot part by the sheared oil, where that was measured.
    pub hot_sheared: Option<&'static HotGrade>,
    /// Whether the limits hold after the shear test too; `None` where that was not measured.
    pub stays: Option<bool>,
}

impl GearGrade {
    /// The hot part the oil carries: that of the new oil unless it is known to leave it.
    pub fn hot(&self) -> Option<&'static HotGrade> {
        self.hot_new.filter(|_| self.stays != Some(false))
    }

    /// As printed: `75W-90`; a hot part that does not last is left out.
    pub fn name(&self) -> Option<String> {
        joined(self.winter.map(|w| w.name), self.hot().map(|h| h.name))
    }

    /// The grade of the new oil alone, as printed.
    pub fn name_new(&self) -> Option<String> {
        joined(self.winter.map(|w| w.name), self.hot_new.map(|h| h.name))
    }
}

/// The grade an oil meets by its measured values.
pub fn classify(oil: &GearOil) -> GearGrade {
    let winter = WINTER.iter().find(|w| {
        let cold = |t| to_celsius(t) <= w.t150000_most_c + NOISE;
        oil.t150000.is_some_and(cold)
            && [Some(oil.nu100), oil.nu100_sheared]
                .into_iter()
                .flatten()
                .all(|nu| in_window(nu, w.nu100_least_mm2_s, f64::INFINITY))
    });
    let hot_new = hot_grade(oil.nu100);
    let hot_sheared = oil.nu100_sheared.and_then(hot_grade);
    let stays = oil.nu100_sheared.map(|_| hot_new == hot_sheared);
    GearGrade {
        winter,
        hot_new,
        hot_sheared,
        stays,
    }
}

fn hot_grade(nu100: KinematicViscosity) -> Option<&'static HotGrade> {
    HOT.iter()
        .find(|h| in_window(nu100, h.nu100_least_mm2_s, h.nu100_below_mm2_s))
}
