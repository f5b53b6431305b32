//! A workbook of the results: plain tables with real numbers, the unit in a second row of headings,
//! both frozen, every table filtered. No macros, no merged cells, no formulas: a text that begins
//! as a formula does is stored as the text it is, and stays text when it is edited.

mod inputs;
mod oil_list;
mod sheets;
mod steps;

pub use sheets::{Content, workbook};

use rust_xlsxwriter::{
    Color, DocProperties, ExcelDateTime, Format, FormatAlign, FormatBorder, Workbook, Worksheet,
    XlsxError,
};
use std::collections::BTreeMap;

/// A cell of a sheet.
#[derive(Clone, Debug, PartialEq)]
pub(crate) enum Cell {
    /// Text.
    Text(String),
    /// A verdict, in its word; a fill besides.
    Verdict(String),
    /// A number with so many decimals shown.
    Number(f64, u8),
    /// Nothing.
    Empty,
}

impl Cell {
    fn text(text: impl Into<String>) -> Self {
        Self::Text(text.into())
    }

    fn maybe(text: Option<&str>) -> Self {
        text.map_or(Self::Empty, Self::text)
    }

    fn number(x: Option<f64>, decimals: u8) -> Self {
        x.filter(|x| x.is_finite()).map_or(Self::Empty, |x| {
            Self::Number(crate::quantity::show::exact(x), decimals)
        })
    }
}

/// A column: its heading, its unit, its width in characters.
pub(crate) type Column = (String, String, f64);

/// A sheet.
#[derive(Clone, Debug, Default)]
pub(crate) struct Sheet {
    name: &'static str,
    columns: Vec<Column>,
    rows: Vec<Vec<Cell>>,
}

fn columns(list: &[(&str, &str, f64)]) -> Vec<Column> {
    list.iter()
        .map(|(heading, unit, width)| ((*heading).to_owned(), (*unit).to_owned(), *width))
        .collect()
}

/// Spreadsheets hold so many characters in a cell and so many rows in a sheet.
const LONGEST: usize = 32_767;
const ROWS: usize = 1_048_576;

/// Number formats by decimals.
const FORMATS: [&str; 4] = ["0", "0.0", "0.00", "0.000"];

struct Formats {
    heading: Format,
    unit: Format,
    text: Format,
    quoted: Format,
    numbers: Vec<Format>,
    verdicts: BTreeMap<&'static str, Format>,
}

impl Formats {
    fn new() -> Self {
        let cell = || Format::new().set_align(FormatAlign::Top);
        let head = || Format::new().set_bold().set_align(FormatAlign::Top);
        // Fills are extra: the word says it.
        let fills = [
            ("holds", 0x00E2_EFDA),
            ("tight", 0x00FF_F2CC),
            ("fails", 0x00F8_CBAD),
            ("open", 0x00ED_EDED),
            ("barred", 0x00D9_D9D9),
        ];
        Self {
            heading: head().set_background_color(Color::RGB(0x00F2_F2F2)),
            unit: Format::new()
                .set_italic()
                .set_border_bottom(FormatBorder::Thin),
            text: cell(),
            quoted: cell().set_quote_prefix(),
            numbers: FORMATS.iter().map(|f| cell().set_num_format(*f)).collect(),
            verdicts: fills
                .into_iter()
                .map(|(word, fill)| (word, cell().set_background_color(Color::RGB(fill))))
                .collect(),
        }
    }
}

/// Whether bytes are a workbook the program made: it says so in its properties.
pub fn is_ours(bytes: &[u8]) -> bool {
    use std::io::Read as _;
    let Ok(mut archive) = zip::ZipArchive::new(std::io::Cursor::new(bytes)) else {
        return false;
    };
    let Ok(part) = archive.by_name("docProps/core.xml") else {
        return false;
    };
    let mut text = String::new();
    let read = part.take(64 << 10).read_to_string(&mut text);
    read.is_ok() && text.contains("filmwright")
}

/// Writes sheets as a workbook; the same sheets give the same bytes.
fn write(sheets: &[Sheet], title: &str, date: &str) -> Result<Vec<u8>, XlsxError> {
    let mut book = Workbook::new();
    let day =
        ExcelDateTime::parse_from_str(date).or_else(|_| ExcelDateTime::from_ymd(1980, 1, 1))?;
    let properties = DocProperties::new()
        .set_title(title)
        .set_comment(concat!("filmwright ", env!("CARGO_PKG_VERSION")))
        .set_creation_datetime(&day);
    book.set_properties(&properties);
    let formats = Formats::new();
    for sheet in sheets {
        one(book.add_worksheet(), sheet, &formats)?;
    }
    book.save_to_buffer()
}

fn one(to: &mut Worksheet, sheet: &Sheet, formats: &Formats) -> Result<(), XlsxError> {
    to.set_name(sheet.name)?;
    to.set_freeze_panes(2, 0)?;
    for (i, (heading, unit, width)) in sheet.columns.iter().enumerate() {
        let column = narrow(i);
        to.set_column_width(column, *width)?;
        to.write_string_with_format(0, column, heading, &formats.heading)?;
        to.write_string_with_format(1, column, unit, &formats.unit)?;
    }
    let rows = sheet.rows.len().min(ROWS - 3);
    for (r, row) in sheet.rows.iter().take(rows).enumerate() {
        for (c, cell) in row.iter().enumerate() {
            put(to, row_number(r + 2), narrow(c), cell, formats)?;
        }
    }
    if sheet.rows.len() > rows {
        let says = format!(
            "{} more rows do not fit a sheet: -f json has them all",
            sheet.rows.len() - rows
        );
        to.write_string_with_format(row_number(rows + 2), 0, says, &formats.text)?;
    }
    if let Some(last) = sheet.columns.len().checked_sub(1) {
        // The filter stands on the units, so that they are no data.
        to.autofilter(1, 0, row_number(rows.max(1) + 1), narrow(last))?;
    }
    Ok(())
}

fn put(
    to: &mut Worksheet,
    row: u32,
    column: u16,
    cell: &Cell,
    formats: &Formats,
) -> Result<(), XlsxError> {
    match cell {
        Cell::Empty => {}
        Cell::Number(x, decimals) => {
            let format = &formats.numbers[usize::from(*decimals).min(FORMATS.len() - 1)];
            to.write_number_with_format(row, column, *x, format)?;
        }
        Cell::Verdict(word) => {
            let format = formats.verdicts.get(word.as_str()).unwrap_or(&formats.text);
            to.write_string_with_format(row, column, word, format)?;
        }
        Cell::Text(text) => {
            let format = if text.starts_with(['=', '+', '-', '@']) {
                &formats.quoted
            } else {
                &formats.text
            };
            to.write_string_with_format(row, column, clipped(text), format)?;
        }
    }
    Ok(())
}

fn clipped(text: &str) -> String {
    text.chars().take(LONGEST).collect()
}

fn narrow(column: usize) -> u16 {
    u16::try_from(column).unwrap_or(u16::MAX)
}

fn row_number(row: usize) -> u32 {
    u32::try_from(row).unwrap_or(u32::MAX)
}
