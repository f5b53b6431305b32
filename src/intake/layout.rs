//! Where a table stands in a file: its sheet, its headings, its columns.

use super::headings::{Guess, apart, guess};
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
    /// The heading of the column that already holds what this one seems to hold.
    pub twice: Option<String>,
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
        twice: None,
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
                columns[held].twice = Some(columns[i].heading.clone());
                columns[held].target = Target::Note;
                columns[held].sure = 0;
                holder.insert(columns[i].target.word(), i);
            }
            Some(held) => {
                columns[i].twice = Some(columns[held].heading.clone());
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
