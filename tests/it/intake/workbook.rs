//! Out as a workbook, and back: the demands of the demonstration works survive the way.

use super::dirty::file;
use crate::scenario::on;
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use filmwright::table::{Content, Stated, read};
use std::path::Path;

fn book(host: &MemoryHost, name: &str) -> filmwright::table::Book {
    read(&host.files[Path::new(name)], &Stated::default()).expect("a workbook")
}

fn demo() -> MemoryHost {
    let ran = on(
        MemoryHost::new(),
        "report --demo --one-file -o r.html --xlsx annex.xlsx -q",
    );
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    let mut host = ran.host;
    host.files.remove(Path::new("r.html"));
    host.stdout.clear();
    host.stderr.clear();
    host
}

#[test]
fn the_demonstration_comes_back_from_its_workbook_with_the_same_demands() {
    let host = demo();
    let site = on(host, "intake annex.xlsx --makes site -o site.yaml -q");
    assert_eq!(site.exit, Exit::Done, "{}", site.err);
    let oils = on(
        site.host,
        "intake annex.xlsx --makes oils -o oils.yaml --map oils.map.yaml -q",
    );
    assert_eq!(oils.exit, Exit::Done, "{}", oils.err);
    let host = oils.host;
    let plain = |text: &str| -> serde_json::Value {
        let mut json: serde_json::Value = serde_json::from_str(text).expect("JSON");
        json["inputs"] = serde_json::Value::Null;
        json["files"] = serde_json::Value::Null;
        json
    };
    for command in ["need -f json -q", "weigh -f json -q"] {
        let mut fresh = host.clone();
        fresh.stdout.clear();
        let back = on(fresh, command);
        assert_eq!(back.exit, Exit::Done, "{}", back.err);
        let was = on(MemoryHost::new(), &format!("{command} --demo"));
        assert!(
            plain(&back.out) == plain(&was.out),
            "{command} differs on the way back"
        );
    }
}

#[test]
fn the_sheets_are_there_with_numbers_units_and_frozen_headings() {
    let host = demo();
    let book = book(&host, "annex.xlsx");
    let names: Vec<&str> = book.sheets.iter().map(|s| s.name.as_str()).collect();
    assert_eq!(
        names,
        [
            "Machines",
            "Oil list",
            "Every oil on every machine",
            "Gaps",
            "Samples",
            "Steps",
            "Inputs",
            "About"
        ]
    );
    assert!(book.sheets.iter().all(|s| s.merged.is_empty() && !s.hidden));
    let pairs = &book.sheets[2];
    assert_eq!(
        pairs.at(1, 6).map(Content::text).as_deref(),
        Some("Hot margin")
    );
    assert_eq!(
        pairs.at(2, 6).map(Content::text).as_deref(),
        Some("VG step")
    );
    // Every pair of the weighing has a row, with its word and its margin as a number.
    let weighed = on(MemoryHost::new(), "weigh --demo -f json -q").json();
    let judged = weighed["judgements"].as_array().expect("a list");
    assert_eq!(pairs.rows.len(), judged.len() + 2);
    for (i, j) in (3_u32..).zip(judged) {
        assert_eq!(
            pairs.at(i, 5).map(Content::text).as_deref(),
            j["verdict"].as_str()
        );
        if let Some(margin) = j["margins"]["hot"]["value"].as_f64() {
            assert!(
                matches!(pairs.at(i, 6), Some(Content::Number { value, .. }) if (value - margin).abs() < 1e-9),
                "row {i}"
            );
        }
    }
    let parts = unpacked(&host.files[Path::new("annex.xlsx")]);
    let sheets: Vec<&String> = parts
        .iter()
        .filter(|(n, _)| n.starts_with("xl/worksheets/sheet"))
        .map(|(_, t)| t)
        .collect();
    assert_eq!(sheets.len(), 8);
    for text in sheets {
        assert!(
            text.contains("state=\"frozen\"")
                && text.contains("<autoFilter")
                && !text.contains("<f>"),
            "{}",
            &text[..400]
        );
    }
    assert!(!parts.iter().any(|(n, _)| n.contains("vba")));
}

/// The parts of a workbook.
fn unpacked(bytes: &[u8]) -> Vec<(String, String)> {
    let mut archive = zip::ZipArchive::new(std::io::Cursor::new(bytes)).expect("a zip");
    (0..archive.len())
        .map(|i| {
            let mut part = archive.by_index(i).expect("a part");
            let mut text = String::new();
            let _ = std::io::Read::read_to_string(&mut part, &mut text);
            let name = part.name().expect("a name").into_owned();
            (name, text)
        })
        .collect()
}

const HOSTILE: &str = "file: site 1\nsite: '=cmd()'\nmachines:\n  '=1+1':\n    name: '@SUM(A1)'\n    notes: '+evil'\n    ambient: -5 .. 30 degC\n    parts:\n      - component: gear_worm\n        name: '-x'\n";
const OILS: &str = "file: oils 1\n'=2+2':\n  name: '=HYPERLINK(\"x\")'\n  kind: gear\n  note: '@now'\n  viscosity: [220 mm2/s at 40 degC, 19 mm2/s at 100 degC]\n";

#[test]
fn text_that_begins_as_a_formula_stays_text_in_both() {
    let host = MemoryHost::new()
        .with("site.yaml", HOSTILE)
        .with("oils.yaml", OILS);
    let ran = on(host, "report --one-file -o r.html --xlsx a.xlsx -q");
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    for (name, text) in unpacked(&ran.host.files[Path::new("a.xlsx")]) {
        assert!(
            !text.contains("<f>") && !text.contains("<f "),
            "{name} holds a formula"
        );
    }
    let styles = unpacked(&ran.host.files[Path::new("a.xlsx")]);
    let styles = &styles
        .iter()
        .find(|(n, _)| n == "xl/styles.xml")
        .expect("styles")
        .1;
    assert!(styles.contains("quotePrefix=\"1\""), "{styles}");
    for command in [
        "weigh -f csv -q",
        "weigh -f csv --csv-excel -q",
        "need --list -f csv",
        "oil =2+2 -f csv -q",
        "check -f csv",
    ] {
        let mut host = ran.host.clone();
        host.stdout.clear();
        let out = on(host, command).out;
        let sign = if command.contains("excel") { ';' } else { ',' };
        for cell in out.lines().flat_map(|l| l.split(sign)) {
            let bare = cell.trim_start_matches(['"', '\u{feff}']);
            let number = bare
                .replace(',', ".")
                .trim_end_matches('"')
                .parse::<f64>()
                .is_ok();
            assert!(
                number || !bare.starts_with(['=', '+', '-', '@']),
                "{command}: {cell}"
            );
        }
    }
}

#[test]
fn the_same_inputs_give_the_same_bytes() {
    let (a, b) = (demo(), demo());
    assert!(a.files[Path::new("annex.xlsx")] == b.files[Path::new("annex.xlsx")]);
    // Its own workbook may be replaced, another one not.
    let again = on(
        a.clone(),
        "report --demo --one-file -o r.html --xlsx annex.xlsx -q",
    );
    assert_eq!(again.exit, Exit::Done, "{}", again.err);
    let mut other = a;
    other
        .files
        .insert("annex.xlsx".into(), b"PK no book of ours".to_vec());
    let refused = on(
        other,
        "report --demo --one-file -o r.html --xlsx annex.xlsx -q",
    );
    assert_eq!(refused.exit, Exit::File);
}

#[test]
fn every_list_is_a_table_and_the_spreadsheet_dialect_too() {
    for command in [
        "need --demo",
        "need --demo --list",
        "weigh --demo",
        "rules",
        "check --demo",
        "work",
        "oil O-01 --demo",
    ] {
        let plain = on(MemoryHost::new(), &format!("{command} -f csv -q"));
        assert_eq!(plain.exit, Exit::Done, "{command}: {}", plain.err);
        let mut rows = csv::ReaderBuilder::new().from_reader(plain.out.as_bytes());
        let width = rows.headers().expect("headings").len();
        assert!(width > 1, "{command}");
        for row in rows.records() {
            assert_eq!(
                row.expect("a row of the same width").len(),
                width,
                "{command}"
            );
        }
        let excel = on(
            MemoryHost::new(),
            &format!("{command} -f csv --csv-excel -q"),
        );
        assert!(
            excel.out.starts_with('\u{feff}')
                && excel.out.lines().next().is_some_and(|l| l.contains(';')),
            "{command}"
        );
    }
}

#[test]
fn progress_is_shown_on_a_terminal_past_two_seconds_alone() {
    let slow = |terminal: bool, clock_ms: u128| {
        let host = MemoryHost {
            terminal,
            clock_ms,
            ..MemoryHost::new()
        };
        on(host, "weigh --demo").host.shown
    };
    assert!(slow(false, 9000).is_empty());
    assert!(slow(true, 1500).is_empty());
    let shown = slow(true, 2500);
    assert!(
        shown
            .first()
            .is_some_and(|s| s.starts_with("weighing points 1 of ")),
        "{shown:?}"
    );
    let quiet = MemoryHost {
        terminal: true,
        clock_ms: 2500,
        ..MemoryHost::new()
    };
    assert!(on(quiet, "weigh --demo -q").host.shown.is_empty());
}

#[test]
fn a_draft_that_goes_to_standard_output_leaves_the_report_to_the_other_stream() {
    let host = MemoryHost::new().with("r.csv", "tag;desc\nA-1;gearbox\n");
    let ran = on(host, "intake r.csv -o -");
    assert!(
        ran.out.starts_with("# yaml-language-server") && ran.err.contains("1 row read"),
        "{}",
        ran.err
    );
    assert!(!ran.host.files.contains_key(Path::new("site.yaml")));
    let map = file(&ran, "r.map.yaml");
    assert!(
        map.contains("is: tag") && map.contains("samples: [A-1]"),
        "{map}"
    );
}
