//! The map file: how the columns of a table are read. The program proposes it, the user mends it.

use super::finding::{column_of, letters};
use super::layout::{Column, Layout};
use super::number::Decimal;
use super::target::{Makes, OTHERS, Target};
use super::units::{Unit, unit};
use super::yaml::{item, scalar};
use crate::problem::suggest;
use crate::source::yaml::{Entry, Node, read};
use crate::source::{FileId, SourceFile, SourceSet};
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

const KEYS: &[&str] = &[
    "file",
    "read",
    "sheet",
    "makes",
    "heading row",
    "encoding",
    "delimiter",
    "decimal",
    "gallon",
    "at ambient",
    "density",
    "columns",
];
const COLUMN_KEYS: &[&str] = &["column", "heading", "is", "unit", "samples"];

/// Reads a map file.
///
/// # Errors
/// The first [`Fault`] found, with its line.
pub fn parse(path: &str, text: &str) -> Result<Map, Fault> {
    let mut set = SourceSet::new();
    let id = set.add(path, text);
    let missing = || Fault {
        path: path.to_owned(),
        line: 1,
        says: "the map does not read".into(),
        write: "delete it, and filmwright intake proposes it anew".into(),
    };
    let file = set.file(id).ok_or_else(missing)?;
    let reading = Reading { path, file };
    let gated = read(FileId(id.0), &file.text);
    if let Some(fault) = gated.faults.first() {
        return Err(reading.fault(
            fault.span.start,
            format!("the map does not read as YAML here: {:?}", fault.kind),
            "a line as in the proposed map",
        ));
    }
    let root = gated.root.ok_or_else(missing)?;
    let entries = root.entries().ok_or_else(|| {
        reading.fault(
            root.span.start,
            "keys with values are wanted".into(),
            "file: map 1",
        )
    })?;
    let mut map = Map::default();
    for entry in entries.iter().filter(|e| !e.key.text.starts_with("x-")) {
        reading.entry(entry, &mut map)?;
    }
    if !entries.iter().any(|e| e.key.text == "file") {
        return Err(reading.fault(
            root.span.start,
            "the file does not say that it is a map".into(),
            "file: map 1",
        ));
    }
    let makes = map.makes.unwrap_or(Makes::Site);
    if let Some(list) = entries.iter().find(|e| e.key.text.trim() == "columns") {
        let items = list.value.items().ok_or_else(|| {
            reading.fault(
                list.value.span.start,
                "a list of columns is wanted".into(),
                "- column: A",
            )
        })?;
        map.columns = items
            .iter()
            .map(|n| reading.column(n, makes))
            .collect::<Result<_, _>>()?;
    }
    Ok(map)
}

struct Reading<'f> {
    path: &'f str,
    file: &'f SourceFile,
}

impl Reading<'_> {
    fn fault(&self, at: u32, says: String, write: &str) -> Fault {
        Fault {
            path: self.path.to_owned(),
            line: self.file.line_of(at),
            says,
            write: write.to_owned(),
        }
    }

    fn text<'e>(&self, entry: &'e Entry) -> Result<&'e str, Fault> {
        let text = entry.value.text().map(str::trim);
        text.ok_or_else(|| {
            self.fault(
                entry.value.span.start,
                format!("one value is wanted behind `{}`", entry.key.text),
                "one value",
            )
        })
    }

    fn entry(&self, entry: &Entry, map: &mut Map) -> Result<(), Fault> {
        let name = entry.key.text.trim().replace('_', " ");
        let bad = |what: &str, write: &str| {
            let text = entry.value.text().unwrap_or("");
            self.fault(
                entry.value.span.start,
                format!("\"{text}\" is no {what}"),
                write,
            )
        };
        match name.as_str() {
            "read" | "columns" => {}
            "file" => {
                if self.text(entry)? != "map 1" {
                    return Err(bad("map of this edition", "file: map 1"));
                }
            }
            "sheet" => map.sheet = Some(self.text(entry)?.to_owned()),
            "makes" => {
                let makes = Makes::of(self.text(entry)?);
                map.makes = Some(makes.ok_or_else(|| {
                    bad("file that is made", "makes: site     or     makes: oils")
                })?);
            }
            "heading row" => {
                let row = self.text(entry)?.parse().ok().filter(|r| *r > 0);
                map.heading_row = Some(row.ok_or_else(|| bad("row", "heading row: 4"))?);
            }
            "encoding" => map.encoding = Some(self.text(entry)?.to_owned()),
            "delimiter" => {
                let c = delimiter_of(self.text(entry)?);
                map.delimiter = Some(c.ok_or_else(|| bad("delimiter", "delimiter: semicolon"))?);
            }
            "decimal" => {
                let rule = Decimal::of(self.text(entry)?);
                map.decimal = Some(rule.ok_or_else(|| {
                    bad("decimal sign", "decimal: comma     or     decimal: point")
                })?);
            }
            "gallon" => {
                let gallon = gallon_of(self.text(entry)?);
                map.gallon =
                    Some(gallon.ok_or_else(|| bad("gallon", "gallon: US     or     gallon: UK"))?);
            }
            "at ambient" => {
                let text = self.text(entry)?;
                let want = crate::input::value::Want::one(&[crate::quantity::Kind::Temperature]);
                if crate::input::value::read(text, &want).is_err() {
                    return Err(bad("temperature", "at ambient: 20 degC"));
                }
                map.at_ambient = Some(text.to_owned());
            }
            "density" => {
                let read = crate::quantity::parse::parse(
                    crate::quantity::Kind::Density,
                    self.text(entry)?,
                );
                map.density_kg_m3 = Some(
                    read.map_err(|_| bad("density", "density: 890 kg/m3"))?
                        .amount
                        .base,
                );
            }
            other => return Err(self.unknown(entry, other, KEYS)),
        }
        Ok(())
    }

    fn unknown(&self, entry: &Entry, name: &str, keys: &[&str]) -> Fault {
        let meant = suggest::certain(name, keys.iter().copied());
        let write = meant.map_or_else(|| format!("one of: {}", keys.join(", ")), str::to_owned);
        self.fault(
            entry.key.span.start,
            format!("unknown key \"{name}\""),
            &write,
        )
    }

    fn column(&self, node: &Node, makes: Makes) -> Result<Stated, Fault> {
        let entries = node.entries().ok_or_else(|| {
            self.fault(
                node.span.start,
                "keys of a column are wanted".into(),
                "- column: A",
            )
        })?;
        let mut out = Stated {
            column: None,
            heading: None,
            target: Target::Note,
            unit: None,
        };
        for entry in entries.iter().filter(|e| !e.key.text.starts_with("x-")) {
            match entry.key.text.trim() {
                "column" => {
                    let text = self.text(entry)?;
                    let column = column_of(text);
                    out.column = Some(column.ok_or_else(|| {
                        self.fault(
                            entry.value.span.start,
                            format!("\"{text}\" is no column"),
                            "column: A",
                        )
                    })?);
                }
                "heading" => out.heading = Some(self.text(entry)?.to_owned()),
                "samples" => {}
                "is" => {
                    let text = self.text(entry)?;
                    out.target = Target::of(makes, text)
                        .ok_or_else(|| self.no_target(entry, text, makes))?;
                }
                "unit" => {
                    let text = self.text(entry)?;
                    let kinds = out.target.kinds();
                    let found = unit(text, kinds).ok_or_else(|| {
                        self.fault(
                            entry.value.span.start,
                            format!("\"{text}\" is no unit"),
                            "unit: L",
                        )
                    })?;
                    out.unit = Some((found, text.to_owned()));
                }
                other => return Err(self.unknown(entry, other, COLUMN_KEYS)),
            }
        }
        // The unit may stand before what the column is.
        if let Some((_, text)) = out.unit.take() {
            out.unit = unit(&text, out.target.kinds()).map(|u| (u, text));
        }
        Ok(out)
    }

    fn no_target(&self, entry: &Entry, text: &str, makes: Makes) -> Fault {
        let keys = match makes {
            Makes::Site => &crate::input::keys::machine::MACHINE,
            Makes::Oils => &crate::input::keys::oil::OIL,
        };
        let names = keys
            .all()
            .map(|k| k.name)
            .chain(OTHERS.iter().map(|o| o.0))
            .chain(["tag"]);
        let meant = suggest::certain(text, names);
        let write = meant.map_or_else(
            || "is: note     keeps it as a note; filmwright help keys lists the keys".into(),
            |m| format!("is: {m}"),
        );
        self.fault(
            entry.value.span.start,
            format!("\"{text}\" is nothing a column can hold"),
            &write,
        )
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
