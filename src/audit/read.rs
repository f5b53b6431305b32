//! A laboratory's table into bottles: every row kept, every cell either understood or named.

mod alike;
mod cell;
mod day;
mod headings;

use super::bottle::{Bottle, Code as Cleanliness, Figures};
use crate::model::sample::{Column, DateOrder, Reading, SampleMap};
use crate::problem::{Code, Problem, Severity, Write};
use crate::source::place::{Cell, FileId};
use crate::table::{Content, Row, Sheet};
use cell::Read;
use day::Day;
use headings::{About, Headings};

/// A table read.
#[derive(Clone, Debug, Default)]
pub struct TableRead {
    /// Its bottles, in the order of rows.
    pub bottles: Vec<Bottle>,
    /// Headings of columns that are not read.
    pub unused: Vec<String>,
    /// What is wrong with it.
    pub problems: Vec<Problem>,
}

/// Reads a sheet by its map; by its headings alone where there is none.
pub fn read(map: Option<&SampleMap>, sheet: &Sheet, name: &str, file: FileId) -> TableRead {
    let about = About {
        name,
        sheet,
        place: Cell {
            file,
            sheet: sheet.name.clone(),
            row: 1,
            column: 1,
        },
    };
    let mut problems = Vec::new();
    let Some(headings) = headings::find(map, &about, &mut problems) else {
        return TableRead {
            problems,
            ..TableRead::default()
        };
    };
    let mut reading = TableReader {
        map,
        about: &about,
        headings: &headings,
        problems,
    };
    let below = sheet.rows.iter().filter(|r| r.number > headings.row);
    let bottles: Vec<Bottle> = below.filter_map(|row| reading.row(row)).collect();
    reading.exchanged(&bottles);
    TableRead {
        bottles,
        unused: headings.unused.clone(),
        problems: alike::told_once(reading.problems),
    }
}

/// The reading of one table.
struct TableReader<'a> {
    map: Option<&'a SampleMap>,
    about: &'a About<'a>,
    headings: &'a Headings,
    problems: Vec<Problem>,
}

/// A cell that was not read, with its problem.
struct Misfit {
    column: u32,
    problem: Option<Problem>,
    /// Whether it speaks for cells that stand under other headings.
    elsewhere: bool,
}

impl TableReader<'_> {
    fn row(&mut self, row: &Row) -> Option<Bottle> {
        let at = |column: u32| row.at(column);
        if !self.headings.columns.iter().any(|(c, ..)| at(*c).is_some()) {
            return None;
        }
        let mut bottle = self.empty(row);
        let mut misfits: Vec<Misfit> = Vec::new();
        for (column, what, how) in &self.headings.columns {
            let content = at(*column);
            match (what, how) {
                (Column::InUse(reading), Some(how)) => {
                    let read = cell::read(content, *how, *column);
                    self.figure(
                        read,
                        *reading,
                        *column,
                        content,
                        &mut bottle.figures,
                        &mut misfits,
                    );
                }
                (Column::New(reading), Some(how)) => {
                    let read = cell::read(content, *how, *column);
                    self.figure(
                        read,
                        *reading,
                        *column,
                        content,
                        &mut bottle.new,
                        &mut misfits,
                    );
                }
                _ => self.text(*what, *column, content, &mut bottle, &mut misfits),
            }
        }
        Self::counts(&mut bottle);
        let beyond = row.cells.iter().find(|c| c.column > self.headings.last);
        let elsewhere = misfits.iter().filter(|m| m.elsewhere).count();
        if beyond.is_some() || elsewhere >= 2 {
            let column =
                beyond.map_or_else(|| misfits.first().map_or(1, |m| m.column), |c| c.column);
            self.shifted(row, column, beyond.is_some(), &mut bottle);
            return Some(bottle);
        }
        for misfit in misfits {
            let text = at(misfit.column).map(Content::text).unwrap_or_default();
            let heading = self.headings.text_of(misfit.column).to_owned();
            bottle.unread.push((heading, text));
            self.problems.extend(misfit.problem.map(|mut p| {
                p.place = self.about.at(row.number, misfit.column);
                p.within(Self::within(&bottle))
            }));
        }
        Some(bottle)
    }

    fn within(bottle: &Bottle) -> String {
        let about = if bottle.machine.is_empty() {
            String::new()
        } else {
            format!(", {}", bottle.machine)
        };
        format!("row {}{about}", bottle.place.row)
    }

    fn empty(&self, row: &Row) -> Bottle {
        let machine = self
            .headings
            .columns
            .iter()
            .find(|(_, c, _)| *c == Column::Machine);
        Bottle {
            number: None,
            machine: String::new(),
            label: None,
            drawn: None,
            drawn_written: String::new(),
            figures: Figures::default(),
            new: Figures::default(),
            cleanliness: None,
            flags: None,
            unread: Vec::new(),
            shifted: false,
            place: Cell {
                row: row.number,
                column: machine.map_or(1, |(c, ..)| *c),
                ..self.about.place.clone()
            },
        }
    }

    #[expect(
        clippy::too_many_lines,
        reason = "one arm for each thing a cell may be"
    )]
    fn figure(
        &self,
        read: Read,
        reading: Reading,
        column: u32,
        content: Option<&Content>,
        into: &mut Figures,
        misfits: &mut Vec<Misfit>,
    ) {
        let written = content.map(Content::text).unwrap_or_default();
        let written = written.trim();
        let problem = |code, message: String| Problem::new(code, message, self.about.at(1, column));
        let comma = self.map.is_some_and(|m| m.decimal_comma);
        let (problem, elsewhere) = match read {
            Read::Nothing => return,
            Read::Figure(figure) => {
                into.put(reading, figure);
                return;
            }
            Read::Placeholder => (
                problem(
                    Code::CellPlaceholder,
                    format!(
                        "{written} for {} stands for nothing in many tables",
                        reading.says()
                    ),
                )
                .so("taken as not known")
                .ask("the laboratory whether it was measured"),
                false,
            ),
            Read::OtherDecimal => {
                let (sign, other) = if comma {
                    ("point", "decimal: point")
                } else {
                    ("comma", "decimal: comma")
                };
                (
                    problem(Code::CellUnread, format!("{written} has a decimal {sign}"))
                        .so("taken as not known")
                        .write(Write::words(format!(
                            "{other} in the samples file, if the whole table is written so"
                        ))),
                    false,
                )
            }
            Read::OtherUnit(unit) => {
                let units = reading.kind().spec().units.iter();
                let listed: Vec<&str> = units.map(|u| u.name).filter(|n| !n.is_empty()).collect();
                (
                    problem(
                        Code::CellUnread,
                        format!("{} is not given in \"{unit}\"", reading.says()),
                    )
                    .so("taken as not known")
                    .why(format!("units understood: {}", listed.join(", "))),
                    listed.is_empty(),
                )
            }
            Read::Impossible => (
                problem(
                    Code::CellUnread,
                    format!("{written} is no {} an oil can have", reading.says()),
                )
                .so("taken as not known")
                .ask("the laboratory for the figure and its unit"),
                true,
            ),
            Read::NoValue => (
                problem(
                    Code::CellWithoutValue,
                    format!("the formula {written} has no value stored"),
                )
                .so("taken as not known")
                .write(Write::words(
                    "open the table in a spreadsheet program and save it, or put the value in",
                )),
                false,
            ),
            Read::IsDate => (
                problem(
                    Code::CellUnread,
                    format!("{written} is a date where {} belongs", reading.says()),
                )
                .so("taken as not known"),
                true,
            ),
            Read::NotUnderstood => (
                problem(
                    Code::CellUnread,
                    format!("\"{written}\" is not understood as {}", reading.says()),
                )
                .so("taken as not known and kept as a remark"),
                true,
            ),
        };
        misfits.push(Misfit {
            column,
            problem: Some(problem),
            elsewhere,
        });
    }

    fn text(
        &self,
        what: Column,
        column: u32,
        content: Option<&Content>,
        bottle: &mut Bottle,
        misfits: &mut Vec<Misfit>,
    ) {
        let text = content.map(Content::text).unwrap_or_default();
        let text = text.trim();
        let some = || (!text.is_empty() && text != "-").then(|| text.to_owned());
        if let Some(Content::NoValue { .. }) = content {
            misfits.push(Misfit {
                column,
                problem: Some(
                    Problem::new(
                        Code::CellWithoutValue,
                        format!("the formula {text} has no value stored"),
                        self.about.at(1, column),
                    )
                    .so("taken as not known"),
                ),
                elsewhere: false,
            });
            return;
        }
        match what {
            Column::Bottle => bottle.number = some(),
            Column::Machine => text.clone_into(&mut bottle.machine),
            Column::Label => bottle.label = some(),
            Column::Flags => bottle.flags = some(),
            Column::Drawn => self.day(column, content, bottle, misfits),
            Column::Iso4406 if some().is_none() => {}
            Column::Iso4406 => match Cleanliness::read(text) {
                Some(code) => bottle.cleanliness = Some((code, false)),
                None if cell_says_nothing(text) => {}
                None => misfits.push(Misfit {
                    column,
                    problem: Some(
                        Problem::new(
                            Code::CellUnread,
                            format!("\"{text}\" is no cleanliness code as 18/16/13"),
                            self.about.at(1, column),
                        )
                        .so("taken as not known and kept as a remark"),
                    ),
                    elsewhere: true,
                }),
            },
            Column::InUse(_) | Column::New(_) => {}
        }
    }

    fn day(
        &self,
        column: u32,
        content: Option<&Content>,
        bottle: &mut Bottle,
        misfits: &mut Vec<Misfit>,
    ) {
        let text = content.map(Content::text).unwrap_or_default();
        text.trim().clone_into(&mut bottle.drawn_written);
        let order = self.map.and_then(|m| m.dates);
        let place = self.about.at(1, column);
        let problem = match day::read(content, order) {
            Day::Is(day) => {
                bottle.drawn = Some(day);
                return;
            }
            Day::Nothing | Day::NoValue => return,
            Day::OtherOrder => {
                let stated = order.unwrap_or_default();
                let word = DateOrder::WRITTEN.iter().find(|(_, o)| *o == stated);
                let word = word.map_or("", |(w, _)| w);
                let mut problem = Problem::new(
                    Code::DateMixed,
                    format!("the date {} is in another order than {word}", text.trim()),
                    place,
                )
                .so("the day is not known; dates that fit both orders are read as stated");
                problem = if order.is_none() {
                    problem.write(Write::words(
                        "dates: day-month-year in the samples file, or month-day-year",
                    ))
                } else {
                    problem
                        .why("one table holds dates of two orders")
                        .write(Write::words(
                            "one order in the whole table, best year-month-day",
                        ))
                };
                (problem, false)
            }
            Day::No => (
                Problem::new(
                    Code::CellUnread,
                    format!("\"{}\" is not understood as a day", text.trim()),
                    place,
                )
                .so("the day is not known")
                .write(Write::words("a year of four figures, as 2026-07-18")),
                !day::looks_like_one(text.trim()),
            ),
        };
        misfits.push(Misfit {
            column,
            problem: Some(problem.0),
            elsewhere: problem.1,
        });
    }

    /// A code from counts where none is given.
    fn counts(bottle: &mut Bottle) {
        if bottle.cleanliness.is_none() {
            let count = |r| bottle.figures.exact(r);
            let counts = [Reading::Count4, Reading::Count6, Reading::Count14].map(count);
            bottle.cleanliness = Cleanliness::of_counts(counts).map(|c| (c, true));
        }
    }

    /// A row whose cells stand under other headings: kept, none of its figures used.
    fn shifted(&mut self, row: &Row, column: u32, beyond: bool, bottle: &mut Bottle) {
        bottle.shifted = true;
        bottle.figures = Figures::default();
        bottle.new = Figures::default();
        bottle.cleanliness = None;
        bottle.drawn = None;
        bottle.unread = row
            .cells
            .iter()
            .map(|c| (self.headings.text_of(c.column).to_owned(), c.content.text()))
            .collect();
        let why = if beyond {
            "the row has more cells than there are headings"
        } else {
            "several cells do not fit what stands above them"
        };
        let problem = Problem::new(
            Code::RowShifted,
            "the cells of this row stand under other headings",
            self.about.at(row.number, column),
        )
        .within(Self::within(bottle))
        .why(why)
        .so("the row is listed, none of its figures is used")
        .write(Write::words(
            "quotation marks round a cell that holds the delimiter, or the missing cell",
        ));
        self.problems.push(problem);
    }

    /// Both viscosities exchanged in most rows: two columns under each other's heading.
    fn exchanged(&mut self, bottles: &[Bottle]) {
        let pairs = bottles.iter().filter_map(|b| {
            let both = (
                b.figures.exact(Reading::Nu40)?,
                b.figures.exact(Reading::Nu100)?,
            );
            Some((b, both))
        });
        let all: Vec<_> = pairs.collect();
        let wrong: Vec<_> = all
            .iter()
            .filter(|(_, (nu40, nu100))| nu100 >= nu40)
            .collect();
        if wrong.len() < 2 || wrong.len() * 2 < all.len() {
            return;
        }
        let first = wrong[0].0;
        let mut problem = Problem::new(
            Code::CurveUpsideDown,
            format!(
                "viscosity rises with temperature in {} of {} rows",
                wrong.len(),
                all.len()
            ),
            self.about.at(first.place.row, first.place.column),
        )
        .why("the columns of 40 and 100 degC look exchanged")
        .write(Write::words(
            "nu40 and nu100 the other way round in `columns`",
        ));
        problem.severity = Severity::Warning;
        self.problems.push(problem);
    }
}

/// Whether a cell of text says that nothing was measured.
fn cell_says_nothing(text: &str) -> bool {
    let how = cell::How {
        reading: Reading::Water,
        unit: &crate::quantity::Kind::Ratio.spec().units[0],
        decimal_comma: false,
    };
    cell::read(Some(&Content::Text(text.to_owned())), how, 1) == Read::Nothing
}
