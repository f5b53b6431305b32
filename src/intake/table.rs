//! The rows of a table: merged cells filled, hidden rows known.

use super::layout::{Column, Layout};
use crate::table::{Book, Comment, Content, Row, Sheet};
use std::collections::BTreeMap;

/// A table ready to be read row by row.
pub struct Table<'b> {
    /// Its sheet.
    pub sheet: &'b Sheet,
    /// Its columns.
    pub layout: &'b Layout,
    /// Where a cell is covered by a merged one: the row that holds its content, by column.
    merged: BTreeMap<u32, Vec<(u32, u32, u32)>>,
    /// Comments by row.
    comments: BTreeMap<u32, Vec<&'b Comment>>,
}

/// One row.
pub struct Line<'b> {
    /// Its number.
    pub number: u32,
    /// Whether it is hidden.
    pub hidden: bool,
    /// The row itself.
    row: &'b Row,
    table: &'b Table<'b>,
}

/// A cell of a row: its column, its content, and whether it is one of a merged cell that begins in
/// another row.
pub struct Field<'b> {
    /// The column.
    pub column: &'b Column,
    /// What it holds.
    pub content: &'b Content,
    /// The row in which the merged cell begins, where it covers this one.
    pub merged_from: Option<u32>,
}

impl<'b> Table<'b> {
    /// The table of a layout.
    pub fn new(book: &'b Book, layout: &'b Layout) -> Self {
        let sheet = &book.sheets[layout.sheet];
        let mut merged: BTreeMap<u32, Vec<(u32, u32, u32)>> = BTreeMap::new();
        for m in &sheet.merged {
            // A cell spread over columns is one value of its first column.
            merged
                .entry(m.column)
                .or_default()
                .push((m.row, m.last_row, m.row));
        }
        for spans in merged.values_mut() {
            spans.sort_unstable();
        }
        let mut comments: BTreeMap<u32, Vec<&'b Comment>> = BTreeMap::new();
        for comment in &sheet.comments {
            comments.entry(comment.row).or_default().push(comment);
        }
        Self {
            sheet,
            layout,
            merged,
            comments,
        }
    }

    /// Comments on the cells of a row.
    pub fn comments(&self, row: u32) -> impl Iterator<Item = &'b Comment> {
        self.comments.get(&row).into_iter().flatten().copied()
    }

    /// Its rows below the headings, those that hold anything.
    pub fn lines(&'b self) -> impl Iterator<Item = Line<'b>> {
        let below = self.layout.unit_row.unwrap_or(self.layout.heading_row);
        let rows = self.sheet.rows.iter().filter(move |r| r.number > below);
        rows.map(move |row| Line {
            number: row.number,
            hidden: row.hidden,
            row,
            table: self,
        })
    }
}

impl<'b> Line<'b> {
    /// What a column holds here.
    pub fn field(&self, column: &'b Column) -> Option<Field<'b>> {
        if let Some(content) = self.row.at(column.number) {
            return Some(Field {
                column,
                content,
                merged_from: None,
            });
        }
        let spans = self.table.merged.get(&column.number)?;
        let at = spans
            .partition_point(|(first, ..)| *first <= self.number)
            .checked_sub(1)?;
        let (first, last, from) = spans[at];
        if first == self.number || last < self.number {
            return None;
        }
        let content = self.table.sheet.at(from, column.number)?;
        Some(Field {
            column,
            content,
            merged_from: Some(from),
        })
    }

    /// Its cells in columns that are read, in order.
    pub fn fields(&self) -> impl Iterator<Item = Field<'b>> + '_ {
        self.table
            .layout
            .columns
            .iter()
            .filter_map(|c| self.field(c))
    }

    /// Comments on its cells.
    pub fn comments(&self) -> impl Iterator<Item = &'b Comment> {
        self.table.comments(self.number)
    }

    /// Whether a row holds one text only, over a table of several columns: a heading between rows.
    pub fn is_heading(&self) -> bool {
        self.table.layout.columns.len() > 2
            && self.row.cells.len() == 1
            && matches!(self.row.cells[0].content, Content::Text(_))
    }

    /// The first text of the row.
    pub fn first_text(&self) -> String {
        self.row
            .cells
            .first()
            .map(|c| c.content.text())
            .unwrap_or_default()
    }
}
