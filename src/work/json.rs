//! Results and steps as JSON.

use super::{Relation, Value, Worked};
use crate::quantity::show::{Units, exact, unit_of};
use crate::quantity::{Amount, Unit};
use crate::trace::{Derivation, How, Step, StepId};
use serde_json::{Map, Value as Json, json};

/// A relation worked out: its results, the steps behind them, remarks. A name has no step; the
/// source of its relation stands beside it.
pub(super) fn answer(relation: &Relation, worked: &Worked) -> Json {
    let mut result = Map::new();
    for (name, value) in &worked.results {
        result.insert((*name).to_owned(), result_value(relation, value));
    }
    let steps: Vec<Json> = worked
        .trace
        .steps()
        .iter()
        .map(|s| step(s, &worked.trace))
        .collect();
    json!({ "result": result, "steps": steps, "notes": worked.notes })
}

fn result_value(relation: &Relation, value: &Value) -> Json {
    match value {
        Value::Quantity { amount, unit, step } => {
            let mut object = in_unit(*amount, unit);
            object.insert("step".to_owned(), json!(step.0));
            Json::Object(object)
        }
        Value::Text(text) => {
            json!({ "value": text, "unit": "", "source": relation.law.source })
        }
    }
}

/// A step: what it is, the law and the numbers it was called with, or where it was read.
fn step(step: &Step, trace: &Derivation) -> Json {
    let mut object = Map::new();
    object.insert("id".to_owned(), json!(step.id.0));
    object.insert("symbol".to_owned(), json!(step.symbol));
    match &step.how {
        How::Law { law, with } => {
            object.insert("title".to_owned(), json!(step.says));
            object.insert("law".to_owned(), json!(law.name));
            object.insert("formula".to_owned(), json!(law.formula));
            object.insert("with".to_owned(), Json::Object(inputs(with, trace)));
            object.insert("result".to_owned(), shown(step.amount));
            object.insert("source".to_owned(), json!(law.source));
        }
        How::Given { written, origin } => {
            object.insert("title".to_owned(), json!(step.says));
            object.insert("written".to_owned(), json!(written));
            object.insert("result".to_owned(), shown(step.amount));
            let source = match &origin.note {
                Some(note) => format!("{}: {note}", origin.whose),
                None => "given".to_owned(),
            };
            object.insert("source".to_owned(), json!(source));
        }
    }
    if !step.notes.is_empty() {
        object.insert("notes".to_owned(), json!(step.notes));
    }
    Json::Object(object)
}

/// By symbol; a symbol met again gets a number behind it.
fn inputs(with: &[(&'static str, StepId)], trace: &Derivation) -> Map<String, Json> {
    let mut object = Map::new();
    for (symbol, id) in with {
        let mut key = (*symbol).to_owned();
        let mut count = 1;
        while object.contains_key(&key) {
            count += 1;
            key = format!("{symbol}_{count}");
        }
        let mut value = trace.step(*id).map_or_else(Map::new, |s| {
            let amount = s.amount;
            in_unit(amount, unit_of(amount.kind, Units::Si).name)
        });
        value.insert("step".to_owned(), json!(id.0));
        object.insert(key, Json::Object(value));
    }
    object
}

fn shown(amount: Amount) -> Json {
    Json::Object(in_unit(amount, unit_of(amount.kind, Units::Si).name))
}

fn in_unit(amount: Amount, unit: &str) -> Map<String, Json> {
    let value = amount
        .kind
        .unit(unit)
        .map_or(amount.base, |unit: &Unit| amount.in_unit(unit));
    let mut object = Map::new();
    object.insert("value".to_owned(), json!(exact(value)));
    object.insert("unit".to_owned(), json!(unit));
    object
}
