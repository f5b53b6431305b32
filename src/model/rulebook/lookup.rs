//! Look-ups of the demands and of the oils' curves.

use super::Rulebook;
use super::base_stock::BaseStockRule;
use super::component::{Component, WindowLimit};
use super::start::PourMargin;
use crate::model::Lubrication;
use crate::model::Oil;
use crate::model::part::BearingClass;
use crate::model::stated::ViscosityLimit;
use crate::quantity::{KinematicViscosity, MassDensity, Measure, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;

impl Rulebook {
    /// What a base stock is like.
    pub fn base_stock(&self, base: BaseStock) -> Option<&BaseStockRule> {
        self.base_stocks.iter().find(|b| b.base == base)
    }

    /// Viscosity index of a base without polymer; the upper end of an open range is the lower
    /// one plus 40.
    pub fn vi_range(&self, base: BaseStock) -> (f64, f64) {
        self.base_stock(base).map_or((90.0, 105.0), |b| {
            let low = b.vi.0.base();
            (low, b.vi.1.map_or(low + 40.0, Measure::base))
        })
    }

    /// Density at 15 °C typical of a base: the middle of its range.
    pub fn typical_density(&self, base: BaseStock) -> MassDensity {
        self.base_stock(base)
            .map_or(MassDensity::from_base(880.0), |b| {
                MassDensity::from_base(f64::midpoint(b.density15.lo.base(), b.density15.hi.base()))
            })
    }

    /// The pour margin for a way of lubrication; `None` where pour point is not the criterion.
    pub fn pour_margin(&self, lubrication: Option<Lubrication>) -> Option<&PourMargin> {
        let lubrication = lubrication?;
        self.pour_margins
            .iter()
            .find(|m| m.when.is_empty() && m.lubrication.contains(&lubrication))
    }

    /// The fixed minimum of a class of rolling bearing.
    pub fn bearing_minimum(&self, class: BearingClass) -> Option<&Component> {
        self.components.iter().find(|c| c.bearings.contains(&class))
    }

    /// Use range of a grease by its thickener.
    pub fn use_range(
        &self,
        oil: &Oil,
    ) -> Option<(ThermodynamicTemperature, ThermodynamicTemperature)> {
        let thickener = oil.grease.as_ref()?.thickener.as_ref()?;
        let entry = self.thickeners.find(&thickener.value)?;
        Some((entry.range.lo, entry.range.hi))
    }
}

impl Component {
    /// The floor of the window, where it is a figure in mm²/s.
    pub fn fixed_minimum(&self) -> Option<KinematicViscosity> {
        match self.min {
            Some(WindowLimit::Fixed(ViscosityLimit::Kinematic(nu))) => Some(nu),
            _ => None,
        }
    }
}
