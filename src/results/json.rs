//! The parts every JSON document is made of.

use crate::quantity::kind::Unit;
use crate::quantity::show::{Units, exact, unit_of};
use crate::quantity::{Amount, Kind, Measure};
use crate::source::place::Place;
use crate::trace::{Derivation, How, Step, StepId};
use serde_json::{Map, Value, json};

/// What stands at the top of every document.
#[derive(Clone, Debug, Default)]
pub struct Head {
    /// Fingerprint of all inputs and rules, sha-256.
    pub inputs: String,
    /// Rules in force: built-in edition, and how many entries a user replaced.
    pub rules: String,
    /// Date of judgement, ISO form.
    pub date: String,
    /// Texts the results were made from, where they are to be weighed again later.
    pub files: Vec<InputFile>,
    /// Reserve asked for by an option, VG steps.
    pub reserve: Option<f64>,
    /// Whether floors were judged as new, on request.
    pub as_new: bool,
}

/// A text the results were made from.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct InputFile {
    /// `site`, `oils`, `samples`, `events`, `rules`.
    pub kind: &'static str,
    /// Its path as shown.
    pub name: String,
    /// The text.
    pub text: String,
}

/// A document of a format, with its lists still to be added.
pub fn document(format: &str, head: &Head) -> Map<String, Value> {
    let mut top = Map::new();
    top.insert("format".into(), json!(format!("filmwright.{format} 1")));
    top.insert(
        "program".into(),
        json!(concat!("filmwright ", env!("CARGO_PKG_VERSION"))),
    );
    top.insert("rules".into(), json!(head.rules));
    top.insert("inputs".into(), json!(head.inputs));
    top.insert("date".into(), json!(head.date));
    if !head.files.is_empty() {
        let options = json!({ "reserve": head.reserve, "worn": !head.as_new });
        top.insert("options".into(), options);
        let files = head.files.iter();
        let files = files.map(|f| json!({ "kind": f.kind, "name": f.name, "text": f.text }));
        top.insert("files".into(), Value::Array(files.collect()));
    }
    top
}

/// A document as text, ending with a newline.
pub fn text(document: Map<String, Value>) -> String {
    let mut text = serde_json::to_string_pretty(&Value::Object(document)).unwrap_or_default();
    text.push('\n');
    text
}

/// A list of a document that is made while it is written: its name and its rows.
pub type Rows<'r> = (&'static str, Box<dyn Iterator<Item = Value> + 'r>);

/// A document in parts, to be written one after the other: what stands at its top, then lists with
/// one row a line. Only one row is in memory at a time, however long the lists are.
pub fn in_parts(
    top: Map<String, Value>,
    lists: Vec<Rows<'_>>,
) -> impl Iterator<Item = String> + '_ {
    let mut head = serde_json::to_string_pretty(&Value::Object(top)).unwrap_or_default();
    // the lists come before the bracket that ends the document
    head.truncate(head.trim_end_matches('}').trim_end().len());
    let lists = lists.into_iter().flat_map(|(name, rows)| {
        let mut first = true;
        let rows = rows.map(move |row| {
            let comma = if std::mem::take(&mut first) { "" } else { "," };
            format!("{comma}\n    {row}")
        });
        std::iter::once(format!(",\n  \"{name}\": ["))
            .chain(rows)
            .chain(std::iter::once("\n  ]".to_owned()))
    });
    std::iter::once(head)
        .chain(lists)
        .chain(std::iter::once("\n}\n".to_owned()))
}

/// A number in a unit.
pub fn in_unit(amount: Amount, unit: &Unit) -> Value {
    json!({ "value": number(amount.in_unit(unit)), "unit": unit.name })
}

/// A quantity in the unit of its kind.
pub fn amount(amount: Amount, units: Units) -> Value {
    in_unit(amount, unit_of(amount.kind, units))
}

/// A typed quantity in the unit of its kind.
pub fn quantity<Q: Measure>(q: Q, units: Units) -> Value {
    amount(q.amount(), units)
}

/// A finite number; null otherwise.
pub fn number(x: f64) -> Value {
    if x.is_finite() {
        json!(exact(x))
    } else {
        Value::Null
    }
}

/// A number of VG steps with its step.
pub fn steps_margin(value: f64, step: Option<StepId>) -> Value {
    let mut m = Map::new();
    m.insert("value".into(), number(value));
    m.insert("unit".into(), json!("VG step"));
    if let Some(step) = step {
        m.insert("step".into(), json!(step_name(step)));
    }
    Value::Object(m)
}

/// A number of kelvins with its step.
pub fn kelvins_margin(value: f64, step: Option<StepId>) -> Value {
    let mut m = Map::new();
    m.insert("value".into(), number(value));
    m.insert("unit".into(), json!("K"));
    if let Some(step) = step {
        m.insert("step".into(), json!(step_name(step)));
    }
    Value::Object(m)
}

/// `s12`.
pub fn step_name(step: StepId) -> String {
    format!("s{}", step.0 + 1)
}

/// An unknown with its range.
pub fn unknown(lo: Amount, hi: Amount, units: Units) -> Value {
    let unit = unit_of(lo.kind, units);
    json!({
        "value": null,
        "range": [number(lo.in_unit(unit)), number(hi.in_unit(unit))],
        "unit": unit.name,
    })
}

/// The steps of a calculation that some results stand on.
pub fn steps(trace: &Derivation, results: &[StepId], units: Units) -> Vec<Value> {
    trace
        .behind(results)
        .into_iter()
        .map(|s| step(trace, s, units))
        .collect()
}

/// All steps of a calculation.
pub fn all_steps(trace: &Derivation, units: Units) -> Vec<Value> {
    trace
        .steps()
        .iter()
        .map(|s| step(trace, s, units))
        .collect()
}

fn step(trace: &Derivation, step: &Step, units: Units) -> Value {
    let mut m = Map::new();
    m.insert("id".into(), json!(step_name(step.id)));
    m.insert("title".into(), json!(step.says));
    if let Some(about) = &step.about {
        m.insert("about".into(), json!(about));
    }
    m.insert("symbol".into(), json!(step.symbol));
    match &step.how {
        How::Law { law, with } => {
            m.insert("relation".into(), json!(law.name));
            m.insert("formula".into(), json!(law.formula));
            let mut inputs = Map::new();
            for (symbol, id) in with {
                if let Some(used) = trace.step(*id) {
                    inputs.insert(unique(&inputs, symbol), input(used, units));
                }
            }
            m.insert("with".into(), Value::Object(inputs));
            m.insert("source".into(), json!(law.source));
            m.insert("range".into(), json!(law.range));
        }
        How::Given { written, origin } => {
            if !written.is_empty() {
                m.insert("written".into(), json!(written));
            }
            m.insert("origin".into(), json!(origin.words()));
            if let Some(note) = &origin.note {
                m.insert("note".into(), json!(note));
            }
            if let Some(dated) = &origin.dated {
                m.insert("dated".into(), json!(dated));
            }
            if let Some(from) = &origin.inherited {
                m.insert("inherited".into(), json!(from));
            }
            if let Place::Rule(rule) = &origin.place {
                m.insert("rule".into(), json!(rule));
            }
        }
    }
    m.insert("result".into(), amount(step.amount, units));
    if !step.notes.is_empty() {
        m.insert("notes".into(), json!(step.notes));
    }
    Value::Object(m)
}

/// A symbol that is not in the map yet: `nu`, `nu 2`.
fn unique(map: &Map<String, Value>, symbol: &str) -> String {
    if !map.contains_key(symbol) {
        return symbol.to_owned();
    }
    (2..=map.len() + 2)
        .map(|n| format!("{symbol} {n}"))
        .find(|s| !map.contains_key(s))
        .unwrap_or_default()
}

fn input(step: &Step, units: Units) -> Value {
    let mut m = match amount(step.amount, units) {
        Value::Object(m) => m,
        _ => Map::new(),
    };
    match &step.how {
        How::Law { .. } => {
            m.insert("step".into(), json!(step_name(step.id)));
        }
        How::Given { origin, .. } => {
            m.insert("origin".into(), json!(origin.words()));
            m.insert("step".into(), json!(step_name(step.id)));
        }
    }
    Value::Object(m)
}

/// A temperature of so many kelvins.
pub fn temperature(kelvins: f64, units: Units) -> Value {
    amount(
        Amount {
            kind: Kind::Temperature,
            base: kelvins,
        },
        units,
    )
}

/// A viscosity of so many m²/s.
pub fn viscosity(base: f64, units: Units) -> Value {
    amount(
        Amount {
            kind: Kind::KinematicViscosity,
            base,
        },
        units,
    )
}
