//! JSON Schemas for editors, made from the table of keys.
//!
//! Draft-07, where the YAML support of editors stops. The schemas are for completion and hover
//! text: what a value means is checked by the reader, which knows more than a schema can say.

use super::file::FileKind;
use super::keys::{Form, Key, Record, is_private, part, records};
use serde_json::{Map, Value, json};

/// The schema of a kind of file.
pub fn schema(kind: FileKind) -> Value {
    let mut root = object(kind.record(), Some(kind));
    if let Some(named) = kind.named() {
        root.insert("additionalProperties".into(), refers_to(named));
    }
    let mut head = Map::new();
    head.insert(
        "$schema".into(),
        json!("http://json-schema.org/draft-07/schema#"),
    );
    head.insert(
        "title".into(),
        json!(format!("filmwright, {}", kind.record().name)),
    );
    head.append(&mut root);
    head.insert("definitions".into(), Value::Object(definitions(kind)));
    Value::Object(head)
}

/// Every schema with the name of its file: `site.schema.json`.
pub fn files() -> Vec<(String, String)> {
    let kinds = FileKind::ALL.iter();
    let mut all: Vec<(&str, Value)> = kinds.map(|kind| (kind.word(), schema(*kind))).collect();
    all.push(("rules", super::rules::schema::schema()));
    let printed = |(word, schema): (&str, Value)| {
        let mut text = serde_json::to_string_pretty(&schema).unwrap_or_default();
        text.push('\n');
        (format!("{word}.schema.json"), text)
    };
    all.into_iter().map(printed).collect()
}

/// The records a kind of file can reach, by name.
fn definitions(kind: FileKind) -> Map<String, Value> {
    let mut wanted: Vec<&'static Record> = Vec::new();
    reach(kind.record(), &mut wanted);
    if let Some(named) = kind.named() {
        reach(named, &mut wanted);
    }
    let mut out = Map::new();
    for record in records() {
        let reached = wanted.iter().any(|w| w.name == record.name);
        let apart = record.name != kind.record().name && record.name != part::PART.name;
        if reached && apart {
            out.insert(slug(record), Value::Object(object(record, None)));
        }
    }
    if wanted.iter().any(|r| r.name == part::PART.name) {
        let any: Vec<Value> = part::KINDS.iter().map(|k| refers_to(k.record)).collect();
        out.insert("any_part".into(), json!({"anyOf": any}));
    }
    out
}

fn reach(record: &'static Record, found: &mut Vec<&'static Record>) {
    if found.iter().any(|r| r.name == record.name) {
        return;
    }
    found.push(record);
    for key in record.all() {
        match key.form {
            Form::Record(r) | Form::Named(r) | Form::List(r) => reach(r, found),
            Form::Bearing => reach(&part::BEARING_SIZES, found),
            Form::Parts => {
                reach(&part::PART, found);
                for kind in &part::KINDS {
                    reach(kind.record, found);
                }
            }
            _ => {}
        }
    }
}

fn slug(record: &Record) -> String {
    record
        .name
        .trim_start_matches("an ")
        .trim_start_matches("a ")
        .trim_start_matches("the ")
        .replace(' ', "_")
}

fn refers_to(record: &Record) -> Value {
    json!({"$ref": format!("#/definitions/{}", slug(record))})
}

/// A record: every key in both spellings, keys that begin with `x-` besides.
fn object(record: &'static Record, kind: Option<FileKind>) -> Map<String, Value> {
    let mut properties = Map::new();
    for key in record.all() {
        let described = property(key, kind);
        properties.insert(key.name.into(), described.clone());
        if key.name.contains(' ') {
            properties.insert(key.name.replace(' ', "_"), described);
        }
    }
    let mut out = Map::new();
    out.insert("type".into(), json!("object"));
    out.insert("properties".into(), Value::Object(properties));
    out.insert("patternProperties".into(), json!({"^x-": {}}));
    out.insert("additionalProperties".into(), json!(false));
    let first = part::KINDS.iter().find(|k| k.record.name == record.name);
    let mut must: Vec<&str> = record.must.to_vec();
    must.extend(first.map(|k| k.first));
    if !must.is_empty() {
        out.insert("required".into(), json!(must));
    }
    debug_assert!(record.all().all(|k| !is_private(k.name)));
    out
}

fn property(key: &Key, kind: Option<FileKind>) -> Value {
    let mut shape = match (&key.form, kind) {
        (Form::FileKind, Some(kind)) => fields(json!({"const": kind.heading()})),
        (form, _) => fields(shape(form)),
    };
    let mut says = key.says.to_owned();
    if key.unstated != "–" {
        says.push_str(" Unstated: ");
        says.push_str(key.unstated);
        says.push('.');
    }
    shape.insert("description".into(), json!(says));
    Value::Object(shape)
}

fn fields(value: Value) -> Map<String, Value> {
    match value {
        Value::Object(map) => map,
        _ => Map::new(),
    }
}

/// A word with what stands behind it: `FKM, maker`.
fn sourced(words: &[&str]) -> Value {
    let plain = |w: &&str| {
        w.chars().fold(String::new(), |mut out, c| {
            if r"\^$.*+?()[]{}|".contains(c) {
                out.push('\\');
            }
            out.push(c);
            out
        })
    };
    let words: Vec<String> = words.iter().map(plain).collect();
    json!({"type": "string", "pattern": format!("^({}) *,", words.join("|"))})
}

/// What the reader takes as text may look like a number or a truth value to an editor.
fn shape(form: &Form) -> Value {
    let text = json!(["string", "number", "boolean"]);
    match form {
        Form::Text | Form::Markdown | Form::Path | Form::Day | Form::Label | Form::Component => {
            json!({"type": text})
        }
        Form::FileKind => json!({"type": "string"}),
        Form::Whole => json!({"type": ["integer", "string"]}),
        Form::Word(words) => json!({"anyOf": [{"enum": words}, sourced(words)]}),
        Form::Words(words) => json!({"anyOf": [
            {"enum": words},
            sourced(words),
            {"type": "array", "items": {"enum": words}},
        ]}),
        Form::Names => json!({"type": ["string", "array"], "items": {"type": text}}),
        Form::YesNo => json!({"enum": ["yes", "no", true, false]}),
        Form::YesNoOr(more) => {
            let mut words = vec![json!("yes"), json!("no"), json!(true), json!(false)];
            words.extend(more.iter().map(|w| json!(w)));
            json!({"enum": words})
        }
        Form::Quantity(want) => json!({"type": text, "examples": [want.example()]}),
        Form::Monthly(want) => {
            json!({"type": "array", "minItems": 12, "maxItems": 12,
                   "items": {"type": "string", "examples": [want.example()]}})
        }
        Form::Name(refers) => json!({"type": text, "title": refers.says()}),
        Form::Points | Form::ColdPoints => {
            json!({"type": "array", "minItems": 1, "items": {"type": "string"}, "examples": [form.says()]})
        }
        Form::Grade
        | Form::Cleanliness
        | Form::Teeth
        | Form::Price
        | Form::HouseLimit
        | Form::Base
        | Form::Flash => json!({"type": text, "examples": [form.says()]}),
        Form::Bearing => json!({"anyOf": [
            {"type": text, "examples": ["22220"]},
            refers_to(&part::BEARING_SIZES),
        ]}),
        Form::Record(record) => json!({"allOf": [refers_to(record)]}),
        Form::Named(record) => {
            json!({"type": "object", "additionalProperties": refers_to(record)})
        }
        Form::Fills => {
            json!({"type": "object", "additionalProperties": {"$ref": "#/definitions/machine"}})
        }
        Form::List(record) => json!({"type": "array", "items": refers_to(record)}),
        Form::Parts => {
            json!({"type": "array", "minItems": 1, "items": {"$ref": "#/definitions/any_part"}})
        }
        Form::Table => json!({"type": "object", "additionalProperties": {"type": text}}),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Every `$ref` of a schema.
    fn references(value: &Value, found: &mut Vec<String>) {
        match value {
            Value::Object(map) => {
                if let Some(Value::String(to)) = map.get("$ref") {
                    found.push(to.clone());
                }
                for inner in map.values() {
                    references(inner, found);
                }
            }
            Value::Array(items) => items.iter().for_each(|i| references(i, found)),
            _ => {}
        }
    }

    #[test]
    fn every_reference_leads_somewhere_and_every_definition_is_used() {
        for kind in FileKind::ALL {
            let schema = schema(*kind);
            let mut found = Vec::new();
            references(&schema, &mut found);
            for to in &found {
                let path = to.trim_start_matches('#');
                assert!(schema.pointer(path).is_some(), "{to} in {kind:?}");
            }
            let definitions = schema["definitions"].as_object().expect("an object");
            for name in definitions
                .keys()
                .filter(|n| !["part", "gear", "drive"].contains(&n.as_str()))
            {
                let to = format!("#/definitions/{name}");
                assert!(found.contains(&to), "{name} unused in {kind:?}");
            }
        }
    }

    #[test]
    fn the_schema_holds_both_spellings_and_the_sentence_of_the_table() {
        let schema = schema(FileKind::Site);
        let machine = &schema["definitions"]["machine"]["properties"];
        let says = machine["sump rise"]["description"].as_str().expect("text");
        assert!(says.starts_with("How much hotter than ambient"));
        assert_eq!(machine["sump rise"], machine["sump_rise"]);
        assert_eq!(schema["properties"]["file"]["const"], "site 1");
    }
}
