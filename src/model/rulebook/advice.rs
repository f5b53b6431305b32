//! Rules of practice that are sentences or a figure beside one, kept by topic.

use super::provenance::Provenance;
use super::table::entry;
use crate::model::stated::Between;
use crate::quantity::{Amount, ThermodynamicTemperature, Time};
use crate::relation::oil::base_stock::BaseStock;

/// A piece of practice, by topic.
#[derive(Clone, Debug, PartialEq)]
pub struct Advice {
    /// Its id.
    pub id: String,
    /// Its topic: `heater`, `sampling place`, `start drill`, `regreasing` …
    pub topic: String,
    /// What it says.
    pub text: String,
    /// A figure that goes with it.
    pub figure: Option<Amount>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(Advice);

/// A loose equivalent between grade systems. Never a conversion.
#[derive(Clone, Debug, PartialEq)]
pub struct GradeCrossing {
    /// Its id.
    pub id: String,
    /// The grade in its own system.
    pub grade: String,
    /// ISO VG, lowest and highest.
    pub vg: Between<u32>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(GradeCrossing, |g| vec![g.grade.as_str()]);

/// Oil life against temperature.
#[derive(Clone, Debug, PartialEq)]
pub struct LifeRule {
    /// Its id.
    pub id: String,
    /// What it says.
    pub says: String,
    /// The figures it carries.
    pub figure: LifeFigure,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(LifeRule);

/// Figures of a life rule.
#[derive(Clone, Debug, PartialEq)]
pub enum LifeFigure {
    /// Life falls by a factor for so many kelvins above a start.
    Halving {
        /// From here on.
        above: ThermodynamicTemperature,
        /// Factor for each step.
        factor: Amount,
        /// The step.
        step: Amount,
    },
    /// `lg(life in h) = k1 + 4750 / T` for an oil type.
    Arrhenius {
        /// Oil type.
        oil: String,
        /// The constant.
        k1: Amount,
    },
    /// Life against a mineral oil of Group I.
    Multiplier {
        /// The base stocks.
        bases: Vec<BaseStock>,
        /// The factor.
        factor: Amount,
    },
    /// Drain interval of a splash gearbox at a sump temperature.
    GearDrain {
        /// Sump temperature.
        sump: ThermodynamicTemperature,
        /// Mineral oil.
        mineral: Time,
        /// PAO.
        pao: Time,
        /// PAG.
        pag: Time,
    },
    /// Longest stay by the calendar.
    Calendar {
        /// The base stocks.
        bases: Vec<BaseStock>,
        /// The time.
        at_most: Time,
    },
}
