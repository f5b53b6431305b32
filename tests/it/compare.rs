//! What moved and why: a site with itself, one input changed in each of fifty ways, two inputs
//! that act only together, two that each suffice.
//!
//! What is right needs no source: the test makes the change itself and asks for its name.

use crate::scenario::{Ran, on};
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use serde_json::Value;

const SITE: &str = r"file: site 1
site: Small works
reviewed: 2026-11-02
revision: A
house:
  reserve: 0.5 step
areas:
  yard:
    ambient: -15 .. 32 degC
    exposure: outdoor
  hall:
    ambient: 5 .. 36 degC
    exposure: indoor
machines:
  G-1:
    name: Conveyor drive
    area: yard
    lubrication: splash
    fill: 46 L
    annual use: 30 L a year
    oil now: M-220
    asks for: EP
    sump rise: 36 K
    start limit: 25000 mm2/s, maker
    backstop: no
    yellow metal: no
    seals: FKM
    parts:
      - gear mesh: slow stage
        pitch-line speed: 4.2 m/s
      - rolling bearing: 22220
        speed: 236 r/min
  P-2:
    name: Pump bearings
    area: hall
    count: 2
    lubrication: bath
    fill: 1.2 L
    oil now: R-68
    sump: 62 degC
    at ambient: 36 degC
    start limit: 1500 mm2/s, maker
    parts:
      - rolling bearing: 6314
        speed: 2980 r/min
  H-3:
    name: Hydraulic unit
    area: hall
    lubrication: reservoir
    fill: 200 L
    oil now: H-46
    sump: held at 52 degC
    start: 10 degC
    floor: 12 mm2/s, maker
    ceiling: 160 mm2/s, maker
    start limit: 1000 mm2/s, maker
    yellow metal: yes
    seals: NBR
    parts:
      - component: hyd_pump_gear_external
        pressure: 140 bar
  W-4:
    name: Fan
    area: yard
    ambient: -5 .. 34 degC
    lubrication: bath
    oil now: unknown
    sump rise: 28 K
    parts:
      - rolling bearing: { bore: 120 mm, outside: 215 mm, type: spherical roller }
        speed: 980 r/min
";

const OILS: &str = r"file: oils 1
M-220:
  name: Mineral EP 220
  kind: gear
  classes: [CKC]
  base: mineral I
  additives: [EP]
  sulphur: inactive
  viscosity: [220 mm2/s at 40 degC, 18.8 mm2/s at 100 degC]
  pour point: -21 degC
  density: 893 kg/m3 at 15 degC
  price: 3.10 per L
S-220:
  name: Synthetic EP 220
  kind: gear
  classes: [CKC]
  base: PAO, no polymer
  additives: [EP]
  sulphur: inactive
  viscosity: [220 mm2/s at 40 degC, 26.4 mm2/s at 100 degC]
  pour point: -42 degC
  density: 855 kg/m3 at 15 degC
  price: 9.80 per L
R-68:
  name: Circulating 68
  kind: circulating
  classes: [CKB]
  base: mineral II
  additives: [R&O]
  viscosity: [68 mm2/s at 40 degC, 8.7 mm2/s at 100 degC]
  pour point: -18 degC
  density: 872 kg/m3 at 15 degC
  price: 2.30 per L
H-46:
  name: Hydraulic 46
  kind: hydraulic
  classes: [HM]
  base: mineral II
  additives: [AW]
  viscosity: [46 mm2/s at 40 degC, 6.9 mm2/s at 100 degC]
  pour point: -30 degC
  density: 870 kg/m3 at 15 degC
  price: 2.10 per L
";

/// Text in a file, what it is replaced by, and the name of that input.
type Edit = (&'static str, &'static str, &'static str);

#[rustfmt::skip]
const EDITS: [Edit; 50] = [
    ("reserve: 0.5 step", "reserve: 1.5 step", "house: reserve"),
    ("ambient: -15 .. 32 degC", "ambient: -28 .. 32 degC", "area yard: ambient"),
    ("ambient: 5 .. 36 degC", "ambient: 5 .. 48 degC", "area hall: ambient"),
    ("sump rise: 36 K", "sump rise: 58 K", "G-1: sump rise"),
    ("start limit: 25000 mm2/s, maker", "start limit: 4000 mm2/s, maker", "G-1: start limit"),
    ("pitch-line speed: 4.2 m/s", "pitch-line speed: 1.6 m/s", "G-1, part 1: pitch-line speed"),
    ("speed: 236 r/min", "speed: 42 r/min", "G-1, part 2: speed"),
    ("lubrication: splash", "lubrication: circulated", "G-1: lubrication"),
    ("oil now: R-68", "oil now: H-46", "P-2: oil now"),
    ("sump: 62 degC", "sump: 88 degC", "P-2: sump"),
    ("at ambient: 36 degC", "at ambient: 20 degC", "P-2: at ambient"),
    ("start limit: 1500 mm2/s, maker", "start limit: 300 mm2/s, maker", "P-2: start limit"),
    ("rolling bearing: 6314", "rolling bearing: 6208", "P-2, part 1: rolling bearing"),
    ("speed: 2980 r/min", "speed: 480 r/min", "P-2, part 1: speed"),
    ("oil now: H-46", "oil now: R-68", "H-3: oil now"),
    ("sump: held at 52 degC", "sump: held at 78 degC", "H-3: sump"),
    ("start: 10 degC", "start: -12 degC", "H-3: start"),
    ("floor: 12 mm2/s, maker", "floor: 36 mm2/s, maker", "H-3: floor"),
    ("ceiling: 160 mm2/s, maker", "ceiling: 30 mm2/s, maker", "H-3: ceiling"),
    ("start limit: 1000 mm2/s, maker", "start limit: 120 mm2/s, maker", "H-3: start limit"),
    ("ambient: -5 .. 34 degC", "ambient: -20 .. 34 degC", "W-4: ambient"),
    ("oil now: unknown", "oil now: R-68", "W-4: oil now"),
    ("sump rise: 28 K", "sump rise: 52 K", "W-4: sump rise"),
    ("speed: 980 r/min", "speed: 150 r/min", "W-4, part 1: speed"),
    ("outside: 215 mm", "outside: 260 mm", "W-4, part 1, rolling bearing: outside"),
    ("pour point: -21 degC", "pour point: -3 degC", "oil M-220: pour point"),
    ("[220 mm2/s at 40 degC, 26.4 mm2/s at 100 degC]", "[460 mm2/s at 40 degC, 45.2 mm2/s at 100 degC]", "oil S-220: viscosity"),
    ("pour point: -42 degC", "pour point: -9 degC", "oil S-220: pour point"),
    ("classes: [CKB]", "classes: [HM]", "oil R-68: classes"),
    ("[68 mm2/s at 40 degC, 8.7 mm2/s at 100 degC]", "[32 mm2/s at 40 degC, 5.4 mm2/s at 100 degC]", "oil R-68: viscosity"),
    ("pour point: -18 degC", "pour point: 6 degC", "oil R-68: pour point"),
    ("classes: [HM]", "classes: [CKC]", "oil H-46: classes"),
    ("[46 mm2/s at 40 degC, 6.9 mm2/s at 100 degC]", "[22 mm2/s at 40 degC, 4.3 mm2/s at 100 degC]", "oil H-46: viscosity"),
    ("    asks for: EP\n", "    asks for: EP\n    heater: 5 degC\n", "G-1: heater"),
    ("    asks for: EP\n", "    asks for: EP\n    maker grade: ISO VG 320\n", "G-1: maker grade"),
    ("    asks for: EP\n", "    asks for: EP\n    floor: 90 mm2/s, maker\n", "G-1: floor"),
    ("    asks for: EP\n", "    asks for: EP\n    ceiling: 40 mm2/s, maker\n", "G-1: ceiling"),
    ("    asks for: EP\n", "    asks for: EP\n    oil limit: 60 degC, maker\n", "G-1: oil limit"),
    ("    asks for: EP\n", "    asks for: EP\n    start: 8 degC\n", "G-1: start"),
    ("    oil now: R-68\n", "    oil now: R-68\n    food class: H1\n", "P-2: food class"),
    ("    oil now: R-68\n", "    oil now: R-68\n    fire class: fire resistant\n", "P-2: fire class"),
    ("    oil now: H-46\n", "    oil now: H-46\n    environment: EAL\n", "H-3: environment"),
    ("    oil now: unknown\n", "    oil now: unknown\n    heater: 20 degC\n", "W-4: heater"),
    ("    oil now: unknown\n", "    oil now: unknown\n    asks for: DAG\n", "W-4: asks for"),
    ("[220 mm2/s at 40 degC, 18.8 mm2/s at 100 degC]", "[32 mm2/s at 40 degC, 5.4 mm2/s at 100 degC]", "oil M-220: viscosity"),
    ("  price: 3.10 per L\n", "  price: 3.10 per L\n  oil limit: 50 degC\n", "oil M-220: oil limit"),
    ("  price: 9.80 per L\n", "  price: 9.80 per L\n  sheared: [140 mm2/s at 40 degC, 17.5 mm2/s at 100 degC]\n", "oil S-220: sheared"),
    ("  price: 9.80 per L\n", "  price: 9.80 per L\n  oil limit: 60 degC\n", "oil S-220: oil limit"),
    ("  price: 2.30 per L\n", "  price: 2.30 per L\n  oil limit: 45 degC\n", "oil R-68: oil limit"),
    ("pour point: -30 degC", "pour point: 2 degC", "oil H-46: pour point"),
];

/// Inputs that differ and move no verdict, oil or limit.
#[rustfmt::skip]
const IDLE: [Edit; 17] = [
    ("oil now: M-220", "oil now: S-220", "G-1: oil now"),
    ("asks for: EP", "asks for: AW", "G-1: asks for"),
    ("backstop: no", "backstop: sprag", "G-1: backstop"),
    ("rolling bearing: 22220", "rolling bearing: 22316", "G-1, part 2: rolling bearing"),
    ("fill: 46 L", "fill: 52 L", "G-1: fill"),
    ("annual use: 30 L a year", "annual use: 44 L a year", "G-1: annual use"),
    ("name: Conveyor drive", "name: Conveyor head drive", "G-1: name"),
    ("    yellow metal: no\n", "    yellow metal: yes\n", "G-1: yellow metal"),
    ("count: 2", "count: 3", "P-2: count"),
    ("component: hyd_pump_gear_external", "component: hyd_pump_vane", "H-3, part 1: component"),
    ("[220 mm2/s at 40 degC, 18.8 mm2/s at 100 degC]", "[150 mm2/s at 40 degC, 14.6 mm2/s at 100 degC]", "oil M-220: viscosity"),
    ("price: 3.10 per L", "price: 12.40 per L", "oil M-220: price"),
    ("density: 893 kg/m3 at 15 degC", "density: 899 kg/m3 at 15 degC", "oil M-220: density"),
    ("base: PAO, no polymer", "base: PAG water-soluble", "oil S-220: base"),
    ("price: 9.80 per L", "price: 1.10 per L", "oil S-220: price"),
    ("additives: [R&O]", "additives: [R&O, zinc]", "oil R-68: additives"),
    ("name: Hydraulic 46", "name: Hydraulic oil 46", "oil H-46: name"),
];

fn host(site: &str, oils: &str) -> MemoryHost {
    MemoryHost::new()
        .with("old/site.yaml", SITE)
        .with("old/oils.yaml", OILS)
        .with("new/site.yaml", site)
        .with("new/oils.yaml", oils)
}

/// The files with texts replaced; each stands in one of them, once.
fn edited(edits: &[(&str, &str)]) -> MemoryHost {
    let (mut site, mut oils) = (SITE.to_owned(), OILS.to_owned());
    for (from, to) in edits {
        assert_eq!(
            site.matches(from).count() + oils.matches(from).count(),
            1,
            "{from} stands once"
        );
        site = site.replace(from, to);
        oils = oils.replace(from, to);
    }
    host(&site, &oils)
}

fn compared(edits: &[(&str, &str)]) -> Value {
    let ran = on(edited(edits), "compare old new -f json -q");
    assert_eq!(ran.exit, Exit::Done, "{edits:?}: {}", ran.err);
    ran.json()
}

fn list<'v>(value: &'v Value, key: &str) -> &'v [Value] {
    value[key].as_array().map_or(&[], Vec::as_slice)
}

fn inputs(value: &Value, key: &str) -> Vec<String> {
    let named = list(value, key).iter();
    named
        .filter_map(|c| c["input"].as_str().map(str::to_owned))
        .collect()
}

#[test]
fn a_site_with_itself_is_empty() {
    let ran = on(host(SITE, OILS), "compare old new -q");
    assert_eq!(ran.out, "nothing differs\n", "{}", ran.err);
    let json = compared(&[]);
    assert!(list(&json, "changes").is_empty() && list(&json, "inputs").is_empty());
    // comments, spacing and the order of keys are no inputs
    let spaced = SITE.replace("fill: 46 L", "fill: 46 L   # measured with a dipstick");
    let ran = on(host(&spaced, OILS), "compare old new -q");
    assert_eq!(ran.out, "nothing differs\n");
}

#[test]
fn one_input_changed_in_each_of_fifty_ways_is_named() {
    for (from, to, name) in EDITS {
        let json = compared(&[(from, to)]);
        assert_eq!(inputs(&json, "inputs"), [name], "{from} -> {to}");
        let changes = list(&json, "changes");
        for change in changes {
            assert_eq!(inputs(change, "because"), [name], "{change}");
            assert_eq!(change["each_alone"], true, "{change}");
        }
        assert!(!changes.is_empty(), "{name}: {from} -> {to} moves nothing");
        assert_eq!(json["inputs"][0]["moved"], true, "{name}");
    }
}

#[test]
fn an_input_that_moves_nothing_is_named_as_such() {
    for (from, to, name) in IDLE {
        let json = compared(&[(from, to)]);
        assert_eq!(inputs(&json, "inputs"), [name], "{from} -> {to}");
        assert!(list(&json, "changes").is_empty(), "{name}: {json}");
        assert_eq!(json["inputs"][0]["moved"], false, "{name}");
    }
    let both = [(IDLE[4].0, IDLE[4].1), (EDITS[5].0, EDITS[5].1)];
    let json = compared(&both);
    for change in list(&json, "changes") {
        assert_eq!(inputs(change, "because"), [EDITS[5].2], "{change}");
    }
}

fn verdict<'v>(json: &'v Value, machine: &str, oil: &str) -> &'v Value {
    list(json, "changes")
        .iter()
        .find(|c| c["machine"] == machine && c["oil"] == oil && c["what"] == "verdict")
        .unwrap_or_else(|| panic!("{machine} with {oil} does not move: {json}"))
}

/// Too thin hot and too thick cold: neither input alone turns the verdict.
#[test]
fn two_inputs_that_act_only_together_are_both_named() {
    let hot = ("sump rise: 36 K", "sump rise: 62 K");
    let cold = (
        "start limit: 25000 mm2/s, maker",
        "start limit: 1500 mm2/s, maker",
    );
    let (mut site, oils) = (SITE.to_owned(), OILS);
    for (from, to) in [hot, cold] {
        site = site.replace(from, to);
    }
    // the other way round: both have to be mended before the oil serves
    let host = MemoryHost::new()
        .with("old/site.yaml", &site)
        .with("old/oils.yaml", oils)
        .with("new/site.yaml", SITE)
        .with("new/oils.yaml", oils);
    let json = on(host, "compare old new -f json -q").json();
    let change = verdict(&json, "G-1", "S-220");
    assert_eq!(change["was"], "fails");
    let named = inputs(change, "because");
    assert_eq!(named, ["G-1: sump rise", "G-1: start limit"], "{change}");
    assert_eq!(change["each_alone"], false);
}

#[test]
fn two_inputs_that_each_suffice_are_both_named() {
    let json = compared(&[
        ("sump rise: 36 K", "sump rise: 75 K"),
        (
            "start limit: 25000 mm2/s, maker",
            "start limit: 900 mm2/s, maker",
        ),
    ]);
    let change = verdict(&json, "G-1", "S-220");
    assert_eq!(change["is"], "fails");
    let named = inputs(change, "because");
    assert_eq!(named, ["G-1: sump rise", "G-1: start limit"], "{change}");
    assert_eq!(change["each_alone"], true);
}

/// A reading in place of a rise is one change: neither half alone is a site.
#[test]
fn keys_that_state_one_thing_change_as_one() {
    let json = compared(&[("sump rise: 36 K", "sump: 95 degC\n    at ambient: 32 degC")]);
    assert_eq!(list(&json, "inputs").len(), 1, "{json}");
    assert!(!list(&json, "changes").is_empty());
}

#[test]
fn a_machine_and_an_oil_that_came_are_told() {
    let more = format!(
        "{SITE}  Z-9:\n    area: hall\n    lubrication: bath\n    sump rise: 20 K\n    parts:\n      - rolling bearing: 6208\n        speed: 900 r/min\n"
    );
    let ran = on(host(&more, OILS), "compare old new -q");
    assert!(ran.out.contains("Z-9\n  machine  new"), "{}", ran.out);
    assert!(ran.out.contains("because Z-9"), "{}", ran.out);
}

#[test]
fn a_result_file_is_compared_like_its_folder() {
    let kept = on(host(SITE, OILS), "weigh -C old -f json -q").out;
    let edit = ("speed: 2980 r/min", "speed: 480 r/min");
    let files = edited(&[edit]).with("old.json", &kept);
    let by_file = on(files, "compare old.json new -f json -q").json();
    let by_folder = compared(&[edit]);
    assert_eq!(by_file["changes"], by_folder["changes"]);
    // judged as new and judged worn: the option is the cause
    let text = |name| filmwright::assets::template(name).unwrap_or_default();
    let demo = host(text("demo/site.yaml"), text("demo/oils.yaml"));
    let kept = on(demo.clone(), "weigh -C new --as new -f json -q").out;
    let files = demo.with("new.json", &kept);
    let json = on(files, "compare new.json new -f json -q").json();
    assert_eq!(inputs(&json, "inputs"), ["option --as"], "{json}");
    // a multigrade that shears out of its grade: the invented works was written for it
    assert_eq!(verdict(&json, "M04", "O-05")["is"], "fails");
    for change in list(&json, "changes") {
        assert_eq!(inputs(change, "because"), ["option --as"], "{change}");
    }
    let without = host(SITE, OILS).with("other.json", "{\"format\": \"filmwright.weigh 1\"}");
    let ran: Ran = on(without, "compare other.json new -q");
    assert_eq!(ran.exit, Exit::Input);
    assert!(ran.err.contains("carries no inputs"), "{}", ran.err);
    let ran = on(host(SITE, OILS), "compare nowhere new -q");
    assert_eq!(ran.exit, Exit::File, "{}", ran.err);
}

#[test]
fn the_report_has_a_page_of_what_moved() {
    let files = edited(&[("sump rise: 36 K", "sump rise: 62 K")]);
    let ran = on(files, "report -C new --since old --one-file -o - -q");
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    assert!(
        ran.out.contains("Changed since revision A of 2026-11-02"),
        "the page is there"
    );
    assert!(ran.out.contains("G-1: sump rise"), "with its cause");
}
