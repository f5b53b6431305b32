//! From verdicts to decisions: what would mend an oil, what one value would change, what is worth
//! finding out, how sure a verdict is, the shortest oil list, the pair of oils by season, the oil to
//! ask for.

pub mod accept;
pub mod ask;
pub mod gaps;
pub mod mend;
pub mod pool;
pub mod scatter;
pub mod season;
pub mod whatif;
