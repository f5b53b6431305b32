//! A lubricant as its data sheet gives it.

use super::stated::Bound;
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, MassDensity, Pressure, PressureViscosity, Ratio,
    ThermodynamicTemperature, Volume,
};
use crate::relation::oil::base_stock::BaseStock;
use crate::source::Origin;
use crate::source::place::Given;

/// A lubricant.
#[derive(Clone, Debug, PartialEq)]
pub struct Oil {
    /// Its id in the oil list.
    pub id: String,
    /// Its name in plain words.
    pub name: Option<String>,
    /// Where its data come from.
    pub source: Option<String>,
    /// A remark.
    pub note: Option<String>,
    /// What kind of lubricant it is sold as.
    pub kind: OilKind,
    /// Base stock; mineral is assumed where nobody says.
    pub base: Option<Given<BaseStock>>,
    /// Whether a polymer thickens it.
    pub polymer: Polymer,
    /// Viscosity new; of a grease, that of its base oil.
    pub viscosity: Viscosity,
    /// Permanent shear.
    pub shear: Option<Shear>,
    /// Base oil and polymer, where the formulation is known.
    pub formulation: Option<Formulation>,
    /// Low-shear viscosities measured cold (ASTM D2983 and the like).
    pub cold_viscosity: Vec<Given<DynamicPoint>>,
    /// Cranking simulator viscosities.
    pub ccs: Vec<Given<DynamicPoint>>,
    /// Mini-rotary viscosities.
    pub mrv: Vec<Given<DynamicPoint>>,
    /// Yield stress seen in the mini-rotary test, and its temperature.
    pub yield_stress: Option<Given<(Pressure, ThermodynamicTemperature)>>,
    /// Temperature of 150 000 mPa·s by ASTM D2983.
    pub t150000: Option<Given<ThermodynamicTemperature>>,
    /// Viscosity at 150 °C and 1e6 1/s.
    pub hths: Option<Given<DynamicViscosity>>,
    /// Pour point.
    pub pour_point: Option<Given<Bound<ThermodynamicTemperature>>>,
    /// Cloud point.
    pub cloud_point: Option<Given<Bound<ThermodynamicTemperature>>>,
    /// Flash point and the cup it was taken in.
    pub flash_point: Option<(Given<Bound<ThermodynamicTemperature>>, Option<Cup>)>,
    /// Highest bulk temperature the supplier allows.
    pub oil_limit: Option<Given<ThermodynamicTemperature>>,
    /// Density and the temperature it holds at.
    pub density: Option<Given<(MassDensity, ThermodynamicTemperature)>>,
    /// Measured pressure-viscosity coefficient and its temperature.
    pub alpha: Option<Given<(PressureViscosity, ThermodynamicTemperature)>>,
    /// Viscosity index as stated; only checked.
    pub vi: Option<Given<Ratio>>,
    /// Additives, classes and declarations that suitability rules ask about.
    pub facts: super::facts::OilFacts,
    /// Price for a litre, or for a kilogram of grease.
    pub price: Option<Given<Price>>,
    /// Litres in stock.
    pub in_stock: Option<Given<Volume>>,
    /// Of a grease: what is not its base oil.
    pub grease: Option<Grease>,
    /// Every value as written, for the oil sheet, in file order.
    pub inputs: Vec<super::machine::InputLine>,
    /// Where the record stands.
    pub origin: Origin,
}

/// What a lubricant is sold as.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum OilKind {
    /// Gear oil.
    Gear,
    /// Hydraulic fluid.
    Hydraulic,
    /// Turbine oil.
    Turbine,
    /// Compressor oil.
    Compressor,
    /// Circulating oil.
    Circulating,
    /// Engine oil.
    Engine,
    /// Axle oil.
    Axle,
    /// Spindle oil.
    Spindle,
    /// Slideway oil.
    Slideway,
    /// Chain oil.
    Chain,
    /// Worm gear oil.
    Worm,
    /// Anything else.
    Other,
    /// Grease.
    Grease,
}

impl OilKind {
    /// The words users write.
    pub const WRITTEN: &'static [(&'static str, Self)] = &[
        ("gear", Self::Gear),
        ("hydraulic", Self::Hydraulic),
        ("turbine", Self::Turbine),
        ("compressor", Self::Compressor),
        ("circulating", Self::Circulating),
        ("engine", Self::Engine),
        ("axle", Self::Axle),
        ("spindle", Self::Spindle),
        ("slideway", Self::Slideway),
        ("chain", Self::Chain),
        ("worm", Self::Worm),
        ("other", Self::Other),
        ("grease", Self::Grease),
    ];

    /// The word users write.
    pub fn word(self) -> &'static str {
        Self::WRITTEN
            .iter()
            .find(|(_, k)| *k == self)
            .map_or("", |(w, _)| w)
    }
}

/// Whether a polymer thickens the oil.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Polymer {
    /// Nobody says.
    NotSaid,
    /// Declared polymer-thickened.
    Thickened,
    /// Declared free of polymer.
    Free,
}

/// Viscosity of the new oil.
#[derive(Clone, Debug, PartialEq)]
pub enum Viscosity {
    /// Two points or more.
    Points {
        /// The points, rising in temperature.
        points: Vec<ViscosityPoint>,
        /// Where they come from.
        from: PointsFrom,
    },
    /// Only a grade.
    Grade(Box<GradeOnly>),
}

/// A viscosity known only by its grade.
#[derive(Clone, Debug, PartialEq)]
pub struct GradeOnly {
    /// ISO VG number.
    pub iso_vg: Given<u32>,
    /// Viscosity index, where stated.
    pub vi: Option<Given<Ratio>>,
}

/// One point of a viscosity line.
#[derive(Clone, Debug, PartialEq)]
pub struct ViscosityPoint {
    /// The viscosity, as written and converted.
    pub nu: Given<KinematicViscosity>,
    /// Its temperature.
    pub at: ThermodynamicTemperature,
    /// Stated tolerance, a share of the value.
    pub tolerance: Option<f64>,
}

/// Where viscosity points come from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum PointsFrom {
    /// A data sheet: typical values.
    DataSheet,
    /// The certificate of a batch.
    Batch,
    /// Measured on the oil itself.
    Measured,
}

/// What permanent shear leaves.
#[derive(Clone, Debug, PartialEq)]
pub enum Shear {
    /// Points measured after a test.
    Points {
        /// The points, rising in temperature.
        points: Vec<ViscosityPoint>,
        /// The test.
        test: Option<String>,
    },
    /// A loss at one temperature by a test.
    Loss {
        /// Share of the viscosity lost.
        loss: Given<Ratio>,
        /// Temperature it was found at.
        at: ThermodynamicTemperature,
        /// The test.
        test: Option<String>,
    },
    /// Permanent shear stability index by a test.
    Pssi {
        /// The index, a share.
        pssi: Given<Ratio>,
        /// The test.
        test: Option<String>,
    },
}

impl Shear {
    /// The test, as written.
    pub fn test(&self) -> Option<&str> {
        let (Self::Points { test, .. } | Self::Loss { test, .. } | Self::Pssi { test, .. }) = self;
        test.as_deref()
    }
}

/// Base oil and polymer of a thickened oil, where stated.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Formulation {
    /// Points of the base oil with everything but the polymer.
    pub base_points: Vec<ViscosityPoint>,
    /// Polymer type, as written.
    pub polymer: Option<Given<String>>,
}

/// A dynamic viscosity at a temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct DynamicPoint {
    /// The viscosity.
    pub eta: DynamicViscosity,
    /// Its temperature.
    pub at: ThermodynamicTemperature,
}

/// The cup a flash point was taken in; the two are not comparable.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Cup {
    /// Cleveland open cup.
    Open,
    /// Pensky-Martens closed cup.
    Closed,
}

/// A price.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Price {
    /// For a litre.
    PerLitre(f64),
    /// For a kilogram.
    PerKilogram(f64),
}

/// What makes a grease of its base oil.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Grease {
    /// Thickener, an id of the rules.
    pub thickener: Option<Given<String>>,
    /// NLGI number, as written: `2`, `1.5`, `00`.
    pub nlgi: Option<Given<String>>,
    /// Dropping point.
    pub dropping_point: Option<Given<Bound<ThermodynamicTemperature>>>,
    /// DIN 51502 code, as written.
    pub code: Option<Given<String>>,
}
