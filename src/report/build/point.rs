//! One lubrication point of a machine's sheet.

use super::ambient::{ambient, axis, drawn, mini, place_gets};
use super::assumed::assumptions;
use super::barred::barred;
use super::candidates::{bars, candidates};
use super::case::{Case, mark};
use super::changes::changes;
use super::curves::curves;
use super::eligible::{Numbers, conditions};
use super::gaps::{self, Found};
use super::inputs;
use super::needs::needs;
use super::steps::{Steps, steps};
use super::vary::Tolerances;
use super::{answer, machine, say};
use crate::relation::Law;
use crate::report::draw::band::MiniBand;
use crate::report::draw::margin_bars::MarginBars;
use crate::report::model::{Phrase, Point, Summary};
use std::collections::BTreeMap;
use std::fmt::Write as _;

/// How many assumptions and gaps a sheet has numbered already.
#[derive(Clone, Copy, Debug, Default)]
pub(super) struct Counts {
    assumptions: u32,
    gaps: u32,
}

/// A point told, with what others need of it.
pub(super) struct Told {
    pub(super) point: Point,
    pub(super) gaps: Vec<Found>,
    pub(super) laws: BTreeMap<&'static str, &'static Law>,
}

/// Tells a point; `named` where its machine has several, with how many machines the report has and
/// the first of its points beside the others.
pub(super) fn point(
    case: &Case<'_, '_>,
    numbers: &mut Numbers,
    counts: &mut Counts,
    (named, machines): (bool, usize),
    first: Option<&Point>,
) -> Told {
    let conditions = conditions(case, numbers);
    let tolerances = Tolerances::new(case);
    let (steps, steps_as) = calculation(case, first);
    let found = gaps::found(case, numbers, &mut counts.gaps);
    let assumptions = assumptions(case, &found, &mut counts.assumptions);
    let address = case.w.point.address();
    let point = Point {
        key: case.key.clone(),
        name: named.then(|| {
            let name = case.w.point.point.as_deref();
            name.unwrap_or(&case.w.point.machine).to_owned()
        }),
        about: if named {
            say::stopped(&say::sentence(&machine::of_point(case).join(", "))).into()
        } else {
            Phrase::new()
        },
        answer: answer::answer(case),
        summary: summary(case, &tolerances),
        needs: needs(case, &steps),
        inputs: inputs::lines(case),
        curves: curves(case),
        candidates: candidates(case, numbers, &tolerances),
        barred: barred(case),
        conditions,
        ambient: ambient(case),
        changes: changes(case, &found, machines),
        change_over: Vec::new(),
        steps_command: command(case, &address),
        steps: steps.list,
        steps_as,
        assumptions,
        gaps: gaps::table(case, &found),
    };
    Told {
        point,
        gaps: found,
        laws: steps.laws,
    }
}

/// The steps of a point; none where they are those of the first point of its machine, figure for
/// figure, which is then named.
fn calculation(case: &Case<'_, '_>, first: Option<&Point>) -> (Steps, Option<String>) {
    if let Some(first) = first {
        let mut as_first = steps(case, &first.key);
        if !first.steps.is_empty() && as_first.list == first.steps {
            as_first.list.clear();
            let name = first.name.clone().unwrap_or_else(|| first.key.clone());
            return (as_first, Some(name));
        }
    }
    (steps(case, &case.key), None)
}

/// The command that prints the steps again.
fn command(case: &Case<'_, '_>, address: &str) -> String {
    let Some(lead) = case.lead else {
        return String::new();
    };
    let flags = &case.run.options.flags;
    let quoted = |word: &str| {
        let plain = |c: char| c.is_ascii_alphanumeric() || "-_./".contains(c);
        if word.chars().all(plain) {
            word.to_owned()
        } else {
            format!("\"{word}\"")
        }
    };
    format!(
        "filmwright why {} {}{flags}",
        quoted(address),
        quoted(case.id(lead.oil))
    )
}

/// The small figure beside the answer; none where no oil is proposed.
fn summary(case: &Case<'_, '_>, tolerances: &Tolerances) -> Option<Summary> {
    let lead = case.lead.filter(|_| case.proposed)?;
    let mut bars = bars(case, lead, case.local("bars-sum"), tolerances);
    bars.bars.retain(|b| b.steps.is_some());
    bars.span = MarginBars::span_of(&bars.bars);
    bars.axis = true;
    let need = place_gets(case);
    let of = drawn(lead.judgement.band);
    let axis_c = axis(need);
    let word = mark(lead.judgement.verdict);
    let band = need.map(|need| MiniBand {
        degrees: case.degrees(),
        ..mini(case.local("band-sum"), need, (None, of), word, axis_c)
    });
    let band_axis = band.as_ref().map(|band| MiniBand {
        id: case.local("band-sum-axis"),
        head: true,
        ..band.clone()
    });
    let mut says = "Margins are rounded down. Light hatching: the reserve asked.".to_owned();
    if !tolerances.inputs.is_empty() {
        let _ = write!(
            says,
            " Thin line: the margin over the stated tolerance of {}.",
            say::list(&tolerances.inputs)
        );
    }
    if bars.bars.iter().any(|b| b.as_new.is_some()) {
        says.push_str(" Dashed: as new.");
    }
    if band.is_some() {
        let _ = write!(
            says,
            " Ambient: {}, uprights what {} gets.",
            say::band(lead.judgement.band, case.degrees()),
            case.where_it_stands()
        );
    }
    if bars.bars.is_empty() {
        return None;
    }
    Some(Summary {
        oil: case.id(lead.oil).to_owned(),
        bars,
        band,
        band_axis,
        says,
    })
}
