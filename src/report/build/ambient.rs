//! Where each oil holds, against what the place gets.

use super::case::{Case, mark};
use super::say;
use super::season::{by_season, season, seasons};
use crate::decide::season::pair;
use crate::judge::Band as Judged;
use crate::quantity::Measure;
use crate::quantity::show::Units;
use crate::report::draw::band::{Band, BandFigure, BandRow, MiniBand};
use crate::report::model::{Ambient, Mark};
use crate::weighing::Candidate;

/// Oils drawn at most; the table has them all.
const DRAWN: usize = 16;

/// A judged band, °C; none where it is nowhere.
pub(super) fn drawn(band: Judged) -> Option<Band> {
    (!band.is_nowhere()).then(|| Band {
        low_c: band.low_end().map(say::celsius),
        high_c: band.high_end().map(say::celsius),
    })
}

/// What the place gets, °C.
pub(super) fn place_gets(case: &Case<'_, '_>) -> Option<(f64, f64)> {
    let (cold, hot) = case.w.demands.middle.thermal.ambient?;
    Some((
        say::celsius(cold.value.base()),
        say::celsius(hot.value.base()),
    ))
}

/// The section; none where nothing was weighed or the ambient is not known.
pub(super) fn ambient(case: &Case<'_, '_>) -> Option<Ambient> {
    let lead = case.lead?;
    let need = place_gets(case)?;
    let shown = shown(case, DRAWN);
    let rows: Vec<BandRow> = shown.iter().map(|c| row(case, c, need)).collect();
    let left_out = case.w.candidates.len() - rows.len();
    let words = in_words(case, need);
    let caption = match left_out {
        0 => String::new(),
        n => format!(
            " {} that fail stand in the table only.",
            say::sentence(&say::count(n, "further oil", "further oils"))
        ),
    };
    let figure = BandFigure {
        id: case.local("fig-bands"),
        title: format!("Ambient each oil holds in on {}", case.w.point.address()),
        description: format!(
            "{} holds {}; {words}.",
            case.id(lead.oil),
            say::band(lead.judgement.band, case.degrees())
        ),
        caption: format!(
            "Cold ends: what limits the start, the pour point or running cold. Warm ends: floors and the oil's own limit.{caption}"
        ),
        degrees: case.degrees(),
        need_c: need,
        need: words,
        rows,
    };
    let pair = pair(case.run.scales, case.w);
    Some(Ambient {
        bands: Some(figure),
        season: match &pair {
            Some(pair) => seasons(case, pair),
            None => season(case, lead),
        },
        notes: pair.iter().map(|p| by_season(case, p)).collect(),
    })
}

fn in_words(case: &Case<'_, '_>, (cold, hot): (f64, f64)) -> String {
    let degrees = case.degrees();
    let kelvin = |c: f64| c + crate::quantity::convert::ZERO_CELSIUS;
    format!(
        "{} gets {} to {}\u{202f}{}",
        case.where_it_stands(),
        say::temperature_figure(kelvin(cold), case.units()),
        say::temperature_figure(kelvin(hot), case.units()),
        degrees.unit()
    )
}

/// All that do not fail, the oil in use, and failing ones as long as there is room.
pub(super) fn shown<'c>(case: &Case<'c, '_>, most: usize) -> Vec<&'c Candidate> {
    let mut room = most;
    let fails = |c: &Candidate| mark(c.judgement.verdict) == Mark::Fails;
    let must = |c: &Candidate| !fails(c) || c.in_use || case.is_lead(c);
    room = room.saturating_sub(case.w.candidates.iter().filter(|c| must(c)).count());
    let mut kept = Vec::new();
    for c in &case.w.candidates {
        if must(c) {
            kept.push(c);
        } else if room > 0 {
            room -= 1;
            kept.push(c);
        }
    }
    kept
}

fn row(case: &Case<'_, '_>, c: &Candidate, need: (f64, f64)) -> BandRow {
    let band = drawn(c.judgement.band);
    BandRow {
        letter: case.letter(c),
        label: case.id(c.oil).to_owned(),
        role: match (case.picked(c), c.in_use) {
            (true, true) => "proposed, in use",
            (true, false) => "proposed",
            (false, true) => "in use",
            (false, false) => "",
        }
        .to_owned(),
        picked: case.picked(c),
        mark: mark(c.judgement.verdict),
        band,
        says: says(band, need, case.units()),
    }
}

/// What a bar says: how many kelvins it is short, and where.
fn says(band: Option<Band>, need: (f64, f64), units: Units) -> String {
    let Some(band) = band else {
        return "nowhere".to_owned();
    };
    let cold = band.low_c.map_or(0.0, |low| low - need.0);
    let hot = band.high_c.map_or(0.0, |high| need.1 - high);
    let short = |kelvins: f64| say::shortfall(kelvins, units);
    let unit = say::difference(units);
    match (cold > 1e-9, hot > 1e-9) {
        (false, false) => "covers the place".to_owned(),
        (true, false) => format!("{}\u{202f}{unit} short when cold", short(cold)),
        (false, true) => format!("{}\u{202f}{unit} short when hot", short(hot)),
        (true, true) => format!(
            "short {}\u{202f}{unit} cold, {}\u{202f}{unit} hot",
            short(cold),
            short(hot)
        ),
    }
}

/// The small band of a row or a summary.
pub(super) fn mini(
    id: String,
    need_c: (f64, f64),
    bands: (Option<Band>, Option<Band>),
    mark: Mark,
    axis: (f64, f64),
) -> MiniBand {
    MiniBand {
        id,
        axis_c: axis,
        need_c,
        now: bands.0,
        proposed: bands.1,
        mark,
        ..MiniBand::default()
    }
}

/// An axis that holds what the places get and most bands, in whole tens, °C.
pub(super) fn axis(needs: impl IntoIterator<Item = (f64, f64)>) -> (f64, f64) {
    let (mut low, mut high) = (0.0_f64, 40.0_f64);
    for (cold, hot) in needs {
        low = low.min(cold);
        high = high.max(hot);
    }
    (
        ((low - 8.0) / 10.0).floor() * 10.0,
        ((high + 12.0) / 10.0).ceil() * 10.0,
    )
}
