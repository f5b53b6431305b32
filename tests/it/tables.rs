//! Tables of other programs, and tables made to do harm.

use crate::hostile;
use filmwright::table::{Content, Fault, Form, Sheet, Stated, read};
use std::fmt::Write as _;
use std::path::Path;

#[expect(clippy::disallowed_methods, reason = "a test reads its own cases")]
fn bytes(name: &str) -> Vec<u8> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/cases/tables");
    std::fs::read(folder.join(name)).expect("a committed table")
}

fn form(form: &Form) -> String {
    match form {
        Form::Xlsx { from_1904 } => format!("xlsx, days from 1904: {from_1904}"),
        Form::Ods => "ods".into(),
        Form::Csv {
            encoding,
            delimiter,
        } => format!(
            "csv, {} {}, {} {}",
            encoding.name,
            encoding.by.says(),
            delimiter.says(),
            delimiter.by.says()
        ),
    }
}

fn content(content: &Content) -> String {
    let kind = match content {
        Content::Text(_) => "text",
        Content::Number { .. } => "number",
        Content::Percent(_) => "share",
        Content::Date(_) => "date",
        Content::Truth(_) => "truth",
        Content::Fault(_) => "fault",
        Content::NoValue { .. } => "no value",
    };
    format!("{kind} {:?}", content.text())
}

fn sheet(out: &mut String, sheet: &Sheet) {
    let hidden = if sheet.hidden { ", hidden" } else { "" };
    let _ = writeln!(out, "sheet {:?}{hidden}", sheet.name);
    if !sheet.hidden_columns.is_empty() {
        let _ = writeln!(out, "  hidden columns {:?}", sheet.hidden_columns);
    }
    for m in &sheet.merged {
        let _ = writeln!(
            out,
            "  merged row {} column {} to row {} column {}",
            m.row, m.column, m.last_row, m.last_column
        );
    }
    for c in &sheet.comments {
        let _ = writeln!(
            out,
            "  comment row {} column {} {:?}",
            c.row, c.column, c.text
        );
    }
    for row in &sheet.rows {
        let hidden = if row.hidden { ", hidden" } else { "" };
        let _ = writeln!(out, "  row {}{hidden}", row.number);
        for cell in &row.cells {
            let _ = writeln!(out, "    {} {}", cell.column, content(&cell.content));
        }
    }
}

fn told(name: &str) -> String {
    let book = read(&bytes(name), &Stated::default()).expect("a table");
    let mut out = format!("{}\n", form(&book.form));
    book.sheets.iter().for_each(|s| sheet(&mut out, s));
    out
}

fn snapshot(name: &str, text: &str) {
    let mut settings = insta::Settings::clone_current();
    settings.set_snapshot_path("../snapshots/tables");
    settings.set_prepend_module_to_snapshot(false);
    settings.bind(|| insta::assert_snapshot!(name, text));
}

#[test]
fn a_workbook_of_openpyxl_is_read_as_it_stands() {
    snapshot("openpyxl", &told("openpyxl.xlsx"));
}

#[test]
fn what_libreoffice_makes_of_it_differs_only_in_the_value_of_the_formula() {
    let plain = told("openpyxl.xlsx");
    let lines: Vec<&str> = plain.lines().collect();
    for name in ["libreoffice.xlsx", "libreoffice.ods"] {
        let other = told(name);
        let differ: Vec<(&str, &str)> = lines
            .iter()
            .copied()
            .zip(other.lines())
            .skip(1)
            .filter(|(a, b)| a != b)
            .collect();
        assert_eq!(lines.len(), other.lines().count(), "{name}:\n{other}");
        // 46 / 3.785
        let want = [(
            "    11 no value \"=E5/3.785\"",
            "    11 number \"12.1532364597094\"",
        )];
        assert_eq!(differ, want, "{name}");
    }
}

#[test]
fn days_from_1904_are_the_same_days() {
    let same = |a: &str, b: &str| {
        let (a, b) = (told(a), told(b));
        assert!(b.starts_with("xlsx, days from 1904: true"));
        let below = |text: &str| text.split_once('\n').expect("lines").1.to_owned();
        assert_eq!(below(&a), below(&b));
    };
    same("openpyxl.xlsx", "openpyxl-1904.xlsx");
    same("libreoffice.xlsx", "libreoffice-1904.xlsx");
}

#[test]
fn text_tables_of_three_encodings_hold_the_same() {
    let windows = told("windows-1252.csv");
    snapshot("windows_1252", &windows);
    let cells = |text: &str| text.split_once('\n').expect("lines").1.to_owned();
    let bom = told("bom.csv");
    assert!(
        bom.starts_with("csv, UTF-8 by the mark at the beginning, comma found"),
        "{bom}"
    );
    // The delimiter inside a text differs with the delimiter of the file.
    assert_eq!(cells(&bom), cells(&windows));
    let wide = told("utf-16.csv");
    assert!(
        wide.starts_with("csv, UTF-16LE by the mark at the beginning, tab found"),
        "{wide}"
    );
}

#[test]
fn one_sheet_is_read_where_one_is_asked_for() {
    let asked = |sheet: &str| Stated {
        sheet: Some(sheet.into()),
        ..Stated::default()
    };
    for name in ["openpyxl.xlsx", "libreoffice.ods"] {
        let book = read(&bytes(name), &asked("Notes")).expect("a sheet");
        let read: Vec<(&str, bool, usize)> = book
            .sheets
            .iter()
            .map(|s| (s.name.as_str(), s.read, s.rows.len()))
            .collect();
        assert_eq!(
            read,
            [
                ("Assets 2026", false, 0),
                ("Notes", true, 1),
                ("Old", false, 0)
            ]
        );
    }
    let fault = read(&bytes("openpyxl.xlsx"), &asked("notes")).expect_err("no such sheet");
    assert!(matches!(fault, Fault::NoSheet { there, .. } if there.len() == 3));
}

#[test]
fn files_made_to_do_harm_end_in_a_named_fault() {
    for case in hostile::all() {
        let got = read(&case.bytes, &Stated::default());
        let told = match &got {
            Ok(book) => format!(
                "read, {} rows",
                book.sheets.iter().map(|s| s.rows.len()).sum::<usize>()
            ),
            Err(Fault::TooLarge { limit, .. }) => format!("{limit:?}"),
            Err(Fault::Damaged { why, .. }) => format!("damaged: {why}"),
            Err(fault) => format!("{fault:?}"),
        };
        assert!(
            told.contains(case.ends_in),
            "{}, {}: {told}",
            case.file,
            case.name
        );
    }
}

proptest::proptest! {
    #![proptest_config(proptest::prelude::ProptestConfig::with_cases(64))]

    #[test]
    fn damaged_bytes_never_panic(
        file in 0_usize..5,
        damage in proptest::collection::vec((proptest::prelude::any::<proptest::sample::Index>(), proptest::prelude::any::<u8>()), 1..12),
        cut in proptest::option::of(proptest::prelude::any::<proptest::sample::Index>()),
    ) {
        let name = ["openpyxl.xlsx", "libreoffice.xlsx", "libreoffice.ods", "windows-1252.csv", "utf-16.csv"][file];
        let mut bytes = bytes(name);
        for (at, byte) in damage {
            let at = at.index(bytes.len());
            bytes[at] = byte;
        }
        if let Some(cut) = cut {
            bytes.truncate(cut.index(bytes.len()).max(1));
        }
        drop(read(&bytes, &Stated::default()));
    }

    #[test]
    fn any_xml_in_the_parts_never_panics(xml in "(<[a-z:]{1,9}( [a-z]{1,2}=\"[A-Z0-9:]{0,9}\")*/?>|</[a-z:]{1,9}>|[a-z&;<0-9]{0,6}){0,30}") {
        let sheet = format!("<worksheet><sheetData><row r=\"1\"><c r=\"A1\">{xml}");
        drop(read(&hostile::xlsx(&[("xl/worksheets/sheet1.xml", sheet.as_bytes())]), &Stated::default()));
        let content = format!("<spreadsheet><table><table-row><table-cell>{xml}");
        drop(read(&hostile::packed(&[("content.xml", content.as_bytes())]), &Stated::default()));
    }
}
