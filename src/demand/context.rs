//! What the demands of one part are worked out in.

use super::inputs::{GapKind, Inputs, Wanted};
use super::thermal::Thermal;
use super::{AtAmbient, Demand, End, For, Information, Limit, Standing, Undecided};
use crate::model::part::Part;
use crate::model::rulebook::{Confidence, Rulebook};
use crate::model::site::{House, HouseLimit, HouseRule};
use crate::model::{Point, Stated};
use crate::quantity::convert::celsius;
use crate::quantity::{Amount, Length, Measure, TemperatureInterval, ThermodynamicTemperature};
use crate::relation::sump;
use crate::source::Origin;
use crate::source::place::{Given, Whose};
use crate::trace::{Known, Recorder, StepId};

/// A temperature as a function of ambient, with the step of its governing value.
#[derive(Clone, Copy, Debug)]
pub struct HotAt {
    /// The function.
    pub at: Option<AtAmbient>,
    /// At the hottest ambient.
    pub hottest: Option<Known<ThermodynamicTemperature>>,
    /// At the coldest ambient.
    pub coldest: Option<Known<ThermodynamicTemperature>>,
}

impl HotAt {
    /// Raised by so much at every ambient.
    #[must_use]
    pub fn raised<R: Recorder>(
        self,
        r: &mut R,
        says: &'static str,
        by: Known<TemperatureInterval>,
    ) -> Self {
        let raise = |r: &mut R, t: Known<ThermodynamicTemperature>| {
            r.law(
                "t_part",
                says,
                &sump::PART,
                (("t", t), ("Delta_t_part", by)),
                |(t, d)| sump::running(t, d),
            )
        };
        Self {
            at: self.at.map(|at| at.raised(by.value.base())),
            hottest: self.hottest.map(|t| raise(r, t)),
            coldest: self.coldest.map(|t| raise(r, t)),
        }
    }
}

/// The surroundings of a part's demands.
pub struct Context<'a, 's, R> {
    /// What the calculation is told to.
    pub r: &'a mut R,
    /// Inputs of the scenario.
    pub inputs: &'a mut Inputs<'s>,
    /// The rules.
    pub rules: &'a Rulebook,
    /// The site's own values.
    pub house: &'a House,
    /// The point.
    pub point: &'a Point,
    /// Its temperatures.
    pub thermal: Thermal,
    /// Demands so far.
    pub list: Vec<Demand>,
    /// Demands that cannot be worked out.
    pub undecided: Vec<Undecided>,
    /// Figures that set no limit.
    pub information: Vec<Information>,
}

impl<R: Recorder> Context<'_, '_, R> {
    fn key<'w>(part: &'w Part, wanted: Wanted<'w>) -> Wanted<'w> {
        Wanted {
            about: Some(&part.label),
            ..wanted
        }
    }

    /// An input of a part that must be there.
    pub fn take<Q: Measure>(
        &mut self,
        part: &Part,
        wanted: Wanted<'_>,
        stated: Option<&Stated<Q>>,
    ) -> Option<Known<Q>> {
        self.inputs.take(self.r, Self::key(part, wanted), stated)
    }

    /// An input of a part that need not be there; nothing is noted where it is not.
    pub fn maybe<Q: Measure>(
        &mut self,
        part: &Part,
        wanted: Wanted<'_>,
        stated: Option<&Stated<Q>>,
    ) -> Option<Known<Q>> {
        match stated {
            Some(Stated::Unknown(..)) | None => None,
            some => self.inputs.take(self.r, Self::key(part, wanted), some),
        }
    }

    /// Whether a value or a range is stated.
    pub fn has<Q>(&self, stated: Option<&Stated<Q>>) -> bool {
        matches!(stated, Some(Stated::Known(..) | Stated::Range(..)))
    }

    /// Notes an input of a part as missing.
    pub fn missing(&mut self, part: &Part, wanted: Wanted<'_>, ask: Option<String>) {
        self.inputs.missing(Self::key(part, wanted), ask, None);
    }

    /// A usual value in place of an input nobody stated.
    pub fn or_assume<Q: Measure>(
        &mut self,
        part: &Part,
        wanted: Wanted<'_>,
        stated: Option<&Stated<Q>>,
        usual: super::inputs::Usual<Q>,
    ) -> Known<Q> {
        self.inputs
            .or_assume(self.r, Self::key(part, wanted), stated, usual)
    }

    /// An input of a part, or its plausible range where nobody knows it.
    pub fn or_plausible<Q: Measure>(
        &mut self,
        part: &Part,
        wanted: Wanted<'_>,
        stated: Option<&Stated<Q>>,
        range: (Q, Q),
        why: &'static str,
    ) -> Known<Q> {
        self.inputs
            .or_plausible(self.r, Self::key(part, wanted), stated, range, why)
    }

    /// A value read from a rule.
    pub fn rule_value<Q: Measure>(
        &mut self,
        symbol: &'static str,
        says: &'static str,
        value: Q,
        rule: &str,
    ) -> Known<Q> {
        let given = Given::new(value, "", Origin::rule(rule, Whose::Standard));
        self.r.given(symbol, says, &given)
    }

    /// Notes a demand that cannot be worked out.
    pub fn undecided(&mut self, part: &Part, end: End, because: &str) {
        self.undecided.push(Undecided {
            end,
            part: Some(part.label.clone()),
            because: because.to_owned(),
        });
    }

    /// Running temperature of a part, its own rise included.
    pub fn hot_at(&mut self, part: &Part) -> HotAt {
        let sump = HotAt {
            at: self.thermal.running,
            hottest: self.thermal.hottest,
            coldest: self.thermal.coldest,
        };
        self.raised(part, sump)
    }

    /// The temperature of a part over that of the oil around it, its own rise included.
    pub fn raised(&mut self, part: &Part, oil: HotAt) -> HotAt {
        let Some(rise) = &part.part_rise else {
            return oil;
        };
        let wanted = Wanted {
            key: "part rise",
            about: None,
            symbol: "Delta_t_part",
            says: "rise of the part over the sump",
            how: "reading on the part and in the sump together",
        };
        let Some(by) = self.take(part, wanted, Some(rise)) else {
            return HotAt {
                at: None,
                hottest: None,
                coldest: None,
            };
        };
        oil.raised(self.r, "running temperature of the part", by)
    }

    /// A hot floor with nothing filled in but its place.
    pub fn blank(&self, part: &Part, hot: HotAt) -> Demand {
        self.blank_at(
            Some(part.label.clone()),
            hot.at,
            hot.hottest.map(|k| k.step),
        )
    }

    /// A demand with nothing filled in but its place.
    pub fn blank_at(
        &self,
        part: Option<String>,
        at: Option<AtAmbient>,
        step: Option<StepId>,
    ) -> Demand {
        Demand {
            end: End::HotFloor,
            limit: Limit::OilsOwn,
            at: at.unwrap_or(AtAmbient::UNKNOWN),
            at_step: step,
            limit_step: None,
            rule: String::new(),
            part,
            says: String::new(),
            source: String::new(),
            whose: Whose::Standard,
            confidence: Confidence::High,
            only: For::All,
            standing: Standing::Judges,
            from_window: false,
            heat: None,
        }
    }

    /// Adds a demand; one whose temperature is not known is undecided instead.
    pub fn push(&mut self, demand: Demand) {
        if demand.at.is_unknown() && demand.standing == Standing::Judges {
            self.undecided.push(Undecided {
                end: demand.end,
                part: demand.part.clone(),
                because: format!("{}: the temperature there is not known", demand.says),
            });
        }
        self.list.push(demand);
    }

    /// How the oil gets to the parts: stated, or implied by a component.
    pub fn lubrication(&self) -> Option<crate::model::Lubrication> {
        use crate::model::PartKind;
        let stated = self.point.lubrication.as_ref().map(|l| l.value);
        stated.or_else(|| {
            self.point.parts.iter().find_map(|part| match &part.kind {
                PartKind::Component(c) => self.rules.components.get(&c.id)?.lubrication,
                _ => None,
            })
        })
    }

    /// The house rule a part takes in place of a rule, with its number.
    pub fn house_rule(&self, part: &Part, replaced: &str) -> Option<(usize, HouseRule)> {
        let named = part.rule.as_ref().map(|r| r.value.as_str());
        self.house.rules.iter().enumerate().find_map(|(i, rule)| {
            let takes = named == Some(rule.name.as_str());
            let replaces = rule.replaces.as_ref().is_some_and(|r| r.value == replaced);
            (takes && replaces).then(|| (i + 1, rule.clone()))
        })
    }

    /// The film height a house rule asks for on a part that takes it, with its source.
    pub fn house_film(
        &mut self,
        part: &Part,
        replaced: &str,
    ) -> Option<(Known<Length>, String, String)> {
        let named = part.rule.as_ref().map(|r| r.value.as_str());
        let found = self.house.rules.iter().enumerate();
        let (number, rule, height) = found
            .filter(|(_, rule)| named == Some(rule.name.as_str()))
            .filter(|(_, rule)| rule.replaces.as_ref().is_none_or(|r| r.value == replaced))
            .find_map(|(i, rule)| match rule.limit {
                HouseLimit::FilmHeight(height) => Some((i + 1, rule.clone(), height)),
                _ => None,
            })?;
        let known = self.rule_value("h_house", "film of the house rule", height, &rule.name);
        let source = rule.source.unwrap_or_else(|| "house rule".to_owned());
        Some((known, format!("H-{number} {}", rule.name), source))
    }

    /// A figure that sets no limit.
    pub fn inform(
        &mut self,
        part: &Part,
        says: impl Into<String>,
        figure: Option<(Amount, StepId)>,
    ) {
        self.information.push(Information {
            part: Some(part.label.clone()),
            says: says.into(),
            amount: figure.map(|f| f.0),
            step: figure.map(|f| f.1),
        });
    }

    /// Notes that a rule asks for a fact nobody stated.
    pub fn fact_missing(&mut self, part: &Part, key: &'static str, how: &'static str) {
        let wanted = Wanted {
            key,
            about: Some(&part.label),
            symbol: "",
            says: key,
            how,
        };
        if !self
            .inputs
            .gaps
            .iter()
            .any(|g| g.key == key && g.kind == GapKind::Fact)
        {
            self.inputs.fact(wanted);
        }
    }
}

/// 40 °C, at which grades are compared.
pub fn forty() -> AtAmbient {
    AtAmbient::held(celsius(40.0).base())
}
