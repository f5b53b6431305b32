//! A file as records with keys, and values without their layout.

use super::Unmerged;
use crate::source::yaml::{Entry, Node, NodeKind, read};
use crate::source::{FileId, Span};
use std::collections::BTreeMap;

/// A file as records with keys.
pub(super) struct Read<'t> {
    pub(super) text: &'t str,
    root: Vec<Entry>,
}

impl<'t> Read<'t> {
    pub(super) fn new(text: &'t str, what: &'static str) -> Result<Self, Unmerged> {
        let gated = read(FileId(0), text);
        let root = match gated.root.map(|r| r.kind) {
            Some(NodeKind::Map(entries)) if gated.faults.is_empty() => entries,
            None if gated.faults.is_empty() => Vec::new(),
            _ => return Err(Unmerged::NotRead(what)),
        };
        Ok(Self { text, root })
    }

    /// Sections that hold records by name; an oil file is one such section itself.
    pub(super) fn sections(&self) -> Vec<(String, &[Entry])> {
        if self.is_oils() {
            return vec![(String::new(), self.root.as_slice())];
        }
        let named = |e: &&Entry| matches!(e.key.text.as_str(), "machines" | "areas");
        self.root
            .iter()
            .filter(named)
            .map(|e| (e.key.text.clone(), e.value.entries().unwrap_or(&[])))
            .collect()
    }

    pub(super) fn is_oils(&self) -> bool {
        let file = self.root.iter().find(|e| e.key.text == "file");
        file.and_then(|e| e.value.text())
            .is_some_and(|t| t.trim().starts_with("oils"))
    }

    /// Records in order: section and name.
    pub(super) fn records(&self) -> Vec<(String, String)> {
        let mut out = Vec::new();
        for (section, entries) in self.sections() {
            for e in entries.iter().filter(|e| e.key.text != "file") {
                out.push((section.clone(), e.key.text.clone()));
            }
        }
        out
    }

    pub(super) fn record(&self, section: &str, name: &str) -> Option<&Entry> {
        let (_, entries) = self.sections().into_iter().find(|(s, _)| s == section)?;
        entries.iter().find(|e| e.key.text == name)
    }

    pub(super) fn key(&self, (section, record, key): &Path) -> Option<&Entry> {
        let entries = self.record(section, record)?.value.entries()?;
        entries.iter().find(|e| e.key.text == *key)
    }

    /// Every key of every record with its value, told without its layout.
    pub(super) fn values(&self) -> BTreeMap<Path, String> {
        let mut out = BTreeMap::new();
        for (section, entries) in self.sections() {
            for record in entries {
                for entry in record.value.entries().unwrap_or(&[]) {
                    let path = (
                        section.clone(),
                        record.key.text.clone(),
                        entry.key.text.clone(),
                    );
                    out.insert(path, told(&entry.value));
                }
            }
        }
        out
    }

    pub(super) fn slice(&self, span: Span) -> &'t str {
        self.text
            .get(span.start as usize..span.end as usize)
            .unwrap_or("")
    }

    /// Column of a byte.
    pub(super) fn column(&self, byte: u32) -> usize {
        let before = self.text.get(..byte as usize).unwrap_or("");
        before.len() - before.rfind('\n').map_or(0, |at| at + 1)
    }
}

/// A value without its layout.
pub(super) fn told(node: &Node) -> String {
    match &node.kind {
        NodeKind::Scalar(s) => s.text.trim().to_owned(),
        NodeKind::Seq(items) => format!(
            "[{}]",
            items.iter().map(told).collect::<Vec<_>>().join(", ")
        ),
        NodeKind::Map(entries) => {
            let keys: Vec<String> = entries
                .iter()
                .map(|e| format!("{}: {}", e.key.text, told(&e.value)))
                .collect();
            format!("{{ {} }}", keys.join(", "))
        }
        NodeKind::Refused => String::new(),
    }
}

/// Path of a key: section, record, key. Keys of the top have no record.
pub(super) type Path = (String, String, String);
