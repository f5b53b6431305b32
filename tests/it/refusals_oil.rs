//! What the relations of the oil refuse, by name and with words that say what to do.

use crate::checks::answer;
use serde_json::{Value, json};

fn refusal(relation: &str, with: &Value) -> (String, String) {
    let answer = answer(relation, with);
    let part = |key: &str| answer["error"][key].as_str().unwrap_or_default().to_owned();
    (part("name"), part("message"))
}

/// The refusal, the relation, its inputs.
static REFUSED: &str = r#"
grade-unknown iso-grade-limits { "grade": 45 }
agma-unknown agma-grade { "number": "16" }
input-missing blend { "fractions": [0.5, 0.5] }
points-too-few viscosity-at { "points": ["46 mm2/s at 40 degC"], "at": "20 degC" }
points-same-temperature viscosity-at { "points": ["46 mm2/s at 40 degC", "45 mm2/s at 40 degC"], "at": "20 degC" }
points-upside-down viscosity-at { "points": ["6.8 mm2/s at 40 degC", "46 mm2/s at 100 degC"], "at": "20 degC" }
viscosity-out-of-range viscosity-at { "points": ["46 mm2/s at 40 degC", "0.1 mm2/s at 100 degC"], "at": "20 degC" }
viscosity-out-of-range viscosity-at { "points": ["46 mm2/s at 40 degC", "6.8 mm2/s at 100 degC"], "at": "-120 degC" }
unit-missing viscosity-at { "points": ["46 mm2/s at 40 degC", "6.8 mm2/s at 100 degC"], "at": "20" }
point-malformed viscosity-at { "points": ["46 mm2/s, 40 degC"], "at": "20 degC" }
input-unknown viscosity-at { "points": ["46 mm2/s at 40 degC", "6.8 mm2/s at 100 degC"], "at": "20 degC", "near": "1" }
viscosity-out-of-range temperature-at { "points": ["46 mm2/s at 40 degC", "6.8 mm2/s at 100 degC"], "nu": "0.2 mm2/s" }
points-upside-down viscosity-index { "nu40": "6.8 mm2/s", "nu100": "46 mm2/s" }
index-not-defined viscosity-index { "nu40": "5 mm2/s", "nu100": "1.99 mm2/s" }
no-solution nu100-from-index { "nu40": "3 mm2/s", "vi": 100 }
index-out-of-range nu100-from-index { "nu40": "46 mm2/s", "vi": 900 }
agma-suffix-unknown agma-grade { "number": "5 ZZ" }
viscosity-out-of-range saybolt { "nu": "1.5 mm2/s", "at": "100 degF" }
reading-out-of-range saybolt-to-nu { "sus": "20 SUS", "at": "100 degF" }
reading-unreadable saybolt-to-nu { "sus": "5 degE", "at": "100 degF" }
reading-unreadable saybolt-to-nu { "sus": "150 %", "at": "100 degF" }
temperature-not-defined furol { "nu": "200 mm2/s", "at": "40 degC" }
reading-out-of-range engler-to-nu { "engler": "1 degE" }
choice-unknown density-at { "density15": "880 kg/m3", "at": "40 degC", "base": "butter" }
fractions-sum blend { "fractions": [0.5, 0.4], "nu": ["32 mm2/s", "68 mm2/s"] }
fraction-out-of-range blend { "fractions": [1.5, -0.5], "nu": ["32 mm2/s", "68 mm2/s"] }
fractions-count blend { "fractions": [0.5, 0.5], "nu": ["32 mm2/s"] }
viscosity-out-of-range blend { "fractions": [0.5, 0.5], "nu": ["1 mm2/s", "68 mm2/s"], "method": "pipeline" }
target-infeasible blend-fraction { "nu_a": "46 mm2/s", "nu_b": "100 mm2/s", "target": "20 mm2/s" }
model-not-for-base pressure-viscosity { "model": "so-klaus", "base": "pao", "nu": "46 mm2/s", "B": 3.1, "density": "830 kg/m3" }
model-not-for-base pressure-viscosity { "model": "iso15144", "base": "ester", "eta38": "40 mPa.s", "at": "60 degC" }
sheared-thicker shear-loss { "nu100_new": "10 mm2/s", "nu100_sheared": "11 mm2/s", "nu100_base": "8 mm2/s" }
share-out-of-range shear-from-pssi { "nu100_new": "10 mm2/s", "nu100_base": "8 mm2/s", "pssi": 25 }
no-polymer polymer-split { "nu40": "46 mm2/s", "nu100": "6.8 mm2/s", "base_vi": 110 }
"#;

#[test]
fn nonsense_is_refused_by_name() {
    for line in REFUSED.lines().filter(|l| !l.is_empty()) {
        let mut parts = line.splitn(3, ' ');
        let (Some(name), Some(relation), Some(with)) = (parts.next(), parts.next(), parts.next())
        else {
            panic!("a line of another form: {line}");
        };
        let with = serde_json::from_str(with).expect("inputs are JSON");
        let (got, message) = refusal(relation, &with);
        assert_eq!(got, name, "{relation} with {with}: {message}");
        assert!(
            message.len() > 15,
            "{relation}: `{message}` says too little"
        );
        assert!(!message.contains("NaN"), "{message}");
    }
}

#[test]
fn a_percentage_forgotten_is_spelt_out() {
    let with = json!({ "nu100_new": "10 mm2/s", "nu100_base": "8 mm2/s", "pssi": 25 });
    let (_, message) = refusal("shear-from-pssi", &with);
    assert!(message.contains("write pssi=\"25 %\""), "{message}");
}

#[test]
fn what_a_reader_should_know_is_noted() {
    let note = |relation: &str, with: Value, word: &str| {
        let notes = answer(relation, &with)["notes"].to_string();
        assert!(notes.contains(word), "{relation}: {notes} lacks `{word}`");
    };
    let two = json!(["46 mm2/s at 40 degC", "6.8 mm2/s at 100 degC"]);
    note(
        "viscosity-at",
        json!({ "points": two, "at": "-10 degC" }),
        "extrapolated 50 K below",
    );
    note(
        "viscosity-at",
        json!({ "points": two, "at": "120 degC" }),
        "extrapolated 20 K above",
    );
    // polydimethylsiloxane, CoolProp 8.0.0 incompressible library
    let silicone = json!([
        "26.17183 mm2/s at -20 degC",
        "11.50403 mm2/s at 20 degC",
        "5.86554 mm2/s at 60 degC",
        "3.39694 mm2/s at 100 degC"
    ]);
    note(
        "viscosity-at",
        json!({ "points": silicone, "at": "30 degC" }),
        "between neighbouring",
    );
    let one = json!({ "points": silicone, "at": "30 degC", "weights": "equal" });
    note("viscosity-at", one, "misses a point");
    let thin = json!(["2.2 mm2/s at 40 degC", "0.95 mm2/s at 100 degC"]);
    note(
        "viscosity-at",
        json!({ "points": thin, "at": "60 degC" }),
        "full form",
    );
    note(
        "sae-engine-grade",
        json!({ "nu100": "14 mm2/s" }),
        "HTHS not given",
    );
    note(
        "agma-grade",
        json!({ "number": "11" }),
        "differ between editions",
    );
    let far = json!({ "fractions": [0.5, 0.5], "nu": ["19 mm2/s", "396 mm2/s"] });
    note("blend", far, "ten times apart");
    note(
        "density-at",
        json!({ "density15": "880 kg/m3", "at": "200 degC" }),
        "outside the range",
    );
}

#[test]
fn every_row_is_named_once_and_lists_what_it_asks_for() {
    let mut names: Vec<&str> = filmwright::work::relations().map(|r| r.name).collect();
    let count = names.len();
    names.sort_unstable();
    names.dedup();
    assert_eq!(names.len(), count);
    for row in filmwright::work::relations() {
        let law = row.law;
        assert!(
            ![law.title, law.formula, law.range, law.source].contains(&""),
            "{}",
            row.name
        );
        assert!(!row.gives.is_empty(), "{}", row.name);
        let (name, message) = refusal(row.name, &json!({}));
        assert_eq!(name, "input-missing", "{}: {message}", row.name);
        let listed = row.with.iter().any(|input| message.contains(input.name));
        assert!(
            listed,
            "{} asks for what it does not list: {message}",
            row.name
        );
    }
}
