//! What every page must be: sound, reachable by keyboard and reader, free of script.

use super::markup::{Piece, tags};
use super::{all, fixtures, templates};
use std::collections::BTreeSet;

const EMPTY: [&str; 6] = ["meta", "br", "img", "input", "hr", "link"];

fn pages() -> Vec<(&'static str, String)> {
    all()
        .into_iter()
        .map(|(name, sheet)| {
            (
                name,
                templates().page(&fixtures::frame(), &sheet).expect(name),
            )
        })
        .collect()
}

pub(crate) fn ids_are_single(name: &str, tags: &[Piece]) {
    let mut seen = BTreeSet::new();
    for id in tags.iter().filter_map(|t| t.attr("id")) {
        assert!(seen.insert(id), "{name}: two elements are called {id}");
    }
    for target in tags
        .iter()
        .flat_map(|t| ["aria-labelledby", "aria-describedby"].map(|a| t.attr(a)))
        .flatten()
    {
        for id in target.split(' ') {
            assert!(seen.contains(id), "{name}: nothing is called {id}");
        }
    }
}

pub(crate) fn headings_descend(name: &str, tags: &[Piece]) {
    let levels: Vec<u32> = tags
        .iter()
        .filter_map(|t| match t {
            Piece::Open(n, _) if n.len() == 2 && n.starts_with('h') => n[1..].parse().ok(),
            _ => None,
        })
        .collect();
    assert_eq!(
        levels.iter().filter(|l| **l == 1).count(),
        1,
        "{name}: one main heading"
    );
    assert_eq!(levels.first(), Some(&1), "{name}");
    for pair in levels.windows(2) {
        assert!(
            pair[1] <= pair[0] + 1,
            "{name}: a heading of level {} follows one of {}",
            pair[1],
            pair[0]
        );
    }
}

#[test]
fn pages_are_sound() {
    for (name, page) in pages() {
        let tags = tags(&page);
        ids_are_single(name, &tags);
        headings_descend(name, &tags);
        let mut open: Vec<&str> = Vec::new();
        for piece in &tags {
            match piece {
                Piece::Open(n, _) if EMPTY.contains(&n.as_str()) => {}
                Piece::Open(n, _)
                    if [
                        "path", "rect", "line", "circle", "polyline", "use", "mspace",
                    ]
                    .contains(&n.as_str()) => {}
                Piece::Open(n, _) => open.push(n),
                Piece::Close(n) => assert_eq!(
                    open.pop(),
                    Some(n.as_str()),
                    "{name}: closed in another order"
                ),
                Piece::Text(_) => {}
            }
        }
        assert!(open.is_empty(), "{name}: left open {open:?}");
    }
}

#[test]
fn nothing_runs_and_nothing_is_loaded() {
    for (name, page) in pages() {
        inert(name, &page);
    }
}

/// Nothing on a page runs or loads, whatever its words.
pub(crate) fn inert(name: &str, page: &str) {
    {
        let tags = tags(page);
        let policy = tags
            .iter()
            .find(|t| t.attr("http-equiv") == Some("Content-Security-Policy"))
            .expect(name);
        assert!(
            policy
                .attr("content")
                .expect(name)
                .starts_with("default-src 'none'; style-src 'sha256-")
        );
        for tag in &tags {
            let Piece::Open(element, attrs) = tag else {
                continue;
            };
            assert!(
                ![
                    "script",
                    "iframe",
                    "object",
                    "embed",
                    "link",
                    "base",
                    "form",
                    "foreignobject"
                ]
                .contains(&element.as_str()),
                "{name}: {element}"
            );
            for (key, value) in attrs {
                assert!(
                    !key.starts_with("on") && key != "style",
                    "{name}: {element} {key}"
                );
                if key == "src" {
                    assert!(value.starts_with("data:image/"), "{name}: {value}");
                }
                if key == "href" && element == "use" {
                    assert!(value.starts_with("#fw-mk-"), "{name}: {value}");
                }
            }
        }
        assert!(
            !page.contains("url(http") && !page.contains("@import"),
            "{name}"
        );
    }
}

#[test]
fn tables_and_figures_can_be_read_aloud() {
    for (name, page) in pages() {
        let tags = tags(&page);
        for (i, tag) in tags.iter().enumerate() {
            if tag.is("table") && !in_prose(&tags[..i]) {
                let next = tags[i + 1..].iter().find(|t| matches!(t, Piece::Open(..)));
                assert!(
                    next.is_some_and(|t| t.is("caption")),
                    "{name}: a table without a caption"
                );
            }
            if tag.is("th") {
                assert!(
                    tag.attr("scope").is_some() || in_prose(&tags[..i]),
                    "{name}: a heading cell without scope"
                );
            }
            if tag.is("svg") {
                let told = tag.attr("role") == Some("img") && tag.attr("aria-labelledby").is_some();
                assert!(
                    told || tag.attr("aria-hidden") == Some("true"),
                    "{name}: a figure without words"
                );
            }
            if tag.class("scroll") || tag.class("f") {
                assert!(
                    tag.is("section")
                        && tag.attr("tabindex") == Some("0")
                        && tag.is("section")
                        && tag.attr("aria-label").is_some(),
                    "{name}: {tag:?}"
                );
            }
        }
        assert!(
            tags.iter().any(|t| t.is("main")) && tags.iter().any(|t| t.class("skip")),
            "{name}"
        );
    }
}

fn in_prose(before: &[Piece]) -> bool {
    before
        .iter()
        .rev()
        .find(|t| t.class("prose") || t.is("section"))
        .is_some_and(|t| t.class("prose"))
}

#[test]
fn links_on_a_page_lead_somewhere() {
    for (name, sheet) in all()
        .into_iter()
        .filter(|(name, _)| !["overview", "area", "oil"].contains(name))
    {
        let page = templates().page(&fixtures::frame(), &sheet).expect(name);
        let tags = tags(&page);
        let ids: BTreeSet<&str> = tags.iter().filter_map(|t| t.attr("id")).collect();
        for target in tags
            .iter()
            .filter(|t| t.is("a"))
            .filter_map(|t| t.attr("href"))
            .filter_map(|h| h.strip_prefix('#'))
        {
            assert!(ids.contains(target), "{name}: nothing is called {target}");
        }
    }
}

#[test]
fn pages_stay_small() {
    for (name, page) in pages() {
        assert!(
            page.len() <= 150_000 || name == "forty" && page.len() <= 260_000,
            "{name}: {} bytes",
            page.len()
        );
    }
}

#[test]
fn empty_sections_make_no_heading() {
    let page = templates()
        .page(&fixtures::frame(), &fixtures::one_candidate())
        .expect("lays out");
    for absent in [
        "Conditions",
        "What would change it",
        "Change-over",
        "Calculation",
        "Assumed and missing",
        "Where each oil holds",
        "Notes",
    ] {
        assert!(!page.contains(&format!("</span>{absent}</h2>")), "{absent}");
    }
    assert!(page.contains("</span>What it needs</h2>"));
}

#[test]
fn templates_print_nothing_unescaped() {
    let folder = include_dir::include_dir!("$CARGO_MANIFEST_DIR/templates/report");
    for file in folder.files() {
        let text = file.contents_utf8().expect("text");
        assert!(
            !text.contains("| safe") && !text.contains("|safe"),
            "{}",
            file.path().display()
        );
    }
}
