//! Why a file cannot be read as a table.

use super::limits::Limit;
use crate::problem::{Code, Problem, Write};
use crate::source::Place;

/// Why a file cannot be read as a table.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Fault {
    /// Nothing in it.
    Empty,
    /// The binary workbook of before 2007, or one protected by a password.
    OldBinary,
    /// Protected by a password.
    Protected,
    /// Of no form that is read.
    NoTable,
    /// Damaged.
    Damaged {
        /// The part of the workbook, or what of it.
        part: String,
        /// What is wrong with it.
        why: String,
    },
    /// Larger than is read.
    TooLarge {
        /// The limit passed.
        limit: Limit,
        /// The sheet and row reached, where that is known.
        at: Option<(String, u32)>,
    },
    /// No sheet of the name asked for.
    NoSheet {
        /// The name asked for.
        asked: String,
        /// The names there are.
        there: Vec<String>,
    },
    /// An encoding nobody knows.
    NoEncoding {
        /// As stated.
        stated: String,
    },
    /// Bytes that are no text in the encoding.
    NotText {
        /// The encoding's name.
        encoding: &'static str,
    },
}

impl Fault {
    pub(super) fn too_large(limit: Limit) -> Self {
        Self::TooLarge { limit, at: None }
    }

    pub(super) fn damaged(part: &str, why: impl ToString) -> Self {
        Self::Damaged {
            part: part.to_owned(),
            why: why.to_string(),
        }
    }

    /// The problem to tell, at the place of the file.
    pub fn problem(&self, name: &str, place: Place) -> Problem {
        match self {
            Self::Empty => Problem::new(Code::TableEmpty, format!("{name} holds nothing"), place)
                .write(Write::words(
                    "a file with a row of headings and rows below it",
                )),
            Self::OldBinary => Problem::new(
                Code::TableKind,
                format!("{name} is an old binary workbook, or one with a password"),
                place,
            )
            .write(Write::words(
                "open it and save it as xlsx, ods or CSV, without a password",
            )),
            Self::Protected => Problem::new(
                Code::TableKind,
                format!("{name} is protected by a password"),
                place,
            )
            .write(Write::words("open it and save it without a password")),
            Self::NoTable => Problem::new(
                Code::TableKind,
                format!("{name} is neither a workbook nor a text table"),
                place,
            )
            .write(Write::words("xlsx, ods or CSV")),
            Self::Damaged { part, why } => Problem::new(
                Code::TableDamaged,
                format!("{name} is damaged: {part}"),
                place,
            )
            .why(why)
            .write(Write::words(
                "open it in a spreadsheet program and save it again",
            )),
            Self::TooLarge { limit, at } => too_large(name, *limit, at.as_ref(), place),
            Self::NoSheet { asked, there } => {
                let problem = Problem::new(
                    Code::TableSheet,
                    format!("{name} has no sheet \"{asked}\""),
                    place,
                );
                let listed: Vec<String> = there.iter().map(|s| format!("\"{s}\"")).collect();
                problem.write(Write::words(format!(
                    "--sheet with one of {}",
                    listed.join(", ")
                )))
            }
            Self::NoEncoding { stated } => Problem::new(
                Code::TableEncoding,
                format!("there is no encoding {stated}"),
                place,
            )
            .write(Write::words(
                "--encoding utf-8, windows-1252, iso-8859-2, utf-16le …",
            )),
            Self::NotText { encoding } => Problem::new(
                Code::TableEncoding,
                format!("{name} is no text in {encoding}"),
                place,
            )
            .write(Write::words(
                "--encoding with the encoding it was written in",
            )),
        }
    }
}

fn too_large(name: &str, limit: Limit, at: Option<&(String, u32)>, place: Place) -> Problem {
    let reached = match at {
        None => String::new(),
        Some((sheet, row)) if sheet.is_empty() => format!(", reached in row {row}"),
        Some((sheet, row)) => format!(", reached in sheet \"{sheet}\", row {row}"),
    };
    let message = format!("{name}: {}{reached}", limit.says());
    Problem::new(Code::TableTooLarge, message, place)
        .why("a register of machines is far smaller; a file that unpacks to more may be made to do harm")
        .write(Write::words("the sheet that holds the register alone, as CSV, or --sheet NAME"))
}
