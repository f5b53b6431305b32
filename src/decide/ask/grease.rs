//! The grease to ask for: base oil and thickener that keep every limit of a grease point.
//!
//! Solved for, like an oil: the plainest base that can do it, with each thickener of the rules the
//! least index at which some base oil holds, and the range of base oils that then hold. The range
//! of a motor bearing is narrower than a grade, so the viscosity is asked for by the certificate of
//! the batch. Of the thickeners the one with the fewest conditions is taken; those that do as well
//! over the same range are named beside it. Consistency and amount are findings about the bearing,
//! not limits, and stand with its needs.

use super::contents::{self, Contents};
use super::trial::Trial;
use super::{GreaseAsked, LEAST_INDEX, Specification};
use crate::demand::End;
use crate::judge::Verdict;
use crate::model::rulebook::grease::Thickener;
use crate::numeric::math::{exp, ln};
use crate::quantity::Measure;
use crate::relation::oil::base_stock::BaseStock;
use crate::weighing::{Scales, Weighed};

/// Base oils tried, the plainest first, with the greatest index they reach.
const BASES: [(BaseStock, f64); 3] = [
    (BaseStock::MineralI, 105.0),
    (BaseStock::MineralII, 120.0),
    (BaseStock::Pao, 180.0),
];
/// Thinnest base oil tried, m²/s at 40 degC.
const THIN: f64 = 10e-6;
/// How many are tried above it.
const TRIED: u32 = 160;
/// Each is so many times the one before: a twelfth of a VG step.
const TIMES: f64 = 1.0325;

/// One thickener that does.
struct Able<'a> {
    thickener: &'a Thickener,
    contents: Contents,
    vi: f64,
    nu40: (f64, f64),
}

/// The grease to ask for; none where no thickener on none of the bases holds.
pub(super) fn ask(scales: &Scales<'_>, weighed: &Weighed<'_>) -> Option<Specification> {
    BASES
        .into_iter()
        .find_map(|(base, index)| on_base(scales, weighed, base, index))
}

fn on_base(
    scales: &Scales<'_>,
    weighed: &Weighed<'_>,
    base: BaseStock,
    index: f64,
) -> Option<Specification> {
    let able = able(scales, weighed, base, index);
    // conditions first; of equals the least index, and the first of the rules
    let conditions = |x: &Able<'_>| x.contents.conditions.len();
    let best = able.iter().min_by(|a, b| {
        let order = conditions(a).cmp(&conditions(b));
        order.then_with(|| a.vi.total_cmp(&b.vi))
    })?;
    let trial = Trial::new(scales, weighed, base, &best.contents, false);
    let (low, high) = best.nu40;
    let judgement = trial.weigh_base_oil((low * high).sqrt(), best.vi)?;
    let as_well = able.iter().filter(|other| {
        let trial = Trial::new(scales, weighed, base, &other.contents, false);
        other.thickener.id != best.thickener.id
            && conditions(other) <= conditions(best)
            && holds(&trial, low, best.vi)
            && holds(&trial, high, best.vi)
    });
    let thickeners = std::iter::once(best).chain(as_well);
    Some(Specification {
        base,
        grade: None,
        vi: best.vi,
        pour: None,
        loss: None,
        cold: None,
        severe: trial.severe(),
        grease: Some(GreaseAsked {
            thickeners: thickeners.map(|a| a.thickener.name.clone()).collect(),
            nu40: best.nu40,
            fit_for: fit_for(weighed),
        }),
        contents: best.contents.clone(),
        judgement,
    })
}

/// The thickeners with which some oil of a base holds.
fn able<'a>(
    scales: &Scales<'a>,
    weighed: &Weighed<'_>,
    base: BaseStock,
    index: f64,
) -> Vec<Able<'a>> {
    let all = scales.rules.thickeners.iter();
    all.filter_map(|thickener| {
        let contents = contents::of(scales, weighed, base, Some(&thickener.id));
        if contents.barred {
            return None;
        }
        let trial = Trial::new(scales, weighed, base, &contents, false);
        let (vi, nu40) = least_index(&trial, index)?;
        Some(Able {
            thickener,
            contents,
            vi,
            nu40,
        })
    })
    .collect()
}

fn holds(trial: &Trial<'_, '_>, nu40: f64, vi: f64) -> bool {
    trial
        .weigh_base_oil(nu40, vi)
        .is_some_and(|j| j.verdict == Verdict::Holds)
}

/// The least whole index at which some base oil holds, with the range of those that do.
fn least_index(trial: &Trial<'_, '_>, most: f64) -> Option<(f64, (f64, f64))> {
    if let Some(found) = range(trial, LEAST_INDEX) {
        return Some((LEAST_INDEX, found));
    }
    let mut best = (most, range(trial, most)?);
    let mut low = LEAST_INDEX;
    while best.0 - low > 1.0 {
        let middle = f64::midpoint(low, best.0).floor();
        match range(trial, middle) {
            Some(found) => best = (middle, found),
            None => low = middle,
        }
    }
    Some(best)
}

/// Thinnest and thickest base oil that holds, m²/s at 40 degC; none where none tried does.
fn range(trial: &Trial<'_, '_>, vi: f64) -> Option<(f64, f64)> {
    let nu = |k: u32| THIN * exp(f64::from(k) * ln(TIMES));
    let does = |k: &u32| holds(trial, nu(*k), vi);
    let first = (0..=TRIED).find(does)?;
    let last = (first..=TRIED).take_while(does).last()?;
    let edge = |mut inside: f64, mut outside: f64| {
        for _ in 0..30 {
            let middle = f64::midpoint(inside, outside);
            if holds(trial, middle, vi) {
                inside = middle;
            } else {
                outside = middle;
            }
        }
        inside
    };
    let low = match first.checked_sub(1) {
        Some(below) => edge(nu(first), nu(below)),
        None => nu(first),
    };
    let high = if last < TRIED {
        edge(nu(last), nu(last + 1))
    } else {
        nu(last)
    };
    Some((low, high))
}

/// Coldest start and hottest running of the point and its parts, over all settings.
fn fit_for(weighed: &Weighed<'_>) -> (Option<f64>, Option<f64>) {
    let settings = || weighed.demands.settings.iter();
    let cold = settings().filter_map(|d| d.thermal.start_coldest.map(|k| k.value.base()));
    let sump = settings().filter_map(|d| d.thermal.hottest.map(|k| k.value.base()));
    let parts = settings().flat_map(|d| {
        let running = |end| matches!(end, End::HotFloor | End::OilCeiling);
        let limits = d.list.iter().filter(move |x| running(x.end));
        limits.filter_map(|x| d.governing_temperature(x))
    });
    (
        cold.min_by(f64::total_cmp),
        sump.chain(parts).max_by(f64::total_cmp),
    )
}
