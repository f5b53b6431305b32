//! What a changed value moves.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
use super::need::end_word;
use crate::decide::whatif::{Change, Governing, LimitMoved, Moved, OilMoved};
use crate::quantity::show::Units;
use serde_json::{Value, json};

/// A JSON document of everything that moves.
pub fn document_of(changes: &[Change], set: &[String], units: Units, head: &Head) -> String {
    let mut top = document("whatif", head);
    top.insert("set".into(), json!(set));
    let (mut moved, mut limits, mut proposed) = (vec![], vec![], vec![]);
    for change in changes {
        moved.extend(change.oils.iter().map(|o| oil(change, o)));
        limits.extend(change.limits.iter().map(|l| limit(change, l, units)));
        if let Some((before, after)) = &change.proposed {
            proposed.push(json!({
                "machine": change.machine, "point": change.point,
                "before": before, "after": after,
            }));
        }
    }
    top.insert("changes".into(), Value::Array(moved));
    top.insert("limits".into(), Value::Array(limits));
    top.insert("proposed".into(), Value::Array(proposed));
    let still: usize = changes.iter().map(|c| c.still).sum();
    top.insert("unchanged".into(), json!(still));
    json::text(top)
}

fn oil(change: &Change, o: &OilMoved) -> Value {
    let margins: serde_json::Map<String, Value> = o
        .margins
        .iter()
        .map(|m| (m.name.to_owned(), margin(m)))
        .collect();
    json!({
        "machine": change.machine, "point": change.point, "oil": o.oil, "in_use": o.in_use,
        "before": o.stand.0.word(), "after": o.stand.1.word(),
        "margins": margins,
        "conditions_added": o.conditions.0, "conditions_gone": o.conditions.1,
    })
}

fn margin(m: &Moved) -> Value {
    let of = |v: Option<f64>| v.map_or(Value::Null, json::number);
    let unit = if is_kelvin(m.name) { "K" } else { "VG step" };
    json!({ "before": of(m.before), "after": of(m.after), "unit": unit })
}

/// Whether a margin of that name is in kelvins.
pub fn is_kelvin(name: &str) -> bool {
    matches!(name, "pour" | "oil")
}

fn limit(change: &Change, l: &LimitMoved, units: Units) -> Value {
    let side = |g: &Option<Governing>| {
        g.as_ref().map_or(Value::Null, |g| {
            json!({
                "says": g.says, "part": g.part,
                "limit": g.limit.map(|a| json::amount(a, units)),
                "at": g.at.map(|t| json::temperature(t, units)),
            })
        })
    };
    json!({
        "machine": change.machine, "point": change.point, "end": end_word(l.end),
        "before": side(&l.before), "after": side(&l.after),
    })
}

/// The same as a table: one row an oil that moves.
pub fn table_of(changes: &[Change]) -> Table {
    let mut headings = vec!["machine", "point", "oil", "in_use", "before", "after"];
    let margins = ["hot", "cold", "pour", "oil", "maker"];
    let names = [
        "hot_before_vg_step",
        "hot_after_vg_step",
        "cold_before_vg_step",
        "cold_after_vg_step",
        "pour_before_k",
        "pour_after_k",
        "oil_before_k",
        "oil_after_k",
        "maker_before_vg_step",
        "maker_after_vg_step",
    ];
    headings.extend(names);
    headings.extend(["conditions_added", "conditions_gone"]);
    let mut table = Table {
        headings: headings.into_iter().map(str::to_owned).collect(),
        rows: Vec::new(),
    };
    for change in changes {
        for o in &change.oils {
            let mut row = vec![
                Cell::from(change.machine.as_str()),
                Cell::maybe(change.point.as_deref()),
                Cell::from(o.oil.as_str()),
                Cell::from(if o.in_use { "yes" } else { "no" }),
                Cell::from(o.stand.0.word()),
                Cell::from(o.stand.1.word()),
            ];
            for name in margins {
                let moved = o.margins.iter().find(|m| m.name == name);
                row.push(Cell::number(moved.and_then(|m| m.before)));
                row.push(Cell::number(moved.and_then(|m| m.after)));
            }
            row.push(Cell::Text(o.conditions.0.join("; ")));
            row.push(Cell::Text(o.conditions.1.join("; ")));
            table.rows.push(row);
        }
    }
    table
}
