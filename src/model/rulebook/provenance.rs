//! Where a rule comes from and how far it can be trusted.

use super::table::entry;
use crate::model::word::words;

words! {
    /// How a figure came into the rulebook.
    Basis, "a basis" {
        Seen = "seen", Memory = "memory", Common = "common", Derived = "derived",
        Judgement = "judgement",
    }
}

words! {
    /// How sure a rule is. A low one may raise a question; it never bars by itself.
    Confidence, "a confidence" { Low = "low", Medium = "medium", High = "high" }
}

/// Source, basis and confidence of an entry.
#[derive(Clone, Debug, PartialEq)]
pub struct Provenance {
    /// Short names of the sources, as sheets cite them.
    pub source: Vec<String>,
    /// How the figure was had.
    pub basis: Basis,
    /// How sure it is.
    pub confidence: Confidence,
    /// A remark for the reader of the sheet.
    pub note: Option<String>,
    /// The file it stands in.
    pub file: String,
}

impl Provenance {
    /// The sources in one line.
    pub fn cited(&self) -> String {
        self.source.join("; ")
    }
}

/// One source of the register.
#[derive(Clone, Debug, PartialEq)]
pub struct SourceEntry {
    /// Short name.
    pub id: String,
    /// What it is, in full.
    pub citation: String,
    /// How much of it was read: `seen`, `scope seen`, `from memory`.
    pub access: String,
    /// Where the entry stands.
    pub provenance: Provenance,
}
entry!(SourceEntry);
