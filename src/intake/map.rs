//! The map file: how the columns of a table are read. The program proposes it, the user mends it.

mod parse;

pub use parse::parse;

use super::finding::letters;
use super::layout::{Column, Layout};
use super::number::Decimal;
use super::target::{Makes, OTHERS, Target};
use super::units::Unit;
use super::yaml::{item, scalar};
use std::fmt::Write as _;

/// What a map states.
#[derive(Clone, Debug, Default)]
pub struct Map {
    /// The sheet.
    pub sheet: Option<String>,
    /// What the table lists.
    pub makes: Option<Makes>,
    /// Row of headings.
    pub heading_row: Option<u32>,
    /// Rule of decimals.
    pub decimal: Option<Decimal>,
    /// Encoding of a CSV file.
    pub encoding: Option<String>,
    /// Delimiter of a CSV file.
    pub delimiter: Option<char>,
    /// Which gallon: `gal(US)` or `gal(UK)`.
    pub gallon: Option<&'static str>,
    /// Ambient at which oil temperatures were read, as written.
    pub at_ambient: Option<String>,
    /// Density by which masses become volumes, kg/m3.
    pub density_kg_m3: Option<f64>,
    /// Columns.
    pub columns: Vec<Stated>,
}

/// A column as a map states it.
#[derive(Clone, Debug)]
pub struct Stated {
    /// Its letters.
    pub column: Option<u32>,
    /// Its heading.
    pub heading: Option<String>,
    /// What it holds.
    pub target: Target,
    /// Its unit.
    pub unit: Option<(Unit, String)>,
}

/// What is wrong with a map.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{path}:{line}: {says}\n  write  {write}")]
pub struct Fault {
    /// The map file.
    pub path: String,
    /// The line.
    pub line: usize,
    /// What is wrong.
    pub says: String,
    /// What to write.
    pub write: String,
}

/// How a file was read, to be said in its map.
#[derive(Clone, Debug, Default)]
pub struct Head {
    /// Name of the file.
    pub file: String,
    /// Name of the sheet, where it has one.
    pub sheet: Option<String>,
    /// Rule of decimals and how it was found.
    pub decimal: Option<Decimal>,
    /// The same in words.
    pub decimal_says: String,
    /// Encoding and delimiter of a CSV file, each with how it was found.
    pub text: Option<(String, String, char, String)>,
}

/// The map as the program proposes it.
pub fn propose(head: &Head, layout: &Layout) -> String {
    let mut out = format!(
        "# How the columns of {} are read. Change what is wrong and run filmwright intake again.\n\
         # is: a key of a machine or oil (filmwright help keys), of a part as \"rolling bearing: load\", or one of:\n",
        one_line(&head.file)
    );
    for (word, _, says) in OTHERS
        .iter()
        .filter(|o| !matches!(o.1, Target::Path | Target::AsWritten | Target::FileKind))
    {
        let _ = writeln!(out, "#   {word:<13} {says}");
    }
    let _ = writeln!(out, "file: map 1\nread: {}", scalar(&head.file));
    if let Some(sheet) = &head.sheet {
        let _ = writeln!(out, "sheet: {}", scalar(sheet));
    }
    let _ = writeln!(
        out,
        "makes: {}\nheading row: {}",
        layout.makes.word(),
        layout.heading_row
    );
    if let Some((encoding, by, delimiter, found)) = &head.text {
        let _ = writeln!(out, "encoding: {encoding:<14} # {by}");
        let _ = writeln!(
            out,
            "delimiter: {:<13} # {found}",
            delimiter_word(*delimiter)
        );
    }
    match head.decimal {
        Some(rule) => {
            let _ = writeln!(
                out,
                "decimal: {:<15} # {}",
                rule.word(),
                one_line(&head.decimal_says)
            );
        }
        None => {
            let _ = writeln!(
                out,
                "# decimal: comma        # {}",
                one_line(&head.decimal_says)
            );
        }
    }
    out.push_str(
        "# gallon: US             # or UK; a bare gal is asked about until this is stated\n",
    );
    if layout.makes == Makes::Site {
        out.push_str("# at ambient: 20 degC    # ambient at which the oil temperatures were read; 20 degC is assumed\n");
    }
    out.push_str("columns:\n");
    for c in &layout.columns {
        column(&mut out, c);
    }
    out
}

fn column(out: &mut String, c: &Column) {
    let how = match c.sure {
        0 if c.twice.is_some() => "   # another column holds the same",
        0 => "   # not recognised: kept as a note",
        1 => "   # guessed from a similar word",
        2 => "   # guessed from the words",
        _ => "",
    };
    let _ = writeln!(out, "  - column: {}", letters(c.number));
    let _ = writeln!(out, "    heading: {}", scalar(&c.heading));
    let _ = writeln!(out, "    is: {}{how}", scalar(&c.target.word()));
    if let Some(written) = &c.unit_written {
        let _ = writeln!(out, "    unit: {}", scalar(written));
    }
    let samples: Vec<String> = c.samples.iter().map(|s| item(&shortened(s))).collect();
    let _ = writeln!(out, "    samples: [{}]", samples.join(", "));
}

/// Samples are shown, not carried.
fn shortened(text: &str) -> String {
    const LONG: usize = 60;
    if text.chars().count() <= LONG {
        return text.to_owned();
    }
    let cut: String = text.chars().take(LONG).collect();
    format!("{cut} ...")
}

fn one_line(text: &str) -> String {
    text.split_whitespace().collect::<Vec<_>>().join(" ")
}

fn delimiter_word(c: char) -> String {
    match c {
        ',' => "comma".into(),
        ';' => "semicolon".into(),
        '\t' => "tab".into(),
        '|' => "bar".into(),
        c => scalar(&c.to_string()),
    }
}

/// The delimiter of a word or character.
pub fn delimiter_of(word: &str) -> Option<char> {
    let mut chars = word.chars();
    match (word, chars.next(), chars.next()) {
        ("comma", ..) => Some(','),
        ("semicolon", ..) => Some(';'),
        ("tab", ..) => Some('\t'),
        ("bar", ..) => Some('|'),
        (_, Some(c), None) if c.is_ascii() && !c.is_alphanumeric() && c != '"' => Some(c),
        _ => None,
    }
}

/// The gallon of a word.
pub fn gallon_of(word: &str) -> Option<&'static str> {
    match word {
        "US" | "us" => Some("gal(US)"),
        "UK" | "uk" => Some("gal(UK)"),
        _ => None,
    }
}

/// What a map and a file say of each other.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Differs {
    /// Headings of the map that the file does not have.
    pub gone: Vec<String>,
    /// Headings of the file that the map does not have.
    pub new: Vec<String>,
}

/// Puts what the map states in the place of what was guessed. Columns are found by their heading,
/// where it stands once, so that a column may move; else by their letters.
pub fn apply(map: &Map, layout: &mut Layout) -> Differs {
    let mut differs = Differs::default();
    if map.columns.is_empty() {
        return differs;
    }
    let mut taken = vec![false; layout.columns.len()];
    for stated in &map.columns {
        let at = place(stated, layout, &taken);
        match at {
            Some(at) => {
                taken[at] = true;
                let column = &mut layout.columns[at];
                column.twice = None;
                column.target = stated.target;
                column.sure = 4;
                if let Some((unit, written)) = &stated.unit {
                    column.unit = Some(*unit);
                    column.unit_written = Some(written.clone());
                }
            }
            None => differs.gone.push(
                stated
                    .heading
                    .clone()
                    .unwrap_or_else(|| stated.column.map(letters).unwrap_or_default()),
            ),
        }
    }
    for (column, _) in layout
        .columns
        .iter()
        .zip(&taken)
        .filter(|(_, taken)| !**taken)
    {
        differs.new.push(column.heading.clone());
    }
    differs
}

fn place(stated: &Stated, layout: &Layout, taken: &[bool]) -> Option<usize> {
    let free = |i: &usize| !taken[*i];
    let all = 0..layout.columns.len();
    let by_letters = |i: &usize| Some(layout.columns[*i].number) == stated.column;
    let Some(heading) = stated.heading.as_deref().filter(|h| !h.is_empty()) else {
        return all.filter(free).find(by_letters);
    };
    let same: Vec<usize> = all
        .filter(free)
        .filter(|i| layout.columns[*i].heading == heading)
        .collect();
    same.iter()
        .copied()
        .find(by_letters)
        .or_else(|| same.first().copied())
}
