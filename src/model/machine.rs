//! A machine and its lubrication points. One point is one fill with one lubricant: a sump, a
//! grease point, a crankcase; it serves one or more parts.

use super::part::Part;
use super::stated::{Between, Stated, ViscosityLimit};
use crate::quantity::{
    Amount, Area, HeatTransfer, HoursPerYear, Mass, Power, TemperatureInterval,
    ThermodynamicTemperature, Time, Volume, VolumePerYear,
};
use crate::source::Origin;
use crate::source::place::Given;

/// One lubrication point, with everything inherited already in place.
#[derive(Clone, Debug, PartialEq)]
pub struct Point {
    /// Tag of the machine, as written.
    pub machine: String,
    /// Name of the point where the machine has several: `drive end`.
    pub point: Option<String>,
    /// What the machine is called.
    pub title: Option<String>,
    /// Name of its area.
    pub area: Option<String>,
    /// Row of the register it came from.
    pub register_row: Option<u32>,
    /// How many such machines there are.
    pub count: u32,
    /// Ambient range it works in.
    pub ambient: Option<Stated<Between<ThermodynamicTemperature>>>,
    /// Twelve monthly ambient ranges, January first.
    pub monthly_ambient: Option<Vec<Given<Between<ThermodynamicTemperature>>>>,
    /// How the oil gets to the parts.
    pub lubrication: Option<Given<Lubrication>>,
    /// What is in it.
    pub fill: Option<Stated<Fill>>,
    /// Oil used a year.
    pub annual_use: Option<Stated<VolumePerYear>>,
    /// Running time a year.
    pub running_hours: Option<Stated<HoursPerYear>>,
    /// Oil in use.
    pub oil_now: OilNow,
    /// Additive families or classes required by the maker or the duty.
    pub asks_for: Vec<Given<String>>,
    /// How running temperature follows ambient.
    pub sump: Option<Sump>,
    /// Oil temperature at start, where it is not the ambient.
    pub start: Option<Stated<ThermodynamicTemperature>>,
    /// Setting of a sump heater.
    pub heater: Option<Stated<ThermodynamicTemperature>>,
    /// Power of the heater.
    pub heater_power: Option<Stated<Power>>,
    /// Heated sheath area.
    pub heater_area: Option<Stated<Area>>,
    /// The grade the maker names, mid-point ISO VG.
    pub maker_grade: Option<Given<MakerGrade>>,
    /// A filter the oil must pass at start.
    pub filter: bool,
    /// A gravity return the oil must pass at start.
    pub gravity_return: bool,
    /// Limits stated for the point.
    pub limits: Limits,
    /// Temperature the bulk oil must not pass.
    pub oil_limit: Option<Given<ThermodynamicTemperature>>,
    /// How clean the oil is kept: an ISO 4406 code or a word of ISO 281.
    pub cleanliness: Option<Given<String>>,
    /// How dusty the place is: `yes`, `no`, `high`.
    pub dust: Option<Given<String>>,
    /// Materials, environment and duty that suitability rules ask about.
    pub facts: super::facts::PointFacts,
    /// For the heat balance.
    pub losses: Option<Losses>,
    /// Grease points: how they are regreased today.
    pub regrease: Option<Regrease>,
    /// Limits of the oil in use stated for the point; they outrank those of practice.
    pub used_oil: Vec<OwnLimit>,
    /// Codes of warnings silenced for this machine.
    pub allow: Vec<String>,
    /// What the point serves.
    pub parts: Vec<Part>,
    /// Every value as written, for the inputs table, in file order.
    pub inputs: Vec<InputLine>,
    /// Free notes: cells of a register that were not understood, and the like.
    pub notes: Vec<String>,
    /// Where the record stands.
    pub origin: Origin,
}

impl Point {
    /// The address users type: `M12/drive end`, or the tag alone.
    pub fn address(&self) -> String {
        match &self.point {
            Some(point) => format!("{}/{point}", self.machine),
            None => self.machine.clone(),
        }
    }
}

/// One value as written, for the table of inputs.
#[derive(Clone, Debug, PartialEq)]
pub struct InputLine {
    /// The key, spelt with spaces.
    pub key: String,
    /// The part it belongs to, if to one.
    pub about: Option<String>,
    /// The value as written, without origin clauses.
    pub written: String,
    /// Whose word it is and where it stands.
    pub origin: Origin,
}

/// How the lubricant is brought to the parts.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Lubrication {
    /// Thrown by gears or discs.
    Splash,
    /// Parts dip into the oil.
    Bath,
    /// Pumped round from a tank or sump.
    Circulated,
    /// Fed under pressure.
    PressureFed,
    /// Loose or fixed oil ring.
    Ring,
    /// Runs down by gravity.
    Gravity,
    /// Drops.
    Drip,
    /// A wick.
    Wick,
    /// Oil mist or oil-air.
    Mist,
    /// Oil-flooded, as screw compressors.
    Flooded,
    /// A hydraulic reservoir.
    Reservoir,
    /// Grease.
    Grease,
}

impl Lubrication {
    /// The words users write.
    pub const WRITTEN: &'static [(&'static str, Self)] = &[
        ("splash", Self::Splash),
        ("bath", Self::Bath),
        ("circulated", Self::Circulated),
        ("pressure-fed", Self::PressureFed),
        ("ring", Self::Ring),
        ("gravity", Self::Gravity),
        ("drip", Self::Drip),
        ("wick", Self::Wick),
        ("mist", Self::Mist),
        ("flooded", Self::Flooded),
        ("reservoir", Self::Reservoir),
        ("grease", Self::Grease),
    ];

    /// The word users write.
    pub fn word(self) -> &'static str {
        Self::WRITTEN
            .iter()
            .find(|(_, l)| *l == self)
            .map_or("", |(w, _)| w)
    }
}

/// What a point holds.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Fill {
    /// Litres of oil.
    Oil(Volume),
    /// Grams of grease.
    Grease(Mass),
}

/// The lubricant in use.
#[derive(Clone, Debug, PartialEq)]
pub enum OilNow {
    /// An oil of the list, by its id.
    Oil(Given<String>),
    /// Filled, nobody knows with what.
    Unknown,
    /// Empty: a new machine.
    Nothing,
}

/// How the running temperature of the sump follows the ambient.
#[derive(Clone, Debug, PartialEq)]
pub enum Sump {
    /// So much above ambient.
    Rise(Stated<TemperatureInterval>),
    /// A reading and the ambient it was taken at, which give the rise.
    Reading {
        /// The reading.
        sump: Given<ThermodynamicTemperature>,
        /// The ambient at that time.
        ambient: Given<ThermodynamicTemperature>,
    },
    /// Controlled: the same at every ambient.
    Held(Stated<ThermodynamicTemperature>),
    /// At the coldest and at the hottest ambient, linear between and carried on beyond.
    Across(Given<Between<ThermodynamicTemperature>>),
}

/// Grade named by the maker.
#[derive(Clone, Debug, PartialEq)]
pub struct MakerGrade {
    /// As an ISO VG number where it is one.
    pub iso_vg: u32,
}

/// Limits on viscosity stated for a point or a part.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Limits {
    /// Never below this while running.
    pub floor: Option<Given<ViscosityLimit>>,
    /// Never above this while running.
    pub ceiling: Option<Given<ViscosityLimit>>,
    /// Never above this at start.
    pub start: Option<Given<ViscosityLimit>>,
}

/// How a grease point is looked after today.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Regrease {
    /// Grease put in each time.
    pub amount: Option<Stated<Mass>>,
    /// Time between.
    pub interval: Option<Stated<Time>>,
    /// How the shaft lies: `horizontal`, `sloping`, `vertical`.
    pub position: Option<Given<String>>,
    /// How much it vibrates: `low`, `medium`, `high`.
    pub vibration: Option<Given<String>>,
}

/// A limit of the oil in use, by the maker or the house.
#[derive(Clone, Debug, PartialEq)]
pub struct OwnLimit {
    /// What it is on.
    pub on: Vec<super::rulebook::used_oil::Reading>,
    /// From here on, watch.
    pub watch: Amount,
    /// From here on, act.
    pub act: Amount,
    /// Whose word it is.
    pub origin: Origin,
}

/// What a heat balance needs beyond the parts.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Losses {
    /// Surface that gives off heat.
    pub casing_area: Option<Stated<Area>>,
    /// Heat transfer coefficient of the casing.
    pub heat_transfer: Option<Stated<HeatTransfer>>,
    /// Heat taken by a cooler.
    pub cooler: Option<Stated<Power>>,
}
