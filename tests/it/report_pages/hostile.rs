//! Hostile words in every field stay words.

use super::markup::{Piece, tags};
use super::{all, fixtures, templates};
use filmwright::report::model::{Frame, Sheet};
use serde_json::Value;

const HOSTILE: &str = "\"'><script>alert(1)</script></style></title></svg><img src=x onerror=y>]]>--!\u{202e}\u{2066}\u{0}\u{7}&lt;&#60;{{ 7*7 }}{% x %}\n`${y}";

/// Fields that hold the program's own words, not the user's.
const OWN: [&str; 16] = [
    "id", "key", "kind", "href", "src", "mark", "now_mark", "was_mark", "is_mark", "degrees",
    "paper", "words", "soft", "stands", "step", "level",
];

/// Puts the words after every text of the model. Formulas are kept from being understood either
/// way, so that they are set alike.
fn taint(value: &mut Value, key: &str, words: &str) {
    match value {
        Value::String(text) => {
            let own = OWN.contains(&key)
                || (key == "role" && ["proposed", "in-use", "other"].contains(&text.as_str()));
            if !own {
                text.push_str("??");
                text.push_str(words);
            }
        }
        Value::Array(items) => items.iter_mut().for_each(|item| taint(item, key, words)),
        // a letter of origin, of a fixed set
        Value::Object(fields) if fields.contains_key("soft") => {}
        Value::Object(fields) => fields
            .iter_mut()
            .for_each(|(key, item)| taint(item, key, words)),
        _ => {}
    }
}

fn tainted(frame: &Frame, sheet: &Sheet, words: &str) -> (Frame, Sheet) {
    let mut values = (
        serde_json::to_value(frame).expect("writes"),
        serde_json::to_value(sheet).expect("writes"),
    );
    taint(&mut values.0, "", words);
    taint(&mut values.1, "", words);
    let frame = serde_json::from_value(values.0).expect("reads");
    let mut read: Sheet = serde_json::from_value(values.1).expect("reads");
    read.place = sheet.place.clone();
    (frame, read)
}

fn shape(page: &str) -> Vec<String> {
    tags(page)
        .into_iter()
        .filter_map(|piece| match piece {
            Piece::Open(name, attrs) => {
                let keys: Vec<String> = attrs.into_iter().map(|(key, _)| key).collect();
                Some(format!("<{name} {}>", keys.join(" ")))
            }
            Piece::Close(name) => Some(format!("</{name}>")),
            Piece::Text(_) => None,
        })
        .collect()
}

/// A page with hostile words in every field, to be opened in a browser.
pub(super) fn page() -> String {
    let (frame, sheet) = tainted(&fixtures::frame(), &fixtures::machine(), HOSTILE);
    templates().page(&frame, &sheet).expect("lays out")
}

#[test]
fn hostile_words_stay_words() {
    let tame: String = HOSTILE.chars().map(|_| 'w').collect();
    let templates = templates();
    for (name, sheet) in all() {
        let (frame, hostile) = tainted(&fixtures::frame(), &sheet, HOSTILE);
        let (tame_frame, tame) = tainted(&fixtures::frame(), &sheet, &tame);
        let page = templates.page(&frame, &hostile).expect(name);
        let (found, wanted) = (
            shape(&page),
            shape(&templates.page(&tame_frame, &tame).expect(name)),
        );
        let first = found.iter().zip(&wanted).position(|(a, b)| a != b);
        assert!(
            first.is_none() && found.len() == wanted.len(),
            "{name}: at {first:?}: {:?}",
            first.map(|i| &found[i])
        );
        assert!(
            !page.contains(['\u{202e}', '\u{2066}', '\u{0}', '\u{7}']),
            "{name}"
        );
        assert!(!page.contains(">49<"), "{name}: a template ran");
    }
}
