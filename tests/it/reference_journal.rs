//! Published and computed values of journal bearings and thrust pads.
//!
//! `tests/reference/film_checks.json` names source and tolerance of every case;
//! `tests/reference/journal_table.csv` is a table computed with another solver on 480 by 40 and
//! finer grids, good to 0.1 to 0.3 %.

#![expect(clippy::print_stdout, reason = "the worst row is worth reading")]

use filmwright::quantity::convert::{
    celsius, dynamic, mm, mm2_s, number, pascals, rpm, to_celsius, to_rpm, to_um,
};
use filmwright::quantity::{DynamicViscosity, Force, Length, MassDensity, Measure, Velocity};
use filmwright::relation::journal::characteristic::{Characteristic, sommerfeld};
use filmwright::relation::journal::feed::{Coolant, Feed};
use filmwright::relation::journal::film::Bearing;
use filmwright::relation::journal::heat::{self, Cooling};
use filmwright::relation::journal::limits::{least_film, load};
use filmwright::relation::journal::table::Cut;
use filmwright::relation::journal::temperature_rise::{Fitted, fitted};
use filmwright::relation::journal::{
    Duty, Geometry, Route, iso7902, long, petroff, short, transition, viscosity,
};
use filmwright::relation::oil::density_iso15144;
use filmwright::relation::oil::viscosity_temperature::{Line, Point};
use filmwright::relation::oil_fits;
use filmwright::relation::thrust::pad::Pad;
use filmwright::relation::thrust::shape::Shape;
use filmwright::relation::thrust::{series, slider};
use serde_json::Value;
use std::collections::BTreeMap;

const CHECKS: &str = include_str!("../reference/film_checks.json");
const PUBLISHED: &str = include_str!("../reference/raimondi_boyd.csv");
const OTHER_SOLVER: &str = include_str!("../reference/journal_table.csv");

type Results = BTreeMap<&'static str, f64>;

/// Inputs of a case.
struct Inputs<'a>(&'a Value);

impl Inputs<'_> {
    fn of(&self, key: &str) -> f64 {
        let found = self.0[key].as_f64();
        found.unwrap_or_else(|| panic!("{key} in {}", self.0))
    }

    fn length(&self, key: &str) -> Length {
        Length::from_base(self.of(key))
    }

    fn eta(&self) -> DynamicViscosity {
        DynamicViscosity::from_base(self.of("eta_Pas"))
    }

    fn load(&self) -> Force {
        Force::from_base(self.of("F_N"))
    }

    /// Diameter, width and clearance, the last radial or relative.
    fn bearing(&self) -> (Geometry, Duty) {
        let (diameter, width) = (self.length("D_m"), self.length("B_m"));
        let clearance = match self.0["psi"].as_f64() {
            Some(psi) => Length::from_base(psi * diameter.base() / 2.0),
            None => self.length("c_m"),
        };
        let geometry = Geometry::new(diameter, width, clearance).expect("sound sizes");
        let duty = Duty::new(self.load(), rpm(self.of("n_rpm"))).expect("sound duty");
        (geometry, duty)
    }

    fn pad(&self) -> (Pad, Shape) {
        let sizes = (self.length("B_m"), self.length("L_m"));
        let load = Force::from_base(self.of("W_N"));
        let speed = Velocity::from_base(self.of("U_m_s"));
        let pad = Pad::new(sizes.0, sizes.1, load, speed).expect("sound pad");
        (pad, Shape::Ratio(number(self.of("m"))))
    }
}

fn journal(c: &Characteristic) -> Results {
    BTreeMap::from([
        ("eps", c.eccentricity.base()),
        ("h0_over_c", 1.0 - c.eccentricity.base()),
        ("S", c.sommerfeld().base()),
        ("So", c.so.base()),
        ("phi_deg", c.attitude.base().to_degrees()),
        ("rc_f", c.friction_variable().base()),
        ("Q", c.flow.base()),
        ("Qs_over_Q", c.side_share.base()),
        ("P_over_pmax", c.mean_over_peak.base()),
    ])
}

fn cut(width_ratio: f64) -> Cut {
    Cut::at(number(width_ratio)).expect("a width ratio of the table")
}

fn settled(i: &Inputs) -> Results {
    let (geometry, duty) = i.bearing();
    let point = |t: f64, key: &str| Point {
        at: celsius(t),
        nu: mm2_s(i.of(key)),
    };
    let line = Line::through(point(40.0, "nu40_mm2s"), point(100.0, "nu100_mm2s"));
    let line = line.expect("two sound points");
    let rho15 = MassDensity::from_base(i.of("rho15"));
    assert_eq!(i.0["mode"], "circulation");
    let cooling = Cooling::Oil {
        inlet: celsius(i.of("T_in_C")),
        feed: Feed::Drawn,
        coolant: Coolant::iso7902(),
    };
    let bearing = Bearing::new(geometry, duty, Route::Iso7902).expect("a ratio of the standard");
    let found = heat::settled(&bearing, &cooling, |t| {
        dynamic(line.nu_at(t), density_iso15144::density(rho15, t))
    });
    let found = found.expect("a balance");
    let (outlet, flow) = found.outlet.expect("cooled by oil");
    let speed = duty.surface_speed(&geometry);
    let limit = least_film::iso7902(geometry.diameter(), speed).expect("a diameter of the table");
    BTreeMap::from([
        ("T_eff_C", to_celsius(found.t_effective)),
        ("T_ex_C", to_celsius(outlet)),
        ("eta_Pas", found.eta.base()),
        ("So", found.film.so.base()),
        ("eps", found.film.eccentricity.base()),
        ("hmin_um", to_um(found.film.h_min)),
        ("P_f_W", found.film.power.base()),
        ("Q3_l_min", flow.base() * 6e4),
        ("U_m_s", speed.base()),
        ("h_lim_um", to_um(limit)),
    ])
}

fn load_limits() -> Results {
    let names = ["PbSn_alloys", "CuPb", "CuSn", "AlSn", "AlZn"];
    let mut results = BTreeMap::new();
    for (name, lining) in names.into_iter().zip(load::Lining::ALL) {
        let (general, special) = load::permissible(lining);
        // two limits in one number: general and special, N/mm2
        results.insert(name, (general.base() * 1e3 + special.base()) / 1e6);
    }
    results
}

fn pads(oracle: &str, i: &Inputs) -> Results {
    match oracle {
        "const" => {
            let (m, load) = slider::optimum();
            BTreeMap::from([("m", m.base()), ("W_star", load.base())])
        }
        "slider_inf" => {
            let s = slider::slider(number(i.of("m"))).expect("a ratio above one");
            BTreeMap::from([
                ("W_star", s.load.base()),
                ("F_star", s.friction.base()),
                ("q_star", s.flow.base()),
                ("xc_from_inlet", s.centre.base()),
                ("pmax_star", s.peak.base()),
            ])
        }
        "slider_fin" => {
            let m = number(i.of("m"));
            let s = series::pad(m, number(i.of("L_over_B"))).expect("a pad of the range");
            let endless = slider::slider(m).expect("a ratio above one");
            BTreeMap::from([
                ("W_star", s.load.base()),
                ("F_star", s.friction.base()),
                ("xc_from_inlet", s.centre.base()),
                ("side_factor", s.load.base() / endless.load.base()),
            ])
        }
        "pivot" => {
            let m = slider::ratio_from_pivot(number(i.of("xc_from_inlet")));
            BTreeMap::from([("m", m.expect("a pivot behind the middle").base())])
        }
        "pad" => {
            let (pad, shape) = i.pad();
            let film = pad.film(shape, i.eta()).expect("a film");
            BTreeMap::from([
                ("W_star", film.numbers.load.base()),
                ("hmin_um", to_um(film.h_out)),
            ])
        }
        "pad_eta" => {
            let (pad, shape) = i.pad();
            let eta = pad
                .viscosity(shape, mm(i.of("hmin_um") / 1e3))
                .expect("a viscosity");
            BTreeMap::from([("eta_required_Pas", eta.base())])
        }
        other => panic!("no such evaluation: {other}"),
    }
}

fn journals(oracle: &str, i: &Inputs) -> Results {
    match oracle {
        "journal_rb_rowcalc" => {
            let (geometry, duty) = i.bearing();
            let eta = viscosity::from_sommerfeld(&geometry, &duty, number(i.of("S")));
            BTreeMap::from([("eta_Pas", eta.base())])
        }
        "journal" => {
            let e = number(i.of("eps"));
            let found = match i.0["L_over_D"].as_f64() {
                Some(ratio) => cut(ratio).characteristic(e).expect("an eccentricity"),
                None => long::characteristic(e).expect("a rupture"),
            };
            journal(&found)
        }
        "journal_from_S" => {
            let so = sommerfeld(number(i.of("S")));
            journal(&cut(i.of("L_over_D")).carrying(so).expect("a film"))
        }
        "short_bearing" => {
            let so = short::load_number(number(i.of("eps")), number(i.of("L_over_D")));
            BTreeMap::from([("S", sommerfeld(so).base())])
        }
        "iso7902" => {
            let (e, b) = (number(i.of("eps")), number(i.of("B_over_D")));
            BTreeMap::from([
                ("So", iso7902::load_number(e, b).base()),
                ("beta_deg", iso7902::attitude(e, b).base().to_degrees()),
                ("f_over_psi", iso7902::friction_variable(e, b).base()),
                ("q3", iso7902::side_flow(e, b).base()),
            ])
        }
        "iso7902_inverse" => {
            let e = iso7902::carrying(number(i.of("So")), number(i.of("B_over_D")));
            BTreeMap::from([("eps", e.expect("a film").base())])
        }
        "journal_heat" => settled(i),
        "journal_eta" => {
            let (geometry, duty) = i.bearing();
            let film = mm(i.of("hmin_um") / 1e3);
            let eta = |route| viscosity::needed(geometry, duty, film, route).expect("a film");
            BTreeMap::from([
                ("P_MPa", duty.specific_load(&geometry).base() / 1e6),
                ("eps", viscosity::eccentricity_for(&geometry, film).base()),
                ("eta_iso_Pas", eta(Route::Iso7902).base()),
                ("eta_numeric_Pas", eta(Route::Reynolds).base()),
            ])
        }
        _ => rules(oracle, i),
    }
}

fn rules(oracle: &str, i: &Inputs) -> Results {
    match oracle {
        "h_lim" => {
            let diameter = mm(i.of("D_mm"));
            let film = least_film::iso7902(diameter, Velocity::from_base(i.of("U_m_s")));
            BTreeMap::from([("h_lim_um", to_um(film.expect("a diameter of the table")))])
        }
        "trumpler" => {
            let film = least_film::trumpler(mm(i.of("d_mm")));
            BTreeMap::from([("h0_min_mm", film.base() * 1e3)])
        }
        "dT_poly" => {
            let width = match i.of("L_over_D") {
                r if r > 0.75 => Fitted::One,
                r if r > 0.3 => Fitted::Half,
                _ => Fitted::Quarter,
            };
            let rise = fitted(pascals(i.of("P_MPa") * 1e6), number(i.of("S")), width);
            BTreeMap::from([("dT_K", rise.base())])
        }
        "vogelpohl" => {
            let volume = transition::volume(i.length("D_m"), i.length("B_m"));
            let speed = transition::speed(i.load(), i.eta(), volume, number(1.0));
            BTreeMap::from([("n_tr_rpm", to_rpm(speed.expect("sound inputs")))])
        }
        "petroff" => {
            let diameter = Length::from_base(2.0 * i.of("r_m"));
            let geometry = Geometry::new(diameter, i.length("L_m"), i.length("c_m"));
            let geometry = geometry.expect("sound sizes");
            let speed = rpm(i.of("n_rpm"));
            BTreeMap::from([
                (
                    "torque_Nm",
                    petroff::torque(&geometry, speed, i.eta()).base(),
                ),
                ("P_W", petroff::power(&geometry, speed, i.eta()).base()),
            ])
        }
        "sae_visc" => sae(i),
        other => panic!("no such evaluation: {other}"),
    }
}

fn sae(i: &Inputs) -> Results {
    let at = celsius(i.of("t_C"));
    let grade = i.0["grade"].as_u64().and_then(|g| u32::try_from(g).ok());
    let eta = oil_fits::sae_viscosity(grade.expect("a grade"), at).expect("a fitted grade");
    BTreeMap::from([("eta_Pas", eta.base())])
}

/// Allowed error of one expected value.
fn tolerance(case: &Value, key: &str) -> f64 {
    match &case["tolerance"] {
        Value::Object(each) => {
            let own = each.get(key).or_else(|| each.get("rel"));
            own.and_then(Value::as_f64)
                .expect("a tolerance for the key")
        }
        all => all.as_f64().expect("a tolerance"),
    }
}

fn expected(value: &Value) -> f64 {
    match value {
        // a pair of limits, as `load_limits` packs them
        Value::Array(pair) => {
            let limit = |i: usize| pair[i].as_f64().expect("a number");
            limit(0) * 1e3 + limit(1)
        }
        number => number.as_f64().expect("a number"),
    }
}

#[test]
fn every_published_case_is_met() {
    let checks: Value = serde_json::from_str(CHECKS).unwrap();
    let mut worst: BTreeMap<String, (f64, String)> = BTreeMap::new();
    let mut run = 0;
    for case in checks["cases"].as_array().unwrap() {
        let id = case["id"].as_str().unwrap();
        let inputs = Inputs(&case["inputs"]);
        let results = match case["oracle"].as_str() {
            Some(oracle) if id.starts_with("jb-") => journals(oracle, &inputs),
            Some(oracle) if id.starts_with("th-") => pads(oracle, &inputs),
            None if id == "jb-96-iso7902-3-load" => load_limits(),
            _ => continue,
        };
        run += 1;
        for (key, want) in case["expect"].as_object().unwrap() {
            let got = results
                .get(key.as_str())
                .unwrap_or_else(|| panic!("{id}: {key}"));
            let want = expected(want);
            let error = (got / want - 1.0).abs();
            let allowed = tolerance(case, key);
            assert!(
                error <= allowed.max(1e-12),
                "{id}: {key} is {got}, not {want}"
            );
            let topic = case["topic"].as_str().unwrap().to_owned();
            let share = error / allowed.max(1e-12);
            let row = worst.entry(topic).or_insert((0.0, String::new()));
            if share >= row.0 {
                *row = (share, format!("{id} {key}: {error:.1e} of {allowed}"));
            }
        }
    }
    let there = checks["cases"].as_array().unwrap().iter();
    let ids = there.map(|c| c["id"].as_str().unwrap());
    assert_eq!(
        run,
        ids.filter(|i| i.starts_with("jb-") || i.starts_with("th-"))
            .count()
    );
    println!("{run} cases; nearest to its tolerance in each topic: {worst:#?}");
}

/// Rows of numbers under a heading; lines that begin with `#` are remarks.
fn rows(text: &str) -> Vec<Vec<f64>> {
    let lines = text.lines().filter(|l| !l.starts_with('#')).skip(1);
    let row = |line: &str| {
        line.split(',')
            .map(|n| n.parse().expect("a number"))
            .collect()
    };
    lines.map(row).collect()
}

/// Largest relative error of every column over rows, each held to its tolerance.
fn compare(text: &str, tolerances: &[f64], row: impl Fn(&[f64]) -> Vec<f64>) -> Vec<f64> {
    let mut worst = vec![0.0_f64; tolerances.len()];
    for expected in rows(text) {
        let got = row(&expected);
        for (column, (got, allowed)) in got.iter().zip(tolerances).enumerate() {
            let want = expected[2 + column];
            // a share that is zero must be met as zero
            let error = (got - want).abs() / if want == 0.0 { 1.0 } else { want.abs() };
            assert!(error <= *allowed, "{expected:?}, column {column}: {got}");
            worst[column] = worst[column].max(error);
        }
    }
    worst
}

#[test]
fn the_rows_of_raimondi_and_boyd_are_met() {
    // S, attitude, friction variable, flow, side share, mean over peak pressure
    let tolerances = [0.035, 0.02, 0.035, 0.06, 0.05, 0.065];
    let worst = compare(PUBLISHED, &tolerances, |row| {
        let e = number(row[1]);
        let c = if row[0].is_infinite() {
            long::characteristic(e).expect("a rupture")
        } else {
            cut(row[0]).characteristic(e).expect("an eccentricity")
        };
        vec![
            c.sommerfeld().base(),
            c.attitude.base().to_degrees(),
            c.friction_variable().base(),
            c.flow.base(),
            c.side_share.base(),
            c.mean_over_peak.base(),
        ]
    });
    println!("worst against Raimondi and Boyd: {worst:.4?}");
}

#[test]
fn another_solver_agrees() {
    // h0/c, S, So, attitude, friction variable, flow, side share, mean over peak pressure, place
    // of the peak, place of rupture
    let tolerances = [
        1e-9, 0.004, 0.004, 0.002, 0.004, 0.003, 0.02, 0.004, 0.004, 0.006,
    ];
    let worst = compare(OTHER_SOLVER, &tolerances, |row| {
        let c = cut(row[0])
            .characteristic(number(row[1]))
            .expect("an eccentricity");
        vec![
            1.0 - row[1],
            c.sommerfeld().base(),
            c.so.base(),
            c.attitude.base().to_degrees(),
            c.friction_variable().base(),
            c.flow.base(),
            c.side_share.base(),
            c.mean_over_peak.base(),
            c.peak_at.base().to_degrees(),
            c.rupture_at.base().to_degrees(),
        ]
    });
    println!("worst against the other solver: {worst:.5?}");
}
