//! The map of a laboratory's table and the list of events: where samples are and what was done to
//! the oils. The bottles themselves are read in the room `audit`.

use crate::quantity::{Kind, Volume};
use crate::source::Origin;
use crate::source::place::Given;
use jiff::civil::Date;

macro_rules! readings {
    ($($(#[doc = $says:literal])+ $variant:ident = $key:literal, $kind:ident, $unit:literal;)+) => {
        /// What a column of numbers of a laboratory's table holds.
        #[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
        pub enum Reading {
            $($(#[doc = $says])+ $variant,)+
        }

        impl Reading {
            /// Every reading.
            pub const ALL: &'static [Self] = &[$(Self::$variant),+];

            /// The key it is mapped under.
            pub const fn key(self) -> &'static str {
                match self { $(Self::$variant => $key),+ }
            }

            /// What kind of quantity it is.
            pub const fn kind(self) -> Kind {
                match self { $(Self::$variant => Kind::$kind),+ }
            }

            /// The unit it is kept in, and taken to be in where nothing else is said.
            pub const fn unit(self) -> &'static str {
                match self { $(Self::$variant => $unit),+ }
            }
        }
    };
}

readings! {
    /// Hours since the last oil change.
    HoursOnOil = "hours on oil", Time, "h";
    /// Hours the machine has run.
    HoursOnMachine = "hours on machine", Time, "h";
    /// Oil added since the last change.
    ToppedUp = "topped up", Volume, "L";
    /// Kinematic viscosity at 40 °C.
    Nu40 = "nu40", KinematicViscosity, "mm2/s";
    /// Kinematic viscosity at 100 °C.
    Nu100 = "nu100", KinematicViscosity, "mm2/s";
    /// Density at 15 °C.
    Density = "density", Density, "kg/m3";
    /// Flash point.
    Flash = "flash", Temperature, "degC";
    /// Acid number.
    AcidNumber = "acid number", AcidNumber, "mg KOH/g";
    /// Base number.
    BaseNumber = "base number", AcidNumber, "mg KOH/g";
    /// Water.
    Water = "water", Ratio, "ppm";
    /// Oxidation by infrared, absorbance per cm.
    Oxidation = "oxidation", Ratio, "";
    /// Nitration by infrared, absorbance per cm.
    Nitration = "nitration", Ratio, "";
    /// Oxidation life left of new oil, rotating pressure vessel.
    OxidationLife = "oxidation life left", Ratio, "%";
    /// Fuel.
    Fuel = "fuel", Ratio, "%";
    /// Soot.
    Soot = "soot", Ratio, "%";
    /// Particles of 4 µm(c) or more in a millilitre.
    Count4 = "count 4", Ratio, "";
    /// Particles of 6 µm(c) or more in a millilitre.
    Count6 = "count 6", Ratio, "";
    /// Particles of 14 µm(c) or more in a millilitre.
    Count14 = "count 14", Ratio, "";
    /// Iron.
    Fe = "Fe", Ratio, "ppm";
    /// Copper.
    Cu = "Cu", Ratio, "ppm";
    /// Lead.
    Pb = "Pb", Ratio, "ppm";
    /// Tin.
    Sn = "Sn", Ratio, "ppm";
    /// Antimony.
    Sb = "Sb", Ratio, "ppm";
    /// Aluminium.
    Al = "Al", Ratio, "ppm";
    /// Chromium.
    Cr = "Cr", Ratio, "ppm";
    /// Nickel.
    Ni = "Ni", Ratio, "ppm";
    /// Molybdenum.
    Mo = "Mo", Ratio, "ppm";
    /// Silver.
    Ag = "Ag", Ratio, "ppm";
    /// Titanium.
    Ti = "Ti", Ratio, "ppm";
    /// Vanadium.
    V = "V", Ratio, "ppm";
    /// Manganese.
    Mn = "Mn", Ratio, "ppm";
    /// Silicon.
    Si = "Si", Ratio, "ppm";
    /// Sodium.
    Na = "Na", Ratio, "ppm";
    /// Potassium.
    K = "K", Ratio, "ppm";
    /// Lithium.
    Li = "Li", Ratio, "ppm";
    /// Boron.
    B = "B", Ratio, "ppm";
    /// Calcium.
    Ca = "Ca", Ratio, "ppm";
    /// Magnesium.
    Mg = "Mg", Ratio, "ppm";
    /// Barium.
    Ba = "Ba", Ratio, "ppm";
    /// Phosphorus.
    P = "P", Ratio, "ppm";
    /// Zinc.
    Zn = "Zn", Ratio, "ppm";
    /// Sulphur.
    S = "S", Ratio, "ppm";
}

impl Reading {
    /// The reading of a key.
    pub fn of(key: &str) -> Option<Self> {
        Self::ALL.iter().copied().find(|r| r.key() == key)
    }

    /// Whether it is an element by spectrometry.
    pub fn is_element(self) -> bool {
        self >= Self::Fe
    }

    /// What it is called in sentences.
    pub fn says(self) -> &'static str {
        match self {
            Self::Nu40 => "viscosity at 40 degC",
            Self::Nu100 => "viscosity at 100 degC",
            Self::Flash => "flash point",
            Self::Count4 | Self::Count6 | Self::Count14 => "particle count",
            Self::Fe => "iron",
            Self::Cu => "copper",
            Self::Pb => "lead",
            Self::Sn => "tin",
            Self::Sb => "antimony",
            Self::Al => "aluminium",
            Self::Cr => "chromium",
            Self::Ni => "nickel",
            Self::Mo => "molybdenum",
            Self::Ag => "silver",
            Self::Ti => "titanium",
            Self::V => "vanadium",
            Self::Mn => "manganese",
            Self::Si => "silicon",
            Self::Na => "sodium",
            Self::K => "potassium",
            Self::Li => "lithium",
            Self::B => "boron",
            Self::Ca => "calcium",
            Self::Mg => "magnesium",
            Self::Ba => "barium",
            Self::P => "phosphorus",
            Self::Zn => "zinc",
            Self::S => "sulphur",
            other => other.key(),
        }
    }
}

/// A column of a laboratory's table.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Column {
    /// The bottle's own number.
    Bottle,
    /// The point sampled.
    Machine,
    /// Oil on the label.
    Label,
    /// Day the sample was drawn.
    Drawn,
    /// Cleanliness code.
    Iso4406,
    /// Remarks of the laboratory.
    Flags,
    /// A number of the oil in use.
    InUse(Reading),
    /// The same number of the new oil.
    New(Reading),
}

impl Column {
    /// The columns that hold no number, with their keys.
    pub const TEXTS: &'static [(&'static str, Self)] = &[
        ("bottle", Self::Bottle),
        ("machine", Self::Machine),
        ("label", Self::Label),
        ("drawn", Self::Drawn),
        ("iso4406", Self::Iso4406),
        ("flags", Self::Flags),
    ];

    /// The column of a key.
    pub fn of(key: &str) -> Option<Self> {
        let text = Self::TEXTS.iter().find(|(k, _)| *k == key);
        text.map(|(_, c)| *c)
            .or_else(|| Reading::of(key).map(Self::InUse))
    }

    /// Its key; of new oil, with `new` behind it.
    pub fn name(self) -> String {
        match self {
            Self::InUse(r) => r.key().to_owned(),
            Self::New(r) => format!("{} new", r.key()),
            text => Self::TEXTS
                .iter()
                .find(|(_, c)| *c == text)
                .map_or(String::new(), |(k, _)| (*k).to_owned()),
        }
    }
}

/// Order of the figures in dates.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum DateOrder {
    /// `2026-10-12`.
    #[default]
    YearMonthDay,
    /// `12-10-2026`.
    DayMonthYear,
    /// `10-12-2026`.
    MonthDayYear,
}

impl DateOrder {
    /// The words users write.
    pub const WRITTEN: &'static [(&'static str, Self)] = &[
        ("year-month-day", Self::YearMonthDay),
        ("day-month-year", Self::DayMonthYear),
        ("month-day-year", Self::MonthDayYear),
    ];
}

/// Where a laboratory's table is and what its columns mean.
#[derive(Clone, Debug, PartialEq)]
pub struct SampleMap {
    /// Path of the table, beside the map.
    pub read: Option<Given<String>>,
    /// The sheet of a workbook.
    pub sheet: Option<String>,
    /// Delimiter of a text table.
    pub delimiter: Option<char>,
    /// Encoding of a text table.
    pub encoding: Option<String>,
    /// Whether a comma parts whole and decimals.
    pub decimal_comma: bool,
    /// Heading of each column named.
    pub columns: Vec<(Column, Given<String>)>,
    /// Units of columns whose values carry none.
    pub units: Vec<(Reading, &'static str)>,
    /// Order of the figures in dates; none: not stated.
    pub dates: Option<DateOrder>,
    /// What the laboratory calls a point, and its address.
    pub aliases: Vec<(String, Given<String>)>,
    /// Where the map stands.
    pub origin: Origin,
}

/// What was done to an oil.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Done {
    /// All of it was changed.
    Change,
    /// Some was added.
    TopUp,
    /// The system was flushed.
    Flush,
}

impl Done {
    /// The words users write.
    pub const WRITTEN: &'static [(&'static str, Self)] = &[
        ("change", Self::Change),
        ("top-up", Self::TopUp),
        ("flush", Self::Flush),
    ];

    /// The word users write.
    pub fn word(self) -> &'static str {
        let found = Self::WRITTEN.iter().find(|(_, d)| *d == self);
        found.map_or("", |(w, _)| w)
    }
}

/// Something done to the oil of a point.
#[derive(Clone, Debug, PartialEq)]
pub struct Event {
    /// Address of the point.
    pub machine: Given<String>,
    /// The day.
    pub date: Date,
    /// What.
    pub what: Done,
    /// With which oil; none: the oil in use.
    pub oil: Option<Given<String>>,
    /// How much went in.
    pub amount: Option<Volume>,
    /// Where the record stands.
    pub origin: Origin,
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_reading_has_a_unit_of_its_kind_and_a_key_of_its_own() {
        for reading in Reading::ALL {
            assert_eq!(Reading::of(reading.key()), Some(*reading));
            assert!(
                reading.unit().is_empty() || reading.kind().unit(reading.unit()).is_some(),
                "{}",
                reading.key()
            );
        }
        assert!(Reading::Zn.is_element() && !Reading::Count14.is_element());
        assert_eq!(Column::of("Zn"), Some(Column::InUse(Reading::Zn)));
        assert_eq!(Column::New(Reading::Zn).name(), "Zn new");
    }
}
