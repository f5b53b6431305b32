//! Conditions: the small closed language in which rules say when they apply.
//!
//! A rule holds a list of clauses, all of which must hold; a clause is one condition, or several
//! joined by `or`. A condition names a fact of the oil, of the oil now in the point, of the
//! point, or of the pair, and tests it. Facts nobody stated leave a condition undecided.

use crate::model::facts::{
    Additive, Backstop, CopperStrip, Elastomer, Environment, FireClass, FoodClass, Mark, Paint,
    PartGroup, SightGlass, Sulphur, Use, WaterEntry, YesNo,
};
use crate::model::machine::Lubrication;
use crate::model::oil::OilKind;
use crate::model::word::{Word, known, spell, words};
use crate::quantity::{Amount, Kind};
use crate::relation::oil::base_stock::BaseStock;

/// Conditions of which one must hold.
#[derive(Clone, Debug, PartialEq)]
pub struct Clause {
    /// The conditions.
    pub any: Vec<Condition>,
    /// As written.
    pub written: String,
}

/// A fact and what is asked of it.
#[derive(Clone, Debug, PartialEq)]
pub struct Condition {
    /// The fact.
    pub fact: Fact,
    /// The test.
    pub test: Test,
}

/// A fact, with whose it is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Fact {
    /// Of the oil weighed.
    Oil(OilFact),
    /// Of the oil now in the point.
    Now(OilFact),
    /// Of the point.
    Point(PointFact),
    /// Of the two together.
    Pair(PairFact),
}

/// What is asked of a fact.
#[derive(Clone, Debug, PartialEq)]
pub enum Test {
    /// It is one of these; of a list, it holds one of these.
    Is(Values),
    /// It is none of these; of a list, it holds none of these.
    IsNot(Values),
    /// It is greater.
    Above(Amount),
    /// It is less.
    Below(Amount),
    /// Somebody stated it.
    Stated,
    /// Nobody stated it.
    NotStated,
}

/// Values a fact is compared with.
#[derive(Clone, Debug, PartialEq)]
pub enum Values {
    /// Words of the fact's own list, one bit each.
    Bits(u64),
    /// Classes by id, or component ids with the bits of part kinds.
    Names {
        /// Ids of the rulebook.
        names: Vec<String>,
        /// Kinds of part, one bit each.
        groups: u64,
    },
}

words! {
    /// What can be asked about an oil.
    OilFact, "a fact of an oil" {
        Kind = "kind", Base = "base", Polymer = "polymer", ShearData = "shear data",
        Additive = "additive", Sulphur = "sulphur", CopperStrip = "copper strip",
        Class = "class", FoodClass = "food class", Environment = "environment",
        FireClass = "fire class", Flash = "flash point", FzgStage = "FZG stage",
        AirRelease = "air release", AirReleaseShare = "air release share",
        Demulsibility = "demulsibility", Viscosity = "viscosity",
    }
}

words! {
    /// What can be asked about a point.
    PointFact, "a fact of a lubrication point" {
        Part = "part", Lubrication = "lubrication", OilNow = "oil now",
        YellowMetal = "yellow metal", Silver = "silver", ZincPlated = "zinc plated",
        Backstop = "backstop", WetClutch = "wet clutch", BreathingAir = "breathing air",
        Oxygen = "oxygen", WaterEntry = "water entry", Wet = "wet area", Seals = "seals",
        InsidePaint = "inside paint", SightGlass = "sight glass", Filter = "filter",
        FoodZone = "food zone", WaterProtection = "water protection", FireZone = "fire zone",
        HotSurface = "hot surface", FoodClass = "food class asked",
        Environment = "environment asked", FireClass = "fire class asked",
        OilTemperature = "oil temperature", PartTemperature = "part temperature",
        StartTemperature = "start temperature", SealMargin = "seal margin",
        Dwell = "dwell time",
    }
}

words! {
    /// What can be asked about an oil at a point.
    PairFact, "a fact of an oil at a point" {
        SameOil = "same oil", Mixing = "mixing", GreaseMixing = "grease mixing",
        Seals = "seals", Paint = "paint", SightGlass = "sight glass",
        FoodClass = "food class", Environment = "environment", FireClass = "fire class",
        FlashMargin = "flash margin", DwellRatio = "dwell ratio", Use = "use",
    }
}

words! {
    /// Whether something asked for is met.
    Met, "met or short" { Met = "met", Short = "short" }
}

words! {
    /// What is known of the oil in use.
    NowKnown, "a word for the oil now" { Known = "known", Nothing = "none", Unknown = "unknown" }
}

/// The form values of a fact take.
#[derive(Clone, Copy, Debug)]
pub enum Form {
    /// Words of a closed list.
    Words(WordForm),
    /// A quantity.
    Number(Kind),
    /// Lubricant classes.
    Classes,
    /// Kinds of part and component ids.
    Parts,
}

/// A closed list of words, without its type.
#[derive(Clone, Copy, Debug)]
pub struct WordForm {
    /// What the list is of.
    pub noun: &'static str,
    /// Reads one word, or a word for several, as bits.
    pub read: fn(&str) -> Option<u64>,
    /// Writes bits as words.
    pub write: fn(u64) -> String,
    /// Every word.
    pub known: fn() -> Vec<&'static str>,
    /// Whether the list runs from least to most, so that `worse than` means something.
    pub ordered: bool,
}

fn read_word<W: Word>(text: &str) -> Option<u64> {
    W::from_word(text).map(Word::bit)
}

fn read_base(text: &str) -> Option<u64> {
    use BaseStock as B;
    let several: &[B] = match text.trim() {
        "mineral" => &[B::MineralI, B::MineralII, B::MineralIII],
        "PAG" => &[B::PagWaterSoluble, B::PagOilSoluble],
        one => return read_word::<B>(one),
    };
    Some(
        several
            .iter()
            .map(|b| b.bit())
            .fold(0, |all, bit| all | bit),
    )
}

const fn of<W: Word>() -> Form {
    Form::Words(WordForm {
        noun: W::NOUN,
        read: read_word::<W>,
        write: spell::<W>,
        known: known::<W>,
        ordered: false,
    })
}

impl OilFact {
    /// The form of its values.
    pub fn form(self) -> Form {
        match self {
            Self::Kind => of::<OilKind>(),
            Self::Base => Form::Words(WordForm {
                noun: BaseStock::NOUN,
                read: read_base,
                write: spell::<BaseStock>,
                known: known::<BaseStock>,
                ordered: false,
            }),
            Self::Polymer | Self::ShearData => of::<YesNo>(),
            Self::Additive => of::<Additive>(),
            Self::Sulphur => of::<Sulphur>(),
            Self::CopperStrip => Form::Words(WordForm {
                noun: CopperStrip::NOUN,
                read: read_word::<CopperStrip>,
                write: spell::<CopperStrip>,
                known: known::<CopperStrip>,
                ordered: true,
            }),
            Self::Class => Form::Classes,
            Self::FoodClass => of::<FoodClass>(),
            Self::Environment => of::<Environment>(),
            Self::FireClass => of::<FireClass>(),
            Self::Flash => Form::Number(Kind::Temperature),
            Self::FzgStage | Self::AirReleaseShare => Form::Number(Kind::Ratio),
            Self::AirRelease | Self::Demulsibility => Form::Number(Kind::Time),
            Self::Viscosity => Form::Number(Kind::KinematicViscosity),
        }
    }
}

impl PointFact {
    /// The form of its values.
    pub fn form(self) -> Form {
        match self {
            Self::Part => Form::Parts,
            Self::Lubrication => of::<Lubrication>(),
            Self::OilNow => of::<NowKnown>(),
            Self::YellowMetal
            | Self::Silver
            | Self::ZincPlated
            | Self::WetClutch
            | Self::BreathingAir
            | Self::Oxygen
            | Self::Wet
            | Self::Filter
            | Self::FoodZone
            | Self::WaterProtection
            | Self::FireZone => of::<YesNo>(),
            Self::Backstop => of::<Backstop>(),
            Self::WaterEntry => of::<WaterEntry>(),
            Self::Seals => of::<Elastomer>(),
            Self::InsidePaint => of::<Paint>(),
            Self::SightGlass => of::<SightGlass>(),
            Self::FoodClass => of::<FoodClass>(),
            Self::Environment => of::<Environment>(),
            Self::FireClass => of::<FireClass>(),
            Self::HotSurface
            | Self::OilTemperature
            | Self::PartTemperature
            | Self::StartTemperature => Form::Number(Kind::Temperature),
            Self::SealMargin => Form::Number(Kind::Rise),
            Self::Dwell => Form::Number(Kind::Time),
        }
    }
}

impl PairFact {
    /// The form of its values.
    pub fn form(self) -> Form {
        match self {
            Self::SameOil => of::<YesNo>(),
            Self::Mixing | Self::GreaseMixing | Self::Seals | Self::Paint | Self::SightGlass => {
                of::<Mark>()
            }
            Self::FoodClass | Self::Environment | Self::FireClass => of::<Met>(),
            Self::FlashMargin => Form::Number(Kind::Rise),
            Self::DwellRatio => Form::Number(Kind::Ratio),
            Self::Use => of::<Use>(),
        }
    }
}

impl Fact {
    /// The form of its values.
    pub fn form(self) -> Form {
        match self {
            Self::Oil(fact) | Self::Now(fact) => fact.form(),
            Self::Point(fact) => fact.form(),
            Self::Pair(fact) => fact.form(),
        }
    }

    /// The fact as rules write it: `oil copper strip`.
    pub fn written(self) -> String {
        match self {
            Self::Oil(fact) => format!("oil {fact}"),
            Self::Now(fact) => format!("now {fact}"),
            Self::Point(fact) => format!("point {fact}"),
            Self::Pair(fact) => format!("pair {fact}"),
        }
    }

    /// The fact as a sheet names it: `oil copper strip`, `yellow metal`.
    pub fn says(self) -> String {
        match self {
            Self::Oil(OilFact::Environment) => "oil environmental class".into(),
            Self::Oil(fact) => format!("oil {fact}"),
            Self::Now(OilFact::Environment) => "environmental class of the oil in use".into(),
            Self::Now(fact) => format!("{fact} of the oil in use"),
            Self::Point(PointFact::Environment) => "environmental class asked".into(),
            Self::Point(fact) => fact.to_string(),
            Self::Pair(fact) => match fact {
                PairFact::SameOil | PairFact::Mixing => "oil in use".into(),
                PairFact::GreaseMixing => "thickeners of the two greases".into(),
                PairFact::Paint => "inside paint".into(),
                other => other.to_string(),
            },
        }
    }
}

/// Kinds of part, as bits.
pub fn groups(names: &[PartGroup]) -> u64 {
    names.iter().fold(0, |all, g| all | g.bit())
}
