//! One machine for each kind of part: its sheet carries the answer, the governing number, the step
//! it comes from and its source, read back from the printed page against `weigh`.

use super::pages::{Pages, figures, row_of, rows, written};
use crate::scenario::on;
use filmwright::cli::host::MemoryHost;
use filmwright::input::keys::part::KINDS;
use serde_json::Value;
use std::collections::BTreeSet;

const OILS: &str = "file: oils 1
G-220: { kind: gear, base: PAO, additives: [EP], classes: [CKD], sulphur: inactive, viscosity: [220 mm2/s at 40 degC, 26.4 mm2/s at 100 degC], density: 855 kg/m3 at 15 degC, pour point: -42 degC }
W-460: { kind: gear, base: mineral I, additives: [compounded], classes: [CKE], viscosity: [460 mm2/s at 40 degC, 31 mm2/s at 100 degC], density: 900 kg/m3 at 15 degC, pour point: -15 degC }
T-46: { kind: circulating, base: mineral II, classes: [TSA, HL], viscosity: [46 mm2/s at 40 degC, 6.8 mm2/s at 100 degC], density: 870 kg/m3 at 15 degC, pour point: -24 degC }
H-46: { kind: hydraulic, base: mineral II, classes: [HM], viscosity: [46 mm2/s at 40 degC, 6.8 mm2/s at 100 degC], density: 870 kg/m3 at 15 degC, pour point: -30 degC }
E-40: { kind: engine, base: mineral I, classes: [SAE 40], viscosity: [140 mm2/s at 40 degC, 14.3 mm2/s at 100 degC], density: 890 kg/m3 at 15 degC, pour point: -21 degC }
A-90: { kind: axle, base: \"mineral I, no polymer\", additives: [EP], classes: [GL-5, SAE 80W-90], viscosity: [140 mm2/s at 40 degC, 14.7 mm2/s at 100 degC], density: 895 kg/m3 at 15 degC, pour point: -27 degC }
K-2: { kind: grease, base: mineral I, thickener: polyurea, NLGI: \"2\", base oil: [110 mm2/s at 40 degC, 11 mm2/s at 100 degC], density: 890 kg/m3 at 15 degC }
";

/// Tag, lubrication, oil now, parts.
const MACHINES: &[(&str, &str, &str, &str)] = &[
    (
        "ROLL",
        "bath",
        "T-46",
        "- rolling bearing: { bore: 60 mm, outside: 110 mm, type: cylindrical roller }\n  speed: 1480 r/min\n  load: 5 kN\n",
    ),
    (
        "MESH",
        "splash",
        "G-220",
        "- gear mesh: stage\n  type: helical\n  teeth: 20/63\n  normal module: 5 mm\n  helix: 12 deg\n  face width: 60 mm\n  pinion speed: 1480 r/min\n  pinion torque: 650 N.m\n",
    ),
    (
        "BEVEL",
        "splash",
        "G-220",
        "- gear mesh: stage\n  type: spiral bevel\n  teeth: 17/52\n  normal module: 5 mm\n  face width: 45 mm\n  pinion speed: 1480 r/min\n  power: 45 kW\n",
    ),
    (
        "HYPOID",
        "splash",
        "G-220",
        "- gear mesh: stage\n  type: hypoid\n  pitch-line speed: 8 m/s\n",
    ),
    (
        "WORM",
        "splash",
        "W-460",
        "- worm mesh: stage\n  worm diameter: 80 mm\n  worm speed: 1000 r/min\n  lead angle: 11.31 deg\n  wheel: bronze\n  power: 4 kW\n",
    ),
    (
        "OPEN",
        "bath",
        "W-460",
        "- open gear: girth\n  application: bath\n  centre distance: 1200 mm\n  ratio: 6\n  face width: 250 mm\n  pinion speed: 90 r/min\n  power: 300 kW\n",
    ),
    (
        "JOURNAL",
        "ring",
        "T-46",
        "- journal bearing: fan\n  diameter: 100 mm\n  width: 80 mm\n  radial clearance: 0.08 mm\n  speed: 1480 r/min\n  load: 9 kN\n  feed: ring\n",
    ),
    (
        "THRUST",
        "bath",
        "T-46",
        "- thrust bearing: collar\n  pads: 6\n  pad length: 60 mm\n  pad width: 60 mm\n  mean diameter: 200 mm\n  speed: 1480 r/min\n  load: 30 kN\n",
    ),
    (
        "CAM",
        "splash",
        "G-220",
        "- contact: cam\n  radius: 10 mm\n  load per length: 200 N/mm\n  entrainment speed: 2 m/s\n  slide-roll: 0.5\n  roughness 1: Rq 0.15 um\n  roughness 2: Rq 0.20 um\n",
    ),
    ("PUMP", "reservoir", "H-46", "- component: hyd_pump_vane\n"),
    (
        "ENGINE",
        "pressure-fed",
        "E-40",
        "- engine: main\n  hot grade: 40\n",
    ),
    ("AXLE", "splash", "A-90", "- axle: rear\n  hot grade: 90\n"),
    (
        "MOTOR",
        "grease",
        "K-2",
        "- rolling bearing: { bore: 95 mm, outside: 200 mm, width: 45 mm, type: deep groove ball }\n  speed: 1480 r/min\n",
    ),
];

fn host() -> MemoryHost {
    let mut site = String::from("file: site 1\nsite: Test yard\nmachines:\n");
    for (tag, lubrication, oil, parts) in MACHINES {
        let machine = format!(
            "  {tag}:\n    ambient: 10 .. 30 degC, measured\n    lubrication: {lubrication}\n    sump: 62 degC, measured\n    at ambient: 28 degC\n    oil now: {oil}\n    yellow metal: no\n    backstop: no\n    parts:\n"
        );
        site.push_str(&machine);
        for line in parts.lines() {
            site.push_str("      ");
            site.push_str(line);
            site.push('\n');
        }
    }
    MemoryHost::new()
        .with("site.yaml", &site)
        .with("oils.yaml", OILS)
}

fn made() -> (Pages, Vec<Value>) {
    let weighed = on(host(), "weigh -f json -q");
    assert!(!weighed.out.is_empty(), "{}", weighed.err);
    let judgements = weighed.json()["judgements"]
        .as_array()
        .expect("a list")
        .clone();
    let ran = on(host(), "report -q -o out");
    assert_eq!(ran.exit as u8, 0, "{}", ran.err);
    (written(&ran.host, "out"), judgements)
}

/// The words of a page, one blank between them.
fn words(page: &str) -> String {
    use crate::report_pages::markup::{Piece, tags};
    let mut text = String::new();
    for piece in tags(page) {
        if let Piece::Text(words) = piece {
            text.push_str(&words);
            text.push(' ');
        }
    }
    plain(&text)
}

/// Without what typesetting does to signs and spaces.
fn plain(text: &str) -> String {
    let text = text
        .replace('\u{2212}', "-")
        .replace(['\u{202f}', '\u{a0}'], " ");
    let text = text
        .replace("°C", "degC")
        .replace("m²", "m2")
        .replace("m³", "m3");
    text.split_whitespace().collect::<Vec<_>>().join(" ")
}

#[test]
fn every_kind_of_part_has_its_machine() {
    let told: BTreeSet<&str> = MACHINES
        .iter()
        .filter_map(|(_, _, _, parts)| parts.trim_start_matches("- ").split(':').next())
        .collect();
    let kinds: BTreeSet<&str> = KINDS.iter().map(|k| k.first).collect();
    assert_eq!(told, kinds);
}

#[test]
fn a_sheet_for_each_kind_of_part_carries_answer_number_step_and_source() {
    let (pages, judgements) = made();
    let needs = on(host(), "need -f json -q").json();
    let (mut figures_read, mut limits_read) = (0, 0);
    for (tag, ..) in MACHINES {
        let page = &pages[&format!("machine-{tag}.html")];
        let text = words(page);
        let mine: Vec<&Value> = judgements
            .iter()
            .filter(|j| j["machine"] == *tag && j["verdict"] != "barred")
            .collect();
        assert!(!mine.is_empty(), "{tag}: nothing weighed");
        let table = rows(page, "oils").remove(0);
        for j in &mine {
            let row = row_of(&table, j["oil"].as_str().expect("an id"));
            let word = j["verdict"].as_str().expect("a word");
            assert!(row.contains(word), "{tag}: {word} not in {row}");
            for figure in figures(j) {
                assert!(row.contains(&figure), "{tag}: {figure} not in {row}");
                figures_read += 1;
            }
        }
        // the steps of the best candidate: each margin's step is among those told
        let best = mine[0];
        let steps = best["steps"].as_array().expect("steps");
        for end in ["hot", "cold"] {
            if let Some(step) = best["margins"][end]["step"].as_str() {
                assert!(steps.iter().any(|s| s["id"] == step), "{tag}: {step}");
            }
        }
        // every governing limit stands on the sheet with its number and its source
        let demands = needs["demands"].as_array().expect("a list");
        let governs = demands
            .iter()
            .filter(|d| d["machine"] == *tag && d["governs"] == true);
        for d in governs {
            let source = d["source"].as_str().expect("a source");
            let first = source.split("; ").next().unwrap_or(source);
            let first = plain(first);
            assert!(text.contains(&first), "{tag}: {first} not on the sheet");
            limits_read += 1;
        }
        for law in used(best) {
            assert!(text.contains(&law), "{tag}: {law} not on the sheet");
        }
    }
    assert!(figures_read > 150, "{figures_read}");
    assert!(limits_read > 30, "{limits_read}");
}

/// Sources of the relations behind the margins of a judgement.
fn used(judgement: &Value) -> BTreeSet<String> {
    let steps = judgement["steps"].as_array().expect("steps");
    steps
        .iter()
        .filter_map(|s| s["source"].as_str())
        .filter(|s| !s.is_empty() && *s != "definition")
        .map(|s| {
            s.split(['(', ';', ','])
                .next()
                .unwrap_or(s)
                .trim()
                .to_owned()
        })
        .collect()
}
