//! The dirty register of the demonstration works, row by row. Rows and what each is to be read as
//! come with the invented works itself; conversions are those of NIST SP 811 (gallons) and
//! ASTM D2161 (Saybolt), the readings of names and placeholders common practice.

use crate::scenario::{Ran, on};
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use serde_json::Value;

pub(super) const REGISTER: &str = "\
row;tag;desc;lubricant;qty;temp;note
1;CV-101 GBX;gearbox conveyor;ISO 220 EP;15 gal;140;
2;CV101-GB;conveyor drive;gear oil 220;68 l;60 C;
3;HPU REEL;press hyd;HLP46;1.200;52,0;
4;WORM-K3;kiln feeder;AGMA 7 Comp?;22;88;
5;P-210 A/B/C;pumps;R&O 68 or equivalent;1,2 L ea;;
6;TURB-1;turbine;315 SUS;240 gal;113F;
7;FAN ID;bearing oil;SAE 20;3;136;
8;CMP-2;compressor;same as turbine;55 l;92 (discharge);
9;MIX-4;mixer;Gear 150;9 kg;131 F;food area
10;SPARE-X;scrapped 2019;0;999;0;
";

pub(super) fn read(text: &str, arguments: &str) -> Ran {
    on(
        MemoryHost::new().with("register.csv", text),
        &format!("intake register.csv {arguments}"),
    )
}

fn findings(ran: &Ran) -> Vec<Value> {
    ran.json()["findings"].as_array().expect("a list").clone()
}

/// What is said of a cell, all kinds together.
fn of(findings: &[Value], kind: &str, cell: &str) -> String {
    let found = findings
        .iter()
        .filter(|f| f["kind"] == kind && f["cell"] == cell);
    found
        .map(|f| f["says"].as_str().unwrap_or("").to_owned())
        .collect::<Vec<_>>()
        .join(" | ")
}

/// The lines of one machine in the draft.
pub(super) fn machine(site: &str, tag: &str) -> String {
    let from = site
        .find(&format!("\n  {tag}:\n"))
        .unwrap_or_else(|| panic!("no {tag} in\n{site}"));
    let rest = &site[from + 1..];
    let end = rest.find("\n\n").unwrap_or(rest.len());
    rest[..end].to_owned()
}

pub(super) fn file(ran: &Ran, name: &str) -> String {
    let bytes = ran.host.files.get(std::path::Path::new(name));
    String::from_utf8(
        bytes
            .unwrap_or_else(|| panic!("{name} was not written: {}", ran.err))
            .clone(),
    )
    .expect("UTF-8")
}

struct Read {
    findings: Vec<Value>,
    site: String,
    json: Value,
}

fn dirty() -> Read {
    let ran = read(REGISTER, "-f json");
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    Read {
        findings: findings(&ran),
        site: file(&ran, "site.yaml"),
        json: ran.json(),
    }
}

fn holds(text: &str, wanted: &[&str]) {
    for want in wanted {
        assert!(text.contains(want), "{want} is not in: {text}");
    }
}

#[test]
fn row_1_and_2_may_be_one_machine_and_the_gallon_was_imperial() {
    let r = dirty();
    holds(
        &of(&r.findings, "question", "row 3"),
        &[
            "CV-101 GBX of row 2",
            "CV101-GB of row 3",
            "may be the same machine",
            "15 gal(UK) and 68 L",
            "140 degF and 60 degC",
        ],
    );
    // 15 US gal is 56.8 L, 15 imperial gal is 68.2 L
    holds(&of(&r.findings, "question", "E2"), &["56.8 L", "68.2 L"]);
    let one = machine(&r.site, "CV-101 GBX");
    holds(
        &one,
        &[
            "unknown (56.8 .. 68.2 L)",
            "140 degF, assumed",
            "register row: 2",
        ],
    );
    holds(
        &machine(&r.site, "CV101-GB"),
        &["fill: 68 L, register", "sump: 60 degC, register"],
    );
    // 140 degF is 60 degC
    holds(
        &of(&r.findings, "question", "F2"),
        &["140 degF is 60.0 degC"],
    );
    // grade and family apart, base unknown
    holds(
        &of(&r.findings, "read as", "D2"),
        &["ISO VG 220; family EP; base unknown"],
    );
    holds(&one, &["oil now: unknown"]);
}

#[test]
fn row_3_follows_the_rule_of_decimal_commas() {
    let r = dirty();
    holds(
        &machine(&r.site, "HPU REEL"),
        &["1200 L, assumed", "52.0 degC, assumed"],
    );
    holds(
        &of(&r.findings, "question", "column E"),
        &["without a unit", "E4", "1200 L"],
    );
    holds(
        &r.json["read_as"].to_string(),
        &["decimal comma, found from 2 cells, the first F4"],
    );
}

#[test]
fn row_4_doubts_itself_and_is_no_oil_in_use() {
    let r = dirty();
    // AGMA 9005-D94: 7 is ISO VG 460, Comp compounded
    holds(
        &of(&r.findings, "not understood", "D5"),
        &["ISO VG 460", "compounded", "oil now: unknown"],
    );
    let one = machine(&r.site, "WORM-K3");
    holds(
        &one,
        &[
            "oil now: unknown",
            "AGMA 7 Comp?",
            "worm mesh: not stated",
            "22 L, assumed",
        ],
    );
}

#[test]
fn row_5_is_three_pumps_without_a_temperature() {
    let r = dirty();
    for tag in ["P-210 A", "P-210 B", "P-210 C"] {
        let one = machine(&r.site, tag);
        holds(
            &one,
            &[
                "fill: 1.2 L, register",
                "oil now: unknown",
                "register row: 6",
            ],
        );
        assert!(!one.contains("sump"), "{one}");
    }
    holds(
        &of(&r.findings, "question", "row 6"),
        &["one row, 3 machines", "alike"],
    );
    holds(
        &of(&r.findings, "question", "D6"),
        &["ISO VG 68", "R&O", "\"or equivalent\" is no name"],
    );
}

#[test]
fn row_6_has_a_viscosity_for_a_name_and_gallons() {
    let r = dirty();
    // 315 SUS at 100 degF is about 68 mm2/s: ASTM D2161; 240 US gal is 908 L
    holds(
        &of(&r.findings, "question", "D7"),
        &[
            "viscosity stands in place of a name",
            "67.9 mm2/s",
            "ISO VG 68",
        ],
    );
    holds(&of(&r.findings, "question", "E7"), &["908 L", "1090 L"]);
    holds(&machine(&r.site, "TURB-1"), &["sump: 113 degF, register"]);
}

#[test]
fn row_7_names_a_range_and_leaves_a_unit_out() {
    let r = dirty();
    // SAE J300: 6.9 to 9.3 mm2/s at 100 degC; roughly VG 46 to 68
    holds(
        &of(&r.findings, "read as", "D8"),
        &["range", "roughly ISO VG 46 to 68"],
    );
    // 136 degF is 57.8 degC
    holds(
        &of(&r.findings, "question", "F8"),
        &["136 degF is 57.8 degC"],
    );
    holds(&machine(&r.site, "FAN ID"), &["136 degF, assumed"]);
}

#[test]
fn row_8_refers_to_another_row_and_gives_the_discharge() {
    let r = dirty();
    holds(
        &of(&r.findings, "read as", "D9"),
        &["TURB-1 of row 7", "315 SUS"],
    );
    holds(
        &of(&r.findings, "not understood", "F9"),
        &["discharge", "that of the oil is wanted"],
    );
    let one = machine(&r.site, "CMP-2");
    assert!(!one.contains("sump:"), "{one}");
    holds(&one, &["fill: 55 L, register", "92 (discharge)"]);
}

#[test]
fn row_9_weighs_its_oil_and_stands_among_food() {
    let r = dirty();
    // 9 kg at 890 kg/m3 is 10.1 L; 131 degF is 55 degC
    holds(
        &machine(&r.site, "MIX-4"),
        &[
            "10.1 L, assumed",
            "131 degF, register",
            "food zone: yes",
            "note: food area",
        ],
    );
    holds(&of(&r.findings, "question", "row 10"), &["H1"]);
    holds(&of(&r.findings, "read as", "D10"), &["ISO VG 150"]);
}

#[test]
fn row_10_is_left_out_and_stays_as_a_remark() {
    let r = dirty();
    holds(&of(&r.findings, "left out", "row 11"), &["scrapped"]);
    assert!(!r.site.contains("\n  SPARE-X:"));
    holds(&r.site, &["# row 11: 10 | SPARE-X | scrapped 2019"]);
    assert_eq!(r.json["rows"], 10);
    assert_eq!(r.json["carried"], 9);
}

#[test]
fn the_draft_is_a_site_that_reads_and_weighs() {
    let ran = read(REGISTER, "-q");
    let host = ran.host.with("oils.yaml", "file: oils 1\nG:\n  kind: gear\n  viscosity: [220 mm2/s at 40 degC, 19 mm2/s at 100 degC]\n");
    let checked = on(host.clone(), "check --strict");
    assert_eq!(checked.exit, Exit::Done, "{}", checked.err);
    let mut host = host;
    host.stdout.clear();
    let weighed = on(host, "weigh -f json -q");
    assert_eq!(weighed.exit, Exit::Done, "{}", weighed.err);
    let all = weighed.json();
    let judged = all["judgements"].as_array().expect("a list");
    // Nothing holds on what a dirty register says alone.
    assert!(judged.iter().all(|j| j["verdict"] != "holds"), "{all}");
}

#[test]
fn a_report_of_the_draft_prints_row_and_notes() {
    let ran = read(REGISTER, "-q");
    let host = ran.host.with("oils.yaml", "file: oils 1\nG:\n  kind: gear\n  viscosity: [220 mm2/s at 40 degC, 19 mm2/s at 100 degC]\n");
    let report = on(host, "report --one-file -o r.html -q");
    let page = file(&report, "r.html");
    assert!(page.contains("register row 5"), "the row of WORM-K3");
    assert!(page.contains("AGMA 7 Comp"), "the note of WORM-K3");
}

#[test]
fn what_the_user_states_comes_before_what_was_found() {
    let ran = read(
        "tag,fill,oil temp\nA-1 gearbox,1.200 gal,60\nB-1 gearbox,15 gal,55\n",
        "--decimal comma --gallon us -o -",
    );
    holds(
        &ran.out,
        &["1200 gal(US), register", "15 gal(US), register"],
    );
    let asked = read(
        "tag,fill\nA-1 gearbox,1.200 L\nB-1 pump,\"1,200 L\"\n",
        "-f json",
    );
    let all = findings(&asked);
    holds(
        &of(&all, "not understood", "B2"),
        &["1.200 or 1200", "--decimal"],
    );
}

#[test]
fn a_motor_speed_is_a_question_and_no_correction() {
    let text = "tag;desc;bearing;speed\nCV-1;conveyor gearbox;22220 EK C3;1480 rpm\nFN-1;fan;6312-2RS;1480 rpm\nCV-2;conveyor drum;22220;66 rpm\n";
    let ran = read(text, "-f json");
    let all = findings(&ran);
    holds(
        &of(&all, "question", "D2"),
        &["speed of a motor", "driven shaft"],
    );
    assert_eq!(of(&all, "question", "D3"), "");
    assert_eq!(of(&all, "question", "D4"), "");
    let site = file(&ran, "site.yaml");
    holds(
        &machine(&site, "CV-1"),
        &[
            "rolling bearing: 22220 EK C3",
            "speed: 1480 r/min, register",
        ],
    );
    holds(&machine(&site, "FN-1"), &["rolling bearing: 6312-2RS"]);
}

#[test]
fn rows_that_point_at_each_other_end_in_a_finding() {
    let text = "tag;lubricant\nA-1;same as row 3\nB-1;same as row 2\nC-1;same as nothing known\nD-1;ISO 68\nE-1;ditto\n";
    let ran = read(text, "-f json");
    let all = findings(&ran);
    holds(&of(&all, "not understood", "B2"), &["circle"]);
    holds(&of(&all, "not understood", "B4"), &["no one row answers"]);
    holds(&of(&all, "read as", "B6"), &["D-1 of row 5"]);
}

#[test]
fn an_oil_of_the_list_is_taken_by_its_id_or_name() {
    let host = MemoryHost::new()
        .with("register.csv", "tag;lubricant;desc\nA-1;sg-220;gearbox\nB-1;PAO gear oil;gearbox\nC-1;ISO 220;gearbox\n")
        .with("oils.yaml", "file: oils 1\nSG-220:\n  name: PAO gear oil\n  kind: gear\n  viscosity: [220 mm2/s at 40 degC, 26 mm2/s at 100 degC]\n");
    let ran = on(host, "intake register.csv -q");
    let site = file(&ran, "site.yaml");
    holds(&machine(&site, "A-1"), &["oil now: SG-220"]);
    holds(&machine(&site, "B-1"), &["oil now: SG-220"]);
    holds(&machine(&site, "C-1"), &["oil now: unknown"]);
    assert_eq!(on(ran.host, "check").exit, Exit::Done);
}

proptest::proptest! {
    #![proptest_config(proptest::prelude::ProptestConfig { failure_persistence: None, ..proptest::prelude::ProptestConfig::with_cases(96) })]

    /// Whatever stands in a register: the draft reads as a site, and nothing is lost: every cell
    /// that carries text is in the draft or in a finding.
    #[test]
    fn whatever_the_cells_hold_the_draft_reads(
        cells in proptest::collection::vec(("[A-Z]{1,3}-[0-9]{1,3}", "[ -~äß°µ]{0,18}", "[ -~°]{0,12}", "[0-9.,]{0,6} ?(L|gal|kg|C|F|degC)?"), 1..6)
    ) {
        let mut text = String::from("tag;desc;lubricant;fill;temp\n");
        for (tag, desc, oil, fill) in &cells {
            let q = |t: &str| format!("\"{}\"", t.replace('"', "\"\""));
            let row = [q(tag), q(desc), q(oil), q(fill), q(fill)].join(";");
            text.push_str(&row);
            text.push('\n');
        }
        let ran = read(&text, "-q --delimiter semicolon");
        proptest::prop_assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
        let host = ran.host.clone();
        let checked = on(host, "check");
        proptest::prop_assert_eq!(checked.exit, Exit::Done, "{}\n{}", checked.err, file(&ran, "site.yaml"));
    }
}
