//! Which kind of file a text is, and of which edition of the format.

use super::keys::{Record, oil, samples, site};

/// A kind of file.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum FileKind {
    /// Machines, areas, house rules.
    Site,
    /// Oils and greases.
    Oils,
    /// The map of a laboratory's table.
    Samples,
    /// What was done to the oils.
    Events,
}

impl FileKind {
    /// Every kind.
    pub const ALL: &'static [Self] = &[Self::Site, Self::Oils, Self::Samples, Self::Events];

    /// The edition of the format this program reads.
    pub const EDITION: u32 = 1;

    /// The word behind `file:`.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Site => "site",
            Self::Oils => "oils",
            Self::Samples => "samples",
            Self::Events => "events",
        }
    }

    /// `site 1`: what stands behind `file:`.
    pub fn heading(self) -> String {
        format!("{} {}", self.word(), Self::EDITION)
    }

    /// The file read where none is named.
    pub fn default_name(self) -> String {
        format!("{}.yaml", self.word())
    }

    /// The keys at its top; of an oil file only `file`, beside the names of the oils.
    pub const fn record(self) -> &'static Record {
        match self {
            Self::Site => &site::SITE,
            Self::Oils => &oil::OIL_FILE,
            Self::Samples => &samples::SAMPLES,
            Self::Events => &samples::EVENTS,
        }
    }

    /// The record every name at its top stands for, beside the keys; only of oil files.
    pub const fn named(self) -> Option<&'static Record> {
        match self {
            Self::Oils => Some(&oil::OIL),
            _ => None,
        }
    }
}
