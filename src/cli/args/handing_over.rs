//! What may be typed behind the commands that audit, hand over and explain: `audit` to `help`.

use clap::{Args, ValueEnum};

/// `audit`
#[derive(Debug, Args)]
pub struct Audit {
    /// Machines, by tag or pattern; all where none is given
    pub tags: Vec<String>,
    /// Only list the bottles that belong to no machine, with what may be meant
    #[arg(long)]
    pub unmatched: bool,
    /// A name on bottles and the machine it means, as "NAME=TAG"
    #[arg(long = "match", value_name = "NAME=TAG")]
    pub matches: Vec<String>,
    /// Lay the shear loss measured in one machine on the others with the same oil
    #[arg(long)]
    pub use_measured_shear: bool,
    /// What parts whole and decimals in the laboratory's numbers (default: as the map says)
    #[arg(long, value_enum, value_name = "SIGN")]
    pub decimal: Option<Decimal>,
}

/// What parts whole and decimals.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum Decimal {
    /// 45.6
    Point,
    /// 45,6
    Comma,
}

/// `report`
#[derive(Debug, Args)]
pub struct Report {
    /// All pages in one file
    #[arg(long)]
    pub one_file: bool,
    /// Only these machines, by tag or pattern
    #[arg(long, value_name = "TAG")]
    pub only: Vec<String>,
    /// An older state to tell the changes from: a site's folder, or a file of `weigh -f json`
    #[arg(long, value_name = "OLD")]
    pub since: Option<String>,
    /// Paper the print style is laid out for
    #[arg(long, value_enum, default_value_t = Paper::A4)]
    pub paper: Paper,
    /// Folder of own templates on top of the built-in ones
    #[arg(long, value_name = "DIR")]
    pub templates: Option<String>,
    /// Say on each sheet in what share of so many cases within the tolerances every limit is met
    #[arg(long, value_name = "CASES")]
    pub scatter: Option<u32>,
    /// Write the results as a workbook as well
    #[arg(long, value_name = "FILE")]
    pub xlsx: Option<String>,
}

/// `labels`
#[derive(Debug, Args)]
pub struct Labels {
    /// Machines, by tag or pattern; all where none is given
    pub tags: Vec<String>,
}

/// Paper sizes.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, ValueEnum)]
pub enum Paper {
    /// 210 by 297 mm.
    #[default]
    A4,
    /// 8.5 by 11 in.
    Letter,
}

/// `rules`
#[derive(Debug, Args)]
pub struct Rules {
    /// Ids, names or patterns; an overview where none is given
    pub rules: Vec<String>,
    /// Only this kind: parts, suitability, base stocks, classes, limits, grease, cautions
    #[arg(long, value_name = "KIND")]
    pub kind: Option<String>,
}

/// `work`
#[derive(Debug, Args)]
pub struct Work {
    /// The relation; a list of all where none is given
    pub relation: Option<String>,
    /// Its inputs
    #[arg(value_name = "KEY=VALUE")]
    pub with: Vec<String>,
    /// JSON Lines in, JSON Lines out; '-' is standard input
    #[arg(long, value_name = "FILE")]
    pub batch: Option<String>,
}

/// `schema`
#[derive(Debug, Args)]
pub struct Schema {
    /// Print the schema of this kind of file: site, oils, samples, events
    #[arg(value_name = "KIND")]
    pub kind: Option<String>,
    /// Write all of them into .filmwright/ of the folder
    #[arg(long)]
    pub write: bool,
}

/// `completions`
#[derive(Debug, Args)]
pub struct Completions {
    /// The shell
    #[arg(value_enum, value_name = "SHELL", required_unless_present = "names")]
    pub shell: Option<Shell>,
    /// Print names of the working folder with what they are, a line each
    #[arg(long, value_enum, value_name = "KIND", hide = true)]
    pub names: Option<Names>,
}

/// Shells.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum Shell {
    /// bash.
    Bash,
    /// zsh.
    Zsh,
    /// fish.
    Fish,
    /// `PowerShell`.
    #[value(name = "powershell")]
    PowerShell,
}

/// Names that are completed.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum Names {
    /// Tags of machines and addresses of points.
    Tags,
    /// Ids of oils.
    Oils,
    /// Ids of rules.
    Rules,
}

/// `man`
#[derive(Debug, Args)]
pub struct Man {
    /// The page of one command; the program's own where none is given
    #[arg(value_name = "COMMAND")]
    pub command: Option<String>,
}

/// `help`
#[derive(Debug, Args)]
pub struct Help {
    /// The topic
    pub topic: Option<String>,
}
