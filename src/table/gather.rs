//! Gathers cells into rows and counts them against the limits.

use super::limits::{self, Limit};
use super::{Cell, Comment, Content, Fault, Merged, Row, Sheet};

/// What all sheets of a file have taken together.
#[derive(Debug, Default)]
pub(super) struct Taken {
    cells: usize,
    text: usize,
}

/// One sheet being read.
pub(super) struct Gather<'t> {
    sheet: Sheet,
    taken: &'t mut Taken,
}

impl<'t> Gather<'t> {
    pub(super) fn new(name: &str, hidden: bool, taken: &'t mut Taken) -> Self {
        let sheet = Sheet {
            name: name.to_owned(),
            hidden,
            read: true,
            ..Sheet::default()
        };
        Self { sheet, taken }
    }

    /// Begins a row; rows come in rising order.
    pub(super) fn row(&mut self, number: u32, hidden: bool) -> Result<(), Fault> {
        if number == 0 || number > limits::ROWS {
            return Err(self.over(Limit::Rows, number));
        }
        let last = self.sheet.rows.last().map_or(0, |r| r.number);
        if number <= last {
            return Err(Fault::damaged(
                &self.sheet.name,
                format!("row {number} follows row {last}"),
            ));
        }
        self.drop_empty();
        if let Some(full) = self.sheet.rows.last_mut() {
            full.cells.shrink_to_fit();
        }
        self.sheet.rows.push(Row {
            number,
            hidden,
            cells: Vec::new(),
        });
        Ok(())
    }

    /// Takes a cell of the row begun; columns come in rising order.
    pub(super) fn cell(&mut self, column: u32, content: Content) -> Result<(), Fault> {
        let number = self.sheet.rows.last().map_or(0, |r| r.number);
        if column == 0 || column > limits::COLUMNS {
            return Err(self.over(Limit::Columns, number));
        }
        if content.is_blank() {
            return Ok(());
        }
        if let Some(limit) = self.count(&content) {
            return Err(self.over(limit, number));
        }
        let Some(row) = self.sheet.rows.last_mut() else {
            return Ok(());
        };
        if row.cells.last().is_some_and(|c| c.column >= column) {
            let name = &self.sheet.name;
            let why = format!("a cell of row {number} stands twice or out of order");
            return Err(Fault::damaged(name, why));
        }
        row.cells.push(Cell { column, content });
        Ok(())
    }

    fn count(&mut self, content: &Content) -> Option<Limit> {
        self.taken.cells += 1;
        let length = match content {
            Content::Text(t) | Content::Date(t) | Content::Fault(t) => t.len(),
            Content::NoValue { formula } => formula.len(),
            Content::Number { .. } | Content::Percent(_) | Content::Truth(_) => 0,
        };
        self.taken.text += length;
        if length > limits::CELL_BYTES {
            Some(Limit::CellBytes)
        } else if self.taken.cells > limits::CELLS {
            Some(Limit::Cells)
        } else if self.taken.text > limits::TEXT_BYTES {
            Some(Limit::TextBytes)
        } else {
            None
        }
    }

    /// The same row again under the next numbers.
    pub(super) fn repeat(&mut self, times: u32) -> Result<(), Fault> {
        let Some(row) = self
            .sheet
            .rows
            .last()
            .filter(|r| !r.cells.is_empty())
            .cloned()
        else {
            return Ok(());
        };
        for next in 1..=times {
            self.row(row.number.saturating_add(next), row.hidden)?;
            for cell in &row.cells {
                self.cell(cell.column, cell.content.clone())?;
            }
        }
        Ok(())
    }

    pub(super) fn merged(&mut self, merged: Merged) {
        self.sheet.merged.push(merged);
    }

    /// A comment on a cell; its text counts as that of cells does.
    pub(super) fn comment(&mut self, row: u32, column: u32, text: String) -> Result<(), Fault> {
        let content = Content::Text(text);
        if let Some(limit) = self.count(&content) {
            return Err(self.over(limit, row));
        }
        if let (Content::Text(text), false) = (&content, content.is_blank()) {
            self.sheet.comments.push(Comment {
                row,
                column,
                text: text.trim().to_owned(),
            });
        }
        Ok(())
    }

    pub(super) fn hide_columns(&mut self, first: u32, last: u32) {
        let last = last.min(limits::COLUMNS);
        // A sheet whose every column to the edge is hidden only has its margin hidden.
        if last < limits::COLUMNS {
            self.sheet.hidden_columns.extend(first..=last);
        }
    }

    pub(super) fn done(mut self) -> Sheet {
        self.drop_empty();
        self.sheet
    }

    fn drop_empty(&mut self) {
        if self.sheet.rows.last().is_some_and(|r| r.cells.is_empty()) {
            self.sheet.rows.pop();
        }
    }

    fn over(&self, limit: Limit, row: u32) -> Fault {
        Fault::TooLarge {
            limit,
            at: Some((self.sheet.name.clone(), row)),
        }
    }
}
