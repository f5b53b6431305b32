//! Oil in use: limits, cleanliness, wear, causes, intervals. The maker's figures outrank these.

use super::condition::Clause;
use super::provenance::Provenance;
use super::table::entry;
use crate::model::sample::Reading as Figure;
use crate::model::stated::Between;
use crate::model::word::words;
use crate::quantity::{Amount, Ratio, Time};

words! {
    /// What a limit is on.
    Reading, "a reading" {
        ViscosityChange40 = "viscosity change at 40 degC",
        ViscosityChange100 = "viscosity change at 100 degC",
        AcidNumberRise = "acid number rise", AcidNumber = "acid number",
        BaseNumberShare = "base number left", Water = "water",
        AntioxidantShare = "antioxidant left", OxidationStabilityShare = "oxidation life left",
        OxidationRise = "oxidation rise", NitrationRise = "nitration rise",
        PatchColour = "patch colour", FlashDrop = "flash drop", Fuel = "fuel", Soot = "soot",
        Demulsibility = "demulsibility",
    }
}

words! {
    /// Which way a limit looks.
    Side, "a side" { Both = "both", Low = "low", High = "high" }
}

/// A limit for a reading, in the two levels `watch` and `act`.
#[derive(Clone, Debug, PartialEq)]
pub struct UsedOilLimit {
    /// Its id.
    pub id: String,
    /// The reading.
    pub reading: Reading,
    /// Which way.
    pub side: Side,
    /// For which oils, in words.
    pub oil: String,
    /// The same as conditions on the oil and the point; of several limits that apply, the one
    /// with the most conditions counts.
    pub when: Vec<Clause>,
    /// From here on, watch.
    pub watch: Option<Amount>,
    /// From here on, act.
    pub act: Option<Amount>,
    /// From here on, the oil is condemned.
    pub condemn: Option<Amount>,
    /// Usual for new oil.
    pub new: Option<Amount>,
    /// The test method.
    pub test: Option<String>,
    /// A further rule in words.
    pub rule: Option<String>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(UsedOilLimit);

/// Cleanliness target of a part, ISO 4406 codes.
#[derive(Clone, Debug, PartialEq)]
pub struct Cleanliness {
    /// Its id.
    pub id: String,
    /// The part.
    pub part: String,
    /// The same as conditions on the point; empty where no part of the program is this one.
    pub when: Vec<Clause>,
    /// Below 140 bar, or at any pressure where the others are empty.
    pub low: String,
    /// 140 to 210 bar.
    pub middle: Option<String>,
    /// Above 210 bar.
    pub high: Option<String>,
    /// What is commonly reached.
    pub realistic: Option<String>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(Cleanliness, |c| vec![c.part.as_str()]);

/// Where a wear metal comes from.
#[derive(Clone, Debug, PartialEq)]
pub struct WearSign {
    /// Its id.
    pub id: String,
    /// Elements by symbol.
    pub elements: Vec<String>,
    /// Where they come from.
    pub from: String,
    /// Companion signs and what they add.
    pub with: Vec<(String, String)>,
    /// How to tell.
    pub tell: Option<String>,
    /// Whether it must be acted on at once.
    pub urgent: bool,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(WearSign);

words! {
    /// Movement of a reading against new oil.
    Movement, "a movement" {
        StrongFall = "--", Fall = "-", SlightFallOrNone = "0 or -", None = "0",
        SlightRiseOrNone = "0 or +", Rise = "+", StrongRise = "++", Odd = "odd",
        TowardOther = "toward the other oil", Varies = "varies",
    }
}

/// What a joint movement of readings means.
#[derive(Clone, Debug, PartialEq)]
pub struct Diagnosis {
    /// Its id.
    pub id: String,
    /// The cause.
    pub cause: String,
    /// Reading by name and its movement: `kv40`, `kv100`, `vi`, `flash`, `acid number`, `water`,
    /// `oxidation`.
    pub movements: Vec<(String, Movement)>,
    /// Which of the two viscosities moves more in per cent, where that tells.
    pub moves_more: Option<String>,
    /// What the elements do.
    pub elements: Option<String>,
    /// What else tells.
    pub more: String,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(Diagnosis, |d| vec![d.cause.as_str()]);

/// How often to sample.
#[derive(Clone, Debug, PartialEq)]
pub struct SamplingInterval {
    /// Its id.
    pub id: String,
    /// The machine.
    pub machine: String,
    /// Running hours, shortest and longest.
    pub hours: Option<Between<Time>>,
    /// By the calendar.
    pub calendar: String,
    /// Conditions on the point.
    pub when: Vec<Clause>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(SamplingInterval, |s| vec![s.machine.as_str()]);

/// When to change, as guidance.
#[derive(Clone, Debug, PartialEq)]
pub struct ChangeInterval {
    /// Its id.
    pub id: String,
    /// Which oil where.
    pub oil: String,
    /// Conditions on the oil and the point.
    pub when: Vec<Clause>,
    /// Sump temperature it holds at or below; none: not stated.
    pub up_to: Option<crate::quantity::ThermodynamicTemperature>,
    /// Hours, shortest and longest.
    pub hours: Between<Time>,
    /// By the calendar.
    pub calendar: Option<String>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(ChangeInterval);

/// What new oil of a kind reads, where neither a new-oil sample nor the data sheet says.
#[derive(Clone, Debug, PartialEq)]
pub struct NewOilReading {
    /// Its id.
    pub id: String,
    /// The figure.
    pub reading: Figure,
    /// Conditions on the oil; of several that apply, the one with the most conditions counts.
    pub when: Vec<Clause>,
    /// Usual value.
    pub value: Amount,
    /// How far it lies from that: two oils in three.
    pub spread: Amount,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(NewOilReading);

/// How far two laboratories differ in a figure, 19 times in 20.
#[derive(Clone, Debug, PartialEq)]
pub struct TestScatter {
    /// Its id.
    pub id: String,
    /// The figure.
    pub reading: Figure,
    /// Elements it holds for as well.
    pub also: Vec<Figure>,
    /// The test method.
    pub test: String,
    /// Reproducibility as a share of the value.
    pub share: Option<Ratio>,
    /// Never less than this.
    pub least: Option<Amount>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(TestScatter);
