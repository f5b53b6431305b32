//! A draft as it grows: records with their lines, findings, counts.

use super::finding::{Finding, Kind};
use super::yaml::scalar;
use std::fmt::Write as _;

/// How much was read.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Counts {
    /// Rows that hold anything, below the headings.
    pub rows: usize,
    /// Rows carried into the draft.
    pub carried: usize,
    /// Cells of a key that are empty or hold a placeholder.
    pub missing: usize,
    /// Machines or oils drafted.
    pub records: usize,
}

/// What an intake gives.
#[derive(Clone, Debug, Default)]
pub struct Draft {
    /// The file drafted.
    pub yaml: String,
    /// Everything to be said, in the order of rows.
    pub findings: Vec<Finding>,
    /// Counts.
    pub counts: Counts,
    /// How the file was read, a sentence each.
    pub how: Vec<String>,
}

impl Draft {
    /// How many findings there are of a kind.
    pub fn count(&self, kind: Kind) -> usize {
        self.findings.iter().filter(|f| f.kind == kind).count()
    }
}

/// A record under its name: a machine, an oil.
#[derive(Clone, Debug, Default)]
pub struct Record {
    /// Its tag or id.
    pub name: String,
    /// Row of the register.
    pub row: u32,
    /// Keys with their values as written, in order.
    pub keys: Vec<(String, String)>,
    /// Parts: lines of each, the first with the kind of part.
    pub parts: Vec<Vec<(String, String)>>,
    /// Notes that stay on the row.
    pub notes: Vec<String>,
    /// Comments before the record.
    pub comments: Vec<String>,
}

impl Record {
    /// Adds a key, once.
    pub fn set(&mut self, key: &str, value: impl Into<String>) {
        if !self.keys.iter().any(|(k, _)| k == key) {
            self.keys.push((key.to_owned(), value.into()));
        }
    }

    /// The value of a key.
    pub fn get(&self, key: &str) -> Option<&str> {
        self.keys
            .iter()
            .find(|(k, _)| k == key)
            .map(|(_, v)| v.as_str())
    }

    /// The record as lines of a file, indented.
    pub fn write(&self, out: &mut String, indent: usize) {
        let pad = " ".repeat(indent);
        for comment in &self.comments {
            let _ = writeln!(
                out,
                "{pad}# {}",
                comment.split_whitespace().collect::<Vec<_>>().join(" ")
            );
        }
        let _ = writeln!(out, "{pad}{}:", scalar(&self.name));
        let inner = " ".repeat(indent + 2);
        for (key, value) in &self.keys {
            let _ = writeln!(out, "{inner}{}: {}", scalar(key), raw_or_scalar(key, value));
        }
        if !self.notes.is_empty() {
            let _ = writeln!(out, "{inner}notes: |");
            for note in &self.notes {
                let line = note.split_whitespace().collect::<Vec<_>>().join(" ");
                let _ = writeln!(out, "{inner}  - {line}");
            }
        }
        if !self.parts.is_empty() {
            let _ = writeln!(out, "{inner}parts:");
            for part in &self.parts {
                for (i, (key, value)) in part.iter().enumerate() {
                    let mark = if i == 0 { "- " } else { "  " };
                    let _ = writeln!(
                        out,
                        "{inner}  {mark}{}: {}",
                        scalar(key),
                        raw_or_scalar(key, value)
                    );
                }
            }
        }
    }
}

/// Keys that hold a text as people wrote it, never a list.
const TEXTS: [&str; 4] = ["name", "area", "source", "note"];

/// Lists and records are written as they are, texts so that they are read back.
fn raw_or_scalar(key: &str, value: &str) -> String {
    let structured = (value.starts_with('[') && value.ends_with(']'))
        || (value.starts_with('{') && value.ends_with('}'));
    if structured && !TEXTS.contains(&key) {
        value.to_owned()
    } else {
        scalar(value)
    }
}

#[cfg(test)]
mod tests {
    use super::Record;

    #[test]
    fn a_name_in_brackets_stays_a_text_and_a_list_a_list() {
        let mut record = Record {
            name: "P-1".to_owned(),
            ..Record::default()
        };
        record.set("name", "{spare}");
        record.set("classes", "[CKC, CKD]");
        let mut out = String::new();
        record.write(&mut out, 0);
        assert_eq!(out, "P-1:\n  name: '{spare}'\n  classes: [CKC, CKD]\n");
    }
}
