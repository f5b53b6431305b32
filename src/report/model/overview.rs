//! The site on one sheet.

use super::{
    Answer, AreaRow, Basis, Caution, Gaps, MachineRow, Mark, Phrase, RegisterGroup, SignOff,
};
use crate::report::draw::band::MiniBand;
use crate::report::draw::list_length::ListFigure;
use serde::{Deserialize, Serialize};

/// The overview.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Overview {
    /// The answer.
    pub answer: Answer,
    /// What to do first, in order.
    pub first: Vec<Phrase>,
    /// The caution.
    pub caution: Caution,
    /// The parts list, by state.
    pub groups: Vec<RegisterGroup>,
    /// The index of areas, on large sites.
    pub areas: Vec<AreaRow>,
    /// Needs and bands, machine by machine.
    pub machines: Vec<MachineRow>,
    /// The axis of the bands.
    pub band_axis: Option<MiniBand>,
    /// The oil list.
    pub oils: Vec<OilRow>,
    /// Shorter and longer lists.
    pub lists: Option<ListFigure>,
    /// What the lists cost, and the like.
    pub list_notes: Vec<Phrase>,
    /// Every oil on every machine, so many oils to a table as a page is wide.
    pub matrix: Vec<Matrix>,
    /// What is missing.
    pub gaps: Gaps,
    /// Tight verdicts accepted by name.
    pub accepted: Vec<AcceptRow>,
    /// The user's notes, Markdown.
    pub notes: Option<String>,
    /// What it rests on.
    pub basis: Basis,
    /// The signatures.
    pub sign: SignOff,
}

/// One oil of the proposed list.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct OilRow {
    /// The oil, with a link to its sheet.
    pub oil: Phrase,
    /// Its name.
    pub name: String,
    /// The machines it serves.
    pub machines: Phrase,
    /// Their fills, as shown.
    pub fill: String,
    /// The tightest of its verdicts.
    pub mark: Mark,
    /// Its margin and machine.
    pub tightest: String,
    /// The oils it replaces.
    pub replaces: String,
}

/// One oil on one machine.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct MatrixCell {
    /// The verdict; none where it was not weighed.
    pub mark: Option<Mark>,
    /// The smallest margin, or a short word: `barred`.
    pub text: String,
    /// The whole of it in words, for those who cannot see the mark.
    pub words: String,
    /// Whether it is proposed.
    pub picked: bool,
    /// Whether it is in use.
    pub in_use: bool,
}

/// One machine of the matrix.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct MatrixRow {
    /// The machine.
    pub tag: Phrase,
    /// Its cells, in the order of the oils.
    pub cells: Vec<MatrixCell>,
}

/// Every oil on every machine.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Matrix {
    /// The oils.
    pub oils: Vec<String>,
    /// The machines, by tag.
    pub rows: Vec<MatrixRow>,
}

/// A tight verdict accepted by name.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct AcceptRow {
    /// Machine.
    pub machine: Phrase,
    /// Oil.
    pub oil: String,
    /// By whom.
    pub by: String,
    /// On and until.
    pub dates: String,
    /// Why.
    pub because: String,
    /// Whether it still stands on the date of judgement.
    pub stands: bool,
}
