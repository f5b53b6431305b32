//! The gaps of the whole site: those that pick an oil or a verdict one by one, facts that only
//! settle a condition together, whatever machine they are missing on.

use super::digest::Digest;
use super::gaps::{Weight, head, span};
use super::{Report, say};
use crate::report::model::{GapRow, Gaps, Phrase};

/// Rows on the overview at most.
const ROWS: usize = 20;
/// Machines named in one row at most.
const NAMED: usize = 6;

/// The table of the overview.
pub(super) fn gaps(report: &Report<'_>) -> Gaps {
    let mut rows = telling(report);
    rows.extend(facts(report));
    let left = rows.len().saturating_sub(ROWS);
    rows.truncate(ROWS);
    let span = span(rows.iter().filter_map(|r| r.bar.as_ref()));
    for (n, row) in rows.iter_mut().enumerate() {
        row.id = (n + 1).to_string();
        if let Some(bar) = &mut row.bar {
            bar.id = format!("gap-{}", n + 1);
            bar.span = span;
        }
    }
    let drawn = rows.iter().any(|r| r.bar.is_some());
    Gaps {
        head: drawn.then(|| head("gap-head".to_owned(), span)),
        rows,
        idle: rest(report, left),
    }
}

fn rest(report: &Report<'_>, left: usize) -> Phrase {
    let mut words = Vec::new();
    if left > 0 {
        let n = say::sentence(&say::number(left));
        words.push(format!("{n} more stand on the sheets of their machines."));
    }
    let idle: usize = report.kept.machines.iter().flatten().map(|d| d.idle).sum();
    if idle > 0 {
        let n = say::count(
            idle,
            "missing or assumed input",
            "missing or assumed inputs",
        );
        words.push(format!("{} would decide nothing.", say::sentence(&n)));
    }
    words.join(" ").into()
}

/// Gaps that pick an oil or a verdict, the most telling first, each with its machine.
fn telling(report: &Report<'_>) -> Vec<GapRow> {
    let mut all: Vec<(Weight, usize, &GapRow, &Digest)> = Vec::new();
    for (i, points) in report.kept.machines.iter().enumerate() {
        for digest in points {
            let gaps = digest.gaps.iter().filter(|(w, _)| *w < Weight::Condition);
            all.extend(gaps.map(|(w, row)| (*w, i, row, digest)));
        }
    }
    all.sort_by_key(|(weight, machine, _, _)| (*weight, *machine));
    all.into_iter()
        .map(|(_, i, row, digest)| {
            let mut row = row.clone();
            let on_sheet = format!("{}, {}", report.plan.machines[i].tag, row.id);
            row.machine = Some(Phrase::new().link(on_sheet, digest.href.clone()));
            // links of a machine's sheet lead nowhere here
            row.decides = row.decides.text().into();
            row
        })
        .collect()
}

/// Facts that settle a condition, each once with its machines; those missing on most come first.
fn facts(report: &Report<'_>) -> Vec<GapRow> {
    let mut all: Vec<(&GapRow, Vec<(usize, &Digest)>)> = Vec::new();
    for (i, points) in report.kept.machines.iter().enumerate() {
        for digest in points {
            for (weight, row) in &digest.gaps {
                if *weight != Weight::Condition {
                    continue;
                }
                match all
                    .iter_mut()
                    .find(|(known, _)| known.missing == row.missing)
                {
                    Some((_, machines)) if machines.last().is_some_and(|(m, _)| *m == i) => {}
                    Some((_, machines)) => machines.push((i, digest)),
                    None => all.push((row, vec![(i, digest)])),
                }
            }
        }
    }
    all.sort_by_key(|(_, machines)| std::cmp::Reverse(machines.len()));
    all.into_iter()
        .map(|(row, machines)| {
            let n = machines.len();
            GapRow {
                machine: Some(named(report, &machines)),
                missing: row.missing.clone(),
                plausible: "not stated".to_owned(),
                decides: match n {
                    1 => "a condition".into(),
                    n => format!("a condition on {} machines", say::number(n)).into(),
                },
                ask: row.ask.clone(),
                ..GapRow::default()
            }
        })
        .collect()
}

fn named(report: &Report<'_>, machines: &[(usize, &Digest)]) -> Phrase {
    let mut phrase = Phrase::new();
    for (i, (m, digest)) in machines.iter().take(NAMED).enumerate() {
        if i > 0 {
            phrase = phrase.and(", ");
        }
        phrase = phrase.link(report.plan.machines[*m].tag, digest.href.clone());
    }
    if machines.len() > NAMED {
        phrase = phrase.and(format!(" and {} more", machines.len() - NAMED));
    }
    phrase
}
