//! Cautions and deferrals of the report.

use super::condition::Clause;
use super::provenance::Provenance;
use super::table::entry;
use crate::model::word::words;

words! {
    /// Where a caution is printed.
    CautionKind, "a kind of caution" { Safety = "safety", Deferral = "deferral" }
}

/// A caution: a short text in Markdown, and when it belongs on a sheet.
#[derive(Clone, Debug, PartialEq)]
pub struct Caution {
    /// Its id.
    pub id: String,
    /// Its heading.
    pub title: String,
    /// Safety or deferral.
    pub kind: CautionKind,
    /// When it applies: all of these; empty: always. Undecided is not enough: a caution that
    /// shall also stand where a fact is not stated says so.
    pub applies: Vec<Clause>,
    /// The text, Markdown.
    pub text: String,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(Caution, |c| vec![c.title.as_str()]);
