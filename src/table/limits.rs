//! How much of a file is taken in. Chosen so that the worst file of each kind ends within a
//! second and 200 MB, and a register of some ten thousand rows is far inside.

/// Bytes of a workbook file.
pub const WORKBOOK_BYTES: usize = 32 << 20;
/// Bytes its parts unpack to, all parts read together.
pub const UNPACKED_BYTES: u64 = 64 << 20;
/// Bytes of a CSV file.
pub const TEXT_FILE_BYTES: usize = 64 << 20;
/// Cells that hold something, all sheets together.
pub const CELLS: usize = 800_000;
/// Bytes of all cell texts together.
pub const TEXT_BYTES: usize = 32 << 20;
/// Bytes of one cell's text: 32 767 characters, the limit of spreadsheets, in their longest form.
pub const CELL_BYTES: usize = 4 * 32_767;
/// Columns, the limit of spreadsheets.
pub const COLUMNS: u32 = 16_384;
/// Rows, the limit of spreadsheets.
pub const ROWS: u32 = 1_048_576;
/// Sheets of a workbook.
pub const SHEETS: usize = 256;
/// Files inside a workbook.
pub const PARTS: usize = 10_000;
/// Elements of one part: enough for a million cells with all that belongs to them.
pub const ELEMENTS: usize = 6_000_000;

/// A limit that was passed.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Limit {
    /// [`WORKBOOK_BYTES`].
    WorkbookBytes,
    /// [`UNPACKED_BYTES`].
    UnpackedBytes,
    /// [`TEXT_FILE_BYTES`].
    TextFileBytes,
    /// [`CELLS`].
    Cells,
    /// [`TEXT_BYTES`].
    TextBytes,
    /// [`CELL_BYTES`].
    CellBytes,
    /// [`COLUMNS`].
    Columns,
    /// [`ROWS`].
    Rows,
    /// [`SHEETS`].
    Sheets,
    /// [`PARTS`].
    Parts,
    /// [`ELEMENTS`].
    Elements,
}

impl Limit {
    /// What was passed, in words.
    pub fn says(self) -> String {
        let mib = |bytes: usize| format!("{} MiB", bytes >> 20);
        match self {
            Self::WorkbookBytes => format!("more than {}", mib(WORKBOOK_BYTES)),
            Self::UnpackedBytes => format!("unpacks to more than {} MiB", UNPACKED_BYTES >> 20),
            Self::TextFileBytes => format!("more than {}", mib(TEXT_FILE_BYTES)),
            Self::Cells => format!("more than {CELLS} filled cells"),
            Self::TextBytes => format!("more than {} of text", mib(TEXT_BYTES)),
            Self::CellBytes => "a cell of more than 32767 characters".to_owned(),
            Self::Columns => format!("more than {COLUMNS} columns"),
            Self::Rows => format!("more than {ROWS} rows"),
            Self::Sheets => format!("more than {SHEETS} sheets"),
            Self::Elements => format!("more than {ELEMENTS} elements in one part"),
            Self::Parts => format!("more than {PARTS} files packed inside"),
        }
    }
}
