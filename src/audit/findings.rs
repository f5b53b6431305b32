//! What was found, in order of urgency, each with a proposal of what to do.

mod changed;
mod condition;
mod without;

use super::Audit;
use super::judged::Judged;
use super::limits::Level;
use super::trend::Trend;
use super::units::Unit;
use super::whose::Whose;
use crate::judge::Verdict;
use crate::quantity::show::{Toward, fixed, margin, significant};
use crate::weighing::Scales;
use changed::changed;
use condition::{condition, metals, trend};
use std::fmt::Write as _;
use without::{unmatched, unsampled};

/// A finding.
#[derive(Clone, Debug, PartialEq)]
pub struct Finding {
    /// Its stable name.
    pub kind: &'static str,
    /// `watch` or `act`.
    pub level: Level,
    /// The machines, by name.
    pub machines: Vec<String>,
    /// What is the matter, in a few words.
    pub title: String,
    /// What was found.
    pub text: String,
    /// What to do.
    pub act: String,
    /// The sample it rests on, by its place among the judged.
    pub judged: Option<usize>,
    /// Order within its level: the smaller the more pressing.
    urgency: f64,
}

/// All findings of an audit.
pub(super) fn of(audit: &Audit, scales: &Scales<'_>) -> Vec<Finding> {
    let mut list = Vec::new();
    for unit in &audit.units {
        list.extend(of_unit(audit, unit, scales));
    }
    list.extend(unsampled(audit, scales));
    list.extend(audit.unmatched.iter().map(|u| unmatched(audit, u)));
    list.sort_by(|a, b| {
        b.level
            .cmp(&a.level)
            .then(a.urgency.total_cmp(&b.urgency))
            .then_with(|| a.machines.cmp(&b.machines))
            .then_with(|| a.kind.cmp(b.kind))
    });
    list
}

fn of_unit(audit: &Audit, unit: &Unit, scales: &Scales<'_>) -> Vec<Finding> {
    let Some(place) = unit.latest() else {
        return Vec::new();
    };
    let j = &audit.judged[place];
    if j.twice {
        return vec![plain(
            unit,
            place,
            "bottles-twice",
            Level::Watch,
            60.0,
            "Two bottles of one day",
            format!(
                "There are two bottles of {}. Which is right cannot be told, so neither is judged.",
                day(audit, j)
            ),
            "compare the bottles with the machine, or draw another sample",
        )];
    }
    if audit.bottles[j.bottle].shifted {
        return vec![plain(
            unit,
            place,
            "row-shifted",
            Level::Watch,
            61.0,
            "Row not read",
            "The cells of its row stand under other headings, so none of its figures is used."
                .to_owned(),
            "mend the row of the laboratory's table and run the audit again",
        )];
    }
    if j.too_old {
        let days = j.age_days.unwrap_or(0);
        return vec![plain(
            unit,
            place,
            "sample-old",
            Level::Watch,
            62.0,
            "Sample too old",
            format!(
                "The last sample is of {}, {days} days ago, past the age the site allows. It says nothing of today.",
                day(audit, j)
            ),
            "draw a sample",
        )];
    }
    let mut list = Vec::new();
    list.extend(service(audit, unit, place, scales));
    list.extend(changed(audit, unit, place, scales));
    list.extend(condition(audit, unit, place));
    list.extend(trend(unit, place));
    list.extend(metals(unit, place));
    list
}

#[expect(clippy::too_many_arguments, reason = "the fields of a finding")]
fn plain(
    unit: &Unit,
    place: usize,
    kind: &'static str,
    level: Level,
    urgency: f64,
    title: &str,
    text: String,
    act: &str,
) -> Finding {
    Finding {
        kind,
        level,
        machines: vec![unit.name.clone()],
        title: title.to_owned(),
        text,
        act: act.to_owned(),
        judged: Some(place),
        urgency,
    }
}

fn day(audit: &Audit, j: &Judged) -> String {
    let b = &audit.bottles[j.bottle];
    match b.drawn {
        Some(day) => day.to_string(),
        None if b.drawn_written.is_empty() => "an unknown day".to_owned(),
        None => b.drawn_written.clone(),
    }
}

fn label(j: &Judged, scales: &Scales<'_>) -> String {
    match (j.label.oil, &j.label.written) {
        (Some(oil), _) => scales.site.oils[oil].id.clone(),
        (None, Some(written)) => written.clone(),
        (None, None) => "unknown".to_owned(),
    }
}

fn nu40(audit: &Audit, j: &Judged) -> String {
    use crate::model::sample::Reading;
    let figure = audit.bottles[j.bottle].figures.get(Reading::Nu40);
    figure.map_or("not measured".to_owned(), |f| {
        format!("{} mm2/s at 40 degC", f.written)
    })
}

/// `needs at least 174 and at most 663 mm2/s at 40 degC`.
pub fn asks(j: &Judged) -> String {
    let Some(s) = &j.serves else {
        return "need not known".to_owned();
    };
    let up = |v: f64| significant(v, 3, Toward::Up);
    let down = |v: f64| significant(v, 3, Toward::Down);
    match (s.floor40, s.ceiling40) {
        (Some(f), Some(c)) if f > c => {
            format!(
                "at least {} and at most {} mm2/s: no value fits",
                up(f),
                down(c)
            )
        }
        (Some(f), Some(c)) => format!("{} to {} mm2/s", up(f), down(c)),
        (Some(f), None) => format!("at least {} mm2/s", up(f)),
        (None, Some(c)) => format!("at most {} mm2/s", down(c)),
        (None, None) => "no limit of viscosity".to_owned(),
    }
}

/// Whether it serves.
#[expect(clippy::too_many_lines, reason = "one arm for each verdict")]
fn service(audit: &Audit, unit: &Unit, place: usize, scales: &Scales<'_>) -> Option<Finding> {
    let j = &audit.judged[place];
    let oil = label(j, scales);
    if j.is_barred() {
        let by: Vec<&str> = j.barred.iter().map(|c| c.says.as_str()).collect();
        let acts: Vec<&str> = j.barred.iter().map(|c| c.act.as_str()).collect();
        return Some(Finding {
            urgency: 12.0,
            ..plain(
                unit,
                place,
                "barred",
                Level::Act,
                0.0,
                "The labelled oil is barred here",
                format!(
                    "The oil is {oil}{}; {oil} is barred on this machine: {}.",
                    condition_words(j),
                    by.join("; ")
                ),
                acts.first()
                    .copied()
                    .unwrap_or("choose another oil (filmwright weigh)"),
            )
        });
    }
    let s = j.serves.as_ref()?;
    let why = s.because.first().cloned().unwrap_or_default();
    let found = nu40(audit, j);
    let need = asks(j);
    match s.verdict {
        Verdict::Fails => {
            let m = s.margin().unwrap_or(-9.0).max(-9.0);
            let (title, act) = match (j.whose, s.no_value_fits()) {
                (Whose::AsLabelled, true) => (
                    "Right oil, and no viscosity of its kind can serve",
                    "change the kind of oil, not the grade (filmwright weigh)",
                ),
                (Whose::AsLabelled, false) => (
                    "Right oil, wrong specification",
                    "change the specification, not only the oil (filmwright weigh)",
                ),
                (Whose::Another, _) => (
                    "Another oil, and it does not serve",
                    "drain and refill now, and find the source",
                ),
                (Whose::Changed, _) => (
                    "Changed oil, and it does not serve",
                    "change the oil now, and mend the cause",
                ),
                (Whose::NotKnown, _) => (
                    "It does not serve",
                    "take another sample at once and prepare an oil change",
                ),
            };
            let first = if j.whose == Whose::AsLabelled {
                20.0
            } else {
                0.0
            };
            Some(plain(
                unit,
                place,
                "does-not-serve",
                Level::Act,
                first + m,
                title,
                format!(
                    "{found} under the label {oil}; the machine needs {need}. {}.",
                    sentence(&why)
                ),
                act,
            ))
        }
        Verdict::Tight => Some(plain(
            unit,
            place,
            "tight",
            Level::Watch,
            40.0,
            "Serves without the full reserve",
            format!("{found}; the machine needs {need}. {}.", sentence(&why)),
            "sample again before the next season",
        )),
        Verdict::Open => Some(plain(
            unit,
            place,
            "open",
            Level::Watch,
            50.0,
            "Whether it serves is open",
            format!("{found}. {}.", sentence(&why)),
            "find the missing input (filmwright why names it)",
        )),
        Verdict::Holds => None,
    }
}

fn condition_words(j: &Judged) -> &'static str {
    match j.whose {
        Whose::AsLabelled => " as labelled and in condition",
        Whose::Changed => ", changed",
        _ => "",
    }
}

fn sentence(text: &str) -> String {
    let mut letters = text.chars();
    let first = letters.next().map(|c| c.to_uppercase().collect::<String>());
    format!(
        "{}{}",
        first.unwrap_or_default(),
        letters.as_str().trim_end_matches('.')
    )
}

/// The trend in a sentence.
pub fn trend_words(trend: &Trend) -> String {
    match trend {
        Trend::TooFew { samples } => format!("{samples} of this fill: too few to say"),
        Trend::Level { samples, .. } => {
            format!("{samples} samples of this fill, no movement beyond the scatter of the test")
        }
        Trend::Moves(m) => {
            let per_year = fixed(m.slope, 1, Toward::Nearest);
            let half = fixed(m.slope_half, 1, Toward::Up);
            let mut says = format!(
                "{per_year} mm2/s a year (+/- {half}, 95 %) over {} samples",
                m.samples
            );
            if let Some(r) = &m.reaches {
                let end = |d: Option<jiff::civil::Date>| {
                    d.map_or("not within a hundred years".to_owned(), |d| d.to_string())
                };
                let _ = write!(
                    says,
                    "; reaches the {} of {} mm2/s about {} (between {} and {})",
                    r.limit,
                    significant(r.nu40, 3, Toward::Nearest),
                    r.on,
                    end(r.between.0),
                    end(r.between.1)
                );
            }
            says
        }
    }
}

/// A margin as printed.
pub fn steps(value: Option<f64>) -> String {
    value.map_or("–".to_owned(), |v| margin(v, 1))
}
