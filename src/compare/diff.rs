//! The inputs that differ between two trees, each with the way to it, and trees with some of the
//! differences put in.

use crate::input::keys::{TOGETHER, spelt};
use crate::source::yaml::{Entry, Node, NodeKind};
use crate::source::{SourceSet, Span};

/// One step of the way to a value.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Way {
    /// A key, spelt with spaces.
    Key(String),
    /// A place in a list, from 0.
    Item(usize),
}

/// Which file a change stands in.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum File {
    /// The site file.
    Site,
    /// The oils.
    Oils,
    /// Own rules, as a whole.
    Rules,
    /// An option of the run: the reserve.
    Option,
    /// An option of the run: whether oils are judged as new.
    As,
}

/// One place at which the two states differ.
#[derive(Clone, Debug, PartialEq)]
struct Edit {
    way: Vec<Way>,
    /// What stands there in the new state, with its key in a record; none where it was taken out.
    new: Option<Entry>,
}

/// One input that differs: what is told and changed as one.
#[derive(Clone, Debug, PartialEq)]
pub struct Change {
    /// Its file.
    pub file: File,
    /// The input in words: `M01: sump rise`.
    pub input: String,
    /// As written before; none where it was not there.
    pub was: Option<String>,
    /// As written now; none where it is not there any more.
    pub is: Option<String>,
    /// Where it stands now, or stood before.
    pub span: Option<Span>,
    edits: Vec<Edit>,
}

impl Change {
    /// A change of the rules or of an option, which stands in no tree.
    pub fn whole(file: File, input: &str, was: Option<String>, is: Option<String>) -> Self {
        Self {
            file,
            input: input.to_owned(),
            was,
            is,
            span: None,
            edits: Vec::new(),
        }
    }

    /// `31 K -> 25 K`, `added: 25 K`, `taken out`.
    pub fn says(&self) -> String {
        match (&self.was, &self.is) {
            (Some(was), Some(is)) => format!("{was} -> {is}"),
            (None, Some(is)) if is.is_empty() => "added".to_owned(),
            (None, Some(is)) => format!("added: {is}"),
            (Some(was), None) if was.is_empty() => "taken out".to_owned(),
            (Some(was), None) => format!("taken out (was {was})"),
            (None, None) => "changed".to_owned(),
        }
    }
}

/// The differences of two trees of one file.
pub fn differences(set: &SourceSet, file: File, old: &Node, new: &Node) -> Vec<Change> {
    let mut walk = Walk {
        set,
        file,
        way: Vec::new(),
        found: Vec::new(),
    };
    walk.node(old, new, None);
    together(walk.found)
}

struct Walk<'s> {
    set: &'s SourceSet,
    file: File,
    way: Vec<Way>,
    found: Vec<Change>,
}

impl Walk<'_> {
    fn node(&mut self, old: &Node, new: &Node, entry: Option<&Entry>) {
        match (&old.kind, &new.kind) {
            (NodeKind::Map(a), NodeKind::Map(b)) => self.maps(a, b),
            (NodeKind::Seq(a), NodeKind::Seq(b)) if records(a, b) => {
                for (i, (a, b)) in a.iter().zip(b).enumerate() {
                    self.way.push(Way::Item(i));
                    self.node(a, b, None);
                    self.way.pop();
                }
            }
            _ if same(old, new) => {}
            _ => {
                let was = Some(self.written(old));
                let is = Some(self.written(new));
                let entry = entry.cloned().unwrap_or_else(|| bare(new));
                self.change(was, is, new.span, Some(entry));
            }
        }
    }

    fn maps(&mut self, old: &[Entry], new: &[Entry]) {
        for a in old {
            let key = spelt(&a.key.text);
            self.way.push(Way::Key(key.clone()));
            match new.iter().find(|b| spelt(&b.key.text) == key) {
                Some(b) => self.node(&a.value, &b.value, Some(b)),
                None => {
                    let was = Some(self.written(&a.value));
                    self.change(was, None, a.key.span, None);
                }
            }
            self.way.pop();
        }
        for b in new {
            let key = spelt(&b.key.text);
            if old.iter().any(|a| spelt(&a.key.text) == key) {
                continue;
            }
            self.way.push(Way::Key(key));
            let is = Some(self.written(&b.value));
            self.change(None, is, b.key.span, Some(b.clone()));
            self.way.pop();
        }
    }

    fn change(&mut self, was: Option<String>, is: Option<String>, at: Span, new: Option<Entry>) {
        self.found.push(Change {
            file: self.file,
            input: in_words(self.file, &self.way),
            was,
            is,
            span: Some(at),
            edits: vec![Edit {
                way: self.way.clone(),
                new,
            }],
        });
    }

    /// A value as written where it is short; nothing of a record.
    fn written(&self, node: &Node) -> String {
        match &node.kind {
            NodeKind::Scalar(s) => s.text.clone(),
            NodeKind::Seq(items) if items.iter().all(|i| i.text().is_some()) => {
                let items: Vec<&str> = items.iter().filter_map(Node::text).collect();
                format!("[{}]", items.join(", "))
            }
            NodeKind::Map(_) if self.set.slice(node.span).starts_with('{') => {
                self.set.slice(node.span).to_owned()
            }
            _ => String::new(),
        }
    }
}

/// Lists of records of one length are compared record by record.
fn records(a: &[Node], b: &[Node]) -> bool {
    let record = |n: &Node| n.entries().is_some();
    a.len() == b.len() && a.iter().chain(b).all(record)
}

/// Whether two values say the same, wherever they stand.
fn same(a: &Node, b: &Node) -> bool {
    match (&a.kind, &b.kind) {
        (NodeKind::Scalar(a), NodeKind::Scalar(b)) => a.text == b.text,
        (NodeKind::Seq(a), NodeKind::Seq(b)) => {
            a.len() == b.len() && a.iter().zip(b).all(|(a, b)| same(a, b))
        }
        (NodeKind::Map(a), NodeKind::Map(b)) => {
            let found = |e: &Entry| {
                let key = spelt(&e.key.text);
                b.iter()
                    .any(|o| spelt(&o.key.text) == key && same(&e.value, &o.value))
            };
            a.len() == b.len() && a.iter().all(found)
        }
        _ => false,
    }
}

/// A value of a list as an entry without a key.
fn bare(node: &Node) -> Entry {
    Entry {
        key: crate::source::yaml::Key {
            text: String::new(),
            span: node.span,
        },
        value: node.clone(),
    }
}

/// `M01: sump rise`, `area yard: ambient`, `oil O-12: viscosity`, `M01, part 2: speed`.
fn in_words(file: File, way: &[Way]) -> String {
    let mut words: Vec<String> = Vec::new();
    let mut rest = way;
    match (file, way) {
        (File::Oils, [Way::Key(id), more @ ..]) => {
            words.push(format!("oil {id}"));
            rest = more;
        }
        (File::Site, [Way::Key(top), Way::Key(name), more @ ..]) if top == "machines" => {
            words.push(name.clone());
            rest = more;
        }
        (File::Site, [Way::Key(top), Way::Key(name), more @ ..]) if top == "areas" => {
            words.push(format!("area {name}"));
            rest = more;
        }
        _ => {}
    }
    let mut list = "item";
    for step in rest {
        match step {
            Way::Key(key) if key == "parts" || key == "points" => {
                if key == "parts" {
                    list = "part";
                }
            }
            Way::Key(key) => words.push(key.clone()),
            Way::Item(i) => words.push(format!("{list} {}", i + 1)),
        }
    }
    match words.split_last() {
        Some((last, [])) => last.clone(),
        Some((last, before)) => format!("{}: {last}", before.join(", ")),
        None => "the file".to_owned(),
    }
}

/// Puts changes of keys that state one thing together.
fn together(found: Vec<Change>) -> Vec<Change> {
    let mut kept: Vec<Change> = Vec::new();
    for change in found {
        let joined = kept.iter_mut().find(|k| belongs(k, &change));
        match joined {
            Some(first) => join(first, change),
            None => kept.push(change),
        }
    }
    kept
}

fn belongs(a: &Change, b: &Change) -> bool {
    let (Some((Way::Key(x), before)), Some((Way::Key(y), other))) = (last(a), last(b)) else {
        return false;
    };
    before == other
        && TOGETHER
            .iter()
            .any(|g| g.contains(&x.as_str()) && g.contains(&y.as_str()))
}

fn last(change: &Change) -> Option<(&Way, &[Way])> {
    change.edits.first()?.way.split_last()
}

fn join(first: &mut Change, second: Change) {
    let key = match last(&second) {
        Some((Way::Key(key), _)) => key.clone(),
        _ => String::new(),
    };
    let with = |mine: Option<String>, theirs: Option<String>| match (mine, theirs) {
        (Some(a), Some(b)) => Some(format!("{a}, {key} {b}")),
        (None, Some(b)) => Some(format!("{key} {b}")),
        (mine, None) => mine,
    };
    first.was = with(first.was.take(), second.was);
    first.is = with(first.is.take(), second.is);
    first.edits.extend(second.edits);
}

/// A tree with some changes put in.
pub fn with(root: &Node, file: File, changes: &[&Change]) -> Node {
    let mut root = root.clone();
    // what is taken out of a list of records shifts nothing: lists change as a whole or in place
    for change in changes.iter().filter(|c| c.file == file) {
        for edit in &change.edits {
            put(&mut root, &edit.way, edit.new.as_ref());
        }
    }
    root
}

fn put(node: &mut Node, way: &[Way], new: Option<&Entry>) {
    let Some((step, rest)) = way.split_first() else {
        if let Some(new) = new {
            *node = new.value.clone();
        }
        return;
    };
    match (step, &mut node.kind) {
        (Way::Item(i), NodeKind::Seq(items)) => {
            if let Some(item) = items.get_mut(*i) {
                put(item, rest, new);
            }
        }
        (Way::Key(key), NodeKind::Map(entries)) => {
            let place = entries.iter().position(|e| spelt(&e.key.text) == *key);
            match (place, rest.is_empty(), new) {
                (Some(place), false, _) => put(&mut entries[place].value, rest, new),
                (Some(place), true, Some(new)) => entries[place] = new.clone(),
                (Some(place), true, None) => {
                    entries.remove(place);
                }
                (None, true, Some(new)) => entries.push(new.clone()),
                _ => {}
            }
        }
        _ => {}
    }
}
