//! The four words, and what they are computed from.

use std::fmt;

/// A verdict, best first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Verdict {
    /// Every limit met, smallest margin at least the reserve.
    Holds,
    /// Every limit met, smallest margin below the reserve.
    Tight,
    /// Missing knowledge decides.
    Open,
    /// At least one limit not met.
    Fails,
}

impl Verdict {
    /// The word.
    pub fn word(self) -> &'static str {
        match self {
            Self::Holds => "holds",
            Self::Tight => "tight",
            Self::Open => "open",
            Self::Fails => "fails",
        }
    }
}

impl fmt::Display for Verdict {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.word())
    }
}
