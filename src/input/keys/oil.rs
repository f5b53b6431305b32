//! Keys of oils and greases.

use super::form::{DYNAMIC, Form, NUMBER, Refers, TEMPERATURE, TIME, VOLUME, one};
use super::machine::{ENVIRONMENT, FIRE, FOOD};
use super::{Key, Record, key};
use crate::input::value::{At, Want};
use crate::quantity::Kind;

/// What a lubricant is sold as.
pub const KIND: &[&str] = &[
    "gear",
    "hydraulic",
    "turbine",
    "compressor",
    "circulating",
    "engine",
    "axle",
    "spindle",
    "slideway",
    "chain",
    "worm",
    "other",
    "grease",
];
/// Additive families.
pub const ADDITIVES: &[&str] = &[
    "EP",
    "AW",
    "R&O",
    "zinc",
    "detergent",
    "friction modifier",
    "moly",
    "graphite",
    "compounded",
];
/// How reactive the sulphur is.
pub const SULPHUR: &[&str] = &["none", "inactive", "active"];
/// Copper strip ratings of ASTM D130.
pub const COPPER: &[&str] = &[
    "1a", "1b", "2a", "2b", "2c", "2d", "2e", "3a", "3b", "4a", "4b", "4c",
];
/// Where viscosity points come from.
pub const POINTS: &[&str] = &["data sheet", "batch", "measured"];

const BOUND: Want = Want::one(TEMPERATURE).or_bound().such_as("-18 degC");
const LOSS: Want = Want::one(NUMBER)
    .at(At::Must)
    .with_test()
    .such_as("26 % at 100 degC");
const INDEX: Want = Want::one(NUMBER).with_test().such_as("25");
const VI: Want = Want::one(NUMBER).such_as("95");
const MINUTES: Want = Want::one(TIME).such_as("10 min");
const HOT: Want = Want::one(TEMPERATURE).such_as("95 degC");
const COLD: Want = Want::one(TEMPERATURE).such_as("-26 degC");
const DENSITY: Want = Want::one(&[Kind::Density])
    .at(At::Must)
    .such_as("893 kg/m3 at 15 degC");
const ALPHA: Want = Want::one(&[Kind::PressureViscosity]).at(At::Must);
const YIELD: Want = Want::one(&[Kind::Pressure])
    .at(At::Must)
    .such_as("40 Pa at -35 degC");

/// An oil or a grease.
pub static OIL: Record = Record {
    name: "an oil",
    also: &[],
    must: &[],
    keys: OIL_KEYS,
};

#[rustfmt::skip]
const OIL_KEYS: &[Key] = &[
    key("name", Form::Text, "–", "What the oil is called in plain words."),
    key("like", Form::Name(Refers::Like), "–", "Oil to copy from; what is stated here comes first, lists are replaced whole."),
    key("source", Form::Text, "–", "Where the figures come from."),
    key("note", Form::Text, "–", "A remark."),
    key("kind", Form::Word(KIND), "other", "What the lubricant is sold as."),
    key("classes", Form::Names, "none declared", "Classes declared: CKC, HLP, SAE 15W-40."),
    key("base", Form::Base, "mineral, assumed", "Base stock, and whether a polymer thickens it."),
    key("viscosity", Form::Points, "error; of a grease `base oil`", "Two or more viscosities at temperatures, or a grade with its index."),
    key("points", Form::Word(POINTS), "data sheet", "Where the viscosities come from."),
    key("sheared", Form::Points, "plausible range of the class", "Viscosities after a shear test."),
    key("shear loss", Form::Quantity(LOSS), "plausible range of the class", "Share of the viscosity lost in a shear test."),
    key("PSSI", Form::Quantity(INDEX), "plausible range of the class", "Permanent shear stability index of the polymer."),
    key("polymer", Form::Text, "any kind", "Kind of polymer: OCP, star polymer, PMA, shear-stable PMA, gear PMA, PIB."),
    key("cold viscosity", Form::ColdPoints, "–", "Viscosities measured cold, ASTM D2983 and the like."),
    key("CCS", Form::ColdPoints, "–", "Cranking simulator viscosities, ASTM D5293."),
    key("MRV", Form::ColdPoints, "–", "Mini-rotary viscosities, ASTM D4684."),
    key("yield stress", Form::Quantity(YIELD), "none seen", "Yield stress in the mini-rotary test, ASTM D4684."),
    key("t150000", Form::Quantity(COLD), "–", "Temperature of 150 000 mPa.s, ASTM D2983."),
    key("HTHS", one(DYNAMIC), "plausible range of the class", "Viscosity at 150 °C under high shear, ASTM D4683."),
    key("pour point", Form::Quantity(BOUND), "gap", "Pour point, ASTM D97."),
    key("cloud point", Form::Quantity(BOUND), "–", "Cloud point, ASTM D2500."),
    key("flash point", Form::Flash, "gap", "Flash point, with COC for the open cup or PMCC for the closed one."),
    key("oil limit", Form::Quantity(HOT), "by base", "Highest bulk temperature the supplier allows."),
    key("density", Form::Quantity(DENSITY), "typical of the base, assumed", "Density at a temperature."),
    key("alpha", Form::Quantity(ALPHA), "by correlation", "Measured pressure-viscosity coefficient at a temperature."),
    key("VI", Form::Quantity(VI), "from the viscosities", "Viscosity index as stated; only checked."),
    key("additives", Form::Words(ADDITIVES), "none declared", "Additives declared; a list is taken as complete."),
    key("sulphur", Form::Word(SULPHUR), "gap where a rule needs it", "How reactive the sulphur is."),
    key("copper strip", Form::Word(COPPER), "gap where a rule needs it", "Copper strip rating at 100 °C, ASTM D130."),
    key("food class", Form::Word(FOOD), "none declared", "Food class registered."),
    key("environment", Form::Word(ENVIRONMENT), "none declared", "Environmental class declared."),
    key("fire class", Form::Word(FIRE), "none declared", "Fire class declared."),
    key("FZG stage", Form::Whole, "none declared", "Failure load stage, ISO 14635-1."),
    key("air release", Form::Quantity(MINUTES), "none declared", "Air release at 50 °C, ISO 9120."),
    key("demulsibility", Form::Quantity(MINUTES), "none declared", "Time to part from water, ISO 6614."),
    key("price", Form::Price, "–", "Price for a litre, or for a kilogram of grease."),
    key("in stock", one(VOLUME), "–", "How much is in store."),
    key("thickener", Form::Text, "gap", "Thickener of a grease."),
    key("NLGI", Form::Text, "gap", "Consistency of a grease, 000 to 6."),
    key("base oil", Form::Points, "gap", "Viscosities of the base oil of a grease, or of an oil without its polymer."),
    key("dropping point", Form::Quantity(Want::one(TEMPERATURE).or_bound().such_as("above 250 degC")), "gap", "Dropping point of a grease, ISO 2176."),
    key("code", Form::Text, "–", "DIN 51502 code of a grease."),
];

/// The top of an oil file: its kind, and the oils by id.
pub static OIL_FILE: Record = Record {
    name: "the oil file",
    also: &[],
    must: &["file"],
    keys: &[key(
        "file",
        Form::FileKind,
        "error",
        "Which kind of file this is, and of which edition of the format.",
    )],
};
