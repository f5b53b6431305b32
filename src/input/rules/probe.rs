//! Learns which keys the reader of a kind of rule file asks for, by running it on an entry without
//! any: what editors are told is what the reader does, and no second list can differ from it.

use super::fault::Faults;
use super::{Filling, kinds};
use crate::assets::TextFile;
use crate::model::rulebook::Rulebook;
use crate::quantity::Kind;
use serde_yaml::{Mapping, Value};
use std::cell::RefCell;
use std::collections::{BTreeMap, BTreeSet};

/// What a key is read as.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) enum Shape {
    /// A text.
    Text,
    /// A text, or a list of them.
    Texts,
    /// A word of a list.
    Word(Vec<&'static str>),
    /// Words of a list.
    Words(Vec<&'static str>),
    /// Yes or no.
    Flag,
    /// A whole number.
    Count,
    /// Whole numbers.
    Counts,
    /// Names with a text each.
    Pairs,
    /// A quantity.
    Quantity(Kind),
    /// A quantity, or a list of them.
    Quantities(Kind),
    /// A range of one.
    Range(Kind),
    /// A block of keys, or a list of them.
    Blocks,
}

/// One key of a kind of entry.
#[derive(Clone, Debug, Default)]
pub(super) struct Asked {
    /// What it may be read as.
    pub(super) shapes: Vec<Shape>,
    /// Whether it must be there.
    pub(super) must: bool,
}

/// Keys by the block they stand in; the entry itself is the block without a name.
pub(super) type Keys = BTreeMap<String, BTreeMap<String, Asked>>;

/// What the reader is told to.
#[derive(Debug, Default)]
pub(super) struct Probe {
    keys: RefCell<Keys>,
    block: Option<Mapping>,
}

impl Probe {
    /// The block that stands in for any other, where blocks are looked into.
    pub(super) fn empty(&self) -> Option<&Mapping> {
        self.block.as_ref()
    }

    /// A key is read as this.
    pub(super) fn shape(&self, block: &str, key: &str, shape: Shape) {
        self.with(block, key, |asked| {
            if !asked.shapes.contains(&shape) {
                asked.shapes.push(shape);
            }
        });
    }

    /// A key must be there.
    pub(super) fn must(&self, block: &str, key: &str) {
        self.with(block, key, |asked| asked.must = true);
    }

    fn with(&self, block: &str, key: &str, change: impl FnOnce(&mut Asked)) {
        let mut keys = self.keys.borrow_mut();
        let block = keys.entry(block.to_owned()).or_default();
        change(block.entry(key.to_owned()).or_default());
    }
}

/// Words that lead the reader of a kind down another way, with the key they are written under.
const WAYS: &[(&str, &str, &[&str])] = &[(
    "life",
    "form",
    &[
        "halving",
        "arrhenius",
        "multiplier",
        "gear drain",
        "calendar",
    ],
)];

/// The keys of a kind of rule file. Keys that only some of its ways ask for are never a must.
pub(super) fn keys(kind: &'static str) -> Keys {
    let ways: Vec<Mapping> = WAYS
        .iter()
        .filter(|(k, ..)| *k == kind)
        .flat_map(entries)
        .collect();
    let ways = if ways.is_empty() {
        vec![Mapping::new()]
    } else {
        ways
    };
    let mut all: Option<Keys> = None;
    for way in &ways {
        // once without blocks, because a block may stand for a text, and once with them
        for block in [None, Some(Mapping::new())] {
            let one = run(kind, way, block);
            all = Some(match all {
                None => one,
                Some(all) => joined(all, one),
            });
        }
    }
    all.unwrap_or_default()
}

fn entries((_, key, words): &(&str, &str, &[&str])) -> Vec<Mapping> {
    let entry = |word: &&str| {
        let mut map = Mapping::new();
        map.insert(Value::from(*key), Value::from(*word));
        map
    };
    words.iter().map(entry).collect()
}

fn run(kind: &'static str, entry: &Mapping, block: Option<Mapping>) -> Keys {
    let probe = Probe {
        keys: RefCell::default(),
        block,
    };
    let file = TextFile {
        path: String::new(),
        text: String::new(),
    };
    let (faults, mut book, mut seen) = (Faults::default(), Rulebook::default(), BTreeSet::new());
    let mut filling = Filling {
        book: &mut book,
        seen: &mut seen,
        faults: &faults,
        file: &file,
        probe: Some(&probe),
    };
    kinds::read(&mut filling, kind, &[Value::from(entry.clone())]);
    probe.keys.into_inner()
}

/// Both sets; a must of the entry only where both ask for it. A block's keys stand as they are.
fn joined(mut all: Keys, one: Keys) -> Keys {
    if let Some(entry) = all.get_mut("") {
        let other = one.get("");
        for (key, asked) in entry.iter_mut() {
            asked.must &= other.and_then(|o| o.get(key)).is_some_and(|a| a.must);
        }
    }
    for (block, keys) in one {
        let known = all.contains_key(&block);
        let into = all.entry(block.clone()).or_default();
        for (key, asked) in keys {
            let fresh = !into.contains_key(&key);
            let entry = into.entry(key).or_default();
            entry.must |= asked.must && fresh && !(known && block.is_empty());
            for shape in asked.shapes {
                if !entry.shapes.contains(&shape) {
                    entry.shapes.push(shape);
                }
            }
        }
    }
    all
}
