//! Findings about the cold end.

use super::{Finding, finding};
use crate::model::Oil;
use crate::model::rulebook::Rulebook;
use crate::oil::cold::{ColdPoint, Used};
use crate::oil::curves::Curves;
use crate::quantity::Measure;
use crate::quantity::show::{Toward, Units, quantity, significant};
use crate::relation::oil::sae_engine::yield_limit;

/// A measured viscosity further than this from the line is a finding; the reproducibility of the
/// low-shear test is about 10 to 20 % (from memory).
const DISAGREES: f64 = 0.2;

pub(super) fn findings(found: &mut Vec<Finding>, oil: &Oil, curves: &Curves, rules: &Rulebook) {
    for p in &curves.cold_points {
        one(found, p);
    }
    yields(found, oil);
    gelling(found, oil, curves, rules);
}

/// An oil that yields does not flow to a pump by itself, whatever its viscosity.
fn yields(found: &mut Vec<Finding>, oil: &Oil) {
    let Some(given) = &oil.yield_stress else {
        return;
    };
    let (stress, at) = given.value;
    if stress < yield_limit() {
        return;
    }
    let at = quantity(at.amount(), Units::Si, Toward::Nearest);
    let pascals = significant(stress.base(), 2, Toward::Up);
    found.push(finding(
        "yields-cold",
        format!(
            "a yield stress of {pascals} Pa at {at} was measured: the oil does not flow to a pump \
             by itself there, whatever its viscosity says"
        ),
        "keep the start warmer than that, or take another oil",
    ));
}

fn one(found: &mut Vec<Finding>, p: &ColdPoint) {
    let shown = |base: f64, like: crate::quantity::KinematicViscosity| {
        let amount = crate::quantity::Amount {
            base,
            ..like.amount()
        };
        quantity(amount, Units::Si, Toward::Nearest)
    };
    let at = quantity(p.at.amount(), Units::Si, Toward::Nearest);
    let (measured, line) = (shown(p.nu.base(), p.nu), shown(p.line.base(), p.nu));
    let test = p.test.word();
    let ratio = p.nu.base() / p.line.base();
    match p.used {
        Used::Crosses => found.push(finding(
            "cold-points-cross",
            format!(
                "{measured} at {at} ({test}) does not fit the other points: the oil would thin as \
                 it cools, or two tests stand at one temperature; it is not used"
            ),
            "check value and temperature with the supplier",
        )),
        Used::Yes | Used::Within if (ratio - 1.0).abs() > DISAGREES => {
            let use_of = if p.used == Used::Yes {
                "the measured one is used and both are drawn"
            } else {
                "it is warmer than the coldest point stated, so the line is kept"
            };
            found.push(finding(
                "cold-disagrees",
                format!(
                    "at {at} {measured} was measured ({test}) and the line gives {line}, {}; {use_of}",
                    times(ratio)
                ),
                "wax, polymer or the glass region: do not carry the line below its points",
            ));
        }
        _ => {}
    }
}

/// A ratio in words: `2.4 times as thick`.
fn times(ratio: f64) -> String {
    if ratio >= 1.0 {
        format!("{ratio:.2} times as thick")
    } else {
        format!("{:.2} times as thin", 1.0 / ratio)
    }
}

/// A waxy oil that stands cold may gel, whatever its viscosity says.
fn gelling(found: &mut Vec<Finding>, oil: &Oil, curves: &Curves, rules: &Rulebook) {
    let waxy = rules.base_stock(curves.base).is_some_and(|s| s.wax_bearing);
    if !waxy || !oil.mrv.is_empty() || oil.yield_stress.is_some() {
        return;
    }
    let cloud = oil.cloud_point.as_ref().map(|c| c.value.figure());
    let pour = oil.pour_point.as_ref().map(|p| p.value.figure());
    let (Some(from), what) = (
        cloud.or(pour),
        if cloud.is_some() { "cloud" } else { "pour" },
    ) else {
        return;
    };
    let from = quantity(from.amount(), Units::Si, Toward::Nearest);
    found.push(finding(
        "may-gel",
        format!(
            "a wax-bearing oil that stands for days near or below its {what} point ({from}) may \
             gel: it then has a yield stress no viscosity shows, and the quick cooling of the pour \
             point test misses it"
        ),
        "where it stands cold, ask for the yield stress after slow cooling (ASTM D4684)",
    ));
}
