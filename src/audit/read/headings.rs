//! Which column of a table holds what.

use super::cell::How;
use crate::model::sample::{Column, SampleMap};
use crate::problem::{Code, Problem, Write, suggest};
use crate::source::Place;
use crate::source::place::Cell;
use crate::table::{Row, Sheet};
use known::{faintly_known, known, parted};

mod known;

/// Rows looked at for the headings.
const LOOKED_AT: usize = 30;

/// The columns of a table.
pub(super) struct Headings {
    /// Row of the headings.
    pub(super) row: u32,
    /// Last column with a heading.
    pub(super) last: u32,
    /// Columns of text, and of figures with how they are read.
    pub(super) columns: Vec<(u32, Column, Option<How>)>,
    /// Headings of columns that are not read.
    pub(super) unused: Vec<String>,
    /// Every heading by its column.
    pub(super) all: Vec<(u32, String)>,
}

impl Headings {
    pub(super) fn text_of(&self, column: u32) -> &str {
        let found = self.all.iter().find(|(c, _)| *c == column);
        found.map_or("", |(_, h)| h.as_str())
    }
}

/// What the problems of a table are told with.
pub(super) struct About<'a> {
    pub(super) name: &'a str,
    pub(super) sheet: &'a Sheet,
    pub(super) place: Cell,
}

impl About<'_> {
    pub(super) fn at(&self, row: u32, column: u32) -> Place {
        Place::Cell(Cell {
            row,
            column,
            ..self.place.clone()
        })
    }
}

/// Finds the headings; every problem with them is told.
pub(super) fn find(
    map: Option<&SampleMap>,
    about: &About<'_>,
    told: &mut Vec<Problem>,
) -> Option<Headings> {
    let named = map.map_or(&[][..], |m| &m.columns);
    let hits = |row: &Row| {
        let texts = row.cells.iter().map(|c| c.content.text());
        let hit = |t: &String| {
            named.iter().any(|(_, h)| same(t, &h.value))
                || known(t).or_else(|| faintly_known(t)).is_some()
        };
        texts.filter(hit).count()
    };
    let rows = about.sheet.rows.iter().take(LOOKED_AT);
    let best = rows.map(|r| (hits(r), r)).filter(|(n, _)| *n >= 2).fold(
        None::<(usize, &Row)>,
        |best, (n, row)| match best {
            Some((most, _)) if most >= n => best,
            _ => Some((n, row)),
        },
    );
    let Some((_, row)) = best else {
        told.push(no_headings(about));
        return None;
    };
    let all: Vec<(u32, String)> = row
        .cells
        .iter()
        .map(|c| (c.column, c.content.text().trim().to_owned()))
        .collect();
    let before = told.len();
    let columns = columns(map, &all, row.number, about, told);
    if told.len() > before {
        return None;
    }
    let unused = all
        .iter()
        .filter(|(c, h)| !h.is_empty() && !columns.iter().any(|(k, ..)| k == c))
        .map(|(_, h)| h.clone())
        .collect();
    Some(Headings {
        row: row.number,
        last: all.last().map_or(0, |(c, _)| *c),
        columns,
        unused,
        all,
    })
}

fn same(a: &str, b: &str) -> bool {
    let squeezed = |t: &str| {
        t.split_whitespace()
            .collect::<Vec<_>>()
            .join(" ")
            .to_lowercase()
    };
    a == b || squeezed(a) == squeezed(b)
}

fn columns(
    map: Option<&SampleMap>,
    all: &[(u32, String)],
    row: u32,
    about: &About<'_>,
    told: &mut Vec<Problem>,
) -> Vec<(u32, Column, Option<How>)> {
    let named = map.map_or(&[][..], |m| &m.columns);
    let mut found: Vec<(u32, Column, Option<How>)> = Vec::new();
    for (column, heading) in named {
        let at: Vec<&(u32, String)> = all
            .iter()
            .filter(|(_, h)| same(h, &heading.value))
            .collect();
        match at.as_slice() {
            [] => told.push(missing(*column, heading, all, about)),
            [(at, text)] => found.push((*at, *column, how(map, *column, text))),
            [_, (second, text), ..] => told.push(twice(text, row, *second, about)),
        }
    }
    for (at, heading) in all {
        let Some(column) = known(heading) else {
            continue;
        };
        if found.iter().any(|(c, ..)| c == at) || named.iter().any(|(c, _)| *c == column) {
            continue;
        }
        if found.iter().any(|(_, c, _)| *c == column) {
            told.push(twice(heading, row, *at, about));
            continue;
        }
        found.push((*at, column, how(map, column, heading)));
    }
    // a heading that may as well mean something else counts where none says it better
    for (at, heading) in all {
        let Some(column) = faintly_known(heading) else {
            continue;
        };
        if !found
            .iter()
            .any(|(c, other, _)| c == at || *other == column)
        {
            found.push((*at, column, how(map, column, heading)));
        }
    }
    let has = |column| found.iter().any(|(_, c, _)| *c == column);
    if told.is_empty() && !has(Column::Machine) && !has(Column::Label) {
        told.push(
            Problem::new(
                Code::ColumnMissing,
                format!(
                    "{}: no column says which machine a sample is from",
                    about.name
                ),
                about.at(row, 1),
            )
            .write(Write::words(
                "columns: { machine: HEADING } in the samples file",
            )),
        );
    }
    found.sort_by_key(|(at, ..)| *at);
    found
}

/// How a column of figures is read.
fn how(map: Option<&SampleMap>, column: Column, heading: &str) -> Option<How> {
    let (Column::InUse(reading) | Column::New(reading)) = column else {
        return None;
    };
    let stated = map.and_then(|m| m.units.iter().find(|(r, _)| *r == reading));
    let kind = reading.kind();
    let by_heading = || {
        let unit = parted(heading).1.filter(|u| !u.is_empty())?;
        kind.unit(unit)
    };
    let unit = match stated {
        Some((_, name)) => kind.unit(name),
        None => by_heading().or_else(|| kind.unit(reading.unit())),
    };
    Some(How {
        reading,
        unit: unit.or_else(|| kind.spec().units.first())?,
        decimal_comma: map.is_some_and(|m| m.decimal_comma),
    })
}

fn missing(
    column: Column,
    heading: &crate::source::place::Given<String>,
    all: &[(u32, String)],
    about: &About<'_>,
) -> Problem {
    let names = all.iter().map(|(_, h)| h.as_str());
    let meant = suggest::certain(&heading.value, names.clone());
    let listed: Vec<&str> = names.filter(|h| !h.is_empty()).take(12).collect();
    let mut problem = Problem::new(
        Code::ColumnMissing,
        format!(
            "{} has no column \"{}\", wanted for `{}`",
            about.name,
            heading.value,
            column.name()
        ),
        heading.origin.place.clone(),
    )
    .why(format!("its headings: {}", listed.join(", ")));
    problem.did_you_mean = meant.map(str::to_owned);
    match (&heading.origin.place, meant) {
        (Place::Text(span), Some(meant)) => problem.write(Write::edit(*span, meant)),
        _ => problem.write(Write::words("the heading as it stands in the table")),
    }
}

fn twice(heading: &str, row: u32, column: u32, about: &About<'_>) -> Problem {
    Problem::new(
        Code::ColumnTwice,
        format!("{}: two columns could be \"{heading}\"", about.name),
        about.at(row, column),
    )
    .why("nobody could tell which of the two counts")
    .write(Write::words(
        "another heading for one of them in the table, or its own heading in the map",
    ))
}

/// No row of headings: most often another delimiter than the file has.
fn no_headings(about: &About<'_>) -> Problem {
    let first = about.sheet.rows.first();
    let text = first
        .and_then(|r| r.cells.first())
        .map(|c| c.content.text());
    let text = text.unwrap_or_default();
    let marks = [
        (';', "semicolon"),
        ('\t', "tab"),
        (',', "comma"),
        ('|', "stroke"),
    ];
    let inside = marks.iter().max_by_key(|(m, _)| text.matches(*m).count());
    let inside = inside.filter(|(m, _)| text.matches(*m).count() >= 2);
    let row = first.map_or(1, |r| r.number);
    let problem = Problem::new(
        Code::ColumnsUnknown,
        format!("{}: no row of headings found", about.name),
        about.at(row, 1),
    );
    match inside {
        Some((mark, word)) => {
            let n = text.matches(*mark).count();
            problem
                .why(format!("the first cell holds {n} of the sign {word}: its cells are parted by another delimiter than stated"))
                .write(Write::words(format!("delimiter: {word} in the samples file, or leave it out")))
        }
        None => problem
            .why("a row with two headings that the map names, or that are named as the keys are, is wanted within the first 30 rows")
            .write(Write::words("columns: { machine: HEADING, drawn: HEADING, nu40: HEADING … } in the samples file")),
    }
}
