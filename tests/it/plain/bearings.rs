//! Journal and thrust bearings: what they need, and what a settled bearing says of it.

use super::{demand, judged, near, needs, ran, step};
use crate::judging::{rules, site};
use filmwright::quantity::convert::{celsius, dynamic, mm, rpm, to_celsius, to_um};
use filmwright::quantity::{Force, Measure};
use filmwright::relation::journal::feed::{Coolant, Feed};
use filmwright::relation::journal::film::Bearing;
use filmwright::relation::journal::heat::{Cooling, settled};
use filmwright::relation::journal::{Duty, Geometry, Route};
use filmwright::relation::oil::viscosity_temperature::ViscosityCurve;
use filmwright::weighing::{Scales, Settings};

/// A journal bearing held at a temperature, its film at that of the sump.
fn journal(sizes: &str, rest: &str) -> String {
    format!(
        "  J:\n    ambient: 10 .. 30 degC\n    lubrication: ring\n    oil now: TU-46\n    sump: held at 50 degC\n    start: 20 degC\n    parts:\n      - journal bearing: end\n        {sizes}\n        feed: ring\n{rest}"
    )
    .replace("; ", "\n        ")
}

const HOUSE: &str = "house:\n  rules:\n    film:\n      replaces: journal-film\n      limit: film height >= HEIGHT um\n      source: design office\n";

/// Jindal, Machine Design, worked example 17-2: 6 kN on a 60 x 60 mm bearing with 40 um radial
/// clearance at 1260 r/min, S = 0.0446 (eccentricity 0.8, film 8 um): 6.293 mPa s.
#[test]
fn a_textbook_bearing_needs_the_viscosity_of_its_chart_reading() {
    let sizes =
        "diameter: 60 mm; width: 60 mm; radial clearance: 0.04 mm; speed: 1260 r/min; load: 6 kN";
    let machine = journal(sizes, "        rule: film\n");
    let found = needs(&HOUSE.replace("HEIGHT", "8"), &machine);
    near(step(&found, "eta_min"), 6.293, 0.015);
    assert_eq!(demand(&found, "film")["confidence"], "medium");
}

/// `film_checks.json`, jb-61: 40 kN on 200 x 150 mm, psi 1.6 per mille, 3000 r/min, film of 20 um:
/// 2.04682 mPa s by an independent solver, 2.0966 by the closed forms of ISO 7902-2 (from memory).
#[test]
fn the_turbine_bearing_needs_what_the_independent_solver_says() {
    let sizes = "diameter: 200 mm; width: 150 mm; radial clearance: 0.16 mm; speed: 3000 r/min; load: 40 kN";
    let machine = journal(sizes, "        rule: film\n");
    let found = needs(&HOUSE.replace("HEIGHT", "20"), &machine);
    near(step(&found, "eta_min"), 2.046_82, 0.01);
    near(step(&found, "eta_iso"), 2.0966, 0.001);
    // the specific load of the same case, 1.33333 MPa
    near(step(&found, "P"), 13.3333, 1e-4);
}

/// `h_lim` 14 um at 200 mm and 31.4 m/s (ISO 7902-3, from memory, `film_checks.json` jb-7); Trumpler's
/// 0.0002 in + 0.00004 D (from memory, jb-81), 13.08 um there; the greatest of them is asked for.
#[test]
fn the_greatest_film_is_asked_for() {
    let sizes = "diameter: 200 mm; width: 150 mm; radial clearance: 0.16 mm; speed: 3000 r/min; load: 40 kN";
    let found = needs("", &journal(sizes, ""));
    near(step(&found, "h_lim"), 0.014, 1e-9);
    near(step(&found, "h_T"), 0.013_08, 1e-6);
    near(step(&found, "h"), 0.014, 1e-9);
    let film = demand(&found, "journal-film");
    assert_eq!(film["says"], "film >= 14.0 um");
    assert_eq!(film["governs"], true);
    // n_tr = 42.44 r/min at 20 mPa s (film_checks.json jb-83): at 3000 r/min and twice n_tr
    // 20 x 2 x 42.4413/3000
    near(step(&found, "eta_tr"), 20.0 * 2.0 * 42.4413 / 3000.0, 0.001);
    // a small shaft: roughness or Trumpler above the 3 um of the table
    let small =
        "diameter: 50.8 mm; width: 40 mm; radial clearance: 0.04 mm; speed: 200 r/min; load: 1 kN";
    near(step(&needs("", &journal(small, "")), "h"), 0.007_112, 1e-4);
}

/// The floor is where it ought to be: a bearing settled with an oil at its own temperature keeps
/// the film just where the margin says so, and gets too hot just where the ceiling says so.
#[test]
fn a_settled_bearing_agrees_with_its_margins() {
    let rules = rules();
    let oils = super::oils();
    let mut looked_at = [0_usize; 2];
    for (d, b, c, n, load, inlet) in [
        (200.0, 150.0, 0.16, 3000.0, 40e3, 45.0),
        (100.0, 80.0, 0.08, 400.0, 14e3, 60.0),
        (160.0, 120.0, 0.12, 300.0, 60e3, 50.0),
        (60.0, 30.0, 0.05, 12000.0, 1.5e3, 40.0),
    ] {
        let machine = format!(
            "  J:\n    ambient: 10 .. 30 degC\n    lubrication: pressure-fed\n    sump: held at {inlet} degC\n    start: 20 degC\n    parts:\n      - journal bearing: end\n        diameter: {d} mm\n        width: {b} mm\n        radial clearance: {c} mm\n        speed: {n} r/min\n        load: {load} N\n        feed: pressure\n"
        );
        let text = format!("file: site 1\nmachines:\n{machine}");
        let site = site(&text, &oils, &rules);
        let scales = Scales::new(&site, &rules, Settings::default()).expect("curves");
        let weighed = scales.weigh(&site.points[0]);
        let geometry = Geometry::new(mm(d), mm(b), mm(c)).unwrap();
        let duty = Duty::new(Force::from_base(load), rpm(n)).unwrap();
        let bearing = Bearing::new(geometry, duty, Route::Reynolds).unwrap();
        let cooling = Cooling::Oil {
            inlet: celsius(inlet),
            feed: Feed::Drawn,
            coolant: Coolant::iso7902(),
        };
        let list = &weighed.demands.middle.list;
        let wanted = list
            .iter()
            .find_map(|d| match &d.limit {
                filmwright::demand::Limit::Film(film) => Some(to_um(film.wanted)),
                _ => None,
            })
            .expect("a film");
        for candidate in &weighed.candidates {
            let curves = &scales.oils[candidate.oil].curves;
            if curves.thickened {
                continue; // thinned for the time it is in the film
            }
            let eta = |t| dynamic(curves.new.nu_at(t), curves.density.at(t));
            let told = scales.explain(&weighed, candidate);
            let margin = |rule: &str| {
                let at = list.iter().position(|d| d.rule == rule)?;
                let found = told.margins.iter().find(|m| usize::from(m.demand) == at);
                found.map(|m| m.value)
            };
            let film = margin("journal-film").expect("a margin");
            match settled(&bearing, &cooling, eta) {
                Err(_) => assert!(film < 0.0, "{} {film}", curves.id),
                Ok(found) => {
                    looked_at[0] += 1;
                    let h = to_um(found.film.h_min);
                    assert_eq!(
                        film >= 0.0,
                        h >= wanted,
                        "{} {film} {h} {wanted}",
                        curves.id
                    );
                    let e = found.film.eccentricity.base();
                    let whirl = margin("journal-whirl").expect("a margin");
                    assert_eq!(whirl >= 0.0, e >= 0.5, "{} {whirl} {e}", curves.id);
                    let Some(hot) = margin("journal-temperature") else {
                        continue;
                    };
                    looked_at[1] += 1;
                    let outlet = to_celsius(found.outlet.expect("cooled by oil").0);
                    assert_eq!(hot >= 0.0, outlet <= 90.0, "{} {hot} {outlet}", curves.id);
                }
            }
        }
    }
    assert!(looked_at[0] > 20 && looked_at[1] > 12, "{looked_at:?}");
}

/// Too thick is a fault too: the ceilings fail an oil, or leave it open.
#[test]
fn too_thick_an_oil_does_not_hold() {
    let machine = "  J:\n    ambient: 10 .. 30 degC\n    lubrication: pressure-fed\n    oil now: TU-46\n    sump: held at 45 degC\n    start: 45 degC\n    parts:\n      - journal bearing: end\n        diameter: 200 mm\n        width: 150 mm\n        radial clearance: 0.16 mm\n        speed: 3000 r/min\n        load: 40 kN\n        feed: pressure\n";
    let found = ran("", machine, "weigh -f json -q").json();
    let thick = judged(&found, "TU-320");
    assert_eq!(thick["verdict"], "fails", "{thick}");
    assert!(
        thick["because"].to_string().contains("too thick"),
        "{thick}"
    );
    let usual = judged(&found, "TU-32");
    assert!(
        matches!(usual["verdict"].as_str(), Some("holds" | "tight")),
        "{usual}"
    );
    let needs = needs("", machine);
    for rule in ["journal-whirl", "journal-temperature"] {
        assert_eq!(demand(&needs, rule)["end"], "running ceiling");
        assert_eq!(demand(&needs, rule)["confidence"], "low");
    }
}

/// Fed with oil that follows the ambient, the bearing gets too hot above some ambient: at that end
/// of the band the oil settles just at the largest temperature.
#[test]
fn the_hot_end_of_the_band_is_where_the_bearing_gets_too_hot() {
    let machine = "  J:\n    ambient: 10 .. 30 degC\n    lubrication: pressure-fed\n    oil now: TU-100\n    sump rise: 20 K\n    parts:\n      - journal bearing: end\n        diameter: 200 mm\n        width: 150 mm\n        radial clearance: 0.16 mm\n        speed: 3000 r/min\n        load: 40 kN\n        feed: pressure\n";
    let found = ran("", machine, "weigh -f json -q").json();
    let high = judged(&found, "TU-100")["band"]["high"]["value"].as_f64();
    let high = high.expect("a hot end");
    let geometry = Geometry::new(mm(200.0), mm(150.0), mm(0.16)).unwrap();
    let duty = Duty::new(Force::from_base(40e3), rpm(3000.0)).unwrap();
    let bearing = Bearing::new(geometry, duty, Route::Reynolds).unwrap();
    let text = format!("file: site 1\nmachines:\n{machine}");
    let (rules, oils) = (rules(), super::oils());
    let site = site(&text, &oils, &rules);
    let scales = Scales::new(&site, &rules, Settings::default()).expect("curves");
    let at = site
        .oils
        .iter()
        .position(|o| o.id == "TU-100")
        .expect("listed");
    let curves = &scales.oils[at].curves;
    let cooling = Cooling::Oil {
        inlet: celsius(high + 20.0),
        feed: Feed::Drawn,
        coolant: Coolant::iso7902(),
    };
    let eta = |t| dynamic(curves.new.nu_at(t), curves.density.at(t));
    let settled = settled(&bearing, &cooling, eta).expect("a film");
    let outlet = to_celsius(settled.outlet.expect("cooled by oil").0);
    assert!((outlet - 90.0).abs() < 0.01, "{high} {outlet}");
}

/// Temporary shear counts in the film of a journal and is a step; without polymer nothing is lost.
#[test]
fn a_thickened_oil_needs_more_at_rest() {
    let sizes = "diameter: 200 mm; width: 150 mm; radial clearance: 0.16 mm; speed: 3000 r/min; load: 40 kN";
    let machine = journal(sizes, "");
    let found = ran("", &machine, "weigh -f json -q").json();
    let kept = |oil: &str| {
        let steps = judged(&found, oil)["steps"]
            .as_array()
            .expect("steps")
            .clone();
        steps.into_iter().find(|s| s["symbol"] == "kept")
    };
    let share = kept("HV-46").expect("a step")["result"]["value"].as_f64();
    assert!(share.is_some_and(|s| s > 0.3 && s < 1.0), "{share:?}");
    assert!(kept("TU-46").is_none());
}

/// `film_checks.json`, th-2-fin-m2-LB1: W* = 0.0692519 for a square pad at ratio 2. By hand for 8
/// pads of 60 x 60 mm under 60 kN at 1000 r/min on 250 mm: W = 7500 N, U = 13.090 m/s,
/// eta = 7500 (10e-6)^2/(0.0692519 13.090 0.06^2 0.06) = 3.830 mPa s.
#[test]
fn a_pad_needs_what_its_load_number_says() {
    let machine = "  T:\n    ambient: 10 .. 30 degC\n    lubrication: bath\n    sump: held at 50 degC\n    start: 20 degC\n    parts:\n      - thrust bearing: upper\n        pads: 8\n        pad length: 60 mm\n        pad width: 60 mm\n        mean diameter: 250 mm\n        speed: 1000 r/min\n        load: 60 kN\n        type: fixed\n        ratio: 2\n";
    let found = needs("", machine);
    near(step(&found, "eta_min"), 3.830, 0.005);
    let film = demand(&found, "thrust-film");
    assert_eq!(
        (&film["end"], &film["governs"]),
        (&"hot floor".into(), &true.into())
    );
    // 7500 N on 36 cm2
    near(step(&found, "p"), 20.8333, 1e-4);
    // a large bearing is asked more
    let large = machine.replace("250 mm", "800 mm");
    assert_eq!(
        demand(&needs("", &large), "thrust-film")["says"],
        "film >= 25.0 um at the outlet of the pad (large pads)"
    );
}

/// Missing data are gaps with a range, and leave the word open only where it matters.
#[test]
fn what_is_missing_is_a_gap_with_a_range() {
    let machine = journal("diameter: 100 mm; speed: 1480 r/min", "");
    let text = ran("", &machine, "need -q").out;
    for gap in [
        "width: unknown, 50 mm",
        "radial clearance: unknown",
        "load: unknown",
    ] {
        let flat = text.split_whitespace().collect::<Vec<_>>().join(" ");
        assert!(flat.contains(gap), "{gap}: {text}");
    }
    let document = ran("", &machine, "weigh -f json -q").json();
    assert_eq!(judged(&document, "TU-5")["verdict"], "open");
    let bare = needs("", &journal("width: 80 mm", ""));
    let because = bare["undecided"][0]["because"].as_str();
    assert_eq!(because, Some("film: the diameter or the speed is missing"));
    let pads = "  T:\n    ambient: 10 .. 30 degC\n    lubrication: bath\n    sump: held at 50 degC\n    parts:\n      - thrust bearing: upper\n        pads: 8\n        pad length: 60 mm\n        mean diameter: 250 mm\n        speed: 1000 r/min\n        type: fixed\n";
    let text = ran("", pads, "need -q").out;
    let flat = text.split_whitespace().collect::<Vec<_>>().join(" ");
    for gap in [
        "pad width: unknown, 42 mm .. 78 mm",
        "load: unknown",
        "ratio: unknown, 1.5 .. 4",
    ] {
        assert!(flat.contains(gap), "{gap}: {text}");
    }
}

/// Sizes that cannot be had are said where a rule on sizes alone cannot see them.
#[test]
fn what_no_oil_mends_is_said() {
    // 3 um of clearance under the 7 um asked for
    let tight =
        "diameter: 100 mm; width: 80 mm; radial clearance: 0.003 mm; speed: 1480 r/min; load: 9 kN";
    let found = needs("", &journal(tight, ""));
    let because = found["undecided"][0]["because"].as_str().expect("words");
    assert!(
        because.contains("above 100 % of a radial clearance of 3.0 um"),
        "{because}"
    );
    // 20 MPa on white metal
    let heavy = "diameter: 100 mm; width: 80 mm; radial clearance: 0.08 mm; speed: 1480 r/min; load: 160 kN";
    let found = needs("", &journal(heavy, ""));
    assert!(
        found["undecided"].to_string().contains("no oil mends that"),
        "{found}"
    );
    // wider than any solution holds for
    let wide =
        "diameter: 100 mm; width: 250 mm; radial clearance: 0.08 mm; speed: 1480 r/min; load: 9 kN";
    let found = needs("", &journal(wide, ""));
    assert!(
        found["undecided"]
            .to_string()
            .contains("width over diameter is 2.50"),
        "{found}"
    );
}
