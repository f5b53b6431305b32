//! The suitability rules in a row, with the questions they put to a pair.

use super::card::{OilCard, PointCard};
use super::mixing::Tables;
use super::need::Needs;
use super::truth::Truth;
use crate::model::rulebook::{
    Clause, Condition, Fact, Level, Rulebook, SuitabilityRule, WhenUnknown,
};
use std::ops::Range;

/// The suitability rules with their clauses in one row.
pub(super) struct Compiled<'r> {
    rules: Vec<Row<'r>>,
    pub(super) clauses: Vec<Column<'r>>,
    /// Every different condition on a pair.
    pub(super) questions: Vec<&'r Condition>,
    pub(super) tables: Tables,
    pub(super) needs: Needs,
    /// Rules that can do no more than note, one bit each.
    notes: Vec<u64>,
}

struct Row<'r> {
    rule: &'r SuitabilityRule,
    when: Range<usize>,
    bars_when: Range<usize>,
    only_where: Range<usize>,
}

/// One clause.
pub(super) struct Column<'r> {
    clause: &'r Clause,
    /// Which of the questions on a pair it puts.
    pub(super) asks: Vec<usize>,
}

/// What one side says about the rules.
#[derive(Clone, Debug, Default)]
pub(super) struct Said {
    /// By clause: the best of the conditions this side answers.
    pub(super) truths: Vec<Truth>,
    /// Rules it rules out by itself, one bit each.
    out: Vec<u64>,
}

fn mark(bits: &mut [u64], place: usize) {
    bits[place / 64] |= 1 << (place % 64);
}

impl<'r> Compiled<'r> {
    pub(super) fn of(book: &'r Rulebook) -> Self {
        let mut clauses = Vec::new();
        let mut add = |list: &'r [Clause]| {
            let from = clauses.len();
            clauses.extend(list.iter().map(|clause| Column {
                clause,
                asks: Vec::new(),
            }));
            from..clauses.len()
        };
        let rules: Vec<Row<'r>> = book
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
        let mut notes = vec![0; rules.len().div_ceil(64)];
        for (place, row) in rules.iter().enumerate() {
            if row.rule.heaviest() == Level::Notes {
                mark(&mut notes, place);
            }
        }
        Self {
            questions: ask_once(&mut clauses),
            rules,
            clauses,
            tables: Tables::of(book),
            needs: Needs::of(book),
            notes,
        }
    }

    /// The rules that neither the oil alone nor the point alone has ruled out.
    pub(super) fn live<'s>(
        &'s self,
        point: &'s PointCard<'_>,
        oil: &'s OilCard<'_>,
        with_notes: bool,
    ) -> impl Iterator<Item = (usize, &'s SuitabilityRule)> {
        let sides = point.said.out.iter().zip(&oil.said.out);
        sides
            .zip(&self.notes)
            .enumerate()
            .flat_map(move |(word, ((a, b), notes))| {
                let mut live = !(a | b);
                if !with_notes {
                    live &= !notes;
                }
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

    /// What one side says about every clause, and the rules it rules out by itself: those with a
    /// clause it settles as false, and those with one it settles as unknown that then stay
    /// silent. `says` answers the conditions this side can answer.
    pub(super) fn weigh(&self, says: impl Fn(&Condition) -> Option<Truth>) -> Said {
        let mut truths = Vec::with_capacity(self.clauses.len());
        let mut settled = Vec::with_capacity(self.clauses.len());
        for column in &self.clauses {
            let mut best = Truth::False;
            let mut all = true;
            for condition in &column.clause.any {
                match says(condition) {
                    Some(truth) => best = best.max(truth),
                    None => all = false,
                }
            }
            truths.push(best);
            settled.push(all);
        }
        let mut out = vec![0; self.notes.len()];
        for (place, row) in self.rules.iter().enumerate() {
            let is = |clause: usize, truth| settled[clause] && truths[clause] == truth;
            let silent = match row.rule.unknown {
                WhenUnknown::Passes => true,
                WhenUnknown::Asks { .. } => row
                    .only_where
                    .clone()
                    .any(|c| is(c, Truth::False) || is(c, Truth::Unknown)),
            };
            let never = |c| is(c, Truth::False) || (silent && is(c, Truth::Unknown));
            if row.when.clone().any(never) {
                mark(&mut out, place);
            }
        }
        Said { truths, out }
    }
}

/// Numbers the conditions on a pair, each different one once.
fn ask_once<'r>(clauses: &mut [Column<'r>]) -> Vec<&'r Condition> {
    let mut questions: Vec<&'r Condition> = Vec::new();
    for column in clauses {
        for condition in &column.clause.any {
            if !matches!(condition.fact, Fact::Pair(_)) {
                continue;
            }
            let known = questions.iter().position(|q| *q == condition);
            column.asks.push(known.unwrap_or(questions.len()));
            if known.is_none() {
                questions.push(condition);
            }
        }
    }
    questions
}
