//! From verdicts to decisions: mends, what-ifs, gaps and samplings, each against the reader and
//! the judge it claims to speak for.

pub(crate) mod gaps;
mod mend;
mod plant;
mod scatter;
mod sheet;
mod whatif;
