//! The command line: what may be typed, with every help text; no logic.

pub mod commands;
pub mod exit;
pub mod host;
pub mod load;
pub mod run;
pub mod samples;
pub mod select;
pub mod session;
pub mod states;
pub mod text;
pub mod text_of;

use clap::{Args, Parser, Subcommand, ValueEnum};

/// The program.
#[derive(Debug, Parser)]
#[command(
    name = "filmwright",
    version,
    about = "Works out the viscosity machines need and weighs candidate lubricants against it.",
    max_term_width = 100,
    help_expected = true,
    disable_help_subcommand = true,
    arg_required_else_help = true,
    after_help = "The core: need -> weigh -> why -> report.  Try: filmwright weigh --demo\n\
                  Topics: filmwright help units, verdicts, files, keys, steps"
)]
pub struct Cli {
    /// What to do.
    #[command(subcommand)]
    pub command: Command,
    /// Options shared by all commands.
    #[command(flatten)]
    pub shared: Shared,
}

/// Options shared by all commands.
#[expect(clippy::struct_excessive_bools, reason = "switches of a command line")]
#[derive(Clone, Debug, Default, Args)]
#[command(next_help_heading = "Shared options")]
pub struct Shared {
    /// Work in this folder (default: the nearest one upward holding site.yaml)
    #[arg(short = 'C', long, value_name = "DIR", global = true)]
    pub dir: Option<String>,
    /// Site file, instead of site.yaml
    #[arg(long, value_name = "FILE", global = true)]
    pub site: Option<String>,
    /// Oil files, instead of oils.yaml and oils/*.yaml
    #[arg(long, value_name = "FILE", global = true)]
    pub oils: Vec<String>,
    /// Sample maps or laboratory files, instead of samples.yaml
    #[arg(long, value_name = "FILE", global = true)]
    pub samples: Vec<String>,
    /// Take the built-in demonstration works instead of files
    #[arg(long, global = true)]
    pub demo: bool,
    /// Output format; text is for people and may change, json and csv are promises
    #[arg(short, long, value_enum, default_value_t = Format::Text, global = true)]
    pub format: Format,
    /// Write results here instead of standard output; '-' is standard output
    #[arg(short, long, value_name = "FILE", global = true)]
    pub out: Option<String>,
    /// Units of the output; input always carries its own
    #[arg(long, value_enum, default_value_t = UnitSystem::Si, global = true)]
    pub units: UnitSystem,
    /// Reserve asked, VG steps (default: the site's own, else 0.5)
    #[arg(long, value_name = "STEPS", global = true)]
    pub reserve: Option<String>,
    /// Exit with 1 if the oil in use (or --oil) is at this level or worse
    #[arg(long, value_enum, value_name = "LEVEL", global = true)]
    pub gate: Option<Gate>,
    /// Warnings count as errors
    #[arg(long, global = true)]
    pub strict: bool,
    /// No notes on standard error
    #[arg(short, long, global = true)]
    pub quiet: bool,
    /// Show where every value comes from
    #[arg(short, long, global = true)]
    pub verbose: bool,
    /// Colour of the output
    #[arg(long, value_enum, default_value_t = When::Auto, global = true)]
    pub color: When,
    /// Verdict marks in text output
    #[arg(long, value_enum, default_value_t = Marks::Plain, global = true)]
    pub marks: Marks,
    /// Date of judgement and of the outputs, as 2026-11-02
    #[arg(long, value_name = "DATE", global = true, value_parser = day)]
    pub on: Option<String>,
    /// Folder of own rules on top of the built-in ones
    #[arg(long, value_name = "DIR", global = true)]
    pub rules: Option<String>,
    /// Replace existing files that filmwright did not make
    #[arg(long, global = true)]
    pub replace: bool,
    /// CSV for spreadsheets of comma-decimal countries: byte-order mark and semicolons
    #[arg(long, global = true)]
    pub csv_excel: bool,
}

/// Output formats.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, ValueEnum)]
pub enum Format {
    /// For people.
    #[default]
    Text,
    /// One JSON document.
    Json,
    /// One table.
    Csv,
}

/// Units of the output.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, ValueEnum)]
pub enum UnitSystem {
    /// mm2/s, degC, mm.
    #[default]
    Si,
    /// As customary in the United States.
    Us,
}

/// Levels of the gate, mildest first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, ValueEnum)]
pub enum Gate {
    /// Limits met, reserve not kept.
    Tight,
    /// Not decided.
    Open,
    /// A limit not met, or barred.
    Fails,
}

/// Colour.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, ValueEnum)]
pub enum When {
    /// On a terminal, unless `NO_COLOR` is set or `TERM` is dumb.
    #[default]
    Auto,
    /// Always.
    Always,
    /// Never.
    Never,
}

/// Verdict marks.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, ValueEnum)]
pub enum Marks {
    /// The word alone.
    Words,
    /// The bar against its limit in plain characters, with the word.
    #[default]
    Plain,
    /// The bar in drawing characters, with the word.
    Drawn,
}

/// The commands.
#[derive(Debug, Subcommand)]
pub enum Command {
    /// Lay down a starter folder: three commented files and the editor schemas
    #[command(after_help = "Example:\n  filmwright new works/")]
    New(New),
    /// Read a spreadsheet register or oil list, draft the site or oil file
    #[command(
        after_help = "Examples:\n  filmwright intake register.xlsx                 draft site.yaml, propose register.map.yaml\n  \
        filmwright intake register.xlsx --map register.map.yaml -o site.yaml\n  \
        filmwright intake oils.csv --makes oils --decimal comma\n  \
        filmwright intake register.xlsx --accept        take the differences of site.yaml.proposed\n\
        See also: check, gaps"
    )]
    Intake(Intake),
    /// Read all files, report errors and warnings, run nothing
    #[command(after_help = "Example:\n  filmwright check --strict")]
    Check,
    /// What a machine needs: floor, ceiling, and what sets them
    #[command(after_help = "Examples:\n  filmwright need M01 --demo\n  \
        filmwright need --bearing 22220 --speed \"236 r/min\"\n\
        See also: weigh, why")]
    Need(Need),
    /// Weigh candidate oils against what machines need
    #[command(
        after_help = "Examples:\n  filmwright weigh CV-104              one machine, all suitable oils\n  \
        filmwright weigh 'CV-*' -f csv       several, as a table\n  \
        filmwright weigh --gate fails        exit 1 if any oil in use fails\n\
        See also: need, why"
    )]
    Weigh(Weigh),
    /// The traced steps behind one verdict
    #[command(after_help = "Example:\n  filmwright why M01 O-13 --demo")]
    Why(Why),
    /// The smallest change that would make an oil hold on a machine
    #[command(after_help = "Examples:\n  filmwright mend M02 O-13 --demo\n  \
        filmwright mend CV-104 MG-320 --band -25..40degC\n\
        Each amount is solved for and verified by weighing again. See also: whatif, why")]
    Mend(Mend),
    /// Weigh again with changed values, files untouched
    #[command(
        after_help = "Examples:\n  filmwright whatif M02 --set \"heater=10 degC\" --demo\n  \
        filmwright whatif CV-104 --set \"sump rise=48 K\" --set \"rolling bearing 22220: speed=250 r/min\"\n  \
        filmwright whatif CV-104 --set \"oil MG-220: pour point=-30 degC\" --set \"area yard: ambient=-25 .. 36 degC\"\n  \
        filmwright whatif CV-104 --set \"house: reserve=0.4 step\"\n\
        Only what moves is printed. See also: mend, gaps"
    )]
    Whatif(Whatif),
    /// Missing and assumed data, ranked by what it would decide
    #[command(
        after_help = "Examples:\n  filmwright gaps --demo\n  filmwright gaps --letter 5 --demo    the first five as questions\n\
        See also: whatif, check"
    )]
    Gaps(Gaps),
    /// One oil: its line, viscosity at temperatures, grades, what does not add up
    #[command(
        after_help = "Example:\n  filmwright oil O-12 --at -15degC --at 85degC --demo\n  \
        filmwright oil O-04 --with O-05 --share \"30 %\" --demo\n  \
        filmwright oil O-04 --with O-05 --target \"46.3 mm2/s at 40 degC\" --demo"
    )]
    Oil(Oil),
    /// The shortest oil list that serves every machine, and what one shorter or longer costs
    #[command(after_help = "Examples:\n  filmwright pool --demo\n  \
        filmwright pool --drop O-13 --never-tight\n  \
        filmwright pool --at-most 8 --site-price 250\n\
        See also: weigh, mend, report")]
    Pool(Pool),
    /// Samples of oils in use against their labels and against what the machines need
    #[command(
        after_help = "Examples:\n  filmwright audit --demo\n  filmwright audit --samples lab-2026-09.csv\n  \
        filmwright audit --match \"Conv104 HD=CV-104\" --unmatched\n\
        See also: weigh, report; filmwright help keys lists the columns"
    )]
    Audit(Audit),
    /// What moved between two states of a site, and why
    #[command(after_help = "Examples:\n  filmwright compare works-2025/ works/\n  \
        filmwright compare old.json new.json --all\n\
        A result file to compare: filmwright weigh -f json -o old.json\n\
        See also: whatif, report --since")]
    Compare(Compare),
    /// HTML sheets: overview, one sheet a machine
    #[command(
        after_help = "Examples:\n  filmwright report --demo\n  filmwright report -o out/\n  \
        filmwright report --one-file -o review.html --only 'CV-*'\n  \
        filmwright report --xlsx annex.xlsx"
    )]
    Report(Report),
    /// Label sheets for the fill points, as plain text
    #[command(
        after_help = "Examples:\n  filmwright labels --demo\n  filmwright labels 'CV-*' -o labels.txt\n\
        See also: report, weigh"
    )]
    Labels(Labels),
    /// The rules built in: formula, range of use, source, defaults
    #[command(after_help = "Examples:\n  filmwright rules\n  filmwright rules gear_parallel_bevel")]
    Rules(Rules),
    /// One published relation worked out, with its steps
    #[command(after_help = "Examples:\n  filmwright work\n  \
        filmwright work bearing-nu1 speed=\"236 r/min\" pitch_diameter=\"140 mm\"\n  \
        filmwright work --batch sums.jsonl")]
    Work(Work),
    /// JSON Schemas for editors: completion and hover text for the files
    #[command(
        after_help = "Examples:\n  filmwright schema --write       into .filmwright/ of the folder\n  filmwright schema site"
    )]
    Schema(Schema),
    /// Completions for a shell, with tags and oils of the working folder
    #[command(
        after_help = "Examples:\n  filmwright completions bash > ~/.local/share/bash-completion/completions/filmwright\n  \
        filmwright completions fish > ~/.config/fish/completions/filmwright.fish"
    )]
    Completions(Completions),
    /// Manual pages
    #[command(
        after_help = "Examples:\n  filmwright man | man -l -\n  filmwright man weigh\n  filmwright man -o man1/        all pages into a folder"
    )]
    Man(Man),
    /// Short texts: units, verdicts, files, keys, steps, or the name of a message
    #[command(after_help = "Example:\n  filmwright help verdicts")]
    Help(Help),
}

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

/// A day of the calendar, as it stands in the files.
fn day(text: &str) -> Result<String, String> {
    text.parse::<jiff::civil::Date>()
        .ok()
        .filter(|day| day.to_string() == text)
        .map(|_| text.to_owned())
        .ok_or_else(|| "a day is written as 2026-11-02".to_owned())
}

#[cfg(test)]
mod tests {
    use super::Cli;
    use clap::CommandFactory as _;

    #[test]
    fn the_command_line_is_well_formed() {
        Cli::command().debug_assert();
    }
}
