//! What may be typed behind the commands that read a site and weigh: `new` to `pool`.

use super::Decimal;
use clap::{Args, ValueEnum};

/// `new`
#[derive(Debug, Args)]
pub struct New {
    /// Folder to lay it down in (default: the working folder)
    pub folder: Option<String>,
    /// Also write the built-in rules out for editing
    #[arg(long = "with-rules")]
    pub with_rules: bool,
}

/// `intake`
#[derive(Debug, Args)]
pub struct Intake {
    /// The spreadsheet: xlsx, ods or csv
    #[arg(value_name = "FILE")]
    pub file: String,
    /// Map of its columns; written where it is not there (default: FILE with .map.yaml)
    #[arg(long, value_name = "FILE")]
    pub map: Option<String>,
    /// The sheet to read (default: the one that looks most like a register)
    #[arg(long, value_name = "NAME")]
    pub sheet: Option<String>,
    /// What the table lists (default: by its headings)
    #[arg(long, value_enum, value_name = "KIND")]
    pub makes: Option<IntakeMakes>,
    /// Decimal sign of its numbers (default: found from the cells)
    #[arg(long, value_enum, value_name = "SIGN")]
    pub decimal: Option<Decimal>,
    /// Encoding of a CSV file, as windows-1252 (default: found)
    #[arg(long, value_name = "NAME")]
    pub encoding: Option<String>,
    /// Delimiter of a CSV file: comma, semicolon, tab, bar (default: found)
    #[arg(long, value_name = "SIGN")]
    pub delimiter: Option<String>,
    /// Which gallon a bare gal is (default: asked about)
    #[arg(long, value_enum, value_name = "WHICH")]
    pub gallon: Option<IntakeGallon>,
    /// Take the differences proposed into the file
    #[arg(long)]
    pub accept: bool,
}

/// What a table lists.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum IntakeMakes {
    /// Machines: a site file.
    Site,
    /// Lubricants: an oil file.
    Oils,
}

/// Gallons.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum IntakeGallon {
    /// 3.785 L.
    Us,
    /// 4.546 L.
    Uk,
}

/// `need`
#[derive(Debug, Args)]
pub struct Need {
    /// Machines, by tag or pattern; all where none is given
    pub tags: Vec<String>,
    /// List the machines and stop
    #[arg(long)]
    pub list: bool,
    /// Also the oil to ask a supplier for: the smallest specification that holds
    #[arg(long)]
    pub ask: bool,
    /// A rolling bearing, without any file: its designation, or bore x outside as "100x180 mm"
    #[arg(long, value_name = "BEARING")]
    pub bearing: Option<String>,
    /// Pitch-line speed of a gear mesh, without any file
    #[arg(long, value_name = "SPEED")]
    pub gear: Option<String>,
    /// A component of the practice windows by id or name, without any file
    #[arg(long, value_name = "ID")]
    pub component: Option<String>,
    /// Speed of the bearing
    #[arg(long, value_name = "SPEED")]
    pub speed: Option<String>,
    /// Running temperature of the sump
    #[arg(long, value_name = "TEMP", allow_hyphen_values = true)]
    pub sump: Option<String>,
    /// Oil temperature at start
    #[arg(long, value_name = "TEMP", allow_hyphen_values = true)]
    pub start: Option<String>,
}

/// `weigh`
#[derive(Debug, Args)]
pub struct Weigh {
    /// Machines, by tag or pattern; all where none is given
    pub tags: Vec<String>,
    /// Only these oils, by id or pattern
    #[arg(long, value_name = "OIL")]
    pub oil: Vec<String>,
    /// Only the oil in use
    #[arg(long)]
    pub now: bool,
    /// Judge polymer-thickened oils as new, or worn by shear
    #[arg(long = "as", value_enum, value_name = "STATE", default_value_t = AsState::Worn)]
    pub state: AsState,
    /// Ambient instead of the area's, as -25..40degC
    #[arg(long, value_name = "LOW..HIGH", allow_hyphen_values = true)]
    pub band: Option<String>,
    /// Also sample so many cases within the tolerances: the share in which every limit is met
    #[arg(long, value_name = "CASES")]
    pub scatter: Option<u32>,
}

/// Which curve floors are judged on.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, ValueEnum)]
pub enum AsState {
    /// As new.
    New,
    /// After permanent shear.
    #[default]
    Worn,
}

/// `why`
#[derive(Debug, Args)]
pub struct Why {
    /// The machine, or machine/point
    pub tag: String,
    /// The oil
    pub oil: String,
}

/// `mend`
#[derive(Debug, Args)]
pub struct Mend {
    /// The machine, or machine/point
    pub tag: String,
    /// The oil, by id or pattern
    pub oil: String,
    /// Ambient instead of the area's, as -25..40degC
    #[arg(long, value_name = "LOW..HIGH", allow_hyphen_values = true)]
    pub band: Option<String>,
}

/// `whatif`
#[derive(Debug, Args)]
pub struct Whatif {
    /// The machine, or machine/point
    pub tag: String,
    /// A value by the name it has in the file, as KEY=VALUE, or NAME: KEY=VALUE with the name
    /// of a part, an oil, an area, another machine, `house` or a house rule; several may be set
    #[arg(
        long,
        value_name = "KEY=VALUE",
        required = true,
        allow_hyphen_values = true
    )]
    pub set: Vec<String>,
    /// Print only these oils, by id or pattern
    #[arg(long, value_name = "OIL")]
    pub oil: Vec<String>,
}

/// `gaps`
#[derive(Debug, Args)]
pub struct Gaps {
    /// Machines, by tag or pattern; all where none is given
    pub tags: Vec<String>,
    /// The first gaps as numbered questions in plain sentences, five unless another number is given
    #[arg(long, value_name = "N", num_args = 0..=1)]
    pub letter: Option<Option<usize>>,
    /// Every row, not only the first forty
    #[arg(long)]
    pub all: bool,
}

/// `oil`
#[derive(Debug, Args)]
pub struct Oil {
    /// The oil
    pub oil: String,
    /// Temperatures to print it at
    #[arg(long, value_name = "TEMP", allow_hyphen_values = true)]
    pub at: Vec<String>,
    /// Weigh it on every machine, not only where it is in use
    #[arg(long)]
    pub machines: bool,
    /// Another oil to blend into it
    #[arg(long, value_name = "OIL")]
    pub with: Option<String>,
    /// Share of the other oil, by volume
    #[arg(long, value_name = "SHARE", requires = "with")]
    pub share: Option<String>,
    /// Viscosity the blend is to have, as "46 mm2/s at 40 degC": the share for it
    #[arg(long, value_name = "VISCOSITY", requires = "with")]
    pub target: Option<String>,
    /// What the blend does to these machines; those that hold the oil where none is given
    #[arg(long, value_name = "TAG", requires = "with")]
    pub at_machine: Vec<String>,
}

/// `compare`
#[derive(Debug, Args)]
pub struct Compare {
    /// The old state: a site's folder, a file of `weigh -f json`, or one of `audit -f json`
    pub old: String,
    /// The new state
    pub new: String,
    /// List also what changed without moving anything
    #[arg(long)]
    pub all: bool,
}

/// `pool`
#[derive(Debug, Args)]
pub struct Pool {
    /// Only these machines, by tag or pattern; all where none is given
    pub tags: Vec<String>,
    /// Oils that stay on the list, by id or pattern
    #[arg(long, value_name = "OIL")]
    pub keep: Vec<String>,
    /// Oils that may not be on the list, by id or pattern
    #[arg(long, value_name = "OIL")]
    pub drop: Vec<String>,
    /// The longest list wanted
    #[arg(long, value_name = "N")]
    pub at_most: Option<usize>,
    /// Take no oil where it is tight
    #[arg(long)]
    pub never_tight: bool,
    /// What holding one oil on the site costs a year, in the site's unit of money
    #[arg(long, value_name = "COST", allow_hyphen_values = true)]
    pub site_price: Option<f64>,
    /// Nodes the search looks at before it prints a gap instead of an answer
    #[arg(long, value_name = "N", default_value_t = crate::decide::pool::case::NODES)]
    pub nodes: u64,
}
