//! From a read site to weighed candidates: every point, every oil, eligibility first.

pub mod facts;
pub mod pair;
mod ratio;
pub mod top_up;
pub mod uses;

pub use pair::Pair;

use crate::demand::{
    Demands, End, PointDemands, Scenario, Standing, demands, is_severe, point_demands, takes_grease,
};
use crate::judge::because::because;
use crate::judge::brief::brief;
use crate::judge::explain::{Explanation, explain};
use crate::judge::margin::Ready;
use crate::judge::order::{Candidate as Ordered, compare, quantised, thousandths};
use crate::judge::own::{Own, OwnSteps, Running, running};
use crate::judge::{Judgement, PreparedOil, PreparedPoint, Verdict, weigh};
use crate::model::facts::{OilFacts, SumpNow};
use crate::model::oil::Price;
use crate::model::rulebook::{Caution, Rulebook};
use crate::model::{Oil, OilNow, Point, Site};
use crate::oil::Curves;
use crate::quantity::Measure;
use crate::quantity::show::Units;
use crate::relation::oil::viscosity_temperature::Misfit;
use crate::suitability::{Eligibility, Finding, Suitability};
use crate::trace::{Derivation, Silent};
use std::collections::BTreeSet;

/// A numbered condition that rides with a verdict.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Condition {
    /// Id of the rule it comes from.
    pub rule: String,
    /// Its title, where it stands for a rule of the rules folder.
    pub title: String,
    /// What must be met, and why.
    pub says: String,
    /// What to do.
    pub act: String,
    /// The source.
    pub source: String,
}

/// One oil weighed on one point.
#[derive(Clone, Debug)]
pub struct Candidate {
    /// Its place in the oil list.
    pub oil: usize,
    /// Margins and word.
    pub judgement: Judgement,
    /// Conditions.
    pub conditions: Vec<Condition>,
    /// Notes of suitability rules.
    pub notes: Vec<Condition>,
    /// Facts that suitability rules need and nobody stated.
    pub facts_missing: Vec<String>,
    /// The question to put for each of them, in the same order.
    pub questions: Vec<String>,
    /// Why the word is what it is, the main reason first.
    pub because: Vec<String>,
    /// The main reason in a few words.
    pub brief: String,
    /// Whether it is the oil in use here.
    pub in_use: bool,
    /// Whether some point of the site holds it today.
    pub on_site: bool,
    /// How hot it runs and what it costs, where the losses of the point are known.
    pub running: Option<Running>,
}

/// One oil that a suitability rule bars.
#[derive(Clone, Debug)]
pub struct Barred {
    /// Its place in the oil list.
    pub oil: usize,
    /// The rules and reasons, at least one.
    pub by: Vec<Condition>,
    /// Whether it is the oil in use here.
    pub in_use: bool,
}

/// A point with its candidates in order.
#[derive(Clone, Debug)]
pub struct Weighed<'a> {
    /// The point.
    pub point: &'a Point,
    /// Its demands.
    pub demands: PointDemands,
    /// Ready to be judged.
    pub ready: PreparedPoint,
    /// Candidates, best first.
    pub candidates: Vec<Candidate>,
    /// Barred oils, in list order.
    pub barred: Vec<Barred>,
}

/// What a site's oils and rules are made ready into, once.
pub struct Scales<'a> {
    /// The site.
    pub site: &'a Site,
    /// The rules.
    pub rules: &'a Rulebook,
    /// Oils made ready, in list order.
    pub oils: Vec<PreparedOil>,
    /// Suitability rules compiled.
    pub suitability: Suitability<'a>,
    /// What the rules may ask of each oil, in list order.
    pub facts: Vec<OilFacts>,
    /// Reserve asked, VG steps.
    pub reserve: f64,
    /// Units of sentences.
    pub units: Units,
    on_site: BTreeSet<String>,
}

/// Settings of a weighing.
#[derive(Clone, Copy, Debug)]
pub struct Settings {
    /// Reserve instead of the site's, VG steps.
    pub reserve: Option<f64>,
    /// Whether floors are judged after permanent shear.
    pub worn: bool,
    /// Units of sentences.
    pub units: Units,
}

impl Default for Settings {
    fn default() -> Self {
        Self {
            reserve: None,
            worn: true,
            units: Units::Si,
        }
    }
}

impl<'a> Scales<'a> {
    /// Makes the oils of a site ready.
    ///
    /// # Errors
    /// The id of an oil whose points make no curve; the reader refuses such oils beforehand.
    pub fn new(
        site: &'a Site,
        rules: &'a Rulebook,
        settings: Settings,
    ) -> Result<Self, (String, Misfit)> {
        let oils = site
            .oils
            .iter()
            .map(|oil| PreparedOil::new(oil, rules, settings.worn).map_err(|e| (oil.id.clone(), e)))
            .collect::<Result<Vec<_>, _>>()?;
        let on_site = site
            .points
            .iter()
            .filter_map(oil_in_use)
            .map(str::to_owned)
            .collect();
        Ok(Self {
            site,
            rules,
            facts: site
                .oils
                .iter()
                .zip(&oils)
                .map(|(o, r)| facts::of_oil(o, r))
                .collect(),
            oils,
            suitability: Suitability::new(rules),
            reserve: settings.reserve.unwrap_or(site.house.reserve.value.base()),
            units: settings.units,
            on_site,
        })
    }

    /// The demands of a point, ready to be judged.
    pub fn prepare(&self, point: &Point) -> (PointDemands, PreparedPoint) {
        let demands = point_demands(point, &self.site.house, self.rules);
        let ready = self.made_ready(point, &demands.settings, self.reserve);
        (demands, ready)
    }

    fn made_ready(&self, point: &Point, settings: &[Demands], reserve: f64) -> PreparedPoint {
        let mut ready = PreparedPoint::new(settings, is_severe(point), reserve);
        if let Some(in_use) = self.in_use_curves(point) {
            ready.run_by_losses(settings, in_use);
        }
        ready
    }

    /// The curves of the oil a point holds, where it is of the list.
    pub fn in_use_curves(&self, point: &Point) -> Option<&Curves> {
        let at = oil_index(self.site, oil_in_use(point)?)?;
        Some(&self.oils[at].curves)
    }

    /// Weighs every oil on a point.
    pub fn weigh(&self, point: &'a Point) -> Weighed<'a> {
        self.weigh_where(point, |_| true)
    }

    /// Weighs those oils on a point that are wanted, by their place in the list.
    pub fn weigh_where(&self, point: &'a Point, wanted: impl Fn(usize) -> bool) -> Weighed<'a> {
        let (demands, ready) = self.prepare(point);
        self.weigh_on(point, demands, ready, wanted)
    }

    /// Weighs every oil on a point in a single setting of its unknowns, or with inputs taken at
    /// other values, to see what they would change. Nothing is traced.
    pub fn weigh_under(&self, point: &'a Point, setting: Scenario) -> Weighed<'a> {
        let alone = demands(&mut Silent, point, &self.site.house, self.rules, &setting);
        let demands = PointDemands {
            trace: Derivation::new(),
            middle: alone.clone(),
            settings: vec![alone],
            shares: vec![setting],
        };
        let ready = self.made_ready(point, &demands.settings, self.reserve);
        self.weigh_on(point, demands, ready, |_| true)
    }

    /// The cautions that belong on the sheet of a point, with the oil proposed where there is one.
    pub fn cautions(&self, weighed: &Weighed<'_>, oil: Option<usize>) -> Vec<&'a Caution> {
        let now = self.in_use_facts(weighed.point);
        let facts = facts::of_point(weighed.point, &weighed.demands, now);
        let card = self.suitability.point(&facts);
        let oil = oil.map(|i| self.suitability.oil(&self.facts[i]));
        self.suitability.cautions(&card, oil.as_ref())
    }

    fn weigh_on(
        &self,
        point: &'a Point,
        demands: PointDemands,
        ready: PreparedPoint,
        wanted: impl Fn(usize) -> bool,
    ) -> Weighed<'a> {
        let grease = takes_grease(point);
        let facts = facts::of_point(point, &demands, self.in_use_facts(point));
        let card = self.suitability.point(&facts);
        let (mut candidates, mut barred) = (Vec::new(), Vec::new());
        let now = oil_in_use(point)
            .and_then(|id| oil_index(self.site, id))
            .and_then(|i| self.running(point, &demands, i));
        for (i, oil) in self.site.oils.iter().enumerate() {
            if self.oils[i].grease != grease || !wanted(i) {
                continue;
            }
            let in_use = oil_in_use(point) == Some(oil.id.as_str());
            let eligible = self
                .suitability
                .assess(&card, &self.suitability.oil(&self.facts[i]));
            if eligible.barred() {
                let by = eligible.barred_by.iter().map(condition).collect();
                barred.push(Barred { oil: i, by, in_use });
            } else {
                let judged = weigh(&ready, &self.oils[i]);
                let state = (i, &self.oils[i]);
                let mut found = self.candidate(&demands, &ready, state, judged, &eligible, in_use);
                found.running = self
                    .running(point, &demands, i)
                    .map(|r| r.over(now.as_ref()));
                candidates.push(found);
            }
        }
        self.sort(&mut candidates);
        Weighed {
            point,
            demands,
            ready,
            candidates,
            barred,
        }
    }

    /// What is in a point now, for the rules of changing over.
    fn in_use_facts(&self, point: &Point) -> SumpNow {
        match &point.oil_now {
            OilNow::Nothing => SumpNow::Nothing,
            OilNow::Unknown => SumpNow::Unknown,
            OilNow::Oil(id) => oil_index(self.site, &id.value).map_or(SumpNow::Unknown, |i| {
                SumpNow::Oil(Box::new(self.facts[i].clone()))
            }),
        }
    }

    fn candidate(
        &self,
        demands: &PointDemands,
        ready: &PreparedPoint,
        (oil, state): (usize, &PreparedOil),
        judgement: Judgement,
        eligible: &Eligibility,
        in_use: bool,
    ) -> Candidate {
        let mut conditions: Vec<Condition> = eligible.conditions.iter().map(condition).collect();
        conditions.extend(asked(demands, &judgement));
        let ready = &*ready.for_oil(state);
        let because = because(demands, ready, state, &judgement, self.units);
        let brief = brief(demands, ready, state, &judgement, self.units);
        Candidate {
            oil,
            judgement,
            conditions,
            notes: {
                let mut notes = self.notes(oil, ready, eligible);
                notes.extend(ratio::notes(demands, ready, state, self.rules));
                notes
            },
            facts_missing: eligible.gaps.iter().map(|g| g.says.clone()).collect(),
            questions: eligible.gaps.iter().map(|g| g.question.clone()).collect(),
            because,
            brief,
            in_use,
            on_site: self.on_site.contains(&self.site.oils[oil].id),
            running: None,
        }
    }

    /// How an oil runs at a point, every unknown in the middle of its range.
    fn running(&self, point: &Point, demands: &PointDemands, oil: usize) -> Option<Running> {
        demands.middle.losses.as_ref()?;
        let in_use = self.in_use_curves(point);
        let own = in_use.and_then(|in_use| Own::of(&demands.middle, in_use));
        let hours = point.running_hours.as_ref().and_then(|h| h.known());
        let hours = hours.map(|h| h.value.0);
        running(&demands.middle, own.as_ref(), &self.oils[oil].curves, hours)
    }

    /// Remarks for the sheet: those of the rules, and a loss found in a test milder than the
    /// machine.
    fn notes(&self, oil: usize, ready: &PreparedPoint, eligible: &Eligibility) -> Vec<Condition> {
        let mut notes: Vec<Condition> = eligible.notes.iter().map(condition).collect();
        let mild = |f: &&crate::oil::findings::Finding| f.name == "shear-test-mild";
        let found = self.oils[oil].curves.findings.iter().find(mild);
        notes.extend(found.filter(|_| ready.severe).map(|f| Condition {
            title: String::new(),
            rule: f.name.to_owned(),
            says: f.says.clone(),
            act: f.act.clone(),
            source: "rules, shear tests".to_owned(),
        }));
        notes
    }

    fn sort(&self, candidates: &mut [Candidate]) {
        candidates.sort_by(|a, b| compare(&self.key(a), &self.key(b)));
    }

    fn key<'c>(&'c self, c: &Candidate) -> Ordered<'c> {
        let oil = &self.site.oils[c.oil];
        Ordered {
            verdict: c.judgement.verdict,
            in_use: c.in_use,
            on_site: c.on_site,
            conditions: c.conditions.len(),
            excess: quantised(&c.judgement),
            price: oil.price.as_ref().map(|p| match p.value {
                Price::PerLitre(x) | Price::PerKilogram(x) => thousandths(x),
            }),
            id: &oil.id,
        }
    }

    /// The worn curve the floors of a point are judged on: after the greatest loss where the loss is
    /// not known.
    pub fn worn(&self, weighed: &Weighed<'_>, oil: usize) -> Option<&Ready> {
        self.oils[oil].worst(&weighed.ready).worn.as_ref()
    }

    /// The steps behind one candidate, in the setting of unknowns its worst margin comes from.
    pub fn explain(&self, weighed: &Weighed<'_>, candidate: &Candidate) -> Explanation {
        let j = &candidate.judgement;
        let setting = usize::from(j.hot.or(j.cold).or(j.pour).map_or(0, |m| m.setting));
        let oil = &self.oils[candidate.oil];
        let (trace, demands) = weighed.trace_of(setting, &self.site.house, self.rules);
        let ready = weighed.ready.for_oil(oil);
        let own = OwnSteps {
            demands: &demands,
            in_use: self.in_use_curves(weighed.point),
        };
        explain(
            &trace,
            &demands.list,
            &ready.settings[setting],
            (&self.site.oils[candidate.oil], oil),
            oil.worst(&weighed.ready),
            Some(&own),
        )
    }
}

impl Weighed<'_> {
    /// The traced demands of one setting: the middle is at hand, others are worked out again.
    fn trace_of(
        &self,
        setting: usize,
        house: &crate::model::site::House,
        rules: &Rulebook,
    ) -> (Derivation, Demands) {
        if setting == 0 {
            return (self.demands.trace.clone(), self.demands.middle.clone());
        }
        let mut trace = Derivation::new();
        let shares = &self.demands.shares[setting];
        let demands = demands(&mut trace, self.point, house, rules, shares);
        (trace, demands)
    }

    /// The candidate that is the oil in use, where it was weighed.
    pub fn in_use(&self) -> Option<&Candidate> {
        self.candidates.iter().find(|c| c.in_use)
    }

    /// The proposed oil: the first candidate that holds or is tight. Where nothing holds, an oil in
    /// use that is tight stays: another tight one is no gain.
    pub fn proposed(&self) -> Option<&Candidate> {
        let first = self.candidates.first()?;
        match first.judgement.verdict {
            Verdict::Holds => Some(first),
            Verdict::Tight => self
                .in_use()
                .filter(|c| c.judgement.verdict == Verdict::Tight)
                .or(Some(first)),
            Verdict::Open | Verdict::Fails => None,
        }
    }
}

/// The oil a point holds today, by id.
pub fn oil_in_use(point: &Point) -> Option<&str> {
    match &point.oil_now {
        OilNow::Oil(id) => Some(&id.value),
        _ => None,
    }
}

/// Conditions from demands that are not met but do not fail: limits a maker's figure replaced,
/// review limits, rules of low confidence.
fn asked(demands: &PointDemands, judgement: &Judgement) -> Vec<Condition> {
    judgement
        .asked
        .iter()
        .map(|number| {
            let demand = &demands.middle.list[usize::from(number)];
            let (why, act) = match &demand.standing {
                Standing::Replaced { by } => (
                    format!("stricter than {by} and not met"),
                    "confirm with the maker that the stated limit holds for this duty",
                ),
                Standing::Condition if demand.end == End::RunningCeiling => (
                    "not met with this oil when it runs coldest".to_owned(),
                    "watch how quietly the part runs, or take a thinner oil that meets the floor",
                ),
                Standing::Condition => (
                    "worth a review before the start, not met".to_owned(),
                    "warm the sump or try the start under watch before relying on it",
                ),
                _ => (
                    "of low confidence and not met".to_owned(),
                    "ask the maker for the limit of this part",
                ),
            };
            Condition {
                rule: demand.rule.clone(),
                title: demand.says.clone(),
                says: format!("{}: {why}", demand.says),
                act: act.to_owned(),
                source: demand.source.clone(),
            }
        })
        .collect()
}

/// A finding of a suitability rule as a condition on the sheet.
fn condition(finding: &Finding) -> Condition {
    Condition {
        rule: finding.rule.clone(),
        title: finding.title.clone(),
        says: finding.reason.clone(),
        act: finding.act.clone(),
        source: finding.source.join("; "),
    }
}

/// Finds an oil by id.
pub fn oil_index(site: &Site, id: &str) -> Option<usize> {
    site.oils.iter().position(|o: &Oil| o.id == id)
}
