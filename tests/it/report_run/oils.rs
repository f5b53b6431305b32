//! The oils' sheets: one for each oil of the list, with the figures of the command `oil`.

use super::demo;
use super::pages::links;
use crate::report_pages::markup::{Piece, tags};
use crate::scenario::filmwright;
use filmwright::quantity::show::{Toward, fixed, significant};
use filmwright::report::model::minus;
use serde_json::Value;

/// The words of a page without its style.
fn words(page: &str) -> String {
    let mut out = String::new();
    let mut style = false;
    for piece in tags(page) {
        match &piece {
            Piece::Open(name, _) if name == "style" => style = true,
            Piece::Close(name) if name == "style" => style = false,
            Piece::Text(text) if !style => {
                out.push_str(text);
                out.push(' ');
            }
            _ => {}
        }
    }
    out
}

fn oils() -> Vec<Value> {
    let document = filmwright("oil * --demo -f json -q").json();
    document["oils"].as_array().expect("a list").clone()
}

#[test]
fn every_oil_has_a_sheet_with_the_figures_of_its_command() {
    let pages = demo();
    let mut read = 0;
    for oil in oils() {
        let id = oil["id"].as_str().expect("an id");
        let page = pages
            .get(&format!("oil-{id}.html"))
            .unwrap_or_else(|| panic!("no sheet of {id}"));
        let text = words(page);
        for point in oil["points"].as_array().expect("a list") {
            let far = point["extrapolated"]["value"].is_number() || !point["cold"].is_null();
            let digits = if far { 2 } else { 3 };
            let nu = point["new"]["value"].as_f64().expect("a number");
            let figure = significant(nu, digits, Toward::Nearest);
            assert!(text.contains(&figure), "{id}: {figure} is not on its sheet");
            let at = point["temperature"]["value"].as_f64().expect("a number");
            let at = minus(&significant(at, 3, Toward::Nearest));
            assert!(
                text.contains(&format!("{at}\u{202f}°C")) || at.contains('.'),
                "{id}: no row at {at} °C"
            );
            read += 1;
        }
        if let Some(vi) = oil["vi"]["value"].as_f64() {
            let vi = fixed(vi, 0, Toward::Nearest);
            assert!(text.contains(&vi), "{id}: VI {vi}");
        }
    }
    assert!(read > 200, "only {read} figures were read back");
}

#[test]
fn an_oil_names_the_machines_it_is_on_and_they_lead_to_it() {
    let pages = demo();
    let page = &pages["oil-O-12.html"];
    assert!(
        links(page)
            .iter()
            .any(|l| l.starts_with("machine-M04.html")),
        "O-12 is proposed for M04"
    );
    assert!(words(page).contains("proposed"));
    assert!(
        links(&pages["machine-M04.html"])
            .iter()
            .any(|l| l == "oil-O-12.html")
    );
    assert!(
        links(&pages["index.html"])
            .iter()
            .any(|l| l == "oil-O-27.html")
    );
}

/// A polymer-thickened oil shows both its lines, and says that it leaves its grade where it does.
#[test]
fn a_thickened_oil_shows_new_and_worn() {
    let text = words(&demo()["oil-O-05.html"]);
    for wanted in [
        "new, B worn",
        "worn",
        "The polymer",
        "Lasting shear",
        "outside ",
    ] {
        let found = text.contains(wanted) || text.to_lowercase().contains(&wanted.to_lowercase());
        assert!(
            found,
            "{wanted} is not on the sheet: {}",
            &text[..600.min(text.len())]
        );
    }
}

#[test]
fn every_relation_used_says_what_it_was_checked_against() {
    let page = &demo()["methods.html"];
    let sections = page.matches("<section class=\"sec\"").count();
    assert!(sections > 20, "{sections} relations");
    assert_eq!(page.matches("<dt>Checked against</dt>").count(), sections);
    assert_eq!(page.matches("<dt>Source</dt>").count(), sections);
    assert_eq!(page.matches("<dt>Used on</dt>").count(), sections);
}
