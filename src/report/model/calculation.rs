//! The calculation step by step, what it takes as true, and what is missing.

use super::{Origin, Phrase};
use crate::report::draw::gap_bars::GapBar;
use crate::report::names::Href;
use serde::{Deserialize, Serialize};

/// A number that goes into a step.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Put {
    /// Its symbol in the formula: `n`, `Dpw`.
    pub symbol: String,
    /// The number alone, in the formula's unit, to be put in; empty where the formula's unit is
    /// another than the one shown.
    pub number: String,
    /// As shown: `236 r/min`.
    pub shown: String,
    /// Where it comes from, if it was given.
    pub origin: Option<Origin>,
    /// The step that made it, with its link, if one did.
    pub step: Option<(String, Href)>,
}

/// One step.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct CalcStep {
    /// Id on its sheet.
    pub id: String,
    /// Its number.
    pub number: String,
    /// What it works out.
    pub title: String,
    /// The formula in plain text, as the relation's record has it.
    pub formula: Option<String>,
    /// What goes in.
    pub with: Vec<Put>,
    /// The result as shown.
    pub result: String,
    /// A line under it: `governs the hot floor`.
    pub aside: String,
    /// The source.
    pub source: String,
    /// Remarks: out of range, extrapolated, tangent.
    pub notes: Vec<String>,
    /// Whether later steps use it.
    pub carried: bool,
    /// Whether it governs.
    pub governs: bool,
}

/// Something taken as true.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Assumption {
    /// `A-1`.
    pub id: String,
    /// What is taken as true.
    pub taken: Phrase,
    /// Why.
    pub because: String,
    /// What changes if it is wrong.
    pub otherwise: String,
}

/// Something missing.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct GapRow {
    /// `G-4`.
    pub id: String,
    /// Machine, where the list is the site's.
    pub machine: Option<Phrase>,
    /// What is missing.
    pub missing: String,
    /// Its plausible range, and on whose word.
    pub plausible: String,
    /// The margin over the range, drawn.
    pub bar: Option<GapBar>,
    /// The same in figures.
    pub range: String,
    /// What it would decide.
    pub decides: Phrase,
    /// The cheapest way to find out.
    pub ask: String,
}

/// The gaps of a machine or of the site, most telling first.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Gaps {
    /// The axis of the bars.
    pub head: Option<GapBar>,
    /// The gaps.
    pub rows: Vec<GapRow>,
    /// Gaps that change nothing, in a sentence.
    pub idle: Phrase,
}
