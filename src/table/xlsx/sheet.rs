//! The cells of one sheet.

use super::Shared;
use super::parts::plain;
use crate::table::archive::Archive;
use crate::table::gather::Gather;
use crate::table::number_format::{self, Meaning};
use crate::table::xml::{Next, Tag, Xml};
use crate::table::{Content, Fault, Merged, Sheet};

/// What the text at hand belongs to.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Inside {
    Nothing,
    Value,
    Formula,
    Text,
}

/// A cell as far as it was read.
#[derive(Default)]
struct Open {
    column: u32,
    style: usize,
    kind: String,
    value: Option<String>,
    formula: Option<String>,
    text: Option<String>,
}

/// A sheet as far as it was read.
struct Reading<'t, 's> {
    gather: Gather<'t>,
    shared: &'s Shared,
    path: &'s str,
    row: u32,
    column: u32,
    open: Option<Open>,
    inside: Inside,
    /// Depth of readings aid.
    aid: usize,
}

pub(super) fn read(
    archive: &mut Archive<'_>,
    path: &str,
    shared: &Shared,
    gather: Gather<'_>,
) -> Result<Sheet, Fault> {
    let left = archive.left();
    let mut xml = Xml::new(archive.must(path)?, path, left);
    let mut reading = Reading {
        gather,
        shared,
        path,
        row: 0,
        column: 0,
        open: None,
        inside: Inside::Nothing,
        aid: 0,
    };
    loop {
        match xml.next()? {
            Next::Open(tag) => reading.opens(&tag)?,
            Next::Close(name) => reading.closes(&name)?,
            Next::Text(piece) => reading.text(&piece),
            Next::End => break,
        }
    }
    drop(xml);
    let mut gather = reading.gather;
    let relations = super::parts::relations(archive, path)?;
    if let Some(part) = relations.of_kind("comments") {
        comments(archive, part, &mut gather)?;
    }
    Ok(gather.done())
}

/// The comments of a sheet.
fn comments(archive: &mut Archive<'_>, path: &str, gather: &mut Gather<'_>) -> Result<(), Fault> {
    let left = archive.left();
    let Some(part) = archive.part(path)? else {
        return Ok(());
    };
    let mut xml = Xml::new(part, path, left);
    let mut open: Option<((u32, u32), String)> = None;
    let mut inside = false;
    loop {
        match xml.next()? {
            Next::Open(tag) if tag.name == "comment" => {
                let at = tag.get("ref").and_then(place);
                open = at.map(|at| (at, String::new()));
            }
            Next::Open(tag) if tag.name == "t" => inside = true,
            Next::Text(piece) if inside => {
                if let Some((_, text)) = &mut open {
                    text.push_str(&piece);
                }
            }
            Next::Close(name) if name == "t" => inside = false,
            Next::Close(name) if name == "comment" => {
                if let Some(((row, column), text)) = open.take() {
                    gather.comment(row, column, plain(&text))?;
                }
            }
            Next::End => return Ok(()),
            _ => {}
        }
    }
}

impl Reading<'_, '_> {
    fn opens(&mut self, tag: &Tag) -> Result<(), Fault> {
        match tag.name.as_str() {
            "row" => {
                let next = self.row.saturating_add(1);
                self.row = tag.number("r").unwrap_or(next);
                self.column = 0;
                self.gather.row(self.row, tag.yes("hidden"))?;
            }
            "c" => self.cell(tag)?,
            "v" => self.inside = Inside::Value,
            "f" => {
                self.inside = Inside::Formula;
                if let Some(open) = &mut self.open {
                    open.formula.get_or_insert_default();
                }
            }
            "t" if self.aid == 0 => self.inside = Inside::Text,
            "rPh" => self.aid += 1,
            "mergeCell" => {
                if let Some(merged) = tag.get("ref").and_then(range) {
                    self.gather.merged(merged);
                }
            }
            "col" if tag.yes("hidden") => {
                if let (Some(first), Some(last)) = (tag.number("min"), tag.number("max")) {
                    self.gather.hide_columns(first, last);
                }
            }
            _ => {}
        }
        Ok(())
    }

    fn cell(&mut self, tag: &Tag) -> Result<(), Fault> {
        let next = self.column.saturating_add(1);
        self.column = match tag.get("r") {
            None => next,
            Some(name) => match place(name) {
                Some((row, column)) if row == self.row => column,
                _ => {
                    let why = format!("cell {name} stands in row {}", self.row);
                    return Err(Fault::damaged(self.path, why));
                }
            },
        };
        self.open = Some(Open {
            column: self.column,
            style: tag.number("s").map_or(0, |s| s as usize),
            kind: tag.get("t").unwrap_or("n").to_owned(),
            ..Open::default()
        });
        Ok(())
    }

    fn text(&mut self, piece: &str) {
        let Some(open) = &mut self.open else { return };
        let into = match self.inside {
            Inside::Nothing => return,
            Inside::Value => &mut open.value,
            Inside::Formula => &mut open.formula,
            Inside::Text => &mut open.text,
        };
        into.get_or_insert_default().push_str(piece);
    }

    fn closes(&mut self, name: &str) -> Result<(), Fault> {
        match name {
            "v" | "f" | "t" => self.inside = Inside::Nothing,
            "rPh" => self.aid = self.aid.saturating_sub(1),
            "c" => {
                if let Some(open) = self.open.take() {
                    let column = open.column;
                    if let Some(content) = self.content(open)? {
                        self.gather.cell(column, content)?;
                    }
                }
            }
            _ => {}
        }
        Ok(())
    }

    /// What a cell holds; nothing where it is only formatted.
    fn content(&self, open: Open) -> Result<Option<Content>, Fault> {
        if open.kind == "inlineStr" {
            return Ok(open.text.map(|t| Content::Text(plain(&t))));
        }
        let Some(value) = open.value else {
            // A formula that gave an empty text has a value: no text at all.
            let lacks = open.formula.filter(|_| open.kind != "str");
            return Ok(lacks.map(|f| Content::NoValue {
                formula: format!("={f}"),
            }));
        };
        Ok(Some(match open.kind.as_str() {
            "s" => Content::Text(self.shared_text(&value)?),
            "str" => Content::Text(plain(&value)),
            "b" => Content::Truth(value.trim() == "1" || value.trim() == "true"),
            "e" => Content::Fault(value),
            "d" => Content::Date(value.trim_end_matches("T00:00:00").replace('T', " ")),
            _ => self.number(value, open.style),
        }))
    }

    fn shared_text(&self, number: &str) -> Result<String, Fault> {
        let at: Option<usize> = number.trim().parse().ok();
        let text = at.and_then(|at| self.shared.texts.get(at));
        text.map(ToString::to_string)
            .ok_or_else(|| Fault::damaged(self.path, format!("there is no shared text {number}")))
    }

    fn number(&self, text: String, style: usize) -> Content {
        let Some(value) = text.trim().parse::<f64>().ok().filter(|v| v.is_finite()) else {
            return Content::Text(text);
        };
        let meaning = self.shared.meanings.get(style).unwrap_or(&Meaning::Plain);
        number_format::content(value, meaning, self.shared.from_1904)
    }
}

/// Row and column of `C7`.
fn place(name: &str) -> Option<(u32, u32)> {
    let name = name.replace('$', "");
    let letters = name.bytes().take_while(u8::is_ascii_alphabetic).count();
    let (letters, digits) = name.split_at(letters);
    if letters.is_empty() || letters.len() > 3 {
        return None;
    }
    let column = letters.bytes().fold(0, |sum, b| {
        sum * 26 + u32::from(b.to_ascii_uppercase() - b'A') + 1
    });
    Some((digits.parse().ok()?, column))
}

/// The cells of `B2:C7`.
fn range(text: &str) -> Option<Merged> {
    let (from, to) = text.split_once(':')?;
    let ((row, column), (last_row, last_column)) = (place(from)?, place(to)?);
    Some(Merged {
        row,
        column,
        last_row,
        last_column,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn places_of_cells_are_read() {
        assert_eq!(place("C7"), Some((7, 3)));
        assert_eq!(place("$AB$12"), Some((12, 28)));
        assert_eq!(place("XFD1048576"), Some((1_048_576, 16_384)));
        assert_eq!(place("7"), None);
        assert_eq!(place("ABCD1"), None);
        let merged = range("B2:C7").expect("a range");
        assert_eq!((merged.row, merged.last_column), (2, 3));
    }
}
