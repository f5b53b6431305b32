//! The limits of a point, the strictest first at each end, with the rule behind each.

use super::case::{Case, asks};
use super::inputs::origin;
use super::say;
use super::steps::Steps;
use crate::demand::{Demand, End, For, Limit, Standing};
use crate::model::rulebook::Confidence;
use crate::quantity::show::{Toward, Units};
use crate::quantity::{Amount, Kind, Measure};
use crate::report::model::{NeedRow, Needs, Phrase, RunKind};
use crate::results::need::{confidence, end_word, limit_amount};
use std::collections::{BTreeMap, BTreeSet};

/// The limits of a point.
pub(super) fn needs(case: &Case<'_, '_>, steps: &Steps) -> Needs {
    let middle = &case.w.demands.middle;
    let governing: BTreeMap<End, usize> = middle
        .list
        .iter()
        .map(|d| d.end)
        .collect::<BTreeSet<End>>()
        .into_iter()
        .filter_map(|end| Some((end, middle.governing(end)?)))
        .collect();
    let governs = |i: usize| governing.get(&middle.list[i].end) == Some(&i);
    let mut order: Vec<usize> = (0..middle.list.len()).collect();
    order.sort_by_key(|i| {
        let d = &middle.list[*i];
        (d.end, !governs(*i), rank(d), *i)
    });
    Needs {
        degrees: case.degrees().unit().to_owned(),
        rows: order
            .into_iter()
            .map(|i| NeedRow {
                governs: governs(i),
                ..row(case, steps, i)
            })
            .collect(),
        notes: notes(case),
    }
}

fn rank(d: &Demand) -> u8 {
    match d.standing {
        Standing::Judges => 0,
        Standing::Condition => 1,
        Standing::Replaced { .. } => 2,
        Standing::Information => 3,
    }
}

/// Whether a limit is a least value.
pub(super) fn is_floor(end: End) -> bool {
    matches!(end, End::HotFloor | End::MakerGrade | End::PourMargin)
}

fn row(case: &Case<'_, '_>, steps: &Steps, i: usize) -> NeedRow {
    let middle = &case.w.demands.middle;
    let d = &middle.list[i];
    let t = middle.governing_temperature(d);
    let (limit, unit) = limit(case, i);
    let mut set_by = Phrase::new().and(asks(d, case.units()));
    match &d.only {
        For::All => {}
        For::With(tag) => set_by = quiet(set_by, &format!(" for oils with {tag} only")),
        For::Without(tag) => set_by = quiet(set_by, &format!(" for oils without {tag}")),
    }
    if let (Limit::Film(_), Some(lead)) = (&d.limit, case.lead)
        && let Some(nu) = u16::try_from(i)
            .ok()
            .and_then(|n| case.explained(n))
            .and_then(|e| e.limit)
    {
        let need = say::viscosity(nu.base(), case.units(), Toward::Up);
        let words = format!(" for a mineral oil; {} needs {need}", case.id(lead.oil));
        set_by = quiet(set_by, &words);
    }
    if let (Limit::OilsOwn, Some(lead)) = (&d.limit, case.lead)
        && let Some((continuous, most)) = case.ready(lead.oil).ceiling
    {
        set_by = quiet(set_by, &own_limit(case, lead.oil, continuous, most));
    }
    NeedRow {
        end: end_word(d.end).to_owned(),
        limit,
        unit,
        at: t.map_or_else(
            || "not known".to_owned(),
            |t| say::temperature_figure(t, case.units()),
        ),
        set_by,
        rule: rule(d, steps, case.units()),
        origin: Some(origin(d.whose)),
        confidence: (d.confidence != Confidence::High)
            .then(|| format!("confidence {}", confidence(d))),
        governs: false,
    }
}

/// ` O-13: 120 °C for long, 150 °C at most`.
fn own_limit(case: &Case<'_, '_>, oil: usize, continuous: Option<f64>, most: f64) -> String {
    let most = say::temperature(most, case.units());
    let id = case.id(oil);
    match continuous {
        Some(t) => {
            let t = say::temperature(t, case.units());
            format!(" {id}: {t} for long, {most} at most, by its base")
        }
        None => format!(" {id}: {most} at most"),
    }
}

fn quiet(phrase: Phrase, words: &str) -> Phrase {
    phrase.with(RunKind::Quiet, words)
}

/// Source, what became of the limit, and the step it comes from.
fn rule(d: &Demand, steps: &Steps, units: Units) -> Phrase {
    let mut phrase = Phrase::new().and(say::set(&d.source));
    if let Some((number, href)) = d.limit_step.and_then(|step| steps.of_demand(step)) {
        phrase = phrase
            .and(", ")
            .link(format!("step {number}"), href.clone());
    }
    match &d.standing {
        Standing::Judges => phrase,
        Standing::Replaced { by } => phrase.and(format!(
            "; replaced by {}: a condition where not met",
            say::told(by, units)
        )),
        Standing::Condition => phrase.and("; a condition where not met"),
        Standing::Information => phrase.and("; printed only"),
    }
}

/// The limit as shown and its unit; a range where an unknown input moves it.
pub(super) fn limit(case: &Case<'_, '_>, i: usize) -> (String, String) {
    let demands = &case.w.demands;
    let d = &demands.middle.list[i];
    let own = limit_amount(d, demands.middle.governing_temperature(d));
    let Some(own) = own else {
        return (own_words(d), String::new());
    };
    let (mut lo, mut hi) = (own.base, own.base);
    for setting in &demands.settings {
        let same = |o: &&Demand| {
            o.end == d.end && o.rule == d.rule && o.part == d.part && o.only == d.only
        };
        let there = setting.list.iter().find(same);
        let found = there.and_then(|o| limit_amount(o, setting.governing_temperature(o)));
        if let Some(found) = found {
            lo = lo.min(found.base);
            hi = hi.max(found.base);
        }
    }
    let floor = is_floor(d.end);
    let (sign, toward) = if floor {
        ("≥", Toward::Up)
    } else {
        ("≤", Toward::Down)
    };
    let figure = |base| say::parts(Amount { base, ..own }, case.units(), toward);
    let (first, unit) = figure(lo);
    let unit = if d.end == End::PourMargin && own.kind == Kind::Rise {
        format!("{unit} over the pour point")
    } else {
        unit
    };
    if hi - lo > 1e-9 * hi.abs() {
        (format!("{sign} {first} to {}", figure(hi).0), unit)
    } else {
        (format!("{sign} {first}"), unit)
    }
}

fn own_words(d: &Demand) -> String {
    match d.limit {
        Limit::OilsOwn => "the oil's own".to_owned(),
        Limit::UseLow => "the thickener's own".to_owned(),
        _ => "by oil".to_owned(),
    }
}

/// What could not be worked out, and figures that set no limit.
fn notes(case: &Case<'_, '_>) -> Vec<Phrase> {
    let middle = &case.w.demands.middle;
    let mut notes = Vec::new();
    for u in &middle.undecided {
        let part = u.part.as_deref().map_or("the point", |p| case.part_name(p));
        notes.push(
            Phrase::new()
                .strong("Not worked out: ")
                .and(say::stopped(&format!(
                    "{part}: {}",
                    say::told(&u.because, case.units())
                ))),
        );
    }
    for info in &middle.information {
        let part = info
            .part
            .as_ref()
            .map_or(String::new(), |p| format!("{}: ", case.part_name(p)));
        let figure = info.amount.map_or(String::new(), |a| {
            format!(": {}", say::amount(a, case.units(), Toward::Nearest))
        });
        let text = format!("{part}{}{figure}", say::told(&info.says, case.units()));
        notes.push(say::stopped(&say::sentence(&text)).into());
    }
    notes.extend(super::running::running(case));
    notes
}
