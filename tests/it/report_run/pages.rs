//! Reads pages back: links, ids, tables, and the figures of `weigh` on them.

use super::{demo, judgements};
use crate::report_pages::markup::{Piece, tags};
use filmwright::cli::host::MemoryHost;
use filmwright::quantity::show::{Toward, fixed, margin, significant};
use filmwright::report::model::minus;
use serde_json::Value;
use std::collections::{BTreeMap, BTreeSet};
use std::path::Path;

/// Pages by file name.
pub(super) type Pages = BTreeMap<String, String>;

/// The pages in a folder of a host.
pub(super) fn written(host: &MemoryHost, folder: &str) -> Pages {
    host.files
        .iter()
        .filter_map(|(path, bytes)| {
            let below = path.strip_prefix(Path::new(folder)).ok()?;
            let name = below.to_str()?.to_owned();
            let text = String::from_utf8(bytes.clone()).ok()?;
            (path.extension()? == "html").then_some((name, text))
        })
        .collect()
}

/// Where the links of a page lead.
pub(super) fn links(page: &str) -> Vec<String> {
    tags(page)
        .iter()
        .filter(|t| t.is("a"))
        .filter_map(|t| t.attr("href"))
        .filter(|h| !h.starts_with("http") && !h.starts_with("mailto:"))
        .map(str::to_owned)
        .collect()
}

/// The ids of a page.
pub(super) fn ids(page: &str) -> BTreeSet<String> {
    tags(page)
        .iter()
        .filter_map(|t| t.attr("id"))
        .map(str::to_owned)
        .collect()
}

/// The words of each sheet on a page.
pub(super) fn articles(page: &str) -> Vec<String> {
    let mut all = Vec::new();
    let mut open: Option<String> = None;
    for piece in tags(page) {
        match &piece {
            Piece::Open(name, _) if name == "article" => open = Some(String::new()),
            Piece::Close(name) if name == "article" => all.extend(open.take()),
            Piece::Text(text) => {
                if let Some(words) = &mut open {
                    words.push_str(text);
                }
            }
            _ => {}
        }
    }
    all
}

/// The rows of the tables of a class, table by table: the words of each row.
pub(super) fn rows(page: &str, class: &str) -> Vec<Vec<String>> {
    let mut tables: Vec<Vec<String>> = Vec::new();
    let mut inside = false;
    for piece in tags(page) {
        match &piece {
            Piece::Open(name, _) if name == "table" => {
                inside = piece.class(class);
                if inside {
                    tables.push(Vec::new());
                }
            }
            Piece::Close(name) if name == "table" => inside = false,
            Piece::Open(name, _) if name == "tr" && inside => {
                if let Some(table) = tables.last_mut() {
                    table.push(String::new());
                }
            }
            Piece::Text(text) if inside => {
                if let Some(row) = tables.last_mut().and_then(|t| t.last_mut()) {
                    row.push_str(text);
                    row.push(' ');
                }
            }
            _ => {}
        }
    }
    tables
}

/// The row of an oil.
pub(super) fn row_of<'r>(table: &'r [String], oil: &str) -> &'r str {
    table
        .iter()
        .find(|row| row.split_whitespace().any(|word| word == oil))
        .unwrap_or_else(|| panic!("no row for {oil}"))
}

/// What the sheet prints of one judgement: margins rounded down, viscosities towards caution.
pub(super) fn figures(j: &Value) -> Vec<String> {
    let mut all = Vec::new();
    let value = |v: &Value| v["value"].as_f64();
    for end in ["hot", "cold"] {
        all.extend(value(&j["margins"][end]).map(|m| minus(&margin(m, 2))));
    }
    for end in ["pour", "oil"] {
        all.extend(value(&j["margins"][end]).map(|m| format!("{}\u{202f}K", minus(&margin(m, 1)))));
    }
    all.extend(value(&j["maker_grade"]).map(|m| minus(&margin(m, 2))));
    let short = |v: f64, toward| {
        let text = significant(v, 3, toward);
        let text = if text.contains('.') {
            text.trim_end_matches('0').trim_end_matches('.').to_owned()
        } else {
            text
        };
        let four = significant(v, 4, Toward::Nearest);
        let exact = four
            .replace('\u{202f}', "")
            .parse::<f64>()
            .is_ok_and(|f| (f - v).abs() < 1e-9 * v);
        if exact {
            four.trim_end_matches('0').trim_end_matches('.').to_owned()
        } else {
            text
        }
    };
    all.extend(value(&j["nu"]["hot"]).map(|v| short(v, Toward::Down)));
    all.extend(value(&j["nu"]["start"]).map(|v| short(v, Toward::Up)));
    all
}

#[test]
fn every_governing_number_of_weigh_is_printed() {
    let pages = demo();
    let mut read = 0;
    for j in judgements() {
        let machine = j["machine"].as_str().expect("a tag");
        let oil = j["oil"].as_str().expect("an id");
        let page = &pages[&format!("machine-{machine}.html")];
        let barred = j["verdict"] == "barred";
        let tables = rows(page, if barred { "barred" } else { "oils" });
        let place = usize::from(j["point"] == "non-drive end");
        let row = row_of(&tables[place], oil);
        if barred {
            for by in j["barred_by"].as_array().expect("a list") {
                let rule = by["rule"].as_str().expect("an id");
                assert!(row.contains(rule), "{machine} {oil}: {rule} not in {row}");
            }
            continue;
        }
        assert!(
            row.contains(j["verdict"].as_str().expect("a word")),
            "{machine} {oil}: {row}"
        );
        for figure in figures(j) {
            assert!(
                row.contains(&figure),
                "{machine} {oil}: {figure} not in {row}"
            );
            read += 1;
        }
    }
    assert!(read > 700, "only {read} figures were read back");
}

#[test]
fn bands_and_answers_of_the_overview_are_those_of_weigh() {
    let pages = demo();
    let overview = rows(&pages["index.html"], "wide").remove(0);
    for j in judgements() {
        let machine = j["machine"].as_str().expect("a tag");
        let row = overview.iter().find(|r| {
            let tag = r.split_whitespace().next().unwrap_or("");
            tag.trim_end_matches(',') == machine
        });
        let row = row.unwrap_or_else(|| panic!("no row for {machine}"));
        let oil = j["oil"].as_str().expect("an id");
        let proposed = row.contains(&format!(" {oil} ")) && !row.contains(&format!("now {oil}"));
        if !proposed || j["band"].is_null() {
            continue;
        }
        for (end, toward) in [("low", Toward::Up), ("high", Toward::Down)] {
            if let Some(t) = j["band"][end]["value"].as_f64() {
                let figure = minus(&fixed(t, 0, toward));
                assert!(
                    row.contains(&figure),
                    "{machine} {oil}: {figure} not in {row}"
                );
            }
        }
    }
}
