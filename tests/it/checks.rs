//! Published check values, with the tolerance each carries, and the worst case of each topic.

use filmwright::work::batch::run_line;
use serde_json::{Map, Value, json};
use std::collections::BTreeMap;

/// A check case.
pub(crate) struct Case<'a> {
    pub(crate) id: &'a str,
    pub(crate) topic: &'a str,
    pub(crate) inputs: &'a Map<String, Value>,
    pub(crate) expect: &'a Map<String, Value>,
    pub(crate) tolerance: &'a Value,
}

impl<'a> Case<'a> {
    pub(crate) fn read(case: &'a Value) -> Self {
        let object = |key: &str| case[key].as_object().expect("an object");
        Self {
            id: case["id"].as_str().expect("an id"),
            topic: case["topic"].as_str().expect("a topic"),
            inputs: object("inputs"),
            expect: object("expect"),
            tolerance: &case["tolerance"],
        }
    }

    pub(crate) fn has(&self, key: &str) -> bool {
        self.inputs.contains_key(key)
    }

    pub(crate) fn number(&self, key: &str) -> f64 {
        let found = self.inputs.get(key).and_then(Value::as_f64);
        found.unwrap_or_else(|| panic!("{}: no number {key}", self.id))
    }

    pub(crate) fn text(&self, key: &str) -> &str {
        let found = self.inputs.get(key).and_then(Value::as_str);
        found.unwrap_or_else(|| panic!("{}: no text {key}", self.id))
    }

    pub(crate) fn numbers(&self, key: &str) -> Vec<f64> {
        numbers(&self.inputs[key])
    }
}

pub(crate) fn numbers(list: &Value) -> Vec<f64> {
    let items = list.as_array().expect("a list");
    items
        .iter()
        .map(|v| v.as_f64().expect("a number"))
        .collect()
}

/// What a relation answers, by result name: the plain values.
pub(crate) fn work(relation: &str, with: &Value) -> Map<String, Value> {
    let answer = answer(relation, with);
    let result = answer["result"].as_object();
    let result = result.unwrap_or_else(|| panic!("{relation} with {with}: {answer}"));
    result
        .iter()
        .map(|(name, value)| (name.clone(), value["value"].clone()))
        .collect()
}

/// The whole answer, error or not.
pub(crate) fn answer(relation: &str, with: &Value) -> Value {
    let line = json!({ "relation": relation, "with": with }).to_string();
    serde_json::from_str(&run_line(&line).0).expect("an answer is JSON")
}

/// The worst case of each topic, as a share of its tolerance, and the failures.
#[derive(Default)]
pub(crate) struct Tally {
    worst: BTreeMap<String, (f64, String)>,
    count: BTreeMap<String, usize>,
    failures: Vec<String>,
}

impl Tally {
    /// Compares every field of the expectation.
    pub(crate) fn compare(&mut self, case: &Case, got: &Value) {
        *self.count.entry(case.topic.to_owned()).or_default() += 1;
        // Where to predict is an input, though it stands among the results.
        for (name, expect) in case.expect.iter().filter(|(n, _)| *n != "predict_at_C") {
            let tolerance = case.tolerance.get(name).unwrap_or(case.tolerance);
            self.field(case, name, (expect, got.get(name)), tolerance);
        }
    }

    fn field(&mut self, case: &Case, path: &str, pair: (&Value, Option<&Value>), how: &Value) {
        let (expect, Some(got)) = pair else {
            self.failures
                .push(format!("{}: {path} not worked out", case.id));
            return;
        };
        match expect {
            Value::Object(fields) => {
                for (name, expect) in fields {
                    let how = how.get(name).unwrap_or(how);
                    let path = format!("{path}.{name}");
                    self.field(case, &path, (expect, got.get(name)), how);
                }
            }
            Value::Array(items) => {
                for (i, expect) in items.iter().enumerate() {
                    self.field(case, &format!("{path}[{i}]"), (expect, got.get(i)), how);
                }
            }
            _ => self.leaf(case, path, (expect, got), how),
        }
    }

    fn leaf(&mut self, case: &Case, path: &str, (expect, got): (&Value, &Value), how: &Value) {
        let limit = how["value"].as_f64().unwrap_or(0.0);
        let error = match (how["type"].as_str(), expect.as_f64(), got.as_f64()) {
            (Some("exact"), Some(e), Some(g)) => {
                f64::from(u8::from((g - e).abs() > 1e-12 * e.abs()))
            }
            (Some("exact"), _, _) => f64::from(u8::from(expect != got)),
            (Some("abs"), Some(e), Some(g)) => (g - e).abs() / limit,
            (Some("rel" | "rel_of_correlation"), Some(e), Some(g)) if e == 0.0 => {
                (g - e).abs() / limit
            }
            (Some("rel" | "rel_of_correlation"), Some(e), Some(g)) => (g / e - 1.0).abs() / limit,
            (Some("max" | "max_rel_error_full_form"), _, Some(g)) => g / limit,
            _ => f64::INFINITY,
        };
        if error.is_nan() || error > 1.0 {
            let words = format!("{}: {path} expected {expect}, got {got} ({how})", case.id);
            self.failures.push(words);
        }
        let worst = self.worst.entry(case.topic.to_owned()).or_default();
        if error >= worst.0 {
            *worst = (error, format!("{} {path}", case.id));
        }
    }

    /// Prints the worst of each topic and fails where anything missed.
    #[expect(clippy::print_stdout, reason = "the worst case is for people to read")]
    pub(crate) fn finish(self) {
        for (topic, (error, which)) in &self.worst {
            let count = self.count[topic];
            println!("{topic:28} {count:4} cases, worst {error:.3} of its tolerance: {which}");
        }
        assert!(self.failures.is_empty(), "{}", self.failures.join("\n"));
    }
}
