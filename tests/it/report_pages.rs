//! The pages of the report, from models built by hand.

pub(crate) mod fixtures;
mod hostile;
pub(crate) mod markup;
mod others;
pub(crate) mod structure;

use filmwright::report::model::Sheet;
use filmwright::report::page::{Position, Templates};

/// Every kind of sheet and state, with a name for messages.
pub(crate) fn all() -> Vec<(&'static str, Sheet)> {
    vec![
        ("overview", fixtures::overview()),
        ("machine", fixtures::machine()),
        ("two-points", fixtures::two_points()),
        ("nothing-holds", fixtures::nothing_holds()),
        ("one-candidate", fixtures::one_candidate()),
        ("forty", fixtures::forty()),
        ("audit", others::audit()),
        ("oil", others::oil()),
        ("area", others::area()),
        ("revision", others::revision()),
        ("methods", others::methods()),
        ("rules", others::rules()),
        ("glossary", others::glossary()),
    ]
}

pub(crate) fn templates() -> Templates {
    Templates::new(&[]).expect("the built-in templates are sound")
}

/// The sheet without the page around it, whose style sheet would drown the rest.
fn laid_out(sheet: &Sheet) -> String {
    templates()
        .sheet(&fixtures::frame(), sheet, Position::Leading)
        .expect("lays out")
}

#[test]
fn sheets_look_as_agreed() {
    for (name, sheet) in all() {
        if [
            "overview",
            "machine",
            "nothing-holds",
            "one-candidate",
            "audit",
        ]
        .contains(&name)
        {
            let mut settings = insta::Settings::clone_current();
            settings.set_snapshot_path("../snapshots");
            settings.set_prepend_module_to_snapshot(false);
            settings.bind(|| insta::assert_snapshot!(format!("sheet_{name}"), laid_out(&sheet)));
        }
    }
}

#[test]
fn models_can_be_read_back() {
    for (name, sheet) in all() {
        let written = serde_json::to_value(&sheet).expect("writes");
        let mut read: Sheet = serde_json::from_value(written).expect(name);
        read.place = sheet.place.clone();
        assert!(read == sheet, "{name}");
    }
}

#[test]
fn same_model_same_bytes() {
    let sheet = fixtures::machine();
    let frame = fixtures::frame();
    assert_eq!(
        templates().page(&frame, &sheet),
        templates().page(&frame, &sheet)
    );
}

#[test]
fn several_sheets_in_one_file_keep_their_ids_apart() {
    let frame = fixtures::frame();
    let (first, second) = (fixtures::overview(), fixtures::machine());
    let templates = templates();
    let mut page = templates.open(&frame, "all", None, &[]).expect("opens");
    page += &templates
        .sheet(&frame, &first, Position::Leading)
        .expect("first");
    page += &templates
        .sheet(&frame, &second, Position::Following)
        .expect("second");
    page += &templates.close(&frame).expect("closes");
    let tags = markup::tags(&page);
    structure::ids_are_single("bundle", &tags);
    structure::headings_descend("bundle", &tags);
}

/// `cargo test -- --ignored write_pages` puts every page into `target/report-pages`, or into the
/// folder of `FILMWRIGHT_PAGES`, to be looked at and to be opened by the browser's checks.
#[test]
#[ignore = "writes files to look at"]
#[expect(
    clippy::disallowed_methods,
    reason = "a tool for looking at the pages, not part of the program"
)]
fn write_pages() {
    let usual = concat!(env!("CARGO_MANIFEST_DIR"), "/target/report-pages");
    let folder = std::env::var("FILMWRIGHT_PAGES").unwrap_or_else(|_| usual.to_owned());
    std::fs::create_dir_all(&folder).expect("a folder");
    for (name, sheet) in all() {
        let page = templates().page(&fixtures::frame(), &sheet).expect(name);
        std::fs::write(format!("{folder}/{name}.html"), page).expect("written");
    }
    std::fs::write(format!("{folder}/hostile.html"), hostile::page()).expect("written");
    let page = templates().page(&fixtures::frame(), &others::formulas());
    std::fs::write(format!("{folder}/formulas.html"), page.expect("lays out")).expect("written");
}
