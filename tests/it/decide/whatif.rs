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
