//! What an oil declares, as a set of classes that can be held against needs.

use crate::model::facts::{Additive, OilFacts};
use crate::model::oil::OilKind;
use crate::model::rulebook::Rulebook;
use crate::model::rulebook::class::plain;
use crate::model::word::Word;
use std::collections::BTreeSet;

/// Classes of the rulebook as a set.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub(super) struct ClassSet(Vec<u64>);

impl ClassSet {
    pub(super) fn with(mut self, place: usize) -> Self {
        if self.0.len() <= place / 64 {
            self.0.resize(place / 64 + 1, 0);
        }
        self.0[place / 64] |= 1 << (place % 64);
        self
    }

    pub(super) fn and(mut self, other: &Self) -> Self {
        if self.0.len() < other.0.len() {
            self.0.resize(other.0.len(), 0);
        }
        self.0.iter_mut().zip(&other.0).for_each(|(a, b)| *a |= b);
        self
    }

    pub(super) fn meets(&self, other: &Self) -> bool {
        self.0.iter().zip(&other.0).any(|(a, b)| a & b != 0)
    }
}

/// What an oil declares, ready to be held against needs.
#[derive(Clone, Debug, PartialEq)]
pub struct Declared {
    pub(super) tokens: ClassSet,
    /// As written, for grades the rulebook has no entry of its own for.
    pub(super) literals: Vec<String>,
    pub(super) any_class: bool,
    /// Additive families stated; a stated list is complete.
    pub(super) families: Option<ClassSet>,
    /// Whether the oil is stated to have no additive at all.
    pub(super) bare: bool,
    pub(super) grease: bool,
}

impl Declared {
    pub(super) fn of(book: &Rulebook, facts: &OilFacts, classes: &[String]) -> Self {
        let set = |ids: &mut dyn Iterator<Item = &str>| {
            ids.filter_map(|id| book.classes.place(id))
                .fold(ClassSet::default(), ClassSet::with)
        };
        let words = || {
            facts
                .additives
                .iter()
                .flatten()
                .map(|a: &Additive| a.word())
        };
        let food = facts.food_class.map(Word::word);
        let environment = facts.environment.map(Word::word);
        let declared = classes.iter().map(String::as_str);
        Self {
            tokens: set(&mut words().chain(food).chain(environment).chain(declared)),
            literals: facts.classes.iter().map(|c| plain(c)).collect(),
            any_class: !facts.classes.is_empty(),
            families: facts.additives.as_ref().map(|_| set(&mut words())),
            bare: facts.additives.as_ref().is_some_and(BTreeSet::is_empty),
            grease: facts.kind == Some(OilKind::Grease),
        }
    }

    /// Whether the oil declares neither classes nor additives.
    pub fn nothing(&self) -> bool {
        !self.any_class && self.families.is_none()
    }
}
