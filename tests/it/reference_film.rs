//! Published and independently computed values of contact, bearing, gear and grease relations:
//! every case of `tests/reference/film_checks.json` that belongs here, with its own tolerance.

mod bearing;
mod contact;
mod gear;
mod table;

use serde_json::{Map, Value};
use std::collections::BTreeMap;

/// What a case gave, by the names of its expectations.
pub(crate) type Got = BTreeMap<&'static str, Value>;

/// One case of the file.
pub(crate) struct Case<'a> {
    pub(crate) id: &'a str,
    pub(crate) inputs: &'a Map<String, Value>,
}

impl Case<'_> {
    /// A number of the inputs.
    pub(crate) fn n(&self, key: &str) -> f64 {
        self.maybe(key)
            .unwrap_or_else(|| panic!("{}: no input {key}", self.id))
    }

    /// A number that may be missing.
    pub(crate) fn maybe(&self, key: &str) -> Option<f64> {
        self.inputs.get(key).and_then(Value::as_f64)
    }

    /// A number with a unit, as a user writes it.
    pub(crate) fn with_unit(&self, key: &str, unit: &str) -> String {
        format!("{} {unit}", self.n(key))
    }

    /// A text of the inputs.
    pub(crate) fn text(&self, key: &str) -> &str {
        self.inputs.get(key).and_then(Value::as_str).unwrap_or("")
    }
}

/// The results of a row of `work`, numbers in the unit the row states.
pub(crate) fn work(relation: &str, with: &[(&str, String)]) -> BTreeMap<String, Value> {
    let with: Map<String, Value> = with
        .iter()
        .map(|(k, v)| ((*k).to_owned(), Value::String(v.clone())))
        .collect();
    work_json(relation, &with)
}

/// The same with lists among the inputs.
pub(crate) fn work_json(relation: &str, with: &Map<String, Value>) -> BTreeMap<String, Value> {
    let line = serde_json::json!({ "relation": relation, "with": with }).to_string();
    let (answer, refused) = filmwright::work::batch::run_line(&line);
    assert!(!refused, "{line}\n{answer}");
    let answer: Value = serde_json::from_str(&answer).expect("an answer is JSON");
    let results = answer["result"].as_object().expect("results").clone();
    results
        .into_iter()
        .map(|(name, result)| (name, result.get("value").cloned().unwrap_or(result)))
        .collect()
}

/// A number among results.
pub(crate) fn number(results: &BTreeMap<String, Value>, name: &str) -> f64 {
    results
        .get(name)
        .and_then(Value::as_f64)
        .unwrap_or_else(|| panic!("no number {name} in {results:?}"))
}

/// The deviation of a value: relative for numbers, none or endless for texts.
fn deviation(got: &Value, want: &Value) -> f64 {
    match (got, want) {
        (Value::Array(got), Value::Array(want)) if got.len() == want.len() => got
            .iter()
            .zip(want)
            .map(|(g, w)| deviation(g, w))
            .fold(0.0, f64::max),
        (Value::Number(got), Value::Number(want)) => {
            let (got, want) = (
                got.as_f64().expect("finite"),
                want.as_f64().expect("finite"),
            );
            if want == 0.0 {
                got.abs()
            } else {
                (got / want - 1.0).abs()
            }
        }
        _ if got == want => 0.0,
        _ => f64::INFINITY,
    }
}

#[test]
#[expect(
    clippy::print_stderr,
    reason = "the worst of each topic, shown with --nocapture"
)]
fn every_case_is_met() {
    let text = include_str!("../reference/film_checks.json");
    let file: Value = serde_json::from_str(text).expect("the file is JSON");
    let mut worst: BTreeMap<String, (f64, String)> = BTreeMap::new();
    let mut run = 0;
    let mut missed = Vec::new();
    for case in file["cases"].as_array().expect("cases") {
        let id = case["id"].as_str().expect("id");
        let topic = case["topic"].as_str().expect("topic");
        let oracle = case["oracle"].as_str().unwrap_or(id);
        let ours = ["hz", "ehl", "rb", "gr", "wm", "bv", "tb", "vi"];
        let group = id.split('-').next().unwrap_or("");
        if !ours.contains(&group) && oracle != "sae_visc" {
            continue;
        }
        let inputs = case["inputs"].as_object().expect("inputs");
        let got = worked(oracle, &Case { id, inputs });
        run += 1;
        for (name, want) in case["expect"].as_object().expect("expect") {
            let tolerance = &case["tolerance"];
            let allowed = tolerance
                .get(name.as_str())
                .or_else(|| tolerance.get("rel"))
                .unwrap_or(tolerance)
                .as_f64()
                .expect("a tolerance");
            let Some(value) = got.get(name.as_str()) else {
                missed.push(format!("{id}: no {name}"));
                continue;
            };
            let off = deviation(value, want);
            // Cases without tolerance are tables; equal within rounding of the same number.
            if off > allowed.max(1e-12) {
                missed.push(format!("{id}: {name} is {value}, wanted {want}"));
            }
            let entry = worst.entry(topic.to_owned()).or_default();
            if off >= entry.0 {
                *entry = (off, format!("{id} {name}, {allowed} allowed"));
            }
        }
    }
    for (topic, (off, at)) in &worst {
        eprintln!("{topic:24} {off:9.2e}  {at}");
    }
    eprintln!("{run} cases");
    assert!(run >= 91, "only {run} cases ran");
    assert!(missed.is_empty(), "{}", missed.join("\n"));
}

fn worked(oracle: &str, case: &Case) -> Got {
    contact::worked(oracle, case)
        .or_else(|| bearing::worked(oracle, case))
        .or_else(|| gear::worked(oracle, case))
        .or_else(|| table::worked(oracle, case))
        .unwrap_or_else(|| panic!("{}: nothing works out {oracle}", case.id))
}
