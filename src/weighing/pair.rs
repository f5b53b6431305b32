//! One oil on one point, either of them changed: how a decision is tried and tried again.

use super::facts;
use super::{Barred, Candidate, Scales, Weighed, condition, oil_in_use};
use crate::demand::settings::{every_setting, untraced};
use crate::demand::{Demands, PointDemands, Scenario, demands};
use crate::judge::{Judgement, PreparedOil, PreparedPoint, weigh};
use crate::model::Point;
use crate::trace::{Derivation, Silent};

/// One oil weighed on one point, with everything its verdict stands on.
#[derive(Clone, Debug)]
pub struct Pair {
    /// The demands of the point.
    pub demands: PointDemands,
    /// The point made ready.
    pub ready: PreparedPoint,
    /// The candidate, or why it is barred.
    pub outcome: Result<Candidate, Barred>,
}

impl Scales<'_> {
    /// A point made ready without a trace, with a reserve of its own.
    pub fn ready(&self, point: &Point, reserve: f64) -> PreparedPoint {
        let (settings, _) = every_setting(point, &self.site.house, self.rules);
        self.made_ready(point, &settings, reserve)
    }

    /// Margins and word alone, for a point and an oil that may both be changed.
    pub fn judge(&self, point: &Point, oil: &PreparedOil, reserve: f64) -> Judgement {
        weigh(&self.ready(point, reserve), oil)
    }

    /// The same in a single setting of the unknowns, with inputs taken at other values.
    pub fn judge_under(
        &self,
        point: &Point,
        setting: Scenario,
        oil: &PreparedOil,
        reserve: f64,
    ) -> Judgement {
        let alone = demands(&mut Silent, point, &self.site.house, self.rules, &setting);
        weigh(&self.made_ready(point, &[alone], reserve), oil)
    }

    /// One oil of the list on a point that may be changed, in a state of its own where `instead`
    /// is given, judged in full: eligibility, conditions, verdict and reasons.
    pub fn pair(
        &self,
        point: &Point,
        oil: usize,
        instead: Option<&PreparedOil>,
        reserve: f64,
    ) -> Pair {
        let demands = untraced(point, &self.site.house, self.rules);
        let ready = self.made_ready(point, &demands.settings, reserve);
        let facts = facts::of_point(point, &demands, self.in_use_facts(point));
        let card = self.suitability.point(&facts);
        let described = &self.site.oils[oil];
        let in_use = oil_in_use(point) == Some(described.id.as_str());
        let state = instead.unwrap_or(&self.oils[oil]);
        let changed = instead.map(|ready| facts::of_oil(described, ready));
        let facts_of_oil = changed.as_ref().unwrap_or(&self.facts[oil]);
        let eligible = self
            .suitability
            .assess(&card, &self.suitability.oil(facts_of_oil));
        let outcome = if eligible.barred() {
            Err(Barred {
                oil,
                by: eligible.barred_by.iter().map(condition).collect(),
                in_use,
            })
        } else {
            let judged = weigh(&ready, state);
            let state = (oil, state);
            Ok(self.candidate(&demands, &ready, state, judged, &eligible, in_use))
        };
        Pair {
            demands,
            ready,
            outcome,
        }
    }
}

impl<'a> Scales<'a> {
    /// A weighed point with one oil of the list in another state among the others.
    pub fn weigh_with_oil(&self, w: &Weighed<'a>, oil: usize, state: &PreparedOil) -> Weighed<'a> {
        let mut next = w.clone();
        next.candidates.retain(|c| c.oil != oil);
        next.barred.retain(|b| b.oil != oil);
        match self.pair(w.point, oil, Some(state), self.reserve).outcome {
            Ok(candidate) => next.candidates.push(candidate),
            Err(barred) => next.barred.push(barred),
        }
        self.sort(&mut next.candidates);
        next
    }

    /// Weighs every oil on a point as if one thing were found out: each of its settings changed
    /// by `closed`. Nothing is traced.
    pub fn weigh_closed(
        &self,
        point: &'a Point,
        of: &PointDemands,
        closed: impl Fn(&Scenario) -> Scenario,
    ) -> Weighed<'a> {
        let mut shares: Vec<Scenario> = Vec::new();
        for setting in of.shares.iter().map(closed) {
            if !shares.contains(&setting) {
                shares.push(setting);
            }
        }
        let settings: Vec<Demands> = shares
            .iter()
            .map(|s| demands(&mut Silent, point, &self.site.house, self.rules, s))
            .collect();
        let demands = PointDemands {
            trace: Derivation::new(),
            middle: settings[0].clone(),
            settings,
            shares,
        };
        let ready = self.made_ready(point, &demands.settings, self.reserve);
        self.weigh_on(point, demands, ready, |_| true)
    }
}

impl Weighed<'_> {
    /// The candidate of an oil, where it was weighed.
    pub fn candidate(&self, oil: usize) -> Option<&Candidate> {
        self.candidates.iter().find(|c| c.oil == oil)
    }
}
