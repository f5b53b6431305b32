//! The sheet of inputs: every value of every file as it was written, so that the files can be put
//! together again from it.

use super::{Cell, Sheet, columns};
use crate::input::value::clauses::split;
use crate::intake::inputs::{STEP, flat};
use crate::intake::number;
use crate::intake::units::{Unit, unit};
use crate::source::yaml::{Node, NodeKind, read};
use crate::source::{SourceFile, SourceSet};

/// Every value of every file.
pub(super) fn sheet(sources: &SourceSet) -> Sheet {
    let mut rows = Vec::new();
    for file in sources.files() {
        let Some(root) = read(file.id, &file.text).root else {
            continue;
        };
        let kind = kind_of(&root);
        if !matches!(kind.as_str(), "site" | "oils" | "samples" | "events") {
            continue;
        }
        rows.extend(
            flat(&root)
                .into_iter()
                .map(|(path, node)| row(file, &kind, &path, node)),
        );
    }
    Sheet {
        name: "Inputs",
        columns: columns(&[
            ("File kind", "", 9.0),
            ("Name", "", 16.0),
            ("Part", "", 6.0),
            ("Key", "", 20.0),
            ("Value", "", 12.0),
            ("Unit", "", 10.0),
            ("Whose word", "", 28.0),
            ("As written", "", 50.0),
            ("Path", "", 50.0),
            ("File", "", 18.0),
            ("Line", "", 6.0),
        ]),
        rows,
    }
}

/// What the file says it is: `site 1`.
fn kind_of(root: &Node) -> String {
    let entries = root.entries().unwrap_or(&[]);
    let file = entries.iter().find(|e| e.key.text == "file");
    let text = file.and_then(|e| e.value.text()).unwrap_or("");
    text.split_whitespace().next().unwrap_or("").to_owned()
}

fn row(file: &SourceFile, kind: &str, path: &str, node: &Node) -> Vec<Cell> {
    let written = match &node.kind {
        NodeKind::Scalar(s) => s.text.clone(),
        NodeKind::Map(_) => "{}".into(),
        NodeKind::Seq(_) => "[]".into(),
        NodeKind::Refused => String::new(),
    };
    let split = split(&written);
    let head = written.get(split.head.clone()).unwrap_or("");
    let whose = written
        .get(split.head.end..)
        .unwrap_or("")
        .trim_start_matches([',', ' ']);
    let (value, unit) = figure(head);
    let steps: Vec<&str> = path.split(STEP).collect();
    let place = Place::of(kind, &steps);
    vec![
        Cell::text(kind),
        Cell::maybe(place.name),
        Cell::maybe(place.part),
        Cell::text(place.key.join(STEP)),
        value.map_or_else(
            || Cell::text(head),
            |v| Cell::number(Some(v), decimals(head)),
        ),
        Cell::maybe(unit),
        Cell::text(whose),
        Cell::text(written.clone()),
        Cell::text(path),
        Cell::text(file.path.clone()),
        Cell::number(Some(file.line_of(node.span.start) as f64), 0),
    ]
}

/// What a path is about, for reading.
struct Place<'p> {
    name: Option<&'p str>,
    part: Option<&'p str>,
    key: Vec<&'p str>,
}

impl<'p> Place<'p> {
    fn of(kind: &str, steps: &[&'p str]) -> Self {
        let named = matches!(
            steps.first(),
            Some(&("machines" | "areas" | "house" | "accept" | "expect"))
        );
        let (name, rest) = match (kind, steps) {
            ("site", [_, name, rest @ ..]) if named && !rest.is_empty() => (Some(*name), rest),
            ("oils", [name, rest @ ..]) if !rest.is_empty() => (Some(*name), rest),
            _ => (None, steps),
        };
        match rest {
            ["parts", part, key @ ..] => Self {
                name,
                part: Some(part),
                key: key.to_vec(),
            },
            _ => Self {
                name,
                part: None,
                key: rest.to_vec(),
            },
        }
    }
}

/// A single number with its unit; nothing of ranges, words and several values.
fn figure(head: &str) -> (Option<f64>, Option<&'static str>) {
    let Some((token, rest)) = number::split(head) else {
        return (None, None);
    };
    let number::Read::Is(plain) = number::read(token, Some(number::Decimal::Point)) else {
        return (None, None);
    };
    match (plain.parse().ok(), rest.trim()) {
        (value, "") => (value, None),
        (value, rest) => match unit(rest, &[]) {
            Some(Unit::Of(_, name)) => (value, Some(name)),
            _ => (None, None),
        },
    }
}

/// As many decimals as were written.
fn decimals(head: &str) -> u8 {
    let token = number::split(head).map_or("", |(t, _)| t);
    let behind = token.split_once('.').map_or(0, |(_, d)| d.len());
    u8::try_from(behind).unwrap_or(3)
}
