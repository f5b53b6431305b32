//! A table of inputs, one a row, as the workbook of a report has it: back into files.
//!
//! A path says where an input belongs, `machines / M01 / parts / [1] / speed`; the value stands as
//! it was written, so that what is read back is what was there.

use super::draft::{Counts, Draft};
use super::finding::{Finding, Kind};
use super::layout::Layout;
use super::table::Table;
use super::target::{Makes, Target};
use super::yaml::scalar;
use crate::source::yaml::{Node, NodeKind};
use std::fmt::Write as _;

/// What parts the steps of a path.
pub const STEP: &str = " / ";

/// A file as rows: the path of every value and the value.
pub fn flat(root: &Node) -> Vec<(String, &Node)> {
    let mut out = Vec::new();
    walk(root, &mut Vec::new(), &mut out);
    out
}

fn walk<'n>(node: &'n Node, path: &mut Vec<String>, out: &mut Vec<(String, &'n Node)>) {
    match &node.kind {
        NodeKind::Map(entries) if !entries.is_empty() => {
            for entry in entries {
                path.push(step(&entry.key.text));
                walk(&entry.value, path, out);
                path.pop();
            }
        }
        NodeKind::Seq(items) if !items.is_empty() => {
            for (i, item) in items.iter().enumerate() {
                path.push(format!("[{}]", i + 1));
                walk(item, path, out);
                path.pop();
            }
        }
        _ => out.push((path.join(STEP), node)),
    }
}

/// A key as a step: an oblique between spaces, and brackets, would be taken for something else.
fn step(key: &str) -> String {
    let safe = key.replace('\\', "\\\\").replace(STEP, " \\/ ");
    if safe.starts_with('[') {
        format!("\\{safe}")
    } else {
        safe
    }
}

fn unstep(step: &str) -> String {
    let plain = step.replace(" \\/ ", STEP);
    let plain = plain
        .strip_prefix("\\[")
        .map_or_else(|| plain.clone(), |rest| format!("[{rest}"));
    plain.replace("\\\\", "\\")
}

/// Whether a table is one of inputs.
pub fn is_one(layout: &Layout) -> bool {
    let has = |t: &Target| layout.columns.iter().any(|c| c.target == *t);
    has(&Target::Path) && has(&Target::AsWritten)
}

/// A value being put together again.
#[derive(Default)]
struct Tree {
    value: Option<String>,
    below: Vec<(String, Tree)>,
}

impl Tree {
    fn put(&mut self, path: &[String], value: &str) {
        match path.split_first() {
            None => self.value = Some(value.to_owned()),
            Some((first, rest)) => {
                let at = match self.below.iter().position(|(k, _)| k == first) {
                    Some(at) => at,
                    None => {
                        self.below.push((first.clone(), Self::default()));
                        self.below.len() - 1
                    }
                };
                self.below[at].1.put(rest, value);
            }
        }
    }

    fn is_list(&self) -> bool {
        !self.below.is_empty() && self.below.iter().all(|(k, _)| is_index(k))
    }

    fn write(&self, out: &mut String, indent: usize) {
        let pad = " ".repeat(indent);
        for (key, below) in &self.below {
            let head = if self.is_list() {
                "-".to_owned()
            } else {
                format!("{}:", scalar(&unstep(key)))
            };
            if below.below.is_empty() {
                let value = below.value.as_deref().unwrap_or("");
                // A record or list of which nothing is stated stands as its brackets.
                let text = match value {
                    "" => String::new(),
                    "{}" | "[]" => format!(" {value}"),
                    other => format!(" {}", scalar(other)),
                };
                let _ = writeln!(out, "{pad}{head}{text}");
            } else if self.is_list() {
                // The first key of an item stands behind its dash.
                let mut inner = String::new();
                below.write(&mut inner, indent + 2);
                let _ = write!(out, "{pad}- {}", inner.trim_start());
            } else {
                let _ = writeln!(out, "{pad}{head}");
                below.write(out, indent + 2);
            }
        }
    }
}

fn is_index(step: &str) -> bool {
    step.strip_prefix('[')
        .and_then(|s| s.strip_suffix(']'))
        .is_some_and(|n| n.parse::<usize>().is_ok())
}

/// Puts the file of one kind together from a table of inputs.
pub fn draft(table: &Table<'_>, makes: Makes, file: &str) -> Draft {
    let column = |t: Target| table.layout.columns.iter().find(|c| c.target == t);
    let (path, written, kind) = (
        column(Target::Path),
        column(Target::AsWritten),
        column(Target::FileKind),
    );
    let mut tree = Tree::default();
    let mut counts = Counts::default();
    let mut findings = Vec::new();
    for line in table.lines() {
        let text = |c: Option<&super::layout::Column>| {
            c.and_then(|c| table.sheet.at(line.number, c.number))
                .map(crate::table::Content::text)
        };
        if text(kind).is_some_and(|k| k.trim() != makes.word()) {
            continue;
        }
        counts.rows += 1;
        let Some(path) = text(path).filter(|p| !p.trim().is_empty()) else {
            findings.push(Finding {
                kind: Kind::LeftOut,
                row: Some(line.number),
                column: None,
                name: None,
                heading: String::new(),
                text: line.first_text(),
                says: "the row has no path: it is not known where its value belongs".into(),
            });
            continue;
        };
        let steps: Vec<String> = path.split(STEP).map(str::to_owned).collect();
        counts.carried += 1;
        tree.put(&steps, &text(written).unwrap_or_default());
    }
    let mut yaml = format!(
        "# yaml-language-server: $schema=./.filmwright/{}.schema.json\n# Put together by filmwright intake from the inputs in {file}.\n",
        makes.word()
    );
    tree.write(&mut yaml, 0);
    let machines = tree.below.iter().find(|(k, _)| k == "machines");
    counts.records = match makes {
        Makes::Site => machines.map_or(0, |(_, t)| t.below.len()),
        Makes::Oils => tree
            .below
            .iter()
            .filter(|(_, t)| !t.below.is_empty())
            .count(),
    };
    Draft {
        yaml,
        findings,
        counts,
        how: Vec::new(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::source::FileId;
    use crate::source::yaml::read;

    #[test]
    fn paths_lead_back_to_the_file() {
        let text = "file: site 1\nareas:\n  a / b: { ambient: -5 .. 30 degC }\n  empty: {}\nmachines:\n  M1:\n    seals: [NBR, FKM]\n    notes: |\n      one\n      two\n    parts:\n      - rolling bearing: { bore: 95 mm }\n        speed: 5 r/min\n      - component: x\n";
        let root = read(FileId(0), text).root.expect("a file");
        let mut tree = Tree::default();
        for (path, node) in flat(&root) {
            let steps: Vec<String> = path.split(STEP).map(str::to_owned).collect();
            let value = match &node.kind {
                NodeKind::Scalar(s) => s.text.clone(),
                NodeKind::Map(_) => "{}".into(),
                _ => "[]".into(),
            };
            tree.put(&steps, &value);
        }
        let mut again = String::new();
        tree.write(&mut again, 0);
        let back = read(FileId(0), &again).root.expect("a file");
        let told = |n: &Node| -> Vec<(String, Option<String>)> {
            flat(n)
                .into_iter()
                .map(|(p, n)| (p, n.text().map(str::to_owned)))
                .collect()
        };
        assert_eq!(told(&root), told(&back), "{again}");
    }
}
