//! Components: the viscosity window a kind of part is given in practice.

use super::provenance::Provenance;
use super::table::entry;
use crate::model::facts::PartGroup;
use crate::model::machine::Lubrication;
use crate::model::part::BearingClass;
use crate::model::stated::{Between, ViscosityLimit};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, Ratio, ThermodynamicTemperature, Velocity,
};

/// A limit of a window.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum WindowLimit {
    /// A figure.
    Fixed(ViscosityLimit),
    /// So many times the reference viscosity of the pitch-line rule.
    TimesReference {
        /// The factor.
        factor: Ratio,
        /// And never more than this.
        at_most: Option<KinematicViscosity>,
    },
}

/// One component of practice, or one kind of bearing or gear.
#[derive(Clone, Debug, PartialEq)]
pub struct Component {
    /// Its id, stable.
    pub id: String,
    /// Its name in words.
    pub name: String,
    /// Other names it is found by.
    pub also: Vec<String>,
    /// Kind of part.
    pub group: PartGroup,
    /// Where its viscosity is judged, if not at the sump: `oil injection`.
    pub evaluate_at: Option<String>,
    /// Never below, running.
    pub min: Option<WindowLimit>,
    /// Aim here; printed, orders candidates, never fails one.
    pub prefer: Option<Between<WindowLimit>>,
    /// Never above at full speed and load.
    pub max_run: Option<WindowLimit>,
    /// Whether `max_run` is only a note and never a demand.
    pub max_run_is_note: bool,
    /// Never above when turned at low load.
    pub max_start: Option<WindowLimit>,
    /// The same where a pump feeds it; `max_start` is then for the other ways.
    pub max_start_pump_fed: Option<WindowLimit>,
    /// For minutes only, at low pressure and limited speed: least.
    pub short_term_min: Option<KinematicViscosity>,
    /// The same: greatest at start.
    pub short_term_start: Option<KinematicViscosity>,
    /// Usual ISO VG grades.
    pub typical_vg: Vec<u32>,
    /// Usual grades of other systems.
    pub typical: Vec<String>,
    /// Relation that outranks the window where its inputs are known.
    pub formula: Option<String>,
    /// Whether the window only restates that relation, so that it is information beside it.
    pub restates: bool,
    /// Lubrication it implies where none is stated.
    pub lubrication: Option<Lubrication>,
    /// Class needs it implies, by id.
    pub needs: Vec<String>,
    /// Cleanliness target, by id.
    pub cleanliness: Option<String>,
    /// How the lubricant is chosen where a window is not the way.
    pub choose_by: Option<String>,
    /// Grade by ambient.
    pub by_ambient: Vec<GradeByAmbient>,
    /// Ways of feeding, with the speeds they serve.
    pub feeds: Vec<FeedMethod>,
    /// What bands of the viscosity ratio mean.
    pub bands: Vec<RatioBand>,
    /// Window of a grease's base oil at 40 °C.
    pub base_oil: Option<Between<KinematicViscosity>>,
    /// Least viscosity at high shear, by duty.
    pub high_shear: Vec<(String, DynamicViscosity)>,
    /// Rolling bearings it is the fixed minimum of.
    pub bearings: Vec<BearingClass>,
    /// Keys of a part it looks at.
    pub keys: Vec<String>,
    /// What else must be looked at.
    pub concerns: Vec<String>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(Component, |c| {
    let mut names = vec![c.name.as_str()];
    names.extend(c.also.iter().map(String::as_str));
    names
});

/// A grade for a band of ambient temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct GradeByAmbient {
    /// The band.
    pub ambient: Between<ThermodynamicTemperature>,
    /// ISO VG.
    pub vg: u32,
}

/// A way of bringing oil to a chain, and the chain speeds it serves.
#[derive(Clone, Debug, PartialEq)]
pub struct FeedMethod {
    /// The way.
    pub method: String,
    /// From this speed.
    pub from: Option<Velocity>,
    /// Up to this speed.
    pub to: Option<Velocity>,
    /// How much, in words.
    pub amount: Option<String>,
}

/// What a band of the viscosity ratio means.
#[derive(Clone, Debug, PartialEq)]
pub struct RatioBand {
    /// From.
    pub from: Option<Ratio>,
    /// To.
    pub to: Option<Ratio>,
    /// What it means and what to do.
    pub act: String,
}
