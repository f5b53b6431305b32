//! How sure verdicts are.

use super::json;
use crate::decide::scatter::{Basis, Sampled, Scatter};
use crate::quantity::show::{Units, unit_of};
use serde_json::{Value, json};

/// The result of a sampling as it stands beside a verdict.
pub fn value(s: &Scatter, units: Units) -> Value {
    let inputs: Vec<Value> = s.inputs.iter().map(|i| input(i, units)).collect();
    let most: Vec<Value> = s.most().iter().map(|i| json!(named(i))).collect();
    json!({
        "cases": s.cases,
        "met": s.met,
        "share": json::number(s.share()),
        "interval": { "low": json::number(s.interval.0), "high": json::number(s.interval.1),
                      "confidence": 0.95 },
        "matter_most": most,
        "inputs": inputs,
        "seed": crate::decide::scatter::SEED,
    })
}

/// The input with its part.
pub fn named(i: &Sampled) -> String {
    i.about
        .as_ref()
        .map_or_else(|| i.key.clone(), |about| format!("{about}: {}", i.key))
}

fn input(i: &Sampled, units: Units) -> Value {
    let unit = unit_of(i.ends.0.kind, units);
    let unit_name = if i.basis == Basis::Oil { "" } else { unit.name };
    json!({
        "key": i.key, "part": i.about, "basis": i.basis.word(),
        "range": [json::number(i.ends.0.in_unit(unit)), json::number(i.ends.1.in_unit(unit))],
        "unit": unit_name,
        "explains": json::number(i.matters),
    })
}
