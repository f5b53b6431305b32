//! What the oil has to declare and what it must not contain: found by trying an oil with each of
//! it on the suitability rules.

use crate::model::facts::{Additive, OilFacts, Sulphur, SumpNow};
use crate::model::oil::OilKind;
use crate::model::rulebook::Class;
use crate::model::word::Word;
use crate::model::{OilNow, Point};
use crate::quantity::convert::mm2_s;
use crate::relation::oil::base_stock::BaseStock;
use crate::suitability::{Eligibility, PointCard};
use crate::weighing::{Scales, Weighed, facts, oil_index};
use std::collections::BTreeSet;

/// Classes named at most.
const NAMED: usize = 4;

/// What the oil is to be, beyond viscosity.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Contents {
    /// Classes any of which serves, the first the one it was solved with.
    pub classes: Vec<String>,
    /// Additive families asked for by name.
    pub additives: Vec<Additive>,
    /// What it must not contain, with the rule that bars it.
    pub without: Vec<Without>,
    /// Conditions that ride with it all the same, by rule.
    pub conditions: Vec<(String, String)>,
    /// The facts it was weighed with.
    pub facts: OilFacts,
    /// Whether no oil of this base may be used at all.
    pub barred: bool,
}

/// Something barred.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Without {
    /// What: `active sulphur`, `zinc`.
    pub what: String,
    /// The rule that bars it.
    pub rule: String,
    /// Its title.
    pub title: String,
}

/// What an oil of a base has to be on a point, or a grease with a thickener.
pub(super) fn of(
    scales: &Scales<'_>,
    weighed: &Weighed<'_>,
    base: BaseStock,
    thickener: Option<&str>,
) -> Contents {
    let point = weighed.point;
    let point_facts = facts::of_point(point, &weighed.demands, now(scales, point));
    let card = scales.suitability.point(&point_facts);
    let mut plain = OilFacts {
        id: "the oil asked for".to_owned(),
        kind: Some(thickener.map_or(OilKind::Other, |_| OilKind::Grease)),
        thickener: thickener.map(str::to_owned),
        base: Some(base),
        polymer: Some(false),
        additives: Some(BTreeSet::new()),
        sulphur: Some(Sulphur::None),
        copper_strip: Some(crate::model::facts::CopperStrip::C1a),
        food_class: point_facts.food_class,
        environment: point_facts.environment,
        fire_class: point_facts.fire_class,
        // a middling one: no rule on thin or thick oils speaks of it
        nu40: Some(mm2_s(100.0)),
        ..OilFacts::default()
    };
    if point_facts.food_zone == Some(true) && plain.food_class.is_none() {
        plain.food_class = Some(crate::model::facts::FoodClass::H1);
    }
    let trial = Rules { scales, card };
    let classes = trial.classes(&plain);
    plain.classes = classes.iter().take(1).cloned().collect();
    let additives: Vec<Additive> = Additive::ALL
        .iter()
        .copied()
        .filter(|a| trial.wants(&plain, *a))
        .collect();
    plain.additives = Some(additives.iter().copied().collect());
    let eligible = trial.assess(&plain);
    Contents {
        without: trial.without(&plain, &additives),
        conditions: eligible
            .conditions
            .iter()
            .map(|c| (c.rule.clone(), c.reason.clone()))
            .collect(),
        barred: eligible.barred(),
        classes,
        additives,
        facts: plain,
    }
}

fn now(scales: &Scales<'_>, point: &Point) -> SumpNow {
    match &point.oil_now {
        OilNow::Nothing => SumpNow::Nothing,
        OilNow::Unknown => SumpNow::Unknown,
        OilNow::Oil(id) => oil_index(scales.site, &id.value).map_or(SumpNow::Unknown, |i| {
            SumpNow::Oil(Box::new(scales.facts[i].clone()))
        }),
    }
}

struct Rules<'t, 'a, 'f> {
    scales: &'t Scales<'a>,
    card: PointCard<'f>,
}

impl Rules<'_, '_, '_> {
    fn assess(&self, oil: &OilFacts) -> Eligibility {
        let suitability = &self.scales.suitability;
        suitability.assess(&self.card, &suitability.oil(oil))
    }

    /// Bars and conditions an oil comes to.
    fn weight(&self, oil: &OilFacts) -> (usize, usize) {
        let found = self.assess(oil);
        (found.barred_by.len(), found.conditions.len())
    }

    /// The classes with the fewest bars and conditions, at most a few; none where a declared class
    /// makes nothing better.
    fn classes(&self, plain: &OilFacts) -> Vec<String> {
        let with = |class: &Class| {
            let mut oil = plain.clone();
            oil.classes = vec![class.id.clone()];
            self.weight(&oil)
        };
        let usable = |c: &&Class| !c.is_family() && !c.withdrawn;
        let all: Vec<(&Class, (usize, usize))> = self
            .scales
            .rules
            .classes
            .iter()
            .filter(usable)
            .map(|c| (c, with(c)))
            .collect();
        let Some(least) = all.iter().map(|(_, w)| *w).min() else {
            return Vec::new();
        };
        if least >= self.weight(plain) {
            return Vec::new();
        }
        let asked: Vec<String> = self.card.facts.asks_for.clone();
        let mut best: Vec<&str> = all
            .iter()
            .filter(|(_, w)| *w == least)
            .map(|(c, _)| c.id.as_str())
            .collect();
        // what the maker asks for by name stands first
        best.sort_by_key(|id| !asked.iter().any(|a| a == id));
        best.into_iter().take(NAMED).map(str::to_owned).collect()
    }

    /// Whether a family of additives is asked for by name, or mends a bar or a condition.
    fn wants(&self, plain: &OilFacts, additive: Additive) -> bool {
        let mut oil = plain.clone();
        oil.additives = Some(BTreeSet::from([additive]));
        self.weight(&oil) < self.weight(plain)
    }

    /// What bars an oil that contains it and nothing else of the kind.
    fn without(&self, plain: &OilFacts, wanted: &[Additive]) -> Vec<Without> {
        let barred = self.assess(plain).barred_by.len();
        let mut found = Vec::new();
        let mut look = |what: String, oil: &OilFacts| {
            let eligible = self.assess(oil);
            if eligible.barred_by.len() > barred
                && let Some(by) = eligible.barred_by.last()
            {
                found.push(Without {
                    what,
                    rule: by.rule.clone(),
                    title: by.title.clone(),
                });
            }
        };
        for additive in Additive::ALL.iter().filter(|a| !wanted.contains(a)) {
            let mut oil = plain.clone();
            oil.additives.get_or_insert_default().insert(*additive);
            look(additive.word().to_owned(), &oil);
        }
        let mut sulphur = plain.clone();
        sulphur.sulphur = Some(Sulphur::Active);
        sulphur.copper_strip = Some(crate::model::facts::CopperStrip::C2c);
        sulphur
            .additives
            .get_or_insert_default()
            .insert(Additive::Ep);
        look("active sulphur".to_owned(), &sulphur);
        for base in BaseStock::ALL {
            let mut oil = plain.clone();
            oil.base = Some(*base);
            look(format!("a base of {}", base.word()), &oil);
        }
        found
    }
}

impl Contents {
    /// What it has to declare, and what it must not contain, a line each.
    pub fn lines(&self) -> Vec<String> {
        let mut lines = Vec::new();
        match self.classes.as_slice() {
            [] => {}
            [one] => lines.push(format!("class {one}")),
            several => lines.push(format!("class {}", several.join(" or "))),
        }
        if !self.additives.is_empty() {
            let named: Vec<&str> = self.additives.iter().map(|a| a.word()).collect();
            lines.push(format!("additives: {}", named.join(", ")));
        }
        let declared = [
            self.facts
                .food_class
                .map(|c| format!("food class {}", c.word())),
            self.facts
                .environment
                .map(|c| format!("environmental class {}", c.word())),
            self.facts
                .fire_class
                .map(|c| format!("fire class: {}", c.word())),
        ];
        lines.extend(declared.into_iter().flatten());
        if !self.without.is_empty() {
            let named: Vec<&str> = self.without.iter().map(|w| w.what.as_str()).collect();
            lines.push(format!("must not contain: {}", named.join(", ")));
        }
        lines
    }
}
