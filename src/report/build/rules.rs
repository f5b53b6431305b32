//! The rules used in this run, in words.

use super::reference::named;
use super::{Report, say};
use crate::demand::rules::CALCULATED;
use crate::model::ViscosityLimit;
use crate::model::rulebook::component::{Component, WindowLimit};
use crate::model::rulebook::{Entry, Provenance, Rulebook};
use crate::model::word::Word;
use crate::quantity::Measure;
use crate::quantity::show::{Toward, Units};
use crate::report::model::{HouseRule, RuleRow};
use crate::report::names::Names;

/// Rules of the program's own that no rule file holds: id, title, what it says, source.
const OWN: [(&str, &str, &str, &str); 3] = [
    (
        "class-asked",
        "Class or additive asked for",
        "An oil that declares classes none of which serves what the maker or the duty asks for is barred; one that declares nothing is asked about.",
        "the machine's own record",
    ),
    (
        "maker-grade",
        "Grade named by the maker",
        "The lower limit of the grade, compared at 40 °C with the new oil at its thin end. It takes the place of empirical floors.",
        "ISO 3448; the maker",
    ),
    (
        "grease-use-range",
        "Range of use of a grease",
        "The thickener closes the range at both ends: the start may not be colder than its low end.",
        "rules on thickeners",
    ),
];

/// The rules of the house, numbered as on the sheets.
pub(super) fn house(report: &Report<'_>) -> Vec<HouseRule> {
    let rules = &report.run.scales.site.house.rules;
    rules
        .iter()
        .enumerate()
        .map(|(i, rule)| {
            let id = format!("H-{}", i + 1);
            let label = format!("{id} {}", rule.name);
            let only = rule.only_for.as_ref().map_or(String::new(), |tag| {
                format!(", for oils with {} only", tag.value)
            });
            HouseRule {
                name: rule.name.clone(),
                says: say::set(&format!("{}{only}", rule.written)).into(),
                replaces: rule
                    .replaces
                    .as_ref()
                    .map_or_else(|| "nothing".to_owned(), |r| r.value.clone()),
                source: rule
                    .source
                    .clone()
                    .unwrap_or_else(|| "not stated".to_owned()),
                used_by: named(report, &users(report, &label)),
                id,
            }
        })
        .collect()
}

fn users(report: &Report<'_>, rule: &str) -> Vec<usize> {
    let uses = |m: &usize| {
        report.kept.machines[*m]
            .iter()
            .any(|d| d.rules.contains(rule))
    };
    (0..report.kept.machines.len()).filter(uses).collect()
}

/// The rules that set a limit or spoke on an oil, by id, and every entry a user's file replaced.
pub(super) fn used(report: &Report<'_>) -> Vec<RuleRow> {
    let book = report.run.scales.rules;
    let mut names = Names::new();
    let mut ids: Vec<&String> = report
        .kept
        .machines
        .iter()
        .flatten()
        .flat_map(|d| &d.rules)
        .collect();
    let replaced: Vec<&String> = book.replaced.iter().map(|r| &r.id).collect();
    ids.extend(&replaced);
    ids.sort_unstable();
    ids.dedup();
    ids.into_iter()
        .filter(|id| !id.starts_with("stated-") && !id.starts_with("H-"))
        .map(|id| {
            let mut row = row(book, id, report.run.scales.units);
            row.id = format!("rule-{}", names.give(id));
            row.rule.clone_from(id);
            if let Some(by) = book.replaced.iter().find(|r| r.id == *id) {
                row.replaced = true;
                let words = format!("{} stands in the place of {}.", by.by, by.was);
                row.says = format!("{}\n\n{}", row.says, escaped(&words));
            }
            row
        })
        .collect()
}

/// Paths are no Markdown.
fn escaped(text: &str) -> String {
    let mut out = String::new();
    for c in text.chars() {
        if c.is_ascii_punctuation() {
            out.push('\\');
        }
        out.push(c);
    }
    out
}

fn row(book: &Rulebook, id: &str, units: Units) -> RuleRow {
    if let Some(rule) = book.suitability.get(id) {
        let says = format!("{} {}", stop(&rule.why), stop(&rule.act));
        return filled(&rule.title, rule.heaviest().word(), says, rule.provenance());
    }
    if let Some(need) = book.needs.get(id) {
        let wanted = need.served_by.join(", ");
        let says = format!(
            "Served by {wanted}. {} {}",
            stop(&need.why),
            stop(&need.act)
        );
        return filled(&need.title, need.level.word(), says, need.provenance());
    }
    if let Some(window) = book.components.get(id) {
        let says = window_words(window, units);
        return filled(&window.name, "limits viscosity", says, window.provenance());
    }
    if let Some(limit) = book.start_limits.get(id) {
        let figure = limit.limit.map_or_else(
            || "not judged by viscosity".to_owned(),
            |l| format!("at most {}", viscosity(l, units)),
        );
        let title = format!("Start: {}", limit.part);
        return filled(
            &title,
            "limits the start",
            stop(&figure),
            limit.provenance(),
        );
    }
    if let Some(margin) = book.pour_margins.get(id) {
        let kelvins = |k: Option<crate::quantity::TemperatureInterval>| {
            k.map_or_else(
                || "none".to_owned(),
                |k| say::amount(k.amount(), units, Toward::Nearest),
            )
        };
        let says = format!(
            "Start above the pour point: least {}, better {}.",
            kelvins(margin.least),
            kelvins(margin.preferred)
        );
        let title = format!("Pour margin: {}", margin.system);
        return filled(&title, "limits the start", says, margin.provenance());
    }
    of_program(id)
}

/// Rules worked out by a relation, and the program's own.
fn of_program(id: &str) -> RuleRow {
    if let Some((_, law, says)) = CALCULATED.iter().find(|(known, ..)| *known == id) {
        return RuleRow {
            title: say::set(law.title),
            level: "worked out".to_owned(),
            says: stop(&say::set(says)),
            source: say::set(law.source),
            ..RuleRow::default()
        };
    }
    if let Some((_, title, says, source)) = OWN.iter().find(|(known, ..)| *known == id) {
        return RuleRow {
            title: (*title).to_owned(),
            level: "part of the program".to_owned(),
            says: (*says).to_owned(),
            source: (*source).to_owned(),
            ..RuleRow::default()
        };
    }
    RuleRow {
        title: say::sentence(&id.replace(['-', '_'], " ")),
        level: "limit".to_owned(),
        says: "Its limit and source stand on the sheets of the machines.".to_owned(),
        ..RuleRow::default()
    }
}

fn filled(title: &str, level: &str, says: String, provenance: &Provenance) -> RuleRow {
    RuleRow {
        title: say::sentence(title),
        level: level.to_owned(),
        confidence: provenance.confidence.word().to_owned(),
        says,
        source: say::set(&provenance.cited()),
        ..RuleRow::default()
    }
}

fn stop(text: &str) -> String {
    say::stopped(&say::sentence(&say::set(text)))
}

fn viscosity(limit: ViscosityLimit, units: Units) -> String {
    let amount = match limit {
        ViscosityLimit::Kinematic(nu) => nu.amount(),
        ViscosityLimit::Dynamic(eta) => eta.amount(),
    };
    say::amount(amount, units, Toward::Nearest)
}

fn window_words(window: &Component, units: Units) -> String {
    let limit = |l: &WindowLimit| match l {
        WindowLimit::Fixed(v) => viscosity(*v, units),
        WindowLimit::TimesReference { factor, .. } => {
            format!("{} times the pitch-line reference", factor.base())
        }
    };
    let parts: Vec<String> = [
        ("least while running", window.min.as_ref()),
        ("greatest at full speed", window.max_run.as_ref()),
        ("greatest at start", window.max_start.as_ref()),
    ]
    .into_iter()
    .filter_map(|(word, l)| Some(format!("{word} {}", limit(l?))))
    .collect();
    if parts.is_empty() {
        "It sets no fixed limit on viscosity.".to_owned()
    } else {
        stop(&parts.join("; "))
    }
}
