//! The register of machines, and the sheets it is parted into on large sites.

use super::{Mark, Phrase};
use crate::report::draw::band::MiniBand;
use crate::report::names::Href;
use serde::{Deserialize, Serialize};

/// One machine in the parts list.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct RegisterRow {
    /// Item number.
    pub item: u32,
    /// Tag, with a link to its sheet.
    pub tag: Phrase,
    /// Its name.
    pub name: String,
    /// The verdict on the oil in use.
    pub now_mark: Option<Mark>,
    /// The oil in use.
    pub now: String,
    /// The verdict on the oil proposed.
    pub mark: Option<Mark>,
    /// The oil proposed.
    pub oil: String,
    /// Numbers of conditions, in words: `2 conditions`.
    pub conditions: String,
    /// The next move.
    pub next: Phrase,
}

/// Machines of one state.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct RegisterGroup {
    /// `Needs attention`, `Not decided`, `Settled`.
    pub title: String,
    /// How many in all, also those on the areas' sheets.
    pub count: u32,
    /// The machines listed here.
    pub rows: Vec<RegisterRow>,
    /// What is listed elsewhere: `212 more on the sheets of their areas`.
    pub more: String,
}

/// One machine in the table of needs and bands.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct MachineRow {
    /// Its state, printed where it differs from the row above.
    pub group: Option<String>,
    /// Tag, with a link to its sheet.
    pub tag: Phrase,
    /// Its name and area.
    pub name: String,
    /// Its limits, one a line.
    pub needs: Vec<String>,
    /// The oil proposed.
    pub oil: String,
    /// The oil in use, if another.
    pub now: String,
    /// The verdict.
    pub mark: Option<Mark>,
    /// The smallest margin and its end: `+0.6 hot`.
    pub margin: String,
    /// The bands, drawn.
    pub band: Option<MiniBand>,
    /// The same in words.
    pub band_words: String,
    /// The next move.
    pub next: Phrase,
}

/// One area in the index of a large site.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct AreaRow {
    /// The area, or a part of it, as printed: `yard, sheet 1 of 3`.
    pub name: String,
    /// Its sheet.
    pub href: Href,
    /// First and last tag on it.
    pub tags: String,
    /// Machines on it.
    pub machines: u32,
    /// How many need attention.
    pub attention: u32,
    /// How many are not decided.
    pub undecided: u32,
    /// How many are settled.
    pub settled: u32,
}

/// The sheet of an area, at most a hundred machines.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct AreaSheet {
    /// Needs and bands, by state.
    pub machines: Vec<MachineRow>,
    /// The axis of the bands.
    pub band_axis: Option<MiniBand>,
    /// The caution.
    pub caution: super::Caution,
}
