//! What an intake read, for machines and spreadsheets.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
use crate::intake::compare::Change;
use crate::intake::draft::Draft;
use crate::intake::finding::{Finding, Kind};
use serde_json::{Value, json};

/// What became of the draft.
#[derive(Clone, Debug, Default)]
pub struct Outcome {
    /// Files written.
    pub written: Vec<String>,
    /// Differences from the file in use.
    pub changes: Vec<Change>,
    /// Keys changed by hand that stay.
    pub by_hand: usize,
}

/// The document of an intake.
pub fn document_of(head: &Head, file: &str, draft: &Draft, outcome: &Outcome) -> String {
    let mut top = document("intake", head);
    top.insert("file".into(), json!(file));
    top.insert("read_as".into(), json!(draft.how));
    top.insert("rows".into(), json!(draft.counts.rows));
    top.insert("carried".into(), json!(draft.counts.carried));
    top.insert("records".into(), json!(draft.counts.records));
    top.insert("values_missing".into(), json!(draft.counts.missing));
    top.insert(
        "cells_not_understood".into(),
        json!(draft.count(Kind::NotUnderstood)),
    );
    top.insert("questions".into(), json!(draft.count(Kind::Question)));
    let findings = draft.findings.iter().map(finding).collect();
    top.insert("findings".into(), Value::Array(findings));
    let changes = outcome.changes.iter().map(change).collect();
    top.insert("changes".into(), Value::Array(changes));
    top.insert("kept_by_hand".into(), json!(outcome.by_hand));
    top.insert("written".into(), json!(outcome.written));
    json::text(top)
}

fn finding(f: &Finding) -> Value {
    json!({
        "kind": f.kind.word(), "row": f.row, "cell": f.cell(), "name": f.name,
        "heading": f.heading, "text": f.text, "says": f.says,
    })
}

fn change(c: &Change) -> Value {
    json!({
        "what": c.what.word(), "record": c.record, "key": c.key,
        "before": c.before, "stands": c.stands, "now": c.now,
    })
}

/// The findings as a table.
pub fn table_of(draft: &Draft) -> Table {
    let headings = ["kind", "row", "cell", "name", "heading", "text", "says"];
    Table {
        headings: headings.map(str::to_owned).to_vec(),
        rows: draft
            .findings
            .iter()
            .map(|f| {
                vec![
                    Cell::from(f.kind.word()),
                    Cell::number(f.row.map(f64::from)),
                    Cell::from(f.cell().as_str()),
                    Cell::maybe(f.name.as_deref()),
                    Cell::from(f.heading.as_str()),
                    Cell::from(f.text.as_str()),
                    Cell::from(f.says.as_str()),
                ]
            })
            .collect(),
    }
}
