//! Findings in words.

use super::truth::Truth;
use super::value::Value;
use super::{Eligibility, FactGap, Finding, Pair};
use crate::model::facts::{Mark, PartGroup, YesNo};
use crate::model::rulebook::condition::{Form, PairFact, PointFact, WordForm};
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

    /// A condition that holds, in words: `yellow metal`, `copper strip 2c`, `no food class`.
    fn says(&self, condition: &Condition) -> Option<String> {
        let fact = condition.fact;
        if let Fact::Pair(fact) = fact {
            return self.says_pair(fact);
        }
        let about = fact.says();
        // what an oil is not says little beside what it is, unless it declares nothing
        let negative = matches!(condition.test, Test::IsNot(_));
        Some(match (fact.form(), self.context.value(fact)) {
            (Form::Words(words), Value::Bits(bits)) => {
                if bits == YesNo::Yes.bit() && is_yes_no(&words) {
                    return Some(about);
                }
                if bits == 0 || (bits == YesNo::No.bit() && is_yes_no(&words)) {
                    return Some(format!("no {about}"));
                }
                if negative && matches!(fact, Fact::Oil(_)) {
                    return None;
                }
                let shown = match &condition.test {
                    Test::Is(Values::Bits(wanted)) => bits & wanted,
                    _ => bits,
                };
                format!("{about} {}", (words.write)(shown))
            }
            (Form::Number(kind), Value::Span(lo, hi)) => {
                format!("{about} {}", number(kind, lo, hi))
            }
            (Form::Classes, Value::Names(names, _)) if !negative => {
                let names = among(&condition.test, names);
                format!("{about} {}", names.join(", "))
            }
            (Form::Parts, Value::Names(names, groups)) => {
                self.parts(&condition.test, names, groups)?
            }
            _ => return None,
        })
    }

    /// A fact of the pair that made a rule fire, in words.
    fn says_pair(&self, fact: PairFact) -> Option<String> {
        let care = self.context.value(Fact::Pair(fact)) == Value::Bits(Mark::Care.bit());
        let says = match fact {
            // how an oil is brought in is part of the question, not a fact of the machine
            PairFact::Use => return None,
            PairFact::SameOil => "another oil than today",
            PairFact::Mixing if care => "the two bases mix only with care",
            PairFact::Mixing => "the two bases do not mix",
            PairFact::GreaseMixing if care => "the two thickeners mix only with care",
            PairFact::GreaseMixing => "the two thickeners do not mix",
            PairFact::Seals if care => "the seals bear this fluid only with care",
            PairFact::Seals => "the seals do not bear this fluid",
            PairFact::Paint => "the inside paint does not bear this fluid",
            PairFact::SightGlass => "the sight glass does not bear this fluid",
            PairFact::FoodClass => return Some(self.asked(PointFact::FoodClass)),
            PairFact::Environment => return Some(self.asked(PointFact::Environment)),
            PairFact::FireClass => return Some(self.asked(PointFact::FireClass)),
            PairFact::FlashMargin | PairFact::DwellRatio => {
                let (Form::Number(kind), Value::Span(lo, hi)) =
                    (fact.form(), self.context.value(Fact::Pair(fact)))
                else {
                    return None;
                };
                return Some(format!("{fact} {}", number(kind, lo, hi)));
            }
        };
        Some(says.to_owned())
    }

    fn asked(&self, fact: PointFact) -> String {
        let fact = Fact::Point(fact);
        match (fact.form(), self.context.value(fact)) {
            (Form::Words(words), Value::Bits(bits)) => {
                format!("{} {}", fact.says(), (words.write)(bits))
            }
            _ => fact.says(),
        }
    }

    /// The parts that made the test true, by their names.
    fn parts(&self, test: &Test, names: &[String], groups: u64) -> Option<String> {
        let Test::Is(Values::Names { groups: wanted, .. }) = test else {
            return None;
        };
        let mut found: Vec<&str> = PartGroup::ALL
            .iter()
            .filter(|g| g.bit() & groups & wanted != 0)
            .map(|g| g.word())
            .collect();
        let components = among(test, names);
        let known = components
            .iter()
            .filter_map(|id| self.context.book.components.get(id));
        found.extend(known.map(|c| c.name.as_str()));
        (!found.is_empty()).then(|| found.join(", "))
    }
}

fn is_yes_no(words: &WordForm) -> bool {
    words.noun == YesNo::NOUN
}

/// The names a test asks for; all of them where it asks for none.
fn among<'n>(test: &Test, names: &'n [String]) -> Vec<&'n str> {
    let wanted = |name: &&String| match test {
        Test::Is(Values::Names { names: wanted, .. }) => wanted.contains(name),
        _ => true,
    };
    names.iter().filter(wanted).map(String::as_str).collect()
}

fn number(kind: Kind, lo: f64, hi: f64) -> String {
    let show = |base: f64| quantity(Amount { kind, base }, Units::Si, Toward::Nearest);
    if (hi - lo).abs() < 1e-9 * hi.abs().max(1.0) {
        show(lo)
    } else {
        format!("{} .. {}", show(lo), show(hi))
    }
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
        act: sentence(&act),
        source: rule.provenance.source.clone(),
        basis: rule.provenance.basis,
        confidence: rule.provenance.confidence,
        undecided,
    }
}

/// A text with a capital first letter, so that it can stand behind a full stop.
pub(super) fn sentence(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| {
        first.to_uppercase().chain(letters).collect()
    })
}
