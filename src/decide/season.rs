//! The best pair of oils by season, where no single oil holds over the whole ambient range: one
//! for the cold part, one for the warm part, with the temperature to change over at and, where
//! the months are known, the months.
//!
//! Both oils are weighed again, each on its own part of the range; a pair whose parts do not both
//! hold or come out tight is not proposed.

use crate::judge::{Band, Verdict, weigh};
use crate::model::stated::{Between, Stated};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::source::Origin;
use crate::source::place::Given;
use crate::weighing::{Candidate, Scales, Weighed};

/// One oil of the pair.
#[derive(Clone, Debug, PartialEq)]
pub struct Season {
    /// The oil, by its place in the list.
    pub oil: usize,
    /// Its verdict on its part of the range.
    pub verdict: Verdict,
    /// Where it meets every limit.
    pub band: Band,
    /// Ambient range it serves, K.
    pub serves: (f64, f64),
    /// Its smallest margin there, VG steps.
    pub margin: Option<f64>,
    /// Conditions that ride with it.
    pub conditions: usize,
    /// Whether it is in use today.
    pub in_use: bool,
    /// Months it serves, 1 to 12, in the order of the season; empty where months are not known.
    pub months: Vec<u8>,
}

/// Two oils that together cover what the place gets.
#[derive(Clone, Debug, PartialEq)]
pub struct Pair {
    /// For the cold part.
    pub winter: Season,
    /// For the warm part.
    pub summer: Season,
    /// Ambients at which both hold, K.
    pub overlap: (f64, f64),
    /// Ambient to change over at, K: the middle of the overlap.
    pub change_over: f64,
}

/// The best pair; none where a single oil holds or is tight, where the ambient is not known, or
/// where no two oils cover the range. Best is: fewest changes from today, the better of the worse
/// verdicts, fewest conditions, the widest overlap, name.
pub fn pair(scales: &Scales<'_>, weighed: &Weighed<'_>) -> Option<Pair> {
    let serves = |c: &Candidate| matches!(c.judgement.verdict, Verdict::Holds | Verdict::Tight);
    if weighed.candidates.iter().any(serves) {
        return None;
    }
    let (cold, hot) = weighed.demands.middle.thermal.ambient?;
    let range = (cold.value.base(), hot.value.base());
    let mut best: Option<Pair> = None;
    for winter in &weighed.candidates {
        for summer in &weighed.candidates {
            let Some(overlap) = overlap(winter, summer, range) else {
                continue;
            };
            let found = tried(scales, weighed, (winter, summer), range, overlap);
            if let Some(found) = found
                && best
                    .as_ref()
                    .is_none_or(|b| key(scales, &found) < key(scales, b))
            {
                best = Some(found);
            }
        }
    }
    best
}

/// Ambients at which both hold; none where they leave a gap, or one covers the range alone.
fn overlap(winter: &Candidate, summer: &Candidate, (cold, hot): (f64, f64)) -> Option<(f64, f64)> {
    let (w, s) = (winter.judgement.band, summer.judgement.band);
    if winter.oil == summer.oil || w.is_nowhere() || s.is_nowhere() {
        return None;
    }
    let ends = (s.low.max(cold), w.high.min(hot));
    let covers = w.low <= cold + 1e-9 && s.high >= hot - 1e-9;
    let alone = w.covers(cold, hot) || s.covers(cold, hot);
    (covers && !alone && ends.0 <= ends.1).then_some(ends)
}

type Key<'s> = (usize, Verdict, usize, i64, &'s str, &'s str);

fn key<'s>(scales: &'s Scales<'_>, pair: &Pair) -> Key<'s> {
    let id = |s: &Season| scales.site.oils[s.oil].id.as_str();
    (
        usize::from(!pair.winter.in_use) + usize::from(!pair.summer.in_use),
        pair.winter.verdict.max(pair.summer.verdict),
        pair.winter.conditions + pair.summer.conditions,
        // widest first, in thousandths of a kelvin so that noise cannot decide
        -crate::judge::order::thousandths(pair.overlap.1 - pair.overlap.0),
        id(&pair.winter),
        id(&pair.summer),
    )
}

fn tried(
    scales: &Scales<'_>,
    weighed: &Weighed<'_>,
    (winter, summer): (&Candidate, &Candidate),
    (cold, hot): (f64, f64),
    overlap: (f64, f64),
) -> Option<Pair> {
    let change_over = f64::midpoint(overlap.0, overlap.1);
    let (winter_months, summer_months) = months(weighed, winter, summer, change_over)?;
    let winter = season(scales, weighed, winter, (cold, change_over), winter_months)?;
    let summer = season(scales, weighed, summer, (change_over, hot), summer_months)?;
    Some(Pair {
        winter,
        summer,
        overlap,
        change_over,
    })
}

/// An oil weighed again on its part of the range; none where it neither holds nor is tight there.
fn season(
    scales: &Scales<'_>,
    weighed: &Weighed<'_>,
    candidate: &Candidate,
    serves: (f64, f64),
    months: Vec<u8>,
) -> Option<Season> {
    let part = Between {
        lo: ThermodynamicTemperature::from_base(serves.0),
        hi: ThermodynamicTemperature::from_base(serves.1),
    };
    let mut point = weighed.point.clone();
    let given = Given::new(part, "", Origin::assumed("part of the year"));
    point.ambient = Some(Stated::Known(given, None));
    let (_, ready) = scales.prepare(&point);
    let j = weigh(&ready, &scales.oils[candidate.oil]);
    matches!(j.verdict, Verdict::Holds | Verdict::Tight).then(|| Season {
        oil: candidate.oil,
        verdict: j.verdict,
        band: candidate.judgement.band,
        serves,
        margin: super::pool::figures::smallest(&j),
        conditions: candidate.conditions.len(),
        in_use: candidate.in_use,
        months,
    })
}

/// The months of each season; empty where they are not known, none where no two seasons of whole
/// months serve: some month is too wide for either, or warm and cold months take turns.
fn months(
    weighed: &Weighed<'_>,
    winter: &Candidate,
    summer: &Candidate,
    change_over: f64,
) -> Option<(Vec<u8>, Vec<u8>)> {
    let Some(given) = &weighed.point.monthly_ambient else {
        return Some((Vec::new(), Vec::new()));
    };
    let mut cold = Vec::new();
    for month in given {
        let (lo, hi) = (month.value.lo.base(), month.value.hi.base());
        let in_winter = winter.judgement.band.covers(lo, hi);
        let in_summer = summer.judgement.band.covers(lo, hi);
        cold.push(match (in_winter, in_summer) {
            (true, true) => f64::midpoint(lo, hi) < change_over,
            (only_winter, true | false) if only_winter != in_summer => only_winter,
            _ => return None,
        });
    }
    let (winter, summer) = (run(&cold, true)?, run(&cold, false)?);
    Some((winter, summer))
}

/// The months of one kind in the order they follow round the year; none where they do not hang
/// together, or there are none.
fn run(cold: &[bool], kind: bool) -> Option<Vec<u8>> {
    let n = cold.len();
    let starts: Vec<usize> = (0..n)
        .filter(|i| cold[*i] == kind && cold[(*i + n - 1) % n] != kind)
        .collect();
    let [start] = starts.as_slice() else {
        return None;
    };
    let months = (0..n)
        .map(|k| (start + k) % n)
        .take_while(|i| cold[*i] == kind)
        .filter_map(|i| u8::try_from(i + 1).ok());
    Some(months.collect())
}

/// English names of the months, short.
pub const MONTHS: [&str; 12] = [
    "Jan", "Feb", "Mar", "Apr", "May", "Jun", "Jul", "Aug", "Sep", "Oct", "Nov", "Dec",
];

/// `Nov to Mar`; empty where months are not known.
pub fn in_words(months: &[u8]) -> String {
    let name = |m: &u8| MONTHS.get(usize::from(*m).wrapping_sub(1)).copied();
    match (months.first().and_then(name), months.last().and_then(name)) {
        (Some(first), Some(last)) if months.len() > 1 => format!("{first} to {last}"),
        (Some(first), _) => first.to_owned(),
        _ => String::new(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_season_runs_over_the_new_year_in_one_piece() {
        let mut cold = [false; 12];
        for m in [0, 1, 2, 10, 11] {
            cold[m] = true;
        }
        assert_eq!(run(&cold, true), Some(vec![11, 12, 1, 2, 3]));
        assert_eq!(run(&cold, false), Some(vec![4, 5, 6, 7, 8, 9, 10]));
        assert_eq!(in_words(&[11, 12, 1, 2, 3]), "Nov to Mar");
        cold[6] = true;
        assert_eq!(run(&cold, true), None, "warm and cold take turns");
        assert_eq!(run(&[true; 12], true), None, "no change over");
    }
}
