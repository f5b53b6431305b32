//! The oils proposed, and every oil on every machine.

use super::answer::badness;
use super::digest::{Cell, Digest};
use super::{Report, say};
use crate::quantity::show::Toward;
use crate::quantity::{Measure, Volume};
use crate::report::model::{Mark, Matrix, MatrixCell, MatrixRow, OilRow, Phrase};
use std::collections::BTreeMap;

/// Sites of more points than this get no table of every oil on every machine: it is for looking up.
pub(super) const MATRIX: usize = 60;
/// Oils in one table: as many as a printed page is wide.
const OILS: usize = 11;
/// Machines named in one row at most.
const NAMED: usize = 12;

/// The oils proposed, the most used first.
pub(super) fn oils(report: &Report<'_>) -> Vec<OilRow> {
    let mut by_oil: BTreeMap<usize, Vec<(usize, &Digest)>> = BTreeMap::new();
    for (machine, points) in report.kept.machines.iter().enumerate() {
        for digest in points {
            if let Some(oil) = digest.oil {
                by_oil.entry(oil).or_default().push((machine, digest));
            }
        }
    }
    let mut rows: Vec<(usize, OilRow)> = by_oil
        .into_iter()
        .map(|(oil, points)| (points.len(), row(report, oil, &points)))
        .collect();
    rows.sort_by_key(|(n, _)| std::cmp::Reverse(*n));
    rows.into_iter().map(|(_, row)| row).collect()
}

fn row(report: &Report<'_>, oil: usize, points: &[(usize, &Digest)]) -> OilRow {
    let site = report.run.scales.site;
    let mark = |d: &Digest| d.mark.unwrap_or_default();
    let worst = points
        .iter()
        .max_by(|(_, a), (_, b)| {
            let by_margin = |d: &Digest| d.smallest.unwrap_or(f64::INFINITY);
            badness(mark(a))
                .cmp(&badness(mark(b)))
                .then_with(|| by_margin(b).total_cmp(&by_margin(a)))
        })
        .copied();
    let mut replaced: Vec<&str> = points
        .iter()
        .map(|(_, d)| d.now.trim_end_matches(", barred"))
        .filter(|now| *now != site.oils[oil].id && site.oil(now).is_some())
        .collect();
    replaced.sort_unstable();
    replaced.dedup();
    OilRow {
        oil: report.run.oil_link(oil),
        name: site.oils[oil].name.clone().unwrap_or_default(),
        machines: machines(report, points),
        fill: fills(report, points),
        mark: worst.map_or(Mark::Open, |(_, d)| mark(d)),
        tightest: worst.map_or(String::new(), |(m, d)| {
            let tag = report.plan.machines[m].tag;
            if d.margin.is_empty() {
                tag.to_owned()
            } else {
                format!("{} at {tag}", d.margin)
            }
        }),
        replaces: if replaced.is_empty() {
            "nothing".to_owned()
        } else {
            replaced.join(", ")
        },
    }
}

fn machines(report: &Report<'_>, points: &[(usize, &Digest)]) -> Phrase {
    let mut named: Vec<usize> = points.iter().map(|(m, _)| *m).collect();
    named.dedup();
    let mut phrase = Phrase::new();
    for (i, m) in named.iter().take(NAMED).enumerate() {
        let plan = &report.plan.machines[*m];
        if i > 0 {
            phrase = phrase.and(", ");
        }
        phrase = phrase.link(plan.tag, report.plan.href(&plan.place));
    }
    if named.len() > NAMED {
        phrase = phrase.and(format!(" and {} more", named.len() - NAMED));
    }
    phrase
}

/// The fills that are known, together; what is not known is said.
fn fills(report: &Report<'_>, points: &[(usize, &Digest)]) -> String {
    let known: Vec<f64> = points
        .iter()
        .filter_map(|(_, d)| Some(d.fill?.base()))
        .collect();
    let missing = points.len() - known.len();
    if known.is_empty() {
        return "not stated".to_owned();
    }
    let total = Volume::from_base(known.iter().sum());
    let shown = say::amount(total.amount(), report.run.scales.units, Toward::Nearest);
    match missing {
        0 => shown,
        n => format!("{shown}, {n} not stated"),
    }
}

/// What the list is and is not, and where every oil's own sheet is.
pub(super) fn notes(report: &Report<'_>) -> Vec<Phrase> {
    let mut points = report.kept.machines.iter().flatten();
    let mut notes: Vec<Phrase> = Vec::new();
    if points.any(|d| d.oil.is_some()) {
        notes.push("The table names for each machine its own first choice. A shorter list for all of them together is told below the figure.".into());
    }
    if !report.plan.oils.is_empty() {
        let mut all = Phrase::new().strong("Sheets of all oils: ");
        for oil in 0..report.plan.oils.len() {
            if oil > 0 {
                all = all.and(", ");
            }
            let fixed = &report.plan.oils[oil];
            all = all.tag_link(report.oil_id(oil), report.plan.href(&fixed.place));
        }
        notes.push(all.and("."));
    }
    notes
}

/// Every oil on every machine, in tables of so many oils; none on large sites.
pub(super) fn matrix(report: &Report<'_>) -> Vec<Matrix> {
    let points = || report.kept.machines.iter().flatten();
    if points().count() > MATRIX {
        return Vec::new();
    }
    let mut used: Vec<usize> = points()
        .flat_map(|d| d.cells.iter().map(|c| c.oil))
        .collect();
    used.sort_unstable();
    used.dedup();
    used.chunks(OILS).map(|oils| block(report, oils)).collect()
}

/// One table: its oils, and the machines one of them was looked at on.
fn block(report: &Report<'_>, oils: &[usize]) -> Matrix {
    let site = report.run.scales.site;
    let mut rows = Vec::new();
    for (m, digests) in report.kept.machines.iter().enumerate() {
        let plan = &report.plan.machines[m];
        for d in digests {
            if !d.cells.iter().any(|c| oils.contains(&c.oil)) {
                continue;
            }
            let tag = match &d.point {
                Some(point) if digests.len() > 1 => format!("{}, {point}", plan.tag),
                _ => plan.tag.to_owned(),
            };
            rows.push(MatrixRow {
                tag: Phrase::new().link(tag, d.href.clone()),
                cells: oils.iter().map(|oil| cell(d, *oil)).collect(),
            });
        }
    }
    Matrix {
        oils: oils.iter().map(|o| site.oils[*o].id.clone()).collect(),
        rows,
    }
}

fn cell(d: &Digest, oil: usize) -> MatrixCell {
    let Some(found) = d.cells.iter().find(|c| c.oil == oil) else {
        return MatrixCell {
            text: "·".to_owned(),
            words: "not weighed".to_owned(),
            ..MatrixCell::default()
        };
    };
    let picked = d.oil == Some(oil);
    let Cell {
        mark,
        margin,
        in_use,
        ..
    } = found;
    let mut words = Vec::new();
    if picked {
        words.push("proposed".to_owned());
    }
    if *in_use {
        words.push("in use".to_owned());
    }
    words.push(mark.map_or("barred".to_owned(), |m| m.word().to_owned()));
    let text = match (mark, margin) {
        (None, _) => "barred".to_owned(),
        (Some(_), Some(m)) => say::steps(*m, 1),
        (Some(_), None) => "\u{2013}".to_owned(),
    };
    MatrixCell {
        mark: *mark,
        text,
        words: words.join(", "),
        picked,
        in_use: *in_use,
    }
}
