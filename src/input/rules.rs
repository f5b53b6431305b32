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
mod probe;
pub mod schema;

pub use condition::clause;
pub use fault::RuleFault;

use crate::assets::{Layer, TextFile};
use crate::model::rulebook::{Rulebook, Serving};
use fault::Faults;
use rayon::iter::{IntoParallelRefIterator, ParallelIterator};
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
        // reading YAML is most of the work, and no file depends on another
        let read: Vec<Read<'_>> = layer.files.par_iter().map(read).collect();
        for (file, read) in layer.files.iter().zip(read) {
            let mut filling = Filling {
                book: &mut book,
                seen: &mut seen,
                faults: &faults,
                file,
                probe: None,
            };
            filling.file(&read);
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

/// A file as far as it can be read without the others.
enum Read<'f> {
    /// A YAML file.
    Yaml(Value),
    /// The front matter and the text of a Markdown file.
    Markdown(Value, &'f str),
    /// Neither: what is wrong and what to write.
    Faulty(String, &'static str),
}

fn read(file: &TextFile) -> Read<'_> {
    let (text, body) = if is_markdown(&file.path) {
        match front_matter(&file.text) {
            Some((head, body)) => (head, Some(body)),
            None => return Read::Faulty("no front matter".into(), MARKDOWN_FORM),
        }
    } else {
        (file.text.as_str(), None)
    };
    match (serde_yaml::from_str(text), body) {
        (Ok(value), None) => Read::Yaml(value),
        (Ok(value), Some(body)) => Read::Markdown(value, body),
        (Err(e), None) => Read::Faulty(format!("not readable as YAML: {e}"), YAML_FORM),
        (Err(e), Some(_)) => {
            Read::Faulty(format!("front matter is not readable: {e}"), MARKDOWN_FORM)
        }
    }
}

/// One file being read into the rulebook.
struct Filling<'a> {
    book: &'a mut Rulebook,
    /// Kind and id of every entry of this layer so far.
    seen: &'a mut BTreeSet<(&'static str, String)>,
    faults: &'a Faults,
    file: &'a TextFile,
    /// Who is told which keys are asked for; none when files are read.
    probe: Option<&'a probe::Probe>,
}

impl Filling<'_> {
    fn file(&mut self, read: &Read<'_>) {
        match read {
            Read::Yaml(value) => self.yaml(value),
            Read::Markdown(head, body) => kinds::caution(self, head, body),
            Read::Faulty(what, write) => self.fault(what, *write),
        }
    }

    fn fault(&self, what: impl Into<String>, write: impl Into<String>) {
        self.faults.add(&self.file.path, None, what, write);
    }

    fn yaml(&mut self, value: &Value) {
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
}

const MARKDOWN_FORM: &str = "--- on the first line, then id, title, kind, applies, source, basis, \
    confidence, then --- and the text";
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
