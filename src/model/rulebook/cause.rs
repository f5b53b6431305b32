//! How far causes go and what they do to the figures of an oil, and what oils a site may hold
//! that are not on its list.

use super::provenance::Provenance;
use super::table::entry;
use crate::model::sample::Reading;
use crate::model::word::words;
use crate::quantity::{AcidNumber, Amount, KinematicViscosity, Ratio, TemperatureInterval};
use crate::relation::oil::base_stock::BaseStock;

words! {
    /// A cause whose size is told by the viscosities.
    SizedCause, "a cause that moves the viscosity" {
        PolymerShear = "polymer-shear", Dilution = "fuel-dilution", Gas = "dissolved-gas",
        Oxidation = "oxidation", LightEndLoss = "light-end-loss", Cracking = "thermal-cracking",
        OtherOil = "another oil",
    }
}

words! {
    /// Where a cause is to be expected more than elsewhere.
    ExpectedWhere, "where a cause is to be expected" {
        Polymer = "polymer-thickened oil", Engine = "engine", Gas = "gas in the machine",
        Heated = "heated oil",
    }
}

words! {
    /// What a size is measured by.
    SizedBy, "what a size is" {
        Fall100 = "fall at 100 degC", Fall40 = "fall at 40 degC", Rise40 = "rise at 40 degC",
        Share = "share mixed in",
    }
}

/// A fluid that thins an oil.
#[derive(Clone, Debug, PartialEq)]
pub struct Diluent {
    /// What it is.
    pub name: String,
    /// Its viscosity at 40 °C.
    pub at_40: KinematicViscosity,
    /// Its viscosity at 100 °C.
    pub at_100: KinematicViscosity,
}

/// How fast acids and carbonyls rise with the viscosity.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Ageing {
    /// Rise of the acid number at a size of 10 %.
    pub acid: AcidNumber,
    /// Rise of the oxidation band at a size of 10 %, absorbance per cm.
    pub oxidation: Ratio,
}

/// How far a cause goes and what it does on its way.
#[derive(Clone, Debug, PartialEq)]
pub struct CauseSize {
    /// Its id.
    pub id: String,
    /// The cause.
    pub cause: SizedCause,
    /// What the sizes are.
    pub by: SizedBy,
    /// Sizes that are weighed.
    pub sizes: Vec<Ratio>,
    /// How common each size is beside the others; all alike where empty.
    pub common: Vec<Ratio>,
    /// Movement of ln nu at the other temperature over that the size is measured by.
    pub ratios: Vec<Ratio>,
    /// Movement of the flash point at each size; one for all, or none.
    pub flash: Vec<TemperatureInterval>,
    /// How far the flash point lies from that, one standard deviation.
    pub flash_spread: Option<TemperatureInterval>,
    /// How acids and carbonyls go with it.
    pub ageing: Vec<Ageing>,
    /// What may be mixed in.
    pub diluents: Vec<Diluent>,
    /// Odds of the cause against no cause, before any figure is looked at; where none is stated it
    /// is weighed only where it is to be expected.
    pub odds: Option<Ratio>,
    /// The same where it is to be expected.
    pub odds_expected: Option<Ratio>,
    /// Where that is.
    pub expected: Option<ExpectedWhere>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(CauseSize);

/// A figure of an oil that is not on the site, by its grade.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ForeignFigure {
    /// The figure.
    pub reading: Reading,
    /// Its value at VG 32, or at any grade where nothing else is stated.
    pub value: Amount,
    /// Its value at VG 460; at other grades by the logarithm of the viscosity.
    pub at_460: Option<Amount>,
    /// How far it lies from that: two oils in three.
    pub spread: Spread,
}

/// How far a figure lies from its value.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Spread {
    /// By so much.
    By(Amount),
    /// By a share of the value.
    Share(Ratio),
}

/// A kind of oil a site may hold though it is not on its list.
#[derive(Clone, Debug, PartialEq)]
pub struct ForeignOil {
    /// Its id.
    pub id: String,
    /// What it is, in words.
    pub name: String,
    /// Base stock.
    pub base: BaseStock,
    /// Whether polymer thickens it.
    pub thickened: bool,
    /// Viscosity index.
    pub index: Ratio,
    /// Viscosities at 40 °C it is sold in, mm²/s.
    pub grades: Vec<u32>,
    /// Its figures.
    pub figures: Vec<ForeignFigure>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(ForeignOil, |o| vec![o.name.as_str()]);
