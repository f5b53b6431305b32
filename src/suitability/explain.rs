//! Findings in words.

use super::truth::Truth;
use super::value::Value;
use super::{Eligibility, FactGap, Finding, Pair};
use crate::model::rulebook::condition::Form;
use crate::model::rulebook::{
    Clause, Condition, Fact, Level, SuitabilityRule, Test, Values, WhenUnknown,
};
use crate::model::word::Word;
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{Amount, Kind};

impl Pair<'_> {
    /// A rule that fired.
    pub(super) fn fired(&self, place: usize, rule: &SuitabilityRule, level: Level) -> Finding {
        let mut facts = self.facts(&rule.when);
        let bars = !self.compiled.bars_when(place).is_empty();
        if bars && level == Level::Bars {
            for fact in self.facts(&rule.bars_when) {
                if !facts.contains(&fact) {
                    facts.push(fact);
                }
            }
        }
        let reason = if facts.is_empty() {
            format!("{}: {}", rule.title, rule.why)
        } else {
            format!("{}: {}; {}", rule.title, facts.join(", "), rule.why)
        };
        finding(rule, level, facts, reason, rule.act.clone(), false)
    }

    /// A rule that lacks a fact: a condition with the question, and a gap for each fact.
    pub(super) fn undecided(&self, place: usize, rule: &SuitabilityRule, found: &mut Eligibility) {
        let WhenUnknown::Asks { question, .. } = &rule.unknown else {
            return;
        };
        let mut missing = Vec::new();
        for (clause, at) in rule.when.iter().zip(self.compiled.when(place)) {
            if self.clause(at) == Truth::Unknown {
                self.missing(clause, &mut missing);
            }
        }
        let names: Vec<String> = missing.iter().map(|fact| fact.says()).collect();
        let reason = format!(
            "{} cannot be decided: not stated: {}; {}",
            rule.title,
            names.join(", "),
            rule.why
        );
        let asks = finding(
            rule,
            Level::Asks,
            names.clone(),
            reason,
            question.clone(),
            true,
        );
        found.conditions.push(asks);
        for (fact, says) in missing.into_iter().zip(names) {
            found.gaps.push(FactGap {
                rule: rule.id.clone(),
                fact: Some(fact),
                says,
                question: question.clone(),
            });
        }
    }

    fn missing(&self, clause: &Clause, missing: &mut Vec<Fact>) {
        for condition in &clause.any {
            let unknown = self.context.condition(condition) == Truth::Unknown;
            if unknown && !missing.contains(&condition.fact) {
                missing.push(condition.fact);
            }
        }
    }

    /// The facts that make the clauses true, in words.
    fn facts(&self, clauses: &[Clause]) -> Vec<String> {
        let mut facts = Vec::new();
        for clause in clauses {
            let holds = |c: &&Condition| self.context.condition(c) == Truth::True;
            let says = clause.any.iter().find(holds).and_then(|c| self.says(c));
            if let Some(says) = says
                && !facts.contains(&says)
            {
                facts.push(says);
            }
        }
        facts
    }

    fn says(&self, condition: &Condition) -> Option<String> {
        let fact = condition.fact;
        let value = match (fact.form(), self.context.value(fact)) {
            (Form::Words(words), Value::Bits(bits)) => match &condition.test {
                Test::Is(Values::Bits(wanted)) => (words.write)(bits & wanted),
                _ if bits == 0 => "none declared".into(),
                _ => (words.write)(bits),
            },
            (Form::Number(kind), Value::Span(lo, hi)) => number(kind, lo, hi),
            (Form::Classes | Form::Parts, Value::Names(names, groups)) => {
                named(&condition.test, names, groups)?
            }
            _ => return None,
        };
        match fact {
            // how an oil is brought in is part of the question, not a fact of the machine
            Fact::Pair(crate::model::rulebook::condition::PairFact::Use) => None,
            _ => Some(format!("{} {value}", fact.says())),
        }
    }
}

fn number(kind: Kind, lo: f64, hi: f64) -> String {
    let show = |base: f64| quantity(Amount { kind, base }, Units::Si, Toward::Nearest);
    if (hi - lo).abs() < 1e-9 * hi.abs().max(1.0) {
        show(lo)
    } else {
        format!("{} .. {}", show(lo), show(hi))
    }
}

/// The names that made the test true.
fn named(test: &Test, names: &[String], groups: u64) -> Option<String> {
    let Test::Is(Values::Names {
        names: wanted,
        groups: wanted_groups,
    }) = test
    else {
        return (!names.is_empty()).then(|| names.join(", "));
    };
    let mut found: Vec<&str> = crate::model::facts::PartGroup::ALL
        .iter()
        .filter(|g| g.bit() & groups & wanted_groups != 0)
        .map(|g| g.word())
        .collect();
    found.extend(
        names
            .iter()
            .filter(|n| wanted.contains(n))
            .map(String::as_str),
    );
    (!found.is_empty()).then(|| found.join(", "))
}

fn finding(
    rule: &SuitabilityRule,
    level: Level,
    facts: Vec<String>,
    reason: String,
    act: String,
    undecided: bool,
) -> Finding {
    Finding {
        rule: rule.id.clone(),
        level,
        title: rule.title.clone(),
        facts,
        reason,
        act,
        source: rule.provenance.source.clone(),
        basis: rule.provenance.basis,
        confidence: rule.provenance.confidence,
        undecided,
    }
}
