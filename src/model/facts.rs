//! What the suitability rules may ask: the facts of an oil and of a lubrication point.
//!
//! The reader's model fills these once per oil and once per point. `None` means that nobody
//! stated the fact, unless the field says otherwise; a rule that needs an unstated fact asks for
//! it. Numbers that are known only as a range are carried as [`Between`].

pub mod words;

pub use words::*;

use super::machine::Lubrication;
use super::oil::OilKind;
use super::stated::Between;
use crate::quantity::{KinematicViscosity, ThermodynamicTemperature, Time};
use crate::relation::oil::base_stock::BaseStock;
use std::collections::BTreeSet;

/// A quantity known exactly, as the range a fact is carried in.
pub fn exactly<Q: Copy>(value: Q) -> Between<Q> {
    Between {
        lo: value,
        hi: value,
    }
}

/// What an oil or a grease is, as far as suitability goes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct OilFacts {
    /// Its id, by which the oil now in the sump is recognised.
    pub id: String,
    /// Oil, by its use, or grease.
    pub kind: Option<OilKind>,
    /// Base stock; of a grease, that of its base oil. Pass the assumed one where none is stated.
    pub base: Option<BaseStock>,
    /// Whether it is thickened with polymer.
    pub polymer: Option<bool>,
    /// Whether a viscosity after shear, or a loss by test, is stated.
    pub shear_data: bool,
    /// Additives. A stated list is taken as complete: what is not in it is not in the oil.
    pub additives: Option<BTreeSet<Additive>>,
    /// How reactive its sulphur is.
    pub sulphur: Option<Sulphur>,
    /// Copper strip at 100 °C, ASTM D130.
    pub copper_strip: Option<CopperStrip>,
    /// Classes declared, as written: `CKC`, `HLP`, `SAE 15W-40`. Empty: none declared.
    pub classes: Vec<String>,
    /// Food class. `None`: none declared.
    pub food_class: Option<FoodClass>,
    /// Environmental class. `None`: none declared.
    pub environment: Option<Environment>,
    /// Fire class. `None`: none declared.
    pub fire_class: Option<FireClass>,
    /// Flash point, open cup where known.
    pub flash: Option<Between<ThermodynamicTemperature>>,
    /// Failure load stage of the FZG scuffing test, ISO 14635-1.
    pub fzg_stage: Option<u8>,
    /// Air release at 50 °C, ISO 9120.
    pub air_release: Option<Time>,
    /// Time to separate from water, ISO 6614.
    pub demulsibility: Option<Time>,
    /// Kinematic viscosity at 40 °C.
    pub nu40: Option<KinematicViscosity>,
    /// Thickener of a grease, by id or name.
    pub thickener: Option<String>,
}

/// What is in the sump now.
#[derive(Clone, Debug, Default, PartialEq)]
pub enum SumpNow {
    /// Nobody knows, or the oil named is not described.
    #[default]
    Unknown,
    /// A new or empty machine.
    Nothing,
    /// This oil.
    Oil(Box<OilFacts>),
}

/// What a lubrication point is, as far as suitability goes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct PointFacts {
    /// What it serves, by kind of part.
    pub serves: BTreeSet<PartGroup>,
    /// The practice components it serves, by id; their groups are added by the engine.
    pub components: Vec<String>,
    /// How oil gets there.
    pub lubrication: Option<Lubrication>,
    /// Classes and additive families asked for by the maker or the duty, as written.
    pub asks_for: Vec<String>,
    /// What is in it now.
    pub oil_now: SumpNow,
    /// Whether copper alloys touch the oil; yes where a part implies it (a bronze wheel).
    pub yellow_metal: Option<bool>,
    /// Whether silver touches the oil.
    pub silver: Option<bool>,
    /// Whether zinc- or cadmium-plated parts, magnesium or bare aluminium touch the oil.
    pub zinc_plated: Option<bool>,
    /// A backstop in the same sump.
    pub backstop: Option<Backstop>,
    /// A wet clutch or brake in the same sump.
    pub wet_clutch: Option<bool>,
    /// Whether air from here can be breathed.
    pub breathing_air: Option<bool>,
    /// Whether oxygen above 23.5 % or an oxidising gas can reach the oil.
    pub oxygen: Option<bool>,
    /// How water gets in.
    pub water_entry: Option<WaterEntry>,
    /// Seal materials.
    pub seals: Option<BTreeSet<Elastomer>>,
    /// Paint inside the housing.
    pub inside_paint: Option<Paint>,
    /// Sight glass.
    pub sight_glass: Option<SightGlass>,
    /// Whether the oil must pass a filter.
    pub filter: Option<bool>,
    /// Food class asked. `None`: none asked.
    pub food_class: Option<FoodClass>,
    /// Environmental class asked. `None`: none asked.
    pub environment: Option<Environment>,
    /// Fire class asked. `None`: none asked.
    pub fire_class: Option<FireClass>,
    /// Area: a wet place.
    pub wet: Option<bool>,
    /// Area: open food, or goods that touch food.
    pub food_zone: Option<bool>,
    /// Area: protected water or ground.
    pub water_protection: Option<bool>,
    /// Area: a fire zone.
    pub fire_zone: Option<bool>,
    /// Area: the hottest surface a leak could reach.
    pub hot_surface: Option<Between<ThermodynamicTemperature>>,
    /// Bulk oil at the hottest ambient.
    pub oil_temperature: Option<Between<ThermodynamicTemperature>>,
    /// The hottest part at the hottest ambient, its own rise included.
    pub part_temperature: Option<Between<ThermodynamicTemperature>>,
    /// Oil at start.
    pub start_temperature: Option<Between<ThermodynamicTemperature>>,
    /// Tank volume over flow, where both are known.
    pub dwell: Option<Between<Time>>,
}
