//! The sheets to look things up on: the relations used, the rules used, the words.

use super::plan::On;
use super::{Report, checked, oils, rules, say};
use crate::quantity::show::{Toward, fixed};
use crate::relation::Law;
use crate::report::model::{
    Body, Glossary, Method, MethodAppendix, Phrase, RulesPage, Sheet, Term,
};
use crate::report::names::plain;
use std::collections::BTreeMap;

/// Machines named beside a method or a rule at most.
const NAMED: usize = 10;

/// The relations used in this run.
pub(super) fn methods(report: &Report<'_>) -> Sheet {
    let methods = used(report)
        .values()
        .map(|(law, machines, oils)| Method {
            id: format!("law-{}", plain(law.name)),
            name: law.name.to_owned(),
            title: say::set(law.title),
            formula: law.formula.to_owned(),
            range: say::set(law.range),
            source: say::set(law.source),
            validation: checked::against(law.name).to_owned(),
            used_by: users(report, machines, oils),
        })
        .collect();
    let fixed = &report.plan.methods;
    Sheet {
        place: fixed.place.clone(),
        number: fixed.number,
        of: report.plan.of,
        name: "Methods".to_owned(),
        subtitle: "Every relation the calculations of this report stand on".to_owned(),
        about: "The name beside each is the one the command line knows it by: filmwright work NAME works it out by itself where it is offered there.".into(),
        title: "Methods: relations used, with range and source".to_owned(),
        nav: report.plan.nav(On::Methods),
        body: Body::Methods(Box::new(MethodAppendix { methods })),
    }
}

/// A relation, and the machines and oils whose sheets stand on it.
type Used = (&'static Law, Vec<usize>, Vec<usize>);

/// The relations of all sheets, by name.
fn used(report: &Report<'_>) -> BTreeMap<&'static str, Used> {
    let machines = report.kept.laws.iter();
    let mut all: BTreeMap<&'static str, Used> = machines
        .map(|(name, (law, machines))| (*name, (*law, machines.clone(), Vec::new())))
        .collect();
    for oil in 0..report.plan.oils.len() {
        for (name, law) in oils::laws(report, oil) {
            let entry = all.entry(name).or_insert((law, Vec::new(), Vec::new()));
            entry.2.push(oil);
        }
    }
    all
}

/// Machines, then oils: those of all sheets in words, few by name.
fn users(report: &Report<'_>, machines: &[usize], oils: &[usize]) -> Phrase {
    let mut phrase = named(report, machines);
    if oils.is_empty() {
        return phrase;
    }
    if !machines.is_empty() {
        phrase = phrase.and("; ");
    }
    if oils.len() == report.plan.oils.len() && oils.len() > 1 {
        return phrase.and("every oil's sheet");
    }
    phrase = phrase.and(if oils.len() == 1 {
        "the sheet of "
    } else {
        "the sheets of "
    });
    for (i, oil) in oils.iter().take(NAMED).enumerate() {
        if i > 0 {
            phrase = phrase.and(", ");
        }
        let fixed = &report.plan.oils[*oil];
        phrase = phrase.tag_link(report.oil_id(*oil), report.plan.href(&fixed.place));
    }
    match oils.len().saturating_sub(NAMED) {
        0 => phrase,
        n => phrase.and(format!(" and {n} more")),
    }
}

/// Machines by tag, with their links.
pub(super) fn named(report: &Report<'_>, machines: &[usize]) -> Phrase {
    let mut phrase = Phrase::new();
    for (i, m) in machines.iter().take(NAMED).enumerate() {
        let plan = &report.plan.machines[*m];
        if i > 0 {
            phrase = phrase.and(", ");
        }
        phrase = phrase.link(plan.tag, report.plan.href(&plan.place));
    }
    if machines.len() > NAMED {
        phrase = phrase.and(format!(" and {} more", machines.len() - NAMED));
    }
    phrase
}

/// The rules used in this run.
pub(super) fn rules(report: &Report<'_>) -> Sheet {
    let fixed = &report.plan.rules;
    let body = RulesPage {
        house: rules::house(report),
        rules: rules::used(report),
    };
    Sheet {
        place: fixed.place.clone(),
        number: fixed.number,
        of: report.plan.of,
        name: "Rules".to_owned(),
        subtitle: "Rules of the house, and rules that spoke in this run".to_owned(),
        about: "A rule stands here if it set a limit on a machine of this report, or barred an oil, asked or noted something.".into(),
        title: "Rules used, with source and confidence".to_owned(),
        nav: report.plan.nav(On::Rules),
        body: Body::Rules(Box::new(body)),
    }
}

/// The words.
pub(super) fn words(report: &Report<'_>) -> Sheet {
    let site = fixed(report.run.scales.reserve, 2, Toward::Nearest);
    let term = |word: &str, means: &str| Term {
        word: word.to_owned(),
        means: means.into(),
    };
    let body = Glossary {
        reserve: format!("{site} of a step"),
        audit: report.plan.audit.is_some(),
        terms: vec![
            term(
                "viscosity ratio κ",
                "viscosity of the oil in the running bearing over the reference viscosity of ISO 281 for its size and speed; a viscosity ratio of one is full credit for the film.",
            ),
            term(
                "film ratio λ",
                "least film over the composite roughness of the two surfaces.",
            ),
            term(
                "thin end, thick end",
                "the edges of an oil's tolerance: floors are judged at the thin end, ceilings at the thick end.",
            ),
            term(
                "worn, sheared",
                "a polymer-thickened oil after the mechanical shear of service; it is thinner for good. Floors are judged on this line.",
            ),
            term(
                "tangent",
                "where an oil's curve bends, the straight line that touches it at the limit stands in for it when the margin is read.",
            ),
            term(
                "carried on",
                "read from a line beyond the points its source states.",
            ),
            term(
                "confidence",
                "how sure a rule is. One of low confidence leaves a verdict open and never fails an oil by a little.",
            ),
        ],
    };
    let fixed = &report.plan.glossary;
    Sheet {
        place: fixed.place.clone(),
        number: fixed.number,
        of: report.plan.of,
        name: "Words".to_owned(),
        subtitle: "What the words and marks mean".to_owned(),
        about: Phrase::new(),
        title: say::sentence("words, marks and units of this report"),
        nav: report.plan.nav(On::Glossary),
        body: Body::Glossary(Box::new(body)),
    }
}
