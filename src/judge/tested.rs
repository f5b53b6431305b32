//! Viscosities that a test measures, against the limit of a grade.
//!
//! The oil's own test comes first; then the W grade it declares, which promises the limit of that
//! grade at its temperature; then its line. The line of a polymer-thickened oil says nothing of
//! fast shear: it reads too thick in the cranking test and too thick at high shear.

use super::band::Band;
use super::margin::{Jaw, Ready, Straight};
use super::prepared::{PreparedOil, ReadyDemand, Variant};
use crate::demand::tested::{GradeTest, TestedLimit};
use crate::model::Oil;
use crate::quantity::convert::{celsius, kinematic};
use crate::quantity::{DynamicViscosity, KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::Law;
use crate::relation::oil::{sae_engine, sae_gear};

/// A viscosity by a test carried to another temperature.
pub static CARRIED_POINT: Law = Law {
    name: "tested-viscosity-carried",
    title: "Viscosity by a test at another temperature",
    formula: "nu(t) on the line through the tested point, parallel to the oil's own",
    range: "near the temperature of the test",
    source: "ASTM D341; the oil's slope",
};

/// Where a viscosity comes from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum By {
    /// The supplier's own test.
    Test,
    /// The grade it declares.
    Declared,
}

impl By {
    /// In words.
    pub fn word(self) -> &'static str {
        match self {
            Self::Test => "measured by the supplier",
            Self::Declared => "limit of the W grade it declares",
        }
    }
}

/// One viscosity of an oil by a test.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct TestedPoint {
    /// The test.
    pub test: GradeTest,
    /// Temperature, K.
    pub t: f64,
    /// As measured or promised.
    pub eta: DynamicViscosity,
    /// Whose word it is.
    pub by: By,
}

/// Everything an oil says by these tests.
pub fn points(oil: &Oil) -> Vec<TestedPoint> {
    let mut all = Vec::new();
    let mut add = |test, t: ThermodynamicTemperature, eta, by| {
        let t = t.base();
        all.push(TestedPoint { test, t, eta, by });
    };
    for p in &oil.ccs {
        add(GradeTest::Cranking, p.value.at, p.value.eta, By::Test);
    }
    for p in &oil.mrv {
        add(GradeTest::Pumping, p.value.at, p.value.eta, By::Test);
    }
    for p in &oil.cold_viscosity {
        add(GradeTest::Axle, p.value.at, p.value.eta, By::Test);
        add(GradeTest::Pumping, p.value.at, p.value.eta, By::Test);
    }
    if let Some(t) = &oil.t150000 {
        let eta = DynamicViscosity::from_base(150.0);
        add(GradeTest::Axle, t.value, eta, By::Test);
    }
    if let Some(eta) = &oil.hths {
        add(GradeTest::HighShear, celsius(150.0), eta.value, By::Test);
    }
    for class in &oil.facts.classes {
        declared(class, &mut add);
    }
    all
}

/// What a declared grade promises: `SAE 15W-40`, `75W-90`.
fn declared(
    class: &str,
    add: &mut impl FnMut(GradeTest, ThermodynamicTemperature, DynamicViscosity, By),
) {
    let plain = class.trim().to_uppercase();
    let plain = plain.trim_start_matches("SAE").trim();
    let Some(name) = plain.split('-').map(str::trim).find(|p| p.ends_with('W')) else {
        return;
    };
    if let Some(w) = sae_engine::WINTER.iter().find(|w| w.name == name) {
        let (crank, pump) = (w.cranking(), w.pumping());
        add(GradeTest::Cranking, crank.at, crank.eta, By::Declared);
        add(GradeTest::Pumping, pump.at, pump.eta, By::Declared);
    }
    if let Some(w) = sae_gear::WINTER.iter().find(|w| w.name == name) {
        let eta = DynamicViscosity::from_base(150.0);
        add(GradeTest::Axle, w.t150000_most(), eta, By::Declared);
    }
}

/// The point that speaks for a temperature: the oil's own test before its grade, the nearest
/// first.
pub fn nearest(points: &[TestedPoint], test: GradeTest, t: f64) -> Option<TestedPoint> {
    points
        .iter()
        .filter(|p| p.test == test)
        .min_by(|a, b| {
            let far = |p: &TestedPoint| (p.t - t).abs();
            a.by.cmp(&b.by).then(far(a).total_cmp(&far(b)))
        })
        .copied()
}

/// What an oil is by a test at a temperature.
pub struct Reading {
    /// The line it is read on.
    pub line: Straight,
    /// The point it goes through; `None` where the oil's own curve had to do.
    pub point: Option<TestedPoint>,
    /// Whether floors were judged on the worn curve.
    pub worn: bool,
}

/// Reads an oil by a test.
pub fn reading(limit: TestedLimit, t: f64, oil: &PreparedOil, worn: Option<&Ready>) -> Reading {
    let hot = limit.test == GradeTest::HighShear;
    let own = if hot { &oil.thin } else { &oil.thick };
    if let Some(point) = nearest(&oil.tested, limit.test, t) {
        let at = ThermodynamicTemperature::from_base(point.t);
        let nu = kinematic(point.eta, oil.curves.density.at(at));
        let line = own.at(point.t).line.parallel_through(nu, at);
        return Reading {
            line: Straight::of(line),
            point: Some(point),
            worn: false,
        };
    }
    let jaw = jaw(limit, t, oil);
    let thinner = worn.filter(|w| hot && w.above(&jaw).0 < own.above(&jaw).0);
    Reading {
        line: thinner.unwrap_or(own).at(t),
        point: None,
        worn: thinner.is_some(),
    }
}

/// The limit as a kinematic viscosity of this oil.
pub fn jaw(limit: TestedLimit, t: f64, oil: &PreparedOil) -> Jaw {
    let at = ThermodynamicTemperature::from_base(t);
    Jaw::new(kinematic(limit.eta, oil.curves.density.at(at)), at)
}

/// A margin by a test.
pub struct TestedMargin {
    /// VG steps on the safe side.
    pub value: f64,
    /// Whether the oil's own curve had to do and says nothing of this test.
    pub unknown: bool,
    /// Ambients at which the margin is not negative.
    pub band: Band,
    /// Viscosity judged.
    pub nu: KinematicViscosity,
}

/// Measures an oil against a limit by a test.
pub fn measure(
    demand: &ReadyDemand,
    limit: TestedLimit,
    oil: &PreparedOil,
    variant: &Variant,
) -> TestedMargin {
    let worn = variant.worn.as_ref();
    let hot = limit.test == GradeTest::HighShear;
    let margin = |t: f64| {
        let read = reading(limit, t, oil, worn);
        let above = read.line.above(&jaw(limit, t, oil)).0;
        (if hot { above } else { -above }, read)
    };
    let (value, read) = margin(demand.t);
    let blind = read.point.is_none()
        && oil.curves.thickened
        && match limit.test {
            GradeTest::Cranking => value < 0.0,
            GradeTest::HighShear => value >= 0.0,
            GradeTest::Pumping | GradeTest::Axle => false,
        };
    let at = ThermodynamicTemperature::from_base(demand.t);
    TestedMargin {
        value,
        unknown: blind,
        band: Band::by_root(hot, |ambient| margin(demand.at.at(ambient)).0),
        nu: read.line.line.nu_at(at),
    }
}
