//! The report from files to pages: what it prints, where its links lead, what it survives.

mod labels;
mod oils;
mod pages;
mod parts;
mod sites;

use crate::report_pages::markup::{Piece, tags};
use crate::report_pages::structure::{headings_descend, ids_are_single, inert};
use crate::scenario::{filmwright, on};
use filmwright::cli::Shared;
use filmwright::cli::host::MemoryHost;
use filmwright::cli::session::Session;
use filmwright::report::build::{Options, Report, Run};
use filmwright::weighing::Scales;
use pages::{Pages, ids, links, written};
use serde_json::Value;
use std::collections::BTreeSet;
use std::sync::LazyLock;

/// The demonstration's report, a file a sheet.
fn demo() -> &'static Pages {
    static PAGES: LazyLock<Pages> = LazyLock::new(made);
    &PAGES
}

fn made() -> Pages {
    written(&filmwright("report --demo -q -o out").host, "out")
}

/// The judgements of the demonstration.
fn judgements() -> &'static [Value] {
    static ALL: LazyLock<Vec<Value>> = LazyLock::new(|| {
        let document = filmwright("weigh --demo -f json -q").json();
        document["judgements"].as_array().expect("a list").clone()
    });
    &ALL
}

#[test]
fn every_machine_has_a_sheet_and_every_page_is_sound() {
    let pages = demo();
    let machines: BTreeSet<&str> = judgements()
        .iter()
        .filter_map(|j| j["machine"].as_str())
        .collect();
    for machine in machines {
        assert!(
            pages.contains_key(&format!("machine-{machine}.html")),
            "{machine}"
        );
    }
    for (name, page) in pages {
        let tags = tags(page);
        ids_are_single(name, &tags);
        headings_descend(name, &tags);
        inert(name, page);
        assert!(
            page.contains("Inputs and rules: "),
            "{name}: no fingerprint"
        );
        // An oil's note is the user's own words.
        let own = |part: &str| part.split_once("</dd>").map(|(_, rest)| rest.to_owned());
        let mut parts = page.split("<dt>Note</dt><dd>");
        let mut ours = parts.next().unwrap_or("").to_owned();
        ours.extend(parts.filter_map(own));
        assert!(
            !ours.contains("degC") && !ours.contains("mm2/s"),
            "{name}: a unit not set"
        );
    }
}

#[test]
fn links_lead_to_what_is_there() {
    let pages = demo();
    for (name, page) in pages {
        for link in links(page) {
            let (file, id) = link.split_once('#').unwrap_or((&link, ""));
            let target = if file.is_empty() {
                page
            } else {
                pages.get(file).unwrap_or_else(|| panic!("{name}: {link}"))
            };
            assert!(id.is_empty() || ids(target).contains(id), "{name}: {link}");
        }
    }
}

#[test]
fn one_file_holds_the_same_sheets() {
    let folder = demo();
    let ran = filmwright("report --demo -q --one-file -o review.html");
    let page = written(&ran.host, "")
        .remove("review.html")
        .expect("written");
    let all = tags(&page);
    ids_are_single("review", &all);
    headings_descend("review", &all);
    inert("review", &page);
    let ids = ids(&page);
    for link in links(&page) {
        assert!(
            ids.contains(link.strip_prefix('#').expect("on the page")),
            "{link}"
        );
    }
    let bundled = pages::articles(&page);
    assert_eq!(bundled.len(), folder.len());
    for (name, page) in folder {
        let own = pages::articles(page);
        assert!(
            bundled.contains(&own[0]),
            "{name} reads otherwise in one file"
        );
    }
}

#[test]
fn same_inputs_same_bytes() {
    assert!(*demo() == made());
    let run = |folder: &str| {
        let host = sites::demo_in(folder);
        let ran = on(host, &format!("report -q -C {folder} -o out"));
        assert_eq!(ran.exit as u8, 0, "{}", ran.err);
        written(&ran.host, "out")
    };
    assert!(run("works") == run("another/folder"));
}

#[test]
fn hostile_words_stay_words_from_file_to_page() {
    let host = sites::hostile();
    let ran = on(host, "report -q -o out");
    assert_eq!(ran.exit as u8, 0, "{}", ran.err);
    for (name, page) in written(&ran.host, "out") {
        assert!(
            name.chars()
                .all(|c| c.is_ascii_alphanumeric() || "-_.".contains(c)),
            "{name}"
        );
        inert(&name, &page);
        ids_are_single(&name, &tags(&page));
        let bad =
            |tag: &Piece| tag.is("script") || tag.is("iframe") || tag.attr("onerror").is_some();
        assert!(!tags(&page).iter().any(bad), "{name}");
    }
}

#[test]
fn files_of_others_are_left_alone() {
    let host = MemoryHost::new().with("out/machine-M03.html", "<p>my own page</p>");
    let ran = on(host, "report --demo -q -o out");
    assert_eq!(ran.exit as u8, 4);
    assert!(ran.err.contains("machine-M03.html"), "{}", ran.err);
    assert_eq!(
        written(&ran.host, "out").len(),
        1,
        "nothing else is written"
    );
    let again = on(ran.host, "report --demo -q -o out --replace");
    assert_eq!(again.exit as u8, 0, "{}", again.err);
    let third = on(again.host, "report --demo -q -o out");
    assert_eq!(
        third.exit as u8, 0,
        "its own pages are replaced: {}",
        third.err
    );
}

#[test]
fn the_answers_stand_on_the_terminal() {
    let ran = filmwright("report --demo -q");
    assert!(
        ran.out.starts_with("Two machines are settled"),
        "{}",
        ran.out
    );
    assert_eq!(ran.out.lines().filter(|l| l.starts_with("  M")).count(), 16);
    assert!(
        ran.out.contains("filmwright-report/index.html"),
        "{}",
        ran.out
    );
    let pages = written(&ran.host, "filmwright-report");
    for line in ran.out.lines().filter(|l| l.starts_with("  M")) {
        let (tag, answer) = line.trim().split_once("  ").expect("a tag and an answer");
        assert!(
            pages::articles(&pages[&format!("machine-{tag}.html")])[0].contains(answer),
            "{line}"
        );
    }
    let only = filmwright("report --demo -q --only M0[1] --only M07 -f json");
    assert_eq!(only.exit as u8, 5, "a pattern that matches nothing");
    let only = filmwright("report --demo -q --only M01 --only M07 -f json").json();
    assert_eq!(only["answers"].as_array().expect("a list").len(), 2);
    assert_eq!(filmwright("report --demo -q -o -").exit as u8, 2);
    assert_eq!(filmwright("report --demo -q --gate fails").exit as u8, 1);
}

/// The models of two machines, so that no change of a template can hide a change of a number.
#[test]
fn models_are_as_agreed() {
    let mut host = MemoryHost::new();
    let shared = Shared {
        demo: true,
        quiet: true,
        ..Shared::default()
    };
    let mut session = Session::new(&mut host, shared);
    let loaded = session.load(None).expect("the demonstration is sound");
    let settings = session.settings(true).expect("no reserve is asked");
    let scales = Scales::new(&loaded.site, &loaded.rules, settings).expect("its oils are sound");
    let points: Vec<_> = loaded.site.points.iter().collect();
    let run = Run::new(
        &scales,
        &loaded.sources,
        session.head(&loaded),
        Options::default(),
    );
    let mut report = Report::new(run, &points);
    for made in report.next_machines(usize::MAX) {
        if ["M07", "M14"].contains(&made.tag.as_str()) {
            let model = serde_json::to_string_pretty(&made.sheet).expect("writes");
            let mut settings = insta::Settings::clone_current();
            settings.set_snapshot_path("../snapshots");
            settings.set_prepend_module_to_snapshot(false);
            settings.bind(|| insta::assert_snapshot!(format!("model_{}", made.tag), model));
        }
    }
}
