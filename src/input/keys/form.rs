//! What a key takes.

use super::Record;
use crate::input::value::{At, Ends, Roughness, Want};
use crate::quantity::Kind;

/// The form of a value.
#[derive(Clone, Copy, Debug)]
pub enum Form {
    /// Which kind of file this is, and of which edition.
    FileKind,
    /// Text.
    Text,
    /// Text in Markdown.
    Markdown,
    /// Path of a file.
    Path,
    /// A day.
    Day,
    /// A positive whole number.
    Whole,
    /// One of these words.
    Word(&'static [&'static str]),
    /// One or several of these words.
    Words(&'static [&'static str]),
    /// One or several words the program does not list.
    Names,
    /// Yes or no.
    YesNo,
    /// Yes, no, or one of these words.
    YesNoOr(&'static [&'static str]),
    /// A quantity.
    Quantity(Want),
    /// Twelve ranges, January first.
    Monthly(Want),
    /// The name of something stated elsewhere.
    Name(Refers),
    /// Viscosities at temperatures, or a grade with an index.
    Points,
    /// Measured viscosities at temperatures, mPa.s.
    ColdPoints,
    /// A viscosity grade.
    Grade,
    /// A cleanliness code or word.
    Cleanliness,
    /// Teeth of pinion and wheel.
    Teeth,
    /// A price for a litre or a kilogram.
    Price,
    /// A limit a house rule sets.
    HouseLimit,
    /// A base stock, with or without polymer.
    Base,
    /// A flash point with its cup.
    Flash,
    /// A rolling bearing, by designation or by its sizes.
    Bearing,
    /// A component of the rules, by id or name.
    Component,
    /// The label of a part.
    Label,
    /// A record.
    Record(&'static Record),
    /// Records by name.
    Named(&'static Record),
    /// The points of a machine by name, each with the keys of a machine.
    Fills,
    /// A list of records.
    List(&'static Record),
    /// A list of parts.
    Parts,
    /// Texts by name.
    Table,
}

/// What a name refers to.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Refers {
    /// An area of the site.
    Area,
    /// A machine or an oil to copy from.
    Like,
    /// A point: `TAG` or `TAG/name`.
    Point,
    /// An oil of the list.
    Oil,
    /// An oil of the list, `unknown` or `none`.
    OilNow,
    /// A house rule, by its name.
    HouseRule,
    /// A rule of the program, by its id.
    Rule,
}

impl Form {
    /// What it takes, in words.
    pub fn says(&self) -> String {
        match self {
            Self::FileKind => "site 1, oils 1, samples 1 or events 1".into(),
            Self::Text => "text".into(),
            Self::Markdown => "text in Markdown".into(),
            Self::Path => "path of a file".into(),
            Self::Day => "a day, 2026-07-18".into(),
            Self::Whole => "a whole number".into(),
            Self::Word(words) => format!("one of: {}", words.join(", ")),
            Self::Words(words) => format!("one or several of: {}", words.join(", ")),
            Self::Names => "one name or a list of names".into(),
            Self::YesNo => "yes or no".into(),
            Self::YesNoOr(words) => format!("yes, no, {}", words.join(", ")),
            Self::Quantity(want) => quantity(want),
            Self::Monthly(_) => "twelve temperature ranges, January first".into(),
            Self::Name(refers) => refers.says().into(),
            Self::Points => "list of points, 220 mm2/s at 40 degC; or [ISO VG 320, VI 155]".into(),
            Self::ColdPoints => "list of points, 6500 mPa.s at -25 degC".into(),
            Self::Grade => "ISO VG 220, AGMA 5 EP or SAE 90".into(),
            Self::Cleanliness => {
                "ISO 4406 code -/17/14, or high, normal, slight, severe, very severe".into()
            }
            Self::Teeth => "two whole numbers, 19 / 68".into(),
            Self::Price => "3.10 per L, or per kg".into(),
            Self::HouseLimit => {
                "kappa >= 0.4, film ratio >= 0.7, film height >= 15 um or floor = 0.7 nu_ref".into()
            }
            Self::Base => "a base stock; behind a comma polymer-thickened or no polymer".into(),
            Self::Flash => "a temperature or a bound, with COC or PMCC behind it".into(),
            Self::Bearing => {
                "designation 22220, or { bore: 95 mm, outside: 170 mm, type: spherical roller }"
                    .into()
            }
            Self::Component => "id or name of a component in the rules".into(),
            Self::Label => "what the part is called".into(),
            Self::Record(record) => format!("keys of {}", record.name),
            Self::Named(record) => format!("name: keys of {}", record.name),
            Self::Fills => "name: keys of a machine".into(),
            Self::List(record) => format!("list, each with keys of {}", record.name),
            Self::Parts => "list of parts".into(),
            Self::Table => "name: text".into(),
        }
    }
}

impl Refers {
    /// In words.
    pub fn says(self) -> &'static str {
        match self {
            Self::Area => "name of an area",
            Self::Like => "name of a record to copy from",
            Self::Point => "tag of a machine, or TAG/point",
            Self::Oil => "id of an oil",
            Self::OilNow => "id of an oil, unknown or none",
            Self::HouseRule => "name of a house rule",
            Self::Rule => "id of a rule",
        }
    }
}

fn quantity(want: &Want) -> String {
    let noun = want.noun();
    let range = noun
        .trim_start_matches("an ")
        .trim_start_matches("a ")
        .to_owned();
    let mut says = match want.ends {
        Ends::One => noun,
        Ends::Range => format!("{range} range"),
        Ends::Either => format!("{noun} or a {range} range"),
    };
    match want.at {
        At::Must => says.push_str(" at a temperature"),
        At::May => says.push_str(", conventional units at a temperature"),
        At::Never => {}
    }
    if want.held {
        says.push_str(", or held at one");
    }
    if want.bound {
        says.push_str(", or below or above one");
    }
    if want.test {
        says.push_str(", with the test");
    }
    if want.unknown {
        says.push_str("; or unknown (a .. b)");
    }
    format!("{says}; as {}", want.example())
}

/// Kinds that are written by themselves.
pub(crate) const TEMPERATURE: &[Kind] = &[Kind::Temperature];
pub(crate) const RISE: &[Kind] = &[Kind::Rise];
pub(crate) const LENGTH: &[Kind] = &[Kind::Length];
pub(crate) const AREA: &[Kind] = &[Kind::Area];
pub(crate) const SPEED: &[Kind] = &[Kind::RotationalSpeed];
pub(crate) const VELOCITY: &[Kind] = &[Kind::Velocity];
pub(crate) const FORCE: &[Kind] = &[Kind::Force];
pub(crate) const POWER: &[Kind] = &[Kind::Power];
pub(crate) const TORQUE: &[Kind] = &[Kind::Torque];
pub(crate) const PRESSURE: &[Kind] = &[Kind::Pressure];
pub(crate) const ANGLE: &[Kind] = &[Kind::Angle];
pub(crate) const NUMBER: &[Kind] = &[Kind::Ratio];
pub(crate) const TIME: &[Kind] = &[Kind::Time];
pub(crate) const VOLUME: &[Kind] = &[Kind::Volume];
pub(crate) const MASS: &[Kind] = &[Kind::Mass];
pub(crate) const DYNAMIC: &[Kind] = &[Kind::DynamicViscosity];
/// A viscosity in any of the ways it is written.
pub(crate) const VISCOSITY: &[Kind] = &[
    Kind::KinematicViscosity,
    Kind::DynamicViscosity,
    Kind::Efflux,
];

/// One value or unknown.
pub(crate) const fn stated(kinds: &'static [Kind]) -> Form {
    Form::Quantity(Want::stated(kinds))
}

/// A roughness, known or not.
pub(crate) const fn rough(roughness: Roughness) -> Form {
    Form::Quantity(Want::stated(LENGTH).rough(roughness))
}

/// One value that must be known.
pub(crate) const fn one(kinds: &'static [Kind]) -> Form {
    Form::Quantity(Want::one(kinds))
}
