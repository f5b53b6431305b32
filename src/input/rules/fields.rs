//! One entry of a rule file, field by field. Every field that is missing or wrong is a fault and
//! reading goes on; fields nobody asked for are faults too.

mod quantities;

use super::condition;
use super::fault::Faults;
use super::probe::{Probe, Shape};
use crate::model::rulebook::{Basis, Clause, Confidence, Provenance};
use crate::model::word::{Word, known};
use serde_yaml::{Mapping, Value};
use std::cell::RefCell;

/// The fields of an entry, or of a block inside one.
pub(super) struct Fields<'a> {
    map: &'a Mapping,
    faults: &'a Faults,
    file: &'a str,
    id: String,
    /// Where the block stands in the entry, empty at the top.
    block: String,
    asked: RefCell<Vec<&'static str>>,
    /// Who is told which keys are asked for, where the reader is run to learn that.
    probe: Option<&'a Probe>,
}

impl<'a> Fields<'a> {
    /// The fields of an entry; its id is read first, so that faults can name it.
    pub(super) fn of(
        value: &'a Value,
        file: &'a str,
        faults: &'a Faults,
        probe: Option<&'a Probe>,
    ) -> Option<Self> {
        let Some(map) = value.as_mapping() else {
            faults.add(file, None, "an entry without keys", "id: NAME and its keys");
            return None;
        };
        let id = map.get("id").and_then(Value::as_str).unwrap_or_default();
        Some(Self {
            map,
            faults,
            file,
            id: id.to_owned(),
            block: String::new(),
            asked: RefCell::default(),
            probe,
        })
    }

    /// Adds a fault of this entry.
    pub(super) fn fault(&self, what: impl Into<String>, write: impl Into<String>) {
        let id = (!self.id.is_empty()).then_some(self.id.as_str());
        self.faults.add(self.file, id, what, write);
    }

    /// The file it stands in.
    pub(super) fn file(&self) -> &str {
        self.file
    }

    fn path(&self, key: &str) -> String {
        if self.block.is_empty() {
            key.to_owned()
        } else {
            format!("{}, {key}", self.block)
        }
    }

    fn take(&self, key: &'static str) -> Option<&'a Value> {
        let mut asked = self.asked.borrow_mut();
        if !asked.contains(&key) {
            asked.push(key);
        }
        self.map.get(key).filter(|v| !v.is_null())
    }

    /// Tells the probe what a key is read as.
    fn told(&self, key: &str, shape: impl FnOnce() -> Shape) {
        if let Some(probe) = self.probe {
            probe.shape(&self.block, key, shape());
        }
    }

    fn missing(&self, key: &str, example: &str) {
        if let Some(probe) = self.probe {
            probe.must(&self.block, key);
        }
        let key = self.path(key);
        self.fault(format!("no `{key}`"), format!("{key}: {example}"));
    }

    fn wrong(&self, key: &str, value: &str, why: &str, example: &str) {
        let key = self.path(key);
        self.fault(
            format!("{key}: `{value}`: {why}"),
            format!("{key}: {example}"),
        );
    }

    /// A scalar as text; a bare number is refused, because `000` would arrive as 0.
    fn scalar(&self, key: &str, value: &'a Value) -> Option<&'a str> {
        match value {
            Value::String(text) => Some(text),
            Value::Number(n) => {
                self.wrong(key, &n.to_string(), "a text is wanted", &format!("\"{n}\""));
                None
            }
            Value::Bool(b) => {
                self.wrong(key, &b.to_string(), "a text is wanted", &format!("\"{b}\""));
                None
            }
            _ => {
                self.wrong(
                    key,
                    "a list or block",
                    "a text is wanted",
                    "one line of text",
                );
                None
            }
        }
    }

    fn scalars(&self, key: &'static str) -> Vec<&'a str> {
        match self.take(key) {
            None => Vec::new(),
            Some(Value::Sequence(list)) => {
                list.iter().filter_map(|v| self.scalar(key, v)).collect()
            }
            Some(one) => self.scalar(key, one).into_iter().collect(),
        }
    }

    /// A text that must be there.
    pub(super) fn text(&self, key: &'static str) -> String {
        self.opt_text(key).unwrap_or_else(|| {
            self.missing(key, "TEXT");
            String::new()
        })
    }

    /// A text that may be there.
    pub(super) fn opt_text(&self, key: &'static str) -> Option<String> {
        self.told(key, || Shape::Text);
        let text = self.scalar(key, self.take(key)?)?.trim();
        (!text.is_empty()).then(|| text.to_owned())
    }

    /// Texts, one or a list of them.
    pub(super) fn texts(&self, key: &'static str) -> Vec<String> {
        self.told(key, || Shape::Texts);
        self.scalars(key).into_iter().map(str::to_owned).collect()
    }

    fn read_word<W: Word>(&self, key: &str, text: &str) -> Option<W> {
        let word = W::from_word(text);
        if word.is_none() {
            let words = known::<W>().join(", ");
            self.wrong(
                key,
                text,
                &format!("{} is wanted", W::NOUN),
                &format!("one of {words}"),
            );
        }
        word
    }

    /// A word of a closed list that may be there.
    pub(super) fn opt_word<W: Word>(&self, key: &'static str) -> Option<W> {
        self.told(key, || Shape::Word(known::<W>()));
        self.read_word(key, self.scalar(key, self.take(key)?)?)
    }

    /// A word of a closed list that must be there; the first of the list after a fault.
    pub(super) fn word<W: Word>(&self, key: &'static str) -> W {
        if self.take(key).is_none() {
            self.missing(key, &known::<W>().join(" or "));
        }
        self.opt_word(key).unwrap_or(W::ALL[0])
    }

    /// Words of a closed list.
    pub(super) fn words<W: Word>(&self, key: &'static str) -> Vec<W> {
        self.told(key, || Shape::Words(known::<W>()));
        self.scalars(key)
            .into_iter()
            .filter_map(|text| self.read_word(key, text))
            .collect()
    }

    /// Yes or no; no where it is not there.
    pub(super) fn flag(&self, key: &'static str) -> bool {
        self.told(key, || Shape::Flag);
        match self.take(key) {
            Some(Value::Bool(b)) => *b,
            Some(_) => {
                self.opt_word::<crate::model::facts::YesNo>(key)
                    == Some(crate::model::facts::YesNo::Yes)
            }
            None => false,
        }
    }

    fn read_count(&self, key: &str, value: &Value) -> Option<u32> {
        let count = value.as_u64().and_then(|n| u32::try_from(n).ok());
        if count.is_none() {
            let text = value.as_str().unwrap_or("this");
            self.wrong(key, text, "a whole number is wanted", "46");
        }
        count
    }

    /// A whole number that may be there.
    pub(super) fn opt_count(&self, key: &'static str) -> Option<u32> {
        self.told(key, || Shape::Count);
        self.read_count(key, self.take(key)?)
    }

    /// A whole number that must be there; 1 after a fault.
    pub(super) fn count(&self, key: &'static str) -> u32 {
        if self.take(key).is_none() {
            self.missing(key, "46");
        }
        self.opt_count(key).unwrap_or(1)
    }

    /// Whole numbers.
    pub(super) fn counts(&self, key: &'static str) -> Vec<u32> {
        self.told(key, || Shape::Counts);
        match self.take(key) {
            None => Vec::new(),
            Some(Value::Sequence(list)) => list
                .iter()
                .filter_map(|v| self.read_count(key, v))
                .collect(),
            Some(one) => self.read_count(key, one).into_iter().collect(),
        }
    }

    /// Conditions, all of which must hold.
    pub(super) fn clauses(&self, key: &'static str) -> Vec<Clause> {
        self.told(key, || Shape::Texts);
        self.scalars(key)
            .into_iter()
            .filter_map(|text| match condition::clause(text) {
                Ok(clause) => Some(clause),
                Err(bad) => {
                    self.wrong(key, text, &bad.what, &bad.write);
                    None
                }
            })
            .collect()
    }

    /// A block of names and texts, in the order written.
    pub(super) fn pairs(&self, key: &'static str) -> Vec<(String, String)> {
        self.told(key, || Shape::Pairs);
        let Some(value) = self.take(key) else {
            return Vec::new();
        };
        let Some(map) = value.as_mapping() else {
            self.wrong(
                key,
                "this",
                "a block of names and values is wanted",
                "{ NAME: VALUE }",
            );
            return Vec::new();
        };
        map.iter()
            .filter_map(|(k, v)| Some((self.scalar(key, k)?, self.scalar(key, v)?)))
            .map(|(k, v)| (k.to_owned(), v.to_owned()))
            .collect()
    }

    /// A block of names and words of a closed list.
    pub(super) fn word_pairs<W: Word>(&self, key: &'static str) -> Vec<(String, W)> {
        self.pairs(key)
            .into_iter()
            .filter_map(|(name, text)| Some((name, self.read_word(key, &text)?)))
            .collect()
    }

    /// A list of blocks.
    pub(super) fn children(&self, key: &'static str) -> Vec<Self> {
        if let Some(probe) = self.probe {
            self.told(key, || Shape::Blocks);
            return probe
                .empty()
                .into_iter()
                .map(|map| self.inner(key, map))
                .collect();
        }
        let list: Vec<&Value> = match self.take(key) {
            None => Vec::new(),
            Some(Value::Sequence(list)) => list.iter().collect(),
            Some(one) => vec![one],
        };
        list.into_iter()
            .filter_map(|value| {
                let map = value.as_mapping();
                if map.is_none() {
                    self.wrong(key, "this", "a block of keys is wanted", "{ KEY: VALUE }");
                }
                Some(self.inner(key, map?))
            })
            .collect()
    }

    /// A block, where it is one; `None` for anything else.
    pub(super) fn child(&self, key: &'static str) -> Option<Self> {
        if let Some(probe) = self.probe {
            self.told(key, || Shape::Blocks);
            return probe.empty().map(|map| self.inner(key, map));
        }
        let map = self.take(key)?.as_mapping()?;
        Some(self.inner(key, map))
    }

    fn inner(&self, key: &str, map: &'a Mapping) -> Self {
        Self {
            map,
            faults: self.faults,
            file: self.file,
            id: self.id.clone(),
            block: self.path(key),
            asked: RefCell::default(),
            probe: self.probe,
        }
    }

    /// Source, basis and confidence, which every entry must state.
    pub(super) fn provenance(&self) -> Provenance {
        let source = self.texts("source");
        if source.is_empty() {
            self.missing("source", "the standard, book or practice it comes from");
        }
        Provenance {
            source,
            basis: self.word::<Basis>("basis"),
            confidence: self.word::<Confidence>("confidence"),
            note: self.opt_text("note"),
            file: self.file.to_owned(),
        }
    }

    /// Says which keys nobody asked for.
    pub(super) fn finish(&self) {
        let asked = self.asked.borrow();
        for key in self.map.keys() {
            let key = key.as_str().unwrap_or("a key that is not text");
            if !asked.contains(&key) && !key.starts_with("x-") {
                let known: &[&str] = &asked;
                self.fault(
                    format!("unknown key `{}`", self.path(key)),
                    format!("one of {}", known.join(", ")),
                );
            }
        }
    }
}
