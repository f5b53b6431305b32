//! What moved between two states, as a document and as a table.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
use crate::compare::{Change, Comparison, Moved, What};
use serde_json::{Map, Value, json};

/// A JSON document of what moved; `names`: of the old and the new state.
pub fn document_of(found: &Comparison, names: (&str, &str), head: &Head) -> String {
    let mut top = document("compare", head);
    top.insert("old".into(), json!(names.0));
    top.insert("new".into(), json!(names.1));
    let moved = found.moved.iter().map(|m| change(found, m)).collect();
    top.insert("changes".into(), Value::Array(moved));
    let idle = found.idle();
    let inputs = found.changes.iter().enumerate().map(|(i, c)| {
        let mut m = input(c);
        m.insert("moved".into(), json!(!idle.contains(&i)));
        Value::Object(m)
    });
    top.insert("inputs".into(), Value::Array(inputs.collect()));
    json::text(top)
}

fn change(found: &Comparison, moved: &Moved) -> Value {
    let (machine, point) = match moved.point.split_once('/') {
        Some((machine, point)) => (machine, Some(point)),
        None => (moved.point.as_str(), None),
    };
    let mut m = Map::new();
    m.insert("machine".into(), json!(machine));
    m.insert("point".into(), json!(point));
    m.insert("what".into(), json!(moved.what.word()));
    match &moved.what {
        What::Verdict(oil) => m.insert("oil".into(), json!(oil)),
        What::Limit(end) => m.insert("end".into(), json!(end)),
        What::Point | What::Oil => None,
    };
    m.insert("was".into(), json!(moved.was));
    m.insert("is".into(), json!(moved.is));
    let because = moved.because.iter().map(|i| input(&found.changes[*i]));
    m.insert(
        "because".into(),
        Value::Array(because.map(Value::Object).collect()),
    );
    m.insert("each_alone".into(), json!(moved.alone));
    Value::Object(m)
}

fn input(change: &Change) -> Map<String, Value> {
    let mut m = Map::new();
    m.insert("input".into(), json!(change.input));
    m.insert("was".into(), json!(change.was));
    m.insert("is".into(), json!(change.is));
    m
}

/// One row a thing that moved.
pub fn table_of(found: &Comparison) -> Table {
    let headings = ["point", "what", "of", "was", "is", "because", "each_alone"];
    Table {
        headings: headings.map(str::to_owned).to_vec(),
        rows: found.moved.iter().map(|m| row(found, m)).collect(),
    }
}

fn row(found: &Comparison, moved: &Moved) -> Vec<Cell> {
    let of = match &moved.what {
        What::Verdict(oil) => Some(oil.as_str()),
        What::Limit(end) => Some(*end),
        What::Point | What::Oil => None,
    };
    let because: Vec<String> = moved
        .because
        .iter()
        .map(|i| format!("{} {}", found.changes[*i].input, found.changes[*i].says()))
        .collect();
    vec![
        Cell::from(moved.point.as_str()),
        Cell::from(moved.what.word()),
        Cell::maybe(of),
        Cell::maybe(moved.was.as_deref()),
        Cell::maybe(moved.is.as_deref()),
        Cell::Text(because.join("; ")),
        Cell::from(if moved.alone { "yes" } else { "no" }),
    ]
}
