//! The rulebook: what practice and the standards say, as data with a source, a basis and a
//! confidence on every entry.
//!
//! One [`Table`] a kind of entry. Tables are filled by the reader of rule files in layers; an
//! entry of a later layer replaces the one of the same id, and [`Rulebook::replaced`] lists every
//! such case, for the sheets to print.

pub mod advice;
pub mod base_stock;
pub mod cause;
pub mod caution;
pub mod class;
pub mod compatibility;
pub mod component;
pub mod condition;
pub mod grease;
mod lookup;
pub mod polymer;
pub mod provenance;
pub mod start;
pub mod suitability;
pub mod table;
pub mod used_oil;

pub use advice::{Advice, GradeCrossing, LifeFigure, LifeRule};
pub use base_stock::BaseStockRule;
pub use cause::{CauseSize, ForeignOil};
pub use caution::Caution;
pub use class::{Because, Class, Contains, Need, Serving};
pub use compatibility::{MixRule, PaintRule, ResidualRule, SealRule};
pub use component::{Component, WindowLimit};
pub use condition::{Clause, Condition, Fact, Test, Values};
pub use polymer::{PolymerKind, ShearTest, ShearsLike};
pub use provenance::{Basis, Confidence, Provenance, SourceEntry};
pub use start::{AirReleaseLimit, HeaterDensity, PourMargin, StartLimit};
pub use suitability::{Level, SuitabilityRule, WhenUnknown};
pub use table::{Entry, Table};
pub use used_oil::{
    ChangeInterval, Cleanliness, Diagnosis, NewOilReading, SamplingInterval, TestScatter,
    UsedOilLimit, WearSign,
};

/// Everything the rule files say.
#[derive(Clone, Debug, Default)]
pub struct Rulebook {
    /// Where the figures come from.
    pub sources: Table<SourceEntry>,
    /// Components with their viscosity windows.
    pub components: Table<Component>,
    /// Base stocks.
    pub base_stocks: Table<BaseStockRule>,
    /// Seal materials against fluids.
    pub seals: Table<SealRule>,
    /// Paints and plastics against fluids.
    pub paints: Table<PaintRule>,
    /// Which fluids mix.
    pub mixing: Table<MixRule>,
    /// What may be left of the old oil after a change.
    pub residuals: Table<ResidualRule>,
    /// Oil life against temperature.
    pub life: Table<LifeRule>,
    /// Viscosity modifiers.
    pub polymers: Table<PolymerKind>,
    /// Tests that shear them.
    pub shear_tests: Table<ShearTest>,
    /// Loose equivalents between grade systems.
    pub crossings: Table<GradeCrossing>,
    /// Classes and additive families.
    pub classes: Table<Class>,
    /// Which class serves which, worked out from the classes.
    pub serving: Serving,
    /// Class needs of components.
    pub needs: Table<Need>,
    /// Suitability rules.
    pub suitability: Table<SuitabilityRule>,
    /// Highest viscosity at start, by what the oil must pass.
    pub start_limits: Table<StartLimit>,
    /// Start temperature over pour point, by lubrication.
    pub pour_margins: Table<PourMargin>,
    /// Watt density of heaters.
    pub heaters: Table<HeaterDensity>,
    /// Air release by grade.
    pub air_release: Table<AirReleaseLimit>,
    /// Limits for oil in use.
    pub used_oil: Table<UsedOilLimit>,
    /// Cleanliness targets.
    pub cleanliness: Table<Cleanliness>,
    /// What wear metals come from.
    pub wear: Table<WearSign>,
    /// What the joint movement of the readings means.
    pub diagnosis: Table<Diagnosis>,
    /// What new oil reads where nobody says.
    pub new_oil: Table<NewOilReading>,
    /// How far causes go, and what they do on their way.
    pub cause_sizes: Table<CauseSize>,
    /// Oils a site may hold though they are not on its list.
    pub foreign_oils: Table<ForeignOil>,
    /// How far laboratories differ.
    pub scatter: Table<TestScatter>,
    /// How often to sample.
    pub sampling: Table<SamplingInterval>,
    /// When to change.
    pub changes: Table<ChangeInterval>,
    /// Grease thickeners.
    pub thickeners: Table<grease::Thickener>,
    /// Which thickeners mix.
    pub grease_mixing: Table<grease::GreaseMix>,
    /// NLGI numbers.
    pub nlgi: Table<grease::Nlgi>,
    /// Letters of the DIN 51502 grease code.
    pub grease_code: Table<grease::CodeLetter>,
    /// Base oil of a grease by speed.
    pub grease_speeds: Table<grease::SpeedBand>,
    /// Highest speed factor by type.
    pub grease_speed_limits: Table<grease::SpeedLimit>,
    /// Factors on the regreasing interval.
    pub grease_factors: Table<grease::IntervalFactor>,
    /// First fill of grease.
    pub grease_fills: Table<grease::FirstFill>,
    /// Rules of practice that are sentences, by topic.
    pub advice: Table<Advice>,
    /// Cautions and deferrals of the report.
    pub cautions: Table<Caution>,
    /// Entries of a lower layer that a user's own took the place of.
    pub replaced: Vec<Replaced>,
}

/// An entry replaced by a layer above it.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub struct Replaced {
    /// The kind of entry: `suitability`.
    pub kind: &'static str,
    /// Its id.
    pub id: String,
    /// The file it was in.
    pub was: String,
    /// The file that replaced it.
    pub by: String,
}

impl Rulebook {
    /// The full citation of a short source name; the name itself where the register has none.
    pub fn citation<'a>(&'a self, source: &'a str) -> &'a str {
        self.sources
            .get(source)
            .map_or(source, |entry| entry.citation.as_str())
    }

    /// Every entry of every table with the kind of its file, in the order of the tables.
    pub fn entries(&self) -> Vec<(&'static str, &dyn Entry)> {
        let mut all: Vec<(&'static str, &dyn Entry)> = Vec::new();
        macro_rules! take {
            ($($table:ident: $kind:literal),+ $(,)?) => {$(
                all.extend(self.$table.iter().map(|e| ($kind, e as &dyn Entry)));
            )+};
        }
        take! {
            sources: "sources",
            components: "components",
            base_stocks: "base stocks",
            seals: "seals",
            paints: "paints",
            mixing: "mixing",
            residuals: "residuals",
            life: "life",
            polymers: "polymers",
            shear_tests: "shear tests",
            crossings: "grade crossings",
            classes: "classes",
            needs: "class needs",
            suitability: "suitability",
            start_limits: "start limits",
            pour_margins: "pour margins",
            heaters: "heaters",
            air_release: "air release",
            used_oil: "used-oil limits",
            cleanliness: "cleanliness",
            wear: "wear",
            diagnosis: "diagnosis",
            new_oil: "new-oil readings",
            cause_sizes: "cause sizes",
            foreign_oils: "foreign oils",
            scatter: "test scatter",
            sampling: "sampling",
            changes: "change intervals",
            thickeners: "thickeners",
            grease_mixing: "grease mixing",
            nlgi: "nlgi",
            grease_code: "grease code",
            grease_speeds: "grease speeds",
            grease_speed_limits: "grease speed limits",
            grease_factors: "grease factors",
            grease_fills: "grease fills",
            advice: "advice",
            cautions: "cautions",
        }
        all
    }

    /// Why an oil that declares one class serves where another is wanted.
    pub fn serves(&self, declared: &str, wanted: &str) -> Option<&Because> {
        let declared = self.class_id(declared)?;
        let wanted = self.class_id(wanted)?;
        self.serving.between(declared, wanted)
    }

    /// The class a designation means: `ISO-L-CKC` and `CKC 220` are `CKC`, `SAE 15W-40` is an
    /// engine grade.
    pub fn class_id(&self, written: &str) -> Option<&str> {
        let plain = class::plain(written);
        self.classes
            .find(&plain)
            .or_else(|| self.classes.find(class::family_of(&plain)?))
            .or_else(|| self.classes.find(class::without_grade(&plain)?))
            .map(|class| class.id.as_str())
    }
}
