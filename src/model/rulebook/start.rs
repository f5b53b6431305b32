//! Cold start: what the oil must pass, how far above its pour point, and how it may be heated.

use super::condition::Clause;
use super::provenance::Provenance;
use super::table::entry;
use crate::model::machine::Lubrication;
use crate::model::stated::ViscosityLimit;
use crate::model::word::words;
use crate::quantity::{HeatFluxDensity, TemperatureInterval, Time};

words! {
    /// What an unmet start limit does.
    Role, "a role" { Demand = "demand", Condition = "condition" }
}

words! {
    /// Keys of a point that put a start limit on it.
    StatedBy, "a key" { Filter = "filter", GravityReturn = "gravity return" }
}

/// Highest viscosity at which something can pass or move the oil.
#[derive(Clone, Debug, PartialEq)]
pub struct StartLimit {
    /// Its id.
    pub id: String,
    /// What it is that must pass the oil.
    pub part: String,
    /// The limit; none where viscosity is not the way to judge it.
    pub limit: Option<ViscosityLimit>,
    /// Ways of lubrication that imply it.
    pub implied_by: Vec<Lubrication>,
    /// Keys that bring it in.
    pub stated_by: Option<StatedBy>,
    /// Whether it judges or is a condition.
    pub role: Role,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(StartLimit, |s| vec![s.part.as_str()]);

/// How far the coldest start must lie above the pour point.
#[derive(Clone, Debug, PartialEq)]
pub struct PourMargin {
    /// Its id.
    pub id: String,
    /// What it is for, in words.
    pub system: String,
    /// Ways of lubrication it is for.
    pub lubrication: Vec<Lubrication>,
    /// Where it is for kinds of part instead: all of these.
    pub when: Vec<Clause>,
    /// Least; none where pour point is not the criterion.
    pub least: Option<TemperatureInterval>,
    /// Preferred.
    pub preferred: Option<TemperatureInterval>,
    /// What is used instead where there is none.
    pub instead: Option<String>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(PourMargin, |p| vec![p.system.as_str()]);

/// Heat a sheath may give to an oil.
#[derive(Clone, Debug, PartialEq)]
pub struct HeaterDensity {
    /// Its id.
    pub id: String,
    /// Which oils, in words.
    pub oil: String,
    /// Up to this ISO VG; none for any.
    pub up_to_vg: Option<u32>,
    /// Whether the oil moves past the sheath.
    pub circulating: bool,
    /// Only for oils of which all of these hold.
    pub when: Vec<Clause>,
    /// The limit.
    pub limit: HeatFluxDensity,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(HeaterDensity);

/// Longest air release a grade is allowed when new.
#[derive(Clone, Debug, PartialEq)]
pub struct AirReleaseLimit {
    /// Its id.
    pub id: String,
    /// ISO VG.
    pub vg: u32,
    /// Longest time at 50 °C.
    pub at_most: Time,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(AirReleaseLimit);
