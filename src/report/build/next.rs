//! The next move on a point, in a few words.

use super::case::{Case, Now};
use super::gaps::{Found, Weight};
use super::say;
use super::state::{Pressing, State};
use crate::judge::Verdict;
use crate::quantity::Measure;
use crate::report::model::Phrase;
use crate::weighing::Candidate;

/// The next move.
pub(super) fn next(
    case: &Case<'_, '_>,
    (state, pressing): (State, Pressing),
    gaps: &[Found],
) -> Phrase {
    let Some(lead) = case.lead else {
        return "No oil on the list may be used here: ask a supplier, or change what bars them."
            .into();
    };
    if !case.proposed {
        return undecided(case, lead, gaps);
    }
    if lead.in_use {
        return kept(case, state);
    }
    let phrase = match pressing {
        Pressing::Barred => Phrase::new().strong("Change now"),
        Pressing::NotKnown if matches!(case.now, Now::Nothing) => Phrase::new().and("Fill"),
        Pressing::NotKnown => Phrase::new().and("Find out what is in it, then change"),
        _ => Phrase::new().and(format!("Change{}", by_when(case))),
    };
    match lead.judgement.verdict {
        Verdict::Tight => phrase.and("; accept tight by name."),
        _ => phrase.and("."),
    }
}

fn kept(case: &Case<'_, '_>, state: State) -> Phrase {
    match (state, case.accepted) {
        (_, Some(by)) => {
            let until = by
                .until
                .as_ref()
                .map_or(String::new(), |u| format!(" until {u}"));
            format!("Keep; tight is accepted{until}.").into()
        }
        (State::Settled, None) => "Keep.".into(),
        _ => "Keep if somebody accepts tight by name, with an end date.".into(),
    }
}

/// Before which weather the oil in use gives out.
fn by_when(case: &Case<'_, '_>) -> String {
    let Now::Weighed(now) = case.now else {
        return String::new();
    };
    let Some((cold, hot)) = case.w.demands.middle.thermal.ambient else {
        return String::new();
    };
    let band = now.judgement.band;
    if band.is_nowhere() || now.judgement.verdict != Verdict::Fails {
        return String::new();
    }
    let degrees = case.degrees();
    let unit = degrees.unit();
    let low = band
        .low_end()
        .filter(|low| *low > cold.value.base() + 1e-6)
        .map(|low| format!("below {}", degrees.figure_up(say::celsius(low))));
    let high = band
        .high_end()
        .filter(|high| *high < hot.value.base() - 1e-6)
        .map(|high| format!("above {}", degrees.figure_down(say::celsius(high))));
    match (low, high) {
        (Some(low), Some(high)) => format!(" before it gets {low} or {high}\u{202f}{unit}"),
        (Some(one), None) | (None, Some(one)) => format!(" before it gets {one}\u{202f}{unit}"),
        (None, None) => String::new(),
    }
}

/// Where no oil is proposed: what to find out, or that none serves.
fn undecided(case: &Case<'_, '_>, lead: &Candidate, gaps: &[Found]) -> Phrase {
    if lead.judgement.verdict == Verdict::Open {
        let telling = gaps
            .iter()
            .find(|g| g.weight <= Weight::Verdict)
            .map(|g| format!("Find out: {} ({}).", g.row.missing, g.row.id));
        let waits = case.w.demands.middle.undecided.first().map(|u| {
            let part = u.part.as_deref().map_or("the point", |p| case.part_name(p));
            say::stopped(&format!("Ask the maker for the limits of {part}"))
        });
        return telling
            .or(waits)
            .unwrap_or_else(|| format!("See why {} is open.", case.id(lead.oil)))
            .into();
    }
    "See what each oil lacks; warm or cool it, or ask a supplier.".into()
}
