//! What is worked out once per oil and once per point.

use super::compiled::{Compiled, Said};
use super::declared::Declared;
use super::need::Want;
use super::value::{self, Value};
use crate::model::facts::{OilFacts, PointFacts, SumpNow};
use crate::model::rulebook::condition::{OilFact, PointFact};
use crate::model::rulebook::{Fact, Rulebook};
use crate::model::word::Word;

/// What depends on an oil alone.
pub struct OilCard<'f> {
    /// Its facts.
    pub facts: &'f OilFacts,
    /// Its declared classes, found in the rulebook.
    pub classes: Vec<String>,
    pub(super) declared: Declared,
    pub(super) said: Said,
}

impl<'f> OilCard<'f> {
    pub(super) fn of(book: &Rulebook, compiled: &Compiled<'_>, facts: &'f OilFacts) -> Self {
        let classes = declared_classes(book, facts);
        let said = compiled.weigh(|c| match c.fact {
            Fact::Oil(fact) => {
                let value = value::of_oil(book, facts, &classes, fact);
                Some(value::check(&c.test, value))
            }
            Fact::Pair(fact) => {
                value::settled_by_oil(fact, facts).map(|value| value::check(&c.test, value))
            }
            Fact::Now(_) | Fact::Point(_) => None,
        });
        Self {
            facts,
            declared: Declared::of(book, facts, &classes),
            classes,
            said,
        }
    }

    pub(super) fn value(&self, book: &Rulebook, fact: OilFact) -> Value<'_> {
        value::of_oil(book, self.facts, &self.classes, fact)
    }
}

fn declared_classes(book: &Rulebook, facts: &OilFacts) -> Vec<String> {
    let found = facts.classes.iter().filter_map(|c| book.class_id(c));
    let mut classes: Vec<String> = found.map(str::to_owned).collect();
    classes.dedup();
    classes
}

/// What depends on a point alone.
pub struct PointCard<'f> {
    /// Its facts.
    pub facts: &'f PointFacts,
    /// Ids of its components that the rulebook knows.
    pub components: Vec<String>,
    groups: u64,
    now_classes: Vec<String>,
    pub(super) wants: Vec<Want>,
    pub(super) said: Said,
}

impl<'f> PointCard<'f> {
    pub(super) fn of(book: &Rulebook, compiled: &Compiled<'_>, facts: &'f PointFacts) -> Self {
        let known = facts
            .components
            .iter()
            .filter_map(|c| book.components.find(c));
        let components: Vec<_> = known.collect();
        let groups = components
            .iter()
            .map(|c| c.group)
            .chain(facts.serves.iter().copied())
            .fold(0, |all, group| all | group.bit());
        let now_classes = match &facts.oil_now {
            SumpNow::Oil(now) => declared_classes(book, now),
            SumpNow::Unknown | SumpNow::Nothing => Vec::new(),
        };
        let mut card = Self {
            facts,
            components: components.into_iter().map(|c| c.id.clone()).collect(),
            groups,
            now_classes,
            wants: Vec::new(),
            said: Said::default(),
        };
        card.said = compiled.weigh(|c| match c.fact {
            Fact::Point(fact) => Some(value::check(&c.test, card.value(book, fact))),
            Fact::Now(fact) => Some(value::check(&c.test, card.now_value(book, fact))),
            Fact::Pair(fact) => {
                value::settled_by_point(fact, facts).map(|value| value::check(&c.test, value))
            }
            Fact::Oil(_) => None,
        });
        card.wants = Want::of_point(book, compiled, &card);
        card
    }

    pub(super) fn value(&self, book: &Rulebook, fact: PointFact) -> Value<'_> {
        value::of_point(book, self.facts, (&self.components, self.groups), fact)
    }

    pub(super) fn now_value(&self, book: &Rulebook, fact: OilFact) -> Value<'_> {
        match &self.facts.oil_now {
            SumpNow::Unknown => Value::Unknown,
            SumpNow::Nothing => Value::Absent,
            SumpNow::Oil(now) => value::of_oil(book, now, &self.now_classes, fact),
        }
    }
}
