//! What is in the machines, against the label and against the need.

use super::{Answer, CalcStep, Caution, Mark, Phrase, SignOff};
use crate::report::draw::trend::TrendPanel;
use serde::{Deserialize, Serialize};

/// The audit.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct AuditSheet {
    /// The answer.
    pub answer: Answer,
    /// The caution.
    pub caution: Caution,
    /// Label against service.
    pub cross: Vec<CrossRow>,
    /// Findings, most pressing first.
    pub findings: Vec<Finding>,
    /// The trend of each machine.
    pub panels: Vec<Panel>,
    /// What the panels share: scale, tolerance, span of time.
    pub panels_caption: String,
    /// The samples.
    pub samples: Vec<SampleRow>,
    /// One sample worked through.
    pub steps: Vec<CalcStep>,
    /// Which sample.
    pub steps_title: String,
    /// How far to trust it.
    pub trust: Vec<Phrase>,
    /// The signatures.
    pub sign: SignOff,
}

/// Machines in one cell of the table of label against service.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct CrossCell {
    /// How many.
    pub count: u32,
    /// Which.
    pub machines: Phrase,
    /// What it means for what to do.
    pub means: String,
}

/// One row of it: `as labelled`, `the labelled oil, changed`, `another oil`, `not known`.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct CrossRow {
    /// The row's words.
    pub label: String,
    /// A line under them.
    pub note: String,
    /// Those that serve; none where service is not known.
    pub serves: Option<CrossCell>,
    /// Those that do not, or all of a row where service is not known.
    pub not: CrossCell,
}

/// Evidence for or against a cause.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Evidence {
    /// The cause.
    pub cause: String,
    /// What speaks for it.
    pub speaks_for: Vec<String>,
    /// What speaks against it.
    pub against: Vec<String>,
}

/// One finding.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Finding {
    /// Id on its sheet.
    pub id: String,
    /// Its number.
    pub number: u32,
    /// `watch` or `act`.
    pub level: String,
    /// Machines and what is the matter.
    pub title: String,
    /// What was found.
    pub text: Phrase,
    /// Likely causes.
    pub causes: Vec<Evidence>,
    /// What to do.
    pub what: Phrase,
}

/// One machine's trend.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Panel {
    /// Its tag.
    pub tag: String,
    /// The label.
    pub label: String,
    /// The verdict on the latest sample.
    pub mark: Mark,
    /// The figure.
    pub figure: TrendPanel,
}

/// One sample.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct SampleRow {
    /// Machine.
    pub machine: Phrase,
    /// Label.
    pub label: String,
    /// Drawn on.
    pub drawn: String,
    /// ν at 40 °C.
    pub nu40: String,
    /// ν at 100 °C.
    pub nu100: String,
    /// As labelled, with the difference.
    pub as_labelled: String,
    /// What the machine asks at 40 °C.
    pub asks: String,
    /// The verdict.
    pub mark: Mark,
    /// The margins.
    pub margins: Vec<String>,
    /// The laboratory's flags, passed on.
    pub flags: String,
    /// Why there is no sample to judge; then the rest is empty.
    pub missing: String,
}
