//! From verdicts to decisions: what would mend an oil, what one value would change, what is worth
//! finding out, how sure a verdict is.

pub mod gaps;
pub mod mend;
pub mod scatter;
pub mod whatif;
