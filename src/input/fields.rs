//! The keys of one record, read through the table of keys.

mod bounds;
mod misplaced;
pub mod quantities;
pub mod words;

use super::keys::{Form, Key, Record, example, is_private, spelt};
use super::reader::{Reader, as_plain};
use super::value::Clauses;
use crate::model::machine::InputLine;
use crate::problem::{Code, Write};
use crate::source::place::Whose;
use crate::source::yaml::{self, Entry, Node, NodeKind};
use crate::source::{Origin, Place, SourceSet, Span};
use std::collections::BTreeMap;
use std::rc::Rc;

/// A value under a key.
#[derive(Clone, Debug)]
pub struct Slot<'t> {
    /// The key of the table.
    pub key: &'static Key,
    /// The key as written.
    pub name: &'t yaml::Key,
    /// The value.
    pub node: &'t Node,
    /// What it was inherited from: `area yard`, `like CV-104`.
    pub inherited: Option<Rc<str>>,
    /// The machine, part or oil it was written in.
    pub within: Rc<str>,
    /// What the record says its figures were taken from.
    pub source: Option<Rc<str>>,
}

/// The values of one record, by key.
#[derive(Clone, Debug)]
pub struct Fields<'t> {
    slots: BTreeMap<&'static str, Slot<'t>>,
    /// Keys that are there, though nothing could be read behind them.
    unread: Vec<&'static str>,
    /// Which record it is.
    pub record: &'static Record,
    /// Where it stands.
    pub span: Span,
    /// The machine, part or oil it is.
    pub within: Rc<str>,
    /// Whether it is no record at all; reported, and nothing is missing in it.
    pub broken: bool,
}

impl<'t> Fields<'t> {
    /// A record without any key.
    pub fn empty(record: &'static Record, span: Span, within: &str) -> Self {
        Self {
            slots: BTreeMap::new(),
            unread: Vec::new(),
            record,
            span,
            within: within.into(),
            broken: false,
        }
    }

    /// Reads the keys of a record; keys that are none are reported.
    pub fn read(
        reader: &mut Reader<'_>,
        node: &'t Node,
        record: &'static Record,
        within: &str,
    ) -> Self {
        let mut fields = Self::empty(record, node.span, within);
        match &node.kind {
            NodeKind::Map(entries) => {
                for entry in entries {
                    fields.take(reader, entry);
                }
                fields.name_the_source();
            }
            NodeKind::Refused => fields.broken = true,
            _ if node.is_blank() => {}
            _ => {
                fields.broken = true;
                record_wanted(reader, node, record, within);
            }
        }
        fields
    }

    /// Tells every value what the record says its figures were taken from.
    fn name_the_source(&mut self) {
        let source = self.slots.get("source").and_then(|s| s.node.text());
        let Some(source) = source.map(Rc::<str>::from) else {
            return;
        };
        for slot in self.slots.values_mut() {
            slot.source = Some(source.clone());
        }
    }

    /// Takes one entry in.
    pub fn take(&mut self, reader: &mut Reader<'_>, entry: &'t Entry) {
        let written = entry.key.text.as_str();
        if is_private(written) {
            return;
        }
        let Some(key) = self.record.key(written) else {
            misplaced::report(reader, self, entry);
            return;
        };
        if let Some(first) = self.slots.get(key.name) {
            let first = first.name.span;
            key_twice(reader, first, entry, &self.within);
            return;
        }
        if entry.value.is_blank() {
            value_missing(reader, key, entry, &self.within);
            self.unread.push(key.name);
            return;
        }
        if matches!(entry.value.kind, NodeKind::Refused) {
            self.unread.push(key.name);
            return;
        }
        self.slots.insert(
            key.name,
            Slot {
                key,
                name: &entry.key,
                node: &entry.value,
                inherited: None,
                within: self.within.clone(),
                source: None,
            },
        );
    }

    /// The value of a key.
    pub fn get(&self, name: &str) -> Option<&Slot<'t>> {
        debug_assert!(
            self.record.key(name).is_some(),
            "{name} is no key of {}",
            self.record.name
        );
        self.slots.get(name)
    }

    /// Whether a key is stated.
    pub fn has(&self, name: &str) -> bool {
        self.get(name).is_some()
    }

    /// Whether a key is nowhere to be seen, not even with something that cannot be read.
    pub fn lacks(&self, name: &str) -> bool {
        !self.broken && !self.has(name) && !self.unread.contains(&name)
    }

    /// Drops a key.
    pub fn remove(&mut self, name: &str) -> Option<Slot<'t>> {
        self.slots.remove(name)
    }

    /// Puts a value in, whatever was there.
    pub fn put(&mut self, slot: Slot<'t>) {
        self.slots.insert(slot.key.name, slot);
    }

    /// Changes every value's slot.
    pub fn for_each(&mut self, change: impl FnMut(&mut Slot<'t>)) {
        self.slots.values_mut().for_each(change);
    }

    /// Every value, in the order of the files.
    pub fn in_file_order(&self) -> Vec<&Slot<'t>> {
        let mut all: Vec<&Slot<'t>> = self.slots.values().collect();
        all.sort_by_key(|s| s.name.span);
        all
    }

    /// Fills what is not stated here from a record below; values keep where they come from.
    pub fn inherit(&mut self, below: &Self, from: &str, except: &[&str]) {
        for (name, slot) in &below.slots {
            if except.contains(name) || self.slots.contains_key(name) {
                continue;
            }
            let mut slot = slot.clone();
            slot.inherited = Some(match &slot.inherited {
                Some(earlier) => format!("{from}, {earlier}").into(),
                None => from.into(),
            });
            self.slots.insert(name, slot);
        }
    }

    /// Reports the keys that must be there and are not.
    pub fn must(&self, reader: &mut Reader<'_>, node: &Node) {
        for name in self.record.must {
            // What a file is, is asked when it is taken in.
            let asked = *name != "file" && self.lacks(name);
            let Some(key) = self.record.key(name).filter(|_| asked) else {
                continue;
            };
            let message = format!("no `{name}` in {}", self.record.name);
            let mut problem = reader.at(
                Code::KeyMissing,
                message,
                first_line(reader, node),
                &self.within,
            );
            problem = problem.why("nothing can stand in for it");
            problem.write.push(added(reader, node, key));
            reader.report(problem);
        }
    }
}

impl Fields<'_> {
    /// Where the record stands.
    pub fn origin(&self) -> Origin {
        Origin {
            whose: Whose::NotStated,
            dated: None,
            note: None,
            place: Place::Text(self.span),
            inherited: None,
        }
    }
}

impl Slot<'_> {
    /// The value as written, for the table of inputs.
    pub fn input_line(&self, set: &SourceSet, about: Option<&str>) -> InputLine {
        let (written, clauses) = match (self.node.text(), self.node.items()) {
            (Some(text), _) => words::parted(text),
            (None, Some(items)) => {
                let texts: Vec<&str> = items.iter().filter_map(Node::text).collect();
                (texts.join(", "), Clauses::default())
            }
            // Records in brackets, as the sizes of a bearing.
            (None, None) => (set.slice(self.node.span).to_owned(), Clauses::default()),
        };
        InputLine {
            key: self.key.name.to_owned(),
            about: about.map(str::to_owned),
            written,
            origin: self.origin(&clauses),
        }
    }

    /// Where the value comes from, without clauses.
    pub fn bare_origin(&self) -> Origin {
        Origin {
            whose: Whose::NotStated,
            dated: None,
            note: self.source.as_deref().map(str::to_owned),
            place: Place::Text(self.node.span),
            inherited: self.inherited.as_deref().map(str::to_owned),
        }
    }
}

/// The beginning of a record, as far as its first line goes.
pub(in crate::input) fn first_line(reader: &Reader<'_>, node: &Node) -> Span {
    let text = reader.source(node);
    let start = node.span.start as usize;
    let line = text
        .get(start..)
        .and_then(|t| t.lines().next())
        .unwrap_or("");
    let end = node
        .span
        .end
        .min(node.span.start + u32::try_from(line.trim_end().len()).unwrap_or(0));
    Span {
        end: end.max(node.span.start),
        ..node.span
    }
}

/// A key added at the beginning of a record.
fn added(reader: &Reader<'_>, node: &Node, key: &Key) -> Write {
    let at = Span {
        end: node.span.start,
        ..node.span
    };
    let line = format!("{}: {}", key.name, example(key));
    let text = reader.source(node);
    let start = node.span.start as usize;
    if text.get(start..).is_some_and(|t| t.starts_with('{')) {
        let behind = Span {
            start: at.start + 1,
            end: at.start + 1,
            ..at
        };
        return Write::edit(behind, format!(" {line},"));
    }
    let column = text[..start].rsplit('\n').next().map_or(0, str::len);
    let indent = " ".repeat(column);
    Write::edit(at, format!("{line}\n{indent}")).said(line)
}

fn record_wanted(reader: &mut Reader<'_>, node: &Node, record: &'static Record, within: &str) {
    let message = format!("{} is a record of keys", record.name);
    let what = match node.items() {
        Some(_) => "a list found",
        None => "one value found",
    };
    let mut problem = reader.at(
        Code::RecordWanted,
        format!("{what}, {message}"),
        node.span,
        within,
    );
    let first = record.all().next().map_or("name", |k| k.name);
    if let Some(text) = node.text() {
        let value = as_plain(text, true);
        problem = problem.write(Write::edit(node.span, format!("{{ {first}: {value} }}")));
    } else {
        problem = problem
            .write(Write::edit(node.span, "{ }").remark(format!("with keys, as {first}: …")));
    }
    reader.report(problem);
}

fn key_twice(reader: &mut Reader<'_>, first: Span, entry: &Entry, within: &str) {
    let name = spelt(&entry.key.text);
    let mut problem = reader
        .at(
            Code::KeyTwice,
            format!("key \"{name}\" stands twice"),
            first,
            within,
        )
        .related(Place::Text(entry.key.span), "")
        .why("nobody could tell which of the two counts");
    let private = format!("x-{}", entry.key.text);
    problem = problem.write(
        Write::edit(entry.key.span, private).remark("keeps the second as a remark; or delete one"),
    );
    reader.report(problem);
}

fn value_missing(reader: &mut Reader<'_>, key: &'static Key, entry: &Entry, within: &str) {
    let span = Span {
        start: entry.key.span.start,
        ..entry.value.span
    };
    let message = format!("no value behind `{}`", key.name);
    let mut problem = reader.at(Code::ValueMissing, message, span, within);
    let bracketed = matches!(&entry.value.kind, NodeKind::Scalar(s) if s.in_brackets);
    let behind = |text: &str| {
        if bracketed && reader.set.slice(span).trim_end().ends_with(':') {
            format!(" {}", as_plain(text, true))
        } else if bracketed {
            format!(": {}", as_plain(text, true))
        } else {
            format!(" {}", as_plain(text, false))
        }
    };
    let unknown = matches!(key.form, Form::Quantity(want) if want.unknown);
    if unknown {
        problem = problem.write(Write::edit(entry.value.span, behind("unknown")));
    }
    if matches!(key.form, Form::Quantity(_)) {
        let example = behind(&example(key));
        problem =
            problem.write(Write::edit(entry.value.span, example).remark("with the right figure"));
    } else if bracketed {
        let example = format!(": {}", example(key));
        problem =
            problem.write(Write::edit(entry.value.span, example).remark("with the right value"));
    } else {
        let before = Span {
            end: span.start,
            ..span
        };
        problem = problem.write(Write::edit(before, "# ").remark("until it is known"));
    }
    reader.report(problem);
}
