//! Rows of heat: heaters, housings, seals, against sums done by hand and a textbook.

use filmwright::work::batch::run_line;
use serde_json::{Value, json};

fn answer(relation: &str, with: &Value) -> Value {
    let line = json!({ "relation": relation, "with": with }).to_string();
    serde_json::from_str(&run_line(&line).0).expect("JSON")
}

fn result(relation: &str, with: &Value, name: &str) -> f64 {
    let answer = answer(relation, with);
    let value = answer["result"][name]["value"].as_f64();
    value.unwrap_or_else(|| panic!("{answer}"))
}

fn near(got: f64, want: f64, tolerance: f64) {
    assert!((got / want - 1.0).abs() < tolerance, "{got}, {want} wanted");
}

/// Common practice, by hand: 600 L of 0.88 kg/L by 20 K in 4 h:
/// 600 x 0.88 x 2.0 x 20 / (3600 x 4) = 1.4667 kW, and back; 0.5 kW of losses come on top.
#[test]
fn a_heater_is_sized_both_ways() {
    let tank = json!({"volume": "600 L", "rise": "20 K", "time": "4 h"});
    near(result("heater-power", &tank, "power"), 1.466_666_7, 1e-7);
    let mut lossy = tank.clone();
    lossy["losses"] = json!("0.5 kW");
    near(result("heater-power", &lossy, "power"), 1.966_666_7, 1e-7);
    let with = json!({"volume": "600 L", "rise": "20 K", "power": "1.4666667 kW"});
    near(result("heater-power", &with, "time"), 4.0, 1e-6);
    let weak = json!({"volume": "600 L", "rise": "20 K", "power": "400 W", "losses": "0.5 kW"});
    assert_eq!(answer("heater-power", &weak)["error"]["name"], "no-answer");
    let neither = json!({"volume": "600 L", "rise": "20 K"});
    assert_eq!(
        answer("heater-power", &neither)["error"]["name"],
        "input-missing"
    );
}

/// By hand: 9 kW on 1900 cm2 is 4.7368 W/cm2; at 1.6 W/cm2 3.04 kW or 5625 cm2.
#[test]
fn a_sheath_bears_so_much() {
    let sheath = json!({"power": "9 kW", "area": "1900 cm2", "at_most": "1.6 W/cm2"});
    near(
        result("heater-watt-density", &sheath, "watt_density"),
        4.736_842,
        1e-6,
    );
    near(
        result("heater-watt-density", &sheath, "power_at_most"),
        3.04,
        1e-9,
    );
    near(
        result("heater-watt-density", &sheath, "area_at_least"),
        5625.0,
        1e-9,
    );
    let notes = answer("heater-watt-density", &sheath)["notes"].to_string();
    assert!(notes.contains("hotter on the sheath"), "{notes}");
    // 15 W/in2 is 2.325 W/cm2: practice rounds it to 2.3
    let thin = json!({"power": "15 W", "area": "6.4516 cm2"});
    near(
        result("heater-watt-density", &thin, "watt_density"),
        2.325,
        1e-3,
    );
}

/// Jindal, Machine Design, example 28-5: 4 kW at an efficiency of 0.865 warm a worm casing of
/// 1.8 m2 at 16 W/(m2 K) by 18.73 K.
#[test]
fn a_worm_casing_settles() {
    let casing = json!({"losses": "540 W", "ambient": "25 degC", "area": "1.8 m2",
                        "heat_transfer": "16 W/(m2.K)"});
    near(result("housing-temperature", &casing, "rise"), 18.73, 2e-3);
    let known = json!({"losses": "540 W", "ambient": "25 degC", "conductance": "28.8 W/K"});
    near(
        result("housing-temperature", &known, "temperature"),
        43.75,
        1e-9,
    );
    // ISO 7902-1: 7 + 12 sqrt(4) = 31 W/(m2 K) in air of 4 m/s
    let blown = json!({"losses": "540 W", "ambient": "25 degC", "area": "1.8 m2",
                       "air_speed": "4 m/s"});
    near(
        result("housing-temperature", &blown, "conductance"),
        31.0 * 1.8,
        1e-9,
    );
    let breeze = json!({"losses": "540 W", "ambient": "25 degC", "area": "1.8 m2",
                        "air_speed": "0.5 m/s"});
    assert_eq!(
        answer("housing-temperature", &breeze)["error"]["name"],
        "out-of-range"
    );
    let cold = json!({"losses": "0 W", "ambient": "25 degC", "area": "1.8 m2"});
    assert_eq!(
        answer("housing-temperature", &cold)["error"]["name"],
        "not-positive"
    );
}

/// ISO/TR 14179-2 (from memory), by hand: 7.69e-6 x 60^2 x 1480 = 40.97 W.
#[test]
fn a_lip_takes_its_share() {
    let lip = json!({"diameter": "60 mm", "speed": "1480 r/min"});
    near(result("seal-loss", &lip, "power"), 40.972_32, 1e-6);
    let still = json!({"diameter": "60 mm", "speed": "0 r/min"});
    assert_eq!(answer("seal-loss", &still)["error"]["name"], "not-positive");
}
