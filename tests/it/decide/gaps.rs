//! The first gap really decides: the oil proposed is another at one end of its range, found out by
//! setting the value and weighing.

use crate::scenario::{filmwright, on};
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use serde_json::Value;

/// A gearbox with a sump rise as written, and three oils of one slope.
pub(crate) fn host(rise: &str) -> MemoryHost {
    let site = format!(
        "file: site 1\nsite: Test works\nmachines:\n  M1:\n    name: Conveyor drive\n    ambient: -15 .. 35 degC\n    lubrication: splash\n    oil now: B-220\n    sump rise: {rise}\n    start limit: 25000 mm2/s, maker\n    parts:\n      - rolling bearing: 22220\n        speed: 236 r/min\n      - gear mesh: stage\n        pitch-line speed: 6 m/s\n"
    );
    let oil = |id: &str, nu40: f64, nu100: f64| {
        format!(
            "{id}:\n  kind: gear\n  base: PAO, no polymer\n  classes: [CKC]\n  additives: [EP]\n  sulphur: inactive\n  viscosity: [{nu40} mm2/s at 40 degC, {nu100} mm2/s at 100 degC]\n  pour point: -45 degC\n  density: 860 kg/m3 at 15 degC\n"
        )
    };
    let oils = format!(
        "file: oils 1\n{}{}{}",
        oil("A-150", 150.0, 19.5),
        oil("B-220", 220.0, 26.4),
        oil("C-320", 320.0, 35.0)
    );
    MemoryHost::new()
        .with("site.yaml", &site)
        .with("oils.yaml", &oils)
}

fn proposed(rise: &str) -> Option<String> {
    let json = on(host(rise), "weigh M1 -f json -q").json();
    let all = json["judgements"].as_array().expect("a list");
    let best = all.iter().find(|j| j["verdict"] == "holds")?;
    best["oil"].as_str().map(str::to_owned)
}

#[test]
fn the_first_gap_flips_the_decision_at_one_end() {
    let rise = "unknown (20 .. 75 K), ask \"plant\"";
    let json = on(host(rise), "gaps -f json -q").json();
    let first = &json["gaps"][0];
    assert_eq!(first["key"], "sump rise", "{json}");
    assert_eq!(first["decides"], "which oil");
    let told: Vec<Option<&str>> = first["proposed"]
        .as_array()
        .expect("a list")
        .iter()
        .map(Value::as_str)
        .collect();
    let (low, high) = (proposed("20 K"), proposed("75 K"));
    assert_ne!(low, high, "the ends propose the same oil");
    for end in [low, high] {
        assert!(told.contains(&end.as_deref()), "{end:?} not in {told:?}");
    }
}

#[test]
fn a_gap_that_changes_nothing_says_so() {
    // 30 to 31 K: every oil keeps its word and the margins hardly move
    let json = on(host("unknown (30 .. 31 K)"), "gaps -f json -q").json();
    let gap = json["gaps"]
        .as_array()
        .expect("a list")
        .iter()
        .find(|g| g["key"] == "sump rise")
        .expect("listed");
    assert_eq!(gap["decides"], "nothing", "{gap}");
}

/// Neither base nor density of the oil is stated: the limit in mPa.s moves with the density, and
/// the wax of a mineral base leaves a start near the pour point open where PAO has none.
#[test]
fn a_base_and_a_density_nobody_states_are_ranked_by_what_they_decide() {
    let site = |limit: &str| {
        format!(
            "file: site 1\nmachines:\n  M1:\n    ambient: -24 .. 35 degC\n    lubrication: splash\n    oil now: X\n    sump rise: 40 K\n    start limit: {limit}, maker\n    parts:\n      - gear mesh: stage\n        pitch-line speed: 60 m/s\n"
        )
    };
    let oils = |more: &str| {
        format!(
            "file: oils 1\nX:\n  kind: gear\n  classes: [CKC]\n  additives: [EP]\n  sulphur: inactive\n  viscosity: [100 mm2/s at 40 degC, 11.2 mm2/s at 100 degC]\n  pour point: -33 degC\n{more}"
        )
    };
    let host = |limit: &str, more: &str| {
        MemoryHost::new()
            .with("site.yaml", &site(limit))
            .with("oils.yaml", &oils(more))
    };
    let gaps = |limit: &str, more: &str| {
        let json = on(host(limit, more), "gaps -f json -q").json();
        json["gaps"].as_array().expect("a list").clone()
    };
    let key = |all: &[Value], key: &str| all.iter().find(|g| g["key"] == key).cloned();
    let word = |limit: &str, more: &str| {
        let json = on(host(limit, more), "weigh M1 -f json -q").json();
        json["judgements"][0]["verdict"].as_str().map(str::to_owned)
    };
    let wide = "900000 mm2/s";
    let found = key(&gaps(wide, ""), "base").expect("the base is a gap");
    assert_eq!(found["decides"], "which oil", "{found}");
    assert_eq!(found["value"]["value"], "mineral I");
    assert_eq!(found["part"], "X");
    let (mineral, pao) = (
        word(wide, "  base: mineral I\n"),
        word(wide, "  base: PAO\n"),
    );
    assert_eq!(
        (mineral.as_deref(), pao.as_deref()),
        (Some("open"), Some("tight"))
    );
    let verdicts = found["verdicts"].to_string();
    assert!(
        verdicts.contains("open") && verdicts.contains("tight"),
        "{found}"
    );
    // stated, it is no gap
    assert!(key(&gaps(wide, "  base: PAO\n"), "base").is_none());

    // a limit in mPa.s between those the ends of the range give; oil shrinks by some 0.07 % a
    // kelvin, 2.7 % from 15 to -24 degC (common practice)
    let json = on(host(wide, ""), "oil X --at=-24degC -f json -q").json();
    let point = &json["oil"]["points"][0]["new"]["value"];
    let nu = point.as_f64().expect("a viscosity");
    let found = key(&gaps(wide, "  base: PAO, no polymer\n"), "density").expect("a gap");
    assert_eq!(found["decides"], "nothing", "no limit in mPa.s: {found}");
    let (lo, hi) = (
        found["value"]["range"][0].as_f64(),
        found["value"]["range"][1].as_f64(),
    );
    let (lo, hi) = (lo.expect("low"), hi.expect("high"));
    let limit = format!("{:.0} mPa.s", nu * 1e-3 * f64::midpoint(lo, hi) * 1.027);
    let found = key(&gaps(&limit, "  base: PAO, no polymer\n"), "density").expect("a gap");
    assert_eq!(found["decides"], "which oil", "{found}");
    let end = |rho: f64| {
        word(
            &limit,
            &format!("  base: PAO, no polymer\n  density: {rho} kg/m3 at 15 degC\n"),
        )
    };
    assert_ne!(end(lo), end(hi));
    let told = on(
        host(&limit, "  base: PAO, no polymer\n"),
        "gaps --letter -q",
    )
    .out;
    assert!(told.contains("What is the density of X?"), "{told}");
    let told = on(host(wide, ""), "gaps -q").out;
    assert!(
        told.contains("X: base") && told.contains("which oil"),
        "{told}"
    );
}

#[test]
fn ranks_never_rise_down_the_list() {
    let order = [
        "which oil",
        "a verdict",
        "a condition",
        "a margin",
        "nothing",
    ];
    let json = filmwright("gaps --demo -f json -q").json();
    let ranks: Vec<usize> = json["gaps"]
        .as_array()
        .expect("a list")
        .iter()
        .map(|g| {
            let word = g["decides"].as_str().expect("a word");
            order.iter().position(|o| *o == word).expect("known")
        })
        .collect();
    assert!(ranks.len() > 20, "{} gaps", ranks.len());
    assert!(ranks.windows(2).all(|w| w[0] <= w[1]), "{ranks:?}");
}

#[test]
fn the_letter_asks_in_sentences() {
    let rise = "unknown (20 .. 75 K), ask \"plant, thermometer in the sump\"";
    let ran = on(host(rise), "gaps --letter 2 -q");
    assert_eq!(ran.exit, Exit::Done);
    let text = ran.out.split_whitespace().collect::<Vec<_>>().join(" ");
    assert!(
        text.contains("1. M1, Conveyor drive. What is the rise of the oil over the ambient"),
        "{text}"
    );
    assert!(
        text.contains("anything from 20 K to 75 K is taken as possible"),
        "{text}"
    );
    assert!(
        text.contains("To ask: plant, thermometer in the sump."),
        "{text}"
    );
    assert!(text.contains("It decides which oil:"), "{text}");
    assert!(!text.contains(" 3. "), "{text}");
    let json = on(host(rise), "gaps --letter -f json -q").json();
    assert_eq!(json["questions"][0]["number"], 1);
    let none = on(host(rise), "gaps --letter 0");
    assert_eq!(none.exit, Exit::Usage);
    let csv = on(host(rise), "gaps -f csv -q").out;
    assert!(csv.starts_with("number,machine,point,part,missing,how_known,low,high,unit,decides"));
}

#[test]
fn an_unknown_without_a_range_waits_for_the_verdict() {
    let json = on(host("40 K"), "gaps -f json -q").json();
    assert!(
        json["gaps"]
            .as_array()
            .is_some_and(|g| g.iter().all(|g| g["key"] != "sump rise"))
    );
    let site = "file: site 1\nmachines:\n  M1:\n    ambient: -5 .. 35 degC\n    sump rise: 30 K\n    lubrication: splash\n    parts:\n      - rolling bearing: 22220\n        speed: unknown\n";
    let oils = "file: oils 1\nX:\n  kind: gear\n  base: PAO\n  viscosity: [220 mm2/s at 40 degC, 26.4 mm2/s at 100 degC]\n";
    let host = MemoryHost::new()
        .with("site.yaml", site)
        .with("oils.yaml", oils);
    let json = on(host, "gaps -f json -q").json();
    let first = &json["gaps"][0];
    assert_eq!(first["key"], "speed", "{json}");
    assert_eq!(first["decides"], "a verdict");
}

#[test]
fn an_unknown_shear_loss_is_a_gap_that_turns_the_verdict() {
    // VG 220 polymer-thickened, 0 to 25 % in gears (common practice); floor 20 mm2/s at 80 degC:
    // the new oil has about 44 there, so it is the floor of the maker that is put between
    let site = "file: site 1\nmachines:\n  M1:\n    ambient: 5 .. 35 degC\n    lubrication: splash\n    oil now: X\n    sump: held at 80 degC\n    start limit: 100000 mm2/s, maker\n    floor: 40 mm2/s, maker\n    parts:\n      - gear mesh: stage\n        pitch-line speed: 30 m/s\n";
    let oils = |loss: &str| {
        format!(
            "file: oils 1\nX:\n  kind: gear\n  base: mineral I, polymer-thickened\n  classes: [CKC]\n  additives: [EP]\n  sulphur: inactive\n  viscosity: [220 mm2/s at 40 degC, 25.9 mm2/s at 100 degC]\n{loss}  density: 890 kg/m3 at 15 degC\n"
        )
    };
    let host = |loss: &str| {
        MemoryHost::new()
            .with("site.yaml", site)
            .with("oils.yaml", &oils(loss))
    };
    let json = on(host(""), "gaps -f json -q").json();
    let all = json["gaps"].as_array().expect("a list");
    let gap = all
        .iter()
        .find(|g| g["key"] == "shear loss")
        .unwrap_or_else(|| panic!("{json}"));
    assert_eq!(gap["value"]["range"][1], 0.25, "{gap}");
    assert!(
        matches!(gap["decides"].as_str(), Some("which oil" | "a verdict")),
        "{gap}"
    );
    // the two ends stated in the file give the two words
    let word = |loss: &str| {
        let json = on(host(loss), "weigh M1 -f json -q").json();
        json["judgements"][0]["verdict"].as_str().map(str::to_owned)
    };
    let (none, most) = (
        word("  shear loss: 1 % at 100 degC, test \"20 h tapered roller bearing\"\n"),
        word("  shear loss: 25 % at 100 degC, test \"20 h tapered roller bearing\"\n"),
    );
    assert_ne!(none, most);
    assert_eq!(most.as_deref(), Some("fails"));
    // the pour point is not stated either: its base's range is a gap
    assert!(all.iter().any(|g| g["key"] == "pour point"), "{json}");
}
