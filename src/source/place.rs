//! Places in sources, and where a value comes from.

use std::fmt;

/// A file of the run, by its number in the source set.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct FileId(pub u32);

/// A stretch of bytes in a file.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Span {
    /// The file.
    pub file: FileId,
    /// First byte.
    pub start: u32,
    /// One past the last byte.
    pub end: u32,
}

/// A cell of a spreadsheet.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Cell {
    /// The file.
    pub file: FileId,
    /// The sheet, empty for a CSV file.
    pub sheet: String,
    /// Row, counted from one as spreadsheets do.
    pub row: u32,
    /// Column, counted from one.
    pub column: u32,
}

/// Where a value stands.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Place {
    /// In a text file.
    Text(Span),
    /// In a spreadsheet.
    Cell(Cell),
    /// In a rule, by its id.
    Rule(String),
    /// On the command line, the option's name.
    Flag(&'static str),
    /// Nowhere: the program's own default.
    Program,
}

/// Whose word a value is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Whose {
    /// Measured on site.
    Measured,
    /// The machine maker's.
    Maker,
    /// From the nameplate.
    Nameplate,
    /// From the asset register.
    Register,
    /// The oil supplier's.
    Supplier,
    /// The site's own house value.
    House,
    /// Assumed, by the user or by the program.
    Assumed,
    /// A published standard.
    Standard,
    /// Nobody said.
    NotStated,
}

impl Whose {
    /// The words a user may write.
    pub const WRITTEN: &'static [(&'static str, Self)] = &[
        ("measured", Self::Measured),
        ("maker", Self::Maker),
        ("nameplate", Self::Nameplate),
        ("register", Self::Register),
        ("supplier", Self::Supplier),
        ("house", Self::House),
        ("assumed", Self::Assumed),
    ];
}

impl fmt::Display for Whose {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self {
            Self::Measured => "measured",
            Self::Maker => "maker",
            Self::Nameplate => "nameplate",
            Self::Register => "register",
            Self::Supplier => "supplier",
            Self::House => "house",
            Self::Assumed => "assumed",
            Self::Standard => "standard",
            Self::NotStated => "given, no source stated",
        })
    }
}

/// Where a value comes from: whose word it is, when, with what remark, and the place it stands.
#[derive(Clone, Debug, PartialEq)]
pub struct Origin {
    /// Whose word.
    pub whose: Whose,
    /// The date or span of years as written.
    pub dated: Option<String>,
    /// The remark in quotes.
    pub note: Option<String>,
    /// The place.
    pub place: Place,
    /// What it was inherited from: `area yard`, `like CV-104`, `house`.
    pub inherited: Option<String>,
}

impl Origin {
    /// Whose word it is, with its date and remark; a source named for the whole record stands
    /// for itself.
    pub fn words(&self) -> String {
        let mut words = Vec::new();
        if self.whose != Whose::NotStated || self.note.is_none() {
            words.push(self.whose.to_string());
        }
        words.extend([&self.dated, &self.note].into_iter().flatten().cloned());
        words.join(", ")
    }

    /// A default of the program, with its reason.
    pub fn assumed(why: impl Into<String>) -> Self {
        Self {
            whose: Whose::Assumed,
            dated: None,
            note: Some(why.into()),
            place: Place::Program,
            inherited: None,
        }
    }

    /// A value taken from a rule.
    pub fn rule(id: impl Into<String>, whose: Whose) -> Self {
        Self {
            whose,
            dated: None,
            note: None,
            place: Place::Rule(id.into()),
            inherited: None,
        }
    }

    /// A value given on the command line.
    pub fn flag(name: &'static str) -> Self {
        Self {
            whose: Whose::NotStated,
            dated: None,
            note: None,
            place: Place::Flag(name),
            inherited: None,
        }
    }
}

/// A value that remembers how it was written and where it comes from.
#[derive(Clone, Debug, PartialEq)]
pub struct Given<T> {
    /// The value.
    pub value: T,
    /// The user's own spelling, without the origin clauses.
    pub written: String,
    /// Where it comes from.
    pub origin: Origin,
}

impl<T> Given<T> {
    /// A value with its spelling and origin.
    pub fn new(value: T, written: impl Into<String>, origin: Origin) -> Self {
        Self {
            value,
            written: written.into(),
            origin,
        }
    }

    /// The same origin and spelling around another value.
    pub fn map<U>(self, f: impl FnOnce(T) -> U) -> Given<U> {
        Given {
            value: f(self.value),
            written: self.written,
            origin: self.origin,
        }
    }
}
