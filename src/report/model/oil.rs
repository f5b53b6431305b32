//! One oil: its line, its figures, what does not add up, where it is weighed.

use super::{CalcStep, Caution, Curves, Mark, Origin, Phrase};
use serde::{Deserialize, Serialize};

/// The sheet of an oil.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct OilSheet {
    /// What it is, in one line.
    pub headline: String,
    /// What is known of it: grade, base, additives, classes.
    pub facts: Vec<(String, String)>,
    /// The caution.
    pub caution: Caution,
    /// What does not add up.
    pub findings: Vec<Phrase>,
    /// Its line.
    pub curves: Option<Curves>,
    /// Its viscosities.
    pub points: Vec<OilPoint>,
    /// Heads of their columns after the temperature: `new, mm²/s`, `sheared, mm²/s`.
    pub columns: Vec<String>,
    /// Where it is weighed.
    pub uses: Vec<OilUse>,
    /// The calculation.
    pub steps: Vec<CalcStep>,
}

/// The oil at one temperature.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct OilPoint {
    /// The temperature as shown.
    pub at: String,
    /// The values, in the order of the columns.
    pub values: Vec<String>,
    /// Where the value comes from, if it was stated.
    pub origin: Option<Origin>,
    /// `extrapolated 58 K below the coldest stated point`.
    pub remark: String,
}

/// The oil on one machine.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct OilUse {
    /// The machine.
    pub machine: Phrase,
    /// Its name.
    pub name: String,
    /// The verdict; none where barred.
    pub mark: Option<Mark>,
    /// `in use`, `proposed`, `barred`.
    pub role: String,
    /// The smallest margin, or the rule that bars.
    pub says: String,
}
