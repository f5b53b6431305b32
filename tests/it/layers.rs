//! Who may import whom. The rooms stand in the order of the pipeline; a room imports only rooms
//! before it, and the relations know nothing but quantities and plain mathematics.

#![expect(
    clippy::disallowed_methods,
    reason = "the test reads the source it judges"
)]

use std::collections::{BTreeMap, BTreeSet};
use std::fs;
use std::path::{Path, PathBuf};

/// The rooms in order: each may import those before it.
const ROOMS: &[&str] = &[
    "numeric",
    "quantity",
    "source",
    "problem",
    "relation",
    "trace",
    "model",
    "assets",
    "table",
    "input",
    "oil",
    "suitability",
    "demand",
    "judge",
    "weighing",
    "decide",
    "audit",
    "intake",
    "compare",
    "results",
    "work",
    "report",
    "cli",
];

/// What these rooms may import, whatever stands before them.
const STRICT: &[(&str, &[&str])] = &[
    ("relation", &["numeric", "quantity"]),
    ("problem", &["source"]),
    ("model", &["quantity", "relation", "source"]),
];

fn source_files(folder: &Path, into: &mut Vec<PathBuf>) {
    let entries = fs::read_dir(folder).expect("src can be listed");
    for entry in entries {
        let path = entry.expect("an entry").path();
        if path.is_dir() {
            source_files(&path, into);
        } else if path.extension().is_some_and(|e| e == "rs") {
            into.push(path);
        }
    }
}

/// Names that follow `crate::` in a file, comments left out.
fn imported(text: &str) -> BTreeSet<String> {
    let mut found = BTreeSet::new();
    let code = text.lines().filter(|l| !l.trim_start().starts_with("//"));
    for line in code {
        for piece in line.split("crate::").skip(1) {
            let name: String = piece
                .trim_start_matches('{')
                .chars()
                .take_while(|c| c.is_ascii_lowercase() || *c == '_')
                .collect();
            found.insert(name);
        }
    }
    found
}

/// Each room with what it imports and one file that does.
fn edges() -> BTreeMap<(String, String), String> {
    let src = Path::new(env!("CARGO_MANIFEST_DIR")).join("src");
    let mut files = Vec::new();
    source_files(&src, &mut files);
    files.sort();
    let mut edges = BTreeMap::new();
    for file in files {
        let inside = file.strip_prefix(&src).expect("under src");
        let first = inside.iter().next().expect("a name").to_string_lossy();
        let room = first.trim_end_matches(".rs").to_owned();
        let text = fs::read_to_string(&file).expect("readable");
        for name in imported(&text) {
            edges
                .entry((room.clone(), name))
                .or_insert_with(|| inside.display().to_string());
        }
    }
    edges
}

#[test]
fn imports_run_in_one_direction() {
    let rank = |room: &str| ROOMS.iter().position(|r| *r == room);
    let mut wrong = Vec::new();
    let mut seen = 0;
    for ((room, name), file) in edges() {
        if room == name || room == "lib" || room == "main" {
            continue;
        }
        let (Some(from), Some(to)) = (rank(&room), rank(&name)) else {
            wrong.push(format!("{file}: {room} or {name} is no room of the list"));
            continue;
        };
        seen += 1;
        let strict = STRICT.iter().find(|(r, _)| *r == room);
        if to > from || strict.is_some_and(|(_, allowed)| !allowed.contains(&name.as_str())) {
            wrong.push(format!("{file}: {room} must not import {name}"));
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    assert!(seen > 40, "only {seen} edges were looked at");
}

#[test]
fn relations_and_model_know_no_file_format() {
    let src = Path::new(env!("CARGO_MANIFEST_DIR")).join("src");
    for room in ["relation", "model", "judge", "demand", "oil"] {
        let mut files = vec![src.join(format!("{room}.rs"))];
        source_files(&src.join(room), &mut files);
        for file in files {
            let text = fs::read_to_string(&file).unwrap_or_default();
            assert!(!text.contains("serde"), "{} uses serde", file.display());
        }
    }
}
