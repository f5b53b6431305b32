//! CSV tables: RFC 4180, UTF-8, the unit in the heading.

/// One table.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Table {
    /// Headings, each with its unit.
    pub headings: Vec<String>,
    /// Rows.
    pub rows: Vec<Vec<Cell>>,
}

/// A cell.
#[derive(Clone, Debug, PartialEq)]
pub enum Cell {
    /// Text.
    Text(String),
    /// A number, unrounded.
    Number(f64),
    /// Nothing.
    Empty,
}

impl Cell {
    /// A text, empty where there is none.
    pub fn maybe(text: Option<&str>) -> Self {
        text.map_or(Self::Empty, |t| Self::Text(t.to_owned()))
    }

    /// A number, empty where there is none or it is not finite.
    pub fn number(x: Option<f64>) -> Self {
        x.filter(|x| x.is_finite()).map_or(Self::Empty, |x| {
            Self::Number(crate::quantity::show::exact(x))
        })
    }
}

impl From<&str> for Cell {
    fn from(text: &str) -> Self {
        Self::Text(text.to_owned())
    }
}

/// Which dialect.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Dialect {
    /// Commas, points.
    #[default]
    Plain,
    /// Byte-order mark, semicolons, decimal commas: what spreadsheets of comma countries open.
    Spreadsheet,
}

/// A table as text. Text that a spreadsheet would take for a formula is kept from it by a quote.
pub fn write(table: &Table, dialect: Dialect) -> String {
    let (separator, mark) = match dialect {
        Dialect::Plain => (b',', ""),
        Dialect::Spreadsheet => (b';', "\u{feff}"),
    };
    let mut out = csv::WriterBuilder::new()
        .delimiter(separator)
        .terminator(csv::Terminator::CRLF)
        .from_writer(Vec::new());
    let headings: Vec<String> = table.headings.iter().map(|h| harmless(h)).collect();
    let mut ok = out.write_record(&headings).is_ok();
    for row in &table.rows {
        let cells: Vec<String> = row.iter().map(|c| shown(c, dialect)).collect();
        ok &= out.write_record(&cells).is_ok();
    }
    debug_assert!(ok, "writing to memory does not fail");
    let bytes = out.into_inner().unwrap_or_default();
    format!("{mark}{}", String::from_utf8_lossy(&bytes))
}

fn shown(cell: &Cell, dialect: Dialect) -> String {
    match cell {
        Cell::Text(text) => harmless(text),
        Cell::Number(x) if dialect == Dialect::Spreadsheet => format!("{x}").replace('.', ","),
        Cell::Number(x) => format!("{x}"),
        Cell::Empty => String::new(),
    }
}

/// Text beginning with a sign of a formula gets an apostrophe before it.
pub fn harmless(text: &str) -> String {
    if text.starts_with(['=', '+', '-', '@', '\t', '\r']) {
        format!("'{text}")
    } else {
        text.to_owned()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn formulas_stay_text_and_quotes_are_doubled() {
        let table = Table {
            headings: vec!["oil".into(), "hot_vg_step".into()],
            rows: vec![
                vec![Cell::from("=1+1"), Cell::Number(0.5)],
                vec![Cell::from("a \"b\", c"), Cell::Empty],
            ],
        };
        assert_eq!(
            write(&table, Dialect::Plain),
            "oil,hot_vg_step\r\n'=1+1,0.5\r\n\"a \"\"b\"\", c\",\r\n"
        );
        assert!(write(&table, Dialect::Spreadsheet).starts_with("\u{feff}oil;hot"));
        assert!(write(&table, Dialect::Spreadsheet).contains(";0,5"));
    }
}
