//! One oil over the machines of a site: where it is in use, what it comes to there, how far it
//! may shear, how long it may live, what a year of it costs.

use super::{Scales, Weighed, oil_in_use};
use crate::demand::PointDemands;
use crate::judge::allowance::{Room, room};
use crate::judge::{Judgement, Verdict};
use crate::model::Point;
use crate::model::machine::{Fill, Lubrication};
use crate::model::oil::Price;
use crate::model::part::PartKind;
use crate::oil::life::{
    DrainGuide, LifeAt, NoLife, YearlyCost, basis, dirty_share, gear_drain, yearly_cost,
};
use crate::quantity::{Measure, ThermodynamicTemperature, Time};
use crate::suitability::Truth;

/// What an oil is to a machine.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Role {
    /// Filled today.
    InUse,
    /// The first candidate that holds or is tight, not filled today.
    Proposed,
    /// Weighed.
    Candidate,
    /// Barred by a suitability rule.
    Barred,
}

impl Role {
    /// In words.
    pub fn word(self) -> &'static str {
        match self {
            Self::InUse => "in use",
            Self::Proposed => "proposed",
            Self::Candidate => "candidate",
            Self::Barred => "barred",
        }
    }
}

/// An oil on one machine.
#[derive(Clone, Debug)]
pub struct OilUse {
    /// Address of the point.
    pub address: String,
    /// What the machine is called.
    pub title: Option<String>,
    /// What the oil is there.
    pub role: Role,
    /// The word; `None` where barred.
    pub verdict: Option<Verdict>,
    /// Margins and all.
    pub judgement: Option<Judgement>,
    /// The main reason, or the rule that bars.
    pub because: String,
    /// How far it may shear; `None` where barred or without polymer.
    pub room: Option<(Room, Option<String>)>,
    /// How it ages there; only where it is in use or asked for.
    pub age: Option<Age>,
}

/// How an oil ages in a machine.
#[derive(Clone, Debug)]
pub struct Age {
    /// Running temperature at the hottest ambient.
    pub at: ThermodynamicTemperature,
    /// Life there, both ways, or why there is none.
    pub life: Result<LifeAt, NoLife>,
    /// Longest stay by the calendar.
    pub calendar: Option<Time>,
    /// Drain intervals the rules know, as guidance.
    pub drain: Vec<DrainGuide>,
    /// Cost a year at the longest and at the shortest of those intervals.
    pub cost: Option<(YearlyCost, YearlyCost)>,
    /// What the cost lacks.
    pub cost_lacks: Vec<&'static str>,
}

/// In use first, then by verdict and address.
fn in_order(uses: &mut [OilUse]) {
    uses.sort_by(|a, b| {
        let key = |u: &OilUse| (u.role, u.verdict);
        key(a).cmp(&key(b)).then_with(|| a.address.cmp(&b.address))
    });
}

impl<'a> Scales<'a> {
    /// An oil of the list on every machine of the site, in use first, then by verdict.
    pub fn uses(&self, oil: usize) -> Vec<OilUse> {
        let points = self.site.points.iter();
        let mut all: Vec<OilUse> = points
            .filter_map(|point| self.use_in(oil, point, &self.weigh(point)))
            .collect();
        in_order(&mut all);
        all
    }

    /// An oil of the list on the machines that hold it today, without weighing the others.
    pub fn uses_today(&self, oil: usize) -> Vec<OilUse> {
        let mut all: Vec<OilUse> = self
            .holding(oil)
            .into_iter()
            .filter_map(|point| {
                let weighed = self.weigh_where(point, |i| i == oil);
                self.use_in(oil, point, &weighed)
            })
            .collect();
        in_order(&mut all);
        all
    }

    /// An oil on a machine already weighed; `None` where one takes grease and the other is oil.
    pub fn use_in(&self, oil: usize, point: &'a Point, weighed: &Weighed<'a>) -> Option<OilUse> {
        let in_use = oil_in_use(point) == Some(self.site.oils[oil].id.as_str());
        if let Some(barred) = weighed.barred.iter().find(|b| b.oil == oil) {
            let because = barred.by.first().map_or(String::new(), |c| c.says.clone());
            return Some(OilUse {
                address: point.address(),
                title: point.title.clone(),
                role: Role::Barred,
                verdict: None,
                judgement: None,
                because,
                room: None,
                age: in_use
                    .then(|| self.age(oil, point, &weighed.demands))
                    .flatten(),
            });
        }
        let candidate = weighed.candidates.iter().find(|c| c.oil == oil)?;
        let proposed = weighed.proposed().is_some_and(|c| c.oil == oil);
        let role = match (in_use, proposed) {
            (true, _) => Role::InUse,
            (false, true) => Role::Proposed,
            (false, false) => Role::Candidate,
        };
        Some(OilUse {
            address: point.address(),
            title: point.title.clone(),
            role,
            verdict: Some(candidate.judgement.verdict),
            because: candidate.because.first().cloned().unwrap_or_default(),
            room: self.room(oil, weighed),
            age: (role != Role::Candidate)
                .then(|| self.age(oil, point, &weighed.demands))
                .flatten(),
            judgement: Some(candidate.judgement.clone()),
        })
    }

    /// How far it may shear, with the demand it then meets no longer.
    fn room(&self, oil: usize, weighed: &Weighed<'_>) -> Option<(Room, Option<String>)> {
        let ready = &self.oils[oil];
        if !ready.curves.thickened {
            return None;
        }
        let room = room(&weighed.ready, ready);
        let demand = match room {
            Room::None { demand } | Room::UpTo { demand, .. } => Some(
                weighed.demands.middle.list[usize::from(demand)]
                    .says
                    .clone(),
            ),
            Room::NoFloor | Room::AllOfIt => None,
        };
        Some((room, demand))
    }

    /// How it ages there; `None` where the running temperature is not known.
    fn age(&self, oil: usize, point: &Point, demands: &PointDemands) -> Option<Age> {
        let stated = &self.site.oils[oil];
        let ready = &self.oils[oil];
        let at = demands.middle.thermal.hottest?.value;
        let basis = basis(stated, &ready.curves, self.rules);
        let mut drain = Vec::new();
        let splash = point.lubrication.as_ref().map(|l| l.value) == Some(Lubrication::Splash);
        let gears = point
            .parts
            .iter()
            .any(|p| matches!(p.kind, PartKind::GearMesh(_) | PartKind::WormMesh(_)));
        if splash
            && gears
            && let Ok(dirty) = dirty_share(self.rules)
        {
            drain.extend(gear_drain(&ready.curves, self.rules, at, dirty));
        }
        drain.extend(self.intervals(oil, point, demands, at));
        let calendar = basis.as_ref().ok().and_then(|b| b.calendar);
        let (cost, cost_lacks) = self.cost(oil, point, &drain, calendar);
        Some(Age {
            at,
            life: basis.map(|b| b.at(at)),
            calendar,
            drain,
            cost,
            cost_lacks,
        })
    }

    /// Change intervals of the rules whose conditions the pair meets.
    fn intervals(
        &self,
        oil: usize,
        point: &Point,
        demands: &PointDemands,
        at: ThermodynamicTemperature,
    ) -> Vec<DrainGuide> {
        let facts = super::facts::of_point(point, demands, self.in_use_facts(point));
        let card = self.suitability.point(&facts);
        let oil_card = self.suitability.oil(&self.facts[oil]);
        self.rules
            .changes
            .iter()
            .filter(|rule| rule.up_to.is_none_or(|most| at <= most))
            .filter(|rule| {
                self.suitability.holds(&rule.when, &card, Some(&oil_card)) == Truth::True
            })
            .map(|rule| DrainGuide {
                hours: (rule.hours.lo, rule.hours.hi),
                by: rule.oil.clone(),
                source: rule.provenance.cited(),
            })
            .collect()
    }

    /// Cost a year at the longest and the shortest interval.
    fn cost(
        &self,
        oil: usize,
        point: &Point,
        drain: &[DrainGuide],
        calendar: Option<Time>,
    ) -> (Option<(YearlyCost, YearlyCost)>, Vec<&'static str>) {
        let price = match self.site.oils[oil].price.as_ref().map(|p| p.value) {
            Some(Price::PerLitre(price)) => Some(price),
            _ => None,
        };
        let known =
            |stated: &Option<crate::model::Stated<Fill>>| match stated.as_ref()?.known()?.value {
                Fill::Oil(volume) => Some(volume.base() * 1e3),
                Fill::Grease(_) => None,
            };
        let fill = known(&point.fill);
        let hours = point
            .running_hours
            .as_ref()
            .and_then(|h| h.known())
            .map(|h| h.value.base());
        let ends = |t: fn(&DrainGuide) -> Time| drain.iter().map(t);
        let longest = ends(|d| d.hours.1).min_by(|a, b| a.base().total_cmp(&b.base()));
        let shortest = ends(|d| d.hours.0).min_by(|a, b| a.base().total_cmp(&b.base()));
        let mut lacks = Vec::new();
        for (missing, what) in [
            (price.is_none(), "price"),
            (fill.is_none(), "fill"),
            (hours.is_none(), "running hours"),
            (longest.is_none(), "drain interval"),
        ] {
            if missing {
                lacks.push(what);
            }
        }
        let all = (price, fill, hours, longest, shortest);
        let (Some(price), Some(fill), Some(hours), Some(longest), Some(shortest)) = all else {
            return (None, lacks);
        };
        // a year's use covers what is changed; only what goes beyond it is topped up
        let used = point
            .annual_use
            .as_ref()
            .and_then(|u| u.known())
            .map(|u| u.value.base() * 1e3);
        let at = |interval: Time| {
            let plain = yearly_cost(price, fill, hours, (interval, calendar), 0.0);
            let more = used.map_or(0.0, |used| (used - plain.litres).max(0.0));
            yearly_cost(price, fill, hours, (interval, calendar), more)
        };
        (Some((at(longest), at(shortest))), lacks)
    }
}
