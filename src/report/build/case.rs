//! One point weighed, with everything its part of a sheet is told from.

use super::Run;
use super::say;
use crate::decide::accept::accepted;
use crate::demand::{Demand, takes_grease};
use crate::judge::explain::{Explained, Explanation};
use crate::judge::margin::Ready;
use crate::judge::weigh::Margin;
use crate::judge::{Judgement, PreparedOil, Verdict};
use crate::model::site::Acceptance;
use crate::model::{Oil, OilNow};
use crate::quantity::show::Units;
use crate::report::model::{Degrees, Mark, item_letter};
use crate::report::names::Place;
use crate::source::place::Place as Stands;
use crate::weighing::{Barred, Candidate, Weighed};

/// What is in the point now.
#[derive(Clone, Copy, Debug)]
pub(super) enum Now<'r> {
    /// An oil that was weighed.
    Weighed(&'r Candidate),
    /// An oil that is barred here.
    Barred(&'r Barred),
    /// A lubricant of the other sort, a grease for an oil or the reverse: not weighed.
    Other(&'r str),
    /// Nobody knows.
    Unknown,
    /// Nothing yet.
    Nothing,
}

/// A point weighed.
pub(super) struct Case<'r, 'a> {
    pub(super) run: &'r Run<'a>,
    pub(super) w: &'r Weighed<'a>,
    /// Key of its ids on the sheet.
    pub(super) key: String,
    /// The sheet.
    pub(super) place: &'r Place,
    pub(super) now: Now<'r>,
    /// The oil the sheet tells of: the one proposed, else the best of those weighed.
    pub(super) lead: Option<&'r Candidate>,
    /// Whether the lead is proposed.
    pub(super) proposed: bool,
    /// The steps of the lead.
    pub(super) told: Option<Explanation>,
    /// The steps of the oil in use, where it is another and fails.
    pub(super) told_now: Option<Explanation>,
    /// The acceptance that makes a tight oil in use stand.
    pub(super) accepted: Option<&'a Acceptance>,
}

/// A verdict as its mark.
pub(super) fn mark(verdict: Verdict) -> Mark {
    match verdict {
        Verdict::Holds => Mark::Holds,
        Verdict::Tight => Mark::Tight,
        Verdict::Open => Mark::Open,
        Verdict::Fails => Mark::Fails,
    }
}

impl<'r, 'a> Case<'r, 'a> {
    pub(super) fn new(run: &'r Run<'a>, w: &'r Weighed<'a>, key: String, place: &'r Place) -> Self {
        let now = now(run, w);
        let accepted = accepted(run.scales.site, w, &run.head.date);
        let kept = w.in_use().filter(|_| accepted.is_some());
        let proposal = kept.or_else(|| w.proposed());
        let lead = proposal.or_else(|| w.candidates.first());
        let told = lead.map(|c| run.scales.explain(w, c));
        let told_now = match now {
            Now::Weighed(c) if c.judgement.verdict == Verdict::Fails => {
                let other = lead.is_none_or(|l| l.oil != c.oil);
                other.then(|| run.scales.explain(w, c))
            }
            _ => None,
        };
        Self {
            run,
            w,
            key,
            place,
            now,
            lead,
            proposed: proposal.is_some(),
            told,
            told_now,
            accepted,
        }
    }

    pub(super) fn units(&self) -> Units {
        self.run.scales.units
    }

    pub(super) fn degrees(&self) -> Degrees {
        say::degrees(self.units())
    }

    pub(super) fn grease(&self) -> bool {
        takes_grease(self.w.point)
    }

    pub(super) fn oil(&self, place: usize) -> &'a Oil {
        &self.run.scales.site.oils[place]
    }

    pub(super) fn id(&self, place: usize) -> &'a str {
        &self.oil(place).id
    }

    pub(super) fn ready(&self, place: usize) -> &'r PreparedOil {
        &self.run.scales.oils[place]
    }

    /// The letter of a candidate.
    pub(super) fn letter(&self, c: &Candidate) -> String {
        let place = self.w.candidates.iter().position(|o| o.oil == c.oil);
        item_letter(place.unwrap_or(0))
    }

    pub(super) fn is_lead(&self, c: &Candidate) -> bool {
        self.lead.is_some_and(|l| l.oil == c.oil)
    }

    /// Whether a candidate is the one proposed.
    pub(super) fn picked(&self, c: &Candidate) -> bool {
        self.proposed && self.is_lead(c)
    }

    /// The worn curve floors are judged on, where the oil wears.
    pub(super) fn worn(&self, oil: usize) -> Option<&'r Ready> {
        self.run.scales.worn(self.w, oil)
    }

    /// The demand of a margin, in the setting it was worst in.
    pub(super) fn demand(&self, m: Margin) -> &'r Demand {
        &self.w.demands.settings[usize::from(m.setting)].list[usize::from(m.demand)]
    }

    /// Its temperature there, K.
    pub(super) fn temperature(&self, m: Margin) -> Option<f64> {
        let setting = &self.w.demands.settings[usize::from(m.setting)];
        setting.governing_temperature(self.demand(m))
    }

    /// The steps of the lead's margin for a demand.
    pub(super) fn explained(&self, demand: u16) -> Option<&Explained> {
        let told = self.told.as_ref()?;
        told.margins.iter().find(|e| e.demand == demand)
    }

    /// What a margin alone would say.
    pub(super) fn margin_mark(j: &Judgement, m: Margin, reserve: f64) -> Mark {
        if m.value < -1e-9 {
            let fails = j.verdict == Verdict::Fails && j.unmet.iter().any(|n| n == m.demand);
            if fails { Mark::Fails } else { Mark::Open }
        } else if m.value < reserve {
            Mark::Tight
        } else {
            Mark::Holds
        }
    }

    /// A part as people call it: a component by the name of its window.
    pub(super) fn part_name<'p>(&'p self, label: &'p str) -> &'p str {
        let window = label
            .strip_prefix("component ")
            .and_then(|id| self.run.scales.rules.components.get(id));
        window.map_or(label, |w| w.name.as_str())
    }

    /// An id of this point on the sheet.
    pub(super) fn local(&self, what: &str) -> String {
        format!("{}-{what}", self.key)
    }

    /// The place of the point in sentences: its area, or `the place`.
    pub(super) fn where_it_stands(&self) -> &'a str {
        self.w.point.area.as_deref().unwrap_or("the place")
    }

    /// Where something stands, as people find it.
    pub(super) fn stands(&self, place: &Stands) -> String {
        self.run.stands(place)
    }
}

/// Whether a limit is compared at a fixed temperature instead of one the machine gets to.
pub(super) fn compared(demand: &Demand) -> bool {
    demand.at_step.is_none() && !demand.at.is_unknown()
}

/// What a demand asks and of what: `gear mesh low-speed stage: …`. A component's window names it.
pub(super) fn asks(demand: &Demand, units: Units) -> String {
    say::told(&demand.asks(), units)
}

fn now<'r>(run: &Run<'_>, w: &'r Weighed<'_>) -> Now<'r> {
    match &w.point.oil_now {
        OilNow::Unknown => Now::Unknown,
        OilNow::Nothing => Now::Nothing,
        OilNow::Oil(id) => {
            if let Some(c) = w.in_use() {
                return Now::Weighed(c);
            }
            if let Some(b) = w.barred.iter().find(|b| b.in_use) {
                return Now::Barred(b);
            }
            match run.scales.site.oil(&id.value) {
                Some(_) => Now::Other(&id.value),
                None => Now::Unknown,
            }
        }
    }
}
