//! The schema of rule files for editors, from what their reader asks for.

use super::probe::{Asked, Keys, Shape, keys};
use super::{EDITION, kinds};
use crate::quantity::Kind;
use serde_json::{Map, Value, json};

/// The schema of every kind of rule file in one: the first line says which one holds.
pub fn schema() -> Value {
    let mut definitions = Map::new();
    let mut ways = Vec::new();
    let mut heads = Vec::new();
    for kind in kinds::known() {
        let head = format!("{kind} {EDITION}");
        let name = kind.replace(' ', "_");
        definitions.insert(name.clone(), block(&keys(kind), ""));
        ways.push(json!({
            "if": { "properties": { "file": { "const": head } } },
            "then": { "properties": { "entries": {
                "items": { "$ref": format!("#/definitions/{name}") } } } },
        }));
        heads.push(head);
    }
    json!({
        "$schema": "http://json-schema.org/draft-07/schema#",
        "title": "filmwright, rules",
        "type": "object",
        "properties": {
            "file": { "enum": heads, "description": "The kind of rule file and its edition." },
            "title": { "type": "string", "description": "What the file is about." },
            "entries": {
                "type": "array",
                "description": "The entries; one of the same id as a built-in one replaces it.",
            },
        },
        "required": ["file", "entries"],
        "additionalProperties": false,
        "allOf": ways,
        "definitions": definitions,
    })
}

/// A block of keys; keys that begin with `x-` besides.
fn block(all: &Keys, name: &str) -> Value {
    let mut properties = Map::new();
    let mut must = Vec::new();
    for (key, asked) in all.get(name).into_iter().flatten() {
        let inner = if name.is_empty() {
            key.clone()
        } else {
            format!("{name}, {key}")
        };
        properties.insert(key.clone(), property(all, &inner, asked));
        if asked.must {
            must.push(key.clone());
        }
    }
    json!({
        "type": "object",
        "properties": properties,
        "patternProperties": { "^x-": {} },
        "additionalProperties": false,
        "required": must,
    })
}

fn property(all: &Keys, path: &str, asked: &Asked) -> Value {
    let forms: Vec<Value> = asked.shapes.iter().map(|s| form(all, path, s)).collect();
    match forms.as_slice() {
        [one] => one.clone(),
        _ => json!({ "anyOf": forms }),
    }
}

fn form(all: &Keys, path: &str, shape: &Shape) -> Value {
    let list = |one: Value| json!({ "anyOf": [one, { "type": "array", "items": one }] });
    match shape {
        Shape::Text => json!({ "type": "string" }),
        Shape::Texts => list(json!({ "type": "string" })),
        Shape::Word(words) => json!({ "enum": words }),
        Shape::Words(words) => list(json!({ "enum": words })),
        Shape::Flag => json!({ "enum": [true, false, "yes", "no"] }),
        Shape::Count => json!({ "type": "integer", "minimum": 0 }),
        Shape::Counts => list(json!({ "type": "integer", "minimum": 0 })),
        Shape::Pairs => {
            json!({ "type": "object", "additionalProperties": { "type": "string" } })
        }
        Shape::Quantity(kind) => quantity(*kind),
        Shape::Quantities(kind) => list(quantity(*kind)),
        Shape::Range(kind) => {
            let example = kind.spec().example;
            json!({ "type": "string", "pattern": "\\.\\.",
                    "examples": [format!("{example} .. {example}")] })
        }
        Shape::Blocks => list(block(all, path)),
    }
}

fn quantity(kind: Kind) -> Value {
    let types = if kind.spec().bare {
        json!(["string", "number"])
    } else {
        json!("string")
    };
    json!({ "type": types, "examples": [kind.spec().example] })
}
