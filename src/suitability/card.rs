//! What is worked out once: the rules in a row, and per oil and per point what each clause says.

use super::mixing::Tables;
use super::need::{Declared, Want};
use super::truth::Truth;
use super::value::{self, Value};
use crate::model::facts::{OilFacts, PointFacts, SumpNow};
use crate::model::rulebook::condition::{OilFact, PointFact};
use crate::model::rulebook::{Clause, Condition, Fact, Rulebook, SuitabilityRule, WhenUnknown};
use crate::model::word::Word;
use std::ops::Range;

/// The suitability rules with their clauses in one row.
pub(super) struct Compiled<'r> {
    rules: Vec<Row<'r>>,
    pub(super) clauses: Vec<Column<'r>>,
    pub(super) tables: Tables,
}

struct Row<'r> {
    rule: &'r SuitabilityRule,
    when: Range<usize>,
    bars_when: Range<usize>,
    only_where: Range<usize>,
}

/// One clause, and who has a say in it.
pub(super) struct Column<'r> {
    pub(super) clause: &'r Clause,
    oil: bool,
    point: bool,
    pub(super) pair: bool,
}

impl<'r> Compiled<'r> {
    pub(super) fn of(book: &'r Rulebook) -> Self {
        let mut clauses = Vec::new();
        let mut add = |list: &'r [Clause]| {
            let from = clauses.len();
            clauses.extend(list.iter().map(Column::of));
            from..clauses.len()
        };
        let rules = book
            .suitability
            .iter()
            .map(|rule| Row {
                rule,
                when: add(&rule.when),
                bars_when: add(&rule.bars_when),
                only_where: match &rule.unknown {
                    WhenUnknown::Asks { only_where, .. } => add(only_where),
                    WhenUnknown::Passes => 0..0,
                },
            })
            .collect();
        Self {
            rules,
            clauses,
            tables: Tables::of(book),
        }
    }

    /// The rules that neither the oil alone nor the point alone has ruled out.
    pub(super) fn live<'s>(
        &'s self,
        point: &'s PointCard<'_>,
        oil: &'s OilCard<'_>,
    ) -> impl Iterator<Item = (usize, &'s SuitabilityRule)> {
        let words = point.out.iter().zip(&oil.out).enumerate();
        words.flat_map(move |(word, (a, b))| {
            let mut live = !(a | b);
            std::iter::from_fn(move || {
                if live == 0 {
                    return None;
                }
                let place = word * 64 + live.trailing_zeros() as usize;
                live &= live - 1;
                Some((place, self.rules.get(place)?.rule))
            })
        })
    }

    pub(super) fn when(&self, place: usize) -> Range<usize> {
        self.rules[place].when.clone()
    }

    pub(super) fn bars_when(&self, place: usize) -> Range<usize> {
        self.rules[place].bars_when.clone()
    }

    pub(super) fn only_where(&self, place: usize) -> Range<usize> {
        self.rules[place].only_where.clone()
    }

    /// What one side says about every clause, and the rules it rules out by itself.
    fn weigh(
        &self,
        has_say: impl Fn(&Column<'_>) -> bool,
        alone: impl Fn(&Column<'_>) -> bool,
        says: impl Fn(&Condition) -> Option<Truth>,
    ) -> (Vec<Truth>, Vec<u64>) {
        let truths: Vec<Truth> = self
            .clauses
            .iter()
            .map(|column| {
                if !has_say(column) {
                    return Truth::False;
                }
                let any = column.clause.any.iter();
                any.filter_map(&says).max().unwrap_or(Truth::False)
            })
            .collect();
        let mut out = vec![0; self.rules.len().div_ceil(64)];
        for (place, row) in self.rules.iter().enumerate() {
            let never = row
                .when
                .clone()
                .any(|i| alone(&self.clauses[i]) && truths[i] == Truth::False);
            if never {
                out[place / 64] |= 1 << (place % 64);
            }
        }
        (truths, out)
    }
}

impl<'r> Column<'r> {
    fn of(clause: &'r Clause) -> Self {
        let has = |wanted: fn(&Fact) -> bool| clause.any.iter().any(|c| wanted(&c.fact));
        Self {
            clause,
            oil: has(|f| matches!(f, Fact::Oil(_))),
            point: has(|f| matches!(f, Fact::Point(_) | Fact::Now(_))),
            pair: has(|f| matches!(f, Fact::Pair(_))),
        }
    }
}

/// What depends on an oil alone.
pub struct OilCard<'f> {
    /// Its facts.
    pub facts: &'f OilFacts,
    /// Its declared classes, found in the rulebook.
    pub classes: Vec<String>,
    pub(super) declared: Declared,
    pub(super) truths: Vec<Truth>,
    out: Vec<u64>,
}

impl<'f> OilCard<'f> {
    pub(super) fn of(book: &Rulebook, compiled: &Compiled<'_>, facts: &'f OilFacts) -> Self {
        let classes = declared_classes(book, facts);
        let (truths, out) = compiled.weigh(
            |c| c.oil,
            |c| !c.point && !c.pair,
            |c| match c.fact {
                Fact::Oil(fact) => {
                    let value = value::of_oil(book, facts, &classes, fact);
                    Some(value::check(&c.test, value))
                }
                _ => None,
            },
        );
        Self {
            facts,
            declared: Declared::of(book, facts, &classes),
            classes,
            truths,
            out,
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
    pub(super) truths: Vec<Truth>,
    out: Vec<u64>,
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
            truths: Vec::new(),
            out: Vec::new(),
        };
        let (truths, out) = compiled.weigh(
            |c| c.point,
            |c| !c.oil && !c.pair,
            |c| match c.fact {
                Fact::Point(fact) => Some(value::check(&c.test, card.value(book, fact))),
                Fact::Now(fact) => Some(value::check(&c.test, card.now_value(book, fact))),
                _ => None,
            },
        );
        card.truths = truths;
        card.out = out;
        card.wants = Want::of_point(book, &compiled.tables, &card);
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
