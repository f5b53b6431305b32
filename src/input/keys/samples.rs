//! Keys of the map to a laboratory's table, and of the list of events.

use super::form::{Form, Refers};
use super::{Key, Record, key};

/// The map of a laboratory's table.
#[rustfmt::skip]
pub static SAMPLES: Record = Record {
    name: "the samples file",
    also: &[],
    must: &["file"],
    keys: &[
        key("file", Form::FileKind, "error", "Which kind of file this is, and of which edition of the format."),
        key("read", Form::Path, "no samples", "The laboratory's table."),
        key("columns", Form::Record(&COLUMNS), "headings as named here", "Heading of each column in the table."),
        key("units", Form::Table, "units in the headings", "Unit of a column, where its values carry none."),
        key("dates", Form::Word(&["day-month-year", "month-day-year", "year-month-day"]), "year-month-day", "Order of the figures in dates."),
        key("aliases", Form::Table, "–", "What the laboratory calls a point: its name, then the tag."),
    ],
};

const TEXT: Form = Form::Text;

/// Columns of a laboratory's table.
pub static COLUMNS: Record = Record {
    name: "the columns",
    also: &[],
    must: &[],
    keys: COLUMN_KEYS,
};

#[rustfmt::skip]
const COLUMN_KEYS: &[Key] = &[
    key("machine", TEXT, "machine", "The point sampled."),
    key("label", TEXT, "label", "Oil on the label."),
    key("drawn", TEXT, "drawn", "Day the sample was drawn."),
    key("hours on oil", TEXT, "hours on oil", "Hours since the last oil change."),
    key("hours on machine", TEXT, "hours on machine", "Hours the machine has run."),
    key("topped up", TEXT, "topped up", "Oil added since the last change."),
    key("nu40", TEXT, "nu40", "Kinematic viscosity at 40 °C."),
    key("nu100", TEXT, "nu100", "Kinematic viscosity at 100 °C."),
    key("flash", TEXT, "flash", "Flash point."),
    key("acid number", TEXT, "acid number", "Acid number."),
    key("water", TEXT, "water", "Water content."),
    key("iso4406", TEXT, "iso4406", "Cleanliness code."),
    key("oxidation", TEXT, "oxidation", "Oxidation by infrared."),
    key("flags", TEXT, "flags", "Remarks of the laboratory."),
    key("Fe", TEXT, "Fe", "Iron, mg/kg."),
    key("Cu", TEXT, "Cu", "Copper."),
    key("Pb", TEXT, "Pb", "Lead."),
    key("Sn", TEXT, "Sn", "Tin."),
    key("Al", TEXT, "Al", "Aluminium."),
    key("Cr", TEXT, "Cr", "Chromium."),
    key("Ni", TEXT, "Ni", "Nickel."),
    key("Mo", TEXT, "Mo", "Molybdenum."),
    key("Ag", TEXT, "Ag", "Silver."),
    key("Ti", TEXT, "Ti", "Titanium."),
    key("V", TEXT, "V", "Vanadium."),
    key("Mn", TEXT, "Mn", "Manganese."),
    key("Si", TEXT, "Si", "Silicon."),
    key("Na", TEXT, "Na", "Sodium."),
    key("K", TEXT, "K", "Potassium."),
    key("Li", TEXT, "Li", "Lithium."),
    key("B", TEXT, "B", "Boron."),
    key("Ca", TEXT, "Ca", "Calcium."),
    key("Mg", TEXT, "Mg", "Magnesium."),
    key("Ba", TEXT, "Ba", "Barium."),
    key("P", TEXT, "P", "Phosphorus."),
    key("Zn", TEXT, "Zn", "Zinc."),
    key("S", TEXT, "S", "Sulphur."),
];

/// The events file.
#[rustfmt::skip]
pub static EVENTS: Record = Record {
    name: "the events file",
    also: &[],
    must: &["file"],
    keys: &[
        key("file", Form::FileKind, "error", "Which kind of file this is, and of which edition of the format."),
        key("events", Form::List(&EVENT), "–", "What was done to the oils, and when."),
    ],
};

/// Something done to an oil.
#[rustfmt::skip]
pub static EVENT: Record = Record {
    name: "an event",
    also: &[],
    must: &["machine", "date", "what"],
    keys: &[
        key("machine", Form::Name(Refers::Point), "error", "The point."),
        key("date", Form::Day, "error", "The day."),
        key("what", Form::Word(&["change", "top-up", "flush"]), "error", "What was done."),
        key("oil", Form::Name(Refers::Oil), "the oil now", "With which oil."),
        key("amount", super::form::stated(super::form::VOLUME), "–", "How much went in."),
    ],
};
