//! The value of a fact, and the test of a condition against it.

use super::card::{OilCard, PointCard};
use super::mixing::{self, Tables};
use super::truth::Truth;
use crate::model::facts::{
    Environment, FireClass, FoodClass, OilFacts, PointFacts, SumpNow, Use, YesNo,
};
use crate::model::oil::OilKind;
use crate::model::rulebook::condition::{Met, NowKnown, OilFact, PairFact, PointFact};
use crate::model::rulebook::{Clause, Condition, Fact, Rulebook, Test, Values};
use crate::model::stated::Between;
use crate::model::word::Word;
use crate::quantity::Measure;
use std::collections::BTreeSet;

/// What a fact is.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) enum Value<'v> {
    /// Nobody stated it.
    Unknown,
    /// There is nothing it could be stated of: no oil in the sump, no class asked.
    Absent,
    /// Words, one bit each; no bit where it is known that there is none.
    Bits(u64),
    /// Between two numbers, base units.
    Span(f64, f64),
    /// Ids of the rulebook, with kinds of part as bits.
    Names(&'v [String], u64),
}

/// Everything a condition may look at.
#[derive(Clone, Copy)]
pub(super) struct Context<'c> {
    pub(super) book: &'c Rulebook,
    pub(super) tables: &'c Tables,
    pub(super) point: &'c PointCard<'c>,
    pub(super) oil: Option<&'c OilCard<'c>>,
    pub(super) how: Use,
}

impl<'c> Context<'c> {
    /// All of the clauses.
    pub(super) fn all(&self, clauses: &[Clause]) -> Truth {
        clauses
            .iter()
            .map(|clause| self.clause(clause))
            .min()
            .unwrap_or(Truth::True)
    }

    fn clause(&self, clause: &Clause) -> Truth {
        let truths = clause.any.iter().map(|c| self.condition(c));
        truths.max().unwrap_or(Truth::False)
    }

    /// One condition.
    pub(super) fn condition(&self, condition: &Condition) -> Truth {
        check(&condition.test, self.value(condition.fact))
    }

    /// The value of a fact here.
    pub(super) fn value(&self, fact: Fact) -> Value<'c> {
        match fact {
            Fact::Oil(fact) => self.oil.map_or(Value::Absent, |o| o.value(self.book, fact)),
            Fact::Now(fact) => self.point.now_value(self.book, fact),
            Fact::Point(fact) => self.point.value(self.book, fact),
            Fact::Pair(fact) => self.oil.map_or(Value::Absent, |o| self.pair(fact, o)),
        }
    }

    fn pair(&self, fact: PairFact, oil: &OilCard<'_>) -> Value<'c> {
        let point = self.point.facts;
        match fact {
            PairFact::Use => Value::Bits(self.how.bit()),
            PairFact::SameOil => match &point.oil_now {
                SumpNow::Unknown => Value::Unknown,
                SumpNow::Nothing => Value::Absent,
                SumpNow::Oil(now) => Value::Bits(YesNo::from(now.id == oil.facts.id).bit()),
            },
            PairFact::Mixing => self.tables.bases(point, oil.facts),
            PairFact::GreaseMixing => mixing::greases(self.book, point, oil.facts),
            PairFact::Seals => self.tables.seals(point, oil.facts),
            PairFact::Paint => self.tables.paint(point, oil.facts),
            PairFact::SightGlass => self.tables.sight_glass(point, oil.facts),
            PairFact::FoodClass => met(point.food_class, |asked| {
                oil.facts
                    .food_class
                    .is_some_and(|has| food_serves(self.book, has, asked))
            }),
            PairFact::Environment => met(point.environment, |asked: Environment| {
                oil.facts.environment == Some(asked)
            }),
            PairFact::FireClass => met(point.fire_class, |asked: FireClass| {
                oil.facts.fire_class.is_some_and(|has| has >= asked)
            }),
            PairFact::FlashMargin => match (oil.facts.flash, point.part_temperature) {
                (Some(flash), Some(hot)) => Value::Span(
                    flash.lo.base() - hot.hi.base(),
                    flash.hi.base() - hot.lo.base(),
                ),
                _ => Value::Unknown,
            },
            PairFact::DwellRatio => match (point.dwell, oil.facts.air_release) {
                (Some(dwell), Some(release)) => Value::Span(
                    dwell.lo.base() / release.base(),
                    dwell.hi.base() / release.base(),
                ),
                _ => Value::Unknown,
            },
        }
    }
}

/// The value of a fact of a pair, where the point alone settles it.
pub(super) fn settled_by_point<'v>(fact: PairFact, point: &PointFacts) -> Option<Value<'v>> {
    let unless = |stated: bool, value: Value<'v>| (!stated).then_some(value);
    match fact {
        PairFact::SameOil | PairFact::Mixing => match point.oil_now {
            SumpNow::Unknown => Some(Value::Unknown),
            SumpNow::Nothing => Some(Value::Absent),
            SumpNow::Oil(_) => None,
        },
        PairFact::GreaseMixing => unless(point.oil_now != SumpNow::Nothing, Value::Absent),
        PairFact::Seals => unless(point.seals.is_some(), Value::Unknown),
        PairFact::Paint => unless(point.inside_paint.is_some(), Value::Unknown),
        PairFact::SightGlass => unless(point.sight_glass.is_some(), Value::Unknown),
        PairFact::FoodClass => unless(point.food_class.is_some(), Value::Absent),
        PairFact::Environment => unless(point.environment.is_some(), Value::Absent),
        PairFact::FireClass => unless(point.fire_class.is_some(), Value::Absent),
        PairFact::FlashMargin => unless(point.part_temperature.is_some(), Value::Unknown),
        PairFact::DwellRatio => unless(point.dwell.is_some(), Value::Unknown),
        PairFact::Use => None,
    }
}

/// The value of a fact of a pair, where the oil alone settles it.
pub(super) fn settled_by_oil<'v>(fact: PairFact, oil: &OilFacts) -> Option<Value<'v>> {
    let unless = |stated: bool, value: Value<'v>| (!stated).then_some(value);
    match fact {
        PairFact::GreaseMixing => unless(oil.kind == Some(OilKind::Grease), Value::Absent),
        PairFact::Seals | PairFact::Paint | PairFact::SightGlass => {
            unless(oil.base.is_some(), Value::Unknown)
        }
        PairFact::FlashMargin => unless(oil.flash.is_some(), Value::Unknown),
        PairFact::DwellRatio => unless(oil.air_release.is_some(), Value::Unknown),
        PairFact::SameOil
        | PairFact::Mixing
        | PairFact::FoodClass
        | PairFact::Environment
        | PairFact::FireClass
        | PairFact::Use => None,
    }
}

fn met<W: Word>(asked: Option<W>, serves: impl Fn(W) -> bool) -> Value<'static> {
    asked.map_or(Value::Absent, |asked| {
        let word = if serves(asked) { Met::Met } else { Met::Short };
        Value::Bits(word.bit())
    })
}

fn food_serves(book: &Rulebook, has: FoodClass, asked: FoodClass) -> bool {
    has == asked || book.serving.between(has.word(), asked.word()).is_some()
}

/// A test against a value.
pub(super) fn check(test: &Test, value: Value<'_>) -> Truth {
    match (test, value) {
        (Test::Stated, value) => stated(value).into(),
        (Test::NotStated, value) => (!stated(value)).into(),
        (_, Value::Unknown) => Truth::Unknown,
        (Test::Is(values), value) => among(values, value).into(),
        (Test::IsNot(values), Value::Bits(_) | Value::Names(..)) => (!among(values, value)).into(),
        (Test::Above(limit), Value::Span(lo, hi)) => compare(lo > limit.base, hi > limit.base),
        (Test::Below(limit), Value::Span(lo, hi)) => compare(hi < limit.base, lo < limit.base),
        // nothing there to be asked about, or a test of another form
        (Test::IsNot(_) | Test::Above(_) | Test::Below(_), _) => Truth::False,
    }
}

fn compare(surely: bool, perhaps: bool) -> Truth {
    match (surely, perhaps) {
        (true, _) => Truth::True,
        (false, true) => Truth::Unknown,
        (false, false) => Truth::False,
    }
}

fn stated(value: Value<'_>) -> bool {
    match value {
        Value::Unknown | Value::Absent | Value::Bits(0) => false,
        Value::Names(names, groups) => !names.is_empty() || groups != 0,
        Value::Bits(_) | Value::Span(..) => true,
    }
}

fn among(values: &Values, value: Value<'_>) -> bool {
    match (values, value) {
        (Values::Bits(wanted), Value::Bits(has)) => wanted & has != 0,
        (Values::Names { names, groups }, Value::Names(has, has_groups)) => {
            groups & has_groups != 0 || has.iter().any(|h| names.contains(h))
        }
        _ => false,
    }
}

fn bit<'v, W: Word>(word: Option<W>) -> Value<'v> {
    word.map_or(Value::Unknown, |w| Value::Bits(w.bit()))
}

/// A class nobody declared or asked for is known to be none.
fn declared<'v, W: Word>(word: Option<W>) -> Value<'v> {
    Value::Bits(word.map_or(0, Word::bit))
}

fn yes_no<'v>(fact: Option<bool>) -> Value<'v> {
    bit(fact.map(YesNo::from))
}

fn set<'v, W: Word>(words: Option<&BTreeSet<W>>) -> Value<'v> {
    words.map_or(Value::Unknown, |set| {
        Value::Bits(set.iter().fold(0, |all, w| all | w.bit()))
    })
}

fn span<'v, Q: Measure>(quantity: Option<Between<Q>>) -> Value<'v> {
    quantity.map_or(Value::Unknown, |q| Value::Span(q.lo.base(), q.hi.base()))
}

fn exact<'v, Q: Measure>(quantity: Option<Q>) -> Value<'v> {
    quantity.map_or(Value::Unknown, |q| Value::Span(q.base(), q.base()))
}

/// A fact of an oil whose declared classes have been found in the rulebook.
pub(super) fn of_oil<'v>(
    book: &Rulebook,
    facts: &OilFacts,
    classes: &'v [String],
    fact: OilFact,
) -> Value<'v> {
    match fact {
        OilFact::Kind => bit(facts.kind),
        OilFact::Base => bit(facts.base),
        OilFact::Polymer => yes_no(facts.polymer),
        OilFact::ShearData => yes_no(Some(facts.shear_data)),
        OilFact::Additive => set(facts.additives.as_ref()),
        OilFact::Sulphur => bit(facts.sulphur),
        OilFact::CopperStrip => bit(facts.copper_strip),
        OilFact::Class => Value::Names(classes, 0),
        OilFact::FoodClass => declared(facts.food_class),
        OilFact::Environment => declared(facts.environment),
        OilFact::FireClass => declared(facts.fire_class),
        OilFact::Flash => span(facts.flash),
        OilFact::FzgStage => facts.fzg_stage.map_or(Value::Unknown, |stage| {
            Value::Span(f64::from(stage), f64::from(stage))
        }),
        OilFact::AirRelease => exact(facts.air_release),
        OilFact::AirReleaseShare => air_release_share(book, facts),
        OilFact::Demulsibility => exact(facts.demulsibility),
        OilFact::Viscosity => exact(facts.nu40),
    }
}

/// Air release over the longest its grade is allowed; not known for grades without a limit.
fn air_release_share<'v>(book: &Rulebook, facts: &OilFacts) -> Value<'v> {
    let (Some(release), Some(nu40)) = (facts.air_release, facts.nu40) else {
        return Value::Unknown;
    };
    let nu = nu40.base() * 1e6;
    let of_grade = |vg: u32| (nu / f64::from(vg) - 1.0).abs() <= 0.1;
    book.air_release
        .iter()
        .find(|limit| of_grade(limit.vg))
        .map_or(Value::Unknown, |limit| {
            let share = release.base() / limit.at_most.base();
            Value::Span(share, share)
        })
}

/// A fact of a point whose components have been found in the rulebook.
pub(super) fn of_point<'v>(
    book: &Rulebook,
    facts: &PointFacts,
    parts: (&'v [String], u64),
    fact: PointFact,
) -> Value<'v> {
    match fact {
        PointFact::Part => Value::Names(parts.0, parts.1),
        PointFact::Lubrication => bit(facts.lubrication),
        PointFact::OilNow => bit(Some(match facts.oil_now {
            SumpNow::Unknown => NowKnown::Unknown,
            SumpNow::Nothing => NowKnown::Nothing,
            SumpNow::Oil(_) => NowKnown::Known,
        })),
        PointFact::YellowMetal => yes_no(facts.yellow_metal),
        PointFact::Silver => yes_no(facts.silver),
        PointFact::ZincPlated => yes_no(facts.zinc_plated),
        PointFact::Backstop => bit(facts.backstop),
        PointFact::WetClutch => yes_no(facts.wet_clutch),
        PointFact::BreathingAir => yes_no(facts.breathing_air),
        PointFact::Oxygen => yes_no(facts.oxygen),
        PointFact::WaterEntry => bit(facts.water_entry),
        PointFact::Wet => yes_no(facts.wet),
        PointFact::Seals => set(facts.seals.as_ref()),
        PointFact::InsidePaint => bit(facts.inside_paint),
        PointFact::SightGlass => bit(facts.sight_glass),
        PointFact::Filter => yes_no(facts.filter),
        PointFact::FoodZone => yes_no(facts.food_zone),
        PointFact::WaterProtection => yes_no(facts.water_protection),
        PointFact::FireZone => yes_no(facts.fire_zone),
        PointFact::HotSurface => span(facts.hot_surface),
        PointFact::FoodClass => declared(facts.food_class),
        PointFact::Environment => declared(facts.environment),
        PointFact::FireClass => declared(facts.fire_class),
        PointFact::OilTemperature => span(facts.oil_temperature),
        PointFact::PartTemperature => span(facts.part_temperature),
        PointFact::StartTemperature => span(facts.start_temperature),
        PointFact::SealMargin => seal_margin(book, facts),
        PointFact::Dwell => span(facts.dwell),
    }
}

/// How far the hottest part stays below the limit of the most sensitive seal.
fn seal_margin<'v>(book: &Rulebook, facts: &PointFacts) -> Value<'v> {
    let (Some(seals), Some(hot)) = (&facts.seals, facts.part_temperature) else {
        return Value::Unknown;
    };
    let limit = book
        .seals
        .iter()
        .filter(|rule| seals.contains(&rule.material))
        .filter_map(|rule| rule.limit)
        .map(Measure::base)
        .min_by(f64::total_cmp);
    limit.map_or(Value::Absent, |limit| {
        Value::Span(limit - hot.hi.base(), limit - hot.lo.base())
    })
}
