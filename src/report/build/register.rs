//! The parts list: every machine by state, what is in it, what is proposed, the next move.

use super::Report;
use super::answer::badness;
use super::digest::Digest;
use super::overview::of_machine;
use super::state::{Pressing, State};
use crate::report::model::{Answer, Caution, Mark, Paper, Phrase, RegisterGroup, RegisterRow};

/// Lines of the list that the first printed page has room for, beside the answer with what to do
/// first and the caution.
pub(super) fn on_first_page(
    paper: Paper,
    answer: &Answer,
    first: &[Phrase],
    caution: &Caution,
) -> usize {
    let folded = |text: &str, wide: usize| text.chars().count().div_ceil(wide).max(1);
    let said: usize = answer
        .sentences
        .iter()
        .map(|p| p.text().chars().count())
        .sum();
    let left = 2 * folded(&answer.headline, 36) + said.div_ceil(62);
    let right = 1 + first.iter().map(|p| folded(&p.text(), 58)).sum::<usize>();
    let defer: String = caution.defer.iter().map(Phrase::text).collect();
    let before: String = caution.before.iter().map(Phrase::text).collect();
    let cautions: usize = [
        caution.judged.join("; "),
        caution.not_judged.join("; "),
        defer,
        before,
    ]
    .iter()
    .map(|text| folded(text, 112))
    .sum();
    let all = match paper {
        Paper::A4 => 33,
        Paper::Letter => 27,
    };
    usize::saturating_sub(all, left.max(right) + cautions).max(3)
}

/// Lines a row takes in print: the columns for the name and the move are so many letters wide.
fn lines(row: &RegisterRow) -> usize {
    let name = row.name.chars().count().div_ceil(40);
    let next = row.next.text().chars().count().div_ceil(38);
    name.max(next).max(1)
}

/// The groups, at most so many lines in all; what is left out is counted.
pub(super) fn groups(
    report: &Report<'_>,
    machines: &[usize],
    at_most: Option<usize>,
) -> Vec<RegisterGroup> {
    let mut room = at_most.unwrap_or(usize::MAX);
    let mut item = 0;
    let mut groups = Vec::new();
    for state in State::ALL {
        let mut of_state: Vec<usize> = machines
            .iter()
            .copied()
            .filter(|m| of_machine(&report.kept.machines[*m]) == state)
            .collect();
        if of_state.is_empty() {
            continue;
        }
        of_state.sort_by_key(|m| (pressing(&report.kept.machines[*m]), *m));
        let count = of_state.len();
        let mut rows: Vec<RegisterRow> = Vec::new();
        for m in of_state {
            let row = row(report, m, item + 1);
            // every state shows at least its most pressing machine
            if lines(&row) > room && !rows.is_empty() {
                break;
            }
            room = room.saturating_sub(lines(&row));
            item += 1;
            rows.push(row);
        }
        let left = count - rows.len();
        groups.push(RegisterGroup {
            title: state.title().to_owned(),
            count: u32::try_from(count).unwrap_or(u32::MAX),
            rows,
            more: match (left, report.plan.areas.is_empty()) {
                (0, _) => String::new(),
                (n, true) => format!("{n} more in the table of machines"),
                (n, false) => format!("{n} more on the sheets of their areas"),
            },
        });
    }
    groups
}

/// The most pressing of a machine's points.
pub(super) fn pressing(points: &[Digest]) -> Pressing {
    points
        .iter()
        .map(|d| d.pressing)
        .min()
        .unwrap_or(Pressing::Nothing)
}

/// Words that differ from point to point, each once.
fn joined(points: &[Digest], word: impl Fn(&Digest) -> String) -> String {
    let mut all: Vec<String> = Vec::new();
    for digest in points {
        let word = word(digest);
        if !word.is_empty() && !all.contains(&word) {
            all.push(word);
        }
    }
    all.join(", ")
}

/// What stands where no oil is proposed.
pub(super) fn no_oil(best: Option<Mark>) -> &'static str {
    match best {
        Some(Mark::Open) => "not decided",
        _ => "none serves",
    }
}

fn row(report: &Report<'_>, machine: usize, item: u32) -> RegisterRow {
    let plan = &report.plan.machines[machine];
    let points = &report.kept.machines[machine];
    let worst = |marks: Vec<Option<Mark>>| marks.into_iter().flatten().max_by_key(|m| badness(*m));
    let conditions = points.iter().map(|d| d.conditions).max().unwrap_or(0);
    let proposed = points.iter().any(|d| d.oil.is_some());
    RegisterRow {
        item,
        tag: Phrase::new().link(plan.tag, report.plan.href(&plan.place)),
        name: points.first().map_or(String::new(), |d| d.title.clone()),
        now_mark: worst(points.iter().map(|d| d.now_mark).collect()),
        now: joined(points, |d| d.now.clone()),
        mark: worst(points.iter().map(|d| d.mark).collect()),
        oil: if proposed {
            joined(points, |d| {
                d.oil.map_or("none".to_owned(), |o| report.oil_id(o))
            })
        } else {
            no_oil(points.iter().find_map(|d| d.mark)).to_owned()
        },
        conditions: match conditions {
            0 => String::new(),
            _ if !proposed => String::new(),
            1 => "1 condition".to_owned(),
            n => format!("{n} conditions"),
        },
        next: next(points, &plan.place, report),
    }
}

/// The next move: the same for all points, or that of the most pressing one.
fn next(points: &[Digest], place: &crate::report::names::Place, report: &Report<'_>) -> Phrase {
    let Some(most) = points.iter().min_by_key(|d| d.pressing) else {
        return Phrase::new();
    };
    if points.iter().all(|d| d.next == most.next) {
        return most.next.clone();
    }
    Phrase::new().link(
        format!("{} lubrication points: see its sheet", points.len()),
        report.plan.href(place),
    )
}
