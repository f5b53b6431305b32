//! Life of an oil against its running temperature: guidance with a range, never a promise.

use super::curves::Curves;
use crate::model::facts::Additive;
use crate::model::oil::{Oil, OilKind};
use crate::model::rulebook::{LifeFigure, Rulebook};
use crate::numeric::math::{exp, ln};
use crate::quantity::convert::number;
use crate::quantity::{
    Amount, Measure, Ratio, TemperatureInterval, ThermodynamicTemperature, Time,
};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::life::{Halving, arrhenius};

/// What the life of an oil is worked out by.
#[derive(Clone, Debug, PartialEq)]
pub struct LifeBasis {
    /// The type of oil of the rule used.
    pub oil: String,
    /// Constant of the equation.
    pub constant: Ratio,
    /// Life of the base against mineral oil.
    pub multiple: Ratio,
    /// Id of the rule behind the constant.
    pub rule: String,
    /// The rule of ten.
    pub halving: Halving,
    /// What water and metal leave of it.
    pub dirty_share: Ratio,
    /// Longest stay by the calendar.
    pub calendar: Option<Time>,
}

/// Why there is no figure.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum NoLife {
    /// No published figures for the base.
    #[error("no published life figures for {0}")]
    Base(&'static str),
    /// Engine oils age by fuel, soot and acids.
    #[error("engine oils age by fuel, soot and acids: the engine maker's interval holds")]
    Engine,
    /// The rules lack an entry.
    #[error("the rules carry no {0}")]
    Rule(&'static str),
}

/// The life at a temperature: clean and dry, and with water or metal.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LifeAt {
    /// Temperature.
    pub at: ThermodynamicTemperature,
    /// By the equation: with water and metal, clean and dry.
    pub equation: (Time, Time),
    /// By the rule of ten from where it begins: the same two.
    pub rule_of_ten: (Time, Time),
    /// Whether oxidation still decides: at or above the start of the rule of ten.
    pub decides: bool,
}

/// The type of oil the rules know the constant of.
fn type_of(oil: &Oil) -> Option<&'static str> {
    let ep = oil
        .facts
        .additives
        .as_ref()
        .is_some_and(|a| a.contains(&Additive::Ep));
    match oil.kind {
        OilKind::Gear | OilKind::Axle | OilKind::Worm | OilKind::Chain => Some("EP gear oil"),
        OilKind::Turbine | OilKind::Circulating | OilKind::Compressor if !ep => Some("turbine oil"),
        OilKind::Hydraulic | OilKind::Spindle | OilKind::Slideway => Some("hydraulic oil"),
        OilKind::Engine | OilKind::Grease => None,
        _ if ep => Some("EP gear oil"),
        _ => Some("mineral oil without inhibitors"),
    }
}

/// What the life of an oil is worked out by.
///
/// # Errors
/// [`NoLife`], with the reason.
pub fn basis(oil: &Oil, curves: &Curves, rules: &Rulebook) -> Result<LifeBasis, NoLife> {
    if oil.kind == OilKind::Engine {
        return Err(NoLife::Engine);
    }
    let wanted = type_of(oil).ok_or(NoLife::Rule("life of greases"))?;
    let multiple = multiple(curves.base, rules).ok_or(NoLife::Base(curves.base.word()))?;
    let found = rules.life.iter().find_map(|r| match &r.figure {
        LifeFigure::Arrhenius { oil, k1 } if oil == wanted => Some((r.id.clone(), *k1)),
        _ => None,
    });
    let (rule, k1) = found.ok_or(NoLife::Rule("constant for this type of oil"))?;
    let halving = halving(rules).ok_or(NoLife::Rule("rule of ten"))?;
    let dirty_share = dirty_share(rules)?;
    Ok(LifeBasis {
        oil: wanted.to_owned(),
        constant: number(k1.base),
        multiple,
        rule,
        halving,
        dirty_share,
        calendar: calendar(curves.base, rules),
    })
}

/// What water and metal leave of the life of an oil.
///
/// # Errors
/// [`NoLife::Rule`] where the rules do not say.
pub fn dirty_share(rules: &Rulebook) -> Result<Ratio, NoLife> {
    let dirty = rules.advice.get("water-and-metal").and_then(|a| a.figure);
    let dirty = dirty.ok_or(NoLife::Rule("share left by water and metal"))?;
    Ok(number(dirty.base))
}

/// Life of a base against mineral oil of Group I; `None` where nobody publishes one.
fn multiple(base: BaseStock, rules: &Rulebook) -> Option<Ratio> {
    if base == BaseStock::MineralI {
        return Some(number(1.0));
    }
    rules.life.iter().find_map(|r| match &r.figure {
        LifeFigure::Multiplier { bases, factor } if bases.contains(&base) => {
            Some(number(factor.base))
        }
        _ => None,
    })
}

fn halving(rules: &Rulebook) -> Option<Halving> {
    rules.life.iter().find_map(|r| match &r.figure {
        LifeFigure::Halving {
            above,
            factor,
            step,
        } => Some(Halving {
            above: *above,
            factor: number(factor.base),
            step: step_of(*step),
        }),
        _ => None,
    })
}

fn step_of(step: Amount) -> TemperatureInterval {
    TemperatureInterval::from_base(step.base)
}

fn calendar(base: BaseStock, rules: &Rulebook) -> Option<Time> {
    rules.life.iter().find_map(|r| match &r.figure {
        LifeFigure::Calendar { bases, at_most } if bases.contains(&base) => Some(*at_most),
        _ => None,
    })
}

impl LifeBasis {
    /// Both ways side by side at a temperature. The rule of ten starts from the life by the
    /// equation where the rule begins.
    pub fn at(&self, at: ThermodynamicTemperature) -> LifeAt {
        let clean = arrhenius(self.constant, self.multiple, at);
        let begin = arrhenius(self.constant, self.multiple, self.halving.above);
        let ten = self.halving.life(begin, at);
        let dirty = |t: Time| Time::from_base(t.base() * self.dirty_share.base());
        LifeAt {
            at,
            equation: (dirty(clean), clean),
            rule_of_ten: (dirty(ten), ten),
            decides: at >= self.halving.above,
        }
    }
}

/// A drain interval as guidance.
#[derive(Clone, Debug, PartialEq)]
pub struct DrainGuide {
    /// Shortest and longest, running time.
    pub hours: (Time, Time),
    /// What it rests on.
    pub by: String,
    /// Its sources.
    pub source: String,
}

/// Drain interval of a splash gearbox, between the sump temperatures tabled; the shortest is the
/// one with water or metal in the oil. `None` hotter than the table, or for a base it does not
/// have.
pub fn gear_drain(
    curves: &Curves,
    rules: &Rulebook,
    at: ThermodynamicTemperature,
    dirty_share: Ratio,
) -> Option<DrainGuide> {
    let family = family(curves.base)?;
    let mut rows: Vec<(f64, f64)> = Vec::new();
    let mut source = String::new();
    for rule in &rules.life {
        if let LifeFigure::GearDrain {
            sump,
            mineral,
            pao,
            pag,
        } = &rule.figure
        {
            let time = [mineral, pao, pag][family];
            rows.push((sump.base(), time.base()));
            source = rule.provenance.cited();
        }
    }
    rows.sort_by(|a, b| a.0.total_cmp(&b.0));
    let (first, last) = (rows.first()?, rows.last()?);
    let t = at.base();
    if t > last.0 {
        return None;
    }
    let seconds = if t <= first.0 {
        first.1
    } else {
        let pair = rows.windows(2).find(|w| t <= w[1].0)?;
        let share = (t - pair[0].0) / (pair[1].0 - pair[0].0);
        exp(ln(pair[0].1) + share * (ln(pair[1].1) - ln(pair[0].1)))
    };
    Some(DrainGuide {
        hours: (
            Time::from_base(seconds * dirty_share.base()),
            Time::from_base(seconds),
        ),
        by: "drain intervals of splash gearboxes by sump temperature".to_owned(),
        source,
    })
}

/// Column of the drain table: mineral, PAO, PAG.
fn family(base: BaseStock) -> Option<usize> {
    match base {
        BaseStock::MineralI
        | BaseStock::MineralII
        | BaseStock::MineralIII
        | BaseStock::Naphthenic => Some(0),
        BaseStock::Pao => Some(1),
        BaseStock::PagWaterSoluble | BaseStock::PagOilSoluble => Some(2),
        _ => None,
    }
}

/// Cost of the oil of one fill over a year of use.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct YearlyCost {
    /// Changes a year.
    pub changes: f64,
    /// Litres a year, changes and top-up.
    pub litres: f64,
    /// Cost a year, in the currency of the price.
    pub cost: f64,
}

/// Cost a year: the fill changed at an interval of running time, or at the latest after
/// `calendar`, and what is topped up between.
pub fn yearly_cost(
    per_litre: f64,
    fill_litres: f64,
    running_hours_a_year: f64,
    interval: (Time, Option<Time>),
    topped_up_litres: f64,
) -> YearlyCost {
    let by_hours = running_hours_a_year * 3600.0 / interval.0.base();
    let by_calendar = interval.1.map_or(0.0, |c| YEAR_S / c.base());
    let changes = by_hours.max(by_calendar);
    let litres = changes * fill_litres + topped_up_litres;
    YearlyCost {
        changes,
        litres,
        cost: litres * per_litre,
    }
}

/// A year, s.
const YEAR_S: f64 = 31_556_952.0;

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_year_costs_its_changes_and_its_top_up() {
        let hours = |h: f64| Time::from_base(h * 3600.0);
        let at = |interval| yearly_cost(3.0, 100.0, 8000.0, interval, 20.0);
        let cost = at((hours(4000.0), None));
        assert!((cost.changes - 2.0).abs() < 1e-12 && (cost.cost - 660.0).abs() < 1e-9);
        // a change every two years by the calendar counts where the hours would allow longer
        let cost = at((hours(80_000.0), Some(Time::from_base(2.0 * YEAR_S))));
        assert!((cost.changes - 0.5).abs() < 1e-12 && (cost.litres - 70.0).abs() < 1e-9);
    }
}
