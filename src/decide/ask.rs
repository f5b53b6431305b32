//! The oil to ask for: the smallest specification that would hold, solved for, so that it can be
//! sent to any supplier.
//!
//! Solved in this order, each for the oil that is easiest to find: the base stock (the plainest
//! that can do it), the grade (the one that gets by with the least viscosity index), the viscosity
//! index at least, the pour point at most, the permanent shear loss at most. At each step an oil
//! of exactly these properties is weighed like any other; the one printed holds, reserve kept.
//! What the oil has to declare and what it must not contain is found by trying it on the rules.

pub mod contents;
mod grease;
mod trial;

use crate::demand::takes_grease;
use crate::judge::{Judgement, Verdict};
use crate::model::rulebook::Rulebook;
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{KinematicViscosity, Measure};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::grade::IsoGrade;
use crate::weighing::{Scales, Weighed};
pub use contents::{Contents, Without};
use trial::Trial;

/// A specification that holds.
#[derive(Clone, Debug, PartialEq)]
pub struct Specification {
    /// Base stock it was solved with: the plainest that can do it.
    pub base: BaseStock,
    /// ISO VG; none for a grease, whose base oil has a range of its own.
    pub grade: Option<u32>,
    /// Viscosity index at least, a whole number.
    pub vi: f64,
    /// Pour point at most, K, a whole number of degrees Celsius; none where nothing asks for one.
    pub pour: Option<f64>,
    /// Permanent loss of viscosity at 100 degC at most, a share; none where nothing worn is
    /// judged.
    pub loss: Option<f64>,
    /// Viscosity to be measured at the coldest start, where the data sheet alone does not carry
    /// that far: K, and Pa·s at most.
    pub cold: Option<(f64, f64)>,
    /// Whether shear is that of gears and rolling bearings.
    pub severe: bool,
    /// What a grease has to be beside its base oil; none for an oil.
    pub grease: Option<GreaseAsked>,
    /// What it has to declare and what it must not contain.
    pub contents: Contents,
    /// The specification weighed: it holds.
    pub judgement: Judgement,
}

/// A grease beside its base oil.
#[derive(Clone, Debug, PartialEq)]
pub struct GreaseAsked {
    /// Thickeners any of which serves, by name, the first the one it was solved with.
    pub thickeners: Vec<String>,
    /// Base oil at 40 degC by the certificate of the batch, at least and at most, m²/s.
    pub nu40: (f64, f64),
    /// Coldest start and hottest running it has to be fit for, K, as far as they are known.
    pub fit_for: (Option<f64>, Option<f64>),
}

/// What came of it.
#[derive(Clone, Debug, PartialEq)]
pub enum Ask {
    /// A specification.
    Specification(Box<Specification>),
    /// What is missing has to be known first.
    Undecided(String),
    /// No oil of one grade can do it: the limits leave no room up to this viscosity index.
    NoRoom {
        /// Greatest viscosity index tried.
        vi: f64,
    },
    /// A grease point, and no thickener on no base oil keeps every limit.
    NoGrease,
}

/// What is said where no grease can do it.
pub const NO_GREASE: &str = "no grease holds here: none of the thickeners of the rules, on a base oil of mineral or PAO, keeps every limit";

/// Bases tried, the plainest first, with the greatest index they reach without polymer.
const BASES: [(BaseStock, f64); 5] = [
    (BaseStock::MineralI, 105.0),
    (BaseStock::MineralII, 120.0),
    (BaseStock::MineralIII, 145.0),
    (BaseStock::Pao, 180.0),
    (BaseStock::PolyolEster, 200.0),
];

/// Least index asked for: the plainest oils have it (common practice).
const LEAST_INDEX: f64 = 90.0;

/// Solves for the oil to ask for on a point.
pub fn ask(scales: &Scales<'_>, weighed: &Weighed<'_>) -> Ask {
    if takes_grease(weighed.point) {
        if let Some(undecided) = undecided(weighed) {
            return undecided;
        }
        let found = grease::ask(scales, weighed);
        return found.map_or(Ask::NoGrease, |spec| Ask::Specification(Box::new(spec)));
    }
    if let Some(undecided) = undecided(weighed) {
        return undecided;
    }
    let mut most = 0.0_f64;
    for (base, index) in BASES {
        most = most.max(index);
        let contents = contents::of(scales, weighed, base, None);
        if contents.barred {
            continue;
        }
        // a data sheet alone may not reach down to the start: then the oil is to be measured there
        for measured_cold in [false, true] {
            let trial = Trial::new(scales, weighed, base, &contents, measured_cold);
            let Some((grade, vi)) = plainest(&trial, index) else {
                continue;
            };
            if let Some(found) = complete(&trial, grade, vi, &contents) {
                return Ask::Specification(Box::new(found));
            }
        }
    }
    Ask::NoRoom { vi: most }
}

/// What has to be known before anything can be solved for.
fn undecided(weighed: &Weighed<'_>) -> Option<Ask> {
    let u = weighed.demands.middle.undecided.first()?;
    let part = u.part.as_deref().unwrap_or("the point");
    Some(Ask::Undecided(format!("{part}: {}", u.because)))
}

/// The grade that holds with the least index up to one; of equals the thinner.
fn plainest(trial: &Trial<'_, '_>, most: f64) -> Option<(u32, f64)> {
    let mut best: Option<(u32, f64)> = None;
    for grade in IsoGrade::all().map(IsoGrade::number) {
        let Some(vi) = least_index(trial, grade, most) else {
            continue;
        };
        if best.is_none_or(|(_, least)| vi < least - 1e-9) {
            best = Some((grade, vi));
        }
    }
    best
}

/// The least whole index with which a grade holds; none where the greatest does not either.
fn least_index(trial: &Trial<'_, '_>, grade: u32, most: f64) -> Option<f64> {
    let holds = |vi: f64| trial.holds(grade, vi, None, None);
    if !holds(most) {
        return None;
    }
    let (mut low, mut high) = (LEAST_INDEX, most);
    if holds(low) {
        return Some(low);
    }
    // whole numbers: what is asked for is printed without decimals
    while high - low > 1.0 {
        let middle = f64::midpoint(low, high).floor();
        if holds(middle) {
            high = middle;
        } else {
            low = middle;
        }
    }
    Some(high)
}

/// Pour point and shear loss for a grade and an index; the whole weighed once more.
fn complete(
    trial: &Trial<'_, '_>,
    grade: u32,
    vi: f64,
    contents: &Contents,
) -> Option<Specification> {
    let pour = trial
        .asks_pour()
        .then(|| warmest_pour(trial, grade, vi))
        .flatten();
    if trial.asks_pour() && pour.is_none() {
        return None;
    }
    let loss = trial
        .has_floor()
        .then(|| greatest_loss(trial, grade, vi, pour));
    let judgement = trial.weigh(grade, vi, pour, loss.filter(|l| *l > 0.0))?;
    (judgement.verdict == Verdict::Holds).then(|| Specification {
        base: trial.base,
        grade: Some(grade),
        vi,
        pour,
        loss,
        cold: trial.cold_viscosity(grade, vi),
        severe: trial.severe(),
        grease: None,
        contents: contents.clone(),
        judgement,
    })
}

/// The warmest pour point that holds, in whole degrees Celsius, K.
fn warmest_pour(trial: &Trial<'_, '_>, grade: u32, vi: f64) -> Option<f64> {
    let zero = crate::quantity::convert::ZERO_CELSIUS;
    let pour = |c: i32| f64::from(c) + zero;
    greatest(-75, 30, |c| trial.holds(grade, vi, Some(pour(c)), None)).map(pour)
}

/// The greatest loss by shear that holds, in whole per cent, a share; zero where none has room.
fn greatest_loss(trial: &Trial<'_, '_>, grade: u32, vi: f64, pour: Option<f64>) -> f64 {
    let loss = |p: i32| f64::from(p) / 100.0;
    greatest(1, 40, |p| trial.holds(grade, vi, pour, Some(loss(p)))).map_or(0.0, loss)
}

/// The greatest whole number that passes, of those from `low` to `high`, where what passes lies
/// below what does not; none where `low` does not pass.
fn greatest(low: i32, high: i32, passes: impl Fn(i32) -> bool) -> Option<i32> {
    if !passes(low) {
        return None;
    }
    if passes(high) {
        return Some(high);
    }
    let (mut low, mut high) = (low, high);
    while high - low > 1 {
        let middle = i32::midpoint(low, high);
        if passes(middle) {
            low = middle;
        } else {
            high = middle;
        }
    }
    Some(low)
}

impl Specification {
    /// The shear test the loss is meant by: that of the duty, by its name in the rules.
    pub fn shear_test(&self, rules: &Rulebook) -> String {
        let id = if self.severe {
            "roller_20"
        } else {
            "injector_30"
        };
        rules
            .shear_tests
            .get(id)
            .map_or_else(String::new, |t| t.name.clone())
    }

    /// The specification in sentences, for a supplier: figures only, no machine named.
    pub fn lines(&self, shear_test: &str, degrees: impl Fn(f64) -> String) -> Vec<String> {
        let mut lines = Vec::new();
        if let Some(grade) = self.grade {
            lines.push(format!(
                "ISO VG {grade}, viscosity index at least {:.0}",
                self.vi
            ));
        }
        if let Some(grease) = &self.grease {
            let nu = |nu: f64, toward| {
                quantity(
                    KinematicViscosity::from_base(nu).amount(),
                    Units::Si,
                    toward,
                )
            };
            lines.push(format!(
                "grease with a base oil of {} to {} at 40 degC, by the certificate of the batch, viscosity index at least {:.0}",
                nu(grease.nu40.0, Toward::Up),
                nu(grease.nu40.1, Toward::Down),
                self.vi
            ));
            lines.push(format!("thickener: {}", grease.thickeners.join(" or ")));
            let (cold, hot) = grease.fit_for;
            let fit = [
                cold.map(|t| format!("from {}", degrees(t))),
                hot.map(|t| format!("to {}", degrees(t))),
            ];
            let fit: Vec<String> = fit.into_iter().flatten().collect();
            if !fit.is_empty() {
                lines.push(format!("fit for use {}", fit.join(" ")));
            }
        }
        lines.extend(
            self.pour
                .map(|p| format!("pour point at most {}", degrees(p))),
        );
        lines.extend(self.cold.map(|(t, eta)| {
            let most = crate::quantity::DynamicViscosity::from_base(eta).amount();
            format!(
                "viscosity measured at {} (ASTM D2983) at most {}",
                degrees(t),
                quantity(most, Units::Si, Toward::Down)
            )
        }));
        lines.extend(self.loss.map(|loss| {
            if loss > 0.0 {
                format!(
                    "permanent shear loss at most {:.0} % of the viscosity at 100 degC, {shear_test}; or no polymer thickener",
                    loss * 100.0
                )
            } else {
                "no polymer thickener".to_owned()
            }
        }));
        lines.push(format!(
            "base: {} or one at least its equal in index and pour point",
            self.base.word()
        ));
        lines.extend(self.contents.lines());
        lines
    }
}
