//! The year: the pair of oils by season, or the lead's limits over the months.

use super::ambient::drawn;
use super::case::Case;
use super::say;
use crate::decide::season::{Pair, Season, in_words};
use crate::judge::Verdict;
use crate::model::stated::Between;
use crate::quantity::show::Toward;
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::report::draw::season::{Season as Drawn, SeasonFigure};
use crate::report::model::Phrase;
use crate::source::place::Given;
use crate::weighing::Candidate;

/// The pair of oils by season, in a sentence.
pub(super) fn by_season(case: &Case<'_, '_>, pair: &Pair) -> Phrase {
    let units = case.units();
    let one = |phrase: Phrase, s: &Season| {
        let months = in_words(&s.months);
        let when = if months.is_empty() {
            String::new()
        } else {
            format!(" ({months})")
        };
        let now = if s.in_use { ", in use today" } else { "" };
        let word = match s.verdict {
            Verdict::Holds => "holds",
            _ => "is tight",
        };
        phrase
            .tag(case.id(s.oil))
            .and(format!(" {word} on its part of the range{now}{when}"))
    };
    let at = say::temperature(pair.change_over, units);
    let phrase = Phrase::new().and(format!("By season: below {at} "));
    let phrase = one(phrase, &pair.winter).and("; above it ");
    let phrase = one(phrase, &pair.summer);
    let end = |t: f64, toward| {
        say::amount(
            ThermodynamicTemperature::from_base(t).amount(),
            units,
            toward,
        )
    };
    phrase.and(format!(
        ". Both meet every limit from {} to {}: the change-over belongs in between.",
        end(pair.overlap.0, Toward::Up),
        end(pair.overlap.1, Toward::Down)
    ))
}

/// The year between the limits of the pair, where the months are known.
pub(super) fn seasons(case: &Case<'_, '_>, pair: &Pair) -> Option<SeasonFigure> {
    let months_c = months_c(case)?;
    let part = |s: &Season| {
        let band = drawn(s.band);
        let letter = |oil: usize| {
            let found = case.w.candidates.iter().find(|c| c.oil == oil);
            found.map_or(String::new(), |c| case.letter(c))
        };
        let label = format!("{} {}", letter(s.oil), case.id(s.oil));
        whole_years(&s.months)
            .into_iter()
            .map(|(first, last)| Drawn {
                first,
                last,
                low_c: band.and_then(|b| b.low_c),
                high_c: band.and_then(|b| b.high_c),
                label: label.clone(),
            })
            .collect::<Vec<_>>()
    };
    let mut seasons = part(&pair.winter);
    seasons.extend(part(&pair.summer));
    seasons.sort_by_key(|s| s.first);
    let (cold, warm) = (case.id(pair.winter.oil), case.id(pair.summer.oil));
    Some(SeasonFigure {
        id: case.local("fig-year"),
        title: format!(
            "The year of {} between the limits of {cold} and {warm}",
            case.where_it_stands()
        ),
        description: format!(
            "{cold} serves {}, {warm} serves {}.",
            in_words(&pair.winter.months),
            in_words(&pair.summer.months)
        ),
        caption: "Columns: coldest and warmest of each month. Hatching: what the oil of the season does not cover.".to_owned(),
        degrees: case.degrees(),
        months_c,
        seasons,
    })
}

/// Months as runs within the calendar year: one over the new year becomes two.
fn whole_years(months: &[u8]) -> Vec<(u8, u8)> {
    let mut runs: Vec<(u8, u8)> = Vec::new();
    for month in months {
        match runs.last_mut() {
            Some((_, last)) if *last + 1 == *month => *last = *month,
            _ => runs.push((*month, *month)),
        }
    }
    runs
}

/// Coldest and warmest of each month, °C, where the months are known.
fn months_c(case: &Case<'_, '_>) -> Option<Vec<(f64, f64)>> {
    let months = case.w.point.monthly_ambient.as_ref()?;
    let ends = |m: &Given<Between<ThermodynamicTemperature>>| {
        (
            say::celsius(m.value.lo.base()),
            say::celsius(m.value.hi.base()),
        )
    };
    Some(months.iter().map(ends).collect())
}

/// The year between the lead's limits, where the months are known.
pub(super) fn season(case: &Case<'_, '_>, lead: &Candidate) -> Option<SeasonFigure> {
    let months_c = months_c(case)?;
    let band = drawn(lead.judgement.band)?;
    let id = case.id(lead.oil);
    Some(SeasonFigure {
        id: case.local("fig-year"),
        title: format!(
            "The year of {} between the limits of {id}",
            case.where_it_stands()
        ),
        description: format!(
            "{id} holds {}.",
            say::band(lead.judgement.band, case.degrees())
        ),
        caption: "Columns: coldest and warmest of each month.".to_owned(),
        degrees: case.degrees(),
        months_c,
        seasons: vec![Drawn {
            first: 1,
            last: 12,
            low_c: band.low_c,
            high_c: band.high_c,
            label: format!("{} {id}", case.letter(lead)),
        }],
    })
}
