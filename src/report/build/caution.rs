//! The caution under the answer, made from the rules applied in this run: what was judged, what
//! was not, who comes before the sheet, and what is particular to it.

use super::case::{Case, Now};
use super::say;
use super::steps::outside;
use crate::demand::{End, Standing};
use crate::judge::Verdict;
use crate::model::facts::PointFacts;
use crate::model::rulebook::caution::CautionKind;
use crate::report::model::{Caution, CautionNote, Phrase};
use std::collections::BTreeSet;

/// What outranks every sheet.
pub(super) const DEFER: &str = "The maker's manual, the law of the place, and whoever is licensed for the work. An unsigned sheet is for discussion.";

/// What no rule of the program looks at.
const NEVER: [&str; 3] = [
    "how the oil ages in service",
    "foam, air and water in service",
    "how well one make of additive protects against another",
];

/// The caution of a machine, from all its points.
pub(super) fn caution(cases: &[Case<'_, '_>]) -> Caution {
    let mut judged: Vec<String> = Vec::new();
    let mut not: Vec<String> = Vec::new();
    for case in cases {
        take(&mut judged, by_ends(case));
        let (known, unknown) = by_facts(case);
        take(&mut judged, known);
        take(&mut not, undecided(case));
        take(&mut not, unknown);
    }
    not.retain(|n| !judged.contains(n));
    take(&mut not, NEVER.iter().map(|s| (*s).to_owned()).collect());
    Caution {
        judged,
        not_judged: not,
        defer: vec![DEFER.into()],
        before: before_acting(cases),
    }
}

fn take(into: &mut Vec<String>, more: Vec<String>) {
    for item in more {
        if !into.contains(&item) {
            into.push(item);
        }
    }
}

/// Ends that a demand judged in this run.
fn by_ends(case: &Case<'_, '_>) -> Vec<String> {
    let list = &case.w.demands.middle.list;
    let judged: BTreeSet<End> = list
        .iter()
        .filter(|d| d.standing == Standing::Judges && !d.at.is_unknown())
        .map(|d| d.end)
        .collect();
    let word = |end: &End| {
        match end {
            End::HotFloor => "viscosity running hot",
            End::RunningCeiling => "viscosity running cold",
            End::StartCeiling => "viscosity at the coldest start",
            End::PourMargin if case.grease() => "the grease's range of use",
            End::PourMargin => "pour point",
            End::OilCeiling => "the oil's own temperature limit",
            End::MakerGrade => "the grade the maker names",
        }
        .to_owned()
    };
    judged.iter().map(word).collect()
}

/// What could not be worked out.
fn undecided(case: &Case<'_, '_>) -> Vec<String> {
    case.w
        .demands
        .middle
        .undecided
        .iter()
        .map(|u| {
            let part = u.part.as_deref().map_or("the point", |p| case.part_name(p));
            format!("{part} ({})", say::told(&u.because, case.units()))
        })
        .collect()
}

/// Topics of the suitability rules, by whether the facts they need are stated.
fn by_facts(case: &Case<'_, '_>) -> (Vec<String>, Vec<String>) {
    let facts = &case.w.point.facts;
    let (mut known, mut unknown) = (Vec::new(), Vec::new());
    let asked: Vec<&str> = case
        .w
        .point
        .asks_for
        .iter()
        .map(|a| a.value.as_str())
        .collect();
    if asked.is_empty() {
        known.push("the class its parts imply".to_owned());
    } else {
        known.push(format!("the class asked for ({})", asked.join(", ")));
    }
    for (topic, stated) in topics(case, facts) {
        if stated {
            known.push(topic.to_owned());
        } else {
            unknown.push(format!("{topic} (not stated)"));
        }
    }
    for fact in case.w.candidates.iter().flat_map(|c| &c.facts_missing) {
        let topic = format!("{fact} (not stated)");
        let told = topics(case, facts)
            .iter()
            .any(|(t, _)| t.contains(fact.as_str()));
        if !told && !unknown.contains(&topic) {
            unknown.push(topic);
        }
    }
    if matches!(case.now, Now::Unknown) {
        unknown.push("mixing with the oil in it now (not known)".to_owned());
    } else {
        known.push("mixing with the oil in it now".to_owned());
    }
    (known, unknown)
}

/// What the rules look at beside viscosity, with whether it is stated here.
fn topics(case: &Case<'_, '_>, facts: &PointFacts) -> Vec<(&'static str, bool)> {
    let mut topics = vec![
        ("seals", facts.seals.is_some()),
        ("water entry", facts.water_entry.is_some()),
    ];
    if !case.grease() {
        topics.extend([
            ("yellow metal", facts.yellow_metal.is_some()),
            ("inside paint", facts.inside_paint.is_some()),
            ("sight glass", facts.sight_glass.is_some()),
        ]);
    }
    topics
}

/// What is particular to the points, with their names where they differ.
fn before_acting(cases: &[Case<'_, '_>]) -> Vec<Phrase> {
    let all: Vec<Vec<String>> = cases.iter().map(before).collect();
    let alike = all.windows(2).all(|w| w[0] == w[1]);
    if alike {
        let first = all.into_iter().next().unwrap_or_default();
        return first.into_iter().map(Phrase::from).collect();
    }
    let mut found = Vec::new();
    for (case, words) in cases.iter().zip(all) {
        let name = case.w.point.point.as_deref().unwrap_or("");
        let name = say::sentence(name);
        found.extend(words.into_iter().map(|w| format!("{name}: {w}").into()));
    }
    found
}

/// What is particular to a point: conditions, extrapolation, wear, assumptions, what is in it.
fn before(case: &Case<'_, '_>) -> Vec<String> {
    let mut all = Vec::new();
    let Some(lead) = case.lead else {
        return all;
    };
    let id = case.id(lead.oil);
    if lead.judgement.verdict != Verdict::Fails && !lead.conditions.is_empty() {
        let n = say::count(lead.conditions.len(), "condition", "conditions");
        let rides = if lead.conditions.len() == 1 {
            "rides with"
        } else {
            "ride with"
        };
        let words = format!("{} {rides} {id}, numbered below.", say::sentence(&n));
        all.push(words);
    }
    let start = case.w.demands.middle.thermal.start_coldest;
    if let Some(t) = start {
        use crate::quantity::Measure;
        if let Some(words) = outside(case, lead.oil, t.value.base()) {
            all.push(format!("{id}, start at {words}"));
        }
    }
    if case.worn(lead.oil).is_some() {
        all.push(format!("{id} is judged after shear when hot."));
    }
    if matches!(case.now, Now::Unknown) {
        all.push("Find out what is in it before anything is mixed with it.".to_owned());
    }
    all
}

/// The cautions that apply to a machine, safety first, then deferrals.
pub(super) fn notes(cases: &[Case<'_, '_>]) -> Vec<CautionNote> {
    let mut found = Vec::new();
    for case in cases {
        let oil = case.lead.map(|c| c.oil);
        for caution in case.run.scales.cautions(case.w, oil) {
            if !found.iter().any(|f: &&_| std::ptr::eq(*f, caution)) {
                found.push(caution);
            }
        }
    }
    found.sort_by_key(|c| c.kind != CautionKind::Safety);
    found
        .into_iter()
        .enumerate()
        .map(|(i, c)| CautionNote {
            id: format!("C-{}", i + 1),
            title: c.title.clone(),
            text: c.text.clone(),
        })
        .collect()
}
