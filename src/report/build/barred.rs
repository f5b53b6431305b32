//! The oils a rule keeps from being weighed: oils barred by the same rules share a row, the oil in
//! use has its own.

use super::case::Case;
use super::say;
use crate::model::rulebook::{Confidence, Entry};
use crate::model::word::Word;
use crate::report::model::{Barred as Row, Phrase, RunKind};
use crate::weighing::{Barred, Condition as Found};
use std::fmt::Write as _;

/// The rows, the oil in use first.
pub(super) fn barred(case: &Case<'_, '_>) -> Vec<Row> {
    let mut groups: Vec<Vec<&Barred>> = Vec::new();
    let mut order: Vec<&Barred> = case.w.barred.iter().collect();
    order.sort_by_key(|b| !b.in_use);
    for b in order {
        let same = |g: &&mut Vec<&Barred>| {
            !b.in_use && !g[0].in_use && common(case, g[0]) == common(case, b)
        };
        match groups.iter_mut().find(same) {
            Some(group) => group.push(b),
            None => groups.push(vec![b]),
        }
    }
    groups.into_iter().map(|g| row(case, &g)).collect()
}

fn row(case: &Case<'_, '_>, group: &[&Barred]) -> Row {
    let first = group[0];
    let mut oil = Phrase::new();
    for (i, b) in group.iter().enumerate() {
        if i > 0 {
            oil = oil.and(", ");
        }
        oil = oil.tag(case.id(b.oil));
    }
    let mut reason = Phrase::new();
    if group.len() == 1 {
        let says: Vec<String> = first
            .by
            .iter()
            .map(|by| say::stopped(&say::told(&by.says, case.units())))
            .collect();
        reason = reason.and(says.join(" "));
    } else {
        let says: Vec<String> = common(case, first)
            .into_iter()
            .map(|(_, words)| say::stopped(&say::told(&words, case.units())))
            .collect();
        let own: Vec<String> = group.iter().flat_map(|b| own(case, b)).collect();
        reason = reason.and(says.join(" "));
        if !own.is_empty() {
            let own = say::stopped(&say::told(&own.join("; "), case.units()));
            reason = reason.with(RunKind::Quiet, format!(" {own}"));
        }
    }
    let rules: Vec<&str> = first.by.iter().map(|by| by.rule.as_str()).collect();
    Row {
        oil,
        name: if group.len() == 1 {
            case.oil(first.oil).name.clone().unwrap_or_default()
        } else {
            say::count(group.len(), "oil", "oils")
        },
        in_use: first.in_use,
        rule: rules.join(", "),
        reason,
        source: source(case, &first.by),
    }
}

/// The parts of a reason: title, then what follows, parted by semicolons.
fn parts(says: &str) -> (&str, Vec<&str>) {
    let (title, rest) = says.split_once(": ").unwrap_or(("", says));
    (title, rest.split("; ").collect())
}

fn names_it(part: &str, id: &str) -> bool {
    part.starts_with(&format!("{id} "))
}

/// Rule and reason without what is said of this oil alone.
fn common<'c>(case: &Case<'_, '_>, b: &'c Barred) -> Vec<(&'c str, String)> {
    let id = case.id(b.oil);
    b.by.iter()
        .map(|by| {
            let (title, rest) = parts(&by.says);
            let kept: Vec<&str> = rest.into_iter().filter(|p| !names_it(p, id)).collect();
            (by.rule.as_str(), format!("{title}: {}", kept.join("; ")))
        })
        .collect()
}

/// What is said of this oil alone: `O-04 declares HM`.
fn own(case: &Case<'_, '_>, b: &Barred) -> Vec<String> {
    let id = case.id(b.oil);
    b.by.iter()
        .flat_map(|by| parts(&by.says).1)
        .filter(|part| names_it(part, id))
        .map(str::to_owned)
        .collect()
}

/// The sources of the rules that bar, with the confidence of the least sure.
fn source(case: &Case<'_, '_>, by: &[Found]) -> String {
    let mut sources: Vec<&str> = Vec::new();
    let mut least: Option<Confidence> = None;
    for found in by {
        if !sources.contains(&found.source.as_str()) {
            sources.push(&found.source);
        }
        let rule = case.run.scales.rules.suitability.get(&found.rule);
        let confidence = rule.map(|r| r.provenance().confidence);
        least = match (least, confidence) {
            (Some(a), Some(b)) => Some(a.min(b)),
            (a, b) => a.or(b),
        };
    }
    let mut text = sources.join("; ");
    if let Some(confidence) = least {
        let _ = write!(text, "; confidence {}", confidence.word());
    }
    text
}
