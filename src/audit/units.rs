//! The fills that were sampled: their samples in time, their trend, their metals.

use super::bottle::Bottle;
use super::judged::{Auditor, Judged};
use super::metals::{self, Rise};
use super::trend::{self, Ahead, Trend};
use crate::model::rulebook::used_oil::Reading as On;
use crate::model::sample::{Done, Reading};
use crate::model::{Fill, Site};
use crate::problem::{Code, Problem, Write};
use crate::quantity::Measure;
use crate::source::Place;
use jiff::civil::Date;
use std::collections::BTreeMap;

/// A sampled fill: a point, or one machine of several alike.
#[derive(Clone, Debug)]
pub struct Unit {
    /// The point, by its place in the site.
    pub point: usize,
    /// What it is called: the address, with the bottle's own word where several alike are meant.
    pub name: String,
    /// Its bottles by their place among the judged, oldest first.
    pub judged: Vec<usize>,
    /// Days on which there are two bottles.
    pub twice: Vec<Date>,
    /// How the viscosity moves since the oil was last changed.
    pub trend: Trend,
    /// How many of its samples are of the fill that is in it now.
    pub of_this_fill: usize,
    /// What was done since the first sample of this fill.
    pub events: Vec<String>,
    /// Metals that rose between the last two samples of this fill.
    pub rises: Vec<Rise>,
}

impl Unit {
    /// The latest bottle, by its place among the judged.
    pub fn latest(&self) -> Option<usize> {
        self.judged.last().copied()
    }
}

/// Groups bottles by the fill they are from.
pub(super) fn of(site: &Site, bottles: &[Bottle], rows: &[(usize, Option<usize>)]) -> Vec<Unit> {
    let mut groups: BTreeMap<(usize, String), Vec<usize>> = BTreeMap::new();
    for (place, (bottle, point)) in rows.iter().enumerate() {
        let Some(point) = point else {
            continue;
        };
        groups
            .entry((*point, own_name(site, *point, &bottles[*bottle])))
            .or_default()
            .push(place);
    }
    groups
        .into_iter()
        .map(|((point, own), mut judged)| {
            judged.sort_by_key(|j| {
                let b = &bottles[rows[*j].0];
                (b.drawn, b.place.row)
            });
            let mut days: BTreeMap<Date, usize> = BTreeMap::new();
            for j in &judged {
                if let Some(day) = bottles[rows[*j].0].drawn {
                    *days.entry(day).or_default() += 1;
                }
            }
            let address = site.points[point].address();
            Unit {
                point,
                name: if own.is_empty() {
                    address
                } else {
                    format!("{address} ({own})")
                },
                judged,
                twice: days
                    .into_iter()
                    .filter(|(_, n)| *n > 1)
                    .map(|(d, _)| d)
                    .collect(),
                trend: Trend::TooFew { samples: 0 },
                of_this_fill: 0,
                events: Vec::new(),
                rises: Vec::new(),
            }
        })
        .collect()
}

/// What tells one of several machines alike from the others: the bottle's own word for it.
fn own_name(site: &Site, point: usize, bottle: &Bottle) -> String {
    let at = &site.points[point];
    let written = bottle.machine.trim();
    let plain =
        written.eq_ignore_ascii_case(&at.machine) || written.eq_ignore_ascii_case(&at.address());
    if at.count > 1 && !plain {
        written.to_owned()
    } else {
        String::new()
    }
}

/// Two bottles of one machine and day: a problem, no coin toss.
pub(super) fn tell_twice(units: &[Unit], bottles: &[Bottle], problems: &mut Vec<Problem>) {
    for unit in units {
        for day in &unit.twice {
            let same: Vec<&Bottle> = bottles
                .iter()
                .filter(|b| b.drawn == Some(*day) && is_of(unit, b))
                .collect();
            let Some(first) = same.first() else {
                continue;
            };
            let mut problem = Problem::new(
                Code::BottleTwice,
                format!("{} bottles of {} on {day}", same.len().max(2), unit.name),
                Place::Cell(first.place.clone()),
            )
            .why("nobody could tell which of them is right")
            .so("none of them is judged; all are listed")
            .write(Write::words("the right day, or only one of them"));
            for other in same.iter().skip(1) {
                problem = problem.related(Place::Cell(other.place.clone()), other.name());
            }
            problems.push(problem);
        }
    }
}

fn is_of(unit: &Unit, bottle: &Bottle) -> bool {
    let written = bottle.machine.trim();
    let (address, own) = match unit.name.split_once(" (") {
        Some((address, own)) => (address, own.trim_end_matches(')')),
        None => (unit.name.as_str(), ""),
    };
    if own.is_empty() {
        written.eq_ignore_ascii_case(address) || !written.is_empty()
    } else {
        written.eq_ignore_ascii_case(own)
    }
}

/// Marks the latest and the doubles, and works the trend out.
pub(super) fn settle(
    units: &mut [Unit],
    judged: &mut [Judged],
    bottles: &[Bottle],
    site: &Site,
    auditor: &Auditor<'_, '_>,
) {
    for unit in units {
        for place in &unit.judged {
            let day = bottles[judged[*place].bottle].drawn;
            judged[*place].twice = day.is_some_and(|d| unit.twice.contains(&d));
        }
        if let Some(latest) = unit.latest() {
            judged[latest].latest = true;
        }
        let fill = this_fill(unit, judged, bottles, site);
        unit.of_this_fill = fill.len();
        unit.events = events(unit, &fill, judged, bottles, site);
        unit.rises = rises(&fill, judged, bottles, auditor);
        unit.trend = trend_of(unit, &fill, judged, bottles, site, auditor);
    }
}

/// The dated samples of the fill that is in the machine now: after the last change or flush, and
/// after the hours on the oil began anew.
fn this_fill(unit: &Unit, judged: &[Judged], bottles: &[Bottle], site: &Site) -> Vec<usize> {
    let address = site.points[unit.point].address();
    let changed = site
        .events
        .iter()
        .filter(|e| e.machine.value == address && matches!(e.what, Done::Change | Done::Flush))
        .map(|e| e.date);
    let latest = unit.latest().and_then(|j| bottles[judged[j].bottle].drawn);
    let since = changed.filter(|d| latest.is_some_and(|l| *d <= l)).max();
    let bottle = |j: &usize| &bottles[judged[*j].bottle];
    let mut fill: Vec<usize> = Vec::new();
    let mut hours_before: Option<f64> = None;
    for place in &unit.judged {
        let b = bottle(place);
        let Some(day) = b.drawn.filter(|_| !judged[*place].twice && !b.shifted) else {
            continue;
        };
        if since.is_some_and(|s| day < s) {
            continue;
        }
        let hours = b.figures.exact(Reading::HoursOnOil);
        if let (Some(now), Some(before)) = (hours, hours_before)
            && now < before
        {
            fill.clear();
        }
        hours_before = hours.or(hours_before);
        fill.push(*place);
    }
    fill
}

fn events(
    unit: &Unit,
    fill: &[usize],
    judged: &[Judged],
    bottles: &[Bottle],
    site: &Site,
) -> Vec<String> {
    let point = &site.points[unit.point];
    let address = point.address();
    let first = fill.first().and_then(|j| bottles[judged[*j].bottle].drawn);
    let mut list: Vec<&crate::model::sample::Event> = site
        .events
        .iter()
        .filter(|e| e.machine.value == address)
        .collect();
    list.sort_by_key(|e| e.date);
    list.into_iter()
        .filter(|e| e.what != Done::TopUp || first.is_none_or(|f| e.date >= f))
        .map(|e| {
            let oil = e
                .oil
                .as_ref()
                .map_or(String::new(), |o| format!(" with {}", o.value));
            let amount = e.amount.map_or(String::new(), |a| {
                use crate::quantity::show::{Toward, significant};
                format!(", {} L", significant(a.base() * 1e3, 3, Toward::Nearest))
            });
            format!("{} {}{oil}{amount}", e.date, e.what.word())
        })
        .collect()
}

/// Share of the fill that was added between its first day and a day.
fn added(unit: &Unit, since: Option<Date>, until: Date, bottle: &Bottle, site: &Site) -> f64 {
    let point = &site.points[unit.point];
    let fill = match point.fill.as_ref().and_then(|f| f.known()).map(|g| g.value) {
        Some(Fill::Oil(volume)) => volume.base() * 1e3,
        _ => return 0.0,
    };
    let address = point.address();
    let by_events: f64 = site
        .events
        .iter()
        .filter(|e| e.machine.value == address && e.what == Done::TopUp)
        .filter(|e| e.date <= until && since.is_none_or(|s| e.date >= s))
        .filter_map(|e| e.amount)
        .map(|a| a.base() * 1e3)
        .sum();
    let by_bottle = bottle.figures.exact(Reading::ToppedUp).unwrap_or(0.0);
    (by_events.max(by_bottle) / fill.max(1e-6)).clamp(0.0, 1.0)
}

fn rises(
    fill: &[usize],
    judged: &[Judged],
    bottles: &[Bottle],
    auditor: &Auditor<'_, '_>,
) -> Vec<Rise> {
    let [.., before, after] = fill else {
        return Vec::new();
    };
    let (before, after) = (
        &bottles[judged[*before].bottle],
        &bottles[judged[*after].bottle],
    );
    let hours = |b: &Bottle| {
        let figures = &b.figures;
        figures
            .exact(Reading::HoursOnOil)
            .or(figures.exact(Reading::HoursOnMachine))
    };
    let between = hours(before).zip(hours(after)).map(|(a, b)| b - a);
    metals::rises(
        &before.figures,
        &after.figures,
        between,
        auditor.scales.rules,
        auditor.scatter(),
    )
}

fn trend_of(
    unit: &Unit,
    fill: &[usize],
    judged: &[Judged],
    bottles: &[Bottle],
    site: &Site,
    auditor: &Auditor<'_, '_>,
) -> Trend {
    let first = fill.first().and_then(|j| bottles[judged[*j].bottle].drawn);
    let readings: Vec<trend::Reading> = fill
        .iter()
        .filter_map(|j| {
            let b = &bottles[judged[*j].bottle];
            let nu40 = b.figures.exact(Reading::Nu40)?;
            let day = b.drawn?;
            Some(trend::Reading {
                day,
                nu40,
                sigma: auditor.scatter().sigma(Reading::Nu40, nu40),
                hours: b.figures.exact(Reading::HoursOnOil),
                added: added(unit, first, day, b, site),
            })
        })
        .collect();
    let Some(latest) = fill.last().map(|j| &judged[*j]) else {
        return Trend::TooFew { samples: 0 };
    };
    let new = latest.label.oil.map(|o| auditor.profile(o).nu40());
    let limits = auditor.limits_of(Some(unit.point), latest.label.oil);
    let act = |low: bool| {
        let side = if low {
            limits.low(On::ViscosityChange40)
        } else {
            limits.high(On::ViscosityChange40)
        };
        side.and_then(|l| l.act)
    };
    let ahead = Ahead {
        floor: latest.serves.as_ref().and_then(|s| s.floor40),
        ceiling: latest.serves.as_ref().and_then(|s| s.ceiling40),
        label_low: new.zip(act(true)).map(|(n, a)| n * (1.0 - a)),
        label_high: new.zip(act(false)).map(|(n, a)| n * (1.0 + a)),
    };
    trend::of(&readings, new, &ahead)
}
