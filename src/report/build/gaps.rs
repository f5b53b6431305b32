//! What is missing or assumed, by what it would decide.

use super::case::Case;
use super::eligible::{Numbers, shortened};
use super::say;
use super::vary::{Effect, effect, smallest};
use crate::demand::{Gap, GapKind};
use crate::judge::Verdict;
use crate::quantity::Amount;
use crate::quantity::show::Toward;
use crate::report::draw::gap_bars::GapBar;
use crate::report::model::{GapRow, Gaps, Phrase};
use crate::report::names::Href;

/// What a gap would decide, the most telling first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum Weight {
    /// Which oil.
    Oil,
    /// A verdict, or whether there is one at all.
    Verdict,
    /// A condition.
    Condition,
    /// The margin by more than the reserve.
    Margin,
    /// Nothing.
    Nothing,
}

/// One gap with its weight and effect.
#[derive(Clone, Debug)]
pub(super) struct Found {
    pub(super) weight: Weight,
    pub(super) row: GapRow,
    pub(super) effect: Option<Effect>,
    /// Key and part of the input.
    pub(super) input: (String, Option<String>),
    /// The value used meanwhile, base units.
    pub(super) taken: Option<f64>,
}

/// The gaps of a point, the most telling first; their numbers go on from `last` on the sheet.
pub(super) fn found(case: &Case<'_, '_>, numbers: &Numbers, last: &mut u32) -> Vec<Found> {
    let middle = &case.w.demands.middle;
    let mut all: Vec<Found> = middle
        .axes
        .iter()
        .chain(&middle.gaps)
        .filter(|g| g.kind != GapKind::Fact)
        .map(|g| of_input(case, g))
        .collect();
    all.extend(facts(case, numbers));
    all.sort_by(|a, b| {
        let moves = |f: &Found| f.effect.as_ref().map_or(0.0, Effect::moves);
        a.weight
            .cmp(&b.weight)
            .then_with(|| moves(b).total_cmp(&moves(a)))
            .then_with(|| a.row.missing.cmp(&b.row.missing))
    });
    for gap in all.iter_mut().filter(|g| g.weight != Weight::Nothing) {
        *last += 1;
        gap.row.id = format!("G-{last}");
    }
    all
}

/// The table: what decides something as rows with a common axis, the rest in a sentence.
pub(super) fn table(case: &Case<'_, '_>, found: &[Found]) -> Gaps {
    let (rows, idle): (Vec<&Found>, Vec<&Found>) =
        found.iter().partition(|f| f.weight != Weight::Nothing);
    let span = span(rows.iter().filter_map(|f| f.row.bar.as_ref()));
    let mut rows: Vec<GapRow> = rows.into_iter().map(|f| f.row.clone()).collect();
    for bar in rows.iter_mut().filter_map(|r| r.bar.as_mut()) {
        bar.span = span;
    }
    let drawn = rows.iter().any(|r| r.bar.is_some());
    let idle: Vec<String> = idle
        .iter()
        .map(|f| format!("{} ({})", f.row.missing, f.row.plausible))
        .collect();
    Gaps {
        head: drawn.then(|| head(case.local("gap-head"), span)),
        rows,
        idle: if idle.is_empty() {
            Phrase::new()
        } else {
            let n = idle.len();
            let verb = if n == 1 { "changes" } else { "change" };
            format!(
                "Missing or assumed, and {verb} nothing over the range: {}.",
                idle.join("; ")
            )
            .into()
        },
    }
}

/// The head of a table of gap bars.
pub(super) fn head(id: String, span: (f64, f64)) -> GapBar {
    GapBar {
        id,
        span,
        head: true,
        ..GapBar::default()
    }
}

/// A common axis: a step to either side at least, three at most.
pub(super) fn span<'b>(bars: impl Iterator<Item = &'b GapBar>) -> (f64, f64) {
    let (mut low, mut high) = (-1.0_f64, 1.0_f64);
    for bar in bars {
        low = low.min(bar.low);
        high = high.max(bar.high);
    }
    (low.floor().max(-3.0), high.ceil().min(3.0))
}

fn missing(case: &Case<'_, '_>, gap: &Gap) -> String {
    gap.about.as_ref().map_or_else(
        || gap.key.clone(),
        |a| format!("{}: {}", case.part_name(a), gap.key),
    )
}

fn of_input(case: &Case<'_, '_>, gap: &Gap) -> Found {
    let effect = case.lead.and_then(|c| effect(case, gap, c.oil));
    let (weight, decides) = match (&effect, &gap.kind) {
        (Some(e), _) => decided(case, e),
        (None, _) => without_range(case, gap),
    };
    let bar = effect
        .as_ref()
        .and_then(|e| e.margin)
        .map(|(low, high)| GapBar {
            id: case.local(&format!("gap-{}", super::ascii(&missing(case, gap)))),
            low,
            high,
            used: used(case, gap),
            reserve: case.lead.map_or(0.0, |c| c.judgement.reserve),
            span: (-1.0, 1.0),
            head: false,
        });
    Found {
        weight,
        row: GapRow {
            id: String::new(),
            machine: None,
            missing: missing(case, gap),
            plausible: plausible(case, gap),
            bar,
            range: effect.as_ref().map(Effect::range).unwrap_or_default(),
            decides,
            ask: gap.ask.clone().unwrap_or_else(|| gap.how.to_owned()),
        },
        effect,
        input: (gap.key.clone(), gap.about.clone()),
        taken: match &gap.kind {
            GapKind::Range(lo, hi) => Some(f64::midpoint(lo.base, hi.base)),
            GapKind::Assumed { taken, .. } => Some(taken.base),
            GapKind::Missing | GapKind::Fact => None,
        },
    }
}

/// The margin at the value used meanwhile; an unknown with a range has none.
fn used(case: &Case<'_, '_>, gap: &Gap) -> Option<f64> {
    match gap.kind {
        GapKind::Assumed { .. } => case.lead.and_then(smallest),
        _ => None,
    }
}

fn plausible(case: &Case<'_, '_>, gap: &Gap) -> String {
    let show = |a: Amount| say::amount(a, case.units(), Toward::Nearest);
    let range = |lo, hi| format!("{} to {}", show(lo), show(hi));
    match &gap.kind {
        GapKind::Range(lo, hi) => {
            let whose = if gap.origin.is_some() {
                "stated"
            } else {
                "plausible"
            };
            format!("{} {whose}", range(*lo, *hi))
        }
        GapKind::Assumed { taken, lo, hi } => {
            format!("{} assumed, {} plausible", show(*taken), range(*lo, *hi))
        }
        GapKind::Missing | GapKind::Fact => "not stated, no range".to_owned(),
    }
}

fn decided(case: &Case<'_, '_>, e: &Effect) -> (Weight, Phrase) {
    let id = case.lead.map_or("", |c| case.id(c.oil));
    if e.picks() {
        let names: Vec<&str> = e
            .proposed
            .iter()
            .map(|o| o.map_or("none", |o| case.id(o)))
            .collect();
        let says = Phrase::new().strong("which oil: ").and(names.join(" or "));
        return (Weight::Oil, says);
    }
    if e.turns() {
        let says = Phrase::new().strong(id).and(format!(": {}", e.words()));
        return (Weight::Verdict, says);
    }
    let reserve = case.run.scales.reserve;
    let words = format!("nothing: {id} is {} either way", e.words());
    let words = words
        .replace(" is holds", " holds")
        .replace(" is fails", " fails");
    if e.moves() > reserve {
        let says = Phrase::new().and(format!(
            "{words}; the margin moves by more than the reserve"
        ));
        return (Weight::Margin, says);
    }
    (Weight::Nothing, words.into())
}

/// An input without a range: it leaves the verdict open where a limit needs it.
fn without_range(case: &Case<'_, '_>, gap: &Gap) -> (Weight, Phrase) {
    let open = case
        .lead
        .is_none_or(|c| c.judgement.verdict == Verdict::Open);
    let waits = case
        .w
        .demands
        .middle
        .undecided
        .iter()
        .any(|u| gap.about.is_none() || u.part == gap.about);
    if waits && open {
        (
            Weight::Verdict,
            Phrase::new().strong("whether there is a verdict at all"),
        )
    } else if waits {
        (
            Weight::Margin,
            "a further limit, not worked out without it".into(),
        )
    } else {
        (
            Weight::Nothing,
            "nothing: a figure beside the limits".into(),
        )
    }
}

/// Facts nobody stated that a suitability rule asks for, each once, with the oils it is about.
fn facts(case: &Case<'_, '_>, numbers: &Numbers) -> Vec<Found> {
    let mut seen: Vec<(String, Vec<&str>)> = Vec::new();
    for c in &case.w.candidates {
        for fact in &c.facts_missing {
            let id = case.id(c.oil);
            match seen.iter_mut().find(|(f, _)| f == fact) {
                Some((_, oils)) => oils.push(id),
                None => seen.push((fact.clone(), vec![id])),
            }
        }
    }
    seen.into_iter()
        .map(|(fact, oils)| {
            let asking = numbers.asking(&fact);
            let decides = match asking {
                Some((number, _)) => {
                    let id = case.place.id(&case.local(&format!("condition-{number}")));
                    Phrase::new().link(format!("condition {number}"), Href::here(&id))
                }
                None => "a condition".into(),
            };
            Found {
                weight: Weight::Condition,
                row: GapRow {
                    id: String::new(),
                    machine: None,
                    missing: fact,
                    plausible: format!("not stated; for {}", shortened(&oils)),
                    bar: None,
                    range: String::new(),
                    decides,
                    ask: asking.map_or(String::new(), |(_, c)| say::told(&c.act, case.units())),
                },
                effect: None,
                input: (String::new(), None),
                taken: None,
            }
        })
        .collect()
}
