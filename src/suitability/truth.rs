//! Three-valued logic: what is not stated is neither true nor false.

/// False, not known, true, in that order: `and` is the least, `or` the greatest.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Truth {
    /// It does not hold.
    False,
    /// A fact is missing.
    Unknown,
    /// It holds.
    True,
}

impl From<bool> for Truth {
    fn from(holds: bool) -> Self {
        if holds { Self::True } else { Self::False }
    }
}
