//! What the rows of contacts, bearings and gears refuse, by name, and that nothing stops them.

use filmwright::work::batch::run_line;
use proptest::prelude::*;
use serde_json::{Map, Value, json};

/// The name of the refusal of a line, with the words.
fn refused(relation: &str, with: &str) -> (String, String) {
    let line = format!("{{\"relation\": \"{relation}\", \"with\": {with}}}");
    let (answer, refused) = run_line(&line);
    assert!(refused, "{line}\n{answer}");
    let answer: Value = serde_json::from_str(&answer).expect("JSON");
    let text = |key: &str| answer["error"][key].as_str().unwrap_or("").to_owned();
    (text("name"), text("message"))
}

/// The notes of a line that is worked out.
fn notes(relation: &str, with: &Value) -> String {
    let line = json!({ "relation": relation, "with": with }).to_string();
    let (answer, refused) = run_line(&line);
    assert!(!refused, "{line}\n{answer}");
    let answer: Value = serde_json::from_str(&answer).expect("JSON");
    answer["notes"].to_string()
}

/// Name of the refusal, words of its message, relation, inputs.
const REFUSED: &str = r#"
out-of-range | kappa | bearing-life-factor | {"class": "radial-ball", "kappa": "0.05", "x": "0.2"}
not-positive | speed | bearing-nu1 | {"speed": "0 r/min", "pitch_diameter": "100 mm"}
no-answer | outside diameter | bearing-nu1 | {"speed": "900 r/min", "bore": "100 mm", "outside": "90 mm"}
designation-unknown | bore and outside diameter | bearing-nu1 | {"speed": "900 r/min", "designation": "HK 0810"}
input-missing | pitch_diameter | bearing-nu1 | {"speed": "900 r/min"}
unit-of-another-kind | load | hertz-line | {"load": "0 N", "radius": "10 mm"}
not-positive | load | hertz-ellipse | {"load": "0 N", "rx": "10 mm", "ry": "20 mm"}
not-positive | radius | hertz-ellipse | {"load": "100 N", "rx": "-10 mm", "ry": "20 mm"}
no-answer | convex | hertz-line | {"load": "100 N/mm", "r1x": "10 mm", "r2x": "-8 mm"}
out-of-range | minor axis | film-ellipse | {"eta": "10 mPa.s", "alpha": "20 1/GPa", "speed": "2 m/s", "load": "100 N", "rx": "20 mm", "ry": "10 mm"}
not-positive | speed | film-line | {"eta": "10 mPa.s", "alpha": "20 1/GPa", "speed": "0 m/s", "load": "100 N/mm", "radius": "20 mm"}
no-answer | viscosity | film-viscosity | {"speed": "0.00001 m/s", "load": "500 N/mm", "radius": "20 mm", "rq1": "2 um", "rq2": "2 um", "lambda": "4"}
out-of-range | meniscus | film-starved | {"h_central": "0.6 um", "h_min": "0.4 um", "rx": "10 mm", "b": "0.2 mm", "m": "0.9"}
not-positive | roughness | film-ratio | {"h": "0.5 um", "rq1": "0 um", "rq2": "0 um"}
out-of-range | -/19/16 | bearing-contamination | {"method": "online-filter", "cleanliness": "-/21/18", "kappa": "1", "pitch_diameter": "100 mm"}
no-answer | not suitable | grease-interval | {"class": "spherical", "speed": "3600 r/min", "bore": "120 mm", "temperature": "70 degC"}
no-answer | thrust ball | grease-interval | {"class": "thrust ball", "speed": "300 r/min", "bore": "50 mm", "temperature": "70 degC"}
no-answer | mesh | gear-pitch-point | {"z1": "20", "z2": "63", "normal_module": "5 mm", "face_width": "60 mm", "speed1": "1480 r/min", "torque1": "650 N.m", "centre_distance": "150 mm"}
not-positive | speed | gear-grade-rule | {"v_t": "0 m/s"}
out-of-range | lead angle | worm-efficiency | {"lead_angle": "95 deg", "mu": "0.03"}
input-contradictory | not both | kappa-lambda | {"kappa": "1", "lambda": "1"}
out-of-range | wider than its ball | bearing-film | {"element": "ball", "pitch_diameter": "60 mm", "element_diameter": "10 mm", "conformity": "0.5", "speed": "1000 r/min", "element_load": "500 N", "eta": "10 mPa.s", "alpha": "20 1/GPa"}
"#;

#[test]
fn nonsense_is_refused_by_name() {
    for line in REFUSED.lines().filter(|line| !line.is_empty()) {
        let [name, words, relation, with] = line
            .splitn(4, " | ")
            .collect::<Vec<_>>()
            .try_into()
            .expect("four fields");
        let (got, said) = refused(relation, with);
        assert_eq!(got, name, "{relation}: {said}");
        assert!(said.contains(words), "{relation}: {said}");
    }
}

#[test]
fn the_edge_of_a_range_is_remarked_on() {
    let high = notes(
        "bearing-kappa",
        &json!({"speed": "3000 r/min", "designation": "6205-2RS", "nu": "100 mm2/s"}),
    );
    assert!(high.contains("above kappa 4") && high.contains("deep groove ball"));
    let slow = notes(
        "film-line",
        &json!({"eta": "10 mPa.s", "alpha": "20 1/GPa", "speed": "0.0001 m/s", "load": "100 N/mm",
               "radius": "20 mm"}),
    );
    assert!(slow.contains("speed parameter"));
    let hot = notes(
        "film-thermal",
        &json!({"beta": "0.04 1/K", "eta": "300 mPa.s", "speed": "20 m/s", "slide_roll": "10 %",
               "p_max": "800 MPa"}),
    );
    assert!(hot.contains("above 25"));
}

#[test]
fn what_is_said_in_two_ways_is_the_same() {
    let of = |relation: &str, with: &Value| {
        let line = json!({ "relation": relation, "with": with }).to_string();
        let answer: Value = serde_json::from_str(&run_line(&line).0).expect("JSON");
        answer["result"].clone()
    };
    let speed = "985 r/min";
    let by_number = of(
        "bearing-nu1",
        &json!({"speed": speed, "designation": "NU 1020"}),
    );
    let by_size = of(
        "bearing-nu1",
        &json!({"speed": speed, "bore": "100 mm", "outside": "150 mm"}),
    );
    assert!(by_number["nu1"]["value"].is_number());
    assert_eq!(by_number, by_size);
    // a ball of 20 mm in a groove of 10.4 mm, by bodies and by reduced radii
    let bodies = of(
        "hertz-ellipse",
        &json!({"load": "500 N", "r1x": "10 mm", "r2x": "40 mm", "r1y": "10 mm", "r2y": "-10.4 mm"}),
    );
    let reduced = of(
        "hertz-ellipse",
        &json!({"load": "500 N", "rx": "8 mm", "ry": "260 mm"}),
    );
    let number = |v: &Value, key: &str| v[key]["value"].as_f64().expect("a number");
    for key in ["a_long", "a_short", "p_max", "k"] {
        assert!((number(&bodies, key) / number(&reduced, key) - 1.0).abs() < 1e-9);
    }
    // power and torque
    let base = json!({"z1": "20", "z2": "63", "normal_module": "5 mm", "face_width": "60 mm",
                      "speed1": "100 rad/s"});
    let mut torque = base.clone();
    torque["torque1"] = json!("650 N.m");
    let mut power = base;
    power["power"] = json!("65 kW");
    let (a, b) = (
        of("gear-pitch-point", &torque),
        of("gear-pitch-point", &power),
    );
    assert!((number(&a, "p_h") / number(&b, "p_h") - 1.0).abs() < 1e-12);
}

const UNITS: &[&str] = &[
    "", "mm", "um", "N", "kN", "N/mm", "m/s", "r/min", "mPa.s", "mm2/s", "1/GPa", "MPa", "degC",
    "deg", "N.m", "kW", "1/K", "%", "m2", "kg/m3",
];

proptest! {
    #![proptest_config(ProptestConfig::with_cases(400))]
    #[test]
    fn no_line_stops_the_program(
        seed in prop::collection::vec((prop::sample::select(vec![
            "0", "1", "-3", "0.02", "25", "1480", "1e308", "1e-300", "yes", "ball", "grease",
            "-/15/12", "radial-ball", "pag",
        ]), 0..UNITS.len()), 24),
    ) {
        for relation in filmwright::work::relations() {
            let with: Map<String, Value> = relation
                .with
                .iter()
                .zip(&seed)
                .map(|(input, (value, unit))| {
                    let text = format!("{value} {}", UNITS[*unit]);
                    (input.name.to_owned(), json!(text.trim()))
                })
                .collect();
            let line = json!({ "relation": relation.name, "with": with }).to_string();
            let (answer, _) = run_line(&line);
            prop_assert!(serde_json::from_str::<Value>(&answer).is_ok(), "{answer}");
        }
    }
}
