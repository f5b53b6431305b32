//! Spreadsheets of OASIS OpenDocument 1.3, part 3: tables, rows, cells.

mod cell;

use super::archive::Archive;
use super::gather::{Gather, Taken};
use super::limits::{self, Limit};
use super::xml::{Next, Tag, Xml};
use super::{Book, Fault, Form, Merged, Sheet, Stated};
use cell::Open;
use std::collections::BTreeSet;

const CONTENT: &str = "content.xml";

pub(super) fn read(archive: &mut Archive<'_>, stated: &Stated) -> Result<Book, Fault> {
    if encrypted(archive)? {
        return Err(Fault::Protected);
    }
    let left = archive.left();
    let mut xml = Xml::new(archive.must(CONTENT)?, CONTENT, left);
    let mut taken = Taken::default();
    let (mut sheets, mut hidden_styles) = (Vec::new(), BTreeSet::new());
    let (mut style, mut spreadsheet) = (String::new(), false);
    loop {
        match xml.next()? {
            Next::Open(tag) => match tag.name.as_str() {
                "spreadsheet" => spreadsheet = true,
                "style" => tag.get("name").unwrap_or("").clone_into(&mut style),
                "table-properties" if tag.get("display") == Some("false") => {
                    hidden_styles.insert(style.clone());
                }
                "table" => {
                    if sheets.len() >= limits::SHEETS {
                        return Err(Fault::too_large(Limit::Sheets));
                    }
                    let style = tag.get("style-name").unwrap_or("");
                    let name = tag.get("name").unwrap_or("").to_owned();
                    let gather = Gather::new(&name, hidden_styles.contains(style), &mut taken);
                    let skip = stated.sheet.as_ref().is_some_and(|s| *s != name);
                    sheets.push(Reading::new(gather, skip).sheet(&mut xml)?);
                }
                _ => {}
            },
            Next::Close(_) | Next::Text(_) => {}
            Next::End => break,
        }
    }
    if !spreadsheet {
        return Err(Fault::NoTable);
    }
    wanted(&sheets, stated)?;
    let form = Form::Ods;
    Ok(Book { form, sheets })
}

fn wanted(sheets: &[Sheet], stated: &Stated) -> Result<(), Fault> {
    match &stated.sheet {
        Some(asked) if !sheets.iter().any(|s| s.name == *asked) => Err(Fault::NoSheet {
            asked: asked.clone(),
            there: sheets.iter().map(|s| s.name.clone()).collect(),
        }),
        _ => Ok(()),
    }
}

/// Whether the manifest names an encryption.
fn encrypted(archive: &mut Archive<'_>) -> Result<bool, Fault> {
    let left = archive.left();
    let path = "META-INF/manifest.xml";
    let Some(part) = archive.part(path)? else {
        return Ok(false);
    };
    let mut xml = Xml::new(part, path, left);
    loop {
        match xml.next()? {
            Next::Open(tag) if tag.name == "encryption-data" => return Ok(true),
            Next::End => return Ok(false),
            _ => {}
        }
    }
}

/// A sheet as far as it was read.
#[expect(
    clippy::struct_excessive_bools,
    reason = "each says where in the file the reading stands"
)]
struct Reading<'t> {
    gather: Gather<'t>,
    skip: bool,
    row: u32,
    /// How often the row stands there.
    rows: u32,
    /// Whether the row holds anything so far.
    begun: bool,
    hidden: bool,
    column: u32,
    columns: u32,
    open: Option<Open>,
    /// Depth below the element that is left out: a comment, a drawing, a table in a cell.
    apart: usize,
    /// The comment at hand, and whether its own text stands here.
    comment: Option<String>,
    in_comment: bool,
}

/// Elements inside a table that are no cells of it.
const APART: &[&str] = &[
    "annotation",
    "frame",
    "shapes",
    "table",
    "custom-shape",
    "control",
    "tracked-changes",
    "ruby-text",
];

impl<'t> Reading<'t> {
    fn new(gather: Gather<'t>, skip: bool) -> Self {
        Self {
            gather,
            skip,
            row: 0,
            rows: 1,
            begun: false,
            hidden: false,
            column: 0,
            columns: 0,
            open: None,
            apart: 0,
            comment: None,
            in_comment: false,
        }
    }

    fn sheet<R: std::io::BufRead>(mut self, xml: &mut Xml<R>) -> Result<Sheet, Fault> {
        loop {
            match xml.next()? {
                Next::Open(tag) if self.apart > 0 => {
                    self.apart += 1;
                    self.in_comment |= tag.name == "p";
                }
                Next::Close(name) if self.apart > 0 => self.leaves(&name)?,
                Next::Text(piece) if self.apart > 0 => {
                    if let (true, Some(text)) = (self.in_comment, &mut self.comment) {
                        text.push_str(&piece);
                    }
                }
                Next::Open(tag) if APART.contains(&tag.name.as_str()) => {
                    self.apart = 1;
                    self.comment =
                        (tag.name == "annotation" && self.open.is_some()).then(String::new);
                }
                Next::Open(tag) => self.opens(&tag),
                Next::Close(name) if name == "table" => break,
                Next::Close(name) => self.closes(&name)?,
                Next::Text(piece) => {
                    if let Some(open) = &mut self.open {
                        open.text(&piece);
                    }
                }
                Next::End => return Err(Fault::damaged(CONTENT, "it breaks off")),
            }
        }
        let mut sheet = self.gather.done();
        sheet.read = !self.skip;
        Ok(sheet)
    }

    /// An element inside one that is no cell ends, or that one itself.
    fn leaves(&mut self, name: &str) -> Result<(), Fault> {
        self.apart -= 1;
        if name == "p" {
            self.in_comment = false;
            if let Some(text) = &mut self.comment {
                text.push('\n');
            }
        }
        if self.apart == 0
            && !self.skip
            && let Some(text) = self.comment.take()
        {
            let column = self.column.saturating_add(1);
            self.gather.comment(self.row, column, text)?;
        }
        Ok(())
    }

    fn opens(&mut self, tag: &Tag) {
        match tag.name.as_str() {
            "table-column" => {
                let count = tag.number("number-columns-repeated").unwrap_or(1);
                let first = self.columns.saturating_add(1);
                self.columns = self.columns.saturating_add(count);
                if tag.get("visibility").is_some_and(|v| v != "visible") {
                    self.gather.hide_columns(first, self.columns);
                }
            }
            "table-row" => {
                self.row = self.row.saturating_add(self.rows);
                self.rows = tag.number("number-rows-repeated").unwrap_or(1).max(1);
                self.column = 0;
                self.begun = false;
                self.hidden = tag.get("visibility").is_some_and(|v| v != "visible");
            }
            "table-cell" | "covered-table-cell" => self.open = Some(Open::new(tag)),
            name => {
                if let Some(open) = &mut self.open {
                    open.opens(name, tag);
                }
            }
        }
    }

    fn closes(&mut self, name: &str) -> Result<(), Fault> {
        match name {
            "table-cell" | "covered-table-cell" => {
                if let Some(open) = self.open.take() {
                    self.cell(open)?;
                }
            }
            "table-row" if self.begun => self.gather.repeat(self.rows - 1)?,
            _ => {}
        }
        Ok(())
    }

    fn cell(&mut self, open: Open) -> Result<(), Fault> {
        let first = self.column.saturating_add(1);
        self.column = self.column.saturating_add(open.repeated);
        if self.skip {
            return Ok(());
        }
        if let Some((rows, columns)) = open.spans {
            self.gather.merged(Merged {
                row: self.row,
                column: first,
                last_row: self.row.saturating_add(rows - 1),
                last_column: first.saturating_add(columns - 1),
            });
        }
        let Some(content) = open.content() else {
            return Ok(());
        };
        if !self.begun {
            // Only a row that holds something counts: sheets end in a million empty ones.
            self.gather.row(self.row, self.hidden)?;
            self.begun = true;
        }
        for column in first..=self.column {
            self.gather.cell(column, content.clone())?;
        }
        Ok(())
    }
}
