//! The share of cases in which every limit is met: right where it can be told beforehand, the same
//! each time, and never a verdict.

use crate::scenario::{filmwright, on};
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use serde_json::Value;

/// A sump held at a temperature at which the oil just has the floor: only the sump is uncertain
/// beside the oil, and both are symmetrical, so one case in two meets the floor.
fn balanced(tolerance: &str, floor: f64) -> MemoryHost {
    let site = format!(
        "file: site 1\nmachines:\n  M1:\n    ambient: 10 .. 30 degC\n    lubrication: circulated\n    sump: held at 40 degC{tolerance}\n    start: 30 degC\n    floor: {floor} mm2/s, maker\n    start limit: 5000 mm2/s, maker\n    parts:\n      - component: pump_bearing_bath\n"
    );
    let oils = "file: oils 1\nX:\n  kind: circulating\n  base: PAO, no polymer\n  classes: [CKB, HL]\n  viscosity: [100 mm2/s at 40 degC, 14 mm2/s at 100 degC]\n  pour point: -45 degC\n  density: 860 kg/m3 at 15 degC\n";
    MemoryHost::new()
        .with("site.yaml", &site)
        .with("oils.yaml", oils)
}

fn scatter(host: MemoryHost, cases: u32) -> Value {
    let ran = on(host, &format!("weigh M1 --scatter {cases} -f json -q"));
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    ran.json()["judgements"][0]["scatter"].clone()
}

fn number(v: &Value) -> f64 {
    v.as_f64().unwrap_or(f64::NAN)
}

#[test]
fn a_floor_just_met_is_met_in_one_case_of_two() {
    let s = scatter(balanced(" +/- 3 K", 100.0), 4000);
    // symmetry: 0.5 with a standard error of 0.5/sqrt(4000) = 0.008; four of them
    let share = number(&s["share"]);
    assert!((share - 0.5).abs() < 0.032, "{s}");
    let (low, high) = (
        number(&s["interval"]["low"]),
        number(&s["interval"]["high"]),
    );
    assert!(low < share && share < high && high - low < 0.04, "{s}");
    assert_eq!(s["cases"], 4000);
    let most: Vec<&str> = s["matter_most"]
        .as_array()
        .expect("a list")
        .iter()
        .filter_map(Value::as_str)
        .collect();
    assert_eq!(most.len(), 2, "{s}");
    assert!(most.contains(&"sump"), "{s}");
}

#[test]
fn a_far_limit_is_always_or_never_met() {
    let sure = scatter(balanced(" +/- 1 K", 50.0), 300);
    assert_eq!(sure["met"], 300);
    assert!(number(&sure["interval"]["low"]) > 0.98, "{sure}");
    let never = scatter(balanced(" +/- 1 K", 300.0), 300);
    assert_eq!(never["met"], 0);
    assert!(number(&never["interval"]["high"]) < 0.02, "{never}");
}

#[test]
fn the_spread_stated_moves_the_share() {
    // 40 degC held, floor 90: 10 % in hand; a wide tolerance spends it more often
    let tight = number(&scatter(balanced(" +/- 1 K", 90.0), 2000)["share"]);
    let wide = number(&scatter(balanced(" +/- 8 K", 90.0), 2000)["share"]);
    assert!(tight > wide + 0.1, "{tight} {wide}");
    // with none stated the usual one of a sump reading is taken, and shown
    let usual = scatter(balanced("", 90.0), 500);
    let listed = usual["inputs"].as_array().expect("a list");
    let sump = listed.iter().find(|i| i["key"] == "sump").expect("listed");
    assert_eq!(sump["basis"], "usual tolerance");
    assert_eq!(sump["range"][0], 38.0, "{sump}");
}

#[test]
fn the_same_every_time_and_no_verdict_moves() {
    let with = filmwright("weigh M01 M05 --demo --scatter 50 -f json -q");
    let again = filmwright("weigh M01 M05 --demo --scatter 50 -f json -q");
    assert_eq!(with.out, again.out);
    let without = filmwright("weigh M01 M05 --demo -f json -q").json();
    let mut stripped = with.json();
    for j in stripped["judgements"].as_array_mut().expect("a list") {
        j.as_object_mut().expect("an object").remove("scatter");
    }
    assert_eq!(stripped, without);
    let text = filmwright("weigh M01 --demo --scatter 50 -q").out;
    assert!(text.contains("the verdicts stand as they are"), "{text}");
    let csv = filmwright("weigh M01 --demo --scatter 50 -f csv -q").out;
    assert!(
        csv.lines()
            .next()
            .is_some_and(|l| l.ends_with("met_share,met_share_low,met_share_high"))
    );
    let none = filmwright("weigh M01 --demo --scatter 0");
    assert_eq!(none.exit, Exit::Usage);
    assert!(none.err.contains("--scatter 1000"), "{}", none.err);
}
