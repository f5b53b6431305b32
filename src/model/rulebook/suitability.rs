//! Suitability rules: what a lubricant must not meet, must be asked about, or should be said.

use super::condition::Clause;
use super::provenance::Provenance;
use super::table::entry;
use crate::model::word::words;

words! {
    /// What a rule does when it fires.
    Level, "a level" { Notes = "notes", Asks = "asks", Bars = "bars" }
}

/// One suitability rule.
#[derive(Clone, Debug, PartialEq)]
pub struct SuitabilityRule {
    /// Its id.
    pub id: String,
    /// What it is about, a short phrase that can open a sentence.
    pub title: String,
    /// When it fires: all of these.
    pub when: Vec<Clause>,
    /// What it then does.
    pub level: Level,
    /// Where these hold as well, it bars.
    pub bars_when: Vec<Clause>,
    /// What happens where a fact it needs is not stated.
    pub unknown: WhenUnknown,
    /// Why.
    pub why: String,
    /// What to do.
    pub act: String,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(SuitabilityRule, |r| vec![r.title.as_str()]);

/// What a rule does where it cannot be decided.
#[derive(Clone, Debug, PartialEq)]
pub enum WhenUnknown {
    /// Nothing.
    Passes,
    /// It asks a question, which is a gap.
    Asks {
        /// The question.
        question: String,
        /// Only where these hold; empty: everywhere.
        only_where: Vec<Clause>,
    },
}

impl SuitabilityRule {
    /// The heaviest level it can reach.
    pub fn heaviest(&self) -> Level {
        if self.bars_when.is_empty() {
            self.level
        } else {
            Level::Bars
        }
    }
}
