//! What the overview keeps of a point after its sheet is made.

use super::ambient::{drawn, place_gets};
use super::case::{Case, Now, mark};
use super::gaps::{Found, Weight};
use super::next::next;
use super::say;
use super::sign;
use super::state::{self, Pressing, State};
use crate::decide::gaps::effect::smallest;
use crate::decide::pool::Place as PoolPlace;
use crate::decide::pool::case as pool;
use crate::judge::Verdict;
use crate::judge::weigh::Margin;
use crate::quantity::{Measure, Volume};
use crate::report::draw::band::Band;
use crate::report::model::{GapRow, Mark, Phrase};
use crate::report::names::Href;
use crate::weighing::{Candidate, oil_in_use, oil_index};
use std::collections::BTreeSet;
use std::fmt::Write as _;

/// One oil on a point, for the table of every oil on every machine.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Cell {
    pub(super) oil: usize,
    /// None: barred.
    pub(super) mark: Option<Mark>,
    /// The smallest margin, VG steps.
    pub(super) margin: Option<f64>,
    pub(super) in_use: bool,
}

/// One point.
#[derive(Clone, Debug, Default)]
pub(super) struct Digest {
    /// Name of the point, where its machine has several.
    pub(super) point: Option<String>,
    pub(super) title: String,
    pub(super) area: String,
    pub(super) href: Href,
    pub(super) state: State,
    pub(super) pressing: Pressing,
    /// The oil in it, as printed.
    pub(super) now: String,
    pub(super) now_mark: Option<Mark>,
    /// The oil proposed.
    pub(super) oil: Option<usize>,
    /// Its verdict, or that of the best oil where none is proposed.
    pub(super) mark: Option<Mark>,
    pub(super) conditions: usize,
    pub(super) next: Phrase,
    /// Governing limits, one a line.
    pub(super) needs: Vec<String>,
    /// The smallest margin and its end.
    pub(super) margin: String,
    pub(super) smallest: Option<f64>,
    /// What the place gets, °C.
    pub(super) place: Option<(f64, f64)>,
    pub(super) band: Option<Band>,
    pub(super) band_now: Option<Band>,
    pub(super) band_words: String,
    pub(super) gaps: Vec<(Weight, GapRow)>,
    pub(super) idle: usize,
    pub(super) cells: Vec<Cell>,
    pub(super) fill: Option<Volume>,
    /// Its address.
    pub(super) address: String,
    /// The oils that may serve it, for the shortest list; none where it cannot be decided.
    pub(super) place_on_list: Option<PoolPlace>,
    /// What its oil of today costs a year, where that is known.
    pub(super) cost_now: Option<f64>,
    /// Rules that set a limit here or spoke on an oil.
    pub(super) rules: BTreeSet<String>,
}

/// Digests a point.
pub(super) fn digest(case: &Case<'_, '_>, gaps: &[Found], href: Href) -> Digest {
    let (state, pressing) = state::of(case);
    let lead = case.lead;
    let (now, now_mark, band_now) = in_it(case);
    Digest {
        point: case.w.point.point.clone(),
        title: case.w.point.title.clone().unwrap_or_default(),
        area: case.w.point.area.clone().unwrap_or_default(),
        href,
        state,
        pressing,
        now,
        now_mark,
        oil: lead.filter(|_| case.proposed).map(|c| c.oil),
        mark: lead.map(|c| mark(c.judgement.verdict)),
        conditions: lead.map_or(0, |c| c.conditions.len()),
        next: next(case, (state, pressing), gaps),
        needs: needs(case),
        margin: lead.map_or(String::new(), margin),
        smallest: lead.and_then(smallest),
        place: place_gets(case),
        band: lead.and_then(|c| drawn(c.judgement.band)),
        band_now,
        band_words: band_words(case),
        gaps: gaps
            .iter()
            .filter(|g| g.weight <= Weight::Condition)
            .map(|g| (g.weight, g.row.clone()))
            .collect(),
        idle: gaps.iter().filter(|g| g.weight > Weight::Condition).count(),
        cells: cells(case),
        fill: sign::volume(case),
        address: case.w.point.address(),
        place_on_list: pool::place(case.run.scales.site, case.w, &case.run.head.date),
        cost_now: cost_now(case),
        rules: rules(case),
    }
}

fn cost_now(case: &Case<'_, '_>) -> Option<f64> {
    let site = case.run.scales.site;
    let oil = oil_index(site, oil_in_use(case.w.point)?)?;
    pool::yearly(site, case.w, oil)
}

fn in_it(case: &Case<'_, '_>) -> (String, Option<Mark>, Option<Band>) {
    match case.now {
        Now::Weighed(c) => (
            case.id(c.oil).to_owned(),
            Some(mark(c.judgement.verdict)),
            drawn(c.judgement.band),
        ),
        Now::Barred(b) => (format!("{}, barred", case.id(b.oil)), None, None),
        Now::Other(id) => (id.to_owned(), None, None),
        Now::Unknown => ("not known".to_owned(), None, None),
        Now::Nothing => ("empty".to_owned(), None, None),
    }
}

fn needs(case: &Case<'_, '_>) -> Vec<String> {
    let middle = &case.w.demands.middle;
    let mut lines = Vec::new();
    for end in super::ENDS {
        let Some(i) = middle.governing(end) else {
            continue;
        };
        let (limit, _) = super::needs::limit(case, i);
        let t = middle.governing_temperature(&middle.list[i]);
        let at = t.map_or(String::new(), |t| {
            format!(" at {}", say::temperature(t, case.units()))
        });
        lines.push(format!("{limit}{at}"));
    }
    if !middle.undecided.is_empty() {
        lines.push("not all known".to_owned());
    }
    lines
}

/// `+0.6 hot`.
fn margin(c: &Candidate) -> String {
    let j = &c.judgement;
    let ends: [(Option<Margin>, &str); 3] =
        [(j.hot, "hot"), (j.cold, "cold"), (j.maker, "to the grade")];
    ends.into_iter()
        .filter_map(|(m, word)| Some((m?.value, word)))
        .min_by(|a, b| a.0.total_cmp(&b.0))
        .map_or(String::new(), |(value, word)| {
            format!("{} {word}", say::steps(value, 1))
        })
}

fn band_words(case: &Case<'_, '_>) -> String {
    let Some(lead) = case.lead else {
        return "no oil weighed".to_owned();
    };
    let degrees = case.degrees();
    let mut words = format!(
        "{} {}",
        case.id(lead.oil),
        say::band(lead.judgement.band, degrees)
    );
    if let Now::Weighed(c) = case.now
        && !case.is_lead(c)
    {
        let band = say::band(c.judgement.band, degrees);
        let _ = write!(words, "; {} in use {band}", case.id(c.oil));
    }
    match case.w.demands.middle.thermal.ambient {
        Some((cold, hot)) => {
            let _ = write!(
                words,
                "; needed {} to {}",
                say::temperature_figure(cold.value.base(), case.units()),
                say::temperature(hot.value.base(), case.units())
            );
        }
        None => words.push_str("; the ambient is not stated"),
    }
    words
}

fn cells(case: &Case<'_, '_>) -> Vec<Cell> {
    let weighed = case.w.candidates.iter().map(|c| Cell {
        oil: c.oil,
        mark: Some(mark(c.judgement.verdict)),
        margin: smallest(c),
        in_use: c.in_use,
    });
    let barred = case.w.barred.iter().map(|b| Cell {
        oil: b.oil,
        in_use: b.in_use,
        ..Cell::default()
    });
    weighed.chain(barred).collect()
}

fn rules(case: &Case<'_, '_>) -> BTreeSet<String> {
    let list = &case.w.demands.middle.list;
    let mut found: BTreeSet<String> = list.iter().map(|d| d.rule.clone()).collect();
    let spoken = case
        .w
        .candidates
        .iter()
        .flat_map(|c| c.conditions.iter().chain(&c.notes))
        .chain(case.w.barred.iter().flat_map(|b| &b.by));
    found.extend(spoken.map(|c| c.rule.clone()));
    found
}

/// A verdict for the gate: that of the oil in use.
pub(super) fn gate(case: &Case<'_, '_>) -> Option<Verdict> {
    match case.now {
        Now::Weighed(c) => Some(c.judgement.verdict),
        Now::Barred(_) => Some(Verdict::Fails),
        _ => None,
    }
}
