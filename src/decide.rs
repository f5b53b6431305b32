//! From verdicts to decisions: the shortest oil list, the pair of oils by season, the oil to ask
//! for.

pub mod accept;
pub mod pool;
