//! From a read site to weighed candidates: every point, every oil, eligibility first.

pub mod facts;

use crate::demand::{Demand, PointDemands, Standing, is_severe, point_demands, takes_grease};
use crate::judge::because::because;
use crate::judge::brief::brief;
use crate::judge::explain::{Explanation, explain};
use crate::judge::order::{Candidate as Ordered, compare, quantised, thousandths};
use crate::judge::{Judgement, PreparedOil, PreparedPoint, Verdict, weigh};
use crate::model::facts::{OilFacts, SumpNow};
use crate::model::oil::Price;
use crate::model::rulebook::Rulebook;
use crate::model::{Oil, OilNow, Point, Site};
use crate::quantity::Measure;
use crate::quantity::show::Units;
use crate::relation::oil::viscosity_temperature::Misfit;
use crate::suitability::{Eligibility, Finding, Suitability};
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
    /// Why the word is what it is, the main reason first.
    pub because: Vec<String>,
    /// The main reason in a few words.
    pub brief: String,
    /// Whether it is the oil in use here.
    pub in_use: bool,
    /// Whether some point of the site holds it today.
    pub on_site: bool,
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
        let ready = PreparedPoint::new(&demands.settings, is_severe(point), self.reserve);
        (demands, ready)
    }

    /// Weighs every oil on a point.
    pub fn weigh(&self, point: &'a Point) -> Weighed<'a> {
        let (demands, ready) = self.prepare(point);
        let grease = takes_grease(point);
        let facts = facts::of_point(point, &demands, self.in_use_facts(point));
        let card = self.suitability.point(&facts);
        let (mut candidates, mut barred) = (Vec::new(), Vec::new());
        for (i, oil) in self.site.oils.iter().enumerate() {
            if self.oils[i].grease != grease {
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
                candidates.push(self.candidate(&demands, &ready, i, judged, &eligible, in_use));
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
        oil: usize,
        judgement: Judgement,
        eligible: &Eligibility,
        in_use: bool,
    ) -> Candidate {
        let mut conditions: Vec<Condition> = eligible.conditions.iter().map(condition).collect();
        conditions.extend(asked(demands, &judgement));
        let because = because(demands, ready, &self.oils[oil], &judgement, self.units);
        let brief = brief(demands, ready, &self.oils[oil], &judgement, self.units);
        Candidate {
            oil,
            judgement,
            conditions,
            notes: eligible.notes.iter().map(condition).collect(),
            facts_missing: eligible.gaps.iter().map(|g| g.says.clone()).collect(),
            because,
            brief,
            in_use,
            on_site: self.on_site.contains(&self.site.oils[oil].id),
        }
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

    /// The steps behind one candidate, in the setting of unknowns its worst margin comes from.
    pub fn explain(&self, weighed: &Weighed<'_>, candidate: &Candidate) -> Explanation {
        let j = &candidate.judgement;
        let setting = usize::from(j.hot.or(j.cold).or(j.pour).map_or(0, |m| m.setting));
        let oil = &self.oils[candidate.oil];
        let worn = oil
            .loss_variants(weighed.ready.severe)
            .last()
            .and_then(Option::as_ref);
        let trace = weighed.trace_of(setting, &self.site.house, self.rules);
        explain(
            &trace.0,
            &trace.1,
            &weighed.ready.settings[setting],
            (&self.site.oils[candidate.oil], oil),
            worn,
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
    ) -> (crate::trace::Derivation, Vec<Demand>) {
        if setting == 0 {
            return (self.demands.trace.clone(), self.demands.middle.list.clone());
        }
        let mut trace = crate::trace::Derivation::new();
        let shares = &self.demands.shares[setting];
        let demands = crate::demand::demands(&mut trace, self.point, house, rules, shares);
        (trace, demands.list)
    }

    /// The candidate that is the oil in use, where it was weighed.
    pub fn in_use(&self) -> Option<&Candidate> {
        self.candidates.iter().find(|c| c.in_use)
    }

    /// The proposed oil: the first candidate that holds or is tight.
    pub fn proposed(&self) -> Option<&Candidate> {
        self.candidates
            .first()
            .filter(|c| c.judgement.verdict <= Verdict::Tight)
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
