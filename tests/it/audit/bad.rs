//! Laboratory tables as they should not be: a named problem each, and nothing lost.

use super::sites::with;
use crate::scenario::{Ran, on};
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;

fn audit(table: &str, map: &str) -> Ran {
    on(with(table, map), "audit -f json")
}

fn told(ran: &Ran, code: &str) {
    assert!(
        ran.err.contains(&format!("[{code}]")),
        "no {code} in:\n{}",
        ran.err
    );
}

const GOOD: &str = "machine,label,drawn,nu40,nu100\nHP-1,H46,2026-10-01,45.9,6.80\nGB-104,G220,2026-10-02,221,19.0\n";

#[test]
fn a_wrong_delimiter_is_named() {
    let ran = audit(&GOOD.replace(',', ";"), "delimiter: comma\n");
    assert_eq!(ran.exit, Exit::Input);
    told(&ran, "columns-unknown");
    assert!(ran.err.contains("delimiter: semicolon"), "{}", ran.err);
    assert_eq!(audit(&GOOD.replace(',', ";"), "").exit, Exit::Done);
}

#[test]
fn a_missing_column_is_named_with_those_there_are() {
    let ran = audit(GOOD, "columns: { flash: Flash COC }\n");
    assert_eq!(ran.exit, Exit::Input);
    told(&ran, "column-missing");
    let ran = audit("machine,nu40,nu40\nHP-1,1,2\n", "");
    told(&ran, "column-twice");
}

#[test]
fn shifted_rows_are_kept_and_not_used() {
    let table = "machine,label,drawn,nu40,nu100\nHP-1,press, big,H46,2026-10-01,45.9,6.80\nGB-104,G220,2026-10-02,221,19.0\n";
    let ran = audit(table, "");
    told(&ran, "row-shifted");
    let samples = ran.json();
    let first = &samples["samples"][0];
    assert_eq!(first["as_labelled"], "not known");
    assert_eq!(first["readings"], serde_json::json!({}));
    assert!(first["not_understood"].as_array().expect("cells").len() >= 5);
    let missing_cell = "machine,label,drawn,nu40,nu100\nHP-1,2026-10-01,45.9,6.80,clear\n";
    told(&audit(missing_cell, ""), "row-shifted");
}

#[test]
fn mixed_dates_are_not_guessed() {
    let table = "machine,label,drawn,nu40\nHP-1,H46,13-10-2026,45.9\nGB-104,G220,10-14-2026,221\n";
    let ran = audit(table, "dates: day-month-year\n");
    told(&ran, "date-mixed");
    let document = ran.json();
    assert_eq!(document["samples"][0]["drawn"], "2026-10-13");
    assert_eq!(document["samples"][1]["drawn"], serde_json::Value::Null);
}

#[test]
fn two_bottles_of_one_day_are_no_coin_toss() {
    let table = "machine,label,drawn,nu40\nHP-1,H46,2026-10-01,45.9\nHP-1,H46,2026-10-01,38.0\n";
    let ran = audit(table, "");
    told(&ran, "bottle-twice");
    let document = ran.json();
    for i in 0..2 {
        assert_eq!(document["samples"][i]["serves"], "open");
    }
    // two machines alike are two machines
    let alike = "machine,label,drawn,nu40\nfan A,C68,2026-10-01,67\nfan B,C68,2026-10-01,66.5\n";
    let ran = audit(alike, "aliases: { fan A: FAN, fan B: FAN }\n");
    assert!(!ran.err.contains("bottle-twice"), "{}", ran.err);
    assert_eq!(ran.json()["trends"].as_array().map(Vec::len), Some(2));
}

#[test]
fn odd_cells_are_unknown_and_named() {
    let table =
        "machine,label,drawn,nu40,nu100,flash,Fe,Cu\nHP-1,H46,2026-10-01,\"45,9\",6.80,0,<5,999\n";
    let ran = audit(table, "");
    told(&ran, "cell-unread");
    told(&ran, "cell-placeholder");
    let document = ran.json();
    let readings = &document["samples"][0]["readings"];
    assert_eq!(readings["nu40"], serde_json::Value::Null);
    assert_eq!(readings["Fe"]["bound"], "below");
    assert_eq!(readings["Cu"], serde_json::Value::Null);
    let comma = on(
        with(&table.replace("6.80", "\"6,80\""), "decimal: comma\n"),
        "audit -f json",
    );
    let nu40 = &comma.json()["samples"][0]["readings"]["nu40"]["value"];
    assert_eq!(nu40.as_f64(), Some(45.9));
}

#[test]
fn bottles_of_nobody_are_listed_with_what_may_be_meant() {
    let table = "machine,label,drawn,nu40\nConv104 HD,G220,2026-10-01,221\n,H46,2026-10-01,46\nHP-1,H-46,2026-10-01,46\n";
    let ran = audit(table, "");
    told(&ran, "label-unknown");
    let document = ran.json();
    let unmatched = document["unmatched"].as_array().expect("a list");
    assert_eq!(unmatched.len(), 2);
    assert_eq!(unmatched[0]["did_you_mean"], "GB-104");
    assert_eq!(document["samples"].as_array().map(Vec::len), Some(3 + 2));
    let matched = on(
        with(table, ""),
        "audit -f json --match \"Conv104 HD=GB-104\"",
    );
    assert_eq!(
        matched.json()["unmatched"].as_array().map(Vec::len),
        Some(1)
    );
    assert_eq!(
        on(with(table, ""), "audit --match \"Conv104 HD\"").exit,
        Exit::Usage
    );
    assert_eq!(
        on(with(table, ""), "audit --match \"Conv104 HD=GB-999\"").exit,
        Exit::NoMatch
    );
}

/// A formula cell whose value was never stored is no 0.
#[test]
fn a_formula_without_value_is_named() {
    let book = include_bytes!("../../cases/tables/samples-formula.xlsx");
    let mut host = with(GOOD, "");
    host.files.insert("lab.csv".into(), book.to_vec());
    let ran = on(host, "audit -f json");
    told(&ran, "cell-without-value");
    let document = ran.json();
    assert_eq!(document["samples"].as_array().map(Vec::len), Some(1 + 2));
    assert_eq!(
        document["samples"][0]["readings"]["nu40"],
        serde_json::Value::Null
    );
    assert_eq!(
        document["samples"][0]["readings"]["nu100"]["value"].as_f64(),
        Some(6.8)
    );
}

#[test]
fn a_table_of_100_megabytes_is_refused_unread() {
    let mut host: MemoryHost = with(GOOD, "");
    host.files.insert("lab.csv".into(), vec![b'1'; 100 << 20]);
    let ran = on(host, "audit");
    assert_eq!(ran.exit, Exit::Input);
    told(&ran, "table-too-large");
    let mut host = with(GOOD, "");
    host.files.remove(std::path::Path::new("lab.csv"));
    assert_eq!(on(host, "audit").exit, Exit::File);
    let mut host = with(GOOD, "");
    host.files
        .insert("lab.csv".into(), b"\x00\x01binary".to_vec());
    told(&on(host, "audit"), "table-kind");
}

/// No text in the place of a table ends in anything but a message or an answer.
#[test]
fn no_table_breaks_the_reader() {
    use proptest::prelude::*;
    let config = ProptestConfig {
        cases: 200,
        failure_persistence: None,
        ..ProptestConfig::default()
    };
    proptest!(config, |(text in "[a-z0-9,;\"\\n.<>/ -]{0,200}")| {
        let table = format!("machine,label,drawn,nu40,nu100,water\n{text}");
        let ran = audit(&table, "");
        prop_assert!(matches!(ran.exit, Exit::Done | Exit::Input), "{:?}", ran.exit);
    });
}

#[test]
fn a_whole_column_of_one_mistake_is_told_once_with_its_rows() {
    let rows: Vec<String> = (1..=12)
        .map(|n| format!("HP-1;H46;2026-10-{n:02};45,{n}"))
        .collect();
    let rows = rows.join("\n");
    let ran = audit(&format!("machine;label;drawn;nu40\n{rows}"), "");
    assert_eq!(ran.err.matches("[cell-unread]").count(), 1, "{}", ran.err);
    assert!(
        ran.err
            .contains("11 more cells of this column are alike, rows 3, 4,"),
        "{}",
        ran.err
    );
    // nothing lost: every cell is kept as it stands
    let document = ran.json();
    let samples = document["samples"].as_array().expect("samples");
    let kept = |s: &&serde_json::Value| s["not_understood"].as_array().map(Vec::len) == Some(1);
    assert_eq!(samples.iter().filter(kept).count(), 12);
}

#[test]
fn an_odd_day_beside_an_odd_cell_is_no_shifted_row() {
    let table = "machine,label,drawn,nu40,water\nHP-1,H46,01/09/26,45.9,wet\n";
    let ran = audit(table, "dates: day-month-year\n");
    assert!(!ran.err.contains("[row-shifted]"), "{}", ran.err);
    assert_eq!(ran.json()["samples"][0]["readings"]["nu40"]["value"], 45.9);
}
