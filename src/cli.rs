//! The command line: what may be typed, with every help text; no logic.

pub mod args;
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

pub use args::*;

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
