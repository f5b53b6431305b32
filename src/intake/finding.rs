//! What an intake has to say of a register, cell by cell.

/// What kind of finding it is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Kind {
    /// A cell that was not understood; it stays as a note on its row.
    NotUnderstood,
    /// Something to ask whoever keeps the register.
    Question,
    /// A cell read as something that does not stand there letter by letter.
    ReadAs,
    /// A row or column that was not carried, and why.
    LeftOut,
}

impl Kind {
    /// Its word in machine-readable outputs.
    pub const fn word(self) -> &'static str {
        match self {
            Self::NotUnderstood => "not understood",
            Self::Question => "question",
            Self::ReadAs => "read as",
            Self::LeftOut => "left out",
        }
    }
}

/// One finding.
#[derive(Clone, Debug, PartialEq)]
pub struct Finding {
    /// What kind it is.
    pub kind: Kind,
    /// Row as a spreadsheet numbers it; none where it is of the whole file or column.
    pub row: Option<u32>,
    /// Column, counted from one; none where it is of the whole row.
    pub column: Option<u32>,
    /// Tag of the machine, or id of the oil, where there is one.
    pub name: Option<String>,
    /// Heading of the column.
    pub heading: String,
    /// The text of the cell.
    pub text: String,
    /// Why, or what it was read as, or the question.
    pub says: String,
}

impl Finding {
    /// The cell as a spreadsheet names it: `E9`; the row or column alone where that is all.
    pub fn cell(&self) -> String {
        let column = self.column.map(letters).unwrap_or_default();
        match self.row {
            Some(row) if self.column.is_some() => format!("{column}{row}"),
            Some(row) => format!("row {row}"),
            None if self.column.is_some() => format!("column {column}"),
            None => "file".into(),
        }
    }
}

/// A column as a spreadsheet names it: 28 is `AB`.
pub fn letters(column: u32) -> String {
    let mut rest = column;
    let mut out = Vec::new();
    while rest > 0 {
        let digit = (rest - 1) % 26;
        out.push(char::from(b'A' + u8::try_from(digit).unwrap_or(0)));
        rest = (rest - 1) / 26;
    }
    out.iter().rev().collect()
}

/// The column of those letters.
pub fn column_of(letters: &str) -> Option<u32> {
    let letters = letters.trim();
    if letters.is_empty() || letters.len() > 3 || !letters.bytes().all(|b| b.is_ascii_alphabetic())
    {
        return None;
    }
    Some(letters.bytes().fold(0, |sum, b| {
        sum * 26 + u32::from(b.to_ascii_uppercase() - b'A') + 1
    }))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn columns_have_the_letters_of_spreadsheets() {
        for (n, name) in [
            (1, "A"),
            (26, "Z"),
            (27, "AA"),
            (28, "AB"),
            (702, "ZZ"),
            (703, "AAA"),
        ] {
            assert_eq!(letters(n), name);
            assert_eq!(column_of(name), Some(n));
        }
        assert_eq!(column_of("A1"), None);
    }
}
