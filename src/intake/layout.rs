//! Where a table stands in a file: its sheet, its headings, its columns.

use super::finding::letters;
use super::headings::{Guess, apart, guess};
use super::number::{Decimal, evidence, split};
use super::target::{Makes, Target};
use super::units::{Unit, unit};
use crate::table::{Book, Content, Sheet};
use std::collections::BTreeMap;

/// Rows looked at for headings.
const LOOKED_AT: u32 = 40;
/// Sample values a column is shown with.
const SAMPLES: usize = 3;

/// A column of the table.
#[derive(Clone, Debug)]
pub struct Column {
    /// Its number, counted from one.
    pub number: u32,
    /// Its heading as written.
    pub heading: String,
    /// What it holds.
    pub target: Target,
    /// How sure the guess is: 3 certain, 0 none; 4 where it is stated.
    pub sure: u8,
    /// The unit of its numbers.
    pub unit: Option<Unit>,
    /// The unit as written in the heading or below it.
    pub unit_written: Option<String>,
    /// Its first values.
    pub samples: Vec<String>,
    /// Whether it is hidden.
    pub hidden: bool,
}

/// A table found.
#[derive(Clone, Debug)]
pub struct Layout {
    /// The sheet, by its place in the book.
    pub sheet: usize,
    /// What the table lists.
    pub makes: Makes,
    /// Row of the headings.
    pub heading_row: u32,
    /// Row of units below them.
    pub unit_row: Option<u32>,
    /// Its columns.
    pub columns: Vec<Column>,
}

/// Why no table was found.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum NoTable {
    /// No row of headings.
    #[error("no row of headings was found in the first {LOOKED_AT} rows of {0}")]
    Headings(String),
    /// The row stated holds nothing.
    #[error("row {0} holds no headings")]
    Row(u32),
}

/// What is stated of the place of a table.
#[derive(Clone, Copy, Debug, Default)]
pub struct Where {
    /// What it lists.
    pub makes: Option<Makes>,
    /// Row of headings.
    pub heading_row: Option<u32>,
}

/// Finds the table of a book.
///
/// # Errors
/// [`NoTable`] where nothing looks like headings.
pub fn find(book: &Book, stated: Where) -> Result<Layout, NoTable> {
    let makes = stated
        .makes
        .map_or(vec![Makes::Site, Makes::Oils], |m| vec![m]);
    let mut best: Option<(u32, Layout)> = None;
    for (i, sheet) in book.sheets.iter().enumerate() {
        if !sheet.read || (sheet.hidden && book.sheets.iter().any(|s| s.read && !s.hidden)) {
            continue;
        }
        for makes in &makes {
            if let Some((score, row)) = headings(sheet, *makes, stated.heading_row)
                && best.as_ref().is_none_or(|(s, _)| score > *s)
            {
                best = Some((score, of_row(sheet, i, *makes, row)));
            }
        }
    }
    best.map(|(_, layout)| layout)
        .ok_or_else(|| match stated.heading_row {
            Some(row) => NoTable::Row(row),
            None => NoTable::Headings(names(book)),
        })
}

fn names(book: &Book) -> String {
    let read: Vec<&str> = book
        .sheets
        .iter()
        .filter(|s| s.read)
        .map(|s| s.name.as_str())
        .collect();
    match read.as_slice() {
        [""] | [] => "the file".into(),
        [one] => format!("sheet \"{one}\""),
        many => format!("the sheets {}", many.join(", ")),
    }
}

/// The row that looks most like headings, with how much.
fn headings(sheet: &Sheet, makes: Makes, stated: Option<u32>) -> Option<(u32, u32)> {
    let mut best: Option<(u32, u32)> = None;
    let first = sheet.rows.first().map_or(1, |r| r.number);
    let looked_at = |row: u32| stated.map_or(row < first + LOOKED_AT, |s| s == row);
    for row in sheet.rows.iter().filter(|r| looked_at(r.number)) {
        let mut sum = 0;
        let mut known: BTreeMap<String, u8> = BTreeMap::new();
        for cell in &row.cells {
            let Content::Text(text) = &cell.content else {
                continue;
            };
            if let Some(g) = guess(makes, &apart(text), &[]) {
                let one = known.entry(g.target.word()).or_insert(0);
                *one = (*one).max(g.sure);
            }
        }
        for (word, sure) in &known {
            let weight = match word.as_str() {
                "path" | "as written" | "file kind" => 100,
                "tag" => 2,
                _ => 1,
            };
            sum += u32::from(*sure) * weight;
        }
        let enough = stated.is_some() || known.values().filter(|s| **s >= 2).count() >= 2;
        if enough && best.is_none_or(|(s, _)| sum > s) {
            best = Some((sum, row.number));
        }
    }
    best
}

fn of_row(sheet: &Sheet, index: usize, makes: Makes, heading_row: u32) -> Layout {
    let unit_row = sheet
        .rows
        .iter()
        .find(|r| r.number > heading_row)
        .filter(|r| is_units(&r.cells.iter().map(|c| c.content.text()).collect::<Vec<_>>()))
        .map(|r| r.number);
    let below = unit_row.unwrap_or(heading_row);
    let width = sheet.width();
    let filled = filled(sheet, below, width);
    let mut columns: Vec<Column> = (1..=width)
        .filter(|n| sheet.at(heading_row, *n).is_some() || filled.contains_key(n))
        .map(|n| column(sheet, makes, (heading_row, unit_row), n, filled.get(&n)))
        .collect();
    once(&mut columns, makes);
    Layout {
        sheet: index,
        makes,
        heading_row,
        unit_row,
        columns,
    }
}

/// A row of units: short texts, most of which are units.
fn is_units(texts: &[String]) -> bool {
    let known = |t: &&String| {
        let bare = t.trim().trim_matches(['(', ')', '[', ']']).trim();
        unit(bare, &[]).is_some()
    };
    let n = texts.iter().filter(known).count();
    n >= 2 && n * 2 > texts.len()
}

/// The first values of each column below a row.
fn filled(sheet: &Sheet, below: u32, width: u32) -> BTreeMap<u32, Vec<String>> {
    let mut found: BTreeMap<u32, Vec<String>> = BTreeMap::new();
    for row in sheet.rows.iter().filter(|r| r.number > below).take(2000) {
        for cell in row.cells.iter().filter(|c| c.column <= width) {
            let samples = found.entry(cell.column).or_default();
            let text = cell.content.text();
            if samples.len() < SAMPLES && !samples.contains(&text) {
                samples.push(text);
            }
        }
    }
    found
}

fn column(
    sheet: &Sheet,
    makes: Makes,
    (heading_row, unit_row): (u32, Option<u32>),
    number: u32,
    samples: Option<&Vec<String>>,
) -> Column {
    let heading = sheet
        .at(heading_row, number)
        .map(Content::text)
        .unwrap_or_default();
    let samples = samples.cloned().unwrap_or_default();
    let parts = apart(&heading);
    let guess = guess(makes, &parts, &samples).unwrap_or(Guess {
        target: Target::Note,
        sure: 0,
    });
    let below = unit_row
        .and_then(|row| sheet.at(row, number))
        .map(Content::text);
    let bare = below
        .as_deref()
        .map(|t| t.trim().trim_matches(['(', ')', '[', ']']).trim());
    let kinds = guess.target.kinds();
    let found = bare.and_then(|t| unit(t, kinds)).or_else(|| {
        let again = parts.unit_written.as_deref().and_then(|t| unit(t, kinds));
        again.or(parts.unit)
    });
    let unit_written = bare.map(str::to_owned).or(parts.unit_written);
    Column {
        number,
        heading: heading.split_whitespace().collect::<Vec<_>>().join(" "),
        target: guess.target,
        sure: guess.sure,
        unit_written: unit_written.filter(|_| found.is_some()),
        unit: found,
        samples,
        hidden: sheet.hidden_columns.contains(&number),
    }
}

/// A key is held by one column: the surest, then the first; the others become notes.
fn once(columns: &mut [Column], makes: Makes) {
    let several =
        |t: &Target| matches!(t, Target::Note | Target::Skip) || t.word() == "rolling bearing";
    let mut holder: BTreeMap<String, usize> = BTreeMap::new();
    for i in 0..columns.len() {
        if several(&columns[i].target) {
            continue;
        }
        match holder.get(&columns[i].target.word()).copied() {
            Some(held) if columns[i].sure > columns[held].sure => {
                columns[held].target = Target::Note;
                columns[held].sure = 0;
                holder.insert(columns[i].target.word(), i);
            }
            Some(_) => {
                columns[i].target = Target::Note;
                columns[i].sure = 0;
            }
            None => {
                holder.insert(columns[i].target.word(), i);
            }
        }
    }
    let long = holder.contains_key("path");
    if !holder.contains_key("tag") && !long {
        let standing_in = ["row number", "name"].iter().find_map(|w| holder.get(*w));
        // An oil list may have names alone: they are then its ids as well.
        if let Some(i) = standing_in.filter(|_| makes == Makes::Site) {
            columns[*i].target = Target::Name;
        }
    }
}

/// The rule of decimals of a table, and the cell that shows it.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Decimals {
    /// The user states it.
    Stated(Decimal),
    /// A cell can only be read this way.
    Found {
        /// The rule.
        rule: Decimal,
        /// The cell.
        cell: String,
        /// What stands in it.
        text: String,
        /// How many cells show it.
        cells: usize,
    },
    /// Cells contradict each other; each is read by itself.
    Mixed {
        /// A cell with a decimal point.
        point: String,
        /// A cell with a decimal comma.
        comma: String,
    },
    /// No cell shows it.
    Nothing,
}

impl Decimals {
    /// The rule, where there is one.
    pub fn rule(&self) -> Option<Decimal> {
        match self {
            Self::Stated(rule) | Self::Found { rule, .. } => Some(*rule),
            Self::Mixed { .. } | Self::Nothing => None,
        }
    }

    /// In words.
    pub fn says(&self) -> String {
        match self {
            Self::Stated(rule) => format!("decimal {}, as stated", rule.word()),
            Self::Found {
                rule,
                cell,
                text,
                cells,
            } => {
                let n = if *cells == 1 {
                    "1 cell".into()
                } else {
                    format!("{cells} cells")
                };
                format!(
                    "decimal {}, found from {n}, the first {cell} \"{text}\"",
                    rule.word()
                )
            }
            Self::Mixed { point, comma } => {
                format!(
                    "decimal point and comma both occur ({point}, {comma}); numbers either rule can read are asked about"
                )
            }
            Self::Nothing => "no cell tells decimal point from comma".into(),
        }
    }
}

/// Finds the rule of decimals from the texts of the columns that hold quantities.
pub fn decimals(sheet: &Sheet, layout: &Layout) -> Decimals {
    let below = layout.unit_row.unwrap_or(layout.heading_row);
    let mut found: BTreeMap<&'static str, (Decimal, String, String, usize)> = BTreeMap::new();
    for column in layout
        .columns
        .iter()
        .filter(|c| !c.target.kinds().is_empty())
    {
        for row in sheet.rows.iter().filter(|r| r.number > below) {
            let Some(Content::Text(text)) = row.at(column.number) else {
                continue;
            };
            let Some(parsed) = super::parsed::parse(text, column.target.kinds()) else {
                continue;
            };
            for token in std::iter::once(&parsed.number).chain(&parsed.second) {
                if let Some(rule) = evidence(token).filter(|_| split(token).is_some()) {
                    let cell = format!("{}{}", letters(column.number), row.number);
                    let entry =
                        found
                            .entry(rule.word())
                            .or_insert((rule, cell.clone(), text.clone(), 0));
                    entry.3 += 1;
                    // The first cell in the order of rows is the one shown.
                    let earlier = row_of(&entry.1) > row.number;
                    if earlier {
                        entry.1 = cell;
                        entry.2.clone_from(text);
                    }
                }
            }
        }
    }
    match (found.get("point"), found.get("comma")) {
        (Some(p), Some(c)) => Decimals::Mixed {
            point: format!("{} \"{}\"", p.1, p.2),
            comma: format!("{} \"{}\"", c.1, c.2),
        },
        (Some((rule, cell, text, cells)), None) | (None, Some((rule, cell, text, cells))) => {
            Decimals::Found {
                rule: *rule,
                cell: cell.clone(),
                text: text.clone(),
                cells: *cells,
            }
        }
        (None, None) => Decimals::Nothing,
    }
}

fn row_of(cell: &str) -> u32 {
    cell.trim_start_matches(|c: char| c.is_ascii_alphabetic())
        .parse()
        .unwrap_or(0)
}
