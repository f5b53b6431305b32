//! What is missing or assumed, by what it would decide.

use super::case::Case;
use super::eligible::{Numbers, shortened};
use super::say;
use super::vary::range;
pub(super) use crate::decide::gaps::Weight;
use crate::decide::gaps::effect::{Effect, smallest, words};
use crate::decide::gaps::oils::SHEAR_LOSS;
use crate::decide::gaps::{self as decide, Missing, Waits};
use crate::demand::{Gap, GapKind};
use crate::quantity::Amount;
use crate::quantity::show::Toward;
use crate::report::draw::gap_bars::GapBar;
use crate::report::model::{GapRow, Gaps, Phrase};
use crate::report::names::Href;

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
    let scales = case.run.scales;
    let mut all: Vec<Found> = decide::found(scales, case.w, case.lead)
        .into_iter()
        .map(|found| match &found.missing {
            Missing::Input(gap) => of_input(case, gap, &found),
            Missing::Fact { says, oils, .. } => of_fact(case, numbers, says, oils),
        })
        .collect();
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

fn of_input(case: &Case<'_, '_>, gap: &Gap, found: &decide::Found) -> Found {
    let (effect, weight) = (found.effect.clone(), found.weight);
    let decides = match &effect {
        Some(e) => decided(case, e, weight),
        None => without_range(found.waits),
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
            range: effect.as_ref().map(range).unwrap_or_default(),
            decides,
            ask: gap.ask.clone().unwrap_or_else(|| gap.how.to_owned()),
        },
        effect,
        input: (gap.key.clone(), gap.about.clone()),
        taken: match &gap.kind {
            GapKind::Range(lo, hi) => Some(f64::midpoint(lo.base, hi.base)),
            GapKind::Assumed { taken, .. } => Some(taken.base),
            GapKind::Word { .. } | GapKind::Missing | GapKind::Fact => None,
        },
    }
}

/// The margin at the value used meanwhile; an unknown with a range has none.
fn used(case: &Case<'_, '_>, gap: &Gap) -> Option<f64> {
    match gap.kind {
        GapKind::Assumed { .. } | GapKind::Word { .. } => case.lead.and_then(smallest),
        _ => None,
    }
}

fn plausible(case: &Case<'_, '_>, gap: &Gap) -> String {
    let show = |a: Amount| {
        if gap.key == SHEAR_LOSS {
            return say::set(&decide::figure(gap, a, case.units()));
        }
        say::amount(a, case.units(), Toward::Nearest)
    };
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
        GapKind::Word { taken, among } => {
            format!("{taken} assumed, {} plausible", among.join(", "))
        }
        GapKind::Missing | GapKind::Fact => "not stated, no range".to_owned(),
    }
}

fn decided(case: &Case<'_, '_>, e: &Effect, weight: Weight) -> Phrase {
    let id = case.lead.map_or("", |c| case.id(c.oil));
    match weight {
        Weight::Oil => {
            let names: Vec<&str> = e
                .proposed
                .iter()
                .map(|o| o.map_or("none", |o| case.id(o)))
                .collect();
            Phrase::new().strong("which oil: ").and(names.join(" or "))
        }
        Weight::Verdict => match case.w.in_use() {
            Some(now) if e.verdicts.len() < 2 => Phrase::new()
                .strong(case.id(now.oil))
                .and(format!(": {}", words(&e.in_use))),
            _ => Phrase::new()
                .strong(id)
                .and(format!(": {}", words(&e.verdicts))),
        },
        _ => {
            let words = format!("nothing: {id} is {} either way", words(&e.verdicts));
            let words = words
                .replace(" is holds", " holds")
                .replace(" is fails", " fails");
            if weight == Weight::Margin {
                return Phrase::new().and(format!(
                    "{words}; the margin moves by more than the reserve"
                ));
            }
            words.into()
        }
    }
}

/// An input without a range: it leaves the verdict open where a limit needs it.
fn without_range(waits: Option<Waits>) -> Phrase {
    match waits {
        Some(Waits::Verdict) => Phrase::new().strong("whether there is a verdict at all"),
        Some(Waits::Limit) => "a further limit, not worked out without it".into(),
        Some(Waits::Nothing) | None => "nothing: a figure beside the limits".into(),
    }
}

/// A fact nobody stated that a suitability rule asks for, with the oils it is about.
fn of_fact(case: &Case<'_, '_>, numbers: &Numbers, fact: &str, oils: &[usize]) -> Found {
    let oils: Vec<&str> = oils.iter().map(|o| case.id(*o)).collect();
    let asking = numbers.asking(fact);
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
            missing: fact.to_owned(),
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
}
