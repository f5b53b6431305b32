//! From a machine to its demands.
//!
//! A demand is one limit on one quantity at one temperature, with the rule that set it and the
//! step of the calculation behind it. Each part yields demands; the point's list is their union,
//! and the strictest at each end governs.

pub mod inputs;
pub mod thermal;

use crate::model::rulebook::Confidence;
use crate::quantity::{Amount, KinematicViscosity, DynamicViscosity};
use crate::source::place::Whose;
use crate::trace::StepId;
pub use inputs::{Gap, GapKind, Inputs, Scenario};
pub use thermal::{AtAmbient, Thermal};

/// Which end a demand limits.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum End {
    /// Least viscosity at running temperature, hottest ambient.
    HotFloor,
    /// Greatest viscosity at running temperature, coldest ambient.
    RunningCeiling,
    /// Greatest viscosity at start.
    StartCeiling,
    /// Start temperature over pour point.
    PourMargin,
    /// Running temperature under the oil's own limit.
    OilCeiling,
    /// Grade named by the maker, compared at 40 °C with the new oil.
    MakerGrade,
}

/// The limit of a demand.
#[derive(Clone, Debug, PartialEq)]
pub enum Limit {
    /// A kinematic viscosity.
    Kinematic(KinematicViscosity),
    /// A dynamic viscosity, divided by the oil's density to be compared.
    Dynamic(DynamicViscosity),
    /// A film: the viscosity it needs is solved for each oil.
    Film(Box<film::FilmDemand>),
    /// Pour margin in kelvins: fails below the first, tight below the second.
    Pour {
        /// Least margin, K.
        least: f64,
        /// Preferred margin, K.
        preferred: f64,
    },
    /// The oil's or its base's own ceiling.
    OilsOwn,
    /// A ceiling stated for the point, K.
    Temperature(f64),
}

/// Which oils a demand speaks of.
#[derive(Clone, Debug, PartialEq)]
pub enum For {
    /// All of them.
    All,
    /// Those that declare this additive or class.
    With(String),
    /// Those that do not.
    Without(String),
}

/// What a demand does.
#[derive(Clone, Debug, PartialEq)]
pub enum Standing {
    /// It judges.
    Judges,
    /// It was replaced by a maker's limit or a house rule; where it is the stricter and an oil
    /// does not meet it, the verdict carries a condition.
    Replaced {
        /// By what, in words.
        by: String,
    },
    /// An unmet one is a condition, never a failure.
    Condition,
    /// Printed only.
    Information,
}

/// One demand.
#[derive(Clone, Debug, PartialEq)]
pub struct Demand {
    /// Which end it limits.
    pub end: End,
    /// The limit.
    pub limit: Limit,
    /// Temperature it is judged at, as a function of ambient.
    pub at: AtAmbient,
    /// The step of that temperature at the governing ambient.
    pub at_step: Option<StepId>,
    /// The step of the limit.
    pub limit_step: Option<StepId>,
    /// Id of the rule that set it.
    pub rule: String,
    /// The part it comes from.
    pub part: Option<String>,
    /// What it asks, in words: `viscosity ratio kappa >= 1`.
    pub says: String,
    /// Standard, maker's manual, practice.
    pub source: String,
    /// Whose word the limit is.
    pub whose: Whose,
    /// How sure the rule is.
    pub confidence: Confidence,
    /// Which oils it speaks of.
    pub only: For,
    /// What it does.
    pub standing: Standing,
}

/// A figure worked out for a part that sets no limit.
#[derive(Clone, Debug, PartialEq)]
pub struct Information {
    /// The part.
    pub part: Option<String>,
    /// What it is, in words.
    pub says: String,
    /// The figure.
    pub amount: Option<Amount>,
    /// Its step.
    pub step: Option<StepId>,
}
