//! What-if with the stated value changes nothing; a changed value moves what it should; the files
//! stay as they are.

use crate::judging::{rules, site};
use crate::scenario::{filmwright, on};
use filmwright::assets;
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use filmwright::model::machine::InputLine;
use std::collections::BTreeMap;

/// An input of the demonstration as the command line takes it.
fn setting(line: &InputLine) -> String {
    let value = line.written.replace('"', "'");
    match &line.about {
        Some(about) => format!("{about}: {}={value}", line.key),
        None => format!("{}={value}", line.key),
    }
}

#[test]
fn the_stated_value_changes_nothing() {
    let rules = rules();
    let text = |name| assets::template(name).unwrap_or_default();
    let demo = site(text("demo/site.yaml"), text("demo/oils.yaml"), &rules);
    let mut by_point: BTreeMap<String, Vec<String>> = BTreeMap::new();
    for point in &demo.points {
        let settable = |line: &&InputLine| {
            // what stands in the area or names another record is no key of the machine
            line.origin.inherited.is_none() && !line.written.contains('"')
        };
        let lines = point.inputs.iter().filter(settable).map(setting);
        by_point.insert(point.address(), lines.collect());
    }
    let mut set = 0;
    for (address, settings) in by_point {
        set += settings.len();
        let all: Vec<String> = settings.iter().map(|s| format!("--set \"{s}\"")).collect();
        let ran = filmwright(&format!("whatif \"{address}\" {} --demo -q", all.join(" ")));
        assert_eq!(ran.exit, Exit::Done, "{address} {settings:?}\n{}", ran.err);
        let same = format!("{address}  nothing changes\nFiles untouched.\n");
        assert_eq!(ran.out, same, "{settings:?}");
    }
    assert!(set > 90, "only {set} values were set");
}

/// The values of a record of the demonstration, each as `KEY=VALUE`: the lines one step deeper than
/// its heading, without remarks.
fn stated(text: &str, heading: &str) -> Vec<String> {
    let deep = |line: &str| line.len() - line.trim_start().len();
    let mut lines = text.lines().skip_while(|l| *l != heading);
    let indent = deep(lines.next().unwrap_or(""));
    lines
        .take_while(|l| l.trim().is_empty() || deep(l) > indent)
        .filter(|l| deep(l) == indent + 2 && !l.trim_start().starts_with('#') && !l.contains('"'))
        .filter_map(|l| l.split(" #").next()?.trim().split_once(": "))
        .map(|(key, value)| format!("{key}={}", value.trim()))
        .collect()
}

#[test]
fn the_stated_value_of_an_oil_an_area_or_the_house_changes_nothing() {
    let text = |name| assets::template(name).unwrap_or_default();
    let (site, oils) = (text("demo/site.yaml"), text("demo/oils.yaml"));
    let mut set = 0;
    for (name, heading, text) in [
        ("oil O-13", "O-13:", oils),
        ("O-05", "O-05:", oils),
        ("oil G-2", "G-2:", oils),
        ("house", "house:", site),
        ("area quarry and crushing", "  quarry and crushing:", site),
        ("board hall", "  board hall:", site),
        ("machine M10", "  M10:", site),
    ] {
        let values = stated(text, heading);
        assert!(!values.is_empty(), "{heading} is found");
        set += values.len();
        let all: Vec<String> = values
            .iter()
            .map(|v| format!("--set \"{name}: {v}\""))
            .collect();
        let ran = filmwright(&format!("whatif \"M0*\" {} --demo -q", all.join(" ")));
        assert_eq!(ran.exit, Exit::Done, "{all:?}\n{}", ran.err);
        let moves = ran.out.lines().filter(|l| !l.ends_with("nothing changes"));
        let moves: Vec<&str> = moves.filter(|l| !l.is_empty()).collect();
        assert_eq!(moves, ["Files untouched."], "{all:?}");
    }
    assert!(set > 40, "only {set} values were set");
}

/// A site where everything that has a name states something.
const NAMED: &str = "file: site 1\nsite: Test works\nhouse:\n  reserve: 0.5 step\n  rules:\n    slow, EP:\n      replaces: iso281-kappa\n      limit: kappa >= 0.9\n      for: EP\nareas:\n  yard:\n    ambient: -15 .. 35 degC\n  hall:\n    ambient: 5 .. 55 degC\nmachines:\n  M1:\n    area: yard\n    lubrication: splash\n    oil now: B-220\n    sump rise: 40 K\n    start limit: 25000 mm2/s, maker\n    parts:\n      - rolling bearing: 22220\n        speed: 236 r/min\n        rule: slow, EP\n  M2:\n    like: M1\n";
const NAMED_OILS: &str = "file: oils 1\nB-220:\n  kind: gear\n  base: PAO, no polymer\n  classes: [CKC]\n  additives: [EP]\n  viscosity: [220 mm2/s at 40 degC, 26.4 mm2/s at 100 degC]\n  pour point: -45 degC\n  density: 860 kg/m3 at 15 degC\nC-320:\n  like: B-220\n  viscosity: [320 mm2/s at 40 degC, 35 mm2/s at 100 degC]\n";

/// A value on the command line does what the same value in the file does.
#[test]
fn any_input_by_its_name_is_as_if_the_file_said_so() {
    let (site, oils) = (NAMED, NAMED_OILS);
    let host = |site: &str, oils: &str| {
        MemoryHost::new()
            .with("site.yaml", site)
            .with("oils.yaml", oils)
    };
    for (set, from, to) in [
        (
            "oil B-220: pour point=-12 degC",
            "pour point: -45 degC",
            "pour point: -12 degC",
        ),
        (
            "B-220: base=mineral I",
            "base: PAO, no polymer",
            "base: mineral I",
        ),
        (
            "C-320: viscosity=[100 mm2/s at 40 degC, 14 mm2/s at 100 degC]",
            "[320 mm2/s at 40 degC, 35 mm2/s at 100 degC]",
            "[100 mm2/s at 40 degC, 14 mm2/s at 100 degC]",
        ),
        (
            "house: reserve=6 step",
            "reserve: 0.5 step",
            "reserve: 6 step",
        ),
        ("reserve=6 step", "reserve: 0.5 step", "reserve: 6 step"),
        (
            "house: pour_margin=40 K",
            "  reserve: 0.5 step",
            "  reserve: 0.5 step\n  pour margin: 40 K",
        ),
        (
            "house rule slow, EP: limit=kappa >= 3",
            "kappa >= 0.9",
            "kappa >= 3",
        ),
        (
            "yard: ambient=-40 .. 55 degC",
            "-15 .. 35 degC",
            "-40 .. 55 degC",
        ),
        (
            "machine M1: sump rise=70 K",
            "sump rise: 40 K",
            "sump rise: 70 K",
        ),
    ] {
        assert_eq!(
            site.matches(from).count() + oils.matches(from).count(),
            1,
            "{from}"
        );
        let told = on(
            host(site, oils),
            &format!("whatif M2 --set \"{set}\" -f json -q"),
        );
        assert_eq!(told.exit, Exit::Done, "{set}: {}", told.err);
        let told = told.json();
        let edited = host(&site.replace(from, to), &oils.replace(from, to));
        let weighed = on(edited, "weigh M2 -f json -q").json();
        let moved = told["changes"].as_array().expect("a list");
        assert!(!moved.is_empty(), "{set} moves something");
        for change in moved {
            let all = weighed["judgements"].as_array().expect("a list");
            let j = all
                .iter()
                .find(|j| j["oil"] == change["oil"])
                .expect("weighed");
            assert_eq!(j["verdict"], change["after"], "{set}");
            for end in ["hot", "cold", "pour"] {
                let after = &change["margins"][end]["after"];
                assert!(
                    after.is_null() || *after == j["margins"][end]["value"],
                    "{set} {end}"
                );
            }
        }
    }
}

/// What a machine inherits or copies from is set before it inherits and copies.
#[test]
fn another_area_or_another_machine_to_copy_is_followed() {
    let host = || {
        MemoryHost::new()
            .with("site.yaml", NAMED)
            .with("oils.yaml", NAMED_OILS)
    };
    let json = on(host(), "whatif M1 --set area=hall -f json -q").json();
    let edited = MemoryHost::new()
        .with("site.yaml", &NAMED.replace("area: yard", "area: hall"))
        .with("oils.yaml", NAMED_OILS);
    let weighed = on(edited, "weigh M1 -f json -q").json();
    let moved = json["changes"].as_array().expect("a list");
    assert!(!moved.is_empty(), "{json}");
    for change in moved {
        let all = weighed["judgements"].as_array().expect("a list");
        let j = all.iter().find(|j| j["oil"] == change["oil"]);
        let j = j.expect("weighed");
        assert_eq!(j["verdict"], change["after"]);
        assert_eq!(
            j["margins"]["hot"]["value"],
            change["margins"]["hot"]["after"]
        );
    }
    // a machine with a rise of its own, then copying M1: nothing but M1's part is there
    let ran = on(host(), "whatif M2 --set like=M3");
    assert!(ran.err.contains("[like-unknown]"), "{}", ran.err);
}

#[test]
fn a_name_that_means_several_things_is_asked_back() {
    let host = || {
        let site = "file: site 1\nareas:\n  B-220:\n    ambient: -15 .. 35 degC\nmachines:\n  M1:\n    area: B-220\n    lubrication: splash\n    sump rise: 40 K\n    parts:\n      - gear mesh: B-220\n        pitch-line speed: 6 m/s\n";
        let oil = "  kind: gear\n  viscosity: [220 mm2/s at 40 degC, 26.4 mm2/s at 100 degC]\n";
        MemoryHost::new().with("site.yaml", site).with(
            "oils.yaml",
            &format!("file: oils 1\nB-220:\n{oil}C-220:\n{oil}"),
        )
    };
    for (set, name, says) in [
        (
            "pour point=-30 degC",
            "[set-which]",
            "\"oil C-220: pour point=-30 degC\"",
        ),
        ("B-220: name=x", "[set-which]", "\"part B-220: name=x\""),
        (
            "C-22O: pour point=-30 degC",
            "[set-whose]",
            "nothing here is called \"C-22O\"",
        ),
        (
            "CC-220: pour point=-30 degC",
            "[set-whose]",
            "did you mean \"C-220\"?",
        ),
        (
            "C-220: pour pont=-30 degC",
            "[key-unknown]",
            "did you mean \"pour point\"?",
        ),
        (
            "house: reserv=1 step",
            "[key-unknown]",
            "did you mean \"reserve\"?",
        ),
        (
            "reserv=1 step",
            "[key-unknown]",
            "did you mean \"reserve\"?",
        ),
        (
            "area B-220: pour point=-30 degC",
            "[key-unknown]",
            "area B-220 has no key",
        ),
        ("house: reserve=2 K", "[unit-other]", "reserve"),
    ] {
        let ran = on(host(), &format!("whatif M1 --set \"{set}\""));
        assert_eq!(ran.exit, Exit::Input, "{set}: {}", ran.out);
        let err = ran.err.replace('\n', " ");
        assert!(
            err.contains(name) && err.contains(says),
            "{set}: {}",
            ran.err
        );
    }
    // the only oil asked about needs no name
    let ran = on(
        host(),
        "whatif M1 --oil C-220 --set \"pour point=20 degC\" -q",
    );
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    assert!(
        ran.out.contains("C-220") && !ran.out.contains("B-220"),
        "{}",
        ran.out
    );
}

#[test]
fn a_limit_keeps_its_origin_unless_another_is_said() {
    // the maker's start limit of M02, raised: still the maker's, so it still replaces the rule's
    let json = filmwright("whatif M02 --set \"start limit=9000 mm2/s\" --demo -f json -q").json();
    let limit = &json["limits"][0];
    assert_eq!(limit["end"], "start ceiling", "{json}");
    assert_eq!(limit["after"]["limit"]["value"], 9000.0, "{limit}");
    assert!(
        limit["after"]["says"]
            .as_str()
            .is_some_and(|s| s.contains("maker"))
    );
}

#[test]
fn only_what_moves_is_printed_and_files_stay() {
    let host = crate::decide::gaps::host("40 K");
    let ran = on(host, "whatif M1 --set \"sump rise=60 K\"");
    assert_eq!(ran.exit, Exit::Done);
    assert!(ran.out.contains("hot floor"), "{}", ran.out);
    assert!(ran.out.ends_with("Files untouched.\n"), "{}", ran.out);
    let before = crate::decide::gaps::host("40 K");
    assert_eq!(ran.host.files, before.files);
    // margins of the table: the running temperature moves by 20 K, the start does not
    let json = on(
        crate::decide::gaps::host("40 K"),
        "whatif M1 --set \"sump rise=60 K\" -f json -q",
    );
    for change in json.json()["changes"].as_array().expect("a list") {
        assert!(change["margins"]["hot"].is_object(), "{change}");
        assert!(change["margins"]["cold"].is_null(), "{change}");
    }
}

#[test]
fn several_values_are_set_at_once_and_parts_by_name() {
    let ran = on(
        crate::decide::gaps::host("40 K"),
        "whatif M1 --set \"gear mesh stage: pitch-line speed=3 m/s\" --set \"heater=0 degC\" -f json -q",
    );
    let json = ran.json();
    let ends: Vec<&str> = json["limits"]
        .as_array()
        .expect("a list")
        .iter()
        .filter_map(|l| l["end"].as_str())
        .collect();
    assert!(
        ends.contains(&"hot floor") && ends.contains(&"start ceiling"),
        "{json}"
    );
    let csv = on(
        crate::decide::gaps::host("40 K"),
        "whatif M1 --set \"heater=0 degC\" -f csv -q",
    );
    assert!(
        csv.out
            .starts_with("machine,point,oil,in_use,before,after,hot_before_vg_step")
    );
}

#[test]
fn a_part_is_called_by_the_name_on_the_sheet_or_by_its_kind() {
    let told = |set: &str| {
        filmwright(&format!(
            "whatif M08 --set \"{set}: speed=100 r/min\" --demo -q -f json"
        ))
    };
    let by_name = told("dryer roll bearing");
    assert_eq!(by_name.exit, Exit::Done, "{}", by_name.err);
    let json = by_name.json();
    assert!(!json["changes"].as_array().expect("a list").is_empty());
    let by_kind = told("part rolling bearing 180 x 300 mm").json();
    assert_eq!(json["changes"], by_kind["changes"]);
}

#[test]
fn bad_settings_get_named_messages() {
    let ran = |set: &str| {
        on(
            crate::decide::gaps::host("40 K"),
            &format!("whatif M1 --set \"{set}\""),
        )
    };
    for (set, name) in [
        ("sump rise 48 K", "[set-form]"),
        ("sump ris=48 K", "[key-unknown]"),
        ("sump rise=48 degC", "[rise-not-temperature]"),
        ("sump rise=48", "[unit-missing]"),
        ("colour=blue", "[key-unknown]"),
        ("floor=-5 mm2/s", "[value-impossible]"),
    ] {
        let told = ran(set);
        assert_eq!(told.exit, Exit::Input, "{set}: {}", told.out);
        assert!(told.err.contains(name), "{set}: {}", told.err);
    }
    let crossed = on(
        crate::decide::gaps::host("40 K"),
        "whatif M1 --set \"floor=500 mm2/s\" --set \"ceiling=10 mm2/s\"",
    );
    assert_eq!(crossed.exit, Exit::Input, "{}", crossed.out);
    assert!(crossed.err.contains("[limits-crossed]"), "{}", crossed.err);
    let nobody = on(MemoryHost::new(), "whatif M1 --set \"sump rise=48 K\"");
    assert_eq!(nobody.exit, Exit::Input);
}
