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
        key("sheet", TEXT, "the first sheet", "Sheet of a workbook that holds the samples."),
        key("delimiter", Form::Word(DELIMITER), "found", "What parts the cells of a text table."),
        key("encoding", TEXT, "found", "Encoding of a text table, as utf-8 or windows-1252."),
        key("decimal", Form::Word(&["point", "comma"]), "point", "What parts whole and decimals in the numbers."),
        key("columns", Form::Record(&COLUMNS), "headings as named here", "Heading of each column in the table."),
        key("new oil", Form::Record(&COLUMNS), "headings as named here, with new behind them", "Heading of each column that holds a figure of the new oil."),
        key("units", Form::Table, "units in the headings", "Unit of a column, where its values carry none."),
        key("dates", Form::Word(&["day-month-year", "month-day-year", "year-month-day"]), "year-month-day", "Order of the figures in dates."),
        key("aliases", Form::Table, "–", "What the laboratory calls a point: its name, then the tag."),
    ],
};

const TEXT: Form = Form::Text;

/// Words for what parts the cells of a text table.
pub const DELIMITER: &[&str] = &["comma", "semicolon", "tab", "stroke"];

/// Columns of a laboratory's table.
pub static COLUMNS: Record = Record {
    name: "the columns",
    also: &[],
    must: &[],
    keys: COLUMN_KEYS,
};

#[rustfmt::skip]
const COLUMN_KEYS: &[Key] = &[
    key("bottle", TEXT, "bottle", "Number of the bottle or of the sample."),
    key("machine", TEXT, "machine", "The point sampled; `new oil` for a sample from the drum."),
    key("label", TEXT, "label", "Oil on the label."),
    key("drawn", TEXT, "drawn", "Day the sample was drawn."),
    key("hours on oil", TEXT, "hours on oil", "Hours since the last oil change."),
    key("hours on machine", TEXT, "hours on machine", "Hours the machine has run."),
    key("topped up", TEXT, "topped up", "Oil added since the last change."),
    key("nu40", TEXT, "nu40", "Kinematic viscosity at 40 °C."),
    key("nu100", TEXT, "nu100", "Kinematic viscosity at 100 °C."),
    key("density", TEXT, "density", "Density at 15 °C."),
    key("flash", TEXT, "flash", "Flash point."),
    key("acid number", TEXT, "acid number", "Acid number."),
    key("base number", TEXT, "base number", "Base number."),
    key("water", TEXT, "water", "Water content."),
    key("iso4406", TEXT, "iso4406", "Cleanliness code."),
    key("oxidation", TEXT, "oxidation", "Oxidation by infrared, absorbance per cm."),
    key("nitration", TEXT, "nitration", "Nitration by infrared, absorbance per cm."),
    key("oxidation life left", TEXT, "oxidation life left", "Rotating pressure vessel test, share of new oil."),
    key("fuel", TEXT, "fuel", "Fuel content."),
    key("soot", TEXT, "soot", "Soot content."),
    key("count 4", TEXT, "count 4", "Particles of 4 µm(c) or more in a millilitre."),
    key("count 6", TEXT, "count 6", "Particles of 6 µm(c) or more in a millilitre."),
    key("count 14", TEXT, "count 14", "Particles of 14 µm(c) or more in a millilitre."),
    key("flags", TEXT, "flags", "Remarks of the laboratory."),
    key("Fe", TEXT, "Fe", "Iron, mg/kg."),
    key("Cu", TEXT, "Cu", "Copper."),
    key("Pb", TEXT, "Pb", "Lead."),
    key("Sn", TEXT, "Sn", "Tin."),
    key("Sb", TEXT, "Sb", "Antimony."),
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
