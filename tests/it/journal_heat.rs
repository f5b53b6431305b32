//! Heat balances of journal bearings at random.

#![expect(clippy::print_stdout, reason = "the worst row is worth reading")]

use crate::chance::Chance;
use filmwright::quantity::convert::{celsius, dynamic, mm, mm2_s, rpm, to_celsius};
use filmwright::quantity::{
    Area, DynamicViscosity, Force, HeatTransfer, MassDensity, Measure, ThermodynamicTemperature,
};
use filmwright::relation::journal::feed::{Coolant, Feed};
use filmwright::relation::journal::film::Bearing;
use filmwright::relation::journal::heat::{Cooling, settled};
use filmwright::relation::journal::viscosity::needed;
use filmwright::relation::journal::{Duty, Geometry, Route};
use filmwright::relation::oil::viscosity_temperature::{Line, Point, ViscosityCurve};
use rayon::prelude::*;
use std::collections::BTreeMap;

/// A bearing, what cools it and what lubricates it, drawn wide: some cannot run.
struct Case {
    geometry: Geometry,
    duty: Duty,
    cooling: Cooling,
    line: Line,
}

fn drawn(chance: &mut Chance) -> Case {
    let diameter = chance.spread(20.0, 800.0);
    let width = diameter * chance.between(0.1, 2.0);
    let clearance = diameter / 2.0 * chance.between(0.0006, 0.003);
    let geometry =
        Geometry::new(mm(diameter), mm(width), mm(clearance)).expect("drawn within its bounds");
    let load = chance.spread(0.05, 6.0) * 1e6 * geometry.projected_area().base();
    let duty = Duty::new(Force::from_base(load), rpm(chance.spread(20.0, 6000.0)))
        .expect("drawn within its bounds");
    let start = celsius(chance.between(-10.0, 60.0));
    let cooling = if chance.between(0.0, 1.0) < 0.5 {
        Cooling::Oil {
            inlet: start,
            feed: Feed::Drawn,
            coolant: Coolant::iso7902(),
        }
    } else {
        Cooling::Air {
            ambient: start,
            area: Area::from_base(geometry.projected_area().base() * chance.between(8.0, 40.0)),
            transfer: HeatTransfer::from_base(chance.between(12.0, 40.0)),
        }
    };
    let cold = chance.spread(10.0, 680.0);
    let hot = chance.between(0.28, 0.42);
    let warm = libm::pow(cold, 2.0 * hot) * 0.9;
    let point = |t: f64, nu: f64| Point {
        at: celsius(t),
        nu: mm2_s(nu),
    };
    let line = Line::through(point(40.0, cold), point(100.0, warm.min(cold * 0.4)))
        .expect("drawn within its bounds");
    Case {
        geometry,
        duty,
        cooling,
        line,
    }
}

fn eta(line: &Line, at: ThermodynamicTemperature) -> DynamicViscosity {
    dynamic(line.nu_at(at), MassDensity::from_base(870.0))
}

/// Every one of ten thousand bearings settles, or says why not; and those that settle do so at
/// the only temperature where losses and cooling agree.
#[test]
fn ten_thousand_bearings_settle_or_say_why_not() {
    let mut chance = Chance::seeded(19_041_886);
    let cases: Vec<Case> = (0..10_000).map(|_| drawn(&mut chance)).collect();
    let outcomes: Vec<Result<f64, (&'static str, String)>> = cases
        .par_iter()
        .map(|case| {
            let bearing = Bearing::new(case.geometry, case.duty, Route::Reynolds).unwrap();
            let found = settled(&bearing, &case.cooling, |t| eta(&case.line, t));
            let settled = found.map_err(|e| (e.name(), e.to_string()))?;
            let left = settled.unbalanced.base() / settled.film.power.base();
            assert!(settled.film.eccentricity.base() <= 0.97);
            assert!(to_celsius(settled.t_effective) <= 250.0);
            Ok(left.abs())
        })
        .collect();
    let mut reasons: BTreeMap<&str, (usize, &str)> = BTreeMap::new();
    let mut worst = 0.0_f64;
    for outcome in &outcomes {
        match outcome {
            Ok(left) => worst = worst.max(*left),
            Err((name, words)) => reasons.entry(*name).or_insert((0, words)).0 += 1,
        }
    }
    let without: usize = reasons.values().map(|(count, _)| count).sum();
    println!(
        "settled: {}, worst imbalance {worst:.1e}",
        outcomes.len() - without
    );
    println!("not settled: {reasons:#?}");
    assert!(worst < 1e-6, "imbalance {worst}");
    let known = ["film-too-thin", "heat-not-removed"];
    assert!(
        reasons.keys().all(|name| known.contains(name)),
        "{reasons:?}"
    );
    assert!(without < outcomes.len() / 2, "{reasons:?}");
}

/// Losses less cooling change sign once between the coldest and the hottest film.
#[test]
fn a_balance_is_the_only_one() {
    let mut chance = Chance::seeded(7_902);
    let mut looked_at = 0;
    for _ in 0..60 {
        let case = drawn(&mut chance);
        let bearing = Bearing::new(case.geometry, case.duty, Route::Reynolds).unwrap();
        let Ok(found) = settled(&bearing, &case.cooling, |t| eta(&case.line, t)) else {
            continue;
        };
        looked_at += 1;
        for step in 1..40 {
            let t = celsius(-9.0 + 6.4 * f64::from(step));
            let Ok(film) = bearing.film(eta(&case.line, t)) else {
                continue;
            };
            let removed = match case.cooling {
                Cooling::Oil { inlet, coolant, .. } => {
                    let heat = coolant.density.base() * coolant.specific_heat.base();
                    heat * film.side_flow.base() * 2.0 * (t.base() - inlet.base())
                }
                Cooling::Air {
                    ambient,
                    area,
                    transfer,
                } => area.base() * transfer.base() * (t.base() - ambient.base()),
            };
            let warmer = t.base() > found.t_effective.base();
            assert_eq!(removed > film.power.base(), warmer, "{t:?}");
        }
    }
    assert!(looked_at > 20, "{looked_at}");
}

/// The viscosity that a film's thickness needs is the one the film was worked out with.
#[test]
fn viscosity_and_film_undo_each_other() {
    let mut chance = Chance::seeded(1_958);
    let mut looked_at = 0;
    for _ in 0..300 {
        let case = drawn(&mut chance);
        let ratio = case.geometry.width_ratio().base();
        for route in [Route::Reynolds, Route::Iso7902] {
            let Ok(bearing) = Bearing::new(case.geometry, case.duty, route) else {
                assert!(!(0.25..=1.0).contains(&ratio), "{ratio}");
                continue;
            };
            let eta = DynamicViscosity::from_base(chance.spread(0.003, 0.6));
            let Ok(film) = bearing.film(eta) else {
                continue;
            };
            // close to the middle the film hardly changes with viscosity
            if film.eccentricity.base() < 0.01 {
                continue;
            }
            looked_at += 1;
            let again = needed(case.geometry, case.duty, film.h_min, route);
            let again = again.expect("a film there is");
            assert!((again.base() / eta.base() - 1.0).abs() < 1e-9, "{film:?}");
        }
    }
    assert!(looked_at > 250, "{looked_at}");
}
