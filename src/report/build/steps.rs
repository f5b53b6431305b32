//! The calculation: the steps the results of the sheet stand on, numbered, each with its formula,
//! its numbers and where they come from. Values as given stand inside the steps that use them;
//! what is worked out twice is printed once.

use super::case::Case;
use super::inputs::origin;
use super::say;
use crate::judge::explain::Explanation;
use crate::judge::weigh::Margin;
use crate::quantity::show::{Toward, Units};
use crate::quantity::{Amount, Kind};
use crate::relation::Law;
use crate::report::model::{CalcStep, Put};
use crate::report::names::Href;
use crate::results::need::end_word;
use crate::source::place::Whose;
use crate::trace::{Derivation, How, Step, StepId};
use crate::weighing::Candidate;
use std::collections::BTreeMap;
use std::fmt::Write as _;

/// The steps of a point.
#[derive(Clone, Debug, Default)]
pub(super) struct Steps {
    pub(super) list: Vec<CalcStep>,
    /// Relations used, by name.
    pub(super) laws: BTreeMap<&'static str, &'static Law>,
    of_demand: BTreeMap<StepId, (String, Href)>,
}

impl Steps {
    /// Number and link of the step of a limit.
    pub(super) fn of_demand(&self, step: StepId) -> Option<&(String, Href)> {
        self.of_demand.get(&step)
    }
}

/// Relations whose formulas take their numbers in the units the sheet shows: only there may the
/// figures be put in.
const AS_SHOWN: [&str; 19] = [
    "bearing-pitch-diameter",
    "bearing-nu1",
    "bearing-kappa",
    "bearing-required",
    "gear-running-rule",
    "gear-running-floor",
    "gear-centre-distance",
    "film-ratio",
    "film-wanted",
    "composite-roughness",
    "rq-from-ra",
    "sump-running",
    "sump-rise",
    "part-temperature",
    "pour-margin",
    "oil-ceiling-margin",
    "use-range-margin",
    "vg-step-floor",
    "vg-step-ceiling",
];

/// Relations that read an oil's line.
const READINGS: [&str; 2] = ["viscosity-at", "viscosity-piecewise"];

/// The steps of the lead in full, then those that sink the oil in use; their ids begin with `key`.
pub(super) fn steps(case: &Case<'_, '_>, key: &str) -> Steps {
    let mut out = Writer {
        case,
        key,
        steps: Steps::default(),
        known: BTreeMap::new(),
        shown: Vec::new(),
    };
    if let (Some(told), Some(lead)) = (&case.told, case.lead) {
        let mut results: Vec<StepId> = told.margins.iter().map(|e| e.step).collect();
        results.extend(&told.running);
        results.sort_unstable();
        out.trace(told, &results, lead, true);
    } else {
        let results: Vec<StepId> = case
            .w
            .demands
            .middle
            .list
            .iter()
            .flat_map(|d| [d.limit_step, d.at_step])
            .flatten()
            .collect();
        let bare = Explanation {
            trace: case.w.demands.trace.clone(),
            margins: Vec::new(),
            running: Vec::new(),
        };
        out.steps_of(&bare.trace, &results, None);
    }
    if let (Some(told), super::case::Now::Weighed(now)) = (&case.told_now, case.now) {
        let results = sinking(told, now);
        out.trace(told, &results, now, false);
    }
    out.finish()
}

/// The smallest margin of each end that is not met.
fn sinking(told: &Explanation, c: &Candidate) -> Vec<StepId> {
    let j = &c.judgement;
    let mut found: Vec<StepId> = [j.hot, j.cold, j.pour, j.oil, j.maker]
        .into_iter()
        .flatten()
        .filter(|m| m.value < 0.0)
        .filter_map(|m| told.margins.iter().find(|e| e.demand == m.demand))
        .map(|e| e.step)
        .collect();
    found.sort_unstable();
    found
}

struct Writer<'c, 'r, 'a> {
    case: &'c Case<'r, 'a>,
    /// Key of the ids of the steps on the sheet.
    key: &'c str,
    steps: Steps,
    /// What a step works out, and from what, against its place in the list.
    known: BTreeMap<String, usize>,
    /// Places of the steps the traced ones are shown at.
    shown: Vec<BTreeMap<StepId, usize>>,
}

impl Writer<'_, '_, '_> {
    fn trace(&mut self, told: &Explanation, results: &[StepId], of: &Candidate, full: bool) {
        self.steps_of(&told.trace, results, Some(of));
        let places = self.shown.last().cloned().unwrap_or_default();
        self.deciding(told, of, &places);
        if full {
            self.limits(&places);
        }
    }

    /// Writes the steps some results stand on.
    fn steps_of(&mut self, trace: &Derivation, results: &[StepId], of: Option<&Candidate>) {
        let mut places: BTreeMap<StepId, usize> = BTreeMap::new();
        for step in trace.behind(results) {
            let How::Law { law, with } = &step.how else {
                continue;
            };
            self.steps.laws.insert(law.name, law);
            let key = identity(trace, step, law, with, &places);
            let at = match self.known.get(&key) {
                Some(at) => *at,
                None => {
                    let at = self.steps.list.len();
                    let written = self.one(trace, step, (law, with), &places, of);
                    self.steps.list.push(written);
                    self.known.insert(key, at);
                    at
                }
            };
            for (_, used) in with {
                if let Some(maker) = places.get(used) {
                    self.steps.list[*maker].carried = true;
                }
            }
            places.insert(step.id, at);
        }
        self.shown.push(places);
    }

    fn one(
        &self,
        trace: &Derivation,
        step: &Step,
        (law, with): (&'static Law, &[(&'static str, StepId)]),
        places: &BTreeMap<StepId, usize>,
        of: Option<&Candidate>,
    ) -> CalcStep {
        let units = self.case.units();
        let number = self.steps.list.len() + 1;
        let used: Vec<(&'static str, &Step)> = with
            .iter()
            .filter_map(|(symbol, id)| Some((*symbol, trace.step(*id)?)))
            .collect();
        let puts = used
            .iter()
            .map(|(symbol, step)| {
                let link = places.get(&step.id).map(|at| self.link(*at));
                put((units, law), symbol, step, link)
            })
            .collect();
        let mut notes: Vec<String> = step.notes.iter().map(|n| say::told(n, units)).collect();
        for (_, given) in &used {
            notes.extend(remarks(given, units));
        }
        notes.extend(of.and_then(|c| self.carried_on(law, &used, c)));
        notes.extend(of.and_then(|c| self.points_from(law, c)));
        notes.dedup();
        let about = step
            .about
            .as_ref()
            .map_or(String::new(), |a| format!("{a}: "));
        CalcStep {
            id: format!("{}-s{number}", self.key),
            number: number.to_string(),
            title: say::sentence(&say::told(&format!("{about}{}", step.says), units)),
            formula: Some(applied(law, &used)),
            with: puts,
            result: say::amount(step.amount, units, Toward::Nearest),
            aside: String::new(),
            source: say::told(law.source, units),
            notes,
            carried: false,
            governs: false,
        }
    }

    fn link(&self, at: usize) -> (String, Href) {
        let step = &self.steps.list[at];
        let href = Href::here(&self.case.place.id(&step.id));
        (step.number.clone(), href)
    }

    /// Where the points of an oil's line come from, said at the first reading.
    fn points_from(&self, law: &Law, of: &Candidate) -> Option<String> {
        let oil = self.case.oil(of.oil);
        let source = oil.source.as_ref()?;
        let text = format!("Points of {}: {source}.", oil.id);
        let said = self.steps.list.iter().any(|s| s.notes.contains(&text));
        (READINGS.contains(&law.name) && !said).then_some(text)
    }

    /// How far a reading lies outside the points the line was drawn through.
    fn carried_on(
        &self,
        law: &Law,
        used: &[(&'static str, &Step)],
        of: &Candidate,
    ) -> Option<String> {
        if !READINGS.contains(&law.name) {
            return None;
        }
        let t = used
            .iter()
            .find(|(symbol, _)| *symbol == "t")?
            .1
            .amount
            .base;
        outside(self.case, of.oil, t)
    }

    /// Marks the margins that decide, with the reserve asked.
    fn deciding(&mut self, told: &Explanation, of: &Candidate, places: &BTreeMap<StepId, usize>) {
        let j = &of.judgement;
        let decide = [
            (j.hot, "hot"),
            (j.cold, "cold"),
            (j.maker, "to the maker's grade"),
        ];
        for (m, word) in decide {
            let Some(at) = m.and_then(|m| place_of(told, m, places)) else {
                continue;
            };
            let step = &mut self.steps.list[at];
            step.governs = true;
            step.aside = if word == "hot" || word == "cold" {
                format!("smallest margin {word}; reserve asked {}", j.reserve)
            } else {
                format!("margin {word}")
            };
        }
        for (m, word) in [(j.pour, "cold"), (j.oil, "hot")] {
            if let Some(at) = m.and_then(|m| place_of(told, m, places)) {
                let step = &mut self.steps.list[at];
                step.aside =
                    format!("smallest margin in kelvins, {word}; reserve inside the limit");
            }
        }
    }

    /// Names the limits that govern and keeps the places of all of them.
    fn limits(&mut self, places: &BTreeMap<StepId, usize>) {
        let middle = &self.case.w.demands.middle;
        for (i, d) in middle.list.iter().enumerate() {
            let Some(step) = d.limit_step else { continue };
            let Some(at) = places.get(&step) else {
                continue;
            };
            let link = self.link(*at);
            self.steps.of_demand.insert(step, link);
            if middle.governing(d.end) == Some(i) {
                let step = &mut self.steps.list[*at];
                step.governs = true;
                step.aside = format!("governs the {}", end_word(d.end));
            }
        }
    }

    fn finish(self) -> Steps {
        self.steps
    }
}

fn place_of(told: &Explanation, m: Margin, places: &BTreeMap<StepId, usize>) -> Option<usize> {
    let step = told.margins.iter().find(|e| e.demand == m.demand)?.step;
    places.get(&step).copied()
}

/// The branch of a formula that was used, where its text has several: the whole text stands on the
/// sheet of methods.
pub(super) fn applied(law: &Law, used: &[(&'static str, &Step)]) -> String {
    let number = |symbol: &str| {
        let step = used.iter().find(|(s, _)| *s == symbol)?.1;
        Some(
            step.amount
                .in_unit(crate::quantity::show::unit_of(step.amount.kind, Units::Si)),
        )
    };
    let branches: Vec<&str> = law.formula.split("; ").collect();
    if let ("bearing-nu1", [slow, fast], Some(n)) = (law.name, branches.as_slice(), number("n")) {
        let (branch, end) = if n < 1000.0 {
            (slow, " below")
        } else {
            (fast, " from")
        };
        return branch.split(end).next().unwrap_or(branch).to_owned();
    }
    let thick = used
        .iter()
        .filter(|(_, s)| s.amount.kind == Kind::KinematicViscosity)
        .all(|(_, s)| s.amount.base >= 2e-6);
    match law.formula.split_once(" (all points") {
        Some((short, _)) if thick && READINGS.contains(&law.name) => short.to_owned(),
        _ => law.formula.to_owned(),
    }
}

/// Two steps are the same where the same relation works out the same quantity from the same
/// numbers.
fn identity(
    trace: &Derivation,
    step: &Step,
    law: &Law,
    with: &[(&'static str, StepId)],
    places: &BTreeMap<StepId, usize>,
) -> String {
    let mut key = format!(
        "{} {} {:016x}",
        law.name,
        step.symbol,
        step.amount.base.to_bits()
    );
    for (symbol, id) in with {
        let base = trace.step(*id).map_or(0, |s| s.amount.base.to_bits());
        let made = places.get(id).map_or(String::new(), usize::to_string);
        let _ = write!(key, " {symbol}={base:016x}@{made}");
    }
    key
}

/// One number put into a formula, with where it comes from: a step, or somebody's word.
pub(super) fn put(
    (units, law): (Units, &Law),
    symbol: &str,
    step: &Step,
    link: Option<(String, Href)>,
) -> Put {
    let (figure, _) = say::parts(step.amount, units, Toward::Nearest);
    let as_shown = units == Units::Si && AS_SHOWN.contains(&law.name);
    let number = match figure.strip_prefix('\u{2212}') {
        Some(_) if as_shown => format!("({figure})"),
        _ if as_shown => figure,
        _ => String::new(),
    };
    let mut shown = say::amount(step.amount, units, Toward::Nearest);
    let mut from = None;
    if let How::Given { written, origin: o } = &step.how {
        from = Some(origin(o.whose));
        if converted(step.amount, written) {
            shown = format!("{shown}, written {}", say::set(written));
        }
    }
    Put {
        symbol: symbol.to_owned(),
        number,
        shown,
        origin: from,
        step: link,
    }
}

/// What the origin of a value as given says that the reader should know.
pub(super) fn remarks(step: &Step, units: Units) -> Vec<String> {
    let How::Given { origin, .. } = &step.how else {
        return Vec::new();
    };
    let mut notes: Vec<String> = step.notes.iter().map(|n| say::told(n, units)).collect();
    if origin.whose == Whose::Assumed
        && let Some(why) = &origin.note
    {
        notes.push(format!(
            "{}: {}.",
            say::sentence(&step.says),
            say::told(why, units)
        ));
    }
    notes
}

/// Whether a value was written in another unit than the one it is shown in.
fn converted(amount: Amount, written: &str) -> bool {
    if amount.kind == Kind::VgStep || written.contains("..") || written.starts_with("unknown") {
        return false;
    }
    let unit = crate::quantity::show::unit_for(amount, Units::Si);
    let shown = crate::quantity::show::in_unit(amount, unit, Toward::Nearest);
    let figure = shown.split(' ').next().unwrap_or("");
    let same = |word: &str| {
        word.trim_end_matches(',') == figure
            || word.parse::<f64>().is_ok_and(|w| {
                figure
                    .replace('\u{202f}', "")
                    .parse::<f64>()
                    .is_ok_and(|f| (w - f).abs() <= 1e-9 * f.abs())
            })
    };
    !written.is_empty() && !written.starts_with('{') && !written.split(' ').any(same)
}

/// How far a temperature lies outside the stated points of an oil.
pub(super) fn outside(case: &Case<'_, '_>, oil: usize, t: f64) -> Option<String> {
    use crate::quantity::Measure;
    let curves = &case.ready(oil).curves;
    let (lowest, highest) = (curves.lowest.base(), curves.highest.base());
    let there = say::temperature(t, case.units());
    let by = |kelvins: f64| {
        let rise = Amount {
            kind: Kind::Rise,
            base: kelvins,
        };
        say::amount(rise, case.units(), Toward::Nearest)
    };
    if t < lowest - 1e-6 {
        let by = by(lowest - t);
        Some(format!(
            "{there} lies {by} below the coldest stated point: carried on, not stated."
        ))
    } else if t > highest + 1e-6 {
        let by = by(t - highest);
        Some(format!(
            "{there} lies {by} above the hottest stated point: carried on, not stated."
        ))
    } else {
        None
    }
}
