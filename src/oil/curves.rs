//! The four curves of an oil: new, thin end, thick end, worn.

use super::cold::{self, ColdPoint};
use super::curve::Curve;
use super::density::{Density, density};
use super::findings::{DataFindings, Finding, findings};
use super::makeup::{Makeup, estimate};
use super::pressure::{PressureLaw, pressure_law};
use super::shape::{POLYMER_WINDOW_FROM_C, shape};
use super::thinning::Thinning;
use super::worn::{Worn, measured, worn};
use crate::model::oil::{Oil, Polymer, Viscosity};
use crate::model::rulebook::Rulebook;
use crate::quantity::convert::celsius;
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::viscosity_index;
use crate::relation::oil::viscosity_temperature::{Misfit, ViscosityCurve};

/// An oil ready to be judged.
#[derive(Clone, Debug, PartialEq)]
pub struct Curves {
    /// Its id.
    pub id: String,
    /// New.
    pub new: Curve,
    /// New, at the thin end of its tolerance, where it has one.
    pub thin: Option<Curve>,
    /// New, at the thick end.
    pub thick: Option<Curve>,
    /// After permanent shear.
    pub worn: Worn,
    /// Base oil and polymer, as far as they are stated or may be estimated.
    pub makeup: Makeup,
    /// How it thins in fast contacts; `None` without polymer, or where nothing is known of it.
    pub thinning: Option<Thinning>,
    /// Everything measured cold.
    pub cold_points: Vec<ColdPoint>,
    /// The new oil with its cold end measured, where it is.
    pub cold: Option<Curve>,
    /// Whether half the reserve is asked: the tolerance is judged already, or the points are
    /// measured.
    pub half_reserve: bool,
    /// Lowest temperature anything was stated at.
    pub lowest: ThermodynamicTemperature,
    /// Highest temperature anything was stated at.
    pub highest: ThermodynamicTemperature,
    /// Below this the finished points alone say little: the polymer's window ends there.
    pub window_end: Option<ThermodynamicTemperature>,
    /// Base stock; mineral Group I where nobody says.
    pub base: BaseStock,
    /// Whether the base was assumed.
    pub base_assumed: bool,
    /// Whether it is or counts as polymer-thickened.
    pub thickened: bool,
    /// Density.
    pub density: Density,
    /// Pressure-viscosity coefficient.
    pub pressure: PressureLaw,
    /// What does not add up.
    pub findings: Vec<Finding>,
}

impl Curves {
    /// Kinematic viscosity of the new oil.
    pub fn nu_new(&self, at: ThermodynamicTemperature) -> KinematicViscosity {
        self.new.nu_at(at)
    }

    /// The new oil as well as it is known cold: through measured points where there are any.
    pub fn best_new(&self) -> &Curve {
        self.cold.as_ref().unwrap_or(&self.new)
    }

    /// The curve ceilings are judged on: the thick end, with its cold end measured where it is.
    pub fn ceiling(&self) -> Curve {
        let thick = self.thick.as_ref().unwrap_or(&self.new);
        cold::joined(thick, &self.cold_points, self.lowest).unwrap_or_else(|| thick.clone())
    }

    /// Worn oil at the least and at the greatest loss in such a machine; the same curve twice
    /// where the loss is known, `None` where nothing is lost. Never above the new oil.
    pub fn worn_range(&self, severe: bool) -> Option<(Capped<'_>, Capped<'_>)> {
        let (least, most) = self.loss_range(severe).unwrap_or((0.0, 0.0));
        let at = |loss| {
            let worn = self.worn_after(loss)?;
            let new = &self.new;
            Some(Capped { worn, new })
        };
        Some((at(least)?, at(most)?))
    }

    /// The curve floors are judged on, after a given loss where the loss is not known.
    pub fn worn_after(&self, loss: f64) -> Option<Curve> {
        match &self.worn {
            Worn::AsNew => None,
            Worn::Known(curve) => Some(curve.clone()),
            Worn::Between { .. } => Some(self.new.after_loss(loss)),
        }
    }

    /// Least and greatest loss in such a machine; `None` where the worn curve is known.
    pub fn loss_range(&self, severe: bool) -> Option<(f64, f64)> {
        match self.worn {
            Worn::Between {
                least,
                most_mild,
                most_severe,
            } => Some((least, if severe { most_severe } else { most_mild })),
            _ => None,
        }
    }
}

/// A worn curve held at or below the new one: lines through points measured after a test may
/// cross that of the new oil far from the points.
#[derive(Clone, Debug, PartialEq)]
pub struct Capped<'c> {
    /// The worn curve.
    pub worn: Curve,
    /// The new one.
    pub new: &'c Curve,
}

impl Capped<'_> {
    /// Viscosity at a temperature.
    pub fn nu_at(&self, at: ThermodynamicTemperature) -> KinematicViscosity {
        let (worn, new) = (self.worn.nu_at(at), self.new.nu_at(at));
        if worn < new { worn } else { new }
    }

    /// Whether the worn curve lies above the new one there, so that the new one stands in.
    pub fn crosses(&self, at: ThermodynamicTemperature) -> bool {
        self.worn.nu_at(at) > self.new.nu_at(at)
    }
}

/// Highest VI a base gives by itself; `None` where it gives any.
pub fn natural_index(base: BaseStock) -> Option<f64> {
    match base {
        BaseStock::MineralI | BaseStock::MineralII => Some(120.0),
        BaseStock::Naphthenic => Some(120.0),
        BaseStock::MineralIII => Some(145.0),
        BaseStock::Pao => Some(180.0),
        BaseStock::DiEster | BaseStock::PolyolEster => Some(200.0),
        _ => None,
    }
}

/// Builds the curves of an oil.
///
/// # Errors
/// [`Misfit`] where its points make no curve; the reader refuses such oils with their place.
pub fn curves(oil: &Oil, rules: &Rulebook) -> Result<Curves, Misfit> {
    let base = oil.base.as_ref().map_or(BaseStock::MineralI, |b| b.value);
    let shape = shape(oil, base, rules)?;
    let vi = index_of(&shape.new);
    let thickened = counts_as_thickened(oil, base, vi);
    let makeup = match shape.made_of {
        Some(oil) => Makeup::Stated(oil),
        None if !thickened && oil.shear.is_none() => Makeup::Plain,
        None => estimate(oil, &shape.new, base, rules, measured(oil, &shape.new)),
    };
    let worn = worn(oil, &shape.new, &makeup, rules)?;
    let two_finished_points = match &oil.viscosity {
        Viscosity::Points { points, .. } => points.len() == 2,
        Viscosity::Grade(_) => true,
    };
    let window_end = (thickened && two_finished_points && shape.made_of.is_none())
        .then(|| celsius(POLYMER_WINDOW_FROM_C));
    let (lowest, highest) = stated_range(oil);
    let density = density(oil, base, rules);
    let cold_points = cold::points(oil, &shape.new, density, lowest);
    let mut built = Curves {
        id: oil.id.clone(),
        cold: cold::joined(&shape.new, &cold_points, lowest),
        new: shape.new,
        thin: shape.thin,
        thick: shape.thick,
        worn,
        thinning: Thinning::of(oil, &makeup, density),
        makeup,
        cold_points,
        half_reserve: shape.tolerance_judged || shape.measured,
        lowest,
        highest,
        window_end,
        base,
        base_assumed: oil.base.is_none(),
        thickened,
        density,
        pressure: pressure_law(oil, base),
        findings: Vec::new(),
    };
    let data = DataFindings {
        residuals: shape.residuals,
        not_made: shape.not_made,
        vi,
    };
    built.findings = findings(oil, &built, &data, rules);
    Ok(built)
}

/// VI from the curve at 40 and 100 °C; not a number below 2 mm²/s at 100 °C.
fn index_of(curve: &Curve) -> Option<f64> {
    viscosity_index::index(curve.nu_at(celsius(40.0)), curve.nu_at(celsius(100.0)))
        .ok()
        .map(Measure::base)
}

fn counts_as_thickened(oil: &Oil, base: BaseStock, vi: Option<f64>) -> bool {
    match oil.polymer {
        Polymer::Thickened => true,
        Polymer::Free => false,
        Polymer::NotSaid => {
            let above = natural_index(base).is_some_and(|most| vi.is_some_and(|vi| vi > most));
            let made_of = oil.formulation.as_ref();
            let polymer = made_of.is_some_and(|f| f.polymer.is_some() || !f.base_points.is_empty());
            polymer
                || oil.shear.is_some()
                || above
                || oil.facts.classes.iter().any(|c| implies_polymer(c))
        }
    }
}

/// High-VI hydraulic classes and multigrades are made with polymer unless the maker says not.
pub(super) fn implies_polymer(class: &str) -> bool {
    let class = class.trim();
    let multigrade = class
        .trim_start_matches("SAE ")
        .split_once('-')
        .is_some_and(|(cold, hot)| cold.ends_with(['W', 'w']) && hot.parse::<u32>().is_ok());
    class.eq_ignore_ascii_case("HV") || class.eq_ignore_ascii_case("HVLP") || multigrade
}

fn stated_range(oil: &Oil) -> (ThermodynamicTemperature, ThermodynamicTemperature) {
    match &oil.viscosity {
        Viscosity::Points { points, .. } => {
            let mut all: Vec<f64> = points.iter().map(|p| p.at.base()).collect();
            all.sort_by(f64::total_cmp);
            (
                ThermodynamicTemperature::from_base(all[0]),
                ThermodynamicTemperature::from_base(all[all.len() - 1]),
            )
        }
        Viscosity::Grade(_) => (celsius(40.0), celsius(40.0)),
    }
}
