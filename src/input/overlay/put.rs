//! Values of the command line put into the trees of the files, where they are for anything else than
//! the points of the run.

use super::TOGETHER;
use super::aim::Aim;
use crate::input::file::FileKind;
use crate::input::keys::spelt;
use crate::input::load::Tree;
use crate::source::yaml::{Entry, Key, Node, NodeKind};

/// Puts a value into the trees of the files.
pub(super) fn put(trees: &mut [Tree], aim: &Aim, entry: &Entry) {
    let (kind, way): (FileKind, Vec<&str>) = match aim {
        Aim::Point(_) => return,
        Aim::Oil(id) => (FileKind::Oils, vec![id]),
        Aim::Area(name) => (FileKind::Site, vec!["areas", name]),
        Aim::House => (FileKind::Site, vec!["house"]),
        Aim::Rule(name) => (FileKind::Site, vec!["house", "rules", name]),
        Aim::Site => (FileKind::Site, Vec::new()),
        Aim::Machine(address) => {
            let way = ["machines"]
                .into_iter()
                .chain(match address.split_once('/') {
                    Some((tag, point)) => vec![tag, "points", point],
                    None => vec![address.as_str()],
                });
            (FileKind::Site, way.collect())
        }
    };
    let mut roots: Vec<&mut Node> = trees
        .iter_mut()
        .filter(|t| t.kind == kind)
        .filter_map(|t| t.root.as_mut())
        .collect();
    for root in &mut roots {
        if let Some(node) = at_mut(root, &way) {
            set(node, entry);
            return;
        }
    }
    // house values where the files have none
    if let (Aim::House, Some(root)) = (aim, roots.first_mut())
        && let NodeKind::Map(entries) = &mut root.kind
    {
        entries.push(Entry {
            key: Key {
                text: "house".to_owned(),
                span: entry.key.span,
            },
            value: Node {
                span: entry.value.span,
                kind: NodeKind::Map(vec![entry.clone()]),
            },
        });
    }
}

fn at_mut<'n>(node: &'n mut Node, way: &[&str]) -> Option<&'n mut Node> {
    let Some((first, rest)) = way.split_first() else {
        return Some(node);
    };
    let NodeKind::Map(entries) = &mut node.kind else {
        return None;
    };
    let names_it = |e: &&mut Entry| e.key.text.trim() == *first || spelt(&e.key.text) == *first;
    at_mut(&mut entries.iter_mut().find(names_it)?.value, rest)
}

/// Sets a key of a record, in place of what stated the same.
fn set(node: &mut Node, entry: &Entry) {
    let key = spelt(&entry.key.text);
    if !matches!(node.kind, NodeKind::Map(_)) {
        node.kind = NodeKind::Map(Vec::new());
    }
    let NodeKind::Map(entries) = &mut node.kind else {
        return;
    };
    let reading = ["sump", "at ambient"];
    let same = |other: &str| {
        let one_reading = reading.contains(&key.as_str()) && reading.contains(&other);
        let together = TOGETHER
            .iter()
            .any(|g| g.contains(&key.as_str()) && g.contains(&other));
        other == key || (together && !one_reading)
    };
    entries.retain(|e| !same(&spelt(&e.key.text)));
    entries.push(entry.clone());
}
