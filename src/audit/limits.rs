//! The limits that apply to the oil of a point: practice by its class, outranked by the maker's.

use super::bottle::Code;
use super::scatter::in_unit;
use crate::model::facts::PartGroup;
use crate::model::oil::OilKind;
use crate::model::rulebook::condition::{Fact, OilFact};
use crate::model::rulebook::used_oil::{Reading as On, Side};
use crate::model::rulebook::{Cleanliness, Rulebook, UsedOilLimit};
use crate::model::sample::Reading;
use crate::model::word::Word;
use crate::model::{PartKind, Point};
use crate::quantity::Measure;
use crate::suitability::{OilCard, PointCard, Suitability, Truth};
use std::collections::BTreeMap;

/// How much a reading calls for.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub enum Level {
    /// Within its limits.
    #[default]
    Fine,
    /// Watch it.
    Watch,
    /// Act.
    Act,
}

impl Level {
    /// The word.
    pub fn word(self) -> &'static str {
        match self {
            Self::Fine => "",
            Self::Watch => "watch",
            Self::Act => "act",
        }
    }
}

/// The two levels of a limit, in the unit of what it is on (shares as shares, rises in K).
#[derive(Clone, Debug, PartialEq)]
pub struct Levels {
    /// From here on, watch.
    pub watch: Option<f64>,
    /// From here on, act.
    pub act: Option<f64>,
    /// For what oil, in words.
    pub oil: String,
    /// Id of the rule; the key of the site file where it is the maker's or the site's.
    pub rule: String,
    /// Where it comes from.
    pub source: String,
    /// How sure it is.
    pub confidence: &'static str,
}

impl Levels {
    /// The level of a value that is bad when high.
    pub fn above(&self, value: f64) -> Level {
        let at = |limit: Option<f64>| limit.is_some_and(|l| value >= l);
        if at(self.act) {
            Level::Act
        } else if at(self.watch) {
            Level::Watch
        } else {
            Level::Fine
        }
    }

    /// Whether it speaks earlier than another; `left`: both are shares left, bad when low.
    fn is_stricter(&self, other: &Self, left: bool) -> bool {
        let mine = self.watch.or(self.act);
        let other = other.watch.or(other.act);
        match (mine, other) {
            (Some(a), Some(b)) if left => a > b,
            (Some(a), Some(b)) => a < b,
            _ => mine.is_some(),
        }
    }

    /// The level of a value that is bad when low.
    pub fn below(&self, value: f64) -> Level {
        let at = |limit: Option<f64>| limit.is_some_and(|l| value <= l);
        if at(self.act) {
            Level::Act
        } else if at(self.watch) {
            Level::Watch
        } else {
            Level::Fine
        }
    }
}

/// Every limit of one oil at one point.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Limits {
    high: BTreeMap<&'static str, Levels>,
    low: BTreeMap<&'static str, Levels>,
    /// Target of cleanliness: the code, for what, and where it comes from.
    pub cleanliness: Option<(Code, String, String)>,
}

impl Limits {
    /// Limits on a reading that is bad when high.
    pub fn high(&self, on: On) -> Option<&Levels> {
        self.high.get(on.word())
    }

    /// Limits on a reading that is bad when low.
    pub fn low(&self, on: On) -> Option<&Levels> {
        self.low.get(on.word())
    }

    /// Those that apply.
    pub fn of(
        rules: &Rulebook,
        suitability: &Suitability<'_>,
        card: &PointCard<'_>,
        oil: Option<&OilCard<'_>>,
        point: Option<&Point>,
    ) -> Self {
        let mut limits = Self::default();
        // a limit for this base outranks one for the place of any oil, then the more particular
        let mut most: BTreeMap<(&'static str, bool), (bool, usize)> = BTreeMap::new();
        for rule in &rules.used_oil {
            if suitability.holds(&rule.when, card, oil) != Truth::True {
                continue;
            }
            let particular = (speaks_of_base(rule), rule.when.len());
            for high in [false, true] {
                let looks = match rule.side {
                    Side::Both => true,
                    Side::High => high,
                    Side::Low => !high,
                };
                if !looks {
                    continue;
                }
                let seen = most.entry((rule.reading.word(), high)).or_default();
                let map = if high {
                    &mut limits.high
                } else {
                    &mut limits.low
                };
                let found = of_rule(rule);
                // of equally particular rules the strictest counts
                let known = map.get(rule.reading.word());
                let better = match known {
                    None => true,
                    Some(_) if particular != *seen => particular > *seen,
                    Some(known) => {
                        found.is_stricter(known, rule.side == Side::Low && share_left(rule.reading))
                    }
                };
                if better {
                    *seen = particular;
                    map.insert(rule.reading.word(), found);
                }
            }
        }
        if let Some(point) = point {
            limits.makers(point);
        }
        limits.cleanliness = point
            .and_then(stated_cleanliness)
            .or_else(|| target(rules, suitability, card, point));
        limits
    }

    /// The maker's own, stated for the point, in the place of practice.
    fn makers(&mut self, point: &Point) {
        for limit in &point.used_oil {
            let levels = Levels {
                watch: limit.on.first().map(|on| in_lab_unit(*on, limit.watch)),
                act: limit.on.first().map(|on| in_lab_unit(*on, limit.act)),
                oil: "this machine".to_owned(),
                rule: "used oil".to_owned(),
                source: limit.origin.words(),
                confidence: "high",
            };
            for on in limit.on.iter().copied() {
                if on != On::OxidationStabilityShare {
                    self.high.insert(on.word(), levels.clone());
                }
                if matches!(
                    on,
                    On::ViscosityChange40 | On::ViscosityChange100 | On::OxidationStabilityShare
                ) {
                    self.low.insert(on.word(), levels.clone());
                }
            }
        }
    }
}

/// An amount in the unit its reading is kept in; shares as shares.
fn in_lab_unit(on: On, amount: crate::quantity::Amount) -> f64 {
    match on {
        On::Water => in_unit(Reading::Water, amount),
        On::Fuel => in_unit(Reading::Fuel, amount),
        On::Soot => in_unit(Reading::Soot, amount),
        _ => amount.base,
    }
}

fn of_rule(rule: &UsedOilLimit) -> Levels {
    Levels {
        watch: rule.watch.map(|a| in_lab_unit(rule.reading, a)),
        act: rule.act.map(|a| in_lab_unit(rule.reading, a)),
        oil: rule.oil.clone(),
        rule: rule.id.clone(),
        source: rule.provenance.cited(),
        confidence: rule.provenance.confidence.word(),
    }
}

/// Whether a limit is one for oils of some base: a polyglycol holds ten times the water of a
/// mineral oil wherever it runs.
fn speaks_of_base(rule: &UsedOilLimit) -> bool {
    let mut facts = rule.when.iter().flat_map(|c| &c.any).map(|c| c.fact);
    facts.any(|fact| fact == Fact::Oil(OilFact::Base))
}

/// Readings that say what is left of new oil.
fn share_left(on: On) -> bool {
    matches!(
        on,
        On::BaseNumberShare | On::AntioxidantShare | On::OxidationStabilityShare
    )
}

/// What the site file says of the machine itself.
fn stated_cleanliness(point: &Point) -> Option<(Code, String, String)> {
    let own = point
        .inputs
        .iter()
        .find(|i| i.key == "cleanliness" && i.about.is_none());
    let own = own.or_else(|| point.inputs.iter().find(|i| i.key == "cleanliness"))?;
    Some((
        Code::read(&own.written)?,
        "stated for the machine".to_owned(),
        own.origin.words(),
    ))
}

/// The strictest target of the parts, by their pressure; what is commonly reached where a rule
/// says that.
fn target(
    rules: &Rulebook,
    suitability: &Suitability<'_>,
    card: &PointCard<'_>,
    point: Option<&Point>,
) -> Option<(Code, String, String)> {
    let bar = point.map_or(0.0, |p| {
        let pressures = p.parts.iter().filter_map(|part| match &part.kind {
            PartKind::Component(c) => c.pressure.as_ref()?.known().map(|g| g.value.base() / 1e5),
            _ => None,
        });
        pressures.fold(0.0, f64::max)
    });
    let code = |rule: &Cleanliness| {
        let by_pressure = match bar {
            b if b > 210.0 => rule.high.as_ref().or(rule.middle.as_ref()),
            b if b >= 140.0 => rule.middle.as_ref(),
            _ => None,
        };
        let text = rule.realistic.as_ref().or(by_pressure).unwrap_or(&rule.low);
        Code::read(text)
    };
    rules
        .cleanliness
        .iter()
        .filter(|r| !r.when.is_empty())
        .filter(|r| suitability.holds(&r.when, card, None) == Truth::True)
        .filter_map(|r| Some((code(r)?, r.part.clone(), r.provenance.cited())))
        .min_by_key(|(code, part, _)| (code.0.map(|n| n.unwrap_or(99)), part.clone()))
}

/// The parts an oil of a kind is usually found in, where the machine is not known.
pub(super) fn usual_place(kind: OilKind) -> Option<PartGroup> {
    Some(match kind {
        OilKind::Gear => PartGroup::Gear,
        OilKind::Worm => PartGroup::Worm,
        OilKind::Hydraulic => PartGroup::Hydraulic,
        OilKind::Turbine => PartGroup::Turbine,
        OilKind::Compressor => PartGroup::Compressor,
        OilKind::Circulating => PartGroup::Circulating,
        OilKind::Engine => PartGroup::Engine,
        OilKind::Axle => PartGroup::Axle,
        _ => return None,
    })
}
