//! The oils weighed, best first, with their margins as bars.

use super::case::{Case, mark};
use super::eligible::{self, Numbers};
use super::say;
use super::vary::Tolerances;
use crate::judge::order::IN_WORDS;
use crate::judge::weigh::{At, Margin, weigh};
use crate::quantity::Measure;
use crate::quantity::show::{Toward, Units, fixed};
use crate::report::draw::margin_bars::{MarginBar, MarginBars};
use crate::report::model::{Candidate as Row, Candidates, Phrase, RunKind, minus};
use crate::weighing::Candidate;
use std::fmt::Write as _;

/// A list of so many oils is told with bars and every reason.
const ALL_IN_FULL: usize = 16;
/// Of a longer one so many, the rest in figures, so that a sheet stays one to read.
const FIRST_IN_FULL: usize = 8;

/// The table; none where nothing was weighed.
pub(super) fn candidates(
    case: &Case<'_, '_>,
    numbers: &mut Numbers,
    tolerances: &Tolerances,
) -> Option<Candidates> {
    let lead = case.lead?;
    let (hot, cold) = (lead.judgement.at_hot, lead.judgement.at_start);
    let all = &case.w.candidates;
    let in_full = if all.len() > ALL_IN_FULL {
        FIRST_IN_FULL
    } else {
        ALL_IN_FULL
    };
    let mut rows: Vec<Row> = all
        .iter()
        .enumerate()
        .map(|(i, c)| {
            let mut row = row(case, c, (hot, cold), numbers, tolerances);
            if i >= in_full && !row.picked && !row.in_use {
                row.reason = reason(c, 1, case.units());
                row.bars.bars.clear();
            }
            row
        })
        .collect();
    let span = MarginBars::span_of(rows.iter().flat_map(|r| &r.bars.bars));
    let last = rows.iter().rposition(|r| !r.bars.bars.is_empty());
    for (i, row) in rows.iter_mut().enumerate() {
        row.bars.span = span;
        row.bars.axis = Some(i) == last;
    }
    let mut order = format!("{IN_WORDS} Sheared oils by their worn line when hot.");
    if rows.len() > in_full {
        let _ = write!(
            order,
            " After the first {in_full}, but for the oil in use, margins stand in figures and with the main reason alone: the command filmwright why tells the rest."
        );
    }
    Some(Candidates {
        limits: limits(case),
        hot_head: head(case, hot),
        cold_head: head(case, cold),
        rows,
        order,
        not_weighed: Vec::new(),
        notes: eligible::notes(case),
    })
}

/// The governing limits and the reserve in words.
fn limits(case: &Case<'_, '_>) -> String {
    let middle = &case.w.demands.middle;
    let mut parts = Vec::new();
    for end in super::ENDS {
        let Some(i) = middle.governing(end) else {
            continue;
        };
        let (limit, unit) = super::needs::limit(case, i);
        let t = middle.governing_temperature(&middle.list[i]);
        let at = t.map_or(String::new(), |t| {
            format!(" at {}", say::temperature(t, case.units()))
        });
        parts.push(format!("{limit} {unit}{at}").replace("  ", " "));
    }
    let reserve = case.run.scales.reserve;
    let asked = format!("Reserve asked: {} step", fixed(reserve, 2, Toward::Nearest));
    if parts.is_empty() {
        format!("{asked}.")
    } else {
        format!("Limits: {}. {asked}.", parts.join(", "))
    }
}

fn head(case: &Case<'_, '_>, at: Option<At>) -> String {
    let unit = say::parts(
        crate::quantity::KinematicViscosity::from_base(1e-6).amount(),
        case.units(),
        Toward::Nearest,
    )
    .1;
    at.map_or_else(
        || unit.clone(),
        |a| format!("{unit}, {}", say::temperature(a.t, case.units())),
    )
}

fn row(
    case: &Case<'_, '_>,
    c: &Candidate,
    (hot, cold): (Option<At>, Option<At>),
    numbers: &mut Numbers,
    tolerances: &Tolerances,
) -> Row {
    let j = &c.judgement;
    let oil = case.oil(c.oil);
    let letter = case.letter(c);
    Row {
        oil: case.run.oil_link(c.oil),
        name: oil.name.clone().unwrap_or_default(),
        picked: case.picked(c),
        in_use: c.in_use,
        mark: mark(j.verdict),
        hot: reading(case, j.at_hot, hot, Toward::Down),
        cold: reading(case, j.at_start, cold, Toward::Up),
        bars: bars(case, c, case.local(&format!("bars-{letter}")), tolerances),
        margins: in_words(c),
        kelvins: kelvins(c, case.units()),
        conditions: eligible::numbers_of(c, numbers),
        reason: reason(c, 3, case.units()),
        letter,
    }
}

/// A viscosity; with its temperature where that is not the column's.
fn reading(case: &Case<'_, '_>, at: Option<At>, column: Option<At>, toward: Toward) -> String {
    let Some(at) = at else {
        return "\u{2013}".to_owned();
    };
    let figure = say::viscosity_figure(at.nu, case.units(), toward);
    let same = column.is_some_and(|c| (c.t - at.t).abs() < 0.05);
    if same {
        figure
    } else {
        format!("{figure} at {}", say::temperature(at.t, case.units()))
    }
}

/// The margins of an oil as bars; the table sets their common span.
pub(super) fn bars(
    case: &Case<'_, '_>,
    c: &Candidate,
    id: String,
    tolerances: &Tolerances,
) -> MarginBars {
    let j = &c.judgement;
    let new = new_margin(case, c);
    let mut bars = vec![
        bar(c, "hot", j.hot, j.reserve),
        bar(c, "cold", j.cold, j.reserve),
    ];
    bars[0].as_new = new;
    (bars[0].whisker, bars[1].whisker) = tolerances.of(c.oil);
    if j.maker.is_some() {
        bars.push(bar(c, "grade", j.maker, 0.0));
    }
    MarginBars {
        id,
        bars,
        reserve: j.reserve,
        span: (-1.0, 1.0),
        axis: false,
    }
}

fn bar(c: &Candidate, label: &str, m: Option<Margin>, reserve: f64) -> MarginBar {
    MarginBar {
        label: label.to_owned(),
        steps: m.map(|m| m.value),
        printed: m.map_or_else(|| "no limit".to_owned(), |m| say::steps(m.value, 2)),
        mark: m.map_or(mark(c.judgement.verdict), |m| {
            Case::margin_mark(&c.judgement, m, reserve)
        }),
        whisker: None,
        as_new: None,
    }
}

/// The hot margin of an oil as new, where it is judged worn.
fn new_margin(case: &Case<'_, '_>, c: &Candidate) -> Option<f64> {
    case.worn(c.oil)?;
    let fresh = case.run.fresh(c.oil)?;
    weigh(&case.w.ready, fresh).hot.map(|m| m.value)
}

/// The margins in words, for those who cannot see the bars.
fn in_words(c: &Candidate) -> String {
    let j = &c.judgement;
    let mut parts = Vec::new();
    for (m, word) in [(j.hot, "hot"), (j.cold, "cold"), (j.maker, "maker's grade")] {
        if let Some(m) = m {
            parts.push(format!("{word} {}", say::steps(m.value, 2)));
        }
    }
    if parts.is_empty() {
        "no limit on viscosity".to_owned()
    } else {
        format!("{} VG steps", parts.join(", "))
    }
}

/// The margins in kelvins: pour point and the oil's own limit.
fn kelvins(c: &Candidate, units: Units) -> String {
    let j = &c.judgement;
    let mut parts = Vec::new();
    for (m, word) in [(j.pour, "pour"), (j.oil, "oil's limit")] {
        if let Some(m) = m {
            parts.push(format!("{word} {}", say::kelvins(m.value, units)));
        }
    }
    minus(&parts.join(", "))
}

/// The main reason and others, so many in all.
fn reason(c: &Candidate, most: usize, units: Units) -> Phrase {
    let mut phrase = Phrase::new();
    if c.in_use {
        phrase = phrase.strong("In use. ");
    }
    let mut because = c.because.iter();
    if let Some(first) = because.next() {
        phrase = phrase.and(say::stopped(&say::sentence(&say::told(first, units))));
    }
    for more in because.take(most.saturating_sub(1)) {
        let text = format!(" {}", say::stopped(&say::sentence(&say::told(more, units))));
        phrase = phrase.with(RunKind::Quiet, text);
    }
    phrase
}
