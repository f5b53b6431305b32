//! What to do first, in order, machines with the same move together.

use super::digest::Digest;
use super::state::Pressing;
use super::{Report, say};
use crate::quantity::show::Toward;
use crate::quantity::{Measure, Volume};
use crate::report::model::Phrase;

/// Lines at most; the parts list has all of them.
const LINES: usize = 6;
/// Tags named on one line at most.
const TAGS: usize = 6;

/// One move, and the points it is for.
struct Move<'r> {
    pressing: Pressing,
    now: &'r str,
    oil: Option<usize>,
    /// What to find out, where that is the move.
    ask: String,
    points: Vec<(usize, &'r Digest)>,
}

/// The moves of the site in order.
pub(super) fn first(report: &Report<'_>) -> Vec<Phrase> {
    let mut moves: Vec<Move<'_>> = Vec::new();
    for (machine, points) in report.kept.machines.iter().enumerate() {
        for digest in points {
            if digest.pressing == Pressing::Nothing {
                continue;
            }
            let ask = if digest.pressing == Pressing::Open {
                digest.next.text()
            } else {
                String::new()
            };
            let same = |m: &Move<'_>| {
                m.pressing == digest.pressing
                    && m.now == digest.now
                    && m.oil == digest.oil
                    && m.ask == ask
            };
            match moves.iter_mut().find(|m| same(m)) {
                Some(known) => known.points.push((machine, digest)),
                None => moves.push(Move {
                    pressing: digest.pressing,
                    now: &digest.now,
                    oil: digest.oil,
                    ask,
                    points: vec![(machine, digest)],
                }),
            }
        }
    }
    moves.sort_by_key(|m| (m.pressing, m.points[0].0));
    let left = moves.len().saturating_sub(LINES);
    let mut lines: Vec<Phrase> = moves.iter().take(LINES).map(|m| line(report, m)).collect();
    if left > 0 {
        lines.push(
            format!(
                "{} in the parts list.",
                say::sentence(&say::count(left, "more move", "more moves"))
            )
            .into(),
        );
    }
    lines
}

fn line(report: &Report<'_>, m: &Move<'_>) -> Phrase {
    let phrase = tags(report, m);
    let oil = m.oil.map(|o| report.oil_id(o));
    let bare = m.now.trim_end_matches(", barred");
    match (m.pressing, oil) {
        (Pressing::Barred, Some(oil)) => phrase
            .and(format!(": {bare} is barred there. Change to "))
            .tag(oil)
            .and(volume(report, m))
            .and("."),
        (Pressing::Barred, None) => phrase.and(format!(
            ": {bare} is barred there, and no oil on the list serves."
        )),
        (Pressing::Fails, Some(oil)) => phrase
            .and(format!(": {bare} fails. Change to "))
            .tag(oil)
            .and(volume(report, m))
            .and("."),
        (Pressing::Fails, None) => {
            phrase.and(format!(": {bare} fails, and no oil on the list holds."))
        }
        (Pressing::NotKnown, Some(oil)) if m.now == "empty" => phrase
            .and(": fill with ")
            .tag(oil)
            .and(volume(report, m))
            .and("."),
        (Pressing::NotKnown, Some(oil)) => phrase
            .and(": find out what is in it, then change to ")
            .tag(oil)
            .and("."),
        (Pressing::NotKnown, None) => phrase.and(": no oil on the list serves."),
        (Pressing::Tight, Some(oil)) if oil != bare => phrase
            .and(format!(
                ": {bare} is tight. Accept that by name, or change to "
            ))
            .tag(oil)
            .and("."),
        (Pressing::Tight, _) => phrase.and(format!(": {bare} is tight. Accept that by name.")),
        (Pressing::Open | Pressing::Nothing, _) => phrase.and(format!(": {}", lowered(&m.ask))),
    }
}

fn lowered(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| {
        first.to_lowercase().chain(letters).collect()
    })
}

/// The machines by tag, each with its link.
fn tags(report: &Report<'_>, m: &Move<'_>) -> Phrase {
    let mut phrase = Phrase::new();
    let mut named: Vec<usize> = Vec::new();
    for (machine, _) in &m.points {
        if !named.contains(machine) {
            named.push(*machine);
        }
    }
    for (i, machine) in named.iter().take(TAGS).enumerate() {
        let plan = &report.plan.machines[*machine];
        if i > 0 {
            phrase = phrase.and(", ");
        }
        phrase = phrase.link(plan.tag, report.plan.href(&plan.place));
    }
    if named.len() > TAGS {
        phrase = phrase.and(format!(" and {} more", named.len() - TAGS));
    }
    phrase
}

/// `, 272 L`: their fills together, where all are known.
fn volume(report: &Report<'_>, m: &Move<'_>) -> String {
    let fills: Option<Vec<f64>> = m.points.iter().map(|(_, d)| Some(d.fill?.base())).collect();
    fills.map_or(String::new(), |all| {
        let total = Volume::from_base(all.iter().sum());
        let shown = say::amount(total.amount(), report.run.scales.units, Toward::Nearest);
        format!(", {shown}")
    })
}
