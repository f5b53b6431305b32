//! The oils weighed: verdict, margins, reason; and those that were not.

use super::{Mark, Phrase};
use crate::report::draw::margin_bars::MarginBars;
use serde::{Deserialize, Serialize};

/// One oil weighed.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Candidate {
    /// Its letter, the same in figures and tables.
    pub letter: String,
    /// Its id in the list.
    pub oil: Phrase,
    /// Its name.
    pub name: String,
    /// Whether it is proposed.
    pub picked: bool,
    /// Whether it is in the machine now.
    pub in_use: bool,
    /// The verdict.
    pub mark: Mark,
    /// Viscosity at the governing hot temperature, as shown.
    pub hot: String,
    /// At the start temperature.
    pub cold: String,
    /// The margins, drawn.
    pub bars: MarginBars,
    /// The margins in words, for those who cannot see the bars.
    pub margins: String,
    /// The margins in kelvins: `pour +8.0 K, oil's limit +33.0 K`.
    pub kelvins: String,
    /// Numbers of the conditions that ride along.
    pub conditions: Vec<u32>,
    /// Why.
    pub reason: Phrase,
}

/// The oils weighed, best first.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Candidates {
    /// The limits and the reserve, for the caption.
    pub limits: String,
    /// Unit and temperature of the hot column: `mm²/s, 78 °C`.
    pub hot_head: String,
    /// Of the cold column.
    pub cold_head: String,
    /// The oils.
    pub rows: Vec<Candidate>,
    /// The order in words.
    pub order: String,
    /// Oils not weighed and why, by reason.
    pub not_weighed: Vec<NotWeighed>,
    /// Remarks of suitability rules on the oils weighed.
    pub notes: Vec<Phrase>,
}

/// Oils left out for one reason.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct NotWeighed {
    /// The oils.
    pub oils: Vec<String>,
    /// Why.
    pub because: String,
}

/// An oil barred by a suitability rule.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Barred {
    /// Its id in the list.
    pub oil: Phrase,
    /// Its name.
    pub name: String,
    /// Whether it is in the machine now.
    pub in_use: bool,
    /// The rule.
    pub rule: String,
    /// Why it bars.
    pub reason: Phrase,
    /// The rule's source and how sure it is.
    pub source: String,
}

/// The smallest change that would make one oil hold.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct ChangeRow {
    /// Its letter.
    pub letter: String,
    /// The oil.
    pub oil: String,
    /// The ambient it covers now.
    pub covers: String,
    /// What would make it hold.
    pub change: Phrase,
    /// What then.
    pub then: String,
}

/// What would change the verdicts.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Changes {
    /// Oil by oil.
    pub rows: Vec<ChangeRow>,
    /// What would unsettle the proposal.
    pub unsettles: Vec<Phrase>,
    /// What to ask a supplier for, where no oil on the list serves.
    pub ask_for: Vec<Phrase>,
}
