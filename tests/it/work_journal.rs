//! The rows of plain bearings, as a user asks them.

use filmwright::work::{Args, Refusal, Value, Worked, run};

fn work(relation: &str, pairs: &[&str]) -> Result<Worked, Refusal> {
    let pairs: Vec<String> = pairs.iter().map(|p| (*p).to_owned()).collect();
    run(relation, Args::from_pairs(&pairs)?)
}

/// A result as a number in the unit it is stated in.
fn number(worked: &Worked, name: &str) -> f64 {
    let found = worked.results.iter().find(|(n, _)| *n == name);
    match found.map(|(_, value)| value) {
        Some(Value::Quantity { amount, unit, .. }) => {
            let unit = amount.kind.unit(unit).expect("a unit of its kind");
            unit.from_base(amount.base)
        }
        other => panic!("{name} is {other:?} among {:?}", worked.results),
    }
}

fn near(worked: &Worked, name: &str, want: f64, share: f64) {
    let got = number(worked, name);
    assert!(
        (got / want - 1.0).abs() <= share,
        "{name} is {got}, not {want}"
    );
}

fn refused(relation: &str, pairs: &[&str]) -> (&'static str, String) {
    match work(relation, pairs) {
        Ok(worked) => panic!("{relation} answered {:?}", worked.results),
        Err(refusal) => (refusal.name, refusal.message),
    }
}

/// Steam turbine bearing, 200 by 150 mm, clearance 1.6 per mille.
const TURBINE: [&str; 5] = [
    "diameter=200 mm",
    "width=150 mm",
    "clearance=160 um",
    "load=40 kN",
    "speed=3000 r/min",
];

fn turbine(more: &[&'static str]) -> Vec<&'static str> {
    TURBINE
        .iter()
        .copied()
        .chain(more.iter().copied())
        .collect()
}

const OIL: [&str; 2] = [
    "oil=[46 mm2/s at 40 degC, 6.8 mm2/s at 100 degC]",
    "density15=870 kg/m3",
];

/// Row L/D 1, e 0.6 of Raimondi and Boyd 1958 (tolerances as in `raimondi_boyd.csv`).
#[test]
fn journal_film_states_the_row_of_its_sommerfeld_number() {
    // S = (r/c)^2 eta N/P = 1e6 * 0.0242 * 10/2e6 = 0.121
    let film = work(
        "journal-film",
        &[
            "diameter=100 mm",
            "width=100 mm",
            "clearance=50 um",
            "load=20 kN",
            "speed=600 r/min",
            "eta=24.2 mPa.s",
        ],
    )
    .unwrap();
    near(&film, "sommerfeld", 0.121, 1e-12);
    near(&film, "eccentricity", 0.6, 0.005);
    near(&film, "h_min", 20.0, 0.005);
    near(&film, "attitude", 50.58, 0.02);
    near(&film, "friction_variable", 3.22, 0.02);
    near(&film, "friction", 3.22e-3, 0.02);
    // Q = 4.33 r c N B = 4.33 * 0.05 * 50e-6 * 10 * 0.1 m3/s
    near(&film, "flow", 4.33 * 2.5e-6 * 6e4, 0.02);
    near(&film, "side_flow", 0.680 * 4.33 * 2.5e-6 * 6e4, 0.03);
    near(&film, "peak_pressure", 2.0 / 0.415, 0.02);
    near(&film, "power", 3.22e-3 * 20e3 * std::f64::consts::PI, 0.02);
    let steps = film.trace.steps();
    assert!(steps.iter().any(|s| s.symbol == "So"));
    assert!(
        film.notes.iter().any(|n| n.contains("ISO 7902-2")),
        "{:?}",
        film.notes
    );
    near(&film, "h_min_other", 20.0, 0.05);
}

#[test]
fn journal_viscosity_undoes_journal_film() {
    let needed = work("journal-viscosity", &turbine(&["h_min=20 um"])).unwrap();
    // computed with another solver and with the closed form of ISO 7902-2
    near(&needed, "eta", 2.046_82, 0.01);
    near(&needed, "eta_other", 2.0966, 0.01);
    near(&needed, "eccentricity", 0.875, 1e-9);
    let eta = format!("eta={} mPa.s", number(&needed, "eta"));
    let film = work("journal-film", &turbine(&[eta.leak()])).unwrap();
    near(&film, "h_min", 20.0, 1e-9);
}

#[test]
fn journal_viscosity_names_the_ceiling_of_eccentricity() {
    let needed = work("journal-viscosity", &turbine(&["h_min=100 um"])).unwrap();
    assert!(number(&needed, "eta_whirl") < number(&needed, "eta"));
    assert!(needed.notes.iter().any(|n| n.contains("whirl")));
    assert!(needed.notes.iter().any(|n| n.contains("too thick")));
}

#[test]
fn journal_heat_balances_by_oil() {
    let all = turbine(&[OIL[0], OIL[1], "inlet=45 degC"]);
    let heat = work("journal-heat", &all).unwrap();
    // ISO 7902 closed forms, computed with another program
    near(&heat, "t_effective", 56.4527, 0.002);
    near(&heat, "eta", 19.7087, 0.002);
    near(&heat, "h_min", 79.4697, 0.002);
    near(&heat, "power", 13_683.7, 0.002);
    near(&heat, "so", 0.551_279, 0.002);
    near(&heat, "flow", 19.9133, 0.002);
    near(&heat, "outlet", 67.9055, 0.002);
    // the Reynolds solution carries the load with a thicker film at this width
    assert!(number(&heat, "h_min_other") > 82.0);
    let solved = turbine(&[OIL[0], OIL[1], "inlet=45 degC", "method=reynolds"]);
    let solved = work("journal-heat", &solved).unwrap();
    near(&solved, "h_min", number(&heat, "h_min_other"), 1e-12);
    // a feed that adds oil cools
    let fed = turbine(&[OIL[0], OIL[1], "inlet=45 degC", "feed_flow=10 L/min"]);
    let fed = work("journal-heat", &fed).unwrap();
    assert!(number(&fed, "t_effective") < number(&heat, "t_effective") - 1.0);
    let hole = ["inlet=45 degC", "feed_pressure=1.5 bar", "feed_hole=10 mm"];
    let hole = turbine(&[OIL[0], OIL[1], hole[0], hole[1], hole[2]]);
    let hole = work("journal-heat", &hole).unwrap();
    assert!(number(&hole, "flow") > number(&heat, "flow"));
}

#[test]
fn journal_heat_balances_by_air() {
    // P_f(T) = k A (T - T_amb) at the answer, from the row's own numbers
    let ring = [
        "diameter=80 mm",
        "width=60 mm",
        "clearance=60 um",
        "load=4 kN",
        "speed=600 r/min",
        OIL[0],
        OIL[1],
        "ambient=25 degC",
        "area=0.1 m2",
        "heat_transfer=20 W/(m2.K)",
    ];
    let heat = work("journal-heat", &ring).unwrap();
    let warmer = number(&heat, "t_effective") - 25.0;
    near(&heat, "power", 20.0 * 0.1 * warmer, 1e-9);
    assert!((20.0..60.0).contains(&warmer), "{warmer}");
}

#[test]
fn journal_transition_and_its_inverse() {
    let all = [
        "load=40 kN",
        "eta=20 mPa.s",
        "diameter=200 mm",
        "width=150 mm",
        "running_speed=100 r/min",
    ];
    let found = work("journal-transition", &all).unwrap();
    near(&found, "speed", 42.4413, 0.001);
    near(&found, "factor", 100.0 / 42.4413, 0.001);
    near(&found, "eta", 20.0 * 3.0 * 42.4413 / 100.0, 0.001);
    assert!(found.notes.iter().any(|n| n.contains("mixed friction")));
}

#[test]
fn journal_limits_by_size_and_speed() {
    let all = [
        "diameter=200 mm",
        "speed=3000 r/min",
        "load=40 kN",
        "width=150 mm",
        "lining=white-metal",
        "clearance=160 um",
        "eta=19.7 mPa.s",
        "density=842 kg/m3",
        "rz_shaft=4 um",
        "rz_bore=6 um",
    ];
    let found = work("journal-limits", &all).unwrap();
    near(&found, "h_lim", 14.0, 1e-9);
    near(&found, "h_trumpler", 13.08, 1e-9);
    near(&found, "h_roughness", 10.0, 1e-9);
    near(&found, "pressure", 4.0 / 3.0, 1e-9);
    near(&found, "pressure_limit", 5.0, 1e-9);
    near(&found, "pressure_limit_special", 15.0, 1e-9);
    near(
        &found,
        "clearance_usual",
        0.8e-3 * 31.4159_f64.sqrt().sqrt(),
        1e-5,
    );
    near(&found, "clearance_step", 1.9e-3, 1e-9);
    near(
        &found,
        "reynolds",
        842.0 * 314.159 * 0.1 * 160e-6 / 19.7e-3,
        1e-5,
    );
    near(
        &found,
        "reynolds_limit",
        41.3 * (0.1_f64 / 160e-6).sqrt(),
        1e-9,
    );
    let small = work("journal-limits", &["diameter=20 mm", "surface_speed=2 m/s"]).unwrap();
    assert!(small.results.contains(&("h_lim", Value::Text(None))));
}

const PAD: [&str; 4] = [
    "length=150 mm",
    "width=150 mm",
    "speed=12 m/s",
    "load=100 kN",
];

fn pad(more: &[&'static str]) -> Vec<&'static str> {
    PAD.iter().copied().chain(more.iter().copied()).collect()
}

#[test]
fn thrust_pad_gives_film_and_viscosity() {
    let film = work("thrust-pad", &pad(&["eta=30 mPa.s", "ratio=2.2"])).unwrap();
    near(&film, "h_out", 29.2665, 0.005);
    near(&film, "w_star", 0.070_496_1, 0.005);
    near(&film, "f_star", 0.699_349, 0.005);
    near(&film, "pressure", 4.444, 0.001);
    // f = F*/W* h_out/B
    let (f, w) = (number(&film, "f_star"), number(&film, "w_star"));
    near(
        &film,
        "friction",
        f / w * number(&film, "h_out") * 1e-6 / 0.15,
        1e-9,
    );
    let eta = work("thrust-pad", &pad(&["h_out=30 um", "ratio=2.2"])).unwrap();
    near(&eta, "eta", 31.5226, 0.005);
    let best = work("thrust-pad", &pad(&["eta=30 mPa.s", "ratio=best"])).unwrap();
    assert!(number(&best, "w_star") >= number(&film, "w_star"));
    // the pivot at the centre of pressure gives the ratio back
    let pivot = format!("pivot={}", number(&film, "centre"));
    let tilting = work("thrust-pad", &pad(&["eta=30 mPa.s", pivot.leak()])).unwrap();
    near(&tilting, "ratio", 2.2, 1e-9);
    // so does the taper m h - h
    let taper = format!("taper={} um", 1.2 * number(&film, "h_out"));
    let fixed = work("thrust-pad", &pad(&["eta=30 mPa.s", taper.leak()])).unwrap();
    near(&fixed, "ratio", 2.2, 1e-9);
    near(&fixed, "h_out", number(&film, "h_out"), 1e-9);
}

#[test]
fn thrust_slider_in_closed_form() {
    let best = work("thrust-slider", &["ratio=best"]).unwrap();
    near(&best, "ratio", 2.19, 0.005);
    near(&best, "w_star", 0.1602, 0.005);
    let square = work("thrust-slider", &["ratio=2.2", "width_over_length=1"]).unwrap();
    near(&square, "side_factor", 0.44, 0.005);
}

#[test]
fn calibration_and_petroff() {
    let all = ["losses=740 W", "reading=66 degC", "ambient=22 degC"];
    near(
        &work("heat-calibration", &all).unwrap(),
        "conductance",
        740.0 / 44.0,
        1e-12,
    );
    let all = [
        "diameter=38.1 mm",
        "width=38.1 mm",
        "clearance=38.1 um",
        "speed=1800 r/min",
        "eta=27.6 mPa.s",
    ];
    let friction = work("journal-petroff", &all).unwrap();
    near(&friction, "torque", 0.225_983, 0.001);
    near(&friction, "power", 42.5967, 0.001);
}

/// Nonsense is refused by name, with what to write instead.
#[test]
fn nonsense_is_refused_by_name() {
    let film = |pairs: &[&'static str]| {
        let mut all = turbine(&["eta=20 mPa.s"]);
        for pair in pairs {
            let key = pair.split('=').next().expect("a key");
            all.retain(|p| p.split('=').next() != Some(key));
            all.push(pair);
        }
        refused("journal-film", &all)
    };
    let (name, words) = film(&["clearance=120 mm"]);
    assert_eq!(name, "clearance-beyond-radius");
    assert!(
        words.contains("half the difference of bore and shaft"),
        "{words}"
    );
    assert_eq!(film(&["speed=0 r/min"]).0, "shaft-stands");
    assert_eq!(film(&["load=0 N"]).0, "load-zero");
    assert_eq!(film(&["width=0 mm"]).0, "size-not-positive");
    assert_eq!(film(&["width=500 mm"]).0, "width-ratio-out-of-range");
    assert_eq!(film(&["eta=0.1 mPa.s"]).0, "film-too-thin");
    assert_eq!(
        film(&["method=iso7902", "width=300 mm"]).0,
        "width-ratio-out-of-range"
    );
    let target = refused("journal-viscosity", &turbine(&["h_min=170 um"]));
    assert_eq!(target.0, "film-target-impossible");
    let target = refused("journal-viscosity", &turbine(&["h_min=160 um"]));
    assert_eq!(target.0, "film-target-impossible");
    assert!(target.1.contains("100 %"), "{}", target.1);
    assert_eq!(refused("journal-heat", &turbine(&OIL)).0, "cooling-missing");
    let both = turbine(&[OIL[0], OIL[1], "inlet=40 degC", "ambient=20 degC"]);
    assert_eq!(refused("journal-heat", &both).0, "cooling-twice");
    let pads = |shape: &'static str| refused("thrust-pad", &pad(&["eta=30 mPa.s", shape]));
    assert_eq!(pads("ratio=1").0, "pad-ratio-one");
    assert_eq!(pads("ratio=0.5").0, "pad-ratio-out-of-range");
    assert_eq!(pads("ratio=20").0, "pad-ratio-out-of-range");
    assert_eq!(pads("pivot=0.5").0, "pivot-central");
    assert_eq!(pads("pivot=0.9").0, "pivot-out-of-range");
    assert_eq!(
        refused("thrust-pad", &pad(&["eta=30 mPa.s"])).0,
        "input-missing"
    );
    let lying = [
        "length=0 mm",
        "width=1 mm",
        "speed=1 m/s",
        "load=1 N",
        "eta=1 mPa.s",
    ];
    assert_eq!(refused("thrust-pad", &lying).0, "size-not-positive");
}

/// A bearing that cannot get rid of its heat says so.
#[test]
fn a_bearing_without_balance_says_why() {
    let hot = turbine(&[OIL[0], OIL[1], "ambient=40 degC", "area=0.05 m2"]);
    let (name, words) = refused("journal-heat", &hot);
    assert!(
        ["heat-not-removed", "film-too-thin"].contains(&name),
        "{name}"
    );
    assert!(words.contains("W still exceed"), "{words}");
}

/// Below 0.25 the note says what stands behind the numbers.
#[test]
fn a_short_bearing_is_noted() {
    let all = [
        "diameter=200 mm",
        "width=40 mm",
        "clearance=160 um",
        "load=5 kN",
        "speed=3000 r/min",
        "eta=20 mPa.s",
    ];
    let film = work("journal-film", &all).unwrap();
    assert!(
        film.notes.iter().any(|n| n.contains("short-bearing form")),
        "{:?}",
        film.notes
    );
}
