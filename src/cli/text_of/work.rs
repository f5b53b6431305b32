//! `work`: one relation at a time, as text.

use super::why;
use crate::cli::text::{Column, folded, table};
use crate::quantity::show::{Units, significant};
use crate::results::csv::{Cell, Table};
use crate::work::{Need, Relation, Value, Worked};
use std::fmt::Write as _;

/// All relations, grouped.
pub fn list(relations: &[&Relation]) -> String {
    let mut out = String::from(
        "Relations, grouped. filmwright work RELATION prints its inputs, range and source.\n",
    );
    let mut group = "";
    for relation in relations {
        if relation.group != group {
            group = relation.group;
            let _ = writeln!(out, "\n  {group}");
        }
        let _ = writeln!(out, "    {:<24} {}", relation.name, relation.law.title);
    }
    out
}

/// What one relation takes and gives.
pub fn about(relation: &Relation, width: usize) -> String {
    let mut out = format!("{}  {}\n\n", relation.name, relation.law.title);
    out.push_str(&folded(relation.law.formula, "  ", width));
    out.push_str("\n  with\n");
    let rows: Vec<Vec<String>> = relation
        .with
        .iter()
        .map(|input| {
            let need = match input.need {
                Need::Always => "needed".to_owned(),
                Need::Otherwise(default) => format!("else {default}"),
                Need::Form(form) => format!("form: {form}"),
            };
            vec![format!("  {}", input.name), need, input.says.to_owned()]
        })
        .collect();
    let columns = [
        Column::text("", 0),
        Column::text("", 0),
        Column::text("", 0),
    ];
    out.push_str(&table(&columns, &rows, width));
    out.push_str("\n  gives\n");
    for (name, says) in relation.gives {
        let _ = writeln!(out, "    {name:<20} {says}");
    }
    out.push('\n');
    out.push_str(&folded(
        &format!("range   {}", relation.law.range),
        "  ",
        width,
    ));
    out.push_str(&folded(
        &format!("source  {}", relation.law.source),
        "  ",
        width,
    ));
    out
}

/// Results and steps.
pub fn worked(worked: &Worked, units: Units, width: usize) -> String {
    let mut out = String::new();
    let mut results = Vec::new();
    for (name, value) in &worked.results {
        match value {
            Value::Quantity { amount, unit, step } => {
                results.push(*step);
                let shown = amount
                    .kind
                    .unit(unit)
                    .map_or(amount.base, |u| amount.in_unit(u));
                let number = significant(shown, 5, crate::quantity::show::Toward::Nearest);
                let _ = writeln!(out, "{name} = {}", format!("{number} {unit}").trim_end());
            }
            Value::Text(text) => {
                let _ = writeln!(out, "{name} = {}", text.as_deref().unwrap_or("none"));
            }
        }
    }
    for note in &worked.notes {
        out.push_str(&folded(&format!("note: {note}"), "", width));
    }
    out.push_str(&why::steps(&worked.trace, &results, units, width, &|_| {
        String::new()
    }));
    out
}

/// The relations as a table.
pub fn csv_table(relations: &[&Relation]) -> Table {
    let headings = [
        "relation", "group", "title", "formula", "range", "source", "with", "gives",
    ];
    let rows = relations.iter().map(|r| {
        let with: Vec<&str> = r.with.iter().map(|i| i.name).collect();
        let gives: Vec<&str> = r.gives.iter().map(|(n, _)| *n).collect();
        vec![
            Cell::from(r.name),
            Cell::from(r.group),
            Cell::from(r.law.title),
            Cell::from(r.law.formula),
            Cell::from(r.law.range),
            Cell::from(r.law.source),
            Cell::from(with.join(", ").as_str()),
            Cell::from(gives.join(", ").as_str()),
        ]
    });
    Table {
        headings: headings.map(str::to_owned).to_vec(),
        rows: rows.collect(),
    }
}

/// The register as JSON: what each relation takes and gives.
pub fn register(relations: &[&Relation]) -> String {
    let rows: Vec<serde_json::Value> = relations
        .iter()
        .map(|r| {
            let with: Vec<_> = r
                .with
                .iter()
                .map(|i| serde_json::json!({ "name": i.name, "says": i.says, "needed": i.need == Need::Always }))
                .collect();
            let gives: Vec<_> =
                r.gives.iter().map(|(n, s)| serde_json::json!({ "name": n, "says": s })).collect();
            serde_json::json!({
                "relation": r.name, "group": r.group, "title": r.law.title, "formula": r.law.formula,
                "range": r.law.range, "source": r.law.source, "with": with, "gives": gives,
            })
        })
        .collect();
    let mut text =
        serde_json::to_string_pretty(&serde_json::json!({ "relations": rows })).unwrap_or_default();
    text.push('\n');
    text
}
