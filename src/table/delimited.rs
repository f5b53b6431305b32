//! CSV as it comes: encoding and delimiter found where they are not stated, and always said.
//!
//! Rows are numbered as a spreadsheet numbers them when it opens the file: an empty line is a
//! row, a line break inside quotation marks is none.

mod dialect;

use super::gather::{Gather, Taken};
use super::limits::{self, Limit};
use super::{Book, Content, Fault, Form, Stated};

/// How bytes became text.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Encoding {
    /// Its name, as `windows-1252`.
    pub name: &'static str,
    /// Why it was taken.
    pub by: Found,
}

/// What parts the cells of a row.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Delimiter {
    /// The character.
    pub character: char,
    /// Why it was taken.
    pub by: Found,
}

/// Why something was taken.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Found {
    /// The user states it.
    Stated,
    /// The file begins with its mark.
    Marked,
    /// It fits the contents.
    Fits,
}

impl Found {
    /// In words.
    pub fn says(self) -> &'static str {
        match self {
            Self::Stated => "as stated",
            Self::Marked => "by the mark at the beginning",
            Self::Fits => "found from the contents",
        }
    }
}

impl Delimiter {
    /// In a word.
    pub fn says(&self) -> String {
        match self.character {
            ',' => "comma".into(),
            ';' => "semicolon".into(),
            '\t' => "tab".into(),
            '|' => "bar".into(),
            c => format!("\"{c}\""),
        }
    }
}

pub(super) fn read(bytes: &[u8], stated: &Stated) -> Result<Book, Fault> {
    if bytes.len() > limits::TEXT_FILE_BYTES {
        return Err(Fault::too_large(Limit::TextFileBytes));
    }
    if let Some(asked) = &stated.sheet {
        return Err(Fault::NoSheet {
            asked: asked.clone(),
            there: Vec::new(),
        });
    }
    let (text, encoding) = dialect::text(bytes, stated.encoding.as_deref())?;
    if text.contains('\0') {
        return Err(Fault::NoTable);
    }
    let (text, delimiter) = dialect::delimiter(&text, stated.delimiter);
    let mut taken = Taken::default();
    let mut gather = Gather::new("", false, &mut taken);
    rows(text, &delimiter, &mut gather)?;
    let sheet = gather.done();
    if sheet.rows.is_empty() {
        return Err(Fault::Empty);
    }
    let form = Form::Csv {
        encoding,
        delimiter,
    };
    Ok(Book {
        form,
        sheets: vec![sheet],
    })
}

fn rows(text: &str, delimiter: &Delimiter, gather: &mut Gather<'_>) -> Result<(), Fault> {
    let mut reader = dialect::reader(text.as_bytes(), delimiter.character);
    let mut record = csv::StringRecord::new();
    let mut lines = Lines::new(text);
    loop {
        match reader.read_record(&mut record) {
            Ok(true) => {}
            Ok(false) => return Ok(()),
            Err(error) => return Err(Fault::damaged("its rows", error)),
        }
        let from = record.position().map_or(0, csv::Position::byte);
        gather.row(lines.row(from), false)?;
        for (column, field) in (1_u32..).zip(&record) {
            lines.inside += field.matches('\n').count();
            gather.cell(column, Content::Text(field.to_owned()))?;
        }
    }
}

/// Counts rows by the line breaks outside quotation marks.
struct Lines<'t> {
    text: &'t str,
    counted: usize,
    breaks: usize,
    /// Breaks inside quotation marks so far.
    inside: usize,
}

impl<'t> Lines<'t> {
    fn new(text: &'t str) -> Self {
        Self {
            text,
            counted: 0,
            breaks: 0,
            inside: 0,
        }
    }

    /// The row of a record that begins at a byte, or behind the line breaks there.
    fn row(&mut self, from: u64) -> u32 {
        let from = usize::try_from(from)
            .unwrap_or(usize::MAX)
            .min(self.text.len());
        let rest = self.text.get(from..).unwrap_or("");
        let blank = rest.len() - rest.trim_start_matches(['\r', '\n']).len();
        let to = (from + blank).max(self.counted);
        let more = self.text.get(self.counted..to).unwrap_or("");
        self.breaks += more.matches('\n').count();
        self.counted = to;
        u32::try_from(self.breaks.saturating_sub(self.inside) + 1).unwrap_or(u32::MAX)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::table::Sheet;

    fn sheet(text: &str) -> Sheet {
        let book = read(text.as_bytes(), &Stated::default()).expect("a table");
        book.sheets.into_iter().next().expect("one sheet")
    }

    #[test]
    fn rows_are_numbered_as_a_spreadsheet_does() {
        let sheet = sheet("tag;oil\nA;\"two\nlines\"\n\nB;\"x\"\n");
        let numbers: Vec<u32> = sheet.rows.iter().map(|r| r.number).collect();
        assert_eq!(numbers, [1, 2, 4]);
        assert_eq!(sheet.at(2, 2), Some(&Content::Text("two\nlines".into())));
        assert_eq!(sheet.at(4, 1), Some(&Content::Text("B".into())));
        assert_eq!(sheet.at(3, 1), None);
    }

    #[test]
    fn lines_of_old_machines_are_lines() {
        let sheet = sheet("tag,oil\rA,1\rB,2\r");
        let numbers: Vec<u32> = sheet.rows.iter().map(|r| r.number).collect();
        assert_eq!(numbers, [1, 2, 3]);
    }

    #[test]
    fn what_is_no_table_is_said() {
        let fault = |bytes: &[u8], stated: &Stated| read(bytes, stated).expect_err("refused");
        let plain = Stated::default();
        assert_eq!(fault(b"\x00\x01\x02binary\x00", &plain), Fault::NoTable);
        assert_eq!(fault(b"\n\n;;;\n", &plain), Fault::Empty);
        let stated = Stated {
            encoding: Some("klingon".into()),
            ..Stated::default()
        };
        assert!(matches!(fault(b"a", &stated), Fault::NoEncoding { .. }));
        let stated = Stated {
            encoding: Some("utf-8".into()),
            ..Stated::default()
        };
        assert!(matches!(fault(b"caf\xe9", &stated), Fault::NotText { .. }));
    }

    #[test]
    fn too_many_columns_and_an_open_quotation_mark_pass_a_limit() {
        let wide = "a,".repeat(20_000);
        assert!(matches!(
            read(wide.as_bytes(), &Stated::default()),
            Err(Fault::TooLarge {
                limit: Limit::Columns,
                at: Some((_, 1))
            })
        ));
        let open = format!("a,b\n\"{}", "x\n".repeat(100_000));
        assert!(matches!(
            read(open.as_bytes(), &Stated::default()),
            Err(Fault::TooLarge {
                limit: Limit::CellBytes,
                ..
            })
        ));
    }
}
