//! Names of the working folder, read lightly: a file with mistakes still completes.

use crate::cli::session::Session;
use crate::input::file::FileKind;
use crate::input::load::default_files;
use crate::input::rules::listing::listing;
use crate::source::FileId;
use crate::source::yaml::{Entry, Node, read};
use std::path::PathBuf;

/// A name with what it is.
type Named = (String, String);

fn roots(session: &Session<'_>, kind: FileKind, named: &[String]) -> Vec<Node> {
    let folder = session.folder();
    let files: Vec<PathBuf> = if named.is_empty() {
        let list = |below: &str| session.host.list(&folder.join(below)).unwrap_or_default();
        default_files(kind, list)
            .into_iter()
            .map(|n| folder.join(n))
            .collect()
    } else {
        named.iter().map(PathBuf::from).collect()
    };
    let demo = match kind {
        _ if !session.shared.demo => None,
        FileKind::Site => crate::assets::template("demo/site.yaml"),
        FileKind::Oils => crate::assets::template("demo/oils.yaml"),
        _ => None,
    };
    if let Some(text) = demo {
        return read(FileId(0), text).root.into_iter().collect();
    }
    let texts = files.iter().filter_map(|f| session.host.read(f).ok());
    texts
        .filter_map(|bytes| read(FileId(0), &String::from_utf8_lossy(&bytes)).root)
        .collect()
}

fn key<'e>(entry: &'e Entry, name: &str) -> Option<&'e Entry> {
    entry.value.entries()?.iter().find(|e| e.key.text == name)
}

fn says(entry: &Entry) -> String {
    let name = key(entry, "name").and_then(|e| e.value.text());
    name.unwrap_or("").to_owned()
}

/// Tags and addresses of points.
pub(super) fn tags(session: &Session<'_>) -> Vec<Named> {
    let mut found = Vec::new();
    let named: Vec<String> = session.shared.site.iter().cloned().collect();
    for root in roots(session, FileKind::Site, &named) {
        let machines = root
            .entries()
            .unwrap_or(&[])
            .iter()
            .find(|e| e.key.text == "machines");
        for machine in machines.and_then(|m| m.value.entries()).unwrap_or(&[]) {
            found.push((machine.key.text.clone(), says(machine)));
            let points = key(machine, "points")
                .and_then(|p| p.value.entries())
                .unwrap_or(&[]);
            for point in points {
                found.push((
                    format!("{}/{}", machine.key.text, point.key.text),
                    says(machine),
                ));
            }
        }
    }
    found
}

/// Ids of oils.
pub(super) fn oils(session: &Session<'_>) -> Vec<Named> {
    let mut found = Vec::new();
    for root in roots(session, FileKind::Oils, &session.shared.oils) {
        for oil in root
            .entries()
            .unwrap_or(&[])
            .iter()
            .filter(|e| e.value.entries().is_some())
        {
            found.push((oil.key.text.clone(), says(oil)));
        }
    }
    found
}

/// Ids of rules.
pub(super) fn rules(session: &Session<'_>) -> Vec<Named> {
    let folder = (!session.shared.demo).then(|| session.folder());
    let calculated = crate::demand::rules::CALCULATED
        .iter()
        .map(|r| (r.0.to_owned(), String::new()));
    let listed = listing(&session.layers(folder.as_deref())).into_iter();
    calculated.chain(listed.map(|r| (r.id, r.title))).collect()
}
