//! The schema of rule files accepts what their reader accepts, and not what it does not know.

use crate::scenario::filmwright;
use filmwright::assets::builtin_rules;
use serde_json::Value;

fn schema() -> Value {
    filmwright("schema rules").json()
}

fn validator() -> jsonschema::Validator {
    jsonschema::draft7::new(&schema()).expect("a schema of draft 7")
}

/// Every built-in rule file of entries, as the validator sees it.
fn files() -> Vec<(String, Value)> {
    let yaml = |path: &str| path.rsplit('.').next() == Some("yaml");
    builtin_rules()
        .files
        .iter()
        .filter(|f| yaml(&f.path))
        .map(|f| (f.path.clone(), serde_yaml::from_str(&f.text).expect("YAML")))
        .collect()
}

#[test]
fn every_rule_file_is_valid() {
    let validator = validator();
    let mut wrong = Vec::new();
    for (path, file) in files() {
        for e in validator.iter_errors(&file).take(3) {
            wrong.push(format!("{path} {}: {e}", e.instance_path()));
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn an_unknown_key_a_lost_source_and_a_wrong_kind_are_refused() {
    let validator = validator();
    let all = files();
    assert!(all.len() > 50, "{}", all.len());
    for (path, file) in all {
        let mut extra = file.clone();
        extra["entries"][0]["colour"] = "green".into();
        assert!(!validator.is_valid(&extra), "{path}: an unknown key");
        let mut lost = file.clone();
        let entry = lost["entries"][0].as_object_mut().expect("an entry");
        if entry.remove("source").is_some() {
            assert!(!validator.is_valid(&lost), "{path}: no source");
        }
        let mut other = file.clone();
        other["file"] = "brakes 1".into();
        assert!(!validator.is_valid(&other), "{path}: no such kind");
    }
}

/// Blocks inside entries are described too.
#[test]
fn blocks_have_keys_of_their_own() {
    let schema = schema();
    let feeds = &schema["definitions"]["components"]["properties"]["feeds"]["anyOf"][0];
    assert!(feeds["properties"]["method"].is_object(), "{feeds}");
    assert_eq!(feeds["required"], serde_json::json!(["method"]));
    let unknown = &schema["definitions"]["suitability"]["properties"]["unknown"];
    let text = unknown.to_string();
    assert!(
        text.contains("only where") && text.contains("string"),
        "{text}"
    );
}
