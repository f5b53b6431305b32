//! One oil: its line, its figures, what does not add up, where it is weighed.

use super::{CalcStep, Caution, Curves, Mark, Origin, Phrase};
use serde::{Deserialize, Serialize};

/// The sheet of an oil.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct OilSheet {
    /// What it is, in one line.
    pub headline: String,
    /// What its figures rest on.
    pub because: String,
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
    /// Index and grades new and worn, polymer and shear.
    pub grades: Vec<(String, String)>,
    /// What is measured cold, pour point, designation.
    pub cold: Vec<(String, String)>,
    /// Where it reaches the limits of a start.
    pub starts: Vec<OilStart>,
    /// What the life rests on, or why there is no figure.
    pub life: Vec<(String, String)>,
    /// Life against temperature.
    pub lives: Vec<OilLife>,
    /// Where it is weighed.
    pub uses: Vec<OilUse>,
    /// What that table leaves out: machines the oil is barred from, and rows without room.
    pub more_uses: Phrase,
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

/// A limit of a cold start.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct OilStart {
    /// The temperature it is reached at, rounded up.
    pub at: String,
    /// The limit.
    pub limit: String,
    /// How far below the coldest point known, where it is.
    pub below: String,
    /// Whose limit it is.
    pub of: String,
    /// The step.
    pub step: String,
}

/// The life at one running temperature.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct OilLife {
    /// The temperature.
    pub at: String,
    /// By the equation, from wet and dirty to clean and dry.
    pub equation: String,
    /// By the rule of ten, the same.
    pub rule_of_ten: String,
    /// `other things end it first`.
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
