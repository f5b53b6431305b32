//! What stands at the head and the foot of every sheet: answer, caution, conditions, signatures.

use super::{Mark, Phrase};
use serde::{Deserialize, Serialize};

/// The answer.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Answer {
    /// Its verdict, where it is one.
    pub mark: Option<Mark>,
    /// The answer in one line.
    pub headline: String,
    /// The reasons.
    pub sentences: Vec<Phrase>,
}

/// The caution under every answer, made from the rules applied in this run.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Caution {
    /// What was judged.
    pub judged: Vec<String>,
    /// What was not.
    pub not_judged: Vec<String>,
    /// Who outranks the sheet: the maker, local codes, licensed practice.
    pub defer: Vec<Phrase>,
    /// What is particular to this sheet.
    pub before: Vec<Phrase>,
}

/// A condition that rides along with a verdict.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Condition {
    /// Its number on the sheet.
    pub number: u32,
    /// What must be met.
    pub text: Phrase,
    /// The oils it rides with.
    pub oils: Vec<String>,
    /// The rule that asks it, with its source.
    pub rule: String,
}

/// A numbered caution of the rules, `C-1`.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct CautionNote {
    /// Its number.
    pub id: String,
    /// Its heading.
    pub title: String,
    /// Its words, Markdown.
    pub text: String,
}

/// On what the sheet rests.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Basis {
    /// Rules, curves, reserve.
    pub lines: Vec<Phrase>,
    /// Cautions.
    pub cautions: Vec<CautionNote>,
}

/// One signature.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct SignBox {
    /// `Prepared`, `Checked`, `Accepted for the works`.
    pub role: String,
    /// What the signature accepts.
    pub accepts: Phrase,
}

/// The signatures.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct SignOff {
    /// What signing means here.
    pub meaning: String,
    /// The boxes.
    pub boxes: Vec<SignBox>,
}
