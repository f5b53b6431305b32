//! What rides with a verdict: conditions, numbered once on a sheet, and remarks.

use super::case::Case;
use super::say;
use crate::model::rulebook::Rulebook;
use crate::report::model::{Condition, Phrase};
use crate::weighing::{Candidate, Condition as Found};
use std::collections::BTreeSet;

/// The conditions of a sheet in the order of their numbers.
#[derive(Clone, Debug, Default)]
pub(super) struct Numbers {
    known: Vec<Found>,
    /// Rules that ask for a class: their words differ from oil to oil only by what it declares.
    needs: BTreeSet<String>,
}

impl Numbers {
    /// For the rules in force.
    pub(super) fn new(book: &Rulebook) -> Self {
        Self {
            known: Vec::new(),
            needs: book.needs.iter().map(|n| n.id.clone()).collect(),
        }
    }

    /// The number of a condition; the same words have the same number on every point.
    fn of(&mut self, found: &Found) -> u32 {
        let any = self.needs.contains(&found.rule);
        let same =
            |k: &Found| k.rule == found.rule && k.act == found.act && (any || k.says == found.says);
        let place = self.known.iter().position(same).unwrap_or_else(|| {
            self.known.push(found.clone());
            self.known.len() - 1
        });
        u32::try_from(place + 1).unwrap_or(u32::MAX)
    }

    /// The number of the question that a missing fact raises, if one does.
    pub(super) fn asking(&self, fact: &str) -> Option<(u32, &Found)> {
        let place = self.known.iter().position(|k| {
            k.says
                .split_once("not stated: ")
                .is_some_and(|(_, rest)| names(rest, fact))
        })?;
        Some((u32::try_from(place + 1).ok()?, &self.known[place]))
    }
}

/// Whether a list of facts up to a semicolon names one.
fn names(rest: &str, fact: &str) -> bool {
    let list = rest.split(';').next().unwrap_or("");
    list.split(", ").any(|name| name.trim() == fact)
}

/// The candidates whose conditions come first: the lead, then the order of the table.
fn in_order<'c>(case: &Case<'c, '_>) -> Vec<&'c Candidate> {
    let mut all: Vec<&Candidate> = case.w.candidates.iter().collect();
    all.sort_by_key(|c| !case.is_lead(c));
    all
}

/// Numbers the conditions of a point and lists them.
pub(super) fn conditions(case: &Case<'_, '_>, numbers: &mut Numbers) -> Vec<Condition> {
    let mut list: Vec<Condition> = Vec::new();
    for c in in_order(case) {
        for found in &c.conditions {
            let number = numbers.of(found);
            let id = case.id(c.oil).to_owned();
            match list.iter_mut().find(|k| k.number == number) {
                Some(known) if known.oils.contains(&id) => {}
                Some(known) => known.oils.push(id),
                None => list.push(Condition {
                    number,
                    text: told(case, found),
                    oils: vec![id],
                    rule: cited(found),
                }),
            }
        }
    }
    list.sort_by_key(|c| c.number);
    list
}

/// The numbers of a candidate's conditions.
pub(super) fn numbers_of(c: &Candidate, numbers: &mut Numbers) -> Vec<u32> {
    let mut all: Vec<u32> = c.conditions.iter().map(|f| numbers.of(f)).collect();
    all.sort_unstable();
    all.dedup();
    all
}

/// Remarks of suitability rules, each with the oils it is about.
pub(super) fn notes(case: &Case<'_, '_>) -> Vec<Phrase> {
    let mut list: Vec<(String, Vec<String>)> = Vec::new();
    for c in in_order(case) {
        for found in &c.notes {
            let text = format!(
                "{} {}",
                words(case, found),
                say::stopped(&say::told(&found.act, case.units()))
            );
            let id = case.id(c.oil).to_owned();
            match list.iter_mut().find(|(known, _)| *known == text) {
                Some((_, oils)) => oils.push(id),
                None => list.push((text, vec![id])),
            }
        }
    }
    list.into_iter()
        .map(|(text, oils)| {
            Phrase::new()
                .strong(format!("{}: ", shortened(&oils)))
                .and(text.trim_end().to_owned())
        })
        .collect()
}

/// Up to four names, then a count.
pub(super) fn shortened<S: AsRef<str>>(names: &[S]) -> String {
    let names: Vec<&str> = names.iter().map(AsRef::as_ref).collect();
    if names.len() <= 4 {
        names.join(", ")
    } else {
        format!("{} and {} more", names[..3].join(", "), names.len() - 3)
    }
}

/// What a rule says of an oil; of a class need, the same words for every oil that falls short.
fn words(case: &Case<'_, '_>, found: &Found) -> String {
    let says = match case.run.scales.rules.needs.get(&found.rule) {
        Some(need) => format!(
            "{}: it declares none of {}; {}",
            need.title,
            need.served_by.join(", "),
            need.why
        ),
        None => found.says.clone(),
    };
    say::stopped(&say::sentence(&say::told(&says, case.units())))
}

fn told(case: &Case<'_, '_>, found: &Found) -> Phrase {
    Phrase::new()
        .and(words(case, found))
        .and(" ")
        .strong(say::stopped(&say::sentence(&say::told(
            &found.act,
            case.units(),
        ))))
}

fn cited(found: &Found) -> String {
    let mut text = format!("Rule {}", found.rule);
    if !found.source.is_empty() {
        text.push_str("; ");
        text.push_str(&found.source);
    }
    say::stopped(&text)
}
