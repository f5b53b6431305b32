//! Rule files: YAML and Markdown in layers, read into the checked [`Rulebook`].
//!
//! A YAML file begins with `file: KIND 1` and lists its `entries`; a caution is a Markdown file
//! with a front matter of the same keys. All faults of all files are collected; a rulebook is
//! handed out only when there are none.

mod condition;
mod fault;
mod fields;
mod kinds;
mod links;
pub mod listing;

pub use condition::clause;
pub use fault::RuleFault;

use crate::assets::{Layer, TextFile};
use crate::model::rulebook::{Rulebook, Serving};
use fault::Faults;
use serde_yaml::Value;
use std::collections::BTreeSet;

/// Edition of the rule files.
const EDITION: &str = "1";

/// Reads rule files, lowest layer first.
///
/// # Errors
/// Every fault found in any file, in the order of layers, files and entries.
pub fn rulebook(layers: &[Layer]) -> Result<Rulebook, Vec<RuleFault>> {
    let faults = Faults::default();
    let mut book = Rulebook::default();
    for layer in layers {
        let mut seen = BTreeSet::new();
        for file in &layer.files {
            let mut filling = Filling {
                book: &mut book,
                seen: &mut seen,
                faults: &faults,
                file,
            };
            filling.file();
        }
    }
    book.serving = Serving::of(&book.classes);
    book.replaced.sort();
    links::check(&book, &faults);
    let faults = faults.into_inner();
    if faults.is_empty() {
        Ok(book)
    } else {
        Err(faults)
    }
}

/// One file being read into the rulebook.
struct Filling<'a> {
    book: &'a mut Rulebook,
    /// Kind and id of every entry of this layer so far.
    seen: &'a mut BTreeSet<(&'static str, String)>,
    faults: &'a Faults,
    file: &'a TextFile,
}

impl Filling<'_> {
    fn file(&mut self) {
        if is_markdown(&self.file.path) {
            self.caution();
        } else {
            self.yaml();
        }
    }

    fn fault(&self, what: impl Into<String>, write: impl Into<String>) {
        self.faults.add(&self.file.path, None, what, write);
    }

    fn yaml(&mut self) {
        let value: Value = match serde_yaml::from_str(&self.file.text) {
            Ok(value) => value,
            Err(e) => return self.fault(format!("not readable as YAML: {e}"), YAML_FORM),
        };
        let Some(map) = value.as_mapping() else {
            return self.fault("nothing in it", YAML_FORM);
        };
        let head = map.get("file").and_then(Value::as_str).unwrap_or_default();
        let kind = match head.rsplit_once(' ') {
            Some((kind, EDITION)) => kind,
            Some((kind, edition)) if kinds::known().contains(&kind) => {
                return self.fault(
                    format!("edition {edition} of {kind} is not known"),
                    format!("file: {kind} {EDITION}"),
                );
            }
            _ => head,
        };
        let Some(entries) = map.get("entries").and_then(Value::as_sequence) else {
            return self.fault("no list of entries", YAML_FORM);
        };
        for key in map.keys().filter_map(Value::as_str) {
            if !["file", "title", "entries"].contains(&key) {
                self.fault(format!("unknown key `{key}`"), "file, title or entries");
            }
        }
        if !kinds::read(self, kind, entries) {
            let known = kinds::known().join(", ");
            self.fault(
                format!("`{head}` is not a kind of rule file"),
                format!("file: KIND {EDITION}, where KIND is one of {known}"),
            );
        }
    }

    fn caution(&mut self) {
        let form = "--- on the first line, then id, title, applies, source, basis, confidence, then --- and the text";
        let Some((head, body)) = front_matter(&self.file.text) else {
            return self.fault("no front matter", form);
        };
        match serde_yaml::from_str::<Value>(head) {
            Ok(value) => kinds::caution(self, &value, body),
            Err(e) => self.fault(format!("front matter is not readable: {e}"), form),
        }
    }
}

const YAML_FORM: &str = "file: KIND 1, then entries: and a list";

fn is_markdown(path: &str) -> bool {
    path.rsplit('.').next() == Some("md")
}

/// The text between the first two lines of dashes, and what follows.
fn front_matter(text: &str) -> Option<(&str, &str)> {
    let rest = text.strip_prefix("---\n")?;
    let (head, body) = rest.split_once("\n---\n")?;
    Some((head, body.trim()))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::assets::builtin_rules;

    fn built_in() -> Rulebook {
        rulebook(&[builtin_rules()]).unwrap_or_else(|faults| {
            let lines: Vec<String> = faults.iter().map(ToString::to_string).collect();
            panic!("{}", lines.join("\n"))
        })
    }

    #[test]
    fn the_built_in_rules_read_without_a_fault() {
        let book = built_in();
        assert!(book.suitability.len() > 50);
    }
}
