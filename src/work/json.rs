//! Results of relations as JSON; the steps are written as in every other document.

use super::{Relation, Value, Worked};
use crate::quantity::show::{Units, unit_of};
use crate::results::json::{all_steps, in_unit, step_name};
use serde_json::{Map, Value as Json, json};

/// A relation worked out: its results, the steps behind them, remarks. A name has no step; the
/// source of its relation stands beside it.
pub(super) fn answer(relation: &Relation, worked: &Worked) -> Json {
    let mut result = Map::new();
    for (name, value) in &worked.results {
        result.insert((*name).to_owned(), result_value(relation, value));
    }
    let steps = all_steps(&worked.trace, Units::Si);
    json!({ "result": result, "steps": steps, "notes": worked.notes })
}

fn result_value(relation: &Relation, value: &Value) -> Json {
    match value {
        Value::Quantity { amount, unit, step } => {
            let kind = amount.kind;
            let unit = kind.unit(unit).unwrap_or_else(|| unit_of(kind, Units::Si));
            let mut object = in_unit(*amount, unit);
            object["step"] = json!(step_name(*step));
            object
        }
        Value::Text(text) => {
            json!({ "value": text, "unit": "", "source": relation.law.source })
        }
    }
}
