//! What a heater has to be, where one is the answer: power from the volume of the sump, sheath
//! from the watt density the oil bears, and what goes with it (practice of heaters).

use super::lever::Lever;
use super::trial::Trial;
use super::{Mended, Target};
use crate::model::Fill;
use crate::model::Lubrication;
use crate::model::rulebook::HeaterDensity;
use crate::numeric::math::lg;
use crate::quantity::{
    Area, HeatFluxDensity, Measure, Power, SpecificHeatCapacity, TemperatureInterval,
    ThermodynamicTemperature, Time, Volume,
};
use crate::relation::heat::heater;
use crate::relation::oil::grade::IsoGrade;
use crate::suitability::Truth;
use crate::weighing::facts;

/// Time a sump is given to warm where nobody says: a shift. Assumed.
const WITHIN_HOURS: f64 = 8.0;
/// Specific heat of oil where the rules say nothing, J/(kg K). Common practice.
const SPECIFIC_HEAT: f64 = 2000.0;

/// A heater that would do.
#[derive(Clone, Debug)]
pub struct HeaterAdvice {
    /// What it is for.
    pub target: Target,
    /// From the coldest start.
    pub from: ThermodynamicTemperature,
    /// To the setting.
    pub to: ThermodynamicTemperature,
    /// Volume of the sump; without it no power is worked out.
    pub volume: Option<Volume>,
    /// Time it is given; assumed.
    pub within: Time,
    /// Power that warms the sump in that time, with the loss of the housing where it is stated.
    pub power: Option<Power>,
    /// Loss of the housing at the setting, where surface and heat transfer are stated.
    pub loss: Option<Power>,
    /// Watt density the oil bears, with the rule.
    pub bears: Option<(HeatFluxDensity, String, String)>,
    /// Sheath the power needs at that density.
    pub sheath: Option<Area>,
    /// A cautious figure for additives, with its rule, where the oil has them.
    pub cautious: Option<(HeatFluxDensity, String)>,
    /// The heater fitted today.
    pub fitted: Option<Fitted>,
    /// Practice that goes with a heater, each with its source.
    pub cautions: Vec<(String, String)>,
}

/// The heater fitted today against what the oil bears.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Fitted {
    /// Its power.
    pub power: Power,
    /// Time in which it warms the sump, losses not counted.
    pub time: Option<Time>,
    /// Its sheath.
    pub area: Option<Area>,
    /// Its watt density.
    pub density: Option<HeatFluxDensity>,
    /// Whether that is more than the oil bears.
    pub too_hot: bool,
    /// Power the sheath may give.
    pub may_give: Option<Power>,
    /// Sheath its power needs.
    pub needs: Option<Area>,
}

/// The heater for the least trouble that needs one; `None` where no heater is an answer.
pub(super) fn advice(trial: &Trial<'_>, found: &Mended) -> Option<HeaterAdvice> {
    let answers = found.single.iter().chain(&found.pairs);
    let (mend, change) = answers
        .filter_map(|m| {
            let heater = m.changes.iter().find(|c| c.lever == Lever::Heater)?;
            Some((m, heater))
        })
        .max_by(|a, b| a.1.to.total_cmp(&b.1.to))?;
    let of = ThermodynamicTemperature::from_base;
    let (from, to) = (of(change.from), of(change.to));
    let by = TemperatureInterval::from_base(change.to - change.from);
    let volume = trial
        .point
        .fill
        .as_ref()
        .and_then(|f| match f.known()?.value {
            Fill::Oil(volume) => Some(volume),
            Fill::Grease(_) => None,
        });
    let within = Time::from_base(WITHIN_HOURS * 3600.0);
    let density = trial.density(from);
    let heat = specific_heat(trial);
    let loss = loss(trial, by);
    let power = volume.map(|v| {
        let warming = heater::power(v, density, heat, by, within);
        Power::from_base(warming.base() + loss.map_or(0.0, Measure::base))
    });
    let bears = bears(trial).map(|r| (r.limit, r.id.clone(), r.provenance.cited()));
    let cautious = bears_cautiously(trial);
    let fitted = trial.point.heater_power.as_ref().and_then(|p| p.known());
    let fitted = fitted.map(|p| {
        let time = volume.map(|v| heater::time(v, density, heat, by, p.value));
        let area = trial.point.heater_area.as_ref().and_then(|a| a.known());
        let area = area.map(|a| a.value);
        let density = area.map(|a| heater::watt_density(p.value, a));
        let limit = bears.as_ref().map(|b| b.0);
        Fitted {
            power: p.value,
            time,
            area,
            density,
            too_hot: density.zip(limit).is_some_and(|(d, l)| d.base() > l.base()),
            may_give: area.zip(limit).map(|(a, l)| heater::power_of_sheath(a, l)),
            needs: limit.map(|l| heater::sheath(p.value, l)),
        }
    });
    Some(HeaterAdvice {
        target: mend.target,
        from,
        to,
        volume,
        within,
        sheath: power
            .zip(bears.as_ref())
            .map(|(p, b)| heater::sheath(p, b.0)),
        power,
        loss,
        bears,
        cautious,
        fitted,
        cautions: trial
            .scales
            .rules
            .advice
            .iter()
            .filter(|a| a.topic == "heater")
            .map(|a| (a.text.clone(), a.provenance.cited()))
            .collect(),
    })
}

fn specific_heat(trial: &Trial<'_>) -> SpecificHeatCapacity {
    let advice = trial.scales.rules.advice.get("heater-size");
    let figure = advice.and_then(|a| a.figure);
    SpecificHeatCapacity::from_base(figure.map_or(SPECIFIC_HEAT, |a| a.base))
}

/// What the housing loses at the setting, where its surface and heat transfer are stated.
fn loss(trial: &Trial<'_>, by: TemperatureInterval) -> Option<Power> {
    let losses = trial.point.losses.as_ref()?;
    let area = losses.casing_area.as_ref()?.known()?;
    let heat = losses.heat_transfer.as_ref()?.known()?;
    let watts = area.value.base() * heat.value.base() * by.base();
    Some(Power::from_base(watts))
}

/// Whether the oil moves past the sheath.
fn circulates(trial: &Trial<'_>) -> bool {
    let lubrication = trial.point.lubrication.as_ref().map(|l| l.value);
    matches!(
        lubrication,
        Some(Lubrication::Circulated | Lubrication::PressureFed)
    )
}

/// The grade an oil counts as: its own, or the nearest thicker one.
fn counts_as(nu40_m2_s: f64) -> u32 {
    let nu = crate::quantity::KinematicViscosity::from_base(nu40_m2_s);
    let own = IsoGrade::of_viscosity(nu);
    let thicker = || IsoGrade::all().find(|g| lg(g.midpoint().base() / nu40_m2_s) >= 0.0);
    own.or_else(thicker).map_or(u32::MAX, IsoGrade::number)
}

/// The rule for the grade and the motion of the oil.
fn bears<'t>(trial: &Trial<'t>) -> Option<&'t HeaterDensity> {
    let grade = counts_as(trial.nu40());
    let moves = circulates(trial);
    let rules = trial.scales.rules.heaters.iter();
    rules
        .filter(|r| r.when.is_empty())
        .filter(|r| !r.circulating || moves)
        .filter(|r| r.up_to_vg.is_none_or(|most| grade <= most))
        .max_by(|a, b| a.limit.base().total_cmp(&b.limit.base()))
}

/// The cautious figure for what the oil contains, where a rule has one.
fn bears_cautiously(trial: &Trial<'_>) -> Option<(HeatFluxDensity, String)> {
    let scales = trial.scales;
    let pair = trial.pair();
    let point = facts::of_point(
        &trial.point,
        &pair.demands,
        crate::model::facts::SumpNow::Unknown,
    );
    let card = scales.suitability.point(&point);
    let oil = scales.suitability.oil(&scales.facts[trial.oil]);
    let rules = scales.rules.heaters.iter().filter(|r| !r.when.is_empty());
    let held =
        rules.filter(|r| scales.suitability.holds(&r.when, &card, Some(&oil)) == Truth::True);
    held.min_by(|a, b| a.limit.base().total_cmp(&b.limit.base()))
        .map(|r| (r.limit, r.id.clone()))
}

impl Trial<'_> {
    fn density(&self, at: ThermodynamicTemperature) -> crate::quantity::MassDensity {
        let oil = &self.scales.oils[self.oil];
        oil.curves.density.at(at)
    }
}
