//! Tables as people keep them: workbooks (xlsx, ods) and CSV files, read into located cells.
//!
//! Every cell keeps the row and column a spreadsheet shows, so that a finding can point at it.
//! What a table cannot say plainly is said by [`Content`]: a formula without a stored value is no
//! number, and a date is no count of days.
//!
//! Files come from anywhere, so nothing of a file is believed before it is counted: the bytes of
//! every part of a workbook are counted while they are unpacked, cells and texts while they are
//! taken in ([`limits`]). A reader that sets memory aside by what a file claims to hold cannot be
//! used here.

mod archive;
mod content;
mod delimited;
mod fault;
mod gather;
pub mod limits;
mod number_format;
mod ods;
mod xlsx;
mod xml;

pub use content::Content;
pub use delimited::{Delimiter, Encoding};
pub use fault::Fault;

/// What kind of file a table was read from.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Form {
    /// Office Open XML workbook.
    Xlsx {
        /// Whether its days count from 1904.
        from_1904: bool,
    },
    /// OpenDocument spreadsheet.
    Ods,
    /// Text with a delimiter.
    Csv {
        /// The encoding, found or stated.
        encoding: Encoding,
        /// The delimiter, found or stated.
        delimiter: Delimiter,
    },
}

/// A file read.
#[derive(Clone, Debug, PartialEq)]
pub struct Book {
    /// Its form.
    pub form: Form,
    /// Its sheets in their order; one without a name for a CSV file. A sheet not asked for is
    /// listed without its rows.
    pub sheets: Vec<Sheet>,
}

/// A sheet.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Sheet {
    /// Its name; empty for a CSV file.
    pub name: String,
    /// Whether the sheet itself is hidden.
    pub hidden: bool,
    /// Whether its rows were read.
    pub read: bool,
    /// Rows that hold anything, in order.
    pub rows: Vec<Row>,
    /// Cells that span others.
    pub merged: Vec<Merged>,
    /// Hidden columns, counted from one.
    pub hidden_columns: Vec<u32>,
    /// Comments, in the order of the file.
    pub comments: Vec<Comment>,
}

/// A row that holds anything.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Row {
    /// Its number, counted from one as spreadsheets do.
    pub number: u32,
    /// Whether it is hidden.
    pub hidden: bool,
    /// Its cells that hold anything, in the order of columns.
    pub cells: Vec<Cell>,
}

/// A cell that holds something.
#[derive(Clone, Debug, PartialEq)]
pub struct Cell {
    /// Its column, counted from one.
    pub column: u32,
    /// What it holds.
    pub content: Content,
}

/// A comment on a cell.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Comment {
    /// Row of the cell.
    pub row: u32,
    /// Column of the cell.
    pub column: u32,
    /// What it says.
    pub text: String,
}

/// A cell that spans others.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Merged {
    /// First row.
    pub row: u32,
    /// First column.
    pub column: u32,
    /// Last row.
    pub last_row: u32,
    /// Last column.
    pub last_column: u32,
}

/// What the user states about a file instead of having it found.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Stated {
    /// Read only this sheet.
    pub sheet: Option<String>,
    /// Encoding of a CSV file, as `windows-1252`.
    pub encoding: Option<String>,
    /// Delimiter of a CSV file.
    pub delimiter: Option<char>,
}

impl Sheet {
    /// What a cell holds; row and column counted from one.
    pub fn at(&self, row: u32, column: u32) -> Option<&Content> {
        let at = self.rows.binary_search_by_key(&row, |r| r.number).ok()?;
        self.rows[at].at(column)
    }

    /// The last column that holds anything.
    pub fn width(&self) -> u32 {
        let last = self.rows.iter().filter_map(|r| r.cells.last());
        last.map(|c| c.column).max().unwrap_or(0)
    }
}

impl Row {
    /// What a column of the row holds.
    pub fn at(&self, column: u32) -> Option<&Content> {
        let at = self
            .cells
            .binary_search_by_key(&column, |c| c.column)
            .ok()?;
        Some(&self.cells[at].content)
    }
}

/// Reads a table from the bytes of a file. What the bytes are decides, not the file's name.
///
/// # Errors
/// [`Fault`] where the file is of no known form, is damaged, or passes a limit.
pub fn read(bytes: &[u8], stated: &Stated) -> Result<Book, Fault> {
    if bytes.is_empty() {
        return Err(Fault::Empty);
    }
    if bytes.starts_with(b"PK") {
        if bytes.len() > limits::WORKBOOK_BYTES {
            return Err(Fault::too_large(limits::Limit::WorkbookBytes));
        }
        let mut archive = archive::Archive::open(bytes)?;
        return if archive.holds("content.xml") {
            ods::read(&mut archive, stated)
        } else {
            xlsx::read(&mut archive, stated)
        };
    }
    if bytes.starts_with(b"\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1") {
        return Err(Fault::OldBinary);
    }
    delimited::read(bytes, stated)
}
