//! The sheet of a machine: its points weighed, told and signed.

use super::answer;
use super::case::Case;
use super::digest::{Digest, digest, gate};
use super::eligible::Numbers;
use super::plan::On;
use super::point::{Counts, point};
use super::say;
use super::{Made, Report, caution, sign};
use crate::quantity::Measure;
use crate::relation::Law;
use crate::report::model::{Answer, Body, MachineSheet, Phrase, Point, Sheet};
use crate::weighing::Weighed;
use std::collections::BTreeMap;

/// The sheet of a machine and what is kept of it.
pub(super) struct OfMachine {
    pub(super) made: Made,
    pub(super) digests: Vec<Digest>,
    pub(super) laws: BTreeMap<&'static str, &'static Law>,
}

/// Weighs a machine and makes its sheet.
pub(super) fn machine(report: &Report<'_>, place: usize) -> OfMachine {
    let plan = &report.plan.machines[place];
    let run = &report.run;
    let weighed: Vec<Weighed<'_>> = plan.points.iter().map(|p| run.scales.weigh(p)).collect();
    let cases: Vec<Case<'_, '_>> = weighed
        .iter()
        .enumerate()
        .map(|(i, w)| Case::new(run, w, format!("p{}", i + 1), &plan.place))
        .collect();
    let (mut numbers, mut counts) = (Numbers::new(run.scales.rules), Counts::default());
    let mut laws = BTreeMap::new();
    let (mut points, mut digests): (Vec<Point>, _) = (Vec::new(), Vec::new());
    for case in &cases {
        let of = (cases.len() > 1, report.plan.machines.len());
        let told = point(case, &mut numbers, &mut counts, of, points.first());
        laws.extend(told.laws);
        let local = (cases.len() > 1).then_some(case.key.as_str());
        let href = plan.place.href(report.plan.bundle, local);
        digests.push(digest(case, &told.gaps, href));
        points.push(told.point);
    }
    let answer = whole(&cases, &mut points);
    let made = Made {
        tag: plan.tag.to_owned(),
        headline: answer.headline.clone(),
        gate: cases.iter().filter_map(gate).max(),
        state: digests
            .iter()
            .map(|d| d.state)
            .min()
            .unwrap_or_default()
            .title(),
        sheet: sheet(report, place, answer, &cases, points),
    };
    OfMachine {
        made,
        digests,
        laws,
    }
}

/// The answer of the machine: its point's, or one over all its points.
fn whole(cases: &[Case<'_, '_>], points: &mut [Point]) -> Answer {
    if let ([_], [point]) = (cases, &mut *points) {
        return std::mem::take(&mut point.answer);
    }
    let named: Vec<(String, Answer)> = points
        .iter()
        .map(|p| (p.name.clone().unwrap_or_default(), p.answer.clone()))
        .collect();
    let oils: Vec<Option<String>> = cases
        .iter()
        .map(|c| {
            let lead = c.lead.filter(|_| c.proposed)?;
            Some(c.id(lead.oil).to_owned())
        })
        .collect();
    answer::of_several(&named, &oils)
}

fn sheet(
    report: &Report<'_>,
    place: usize,
    answer: Answer,
    cases: &[Case<'_, '_>],
    points: Vec<Point>,
) -> Sheet {
    let plan = &report.plan.machines[place];
    let first = cases[0].w.point;
    let title = first.title.as_deref().unwrap_or("");
    let mut notes: Vec<&str> = cases
        .iter()
        .flat_map(|c| c.w.point.notes.iter().map(String::as_str))
        .collect();
    // Points share the notes of their machine.
    notes.dedup();
    let body = MachineSheet {
        answer,
        caution: caution::caution(cases),
        work_order: sign::work_order(cases, &points),
        cautions: caution::notes(cases),
        notes: (!notes.is_empty()).then(|| notes.join("\n\n")),
        sign: sign::of_machine(cases, &points),
        points,
    };
    let about = if title.is_empty() {
        plan.tag.to_owned()
    } else {
        format!("{}, {title}", plan.tag)
    };
    Sheet {
        place: plan.place.clone(),
        number: plan.number,
        of: report.plan.of,
        name: plan.tag.to_owned(),
        subtitle: title.to_owned(),
        about: about_it(cases),
        title: format!("{about}: viscosity needed and oil proposed"),
        nav: report.plan.nav(On::Machine(place)),
        body: Body::Machine(Box::new(body)),
    }
}

/// Where it stands, how it is lubricated, what it holds, how many there are.
fn about_it(cases: &[Case<'_, '_>]) -> Phrase {
    let first = cases[0].w.point;
    let mut parts: Vec<String> = Vec::new();
    if let Some(area) = &first.area {
        parts.push(area.clone());
    }
    if let [only] = cases {
        parts.extend(of_point(only));
    }
    if first.count > 1 {
        parts.push(format!("{} of them", first.count));
    }
    if let Some(row) = first.register_row {
        parts.push(format!("register row {row}"));
    }
    say::stopped(&say::sentence(&parts.join(", "))).into()
}

/// How a point is lubricated, what it holds and what it serves.
pub(super) fn of_point(case: &Case<'_, '_>) -> Vec<String> {
    let point = case.w.point;
    let mut parts = Vec::new();
    if let Some(l) = &point.lubrication {
        parts.push(format!("lubrication {}", l.value.word()));
    }
    parts.extend(sign::fill(case));
    if let Some((cold, hot)) = case.w.demands.middle.thermal.ambient {
        parts.push(format!(
            "ambient {} to {}",
            say::temperature_figure(cold.value.base(), case.units()),
            say::temperature(hot.value.base(), case.units())
        ));
    } else {
        parts.push("ambient not stated".to_owned());
    }
    parts
}
