//! Keys of areas, machines and their points.

use super::form::{
    AREA as SURFACE, Form, MASS, POWER, RISE, Refers, TEMPERATURE, TIME, VISCOSITY, stated,
};
use super::{Key, Record, key};
use crate::input::value::{At, Ends, Want};
use crate::quantity::Kind;

/// How exposed a place is.
pub const EXPOSURE: &[&str] = &["outdoor", "sheltered", "indoor"];
/// Words for dust besides yes and no.
pub const DUST: &[&str] = &["high"];
/// How a shaft lies.
pub const POSITION: &[&str] = &["horizontal", "sloping", "vertical"];
/// How much a bearing vibrates.
pub const VIBRATION: &[&str] = &["low", "medium", "high"];
/// Ways of lubrication.
pub const LUBRICATION: &[&str] = &[
    "splash",
    "bath",
    "circulated",
    "pressure-fed",
    "ring",
    "gravity",
    "drip",
    "wick",
    "mist",
    "flooded",
    "reservoir",
    "grease",
];
/// Kinds of backstop besides yes and no.
pub const BACKSTOP: &[&str] = &["sprag", "cam"];
/// How water gets in, besides yes and no.
pub const WATER: &[&str] = &["steady", "seldom"];
/// Seal materials.
pub const SEALS: &[&str] = &[
    "NBR",
    "HNBR",
    "FKM",
    "ACM",
    "VMQ",
    "EPDM",
    "CR",
    "IIR",
    "AU",
    "polyurethane",
    "PTFE",
    "labyrinth",
    "none",
];
/// Paints inside a housing.
pub const PAINT: &[&str] = &["two-part epoxy", "single-pack", "none"];
/// Sight glasses.
pub const SIGHT_GLASS: &[&str] = &["glass", "polycarbonate", "acrylic", "none"];
/// Food classes.
pub const FOOD: &[&str] = &["H1", "H2", "H3", "3H"];
/// Environmental classes.
pub const ENVIRONMENT: &[&str] = &["EAL"];
/// Fire classes.
pub const FIRE: &[&str] = &["less flammable", "fire resistant", "non-flammable"];
/// How heavily a machine is shaken.
pub const SHOCK: &[&str] = &["light", "moderate", "heavy"];

const AMBIENT: Want = Want::stated(TEMPERATURE).ends(Ends::Range);
const LIMIT: Want = Want::one(VISCOSITY).at(At::May);
const FILL: &[Kind] = &[Kind::Volume, Kind::Mass];
const YEARLY: &[Kind] = &[Kind::VolumePerYear, Kind::Volume];
const HOURS: &[Kind] = &[Kind::HoursPerYear, Kind::Time];

/// An area of the site.
#[rustfmt::skip]
pub static AREA: Record = Record {
    name: "an area",
    also: &[],
    must: &[],
    keys: &[
        key("ambient", Form::Quantity(AMBIENT), "gap", "Coldest and hottest air of the place."),
        key("monthly ambient", Form::Monthly(AMBIENT), "–", "Twelve ambient ranges, January first, for seasonal oils."),
        key("exposure", Form::Word(EXPOSURE), "–", "How open to the weather the place is."),
        key("wet", Form::YesNo, "gap where a rule needs it", "Whether water splashes or drips there."),
        key("dust", Form::YesNoOr(DUST), "–", "How dusty the place is."),
        key("food zone", Form::YesNo, "gap where a rule needs it", "Whether there is open food, or goods that touch food."),
        key("water protection", Form::YesNo, "gap where a rule needs it", "Whether a leak would reach protected water or ground."),
        key("fire zone", Form::YesNo, "gap where a rule needs it", "Whether a leak could meet flame or hot metal."),
        key("hot surface", Form::Quantity(Want::stated(TEMPERATURE).such_as("380 degC")), "gap where a rule needs it", "Hottest surface a leak could reach."),
    ],
};

/// A machine, or one of its points.
pub static MACHINE: Record = Record {
    name: "a machine",
    also: &[&AREA],
    must: &[],
    keys: MACHINE_KEYS,
};

#[rustfmt::skip]
const MACHINE_KEYS: &[Key] = &[
    key("name", Form::Text, "–", "What the machine is called in words."),
    key("area", Form::Name(Refers::Area), "–", "The area it stands in; it inherits what is stated there."),
    key("like", Form::Name(Refers::Like), "–", "Machine to copy from; what is stated here comes first, lists are replaced whole."),
    key("count", Form::Whole, "1", "How many such machines there are."),
    key("points", Form::Fills, "one point", "Its lubrication points by name, where it has several fills."),
    key("lubrication", Form::Word(LUBRICATION), "by its parts; else gap", "How the lubricant gets to the parts."),
    key("fill", stated(FILL), "gap", "How much lubricant it holds."),
    key("annual use", stated(YEARLY), "gap", "Lubricant used in a year."),
    key("running hours", stated(HOURS), "gap", "Hours it runs in a year."),
    key("oil now", Form::Name(Refers::OilNow), "unknown", "Lubricant in it today."),
    key("asks for", Form::Names, "what its parts imply", "Additive families or classes the maker or the duty requires."),
    key("sump rise", stated(RISE), "gap; plausible range by lubrication", "How much hotter than ambient the sump runs at full load."),
    key("sump", Form::Quantity(Want::stated(TEMPERATURE).ends(Ends::Either).or_held()), "gap", "Sump temperature: a reading with `at ambient`, `held at` a value, or at the coldest and the hottest ambient."),
    key("at ambient", Form::Quantity(Want::one(TEMPERATURE).such_as("20 degC")), "–", "Ambient at which the sump reading was taken."),
    key("start", Form::Quantity(Want::stated(TEMPERATURE).such_as("-18 degC")), "coldest ambient", "Oil temperature at start."),
    key("heater", Form::Quantity(Want::stated(TEMPERATURE).such_as("10 degC")), "none", "Temperature a heater keeps the oil at before start."),
    key("heater power", stated(POWER), "–", "Power of the heater."),
    key("heater area", stated(SURFACE), "–", "Heated surface of its sheath."),
    key("maker grade", Form::Grade, "–", "Viscosity grade the maker names; a floor at 40 °C."),
    key("filter", Form::YesNo, "not counted", "Whether the oil must pass a filter at start."),
    key("gravity return", Form::YesNo, "not counted", "Whether the oil must run back by gravity at start."),
    key("floor", Form::Quantity(LIMIT), "by rules", "Least viscosity at running temperature."),
    key("ceiling", Form::Quantity(LIMIT), "by rules", "Greatest viscosity at running temperature."),
    key("start limit", Form::Quantity(LIMIT), "by rules", "Greatest viscosity at start."),
    key("oil limit", Form::Quantity(Want::one(TEMPERATURE).such_as("90 degC")), "the oil's own", "Highest temperature the maker allows the oil."),
    key("yellow metal", Form::YesNo, "gap where a rule needs it", "Whether bronze, brass or copper touches the oil."),
    key("silver", Form::YesNo, "gap where a rule needs it", "Whether silver touches the oil."),
    key("zinc plated", Form::YesNo, "gap where a rule needs it", "Whether zinc-plated parts touch the oil."),
    key("backstop", Form::YesNoOr(BACKSTOP), "gap where a rule needs it", "Whether a backstop runs in the same oil, and of which kind."),
    key("wet clutch", Form::YesNo, "gap where a rule needs it", "Whether a clutch or brake runs in the oil."),
    key("breathing air", Form::YesNo, "gap where a rule needs it", "Whether people breathe the air it delivers."),
    key("oxygen", Form::YesNo, "gap where a rule needs it", "Whether oxygen can reach the oil."),
    key("water entry", Form::YesNoOr(WATER), "gap where a rule needs it", "How water gets into the oil."),
    key("seals", Form::Words(SEALS), "gap where a rule needs it", "What the seals are made of."),
    key("inside paint", Form::Word(PAINT), "gap where a rule needs it", "Paint inside the housing."),
    key("sight glass", Form::Word(SIGHT_GLASS), "gap where a rule needs it", "What the sight glass is made of."),
    key("food class", Form::Word(FOOD), "none asked", "Food class the duty asks."),
    key("environment", Form::Word(ENVIRONMENT), "none asked", "Environmental class the duty asks."),
    key("fire class", Form::Word(FIRE), "none asked", "Least fire class the duty asks."),
    key("shock", Form::Word(SHOCK), "moderate", "How hard the load shakes."),
    key("cleanliness", Form::Cleanliness, "gap; plausible by system", "How clean the oil is kept."),
    key("losses", Form::Record(&LOSSES), "for information only", "What a heat balance needs."),
    key("regrease", Form::Record(&REGREASE), "gap", "How a grease point is looked after today."),
    key("used oil", Form::Record(&USED_OIL), "practice by class (rules, used-oil limits)", "Limits of the oil in use by the maker or the house: watch .. act."),
    key("parts", Form::Parts, "error if empty", "What the fill serves; on the machine or on its points."),
    key("allow", Form::Names, "–", "Names of warnings silenced for this machine."),
    key("notes", Form::Markdown, "–", "Remarks for its sheet, and what was not understood of its register row."),
    key("register row", Form::Whole, "–", "Row of the register it was taken from."),
];

/// What a heat balance needs.
#[rustfmt::skip]
pub static LOSSES: Record = Record {
    name: "losses",
    also: &[],
    must: &[],
    keys: &[
        key("casing area", stated(SURFACE), "gap", "Surface that gives off heat."),
        key("heat transfer", stated(&[Kind::HeatTransfer]), "16 W/(m2.K)", "Heat transfer coefficient of the casing."),
        key("cooler", stated(POWER), "none", "Heat a cooler takes away."),
    ],
};

/// Limits of the oil in use, watch and act.
#[rustfmt::skip]
pub static USED_OIL: Record = Record {
    name: "used oil",
    also: &[],
    must: &[],
    keys: &[
        key("viscosity change", levels(&[Kind::Ratio], "8 % .. 12 %"), "by class", "How far the viscosity may move from new oil, up or down."),
        key("acid number rise", levels(&[Kind::AcidNumber], "0.3 .. 0.6 mg KOH/g"), "by class", "How far the acid number may rise over new oil."),
        key("acid number", levels(&[Kind::AcidNumber], "1.5 .. 2.0 mg KOH/g"), "by class", "How high the acid number may be."),
        key("water", levels(&[Kind::Ratio], "200 ppm .. 500 ppm"), "by class", "How much water there may be."),
        key("flash drop", levels(&[Kind::Rise], "15 .. 30 K"), "by class", "How far the flash point may fall from new oil."),
        key("oxidation rise", levels(&[Kind::Ratio], "10 .. 20"), "by class", "How far oxidation by infrared may rise, absorbance per cm."),
        key("fuel", levels(&[Kind::Ratio], "2 % .. 5 %"), "by class", "How much fuel there may be."),
        key("soot", levels(&[Kind::Ratio], "2 % .. 4 %"), "by class", "How much soot there may be."),
    ],
};

/// Two levels, `watch .. act`.
const fn levels(kinds: &'static [Kind], example: &'static str) -> Form {
    Form::Quantity(Want::one(kinds).ends(Ends::Range).such_as(example))
}

/// How a grease point is looked after.
#[rustfmt::skip]
pub static REGREASE: Record = Record {
    name: "regrease",
    also: &[],
    must: &[],
    keys: &[
        key("amount", stated(MASS), "gap", "Grease put in each time."),
        key("interval", Form::Quantity(Want::stated(TIME).such_as("2000 h")), "gap", "Time between."),
        key("position", Form::Word(POSITION), "horizontal", "How the shaft lies."),
        key("vibration", Form::Word(VIBRATION), "low", "How much the bearing vibrates: low below 5 mm/s, medium to 10 mm/s, high above."),
    ],
};
